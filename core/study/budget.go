package study

import (
	"cmp"
	"math"
	"slices"
	"strconv"

	"weirmark/core/derived"
	"weirmark/core/notice"
	"weirmark/core/quantity"
	"weirmark/core/station"
	"weirmark/core/tablefile"
	"weirmark/core/uncertainty"
)

// part is the standard uncertainty of one source at the stations, in SI.
type part struct {
	line     SourceLine
	source   uncertainty.Source
	degrees  float64   // of freedom; +Inf where u is taken as known
	interp   bool      // of the interpolation to the stations
	aside    bool      // does not by itself make a numerical uncertainty
	plain    []float64 // standard uncertainty as stated, where sums of u_num raised it
	grid     bool      // from the grid study
	readings int       // behind a mean whose scatter it is; 0: none

	own     []float64            // of a source of the data that acts on both sides: its uncertainty there; source is what is left in E
	members []uncertainty.Source // of sampled runs: the sources whose sum source.U is
	sides   []uncertainty.TwoPiece
	form    uncertainty.Distribution // of a scalar, for sampling; empty: normal

	made   made
	number int // of the entry it was made from
}

// sources returns what the part adds to the covariance of E.
func (p *part) sources() []uncertainty.Source {
	if p.members != nil {
		return p.members
	}
	return []uncertainty.Source{p.source}
}

// ofSide is the standard uncertainty of the part on its own side.
func (p *part) ofSide() uncertainty.Source {
	if p.own != nil {
		return uncertainty.Source{U: p.own}
	}
	return p.source
}

// made says what a part was made from, to walk back from it.
type made int

const (
	madeOtherwise  made = iota
	madeOfColumn        // the uncertainty column of the data
	madeOfReadings      // the scatter of repeated readings
	madeOfEntry         // a source of the question
	madeOfGrids
	madeOfMonitor
	madeOfCondition
)

// budget collects the sources of the cell at its stations.
func (w *work) budget() {
	if len(w.x) == 0 {
		w.missingParts()
		return
	}
	w.findInputRuns()
	w.dataColumn()
	w.replicates()
	w.repeated()
	w.digitised()
	for i := range w.q.Sources {
		s := &w.q.Sources[i]
		if (s.Model == "" || s.Model == w.model) && !w.ofCurve(s) {
			w.source(i, s)
		}
	}
	w.members()
	w.overlaps()
	w.resolved()
	w.cardSources()
	w.gridPart()
	w.interpolationPart()
	w.missingParts()
	w.total()
	w.reduction()
}

// add appends a source that is independent between stations, or common.
func (w *work) add(of, name, text, origin string, u []float64, common, open bool) *part {
	return w.addSource(of, name, text, origin, uncertainty.Source{U: u, Common: common}, open)
}

// addSource appends a source of any pattern.
func (w *work) addSource(of, name, text, origin string, source uncertainty.Source, open bool) *part {
	w.parts = append(w.parts, part{line: SourceLine{Name: name, Of: of, Text: text, Pattern: patternOf(source), Origin: origin, Open: open}, source: source, degrees: math.Inf(1)})
	return &w.parts[len(w.parts)-1]
}

// patternOf names the pattern of a source.
func patternOf(s uncertainty.Source) string {
	switch {
	case s.Common:
		return Common
	case s.Group != nil:
		return Grouped
	case s.Length > 0:
		return Length
	}
	return Independent
}

// dataColumn takes the uncertainty column of the reference.
func (w *work) dataColumn() {
	c := w.reference
	if c.u == nil || c.scalar() {
		return
	}
	u := pick(c.u, w.rows)
	w.blanks(u, "the uncertainty of the data", slipTarget(c.slip, "u.column"))
	if c.uOpen && c.slip.UFactor.Given() {
		w.need(2, true, "the coverage of u_D", slipTarget(c.slip, "u_factor"), "u-coverage", c.slip.U.Column.Value)
	}
	p := w.add(OfData, "column "+c.slip.U.Column.Value, "at each station, "+coverageWords(c.slip.UFactor.Value), "stated in "+w.e.study.fileName(c.slip), u, false, c.uOpen)
	if c.uPlus == nil {
		p.made = madeOfColumn
	} else {
		w.twoSided(p, u, pick(c.uPlus, w.rows))
	}
}

