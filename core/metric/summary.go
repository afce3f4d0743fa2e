// Package metric holds difference measures over the common stations. Each is
// in the unit of the quantity and takes the comparison error E; none says
// anything about agreement without the uncertainty beside it.
package metric

import (
	"math"

	"weirmark/core/quantity"
)

// Summary of a comparison error.
type Summary struct {
	N      int
	Bias   float64 // mean of e
	MAE    float64 // mean of |e|
	RMSE   float64 // root of the mean of e squared
	MaxAbs float64 // largest |e|
	MaxAt  int     // its index
}

// Summarise returns the summary of e; of no stations, zeros with N = 0. A NaN
// in e makes every mean NaN: the caller leaves out what is not compared.
func Summarise(e []float64) Summary {
	s := Summary{N: len(e)}
	if s.N == 0 {
		return s
	}
	sum, absolute, squares := 0.0, 0.0, 0.0
	for i, v := range e {
		sum += v
		absolute += math.Abs(v)
		squares += float64(v * v)
		if math.Abs(v) > s.MaxAbs {
			s.MaxAbs, s.MaxAt = math.Abs(v), i
		}
	}
	n := float64(s.N)
	s.Bias, s.MAE, s.RMSE = sum/n, absolute/n, math.Sqrt(squares/n)
	return s
}

// Within counts the stations with ratio <= k, both as printed with ten digits,
// so that the count agrees with the printed ratios and does not hang on last
// bits. NaN counts as neither.
func Within(ratio []float64, k float64) int {
	limit := printedAs(k)
	n := 0
	for _, r := range ratio {
		if r <= limit {
			n++
		}
	}
	return n
}

// printedAs returns the largest number that is printed as k, by bisection.
func printedAs(k float64) float64 {
	k = quantity.Round(k, 10)
	below, above := k, k+1e-8*math.Abs(k)
	for {
		middle := below + (above-below)/2
		switch {
		case !(below < middle && middle < above):
			return below
		case quantity.Round(middle, 10) <= k:
			below = middle
		default:
			above = middle
		}
	}
}
