package metric

import (
	"math"
	"testing"
)

// S twice D and one more: the correlation is 1 although S is nowhere near D,
// which the slope and the intercept beside it show.
func TestLineIsBlindToBias(t *testing.T) {
	d := []float64{1, 2, 3, 4}
	s := []float64{3, 5, 7, 9}
	l := Fit(s, d)
	near(t, "R", l.R, 1, 1e-15)
	near(t, "slope", l.Slope, 2, 1e-15)
	near(t, "intercept", l.Intercept, 1, 1e-14)
	for _, row := range [][2][]float64{{{1, 1}, {1, 2}}, {{1, 2}, {1, 1}}, {{}, {}}} {
		if l := Fit(row[0], row[1]); !math.IsNaN(l.R) || !math.IsNaN(l.Slope) {
			t.Errorf("%v on %v: %+v", row[0], row[1], l)
		}
	}
}
