package study

import (
	"math"

	"weirmark/core/notice"
	"weirmark/core/quantity"
	"weirmark/core/station"
	"weirmark/core/uncertainty"
)

// Written is a value as a file states it.
type Written = quantity.Written

// unit is the unit of an axis of the cell; symbol is "" where neither side
// states one.
type unit struct {
	quantity.Unit
	symbol string
}

// finest returns the simulation that is compared, or nil.
func (w *work) finest() *curve {
	if len(w.runs) > 0 {
		return w.runs[0].curve
	}
	return w.grids
}

// settleUnits decides the units of the cell and reports whether the two sides
// can be compared.
func (w *work) settleUnits() bool {
	s, d := w.finest(), w.reference
	lead := d
	if lead == nil {
		lead = s
	}
	if lead == nil {
		return false
	}
	w.yUnit, w.xUnit = axisUnit(lead.yUnit), axisUnit(lead.xUnit)
	w.cell.Unit, w.cell.XUnit = w.yUnit.symbol, w.xUnit.symbol
	w.cell.XName, w.cell.Scalar = lead.xUnit.name, lead.scalar()
	if w.cell.Scalar {
		w.cell.Choices.Gap = 0 // no choice of one value
	}
	if s == nil || d == nil {
		return s != nil // a grid study can be shown without data
	}
	if s.scalar() != d.scalar() {
		n := notice.New("scalar-curve", shape(s), shape(d))
		w.tell(n)
		w.stop(2, "a common form of both sides", slipTarget(s.slip, "x.column"), n)
		return false
	}
	if w.doubtWallUnits(s, d) || w.mixedAbscissae(s, d) {
		return false
	}
	w.byDensity(s, d)
	ok := w.sameUnits(s.yUnit, d.yUnit, &w.yUnit, "y.unit")
	if !s.scalar() {
		ok = w.sameUnits(s.xUnit, d.xUnit, &w.xUnit, "x.unit") && ok
	}
	w.cell.Unit, w.cell.XUnit = w.yUnit.symbol, w.xUnit.symbol
	return ok
}

func shape(c *curve) string {
	if c.scalar() {
		return "one value"
	}
	return "a curve"
}

func axisUnit(a axis) unit {
	if !a.known {
		return unit{quantity.One, a.symbol}
	}
	return unit{a.unit, a.symbol}
}

// sameUnits settles one axis. Where one side states no unit the other's is
// taken for both, which the open point of the missing unit says.
func (w *work) sameUnits(s, d axis, u *unit, field string) bool {
	both, refusal := sameAxis(d, s, d.name, s.name)
	if refusal != nil {
		w.tell(*refusal)
		w.stop(2, "a common unit of "+w.q.Quantity, slipTarget(w.finest().slip, field), *refusal)
		return false
	}
	if !d.known && s.known {
		*u = unit{both, s.symbol}
	}
	return true
}

// inUnit returns the values of one side in SI, reading values without a
// stated unit in the unit of the cell.
func inUnit(values []float64, have axis, u unit) []float64 {
	if have.known {
		return values
	}
	return inSI(values, u.Unit)
}

// commonStations resamples the finest simulation at the stations of the
// reference.
func (w *work) commonStations() {
	if w.reference == nil {
		return
	}
	if w.reference.scalar() {
		w.commonScalar()
		return
	}
	r := w.reference
	rx, ry := inUnit(r.x, r.xUnit, w.xUnit), inUnit(r.y, r.yUnit, w.yUnit)
	at, rows := make([]float64, 0, len(rx)), make([]int, 0, len(rx))
	missing := 0
	for i, x := range rx {
		switch {
		case math.IsNaN(x) || math.IsNaN(ry[i]):
			missing++
			if !math.IsNaN(x) {
				w.skipped = append(w.skipped, x)
			}
		case w.without != nil && w.holds(*w.without, x, ry[i]):
		case !w.excluded(i, x, ry[i]):
			at, rows = append(at, x), append(rows, i)
		default:
			w.skipped = append(w.skipped, x)
		}
	}
	missing -= r.left
	if missing > 0 {
		w.tell(notice.New("station-missing", missing))
	}
	w.cell.StationsAll = len(at) + len(w.cell.Excluded)
	w.tellExcluded()
	got := w.resampleFinest(at)
	for _, n := range got.Notices {
		w.tell(n)
	}
	for _, i := range got.Outside {
		w.cell.Outside = append(w.cell.Outside, Number(w.xUnit.FromSI(at[i])))
	}
	n := len(got.Kept)
	w.rows, w.x, w.d = make([]int, n), make([]float64, n), make([]float64, n)
	for j, i := range got.Kept {
		w.rows[j], w.x[j], w.d[j] = rows[i], at[i], ry[rows[i]]
	}
	w.s, w.uInterp, w.linePart = got.S, got.UInterp, got.Part
	for _, list := range [][]int{got.Outside, got.Gap, got.Jump} {
		for _, i := range list {
			w.skipped = append(w.skipped, at[i])
		}
	}
	if n == 0 {
		w.need(2, true, "a common station", slipTarget(w.finest().slip, "x.unit"), "station-common", w.q.label())
	}
}

