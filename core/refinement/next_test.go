package refinement

import (
	"math"
	"testing"
)

// TestNextGrid: a family refined as it says has the uncertainty asked for.
func TestNextGrid(t *testing.T) {
	counts, values := []float64{8e6, 1e6, 1.25e5}, []float64{1, 0, 0}
	family := func(p, shrink float64) []float64 {
		for i, h := range []float64{1, 2, 4} {
			values[i] = 5 + 0.1*math.Pow(h*shrink, p)
		}
		return values
	}
	for _, p := range []float64{1, 1.5, 2, 2.5} {
		opt := Options{Formal: 2}
		r := Three(counts, family(p, 1), 3, opt)
		next := NextGrid(r, 3, opt, r.U, r.U/3, 0)
		shrink := math.Cbrt(counts[0] / next.Cells)
		if finer := Three(counts, family(p, shrink), 3, opt); math.Abs(finer.U-r.U/3) > 1e-9*r.U {
			t.Errorf("p %v: U %v, asked for %v", p, finer.U, r.U/3)
		}
		if want := math.Pow(next.Cells/counts[0], 4./3); math.Abs(next.Cost-want) > 1e-12*want {
			t.Errorf("p %v: cost %v, want %v", p, next.Cost, want)
		}
		if steady := NextGrid(r, 3, opt, r.U, r.U/3, 1); math.Abs(steady.Cost-steady.Cells/counts[0]) > 1e-12*steady.Cost {
			t.Errorf("p %v: cost %v of %v cells with exponent 1", p, steady.Cost, steady.Cells)
		}
	}
}

// TestNextGridIsNotTold: without a credible order, or with nothing to gain.
func TestNextGridIsNotTold(t *testing.T) {
	counts := []float64{16, 4, 1}
	power := func(p float64) Result {
		return Three(counts, []float64{1, math.Pow(2, p), math.Pow(4, p)}, 2, Options{})
	}
	for _, row := range []struct {
		what      string
		r         Result
		u, target float64
		known     bool
	}{
		{"second order", power(2), 1, .5, true},
		{"order 0.9", power(.9), 1, .5, false},
		{"order 3.1", power(3.1), 1, .5, false},
		{"reached", power(2), 1, 1, false},
		{"nothing left", power(2), 1, 0, false},
		{"unknown", power(2), math.NaN(), 1, false},
		{"oscillatory", Three(counts, []float64{1, 1.25, .25}, 2, Options{}), 1, .5, false},
		{"diverging", Three(counts, []float64{1, 2, 2.25}, 2, Options{}), 1, .5, false},
		{"two grids", Study(counts[:2], []float64{1, 2}, 2, Options{Rule: RuleTwo}), 1, .5, false},
	} {
		if next := NextGrid(row.r, 2, Options{}, row.u, row.target, 0); math.IsNaN(next.Cells) == row.known || math.IsNaN(next.Cost) == row.known {
			t.Errorf("%s: %+v", row.what, next)
		}
	}
}
