package study

import (
	"weirmark/core/adequacy"
)

// k95 is the coverage factor of 95 % of a normal error, as rounded in common
// practice, where the degrees of freedom give no other.
const k95 = 2

// MarineLine sets |E|, U_V and U_reqd, all at 95 %, in order at the tested
// stations. U_V is K u_val. The three are of the one value, null of a curve.
type MarineLine struct {
	K         Number         `json:"k"`
	E         Number         `json:"e"`
	UV        Number         `json:"u_v"`
	Required  Number         `json:"required"`
	Orderings []OrderingLine `json:"orderings"` // all six
}

// OrderingLine is one of the six orders of three numbers, with how many of the
// stations have it.
type OrderingLine struct {
	Order string `json:"order"`
	Words string `json:"words"`
	N     int    `json:"n"`
}

// marine counts the six orderings, where they are asked for. The slices are of
// the tested stations, in SI. What sources known as intervals do is in U_V whole.
func (w *work) marine(e, limits []float64) {
	if w.q.Scores == nil || !w.q.Scores.Marine {
		return
	}
	line := &MarineLine{K: k95, E: None, UV: None, Required: None}
	if w.cell.Scalar && w.cell.K95.Known() {
		line.K = w.cell.K95
	}
	for _, o := range adequacy.Orderings {
		line.Orderings = append(line.Orderings, OrderingLine{Order: o.Order, Words: o.Words})
	}
	for n, i := range w.tested {
		uV := float64(float64(line.K)*w.uVal[i]) + w.boundAt(i)
		if order := adequacy.Order(e[n], uV, limits[n]); order >= 0 {
			line.Orderings[order].N++
		}
		if w.cell.Scalar {
			line.E, line.UV, line.Required = w.step(e[n]), w.step(uV), w.step(limits[n])
		}
	}
	w.cell.Marine = line
}
