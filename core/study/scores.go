package study

import (
	"errors"
	"math"
	"strconv"

	"weirmark/core/metric"
	"weirmark/core/notice"
	"weirmark/core/profile"
	"weirmark/core/quantity"
)

// nearZero is the part of the largest |D| below which a percent error is
// withheld.
const nearZero = 0.02

// scores fills the difference measures of a curve, each with its scale, and
// those of a field where they are asked for.
func (w *work) scores() {
	if w.cell.Scalar || len(w.s) < 2 {
		return
	}
	lo, hi := profile.Limits(w.d)
	largest := max(math.Abs(lo), math.Abs(hi))
	e := w.errors()
	m := metric.Summarise(e)
	if hi > lo {
		w.score(ScoreLine{Name: "RMSE / range of D", Value: Number(m.RMSE / (hi - lo)), Scale: quantity.Text(float64(w.step(hi-lo)), 4) + w.cell.UnitSuffix()})
	}
	if largest > 0 {
		if _, withheld := metric.Percent(w.s, w.d, nearZero*largest); withheld > 0 {
			w.tell(notice.New("percent-withheld", withheld, quantity.Text(100*nearZero, 1)))
		}
	}
	w.fieldScores()
	w.regions(e)
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

// fieldScores fills the scores of the dispersion and wind fields.
func (w *work) fieldScores() {
	ask := w.q.Scores
	if ask == nil {
		return
	}
	if ask.Fraction > 0 || ask.Allowance > 0 {
		allowance := w.yUnit.StepToSI(ask.Allowance)
		if q, err := metric.HitRate(w.s, w.d, ask.Fraction, allowance); err == nil {
			w.scored("q", "hit rate", q, "within "+quantity.Typed(100*ask.Fraction)+" % of D or "+quantity.Typed(ask.Allowance)+w.cell.UnitSuffix(), "")
		}
	}
	if !ask.Dispersion {
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
	if mg, vg, err := metric.Geometric(w.s, w.d); err != nil {
		w.refuseScores("MG and VG", err)
	} else {
		w.scored("MG", "geometric mean bias MG", mg, "logarithms of D and S", "")
		w.scored("VG", "geometric variance VG", vg, "logarithms of D and S", "")
	}
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
	for _, c := range metric.Criteria {
		if c.Score == key {
			line.Criteria = append(line.Criteria, CriterionLine{Name: c.Name, Low: Number(c.Low), High: Number(c.High), Met: c.Met(quantity.Round(value, 10)), Scope: c.Scope, Source: c.Source})
		}
	}
	w.score(line)
}

// regions breaks the measures down, so that a sub-area does not hide in the
// whole.
func (w *work) regions(e []float64) {
	for _, r := range w.q.Regions {
		lo, hi := w.xUnit.ToSI(r.From), w.xUnit.ToSI(r.To)
		var rows []int
		for i, x := range w.x {
			if x >= lo && x <= hi {
				rows = append(rows, i)
			}
		}
		line := RegionLine{Name: r.Name, From: Number(r.From), To: Number(r.To), N: len(rows), Bias: None, RMSE: None, HitRate: None, Beyond: 0}
		if len(rows) > 0 {
			m := metric.Summarise(pick(e, rows))
			line.Bias, line.RMSE = w.step(m.Bias), w.step(m.RMSE)
			if ask := w.q.Scores; ask != nil && (ask.Fraction > 0 || ask.Allowance > 0) {
				if q, err := metric.HitRate(pick(w.s, rows), pick(w.d, rows), ask.Fraction, w.yUnit.StepToSI(ask.Allowance)); err == nil {
					line.HitRate = Number(q)
				}
			}
			for _, i := range rows {
				if w.uVal != nil && w.uVal[i] > 0 && exceeds(math.Abs(e[i]), float64(w.choices.K*w.uVal[i])) {
					line.Beyond++
				}
			}
		}
		w.cell.Regions = append(w.cell.Regions, line)
	}
}

// difference sets two models against each other, with the uncertainty of the
// difference: the data are common to both and cancel.
func (e *evaluation) difference(a, b *Cell) (Difference, bool) {
	if !sameStations(a, b) {
		return Difference{}, false
	}
	d := Difference{Case: a.Case, Quantity: a.Quantity, A: a.Model, B: b.Model, Unit: a.Unit, N: len(a.Stations), U: None}
	sum, square, known := 0.0, 0.0, true
	n := float64(len(a.Stations))
	for i := range a.Stations {
		x, y := a.Stations[i], b.Stations[i]
		sum += float64(x.S-y.S) / n
		known = known && x.UInput.Known() && y.UInput.Known()
		for _, u := range []Number{x.UNum, y.UNum} {
			known = known && u.Known()
			square += float64(u*u) / float64(n*n)
		}
		// Input sources are fully shared between stations; how they move the
		// two models against each other is not known: counted in full for both.
		d.RMSA += x.E * x.E / Number(n)
		d.RMSB += y.E * y.E / Number(n)
	}
	d.RMSA, d.RMSB = Number(math.Sqrt(float64(d.RMSA))), Number(math.Sqrt(float64(d.RMSB)))
	d.Mean = Number(sum)
	if !known {
		return d, true
	}
	input := 0.0
	for _, c := range []*Cell{a, b} {
		u := 0.0
		for i := range c.Stations {
			if v := c.Stations[i].UInput; v.Known() {
				u += float64(v) / n
			}
		}
		input += float64(u * u)
	}
	d.U = Number(math.Sqrt(square + input))
	d.Resolved = exceeds(math.Abs(sum), float64(a.Choices.K)*float64(d.U))
	return d, true
}

// sameStations reports whether two cells compare the same rows in the same
// unit: anything else would be no fair comparison of models.
func sameStations(a, b *Cell) bool {
	if a.Unit != b.Unit || a.XUnit != b.XUnit || len(a.Stations) != len(b.Stations) || len(a.Stations) == 0 {
		return false
	}
	for i := range a.Stations {
		if a.Stations[i].Line != b.Stations[i].Line {
			return false
		}
	}
	return true
}

// differences lists the models of every question against each other.
func (e *evaluation) differences(r *Report) {
	for i := range r.Cells {
		for j := i + 1; j < len(r.Cells); j++ {
			a, b := &r.Cells[i], &r.Cells[j]
			if a.Case != b.Case || a.Quantity != b.Quantity || a.Summary == nil || b.Summary == nil {
				continue
			}
			d, fair := e.difference(a, b)
			if !fair {
				r.Notices = append(r.Notices, notice.New("models-stations", a.Model, b.Model, a.Quantity, strconv.Itoa(len(a.Stations)), strconv.Itoa(len(b.Stations))))
				continue
			}
			r.Differences = append(r.Differences, d)
		}
	}
}
