package uncertainty

import (
	"math"
	"slices"
	"testing"

	"pgregory.net/rapid"
)

var nan = math.NaN()

// same compares slices; NaN equals NaN.
func same(a, b []float64, tolerance float64) bool {
	return slices.EqualFunc(a, b, func(x, y float64) bool {
		return math.IsNaN(x) && math.IsNaN(y) || math.Abs(x-y) <= tolerance*math.Abs(y)
	})
}

func TestCombine(t *testing.T) {
	for _, row := range []struct {
		name     string
		sources  []Source
		variance []float64
		common   int
		total    []float64
	}{
		{"none", nil, []float64{0, 0}, 0, []float64{0, 0}},
		{"one independent", []Source{{U: []float64{3, 4}}}, []float64{9, 16}, 0, []float64{3, 4}},
		{"3, 4, 12 make 13", []Source{{U: []float64{3, 0}}, {U: []float64{4, 5}}, {U: []float64{12, 12}}}, []float64{169, 169}, 0, []float64{13, 13}},
		{"a common source leaves the diagonal part", []Source{{U: []float64{3, 5}}, {U: []float64{4, 12}, Common: true}}, []float64{9, 25}, 1, []float64{5, 13}},
		{"two common sources stay apart", []Source{{U: []float64{3, 3}, Common: true}, {U: []float64{4, 4}, Common: true}}, []float64{0, 0}, 2, []float64{5, 5}},
		{"unknown is not zero", []Source{{U: []float64{3, nan}}, {U: []float64{4, 4}}}, []float64{25, nan}, 0, []float64{5, nan}},
		{"unknown in a common source", []Source{{U: []float64{3, 3}}, {U: []float64{nan, 4}, Common: true}}, []float64{9, 9}, 1, []float64{nan, 5}},
	} {
		b := Combine(2, row.sources)
		if !same(b.Variance, row.variance, 0) || len(b.Common) != row.common || !same(b.Total(), row.total, 0) {
			t.Errorf("%s: %+v, total %v", row.name, b, b.Total())
		}
	}
}

// TestTotalIsTheDiagonal: the total of a budget does not depend on which
// sources are common, nor on their order beyond rounding.
func TestTotalIsTheDiagonal(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		n := rapid.IntRange(1, 20).Draw(t, "stations")
		u := rapid.SliceOfN(rapid.Float64Range(0, 1e6), n, n)
		sources := rapid.SliceOfN(rapid.Custom(func(t *rapid.T) Source {
			return Source{U: u.Draw(t, "u"), Common: rapid.Bool().Draw(t, "common")}
		}), 1, 6).Draw(t, "sources")
		total := Combine(n, sources).Total()
		slices.Reverse(sources)
		for i := range sources {
			sources[i].Common = !sources[i].Common
		}
		// Six squares are summed in another order: a few units of the last place.
		if again := Combine(n, sources).Total(); !same(again, total, 1e-15) {
			t.Errorf("%v, then %v", total, again)
		}
	})
}

func TestStationwise(t *testing.T) {
	d := []float64{-2, 0, 10, nan}
	if got := OfReading(d, 0.05); !same(got, []float64{0.1, 0, 0.5, nan}, 1e-16) {
		t.Errorf("OfReading: %v", got)
	}
	if got := Constant(3, 0.5); !same(got, []float64{0.5, 0.5, 0.5}, 0) {
		t.Errorf("Constant: %v", got)
	}
	if got := Scaled([]float64{1, 0, nan}, 2); !same(got, []float64{0.5, 0, nan}, 0) {
		t.Errorf("Scaled: %v", got)
	}
	if d[0] != -2 {
		t.Error("the readings were changed")
	}
}

func TestReplicates(t *testing.T) {
	for _, row := range []struct {
		name       string
		x          []float64
		mean, s, u float64
		tolerance  float64
		source     string
	}{
		{"V of the GUM", []float64{5.007, 4.994, 5.005, 4.990, 4.999}, 4.999, math.Sqrt(5) * 0.0032093613, 0.0032093613, 1e-7,
			"JCGM 100 H.2, published-examples 3.2: 4.9990 (0.0032) printed, 0.0032093613 recomputed there"},
		{"I of the GUM, mA", []float64{19.663, 19.639, 19.640, 19.685, 19.678}, 19.661, math.Sqrt(5) * 0.0094710084, 0.0094710084, 1e-7,
			"JCGM 100 H.2, published-examples 3.2: 19.6610 (0.0095) printed, 0.0094710084 recomputed there"},
		{"phi of the GUM, rad", []float64{1.0456, 1.0438, 1.0468, 1.0428, 1.0433}, 1.04446, math.Sqrt(5) * 0.00075206383, 0.00075206383, 1e-7,
			"JCGM 100 H.2, published-examples 3.2: 1.04446 (0.00075) printed, 0.00075206383 recomputed there"},
		{"NumAcc1", []float64{10000001, 10000003, 10000002}, 10000002, 1, 1 / math.Sqrt(3), 1e-15,
			"NIST StRD NumAcc1: mean 10000002, standard deviation 1, both exact"},
		{"equal readings", []float64{0.1, 0.1, 0.1, 0.1}, 0.1, 0, 0, 1e-15, "no scatter"},
	} {
		mean, s, u := Replicates(row.x)
		if !same([]float64{mean, s, u}, []float64{row.mean, row.s, row.u}, row.tolerance) {
			t.Errorf("%s: %v, %v, %v, want %v, %v, %v (%s)", row.name, mean, s, u, row.mean, row.s, row.u, row.source)
		}
	}
}

// TestNumAcc4: NIST StRD, 1001 values 10000000.2, then 10000000.1 and
// 10000000.3 in turn; mean 10000000.2 and standard deviation 0.1 exactly. In
// double precision the inputs themselves limit the deviation to about 8.3
// digits (published-examples 7), hence 1e-9 in it; the mean has the last place
// of its own size, 1.9e-9.
func TestNumAcc4(t *testing.T) {
	x := []float64{10000000.2}
	for range 500 {
		x = append(x, 10000000.1, 10000000.3)
	}
	mean, s, _ := Replicates(x)
	if math.Abs(mean-10000000.2) > 2e-9 || math.Abs(s-0.1) > 1e-9 {
		t.Errorf("mean %v, s %v", mean, s)
	}
}

func TestReplicatesNeedTwo(t *testing.T) {
	if mean, s, u := Replicates([]float64{3}); mean != 3 || !math.IsNaN(s) || !math.IsNaN(u) {
		t.Errorf("one reading: %v, %v, %v", mean, s, u)
	}
	if mean, s, u := Replicates(nil); !math.IsNaN(mean) || !math.IsNaN(s) || !math.IsNaN(u) {
		t.Errorf("no reading: %v, %v, %v", mean, s, u)
	}
}
