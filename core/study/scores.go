package study

import (
	"cmp"
	"errors"
	"math"
	"strconv"

	"weirmark/core/metric"
	"weirmark/core/notice"
	"weirmark/core/profile"
	"weirmark/core/quantity"
	"weirmark/core/uncertainty"
)

// nearZero is the part of the largest |D|, in percent, that |D| must exceed
// for a percent error, where no other is entered.
const nearZero = 2

// scores fills the difference measures of a curve, each with its scale, and
// those of a field where they are asked for.
func (w *work) scores() {
	if w.cell.Scalar || len(w.s) < 2 {
		return
	}
	ask := w.q.Scores
	if ask == nil {
		ask = &Scoring{}
	}
	e := w.errors()
	w.scaled(ask, metric.Summarise(e))
	w.percent(ask)
	w.weighted(ask, e)
	w.correlation(ask)
	w.fieldScores(ask)
	w.distribution(ask, e)
	w.regions(ask, e)
	if w.e.options.Alternatives && !w.inner {
		w.measured()
	}
}

func (w *work) score(line ScoreLine) {
	if line.Criteria == nil {
		line.Criteria = []CriterionLine{}
	}
	w.cell.Scores = append(w.cell.Scores, line)
}

// errors returns E at the stations, in SI.
func (w *work) errors() []float64 {
	e := make([]float64, len(w.s))
	for i := range e {
		e[i] = w.s[i] - w.d[i]
	}
	return e
}

// scaled gives the usual measures as parts of a scale that is named with them.
func (w *work) scaled(ask *Scoring, m metric.Summary) {
	scale, name, ok := w.scale(ask)
	if !ok {
		return
	}
	printed := quantity.Text(float64(w.step(scale)), 4) + w.cell.UnitSuffix()
	line := func(measure string, v float64) {
		w.score(ScoreLine{Name: measure + " / " + name, Value: Number(v / scale), Scale: printed})
	}
	if ask.Scale != "" {
		line("mean E", m.Bias)
		line("mean |E|", m.MAE)
	}
	line("RMSE", m.RMSE)
	if ask.Scale != "" {
		line("largest |E|", m.MaxAbs)
	}
}

// scale returns the scale of the measures, in SI, and its name; what is no
// scale of the quantity is told.
func (w *work) scale(ask *Scoring) (float64, string, bool) {
	lo, hi := profile.Limits(w.d)
	of := func(symbol, name string) (float64, string, bool) {
		v, known := w.e.cardValue(w.q.Case, symbol, OfData)
		wanted, _ := cardSymbol(symbol)
		unit, err := quantity.Parse(wanted.Unit)
		if !known || !(v > 0) || err != nil || !w.yUnit.Same(unit) {
			w.tell(notice.New("scale-missing", name, w.q.label()))
			return 0, "", false
		}
		return v, name, true
	}
	switch ask.Scale {
	case ScaleMean:
		if w.noParts("mean |D|") {
			return 0, "", false
		}
		mean := 0.0
		for _, d := range w.d {
			mean += math.Abs(d) / float64(len(w.d))
		}
		return mean, "mean |D|", mean > 0
	case ScaleSpeed:
		return of(RefSpeed, "reference speed U")
	case ScalePressure:
		return of(DynamicPressure, "dynamic pressure q")
	case ScaleEntered:
		if !(ask.ScaleValue > 0) {
			w.tell(notice.New("scale-missing", "the entered scale", w.q.label()))
		}
		return w.yUnit.StepToSI(ask.ScaleValue), "entered scale", ask.ScaleValue > 0
	}
	return hi - lo, "range of D", hi > lo
}

// noParts tells where a measure would take parts of values whose zero is a
// convention.
func (w *work) noParts(measure string) bool {
	if w.yUnit.ByConvention() {
		w.tell(notice.New("scores-zero", capital(measure), w.yUnit.symbol))
		return true
	}
	return false
}

// percent gives E in percent of |D| where |D| is no small part of its largest
// value, and counts the stations where it is withheld.
func (w *work) percent(ask *Scoring) {
	lo, hi := profile.Limits(w.d)
	largest := max(math.Abs(lo), math.Abs(hi))
	if !(largest > 0) || w.yUnit.ByConvention() && !ask.Percent || w.noParts("E / |D|") {
		return
	}
	above := ask.PercentAbove
	if above == 0 {
		above = nearZero
	}
	percent, withheld := metric.Percent(w.s, w.d, above/100*largest)
	if withheld > 0 {
		w.tell(notice.New("percent-withheld", withheld, quantity.Text(above, 2)))
	}
	if !ask.Percent {
		return
	}
	kept := make([]float64, 0, len(percent))
	for i, p := range percent {
		v := Number(p)
		w.cell.Stations[i].Percent = &v
		if !math.IsNaN(p) {
			kept = append(kept, p)
		}
	}
	if len(kept) > 0 {
		m := metric.Summarise(kept)
		scale := "%; " + strconv.Itoa(len(kept)) + " of " + quantity.Counted(len(percent), "station") + ", |D| above " + quantity.Text(above, 2) + " % of its largest value"
		w.score(ScoreLine{Name: "mean |E| / |D|", Value: Number(m.MAE), Scale: scale})
		w.score(ScoreLine{Name: "largest |E| / |D|", Value: Number(m.MaxAbs), Scale: scale})
	}
}

