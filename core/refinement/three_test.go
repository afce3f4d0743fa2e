package refinement

import (
	"math"
	"slices"
	"testing"

	"pgregory.net/rapid"

	"weirmark/core/notice"
)

var nan = math.NaN()

func codes(list []notice.Notice) []string {
	var all []string
	for _, n := range list {
		all = append(all, n.Code)
	}
	return all
}

// TestClasses is the table of decided answers: canonical triples, zeros,
// equal values and what the input may lack. Counts 16, 4, 1 in two dimensions
// are r = 2.
func TestClasses(t *testing.T) {
	family := []float64{16, 4, 1}
	for _, row := range []struct {
		what           string
		counts, values []float64
		class          Class
		notices        []string
	}{
		{"monotone", family, []float64{1, 1.25, 2.25}, Monotone, nil},
		{"falling", family, []float64{-1, -1.25, -2.25}, Monotone, nil},
		{"oscillatory", family, []float64{1, 1.25, 0.25}, Oscillatory, []string{"grid-oscillatory"}},
		{"diverging", family, []float64{1, 2, 2.25}, Diverging, []string{"grid-diverging"}},
		{"oscillatory and diverging", family, []float64{1, 2, 1.75}, OscillatoryDiverging, []string{"grid-diverging"}},
		{"oscillating undamped", family, []float64{1, 2, 1}, OscillatoryDiverging, []string{"grid-diverging"}},
		{"flat", family, []float64{3, 3, 3}, Flat, []string{"grid-flat"}},
		{"flat but for rounding", family, []float64{3, 3 + 1e-12, 3}, Flat, []string{"grid-flat"}},
		{"all zero", family, []float64{0, 0, 0}, Flat, []string{"grid-flat"}},
		{"constant differences", family, []float64{1, 2, 3}, Insufficient, []string{"grid-undefined"}},
		{"fine values equal", family, []float64{1, 1, 2}, Insufficient, []string{"grid-undefined"}},
		{"fine values equal but for rounding", family, []float64{1, 1 + 1e-13, 2}, Insufficient, []string{"grid-undefined"}},
		{"coarse values equal", family, []float64{1, 2, 2}, Insufficient, []string{"grid-undefined"}},
		{"fine value zero", family, []float64{0, 0.25, 1.25}, Monotone, []string{"grid-zero-value"}},
		{"middle value zero", family, []float64{-0.25, 0, 1}, Monotone, nil},
		{"extrapolates to zero", family, []float64{0.25, 1, 4}, Monotone, nil},

		// First-order data on h = 1, 1.5, 2: the plain ratio is 1, the scaled is below.
		{"unequal ratios", []float64{1, 1 / 2.25, 0.25}, []float64{1, 1.5, 2}, Monotone, nil},
		// h = 1, 2, 2.5 and log h: the plain ratio is 3.1, the scaled is 1.
		{"logarithmic", []float64{1, 0.25, 0.16}, []float64{0, math.Ln2, math.Log(2.5)}, Insufficient, []string{"grid-ratio", "grid-undefined"}},
		{"close grids", []float64{1, 1 / 1.21, 1 / 1.4641}, []float64{1, 1.1, 1.21 * 1.1}, Monotone, []string{"grid-ratio", "grid-order-high"}},

		{"no grids", nil, nil, Insufficient, []string{"grid-few"}},
		{"two grids", []float64{4, 1}, []float64{1, 2}, Insufficient, []string{"grid-few"}},
		{"value missing", family, []float64{1, nan, 2}, Insufficient, []string{"grid-few"}},
		{"count missing", []float64{16, nan, 1}, []float64{1, 2, 3}, Insufficient, []string{"grid-few"}},
		{"count zero or negative", []float64{16, 0, -1}, []float64{1, 2, 3}, Insufficient, []string{"grid-few"}},
		{"infinite", []float64{math.Inf(1), 4, 1}, []float64{1, math.Inf(-1), 3}, Insufficient, []string{"grid-few"}},
		{"repeated row", []float64{16, 4, 4, 1}, []float64{1, 1.25, 1.25, 2.25}, Monotone, nil},
		{"repeated count, other value", []float64{16, 4, 4, 1}, []float64{1, 1.25, 1.3, 2.25}, Insufficient, []string{"grid-duplicate"}},
		{"repeated count among the unused", []float64{16, 4, 1, .25, .25}, []float64{1, 1.25, 2.25, 7, 8}, Monotone, []string{"grid-finest-three"}},
		{"order of rows", []float64{1, 16, 4}, []float64{2.25, 1, 1.25}, Monotone, nil},
		{"counts hardly different", []float64{1, math.Nextafter(1, 0), 0.25}, []float64{1, 2, 4}, Insufficient, []string{"grid-ratio", "grid-undefined"}},
	} {
		r := Three(row.counts, row.values, 2, Options{})
		if r.Class != row.class || !slices.Equal(codes(r.Notices), row.notices) {
			t.Errorf("%s: %s, notices %v", row.what, r.Class, codes(r.Notices))
		}
		if r.Rule == "" {
			t.Errorf("%s: no rule", row.what)
		}
		known := func(v float64) bool { return !math.IsNaN(v) && !math.IsInf(v, 0) }
		u := r.StandardUncertainty(2)
		switch r.Class {
		case Monotone:
			if !(r.U > 0 && u == r.U/2 && r.Order > 0 && known(r.Extrapolated)) || !math.IsNaN(r.UStandard) {
				t.Errorf("%s: %+v", row.what, r)
			}
		case Oscillatory:
			if !(u > 0 && u == r.UStandard) || known(r.U) || known(r.Order) {
				t.Errorf("%s: %+v", row.what, r)
			}
		default:
			if known(u) || known(r.U) || known(r.UStandard) || known(r.Order) || known(r.GCI) || known(r.Extrapolated) {
				t.Errorf("%s: %+v", row.what, r)
			}
		}
	}
}

