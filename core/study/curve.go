package study

import (
	"math"
	"strconv"
	"strings"

	"weirmark/core/notice"
	"weirmark/core/profile"
	"weirmark/core/quantity"
	"weirmark/core/tablefile"
	"weirmark/core/uncertainty"
)

// curve is what a slip stands for: columns of one table, in SI, in file
// order. Scalars are curves without an abscissa.
type curve struct {
	slip  *Slip
	table tablefile.Table
	x     []float64 // nil for scalars
	y     []float64
	u     []float64 // standard, independent between stations; nil when there is no column
	uPlus []float64 // of the upper side where the bars are two columns; u is then the lower
	uOpen bool      // u is there but its coverage is not known
	along string    // AlongArc or AlongArcPart where x is a length, else empty
	taken bool      // the one value of another curve
	left  int       // rows left out as repeats of a station
	xUnit axis
	yUnit axis

	// What a formula or a form did; see takeForms.
	xTurned, yTurned bool
	parts            []cardPart  // of the case card in y
	inputs           []cardInput // of the case card that were used
	slope            []float64   // of y by the value before the form; nil where there was none
	rawUnit          axis        // of the value before the form
	reduced          *reducing
}

// axis is the unit of a column; known is false where none was given.
type axis struct {
	unit   quantity.Unit
	known  bool
	name   string // of the column, the formula or the form
	symbol string // of the unit, as it is printed
}

func (c *curve) scalar() bool { return c.x == nil }

// fileName is the name of the file behind a slip.
func (s *Study) fileName(slip *Slip) string {
	if f := s.File(slip.File); f != nil {
		return f.Name
	}
	return slip.File
}

// load reads the columns a slip names. Notices say what stopped it; c is nil
// when nothing can be used.
func (e *evaluation) load(slip *Slip) (*curve, []notice.Notice) {
	file, ok := e.files[slip.File]
	if !ok {
		if altered := e.study.File(slip.File); altered != nil {
			return nil, []notice.Notice{notice.New("hash-changed", altered.Name).In(altered.Name)}
		}
		return nil, []notice.Notice{notice.New("file-unknown", slip.File, slip.ID)}
	}
	table, err := file.Table(slip.Table)
	if err != nil {
		return nil, []notice.Notice{asNotice(err)}
	}
	l := loader{e: e, slip: slip, table: table, file: file.Name}
	if slip.Rows.Column.Given() && !l.selectRows() {
		return nil, l.notices
	}
	table = l.table
	c := &curve{slip: slip, table: table}
	if slip.X.Given() {
		c.x, c.xUnit = l.column(slip.X)
		c.take(l.last, nil)
	}
	l.last = nil
	if !l.knownForces(slip.Force) {
		return nil, l.notices
	}
	values := slip.values()
	c.y, c.yUnit = l.column(values)
	if l.last != nil {
		c.take(l.last, l.last.parts)
		c.reduced = l.last
	}
	c.xTurned, c.yTurned = slip.X.Formula.Given(), values.Formula.Given()
	if slip.U.Column.Given() {
		l.uncertainty(c)
	}
	if notice.Any(l.notices, notice.Stop) {
		return nil, l.notices
	}
	if slip.Branch.Given() && c.x != nil {
		l.takeBranch(c)
	}
	if slip.Abscissa.Given() && c.x != nil && slip.Derive.Value == "" {
		l.takeLength(c)
	}
	if slip.Repeats.Given() && c.x != nil {
		l.mergeRepeats(c)
	}
	if notice.Any(l.notices, notice.Stop) {
		return nil, l.notices
	}
	if slip.Derive.Value == "" {
		l.turnAxis(c)
		l.takeForms(c)
		if notice.Any(l.notices, notice.Stop) {
			return nil, l.notices
		}
	}
	if slip.Derive.Value == DeriveLift {
		scalar, more := e.deriveLoop(c)
		return scalar, append(l.notices, more...)
	}
	return c, l.notices
}

// asNotice returns the notice that an error of tablefile is.
func asNotice(err error) notice.Notice {
	if n, ok := err.(notice.Notice); ok {
		return n
	}
	return notice.New("study-error", err.Error())
}