// replicates takes the scatter of repeated readings of a scalar.
func (w *work) replicates() {
	c := w.reference
	if !c.scalar() {
		return
	}
	readings := known(inUnit(c.y, c.yUnit, w.yUnit))
	if len(readings) < 2 {
		if row := slices.IndexFunc(c.y, func(v float64) bool { return !math.IsNaN(v) }); row >= 0 && row < len(c.u) {
			p := w.add(OfData, "column "+c.slip.U.Column.Value, coverageWords(c.slip.UFactor.Value), "stated in "+w.e.study.fileName(c.slip), c.u[row:row+1:row+1], false, c.uOpen)
			if c.uPlus == nil {
				p.made = madeOfColumn
			} else {
				w.twoSided(p, []float64{c.u[row]}, []float64{c.uPlus[row]})
			}
		}
		return
	}
	if u := known(c.u); len(u) > 0 {
		w.ofReadings(c, rms(u), len(u))
	}
	if w.leveled(c, inUnit(c.y, c.yUnit, w.yUnit)) {
		return
	}
	_, s, u := uncertainty.Replicates(readings)
	text := "standard deviation " + quantity.Text(float64(w.step(s)), 3) + " of " + quantity.Counted(len(readings), "reading") + ", divided by √" + strconv.Itoa(len(readings))
	p := w.add(OfData, "scatter of repeated readings", text, "computed from "+w.e.study.fileName(c.slip), []float64{u}, false, false)
	p.degrees, p.readings = float64(len(readings)-1), len(readings)
	p.made = madeOfReadings
	w.fewReadings(len(readings))
}

// ofReadings takes what is stated of each of several readings. It is not divided
// by their number: what one instrument does to all of them does not average out.
func (w *work) ofReadings(c *curve, u float64, n int) {
	if c.uPlus != nil {
		u = max(u, rms(known(c.uPlus)))
	}
	text := coverageWords(c.slip.UFactor.Value) + ", root mean square over " + quantity.Counted(n, "reading") + ", not divided by their number"
	w.add(OfData, "column "+c.slip.U.Column.Value, text, "stated in "+w.e.study.fileName(c.slip), []float64{u}, false, c.uOpen)
}

// fewReadings tells the factor that so few readings need.
func (w *work) fewReadings(n int) {
	if k, ok := uncertainty.StudentFactor(0.95, float64(n-1)); ok && n <= 3 {
		w.tell(notice.New("readings-few", n, quantity.Text(k, 3), quantity.Typed(w.choices.K)))
	}
}

// source takes one entered line of the budget.
func (w *work) source(at int, s *Source) {
	target := Target{Kind: "source", ID: w.q.id(), Field: strconv.Itoa(at)}
	if s.Unknown {
		w.unknown = append(w.unknown, s.Of)
		w.need(2, true, "the size of "+s.Name, Target{Kind: "source", ID: w.q.id(), Field: target.Field + ".value"}, "u-unknown", s.Name)
		return
	}
	k, knownCoverage := w.divisor(s, target)
	if s.Value < 0 {
		n := notice.New("u-negative", quantity.Text(s.Value, 6), s.Name)
		w.tell(n)
		w.stop(2, "a valid "+s.Name, target, n)
		return
	}
	var source uncertainty.Source
	var ok bool
	if s.Input != "" {
		source, ok = w.inputSource(s, k, target)
	} else {
		source, ok = w.entered(s, k, target)
	}
	if !ok {
		return
	}
	if s.Form == Interval {
		w.apart(s, source.U)
		return
	}
	if s.Of == OfNumerical {
		w.tell(notice.New("grid-declared", w.q.label(), cmp.Or(s.Origin, "no reason was given.")))
		if w.choices.NumShared {
			source = uncertainty.Source{U: source.U, Common: true}
		}
	}
	p := w.addSource(s.Of, s.Name, w.sourceText(s), s.Origin, source, !knownCoverage || s.Coverage.Open())
	p.form = uncertainty.Distribution(s.Form)
	if s.Input == "" && s.Upper == nil {
		p.made, p.number = madeOfEntry, at
	}
	if s.Degrees > 0 {
		p.degrees = s.Degrees
	}
	if s.Upper != nil && s.Column == "" {
		w.asymmetric(p, s, k, target)
	}
	if s.Shared && s.Of == OfData {
		w.share(p, s, k)
	}
}

