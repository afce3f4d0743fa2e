package chart

import (
	"cmp"
	"errors"
	"fmt"
	"math"
	"slices"
	"strings"

	"github.com/go-echarts/go-echarts/v2/opts"

	"weirmark/core/quantity"
	"weirmark/core/settling"
	"weirmark/core/study"
)

// Measures of the figure of monitors in px.
const (
	monitorHeight = 124
	beneathHeight = 62 // of the residuals beneath
	beneathGap    = 36 // with their name
	monitorGap    = 34 // between panels side by side
)

// mostMonitors is the number of panels of one figure; finer grids go first.
const mostMonitors = 4

// reach is how many times the range of the later half of a monitor its axis
// may cover. A start that lies farther off is left outside.
const reach = 4

const (
	windowName = "averaging window"
	meanName   = "mean over the window"
	driftName  = "drift over the window"
	depthName  = "residuals of the run"
)

// Settling returns the monitors of a cell's runs, one panel each, coarse to
// fine: the value against iterations or time, the averaging window, and the
// mean over it, or the drift where there is one. The residuals of a run, where
// they are given, stand small beneath. Every panel has its own axes; a start that would leave the end
// flat runs out of the axis, and the caption counts what is outside. It fails on
// a cell without a monitor.
func Settling(c study.Cell, id string, t Theme) (Figure, error) {
	if len(c.Monitors) == 0 {
		return Figure{}, errors.New("drawing monitors: the cell has none")
	}
	p, err := newPicture(t)
	if err != nil {
		return Figure{}, err
	}
	monitors := coarseToFine(c)
	shown := monitors[max(0, len(monitors)-mostMonitors):]
	panels := make([]monitorPanel, len(shown))
	digits := 0
	for i, m := range shown {
		panels[i] = newMonitorPanel(m, residualsOf(c, m), len(shown) > 1)
		digits = max(digits, panels[i].y.digits(), panels[i].logs.digits())
	}
	left := 20 + digitWidth*digits
	top := topEdge + keyRow*p.keys(left, topEdge, p.monitorKeys(c, panels)) + nameRow
	each := width - left - rightEdge
	if len(shown) > 1 {
		each = (width - 2*left - rightEdge - monitorGap) / 2
	}
	columns := min(len(shown), 2)
	bottom := top
	for i := range panels {
		if i > 0 && i%columns == 0 {
			top = bottom + nameRow
		}
		x := left + (i%columns)*(each+left+monitorGap)
		p.monitor(c, &panels[i], x, width-x-each, top)
		bottom = max(bottom, top+panels[i].height()+footRow)
	}
	return Figure{
		ID: id + "-monitors", Title: "Monitors of " + subject(c) + ", " + simulation(c),
		Caption: monitorCaption(c, shown, panels), Alt: monitorAlt(c, monitors),
		Height: bottom, Table: monitorTable(c, monitors),
	}.finish(p.option)
}

// coarseToFine returns the monitors in the order of the grid study, those of
// grids that it does not name first.
func coarseToFine(c study.Cell) []study.MonitorLine {
	place := func(m study.MonitorLine) int {
		if c.Grids != nil {
			for i, g := range c.Grids.Points {
				if g.Name == m.Grid {
					return i + 1
				}
			}
		}
		return 0
	}
	list := slices.Clone(c.Monitors)
	slices.SortStableFunc(list, func(a, b study.MonitorLine) int { return cmp.Compare(place(a), place(b)) })
	return list
}

// monitorPanel is one monitor with its axes; early counts the points that lie
// outside the axis.
type monitorPanel struct {
	study.MonitorLine
	rows      [][]any
	x, y      scale
	early     int
	residuals [][][]any // logarithms
	logs      scale
}

// height of the panel with what stands beneath it, in px.
func (m *monitorPanel) height() int {
	if len(m.residuals) == 0 {
		return monitorHeight
	}
	return monitorHeight + beneathGap + beneathHeight
}

