package study

import (
	"cmp"
	"math"
	"strconv"
	"strings"

	"weirmark/core/notice"
	"weirmark/core/quantity"
	"weirmark/core/settling"
)

// settle judges the monitors, balances and residuals of the runs behind the
// cell and takes what they leave uncertain in the finest into the budget.
func (w *work) settle() {
	if w.finest() == nil {
		return
	}
	shown := map[string]bool{} // runs of which something shows that they have settled
	for _, p := range w.slips(Monitor) {
		if c := w.use(p); c != nil {
			shown[p.Grid.Value] = true
			w.judgeMonitor(c)
		}
	}
	if len(shown) == 0 {
		w.takeStandIn(shown)
	}
	w.takeEntered(shown)
	w.judgeBalances()
	for _, p := range w.slips(Residual) {
		if c := w.use(p); c != nil {
			w.judgeResidual(c)
		}
	}
	w.missingMonitors(shown)
}

// slips returns the slips of one role that belong to the cell's runs.
func (w *work) slips(role string) []*Slip {
	var list []*Slip
	for i := range w.e.study.Slips {
		p := &w.e.study.Slips[i]
		if p.Model.Value == w.model && w.q.belongs(p, role) {
			list = append(list, p)
		}
	}
	return list
}

// usedGrids are the names of the runs that the numbers of the cell rest on:
// those in the estimate of a family, or the finest run.
func (w *work) usedGrids() []string {
	if w.cell.Grids == nil {
		return []string{w.cell.Grid}
	}
	var names []string
	for _, p := range w.cell.Grids.Points {
		if p.Used {
			names = append(names, p.Name)
		}
	}
	return names
}

// missingMonitors asks for the monitors of the runs that have none.
func (w *work) missingMonitors(judged map[string]bool) {
	var missing []string
	for _, name := range w.usedGrids() {
		if !judged[name] {
			missing = append(missing, cmp.Or(name, "the run"))
		}
	}
	if len(missing) == 0 {
		return
	}
	what, of := "evidence that each run has settled", w.q.label()
	if len(judged) > 0 {
		what, of = "the monitor of "+strings.Join(missing, ", "), of+", "+strings.Join(missing, ", ")
	}
	w.need(0, false, what, w.q.target("settled"), "monitor-missing", of)
}

// judgeMonitor judges one monitor of the quantity itself. Of the finest run,
// what it cannot settle counts in u_num.
func (w *work) judgeMonitor(c *curve) {
	p := c.slip
	if c.yUnit.known {
		own := axis{unit: w.yUnit.Unit, known: true}
		if _, refusal := sameAxis(own, c.yUnit, w.q.Quantity, p.Y.Column.Value); refusal != nil {
			w.finding(0, "a monitor in the unit of "+w.q.Quantity, *refusal)
			return
		}
	}
	opt := w.settlingOptions()
	m, line := w.judged(c, w.q.Quantity, w.yUnit, &opt)
	u := w.yUnit.StepToSI(m.U)
	w.cell.Monitors = append(w.cell.Monitors, line)
	blocked := w.settlingFindings(opt.Name, p.Grid.Value, line.Entered != "", m)
	w.doubtMonitorValue(opt.Name, p.Grid.Value, m, opt)
	if p.Grid.Value != w.cell.Grid || math.IsNaN(u) || len(w.x) == 0 || blocked {
		return
	}
	var added *part
	if m.Stat != nil && line.Entered == "" {
		w.averages = append(w.averages, average{len(w.cell.Monitors) - 1, opt.Name, *m.Stat, u})
		added = w.addToRun("averaging in time", quantity.Text(m.Stat.Independent, 2)+" independent samples; "+m.Rule, "computed from "+w.e.study.fileName(p), u)
	} else if line.Entered != "" {
		added = w.addToRun("iteration", "U_iter entered, divided by 2", line.Entered, u)
	} else {
		added = w.addToRun("iteration", string(m.Class)+" monitor, "+m.Rule, "computed from "+w.e.study.fileName(p), u)
	}
	added.made, added.number = madeOfMonitor, len(w.cell.Monitors)-1
	change := math.NaN()
	if g := w.cell.Grids; g != nil && !g.Along && len(g.Points) > 1 {
		change = float64(g.Points[len(g.Points)-1].Value - g.Points[len(g.Points)-2].Value)
	}
	uIter, _ := line.UIter()
	for _, n := range settling.Weigh(w.q.Quantity, float64(uIter), opt.UGrid, change, opt.E).Notices {
		w.tell(n)
	}
}

// addToRun adds a source of what the finest run itself leaves uncertain, the
// same u at all stations.
func (w *work) addToRun(name, text, origin string, u float64) *part {
	all := make([]float64, len(w.x))
	for i := range all {
		all[i] = u
	}
	p := w.add(OfNumerical, name, text, origin, all, w.choices.NumShared, false)
	p.aside = true
	return p
}

