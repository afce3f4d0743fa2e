package study

import (
	"cmp"
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

// taking is a kind of scalar with what it needs of one study: its settings and
// the units of the curves it is taken from.
type taking struct {
	kind     *derived.Kind
	settings derived.Settings
	x, y     unit    // of the curves
	length   float64 // of a loop: what makes coordinates pure numbers, in SI
	pressure float64 // of a loop: what makes values pure numbers, in SI
	unit     unit    // of the scalar
}

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
	w.sides(t, d, reference, "reference", fromD, OfData)
	w.sides(t, s, simulation, "simulation at the stations", fromS, OfNumerical)
	if full, err := t.take(whole); err == nil {
		w.sides(t, s, whole, "simulation at all its rows", full, "")
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
		w.sides(t, c, from, side, got, "")
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
					w.sides(t, c, from, "further reference", got, "")
					w.others[i] = scalarCurve(t, c, got.Value)
				}
			}
		}
	}
}

// taking reads the settings of the question for curves in given units, and
// lists what is missing.
func (w *work) taking(kind *derived.Kind, x, y unit) (*taking, bool) {
	t := &taking{kind: kind, x: x, y: y, length: 1, pressure: 1}
	t.settings = derived.Settings{Words: map[string]string{}, Numbers: map[string]float64{}}
	settings := []DerivedSetting{}
	ok := true
	for i := range kind.Parameters {
		p := &kind.Parameters[i]
		text := cmp.Or(w.q.Derive.Parameters[p.Key], p.Default)
		switch {
		case text == "" && p.Needed:
			w.need(2, true, p.Label, w.q.target("derive."+p.Key), "derive-parameter", p.Label, kind.Name)
			ok = false
		case p.Unit == "":
			t.settings.Words[p.Key] = text
		case text != "":
			v := 0.0
			if _, err := number(&v, text, p.Low, 1e30); err != nil {
				w.need(2, true, p.Label, w.q.target("derive."+p.Key), "field-bad", p.Label, w.q.label(), text)
				ok = false
				continue
			}
			si, symbol := t.toSI(p.Unit, v)
			t.settings.Numbers[p.Key] = si
			text += symbol
		}
		if text != "" {
			settings = append(settings, DerivedSetting{Name: p.Label, Value: text})
		}
	}
	if !kind.Loop && !t.derivedUnit() {
		w.refuseDerived(notice.New("derive-unit", kind.Name, x.symbol, y.symbol), w.q.target("derive.kind"))
		return nil, false
	}
	if kind.Loop {
		ok = w.loopScales(t, &settings) && ok
	}
	w.cell.Derived.Settings = settings
	return t, ok
}

// toSI converts a number of a parameter, and returns its unit to print.
func (t *taking) toSI(symbol string, v float64) (float64, string) {
	switch symbol {
	case "x":
		return t.x.ToSI(v), suffix(t.x.symbol)
	case "y":
		return t.y.ToSI(v), suffix(t.y.symbol)
	}
	u, err := quantity.Parse(symbol)
	if err != nil {
		panic("study: a parameter in " + symbol) // of the table of kinds
	}
	return u.ToSI(v), suffix(symbol)
}

func suffix(symbol string) string {
	if symbol == "" || symbol == "1" {
		return ""
	}
	return " " + symbol
}

func (t *taking) suffix() string { return suffix(t.unit.symbol) }

// derivedUnit settles the unit of the scalar from those of the columns.
func (t *taking) derivedUnit() bool {
	k := t.kind
	switch {
	case k.Velocity:
		// A profile in wall units or of pure numbers has no friction velocity.
		if t.y.Dimension != (quantity.Dimension{1, 0, -1}) || t.x.Dimension != (quantity.Dimension{1}) {
			return false
		}
		t.unit = t.y
	case k.Pure && !t.y.Same(quantity.One):
		return false
	case k.X == 0 && k.Y == 0:
		t.unit = unit{quantity.One, "1"}
	case k.X == 1 && k.Y == 0:
		t.unit = t.x
	case k.X == 0 && k.Difference && t.y.Offset != 0:
		t.unit = unit{quantity.Unit{Symbol: "K", Dimension: t.y.Dimension, Factor: 1}, "K"}
	case k.X == 0:
		t.unit = t.y
	default:
		symbol := power(t.x.symbol, k.X)
		switch {
		case k.Y > 0 && k.X < 0:
			symbol = over(t.y.symbol, power(t.x.symbol, -k.X))
		case k.Y > 0:
			symbol = product(t.y.symbol, symbol)
		}
		u, err := quantity.Parse(symbol)
		if err != nil {
			return false
		}
		t.unit = unit{u, symbol}
	}
	return true
}