// residualsOf returns the residuals of a monitor's run; of a monitor in time,
// whose axis is another, there are none.
func residualsOf(c study.Cell, m study.MonitorLine) []study.ResidualLine {
	var list []study.ResidualLine
	for _, r := range c.Residuals {
		if r.Grid == m.Grid && m.Axis != study.AxisTime && len(r.X) > 0 {
			list = append(list, r)
		}
	}
	return list
}

func newMonitorPanel(m study.MonitorLine, residuals []study.ResidualLine, narrow bool) monitorPanel {
	p := monitorPanel{MonitorLine: m}
	n := min(len(m.X), len(m.Y))
	kept := thin(n, mostMarks, func(i int) float64 { return float64(m.Y[i]) })
	x, whole, late := newBounds(), newBounds(), newBounds()
	for _, i := range kept {
		p.rows = append(p.rows, []any{m.X[i], m.Y[i]})
		x.take(float64(m.X[i]))
		whole.take(float64(m.Y[i]))
		if i >= n/2 || m.From.Known() && m.X[i] >= m.From {
			late.take(float64(m.Y[i]))
		}
	}
	late.take(float64(m.Mean))
	if room := late.hi - late.lo; !late.empty() && room > 0 && whole.hi-whole.lo > float64(reach*room) {
		margin := float64((reach - 1) / 2. * room)
		whole = bounds{math.Max(whole.lo, late.lo-margin), math.Min(whole.hi, late.hi+margin)}
	}
	logs := newBounds()
	for _, r := range residuals {
		rows := [][]any{}
		for i := range min(len(r.X), len(r.Y)) {
			rows = append(rows, []any{r.X[i], r.Y[i]})
			x.take(float64(r.X[i]))
			logs.take(float64(r.Y[i]))
		}
		p.residuals = append(p.residuals, rows)
	}
	p.logs = newScale(logs.padded(0.05), 3)
	steps := 9
	if narrow {
		steps = 5
	}
	p.x, p.y = newScale(x, steps), newScale(whole.padded(0.05), 4)
	for _, i := range kept {
		if y := float64(m.Y[i]); y < p.y.Min || y > p.y.Max {
			p.early++
		}
	}
	return p
}

// along names the axis of a monitor.
func (m *monitorPanel) along() string {
	name := m.Axis
	if name == "" {
		name = study.AxisIterations
	}
	if m.XName != "" && !strings.HasPrefix(name, strings.ToLower(m.XName)) {
		name = short(m.XName)
	}
	if m.x.Exponent != 0 {
		name += " (10" + superscript(m.x.Exponent) + ")"
	}
	return name
}

// named returns the grid and the class of a monitor.
func (m *monitorPanel) named() string { return short(gridOf(m.MonitorLine)) + ": " + m.Class }

func gridOf(m study.MonitorLine) string {
	switch {
	case m.Grid != "":
		return "grid " + m.Grid
	case m.File != "":
		return m.File
	}
	return "run"
}

// valueName names the values of a cell's monitors in a drawing.
func valueName(c study.Cell) string {
	if len(c.Monitors) > 0 && c.Monitors[0].Quantity != "" { // one that stands for the cell's own
		return short(c.Monitors[0].Quantity)
	}
	if c.Symbol != "" {
		return marked(short(c.Symbol))
	}
	return short(c.Quantity)
}

// monitorUnit is the unit of a cell's monitors.
func monitorUnit(c study.Cell) string {
	if len(c.Monitors) > 0 && c.Monitors[0].Quantity != "" {
		return c.Monitors[0].Unit
	}
	return c.Unit
}