// divisor returns what the half-width of a source is divided by, and asks
// where that is not known. Limits of an interval are not divided.
func (w *work) divisor(s *Source, target Target) (k float64, known bool) {
	if s.Form == Interval {
		return 1, true
	}
	coverage := Target{Kind: "source", ID: w.q.id(), Field: target.Field + ".coverage"}
	k, known = uncertainty.Divisor(s.Coverage.Value, uncertainty.Distribution(s.Form), s.Degrees)
	switch _, plain := uncertainty.CoverageFactor(s.Coverage.Value); {
	case !known && plain:
		w.need(2, true, "the coverage of "+s.Name, coverage, "u-form", s.Coverage.Value, s.Name, s.Form)
		k = 1
	case !known:
		w.need(2, true, "the coverage of "+s.Name, coverage, "u-coverage", s.Name)
		k = 1
	case s.Coverage.Open():
		w.need(2, true, "acceptance of the coverage of "+s.Name, coverage, "guess-open", "The coverage", s.Name, s.Coverage.Value)
	}
	return k, known
}

// entered returns a source that is stated as an uncertainty of the quantity.
func (w *work) entered(s *Source, k float64, target Target) (uncertainty.Source, bool) {
	u, ok := w.sourceValues(s, k, target)
	if !ok {
		return uncertainty.Source{}, false
	}
	w.blanks(u, s.Name, target)
	w.zeros(u, s.Name, target)
	return w.patterned(s, u, target)
}

// patterned gives a source its correlation between stations.
func (w *work) patterned(s *Source, u []float64, target Target) (uncertainty.Source, bool) {
	switch s.Pattern {
	case Common:
		switch s.Basis {
		case OfReading: // one unknown factor acts on all readings, with their signs
			u = signedLike(u, w.d)
		case OfPosition: // one unknown shift acts by the slope, with its sign
			u = signedLike(u, w.slopes())
		}
		return uncertainty.Source{U: u, Common: true}, true
	case Grouped:
		if w.reference == nil || w.reference.scalar() {
			return uncertainty.Source{U: u}, true
		}
		column, err := w.reference.table.Column(s.Group)
		if err != nil {
			n := asNotice(err)
			w.tell(n)
			w.stop(2, "the groups of "+s.Name, target, n)
			return uncertainty.Source{}, false
		}
		labels := make([]int, len(w.rows))
		for j, i := range w.rows {
			labels[j] = int(column.Values[i])
		}
		return uncertainty.Source{U: u, Group: labels}, true
	case Length:
		if !(s.Length > 0) {
			w.need(2, true, "the correlation length of "+s.Name, target, "field-missing", "The correlation length", s.Name)
			return uncertainty.Source{U: u}, true
		}
		return uncertainty.Source{U: u, X: w.x, Length: w.xUnit.StepToSI(s.Length)}, true
	}
	return uncertainty.Source{U: u}, true
}

// signedLike returns u with the signs of values.
func signedLike(u, values []float64) []float64 {
	signed := make([]float64, len(u))
	for i, v := range u {
		signed[i] = math.Copysign(v, values[i])
	}
	return signed
}

// slopes returns the slope of the data at the stations, by the rows of the
// reference that are not excluded; NaN where there are too few.
func (w *work) slopes() []float64 {
	out := uncertainty.Constant(len(w.x), math.NaN())
	if w.cell.Scalar {
		return out
	}
	c := w.reference
	x, y := ascending(bothKnown(inUnit(c.x, c.xUnit, w.xUnit), w.withoutExcluded(c, inUnit(c.y, c.yUnit, w.yUnit))))
	all := derived.Slopes(x, y)
	for i, at := range w.x {
		if k, found := slices.BinarySearch(x, at); found && all != nil {
			out[i] = all[k]
		}
	}
	return out
}

// bothKnown returns the pairs whose numbers are both there.
func bothKnown(x, y []float64) (px, py []float64) {
	for i := range x {
		if !math.IsNaN(x[i]) && !math.IsNaN(y[i]) {
			px, py = append(px, x[i]), append(py, y[i])
		}
	}
	return px, py
}

// zeros asks about uncertainties of exactly zero.
func (w *work) zeros(u []float64, name string, target Target) {
	n := 0
	for _, v := range u {
		if v == 0 {
			n++
		}
	}
	if n > 0 {
		w.need(2, false, "whether "+name+" is zero by definition", target, "u-zero", n)
	}
}

// blanks asks for the stations at which a source has no value.
func (w *work) blanks(u []float64, name string, target Target) {
	n := len(u) - len(known(u))
	if n > 0 {
		w.need(2, false, name+" at "+quantity.Counted(n, "station"), target, "u-blank", n)
	}
}