// TestZeros: relative numbers without a meaning are NaN, the others stay.
func TestZeros(t *testing.T) {
	family := []float64{16, 4, 1}
	r := Three(family, []float64{0, 0.25, 1.25}, 2, Options{}) // p = 2
	if !math.IsNaN(r.Ea) || !math.IsNaN(r.GCI) || math.Abs(r.U-1.25*0.25/3) > 1e-15 || math.Abs(r.Eext-1) > 1e-15 {
		t.Errorf("fine value zero: %+v", r)
	}
	r = Three(family, []float64{0.25, 1, 4}, 2, Options{}) // exactly h^2/4: zero at zero spacing
	if r.Extrapolated != 0 || !math.IsNaN(r.Eext) || math.Abs(r.GCI-1.25) > 1e-15 {
		t.Errorf("extrapolated value zero: %+v", r)
	}
}

func TestDimension(t *testing.T) {
	for dim, r21 := range map[int]float64{1: 64, 2: 8, 3: 4} {
		r := Three([]float64{64, 1, 1. / 64}, []float64{1, 2, 5}, dim, Options{})
		if math.Abs(r.R21-r21) > 1e-14 || r.R32 != r.R21 {
			t.Errorf("dim %d: r21 %v, r32 %v", dim, r.R21, r.R32)
		}
	}
	for _, dim := range []int{-1, 0, 4} {
		if r := Three([]float64{64, 1, 1. / 64}, []float64{1, 2, 5}, dim, Options{}); r.Class != Insufficient || !notice.Has(r.Notices, "grid-dimension") {
			t.Errorf("dim %d: %+v", dim, r)
		}
	}
}

// TestBounds: each limit of the bounded rule once on either side. r = 2,
// values by f = h^p.
func TestBounds(t *testing.T) {
	for _, row := range []struct {
		p      float64
		code   string
		factor float64 // U over 1.25 |e21|
	}{
		// p = 0.3: the range over e21 is 1 + 2^0.3, the plain factor 1/(2^0.3 - 1) = 4.33.
		{0.3, "grid-bounded-low", 1 + math.Pow(2, 0.3)},
		{0.94, "", 1 / (math.Pow(2, 0.94) - 1)},
		{2, "", 1. / 3},
		{3.04, "", 1 / (math.Pow(2, 3.04) - 1)},
		// Above 3.05 the range 1 + 2^p is always more than 1/7.
		{3.06, "grid-bounded-high", 1 + math.Pow(2, 3.06)},
	} {
		values := []float64{1, math.Pow(2, row.p), math.Pow(4, row.p)}
		e21 := values[1] - values[0]
		r := Three([]float64{16, 4, 1}, values, 2, Options{Bounded: true, Formal: 2})
		if math.Abs(r.U-1.25*e21*row.factor) > 1e-12*r.U {
			t.Errorf("p %v: U %v, want %v", row.p, r.U, 1.25*e21*row.factor)
		}
		for _, code := range []string{"grid-bounded-low", "grid-bounded-high"} {
			if notice.Has(r.Notices, code) != (code == row.code) {
				t.Errorf("p %v: notices %v", row.p, codes(r.Notices))
			}
		}
		plain := Three([]float64{16, 4, 1}, values, 2, Options{})
		if math.Abs(plain.U-1.25*e21/(math.Pow(2, row.p)-1)) > 1e-12*plain.U {
			t.Errorf("p %v: plain U %v", row.p, plain.U)
		}
	}
}

