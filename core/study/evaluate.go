package study

import (
	"cmp"
	"slices"
	"strconv"

	"weirmark/core/notice"
	"weirmark/core/refinement"
	"weirmark/core/settling"
	"weirmark/core/tablefile"
)

// Edition names the edition of the methods that a report was made with.
const Edition = "1"

// Options of Evaluate.
type Options struct {
	// Read reads a file; a host that evaluates often may answer from what it
	// read before. Nil reads anew.
	Read func(File) tablefile.File
	// Alternatives asks for the list of choices that would change an outcome;
	// every one evaluates its cell again.
	Alternatives bool
	// Partial gives u_val without its numerical part too, for a host that says
	// so beside it: a study has no u_val while a part is missing.
	Partial bool
	// Memory, where a host keeps one, saves what did not change since the
	// evaluation before.
	Memory *Memory
}

// Read reads the bytes of a file.
func Read(f File) tablefile.File { return ReadTelling(f, nil) }

// ReadTelling is Read that tells, now and then, how many bytes are done of all.
func ReadTelling(f File, tell func(done, total int)) tablefile.File {
	options := tablefile.Options{}
	if f.Reading != nil {
		options = *f.Reading
	}
	if tell != nil {
		options.Progress = func(done, total int) bool {
			tell(done, total)
			return true
		}
	}
	return tablefile.Read(f.Name, f.Data, options)
}

// evaluation is one run of Evaluate.
type evaluation struct {
	study   *Study
	options Options
	files   map[string]tablefile.File // by ID; only those whose bytes have their recorded hash
	judged  map[judgedSeries]settling.Monitor
}

// begin starts an evaluation; monitors that the memory has judged are not
// judged again.
func begin(s *Study, options Options) *evaluation {
	if options.Read == nil {
		options.Read = Read
	}
	e := &evaluation{study: s, options: options, files: map[string]tablefile.File{}, judged: map[judgedSeries]settling.Monitor{}}
	if options.Memory != nil {
		e.judged = options.Memory.monitors()
	}
	return e
}

// Evaluate returns everything that can be said of a study. It is a pure
// function: the same study gives the same report in every host. Values of a
// cell are in the unit of its data (of the simulation where there are none).
func Evaluate(s *Study, options Options) Report {
	e := begin(s, options)
	r := Report{
		Title: s.Title, Purpose: s.Purpose, Edition: Edition,
		Files: []FileLine{}, Cells: []Cell{}, Differences: []Difference{}, Notices: []notice.Notice{},
		Prepared: s.Prepared, Checked: s.Checked, Approved: s.Approved,
		Log: append([]Entry{}, s.Log...),
	}
	e.readFiles(&r)
	if m := options.Memory; m != nil {
		m.begin()
		defer m.end()
	}
	for i := range s.Questions {
		q := &s.Questions[i]
		if !s.asked(q) || s.exactOnly(q) {
			continue // its tables are gone or belong to another question now
		}
		for _, model := range s.models(q) {
			r.Cells = append(r.Cells, e.remembered(q, model))
		}
	}
	e.differences(&r)
	e.codeChecks(&r)
	return r
}

// Closely returns a cell of the study's report as Evaluate gives it when it is
// asked for alternatives, for a host that shows one cell at a time.
func Closely(s *Study, options Options, c *Cell) Cell {
	q := s.Question(c.Case, c.Quantity)
	if q == nil || c.Summary == nil {
		return *c
	}
	options.Alternatives = true
	e := begin(s, options)
	e.readFiles(&Report{})
	if m := options.Memory; m != nil {
		m.begin()
		defer m.end()
	}
	return e.remembered(q, c.Model)
}

// readFiles reads every file once and lists it with its uses.
func (e *evaluation) readFiles(r *Report) {
	first := map[string]string{} // by hash
	for _, f := range e.study.Files {
		read := e.options.Read(f)
		line := FileLine{ID: f.ID, Name: f.Name, SHA256: read.SHA256, Bytes: read.Size, Matches: read.SHA256 == f.SHA256, Uses: e.study.uses(f.ID)}
		r.Files = append(r.Files, line)
		for _, n := range read.Notices {
			r.Notices = append(r.Notices, n.In(f.Name))
		}
		if !line.Matches {
			r.Notices = append(r.Notices, notice.New("hash-changed", f.Name).In(f.Name))
			continue
		}
		if other, twice := first[read.SHA256]; twice {
			r.Notices = append(r.Notices, notice.New("files-identical", other, f.Name).In(f.Name))
		} else {
			first[read.SHA256] = f.Name
		}
		e.files[f.ID] = read
	}
}

