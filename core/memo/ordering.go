package memo

import (
	"fmt"
	"strings"

	"weirmark/core/study"
)

// ordering prints the six orders of |E|, U_V and the requirement.
func (b *builder) ordering(i int, c study.Cell) []Node {
	m := c.Marine
	if m == nil {
		return nil
	}
	at := func(name string) string { return fmt.Sprintf("cells.%d.marine.%s", i, name) }
	caption := say("|*E*|, *U*_{V} = {} *u*_{val} and the requirement *U*_{reqd}, all at 95 %, with *E* = *S* − *D*.", digits(m.K, 3, at("k")))
	if known(m.E) {
		caption = append(caption, say(" *E* {}, *U*_{V} {}, *U*_{reqd} {}{}.", signed(m.E, 3, at("e")), digits(m.UV, 3, at("u_v")), digits(m.Required, 3, at("required")), text(suffix(c.Unit)))...)
	}
	rows := make([]Node, len(m.Orderings))
	for j, o := range m.Orderings {
		rows[j] = row(cell(text(o.Order)), figureCell(count(o.N, at(fmt.Sprintf("orderings.%d.n", j)))), cell(text(o.Words)))
	}
	return []Node{b.table("plain", caption, headRow("Order", "#Stations", "What it says"), rows...)}
}

// trend prints the change from another case.
func (b *builder) trend(i int, c study.Cell) []Node {
	t := c.Trend
	if t == nil {
		return nil
	}
	at := func(name string) string { return fmt.Sprintf("cells.%d.trend.%s", i, name) }
	words := say("Change from case {} to this: {} in *S*, {} in *D*; the one less the other is {}{}", text(t.From), signed(t.S, 3, at("s")), signed(t.D, 3, at("d")), signed(t.E, 3, at("e")), text(suffix(c.Unit)))
	if !known(t.U) {
		return []Node{paragraph(append(words, text("; its uncertainty is not known."))...)}
	}
	common := "No source is known to be one error in both cases"
	if len(t.Common) > 0 {
		common = "One error in both cases, so that only the difference of its effects remains: " + strings.Join(t.Common, ", ")
	}
	words = append(words, say(", with *u* = {} (standard): ", digits(t.U, 3, at("u")))...)
	words = append(words, interval(signedBeside(t.Lo, t.U, at("lo")), signedBeside(t.Hi, t.U, at("hi")))...)
	words = append(words, say(" at *k* *u*, {}. {}. If no source were common *u* would be {}. Grid uncertainties count in full, since how they cancel is not known.", strong(t.Reading), text(common), digits(t.Apart, 3, at("apart")))...)
	return []Node{paragraph(words...)}
}
