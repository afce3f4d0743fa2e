package refinement

import (
	"math"

	"weirmark/core/quantity"
)

// oscillatory takes the half-range of the three finest grids as a bound, of a
// rectangular distribution, or, if asked, three times their range as U at
// about 95 %. Source of the latter: NASA Turbulence Modeling Resource,
// "Summary of Uncertainty Procedure", 2018.
func (r *Result) oscillatory(t triple, e21, e32 float64, opt Options) {
	if opt.Rule == RuleRange {
		r.U = wideSafety * t.dataRange()
		r.Rule = "oscillatory: U = 3 times the range of the three finest grids; no order"
		r.tell("grid-range", r.shownRatio(t, e21, e32), quantity.Text(r.U, 3))
		r.index()
		return
	}
	r.UStandard = r.HalfRange / math.Sqrt(3)
	r.Rule = "oscillatory: the half-range of the three finest grids is a bound, u = half-range/√3; no order"
	r.tell("grid-oscillatory", r.shownRatio(t, e21, e32), quantity.Text(r.HalfRange, 3))
}
