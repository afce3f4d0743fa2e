package study

import (
	"errors"
	"math"

	"gonum.org/v1/gonum/stat/distuv"

	"weirmark/core/comparison"
	"weirmark/core/derived"
	"weirmark/core/interpolate"
	"weirmark/core/metric"
	"weirmark/core/notice"
	"weirmark/core/quantity"
	"weirmark/core/uncertainty"
)

// agree compares the two sides station by station and together.
func (w *work) agree() {
	w.crossings()
	if len(w.x) == 0 {
		return
	}
	e := comparison.Error(w.s, w.d)
	var ratio []float64
	if w.uVal != nil {
		ratio = comparison.Ratio(e, w.uVal)
	}
	weights := w.stationWeights()
	w.stationLines(e, ratio)
	for i, v := range weights {
		weight := Number(v)
		w.cell.Stations[i].Weight = &weight
	}
	w.summarise(e, ratio)
	w.shares()
	w.joint(e)
}

// stationLines fills the station table.
func (w *work) stationLines(e, ratio []float64) {
	k := w.choices.K
	at := func(u []float64, i int) Number {
		if u == nil {
			return None
		}
		return w.step(u[i])
	}
	lines := make([]Station, len(w.x))
	for i := range lines {
		s := Station{Whitened: None,
			X: Written(w.xUnit.FromSI(w.x[i])), S: w.yNumber(w.s[i]), D: Written(w.yUnit.FromSI(w.d[i])), E: w.step(e[i]),
			UD: at(w.uD, i), UNum: at(w.uNum, i), UInput: at(w.uInput, i), UVal: at(w.uVal, i), UInterp: None,
			Ratio: None, Lo: None, Hi: None, Line: w.reference.table.RowLine(w.rows[i]),
		}
		if w.cell.Derived != nil {
			s.Line = 0 // of no single row
		}
		// A value that no conversion touched is printed as it was written.
		if !w.cell.Scalar && w.rows != nil {
			s.X, s.D = w.written(w.rows[i], s.X, s.D)
		}
		if w.choices.UInterp && !w.cell.Scalar {
			s.UInterp = w.step(w.uInterp[i])
		}
		if ratio != nil && !math.IsNaN(ratio[i]) {
			half := float64(k*w.uVal[i]) + w.boundAt(i)
			s.Ratio = Number(ratio[i])
			s.Lo, s.Hi = w.step(e[i]-half), w.step(e[i]+half)
			s.Reading = reading(max(math.Abs(e[i])-w.boundAt(i), 0)/w.uVal[i], k)
		}
		lines[i] = s
	}
	w.cell.Stations = lines
}

// written returns the values of a reference row as the file states them,
// where the cell is in the units of the file.
func (w *work) written(row int, x, d Written) (Written, Written) {
	p := w.reference.slip
	if column, err := w.reference.table.Column(p.X.Column.Value); err == nil && w.reference.along == "" && !w.reference.xTurned && p.X.Unit.Value == w.xUnit.symbol {
		x = Written(column.Values[row])
	}
	if column, err := w.reference.table.Column(p.Y.Column.Value); err == nil && p.Repeats.Value != Averaged && !w.reference.yTurned && p.Y.Unit.Value == w.yUnit.symbol {
		d = Written(column.Values[row])
	}
	return x, d
}

// reading is the word of a pointwise comparison; thresholds are compared on
// rounded values so that every host says the same.
func reading(ratio, k float64) string {
	r := quantity.Round(ratio, 10)
	switch {
	case r <= 1:
		return WithinNoise
	case r <= k:
		return Between
	}
	return SignResolved
}

func (w *work) summarise(e, ratio []float64) {
	m := metric.Summarise(e)
	s := &Summary{N: m.N, Bias: w.step(m.Bias), MAE: w.step(m.MAE), RMSE: w.step(m.RMSE), MaxAbs: w.step(m.MaxAbs),
		MaxAt: Number(w.xUnit.FromSI(w.x[m.MaxAt])), MaxRatio: None, BeyondChance: None}
	if ratio != nil {
		tested := pick(ratio, w.tested)
		s.WithinUVal, s.WithinKUVal = metric.Within(tested, 1), metric.Within(tested, w.choices.K)
		worst := 0.0
		for _, r := range tested {
			worst = max(worst, r)
		}
		if len(tested) > 0 {
			s.MaxRatio = Number(worst)
			s.BeyondChance = Number(2 * distuv.UnitNormal.Survival(w.choices.K) * float64(len(tested)))
		}
	}
	s.Tested = len(w.tested)
	w.cell.Summary = s
}

// shares fills the lines of the sources: root mean square over the tested
// stations, and the part of the mean u_val squared.
func (w *work) shares() {
	rows := w.tested
	if len(rows) == 0 {
		rows = all(len(w.x))
	}
	whole := 0.0
	if w.uVal != nil {
		whole = squares(w.uVal, rows)
	}
	for _, p := range w.parts {
		line := p.line
		sum := squares(p.source.U, rows)
		line.U, line.Share = w.step(math.Sqrt(squares(p.stated(), rows)/float64(len(rows)))), None
		if whole > 0 {
			line.Share = Number(sum / whole)
		}
		w.cell.Sources = append(w.cell.Sources, line)
	}
	w.cell.Sources = append(w.cell.Sources, w.aparts...)
}

