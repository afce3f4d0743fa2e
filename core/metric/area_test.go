package metric

import (
	"math"
	"slices"
	"testing"

	"pgregory.net/rapid"
)

// TestArea: exactly solvable rows of published-examples 4.2.
func TestArea(t *testing.T) {
	for _, row := range []struct {
		name string
		a, b []float64
		want float64
	}{
		{"{1, 2, 3} against {2, 3, 7}", []float64{1, 2, 3}, []float64{2, 3, 7}, 2},
		{"equal means, not equal", []float64{0, 1, 2, 3}, []float64{0.5, 2.5}, 0.5},
		{"order does not matter", []float64{3, 0, 2, 1}, []float64{2.5, 0.5}, 0.5},
		{"apart: the difference of means", []float64{0, 1}, []float64{10, 11, 12}, 10.5},
		{"repeated values", []float64{1, 1, 2}, []float64{1, 2, 2}, 1. / 3},
		{"itself", []float64{4, 5, 5}, []float64{5, 4, 5}, 0},
	} {
		if got := Area(row.a, row.b); math.Abs(got-row.want) > 1e-15 {
			t.Errorf("%s: %v, want %v", row.name, got, row.want)
		}
	}
	for _, bad := range [][]float64{nil, {math.NaN()}, {math.Inf(1)}} {
		if got := Area(bad, []float64{1}); !math.IsNaN(got) {
			t.Errorf("%v: %v", bad, got)
		}
		if got := Area([]float64{1}, bad); !math.IsNaN(got) {
			t.Errorf("%v on the other side: %v", bad, got)
		}
		if got := AreaNormal(0, 1, bad); !math.IsNaN(got) {
			t.Errorf("normal against %v: %v", bad, got)
		}
	}
	if got := AreaNormal(0, 0, []float64{1}); !math.IsNaN(got) {
		t.Errorf("no deviation: %v", got)
	}
}

// TestAreaOfShift: J8, a uniform shift has the area of the shift.
func TestAreaOfShift(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		a := rapid.SliceOfN(rapid.Float64Range(-100, 100), 1, 30).Draw(t, "a")
		shift := rapid.Float64Range(-50, 50).Draw(t, "shift")
		b := slices.Clone(a)
		for i := range b {
			b[i] += shift
		}
		if got := Area(a, b); math.Abs(got-math.Abs(shift)) > 1e-11 {
			t.Errorf("%v, want %v", got, math.Abs(shift))
		}
		if there, back := Area(a, b), Area(b, a); math.Abs(there-back) > 1e-12 {
			t.Errorf("%v there, %v back", there, back)
		}
	})
}

// TestAreaNormal: closed forms of published-examples 4.2, to the ten decimals
// printed there.
func TestAreaNormal(t *testing.T) {
	for _, row := range []struct {
		mean, s float64
		sample  []float64
		want    float64
	}{
		{0, 1, []float64{0}, 0.7978845608},
		{0, 1, []float64{0.5}, 0.8955931148},
		{3, 1, []float64{2}, 1.1666309412},
		{3, 2, []float64{7}, 2 * 2.0169814052},
		{10, 1.5, []float64{7.2, 8.1, 9.9, 11.4}, 0.9161431183},
		{10, 1.5, []float64{11.4, 9.9, 7.2, 8.1}, 0.9161431183},
	} {
		if got := AreaNormal(row.mean, row.s, row.sample); math.Abs(got-row.want) > 1.1e-10 {
			t.Errorf("N(%v, %v) against %v: %v, want %v", row.mean, row.s, row.sample, got, row.want)
		}
	}
}
