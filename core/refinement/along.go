package refinement

import (
	"cmp"
	"math"
	"slices"
	"strconv"

	"weirmark/core/notice"
	"weirmark/core/quantity"
	"weirmark/core/station"
)

// Grid is the curve of one grid, in file order.
type Grid struct {
	Name  string
	Count float64
	X, Y  []float64
}

// LocalPoint is the study at one station. At a station that not all three
// grids answer the class is Insufficient and every number but X is NaN.
type LocalPoint struct {
	X      float64
	Class  Class
	Order  float64    // observed at this station alone; monotone only
	U      float64    // expanded
	Values [3]float64 // fine first; NaN for a third grid that there is not
	known  bool       // all grids that are used answer here
}

// StandardUncertainty returns U/k.
func (p LocalPoint) StandardUncertainty(k float64) float64 { return p.U / k }

// Local is the study of a curve.
type Local struct {
	Points      []LocalPoint // parallel to the stations asked for
	Common      float64      // median of the local orders, kept between 0.5 and the formal order; NaN where there are none
	Low, High   float64      // quartiles of the local orders, as observed
	Monotone    int          // stations that converge monotonically
	NonMonotone int          // other stations that all three grids answer
	R21, R32    float64
	Rule        string
	Notices     []notice.Notice
}

// leastOrder is the lowest common order that is used.
const leastOrder = 0.5

// Along studies curves at the stations of at, with the three grids of the
// largest different counts, each brought to the stations by station.Resample.
//
// Every station is classified by its own three values (a difference below
// 1e-12 of the largest value of the curve is none). A local order is too
// uncertain to be used alone, so monotone stations share one, the median of
// theirs, kept between 0.5 and the formal order:
//
//	U = 1.25 |e21|/(r21^p - 1), by the bounded rule if asked.
//
// All other stations take U = 3 DM, DM the range of the three values.
//
// A difference that changes sign along the curve passes zero somewhere; that
// is a place, not a property of the grid. So no U is below the median of the
// stations around it: a tenth of all, at least five (see floor). Only where no
// station differs between the grids is there no U, with the notice grid-flat.
//
// The other rules of Rules, where asked for: two grids and no class, three
// times the error of the formal order; the correction factor and the factor of
// safety with the common order at monotone stations; least squares over four
// grids or more at every station that converges; the data range at all
// stations. The common order is held at the formal one by any of them.
//
// Source of the common order and of the factors: the procedure of Celik et al.
// (J. Fluids Eng. 130 (2008) 078001) for profiles uses a mean order; the
// median and the floor are our own.
func Along(grids []Grid, at []float64, dim int, opt Options) Local {
	l := Local{
		Points: make([]LocalPoint, len(at)),
		Common: math.NaN(), Low: math.NaN(), High: math.NaN(), R21: math.NaN(), R32: math.NaN(),
		Rule: "no uncertainty along the curve",
	}
	for i, x := range at {
		l.Points[i] = LocalPoint{X: x, Class: Insufficient, Order: math.NaN(), U: math.NaN(), Values: unknown()}
	}
	some, ok := l.choose(grids, dim, opt)
	if !ok {
		return l
	}
	values, ok := l.resample(some, at, opt)
	if !ok {
		return l
	}
	if len(some) == 2 {
		l.judgeTwo(opt)
		return l
	}
	if !l.judge(opt) {
		return l
	}
	if len(some) > 3 {
		l.fit(some, values, dim, opt)
	}
	l.floor()
	l.say(opt, len(some))
	return l
}

func (l *Local) tell(code string, args ...any) {
	l.Notices = append(l.Notices, notice.New(code, args...))
}

// choose returns the grids that the rule takes, fine first, and sets the
// ratios: the three finest, two where the rule makes do with them and there
// are no more, or all by least squares.
func (l *Local) choose(grids []Grid, dim int, opt Options) ([]Grid, bool) {
	if dim < 1 || dim > 3 {
		l.tell("grid-dimension", dim)
		return nil, false
	}
	var some []Grid
	for _, g := range grids {
		if g.Count > 0 && !math.IsInf(g.Count, 0) {
			some = append(some, g)
		}
	}
	slices.SortStableFunc(some, func(a, b Grid) int { return cmp.Compare(b.Count, a.Count) })
	var different []Grid
	for i, g := range some {
		if i == 0 || g.Count != some[i-1].Count {
			different = append(different, g)
			continue
		}
		same := different[len(different)-1]
		if len(different) <= 3 && !(slices.Equal(g.X, same.X) && slices.Equal(g.Y, same.Y)) {
			l.tell("grid-duplicate", quantity.Text(g.Count, 10))
			return nil, false
		}
	}
	all := opt.Rule == RuleLeastSquares && len(different) > 3
	switch {
	case len(different) == 2 && opt.two():
		l.R21 = ratio(different[0].Count, different[1].Count, dim)
		l.tellRatio(l.R21)
		return different, true
	case len(different) < 3:
		l.tell("grid-few", len(different))
		return nil, false
	case opt.Rule == RuleLeastSquares && !all:
		l.tell("grid-rule-few", len(different))
	case len(different) > 3 && !all:
		l.tell("grid-finest-three", len(different))
	}
	if !isRule(opt.Rule) {
		l.tell("grid-rule-unknown", opt.Rule)
	}
	l.R21 = ratio(different[0].Count, different[1].Count, dim)
	l.R32 = ratio(different[1].Count, different[2].Count, dim)
	l.tellRatio(min(l.R21, l.R32))
	if all {
		return different, true
	}
	return different[:3], true
}

