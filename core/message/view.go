package message

import (
	"cmp"
	"slices"
	"strconv"

	"weirmark/core/notice"
	"weirmark/core/quantity"
	"weirmark/core/sentence"
	"weirmark/core/study"
)

// View is everything the page shows of the study: it renders this and knows
// no word or number of its own.
type View struct {
	Title     string             `json:"title"`
	Purpose   string             `json:"purpose"`
	Status    string             `json:"status"` // draft, checked, approved
	Unsaved   bool               `json:"unsaved"`
	Undo      string             `json:"undo"` // what would be undone; empty: nothing
	Redo      string             `json:"redo"`
	Selected  string             `json:"selected"`
	Statement sentence.Statement `json:"statement"`
	Spoken    string             `json:"spoken"` // the statement as one text, for a screen reader
	Next      *NextPoint         `json:"next"`   // the next job, of the selected cell first
	OpenCount int                `json:"open_count"`
	Board     Board              `json:"board"`
	Courses   []Course           `json:"courses"`
	Names     Names              `json:"names"`
	Clashes   []string           `json:"clashes"` // what of the files contradicts each other, in any cell
	Slips     []SlipCard         `json:"slips"`
	Sources   []SourceCard       `json:"sources"`
	Excluded  []ExcludedCard     `json:"excluded"` // stations that were taken out, to take them back
	Lists     []EntryList        `json:"lists"`    // what a person enters for the question, in the order of use
	People    []Entry            `json:"people"`
	Files     []FileCard         `json:"files"`
	Log       []study.Entry      `json:"log"`
	Notices   []string           `json:"notices"` // of opening the study
	Veiled    bool               `json:"veiled"`  // the comparison is covered until asked for
	Reveal    study.Target       `json:"reveal"`
}

// NextPoint is an open point with the cell it belongs to.
type NextPoint struct {
	Cell string     `json:"cell"`
	Open study.Open `json:"open"`
}

// Board is the tally of all cells: rows are questions, columns models.
type Board struct {
	Models  []string   `json:"models"`
	Rows    []BoardRow `json:"rows"`
	Summary string     `json:"summary"`
}

// BoardRow is one question.
type BoardRow struct {
	Case     string       `json:"case"`
	Quantity string       `json:"quantity"`
	Stations string       `json:"stations"`
	Cells    []*BoardCell `json:"cells"` // in the order of Models; null where there is none
}

// BoardCell is one stack of five courses.
type BoardCell struct {
	ID      string         `json:"id"`
	Courses [5]study.State `json:"courses"`
	Letter  string         `json:"letter"` // S, N, ?, or empty
	Spoken  string         `json:"spoken"`
}

// Course is one course of evidence of the selected cell.
type Course struct {
	Question string       `json:"question"`
	Answer   string       `json:"answer"`
	State    study.State  `json:"state"`
	Numbers  []Headline   `json:"numbers"`
	Doubts   []study.Open `json:"doubts"`
	Notes    []string     `json:"notes"`
	Figures  []CellFigure `json:"figures"`
	Tables   []Table      `json:"tables"`
}

// Headline is a number with its name.
type Headline struct {
	Value string `json:"value"`
	Name  string `json:"name"`
}

// Table is a table to show, as texts.
type Table struct {
	Title string     `json:"title"`
	Head  []string   `json:"head"`
	Rows  [][]string `json:"rows"`
}

// Option is one choice of an entry.
type Option struct {
	Value string `json:"value"`
	Label string `json:"label"`
}

// Entry is something a person can enter or accept.
type Entry struct {
	Target  study.Target    `json:"target"`
	Label   string          `json:"label"`
	Value   string          `json:"value"`
	By      study.Certainty `json:"by"`
	Options []Option        `json:"options"` // empty: free text
	Hint    string          `json:"hint"`
	Open    bool            `json:"open"`  // a guess to accept or a gap to fill
	Aside   bool            `json:"aside"` // nothing is said of it and nothing has to be
}

// EntryList is a list that a person can add to and take from. Where Add is
// null the items are fixed.
type EntryList struct {
	Course int           `json:"course"` // 0 to 4: where it belongs
	Title  string        `json:"title"`
	Hint   string        `json:"hint"`
	Main   bool          `json:"main"` // always in sight
	Add    *study.Target `json:"add"`
	Items  []EntryItem   `json:"items"`
}

