package uncertainty

import (
	"math"
	"slices"
)

// OfResolution returns the standard uncertainty of a reading that is rounded to
// a step: step/sqrt 12, the deviation of a rectangular distribution one step
// wide (JCGM 100:2008 F.2.2.1, clause from memory).
func OfResolution(step float64) float64 { return math.Abs(step) / math.Sqrt(12) }

// AtLeast returns u, raised to the least value where it is below. An unknown
// uncertainty stays unknown.
func AtLeast(u []float64, least float64) []float64 {
	all := make([]float64, len(u))
	for i, v := range u {
		all[i] = max(v, least)
	}
	return all
}

// minQuantised is the number of readings below which no step is looked for:
// the common divisor of few whole numbers is often not one.
const minQuantised = 8

// Quantised returns the step of which all differences of the readings are whole
// multiples. It is not ok below eight readings, without three different ones,
// or where there is no such step that is seen clearly: the readings are doubles,
// so a step must be ten thousand times their rounding.
//
// It cannot tell a coarse instrument from a file written with few digits; both
// limit what the readings can show.
func Quantised(x []float64) (step float64, ok bool) {
	values := slices.Clone(x)
	slices.Sort(values)
	values = slices.Compact(values)
	if len(x) < minQuantised || len(values) < 3 || math.IsNaN(values[0]) || math.IsInf(values[0], 0) || math.IsInf(values[len(values)-1], 0) {
		return 0, false
	}
	largest := max(math.Abs(values[0]), math.Abs(values[len(values)-1]))
	rounding := largest * 0x1p-50
	for i, v := range values[1:] {
		step = divisor(v-values[i], step, rounding)
	}
	if !(step > 1e4*rounding) {
		return 0, false
	}
	// Count the steps over the whole range: the error of the step is then that
	// of two values over their count.
	span := values[len(values)-1] - values[0]
	step = span / math.Round(span/step)
	for _, v := range values {
		offset := v - values[0]
		if math.Abs(offset-float64(step*math.Round(offset/step))) > 4*rounding {
			return 0, false
		}
	}
	return step, true
}

// divisor returns the greatest common divisor of two lengths. A rest that the
// rounding of the lengths can make, which grows with the multiple, is none.
func divisor(a, b, rounding float64) float64 {
	for b > 0 {
		multiple := math.Round(a / b)
		rest := math.Abs(a - float64(b*multiple))
		if rest <= float64(2*rounding*(1+multiple)) {
			return b
		}
		a, b = b, rest
	}
	return a
}