// sourceValues returns the standard uncertainty of an entered source.
func (w *work) sourceValues(s *Source, k float64, target Target) ([]float64, bool) {
	switch {
	case s.Column != "":
		u, err := w.sourceColumn(s)
		if err != nil {
			n := asNotice(err)
			w.tell(n)
			w.stop(2, "a valid "+s.Name, target, n)
			return nil, false
		}
		return uncertainty.Scaled(u, k), true
	case s.Basis == OfReading && w.yUnit.ByConvention():
		n := percentOfConvention(s.Name, w.yUnit.symbol)
		w.tell(n)
		w.stop(2, "the size of "+s.Name+" in the unit of the data", target, n)
		return nil, false
	case s.Basis == OfReading:
		return uncertainty.Scaled(uncertainty.OfReading(w.d, s.Value/100), k), true
	case s.Basis == OfPosition:
		slopes := w.slopes()
		for i, v := range slopes {
			slopes[i] = math.Abs(v) * w.xUnit.StepToSI(s.Value)
		}
		return uncertainty.Scaled(slopes, k), true
	case s.Basis == OfFullScale:
		if !(s.FullScale > 0) {
			w.need(2, true, "the full scale of "+s.Name, target, "field-missing", "The full scale", s.Name)
		}
		return uncertainty.Scaled(uncertainty.OfFullScale(len(w.d), s.Value/100, w.yUnit.StepToSI(s.FullScale)), k), true
	case s.Basis == OfCounts:
		if !(s.PerCount > 0) {
			w.need(2, true, "the size of one count of "+s.Name, target, "field-missing", "The size of one count", s.Name)
		}
		return uncertainty.Scaled(uncertainty.OfCounts(len(w.d), s.Value, w.yUnit.StepToSI(s.PerCount)), k), true
	}
	return uncertainty.Constant(len(w.d), w.yUnit.StepToSI(s.Value)/k), true
}

// sourceColumn returns a column of half-widths at the stations: of the
// simulation, resampled, for numerical sources and inputs that name one there,
// else of the reference.
func (w *work) sourceColumn(s *Source) ([]float64, error) {
	if run := w.finest(); s.Of != OfData && run != nil {
		if column, err := run.table.Column(s.Column); err == nil {
			if s.Of == OfNumerical {
				w.tell(notice.New("u-num-column", column.Name, "simulation"))
			}
			values, err := w.columnValues(s, run, column, all(len(column.Values)))
			if err != nil {
				return nil, err
			}
			if run.scalar() {
				return []float64{values[max(w.scalarRow(run), 0)]}, nil
			}
			x := inUnit(run.x, run.xUnit, w.xUnit)
			got := station.Resample(w.e.study.fileName(run.slip), run.xUnit.name, x, values, w.x, w.policy())
			u := uncertainty.Constant(len(w.x), math.NaN())
			for j, i := range got.Kept {
				u[i] = got.S[j]
			}
			return u, nil
		}
	}
	column, err := w.reference.table.Column(s.Column)
	if err != nil {
		return nil, err
	}
	u, err := w.columnValues(s, w.reference, column, w.rows)
	if err != nil {
		return nil, err
	}
	for j, v := range u {
		if v < 0 {
			return nil, notice.New("u-negative", quantity.Text(v, 6), place(w.reference, w.rows[j])).In(w.e.study.fileName(w.reference.slip)).At(w.reference.table.RowLine(w.rows[j]))
		}
	}
	return u, nil
}

// columnValues returns a column of half-widths of a side at some of its rows, in
// SI: in the unit that the column states, else in that of the values as they
// were read; or in percent of the values.
func (w *work) columnValues(s *Source, c *curve, column tablefile.Column, rows []int) ([]float64, error) {
	raw := w.rawUnit(c)
	percent := s.Basis == OfReading
	if stated, err := quantity.Parse(column.Unit); column.Unit != "" && err == nil {
		switch {
		case stated.Same(raw.Unit) && column.Unit != "%":
			raw.Unit = stated
		case column.Unit == "%" && raw.symbol != "%":
			percent = true
		case column.Unit != raw.symbol:
			return nil, notice.New("unit-dimension", c.slip.Y.Name(), raw.symbol, column.Name, column.Unit).In(w.e.study.fileName(c.slip))
		}
	}
	if percent && w.yUnit.ByConvention() {
		return nil, percentOfConvention(s.Name, w.yUnit.symbol)
	}
	out := make([]float64, len(rows))
	y := inUnit(c.y, c.yUnit, w.yUnit)
	for j, i := range rows {
		switch v := column.Values[i]; {
		case percent:
			out[j] = math.Abs(y[i]) * v / 100
		case c.slope != nil:
			out[j] = float64(raw.StepToSI(v) * math.Abs(c.slope[i]))
		default:
			out[j] = raw.StepToSI(v)
		}
	}
	return out, nil
}

