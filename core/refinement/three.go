package refinement

import (
	"math"
	"slices"

	"weirmark/core/interpolate"
	"weirmark/core/notice"
	"weirmark/core/quantity"
)

// Options are the choices of a grid study.
type Options struct {
	Rule    string             // one of Rules, or empty for the three finest grids
	Bounded bool               // limit the index where the order is below 0.95 or above 3.05
	Formal  float64            // formal order of the scheme; 0 stands for 2
	Method  interpolate.Method // along a curve: how a grid's curve is brought to the stations
	Safety  float64            // factor on the estimated error of three grids with an observed order; 0 stands for 1.25
}

func (o Options) safety() float64 {
	if o.Safety > 0 {
		return o.Safety
	}
	return safety
}

// safetyWords prints the factor of the rule.
func (o Options) safetyWords() string { return quantity.Typed(o.safety()) }

func (o Options) formal() float64 {
	if o.Formal > 0 {
		return o.Formal
	}
	return 2
}

// Factors and limits of the rules. Source: Celik et al., J. Fluids Eng. 130
// (2008) 078001 (safety); NASA Turbulence Modeling Resource, "Summary of
// Uncertainty Procedure", 2018 (limits of the bounded rule).
const (
	safety     = UsualSafety
	wideSafety = 3 // where no order is credible
	lowOrder   = 0.95
	highOrder  = 3.05
	cappedTo   = 3
)

// UsualSafety is the factor of the three finest grids where no other is chosen.
const UsualSafety = 1.25

// leastRatio is the refinement ratio below which differences are close to the
// noise of the runs. Source: Celik et al., a value "based on experience".
const leastRatio = 1.3

// Result is the study of one value over a family. Numbers that a class does
// not have are NaN.
type Result struct {
	Class          Class
	Ratio          float64 // e21/e32
	R21, R32       float64
	Values, Counts [3]float64 // the three used, fine first; NaN where there are fewer
	Order          float64    // observed; monotone only
	Extrapolated   float64    // value at zero spacing; monotone only
	Ea             float64    // |e21/f1|, a fraction
	Eext           float64    // |(extrapolated - f1)/extrapolated|, a fraction
	GCI            float64    // U/|f1|, a fraction
	U              float64    // expanded, in the unit of the values
	UStandard      float64    // standard, where the rule gives that; oscillatory only
	HalfRange      float64    // half the range of the three
	Range          float64    // range of all values given
	Used           int        // grids that the result rests on
	Fit            *Fit       // the line behind U where it is not that of the observed order through three grids
	Rule           string     // what was done
	Notices        []notice.Notice
}

// StandardUncertainty returns the standard uncertainty of the grid: U/k, the
// half-range over sqrt(3) for oscillatory values (U/k where the rule asked for
// gives a U for them), and NaN for diverging and insufficient ones. It is NaN for flat values as well:
// three equal values may be printed too coarsely, or be copies of one run, so
// they are no evidence that the uncertainty is zero.
func (r Result) StandardUncertainty(k float64) float64 {
	if math.IsNaN(r.U) {
		return r.UStandard
	}
	return r.U / k
}

// Three studies values over cell counts with the three largest different
// counts. The class comes first (see Class); then
//
//	monotone: p as observed, extrapolated = (r21^p f1 - f2)/(r21^p - 1),
//	U = 1.25 |e21|/(r21^p - 1), GCI = U/|f1|. Bounded, with DM the range of the
//	three: p < 0.95, U is at most 1.25 DM; p > 3.05, U is computed with p = 3
//	and is at least 1.25 DM.
//	oscillatory: no order; the half-range is a bound, u = half-range/sqrt(3).
//	diverging, flat, insufficient: no uncertainty, and a notice why.
//
// Rows without a count above zero or without a value are left out; equal
// counts with equal values count once, with different ones the case is
// insufficient. Both slices have one length; dim is 1, 2 or 3. Source: as at
// the constants.
func Three(counts, values []float64, dim int, opt Options) Result {
	opt.Rule = RuleThree
	return Study(counts, values, dim, opt)
}

func (r *Result) tell(code string, args ...any) {
	r.Notices = append(r.Notices, notice.New(code, args...))
}

func unknown() [3]float64 { return [3]float64{math.NaN(), math.NaN(), math.NaN()} }

// run is one grid with its value.
type run struct{ count, value float64 }

// usable returns the runs with a count and a value, fine first.
func usable(counts, values []float64) []run {
	var runs []run
	for i, n := range counts {
		if n > 0 && !math.IsInf(n, 0) && !math.IsNaN(values[i]) && !math.IsInf(values[i], 0) {
			runs = append(runs, run{n, values[i]})
		}
	}
	slices.SortStableFunc(runs, func(a, b run) int {
		if a.count > b.count {
			return -1
		} else if a.count < b.count {
			return 1
		}
		return 0
	})
	return runs
}

func rangeOf(runs []run) float64 {
	lo, hi := runs[0].value, runs[0].value
	for _, r := range runs {
		lo, hi = min(lo, r.value), max(hi, r.value)
	}
	return hi - lo
}

// finest returns the three runs with the largest different counts, fewer
// where there are no more, the number of different counts, and whether the
// three can be classified.
func finest(runs []run) (three []run, different int, notices []notice.Notice, ok bool) {
	ok = true
	for i, r := range runs {
		if i == 0 || r.count != runs[i-1].count {
			different++
			if different <= 3 {
				three = append(three, r)
			}
			continue
		}
		if different <= 3 && r.value != three[different-1].value {
			if ok {
				notices = append(notices, notice.New("grid-duplicate", quantity.Text(r.count, 10)))
			}
			ok = false
		}
	}
	return three, different, notices, ok && different >= 3
}