// weighted gives the measures with weights of the stations.
func (w *work) weighted(ask *Scoring, e []float64) {
	if ask.Weights == "" {
		return
	}
	weights, words, err := w.weights(ask)
	if err != nil {
		w.tell(asNotice(err))
		return
	}
	bias, mae, rmse, ok := metric.Weighted(e, weights)
	if !ok {
		w.tell(notice.New("weights-refused", words))
		return
	}
	w.score(ScoreLine{Name: "weighted mean E", Value: w.step(bias), Scale: words})
	w.score(ScoreLine{Name: "weighted mean |E|", Value: w.step(mae), Scale: words})
	w.score(ScoreLine{Name: "weighted RMSE", Value: w.step(rmse), Scale: words})
}

// correlation gives R and R², which are blind to bias and scale, beside the
// slope and the intercept, which are not.
func (w *work) correlation(ask *Scoring) {
	if !ask.Correlation {
		return
	}
	l := metric.Fit(w.s, w.d)
	if math.IsNaN(l.R) {
		w.tell(notice.New("correlation-none", w.q.label()))
		return
	}
	m := metric.Summarise(w.errors())
	beside := "of S on D, beside slope " + quantity.Text(l.Slope, 3) + " and mean E " + quantity.Signed(float64(w.step(m.Bias)), 3) + w.cell.UnitSuffix()
	w.scored("R", "correlation R", l.R, beside+"; blind to both", "")
	w.score(ScoreLine{Name: "R²", Value: Number(l.R * l.R), Scale: beside + "; blind to both"})
	w.scored("slope", "slope of S on D", l.Slope, "1 without an error of scale", "")
	w.score(ScoreLine{Name: "intercept of S on D", Value: w.step(l.Intercept), Scale: "0 without an offset"})
}

// distribution gives measures of E as a distribution: the limits within which
// 95 % of single differences lie, and the area between the distribution
// functions of S and D.
func (w *work) distribution(ask *Scoring, e []float64) {
	if !ask.Distribution {
		return
	}
	if a, ok := metric.Limits(e); ok {
		words := "mean E ± 1.96 standard deviations, normal differences; ± " + quantity.Text(float64(w.step(a.LimitU)), 2) + " (standard)"
		w.score(ScoreLine{Name: "lower limit of agreement", Value: w.step(a.Low), Scale: words})
		w.score(ScoreLine{Name: "upper limit of agreement", Value: w.step(a.High), Scale: words})
	}
	w.score(ScoreLine{Name: "area between the distributions of S and D", Value: w.step(metric.Area(w.s, w.d)), Scale: "all stations as one sample; where they lie plays no part"})
}

// fieldScores fills the scores of the dispersion and wind fields.
func (w *work) fieldScores(ask *Scoring) {
	if ask.AllowanceK > 0 && w.uD == nil {
		w.tell(notice.New("allowance-none", w.q.label()))
	}
	if allowance, words, asked := w.allowance(ask); asked && (ask.Fraction == 0 || !w.noParts("the hit rate")) {
		if q, err := metric.HitRateWithin(w.s, w.d, ask.Fraction, allowance); err == nil {
			w.scored("q", "hit rate", q, "within "+quantity.Typed(100*ask.Fraction)+" % of D or "+words, "")
		}
	}
	if !ask.Dispersion || w.noParts("FB, NMSE, FAC2, MG and VG") {
		return
	}
	r, err := metric.Dispersion(w.s, w.d, w.yUnit.ToSI(ask.Threshold))
	if err != nil {
		w.refuseScores("FB, NMSE and FAC2", err)
		return
	}
	word := "under-prediction"
	if r.FB < 0 {
		word = "over-prediction"
	}
	w.scored("FB", "fractional bias FB", r.FB, "means of D and S", word)
	w.scored("NMSE", "normalised mean square error NMSE", r.NMSE, "product of the means; "+quantity.Percent(r.Systematic/r.NMSE)+" % of it from the mean bias", "")
	w.scored("FAC2", "within a factor of two, FAC2", r.FAC2, quantity.Counted(r.Below, "pair")+" below the threshold counted as met", "")
	w.scored("NAD", "normalised absolute difference NAD", r.NAD, "sum of the means of D and S", "")
	if mg, vg, err := metric.Geometric(w.s, w.d); err != nil {
		w.refuseScores("MG and VG", err)
	} else {
		w.scored("MG", "geometric mean bias MG", mg, "logarithms of D and S", "")
		w.scored("VG", "geometric variance VG", vg, "logarithms of D and S", "")
	}
}