// rawUnit is the unit of the values of a curve as its table holds them, before a
// form.
func (w *work) rawUnit(c *curve) unit {
	switch {
	case c.slope != nil:
		return axisUnit(c.rawUnit)
	case c.yUnit.known:
		return axisUnit(c.yUnit)
	}
	return w.yUnit
}

// sourceText says a source in words.
func (w *work) sourceText(s *Source) string {
	value := quantity.Typed(s.Value)
	if s.Upper != nil {
		value = "−" + value + " +" + quantity.Typed(*s.Upper)
	}
	switch {
	case s.Column != "":
		value = "column " + s.Column
	case s.Input != "" && s.Basis == OfReading:
		value += " % of " + s.Input + " = " + valueUnit(s.Nominal, s.Unit)
	case s.Input != "":
		value = valueUnit(s.Value, s.Unit) + " of " + s.Input
	case s.Basis == OfCounts:
		value += " counts of " + quantity.Typed(s.PerCount) + w.cell.UnitSuffix()
	case s.Basis == OfReading:
		value += " % of reading"
	case s.Basis == OfFullScale:
		value += " % of the full scale " + quantity.Typed(s.FullScale) + w.cell.UnitSuffix()
	case s.Basis == OfPosition:
		value += unitAfter(w.cell.XUnit) + " of the place, times the slope |dD/dx|"
	case w.cell.Unit != "" && w.cell.Unit != "1":
		value += " " + w.cell.Unit
	}
	kind := "systematic"
	if s.Random {
		kind = "random"
	}
	if s.Form == Interval {
		return "± " + value + ", an interval and no standard uncertainty, " + kind
	}
	words := value + ", " + coverageWords(s.Coverage.Value) + ", "
	if s.Form != "" {
		words += s.Form + ", "
	}
	words += kind
	if s.Type != "" {
		words += ", type " + s.Type
	}
	if s.Shared {
		words += ", acts on both sides"
	}
	return words
}

// coverageWords says a coverage in words.
func coverageWords(text string) string {
	switch text {
	case "":
		return "coverage not stated"
	case "1", "standard":
		return "standard (k = 1)"
	}
	if _, err := strconv.ParseFloat(text, 64); err == nil {
		return "k = " + text
	}
	return text
}

// gridPart takes the grid study as a numerical source.
func (w *work) gridPart() {
	if w.gridU == nil {
		return
	}
	text := "U of the grid study divided by " + quantity.Typed(w.choices.KNum)
	if math.IsNaN(float64(w.cell.Grids.U)) && !w.cell.Grids.Along {
		text = "bound of the grid study divided by √3"
	}
	p := w.add(OfNumerical, "grid", text, "computed from the grid study", w.gridU, w.choices.NumShared, false)
	p.grid, p.made = true, madeOfGrids
}

// interpolationPart takes the interpolation of the simulation as a numerical
// source, always independent between stations.
func (w *work) interpolationPart() {
	if !w.choices.UInterp || w.cell.Scalar {
		return
	}
	w.add(OfNumerical, "interpolation to the stations", "bound divided by √3, "+string(w.choices.Interpolation), "computed", w.uInterp, false, false).interp = true
}

// has reports whether a part is of one side, interpolation and iteration
// apart: alone they are no numerical uncertainty.
func (w *work) has(of string) bool {
	for _, p := range w.parts {
		if p.line.Of == of && !p.interp && !p.aside {
			return true
		}
	}
	for _, line := range w.aparts {
		if line.Of == of && of == OfInput { // an interval says what is known of an input
			return true
		}
	}
	return false
}

// isUnknown reports whether a source of a side is marked as unknown.
func (w *work) isUnknown(of string) bool { return slices.Contains(w.unknown, of) }

