package uncertainty

import (
	"math"
	"testing"
)

// TestTwoPiece: the moments against numerical integration of the density, and
// the symmetric limit.
func TestTwoPiece(t *testing.T) {
	for _, row := range []TwoPiece{{1, 1}, {0.5, 2}, {2, 0.5}, {0, 3}, {3, 0}, {1e-3, 1}} {
		const steps = 400_000
		var mass, first, second float64
		for i := range steps {
			z := (float64(i) + 0.5) * 10 / steps
			p := math.Exp(-z * z / 2)
			// On either side x = width z, dx = width dz, of equal height at 0.
			for _, side := range []struct{ width, sign float64 }{{row.Minus, -1}, {row.Plus, 1}} {
				x := side.sign * side.width * z
				mass += p * side.width
				first += p * side.width * x
				second += p * side.width * x * x
			}
		}
		mean := first / mass
		u := math.Sqrt(second/mass - mean*mean)
		if math.Abs(row.Shift()-mean) > 1e-8 || math.Abs(row.U()-u) > 1e-8 {
			t.Errorf("%+v: shift %v, u %v, integrated %v, %v", row, row.Shift(), row.U(), mean, u)
		}
	}
	if s := (TwoPiece{0.7, 0.7}); s.Shift() != 0 || math.Abs(s.U()-0.7) > 1e-15 {
		t.Errorf("symmetric: %v, %v", s.Shift(), s.U())
	}
}

func TestFacing(t *testing.T) {
	got := Facing([]float64{0.1, -0.1, 0, nan}, []float64{1, 1, 1, 1}, []float64{3, 3, 3, 3})
	if !same(got, []float64{3, 1, 3, nan}, 0) {
		t.Error(got)
	}
	got = Facing([]float64{5, -5, 0}, []float64{2, 2, 2}, []float64{2, 2, 2})
	if !same(got, []float64{2, 2, 2}, 0) {
		t.Errorf("symmetric: %v", got)
	}
}