// allowance returns what a hit rate allows at each station, in SI, and says it
// in words.
func (w *work) allowance(ask *Scoring) ([]float64, string, bool) {
	switch {
	case ask.AllowanceK > 0 && w.uD != nil:
		return uncertainty.Scaled(w.uD, 1/ask.AllowanceK), quantity.Typed(ask.AllowanceK) + " u_D", true
	case ask.AllowanceK > 0:
		return nil, "", false
	}
	return uncertainty.Constant(len(w.d), w.yUnit.StepToSI(ask.Allowance)), quantity.Typed(ask.Allowance) + w.cell.UnitSuffix(), ask.Fraction > 0 || ask.Allowance > 0
}

func (w *work) refuseScores(names string, err error) {
	code := "scores-positive"
	if errors.Is(err, metric.ErrSigned) {
		code = "scores-signed"
	}
	w.tell(notice.New(code, names, w.q.Quantity))
}

// scored adds a score with the criteria of its field.
func (w *work) scored(key, name string, value float64, scale, word string) {
	line := ScoreLine{Name: name, Value: Number(value), Scale: scale, Word: word, Criteria: []CriterionLine{}}
	fraction := 0.0
	if w.q.Scores != nil {
		fraction = w.q.Scores.Fraction
	}
	for _, c := range CriteriaOf(w.q) {
		if c.For(key, fraction) {
			line.Criteria = append(line.Criteria, CriterionLine{Name: c.Name, Low: Number(c.Low), High: Number(c.High), Met: c.Met(quantity.Round(value, 10)), Scope: cmp.Or(c.Scope, "no scope entered"), Source: cmp.Or(c.Source, "no source entered")})
		}
	}
	w.score(line)
}

// measured gives the uncertainty of the measures at the tested stations, and
// the floor that the stated errors make by themselves.
func (w *work) measured() {
	if w.uVal == nil || len(w.tested) < 2 {
		return
	}
	e := pick(w.errors(), w.tested)
	s, ok := metric.Sample(e, w.covariance(w.parts, w.tested), samplingSeed)
	if !ok {
		return
	}
	m := metric.Summarise(e)
	for _, l := range []struct {
		name  string
		value float64
		of    metric.Spread
	}{{"mean E", m.Bias, s.Bias}, {"mean |E|", m.MAE, s.MAE}, {"RMSE", m.RMSE, s.RMSE}, {"largest |E|", m.MaxAbs, s.MaxAbs}} {
		w.cell.Measured = append(w.cell.Measured, MeasureLine{Name: l.name, Value: w.step(l.value), U: w.step(l.of.U), Floor: w.step(l.of.Floor), FloorHi: w.step(l.of.FloorHi), Above: exceeds(math.Abs(l.value), l.of.FloorHi)})
	}
}

// regions breaks the measures down, so that a sub-area does not hide in the
// whole. Where the regions do not overlap, the stations of none of them follow,
// so that the parts make the whole.
func (w *work) regions(ask *Scoring, e []float64) {
	in := make([]int, len(e))
	for _, r := range w.q.Regions {
		rows := w.regionRows(r)
		for _, i := range rows {
			in[i]++
		}
		line := w.regionLine(ask, e, rows)
		line.Name, line.From, line.To, line.Sign = r.Name, Number(r.From), Number(r.To), r.Sign
		if !r.bounded() {
			line.From, line.To = None, None
		}
		w.cell.Regions = append(w.cell.Regions, line)
	}
	var rest []int
	for i, n := range in {
		if n > 1 {
			return
		}
		if n == 0 {
			rest = append(rest, i)
		}
	}
	if len(w.q.Regions) > 0 && len(rest) > 0 {
		line := w.regionLine(ask, e, rest)
		line.Name, line.From, line.To, line.Rest = "all other stations", None, None, true
		w.cell.Regions = append(w.cell.Regions, line)
	}
}

// bounded reports whether the bounds of a region count.
func (r Region) bounded() bool { return r.Sign == "" || r.From != r.To }

// holds reports whether a station, in SI, belongs to a region.
func (w *work) holds(r Region, x, d float64) bool {
	inside := !r.bounded() || x >= w.xUnit.ToSI(r.From) && x <= w.xUnit.ToSI(r.To)
	return inside && (r.Sign == "" || r.Sign == SignPositive && d > 0 || r.Sign == SignNegative && d < 0)
}

