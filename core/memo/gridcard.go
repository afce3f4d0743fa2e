package memo

import (
	"fmt"
	"strings"

	"weirmark/core/quantity"
	"weirmark/core/study"
)

// familyLines are what a person stated of the grids, and what follows from it.
func familyLines(i int, c study.Cell) []Node {
	g := c.Grids
	at := func(name string) string { return fmt.Sprintf("cells.%d.grids.%s", i, name) }
	rows := []Node{}
	if f := g.Card; f != nil {
		for _, l := range []struct{ name, value string }{{"Similarity of the grids", f.Similar}, {"Wall treatment", f.Wall}, {"Scheme", f.Scheme}, {"Runs", f.Regime}} {
			if l.value != "" {
				rows = append(rows, line(say(l.name), text(l.value+" (as stated)")))
			}
		}
		if len(f.Ratios) > 0 {
			var pairs []Node
			for j, r := range f.Ratios {
				if j > 0 {
					pairs = append(pairs, text("; "))
				}
				pairs = append(pairs, text(r.Coarse+" to "+r.Fine+" "), digits(r.R, 4, at(fmt.Sprintf("card.ratios.%d.r", j))))
			}
			rows = append(rows, line(say("Ratios *r* of all pairs"), pairs...))
		}
	}
	if f := g.Fit; f != nil {
		sum := withUnit(beside(f.Base, g.U, at("fit.base")), c.Unit)
		for j, t := range f.Terms {
			sum = append(sum, say(" {} *h*^", signed(t.Coefficient, 3, at(fmt.Sprintf("fit.terms.%d.coefficient", j))))...)
			sum = append(sum, digits(t.Power, 3, at(fmt.Sprintf("fit.terms.%d.power", j))))
		}
		rows = append(rows, line(say("Line behind *U*, *h* relative to the finest"), sum...))
	}
	if s := g.Stated; s != nil {
		rows = append(rows, line(say("To bring *u*_{num} to a stated value"), statedWords(c, s, at)...))
	}
	return rows
}

func statedWords(c study.Cell, s *study.StatedNext, at func(string) string) []Node {
	value := withUnit(digits(s.U, 3, at("stated.u")), c.Unit)
	switch {
	case s.Met:
		return append(value, text(": this family has it"))
	case !known(s.Cells):
		return append(value, text(": cannot be told, for want of an order to reckon with"))
	}
	value = append(value, say(": about {} cells, {} times the cost of the finest run, by ", cellCount(s.Cells, at("stated.cells")), digits(s.Cost, 3, at("stated.cost")))...)
	return append(value, costWords(c.Grids, at("cost_exponent"))...)
}

// costWords names the power of the cells behind a cost.
func costWords(g *study.Grids, field string) []Node {
	if !known(g.CostExponent) || g.CostExponent == 0 {
		return say("cells^{4/3} (a run in time)")
	}
	return say("cells to the power {}", digits(g.CostExponent, 3, field))
}

// gridSettings prints the settings of the grids, one a row.
func (b *builder) gridSettings(c study.Cell) []Node {
	g := c.Grids
	if g.Card == nil || len(g.Card.Settings) == 0 {
		return nil
	}
	head := block(Row, "head", block(Head, "", text("Setting")))
	for _, p := range g.Points {
		head.Nodes = append(head.Nodes, block(Head, "", given(p.Name)))
	}
	head.Nodes = append(head.Nodes, block(Head, "", text("Over the grids")))
	var rows []Node
	for _, s := range g.Card.Settings {
		r := row(cell(text(s.Key)))
		for _, v := range s.Values {
			r.Nodes = append(r.Nodes, cell(text(orDash(v))))
		}
		r.Nodes = append(r.Nodes, cell(text(settingWords(s))))
		rows = append(rows, r)
	}
	return []Node{b.table("plain", say("Settings of the runs, as their files state them or as entered."), head, rows...)}
}

func orDash(s string) string {
	if strings.TrimSpace(s) == "" {
		return "–"
	}
	return s
}

func settingWords(s study.SettingLine) string {
	first := ""
	for _, v := range s.Values {
		switch {
		case s.Differs:
			return "sets runs apart"
		case first == "":
			first = v
		case v != "" && v != first:
			return "another on every grid"
		}
	}
	return "the same where stated"
}

// gridRules prints what every rule makes of one value.
func (b *builder) gridRules(i int, c study.Cell) []Node {
	g := c.Grids
	if len(g.Rules) == 0 {
		return nil
	}
	rows := make([]Node, len(g.Rules))
	for j, r := range g.Rules {
		at := func(name string) string { return fmt.Sprintf("cells.%d.grids.rules.%d.%s", i, j, name) }
		expanded := text("a bound")
		if known(r.U) {
			expanded = digits(r.U, 3, at("u"))
		}
		rows[j] = row(cell(text(r.Rule)), figureCell(expanded), figureCell(digits(r.UNum, 3, at("u_num"))))
	}
	caption := say("The same values by every rule ({}); *U* is expanded, 95 %.", text(unitOf(c.Unit)))
	return []Node{b.table("plain", caption, headRow("Rule", "#*U*", "#*u*_{num}"), rows...)}
}

// kNumWords says why a factor brings U to u_num.
func kNumWords(k quantity.Number) string {
	if !k.Known() {
		return ""
	}
	return ": " + study.KNumReason(float64(k))
}
