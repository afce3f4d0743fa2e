package memo

import (
	"fmt"

	"weirmark/core/quantity"
	"weirmark/core/study"
)

// settling prints how the monitors of the runs were judged, and the balances.
func (b *builder) settling(i int, c study.Cell) []Node {
	figures := b.figuresOf(c, "monitors")
	if len(c.Monitors)+len(c.Balances)+len(figures) == 0 {
		return nil
	}
	nodes := []Node{heading("Runs settled")}
	if len(c.Monitors) > 0 {
		nodes = append(nodes, b.monitors(i, c))
	}
	if len(c.Balances) > 0 {
		nodes = append(nodes, b.balances(i, c))
	}
	return append(nodes, figures...)
}

func (b *builder) monitors(i int, c study.Cell) Node {
	rows := make([]Node, len(c.Monitors))
	for j, m := range c.Monitors {
		at := func(name string) string { return fmt.Sprintf("cells.%d.monitors.%d.%s", i, j, name) }
		window := []Node{text("none")}
		if known(m.From, m.To) {
			window = interval(trimmed(m.From, 6, at("from")), trimmed(m.To, 6, at("to")))
		}
		u, k := m.UIter()
		expanded := quantity.Text(float64(u), 2)
		if u.Known() && !k.Known() {
			expanded += " (bound)"
		}
		rows[j] = row(cell(given(m.Grid)), cell(text(m.File)), cell(text(m.Class)), figureCell(window...), figureCell(beside(m.Mean, m.U, at("mean"))),
			figureCell(digits(m.U, 2, at("u"))), figureCell(text(expanded)), cell(b.rule(m, at)...))
	}
	caption := say("Monitors ({}). *u* is standard; *U* is 2 *u*, or half the range as a bound where iterates keep changing.", text(unitOf(c.Unit)))
	return b.table("plain", caption, headRow("Grid", "File", "Class", "#Window", "#Mean", "#*u*", "#*U*", "Rule"), rows...)
}

// rule says how a monitor was judged, with the numbers the rule speaks of.
func (b *builder) rule(m study.MonitorLine, at func(string) string) []Node {
	nodes := []Node{given(m.Rule)}
	if known(m.Drift, m.Per) {
		nodes = append(nodes, say("; drift {} per {} {}", signedPercent(m.Drift, at("drift")), trimmed(m.Per, 4, at("per")), given(m.Axis))...)
	}
	if known(m.Period) {
		nodes = append(nodes, say("; period {}, {} in the window", trimmed(m.Period, 4, at("period")), count(m.Cycles, at("cycles")))...)
	}
	if known(m.HalfRange) {
		nodes = append(nodes, say("; half-range {}", digits(m.HalfRange, 2, at("half_range")))...)
	}
	return nodes
}

func (b *builder) balances(i int, c study.Cell) Node {
	rows := make([]Node, len(c.Balances))
	for j, l := range c.Balances {
		at := func(name string) string { return fmt.Sprintf("cells.%d.balances.%d.%s", i, j, name) }
		closed := strong("not closed")
		if l.Closed {
			closed = text("closed")
		}
		rows[j] = row(cell(given(l.Grid)), cell(text(l.File)), figureCell(trimmed(l.In, 6, at("in"))), figureCell(trimmed(l.Out, 6, at("out"))),
			figureCell(signed(l.Net, 2, at("net"))), figureCell(signedPercent(l.Fraction, at("fraction"))), cell(closed))
	}
	caption := say("Balances in the units of their files: what enters less what leaves, and as a share of what enters.")
	return b.table("plain", caption, headRow("Grid", "File", "#In", "#Out", "#In less out", "#Of what enters", ""), rows...)
}
