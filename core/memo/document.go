package memo

import (
	"fmt"
	"strings"

	"weirmark/core/quantity"
	"weirmark/core/study"
)

// builder counts what is numbered while the document is made in order.
type builder struct {
	in         Input
	statements map[key]Statement
	assumed    []assumption
	section    [3]int
	figures    int
	lacking    []string // what a cell has not, printed at its end
	tables     int
	data       []Node // tables behind figures of no cell, printed together
	printed    []bool // which figures stand in the document
}

// Document returns the memo as one tree.
func Document(in Input) Node {
	if in.Edition == "" {
		in.Edition = in.Report.Edition
	}
	b := &builder{in: in, statements: statementsOf(in.Statements), printed: make([]bool, len(in.Figures))}
	b.assumed = assumptions(in)
	root := Node{Kind: Root, Text: titleOf(in.Report)}
	root.Nodes = append(root.Nodes, b.running()...)
	root.Nodes = append(root.Nodes, b.identity()...)
	for _, part := range []func() Node{
		b.statementSection, b.summarySection, b.comparisons, b.methods, b.assumptionSection,
		b.notProvided, b.code, b.findings, b.figureData, b.files, b.log, b.limits, b.signatures,
	} {
		if section := part(); section.Kind != "" {
			root.Nodes = append(root.Nodes, section)
		}
	}
	return root
}

// open returns a numbered section with its heading; level 1 or 2.
func (b *builder) open(level int, id, title string) Node {
	return b.openWith(level, id, text(title))
}

func (b *builder) openWith(level int, id string, title ...Node) Node {
	b.section[level]++
	number := fmt.Sprint(b.section[1])
	if level == 2 {
		number = fmt.Sprintf("%d.%d", b.section[1], b.section[2])
	} else {
		b.section[2] = 0
	}
	heading := Node{Kind: Heading, Level: level, Nodes: append([]Node{text(number + "\u2002")}, title...)}
	return Node{Kind: Section, Level: level, ID: id, Nodes: []Node{heading}}
}

// heading returns a heading inside a section, without a number.
func heading(title string) Node {
	return Node{Kind: Heading, Level: 3, Nodes: []Node{text(title)}}
}

// table returns a numbered table.
func (b *builder) table(role string, caption []Node, head Node, rows ...Node) Node {
	b.tables++
	label := strong(fmt.Sprintf("Table %d. ", b.tables))
	nodes := []Node{block(Caption, "", append([]Node{label}, caption...)...), head}
	return block(Table, whole(role, len(rows)), append(nodes, rows...)...)
}

// whole marks a short table: it is not parted between pages.
func whole(role string, rows int) string {
	if rows <= 12 {
		return role + " whole"
	}
	return role
}

// sheet returns a table of names and values without caption or number.
func sheet(rows ...Node) Node { return block(Table, "sheet", rows...) }

// pairs returns a table of names and values in two columns of pairs.
func pairs(lines ...Node) Node {
	half := (len(lines) + 1) / 2
	rows := make([]Node, half)
	for i := range rows {
		rows[i] = row(lines[i].Nodes...)
		switch {
		case half+i < len(lines):
			rows[i].Nodes = append(rows[i].Nodes, lines[half+i].Nodes...)
		case half > 1:
			rows[i].Nodes = append(rows[i].Nodes, block(Head, ""), cell())
		}
	}
	return block(Table, "pairs", rows...)
}

// line is a row of a sheet: the name, and the value.
func line(name []Node, value ...Node) Node {
	return block(Row, "", block(Head, "", name...), block(Cell, "", value...))
}

// headRow returns the head of a table from templates; a leading "#" marks a
// column of numbers.
func headRow(titles ...string) Node {
	row := block(Row, "head")
	for _, title := range titles {
		role := ""
		if cut, numeric := strings.CutPrefix(title, "#"); numeric {
			role, title = "number", cut
		}
		row.Nodes = append(row.Nodes, block(Head, role, say(title)...))
	}
	return row
}

func cell(nodes ...Node) Node { return block(Cell, "", nodes...) }

