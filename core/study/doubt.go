package study

import (
	"math"
	"strconv"

	"weirmark/core/notice"
	"weirmark/core/plausibility"
	"weirmark/core/profile"
	"weirmark/core/quantity"
	"weirmark/core/uncertainty"
)

// doubtCurves looks for mistakes in each side by itself.
func (w *work) doubtCurves() {
	for _, c := range []*curve{w.reference, w.finest()} {
		if c == nil || c == w.grids {
			continue
		}
		w.doubtConstant(c)
		w.doubtCard(c)
		if c.scalar() {
			continue
		}
		if turns, shuffled := plausibility.Shuffled(c.x, c.y); shuffled {
			w.ask(2, "the order of "+w.e.study.fileName(c.slip), "curve-shuffled", w.e.study.fileName(c.slip), turns)
		}
	}
	w.doubtForces()
	w.doubtDatum()
	w.doubtFirstCell()
	w.doubtFriction()
	w.doubtSwapped()
	w.doubtWallTreatment()
	w.doubtRepeated(w.reference)
	if s := w.finest(); s != w.grids {
		w.doubtRepeated(s)
	}
	w.doubtReadings()
	w.doubtOutliers()
	w.doubtRanges()
	w.doubtMagnitude()
}

// doubtConstant asks about a curve of one value, or of one station.
func (w *work) doubtConstant(c *curve) {
	if len(c.y) < 3 || c.scalar() {
		return
	}
	if oneValue(c.x) {
		file := w.e.study.fileName(c.slip)
		n := notice.New("stations-constant", file, quantity.Text(c.xUnit.unit.FromSI(c.x[0]), 4))
		w.tell(n)
		w.stop(2, "the stations of "+file, slipTarget(c.slip, "x.column"), n)
	}
	if !oneValue(c.y) {
		return
	}
	w.ask(2, "what "+w.e.study.fileName(c.slip)+" holds", "curve-constant", w.e.study.fileName(c.slip), quantity.Text(w.yUnit.FromSI(c.y[0]), 4))
}

// oneValue reports whether all known values are equal.
func oneValue(values []float64) bool {
	for _, v := range values {
		if v != values[0] && !math.IsNaN(v) {
			return false
		}
	}
	return true
}

// doubtReadings asks about one repeated reading that is a multiple of the
// others.
func (w *work) doubtReadings() {
	c := w.reference
	if c == nil || !c.scalar() {
		return
	}
	if at, ratio, found := plausibility.ReplicateRatio(known(c.y)); found {
		line := c.table.RowLine(rowOf(c.y, at))
		w.ask(2, "the reading at line "+strconv.Itoa(line), "readings-ratio", len(known(c.y)), line, quantity.Text(ratio, 3))
	}
}

// rowOf returns the row of the n-th known value.
func rowOf(y []float64, n int) int {
	for i, v := range y {
		if math.IsNaN(v) {
			continue
		}
		if n == 0 {
			return i
		}
		n--
	}
	return 0
}

// doubtOutliers flags single rows of the reference that lie far off.
func (w *work) doubtOutliers() {
	c := w.reference
	if c == nil || c.scalar() {
		return
	}
	for _, o := range plausibility.Outliers(known(c.y)) {
		o.Row = rowOf(c.y, o.Row)
		line := c.table.RowLine(o.Row)
		if w.isExcluded(line) {
			continue
		}
		w.ask(2, "the station at line "+strconv.Itoa(line), "curve-outlier", capital(place(c, o.Row)), line, quantity.Text(o.Robust, 2), quantity.Text(o.Ratio, 2))
	}
}

func (w *work) isExcluded(line int) bool {
	for _, e := range w.q.Excluded {
		if e.Line == line {
			return true
		}
	}
	return false
}

