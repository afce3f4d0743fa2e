package memo

import (
	"fmt"

	"weirmark/core/quantity"
	"weirmark/core/study"
)

// settling prints how the monitors of the runs were judged, and the balances.
func (b *builder) settling(i int, c study.Cell) []Node {
	figures := b.figuresOf(c, "monitors")
	figures = append(figures, b.figuresOf(c, "balances")...)
	if len(c.Monitors)+len(c.Balances)+len(c.Residuals)+len(figures) == 0 && c.RoundOff == nil {
		return nil
	}
	nodes := []Node{heading("Runs settled")}
	if len(c.Monitors) > 0 {
		nodes = append(nodes, b.monitors(i, c))
	}
	if len(c.Balances) > 0 {
		nodes = append(nodes, b.balances(i, c))
	}
	if len(c.Residuals) > 0 {
		nodes = append(nodes, b.residuals(i, c))
	}
	if r := c.RoundOff; r != nil {
		at := func(name string) string { return fmt.Sprintf("cells.%d.round_off.%s", i, name) }
		nodes = append(nodes, paragraph(say("Round-off floor: two runs on {} that differ in precision or platform only ({}) differ by {} (root mean square) and {} (most), values compared: {} ({}).",
			given(r.Grid), text(r.File), digits(r.RMS, 2, at("rms")), digits(r.Max, 2, at("max")), count(r.N, at("n")), text(unitOf(c.Unit)))...))
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
		grid := m.Grid
		if m.Quantity != "" {
			grid += " (" + m.Quantity + ", " + unitOf(m.Unit) + ")"
		}
		rows[j] = row(cell(given(grid)), cell(text(m.File)), cell(text(m.Class)), figureCell(window...), figureCell(beside(m.Mean, m.U, at("mean"))),
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
	if known(m.Change) {
		nodes = append(nodes, say(" ({})", signed(m.Change, 2, at("change")))...)
	}
	if known(m.Limit) {
		nodes = append(nodes, say("; small is {}", digits(m.Limit, 2, at("limit")))...)
	}
	if known(m.Remaining) {
		nodes = append(nodes, say("; to come by geometric extrapolation {}", signed(m.Remaining, 2, at("remaining")))...)
	}
	if known(m.Period) {
		nodes = append(nodes, say("; period {}, {} in the window", trimmed(m.Period, 4, at("period")), count(m.Cycles, at("cycles")))...)
	}
	if known(m.HalfRange) {
		nodes = append(nodes, say("; half-range {}", digits(m.HalfRange, 2, at("half_range")))...)
	}
	if known(m.OfGrid) {
		nodes = append(nodes, say("; *U*_{iter}/*U*_{grid} {} (aim 0.1 or less)", digits(m.OfGrid, 2, at("of_grid")))...)
	}
	if m.Entered != "" {
		nodes = append(nodes, text("; U_iter entered, not computed: "+m.Entered))
	}
	if m.Sampling != nil {
		nodes = append(nodes, samplingWords(*m.Sampling, at)...)
	}
	return nodes
}

// samplingWords says how the mean of an unsteady run came by its uncertainty.
func samplingWords(s study.Sampling, monitor func(string) string) []Node {
	at := func(name string) string { return monitor("sampling." + name) }
	nodes := say("; {} rows left out in front, {} averaged, standard deviation {}, correlation time {}, independent samples {}",
		count(s.StartUp, at("start_up")), count(s.Rows, at("rows")), digits(s.SD, 2, at("sd")), digits(s.Tau, 2, at("tau")), digits(s.Independent, 3, at("independent")))
	if known(s.UBatches) {
		nodes = append(nodes, say("; *u* by {} batches {}", count(s.Batches, at("batches")), digits(s.UBatches, 2, at("u_batches")))...)
	}
	if known(s.UMarkov) {
		nodes = append(nodes, say("; *u* from successive rows alone {}", digits(s.UMarkov, 2, at("u_markov")))...)
	}
	if known(s.Share) {
		nodes = append(nodes, say("; *u* is {} of *u*_{num}", percent(s.Share, at("share")))...)
	}
	return nodes
}

func (b *builder) balances(i int, c study.Cell) Node {
	rows := make([]Node, len(c.Balances))
	for j, l := range c.Balances {
		at := func(name string) string { return fmt.Sprintf("cells.%d.balances.%d.%s", i, j, name) }
		closed := []Node{strong("not closed")}
		if l.Closed {
			closed = []Node{text("closed")}
		}
		if known(l.Limit) && l.LimitOf != "" {
			closed = append(closed, say("; small is {}, {}", percent(l.Limit, at("limit")), text(l.LimitOf))...)
		}
		if known(l.OfGrid) {
			closed = append(closed, say("; as a part of the quantity {} of *U*_{grid}", digits(l.OfGrid, 2, at("of_grid")))...)
		}
		if known(l.OfE) {
			closed = append(closed, say("; {} of |*E*|", digits(l.OfE, 2, at("of_e")))...)
		}
		if known(l.Effect) {
			closed = append(closed, say("; effect of at most ±{} entered: {}", trimmed(l.Effect, 6, at("effect")), text(l.EffectWhy))...)
		}
		of := []Node{text("not known")}
		if known(l.Scale) {
			of = say("{} ({})", trimmed(l.Scale, 6, at("scale")), given(l.ScaleOf))
		}
		rows[j] = row(cell(given(l.Grid)), cell(text(l.File)), cell(given(l.Kind)), figureCell(trimmed(l.In, 6, at("in"))), figureCell(trimmed(l.Out, 6, at("out"))),
			figureCell(signed(l.Net, 2, at("net"))), figureCell(of...), figureCell(signedPercent(l.Fraction, at("fraction"))), cell(closed...))
	}
	caption := say("Balances in the units of their files: what enters less what leaves, and as a share of the flux that matters. An effect is in the unit of the quantity.")
	return b.table("plain", caption, headRow("Grid", "File", "Of", "#In", "#Out", "#In less out", "#Flux that matters", "#Share", "Judgement"), rows...)
}

// residuals prints how far the residuals fell.
func (b *builder) residuals(i int, c study.Cell) Node {
	rows := make([]Node, len(c.Residuals))
	for j, l := range c.Residuals {
		at := func(name string) string { return fmt.Sprintf("cells.%d.residuals.%d.%s", i, j, name) }
		end := []Node{text("not judged")}
		if known(l.PerLast) {
			end = say("{} decades per {} over {} to {}", digits(l.PerLast, 2, at("per_last")), trimmed(l.Per, 4, at("per")), trimmed(l.From, 6, at("from")), trimmed(l.To, 6, at("to")))
			if l.Stalled {
				end = append(end, text(" (stalled)"))
			}
		}
		rows[j] = row(cell(given(l.Grid)), cell(text(l.File)), cell(text(l.Name)), figureCell(digits(l.Decades, 2, at("decades"))), figureCell(digits(l.PerFirst, 2, at("per_first"))), cell(end...))
	}
	caption := say("Residuals: decades fallen, in all and for the stated number of iterations. A residual gives no uncertainty of a quantity.")
	return b.table("plain", caption, headRow("Grid", "File", "Residual", "#Decades", "#Rate so far", "Last third"), rows...)
}
