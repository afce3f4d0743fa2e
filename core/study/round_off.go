package study

import (
	"math"

	"weirmark/core/notice"
	"weirmark/core/refinement"
)

// roundOff compares the finest run with a second one that differs in precision
// or platform only. What they differ by is the floor below which no numerical
// uncertainty lies: it is a source of its own, the same at all stations, so
// that a place where the two happen to agree has no smaller one.
func (w *work) roundOff() {
	for _, p := range w.slips(Precision) {
		c := w.use(p)
		if c == nil {
			continue
		}
		if w.finest() == nil || p.Grid.Given() && p.Grid.Value != w.cell.Grid || w.cell.RoundOff != nil {
			w.tell(notice.New("precision-grid", w.e.study.fileName(p), p.Grid.Value, w.cell.Grid))
			continue
		}
		w.pair(c)
	}
}

// pair takes the floor from the finest run and its pair.
func (w *work) pair(c *curve) {
	p := c.slip
	if _, refusal := sameAxis(axis{unit: w.yUnit.Unit, known: true}, c.yUnit, w.q.Quantity, p.Y.Column.Value); c.yUnit.known && refusal != nil {
		w.finding(1, "a second run in the unit of "+w.q.Quantity, *refusal)
		return
	}
	a, b := w.bothRuns(c)
	floor := refinement.RoundOff(a, b)
	if math.IsNaN(floor.RMS) {
		w.ask(1, "a second run that can be compared", "precision-none", w.e.study.fileName(p))
		return
	}
	line := &RoundOffLine{Grid: w.cell.Grid, File: w.e.study.fileName(p), RMS: w.step(floor.RMS), Max: w.step(floor.Max), N: len(a)}
	w.cell.RoundOff = line
	if w.refined.Used > 0 {
		shown := refinement.NoiseFloor{RMS: float64(line.RMS), Max: float64(line.Max)}
		r := w.refined
		for i, v := range w.refined.Values {
			r.Values[i] = w.yUnit.FromSI(v)
		}
		for _, n := range shown.Doubt(r) {
			line.Doubt = true
			w.tell(n)
		}
	}
	if floor.RMS == 0 {
		w.tell(notice.New("precision-equal", w.e.study.fileName(p)))
		return
	}
	if len(w.x) > 0 {
		w.addToRun("round-off", "difference of two runs of other precision or platform, root mean square", "computed from "+line.File, floor.RMS)
	}
}

// bothRuns returns the finest run and its pair, in SI, at the stations both
// answer: as they were run, before any correction of conditions.
func (w *work) bothRuns(c *curve) (a, b []float64) {
	if w.cell.Scalar {
		va, oka := w.scalarOf(w.finest())
		vb, okb := w.scalarOf(c)
		if !oka || !okb {
			return nil, nil
		}
		return []float64{va}, []float64{vb}
	}
	if c.scalar() || len(w.x) == 0 {
		return nil, nil
	}
	one, two := w.resample(w.finest(), w.x), w.resample(c, w.x)
	at := map[int]float64{}
	for j, i := range two.Kept {
		at[i] = two.S[j]
	}
	for j, i := range one.Kept {
		if v, both := at[i]; both {
			a, b = append(a, one.S[j]), append(b, v)
		}
	}
	return a, b
}