func power(symbol string, n int) string {
	if symbol == "" || symbol == "1" || n == 1 {
		return cmp.Or(symbol, "1")
	}
	return "(" + symbol + ")^" + string(rune('0'+n))
}

func product(a, b string) string {
	switch {
	case a == "" || a == "1":
		return b
	case b == "1":
		return a
	}
	return "(" + a + ") (" + b + ")"
}

func over(a, b string) string {
	if b == "1" {
		return cmp.Or(a, "1")
	}
	return "(" + cmp.Or(a, "1") + ")/(" + b + ")"
}

// loopScales takes what makes a loop of pure numbers from the card of the
// case.
func (w *work) loopScales(t *taking, settings *[]DerivedSetting) bool {
	t.unit = unit{quantity.One, "1"}
	length, okX := w.e.scaleOf(axis{unit: t.x.Unit}, w.q.Case, OfData, RefLength)
	pressure, okY := w.e.scaleOf(axis{unit: t.y.Unit}, w.q.Case, OfData, DynamicPressure)
	if !okX || !okY {
		w.refuseDerived(notice.New("loop-references", w.q.label(), w.q.Case), w.q.target("derive.kind"))
		return false
	}
	t.length, t.pressure = length, pressure
	alpha, known := w.e.cardValue(w.q.Case, Angle, OfData)
	if !known && !notice.Has(w.cell.Notices, "loop-angle") {
		w.tell(notice.New("loop-angle", w.q.label()))
	}
	t.settings.Numbers[derived.NumberAngle] = alpha
	*settings = append(*settings, DerivedSetting{Name: "angle of attack α of the case", Value: quantity.Typed(quantity.Round(alpha*180/math.Pi, 10)) + "°"})
	return true
}

// scaled returns a curve as its kind takes it: a loop in pure numbers.
func (t *taking) scaled(c derived.Curve) derived.Curve {
	if !t.kind.Loop {
		return c
	}
	return derived.Curve{X: times(c.X, 1/t.length), Y: times(c.Y, 1/t.pressure), Second: times(c.Second, 1/t.length)}
}

func (t *taking) take(c derived.Curve) (derived.Scalar, error) {
	return t.kind.Take(t.scaled(c), t.settings)
}