// EntryItem is one item of a list. Remove is null where it cannot be removed.
type EntryItem struct {
	Remove  *study.Target `json:"remove"`
	Entries []Entry       `json:"entries"`
}

// Names is how the names of files are read: the pattern, what it makes of
// each name, and what does not fit or is said twice.
type Names struct {
	Pattern Entry    `json:"pattern"`
	Table   *Table   `json:"table"` // null where there is no pattern
	Notices []string `json:"notices"`
}

// SlipCard says what was read of one table and how it is used.
type SlipCard struct {
	ID      string   `json:"id"`
	File    string   `json:"file"` // ID
	Name    string   `json:"name"`
	Read    string   `json:"read"` // what was read, in words
	Entries []Entry  `json:"entries"`
	Open    int      `json:"open"`  // guesses to accept and gaps to fill
	Group   string   `json:"group"` // tables of one shape have the same; empty: not used
	Odd     string   `json:"odd"`   // how it differs from most of its group
	Notices []string `json:"notices"`
	Sketch  Sketch   `json:"sketch"`
}

// Sketch is a small picture of the chosen columns: points scaled to 0 to 1,
// beside those of the other slips of the question.
type Sketch struct {
	Own    [][2]study.Number   `json:"own"`
	Others [][][2]study.Number `json:"others"`
	Zero   study.Number        `json:"zero"` // where a value of zero lies, perhaps outside; null without points
}

// SourceCard is one line of the uncertainty budget with its entries.
type SourceCard struct {
	Target  study.Target `json:"target"` // to remove it; empty kind: computed, cannot be removed
	Text    string       `json:"text"`
	Share   string       `json:"share"`
	Of      string       `json:"of"`
	Pattern string       `json:"pattern"`
	Entries []Entry      `json:"entries"`
	Leads   []string     `json:"leads"` // the words before each entry: together they read as a sentence
}

// ExcludedCard is a station that a person took out of the comparison.
type ExcludedCard struct {
	Target study.Target `json:"target"` // to include it again
	Text   string       `json:"text"`
}

// FileCard is a file of the study.
type FileCard struct {
	ID      string   `json:"id"`
	Name    string   `json:"name"`
	SHA256  string   `json:"sha256"`
	Size    string   `json:"size"`
	Uses    []string `json:"uses"`
	Rejects []string `json:"rejects"` // why nothing of it could be used
	Stated  []string `json:"stated"`  // what the file says of itself
	Reading []Entry  `json:"reading"` // answers to what the reader asked
}

// view evaluates the study and lays it out for the page.
func (s *Session) view() (*View, error) {
	options := study.Options{Read: s.readOnce}
	report := study.Evaluate(s.study, options)
	v := &View{
		Title: s.study.Title, Purpose: s.study.Purpose, Status: status(s.study), Unsaved: len(s.study.Log) > s.saved,
		Board: board(&report), Courses: []Course{}, Names: names(s.study), Slips: s.slipCards(), Sources: []SourceCard{}, Lists: []EntryList{}, Excluded: []ExcludedCard{},
		People: people(s.study), Files: s.fileCards(&report), Log: report.Log, Notices: []string{},
	}
	if n := len(s.past); n > 0 {
		v.Undo = s.past[n-1].what
	}
	if n := len(s.future); n > 0 {
		v.Redo = s.future[n-1].what
	}
	for _, n := range s.notices {
		v.Notices = append(v.Notices, n.Text)
	}
	at := s.selectedCell(&report)
	v.Clashes = clashes(&report)
	for i := range report.Cells {
		v.OpenCount += len(report.Cells[i].Open)
	}
	v.Next = next(&report, at)
	if at < 0 {
		v.Statement = sentence.Statement{Status: sentence.Withheld, Phrases: []study.Phrase{{Text: nothingYet(s.study)}}}
		v.Spoken = v.Statement.Text()
		return v, nil
	}
	c := &report.Cells[at]
	options.Memory = &s.near
	*c = study.Closely(s.study, options, c) // of the others no word is shown
	s.walk, s.walkOf, s.whole = study.NewWalk(s.study, study.Options{Read: s.readOnce}, &report), s.study, false
	v.Selected = cellID(at)
	v.Statement = sentence.Of(c)
	v.Spoken = v.Statement.Text()
	q := s.study.Question(c.Case, c.Quantity)
	v.Reveal = study.Target{Kind: "question", ID: questionID(q)}
	v.Veiled = c.Summary != nil && c.Requirement == nil && !q.Revealed
	if v.Veiled {
		v.Statement = sentence.Veiled(c)
		v.Spoken = v.Statement.Text()
	}
	figures, err := figuresOfQuestion(&report, at, themeOf(s.theme))
	if err != nil {
		return nil, err
	}
	v.Courses = courses(c, cellFigures(figures, c), v.Veiled)
	v.Sources = sourceCards(q, c)
	v.Lists = entryLists(s.study, q, c)
	v.Courses[1].Tables = append(v.Courses[1].Tables, codeTables(&report)...)
	for _, e := range c.Excluded {
		v.Excluded = append(v.Excluded, ExcludedCard{
			Target: study.Target{Kind: "question", ID: questionID(q), Field: strconv.Itoa(e.Line)},
			Text:   cmp.Or(c.XName, "x") + " = " + written(e.X) + ", D = " + written(e.D) + ", line " + strconv.Itoa(e.Line) + ": " + e.Why,
		})
	}
	return v, nil
}

