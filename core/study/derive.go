package study

import (
	"math"

	"weirmark/core/derived"
	"weirmark/core/notice"
	"weirmark/core/quantity"
)

// DeriveLift is the lift coefficient of a closed section, integrated from the
// pressure along its contour.
const DeriveLift = "lift of a loop"

// deriveLoop turns a curve of pressures along a contour into one lift
// coefficient. Coordinates and pressures that are no pure numbers need the
// length and the dynamic pressure of the case; an unknown angle is zero, which
// is told.
func (e *evaluation) deriveLoop(c *curve) (*curve, []notice.Notice) {
	p := c.slip
	file := e.study.fileName(p)
	l := loader{e: e, slip: p, table: c.table, file: file}
	second, unit := l.column(p.Contour)
	if second == nil || c.x == nil {
		return nil, append(l.notices, notice.New("loop-contour", file).In(file))
	}
	length, ok := e.scaleOf(c.xUnit, p.Case.Value, p.side(), RefLength)
	height, okHeight := e.scaleOf(unit, p.Case.Value, p.side(), RefLength)
	pressure, okPressure := e.scaleOf(c.yUnit, p.Case.Value, p.side(), DynamicPressure)
	if !ok || !okHeight || !okPressure {
		return nil, append(l.notices, notice.New("loop-references", file, p.Case.Value).In(file))
	}
	alpha, known := e.cardValue(p.Case.Value, Angle, p.side())
	if !known {
		l.tell(notice.New("loop-angle", file))
	}
	section, err := derived.Loop(times(c.x, 1/length), times(second, 1/height), times(c.y, 1/pressure), alpha)
	if err != nil {
		return nil, append(l.notices, notice.New("loop-refused", file, err.Error()).In(file))
	}
	l.tell(notice.New("loop-lift", file, quantity.Text(section.Lift, 4), quantity.Text(math.Abs(section.Closing.Lift), 2)))
	scalar := *c
	scalar.x, scalar.u = nil, nil
	scalar.y = []float64{section.Lift}
	scalar.yUnit = pureAxis(p.Y.Name())
	return &scalar, l.notices
}

// scaleOf returns what makes a column a pure number: one where it is one, else
// the reference quantity of the case.
func (e *evaluation) scaleOf(a axis, caseName, side, symbol string) (float64, bool) {
	if a.unit.Same(quantity.One) {
		return 1, true
	}
	v, known := e.cardValue(caseName, symbol, side)
	wanted, _ := cardSymbol(symbol)
	unit, err := quantity.Parse(wanted.Unit)
	return v, known && v > 0 && err == nil && a.unit.Same(unit)
}

// apartWords says a difference of the data from another value as a part of them
// where there are parts.
func (w *work) apartWords(difference float64) string {
	if w.yUnit.ByConvention() {
		return quantity.Text(float64(w.step(math.Abs(difference))), 2) + " K"
	}
	return quantity.Percent(math.Abs(difference/w.d[0])) + " %"
}

// otherReferences holds the first reference of a scalar against the others:
// where they differ by more than k of the first's uncertainty, the data do not
// agree with each other.
func (w *work) otherReferences() {
	if len(w.others) == 0 || !w.cell.Scalar || len(w.d) != 1 || w.uD == nil {
		return
	}
	for _, c := range w.others {
		all := known(inUnit(c.y, c.yUnit, w.yUnit))
		if len(all) != 1 || !(w.uD[0] > 0) {
			continue
		}
		difference := all[0] - w.d[0]
		w.consistent(ConsistencyLine{Name: "against " + w.e.study.fileName(c.slip), Value: w.yNumber(w.d[0]), Expected: w.yNumber(all[0]), U: w.step(w.uD[0]), Ratio: Number(math.Abs(difference) / w.uD[0]),
			Holds: !exceeds(math.Abs(difference), float64(w.choices.K*w.uD[0]))})
		if exceeds(math.Abs(difference), float64(w.choices.K*w.uD[0])) {
			w.ask(2, "which of the references holds", "references-differ", w.cell.Reference, quantity.Text(w.yUnit.FromSI(w.d[0]), 4), w.e.study.fileName(c.slip), quantity.Text(w.yUnit.FromSI(all[0]), 4),
				w.apartWords(difference), quantity.Typed(w.choices.K))
		}
	}
}
