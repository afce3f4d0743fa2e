package study

import (
	"encoding/json"

	"weirmark/core/settling"
	"weirmark/core/tablefile"
)

// Memory keeps the cells of one evaluation for the next, so that a change
// evaluates only what it touches. A cell is taken from it when everything it
// is made of is the same: the result is that of a fresh evaluation.
type Memory struct {
	cells  map[string]Cell
	next   map[string]Cell
	judged map[judgedSeries]settling.Monitor
}

// ingredients is everything that a cell is made of.
type ingredients struct {
	Question    *Question
	Model       string
	Slips       []*Slip
	Files       []string // hash and name of the file of each slip; empty where it was not used
	Readings    []*tablefile.Options
	Answers     []map[string]string
	Cases       []Card
	Application []Condition
	Quality     []Quality
	Context     Context
	Checked     Signature
	Recorded    []string     // times of the log entries that the question names
	Names       []string     // of all questions, where a point of application is stated
	Conditions  [][]Matching // of all questions, where a point of application is stated
	Questions   []Question   // all, where a grid uncertainty is borrowed or a change from another case is compared
	Alternative bool
}

// key returns a text that is equal for equal ingredients.
func (e *evaluation) key(q *Question, model string) string {
	in := ingredients{Question: q, Model: model, Cases: e.study.Cases, Application: e.study.Application, Quality: e.study.Quality, Context: e.study.Context, Checked: e.study.Checked, Alternative: e.options.Alternatives}
	for i := range e.study.Slips {
		p := &e.study.Slips[i]
		if !q.concerns(p) && !q.borrows() {
			continue
		}
		in.Slips = append(in.Slips, p)
		file := ""
		if f, used := e.files[p.File]; used {
			file = f.SHA256 + " " + f.Name
		}
		in.Files = append(in.Files, file)
		if f := e.study.File(p.File); f != nil {
			in.Readings, in.Answers = append(in.Readings, f.Reading), append(in.Answers, f.Answers)
		}
	}
	for _, r := range q.recordedIn() {
		if r.In >= 1 && r.In <= len(e.study.Log) {
			in.Recorded = append(in.Recorded, e.study.Log[r.In-1].At)
		}
	}
	if len(e.study.Application) > 0 {
		for i := range e.study.Questions {
			in.Conditions = append(in.Conditions, e.study.Questions[i].Conditions)
			in.Names = append(in.Names, e.study.Questions[i].id())
		}
	}
	if q.borrows() {
		in.Questions = e.study.Questions
	}
	text, err := json.Marshal(in)
	if err != nil {
		return "" // a number that is not finite: such a cell is evaluated anew
	}
	return string(text)
}

// borrows reports whether a cell of the question rests on another question.
func (q *Question) borrows() bool {
	return q.Family != nil && q.Family.Borrow != nil || q.Baseline != ""
}

// concerns reports whether a slip is one of those that a cell of the question
// may be made of.
func (q *Question) concerns(p *Slip) bool {
	if p.Case.Value != q.Case {
		return false
	}
	return p.Quantity.Value == q.Quantity || !p.Quantity.Given() || q.StandIn != nil && p.Quantity.Value == q.StandIn.Quantity
}

// remembered evaluates a cell, or takes it from memory.
func (e *evaluation) remembered(q *Question, model string) Cell {
	m := e.options.Memory
	if m == nil {
		return e.cell(q, model)
	}
	key := e.key(q, model)
	c, known := m.cells[key]
	if !known || key == "" {
		c = e.cell(q, model)
	}
	m.next[key] = c
	return c
}

// mostJudged is the number of judged monitors above which all are forgotten.
const mostJudged = 2000

// monitors returns the judged monitors to look in and add to.
func (m *Memory) monitors() map[judgedSeries]settling.Monitor {
	if m.judged == nil || len(m.judged) > mostJudged {
		m.judged = map[judgedSeries]settling.Monitor{}
	}
	return m.judged
}

// begin and end bound an evaluation: cells it did not ask for are forgotten.
func (m *Memory) begin() { m.next = map[string]Cell{} }

func (m *Memory) end() { m.cells, m.next = m.next, nil }