// clashes lists, once each, copies of a file and the open findings of the
// third course that hold one file against another: they are told beside the
// slips, before anything is accepted.
func clashes(r *study.Report) []string {
	list := []string{}
	for _, n := range r.Notices {
		if n.Code == "files-identical" {
			list = append(list, n.Text)
		}
	}
	for i := range r.Cells {
		for _, o := range r.Cells[i].Open {
			if o.Course == 2 && o.Target.Kind == "answer" && !slices.Contains(list, o.Text) {
				list = append(list, o.Text)
			}
		}
	}
	return list
}

func nothingYet(s *study.Study) string {
	if len(s.Files) == 0 {
		return "No statement: no file has been given. Drop simulated and measured tables anywhere on this page."
	}
	return "No statement: no table has a role, a case and a quantity yet. Accept or correct what the slips below say."
}

func questionID(q *study.Question) string { return q.Case + "|" + q.Quantity }

// status is the state of the study as its signatures record it.
func status(s *study.Study) string {
	switch {
	case s.Approved.Name != "":
		return "approved"
	case s.Checked.Name != "":
		return "checked"
	}
	return "draft"
}

// selectedCell returns the index of the cell that was chosen, else the first
// that is stated, else the first; -1 where there is none.
func (s *Session) selectedCell(r *study.Report) int {
	for i := range r.Cells {
		if cellID(i) == s.selected {
			return i
		}
	}
	if len(r.Cells) == 0 {
		return -1
	}
	return 0
}

// next is the first open point of the selected cell, else of any other.
func next(r *study.Report, at int) *NextPoint {
	if at < 0 {
		return nil
	}
	for step := range r.Cells {
		i := (at + step) % len(r.Cells)
		if open := r.Cells[i].Open; len(open) > 0 {
			return &NextPoint{cellID(i), open[0]}
		}
	}
	return nil
}

// board tallies all cells.
func board(r *study.Report) Board {
	b := Board{Models: []string{}, Rows: []BoardRow{}}
	column := map[string]int{}
	for i := range r.Cells {
		if _, known := column[r.Cells[i].Model]; !known {
			column[r.Cells[i].Model] = len(b.Models)
			b.Models = append(b.Models, r.Cells[i].Model)
		}
	}
	complete, doubts, empty := 0, 0, 0
	for i := range r.Cells {
		c := &r.Cells[i]
		if i == 0 || !sameQuestion(c, &r.Cells[i-1]) {
			b.Rows = append(b.Rows, BoardRow{Case: c.Case, Quantity: c.Quantity, Cells: make([]*BoardCell, len(b.Models)), Stations: stationsOf(c)})
		}
		cell := boardCell(cellID(i), c)
		b.Rows[len(b.Rows)-1].Cells[column[c.Model]] = cell
		switch {
		case c.Summary == nil:
			empty++
		case len(c.Open) > 0:
			doubts++
		default:
			complete++
		}
	}
	b.Summary = quantity.Counted(len(r.Cells), "cell") + ": " + strconv.Itoa(complete) + " complete, " + strconv.Itoa(doubts) + " with doubts, " + strconv.Itoa(empty) + " with nothing compared. A blank low in a stack is the next job."
	return b
}