// value and step print a scalar and a difference of scalars in their unit.
func (t *taking) value(si float64) Number { return Number(t.unit.FromSI(si)) }
func (t *taking) step(si float64) Number  { return Number(t.unit.StepFromSI(si)) }

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
	y := w.resample(c, reference.X, w.choices.Interpolation)
	at := derived.Curve{X: reference.X, Y: y.S}
	if len(y.Kept) != len(reference.X) {
		return at, false
	}
	if second != nil {
		other := *c
		other.y = second
		at.Second = w.resample(&other, reference.X, w.choices.Interpolation).S
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
func (w *work) sides(t *taking, c *curve, from derived.Curve, side string, got derived.Scalar, of string) {
	line := DerivedSide{Side: side, File: w.e.study.fileName(c.slip), Rows: got.Rows, Value: t.value(got.Value), U: t.step(got.U()), At: Number(t.x.FromSI(got.At * t.length)), AtUnit: t.x.symbol,
		Edge: Number(t.y.FromSI(got.Edge)), EdgeUnit: t.y.symbol, Overshoot: Number(got.Overshoot), Gap: Number(got.Gap), Bound: got.Bound, Effects: []DerivedEffect{}, Places: []DerivedPlace{}}
	for _, e := range got.Effects {
		line.Effects = append(line.Effects, DerivedEffect{Name: e.Name, Change: t.step(e.Change), U: t.step(e.Part())})
	}
	for i, p := range got.Places {
		line.Places = append(line.Places, DerivedPlace{X: Number(t.x.FromSI(p.X)), Rising: p.Rising, U: None, Chosen: i == got.Chosen})
	}
	w.cell.Derived.Sides = append(w.cell.Derived.Sides, line)
}

// remainders are what the effects of the method leave in the difference of the
// two sides: an effect that is the same on both is not in E.
func remainders(s, d derived.Scalar) []part {
	var parts []part
	left := map[string]bool{}
	add := func(name string, change, factor float64) {
		u := factor * math.Abs(change)
		parts = append(parts, part{aside: true, degrees: math.Inf(1), source: uncertainty.Source{U: []float64{u}},
			line: SourceLine{Name: "taking of the scalar: " + name, Of: OfNumerical, Text: "difference of the effect on the two sides, times " + quantity.Text(factor, 3), Pattern: Independent, Origin: "computed"}})
	}
	for _, e := range s.Effects {
		change := e.Change
		for _, other := range d.Effects {
			if other.Name == e.Name {
				change -= other.Change
				left[e.Name] = true
			}
		}
		add(e.Name, change, e.Factor)
	}
	for _, e := range d.Effects {
		if !left[e.Name] {
			add(e.Name, e.Change, e.Factor)
		}
	}
	return parts
}

// ofCurve reports whether an entered source is of the values of the curve.
func (w *work) ofCurve(s *Source) bool {
	if w.cell.Derived == nil || s.OfScalar || s.Input != "" {
		return false
	}
	if s.Of == OfData {
		return w.derivedData
	}
	return w.derivedBoth
}

// propagated carries the sources of the curves to the scalar: of the data
// through the curve of the data, all others through that of the simulation,
// which has no rows where it is a value. First order: sqrt(cᵀVc), with c from
// differences over one standard uncertainty at each row and V the declared
// pattern of the source.
func (w *work) propagated(t *taking, reference, simulation derived.Curve) []part {
	w.derivedData, w.derivedBoth = true, len(simulation.X) > 0
	w.parts = nil
	if !w.reference.scalar() {
		w.dataColumn()
	}
	var halves []interval
	for i := range w.q.Sources {
		if s := &w.q.Sources[i]; w.ofCurve(s) && (s.Model == "" || s.Model == w.model) {
			w.source(i, s)
			if w.bound != nil {
				halves = append(halves, interval{w.bound, s.Of == OfData})
				w.bound = nil
			}
		}
	}
	if w.derivedBoth && !t.kind.Loop {
		w.cardSources()
		w.interpolationPart()
	} else {
		w.cardLost(t.kind.Name)
	}
	parts := w.parts
	w.parts = nil
	slopes := map[bool][]float64{}
	for _, data := range []bool{true, false} {
		from := reference
		if !data {
			from = simulation
		}
		var sources []uncertainty.Source
		for _, p := range parts {
			if (p.line.Of == OfData) == data {
				sources = append(sources, p.sources()...)
			}
		}
		if len(sources) == 0 && len(halves) == 0 || len(from.X) == 0 {
			continue
		}
		u := uncertainty.Combine(len(from.X), sources).Total()
		c, ok := t.slopes(from, u)
		if !ok {
			w.need(2, true, "the uncertainty of "+w.q.label(), w.q.target("derive.kind"), "derive-lost", t.kind.Name)
			continue
		}
		slopes[data] = c
		w.placesU(t, from, u, data)
	}
	w.cell.Derived.Propagation = "first order, by differences over ± one standard uncertainty at each row, with the declared correlation between stations"
	var carried []part
	for _, p := range parts {
		c := slopes[p.line.Of == OfData]
		if c == nil {
			continue
		}
		through := func(sources ...uncertainty.Source) []float64 {
			return []float64{uncertainty.Combine(len(c), sources).Through(c)}
		}
		own := p.own
		if own != nil {
			whole := p.source
			whole.U = own
			own = through(whole)
		}
		p = part{line: p.line, degrees: p.degrees, aside: p.interp, own: own, source: uncertainty.Source{U: through(p.sources()...)}}
		p.line.Text += "; carried through the curve"
		carried = append(carried, p)
		for i := range w.cell.Shared {
			if own != nil && w.cell.Shared[i].Source == p.line.Name {
				w.cell.Shared[i].U, w.cell.Shared[i].Left = t.step(own[0]), t.step(p.source.U[0])
			}
		}
	}
	w.carryIntervals(t, halves, slopes)
	return carried
}

// interval holds the half-widths of a source that is known as an interval.
type interval struct {
	half []float64
	data bool
}

// carryIntervals carries half-widths to the scalar: at most, all act together.
func (w *work) carryIntervals(t *taking, halves []interval, slopes map[bool][]float64) {
	total := 0.0
	for _, h := range halves {
		for i, c := range slopes[h.data] {
			total += float64(math.Abs(c) * h.half[i])
		}
	}
	if len(halves) > 0 {
		w.bound = []float64{total}
		w.cell.Bound = &BoundLine{Half: t.step(total), At: None}
	}
}

// slopes are the changes of the scalar with the value at each row, in SI of
// the columns.
func (t *taking) slopes(c derived.Curve, u []float64) ([]float64, bool) {
	lo, hi := math.Inf(1), math.Inf(-1)
	for _, v := range known(c.Y) {
		lo, hi = min(lo, v), max(hi, v)
	}
	if !(hi > lo) {
		return nil, false
	}
	s, ok := t.kind.Sensitivities(t.scaled(c), t.settings, times(u, 1/t.pressure), (hi-lo)/t.pressure*1e-4)
	return times(s, 1/t.pressure), ok
}

// placesU gives the candidates of the last side taken their uncertainty:
// that of the values there over the slope.
func (w *work) placesU(t *taking, from derived.Curve, u []float64, data bool) {
	name := "simulation at the stations"
	if data {
		name = "reference"
	}
	level := make([]float64, len(from.Y))
	for i, v := range from.Y {
		level[i] = v - t.settings.Numbers[derived.KeyLevel]
	}
	for i := range w.cell.Derived.Sides {
		side := &w.cell.Derived.Sides[i]
		for j := range side.Places {
			if at := t.x.ToSI(float64(side.Places[j].X)); side.Side == name {
				if v, known := w.between(at, u); known {
					side.Places[j].U = Number(t.x.StepFromSI(derived.CrossingU(from.X, level, at, v)))
				}
			}
		}
	}
}

// otherChoices lists the values under the other choices of the kind.
func (w *work) otherChoices(t *taking, reference, simulation *derived.Curve) {
	for _, o := range t.kind.Others {
		other := *t
		other.settings = derived.Settings{Words: map[string]string{}, Numbers: map[string]float64{}}
		same := true
		for k, v := range t.settings.Words {
			other.settings.Words[k] = v
		}
		for k, v := range t.settings.Numbers {
			other.settings.Numbers[k] = v
		}
		for _, p := range t.kind.Parameters {
			text, given := o.Set[p.Key]
			if !given {
				continue
			}
			if p.Unit == "" {
				same = same && t.settings.Words[p.Key] == text
				other.settings.Words[p.Key] = text
				continue
			}
			v := 0.0
			if _, err := number(&v, text, -1e30, 1e30); err == nil {
				v, _ = t.toSI(p.Unit, v)
				same = same && t.settings.Numbers[p.Key] == v
				other.settings.Numbers[p.Key] = v
			}
		}
		if same {
			continue
		}
		s, errS := other.take(*simulation)
		d, errD := other.take(*reference)
		line := DerivedOther{Change: o.Label, Simulation: None, Reference: None, E: None}
		if errS == nil {
			line.Simulation = t.value(s.Value)
		}
		if errD == nil {
			line.Reference = t.value(d.Value)
		}
		if errS == nil && errD == nil {
			line.E = t.step(s.Value - d.Value)
		}
		w.cell.Derived.Others = append(w.cell.Derived.Others, line)
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
	return &curve{slip: &slip, table: c.table, y: []float64{value}, yUnit: axis{unit: t.unit.Unit, known: true, name: c.yUnit.name, symbol: t.unit.symbol}}
}

// becomeScalar lets the cell go on as one of two values.
func (w *work) becomeScalar(t *taking, d, s float64, runs []run) {
	w.reference, w.runs = scalarCurve(t, w.reference, d), runs
	w.xUnit, w.yUnit = unit{Unit: quantity.One}, t.unit
	w.cell.Unit, w.cell.XUnit, w.cell.XName, w.cell.Scalar = t.unit.symbol, "", "", true
	w.cell.StationsAll, w.cell.Outside = 1, []Number{}
	w.rows, w.x, w.d, w.s, w.uInterp = []int{0}, []float64{math.NaN()}, []float64{d}, []float64{s}, []float64{0}
}

// otherDerivations lists the choices of a derived scalar that another careful
// person might have made.
func otherDerivations(d *Derivation) []Derivation {
	if d == nil {
		return nil
	}
	kind, known := derived.Named(d.Kind)
	if !known {
		return nil
	}
	var list []Derivation
	for _, o := range kind.Others {
		other := Derivation{Kind: d.Kind, Parameters: map[string]string{}, label: o.Label}
		for k, v := range d.Parameters {
			other.Parameters[k] = v
		}
		for k, v := range o.Set {
			other.Parameters[k] = v
		}
		list = append(list, other)
	}
	return list
}
