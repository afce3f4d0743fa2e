package refinement

import "math"

// held takes U as the rule of three grids does, with the observed order or the
// formal one, whichever is less: an order above the formal one is a sign of
// grids that are too coarse, and would make U too small.
func (r *Result) held(t triple, e21 float64, opt Options) {
	p := min(r.Order, opt.formal())
	if p < r.Order {
		r.Fit = r.through(e21, p)
	}
	r.U, _ = indexed(t, math.Abs(e21), p, opt)
	r.Rule = "U = " + opt.safetyWords() + " |f2 - f1|/(r^p - 1) of the three finest grids with p at most the formal order " + orderWords(opt.formal())
}
