package study

import (
	"cmp"
	"math"

	"weirmark/core/derived"
	"weirmark/core/notice"
	"weirmark/core/quantity"
)

// derive takes the scalar that the question asks for from every curve of the
// cell, which goes on as one of scalars. Where both sides are curves the
// simulation is brought to the stations of the data first, so that what lies
// between them is missing on both sides alike. It reports whether the two
// sides can be compared.
func (w *work) derive() bool {
	kind, known := derived.Named(w.q.Derive.Kind)
	if !known {
		w.refuseDerived(notice.New("derive-unknown", w.q.Derive.Kind), w.q.target("derive.kind"))
		return false
	}
	w.cell.Derived = &Derived{Kind: kind.Name, Formula: kind.Formula, Settings: []DerivedSetting{}, Sides: []DerivedSide{}, Others: []DerivedOther{}, Effect: None}
	s, d := w.finest(), w.reference
	if s != nil && d != nil && !s.scalar() && !d.scalar() {
		return w.deriveBoth(kind)
	}
	return w.deriveEach(kind)
}

func (w *work) refuseDerived(n notice.Notice, target Target) {
	w.tell(n)
	w.stop(2, "the scalar of "+w.q.label(), target, n)
}

// deriveBoth compares curve with curve.
func (w *work) deriveBoth(kind *derived.Kind) bool {
	if !w.settleUnits() {
		return false
	}
	t, ok := w.taking(kind, w.xUnit, w.yUnit)
	if !ok {
		return false
	}
	s, d := w.finest(), w.reference
	if kind.Loop {
		w.commonContour()
	} else {
		w.commonStations()
	}
	if len(w.x) == 0 {
		return false
	}
	w.doubtCurves()
	dSecond, okD := w.second(t, d)
	reference := derived.Curve{X: w.x, Y: w.d, Second: pickSecond(dSecond, w.rows)}
	simulation, okS := w.runAtStations(t, s, reference)
	whole, okW := w.wholeOf(t, s, w.x)
	if !okD || !okS || !okW {
		return false
	}
	fromD, okD := w.take(t, d, reference, "reference")
	fromS, okS := w.take(t, s, simulation, "simulation at the stations")
	if !okD || !okS {
		return false
	}
	w.sides(t, d, reference, "reference", fromD)
	w.sides(t, s, simulation, "simulation at the stations", fromS)
	if full, err := t.take(whole); err == nil {
		w.sides(t, s, whole, "simulation at all its rows", full)
		effect := full.Value - fromS.Value
		w.cell.Derived.Effect = t.step(effect)
		w.tell(notice.New("derive-sampling", kind.Name, quantity.Like(float64(t.value(fromS.Value)), float64(t.step(effect)), 3), quantity.Like(float64(t.value(full.Value)), float64(t.step(effect)), 3), quantity.Signed(float64(t.step(effect)), 2)+t.suffix()))
	} else {
		w.tell(notice.New("derive-whole", kind.Name, w.e.study.fileName(s.slip), err.Error()))
	}
	w.otherChoices(t, &reference, &simulation)
	parts := w.propagated(t, reference, simulation)
	parts = append(parts, remainders(fromS, fromD)...)
	w.asScalar = func(c *curve) (*curve, error) {
		x, y := w.xUnit, w.yUnit // of the scalar, once the cell is one
		defer func() { w.xUnit, w.yUnit = x, y }()
		w.xUnit, w.yUnit = t.x, t.y
		at, ok := w.runAtStations(t, c, reference)
		if !ok {
			return nil, derived.ErrRows
		}
		got, err := t.take(at)
		return scalarCurve(t, c, got.Value), err
	}
	w.deriveOthers(kind)
	w.becomeScalar(t, fromD.Value, fromS.Value, w.derivedRuns(t, fromS))
	w.parts = parts
	return true
}