func (p *picture) monitor(c study.Cell, m *monitorPanel, left, right, top int) {
	beneath := len(m.residuals) > 0
	frame := panel{
		left: left, right: right, top: top, height: monitorHeight, x: m.x, y: m.y, bare: beneath,
		xName: m.along(), yName: m.named() + ", " + valueName(c) + " (" + unitText(monitorUnit(c), m.y.Exponent) + ")",
	}
	if beneath {
		frame.xName = ""
	}
	n := p.add(frame)
	// The name stands over the numbers of its own axis.
	p.YAxis[n].NameTextStyle.Padding = []int{0, 0, 0, -digitWidth * m.y.digits()}
	if m.From.Known() && m.To.Known() {
		low, high := quantity.Number(m.y.Min), quantity.Number(m.y.Max)
		p.draw(n, 1, band(windowName, shade(p.ink, outerOpacity), [][]any{{m.From, low, high}, {m.To, low, high}}))
		if name, half := m.throughWindow(); name != "" {
			p.draw(n, 3, series{
				Type: "line", Name: name, Symbol: "none", Silent: true, Clip: true, ItemStyle: filled(p.ink),
				LineStyle: &lineStyle{LineStyle: opts.LineStyle{Color: p.ink, Width: 1.2}, Type: limitDash},
				Data:      [][]any{{m.From, m.Mean - half}, {m.To, m.Mean + half}},
			})
		}
	}
	p.draw(n, 2, series{
		Type: "line", Name: monitorName(c), Symbol: "none", Clip: true, ItemStyle: filled(p.models[0]), Data: m.rows,
		LineStyle: &lineStyle{LineStyle: opts.LineStyle{Color: p.models[0], Width: 1.2}},
	})
	if beneath {
		p.residuals(m, left, right, top+monitorHeight+beneathGap)
	}
}

// residuals draws the strip of residuals on the axis of the monitor above.
func (p *picture) residuals(m *monitorPanel, left, right, top int) {
	n := p.add(panel{left: left, right: right, top: top, height: beneathHeight, x: m.x, y: m.logs, xName: m.along(), yName: "residuals (log_{10})"})
	p.YAxis[n].NameTextStyle.Padding = []int{0, 0, 0, -digitWidth * m.y.digits()}
	for _, rows := range m.residuals {
		p.draw(n, 2, series{
			Type: "line", Name: depthName, Symbol: "none", Clip: true, Silent: true, ItemStyle: filled(p.quiet), Data: rows,
			LineStyle: &lineStyle{LineStyle: opts.LineStyle{Color: p.quiet, Width: 1}},
		})
	}
}

// throughWindow returns the name of the line through the window, and half of
// what it rises: the drift of a monitor that drifts, else the mean; no name
// where there is none.
func (m *monitorPanel) throughWindow() (name string, half quantity.Number) {
	switch {
	case !m.Mean.Known():
		return "", 0
	case m.Class == string(settling.Drifting) && m.Change.Known() && m.Per > 0:
		return driftName, m.Change * (m.To - m.From) / m.Per / 2
	}
	return meanName, 0
}

func monitorName(c study.Cell) string { return valueName(c) + " of the run" }

func (p *picture) monitorKeys(c study.Cell, panels []monitorPanel) []entry {
	keys := []entry{{Name: monitorName(c), Icon: lineKey(nil), ItemStyle: filled(p.models[0])}}
	window := func(m monitorPanel) bool { return m.From.Known() && m.To.Known() }
	if slices.ContainsFunc(panels, window) {
		keys = append(keys, entry{Name: windowName, Icon: bandKey, ItemStyle: shade(p.ink, outerOpacity)})
	}
	for _, name := range []string{meanName, driftName} {
		through := func(m monitorPanel) bool {
			line, _ := m.throughWindow()
			return window(m) && line == name
		}
		if slices.ContainsFunc(panels, through) {
			keys = append(keys, entry{Name: name, Icon: lineKey(limitDash), ItemStyle: filled(p.ink)})
		}
	}
	if slices.ContainsFunc(panels, func(m monitorPanel) bool { return len(m.residuals) > 0 }) {
		keys = append(keys, entry{Name: depthName, Icon: lineKey(nil), ItemStyle: filled(p.quiet)})
	}
	return keys
}

