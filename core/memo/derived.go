package memo

import (
	"fmt"

	"weirmark/core/study"
)

// derived says how the scalar of a cell was taken from its curves.
func (b *builder) derived(i int, c study.Cell) []Node {
	d := c.Derived
	if d == nil {
		return nil
	}
	words := say("{} {}: {}.", strong("Taken from the curves"), text(d.Kind), text(d.Formula))
	for _, s := range d.Settings {
		words = append(words, say(" {}: {}.", text(s.Name), text(s.Value))...)
	}
	if d.Propagation != "" {
		words = append(words, say(" The uncertainty of the curves was carried to the scalar: {}.", text(d.Propagation))...)
	}
	at := func(format string, args ...any) string {
		return fmt.Sprintf("cells.%d.derived.", i) + fmt.Sprintf(format, args...)
	}
	if d.Effect.Known() {
		words = append(words, say(" What lies between the stations of the data changes the simulation by ")...)
		words = append(words, withUnit(signed(d.Effect, 2, at("effect")), c.Unit)...)
		words = append(words, say(" (all rows less stations); both sides were taken at the stations, so that it is not in *E*.")...)
	}
	nodes := []Node{paragraph(words...)}
	if len(d.Sides) == 0 {
		return nodes
	}
	var rows, places []Node
	for j, s := range d.Sides {
		of := func(name string) string { return at("sides.%d.%s", j, name) }
		value := []Node{digits(s.Value, 5, of("value"))}
		if s.Bound {
			value = append(value, text(" (a bound)"))
		}
		var more []Node
		add := func(words ...Node) {
			if len(more) > 0 {
				more = append(more, text("; "))
			}
			more = append(more, words...)
		}
		if s.At.Known() {
			add(append([]Node{text("at ")}, withUnit(trimmed(s.At, 5, of("at")), s.AtUnit)...)...)
		}
		if s.Edge.Known() {
			add(append([]Node{text("edge ")}, withUnit(trimmed(s.Edge, 5, of("edge")), s.EdgeUnit)...)...)
		}
		if s.Overshoot.Known() {
			add(text("overshoot "), percent(s.Overshoot, of("overshoot")))
		}
		if s.Gap.Known() {
			add(text("gap of the contour "), digits(s.Gap, 2, of("gap")))
		}
		for k, e := range s.Effects {
			add(text(e.Name+": "), signed(e.Change, 2, of(fmt.Sprintf("effects.%d.change", k))), text(", "), digits(e.U, 2, of(fmt.Sprintf("effects.%d.u", k))), text(" as u"))
		}
		rows = append(rows, row(cell(text(s.Side+", "+s.File)), figureCell(count(s.Rows, of("rows"))), figureCell(value...), figureCell(digits(s.U, 2, of("u"))), cell(more...)))
		for k, p := range s.Places {
			way, taken := "falling", ""
			if p.Rising {
				way = "rising"
			}
			if p.Chosen {
				taken = "taken"
			}
			u := []Node{text(absent)}
			if p.U.Known() {
				u = withUnit(digits(p.U, 2, of(fmt.Sprintf("places.%d.u", k))), s.AtUnit)
			}
			places = append(places, row(cell(text(s.Side)), figureCell(withUnit(trimmed(p.X, 6, of(fmt.Sprintf("places.%d.x", k))), s.AtUnit)...), figureCell(u...), cell(text(way)), cell(text(taken))))
		}
	}
	nodes = append(nodes, b.table("plain", say("The scalar of each curve, {}; *u* is standard and of the taking alone. Of it, only what differs between the sides is in *u*_{val}.", text(unitOf(c.Unit))), headRow("Curve", "#Rows", "#Value", "#*u*", "Place, edge, what the taking leaves open"), rows...))
	if len(places) > 0 {
		nodes = append(nodes, b.table("plain", say("Candidates of the crossing; *u* is that of the values there over the slope."), headRow("Curve", "#Place", "#*u*", "Direction", ""), places...))
	}
	if len(d.Others) == 0 {
		return nodes
	}
	others := make([]Node, len(d.Others))
	for j, o := range d.Others {
		of := func(name string) string { return at("others.%d.%s", j, name) }
		others[j] = row(cell(text(o.Change)), figureCell(digits(o.Simulation, 5, of("simulation"))), figureCell(digits(o.Reference, 5, of("reference"))), figureCell(signed(o.E, 3, of("e"))))
	}
	return append(nodes, b.table("plain", say("The scalar under other choices ({}).", text(unitOf(c.Unit))), headRow("Choice", "#*S*", "#*D*", "#*E*"), others...))
}
