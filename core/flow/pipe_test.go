package flow

import (
	"math"
	"testing"

	"pgregory.net/rapid"
)

// TestPipes: formulas from memory; numbers recomputed with scipy, ten decimals.
// The roughest row was recomputed with thirty digits (mpmath): the list of
// published examples has 0.0769868348, the same number cut, not rounded.
func TestPipes(t *testing.T) {
	rough := func(eps float64) map[string]float64 { return map[string]float64{"eps/D": eps} }
	check(t, []printed{
		{"pipe-laminar", nil, 2000, 0.032, 1e-17},
		{"pipe-colebrook", rough(0.001), 1e5, 0.0221745359, 5e-11},
		{"pipe-colebrook", rough(1e-4), 1e6, 0.0134414377, 5e-11},
		{"pipe-colebrook", rough(0.05), 4e3, 0.0769868348892, 5e-14},
		{"pipe-colebrook", rough(0), 1e5, 0.0179897731, 5e-11},
		{"pipe-prandtl", nil, 1e5, 0.0179925939, 5e-11},
		{"pipe-haaland", rough(0.001), 1e5, 0.0219662140, 5e-11},
		{"pipe-haaland", rough(1e-4), 1e6, 0.0133261595, 5e-11},
		{"pipe-haaland", rough(0.05), 4e3, 0.0776348801, 5e-11},
		{"pipe-blasius", nil, 1e5, 0.0177924795, 5e-11},
	})
}

// TestColebrookSolves: the implicit equation holds; f rises with roughness and
// falls with Re; Haaland's explicit form stays within 2 % in the stated range.
func TestColebrookSolves(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		eps := rapid.Float64Range(0, 0.05).Draw(t, "eps")
		re := math.Pow(10, rapid.Float64Range(math.Log10(4000), 8).Draw(t, "log10 Re"))
		f := colebrook(eps, re)
		y := 1 / math.Sqrt(f)
		if right := -2 * math.Log10(eps/3.7+2.51*y/re); math.Abs(y-right) > 1e-12*y {
			t.Fatalf("%v and %v", y, right)
		}
		if colebrook(eps+0.001, re) <= f || colebrook(eps, 1.1*re) > f {
			t.Fatalf("f at (%v, %v) is not between its neighbours", eps, re)
		}
		if h := haaland(eps, re); math.Abs(h/f-1) > 0.02 {
			t.Fatalf("Haaland %v, Colebrook %v", h, f)
		}
		s := smoothPipe(re)
		if left, right := 1/math.Sqrt(s), 2*math.Log10(re*math.Sqrt(s))-0.8; math.Abs(left-right) > 1e-12*left {
			t.Fatalf("smooth: %v and %v", left, right)
		}
	})
	// Fully rough: f no longer depends on Re, 1/sqrt(f) = -2 log10(eps/3.7).
	if got, want := colebrook(0.01, 1e15), math.Pow(-2*math.Log10(0.01/3.7), -2); math.Abs(got-want) > 1e-12 {
		t.Errorf("fully rough %v, want %v", got, want)
	}
}