// uses says in words what a file is used for.
func (s *Study) uses(id string) []string {
	uses := []string{}
	for i := range s.Slips {
		p := &s.Slips[i]
		if p.File != id || p.Role.Value == Unused || !p.Role.Given() {
			continue
		}
		text := p.Role.Value + ": " + cmp.Or(p.Quantity.Value, "all quantities")
		if p.Model.Given() && p.Role.Value != Reference {
			text += ", model " + p.Model.Value
		}
		if p.Grid.Given() {
			text += ", grid " + p.Grid.Value
		}
		uses = append(uses, text)
	}
	return uses
}

// belongs reports whether a slip is of a question and plays one of the roles.
func (q *Question) belongs(p *Slip, roles ...string) bool {
	if p.Case.Value != q.Case || p.Quantity.Value != q.Quantity && !(p.anyQuantity() && !p.Quantity.Given()) {
		return false
	}
	for _, role := range roles {
		if p.Role.Value == role {
			return true
		}
	}
	return false
}

// ofRun reports whether a slip shows how a run went, not what came of it.
func (p *Slip) ofRun() bool {
	return p.Role.Value == Monitor || p.Role.Value == Residual || p.Role.Value == Balance
}

// anyQuantity reports whether a slip without a quantity counts for every
// quantity of its case: residuals and balances are of the run as a whole.
func (p *Slip) anyQuantity() bool { return p.Role.Value == Residual || p.Role.Value == Balance }

// models lists the models that a question has simulations of, in the order
// of their slips; one nameless model where there is none.
func (s *Study) models(q *Question) []string {
	var models []string
	seen := map[string]bool{}
	for i := range s.Slips {
		p := &s.Slips[i]
		if q.belongs(p, Simulation, GridValues) && !seen[p.Model.Value] {
			seen[p.Model.Value] = true
			models = append(models, p.Model.Value)
		}
	}
	if models == nil {
		return []string{""}
	}
	return models
}

// cell evaluates one question for one model, with the choices that would
// change an outcome.
func (e *evaluation) cell(q *Question, model string) Cell {
	c := e.work(q, model, q.Choices)
	if e.options.Alternatives && c.Summary != nil {
		e.fragile(q, model, &c)
	}
	return c
}

// work evaluates one question for one model with given choices.
func (e *evaluation) work(q *Question, model string, choices Choices) Cell {
	return e.workWith(&work{e: e, q: q, model: model, choices: choices})
}

// workWith evaluates the cell that a work was set up for.
func (e *evaluation) workWith(w *work) Cell {
	q, model, choices := w.q, w.model, w.choices
	w.cell = Cell{
		Case: q.Case, Condition: q.Condition, Quantity: q.Quantity, Symbol: q.Symbol, Model: model,
		Reference: q.ReferenceID, Kind: q.Kind.Value, Use: q.Use.Value, Known: q.Known.Value, Downward: q.Downward, Choices: choices,
		Corrected: q.Corrected, Unit: "1", XUnit: "1", Degrees: None, K95: None,
		Open: []Open{}, Stations: []Station{}, Outside: []Number{}, Excluded: []Excluded{}, Scores: []ScoreLine{}, Regions: []RegionLine{}, Monitors: []MonitorLine{}, Balances: []BalanceLine{}, Residuals: []ResidualLine{}, Conditions: []Compared{}, Sources: []SourceLine{}, Fragile: []Fragility{},
		Notices: []notice.Notice{}, FilesUsed: []string{},
		Crossings: Crossings{Simulation: []Crossing{}, Reference: []Crossing{}},
		Curve:     Curve{X: []Written{}, Y: []Written{}, UNum: []Number{}},
	}
	w.findReference()
	w.findSimulation()
	w.takeCard()
	w.mapping()
	if w.commonGround() {
		w.matchConditions()
		w.doubtCurves()
		w.family()
		w.roundOff()
		w.settle()
		w.budget()
		w.inputForm()
		w.shareOfSampling()
		w.agree()
		w.sample()
		w.doubtComparison()
		w.otherReferences()
		w.distributions()
		w.scores()
		w.judge()
		w.trend()
		w.draw()
		w.treat()
	}
	w.application()
	w.quality()
	w.recorded()
	w.close()
	return w.cell
}

