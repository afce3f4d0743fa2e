package message

import (
	"cmp"
	"strconv"

	"weirmark/core/quantity"
	"weirmark/core/study"
)

// pascal is the unit of a pressure.
var pascal = quantity.Unit{Symbol: "Pa", Dimension: quantity.Dimension{-1, 1, -2}, Factor: 1}

// formOptions are the forms of values or of stations.
func formOptions(station bool) []Option {
	list := []Option{{"", "they are"}}
	for _, k := range study.FormKinds {
		if k.Station == station {
			list = append(list, Option{k.Name, k.Name + ", " + k.Words})
		}
	}
	return list
}

// sideOptions are what one side does about a form.
func sideOptions() []Option {
	return []Option{{study.FormAsIs, "are in this form"}, {study.FormMade, "are in this form, made with the case card"}, {study.FormTurned, "are turned into it with the case card"}}
}

// cardList are the reference quantities of the case of a question.
func cardList(s *study.Study, q *study.Question) EntryList {
	list := EntryList{Course: 2, Title: "Case " + q.Case, Hint: "reference quantities: for both sides, or for one", Add: &study.Target{Kind: study.ItemReference, ID: q.Case}, Items: []EntryItem{}}
	symbols := []Option{}
	for _, c := range study.CardSymbols {
		symbols = append(symbols, Option{c.Symbol, c.Shown + ", " + c.Words})
	}
	for i, r := range s.Card(q.Case).References {
		entry := itemEntries(study.ItemReference, q.Case, i)
		choices := append([]Option{}, symbols...)
		if !known(symbols, r.Symbol) {
			choices = append([]Option{{r.Symbol, r.Symbol}}, choices...)
		}
		entries := []Entry{
			entry("symbol", "quantity", r.Symbol, choices, ""),
			entry("value", "value", quantity.Typed(r.Value), nil, ""),
			entry("unit", "unit", r.Unit, nil, "any unit of its dimension"),
			entry("u", "standard uncertainty, in this unit", study.OptionalText(r.U), nil, "empty: not known"),
			entry("side", "of", r.Side, []Option{{"", "both sides"}, {study.Simulation, "the simulation"}, {study.OfData, "the data"}}, ""),
			entry("shared", "its error on simulation and data", r.Shared, []Option{{"", "is one where the entry is one"}, {study.ErrorShared, "is the same"}, {study.ErrorApart, "is not the same"}}, "one instrument: the same"),
		}
		if r.Symbol == study.RefArea {
			kinds := []Option{{"", "–"}}
			for _, k := range study.AreaKinds {
				kinds = append(kinds, Option{k, k})
			}
			entries = append(entries, entry("kind", "which area", r.Kind, kinds, ""))
		}
		entries = append(entries, entry("origin", "where it comes from", r.Origin, nil, ""))
		list.Items = append(list.Items, EntryItem{Remove: &study.Target{Kind: study.ItemReference, ID: q.Case, Field: strconv.Itoa(i)}, Entries: entries})
	}
	return list
}

// axesList are the axes of the case of a question.
func axesList(s *study.Study, q *study.Question) EntryList {
	list := EntryList{Course: 2, Title: "Axes of case " + q.Case, Hint: "what the coordinates of each side mean", Add: &study.Target{Kind: study.ItemAxes, ID: q.Case}, Items: []EntryItem{}}
	for i, a := range s.Card(q.Case).Axes {
		entry := itemEntries(study.ItemAxes, q.Case, i)
		list.Items = append(list.Items, EntryItem{Remove: &study.Target{Kind: study.ItemAxes, ID: q.Case, Field: strconv.Itoa(i)}, Entries: []Entry{
			entry("side", "of", a.Side, []Option{{"", "both sides"}, {study.Simulation, "the simulation"}, {study.OfData, "the data"}}, ""),
			entry("origin", "origin", a.Origin, nil, "e.g. leading edge, mid span"),
			entry("up", "upward is", a.Up, []Option{{"", "–"}, {study.UpY, "y"}, {study.UpZ, "z"}}, ""),
			entry("flow", "the flow goes along", a.Flow, []Option{{"", "–"}, {study.AlongX, "+x"}, {study.AgainstX, "−x: its stations are turned"}}, ""),
		}})
	}
	return list
}

// itemEntries makes entries of one item of a list.
func itemEntries(kind, id string, i int) func(field, label, value string, options []Option, hint string) Entry {
	return func(field, label, value string, options []Option, hint string) Entry {
		if options == nil {
			options = []Option{}
		}
		return Entry{Target: study.Target{Kind: kind, ID: id, Field: strconv.Itoa(i) + "." + field}, Label: label, Value: value, By: study.Entered, Options: options, Hint: hint}
	}
}

func known(options []Option, value string) bool {
	for _, o := range options {
		if o.Value == value {
			return true
		}
	}
	return false
}

// sameTables are the case card and what its uncertainties do.
func sameTables(c *study.Cell) []Table {
	var tables []Table
	if len(c.Mapping) > 0 {
		t := Table{Title: "How the columns are used", Head: []string{""}, Rows: [][]string{}}
		for _, m := range c.Mapping {
			t.Rows = append(t.Rows, []string{m})
		}
		tables = append(tables, t)
	}
	if len(c.References) > 0 {
		t := Table{Title: "Reference quantities of case " + c.Case, Head: []string{"", "quantity", "of", "value", "u, standard", "unit", "origin"}, Rows: [][]string{}}
		for _, r := range c.References {
			of := map[string]string{"": "both sides", study.Simulation: "the simulation", study.OfData: "the data"}[r.Side]
			words := r.Words
			if r.Kind != "" {
				words += " (" + r.Kind + ")"
			}
			t.Rows = append(t.Rows, []string{r.Symbol, words, of, text(r.Value, 6), text(r.U, 2), r.Unit, cmp.Or(r.Formula, r.Origin)})
		}
		tables = append(tables, t)
	}
	if r := c.Reduction; r != nil {
		t := Table{Title: "Uncertainty of " + r.Text + ", line " + strconv.Itoa(r.Line), Head: []string{"", "value", "u, standard", "95 % interval"}, Rows: [][]string{
			{"first order", text(r.Value, 4), text(r.U, 2), text(r.Low, 4) + " to " + text(r.High, 4)},
			{"sampling, " + strconv.Itoa(r.Draws) + " draws", text(r.Sampled, 4), text(r.SU, 2), text(r.SLow, 4) + " to " + text(r.SHigh, 4)},
		}}
		for _, in := range r.Inputs {
			shared := "of one station"
			if in.Common {
				shared = "one error of all stations"
			}
			t.Rows = append(t.Rows, []string{"by " + in.Name, "", quantity.Signed(float64(in.Part), 2), shared})
		}
		tables = append(tables, t)
	}
	return tables
}
