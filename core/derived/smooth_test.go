package derived

import (
	"math"
	"testing"
)

// A straight line stays as it is; the window parts scatter from a change of
// sign; gaps part the curve.
func TestSmooth(t *testing.T) {
	nan := math.NaN()
	x, line, noisy := make([]float64, 31), make([]float64, 31), make([]float64, 31)
	for i := range x {
		x[i] = float64(i) + .2*float64(i%3)
		line[i] = x[i] - 15.1
		noisy[i] = line[i] + 1.5*float64(1-2*(i%2))
	}
	for i, v := range Smooth(x, line, 7) {
		if math.Abs(v-line[i]) > 1e-12 {
			t.Errorf("the line at %v became %v", line[i], v)
		}
	}
	if raw, smooth := len(Crossings(x, noisy)), len(Crossings(x, Smooth(x, noisy, 9))); raw < 3 || smooth != 1 {
		t.Errorf("%d crossings as read, %d smoothed", raw, smooth)
	}
	y := []float64{0, 6, 0, nan, 0, 0, 9, 0, 0}
	at := []float64{0, 1, 2, 3, 4, 5, 6, 7, 8}
	want := []float64{0, 2, 0, nan, 0, 3, 1.8, 3, 0}
	for i, v := range Smooth(at, y, 5) {
		if v != want[i] && math.Abs(v-want[i]) > 1e-12 && !math.IsNaN(want[i]) || math.IsNaN(want[i]) != math.IsNaN(v) {
			t.Errorf("row %d: %v, want %v", i, v, want[i])
		}
	}
}
