package study

import (
	"math"
	"strconv"

	"weirmark/core/notice"
	"weirmark/core/quantity"
	"weirmark/core/uncertainty"
)

// inputRun is a simulation with one input changed.
type inputRun struct {
	curve *curve
	at    float64 // value of the input
}

// findInputRuns loads the runs of the model in which one input is changed.
func (w *work) findInputRuns() {
	for i := range w.e.study.Slips {
		p := &w.e.study.Slips[i]
		if p.Model.Value != w.model || !w.q.belongs(p, InputRun) {
			continue
		}
		c := w.use(p)
		if c != nil && w.asScalar != nil && !c.scalar() {
			scalar, err := w.asScalar(c)
			if err != nil {
				w.tell(notice.New("derive-run", w.e.study.fileName(p), w.q.Derive.Kind, err.Error()))
				continue
			}
			c = scalar
		}
		at, err := strconv.ParseFloat(p.InputAt.Value, 64)
		switch {
		case c == nil || !w.inCellUnit(c):
		case err != nil:
			if p.InputAt.Given() {
				w.need(2, true, "the value of the input", slipTarget(p, "input_at"), "field-bad", "value of the input", w.e.study.fileName(p), p.InputAt.Value)
			}
		default:
			w.changed = append(w.changed, inputRun{c, at})
		}
	}
}

// inCellUnit reports whether a further run is of the quantity of the cell, and
// refuses it where its unit says that it is not.
func (w *work) inCellUnit(c *curve) bool {
	if !c.yUnit.known || c.yUnit.unit.Same(w.yUnit.Unit) {
		return true
	}
	p := c.slip
	n := notice.New("unit-dimension", w.q.Quantity, w.yUnit.symbol, p.Y.Column.Value, p.Y.Unit.Value)
	w.tell(n)
	w.stop(2, "a common unit of "+w.q.Quantity, slipTarget(p, "y.unit"), n)
	return false
}

// inputSource brings the uncertainty of an input to the quantity.
func (w *work) inputSource(s *Source, k float64, target Target) (uncertainty.Source, bool) {
	u := s.Value / k
	if unit, err := quantity.Parse(s.Unit); s.Basis == OfReading && err == nil && unit.ByConvention() {
		n := percentOfConvention("the uncertainty of "+s.Input, s.Unit)
		w.tell(n)
		w.stop(2, "the size of "+s.Name+" in the unit of "+s.Input, target, n)
		return uncertainty.Source{}, false
	}
	if s.Basis == OfReading {
		u = math.Abs(s.Nominal) * s.Value / 100 / k
	}
	line := InputLine{Name: s.Input, Unit: s.Unit, Nominal: Number(s.Nominal), U: Number(u), Sensitivity: None, DataSensitivity: None, Shared: s.Shared, Text: w.sourceText(s), Origin: s.Origin}
	var ofSimulation []float64
	ofSimulation, line.Method = w.sensitivity(s)
	defer func() { w.cell.Inputs = append(w.cell.Inputs, line) }()
	if ofSimulation == nil {
		w.need(2, true, "the sensitivity to "+s.Input, Target{Kind: "source", ID: w.q.id(), Field: target.Field + ".sensitivity"}, "input-sensitivity", s.Input)
		return uncertainty.Source{}, false
	}
	line.Sensitivity = w.step(rms(ofSimulation))
	if len(ofSimulation) == 1 {
		line.Sensitivity = w.step(ofSimulation[0])
	}
	var ofData []float64
	if s.Shared {
		if s.DataSensitivity == nil {
			w.need(2, true, "what "+s.Input+" does to the data", Target{Kind: "source", ID: w.q.id(), Field: target.Field + ".data_sensitivity"}, "input-shared", s.Input)
			return uncertainty.Source{}, false
		}
		ofData = uncertainty.Constant(len(w.x), w.yUnit.StepToSI(*s.DataSensitivity))
		line.DataSensitivity = Number(*s.DataSensitivity)
		w.sharedTwice(s)
	}
	source := uncertainty.OfInput(ofSimulation, ofData, u)
	w.blanks(source.U, s.Name, target)
	w.zeros(source.U, s.Name, target)
	return source, true
}

// sharedTwice asks about a source of the data of the same name as an input
// that is shared with them: the one error would count twice.
func (w *work) sharedTwice(s *Source) {
	for i := range w.q.Sources {
		if o := &w.q.Sources[i]; o.Of == OfData && (o.Name == s.Name || o.Name == s.Input) {
			w.need(2, true, "one line for "+o.Name, Target{Kind: "source", ID: w.q.id(), Field: strconv.Itoa(i)}, "shared-twice", o.Name)
		}
	}
}

// rms is the root mean square of the known values.
func rms(values []float64) float64 {
	have := known(values)
	return math.Sqrt(squares(have, all(len(have))) / float64(len(have)))
}

