package refinement

import "math"

// correction takes U by the correction factor C = (r21^p - 1)/(r21^q - 1), q
// the formal order, for a value that is not corrected: with the estimate
// d = |e21|/(r21^p - 1),
//
//	U = [9.6 (1-C)^2 + 1.1] d   for |1-C| < 0.125,
//	U = [2 |1-C| + 1] d         otherwise.
//
// Source: Wilson, Shao and Stern, J. Fluids Eng. 126 (2004) 704; coefficients
// from memory.
func (r *Result) correction(e21 float64, opt Options) {
	off := math.Abs(1 - powerLessOne(r.R21, r.Order)/powerLessOne(r.R21, opt.formal()))
	factor := 2*off + 1
	if off < 0.125 {
		factor = float64(9.6*off*off) + 1.1
	}
	r.U = factor * r.estimate(e21, r.Order)
	r.Rule = "correction factor of the three finest grids, value not corrected, formal order " + orderWords(opt.formal()) + "; coefficients from memory"
	r.tell("grid-memory-rule", "correction-factor")
}
