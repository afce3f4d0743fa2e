package uncertainty

import (
	"math"
	"slices"
	"testing"

	"pgregory.net/rapid"
)

func sorted(x []float64) ([]float64, bool) {
	s := slices.Clone(x)
	slices.Sort(s)
	return s, true
}

// TestShortestInterval: the definition, on all values in order.
func TestShortestInterval(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		x := rapid.SliceOfN(rapid.Map(rapid.IntRange(-50, 50), func(i int) float64 { return float64(i) / 8 }), 2, 200).Draw(t, "values")
		level := rapid.Float64Range(0.01, 0.99).Draw(t, "level")
		all, _ := sorted(x)
		q := int(level*float64(len(x)) + 0.5)
		low, high, ok := ShortestInterval(slices.Clone(x), level)
		if ok != (q >= 1 && q < len(x)) {
			t.Fatalf("q %d of %d: %v", q, len(x), ok)
		}
		if !ok {
			return
		}
		wantLow, wantHigh := all[0], all[q]
		for r := range len(all) - q {
			if all[r+q]-all[r] < wantHigh-wantLow {
				wantLow, wantHigh = all[r], all[r+q]
			}
		}
		if low != wantLow || high != wantHigh {
			t.Errorf("%v to %v, want %v to %v", low, high, wantLow, wantHigh)
		}
	})
}

func TestMedian(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		x := rapid.SliceOfN(rapid.Map(rapid.IntRange(-50, 50), func(i int) float64 { return float64(i) }), 1, 99).Draw(t, "values")
		all, _ := sorted(x)
		n := len(x)
		want := (all[(n-1)/2] + all[n/2]) / 2
		if got := median(x); got != want {
			t.Errorf("%v, want %v", got, want)
		}
	})
}

func TestShortestIntervalRefuses(t *testing.T) {
	for _, level := range []float64{0, 1, -1, 2, nan, 0.1, 0.95} {
		if low, high, ok := ShortestInterval([]float64{1, 2, 3}, level); ok || !math.IsNaN(low) || !math.IsNaN(high) {
			t.Errorf("level %v: %v to %v", level, low, high)
		}
	}
}
