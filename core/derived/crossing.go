package derived

import "math"

// Crossing is a place where a curve changes sign.
type Crossing struct {
	X      float64
	Rising bool // from negative to positive in the order of the slices
}

// Crossings returns every place where the curve (x, y) changes sign, in the
// order of the slices: between neighbours of opposite sign by a straight line,
// and at a single exact zero between opposite signs. A run of zeros is no
// crossing, and neither is a zero between equal signs or at an end. A row
// where x or y is not finite parts the curve.
func Crossings(x, y []float64) []Crossing {
	var found []Crossing
	for i := 1; i < len(x); i++ {
		if !usable(x, y, i-1) || !usable(x, y, i) {
			continue
		}
		a, b := y[i-1], y[i]
		switch {
		case opposite(a, b):
			// a/(a - b), written so that the difference cannot overflow.
			w := 1 / (1 + math.Abs(b/a))
			at := x[i-1] + float64(w*(x[i]-x[i-1]))
			found = append(found, Crossing{at, b > a})
		case b == 0 && i+1 < len(x) && usable(x, y, i+1) && opposite(a, y[i+1]):
			found = append(found, Crossing{x[i], y[i+1] > a})
		}
	}
	return found
}

func usable(x, y []float64, i int) bool {
	return !math.IsNaN(x[i]) && !math.IsInf(x[i], 0) && !math.IsNaN(y[i]) && !math.IsInf(y[i], 0)
}

func opposite(a, b float64) bool { return a < 0 && b > 0 || a > 0 && b < 0 }