// commonGround brings both sides to what is compared: stations, or a scalar.
func (w *work) commonGround() bool {
	if w.q.Derive != nil {
		return w.derive()
	}
	if !w.settleUnits() {
		return false
	}
	w.commonStations()
	return true
}

// work is the state of one cell while it is evaluated. Slices over the
// stations are in SI.
type work struct {
	e       *evaluation
	q       *Question
	model   string
	choices Choices
	// withExcluded compares the excluded stations too, as an alternative.
	withExcluded bool
	without      *Region                        // a part of the stations left out, as an alternative
	derivedData  bool                           // sources of the data are of a curve from which the scalar was taken
	asScalar     func(c *curve) (*curve, error) // takes the scalar of a further run
	derivedBoth  bool                           // and all others of the curve of the simulation
	inner        bool                           // an alternative itself: what only the statement shows is left out
	cell         Cell

	lending   bool // evaluated for what another cell borrows of it
	reference *curve
	others    []*curve // further references of a scalar
	runs      []run    // finest first
	grids     *curve
	sizes     []float64

	xUnit, yUnit unit

	rows []int // of the reference, one a station
	x, s, d,
	uInterp []float64
	linePart    []int     // number of the unbroken part of the simulation that answered each station
	skipped     []float64 // stations that are not compared, in SI
	anchors     []AnchorLine
	sampledRuns [][]float64 // runs with sampled inputs, at the stations
	takes       []takenSide // curves that scalars were taken from
	refined     refinement.Result
	gridU       []float64 // standard uncertainty from the grid study; nil where there is none
	blocked     bool      // the grid study says that there is none
	floor       []float64 // standard uncertainty by rounding at the stations; nil where no second run shows it
	averages    []average // of unsteady runs that count in u_num
	parts       []part
	uD, uNum    []float64
	uInput      []float64
	uVal        []float64
	tested      []int // stations with a known u_val
	joined      []int // of these, the stations of the joint statistic: every reading once

	unknown []string     // sides with a source that is marked as unknown
	aparts  []SourceLine // sources known as intervals only
	bound   []float64    // what these can do to E at the stations; nil where there are none
	changed []inputRun
	spreads []spread // of repeated readings
}

// run is one simulation with the number of cells of its grid.
type run struct {
	curve *curve
	cells float64 // 0 where not given
}

// tell adds a notice to the cell.
func (w *work) tell(n notice.Notice) { w.cell.Notices = append(w.cell.Notices, n) }

// need adds an open point with the text of a notice.
func (w *work) need(course int, blocks bool, missing string, target Target, code string, args ...any) {
	n := notice.New(code, args...)
	w.tell(n)
	w.cell.Open = append(w.cell.Open, Open{Course: course, Blocks: blocks, Missing: missing, Text: n.Text, Target: target})
}

// ask adds a finding that a person has to answer: an open point until there
// is an answer, then a notice beside it.
func (w *work) ask(course int, missing, code string, args ...any) {
	w.finding(course, missing, notice.New(code, args...))
}

// id names a question in targets.
func (q *Question) id() string { return q.Case + "|" + q.Quantity }

func (q *Question) target(field string) Target {
	return Target{Kind: "question", ID: q.id(), Field: field}
}

// label names a question for a reader.
func (q *Question) label() string { return q.Quantity + " at " + q.Case }

// findReference loads the reference of the question.
func (w *work) findReference() {
	var found []*Slip
	for i := range w.e.study.Slips {
		if p := &w.e.study.Slips[i]; w.q.belongs(p, Reference) {
			found = append(found, p)
		}
	}
	if len(found) == 0 {
		w.need(2, true, "reference data", w.q.target("reference"), "reference-missing", w.q.label())
		return
	}
	w.reference = w.use(found[0])
	for _, p := range found[1:] {
		c := w.use(p)
		if c != nil && w.reference != nil && (w.q.Derive != nil || c.scalar() && w.reference.scalar()) {
			w.others = append(w.others, c) // held against the first
			continue
		}
		w.need(2, false, "the choice of one reference", slipTarget(p, "role"), "reference-many", len(found), w.q.label(), w.e.study.fileName(found[0]))
	}
	if w.cell.Reference == "" {
		w.cell.Reference = w.e.study.fileName(found[0])
	}
}

