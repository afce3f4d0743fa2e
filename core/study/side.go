package study

import (
	"errors"
	"math"
	"sort"
	"strings"

	"weirmark/core/derived"
	"weirmark/core/notice"
	"weirmark/core/plausibility"
	"weirmark/core/quantity"
	"weirmark/core/uncertainty"
)

// take takes the scalar of one side and says what is doubtful about it.
func (w *work) take(t *taking, c *curve, from derived.Curve, side string) (derived.Scalar, bool) {
	file := w.e.study.fileName(c.slip)
	got, err := t.take(from)
	switch {
	case errors.Is(err, derived.ErrNone) && t.kind.Signed && w.magnitude(t, c, from):
		return got, false
	case errors.Is(err, derived.ErrEdge):
		w.refuseDerived(notice.New("derive-edge", file, t.kind.Name), w.q.target("derive.edge"))
		return got, false
	case err != nil:
		w.refuseDerived(notice.New("derive-refused", t.kind.Name, file, err.Error()), w.q.target("derive.kind"))
		return got, false
	}
	if got.Several {
		w.several(t, c, from, got)
	}
	if got.Bound {
		w.tell(notice.New("derive-bound", t.kind.Name, file))
	}
	if got.Overshoot > 0.005 {
		w.tell(notice.New("derive-overshoot", file, quantity.Percent(got.Overshoot)))
	}
	return got, true
}

// magnitude asks about a column without sign that should have one.
func (w *work) magnitude(t *taking, c *curve, from derived.Curve) bool {
	least, largest := math.Inf(1), math.Inf(-1)
	for _, v := range from.Y {
		if !math.IsNaN(v) {
			least, largest = min(least, v), max(largest, v)
		}
	}
	_, corner := plausibility.Magnitude(known(from.Y))
	if t.settings.Numbers[derived.KeyLevel] != 0 || least < 0 || !corner && least > 0.02*largest {
		return false
	}
	w.need(2, true, "the sign of "+c.yUnit.name, slipTarget(c.slip, "y.column"), "derive-magnitude", c.yUnit.name+" of "+w.e.study.fileName(c.slip), quantity.Text(t.y.FromSI(least), 2), t.kind.Name)
	return true
}

// several asks which of the candidates is the event.
func (w *work) several(t *taking, c *curve, from derived.Curve, got derived.Scalar) {
	places := make([]string, len(got.Places))
	for i, p := range got.Places {
		places[i] = quantity.Text(t.x.FromSI(p.X), 4)
	}
	noise := "not known"
	if u := w.columnU(c); u > 0 {
		noise = quantity.Text(t.y.StepFromSI(u), 2) + suffix(t.y.symbol)
	}
	w.need(2, true, "which of the crossings is meant", w.q.target("derive.which"), "derive-several", len(places), w.e.study.fileName(c.slip), strings.Join(places, ", "), noise)
}

// columnU is the root mean square of the uncertainty column of a curve.
func (w *work) columnU(c *curve) float64 {
	sum, n := 0.0, 0.0
	for _, u := range c.u {
		if !math.IsNaN(u) {
			sum, n = sum+float64(u*u), n+1
		}
	}
	if n == 0 {
		return 0
	}
	return math.Sqrt(sum / n)
}

// second returns the second column of a curve where the kind uses one; ok is
// false where one is needed and not given.
func (w *work) second(t *taking, c *curve) ([]float64, bool) {
	if t.kind.Second == "" {
		return nil, true
	}
	if !c.slip.Contour.Column.Given() {
		if t.kind.Loop {
			w.refuseDerived(notice.New("loop-contour", w.e.study.fileName(c.slip)), slipTarget(c.slip, "contour.column"))
		}
		return nil, !t.kind.Loop
	}
	l := loader{table: c.table, file: w.e.study.fileName(c.slip)}
	values, unit := l.column(c.slip.Contour)
	for _, n := range l.notices {
		w.tell(n)
		w.stop(2, "a readable second column", slipTarget(c.slip, "contour.column"), n)
	}
	if t.kind.Loop && values != nil {
		values = inUnit(values, unit, t.x)
	}
	return values, values != nil
}

func pickSecond(second []float64, rows []int) []float64 {
	if second == nil {
		return nil
	}
	return pick(second, rows)
}