func (l *Local) tellRatio(least float64) {
	if least = quantity.Round(least, 10); least < leastRatio {
		l.tell("grid-ratio", quantity.Text(least, 4))
	}
}

// resample brings the grids to the stations and fills in the values of the
// three finest. It returns the values of every grid at every station.
func (l *Local) resample(some []Grid, at []float64, opt Options) ([][]float64, bool) {
	asked := 0
	for _, x := range at {
		if !math.IsNaN(x) {
			asked++
		}
	}
	values := make([][]float64, len(some))
	for k, g := range some {
		values[k] = make([]float64, len(at))
		for i := range values[k] {
			values[k][i] = math.NaN()
		}
		r := station.Resample(g.Name, "x", g.X, g.Y, at, station.Options{Method: opt.Method})
		for _, n := range r.Notices {
			// Stations left out are counted once for all grids, below.
			if n.Code != "station-outside" && n.Code != "station-gap" {
				l.Notices = append(l.Notices, n)
			}
		}
		if r.Refused {
			l.tell("grid-curve", g.Name)
			return nil, false
		}
		for j, i := range r.Kept {
			values[k][i] = r.S[j]
		}
	}
	answered := 0
	for i := range l.Points {
		p := &l.Points[i]
		p.known = true
		for k := range some {
			p.known = p.known && !math.IsNaN(values[k][i])
		}
		if !p.known {
			continue
		}
		answered++
		for k := range min(3, len(some)) {
			p.Values[k] = values[k][i]
		}
	}
	if answered < asked {
		l.tell("grid-support", asked-answered, asked)
	}
	return values, answered > 0
}

func (p LocalPoint) answered() bool { return p.known }

// judge classifies the stations and gives each its uncertainty from the three
// finest grids. It reports whether any station differs between them.
func (l *Local) judge(opt Options) bool {
	scale := 0.0
	for _, p := range l.Points {
		if p.answered() {
			scale = max(scale, math.Abs(p.Values[0]), math.Abs(p.Values[1]), math.Abs(p.Values[2]))
		}
	}
	var orders []float64
	flat := true
	for i := range l.Points {
		p := &l.Points[i]
		if !p.answered() {
			continue
		}
		t := triple{p.Values, l.R21, l.R32}
		p.Class = t.classify(scale)
		flat = flat && p.Class == Flat
		if p.Class != Monotone {
			l.NonMonotone++
			continue
		}
		l.Monotone++
		e21, e32 := t.differences(scale)
		p.Order = observedOrder(l.R21, l.R32, e21, e32)
		orders = append(orders, p.Order)
	}
	if flat {
		l.Rule = "no difference between the three finest grids: no uncertainty"
		l.tell("grid-flat")
		return false
	}
	if len(orders) > 0 {
		slices.Sort(orders)
		l.Low, l.High = quantile(orders, 0.25), quantile(orders, 0.75)
		l.Common = min(max(quantile(orders, 0.5), leastOrder), max(opt.formal(), leastOrder))
	}
	for i := range l.Points {
		if p := &l.Points[i]; p.answered() {
			p.U = l.expanded(*p, opt)
		}
	}
	return true
}

// expanded returns U of one station before the floor.
func (l *Local) expanded(p LocalPoint, opt Options) float64 {
	t := triple{p.Values, l.R21, l.R32}
	if p.Class != Monotone || opt.Rule == RuleRange {
		return wideSafety * t.dataRange()
	}
	e := math.Abs(p.Values[1] - p.Values[0])
	d := e / powerLessOne(l.R21, l.Common)
	switch opt.Rule {
	case RuleTwo:
		return wideSafety * e / powerLessOne(l.R21, opt.formal())
	case RuleCorrection:
		return correctionFactor(l.R21, l.Common, opt.formal()) * d
	case RuleFactor:
		return factorOfSafety(l.Common, opt.formal()) * d
	}
	u, _ := indexed(t, e, l.Common, opt)
	return u
}

