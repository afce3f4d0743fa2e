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

// settle judges the monitors and balances of the runs behind the cell and
// takes the iterative uncertainty of the finest into the budget.
func (w *work) settle() {
	if w.finest() == nil {
		return
	}
	judged := map[string]bool{}
	for _, p := range w.slips(Monitor) {
		c := w.use(p)
		if c == nil || c.x == nil {
			continue
		}
		judged[p.Grid.Value] = true
		w.judgeMonitor(c)
	}
	for _, p := range w.slips(Balance) {
		if c := w.use(p); c != nil && c.x != nil {
			w.judgeBalance(c)
		}
	}
	w.missingMonitors(judged)
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

// judgeMonitor judges one monitor. Of the finest run, what it cannot settle
// counts in u_num.
func (w *work) judgeMonitor(c *curve) {
	p := c.slip
	values := inUnit(c.y, c.yUnit, w.yUnit)
	name := capital(w.q.Quantity)
	if p.Grid.Given() {
		name += " on " + p.Grid.Value
	}
	opt := w.settlingOptions()
	opt.Name, opt.Time = name, p.Axis.Value == AxisTime
	m := w.e.judge(c, values, opt)
	finest := p.Grid.Value == w.cell.Grid
	w.cell.Monitors = append(w.cell.Monitors, w.monitorLine(c, values, m))
	blocked := false
	for _, n := range m.Notices {
		blocked = w.finding(0, "a settled "+name, n) || blocked
	}
	w.doubtMonitorValue(name, p.Grid.Value, m, opt)
	if !finest || math.IsNaN(m.U) || len(w.x) == 0 || blocked {
		return
	}
	u := make([]float64, len(w.x))
	for i := range u {
		u[i] = m.U
	}
	w.add(OfNumerical, "iteration", string(m.Class)+" monitor, "+m.Rule, "computed from "+w.e.study.fileName(p), u, w.choices.NumShared, false).aside = true
	change := math.NaN()
	if g := w.cell.Grids; g != nil && !g.Along && len(g.Points) > 1 {
		change = w.yUnit.StepToSI(float64(g.Points[len(g.Points)-1].Value - g.Points[len(g.Points)-2].Value))
	}
	e := math.NaN()
	if w.cell.Scalar {
		e = w.s[0] - w.d[0]
	}
	uIter, _ := iterative(string(m.Class), m.U, m.HalfRange)
	for _, n := range settling.Weigh(w.q.Quantity, uIter, opt.UGrid, change, e).Notices {
		w.tell(n)
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
		value := w.yUnit.ToSI(float64(p.Value))
		small := max(2*m.U, 0.1*opt.UGrid, 1e-3*math.Abs(value))
		if exceeds(math.Abs(m.Mean-value), small) {
			w.ask(0, "the value of "+grid, "monitor-value", name, quantity.Text(float64(w.yNumber(m.Mean)), 4)+w.cell.UnitSuffix(), quantity.Text(float64(p.Value), 4)+w.cell.UnitSuffix())
		}
	}
}

// settlingOptions holds what changes are judged against: the grid
// uncertainty, the size of the quantity, and the comparison error.
func (w *work) settlingOptions() settling.Options {
	opt := settling.Options{}
	if w.cell.Grids != nil && w.cell.Grids.U.Known() {
		opt.UGrid = w.yUnit.StepToSI(float64(w.cell.Grids.U))
	}
	if w.cell.Scalar && len(w.s) == 1 {
		opt.Scale, opt.E = math.Abs(w.s[0]), w.s[0]-w.d[0]
	}
	return opt
}

// judgedSeries names a judgement: the same columns of the same bytes, read in
// the same units, under the same options.
type judgedSeries struct {
	hash, table, x, y string
	xUnit, yUnit      quantity.Unit
	opt               settling.Options
}

// judge judges a monitor once for equal ingredients.
func (e *evaluation) judge(c *curve, values []float64, opt settling.Options) settling.Monitor {
	p := c.slip
	key := judgedSeries{e.files[p.File].SHA256 + e.study.File(p.File).readingText(), p.Table, p.X.Column.Value, p.Y.Column.Value, c.xUnit.unit, c.yUnit.unit, opt}
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
	w.tell(n)
	answer := w.q.Answers[n.Code]
	switch {
	case n.Severity == notice.Note:
		return false
	case answer != "":
		w.tell(notice.New("finding-answered", capital(missing), answer))
		return false
	}
	w.cell.Open = append(w.cell.Open, Open{Course: course, Blocks: n.Severity == notice.Stop, Missing: missing, Text: n.Text, Target: Target{Kind: "answer", ID: w.q.id(), Field: n.Code}})
	return n.Severity == notice.Stop
}

// monitorPoints is the number of points of a monitor that a figure draws.
const monitorPoints = 400

func (w *work) monitorLine(c *curve, values []float64, m settling.Monitor) MonitorLine {
	line := MonitorLine{
		Grid: c.slip.Grid.Value, File: w.e.study.fileName(c.slip), Axis: cmp.Or(c.slip.Axis.Value, AxisIterations), XName: c.slip.X.Column.Value,
		Class: string(m.Class), Rule: m.Rule, Mean: w.yNumber(m.Mean), U: w.step(m.U), From: Number(m.Window[0]), To: Number(m.Window[1]),
		Drift: Number(m.Drift), Per: Number(m.Per), Period: Number(m.Period), Cycles: m.Cycles, HalfRange: w.step(m.HalfRange),
		X: []Number{}, Y: []Number{},
	}
	step := max(1, (len(values)+monitorPoints-1)/monitorPoints)
	for i := 0; i < len(values); i += step {
		line.X, line.Y = append(line.X, Number(c.x[i])), append(line.Y, w.yNumber(values[i]))
	}
	return line
}

// judgeBalance adds up what enters (the station column) and leaves (the value
// column); of a history, the last row counts.
func (w *work) judgeBalance(c *curve) {
	in, out, row := 0.0, 0.0, -1
	for i := range c.y {
		if !math.IsNaN(c.x[i]) && !math.IsNaN(c.y[i]) {
			in, out, row = c.x[i], c.y[i], i
		}
	}
	if row < 0 {
		return
	}
	b := settling.Balance(settling.Flux{Kind: settling.Mass, In: []float64{in}, Out: []float64{out}}, w.settlingOptions())
	w.cell.Balances = append(w.cell.Balances, BalanceLine{Grid: c.slip.Grid.Value, File: w.e.study.fileName(c.slip), In: Number(in), Out: Number(out), Net: Number(b.Net), Fraction: Number(b.Fraction), Closed: b.Closed})
	for _, n := range b.Notices {
		if c.slip.Grid.Given() && n.Severity != notice.Note {
			n.Text = "Grid " + c.slip.Grid.Value + ": " + n.Text
		}
		w.finding(0, "a closed balance of "+cmp.Or(c.slip.Grid.Value, "the run"), n)
	}
}

// SettledText says in one line what the monitors and balances show.
func (c *Cell) SettledText() string {
	classes := map[string][]string{}
	var order, texts []string
	for _, m := range c.Monitors {
		if classes[m.Class] == nil {
			order = append(order, m.Class)
		}
		classes[m.Class] = append(classes[m.Class], cmp.Or(m.Grid, "the run"))
	}
	for _, class := range order {
		texts = append(texts, class+": "+strings.Join(classes[class], ", "))
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
	return strings.Join(texts, "; ")
}