// missingParts lists what the budget lacks.
func (w *work) missingParts() {
	if w.reference != nil && len(w.x) > 0 && !w.has(OfData) && !w.isUnknown(OfData) {
		w.need(2, true, "the uncertainty of the data", Target{Kind: "source", ID: w.q.id(), Field: OfData}, "u-missing")
	}
	if w.finest() != nil && !w.has(OfNumerical) && !w.blocked && !w.isUnknown(OfNumerical) {
		w.need(1, true, "the numerical uncertainty", Target{Kind: "source", ID: w.q.id(), Field: OfNumerical}, w.gridsMissing())
	}
	if w.finest() != nil && len(w.x) > 0 && !w.has(OfInput) && !w.isUnknown(OfInput) {
		if w.q.NoInput != "" {
			w.tell(notice.New("u-input-none", w.q.NoInput))
		} else {
			w.need(2, false, "the input uncertainty", Target{Kind: "source", ID: w.q.id(), Field: OfInput}, "u-input-missing")
		}
	}
}

// gridsMissing is the code of the open point for want of a grid uncertainty.
func (w *work) gridsMissing() string {
	if w.cell.Grids == nil {
		return "grid-one"
	}
	return "u-num-missing"
}

// total sums the parts by side; u_val is nil while a side is missing that it
// cannot do without.
func (w *work) total() {
	n := len(w.x)
	w.sumNumerical()
	side := func(of string, interp bool) []float64 {
		var sources []uncertainty.Source
		for _, p := range w.parts {
			if p.line.Of == of && p.interp == interp {
				sources = append(sources, p.ofSide())
			}
		}
		if sources == nil || w.isUnknown(of) {
			return nil
		}
		return uncertainty.Combine(n, sources).Total()
	}
	w.uD, w.uNum, w.uInput = side(OfData, false), side(OfNumerical, false), side(OfInput, false)
	w.flowRate()
	w.bounding()
	if w.uD == nil || !w.has(OfNumerical) && !w.e.options.Partial || len(w.unknown) > 0 {
		return
	}
	w.uVal = w.covariance(w.parts, all(n)).Total()
	for i, u := range w.uVal {
		if u > 0 {
			w.tested = append(w.tested, i)
		}
	}
	w.coarseSimulation()
	w.degrees()
}

// degrees gives the effective degrees of freedom, of a curve the least over its
// tested stations, and the factor that 95 % would need with them; the factor of
// the statement follows where that was chosen.
func (w *work) degrees() {
	nu := math.Inf(1)
	for _, i := range w.tested {
		var terms []uncertainty.Term
		for _, p := range w.parts {
			terms = append(terms, uncertainty.Term{U: math.Abs(p.source.U[i]), Degrees: p.degrees})
		}
		if at, err := uncertainty.EffectiveDegrees(terms); err == nil {
			nu = min(nu, at)
		}
	}
	k, ok := uncertainty.StudentFactor(0.95, nu)
	if math.IsInf(nu, 1) || !ok {
		return
	}
	w.cell.Degrees, w.cell.K95 = Number(nu), Number(k)
	if w.choices.KStudent {
		w.choices.K = quantity.Round(k, 3)
		w.cell.Choices.K = w.choices.K
		w.tell(notice.New("degrees-used", quantity.Typed(w.choices.K), quantity.Text(nu, 2)))
		return
	}
	if exceeds(k, 1.05*w.choices.K) {
		w.tell(notice.New("degrees-few", quantity.Text(nu, 2), quantity.Text(k, 3), quantity.Typed(w.choices.K)))
	}
}

// coarse is the part of u_val above which the interpolation uncertainty is
// told.
const coarse = 0.3

// coarseSimulation tells where the interpolation uncertainty is no small part
// of u_val.
func (w *work) coarseSimulation() {
	worst := 0.0
	for _, p := range w.parts {
		if p.interp {
			for _, i := range w.tested {
				worst = max(worst, p.source.U[i]/w.uVal[i])
			}
		}
	}
	if worst > coarse {
		w.tell(notice.New("station-interp", quantity.Text(100*worst, 2)))
	}
}

// all returns 0 to n-1.
func all(n int) []int {
	rows := make([]int, n)
	for i := range rows {
		rows[i] = i
	}
	return rows
}

// covariance returns the budget of parts at some of the stations.
func (w *work) covariance(parts []part, at []int) uncertainty.Budget {
	sources := make([]uncertainty.Source, 0, len(parts))
	for i := range parts {
		sources = append(sources, parts[i].sources()...)
	}
	whole := uncertainty.Combine(len(w.x), sources)
	if len(at) == len(w.x) {
		return whole
	}
	return whole.At(at)
}

// pick returns the values at some indices; all of them are not copied.
func pick(values []float64, at []int) []float64 {
	if len(at) == len(values) {
		return values
	}
	out := make([]float64, len(at))
	for j, i := range at {
		out[j] = values[i]
	}
	return out
}
