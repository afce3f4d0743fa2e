package memo

import (
	"fmt"

	"weirmark/core/study"
)

// steps prints the study of the time step.
func (b *builder) steps(i int, c study.Cell) []Node {
	s := c.Steps
	if s == nil {
		return nil
	}
	at := func(name string) string { return fmt.Sprintf("cells.%d.steps.%s", i, name) }
	rows := make([]Node, len(s.Points))
	for j, p := range s.Points {
		point := func(name string) string { return at(fmt.Sprintf("points.%d.%s", j, name)) }
		cells := text("–")
		if known(p.Cells) {
			cells = cellCount(p.Cells, point("cells"))
		}
		rows[j] = row(figureCell(trimmed(p.Step, 6, point("step"))), figureCell(cells), figureCell(trimmed(p.Value, 6, point("value"))))
	}
	caption := say("Time steps ({}), from {} ({}).", given(s.StepUnit), text(s.File), text(unitOf(c.Unit)))
	lines := []Node{}
	add := func(name string, value ...Node) { lines = append(lines, line(say(name), value...)) }
	if s.Joint {
		add("Formal orders in space and time", say("{}, {}; none is observed", digits(s.Space, 3, at("space")), digits(s.Formal, 3, at("formal")))...)
		add("Errors of the finest run in space and time", say("{}, {}", signed(s.SpaceError, 3, at("space_error")), signed(s.TimeError, 3, at("time_error")))...)
		add("Scatter of the fit", withUnit(digits(s.Scatter, 3, at("scatter")), c.Unit)...)
	} else {
		add("Behaviour", text(s.Class))
		if known(s.Order) {
			add("Observed order in time", say("{} (formal {})", digits(s.Order, 3, at("order")), digits(s.Formal, 3, at("formal")))...)
		} else {
			add("Observed order in time", say("none is given (formal {})", digits(s.Formal, 3, at("formal")))...)
		}
	}
	if known(s.Extrapolated) {
		add("Extrapolated value", withUnit(beside(s.Extrapolated, s.U, at("extrapolated")), c.Unit)...)
	}
	if known(s.U) {
		add("*U* (expanded, 95 %)", withUnit(digits(s.U, 3, at("u")), c.Unit)...)
	}
	add("*u* in the budget", withUnit(digits(s.UNum, 3, at("u_num")), c.Unit)...)
	return []Node{heading("Time step"), b.table("plain", caption, headRow("#Δ*t*", "#Cells", "#Value"), rows...), pairs(lines...), note(text("Rule: " + sentenceEnd(s.Rule)))}
}

// borrowed prints what was borrowed in place of a grid study.
func borrowed(i int, c study.Cell) []Node {
	l := c.Borrowed
	if l == nil {
		return nil
	}
	at := func(name string) string { return fmt.Sprintf("cells.%d.borrowed.%s", i, name) }
	return []Node{heading("Grid uncertainty, borrowed"), sheet(
		line(say("Borrowed, not computed"), text("from "+l.From)),
		line(say("Standard uncertainty there, relative"), percent(l.Relative, at("relative"))),
		line(say("Penalty"), digits(l.Penalty, 3, at("penalty"))),
		line(say("*u* in the budget"), withUnit(digits(l.U, 3, at("u")), c.Unit)...),
		line(say("Reason"), given(l.Why)),
	)}
}

// code prints the evidence that the code solves its equations as it should:
// what a person states of it, and the orders observed against exact solutions.
func (b *builder) code() Node {
	s := b.open(1, "code", "Code verification evidence")
	r := b.in.Report
	if e := r.Code; e != nil && (e.Statement != "" || e.Link != "") {
		s.Nodes = append(s.Nodes, sheet(line(say("Statement"), given(e.Statement)), line(say("Where the evidence is"), given(e.Link))))
	}
	for i, c := range r.CodeChecks {
		s.Nodes = append(s.Nodes, b.codeCheck(i, c)...)
	}
	if len(s.Nodes) == 1 {
		s.Nodes = append(s.Nodes, paragraph(say("None is recorded. *u*_{num} takes it that the code solves its equations as it should.")...))
	}
	return s
}

func (b *builder) codeCheck(i int, c study.CodeCheck) []Node {
	at := func(name string) string { return fmt.Sprintf("code_checks.%d.%s", i, name) }
	rows := make([]Node, len(c.Points))
	for j, p := range c.Points {
		order := text("–")
		if j > 0 && j <= len(c.Orders) {
			order = digits(c.Orders[j-1], 3, at(fmt.Sprintf("orders.%d", j-1)))
		}
		rows[j] = row(cell(text(orDash(p.Grid))), figureCell(digits(p.H, 4, at(fmt.Sprintf("points.%d.h", j)))), figureCell(digits(p.Error, 4, at(fmt.Sprintf("points.%d.error", j)))), figureCell(order))
	}
	caption := say("Error of {} at {}, model {}, against a known solution ({}; norm: {}; {}).", text(c.Quantity), text(c.Case), given(c.Model), text(c.File), text(c.Norm), text(unitOf(c.Unit)))
	found := say("No order is given: the error does not fall with every refinement.")
	if known(c.Order) {
		found = say("Observed order over all grids: {}.", digits(c.Order, 3, at("order")))
	}
	nodes := []Node{b.table("plain", caption, headRow("Grid", "#*h*", "#Error", "#Order"), rows...), paragraph(found...)}
	for _, n := range c.Notices {
		nodes = append(nodes, note(text(n.Error())))
	}
	return nodes
}
