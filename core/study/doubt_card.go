package study

import (
	"math"

	"weirmark/core/notice"
	"weirmark/core/plausibility"
	"weirmark/core/profile"
	"weirmark/core/quantity"
)

// Limits beyond which values are asked about (common practice, no source).
const (
	highestCp    = 1.05 // of low-speed flow; at a stagnation point it is 1
	highestSpeed = 3.0  // of the reference speed
	sameFriction = 0.01 // of two friction velocities
)

// doubtCard asks about values that the case card makes implausible.
func (w *work) doubtCard(c *curve) {
	lo, hi := profile.Limits(c.y)
	file := w.e.study.fileName(c.slip)
	if w.q.Form.Name == "Cp" && hi > highestCp {
		w.ask(2, "the largest Cp of "+file, "cp-high", file, quantity.Text(hi, 3), quantity.Typed(highestCp))
	}
	if c.slip.Datum.Value == DatumAbsolute && !c.yTurned && lo < 0 {
		w.ask(2, "the datum of "+file, "absolute-negative", file, quantity.Text(c.yUnit.unit.FromSI(lo), 3))
	}
	if !c.yUnit.known {
		return
	}
	kelvin, speed := quantity.Dimension{0, 0, 0, 1}, quantity.Dimension{1, 0, -1}
	print := func(v float64) string { return valueUnit(quantity.Round(c.yUnit.unit.FromSI(v), 5), c.yUnit.symbol) }
	if c.yUnit.unit.Dimension == kelvin && !c.yUnit.unit.Step && !c.yTurned && lo < 0 {
		w.ask(2, "the temperatures of "+file, "temperature-below", file, print(lo), print(0))
	}
	ref, known := w.e.cardValue(w.q.Case, RefSpeed, c.slip.side())
	if largest := max(math.Abs(lo), math.Abs(hi)); known && c.yUnit.unit.Dimension == speed && largest > highestSpeed*ref {
		w.ask(2, "the speeds of "+file, "speed-high", file, quantity.Text(largest/ref, 3))
	}
}

// doubtFriction tells of two friction velocities: wall units then differ by
// them, and not by the flow alone.
func (w *work) doubtFriction() {
	if w.q.Form.Name != "u⁺" && w.q.XForm.Name != "y⁺" {
		return
	}
	s, knownS := w.e.cardValue(w.q.Case, FrictionSpeed, Simulation)
	d, knownD := w.e.cardValue(w.q.Case, FrictionSpeed, OfData)
	if knownS && knownD && d > 0 && math.Abs(s/d-1) > sameFriction {
		w.tell(notice.New("friction-two", quantity.Text(s, 3), quantity.Text(d, 3), quantity.Percent(math.Abs(s/d-1))))
	}
}

// areaCauses is the ratio that two reference areas of the card would explain.
func (w *work) areaCauses() []plausibility.Cause {
	var list []plausibility.Cause
	card := w.e.study.Card(w.q.Case)
	for i, a := range card.References {
		for _, b := range card.References[:i] {
			ua, errA := a.unit()
			ub, errB := b.unit()
			if a.Symbol == RefArea && b.Symbol == RefArea && errA == nil && errB == nil && a.Value > 0 && b.Value > 0 {
				ratio := ua.ToSI(a.Value) / ub.ToSI(b.Value)
				list = append(list, plausibility.Cause{Ratio: ratio, Words: "one reference area against the other (their ratio is " + quantity.Text(ratio, 3) + ")"})
			}
		}
	}
	return list
}