func TestOffFormal(t *testing.T) {
	for _, row := range []struct {
		p, formal float64
		code      string
	}{
		{0.4, 1, "grid-order-low"}, {0.6, 1, ""}, {1.4, 1, ""}, {1.6, 1, "grid-order-high"},
		{0.9, 0, "grid-order-low"}, {2.9, 0, ""}, {3.1, 0, "grid-order-high"}, // 0 stands for 2
	} {
		r := Three([]float64{16, 4, 1}, []float64{1, math.Pow(2, row.p), math.Pow(4, row.p)}, 2, Options{Formal: row.formal})
		for _, code := range []string{"grid-order-low", "grid-order-high"} {
			if notice.Has(r.Notices, code) != (code == row.code) {
				t.Errorf("p %v, formal %v: %v", row.p, row.formal, codes(r.Notices))
			}
		}
	}
}

// TestNotSolved: very unequal ratios for which the usual formula has no order.
func TestNotSolved(t *testing.T) {
	r := Three([]float64{9 * 1.21, 9, 1}, []float64{1, 2, 1.9}, 2, Options{})
	if r.Class != OscillatoryDiverging || !notice.Has(r.Notices, "grid-not-solved") {
		t.Errorf("%s, %v", r.Class, r.Notices)
	}
}

// TestExactPowerLaw: values f0 + a h^p on any three grids give back p and f0,
// and U = 1.25 a h1^p. The tolerance follows from the rounding of the
// differences, about 1e-16/|e21|.
func TestExactPowerLaw(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		p := rapid.Float64Range(0.3, 4).Draw(t, "order")
		a := rapid.SampledFrom([]float64{-1, 1}).Draw(t, "sign") * rapid.Float64Range(0.1, 10).Draw(t, "size")
		f0 := rapid.Float64Range(-10, 10).Draw(t, "limit")
		h := []float64{1, 0, 0}
		h[1] = rapid.Float64Range(1.1, 3).Draw(t, "r21")
		h[2] = h[1] * rapid.Float64Range(1.1, 3).Draw(t, "r32")
		dim := rapid.IntRange(1, 3).Draw(t, "dimension")
		counts, values := make([]float64, 3), make([]float64, 3)
		for i, v := range h {
			counts[i], values[i] = 1e6/math.Pow(v, float64(dim)), f0+a*math.Pow(v, p)
		}
		r := Three(counts, values, dim, Options{})
		if r.Class != Monotone || math.Abs(r.Order-p) > 1e-9 || math.Abs(r.Extrapolated-f0) > 1e-8 || math.Abs(r.U-1.25*math.Abs(a)) > 1e-7 {
			t.Fatalf("%+v", r)
		}
	})
}

// TestInvariance: neither the order of the rows, nor a unit of the values, nor
// the sign, nor a common factor of the counts changes the study.
func TestInvariance(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		n := rapid.IntRange(3, 6).Draw(t, "grids")
		counts := make([]float64, n)
		at := 100.0
		for i := range counts {
			counts[i] = at
			at *= rapid.Float64Range(1.5, 10).Draw(t, "factor")
		}
		values := rapid.SliceOfN(rapid.Float64Range(-1, 1), n, n).Draw(t, "values")
		opt := Options{Bounded: rapid.Bool().Draw(t, "bounded")}
		r := Three(counts, values, 2, opt)

		order := rapid.Permutation(slices.Collect(func(yield func(int) bool) {
			for i := range n {
				if !yield(i) {
					return
				}
			}
		})).Draw(t, "order of rows")
		const unit = -1024
		c, v := make([]float64, n), make([]float64, n)
		for i, k := range order {
			c[i], v[i] = counts[k]*64, values[k]*unit
		}
		s := Three(c, v, 2, opt)
		same := func(a, b float64) bool { return a == b || math.IsNaN(a) && math.IsNaN(b) }
		if r.Class != s.Class || !same(r.Order, s.Order) || !same(r.GCI, s.GCI) || !same(r.U*1024, s.U) || !same(r.UStandard*1024, s.UStandard) ||
			!same(r.Extrapolated*unit, s.Extrapolated) || !same(r.Ratio, s.Ratio) || !same(r.HalfRange*1024, s.HalfRange) {
			t.Fatalf("%+v\n%+v", r, s)
		}
	})
}
