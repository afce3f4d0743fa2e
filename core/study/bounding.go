package study

import "math"

// bounding finds, where u_D is unknown, the u_D up to which the outcome with
// none stays: of the requirement, else of the sign of E. The other parts are as
// they are; a requirement that is not resolved without u_D is never resolved by
// more of it.
func (w *work) bounding() {
	if r := w.q.Requirement; r != nil && r.Percent && w.yUnit.ByConvention() {
		return // judge says why
	}
	if w.uD != nil || !w.has(OfNumerical) || w.isUnknown(OfNumerical) || w.isUnknown(OfInput) || len(w.x) == 0 || w.inner {
		return
	}
	rest := w.covariance(w.parts, all(len(w.x))).Total()
	b := &Bounding{What: "sign", UD: None, At: None}
	kept := make([]float64, len(rest)) // the distance that k u_val may fill
	if r := w.q.Requirement; r.set() {
		b.What, b.Word = "requirement", Shown
		for i := range kept {
			kept[i] = w.limit(r, i) - math.Abs(w.s[i]-w.d[i]) - w.boundAt(i)
		}
	} else {
		b.Word = SignResolved
		for i := range kept {
			kept[i] = math.Abs(w.s[i]-w.d[i]) - w.boundAt(i)
		}
	}
	w.fill(b, kept, rest)
	w.cell.Bounding = b
}

// fill sets the word and its u_D. Shown holds while all stations hold, not met
// and a resolved sign while one does.
func (w *work) fill(b *Bounding, kept, rest []float64) {
	at, u := w.last(kept, rest)
	if b.What == "requirement" {
		beyond := make([]float64, len(kept))
		for i, v := range kept {
			beyond[i] = -v - 2*w.boundAt(i)
		}
		if at, u = w.last(beyond, rest); u > 0 {
			b.Word = NotMet
		} else {
			at, u = w.first(kept, rest)
		}
	}
	b.After = NotResolved
	if !(u > 0) {
		b.Word = NotResolved
		return
	}
	b.UD = w.step(u)
	if !w.cell.Scalar {
		b.At = Number(w.xUnit.FromSI(w.x[at]))
	}
}

// room is the u_D that fills what is left of a distance at a station; 0 where
// the other parts fill it.
func (w *work) room(distance, rest float64) float64 {
	whole := distance / w.choices.K
	if !(whole > 0) || !exceeds(whole, rest) {
		return 0
	}
	return math.Sqrt((whole - rest) * (whole + rest))
}

// last and first return the station with the most and with the least room.
func (w *work) last(distance, rest []float64) (at int, u float64) {
	for i := range distance {
		if v := w.room(distance[i], rest[i]); v > u {
			at, u = i, v
		}
	}
	return at, u
}

func (w *work) first(distance, rest []float64) (at int, u float64) {
	u = math.Inf(1)
	for i := range distance {
		if v := w.room(distance[i], rest[i]); v < u {
			at, u = i, v
		}
	}
	return at, u
}
