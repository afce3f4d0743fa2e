package message

import (
	"weirmark/core/chart"
	"weirmark/core/memo"
	"weirmark/core/notice"
	"weirmark/core/sentence"
	"weirmark/core/study"
)

// Results are the report of a study with its statements and figures.
type Results struct {
	Report     study.Report    `json:"report"`
	Statements []CellStatement `json:"statements"`
	Figures    []CellFigure    `json:"figures"`
}

// CellStatement is the statement of one cell, also as plain text.
type CellStatement struct {
	Cell     string             `json:"cell"`
	Case     string             `json:"case"`
	Quantity string             `json:"quantity"`
	Model    string             `json:"model"`
	Text     string             `json:"text"`
	Sentence sentence.Statement `json:"sentence"`
}

// CellFigure is a figure of one cell, or of all models of a question where
// Model is empty.
type CellFigure struct {
	Case     string       `json:"case"`
	Quantity string       `json:"quantity"`
	Model    string       `json:"model"`
	Figure   chart.Figure `json:"figure"`
}

// report evaluates the study of the session.
func (s *Session) report() study.Report {
	return study.Evaluate(s.study, study.Options{Read: s.readOnce, Alternatives: true, Memory: &s.memory})
}

// results evaluates the study: the report, the statements, and the figures as
// options that a host draws.
func results(s *Session, q *Request, _ [][]byte, r *Reply) ([][]byte, error) {
	if s.study == nil {
		return nil, notice.New("request-study")
	}
	report := s.report()
	figures, err := figuresOf(&report, themeOf(q.Theme))
	if err != nil {
		return nil, err
	}
	r.Results = &Results{Report: report, Statements: statements(&report), Figures: figures}
	for _, c := range report.Cells {
		if c.Withheld {
			r.Status = Incomplete
		}
	}
	if len(report.Cells) == 0 {
		r.Status = Incomplete
	}
	for _, f := range report.Files {
		if !f.Matches {
			r.Status = Refused
		}
	}
	return nil, nil
}

func themeOf(name string) chart.Theme {
	if name == "" {
		return chart.Light
	}
	return chart.Theme(name)
}

func statements(report *study.Report) []CellStatement {
	list := []CellStatement{}
	for i := range report.Cells {
		c := &report.Cells[i]
		of := sentence.Of(c)
		list = append(list, CellStatement{cellID(i), c.Case, c.Quantity, c.Model, of.Text(), of})
	}
	return list
}

// figuresOf draws the overview of several cells, which is of no case, then every
// cell, and the models of a question together where there are several.
func figuresOf(report *study.Report, theme chart.Theme) ([]CellFigure, error) {
	list := []CellFigure{}
	if intervals(report.Cells) > 1 {
		f, err := chart.Overview(report.Cells, theme)
		if err != nil {
			return nil, err
		}
		list = append(list, CellFigure{Figure: f})
	}
	for i := range report.Cells {
		if i > 0 && sameQuestion(&report.Cells[i-1], &report.Cells[i]) {
			continue
		}
		figures, err := figuresOfQuestion(report, i, theme)
		if err != nil {
			return nil, err
		}
		list = append(list, figures...)
	}
	return list, nil
}

// figuresOfQuestion draws the cells of the question that a cell belongs to;
// they lie side by side in the report.
func figuresOfQuestion(report *study.Report, at int, theme chart.Theme) ([]CellFigure, error) {
	first, last := at, at
	for first > 0 && sameQuestion(&report.Cells[first-1], &report.Cells[at]) {
		first--
	}
	for last < len(report.Cells) && sameQuestion(&report.Cells[at], &report.Cells[last]) {
		last++
	}
	list, shared := []CellFigure{}, false
	group := report.Cells[first:last]
	if drawn := together(group); len(drawn) > 1 {
		f, err := chart.Compared(drawn, cellID(first), theme)
		if err != nil {
			return nil, err
		}
		list = append(list, CellFigure{group[0].Case, group[0].Quantity, "", f})
		shared = group[0].Scalar // one picture of intervals holds all models
	}
	for j := first; j < last; j++ {
		c := &report.Cells[j]
		figures, err := chart.Figures(*c, cellID(j), theme)
		if err != nil {
			return nil, err
		}
		for _, f := range figures {
			if shared && courseOfFigure(f) == comparison {
				continue
			}
			list = append(list, CellFigure{c.Case, c.Quantity, c.Model, f})
		}
	}
	return list, nil
}

// comparison is the course of the figures that show E.
const comparison = 3

// intervals counts the cells that state an interval of the model error.
func intervals(cells []study.Cell) int {
	n := 0
	for _, c := range cells {
		if !c.Withheld && c.Summary != nil && c.Summary.Tested > 0 {
			n++
		}
	}
	return n
}

func sameQuestion(a, b *study.Cell) bool { return a.Case == b.Case && a.Quantity == b.Quantity }

// together returns the cells of a question that can share one overlay.
func together(cells []study.Cell) []study.Cell {
	var drawn []study.Cell
	for _, c := range cells {
		if c.Scalar == cells[0].Scalar && len(c.Stations) > 0 && c.Unit == cells[0].Unit && c.XUnit == cells[0].XUnit {
			drawn = append(drawn, c)
		}
	}
	return drawn
}

// writeMemo returns the memo as HTML, with the drawings the host has made of
// the figures.
func writeMemo(s *Session, q *Request, _ [][]byte, r *Reply) ([][]byte, error) {
	if s.study == nil {
		return nil, notice.New("request-study")
	}
	report := s.report()
	figures, err := figuresOf(&report, chart.Light)
	if err != nil {
		return nil, err
	}
	data, err := s.study.Save()
	if err != nil {
		return nil, err
	}
	in := memo.Input{Report: report, Product: Product + " " + Version, Edition: report.Edition, Made: q.At, Hash: study.Hash(data)}
	for _, f := range statements(&report) {
		in.Statements = append(in.Statements, memo.Statement{Case: f.Case, Quantity: f.Quantity, Model: f.Model, Status: f.Sentence.Status, Phrases: f.Sentence.Phrases})
	}
	for _, f := range figures {
		in.Figures = append(in.Figures, memo.Figure{Case: f.Case, Quantity: f.Quantity, Model: f.Model, ID: f.Figure.ID, Title: f.Figure.Title,
			Caption: f.Figure.Caption, Alt: f.Figure.Alt, SVG: q.Drawings[f.Figure.ID], Head: f.Figure.Table.Head, Rows: f.Figure.Table.Rows})
	}
	r.Files = []string{fileName(s.study.Title, "memo.html")}
	return [][]byte{memo.HTML(memo.Document(in))}, nil
}

// writeStations returns the station tables of all cells as CSV.
func writeStations(s *Session, _ *Request, _ [][]byte, r *Reply) ([][]byte, error) {
	if s.study == nil {
		return nil, notice.New("request-study")
	}
	data, err := memo.Stations(s.report().Cells)
	if err != nil {
		return nil, err
	}
	r.Files = []string{fileName(s.study.Title, "stations.csv")}
	return [][]byte{data}, nil
}
