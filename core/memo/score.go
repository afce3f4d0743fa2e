package memo

import (
	"fmt"
	"slices"

	"weirmark/core/study"
)

// scores prints the measures of a field with their criteria, and the regions.
func (b *builder) scores(i int, c study.Cell) []Node {
	var nodes []Node
	if len(c.Scores) > 0 {
		nodes = append(nodes, b.scoreTable(i, c))
	}
	if len(c.Measured) > 0 {
		nodes = append(nodes, b.measured(i, c))
	}
	if len(c.Regions) > 0 {
		nodes = append(nodes, b.regions(i, c))
	}
	return nodes
}

func (b *builder) scoreTable(i int, c study.Cell) Node {
	var rows []Node
	judged := slices.ContainsFunc(c.Scores, func(s study.ScoreLine) bool { return len(s.Criteria) > 0 })
	for j, s := range c.Scores {
		at := func(name string) string { return fmt.Sprintf("cells.%d.scores.%d.%s", i, j, name) }
		value := []Node{digits(s.Value, 3, at("value"))}
		if s.Word != "" {
			value = append(value, text(" "+s.Word))
		}
		measure := []Node{cell(typeset(s.Name)...), figureCell(value...), cell(typeset(s.Scale)...)}
		switch {
		case !judged:
			rows = append(rows, row(measure...))
		case len(s.Criteria) == 0:
			rows = append(rows, row(append(measure, cell(), cell())...))
		}
		for m, k := range s.Criteria {
			met := strong("not met")
			if k.Met {
				met = text("met")
			}
			limits := say("{}: {} to {}, {}", text(k.Name), digits(k.Low, 3, at(fmt.Sprintf("criteria.%d.low", m))), digits(k.High, 3, at(fmt.Sprintf("criteria.%d.high", m))), met)
			rows = append(rows, row(append(measure, cell(limits...), cell(text(k.Scope+"; "+k.Source)))...))
			measure = []Node{cell(), cell(), cell()}
		}
	}
	if !judged {
		return b.table("plain", say("Measures with their scales."), headRow("Measure", "#Value", "Scale"), rows...)
	}
	return b.table("plain", say("Measures with their scales, and criteria of the field with their scope and source."),
		headRow("Measure", "#Value", "Scale", "Criterion", "Scope and source"), rows...)
}

// measured prints the uncertainty of the measures and their floor.
func (b *builder) measured(i int, c study.Cell) Node {
	rows := make([]Node, len(c.Measured))
	for j, m := range c.Measured {
		at := func(name string) string { return fmt.Sprintf("cells.%d.measured.%d.%s", i, j, name) }
		lies := "not above it"
		if m.Above {
			lies = "above it"
		}
		rows[j] = row(cell(typeset(m.Name)...), figureCell(digits(m.Value, 3, at("value"))), figureCell(digits(m.U, 2, at("u"))),
			figureCell(digits(m.Floor, 3, at("floor"))), figureCell(digits(m.FloorHi, 3, at("floor_hi"))), cell(text(lies)))
	}
	return b.table("plain", say("Uncertainty of the measures ({}), by sampling with the covariance of *u*_{val}. The floor is what the stated errors alone make of each measure.", text(unitOf(c.Unit))),
		headRow("Measure", "#Value", "#*u*", "#Floor", "#95 % of the floor", "Value"), rows...)
}

func (b *builder) regions(i int, c study.Cell) Node {
	rows := make([]Node, len(c.Regions))
	for j, r := range c.Regions {
		at := func(name string) string { return fmt.Sprintf("cells.%d.regions.%d.%s", i, j, name) }
		name := r.Name
		if r.Sign != "" {
			name += ", D " + r.Sign
		}
		where := interval(trimmed(r.From, 6, at("from")), trimmed(r.To, 6, at("to")))
		if !r.From.Known() {
			where = []Node{text("")}
		}
		rows[j] = row(cell(text(name)), figureCell(where...), figureCell(count(r.N, at("n"))),
			figureCell(signed(r.Bias, 3, at("bias"))), figureCell(digits(r.RMSE, 3, at("rmse"))), figureCell(digits(r.HitRate, 3, at("hit_rate"))), figureCell(count(r.Beyond, at("beyond"))))
	}
	return b.table("plain", say("Parts of the stations ({}); weighted by *n* they make the whole where they do not overlap.", text(unitOf(c.Unit))),
		headRow("Region", "#Range", "#*n*", "#Mean *E*", "#RMS *E*", "#Hit rate", "#|*E*| > *k* *u*_{val}"), rows...)
}

// differences sets models of one question against each other.
func (b *builder) differences() []Node {
	list := b.in.Report.Differences
	if len(list) == 0 {
		return nil
	}
	rows := make([]Node, len(list))
	for j, d := range list {
		at := func(name string) string { return fmt.Sprintf("differences.%d.%s", j, name) }
		resolved := "not resolved"
		switch {
		case d.Resolved:
			resolved = "resolved"
		case !d.U.Known():
			resolved = "uncertainty not known"
		}
		mean := append(withUnit(signedBeside(d.Mean, d.U, at("mean")), d.Unit), text(" ± "))
		if d.Shared {
			resolved += ", at the shared stations only"
		}
		rows[j] = row(cell(text(d.Case)), cell(text(d.Quantity)), cell(text(d.A+" − "+d.B)), figureCell(count(d.N, at("n"))),
			figureCell(append(mean, digits(d.U, 2, at("u")))...), cell(text(resolved)), figureCell(interval(digits(d.RMSA, 3, at("rms_a")), digits(d.RMSB, 3, at("rms_b")))...))
	}
	return []Node{b.table("plain", say("Models against each other: the data cancel. Mean difference ± its standard uncertainty, in which the inputs count in full for both models, since how they move one against the other is not known; and the root mean square of *E* of the one and the other."),
		headRow("Case", "Quantity", "Models", "#*n*", "#Mean difference", "", "#RMS *E*"), rows...)}
}