// judged judges a monitor with the entries of its run, in a unit, and returns
// it with its line. It completes the options. A monitor without a column of
// places has its rows counted.
func (w *work) judged(c *curve, name string, u unit, opt *settling.Options) (settling.Monitor, MonitorLine) {
	p := c.slip
	opt.Name, opt.Time = runName(name, p.Grid.Value), p.Axis.Value == AxisTime
	run := w.q.Run(w.model, p.Grid.Value)
	if run.Start != nil {
		opt.Declared, opt.Start = true, *run.Start
	}
	if run.Period != nil {
		opt.Period = *run.Period
	}
	if c.x == nil {
		c.x = make([]float64, len(c.y))
		for i := range c.x {
			c.x[i] = float64(i + 1)
		}
	}
	values := inUnit(c.y, c.yUnit, u)
	shown := make([]float64, len(values))
	for i, v := range values {
		shown[i] = u.FromSI(v)
	}
	m := w.e.judge(c, shown, u.symbol, *opt)
	entered := w.enteredIter(run, opt.Name)
	if entered != "" {
		m.U = *run.UIter / 2
	}
	return m, monitorLine(c, w.e.study.fileName(p), shown, m, entered, opt.UGrid)
}

// runName names a quantity of one run in messages.
func runName(name, grid string) string {
	if grid == "" {
		return capital(name)
	}
	return capital(name) + " on " + grid
}

// enteredIter returns the reason of an entered U_iter and tells it; nothing
// where none was entered, or none with a reason.
func (w *work) enteredIter(run RunEntry, name string) string {
	switch {
	case run.UIter == nil:
		return ""
	case run.UIterWhy == "":
		w.need(0, false, "the reason of U_iter", w.q.RunTarget("u_iter_why", run.Model, run.Grid), "iteration-reason", "U_iter", name)
		return ""
	}
	w.tell(notice.New("iteration-entered", name, quantity.Typed(*run.UIter)+w.cell.UnitSuffix(), run.UIterWhy))
	return run.UIterWhy
}

// byEntry are the findings that words do not answer: they ask for a number
// with its reason, the entry of a run of that name.
var byEntry = map[string]string{"monitor-drift": "u_iter", "sampling-none": "u_iter", "balance-open": "effect"}

// settlingFindings lists what was found of one monitor and reports whether it
// blocks. An entered U_iter stands for what the monitor does not give.
func (w *work) settlingFindings(name, grid string, entered bool, m settling.Monitor) bool {
	blocked := false
	for _, n := range m.Notices {
		field, number := byEntry[n.Code]
		switch {
		case n.Code == "sampling-short" && grid == w.cell.Grid:
			// It is told with its part of u_num, when that is known.
		case entered && (number || n.Code == "monitor-short" || n.Code == "monitor-constant"):
			n.Severity = notice.Note
			w.tell(n)
		case number:
			blocked = w.findingAt(0, "a settled "+name, n, w.q.RunTarget(field, w.model, grid)) || blocked
		default:
			blocked = w.finding(0, "a settled "+name, n) || blocked
		}
	}
	return blocked
}

// takeStandIn judges the monitors of the quantity that a person named for this
// one. Their own uncertainty is not that of this quantity: it is not in u_num.
func (w *work) takeStandIn(shown map[string]bool) {
	other := w.q.StandIn
	switch {
	case other == nil || other.Quantity == "":
		return
	case other.Why == "":
		w.need(0, false, "the reason of the monitors that stand in", w.q.RunTarget("stand_in_why", "", ""), "iteration-reason", "The use of monitors of "+other.Quantity, w.q.label())
		return
	}
	theirs := Question{Case: w.q.Case, Quantity: other.Quantity}
	for i := range w.e.study.Slips {
		p := &w.e.study.Slips[i]
		if p.Model.Value != w.model || !theirs.belongs(p, Monitor) {
			continue
		}
		c := w.use(p)
		if c == nil {
			continue
		}
		shown[p.Grid.Value] = true
		u := axisUnit(c.yUnit)
		var opt settling.Options
		m, line := w.judged(c, other.Quantity, u, &opt)
		line.Quantity, line.Unit = other.Quantity, u.symbol
		w.cell.Monitors = append(w.cell.Monitors, line)
		blocked := w.settlingFindings(opt.Name, p.Grid.Value, line.Entered != "", m)
		if line.Entered != "" && p.Grid.Value == w.cell.Grid && !blocked {
			w.addToRun("iteration", "U_iter entered, divided by 2", line.Entered, w.yUnit.StepToSI(m.U))
		}
	}
	if len(shown) > 0 {
		w.tell(notice.New("monitor-stands", other.Quantity, w.q.Quantity, other.Why))
	}
}

