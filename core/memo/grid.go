package memo

import (
	"fmt"

	"weirmark/core/study"
)

// grids prints the grid study behind u_num.
func (b *builder) grids(i int, c study.Cell) []Node {
	g := c.Grids
	figures := b.figuresOf(c, "grids")
	more := append(borrowed(i, c), b.steps(i, c)...)
	if g == nil {
		b.lacks("No grid study is available for this cell.")
		return append(more, figures...)
	}
	at := func(name string) string { return fmt.Sprintf("cells.%d.grids.%s", i, name) }
	nodes := []Node{heading("Grid study")}
	if len(g.Points) > 0 {
		nodes = append(nodes, b.gridPoints(i, c))
	}
	rows := []Node{}
	add := func(name string, value ...Node) { rows = append(rows, line(say(name), value...)) }
	scale := g.U
	if g.Class != "" {
		add("Behaviour", text(g.Class))
	}
	if known(g.Ratio) {
		add("Ratio of differences *R* = ε_{21}/ε_{32}", digits(g.Ratio, 3, at("ratio")))
	}
	if known(g.R21, g.R32) {
		add("Refinement ratios *r*_{21}, *r*_{32}", say("{}, {}", digits(g.R21, 4, at("r21")), digits(g.R32, 4, at("r32")))...)
	}
	switch {
	case known(g.Order) && g.Along:
		add("Common order *p*", say("{} (formal {})", digits(g.Order, 3, at("order")), digits(g.Formal, 3, at("formal")))...)
	case known(g.Order):
		add("Observed order *p*", say("{} (formal {})", digits(g.Order, 3, at("order")), digits(g.Formal, 3, at("formal")))...)
	case !g.Along:
		add("Observed order *p*", say("none is given (formal {})", digits(g.Formal, 3, at("formal")))...)
	}
	if known(g.Extrapolated) {
		add("Extrapolated value", withUnit(beside(g.Extrapolated, scale, at("extrapolated")), c.Unit)...)
	}
	if known(g.Ea, g.Eext) {
		add("Relative differences *e*_{a}, *e*_{ext}", say("{}, {}", percent(g.Ea, at("ea")), percent(g.Eext, at("eext")))...)
	}
	if known(g.GCI) {
		add("Grid convergence index", percent(g.GCI, at("gci")))
	}
	if g.Along && known(g.R32) {
		add("Stations", say("{} monotone, {} not monotone", count(g.Monotone, at("monotone")), count(g.NonMonotone, at("non_monotone")))...)
		if known(g.OrderLow, g.OrderHigh) {
			add("Quartiles of the local orders", interval(digits(g.OrderLow, 3, at("order_low")), digits(g.OrderHigh, 3, at("order_high")))...)
		}
	}
	if known(g.U) {
		add("Grid uncertainty *U* (expanded, 95 %)", withUnit(digits(g.U, 3, at("u")), c.Unit)...)
	}
	switch {
	case g.Along:
		add("*u*_{num} = *U*/*k*_{num}", append(say("root mean square over the stations "), append(withUnit(digits(g.UNum, 3, at("u_num")), c.Unit), say(", *k*_{num} = {}{}", digits(g.KNum, 3, at("k_num")), text(kNumWords(g.KNum)))...)...)...)
	case known(g.U) && known(g.UNum):
		add("*u*_{num} = *U*/*k*_{num}", append(withUnit(digits(g.UNum, 3, at("u_num")), c.Unit), say(" with *k*_{num} = {}{}", digits(g.KNum, 3, at("k_num")), text(kNumWords(g.KNum)))...)...)
	case known(g.UNum):
		add("*u*_{num}", withUnit(digits(g.UNum, 3, at("u_num")), c.Unit)...)
	default:
		add("*u*_{num}", text("not available"))
	}
	if known(g.NextCells, g.NextCost) {
		add("To resolve the requirement, with *E* unchanged", append(say("about {} cells; {} times the cost of the finest run, by ", cellCount(g.NextCells, at("next_cells")), digits(g.NextCost, 3, at("next_cost"))), costWords(g, at("cost_exponent"))...)...)
	}
	nodes = append(nodes, pairs(rows...))
	if lines := familyLines(i, c); len(lines) > 0 {
		nodes = append(nodes, sheet(lines...))
	}
	if g.Rule != "" {
		nodes = append(nodes, note(text("Rule: "+sentenceEnd(g.Rule))))
	}
	nodes = append(nodes, b.gridSettings(c)...)
	nodes = append(nodes, b.gridRules(i, c)...)
	if len(g.Local) > 0 {
		nodes = append(nodes, b.localGrids(i, c)...)
	}
	return append(append(nodes, more...), figures...)
}