// doubtRanges asks about stations that would only fit with another unit.
func (w *work) doubtRanges() {
	r, s := w.reference, w.finest()
	if r == nil || s == nil || r.scalar() || s.scalar() {
		return
	}
	rLo, rHi := profile.Limits(inUnit(r.x, r.xUnit, w.xUnit))
	sLo, sHi := profile.Limits(inUnit(s.x, s.xUnit, w.xUnit))
	factor, found := plausibility.ScaledRange(rLo, rHi, sLo, sHi)
	if !found {
		return
	}
	print := func(v float64) string { return quantity.Text(w.xUnit.FromSI(v), 4) }
	w.ask(2, "the unit of "+r.xUnit.name, "range-scaled", r.xUnit.name, print(rLo), print(rHi), print(sLo), print(sHi), quantity.Text(factor, 4), scaleWords(factor))
}

// scales are the pairs of units whose numbers differ by a factor.
var scales = []struct {
	factor float64
	words  string
}{{1000, "millimetres against metres"}, {100, "centimetres against metres"}, {10, "millimetres against centimetres"}, {25.4, "millimetres against inches"}, {39.37, "inches against metres"}, {3.281, "feet against metres"}, {12, "inches against feet"}, {57.3, "degrees against radians"}}

// scaleWords names the units that a factor suggests, whichever way round.
func scaleWords(factor float64) string {
	for _, s := range scales {
		if near(factor, s.factor) || near(1/factor, s.factor) {
			return " (" + s.words + "?)"
		}
	}
	return ""
}

// near allows for the ends of two ranges that are not quite the same.
func near(a, b float64) bool { return math.Abs(a/b-1) < 0.02 }

// doubtMagnitude asks about a simulation without a sign where the reference
// changes it.
func (w *work) doubtMagnitude() {
	r, s := w.reference, w.finest()
	if r == nil || s == nil || s.scalar() || r.scalar() {
		return
	}
	if lo, hi := profile.Limits(w.d); !(lo < 0 && hi > 0) {
		return
	}
	if least, found := plausibility.Magnitude(s.y); found {
		w.ask(2, "the sign of "+s.yUnit.name, "curve-magnitude", s.yUnit.name+" of "+w.e.study.fileName(s.slip), quantity.Text(w.yUnit.FromSI(least), 2))
	}
}

// doubtComparison looks for mistakes that show between the two sides.
func (w *work) doubtComparison() {
	if len(w.s) < 2 {
		return
	}
	if r, found := plausibility.ConstantRatio(w.s, w.d, w.knownCauses()); found {
		why := ""
		if r.Cause != "" {
			why = ": " + r.Cause + "?"
		}
		w.ask(2, "the ratio of the two sides", "ratio-constant", quantity.Text(r.Value, 3), quantity.Text(r.Spread, 1), why)
		return
	}
	e := make([]float64, len(w.s))
	for i := range e {
		e[i] = w.s[i] - w.d[i]
	}
	lo, hi := profile.Limits(w.d)
	if offset, half, found := plausibility.ConstantOffset(e, hi-lo); found {
		w.ask(2, "the datum of the two sides", "offset-constant", quantity.Text(float64(w.step(offset)), 3)+w.cell.UnitSuffix(), quantity.Text(float64(w.step(half)), 1))
	}
}

// doubtCorrelation asks about a systematic source of the data that was left
// independent where the joint outcome turns on it.
func (w *work) doubtCorrelation(e []float64) {
	for i := range w.q.Sources {
		s := &w.q.Sources[i]
		if s.Pattern != "" || s.Of != OfData {
			continue
		}
		at := func(common bool) string {
			return quantity.Text(float64(w.alternative(e, func(p *part) {
				if p.line.Name == s.Name {
					p.source = uncertainty.Source{U: p.source.U, Common: common}
				}
			})), 3)
		}
		n := notice.New("correlation-unset", s.Name, at(false), at(true))
		w.tell(n)
		w.stop(2, "the correlation of "+s.Name, Target{Kind: "source", ID: w.q.id(), Field: strconv.Itoa(i) + ".pattern"}, n)
	}
}

// knownCauses are the ratios that the reference quantities of the case would
// explain.
func (w *work) knownCauses() []plausibility.Cause {
	list := w.areaCauses()
	if rho, known := w.density(""); known {
		list = append(list, plausibility.Cause{Ratio: rho, Words: "a pressure divided by density (1/ρ = " + quantity.Text(1/rho, 3) + ") against a pressure"})
	}
	return list
}
