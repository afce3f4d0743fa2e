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
	b := study.Borrowing{}
	if f.Borrow != nil {
		b = *f.Borrow
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
		entry("steps", "grid and time step are", f.Steps, []Option{{"", "fitted together where a table holds both"}, {study.Apart, "studied apart"}}, ""),
		entry("formal_time", "formal order in time", study.OptionalText(f.FormalTime), free, "empty: 2"),
		entry("borrow.case", "borrow the grid uncertainty of case", b.Case, free, "where this case has no grids of its own"),
		entry("borrow.quantity", "quantity there", b.Quantity, free, ""),
		entry("borrow.penalty", "penalty, a factor", study.OptionalText(b.Penalty), free, "1 or more"),
		entry("borrow.why", "why it may be borrowed", b.Why, free, ""),
		entry("target", "u_num to reach, standard", study.OptionalText(f.Target), free, "in the unit of the data; empty: what the requirement needs"),
	}}}}
}

// codeList is what a person states of the verification of the code.
func codeList(s *study.Study) EntryList {
	e := study.CodeEvidence{}
	if s.Code != nil {
		e = *s.Code
	}
	entry := func(field, label, value, hint string) Entry {
		return Entry{Target: study.Target{Kind: "study", Field: "code." + field}, Label: label, Value: value, By: study.Entered, Options: []Option{}, Hint: hint}
	}
	return EntryList{Course: 1, Title: "Code verification", Hint: "u_num takes it that the code solves its equations as it should", Items: []EntryItem{{Entries: []Entry{
		entry("statement", "statement", e.Statement, "which solutions, which order"), entry("link", "where the evidence is", e.Link, "e.g. report and page"),
	}}}}
}

// codeTables are the orders observed against exact solutions.
func codeTables(r *study.Report) []Table {
	var tables []Table
	for _, c := range r.CodeChecks {
		found := "no order: the error does not fall with every refinement"
		if c.Order.Known() {
			found = "observed order " + text(c.Order, 3)
		}
		t := Table{Title: "Code verification: " + c.Quantity + " at " + c.Case + ", " + c.Norm + " error, " + found, Head: []string{"grid", "h", "error", "order"}, Rows: [][]string{}}
		for i, p := range c.Points {
			order := "–"
			if i > 0 && i <= len(c.Orders) {
				order = text(c.Orders[i-1], 3)
			}
			t.Rows = append(t.Rows, []string{cmp.Or(p.Grid, "–"), text(p.H, 4), text(p.Error, 4), order})
		}
		for _, n := range c.Notices {
			t.Rows = append(t.Rows, []string{"", "", "", n.Error()})
		}
		tables = append(tables, t)
	}
	return tables
}

func borrowedAnswer(c *study.Cell) string {
	b := c.Borrowed
	return "No grids of its own: the grid uncertainty is borrowed from " + b.From + " with the penalty " + text(b.Penalty, 3) + ", not computed; u_num " + text(b.U, 2) + c.UnitSuffix() + "."
}

// stepTables show the study of the time step.
func stepTables(c *study.Cell) []Table {
	s := c.Steps
	if s == nil {
		return nil
	}
	title := "Time steps: "
	switch {
	case s.Joint:
		title += "fitted together with the grid, formal orders " + text(s.Space, 2) + " and " + text(s.Formal, 2)
	case s.Order.Known():
		title += s.Class + ", observed order " + text(s.Order, 3) + " against " + text(s.Formal, 2)
	default:
		title += s.Class + ", no order"
	}
	step := "time step"
	if s.StepUnit != "" {
		step += " [" + s.StepUnit + "]"
	}
	t := Table{Title: title, Head: []string{step, "cells", cmp.Or(c.Symbol, "value")}, Rows: [][]string{}}
	for _, p := range s.Points {
		cells := "–"
		if p.Cells.Known() {
			cells = quantity.Typed(float64(p.Cells))
		}
		t.Rows = append(t.Rows, []string{text(p.Step, 4), cells, text(p.Value, 6)})
	}
	result := Table{Title: "Uncertainty of the time step", Head: []string{"", ""}, Rows: [][]string{}}
	add := func(name string, n study.Number, digits int) {
		if n.Known() {
			result.Rows = append(result.Rows, []string{name, text(n, digits) + c.UnitSuffix()})
		}
	}
	add("extrapolated", s.Extrapolated, 6)
	add("error of the finest run in space", s.SpaceError, 3)
	add("error of the finest run in time", s.TimeError, 3)
	add("scatter of the fit", s.Scatter, 3)
	add("U, 95 %", s.U, 3)
	add("u in the budget", s.UNum, 3)
	return []Table{t, result}
}