// takeBranch keeps the rows of one branch; the others become gaps at the ends,
// so that rows keep their lines.
func (l *loader) takeBranch(c *curve) {
	var height []float64
	if c.slip.Contour.Column.Given() {
		height, _ = l.column(c.slip.Contour)
	}
	branches, err := profile.Branches(c.x, height)
	if err != nil {
		l.tell(notice.New("branch-none", l.file, err.Error()))
		return
	}
	for _, b := range branches {
		if b.Name != c.slip.Branch.Value {
			continue
		}
		x, y := blank(len(c.x)), blank(len(c.y))
		for _, r := range b.Rows {
			x[r], y[r] = c.x[r], c.y[r]
		}
		c.x, c.y = x, y
		l.tell(notice.New("branch-taken", l.file, b.Name, len(b.Rows), len(c.table.Columns[0].Values), branchSide(c)))
		return
	}
	l.tell(notice.New("branch-name", c.slip.Branch.Value, l.file, branches[0].Name, branches[1].Name))
}

// branchSide says by what the branches were named.
func branchSide(c *curve) string {
	if c.slip.Contour.Column.Given() {
		return "by " + c.slip.Contour.Column.Value
	}
	return "by their order in the file"
}

// blank returns n missing values.
func blank(n int) []float64 {
	out := make([]float64, n)
	for i := range out {
		out[i] = math.NaN()
	}
	return out
}

// take keeps what a formula took from the case card, and what that does to y.
func (c *curve) take(r *reducing, parts []cardPart) {
	if r != nil {
		c.inputs, c.parts = append(c.inputs, r.binding.inputs...), addParts(c.parts, parts)
	}
}

type loader struct {
	e       *evaluation
	slip    *Slip
	last    *reducing // of the column that was made by a formula last
	table   tablefile.Table
	file    string
	notices []notice.Notice
}

func (l *loader) tell(n notice.Notice) { l.notices = append(l.notices, n.In(l.file)) }

// column returns a column in SI. A unit that is not given, or not known,
// leaves the values as written.
func (l *loader) column(use ColumnUse) ([]float64, axis) {
	if use.Formula.Given() {
		return l.formula(use)
	}
	column, err := l.table.Column(use.Column.Value)
	if err != nil {
		l.tell(asNotice(err))
		return nil, axis{}
	}
	if !anyKnown(column.Values) {
		l.tell(notice.New("column-empty", column.Name))
		return nil, axis{}
	}
	symbol := use.Unit.Value
	if symbol == "" {
		return column.Values, axis{unit: quantity.One, name: column.Name}
	}
	unit, err := quantity.Parse(symbol)
	if err != nil {
		l.tell(unknownUnit(symbol, column.Name))
		return column.Values, axis{unit: quantity.One, name: column.Name, symbol: symbol}
	}
	return inSI(column.Values, unit), axis{unit, true, column.Name, symbol}
}

// unknownUnit says why a unit is not used. A level has no unit until it is said
// of what and against which reference.
func unknownUnit(symbol, column string) notice.Notice {
	if strings.HasPrefix(strings.ToLower(symbol), "db") {
		return notice.New("unit-level", symbol, column)
	}
	return notice.New("unit-unknown", symbol, column)
}

// inSI converts values; those of units that are SI already are not copied.
func inSI(values []float64, unit quantity.Unit) []float64 {
	if unit.Factor == 1 && unit.Offset == 0 {
		return values
	}
	out := make([]float64, len(values))
	for i, v := range values {
		out[i] = unit.ToSI(v)
	}
	return out
}

// uncertainty reads the uncertainty column, and that of the upper side where
// there is one: half-widths in the unit of the quantity, or percent of the
// reading where their unit is % and the quantity's is not; or limits.
func (l *loader) uncertainty(c *curve) {
	k, known := uncertainty.CoverageFactor(c.slip.UFactor.Value)
	if !known {
		k, c.uOpen = 1, true
	}
	if c.u = l.bars(c, c.slip.U, k, -1); c.u == nil || !c.slip.Upper.Column.Given() {
		return
	}
	c.uPlus = l.bars(c, c.slip.Upper, k, 1)
}