// fit takes U and the order of the stations whose three finest grids converge
// from the fit over all grids.
func (l *Local) fit(grids []Grid, values [][]float64, dim int, opt Options) {
	counts, own := make([]float64, len(grids)), make([]float64, len(grids))
	for k, g := range grids {
		counts[k] = g.Count
	}
	for i := range l.Points {
		p := &l.Points[i]
		if p.Class != Monotone && p.Class != Oscillatory {
			continue
		}
		for k := range grids {
			own[k] = values[k][i]
		}
		if r := Study(counts, own, dim, opt); !math.IsNaN(r.U) {
			p.U, p.Order = r.U, r.Order
		}
	}
}

// judgeTwo gives every station of two grids three times the error that the
// formal order estimates. Nothing shows that they converge: no station has a
// class or an order.
func (l *Local) judgeTwo(opt Options) {
	flat := true
	for i := range l.Points {
		p := &l.Points[i]
		if !p.answered() {
			continue
		}
		l.NonMonotone++
		e := math.Abs(p.Values[1] - p.Values[0])
		flat = flat && e == 0
		p.U = wideSafety * e / powerLessOne(l.R21, opt.formal())
	}
	if flat {
		for i := range l.Points {
			l.Points[i].U = math.NaN()
		}
		l.Rule = "no difference between the two grids: no uncertainty"
		l.tell("grid-flat")
		return
	}
	l.floor()
	l.Rule = twoWords(opt) + "; nowhere below the median of the neighbours"
	l.tell("grid-two", orderWords(opt.formal()))
}

// floor lifts every U to the median of its neighbourhood: up to ten stations
// on each side in order of x, evenly spaced over a twentieth of all stations
// or over two, whichever is more.
func (l *Local) floor() {
	var order []int
	for i, p := range l.Points {
		if p.answered() {
			order = append(order, i)
		}
	}
	slices.SortStableFunc(order, func(a, b int) int { return cmp.Compare(l.Points[a].X, l.Points[b].X) })
	n := len(order)
	half := min(max(n/20, 2), 10)
	stride := max(n/200, 1)
	lifted := make([]float64, n)
	around := make([]float64, 0, 2*half+1)
	for i := range order {
		around = around[:0]
		for k := i - half*stride; k <= i+half*stride; k += stride {
			if k >= 0 && k < n {
				around = append(around, l.Points[order[k]].U)
			}
		}
		slices.Sort(around)
		lifted[i] = max(l.Points[order[i]].U, quantile(around, 0.5))
	}
	for i, k := range order {
		l.Points[k].U = lifted[i]
	}
}

// quantile returns the q-quantile of ascending values, linear between ranks.
func quantile(sorted []float64, q float64) float64 {
	at := q * float64(len(sorted)-1)
	i := min(int(at), len(sorted)-1)
	if i == len(sorted)-1 {
		return sorted[i]
	}
	return sorted[i] + float64((sorted[i+1]-sorted[i])*(at-float64(i)))
}

func (l *Local) say(opt Options, grids int) {
	const others, floor = "3 times the range of the three finest grids at the others", "; nowhere below the median of the neighbours"
	if opt.Rule == RuleRange {
		l.Rule = "U = 3 times the range of the three finest grids at every station, asked for" + floor
		return
	}
	if grids > 3 {
		l.Rule = "least squares over " + strconv.Itoa(grids) + " grids at stations that converge, " + others + "; implemented from a description of the procedure" + floor
		l.tell("grid-local-fitted", grids)
		return
	}
	switch all := l.Monotone + l.NonMonotone; {
	case l.Monotone == 0:
		l.Rule = "U = 3 times the range of the three finest grids at every station"
		l.tell("grid-local-none")
		return
	case l.NonMonotone > 0:
		l.tell("grid-local-mixed", l.Monotone, all, quantity.Text(l.Common, 3))
	}
	switch opt.Rule {
	case RuleTwo:
		l.Rule = "monotone stations: " + twoWords(opt)
	case RuleCorrection:
		l.Rule = "common order at monotone stations, U by the correction factor, formal order " + orderWords(opt.formal()) + ", coefficients from memory"
		l.tell("grid-memory-rule", "correction-factor")
	case RuleFactor:
		l.Rule = "common order at monotone stations, U by the factor of safety, formal order " + orderWords(opt.formal()) + ", coefficients from memory"
		l.tell("grid-memory-rule", "factor-of-safety")
	default:
		l.Rule = "common order at monotone stations, U = " + opt.safetyWords() + " times the estimated error"
		if opt.Bounded {
			l.Rule += " (bounded rule)"
		}
	}
	l.Rule += "; " + others + floor
}
