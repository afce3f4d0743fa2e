package refinement

import (
	"math"

	"weirmark/core/notice"
	"weirmark/core/quantity"
)

// NoiseFloor is the size of what rounding does to a value, from two runs that
// differ in precision or platform only.
type NoiseFloor struct{ RMS, Max float64 }

// RoundOff returns the floor of values of one run and of its pair, at the same
// places; pairs without both values are left out, and without any it is NaN.
// The difference is taken as the error of the less precise of the two.
func RoundOff(a, b []float64) NoiseFloor {
	var d []float64
	for i := range a {
		if e := a[i] - b[i]; !math.IsNaN(e) && !math.IsInf(e, 0) {
			d = append(d, e)
		}
	}
	norms := NormsOf(d)
	return NoiseFloor{norms.RMS, norms.Max}
}

// Doubt returns a notice where the two finest grids of a study differ by no
// more than twice the floor: then no class and no order can be believed.
func (f NoiseFloor) Doubt(r Result) []notice.Notice {
	e := math.Abs(r.Values[1] - r.Values[0])
	if !(e <= 2*f.Max) {
		return nil
	}
	return []notice.Notice{notice.New("grid-noise", quantity.Text(e, 2), quantity.Text(f.Max, 2))}
}
