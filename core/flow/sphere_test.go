package flow

import (
	"math"
	"testing"

	"pgregory.net/rapid"
)

// TestSphere: the formulas by hand, and a value of the standard drag curve
// (Clift, Grace and Weber 1978: 1.087 at Re = 100 and 27.1 at Re = 1, from
// memory), which the correlations hold within the 5 % said of them.
func TestSphere(t *testing.T) {
	check(t, []printed{
		{"sphere-stokes", nil, 0.1, 240, 1e-12},
		{"sphere-schiller-naumann", nil, 1, 24 * 1.15, 1e-13},
		{"sphere-brown-lawler", nil, 1, 24*1.15 + 0.407/8711, 1e-13},
		{"sphere-schiller-naumann", nil, 100, 1.087, 0.05 * 1.087},
		{"sphere-brown-lawler", nil, 100, 1.087, 0.05 * 1.087},
		{"sphere-schiller-naumann", nil, 1, 27.1, 0.05 * 27.1},
		{"sphere-brown-lawler", nil, 1, 27.1, 0.05 * 27.1},
	})
}

// TestSphereLimits: both correlations lie above Stokes, go over into it, and
// stay within 5 % of each other up to Re = 800.
func TestSphereLimits(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		re := math.Pow(10, rapid.Float64Range(-8, math.Log10(800)).Draw(t, "log10 Re"))
		stokes, first, second := 24/re, schillerNaumann(re), brownLawler(re)
		if first < stokes || second < stokes || math.Abs(second/first-1) > 0.05 {
			t.Fatalf("Re %v: %v, %v, %v", re, stokes, first, second)
		}
		if re < 1e-6 && first/stokes-1 > 2e-5 {
			t.Fatalf("Re %v: %v is not near %v", re, first, stokes)
		}
	})
}
