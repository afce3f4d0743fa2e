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
	r.U = correctionFactor(r.R21, r.Order, opt.formal()) * r.estimate(e21, r.Order)
	r.Rule = "correction factor of the three finest grids, value not corrected, formal order " + orderWords(opt.formal()) + "; coefficients from memory"
	r.tell("grid-memory-rule", "correction-factor")
}

// correctionFactor returns the factor of d for an observed order p and a formal
// order q.
func correctionFactor(r21, p, q float64) float64 {
	off := math.Abs(1 - powerLessOne(r21, p)/powerLessOne(r21, q))
	if off < 0.125 {
		return float64(9.6*off*off) + 1.1
	}
	return 2*off + 1
}