// commonContour brings the pressures of the simulation to the points of the
// reference: each to the nearest point of the simulated contour.
func (w *work) commonContour() {
	t := &taking{kind: &derived.Kind{Loop: true, Second: "second coordinate"}, x: w.xUnit}
	s, d := w.finest(), w.reference
	sy, okS := w.second(t, s)
	dy, okD := w.second(t, d)
	if !okS || !okD {
		return
	}
	rx, rv := inUnit(d.x, d.xUnit, w.xUnit), inUnit(d.y, d.yUnit, w.yUnit)
	for i := range rx {
		if math.IsNaN(rx[i]) || math.IsNaN(rv[i]) || math.IsNaN(dy[i]) || w.excluded(i, rx[i], rv[i]) {
			continue
		}
		w.rows, w.x, w.d = append(w.rows, i), append(w.x, rx[i]), append(w.d, rv[i])
	}
	w.tellExcluded()
	values, apart := derived.Onto(inUnit(s.x, s.xUnit, w.xUnit), sy, inUnit(s.y, s.yUnit, w.yUnit), w.x, pick(dy, w.rows))
	if len(values) < len(w.x) {
		w.refuseDerived(notice.New("derive-refused", w.cell.Derived.Kind, w.e.study.fileName(s.slip), derived.ErrRows.Error()), slipTarget(s.slip, "contour.column"))
		w.x = nil
		return
	}
	if apart > 0.02 {
		w.ask(2, "the same section on both sides", "derive-contour", w.e.study.fileName(s.slip), w.e.study.fileName(d.slip), quantity.Percent(apart))
	}
	w.s, w.uInterp = values, uncertainty.Constant(len(w.x), 0)
}

// runAtStations brings a run to the stations that the finest run has been
// brought to; ok is false where it does not answer all of them.
func (w *work) runAtStations(t *taking, c *curve, reference derived.Curve) (derived.Curve, bool) {
	second, ok := w.second(t, c)
	if !ok {
		return derived.Curve{}, false
	}
	if t.kind.Loop {
		v, _ := derived.Onto(inUnit(c.x, c.xUnit, w.xUnit), second, inUnit(c.y, c.yUnit, w.yUnit), reference.X, reference.Second)
		return derived.Curve{X: reference.X, Y: v, Second: reference.Second}, len(v) == len(reference.X)
	}
	y := w.resample(c, reference.X)
	at := derived.Curve{X: reference.X, Y: y.S}
	if len(y.Kept) != len(reference.X) {
		return at, false
	}
	if second != nil {
		other := *c
		other.y = second
		at.Second = w.resample(&other, reference.X).S
		ok = len(at.Second) == len(at.X)
	}
	return at, ok
}

// wholeOf returns a curve at all its rows, within the part that stands beside
// the stations of the other side; at is nil where there are none.
func (w *work) wholeOf(t *taking, c *curve, at []float64) (derived.Curve, bool) {
	second, ok := w.second(t, c)
	whole := derived.Curve{X: inUnit(c.x, c.xUnit, t.x), Y: inUnit(c.y, c.yUnit, t.y), Second: second}
	if gaps := len(whole.Y) - len(known(whole.Y)); gaps > 0 && !c.slip.Branch.Given() {
		w.tell(notice.New("derive-gap", gaps, w.e.study.fileName(c.slip), t.kind.Name))
	}
	if !ok || at == nil || t.kind.Range == derived.Whole {
		return whole, ok
	}
	lo, hi := at[0], at[0]
	for _, x := range at {
		lo, hi = min(lo, x), max(hi, x)
	}
	ends := []float64{hi}
	if t.kind.Range == derived.Between {
		ends = []float64{lo, hi}
	} else {
		lo = math.Inf(-1)
	}
	cut, fits := w.runAtStations(t, c, derived.Curve{X: ends})
	if !fits {
		return whole, false
	}
	for i, x := range whole.X {
		if x > lo && x < hi {
			cut.X, cut.Y = append(cut.X, x), append(cut.Y, whole.Y[i])
			if second != nil {
				cut.Second = append(cut.Second, second[i])
			}
		}
	}
	order := all(len(cut.X))
	sort.SliceStable(order, func(i, j int) bool { return cut.X[order[i]] < cut.X[order[j]] })
	sorted := derived.Curve{}
	for _, i := range order {
		sorted.X, sorted.Y = append(sorted.X, cut.X[i]), append(sorted.Y, cut.Y[i])
		if second != nil {
			sorted.Second = append(sorted.Second, cut.Second[i])
		}
	}
	return sorted, true
}

// sides lists what was found of one side.
func (w *work) sides(t *taking, c *curve, from derived.Curve, side string, got derived.Scalar) {
	line := DerivedSide{Side: side, File: w.e.study.fileName(c.slip), Rows: got.Rows, Value: t.value(got.Value), U: t.step(got.U()), At: Number(t.x.FromSI(got.At * t.length)), AtUnit: t.x.symbol,
		Edge: Number(t.y.FromSI(got.Edge)), EdgeUnit: t.y.symbol, Overshoot: Number(got.Overshoot), Gap: Number(got.Gap), Bound: got.Bound, Effects: []DerivedEffect{}, Places: []DerivedPlace{}}
	for _, e := range got.Effects {
		line.Effects = append(line.Effects, DerivedEffect{Name: e.Name, Change: t.step(e.Change), U: t.step(e.Part())})
	}
	for i, p := range got.Places {
		line.Places = append(line.Places, DerivedPlace{X: Number(t.x.FromSI(p.X)), Rising: p.Rising, U: None, Chosen: i == got.Chosen})
	}
	w.cell.Derived.Sides = append(w.cell.Derived.Sides, line)
	w.takes = append(w.takes, takenSide{t, c, from})
}
