package study

import (
	"math"
	"strings"

	"weirmark/core/notice"
	"weirmark/core/profile"
	"weirmark/core/quantity"
)

// enter changes a field of an anchor.
func (a *Anchor) enter(field, value string) (string, error) {
	switch field {
	case "kind":
		if value != AtWall && value != AtSymmetry {
			return a.Kind, refuse("the kind of a support point", value)
		}
		return exchange(&a.Kind, value)
	case "why":
		return exchange(&a.Why, value)
	case "model":
		return exchange(&a.Model, value)
	case "x":
		return number(&a.X, value, -1e30, 1e30)
	case "value":
		return number(&a.Value, value, -1e30, 1e30)
	}
	return "", refuse(field, value)
}

// anchored adds the declared support points to the rows of a simulation, in
// SI: a known value at its place, and at a plane of symmetry the row nearest
// to it on the other side. A point inside the line is not added: the line has
// values of its own there.
func (w *work) anchored(x, y []float64) ([]float64, []float64) {
	w.anchors = nil
	for i := range w.q.Anchors {
		a := &w.q.Anchors[i]
		if a.Model != "" && a.Model != w.model {
			continue
		}
		if strings.TrimSpace(a.Why) == "" {
			w.need(2, false, "the physics of a support point", w.q.target("anchors"), "anchor-reason", w.place(w.xUnit.ToSI(a.X)))
			continue
		}
		lo, hi := profile.Limits(x)
		at := w.xUnit.ToSI(a.X)
		if !(hi > lo) || at >= lo && at <= hi {
			w.tell(notice.New("anchor-inside", w.place(at), w.place(lo), w.place(hi)))
			continue
		}
		value := w.yUnit.ToSI(a.Value)
		if a.Kind == AtSymmetry {
			row := nearestRow(x, y, at)
			at, value = 2*at-x[row], y[row]
		}
		x, y = withEnd(x, y, at, value)
		w.anchors = append(w.anchors, AnchorLine{Kind: a.Kind, X: Number(w.xUnit.FromSI(at)), Value: w.yNumber(value), Why: a.Why})
		w.tell(notice.New("anchor-used", w.place(at), quantity.Plain(w.yUnit.FromSI(value), 6)+w.cell.UnitSuffix(), a.Why))
	}
	return x, y
}

// nearestRow returns the row with a value that is nearest to a place.
func nearestRow(x, y []float64, at float64) int {
	best, distance := 0, math.Inf(1)
	for i, v := range x {
		if d := math.Abs(v - at); d < distance && !math.IsNaN(y[i]) {
			best, distance = i, d
		}
	}
	return best
}

// withEnd returns the rows with one more at the end of the file it is nearer
// to, so that an ordered line stays ordered.
func withEnd(x, y []float64, at, value float64) ([]float64, []float64) {
	first, last := profile.Ends(x)
	if math.Abs(at-first) < math.Abs(at-last) {
		return append([]float64{at}, x...), append([]float64{value}, y...)
	}
	n := len(x)
	return append(x[:n:n], at), append(y[:n:n], value)
}
