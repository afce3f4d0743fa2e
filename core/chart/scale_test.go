package chart

import (
	"fmt"
	"math"
	"testing"
)

func TestNewScale(t *testing.T) {
	for _, row := range []struct {
		lo, hi  float64
		steps   int
		want    string // numbers
		printed string
	}{
		{0, 1, 5, "[0 0.2 0.4 0.6 0.8 1]", "decimals:1:0"},
		{0.02, 0.98, 9, "[0 0.2 0.4 0.6 0.8 1]", "decimals:1:0"},
		{-0.0267, 0.0533, 4, "[-0.02 0 0.02 0.04 0.06]", "decimals:2:0"},
		{-1.74, 0.52, 5, "[-1.5 -1 -0.5 0 0.5]", "decimals:1:0"},
		{0, 0.0002, 4, "[0 5e-05 0.0001 0.00015 0.0002]", "decimals:0:-6"},
		{0, 0.3, 3, "[0 0.1 0.2 0.3]", "decimals:1:0"},
		{101300, 101420, 5, "[101300 101350 101400]", "decimals:2:3"},
		{-3e6, 2e6, 5, "[-3e+06 -2e+06 -1e+06 0 1e+06 2e+06]", "decimals:0:6"},
		{5, 5, 5, "[4.8 4.9 5 5.1 5.2]", "decimals:1:0"},
		{0, 0, 5, "[-1 -0.5 0 0.5 1]", "decimals:1:0"},
		{math.Inf(1), math.Inf(-1), 5, "[0 0.2 0.4 0.6 0.8 1]", "decimals:1:0"},
	} {
		s := newScale(bounds{row.lo, row.hi}, row.steps)
		if got := fmt.Sprint(s.numbers()); got != row.want || s.formatter() != row.printed {
			t.Errorf("%g to %g: %s %s, want %s %s", row.lo, row.hi, got, s.formatter(), row.want, row.printed)
		}
		if row.lo <= row.hi && (s.Min > row.lo || s.Max < row.hi) {
			t.Errorf("%g to %g: the axis runs from %g to %g", row.lo, row.hi, s.Min, s.Max)
		}
	}
}

// Numbers must be told apart as they are printed.
func TestNumbersAreTrueAsPrinted(t *testing.T) {
	for e := -9; e <= 9; e++ {
		for _, span := range []float64{1, 1.7, 2.3, 3.1, 4.9, 7.7} {
			s := newScale(bounds{0.37 * math.Pow10(e), (0.37 + span) * math.Pow10(e)}, 5)
			numbers := s.numbers()
			if len(numbers) < 3 || len(numbers) > 9 {
				t.Errorf("span %ge%d: %d numbers", span, e, len(numbers))
			}
			for _, v := range numbers {
				scaled := v / decimal(1, s.Exponent) * math.Pow10(s.Decimals)
				if math.Abs(scaled-math.Round(scaled)) > 1e-6 {
					t.Errorf("span %ge%d: %g is not true with %s", span, e, v, s.formatter())
				}
			}
		}
	}
}

func TestThin(t *testing.T) {
	value := func(i int) float64 {
		switch {
		case i == 700:
			return 9
		case i == 701:
			return -9
		case i >= 300 && i < 400:
			return math.NaN()
		}
		return float64(i % 3)
	}
	kept := thin(1000, 100, value)
	if len(kept) > 100 || kept[0] != 0 || kept[len(kept)-1] != 999 {
		t.Fatalf("%d kept, from %d to %d", len(kept), kept[0], kept[len(kept)-1])
	}
	found := map[int]bool{}
	gap := false
	for i, k := range kept {
		if i > 0 && k <= kept[i-1] {
			t.Fatalf("not in order: %v", kept)
		}
		found[k] = true
		gap = gap || math.IsNaN(value(k))
	}
	if !found[700] || !found[701] || !gap {
		t.Errorf("an extreme is left out, or the gap is closed: %v", kept)
	}
	if kept := thin(100, 100, value); len(kept) != 100 {
		t.Errorf("%d of 100 kept where all may be", len(kept))
	}
}