// takeEntered takes what was entered of runs that have no monitor.
func (w *work) takeEntered(shown map[string]bool) {
	for _, run := range w.q.Runs {
		if run.Model != w.model || shown[run.Grid] {
			continue
		}
		why := w.enteredIter(run, runName(w.q.Quantity, run.Grid))
		if why == "" {
			continue
		}
		shown[run.Grid] = true
		if run.Grid == w.cell.Grid && len(w.x) > 0 {
			w.addToRun("iteration", "U_iter entered, divided by 2", why, w.yUnit.StepToSI(*run.UIter/2))
		}
	}
}

// average is a mean of an unsteady run whose uncertainty, u in SI, is in u_num.
type average struct {
	line int // of the monitors
	name string
	stat settling.Stat
	u    float64
}

// shareOfSampling tells what part of u_num the means of unsteady runs are,
// where it is large, or the samples few.
func (w *work) shareOfSampling() {
	for _, a := range w.averages {
		uNum := math.NaN()
		if w.has(OfNumerical) && w.uNum != nil {
			uNum = math.Sqrt(squares(w.uNum, all(len(w.uNum))) / float64(len(w.uNum)))
		}
		if uNum > 0 {
			w.cell.Monitors[a.line].Sampling.Share = Number(a.u / uNum)
		}
		st := a.stat
		st.U = a.u
		if n, short := st.Short(a.name, quantity.Text(float64(w.step(a.u)), 2)+w.cell.UnitSuffix(), uNum); short {
			w.tell(n)
		}
	}
}

// iterative returns U_iter of a monitor and its coverage factor: twice u, or of
// iterates that keep changing half their range, a bound without a factor.
func iterative(class string, u, halfRange float64) (value, k float64) {
	if class == string(settling.Cycling) || class == string(settling.Stalled) {
		return halfRange, math.NaN()
	}
	return 2 * u, 2
}

// UIter returns the iterative uncertainty that is printed of the monitor, and
// its coverage factor, which a bound has not.
func (m MonitorLine) UIter() (value, k Number) {
	if m.Entered != "" {
		return 2 * m.U, 2
	}
	v, factor := iterative(m.Class, float64(m.U), float64(m.HalfRange))
	return Number(v), Number(factor)
}

// doubtMonitorValue asks where a monitor settles elsewhere than the value that
// is used of its grid: by more than its own uncertainty, a tenth of the grid
// uncertainty and a thousandth of the value.
func (w *work) doubtMonitorValue(name, grid string, m settling.Monitor, opt settling.Options) {
	if w.cell.Grids == nil || w.cell.Grids.Along || math.IsNaN(m.Mean) || math.IsNaN(m.U) {
		return
	}
	for _, p := range w.cell.Grids.Points {
		if p.Name != grid || !p.Value.Known() {
			continue
		}
		small := max(2*m.U, 0.1*opt.UGrid, 1e-3*math.Abs(float64(p.Value)))
		if exceeds(math.Abs(m.Mean-float64(p.Value)), small) {
			w.ask(0, "the value of "+grid, "monitor-value", name, quantity.Text(m.Mean, 4)+w.cell.UnitSuffix(), quantity.Text(float64(p.Value), 4)+w.cell.UnitSuffix())
		}
	}
}

// settlingOptions holds what changes are judged against: the grid
// uncertainty, the size of the quantity, and the comparison error, in the unit
// of the cell.
func (w *work) settlingOptions() settling.Options {
	opt := settling.Options{}
	if w.cell.Grids != nil && w.cell.Grids.U.Known() {
		opt.UGrid = float64(w.cell.Grids.U)
	}
	if w.cell.Scalar && len(w.s) == 1 {
		opt.Scale, opt.E = math.Abs(w.yUnit.FromSI(w.s[0])), w.yUnit.StepFromSI(w.s[0]-w.d[0])
	}
	return opt
}

// judgedSeries names a judgement: the same columns of the same bytes, read in
// the same units, under the same options.
type judgedSeries struct {
	hash, table, x, y string
	xUnit, yUnit      quantity.Unit
	shown             string    // the unit of the judgement
	kept              [4]string // branch, abscissa and repeats of the slip, second coordinate
	opt               settling.Options
}

// judge judges a monitor once for equal ingredients.
func (e *evaluation) judge(c *curve, values []float64, shown string, opt settling.Options) settling.Monitor {
	p := c.slip
	if c.yTurned || c.xTurned { // the case card is in it
		return settling.Judge(settling.Series{At: c.x, Value: values}, opt)
	}
	key := judgedSeries{e.files[p.File].SHA256 + e.study.File(p.File).readingText(), p.Table, p.X.Column.Value, p.Y.Column.Value, c.xUnit.unit, c.yUnit.unit, shown, [4]string{p.Branch.Value, p.Abscissa.Value, p.Repeats.Value, p.Contour.Name()}, opt}
	if m, known := e.judged[key]; known {
		return m
	}
	m := settling.Judge(settling.Series{At: c.x, Value: values}, opt)
	e.judged[key] = m
	return m
}

