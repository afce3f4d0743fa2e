package comparison

import (
	"math"
	"slices"
	"testing"

	"pgregory.net/rapid"
)

func same(a, b []float64, tolerance float64) bool {
	return slices.EqualFunc(a, b, func(x, y float64) bool {
		return math.IsNaN(x) && math.IsNaN(y) || math.Abs(x-y) <= tolerance*math.Abs(y)
	})
}

// TestScalar: S = 105, D = 100, u_num = 2, u_input = 3, u_D = 4, exactly
// solvable (published-examples section 2, provenance C).
func TestScalar(t *testing.T) {
	e := Error([]float64{105}, []float64{100})
	u := RootSum([]float64{2}, []float64{3}, []float64{4})
	if e[0] != 5 || !same(u, []float64{math.Sqrt(29)}, 1e-15) || !same(u, []float64{5.3851648071}, 1e-10) {
		t.Errorf("E = %v, u_val = %v", e, u)
	}
	if low, high := e[0]-2*u[0], e[0]+2*u[0]; math.Abs(low+5.7703296143) > 5e-11 || math.Abs(high-15.7703296143) > 5e-11 {
		t.Errorf("interval %v to %v", low, high)
	}
	if r := Ratio(e, u); !same(r, []float64{5 / math.Sqrt(29)}, 1e-15) {
		t.Errorf("ratio %v", r)
	}
}

func TestError(t *testing.T) {
	got := Error([]float64{1, 2, math.NaN(), 0}, []float64{0.5, 3, 1, 0})
	if want := []float64{0.5, -1, math.NaN(), 0}; !same(got, want, 0) {
		t.Errorf("%v, want %v", got, want)
	}
	if got := Error(nil, nil); len(got) != 0 {
		t.Errorf("no stations: %v", got)
	}
}

func TestRootSum(t *testing.T) {
	for _, row := range []struct {
		name  string
		parts [][]float64
		want  []float64
	}{
		{"no part", nil, nil},
		{"only parts that are left out", [][]float64{nil, nil}, nil},
		{"one part", [][]float64{{3, 0}}, []float64{3, 0}},
		{"a part that is left out", [][]float64{nil, {3, 5}, nil, {4, 12}}, []float64{5, 13}},
		{"unknown is not zero", [][]float64{{3, 3}, {math.NaN(), 4}}, []float64{math.NaN(), 5}},
	} {
		if got := RootSum(row.parts...); !same(got, row.want, 0) {
			t.Errorf("%s: %v, want %v", row.name, got, row.want)
		}
	}
}

func TestRatio(t *testing.T) {
	e := []float64{1, -1, 0, 1, 0, 1, math.NaN()}
	u := []float64{0.5, 0.5, 0.5, 0, 0, math.NaN(), 1}
	nan := math.NaN()
	if got, want := Ratio(e, u), []float64{2, 2, 0, nan, nan, nan, nan}; !same(got, want, 0) {
		t.Errorf("%v, want %v", got, want)
	}
}

// TestRatioSquaresAreTheStatistic: with independent stations the joint
// statistic is the sum of the squares of the ratios.
func TestRatioSquaresAreTheStatistic(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		n := rapid.IntRange(1, 30).Draw(t, "stations")
		e := rapid.SliceOfN(rapid.Float64Range(-1e3, 1e3), n, n).Draw(t, "e")
		u := rapid.Float64Range(1e-3, 1e3).Draw(t, "u")
		b := budget(n, []float64{u}, nil)
		sum := 0.0
		for _, r := range Ratio(e, b.Total()) {
			sum += r * r
		}
		if q, err := Statistic(e, b); err != nil || !near(q.Statistic, sum, 1e-13) {
			t.Errorf("%+v, %v, want %v", q, err, sum)
		}
	})
}