// sensitivity returns the change of the simulation for one unit of an input at
// the stations, in SI, and where it is from: the entered one, else that of the
// nearest runs on either side of the nominal value. Nil: it is not known.
func (w *work) sensitivity(s *Source) ([]float64, string) {
	if s.Sensitivity != nil {
		return uncertainty.Constant(len(w.x), w.yUnit.StepToSI(*s.Sensitivity)), "entered"
	}
	var below, above *inputRun
	for i := range w.changed {
		r := &w.changed[i]
		switch {
		case r.curve.slip.Input.Value != s.Input:
		case r.at < s.Nominal && (below == nil || r.at > below.at):
			below = r
		case r.at > s.Nominal && (above == nil || r.at < above.at):
			above = r
		}
	}
	switch {
	case below != nil && above != nil && w.sameGrid(below, above):
		lo, hi := w.atStations(below.curve), w.atStations(above.curve)
		if s.Nominal-below.at == above.at-s.Nominal {
			return uncertainty.Central(lo, hi, above.at-s.Nominal), "central, two runs"
		}
		return uncertainty.Between(lo, w.baseOf(below), hi, s.Nominal-below.at, above.at-s.Nominal), "three runs, unequal steps"
	case above != nil:
		return uncertainty.OneSided(w.baseOf(above), w.atStations(above.curve), above.at-s.Nominal), "one-sided, two runs"
	case below != nil:
		return uncertainty.OneSided(w.baseOf(below), w.atStations(below.curve), below.at-s.Nominal), "one-sided, two runs"
	}
	return nil, ""
}

// sameGrid asks about two runs of one input on different grids.
func (w *work) sameGrid(a, b *inputRun) bool {
	if g, h := a.curve.slip.Grid.Value, b.curve.slip.Grid.Value; g != h {
		w.need(2, true, "runs of "+a.curve.slip.Input.Value+" on one grid", slipTarget(a.curve.slip, "grid"), "input-grids", a.curve.slip.Input.Value, g, h)
	}
	return true
}

// baseOf returns the run that an input run is a change of, at the stations: the
// one on its grid, else the finest.
func (w *work) baseOf(r *inputRun) []float64 {
	name := r.curve.slip.Grid.Value
	for _, base := range w.runs {
		if name != "" && base.curve.slip.Grid.Value == name {
			return w.atStations(base.curve)
		}
	}
	if w.grids != nil && len(w.runs) == 0 {
		counts, values, names := w.scalarGrids()
		for i := range counts {
			if name != "" && names[i] == name {
				return []float64{values[i]}
			}
		}
	}
	return w.atStations(w.finest())
}

// atStations returns a simulation at the stations as it was computed, NaN where
// it does not answer.
func (w *work) atStations(c *curve) []float64 {
	if w.cell.Scalar {
		if v, ok := w.scalarOf(c); ok {
			return []float64{v}
		}
		return blank(1)
	}
	out := blank(len(w.x))
	if c.scalar() {
		return out
	}
	got := w.resample(c, w.x)
	for j, i := range got.Kept {
		out[i] = got.S[j]
	}
	return out
}

// share leaves of a source of the data that acts on the simulation too what is
// not common to both: of a part of the reading the same part of S and of D, else
// the same error, or the entered multiple of it.
func (w *work) share(p *part, s *Source, k float64) {
	own := p.source.U
	if len(w.s) != len(own) { // the simulation is one value, the data a curve
		p.line.Text += ", counted in full: what it does to the value of the simulation is not followed"
		return
	}
	left, ofSimulation := make([]float64, len(own)), own
	switch {
	case s.Sensitivity != nil:
		ofSimulation = times(own, *s.Sensitivity)
	case s.Basis == OfReading && s.Column == "":
		own = signedLike(own, w.d)
		ofSimulation = signedLike(uncertainty.Scaled(uncertainty.OfReading(w.s, s.Value/100), k), w.s)
	}
	for i := range left {
		left[i] = ofSimulation[i] - own[i]
	}
	for i := range p.sides {
		p.sides[i] = p.sides[i].Times(remains(left[i], own[i]))
		facing := uncertainty.Facing([]float64{w.s[i] - w.d[i]}, []float64{p.sides[i].Minus}, []float64{p.sides[i].Plus})
		left[i] = math.Copysign(facing[0], left[i])
	}
	p.own, p.source.U = own, left
	w.cell.Shared = append(w.cell.Shared, SharedLine{Source: s.Name, U: w.step(rms(own)), Left: w.step(rms(left))})
	w.tell(notice.New("source-shared", s.Name, quantity.Text(float64(w.step(rms(own))), 2), quantity.Text(float64(w.step(rms(left))), 2)+w.cell.UnitSuffix()))
}

// remains is the part of an error of the data that is left in E = S - D, with the
// sign of that of the data.
func remains(left, own float64) float64 {
	if own == 0 {
		return 0
	}
	return -left / own
}