// iterative says the uncertainty of a monitor's mean.
func iterative(m study.MonitorLine, unit string) string {
	value, k := m.UIter()
	switch {
	case !value.Known():
		return "no uncertainty"
	case m.Entered != "":
		return "U_iter " + quantity.Text(float64(value), 2) + unit + " (k = 2, entered)"
	case m.Class == string(settling.Unsteady):
		return "U of the mean " + quantity.Text(float64(value), 2) + unit + " (k = " + factor(float64(k)) + ")"
	case k.Known():
		return "U_iter " + quantity.Text(float64(value), 2) + unit + " (k = " + factor(float64(k)) + ")"
	}
	return "U_iter " + quantity.Text(float64(value), 2) + unit + " (a bound, half the range)"
}

func monitorCaption(c study.Cell, shown []study.MonitorLine, panels []monitorPanel) string {
	text := capital(subject(c)) + " against " + axesOf(panels) + ": " + simulation(c)
	if where := setting(c); where != "" {
		text += "; " + where
	}
	parts := make([]string, len(shown))
	early := 0
	for i, m := range shown {
		parts[i] = gridOf(m) + " " + m.Class
		if m.From.Known() && m.To.Known() {
			parts[i] += ", window " + trimmed(m.From, 6) + " to " + trimmed(m.To, 6)
		}
		parts[i] += ", " + iterative(m, unitAfter(study.Cell{Unit: monitorUnit(c)}))
		early += panels[i].early
	}
	text += ". " + capital(strings.Join(parts, "; ")) + "."
	if c.Monitors[0].Quantity != "" {
		text += " The monitors are those of the " + c.Monitors[0].Quantity + ", which stand for it."
	}
	if slices.ContainsFunc(panels, func(m monitorPanel) bool { return len(m.residuals) > 0 }) {
		text += " Beneath, the residuals of the run; their depth is no uncertainty of the quantity."
	}
	if len(shown) > 1 {
		text += " Each panel has its own scale."
	}
	if early > 0 {
		text += " " + counts(early, "point lies", "points lie") + " beyond the value axis."
	}
	if len(shown) < len(c.Monitors) {
		text += fmt.Sprintf(" %d of %d monitors are drawn, those of the finest grids.", len(shown), len(c.Monitors))
	}
	if unit := monitorUnit(c); unit != "" && unit != "1" {
		return text + " Values are in " + unit + "."
	}
	return text + " Values are dimensionless."
}

// axesOf returns "iterations", "time" or both.
func axesOf(panels []monitorPanel) string {
	names := []string{}
	for i := range panels {
		name := panels[i].Axis
		if name == "" {
			name = study.AxisIterations
		}
		if !slices.Contains(names, name) {
			names = append(names, name)
		}
	}
	return strings.Join(names, " and ")
}

func monitorAlt(c study.Cell, monitors []study.MonitorLine) string {
	parts := make([]string, len(monitors))
	for i, m := range monitors {
		parts[i] = gridOf(m) + " " + m.Class
		if m.Mean.Known() {
			parts[i] += ", mean " + beside(m.Mean, m.U)
		}
	}
	return "Monitors of " + subject(c) + ", coarse to fine: " + strings.Join(parts, "; ") + ". The numbers are in the table."
}

// monitorTable has one row per monitor: the points of the lines are in the files.
func monitorTable(c study.Cell, monitors []study.MonitorLine) Table {
	t := Table{Head: []string{"grid", "class", "from", "to", headUnit("mean", monitorUnit(c)), "u", "U"}, Rows: [][]string{}}
	for _, m := range monitors {
		value, _ := m.UIter()
		t.Rows = append(t.Rows, []string{
			gridOf(m), m.Class, trimmed(m.From, 6), trimmed(m.To, 6), beside(m.Mean, m.U), quantity.Text(float64(m.U), 2), quantity.Text(float64(value), 2),
		})
	}
	return t
}
