package memo

import (
	"fmt"
	"strings"

	"weirmark/core/study"
)

// treatment says what was done with the curves of a cell, and what they show
// beside the comparison.
func (b *builder) treatment(i int, c study.Cell) []Node {
	t := c.Treatment
	if t == nil {
		return nil
	}
	at := func(name string) string { return fmt.Sprintf("cells.%d.treatment.%s", i, name) }
	var rows []Node
	add := func(name string, value ...Node) { rows = append(rows, line(say(name), value...)) }
	for _, o := range t.Orders {
		words := "kept as in the file"
		if o.Sorted {
			words += "; a copy in order of stations was compared"
		}
		add("Order of rows", say("{}, column {}: {}, {}", text(o.File), text(o.Column), code(o.Hash), text(words))...)
	}
	if t.Sampling != "" {
		add("Simulation holds its values at", text(t.Sampling))
	}
	for j, a := range t.Anchors {
		add("Support point", append(say("{}{}, value {}{}: {}", trimmed(a.X, 6, at(fmt.Sprintf("anchors.%d.x", j))), text(suffix(c.XUnit)),
			trimmed(a.Value, 6, at(fmt.Sprintf("anchors.%d.value", j))), text(suffix(c.Unit)), text(a.Why)), text(" ("+anchorKinds[a.Kind]+")"))...)
	}
	if p := t.Plan; p != nil {
		words := "locked " + p.At + ", before the comparison was seen"
		if p.Late {
			words = "locked " + p.At + ", after the comparison was seen"
		}
		if len(p.Changes) > 0 {
			words += "; changed since: " + strings.Join(p.Changes, ", ")
		} else {
			words += "; unchanged since"
		}
		add("Stations", text(words))
	}
	if t.Weights != "" {
		add("Weights of the stations", text(t.Weights+"; sum one; in the means of E, not in the joint statistic"))
	}
	if n := t.Noise; n != nil {
		stated := text("; no random uncertainty is stated")
		words := say("{}{} between neighbours, from {} differences", digits(n.S, 2, at("noise.s")), text(suffix(c.Unit)), count(n.Rows, at("noise.rows")))
		if n.Stated.Known() {
			words = append(words, say("; stated as random: {}{}", digits(n.Stated, 2, at("noise.stated")), text(suffix(c.Unit)))...)
		} else {
			words = append(words, stated)
		}
		add("Scatter of *D*, a lower bound", words...)
	}
	if l := t.Integral; l != nil {
		unit := suffix(study.ProductUnit(c.Unit, c.XUnit))
		words := say("{}{}", signedBeside(l.E, l.U, at("integral.e")), text(unit))
		if l.U.Known() {
			words = append(words, say(" ± {} (standard)", digits(l.U, 2, at("integral.u")))...)
		}
		add("Integral of *E*", append(words, say("; of *S* {}, of *D* {}; over {} of {}{}, in unbroken pieces: {}", beside(l.S, l.U, at("integral.s")), beside(l.D, l.U, at("integral.d")),
			trimmed(l.Length, 4, at("integral.length")), trimmed(l.Whole, 4, at("integral.whole")), text(suffix(c.XUnit)), count(l.Pieces, at("integral.pieces")))...)...)
	}
	if f := t.Fit; f != nil {
		add("Shift and scale of *S*", b.fit(f, c, at)...)
	}
	if len(rows) == 0 {
		return nil
	}
	return []Node{heading("Curves and stations"), sheet(rows...)}
}

var anchorKinds = map[string]string{study.AtWall: "known value", study.AtSymmetry: "symmetry"}

// fit says which shift and scale would bring S nearest to D.
func (b *builder) fit(f *study.DisplacementLine, c study.Cell, at func(string) string) []Node {
	x, y := text(suffix(c.XUnit)), text(suffix(c.Unit))
	words := say("diagnosis only, nothing was moved: RMS of *E* at {} stations {}{}; shifted by {}{}, {}{}; scaled by {}, {}{}; shifted by {}{} and scaled by {}, {}{}",
		count(f.N, at("fit.n")), digits(f.RMS, 3, at("fit.rms")), y,
		signed(f.Shift, 2, at("fit.shift")), x, digits(f.ShiftRMS, 3, at("fit.shift_rms")), y,
		digits(f.Scale, 4, at("fit.scale")), digits(f.ScaleRMS, 3, at("fit.scale_rms")), y,
		signed(f.BothShift, 2, at("fit.both_shift")), x, digits(f.BothScale, 4, at("fit.both_scale")), digits(f.BothRMS, 3, at("fit.both_rms")), y)
	if f.AtEdge {
		words = append(words, text("; a shift is the largest that was tried"))
	}
	return words
}
