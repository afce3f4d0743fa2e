package chart

import (
	"math"

	"weirmark/core/quantity"
)

// Most marks and most corners of a line that one figure draws. More are not
// told apart on its width, and make it slow.
const (
	mostMarks   = 400
	mostCorners = 1500
)

// thin returns which of n values to draw, in order: all where there are at most
// limit, else the first, the last, and the least and greatest of each stretch,
// one missing value standing for a stretch without any. Ties go to the first
// of values that are equal as printed.
func thin(n, limit int, value func(int) float64) []int {
	if n <= limit {
		all := make([]int, n)
		for i := range all {
			all[i] = i
		}
		return all
	}
	kept := make([]int, 0, limit)
	keep := func(i int) {
		if len(kept) == 0 || kept[len(kept)-1] < i {
			kept = append(kept, i)
		}
	}
	keep(0)
	stretches := (limit - 2) / 2
	for k := range stretches {
		from, to := k*n/stretches, (k+1)*n/stretches
		least, greatest := extremes(from, to, value)
		keep(min(least, greatest))
		keep(max(least, greatest))
	}
	keep(n - 1)
	return kept
}

// extremes returns where the least and the greatest value of from to to-1
// stand; both are from where no value is finite.
func extremes(from, to int, value func(int) float64) (least, greatest int) {
	least, greatest = from, from
	lo, hi := math.Inf(1), math.Inf(-1)
	for i := from; i < to; i++ {
		v := quantity.Round(value(i), 10)
		if v < lo {
			lo, least = v, i
		}
		if v > hi {
			hi, greatest = v, i
		}
	}
	return least, greatest
}