// finding lists a notice of another package: a stop that no one has answered
// blocks the statement, a question is an open point. It reports whether the
// notice blocks.
func (w *work) finding(course int, missing string, n notice.Notice) bool {
	answer := w.q.Answers[n.Code]
	if n.Severity == notice.Note || answer == "" {
		return w.findingAt(course, missing, n, Target{Kind: "answer", ID: w.q.id(), Field: n.Code})
	}
	w.tell(n)
	w.tell(notice.New("finding-answered", capital(missing), answer))
	return false
}

// findingAt lists a notice that an entry at the target answers, and reports
// whether it blocks.
func (w *work) findingAt(course int, missing string, n notice.Notice, target Target) bool {
	w.tell(n)
	if n.Severity == notice.Note {
		return false
	}
	w.cell.Open = append(w.cell.Open, Open{Course: course, Blocks: n.Severity == notice.Stop, Missing: missing, Text: n.Text, Target: target})
	return n.Severity == notice.Stop
}

// monitorPoints is the number of points of a monitor that a figure draws.
const monitorPoints = 400

// monitorLine is a judgement in the unit that it was made in.
func monitorLine(c *curve, file string, values []float64, m settling.Monitor, entered string, uGrid float64) MonitorLine {
	line := MonitorLine{
		Grid: c.slip.Grid.Value, File: file, Axis: cmp.Or(c.slip.Axis.Value, AxisIterations), XName: c.xUnit.name,
		Class: string(m.Class), Rule: m.Rule, Mean: Number(m.Mean), U: Number(m.U), Entered: entered, From: Number(m.Window[0]), To: Number(m.Window[1]),
		Drift: Number(m.Drift), Change: Number(m.Drift * m.Scale), Per: Number(m.Per), Limit: Number(m.Limit), Remaining: Number(m.Remaining),
		Period: Number(m.Period), Cycles: m.Cycles, HalfRange: Number(m.HalfRange), OfGrid: None, Sampling: sampling(m.Stat),
		X: []Number{}, Y: []Number{},
	}
	u, _ := line.UIter()
	line.OfGrid = Number(settling.Weigh("", float64(u), uGrid, 0, 0).OfGrid)
	line.X, line.Y = thinned(c.x, values)
	return line
}

// sampling is how a mean came by its uncertainty; nil for iterations.
func sampling(st *settling.Stat) *Sampling {
	if st == nil {
		return nil
	}
	s := Sampling{StartUp: st.StartUp, Rows: st.Rows, SD: Number(st.SD), Tau: Number(st.Tau), Independent: Number(st.Independent),
		Batches: st.Batch.Count, UBatches: None, UMarkov: Number(st.UMarkov), Share: None}
	if st.Batch.Count > 0 {
		s.UBatches = Number(st.Batch.U)
	}
	return &s
}

// thinned returns the points of a series that a figure draws.
func thinned(at, values []float64) (x, y []Number) {
	x, y = []Number{}, []Number{}
	step := max(1, (len(values)+monitorPoints-1)/monitorPoints)
	for i := 0; i < len(values); i += step {
		x, y = append(x, Number(at[i])), append(y, Number(values[i]))
	}
	return x, y
}

// SettledText says in one line what monitors, balances and residuals show.
func (c *Cell) SettledText() string {
	classes := map[string][]string{}
	var order, texts []string
	for _, m := range c.Monitors {
		if classes[m.Class] == nil {
			order = append(order, m.Class)
		}
		name := cmp.Or(m.Grid, "the run")
		if m.Entered != "" {
			name += " (U_iter entered)"
		}
		classes[m.Class] = append(classes[m.Class], name)
	}
	for _, class := range order {
		texts = append(texts, class+": "+strings.Join(classes[class], ", "))
	}
	if len(c.Monitors) > 0 && c.Monitors[0].Quantity != "" {
		texts[0] = "by the " + c.Monitors[0].Quantity + ", " + texts[0]
	}
	open := 0
	for _, b := range c.Balances {
		if !b.Closed {
			open++
		}
	}
	if n := len(c.Balances); n > 0 {
		texts = append(texts, quantity.Counted(n, "balance")+", "+strconv.Itoa(open)+" not closed")
	}
	if fallen := c.residualText(); fallen != "" {
		texts = append(texts, fallen)
	}
	return strings.Join(texts, "; ")
}
