package refinement

import (
	"math"
	"slices"

	"weirmark/core/notice"
)

// Norms are the sizes of an error over the points of a grid.
type Norms struct{ Mean, RMS, Max float64 }

// NormsOf returns the norms of errors at points that stand for equal parts of
// the domain. Without a point they are NaN.
func NormsOf(errors []float64) Norms {
	if len(errors) == 0 {
		return Norms{math.NaN(), math.NaN(), math.NaN()}
	}
	sum, squares, most := 0.0, 0.0, 0.0
	for _, e := range errors {
		sum, squares, most = sum+math.Abs(e), squares+float64(e*e), max(most, math.Abs(e))
	}
	n := float64(len(errors))
	return Norms{sum / n, math.Sqrt(squares / n), most}
}

// Verification is the order at which a code approaches an exact solution.
type Verification struct {
	Order   float64   // slope of log error against log h over all grids
	Orders  []float64 // between neighbours, coarse to fine
	Notices []notice.Notice
}

// Verify returns the observed order of error norms against the spacing h of
// two or more grids, in any order. The norms must fall with every refinement;
// else there is no order, with a notice. Norms and spacings must be positive.
func Verify(h, norms []float64) Verification {
	none := Verification{Order: math.NaN()}
	order := make([]int, len(h))
	for i := range order {
		order[i] = i
	}
	slices.SortStableFunc(order, func(a, b int) int {
		switch {
		case h[a] > h[b]:
			return -1
		case h[a] < h[b]:
			return 1
		}
		return 0
	})
	var x, y, weights []float64
	for rank, i := range order {
		falls := rank == 0 || h[i] < h[order[rank-1]] && norms[i] < norms[order[rank-1]]
		if !falls || !(h[i] > 0 && norms[i] > 0) || math.IsInf(norms[i], 0) || math.IsInf(h[i], 0) {
			none.Notices = append(none.Notices, notice.New("grid-verify-none"))
			return none
		}
		x, y, weights = append(x, math.Log(h[i])), append(y, math.Log(norms[i])), append(weights, 1/float64(len(h)))
	}
	line, ok := fitLinear(y, weights, x)
	if len(x) < 2 || !ok {
		none.Notices = append(none.Notices, notice.New("grid-verify-none"))
		return none
	}
	v := Verification{Order: line.c[1]}
	for i := 1; i < len(x); i++ {
		v.Orders = append(v.Orders, (y[i]-y[i-1])/(x[i]-x[i-1]))
	}
	return v
}
