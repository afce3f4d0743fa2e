// Package metric holds difference measures over the common stations. Each is
// in the unit of the quantity and takes the comparison error E; none says
// anything about agreement without the uncertainty beside it.
package metric

import "math"

// Summary of a comparison error.
type Summary struct {
	N      int
	Bias   float64 // mean of e
	MAE    float64 // mean of |e|
	RMSE   float64 // root of the mean of e squared
	MaxAbs float64 // largest |e|
	MaxAt  int     // its index
}

// Summarise returns the summary of e; of no stations, zeros with N = 0.
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

// Within counts the stations with ratio <= k; NaN counts as neither.
func Within(ratio []float64, k float64) int {
	n := 0
	for _, r := range ratio {
		if r <= k {
			n++
		}
	}
	return n
}
