package refinement

import (
	"math"

	"weirmark/core/quantity"
)

// Class says how the values of three grids change with refinement.
type Class string

// The classes.
const (
	Monotone             Class = "monotone"              // differences shrink, one sign
	Oscillatory          Class = "oscillatory"           // differences shrink, signs alternate
	Diverging            Class = "diverging"             // differences grow, one sign
	OscillatoryDiverging Class = "oscillatory-diverging" // differences do not shrink, signs alternate
	Flat                 Class = "flat"                  // no difference
	Insufficient         Class = "insufficient"          // cannot be classified
)

// rounding is the part of the largest value below which a difference is none.
const rounding = 1e-12

// triple is three values, fine first, and the refinement ratios between them.
type triple struct {
	f        [3]float64
	r21, r32 float64
}

// differences returns e21 and e32. A difference of at most rounding of scale
// is zero.
func (t triple) differences(scale float64) (e21, e32 float64) {
	e21, e32 = t.f[1]-t.f[0], t.f[2]-t.f[1]
	if math.Abs(e21) <= rounding*scale {
		e21 = 0
	}
	if math.Abs(e32) <= rounding*scale {
		e32 = 0
	}
	return e21, e32
}

// dataRange returns the largest difference between any two of the values.
func (t triple) dataRange() float64 {
	return max(t.f[0], t.f[1], t.f[2]) - min(t.f[0], t.f[1], t.f[2])
}

// scaledRatio returns (e21/ln r21)/(e32/ln r32), the ratio of the differences
// for equal steps of refinement, rounded so that no class hangs on last bits.
func (t triple) scaledRatio(e21, e32 float64) float64 {
	return quantity.Round(e21/math.Log(t.r21)/(e32/math.Log(t.r32)), 10)
}

// classify returns the class by the scaled ratio R*: monotone for 0 < R* < 1,
// oscillatory for -1 < R* < 0, diverging above 1, oscillatory and diverging at
// -1 and below; flat where there is no difference; insufficient where R* is 0,
// 1 or not a number. The plain ratio e21/e32 would mislead where the ratios of
// refinement differ: exact first-order data on h = 1, 1.5, 2 give 1.
func (t triple) classify(scale float64) Class {
	e21, e32 := t.differences(scale)
	if e21 == 0 && e32 == 0 {
		return Flat
	}
	if e21 == 0 || e32 == 0 {
		return Insufficient
	}
	switch r := t.scaledRatio(e21, e32); {
	case 0 < r && r < 1:
		return Monotone
	case -1 < r && r < 0:
		return Oscillatory
	case r > 1 && !math.IsInf(r, 0):
		return Diverging
	case r <= -1 && !math.IsInf(r, 0):
		return OscillatoryDiverging
	}
	return Insufficient
}
