package refinement

import (
	"math"

	"weirmark/core/quantity"
)

// Next is the grid that would bring the uncertainty down to a stated value.
// Its numbers are NaN where the study has no order to tell it from.
type Next struct {
	Cells float64
	Cost  float64 // relative to the finest grid of the family
}

// CostExponent is the power of the cell count that the cost of a run follows
// where no other is entered: the cells, times the time steps that shrink with
// the spacing in three dimensions. It is for time-accurate runs whose iterations
// a step do not change (common practice, no source). To resolve all scales of
// turbulence costs of order Re^3, which no grid study tells (common practice, no
// source).
const CostExponent = 4. / 3

// NextGrid returns the cells and the cost that bring u, the uncertainty of the
// finest grid, to target, in the same unit and at the same coverage, from
// u ~ h^p with the observed order:
//
//	cells = n (u/target)^(dim/p), cost = (cells/n)^exponent.
//
// The order is believed where the values converge monotonically and it lies
// within half of the formal order about that; a target that is reached already
// asks for no grid. exponent 0 stands for CostExponent.
func NextGrid(r Result, dim int, opt Options, u, target, exponent float64) Next {
	none := Next{math.NaN(), math.NaN()}
	if r.Class != Monotone || !credible(r.Order, opt) || !(target > 0 && target < u) || math.IsInf(u, 0) {
		return none
	}
	if exponent == 0 {
		exponent = CostExponent
	}
	growth := math.Log(u/target) * float64(dim) / r.Order
	return Next{Cells: r.Counts[0] * math.Exp(growth), Cost: math.Exp(growth * exponent)}
}

// credible reports whether an observed order is one to reckon with.
func credible(p float64, opt Options) bool {
	rounded := quantity.Round(p, 10)
	return rounded >= 0.5*opt.formal() && rounded <= 1.5*opt.formal()
}
