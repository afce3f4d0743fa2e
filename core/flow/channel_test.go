package flow

import (
	"math"
	"testing"

	"pgregory.net/rapid"

	"weirmark/core/integrate"
)

// TestDucts: exact at the walls and on the axis.
func TestDucts(t *testing.T) {
	p := map[string]float64{"U": 2, "h": 0.5, "nu": 1e-2}
	q := map[string]float64{"U": 2, "D": 0.5, "nu": 1e-2}
	check(t, []printed{
		{"plane-poiseuille", p, 0, 0, 0},
		{"plane-poiseuille", p, 0.5, 0, 0},
		{"plane-poiseuille", p, 0.25, 3, 0}, // 3/2 of the mean
		{"plane-poiseuille", p, 0.125, 2.25, 0},
		{"couette", p, 0, 0, 0},
		{"couette", p, 0.5, 2, 0},
		{"couette", p, 0.125, 0.5, 0},
		{"pipe-poiseuille", q, 0, 4, 0}, // twice the mean
		{"pipe-poiseuille", q, 0.25, 0, 0},
		{"pipe-poiseuille", q, 0.125, 3, 0},
	})
}

// TestDuctMeans: the mean over the section is U: Simpson's rule is exact for the
// parabola and, with the weight r, for the pipe's cubic, on uneven stations
// halved by their midpoints.
func TestDuctMeans(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		mean, h := rapid.Float64Range(-50, 50).Draw(t, "U"), rapid.Float64Range(0.01, 10).Draw(t, "h")
		cut := rapid.Float64Range(0.1, 0.9).Draw(t, "cut")
		y := []float64{0, cut / 2 * h, cut * h, (1 + cut) / 2 * h, h}
		u, v := make([]float64, len(y)), make([]float64, len(y))
		for i := range y {
			u[i] = planePoiseuille(mean, h, y[i])
			v[i] = pipePoiseuille(mean, 2*h, y[i]) * y[i]
		}
		plane, err := integrate.Simpson(y, u)
		if err != nil || math.Abs(plane/h-mean) > 1e-12*math.Abs(mean) {
			t.Fatalf("plane: mean %v, want %v, %v", plane/h, mean, err)
		}
		pipe, err := integrate.Simpson(y, v)
		if err != nil || math.Abs(2*pipe/(h*h)-mean) > 1e-12*math.Abs(mean) {
			t.Fatalf("pipe: mean %v, want %v, %v", 2*pipe/(h*h), mean, err)
		}
	})
}

// TestPipeWall: f = 8 tau/(rho U^2) with tau = rho nu |du/dr| at the wall gives
// 64/Re. The parabola's slope at the wall is that of a secant, extrapolated.
func TestPipeWall(t *testing.T) {
	const mean, d, nu = 0.3, 0.02, 1e-5
	const e = 1e-3
	near, far := pipePoiseuille(mean, d, d/2-e), pipePoiseuille(mean, d, d/2-2*e)
	slope := (4*near - far) / (2 * e)
	if got, want := 8*nu*slope/(mean*mean), value(t, "pipe-laminar", nil, mean*d/nu); math.Abs(got-want) > 1e-13 {
		t.Errorf("f from the profile %v, 64/Re %v", got, want)
	}
}