func squares(u []float64, rows []int) float64 {
	sum := 0.0
	for _, i := range rows {
		sum += float64(u[i] * u[i])
	}
	return sum
}

// joint makes the statistic of all stations together.
func (w *work) joint(e []float64) {
	if w.uVal == nil || len(w.tested) == 0 {
		return
	}
	w.mergeRepeated()
	tested := pick(e, w.joined)
	budget := w.covariance(w.parts, w.joined)
	q, err := comparison.Whiten(tested, budget)
	if err != nil {
		w.tell(jointRefusal(err, len(tested)))
		return
	}
	reference := comparison.ChiSquare95(q.Rank)
	j := &Joint{Statistic: Number(q.Statistic), N: q.Rank, P: Number(q.P()), Reference: Number(reference),
		Exceeds: exceeds(q.Statistic, reference), Pattern: w.pattern(),
		Independent: w.alternative(tested, func(p *part) { p.source, p.members = uncertainty.Source{U: p.source.U}, nil }),
		NumShared: w.alternative(tested, func(p *part) {
			if p.line.Of == OfNumerical && !p.interp {
				p.source = uncertainty.Source{U: p.source.U, Common: true}
			}
		}),
		Offset: None, UOffset: None, OffsetPart: None, Remainder: None, RemainderReference: None,
		Scale: None, UScale: None, ScalePart: None, ShapePart: None, AtLeast: None, Turns: []Turning{}, Without: []Leaving{},
		Merged: len(w.tested) - len(w.joined), Worst: None, WorstAt: None, Condition: None, Eigenvalues: []Number{}, Correlations: []CorrelationLine{}}
	w.cell.Joint = j
	w.residuals(j, q)
	w.doubtCorrelation(tested)
	if q.Rank < len(tested) {
		w.tell(notice.New("covariance-rank", q.Rank, len(tested), q.Rank))
	}
	if low := (distuv.ChiSquared{K: float64(q.Rank)}).CDF(q.Statistic); low < 0.01 {
		w.tell(notice.New("joint-low-tail"))
	}
	w.split(j, tested, budget)
	if w.e.options.Alternatives && !w.inner {
		w.lookAround(j, tested, budget)
	}
}

// jointRefusal says why there is no joint statistic.
func jointRefusal(err error, n int) notice.Notice {
	switch {
	case errors.Is(err, comparison.ErrSize):
		return notice.New("covariance-size", n, comparison.MaxDense)
	case errors.Is(err, comparison.ErrPattern):
		return notice.New("covariance-pattern")
	case errors.Is(err, comparison.ErrFinite):
		return notice.New("covariance-finite")
	}
	return notice.New("covariance-range")
}

// split parts the statistic into a common offset and the remainder.
func (w *work) split(j *Joint, e []float64, budget uncertainty.Budget) {
	if len(e) < 3 {
		return
	}
	s, ok := comparison.Offset(e, budget)
	if !ok {
		return // no independent variance at some station: there are no such parts
	}
	j.Offset, j.UOffset, j.OffsetPart, j.Remainder = w.step(s.Offset), w.step(s.U), Number(s.Part), Number(s.Remainder)
	j.RemainderN = j.N - 1
	reference := comparison.ChiSquare95(j.RemainderN)
	j.RemainderReference, j.RemainderExceeds = Number(reference), exceeds(s.Remainder, reference)
	j.OffsetResolved = exceeds(math.Abs(s.Offset), float64(w.choices.K*s.U))
}

// lookAround adds what costs more than the statistic itself: the chance of the
// found count, the correlations at which the conclusion turns, and the
// statistic without each region.
func (w *work) lookAround(j *Joint, e []float64, budget uncertainty.Budget) {
	if d, ok := comparison.Decompose(e, pick(w.s, w.joined), budget); ok {
		j.Scale, j.UScale = Number(d.Scale), Number(d.UScale)
		j.ScalePart, j.ShapePart, j.ShapeN = Number(d.ScalePart), Number(d.ShapePart), d.ShapeDegrees
		j.ScaleResolved = exceeds(math.Abs(d.Scale), float64(w.choices.K*d.UScale))
	}
	found := len(w.joined) - metric.Within(comparison.Ratio(e, budget.Total()), w.choices.K)
	if found == 0 {
		j.AtLeast = 1
	} else if c, err := comparison.BeyondByChance(budget, w.choices.K, found, samplingSeed); err == nil {
		j.AtLeast = Number(c.AtLeast)
	}
	if len(e) > 1 && len(e) <= mostTurned {
		w.turnings(j, e)
	}
	w.withoutRegions(j, e, budget)
	w.withoutStations(j, e, budget)
	w.conditioning(j, budget)
}