// apart keeps a source that is known as an interval only out of u_val.
func (w *work) apart(s *Source, half []float64) {
	bounds := uncertainty.Bounds([][]float64{half}, []float64{1})
	if w.bound == nil {
		w.bound = make([]float64, len(w.x))
	}
	for i, b := range bounds {
		w.bound[i] += b
	}
	w.aparts = append(w.aparts, SourceLine{Name: s.Name, Of: s.Of, Text: w.sourceText(s), U: None, Share: None, Pattern: Interval, Origin: s.Origin})
	most := 0
	for i, b := range w.bound {
		if b > w.bound[most] {
			most = i
		}
	}
	w.cell.Bound = &BoundLine{Half: w.step(w.bound[most]), At: None}
	if !w.cell.Scalar {
		w.cell.Bound.At = Number(w.xUnit.FromSI(w.x[most]))
	}
	w.tell(notice.New("source-interval", s.Name, quantity.Text(float64(w.step(rms(bounds))), 2)+w.cell.UnitSuffix()))
}

// boundAt is the part that sources known as intervals can have in E at a
// station.
func (w *work) boundAt(i int) float64 {
	if w.bound == nil {
		return 0
	}
	return w.bound[i]
}

// members takes runs with sampled inputs: their scatter is the uncertainty of
// the inputs, with the covariance of the runs.
func (w *work) members() {
	for i := range w.e.study.Slips {
		p := &w.e.study.Slips[i]
		if p.Model.Value != w.model || !w.q.belongs(p, Members) {
			continue
		}
		if c := w.use(p); c != nil && (w.asScalar != nil && !c.scalar() || w.inCellUnit(c)) {
			w.addMembers(c)
		}
	}
}

func (w *work) addMembers(c *curve) {
	file := w.e.study.fileName(c.slip)
	runs := w.memberRuns(c)
	mean, sources, ok := uncertainty.OfMembers(runs)
	if !ok {
		w.need(2, true, "two runs with sampled inputs", slipTarget(c.slip, "y.column"), "members-few", file, len(runs))
		return
	}
	w.sampledRuns = runs
	u := uncertainty.Combine(len(w.x), sources).Total()
	difference := 0.0
	base := w.atStations(w.finest())
	for i, m := range mean {
		if d := m - base[i]; math.Abs(d) > math.Abs(difference) {
			difference = d
		}
	}
	p := w.addSource(OfInput, "runs with sampled inputs", "deviation of "+quantity.Counted(len(runs), "run")+", with their covariance", "computed from "+file, uncertainty.Source{U: u}, false)
	p.members, p.line.Pattern, p.degrees = sources, Members, float64(len(runs)-1)
	w.cell.Members = &MemberLine{N: len(runs), U: w.step(rms(u)), Mean: w.step(difference), Rank: min(len(runs)-1, len(w.x))}
	w.tell(notice.New("members-mean", len(runs), file, quantity.Signed(float64(w.step(difference)), 2)+w.cell.UnitSuffix()))
	w.blanks(u, p.line.Name, slipTarget(c.slip, "y.column"))
}

// memberRuns returns the runs of a table at the stations: of a scalar one a
// row, else one a column from the column of values on, each read as the slip
// reads that.
func (w *work) memberRuns(c *curve) [][]float64 {
	var runs [][]float64
	if c.scalar() {
		for _, v := range known(inUnit(c.y, c.yUnit, w.yUnit)) {
			runs = append(runs, []float64{v})
		}
		return runs
	}
	begun := false
	for _, column := range c.table.Columns {
		begun = begun || column.Name == c.slip.Y.Column.Value
		if !begun || column.Name == c.slip.X.Column.Value || column.Text != nil && !anyKnown(column.Values) {
			continue
		}
		p := *w.e.study.slip(c.slip.ID)
		p.Y.Column.Value = column.Name
		one, _ := w.e.load(&p)
		if one == nil {
			runs = append(runs, blank(len(w.x)))
			continue
		}
		runs = append(runs, w.memberAt(one))
	}
	return runs
}

// memberAt returns one of the runs at the stations, or the scalar that the
// question takes from its curve; NaN where there is none.
func (w *work) memberAt(c *curve) []float64 {
	if w.asScalar == nil {
		return w.atStations(c)
	}
	scalar, err := w.asScalar(c)
	if err != nil {
		w.tell(notice.New("derive-run", w.e.study.fileName(c.slip)+", column "+c.slip.Y.Column.Value, w.q.Derive.Kind, err.Error()))
		return blank(1)
	}
	if !w.inCellUnit(scalar) {
		return blank(1)
	}
	return scalar.y
}

// inputForm says whether the uncertainty of the inputs is in u_val.
func (w *work) inputForm() {
	if w.uVal == nil {
		return
	}
	w.cell.InputForm = InputsNominal
	if w.has(OfInput) {
		w.cell.InputForm = InputsCounted
	}
}
