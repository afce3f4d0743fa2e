package refinement

import (
	"math"

	"weirmark/core/quantity"
)

// The rules of a study. An empty rule is RuleThree, and of two grids RuleTwo.
const (
	RuleThree        = "three"             // the three finest grids, bounded or plain
	RuleTwo          = "two"               // the two finest grids with the formal order and factor 3
	RuleFormal       = "formal order"      // as three, with an order of at most the formal one
	RuleLeastSquares = "least squares"     // four or more grids
	RuleCorrection   = "correction factor" // the three finest grids
	RuleFactor       = "factor of safety"  // the three finest grids
	RuleRange        = "data range"        // as three, but three times the range where values oscillate
)

// Rules lists them, the default first.
var Rules = []string{RuleThree, RuleTwo, RuleFormal, RuleLeastSquares, RuleCorrection, RuleFactor, RuleRange}

// Study studies values over cell counts by the rule of opt. Whatever the rule,
// the three finest grids of different counts are classified first (see Class),
// and where they diverge, are flat, or cannot be classified, no rule gives an
// order or an uncertainty. Two grids have no class; the rule of two grids gives
// them a U, without an order, where it is asked for or no rule is.
//
// Rows without a count above zero or without a value are left out; equal
// counts with equal values count once, with different ones the case is
// insufficient. Both slices have one length; dim is 1, 2 or 3.
func Study(counts, values []float64, dim int, opt Options) Result {
	r := nothing()
	runs := usable(counts, values)
	if len(runs) > 0 {
		r.Range = rangeOf(runs)
	}
	three, different, notices, ok := finest(runs)
	r.Notices = notices
	for i, g := range three {
		r.Values[i], r.Counts[i] = g.value, g.count
	}
	if different < 3 && !(different == 2 && opt.two()) {
		r.tell("grid-few", different)
	}
	if dim < 1 || dim > 3 {
		r.tell("grid-dimension", dim)
		return r
	}
	if different == 2 && opt.two() && len(notices) == 0 {
		r.onlyTwo(ratio(three[0].count, three[1].count, dim), opt)
	}
	if !ok {
		return r
	}
	all := opt.Rule == RuleLeastSquares && different > 3
	switch {
	case opt.Rule == RuleLeastSquares && !all:
		r.tell("grid-rule-few", different)
	case different > 3 && !all:
		r.tell("grid-finest-three", different)
	}
	if !isRule(opt.Rule) {
		r.tell("grid-rule-unknown", opt.Rule)
	}
	r.R21, r.R32 = ratio(three[0].count, three[1].count, dim), ratio(three[1].count, three[2].count, dim)
	r.Used = 3
	if all {
		r.leastSquares(runs, dim, opt)
		return r
	}
	r.judge(opt)
	return r
}

// two reports whether two grids get an uncertainty where there is no third.
func (o Options) two() bool { return o.Rule == RuleTwo || o.Rule == "" }

// isRule reports whether a rule has a name known here.
func isRule(name string) bool {
	if name == "" {
		return true
	}
	for _, r := range Rules {
		if r == name {
			return true
		}
	}
	return false
}

// nothing returns a result without numbers.
func nothing() Result {
	return Result{
		Class: Insufficient, Ratio: math.NaN(), R21: math.NaN(), R32: math.NaN(),
		Values: unknown(), Counts: unknown(),
		Order: math.NaN(), Extrapolated: math.NaN(), Ea: math.NaN(), Eext: math.NaN(), GCI: math.NaN(),
		U: math.NaN(), UStandard: math.NaN(), HalfRange: math.NaN(), Range: math.NaN(),
		Rule: "no order: three grids of different counts are needed",
	}
}

// estimate returns |e21|/(r21^p - 1), the error of the finest grid by an
// order.
func (r *Result) estimate(e21, p float64) float64 {
	return math.Abs(e21) / powerLessOne(r.R21, p)
}

// orderWords prints an order in a rule.
func orderWords(p float64) string { return quantity.Text(p, 3) }