// samplingSeed makes sampled numbers the same in every evaluation.
const samplingSeed = 20260901

// mostTurned is the number of stations above which the correlations are not
// searched: each source evaluates the statistic some sixty times.
const mostTurned = 20_000

// turnings finds, for every systematic source of the data, the correlation at
// which the conclusion turns.
func (w *work) turnings(j *Joint, e []float64) {
	for i, p := range w.parts {
		if p.line.Of != OfData || !p.source.Common {
			continue
		}
		rest := append(append([]part{}, w.parts[:i]...), w.parts[i+1:]...)
		curve, err := comparison.Correlate(e, w.covariance(rest, w.joined), pick(p.source.U, w.joined), correlationSteps)
		if err != nil {
			continue // told with the statistic itself
		}
		w.correlationLine(j, p.line.Name, curve)
		first, last := curve.Points[0], curve.Points[len(curve.Points)-1]
		if n := len(curve.Flips); n > 0 { // the one nearest to what is declared
			j.Turns = append(j.Turns, Turning{Source: p.line.Name, Rho: Number(curve.Flips[n-1]), At0: Number(first.Statistic), At1: Number(last.Statistic)})
		}
	}
}

// withoutRegions gives the statistic with each region left out.
func (w *work) withoutRegions(j *Joint, e []float64, budget uncertainty.Budget) {
	var regions [][]int
	var names []string
	for _, r := range w.q.Regions {
		in := map[int]bool{}
		for _, i := range w.regionRows(r) {
			in[i] = true
		}
		var rows []int
		for n, i := range w.joined {
			if in[i] {
				rows = append(rows, n)
			}
		}
		if len(rows) > 0 && len(rows) < len(e) {
			regions, names = append(regions, rows), append(names, r.Name)
		}
	}
	if regions == nil {
		return
	}
	left, err := comparison.LeaveOut(e, budget, regions)
	if err != nil {
		return // told with the statistic itself
	}
	for n, q := range left {
		j.Without = append(j.Without, w.leaving(names[n], q))
	}
}

// exceeds compares on rounded values, so that every host says the same.
func exceeds(a, b float64) bool { return quantity.Round(a, 10) > quantity.Round(b, 10) }

// alternative returns the statistic with the pattern of the sources changed.
func (w *work) alternative(e []float64, change func(*part)) Number {
	parts := append([]part{}, w.parts...)
	for i := range parts {
		change(&parts[i])
	}
	q, err := comparison.Statistic(e, w.covariance(parts, w.joined))
	if err != nil {
		return None
	}
	return Number(q.Statistic)
}

// pattern says the correlation of the budget in words.
func (w *work) pattern() string {
	common, independent, other := false, false, false
	for _, p := range w.parts {
		switch p.line.Pattern {
		case Common:
			common = true
		case Independent:
			independent = true
		default:
			other = true
		}
	}
	switch {
	case other:
		return "structured"
	case common && independent:
		return "independent and common"
	case common:
		return "common"
	}
	return "independent"
}

// crossings lists the changes of sign of both curves as they were read.
func (w *work) crossings() {
	if w.cell.Scalar {
		return
	}
	list := func(c *curve, u []float64) []Crossing {
		out := []Crossing{}
		if c == nil || c.scalar() {
			return out
		}
		x, y := inUnit(c.x, c.xUnit, w.xUnit), inUnit(c.y, c.yUnit, w.yUnit)
		if c == w.reference {
			y = w.withoutExcluded(c, y)
		}
		if n := w.choices.Smooth; n > 0 {
			y = derived.Smooth(x, y, n)
		}
		for _, at := range derived.Crossings(x, y) {
			place := Crossing{X: Number(w.xUnit.FromSI(at.X)), U: None, Rising: at.Rising}
			if v, known := w.between(at.X, u); known {
				place.U = Number(w.xUnit.StepFromSI(derived.CrossingU(x, y, at.X, v)))
			}
			out = append(out, place)
		}
		return out
	}
	w.cell.Crossings = Crossings{Simulation: list(w.finest(), w.uNum), Reference: list(w.reference, w.uD)}
}

// withoutExcluded makes the excluded rows of the reference gaps.
func (w *work) withoutExcluded(c *curve, y []float64) []float64 {
	if len(w.cell.Excluded) == 0 {
		return y
	}
	out := append([]float64{}, y...)
	for i := range out {
		if w.isExcluded(c.table.RowLine(i)) {
			out[i] = math.NaN()
		}
	}
	return out
}

// between returns an uncertainty between the stations around a place.
func (w *work) between(at float64, u []float64) (float64, bool) {
	if u == nil || len(w.x) < 2 {
		return 0, false
	}
	x, y := ascending(w.x, u)
	value := make([]float64, 1)
	if len(x) < 2 || interpolate.At(value, x, y, []float64{at}, interpolate.Linear) != nil || math.IsNaN(value[0]) {
		return 0, false
	}
	return value[0], true
}
