package message

import (
	"cmp"
	"strings"

	"weirmark/core/quantity"
	"weirmark/core/study"
)

// gridTablesBeside say what the grids have in common, what their settings are, and
// what the other rules make of them.
func gridTablesBeside(c *study.Cell) []Table {
	var tables []Table
	g := c.Grids
	if rows := familyRows(c); len(rows) > 0 {
		tables = append(tables, Table{Title: "The family", Head: []string{"", ""}, Rows: rows})
	}
	if g.Card != nil && len(g.Card.Settings) > 0 {
		t := Table{Title: "Settings of the runs", Head: []string{"setting"}, Rows: [][]string{}}
		for _, p := range g.Points {
			t.Head = append(t.Head, cmp.Or(p.Name, "–"))
		}
		t.Head = append(t.Head, "sets runs apart")
		for _, s := range g.Card.Settings {
			row := []string{s.Key}
			for _, v := range s.Values {
				row = append(row, cmp.Or(v, "–"))
			}
			t.Rows = append(t.Rows, append(row, map[bool]string{true: "yes", false: ""}[s.Differs]))
		}
		tables = append(tables, t)
	}
	if len(g.Rules) > 0 {
		t := Table{Title: "The same values by every rule", Head: []string{"rule", "U, 95 %", "u_num"}, Rows: [][]string{}}
		for _, r := range g.Rules {
			u := "a bound"
			if r.U.Known() {
				u = text(r.U, 3)
			}
			t.Rows = append(t.Rows, []string{r.Rule, u, text(r.UNum, 3)})
		}
		tables = append(tables, t)
	}
	return tables
}

// familyRows are names and texts about a family.
func familyRows(c *study.Cell) [][]string {
	g := c.Grids
	rows := [][]string{}
	add := func(name, value string) {
		if value != "" {
			rows = append(rows, []string{name, value})
		}
	}
	if f := g.Card; f != nil {
		add("similarity", cmp.Or(f.Similar, "not stated"))
		add("wall treatment", f.Wall)
		add("scheme", f.Scheme)
		add("runs", f.Regime)
		var ratios []string
		for _, r := range f.Ratios {
			ratios = append(ratios, r.Coarse+" to "+r.Fine+" "+text(r.R, 4))
		}
		add("refinement ratios r", strings.Join(ratios, "; "))
	}
	if g.KNum.Known() && g.U.Known() || g.Along {
		add("from U to u_num", "divided by "+text(g.KNum, 3)+": "+study.KNumReason(float64(g.KNum)))
	}
	if f := g.Fit; f != nil {
		line := text(f.Base, 6)
		for _, t := range f.Terms {
			line += " " + quantity.Signed(float64(t.Coefficient), 3) + " h^" + text(t.Power, 3)
		}
		add("line behind U, h relative to the finest", line)
	}
	if s := g.Stated; s != nil {
		words := "cannot be told, for want of an order to reckon with"
		switch {
		case s.Met:
			words = "this family has it"
		case s.Cells.Known():
			words = "about " + cellWords(float64(s.Cells)) + " cells, " + text(s.Cost, 2) + " times the cost of the finest run"
		}
		add("to bring u_num to "+text(s.U, 3)+c.UnitSuffix(), words)
	}
	return rows
}

// familyList is what a person states of the grids of a question.
func familyList(q *study.Question) EntryList {
	f := study.Family{}
	if q.Family != nil {
		f = *q.Family
	}
	entry := func(field, label, value string, options []Option, hint string) Entry {
		return Entry{Target: study.Target{Kind: "question", ID: questionID(q), Field: "family." + field}, Label: label, Value: value, By: study.Entered, Options: options, Hint: hint}
	}
	free := []Option{}
	return EntryList{Course: 1, Title: "Family of grids", Hint: "what its grids have in common", Items: []EntryItem{{Entries: []Entry{
		entry("similar", "the grids are", f.Similar, []Option{{"", "–"}, {study.SimilarYes, "similar: refined by one factor in all directions"}, {study.SimilarNo, "not similar"}}, ""),
		entry("wall", "wall treatment", f.Wall, free, "e.g. wall functions"),
		entry("scheme", "scheme", f.Scheme, free, "e.g. second-order upwind"),
		entry("regime", "the runs are", f.Regime, []Option{{"", "–"}, {study.RegimeSteady, "steady"}, {study.RegimeTime, "time-accurate"}, {study.RegimeScales, "scale-resolving"}}, ""),
		entry("cost_exponent", "cost follows cells to the power", study.OptionalText(f.CostExponent), free, "empty: 4/3, a run in time"),
		entry("target", "u_num to reach, standard", study.OptionalText(f.Target), free, "in the unit of the data; empty: what the requirement needs"),
	}}}}
}