// regionRows returns the stations of a region.
func (w *work) regionRows(r Region) []int {
	var rows []int
	for i, x := range w.x {
		if w.holds(r, x, w.d[i]) {
			rows = append(rows, i)
		}
	}
	return rows
}

// regionLine measures E at some stations.
func (w *work) regionLine(ask *Scoring, e []float64, rows []int) RegionLine {
	line := RegionLine{N: len(rows), Bias: None, RMSE: None, HitRate: None}
	if len(rows) == 0 {
		return line
	}
	m := metric.Summarise(pick(e, rows))
	line.Bias, line.RMSE = w.step(m.Bias), w.step(m.RMSE)
	if allowance, _, asked := w.allowance(ask); asked {
		if q, err := metric.HitRateWithin(pick(w.s, rows), pick(w.d, rows), ask.Fraction, pick(allowance, rows)); err == nil {
			line.HitRate = Number(q)
		}
	}
	for _, i := range rows {
		if w.uVal != nil && w.uVal[i] > 0 && exceeds(math.Abs(e[i])-w.boundAt(i), float64(w.choices.K*w.uVal[i])) {
			line.Beyond++
		}
	}
	return line
}

// difference sets two models against each other at the given pairs of
// stations, with the uncertainty of the difference: the data are common to both
// and cancel.
func (e *evaluation) difference(a, b *Cell, pairs [][2]int) Difference {
	d := Difference{Case: a.Case, Quantity: a.Quantity, A: a.Model, B: b.Model, Unit: a.Unit, N: len(pairs), U: None}
	sum, square, known := 0.0, 0.0, true
	var shared [2]float64 // of u_num that is the same error at all stations
	n := float64(len(pairs))
	for _, p := range pairs {
		x, y := a.Stations[p[0]], b.Stations[p[1]]
		sum += float64(x.S-y.S) / n
		known = known && x.UInput.Known() && y.UInput.Known()
		for k, of := range []struct {
			u, interp Number
			shared    bool
		}{{x.UNum, x.UInterp, a.Choices.NumShared}, {y.UNum, y.UInterp, b.Choices.NumShared}} {
			known = known && of.u.Known()
			if of.shared {
				shared[k] += float64(of.u) / n
			} else {
				square += float64(of.u*of.u) / float64(n*n)
			}
			if of.interp.Known() {
				square += float64(of.interp*of.interp) / float64(n*n)
			}
		}
		d.RMSA += x.E * x.E / Number(n)
		d.RMSB += y.E * y.E / Number(n)
	}
	d.RMSA, d.RMSB = Number(math.Sqrt(float64(d.RMSA))), Number(math.Sqrt(float64(d.RMSB)))
	d.Mean = Number(sum)
	if !known {
		return d
	}
	// Input sources are fully shared between stations; how they move the two
	// models against each other is not known: counted in full for both.
	inputA, inputB := 0.0, 0.0
	for _, p := range pairs {
		inputA += float64(a.Stations[p[0]].UInput) / n
		inputB += float64(b.Stations[p[1]].UInput) / n
	}
	d.U = Number(math.Sqrt(square + float64(shared[0]*shared[0]) + float64(shared[1]*shared[1]) + float64(inputA*inputA) + float64(inputB*inputB)))
	d.Resolved = exceeds(math.Abs(sum), float64(a.Choices.K)*float64(d.U))
	return d
}

// sharedStations pairs the stations of two cells that compare the same row of
// the reference in the same unit, and reports whether these are all of both:
// anything else would be no fair comparison of models.
func sharedStations(a, b *Cell) (pairs [][2]int, all bool) {
	if a.Unit != b.Unit || a.XUnit != b.XUnit {
		return nil, false
	}
	at := map[int]int{}
	for j, s := range b.Stations {
		at[s.Line] = j
	}
	for i, s := range a.Stations {
		if j, shared := at[s.Line]; shared {
			pairs = append(pairs, [2]int{i, j})
		}
	}
	return pairs, len(pairs) > 0 && len(pairs) == len(a.Stations) && len(pairs) == len(b.Stations)
}

// differences lists the models of every question against each other.
func (e *evaluation) differences(r *Report) {
	for i := range r.Cells {
		for j := i + 1; j < len(r.Cells); j++ {
			a, b := &r.Cells[i], &r.Cells[j]
			if a.Case != b.Case || a.Quantity != b.Quantity || a.Summary == nil || b.Summary == nil {
				continue
			}
			pairs, fair := sharedStations(a, b)
			if !fair && !(a.Choices.CommonSet && len(pairs) > 0) {
				r.Notices = append(r.Notices, notice.New("models-stations", a.Model, b.Model, len(pairs), max(len(a.Stations), len(b.Stations)), a.Quantity))
				continue
			}
			d := e.difference(a, b, pairs)
			d.Shared = !fair
			r.Differences = append(r.Differences, d)
		}
	}
}