func figureCell(nodes ...Node) Node { return block(Cell, "number", nodes...) }

func row(cells ...Node) Node { return block(Row, "", cells...) }

// given returns a text of a user, or says that there is none.
func given(s string) Node {
	if strings.TrimSpace(s) == "" {
		return text("Not provided")
	}
	return text(s)
}

func titleOf(r study.Report) string {
	if strings.TrimSpace(r.Title) == "" {
		return "Comparison of simulation and reference data"
	}
	return r.Title
}

// state is the status of the whole memo, from the recorded roles.
func state(r study.Report) string {
	switch {
	case r.Approved.Name != "":
		return "recorded as approved"
	case r.Checked.Name != "":
		return "recorded as checked, not approved"
	}
	return "draft, not checked"
}

// running returns what stands in the margins of every printed page.
func (b *builder) running() []Node {
	hash := "no study hash given"
	if b.in.Hash != "" {
		hash = "study " + short(b.in.Hash)
	}
	foot := b.in.Product
	if b.in.Edition != "" {
		foot = strings.TrimPrefix(foot+" · methods "+b.in.Edition, " · ")
	}
	return []Node{
		{Kind: Running, Role: "top-left", Text: titleOf(b.in.Report)},
		{Kind: Running, Role: "top-right", Text: state(b.in.Report) + " · " + hash},
		{Kind: Running, Role: "bottom-left", Text: foot},
	}
}

// short returns the first digits of a hash.
func short(hash string) string {
	if len(hash) > 12 {
		return hash[:12]
	}
	return hash
}

// identity returns the title block.
func (b *builder) identity() []Node {
	r := b.in.Report
	hash := []Node{given(b.in.Hash)}
	if b.in.Hash != "" {
		hash = []Node{code(b.in.Hash)}
	}
	made := text("Time not recorded")
	if b.in.Made != "" {
		made = text(b.in.Made)
	}
	rows := []Node{
		line(say("Purpose and intended use"), given(r.Purpose)),
		line(say("Status"), text(state(r))),
		line(say("Compared"), say("{} in {}, from {}", text(quantity.Counted(len(r.Cells), "cell")), text(quantity.Counted(questions(r), "question")), text(quantity.Counted(len(r.Files), "file")))...),
		line(say("Made"), say("{}, by {}, methods {}", made, given(b.in.Product), given(b.in.Edition))...),
		line(say("SHA-256 of the study"), hash...),
	}
	return []Node{
		{Kind: Heading, Level: 0, Nodes: []Node{text(titleOf(r))}},
		block(Paragraph, "lead", text("Comparison memo")),
		sheet(rows...),
	}
}

// questions counts the pairs of case and quantity.
func questions(r study.Report) int {
	seen := map[key]bool{}
	for _, c := range r.Cells {
		seen[key{c.Case, c.Quantity, ""}] = true
	}
	return len(seen)
}

// unitOf returns a unit for a reader.
func unitOf(unit string) string {
	if unit == "" || unit == "1" {
		return "pure number"
	}
	return unit
}

// withUnit returns a value followed by its unit, if it has one.
func withUnit(value Node, unit string) []Node {
	if unit == "" || unit == "1" || value.Kind == Text {
		return []Node{value}
	}
	return []Node{value, text("\u202f" + unit)}
}

// suffix is a unit behind a number, nothing for pure numbers.
func suffix(unit string) string {
	if unit == "" || unit == "1" {
		return ""
	}
	return "\u202f" + unit
}

// interval returns "lo to hi".
func interval(lo, hi Node) []Node { return say("{} to {}", lo, hi) }

// names returns the case, quantity and model of a cell.
func names(c study.Cell) []Node {
	quantityText := c.Quantity
	if c.Symbol != "" && c.Symbol != c.Quantity {
		quantityText += " " + c.Symbol
	}
	return say("Case {} · {} · model {}", text(c.Case), text(quantityText), text(c.Model))
}

// known reports whether any of the values is there.
func known(values ...quantity.Number) bool {
	for _, v := range values {
		if v.Known() {
			return true
		}
	}
	return false
}