// excluded lists a row of the reference that a person took out, and reports
// whether it is one.
func (w *work) excluded(row int, x, d float64) bool {
	if len(w.q.Excluded) == 0 || w.withExcluded {
		return false
	}
	line := w.reference.table.RowLine(row)
	for _, e := range w.q.Excluded {
		if e.Line == line {
			out := Excluded{X: Written(w.xUnit.FromSI(x)), D: Written(w.yUnit.FromSI(d)), Line: line, Why: e.Why, Late: e.Late}
			out.X, out.D = w.written(row, out.X, out.D)
			w.cell.Excluded = append(w.cell.Excluded, out)
			return true
		}
	}
	return false
}

func (w *work) tellExcluded() {
	late := 0
	for _, e := range w.cell.Excluded {
		if e.Late {
			late++
		}
	}
	if n := len(w.cell.Excluded); n > 0 {
		w.tell(notice.New("station-excluded", n, w.cell.StationsAll))
		if late > 0 {
			w.need(2, false, "a station plan made before results were seen", w.q.target("excluded"), "station-excluded-late", late)
		}
	}
}

// resampleFinest answers stations, in SI, from the simulation that is
// compared, with its declared support points.
func (w *work) resampleFinest(at []float64) station.Resampled {
	c := w.finest()
	x, y := w.anchored(inUnit(c.x, c.xUnit, w.xUnit), inUnit(c.y, c.yUnit, w.yUnit))
	return station.Resample(w.e.study.fileName(c.slip), c.xUnit.name, x, y, at, w.policy())
}

// resample answers stations, in SI, from any simulation, as it stands.
func (w *work) resample(c *curve, at []float64) station.Resampled {
	x, y := inUnit(c.x, c.xUnit, w.xUnit), inUnit(c.y, c.yUnit, w.yUnit)
	return station.Resample(w.e.study.fileName(c.slip), c.xUnit.name, x, y, at, w.policy())
}

// policy is how simulations are brought to the stations, in SI.
func (w *work) policy() station.Options {
	h := w.choices
	return station.Options{Method: h.Interpolation, Show: w.place, Gap: h.Gap, Period: w.xUnit.StepToSI(h.Period), Width: w.xUnit.StepToSI(h.Probe)}
}

// place prints a place on the axis of stations, in the unit of the cell.
func (w *work) place(si float64) string {
	text := quantity.Plain(w.xUnit.FromSI(si), 6)
	if u := w.xUnit.symbol; u != "" && u != "1" {
		text += " " + u
	}
	return text
}

// commonScalar compares one value with one value. Several rows of the
// reference are repeated readings, whose mean is compared.
func (w *work) commonScalar() {
	readings := known(inUnit(w.reference.y, w.reference.yUnit, w.yUnit))
	w.cell.StationsAll = 1
	s, ok := w.scalarOf(w.finest())
	if len(readings) == 0 || !ok {
		return
	}
	mean, _, _ := uncertainty.Replicates(readings)
	w.rows, w.x, w.d, w.s = []int{0}, []float64{math.NaN()}, []float64{mean}, []float64{s}
	w.uInterp = []float64{0}
}

// scalarOf returns the one value of a simulation, in SI: of the finest grid
// where it is a table over grids.
func (w *work) scalarOf(c *curve) (float64, bool) {
	values := inUnit(c.y, c.yUnit, w.yUnit)
	if c == w.grids && len(w.runs) == 0 {
		best := w.scalarRow(c)
		if best < 0 {
			return 0, false
		}
		return values[best], true
	}
	all := known(values)
	if len(all) != 1 {
		n := notice.New("scalar-rows", w.e.study.fileName(c.slip), len(all))
		w.tell(n)
		w.stop(2, "one value of the simulation", slipTarget(c.slip, "x.column"), n)
		return 0, false
	}
	return all[0], true
}

// scalarRow is the row of the one value of a simulation: of the finest grid
// where it is a table over grids, else the first that is a number; -1 where
// there is none.
func (w *work) scalarRow(c *curve) int {
	best := -1
	for i, v := range c.y {
		switch {
		case math.IsNaN(v):
		case c != w.grids || len(w.runs) > 0:
			return i
		case !math.IsNaN(w.sizes[i]) && (best < 0 || w.sizes[i] > w.sizes[best]):
			best = i
		}
	}
	return best
}

// known returns the values that are numbers.
func known(values []float64) []float64 {
	all := make([]float64, 0, len(values))
	for _, v := range values {
		if !math.IsNaN(v) {
			all = append(all, v)
		}
	}
	return all
}