// findSimulation loads the runs of the model, finest first.
func (w *work) findSimulation() {
	any := false
	for i := range w.e.study.Slips {
		p := &w.e.study.Slips[i]
		if p.Model.Value != w.model || !w.q.belongs(p, Simulation, GridValues) {
			continue
		}
		any = true
		c := w.use(p)
		switch {
		case c == nil:
		case p.Role.Value == GridValues:
			w.takeGrids(c)
		default:
			w.runs = append(w.runs, run{c, w.cells(p)})
		}
	}
	if !any {
		w.need(2, true, "a simulation", w.q.target("simulation"), "simulation-missing", w.q.label())
	}
	w.finestFirst()
	w.identicalRuns()
	if len(w.runs) > 0 {
		w.cell.Grid = w.runs[0].curve.slip.Grid.Value
	}
}

// identicalRuns asks about runs of one family that hold the same bytes.
func (w *work) identicalRuns() {
	first, grids := map[string]*Slip{}, map[string]*Slip{}
	for _, r := range w.runs {
		p := r.curve.slip
		if other, twice := grids[p.Grid.Value]; twice && p.Grid.Given() && other.File != p.File {
			w.need(1, true, "the run of grid "+p.Grid.Value, slipTarget(p, "grid"), "names-collide", w.e.study.fileName(other)+" and "+w.e.study.fileName(p), w.q.label()+", grid "+p.Grid.Value)
		}
		grids[p.Grid.Value] = p
		f := w.e.study.File(p.File)
		key := f.SHA256 + " " + p.Table + " " + p.Y.Name()
		if other, twice := first[key]; twice && other.File != p.File {
			w.need(1, true, "the right file of grid "+cmp.Or(p.Grid.Value, f.Name), slipTarget(p, "grid"), "grid-identical", w.e.study.fileName(other), f.Name)
			continue
		}
		first[key] = p
	}
}

// finestFirst orders the runs by their cells, keeping the order of slips
// among equals.
func (w *work) finestFirst() {
	for i := 1; i < len(w.runs); i++ {
		for j := i; j > 0 && w.runs[j].cells > w.runs[j-1].cells; j-- {
			w.runs[j], w.runs[j-1] = w.runs[j-1], w.runs[j]
		}
	}
}

func (w *work) cells(p *Slip) float64 {
	if !p.Cells.Given() {
		return 0
	}
	n, err := strconv.ParseFloat(p.Cells.Value, 64)
	if err != nil || !(n > 0) {
		w.need(1, true, "the number of cells", slipTarget(p, "cells"), "field-bad", "number of cells", w.e.study.fileName(p), p.Cells.Value)
		return 0
	}
	return n
}

// takeGrids keeps a table of values over grid sizes.
func (w *work) takeGrids(c *curve) {
	column, err := c.table.Column(c.slip.Size.Column.Value)
	if err != nil {
		w.tell(asNotice(err))
		w.stop(1, "the number of cells", slipTarget(c.slip, "size.column"), asNotice(err))
		return
	}
	w.grids, w.sizes = c, column.Values
}

// stop adds a blocking open point for a notice that is listed already.
func (w *work) stop(course int, missing string, target Target, n notice.Notice) {
	w.cell.Open = append(w.cell.Open, Open{Course: course, Blocks: true, Missing: missing, Text: n.Text, Target: target})
}

func slipTarget(p *Slip, field string) Target { return Target{Kind: "slip", ID: p.ID, Field: field} }

// use loads a slip, lists its guesses and gaps as open points, and notes the
// file.
func (w *work) use(p *Slip) *curve {
	if w.fileUsed(p.File) {
		w.readerAsks(p)
	}
	w.doubts(p)
	c, notices := w.e.load(p)
	for _, n := range notices {
		if n.Code == "u-zero" {
			w.finding(2, "whether the uncertainty in "+p.U.Column.Value+" of "+w.e.study.fileName(p)+" is zero by definition", n)
			continue
		}
		w.tell(n)
		if n.Code == "hash-changed" {
			w.stop(2, "the unaltered file "+w.e.study.fileName(p), Target{Kind: "file", ID: p.File}, n)
			continue
		}
		if n.Severity == notice.Stop || n.Code == "unit-unknown" {
			w.stop(2, "a readable "+p.Quantity.Value, slipTarget(p, "y.column"), n)
		}
	}
	return c
}

// fileUsed lists a file of the cell and reports whether it is new there.
func (w *work) fileUsed(id string) bool {
	for _, have := range w.cell.FilesUsed {
		if have == id {
			return false
		}
	}
	w.cell.FilesUsed = append(w.cell.FilesUsed, id)
	return true
}

