package message

import (
	"cmp"
	"strconv"

	"weirmark/core/derived"
	"weirmark/core/quantity"
	"weirmark/core/study"
)

// derivation is the scalar that a question takes from its curves, with the
// choices of its kind.
func derivation(q *study.Question) EntryList {
	id := questionID(q)
	entry := func(key, label, value string, options []Option, hint string) Entry {
		return Entry{Target: study.Target{Kind: "question", ID: id, Field: "derive." + key}, Label: label, Value: value, By: study.Entered, Options: options, Hint: hint}
	}
	d := study.Derivation{}
	if q.Derive != nil {
		d = *q.Derive
	}
	names := []Option{{"", "the values as they are"}}
	for _, name := range derived.Names() {
		names = append(names, Option{name, name})
	}
	kind, known := derived.Named(d.Kind)
	hint := "the same way on both sides, at the stations of the data"
	if known {
		hint = kind.Formula
	}
	entries := []Entry{entry("kind", "compared is", d.Kind, names, hint)}
	if known {
		for _, p := range kind.Parameters {
			options := []Option{}
			for _, o := range p.Options {
				options = append(options, Option{o, cmp.Or(o, "–")})
			}
			hint := map[string]string{"x": "in the unit of the stations", "y": "in the unit of the values"}[p.Unit]
			if hint == "" && p.Unit != "" && p.Unit != "1" {
				hint = "in " + p.Unit
			}
			e := entry(p.Key, p.Label, cmp.Or(d.Parameters[p.Key], p.Default), options, hint)
			e.Open = p.Needed && e.Value == ""
			entries = append(entries, e)
		}
	}
	return EntryList{Course: 2, Title: "A scalar of the curves", Hint: "adding asks for one beside the curves", Add: &study.Target{Kind: study.ItemDerived, ID: id}, Items: []EntryItem{{Entries: entries}}}
}

// secondColumn names what a second column of a slip holds; empty where none
// is used.
func secondColumn(s *study.Study, p *study.Slip) string {
	if q := s.Question(p.Case.Value, p.Quantity.Value); q != nil && q.Derive != nil {
		if kind, known := derived.Named(q.Derive.Kind); known && kind.Second != "" {
			return kind.Second
		}
	}
	if p.Derive.Value == study.DeriveLift || p.Branch.Given() || p.Abscissa.Given() {
		return "second coordinate"
	}
	return ""
}

// derivedTables says how a scalar was taken from its curves.
func derivedTables(c *study.Cell) []Table {
	d := c.Derived
	if d == nil || len(d.Sides) == 0 {
		return nil
	}
	t := Table{Title: "The " + d.Kind + ": " + d.Formula, Head: []string{"side", "rows", "value" + c.UnitSuffix(), "u of the taking", "at", "edge", "overshoot", "what the taking leaves open"}, Rows: [][]string{}}
	for _, s := range d.Sides {
		open := ""
		for i, e := range s.Effects {
			if i > 0 {
				open += "; "
			}
			open += e.Name + ": " + quantity.Signed(float64(e.Change), 2)
		}
		value := text(s.Value, 5)
		if s.Bound {
			value += " (a bound)"
		}
		row := []string{s.Side + ", " + s.File, strconv.Itoa(s.Rows), value, text(s.U, 2), unitText(s.At, 4, s.AtUnit), unitText(s.Edge, 4, s.EdgeUnit), "", open}
		if s.Overshoot.Known() {
			row[6] = quantity.Percent(float64(s.Overshoot)) + " %"
		}
		t.Rows = append(t.Rows, row)
	}
	if d.Effect.Known() {
		t.Rows = append(t.Rows, []string{"effect of the stations, all rows less stations", "", quantity.Signed(float64(d.Effect), 2), "", "", "", "", "on both sides alike, not in E"})
	}
	tables := []Table{t}
	if places := derivedPlaces(d); len(places.Rows) > 0 {
		tables = append(tables, places)
	}
	if len(d.Others) > 0 {
		o := Table{Title: "Under other choices", Head: []string{"choice", "S", "D", "E"}, Rows: [][]string{}}
		for _, other := range d.Others {
			e := text(other.E, 3)
			if other.E.Known() {
				e = quantity.Signed(float64(other.E), 3)
			}
			o.Rows = append(o.Rows, []string{other.Change, text(other.Simulation, 5), text(other.Reference, 5), e})
		}
		tables = append(tables, o)
	}
	return tables
}

// derivedPlaces lists the candidates of a crossing.
func derivedPlaces(d *study.Derived) Table {
	t := Table{Title: "Candidates", Head: []string{"side", "place", "u = u of the values over the slope", "direction", "taken"}, Rows: [][]string{}}
	for _, s := range d.Sides {
		for _, p := range s.Places {
			direction, taken := "falling", ""
			if p.Rising {
				direction = "rising"
			}
			if p.Chosen {
				taken = "yes"
			}
			t.Rows = append(t.Rows, []string{s.Side, unitText(p.X, 5, s.AtUnit), text(p.U, 2), direction, taken})
		}
	}
	return t
}

// unitText prints a number with its unit, or nothing.
func unitText(n study.Number, digits int, unit string) string {
	switch {
	case !n.Known():
		return ""
	case unit == "" || unit == "1":
		return text(n, digits)
	}
	return text(n, digits) + " " + unit
}
