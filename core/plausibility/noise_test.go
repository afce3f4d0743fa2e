package plausibility

import (
	"math"
	"testing"

	"weirmark/core/uncertainty"
)

// Known noise on a smooth curve is found within three standard deviations of
// the estimate: 1.2/sqrt(n) of it upward, for the mean square of differences
// of second order (terms of correlation -2/3 and 1/6), and 2/sqrt(n) downward,
// for the median of as many correlated terms. The curve alone is not taken for
// noise, nor is one with a single jump.
func TestNoise(t *testing.T) {
	g := uncertainty.NewGenerator(20260901)
	for _, n := range []int{60, 200, 2000} {
		for _, sigma := range []float64{.01, .1, 2} {
			x, y := make([]float64, n), make([]float64, n)
			for i := range x {
				x[i] = (float64(i) + .6*g.Uniform()) / float64(n)
				y[i] = 3 + math.Sin(2*x[i]) + sigma*g.Normal()
			}
			s, rows, ok := Noise(x, y)
			if !ok || rows != n-2 || s/sigma-1 > 3*1.2/math.Sqrt(float64(n)) || 1-s/sigma > 3*2/math.Sqrt(float64(n)) {
				t.Errorf("n %d, sigma %v: %v (%v)", n, sigma, s, ok)
			}
		}
	}
	smooth, few := make([]float64, 40), []float64{1, 2, 1, 2, 1, 2}
	x := make([]float64, 40)
	for i := range smooth {
		x[i] = float64(i) / 39
		smooth[i] = math.Exp(3 * x[i])
	}
	if s, _, ok := Noise(x, smooth); ok {
		t.Errorf("a smooth curve was given a noise of %v", s)
	}
	for i := 20; i < 40; i++ {
		smooth[i] += 30
	}
	if s, _, ok := Noise(x, smooth); ok {
		t.Errorf("a jump was given a noise of %v", s)
	}
	if _, rows, ok := Noise(x[:6], few); ok || rows != 4 {
		t.Errorf("six rows were taken as enough: %d", rows)
	}
}