// ratio returns (fine/coarse)^(1/dim).
func ratio(fine, coarse float64, dim int) float64 {
	switch q := fine / coarse; dim {
	case 2:
		return math.Sqrt(q)
	case 3:
		return math.Cbrt(q)
	default:
		return q
	}
}

// judge fills in what the class allows.
func (r *Result) judge(opt Options) {
	t := triple{r.Values, r.R21, r.R32}
	scale := max(math.Abs(r.Values[0]), math.Abs(r.Values[1]), math.Abs(r.Values[2]))
	e21, e32 := t.differences(scale)
	r.Class, r.HalfRange = t.classify(scale), t.dataRange()/2
	if r.Values[0] != 0 {
		r.Ea = math.Abs(e21 / r.Values[0])
	}
	if e32 != 0 {
		r.Ratio = e21 / e32
	}
	if least := quantity.Round(min(r.R21, r.R32), 10); least < leastRatio {
		r.tell("grid-ratio", quantity.Text(least, 4))
	}
	switch r.Class {
	case Monotone:
		r.monotone(t, e21, e32, opt)
	case Oscillatory:
		r.oscillatory(t, e21, e32, opt)
	case Diverging, OscillatoryDiverging:
		r.Rule = "differences grow with refinement: no order and no uncertainty"
		p := usualOrder(r.R21, r.R32, e21, e32)
		r.tell("grid-diverging", r.shownRatio(t, e21, e32), quantity.Text(p, 3))
		if math.IsNaN(p) {
			r.tell("grid-not-solved")
		}
	case Flat:
		r.Rule = "no difference between the three finest grids: no order and no uncertainty"
		r.tell("grid-flat")
	case Insufficient:
		r.Rule = "two of the three values or grids are equal: no order and no uncertainty"
		r.tell("grid-undefined")
	}
}

// shownRatio returns e21/e32 for a reader, or the scaled ratio where the plain
// one is on the other side of one and would contradict the class.
func (r *Result) shownRatio(t triple, e21, e32 float64) string {
	shown, scaled := r.Ratio, t.scaledRatio(e21, e32)
	if (math.Abs(shown) < 1) != (math.Abs(scaled) < 1) {
		shown = scaled
	}
	return quantity.Text(shown, 3)
}

// monotone computes order, extrapolation and index.
func (r *Result) monotone(t triple, e21, e32 float64, opt Options) {
	p := observedOrder(r.R21, r.R32, e21, e32)
	r.Order = p
	r.Extrapolated = r.Values[0] - e21/powerLessOne(r.R21, p)
	if r.Extrapolated != 0 {
		r.Eext = math.Abs((r.Extrapolated - r.Values[0]) / r.Extrapolated)
	}
	switch opt.Rule {
	case RuleTwo:
		r.two(e21, opt)
	case RuleFormal:
		r.held(t, e21, opt)
	case RuleCorrection:
		r.correction(e21, opt)
	case RuleFactor:
		r.factor(e21, opt)
	default:
		r.plain(t, e21, opt)
	}
	r.index()
	r.offFormal(opt)
}

// offFormal tells an order that is off the formal one by half of it (no
// source).
func (r *Result) offFormal(opt Options) {
	if credible(r.Order, opt) {
		return
	}
	code := "grid-order-low"
	if r.Order > opt.formal() {
		code = "grid-order-high"
	}
	r.tell(code, quantity.Text(r.Order, 3), quantity.Text(opt.formal(), 3))
}

// plain takes U by the rule of the three finest grids, bounded if asked.
func (r *Result) plain(t triple, e21 float64, opt Options) {
	limit := none
	r.U, limit = indexed(t, math.Abs(e21), r.Order, opt)
	r.Rule = "U = " + opt.safetyWords() + " |f2 - f1|/(r^p - 1) of the three finest grids, " + limit.words(opt)
	switch limit {
	case low:
		r.tell("grid-bounded-low", quantity.Text(r.Order, 3))
	case high:
		r.tell("grid-bounded-high", quantity.Text(r.Order, 3))
	}
}

// index relates U to the value of the finest grid.
func (r *Result) index() {
	if r.Values[0] == 0 {
		r.tell("grid-zero-value")
		return
	}
	r.GCI = r.U / math.Abs(r.Values[0])
}

// bound says which limit of the bounded rule decided U.
type bound int

const (
	none bound = iota
	low
	high
)

func (b bound) words(opt Options) string {
	switch {
	case b == low:
		return "at most " + opt.safetyWords() + " times their range (bounded rule, p below 0.95)"
	case b == high:
		return "with p = 3 and at least " + opt.safetyWords() + " times their range (bounded rule, p above 3.05)"
	case opt.Bounded:
		return "p as observed (bounded rule, no limit reached)"
	}
	return "p as observed"
}

// indexed returns U = 1.25 e/(r21^p - 1), or with another factor, for the
// difference e >= 0 of the two finest grids, by the bounded rule if asked, and
// the limit that decided.
func indexed(t triple, e, p float64, opt Options) (float64, bound) {
	plain := opt.safety() * e / powerLessOne(t.r21, p)
	if !opt.Bounded {
		return plain, none
	}
	limit := opt.safety() * t.dataRange()
	switch rounded := quantity.Round(p, 10); {
	case rounded < lowOrder && limit < plain:
		return limit, low
	case rounded > highOrder:
		return max(opt.safety()*e/powerLessOne(t.r21, cappedTo), limit), high
	}
	return plain, none
}

// powerLessOne returns r^p - 1 without cancellation.
func powerLessOne(r, p float64) float64 { return math.Expm1(p * math.Log(r)) }
