package plausibility

import (
	"math"
	"testing"
)

// Each of the four causes of two values at one abscissa, made on purpose.
func TestRepeatCauses(t *testing.T) {
	f := func(x float64) float64 { return 1 + x - .3*x*x }
	for _, row := range []struct {
		name  string
		x, y  []float64
		pairs int
		cause string
	}{
		{"nothing repeated", []float64{0, 1, 2, 3}, []float64{1, 2, 3, 4}, 0, ""},
		{"equal rows", []float64{0, 1, 1, 3}, []float64{1, 2, 2, 4}, 0, ""},
		{"one reading again", []float64{0, .1, .2, .3, .3, .4, .5, .6}, []float64{f(0), f(.1), f(.2), f(.3) + .01, f(.3) - .01, f(.4), f(.5), f(.6)}, 1, Readings},
		{"a whole sweep again", []float64{0, 1, 2, 3, 4, 0, 1, 2, 3, 4}, []float64{0, 1, 2, 3, 4, .1, 1.1, 2.2, 2.9, 4.1}, 5, Readings},
		{"shock", []float64{0, .1, .2, .3, .3, .4, .5, .6}, []float64{-1, -1.02, -1.04, -1.06, -.4, -.38, -.36, -.34}, 1, Step},
		{"out and back", []float64{1, .75, .5, .25, 0, .25, .5, .75, 1}, []float64{.2, -.3, -.6, -.9, 1, .5, .2, .1, .2}, 3, Sides},
		{"overlapping zones", []float64{0, 1, 2, 3, 4, 5, 4, 5, 6, 7, 8, 9}, []float64{0, 1, 2, 3, 4, 5, 4.1, 5.2, 6, 7, 8, 9}, 2, Zones},
		{"rows without numbers between", []float64{0, .1, math.NaN(), .2, .2, .3}, []float64{0, 1, 1, 2, 2.5, 3}, 1, Readings},
	} {
		got := Repeats(row.x, row.y)
		if len(got) != row.pairs {
			t.Errorf("%s: %+v", row.name, got)
		}
		for _, r := range got {
			if r.Cause != row.cause || row.x[r.Rows[0]] != row.x[r.Rows[1]] {
				t.Errorf("%s: %+v, want %s", row.name, r, row.cause)
			}
		}
	}
}