func stationsOf(c *study.Cell) string {
	if c.Summary == nil {
		return ""
	}
	if c.Scalar {
		return "one value"
	}
	return strconv.Itoa(c.Summary.N) + " of " + quantity.Counted(c.StationsAll, "station")
}

var courseNames = [5]string{"settled", "fine enough", "same thing", "agreement", "what can be said"}

func boardCell(id string, c *study.Cell) *BoardCell {
	b := &BoardCell{ID: id, Courses: c.Courses}
	outcome := ""
	if c.Requirement != nil && !c.Withheld {
		outcome = c.Requirement.Outcome
		b.Letter = map[string]string{study.Shown: "S", study.NotMet: "N", study.NotResolved: "?"}[outcome]
	}
	b.Spoken = c.Case + " " + c.Quantity + ", model " + c.Model + ": "
	for i, state := range c.Courses {
		b.Spoken += courseNames[i] + " " + string(state) + ", "
	}
	b.Spoken += quantity.Counted(len(c.Open), "open point")
	if outcome != "" {
		b.Spoken += ", requirement " + outcome
	}
	return b
}

// cellFigures returns the figures of a cell and those its models share.
func cellFigures(all []CellFigure, c *study.Cell) []CellFigure {
	var own []CellFigure
	for _, f := range all {
		if f.Case == c.Case && f.Quantity == c.Quantity && (f.Model == c.Model || f.Model == "") {
			own = append(own, f)
		}
	}
	return own
}

// fileCards lists the files with what was refused, what they say of
// themselves, and the answers to what the reader asked.
func (s *Session) fileCards(r *study.Report) []FileCard {
	cards := []FileCard{}
	for _, f := range r.Files {
		card := FileCard{ID: f.ID, Name: f.Name, SHA256: f.SHA256, Size: quantity.Counted(f.Bytes, "byte"), Uses: f.Uses, Rejects: []string{}, Stated: []string{}, Reading: []Entry{}}
		asked := map[string]string{} // by code
		for _, n := range r.Notices {
			switch {
			case n.File != f.Name:
			case n.Severity == notice.Stop:
				card.Rejects = append(card.Rejects, n.Text)
			case n.Severity == notice.Ask:
				asked[n.Code] = n.Text
			}
		}
		if file := s.study.File(f.ID); file != nil {
			for _, m := range s.readOnce(*file).Meta {
				card.Stated = append(card.Stated, m.Key+": "+m.Value)
			}
			card.Reading = readingEntries(file, asked)
		}
		cards = append(cards, card)
	}
	return cards
}

// people are the entries of title, purpose and signatures.
func people(s *study.Study) []Entry {
	entry := func(field, label, value, hint string) Entry {
		return Entry{Target: study.Target{Kind: "study", Field: field}, Label: label, Value: value, By: study.Entered, Options: []Option{}, Hint: hint}
	}
	weight := func(field, label, value string) Entry {
		e := entry(field, label, value, "lists the evidence that a reader may expect; no score is made of it")
		e.Options = []Option{{"", "–"}, {study.Low, "low"}, {study.Medium, "medium"}, {study.High, "high"}}
		return e
	}
	return []Entry{
		entry("title", "Title", s.Title, ""),
		entry("purpose", "Purpose and intended use", s.Purpose, "for which decision, and whose"),
		weight("context.influence", "Influence of the simulation on the decision", s.Context.Influence),
		weight("context.consequence", "Consequence of a wrong decision", s.Context.Consequence),
		entry("prepared.name", "Prepared by", s.Prepared.Name, "a recorded statement, not an authenticated signature"),
		entry("prepared.date", "on", s.Prepared.Date, "date"),
		entry("checked.name", "Checked by", s.Checked.Name, ""),
		entry("checked.date", "on", s.Checked.Date, "date"),
		entry("approved.name", "Approved by", s.Approved.Name, ""),
		entry("approved.date", "on", s.Approved.Date, "date"),
	}
}
