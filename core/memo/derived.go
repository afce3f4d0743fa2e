package memo

import (
	"fmt"

	"weirmark/core/quantity"
	"weirmark/core/study"
)

// detail is a number of the report with the words before it.
type detail struct {
	before string
	value  quantity.Number
	field  string
	unit   string
	sign   bool // of a difference
	part   bool // a fraction, in percent
}

// nodes prints a detail; one that is not known is a dash.
func (d detail) nodes() []Node {
	var n Node
	switch {
	case !d.value.Known():
		return []Node{text(absent)}
	case d.part:
		n = percent(d.value, d.field)
	case d.sign:
		n = signed(d.value, 3, d.field)
	default:
		n = digits(d.value, 5, d.field)
	}
	return append([]Node{text(d.before)}, withUnit(n, d.unit)...)
}

// details prints those that are known, one behind the other.
func details(list []detail) []Node {
	var nodes []Node
	for _, d := range list {
		if d.value.Known() {
			if len(nodes) > 0 {
				d.before = "; " + d.before
			}
			nodes = append(nodes, d.nodes()...)
		}
	}
	return nodes
}

// detailRow is a row of a name, numbers, and words.
func detailRow(name string, numbers []detail, words ...[]Node) Node {
	cells := []Node{cell(text(name))}
	for _, d := range numbers {
		cells = append(cells, figureCell(d.nodes()...))
	}
	for _, w := range words {
		cells = append(cells, cell(w...))
	}
	return row(cells...)
}

// derived says how the scalar of a cell was taken from its curves.
func (b *builder) derived(i int, c study.Cell) []Node {
	d := c.Derived
	if d == nil {
		return nil
	}
	at := fmt.Sprintf("cells.%d.derived.", i)
	words := d.Kind + ": " + d.Formula + "."
	for _, s := range d.Settings {
		words += " " + s.Name + ": " + s.Value + "."
	}
	if d.Propagation != "" {
		words += " The uncertainty of the curves was carried to the scalar: " + d.Propagation + "."
	}
	said := []Node{strong("Taken from the curves "), text(words)}
	said = append(said, details([]detail{{before: " The simulation at all its rows, less at the stations of the data where both sides were taken: ", value: d.Effect, field: at + "effect", unit: c.Unit, sign: true}})...)
	nodes := []Node{paragraph(said...)}
	var sides, places, others []Node
	for j, s := range d.Sides {
		of := fmt.Sprintf("%ssides.%d.", at, j)
		sides = append(sides, derivedSide(s, of))
		for k, p := range s.Places {
			way := "falling"
			if p.Rising {
				way = "rising"
			}
			if p.Chosen {
				way += ", taken"
			}
			to := fmt.Sprintf("%splaces.%d.", of, k)
			places = append(places, detailRow(s.Side, []detail{{value: p.X, field: to + "x", unit: s.AtUnit}, {value: p.U, field: to + "u", unit: s.AtUnit}}, []Node{text(way)}))
		}
	}
	for j, o := range d.Others {
		of := fmt.Sprintf("%sothers.%d.", at, j)
		others = append(others, detailRow(o.Change, []detail{{value: o.Simulation, field: of + "simulation"}, {value: o.Reference, field: of + "reference"}, {value: o.E, field: of + "e", sign: true}}))
	}
	add := func(caption string, head Node, rows []Node) {
		if len(rows) > 0 {
			nodes = append(nodes, b.table("plain", say(caption, text(unitOf(c.Unit))), head, rows...))
		}
	}
	add("The scalar of each curve, {}; *u* is standard and of the taking alone. Of it, only what differs between the sides is in *u*_{val}.", headRow("Curve", "#Rows", "#Value", "#*u*", "Place, edge, what the taking leaves open"), sides)
	add("Candidates of the crossing of the scalar ({}); *u* is that of the values there over the slope.", headRow("Curve", "#Place", "#*u*", "Direction"), places)
	add("The scalar under other choices ({}).", headRow("Choice", "#*S*", "#*D*", "#*E*"), others)
	return nodes
}

// derivedSide is the row of one curve.
func derivedSide(s study.DerivedSide, of string) Node {
	value := detail{value: s.Value, field: of + "value"}
	if s.Bound {
		value.before = "bound "
	}
	more := []detail{{before: "at ", value: s.At, field: of + "at", unit: s.AtUnit}, {before: "edge ", value: s.Edge, field: of + "edge", unit: s.EdgeUnit},
		{before: "overshoot ", value: s.Overshoot, field: of + "overshoot", part: true}, {before: "gap of the contour ", value: s.Gap, field: of + "gap"}}
	for k, e := range s.Effects {
		to := fmt.Sprintf("%seffects.%d.", of, k)
		more = append(more, detail{before: e.Name + ": ", value: e.Change, field: to + "change", sign: true}, detail{before: "as u ", value: e.U, field: to + "u"})
	}
	name := cell(text(s.Side + ", " + s.File))
	return row(name, figureCell(count(s.Rows, of+"rows")), figureCell(value.nodes()...), figureCell(detail{value: s.U, field: of + "u"}.nodes()...), cell(details(more)...))
}
