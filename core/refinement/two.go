package refinement

import "math"

// two takes U = 3 |e21|/(r21^q - 1) with the formal order q, for values whose
// three finest grids converge. Source: P. J. Roache's index for two grids, as
// the design's references 1.4 give it.
func (r *Result) two(e21 float64, opt Options) {
	r.Used = 2
	r.U = wideSafety * r.estimate(e21, opt.formal())
	r.Fit = r.through(e21, opt.formal())
	r.Rule = twoWords(opt)
}

// onlyTwo does so for a family of two grids, of which nothing shows that it
// converges: it has no class and no order.
func (r *Result) onlyTwo(r21 float64, opt Options) {
	e21 := r.Values[1] - r.Values[0]
	r.R21 = r21
	r.HalfRange = math.Abs(e21) / 2
	if math.Abs(e21) <= rounding*max(math.Abs(r.Values[0]), math.Abs(r.Values[1])) {
		r.Rule = "no difference between the two grids: no uncertainty"
		r.tell("grid-flat")
		return
	}
	r.two(e21, opt)
	if r.Values[0] != 0 {
		r.Ea = math.Abs(e21 / r.Values[0])
	}
	r.index()
	r.tell("grid-two", orderWords(opt.formal()))
}

func twoWords(opt Options) string {
	return "U = 3 |f2 - f1|/(r^p - 1) of the two finest grids with the formal order " + orderWords(opt.formal()) + ", assumed and not observed"
}