// readerAsks lists what the reader asked about the file of a slip and no one
// has answered.
func (w *work) readerAsks(p *Slip) {
	file := w.e.study.File(p.File)
	for _, n := range w.e.files[p.File].Notices {
		if n.Severity != notice.Ask {
			continue
		}
		w.askOfFile(file, n.In(file.Name))
	}
}

// identicalFiles asks about two files of the cell that hold the same bytes,
// where they are not runs of a family, which are asked about by themselves.
func (w *work) identicalFiles() {
	if notice.Has(w.cell.Notices, "grid-identical") {
		return
	}
	first := map[string]string{} // names by hash
	for i := range w.e.study.Files {
		file := &w.e.study.Files[i]
		if !slices.Contains(w.cell.FilesUsed, file.ID) {
			continue
		}
		other, twice := first[file.SHA256]
		if !twice {
			first[file.SHA256] = file.Name
			continue
		}
		w.askOfFile(file, notice.New("files-identical", other, file.Name).In(file.Name))
	}
}

// askOfFile lists what is asked of a file, or what a person answered to it.
func (w *work) askOfFile(file *File, n notice.Notice) {
	if answer := file.Answers[n.Code]; answer != "" {
		w.tell(notice.New("finding-answered", "A question on "+file.Name+" ("+n.Text+")", answer))
		return
	}
	w.cell.Open = append(w.cell.Open, Open{Course: 2, Blocks: true, Missing: "an answer on " + file.Name, Text: n.Error(), Target: Target{Kind: "file", ID: file.ID, Field: "answer." + n.Code}})
}

// doubts lists the fields of a slip that are guesses or missing.
func (w *work) doubts(p *Slip) {
	file := w.e.study.fileName(p)
	for _, f := range p.fields() {
		switch {
		case f.field.Open():
			w.need(f.course, true, "acceptance of the "+f.name, slipTarget(p, f.path), "guess-open", capital(f.name), file, f.field.Value)
		case f.needed && !f.field.Given() && f.path == "u_factor":
			w.need(f.course, true, "the "+f.name, slipTarget(p, f.path), "u-coverage", "column "+p.U.Column.Value+" of "+file)
		case f.needed && !f.field.Given() && f.path == "u_basis":
			w.need(f.course, true, "the "+f.name, slipTarget(p, f.path), "u-basis", p.U.Column.Value, file)
		case f.needed && !f.field.Given() && f.unitOf != "":
			w.need(f.course, true, "the "+f.name, slipTarget(p, f.path), "unit-missing", f.unitOf, file, w.unitsThatFit(p, f))
		case f.needed && !f.field.Given():
			w.need(f.course, true, "the "+f.name, slipTarget(p, f.path), "field-missing", capital(f.name), file)
		}
	}
}

// slipField is a field of a slip as doubts are told of it.
type slipField struct {
	path   string
	name   string
	field  Field
	needed bool
	course int
	unitOf string // the column, where the field is its unit
}

