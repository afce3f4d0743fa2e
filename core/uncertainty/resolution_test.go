package uncertainty

import (
	"math"
	"testing"

	"pgregory.net/rapid"
)

func TestOfResolution(t *testing.T) {
	// Half a step is the half-width of a rectangle: 0.5/sqrt 3.
	if got := OfResolution(1); math.Abs(got-0.28867513459481287) > 1e-16 {
		t.Error(got)
	}
	if got := AtLeast([]float64{0, 0.5, nan}, 0.1); !same(got, []float64{0.1, 0.5, nan}, 0) {
		t.Error(got)
	}
}

func TestQuantised(t *testing.T) {
	for _, row := range []struct {
		name string
		x    []float64
		step float64
	}{
		{"tenths", []float64{20.1, 20.3, 20.2, 20.1, 20.2, 20.4, 20.2, 20.3}, 0.1},
		{"quarters", []float64{1, 1.25, 1.75, 1, 1.5, 2.25, 1.25, 3}, 0.25},
		{"a converter of 12 bits over 2500", []float64{3 * 2500. / 4096, 5 * 2500. / 4096, 10 * 2500. / 4096, 11 * 2500. / 4096, 5 * 2500. / 4096, 0, 24 * 2500. / 4096, 3 * 2500. / 4096}, 2500. / 4096},
		{"no smallest difference of one step: 0, 6, 10, 15", []float64{0, 6, 10, 15, 0, 6, 10, 15}, 1},
		{"around a large offset", []float64{101325.2, 101325.4, 101325.8, 101325.2, 101325.6, 101325.4, 101325.2, 101326}, 0.2},
	} {
		step, ok := Quantised(row.x)
		if !ok || math.Abs(step-row.step) > 1e-9*row.step {
			t.Errorf("%s: %v, %v, want %v", row.name, step, ok, row.step)
		}
	}
}

func TestQuantisedRefuses(t *testing.T) {
	g := NewGenerator(3)
	random := make([]float64, 50)
	for i := range random {
		random[i] = g.Normal()
	}
	for _, row := range []struct {
		name string
		x    []float64
	}{
		{"random", random},
		{"seven readings", []float64{1, 2, 3, 4, 5, 6, 7}},
		{"two different readings", []float64{1, 2, 1, 2, 1, 2, 1, 2}},
		{"one reading eight times", []float64{1, 1, 1, 1, 1, 1, 1, 1}},
		{"unknown", []float64{1, 2, 3, nan, 5, 6, 7, 8}},
		{"infinite", []float64{1, 2, 3, inf, 5, 6, 7, 8}},
		{"one odd reading", []float64{0, 1, 2, 3, 4, 5, 6, math.Sqrt2 * 5}},
	} {
		if step, ok := Quantised(row.x); ok {
			t.Errorf("%s: %v", row.name, step)
		}
	}
}

// TestQuantisedFindsAnyStep: readings rounded to a step, neighbours among them.
func TestQuantisedFindsAnyStep(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		step := rapid.Float64Range(1e-4, 10).Draw(t, "step")
		offset := float64(rapid.IntRange(-1000, 1000).Draw(t, "offset"))
		counts := rapid.SliceOfN(rapid.IntRange(0, 500), 6, 40).Draw(t, "counts")
		x := []float64{offset * step, (offset + 1) * step, (offset + 3) * step}
		for _, c := range counts {
			x = append(x, (offset+float64(c))*step)
		}
		if got, ok := Quantised(x); !ok || math.Abs(got-step) > 1e-9*step {
			t.Errorf("%v, %v, want %v", got, ok, step)
		}
	})
}