// bars reads one side of the bars, above the values (1) or below (-1), as
// standard uncertainties; nil where it is refused.
func (l *loader) bars(c *curve, use ColumnUse, k, side float64) []float64 {
	slip := c.slip
	column, err := l.table.Column(use.Column.Value)
	if err != nil {
		l.tell(asNotice(err))
		return nil
	}
	step, percent := c.yUnit.unit, false
	if symbol := use.Unit.Value; symbol != "" && symbol != slip.Y.Unit.Value {
		unit, err := quantity.Parse(symbol)
		switch {
		case err != nil:
			l.tell(unknownUnit(symbol, column.Name))
		case symbol == "%":
			percent = true
		case !unit.Same(c.yUnit.unit):
			l.tell(notice.New("unit-dimension", slip.Y.Name(), slip.Y.Unit.Value, column.Name, symbol))
			return nil
		default:
			step = unit
		}
	}
	if slip.BarsAs.Value == BarsLimits {
		return l.limits(c, column, inSI(column.Values, step), k, side)
	}
	fullScale, _ := strconv.ParseFloat(slip.UBasis.Value, 64) // a word is no full scale
	if percent && !(fullScale > 0) && c.yUnit.unit.ByConvention() {
		l.tell(percentOfConvention("column "+column.Name, c.yUnit.symbol))
		return nil
	}
	all := make([]float64, len(column.Values))
	zeros := 0
	for i, v := range column.Values {
		if v < 0 {
			l.tell(notice.New("u-negative", quantity.Typed(v), place(c, i)).At(l.table.RowLine(i)))
			return nil
		}
		if v == 0 {
			zeros++
		}
		u := step.StepToSI(v)
		switch {
		case percent && fullScale > 0:
			u = c.yUnit.unit.StepToSI(fullScale) * v / 100
		case percent:
			u = math.Abs(c.y[i]) * v / 100
		}
		all[i] = u / k
	}
	if zeros > 0 {
		l.tell(notice.New("u-zero", zeros))
	}
	return all
}

// percentOfConvention refuses percentages of values whose zero is a convention.
func percentOfConvention(what, symbol string) notice.Notice {
	return notice.New("percent-zero", capital(what), symbol, "Δ"+strings.TrimPrefix(symbol, "Δ"))
}

// limits turns limits, in SI, into half-widths; those on the wrong side of
// their value are refused.
func (l *loader) limits(c *curve, column tablefile.Column, values []float64, k, side float64) []float64 {
	all := make([]float64, len(values))
	wrong, first := 0, 0
	for i, v := range values {
		all[i] = side * (v - c.y[i]) / k
		if all[i] < 0 {
			if wrong == 0 {
				first = i
			}
			wrong++
		}
	}
	if wrong > 0 {
		words := map[float64]string{-1: "above", 1: "below"}
		l.tell(notice.New("limits-crossed", column.Name, words[side], wrong, place(c, first)).At(l.table.RowLine(first)))
		return nil
	}
	return all
}

// place names row i of a curve for a reader.
func place(c *curve, i int) string {
	if c.scalar() {
		return "row " + strconv.Itoa(i+1)
	}
	return c.xUnit.name + " = " + strconv.FormatFloat(c.xUnit.unit.FromSI(c.x[i]), 'g', 6, 64)
}

func anyKnown(values []float64) bool {
	for _, v := range values {
		if !math.IsNaN(v) {
			return true
		}
	}
	return len(values) == 0
}

// sameAxis settles the units of two columns that are to be compared. Where
// one side states no unit it is read in the other's, which is an open point;
// the error notice says that the two cannot be compared.
func sameAxis(a, b axis, aName, bName string) (quantity.Unit, *notice.Notice) {
	switch {
	case !a.known && !b.known:
		return quantity.One, nil
	case !a.known:
		return b.unit, nil
	case !b.known:
		return a.unit, nil
	case a.unit.StepAgainst(b.unit):
		if b.unit.Step {
			a, b, aName, bName = b, a, bName, aName
		}
		n := notice.New("temperature-step", aName, a.unit.Symbol, bName, b.unit.Symbol)
		return quantity.One, &n
	case a.unit.Same(b.unit):
		return a.unit, nil
	}
	code := "unit-dimension"
	if a.unit.KinematicOf(b.unit) || b.unit.KinematicOf(a.unit) {
		code = "density-needed"
		if b.unit.KinematicOf(a.unit) {
			a, b, aName, bName = b, a, bName, aName
		}
		n := notice.New(code, aName, a.unit.Symbol, bName, b.unit.Symbol)
		return quantity.One, &n
	}
	n := notice.New(code, aName, a.unit.Symbol, bName, b.unit.Symbol)
	return quantity.One, &n
}
