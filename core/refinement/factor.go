package refinement

// factor takes U by the factor of safety: with P = p/q, q the formal order, and
// the estimate d = |e21|/(r21^p - 1),
//
//	U = (2.45 - 0.85 P) d   for P <= 1,
//	U = (16.4 P - 14.8) d   for P > 1.
//
// Source: Xing and Stern, J. Fluids Eng. 132 (2010) 061403; coefficients from
// memory.
func (r *Result) factor(e21 float64, opt Options) {
	r.U = factorOfSafety(r.Order, opt.formal()) * r.estimate(e21, r.Order)
	r.Rule = "factor of safety of the three finest grids, formal order " + orderWords(opt.formal()) + "; coefficients from memory"
	r.tell("grid-memory-rule", "factor-of-safety")
}

// factorOfSafety returns the factor of d for an observed order p and a formal
// order q.
func factorOfSafety(p, q float64) float64 {
	part := p / q
	if part > 1 {
		return float64(16.4*part) - 14.8
	}
	return 2.45 - float64(0.85*part)
}