// fields lists the fields of a slip that a statement rests on.
func (p *Slip) fields() []slipField {
	all := []slipField{
		{path: "role", name: "role", field: p.Role, needed: true, course: 2},
		{path: "case", name: "case", field: p.Case, needed: true, course: 2},
		{path: "quantity", name: "quantity", field: p.Quantity, needed: !p.anyQuantity(), course: 2},
		{path: "y.column", name: "column of values", field: p.Y.Column, needed: !p.Y.Formula.Given(), course: 2},
		{path: "y.formula", name: "formula of values", field: p.Y.Formula, course: 2},
		{path: "y.unit", name: "unit of " + cmp.Or(p.Y.Name(), "the values"), field: p.Y.Unit, needed: p.Role.Value != Balance && p.Role.Value != Residual, course: 2, unitOf: cmp.Or(p.Y.Name(), "the values")},
	}
	if p.Role.Value != Reference {
		all = append(all, slipField{path: "model", name: "model", field: p.Model, course: 2})
	}
	if p.X.Given() {
		all = append(all,
			slipField{path: "x.column", name: "column of stations", field: p.X.Column, needed: !p.X.Formula.Given(), course: 2},
			slipField{path: "x.formula", name: "formula of stations", field: p.X.Formula, course: 2},
			slipField{path: "x.unit", name: "unit of " + p.X.Name(), field: p.X.Unit, needed: !p.ofRun(), course: 2, unitOf: p.X.Name()})
	}
	if p.U.Column.Given() {
		all = append(all,
			slipField{path: "u.column", name: "column of uncertainty", field: p.U.Column, needed: true, course: 2},
			slipField{path: "u.unit", name: "unit of " + p.U.Column.Value, field: p.U.Unit, course: 2},
			slipField{path: "u_factor", name: "coverage of " + p.U.Column.Value, field: p.UFactor, needed: true, course: 2})
		if p.Upper.Column.Given() {
			all = append(all, slipField{path: "upper.column", name: "column of the upper bar", field: p.Upper.Column, needed: true, course: 2},
				slipField{path: "upper.unit", name: "unit of the upper bar", field: p.Upper.Unit, course: 2},
				slipField{path: "bars_as", name: "meaning of the bars", field: p.BarsAs, needed: true, course: 2})
		}
		if p.percentU() {
			all = append(all, slipField{path: "u_basis", name: "basis of " + p.U.Column.Value, field: p.UBasis, needed: true, course: 2})
		}
	}
	if f := p.Force; f.As.Given() || f.Half.Given() {
		all = append(all, slipField{path: "force.as", name: "use of the force", field: f.As, course: 2}, slipField{path: "force.half", name: "factor of a half model", field: f.Half, course: 2},
			slipField{path: "force.normal", name: "column of the normal force", field: f.Normal, needed: f.As.Value == AsMoment, course: 2},
			slipField{path: "force.axial", name: "column of the axial force", field: f.Axial, needed: f.As.Value == AsLift || f.As.Value == AsDrag, course: 2})
	}
	if p.Derive.Given() {
		all = append(all, slipField{path: "derive", name: "derivation", field: p.Derive, course: 2})
	}
	for _, f := range []slipField{
		{path: "abscissa", name: "abscissa", field: p.Abscissa, course: 2},
		{path: "rows.column", name: "column that selects rows", field: p.Rows.Column, course: 2},
		{path: "repeats", name: "treatment of repeated stations", field: p.Repeats, course: 2},
		{path: "sampling", name: "place of the values", field: p.Sampling, course: 2},
	} {
		if f.field.Given() {
			all = append(all, f)
		}
	}
	if p.Branch.Given() {
		all = append(all, slipField{path: "branch", name: "branch", field: p.Branch, course: 2})
	}
	if p.Role.Value == Monitor {
		all = append(all, slipField{path: "axis", name: "kind of monitor", field: p.Axis, needed: true, course: 0})
	}
	if p.Role.Value == Balance {
		all = append(all, slipField{path: "balance_of", name: "kind of balance", field: p.BalanceOf, course: 0},
			slipField{path: "scale", name: "flux that matters", field: p.Scale, needed: !p.X.Column.Given(), course: 0})
	}
	if p.Role.Value == Simulation || p.Role.Value == Precision || p.ofRun() {
		all = append(all,
			slipField{path: "grid", name: "grid", field: p.Grid, course: 1},
			slipField{path: "cells", name: "number of cells", field: p.Cells, course: 1})
	}
	if p.Derive.Value == DeriveLift {
		all = append(all, slipField{path: "contour.column", name: "second coordinate", field: p.Contour.Column, needed: true, course: 2},
			slipField{path: "contour.unit", name: "unit of the second coordinate", field: p.Contour.Unit, needed: true, course: 2, unitOf: cmp.Or(p.Contour.Column.Value, "the second coordinate")})
	}
	if p.Role.Value == InputRun {
		all = append(all, slipField{path: "input", name: "input of the run", field: p.Input, needed: true, course: 2}, slipField{path: "input_at", name: "value of the input", field: p.InputAt, needed: true, course: 2})
	}
	if p.Role.Value == StepValues {
		all = append(all, slipField{path: "step.column", name: "column of time steps", field: p.Step.Column, needed: true, course: 1})
	}
	if p.Role.Value == GridValues {
		all = append(all, slipField{path: "size.column", name: "column of cell counts", field: p.Size.Column, needed: true, course: 1},
			slipField{path: "grid", name: "column of grid names", field: p.Grid, course: 1})
	}
	return all
}

// percentU reports whether the uncertainty is in percent of something.
func (p *Slip) percentU() bool { return p.U.Unit.Value == "%" && p.Y.Unit.Value != "%" }

// capital returns text with its first letter, an ASCII one, in upper case.
func capital(text string) string {
	if text == "" || text[0] < 'a' || text[0] > 'z' {
		return text
	}
	return string(text[0]-'a'+'A') + text[1:]
}
