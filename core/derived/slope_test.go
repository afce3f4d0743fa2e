package derived

import (
	"math"
	"testing"
)

// The slopes of a parabola on uneven rows are its derivative at every row.
func TestSlopes(t *testing.T) {
	x := []float64{-1, -.4, 0, .1, 1, 4, 4.5}
	y := make([]float64, len(x))
	for i, at := range x {
		y[i] = 2 - 3*at + .5*at*at
	}
	for i, got := range Slopes(x, y) {
		if want := -3 + x[i]; math.Abs(got-want) > 1e-12 {
			t.Errorf("at %v: %v, want %v", x[i], got, want)
		}
	}
	if s := Slopes(x[:2], y[:2]); s[0] != s[1] || math.Abs(s[0]-(y[1]-y[0])/.6) > 1e-12 {
		t.Errorf("two rows: %v", s)
	}
	if Slopes(x[:1], y[:1]) != nil {
		t.Error("one row has a slope")
	}
}
