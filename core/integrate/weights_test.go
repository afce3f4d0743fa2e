package integrate

import (
	"math"
	"testing"

	"pgregory.net/rapid"
)

func TestWeights(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		n := rapid.IntRange(2, 30).Draw(t, "n")
		x, y := make([]float64, n), make([]float64, n)
		for i := range x {
			if i > 0 {
				x[i] = x[i-1] + rapid.Float64Range(1e-3, 10).Draw(t, "step")
			}
			y[i] = rapid.Float64Range(-5, 5).Draw(t, "y")
		}
		sum, length := 0.0, 0.0
		for i, w := range Weights(x) {
			sum += float64(w * y[i])
			length += w
		}
		want, err := Trapezoid(x, y)
		if err != nil || math.Abs(sum-want) > 1e-10*float64(n) || math.Abs(length-(x[n-1]-x[0])) > 1e-10*x[n-1] {
			t.Fatalf("sum %v for %v, length %v for %v, %v", sum, want, length, x[n-1]-x[0], err)
		}
	})
	if w := Weights([]float64{1, 1, 3}); w[0] != 0 || w[1] != 1 || w[2] != 1 {
		t.Errorf("equal stations: %v", w)
	}
	if w := Weights([]float64{1}); len(w) != 1 || w[0] != 0 {
		t.Errorf("one station: %v", w)
	}
}