// deriveEach takes the scalar of each curve at all its rows: the other side is
// a value, or there is none.
func (w *work) deriveEach(kind *derived.Kind) bool {
	mixed := false
	each := func(c *curve, side, of string) (*curve, bool) {
		if c == nil || c.scalar() || c == w.grids {
			return c, true
		}
		mixed = true
		t, ok := w.taking(kind, axisUnit(c.xUnit), axisUnit(c.yUnit))
		if !ok {
			return nil, false
		}
		from, ok := w.wholeOf(t, c, nil)
		if !ok {
			return nil, false
		}
		if of == OfData {
			w.xUnit, w.yUnit = t.x, t.y
			from = w.usable(from)
			w.x, w.d = from.X, from.Y
		}
		got, ok := w.take(t, c, from, side)
		if !ok {
			return nil, false
		}
		if of == OfData {
			w.parts = append(w.propagated(t, from, derived.Curve{}), remainders(derived.Scalar{}, got)...)
			w.x, w.d, w.rows = nil, nil, nil
		}
		w.sides(t, c, from, side, got)
		if of == OfNumerical {
			w.parts = append(w.parts, remainders(got, derived.Scalar{})...)
		}
		return scalarCurve(t, c, got.Value), true
	}
	var ok bool
	if w.reference, ok = each(w.reference, "reference", OfData); !ok {
		return false
	}
	for i, r := range w.runs {
		side, of := "simulation", OfNumerical
		if i > 0 {
			side, of = "simulation, grid "+cmp.Or(r.curve.slip.Grid.Value, "–"), ""
		}
		if w.runs[i].curve, ok = each(r.curve, side, of); !ok {
			return false
		}
	}
	parts := w.parts
	w.asScalar = func(c *curve) (*curve, error) {
		t, ok := w.taking(kind, axisUnit(c.xUnit), axisUnit(c.yUnit))
		if !ok {
			return nil, derived.ErrSecond
		}
		from, ok := w.wholeOf(t, c, nil)
		if !ok {
			return nil, derived.ErrSecond
		}
		got, err := t.take(from)
		return scalarCurve(t, c, got.Value), err
	}
	if mixed && w.reference != nil && w.finest() != nil {
		w.tell(notice.New("derive-alone", w.cell.Derived.Kind))
	}
	w.deriveOthers(kind)
	if !w.settleUnits() {
		return false
	}
	w.commonStations()
	w.parts = parts
	return true
}

// usable leaves out the rows of the reference that have a gap or that a person
// took out.
func (w *work) usable(c derived.Curve) derived.Curve {
	for i := range c.X {
		if !math.IsNaN(c.X[i]) && !math.IsNaN(c.Y[i]) && (c.Second == nil || !math.IsNaN(c.Second[i])) && !w.excluded(i, c.X[i], c.Y[i]) {
			w.rows = append(w.rows, i)
		}
	}
	return derived.Curve{X: pick(c.X, w.rows), Y: pick(c.Y, w.rows), Second: pickSecond(c.Second, w.rows)}
}

// deriveOthers takes the scalar of further references that are curves.
func (w *work) deriveOthers(kind *derived.Kind) {
	for i, c := range w.others {
		if c.scalar() {
			continue
		}
		if t, ok := w.taking(kind, axisUnit(c.xUnit), axisUnit(c.yUnit)); ok {
			if from, ok := w.wholeOf(t, c, nil); ok {
				if got, ok := w.take(t, c, from, "further reference"); ok {
					w.sides(t, c, from, "further reference", got)
					w.others[i] = scalarCurve(t, c, got.Value)
				}
			}
		}
	}
}

// derivedRuns takes the scalar of every run at the same stations; a run that
// does not answer them all, or has no such scalar, leaves the grid study.
func (w *work) derivedRuns(t *taking, finest derived.Scalar) []run {
	runs := []run{{scalarCurve(t, w.runs[0].curve, finest.Value), w.runs[0].cells}}
	for _, r := range w.runs[1:] {
		c, err := w.asScalar(r.curve)
		if err != nil {
			w.tell(notice.New("derive-run", cmp.Or(r.curve.slip.Grid.Value, w.e.study.fileName(r.curve.slip)), t.kind.Name, err.Error()))
			continue
		}
		runs = append(runs, run{c, r.cells})
	}
	return runs
}

// scalarCurve is a curve of the one value that was taken from another.
func scalarCurve(t *taking, c *curve, value float64) *curve {
	slip := *c.slip
	slip.X, slip.Y.Unit = ColumnUse{}, Field{Value: t.unit.symbol, By: slip.Y.Unit.By}
	return &curve{slip: &slip, table: c.table, taken: true, y: []float64{value}, yUnit: axis{unit: t.unit.Unit, known: true, name: c.yUnit.name, symbol: t.unit.symbol}}
}

// becomeScalar lets the cell go on as one of two values.
func (w *work) becomeScalar(t *taking, d, s float64, runs []run) {
	w.reference, w.runs = scalarCurve(t, w.reference, d), runs
	w.xUnit, w.yUnit = unit{Unit: quantity.One}, t.unit
	w.cell.Unit, w.cell.XUnit, w.cell.XName, w.cell.Scalar = t.unit.symbol, "", "", true
	w.cell.StationsAll, w.cell.Outside = 1, []Number{}
	w.rows, w.x, w.d, w.s, w.uInterp = []int{0}, []float64{math.NaN()}, []float64{d}, []float64{s}, []float64{0}
}