func (b *builder) gridPoints(i int, c study.Cell) Node {
	g := c.Grids
	hasValue, hasHeight := false, false
	for _, p := range g.Points {
		hasValue, hasHeight = hasValue || p.Value.Known(), hasHeight || p.YPlus > 0
	}
	titles := []string{"Grid", "#Cells", "#*h*/*h*_{finest}"}
	if hasValue {
		titles = append(titles, "#Value")
	}
	if hasHeight {
		titles = append(titles, "#*y*^{+}")
	}
	head := headRow(append(titles, "Use")...)
	rows := make([]Node, len(g.Points))
	for j, p := range g.Points {
		at := func(name string) string { return fmt.Sprintf("cells.%d.grids.points.%d.%s", i, j, name) }
		use := "listed only"
		if p.Used {
			use = "in the estimate"
		}
		rows[j] = row(cell(text(p.Name)), figureCell(cellCount(p.Cells, at("cells"))), figureCell(digits(p.H, 4, at("h"))))
		if hasValue {
			value := trimmed(p.Value, 6, at("value"))
			if known(g.U) {
				value = beside(p.Value, g.U/10, at("value"))
			}
			rows[j].Nodes = append(rows[j].Nodes, figureCell(value))
		}
		if hasHeight {
			height := text("–")
			if p.YPlus > 0 {
				height = digits(p.YPlus, 3, at("y_plus"))
			}
			rows[j].Nodes = append(rows[j].Nodes, figureCell(height))
		}
		rows[j].Nodes = append(rows[j].Nodes, cell(text(use)))
	}
	caption := say("Grids, coarse to fine ({}; {} dimensions).", text(unitOf(c.Unit)), count(g.Dimension, fmt.Sprintf("cells.%d.grids.dimension", i)))
	return b.table("plain", caption, head, rows...)
}

// localGrids prints the grid study of the stations in two columns of rows.
func (b *builder) localGrids(i int, c study.Cell) []Node {
	g := c.Grids
	at := spread(len(g.Local), rowLimit)
	x := make([]float64, len(at))
	for r, n := range at {
		x[r] = float64(g.Local[n].X)
	}
	decimals := places(x)
	half := (len(at) + 1) / 2
	rows := make([]Node, half)
	for r, n := range at {
		field := func(name string) string { return fmt.Sprintf("cells.%d.grids.local.%d.%s", i, n, name) }
		l := g.Local[n]
		into := &rows[r%half]
		into.Kind = Row
		into.Nodes = append(into.Nodes, figureCell(number(l.X, atPlaces(float64(l.X), decimals), field("x"))), cell(text(l.Class)),
			figureCell(digits(l.Order, 3, field("order"))), figureCell(digits(l.U, 2, field("u"))))
	}
	head := block(Row, "head")
	for range min(2, len(at)) {
		head.Nodes = append(head.Nodes, block(Head, "number", given(c.XName)), block(Head, "", text("Behaviour")),
			block(Head, "number", say("Local *p*")...), block(Head, "number", say("*U*")...))
	}
	if last := &rows[half-1]; len(last.Nodes) < len(head.Nodes) {
		last.Nodes = append(last.Nodes, cell(), cell(), cell(), cell())
	}
	caption := say("Grid study along the curve against {} ({}); *U* is expanded, 95 % ({}).", given(c.XName), text(unitOf(c.XUnit)), text(unitOf(c.Unit)))
	nodes := []Node{b.table("plain", caption, head, rows...)}
	if len(at) < len(g.Local) {
		nodes = append(nodes, note(text(fmt.Sprintf("The table prints %d of %d stations, evenly spaced.", len(at), len(g.Local)))))
	}
	return nodes
}
