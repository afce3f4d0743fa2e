package profile

import (
	"math"
	"testing"
)

func last(v []float64) float64 { return v[len(v)-1] }

// The circle of 1000 sides has the length of the circle to 1e-6: its chords
// alone are short by pi²/6/N² = 1.6e-6 (geometry). Uneven sides, an ellipse by
// its complete elliptic integral (Abramowitz and Stegun 1964, table 17.1,
// m = 0.75: E = 1.21105603), and straight sides keep the same bound.
func TestArcLength(t *testing.T) {
	ring := func(n int, a, b, uneven float64) ([]float64, []float64) {
		x, y := make([]float64, n+1), make([]float64, n+1)
		for i := range x {
			at := 2 * math.Pi * float64(i) / float64(n)
			at += uneven * math.Sin(3*at)
			x[i], y[i] = a*math.Cos(at), b*math.Sin(at)
		}
		return x, y
	}
	for _, row := range []struct {
		name         string
		a, b, uneven float64
		want         float64
	}{{"circle", 1, 1, 0, 2 * math.Pi}, {"uneven circle", 1, 1, .2, 2 * math.Pi}, {"large circle", 250, 250, 0, 500 * math.Pi}, {"ellipse", 2, 1, 0, 8 * 1.21105603}} {
		x, y := ring(1000, row.a, row.b, row.uneven)
		if got := last(Arc(x, y)); math.Abs(got/row.want-1) > 1e-6 {
			t.Errorf("%s: %.9f, want %.9f", row.name, got, row.want)
		}
	}
	x, y := []float64{0, math.NaN(), 3, 3, 0, 0}, []float64{0, 0, 0, 4, 4, 0}
	s := Arc(x, y)
	if !math.IsNaN(s[1]) || s[0] != 0 || s[2] != 3 || last(s) != 14 {
		t.Errorf("a rectangle with a row without a place: %v", s)
	}
	// Scatter to and fro is no curve: the length is that of the sides.
	zx, zy, sides := []float64{}, []float64{}, 0.0
	for i := range 40 {
		zx, zy = append(zx, float64(i)), append(zy, .05*float64(i%2))
		if i > 0 {
			sides += math.Hypot(1, .05)
		}
	}
	if got := last(Arc(zx, zy)); math.Abs(got-sides) > 1e-12*sides {
		t.Errorf("zigzag: %v, want %v", got, sides)
	}
	if n := len(Arc(nil, nil)); n != 0 {
		t.Errorf("nothing has %d lengths", n)
	}
}
