package message

import (
	"cmp"
	"math"
	"slices"
	"strconv"

	"weirmark/core/metric"
	"weirmark/core/notice"
	"weirmark/core/plausibility"
	"weirmark/core/profile"
	"weirmark/core/quantity"
	"weirmark/core/refinement"
	"weirmark/core/settling"
	"weirmark/core/study"
	"weirmark/core/tablefile"
)

// slipCards says of every slip what was read and how it is used.
func (s *Session) slipCards() []SlipCard {
	cards := []SlipCard{}
	var slips []*study.Slip
	var tables []tablefile.Table
	for i := range s.study.Slips {
		p := &s.study.Slips[i]
		f := s.study.File(p.File)
		if f == nil {
			continue
		}
		read := s.readOnce(*f)
		t, err := read.Table(p.Table)
		card := SlipCard{ID: p.ID, File: p.File, Name: f.Name, Notices: []string{}, Entries: []Entry{}, Sketch: Sketch{Own: [][2]study.Number{}, Others: [][][2]study.Number{}, Zero: study.None}}
		if err != nil {
			card.Read = asNotice(err).Text
			cards, slips, tables = append(cards, card), append(slips, p), append(tables, t)
			continue
		}
		card.Read = readWords(t, p.X.Column.Value)
		if p.Role.Given() && p.Role.Value != study.Unused {
			card.Read += " Used: " + s.study.Mapping(p, t) + "."
		}
		card.Entries = slipEntries(s.study, p, t)
		for i := range card.Entries {
			e := &card.Entries[i]
			e.Open = e.By == study.Guessed || e.Value == "" && needed(p, e.Target.Field)
			if e.Open {
				card.Open++
			}
			e.Aside = !e.Open && e.Value == "" && !slices.Contains(alwaysTold, e.Target.Field)
		}
		for _, n := range read.Notices {
			if n.Severity != notice.Note {
				card.Notices = append(card.Notices, n.Text)
			}
		}
		card.Sketch = s.sketch(p, t)
		cards, slips, tables = append(cards, card), append(slips, p), append(tables, t)
	}
	group(cards, slips, tables)
	return cards
}

// readWords says what a table holds, and the order of its stations.
func readWords(t tablefile.Table, stations string) string {
	text := ""
	if t.Name != "" {
		text = "Table “" + t.Name + "”: "
	}
	text += quantity.Counted(t.Rows(), "row") + ", " + quantity.Counted(len(t.Columns), "column") + ", order kept"
	if x, err := t.Column(stations); stations != "" && err == nil {
		text += " (hash of " + x.Name + " in file order: " + study.OrderHash(x.Values) + ")"
	}
	text += "."
	for i, c := range t.Columns {
		if i == 6 {
			return text + " And " + quantity.Counted(len(t.Columns)-6, "further column") + "."
		}
		text += " " + columnWords(c)
	}
	return text
}

func columnWords(c tablefile.Column) string {
	text := c.Name
	if c.Unit != "" {
		text += " in " + c.Unit
	}
	lo, hi, missing := math.Inf(1), math.Inf(-1), 0
	for _, v := range c.Values {
		if math.IsNaN(v) {
			missing++
			continue
		}
		lo, hi = min(lo, v), max(hi, v)
	}
	switch {
	case lo > hi:
		return text + ": text."
	case lo == hi:
		text += ": " + quantity.Text(lo, 4)
	default:
		text += ": " + quantity.Text(lo, 4) + " to " + quantity.Text(hi, 4)
	}
	if missing > 0 {
		text += ", " + strconv.Itoa(missing) + " missing"
	}
	return text + "."
}

// needed reports whether an empty entry keeps a slip from being used.
func needed(p *study.Slip, field string) bool {
	role := p.Role.Value
	wholeRun := role == study.Balance || role == study.Residual
	switch field {
	case "role", "case":
		return role != study.Unused
	case "y.column":
		return role != study.Unused && !p.Y.Formula.Given()
	case "quantity", "y.unit":
		return role != study.Unused && !wholeRun
	case "x.unit":
		return p.X.Given() && !wholeRun && role != study.Monitor
	case "scale":
		return role == study.Balance && !p.X.Column.Given()
	case "u_factor", "u_basis":
		return p.U.Column.Given()
	case "bars_as":
		return p.Upper.Column.Given()
	case "digitised.x_scale", "digitised.x_zero", "digitised.y_scale", "digitised.y_zero", "digitised.line", "digitised.pixel":
		return p.Digitised.Is.Value == "yes"
	case "input", "input_at":
		return p.Role.Value == study.InputRun
	case "size.column":
		return p.Role.Value == study.GridValues
	case "step.column":
		return p.Role.Value == study.StepValues
	}
	return false
}

// alwaysTold are the entries of a slip that are in sight even where they are empty.
var alwaysTold = []string{"role", "case", "quantity", "model", "x.column", "y.column", "u.column", "grid"}

// slipEntries are the entries of a slip in the order in which one reads them.
func slipEntries(s *study.Study, p *study.Slip, t tablefile.Table) []Entry {
	columns := []Option{{"", "–"}}
	for _, c := range t.Columns {
		columns = append(columns, Option{c.Name, c.Name})
	}
	free := []Option{}
	entry := func(field, label string, f study.Field, options []Option, hint string) Entry {
		return Entry{Target: study.Target{Kind: "slip", ID: p.ID, Field: field}, Label: label, Value: f.Value, By: f.By, Options: options, Hint: hint}
	}
	list := []Entry{
		entry("role", "looks like", p.Role, []Option{{study.Simulation, "a simulation"}, {study.GridValues, "values over grids"}, {study.StepValues, "values over time steps"}, {study.ExactErrors, "errors against a known solution"}, {study.ExactSolution, "a known solution"}, {study.InputRun, "a run with one input changed"}, {study.Members, "runs with sampled inputs"}, {study.Reference, "reference data"}, {study.Replicates, "repeated readings at the stations"}, {study.Monitor, "a monitor of one run"}, {study.Balance, "a balance of one run"}, {study.Residual, "a residual of one run"}, {study.Precision, "the run again, in other precision"}, {study.Unused, "not used"}}, ""),
	}
	if p.Role.Value == study.Unused {
		return list
	}
	list = append(list,
		entry("case", "case", p.Case, free, "e.g. C1"),
		entry("quantity", "quantity", p.Quantity, free, quantityHint(p)))
	if p.Role.Value != study.Reference && p.Role.Value != study.Replicates {
		list = append(list, entry("model", "model", p.Model, free, "e.g. A"))
	}
	switch p.Role.Value {
	case study.StepValues:
		list = append(list, entry("step.column", "time steps in", p.Step.Column, columns, ""), entry("step.unit", "their unit", p.Step.Unit, free, "e.g. s"), entry("size.column", "cells in", p.Size.Column, columns, "empty: one grid"))
	case study.ExactErrors:
		list = append(list, entry("x.column", "spacing in", p.X.Column, columns, "empty: cells are given"), entry("size.column", "cells in", p.Size.Column, columns, ""), entry("dimensions", "the grids have", p.Dimensions, []Option{{"", "–"}, {"1", "one dimension"}, {"2", "two dimensions"}, {"3", "three dimensions"}}, ""))
	case study.GridValues:
		list = append(list, entry("size.column", "cells in", p.Size.Column, columns, ""), entry("grid", "grid names in", p.Grid, columns, ""))
	default:
		label := map[string]string{study.Monitor: "iterations or time in", study.Residual: "iterations in", study.Balance: "what enters in"}[p.Role.Value]
		list = append(list, entry("x.column", cmp.Or(label, "stations in"), p.X.Column, columns, "none for a single value"))
		if p.Role.Value == study.Simulation || p.Role.Value == study.Reference {
			list = append(list, entry("x.formula", "or stations by a formula", p.X.Formula, free, "e.g. x - x_0; it takes the place of the column"))
		}
		if p.X.Given() && p.Role.Value != study.Residual {
			list = append(list, entry("x.unit", "unit of stations", p.X.Unit, free, "m, mm, … or 1 for a pure number"))
		}
	}
	if p.Role.Value == study.Monitor {
		list = append(list, entry("axis", "they are", p.Axis, []Option{{study.AxisIterations, "iterations"}, {study.AxisTime, "samples in time"}}, ""))
	}
	list = append(list,
		entry("y.column", map[bool]string{true: "what leaves in", false: "values in"}[p.Role.Value == study.Balance], p.Y.Column, columns, ""),
		entry("y.unit", "unit of values", p.Y.Unit, free, "Pa, m/s, … or 1 for a pure number"))
	switch p.Role.Value {
	case study.Residual:
		list = list[:len(list)-1] // decades have no unit
	case study.Balance:
		list = append(list, entry("balance_of", "of", p.BalanceOf, []Option{{"", "mass"}, {string(settling.Energy), "energy"}, {string(settling.Species), "a species"}, {string(settling.Force), "forces: enters drives, leaves holds back"}}, ""),
			entry("scale", "the flux that matters", p.Scale, free, "in the unit of the file; empty: what enters"))
		if p.Scale.Given() {
			list = append(list, entry("scale_name", "which is", p.ScaleName, free, "e.g. the heat exchanged"))
		}
	}
	if p.Role.Value != study.Balance && p.Role.Value != study.Residual {
		list = append(list, entry("y.formula", "or values by a formula", p.Y.Formula, free, "e.g. (p - p_ref)/q or sqrt(\"u u in m^2/s^2\"): columns and symbols of the case, in the place of the column"))
	}
	if unit, err := quantity.Parse(p.Y.Unit.Value); err == nil && unit.Dimension == pascal.Dimension {
		list = append(list, entry("datum", "the pressure is", p.Datum, []Option{{"", "–"}, {study.DatumAbsolute, "absolute"}, {study.DatumGauge, "gauge"}, {study.DatumDifference, "a difference to p_ref"}}, ""))
	}
	list = append(list, forceEntries(p, columns, entry)...)
	switch p.Role.Value {
	case study.Monitor, study.Balance, study.Residual, study.Precision:
		list = append(list, entry("grid", "grid", p.Grid, free, "e.g. G4"))
	}
	if p.X.Given() && (p.Role.Value == study.Simulation || p.Role.Value == study.Reference) {
		list = append(list, entry("derive", "taken", p.Derive, []Option{{"", "as a curve"}, {study.DeriveLift, "as the lift of a closed section"}}, ""))
		loop := false
		if x, err := t.Column(p.X.Column.Value); err == nil {
			loop = profile.Loop(x.Values)
		}
		if loop || p.Branch.Given() {
			list = append(list, entry("branch", "branch", p.Branch, []Option{{"", "the whole"}, {profile.Upper, "upper"}, {profile.Lower, "lower"}, {profile.First, "first in the file"}, {profile.Second, "second in the file"}}, "upper and lower need the second coordinate"))
		}
		if second := secondColumn(s, p); second != "" {
			list = append(list, entry("contour.column", second+" in", p.Contour.Column, columns, ""), entry("contour.unit", "its unit", p.Contour.Unit, free, "m, mm, … or 1 for a pure number"))
		}
	}
	if p.Role.Value == study.InputRun {
		list = append(list, entry("input", "changed input", p.Input, free, "as in the source line, e.g. U"), entry("input_at", "its value here", p.InputAt, free, ""), entry("grid", "grid", p.Grid, free, "e.g. G4"))
	}
	list = append(list, curveEntries(p, t, entry)...)
	if p.Role.Value == study.Simulation {
		list = append(list, entry("grid", "grid", p.Grid, free, "e.g. G4"), entry("cells", "cells", p.Cells, free, "number of cells"))
		if p.Grid.Given() || p.Cells.Given() {
			list = append(list, entry("y_plus", "y+ of the first cells", p.YPlus, free, ""), entry("settings", "settings of the run", p.Settings, free, "key: value; key: value, beside those the file states"))
		}
	}
	if p.Role.Value == study.Replicates || p.Role.Value == study.Reference && !p.X.Column.Given() && t.Rows() > 1 {
		for _, l := range []struct{ field, label string }{{"facility", "facility in"}, {"day", "day in"}, {"rig", "set-up in"}, {"run", "run in"}} {
			list = append(list, entry("levels."+l.field, l.label, p.Level(l.field), columns, "tells repeats apart"))
		}
	}
	if p.Role.Value == study.Reference && p.X.Column.Given() {
		list = append(list, figureEntries(p, entry)...)
	}
	if p.Role.Value == study.Reference {
		list = append(list, entry("u.column", "uncertainty in", p.U.Column, columns, ""))
		if p.U.Column.Given() {
			list = append(list,
				entry("u.unit", "its unit", p.U.Unit, free, "as the values, or % of reading"),
				entry("u_factor", "its coverage", p.UFactor, coverages(), "what the bars mean"),
				entry("upper.column", "upper side in", p.Upper.Column, columns, "none: the same on both sides"))
			if p.Upper.Column.Given() {
				list = append(list, entry("upper.unit", "its unit", p.Upper.Unit, free, "as the values, or %"),
					entry("bars_as", "both are", p.BarsAs, []Option{{"", "–"}, {study.BarsWidths, "half-widths"}, {study.BarsLimits, "limits"}}, ""))
			}
			if p.U.Unit.Value == "%" && p.Y.Unit.Value != "%" {
				list = append(list, entry("u_basis", "percent of", p.UBasis, free, "reading, or the number of the full scale"))
			}
		}
	}
	return list
}

// forceUnits are units of what forceEntries are shown for, beside pure numbers
// without stations.
var forceUnits = []string{"N", "N m", "N/m"}

// forceEntries say what is made of a force or a moment.
func forceEntries(p *study.Slip, columns []Option, entry func(field, label string, f study.Field, options []Option, hint string) Entry) []Entry {
	if p.Role.Value != study.Simulation && p.Role.Value != study.Reference || p.Y.Formula.Given() {
		return nil
	}
	f := &p.Force
	show := f.As.Given() || f.Half.Given() || !p.X.Given() && p.Y.Unit.Value == "1"
	unit, err := quantity.Parse(p.Y.Unit.Value)
	for _, symbol := range forceUnits {
		of, bad := quantity.Parse(symbol)
		show = show || err == nil && bad == nil && unit.Same(of)
	}
	if !show {
		return nil
	}
	list := []Entry{
		entry("force.as", "they become", f.As, []Option{{"", "what they are"}, {study.AsLift, "lift: N cos α − A sin α, of normal forces N"}, {study.AsDrag, "drag: N sin α + A cos α, of normal forces N"}, {study.AsMoment, "moments M about x_c: M + (x_c − x_m) N − (z_c − z_m) A"}}, "α, x_m and x_c from the case card"),
		entry("force.half", "they are", f.Half, []Option{{"", "of the whole model"}, {"yes", "of a half model: doubled"}}, "a column of uncertainty is that of the result"),
	}
	if f.As.Value == study.AsMoment {
		list = append(list, entry("force.normal", "normal force N in", f.Normal, columns, ""))
	}
	if f.As.Given() {
		list = append(list, entry("force.axial", "axial force A in", f.Axial, columns, ""), entry("force.unit", "unit of the forces", f.Unit, []Option{}, "empty: as the values, N for moments in N m"))
	}
	return list
}

func quantityHint(p *study.Slip) string {
	if p.Role.Value == study.Balance || p.Role.Value == study.Residual {
		return "empty: all of the case"
	}
	return "e.g. drag coefficient"
}

// figureEntries are the record of a curve that was read off a figure, and the
// flow rate that its integral should be.
func figureEntries(p *study.Slip, entry func(field, label string, f study.Field, options []Option, hint string) Entry) []Entry {
	d := &p.Digitised
	list := []Entry{entry("digitised", "from", d.Is, []Option{{"", "a file of readings"}, {"yes", "a figure, digitised"}}, "")}
	if d.Is.Value == "yes" {
		list = append(list,
			entry("digitised.x_scale", "u of the x scale in %", d.XScale, []Option{}, "standard, from the calibration of the axis"),
			entry("digitised.x_zero", "u of its zero", d.XZero, []Option{}, "in the unit of the stations"),
			entry("digitised.y_scale", "u of the y scale in %", d.YScale, []Option{}, "standard"),
			entry("digitised.y_zero", "u of its zero", d.YZero, []Option{}, "in the unit of the values"),
			entry("digitised.line", "line thickness", d.Line, []Option{}, "in the unit of the values"),
			entry("digitised.pixel", "pixel", d.Pixel, []Option{}, "in the unit of the values"))
	}
	list = append(list, entry("flow_rate", "its integral should be", p.FlowRate, []Option{}, "a stated flow rate, in the units of values times stations"))
	if p.FlowRate.Given() {
		list = append(list, entry("flow_rate_u", "with u", p.FlowRateU, []Option{}, "standard; empty: taken as exact"))
	}
	return list
}

// curveEntries are the entries of a curve that apply to few: they show where
// the table calls for them, or where they are filled.
func curveEntries(p *study.Slip, t tablefile.Table, entry func(field, label string, f study.Field, options []Option, hint string) Entry) []Entry {
	if !p.X.Column.Given() || p.Role.Value != study.Simulation && p.Role.Value != study.Reference {
		return nil
	}
	list := []Entry{}
	x, errX := t.Column(p.X.Column.Value)
	if p.Abscissa.Given() || p.Contour.Column.Given() || errX == nil && profile.Loop(x.Values) && len(t.Columns) > 2 {
		list = append(list, entry("abscissa", "abscissa", p.Abscissa, []Option{{"", "the stations"}, {study.AlongArc, "arc length s"}, {study.AlongArcPart, "s over its whole"}}, "needs the second coordinate"))
	}
	if y, err := t.Column(p.Y.Column.Value); err == nil && errX == nil && (p.Repeats.Given() || len(plausibility.Repeats(x.Values, y.Values)) > 0) {
		list = append(list, entry("repeats", "different values at one station", p.Repeats, []Option{{"", "–"}, {study.Averaged, "averaged"}, {study.KeptBoth, "both kept, as a jump"}, {study.FirstKept, "the first kept, others left out"}}, "stays open until it is answered"))
	}
	if p.Rows.Column.Given() || len(t.Columns) > 2 {
		columns := []Option{{"", "all"}}
		for _, c := range t.Columns {
			columns = append(columns, Option{c.Name, "those selected by " + c.Name})
		}
		list = append(list, entry("rows.column", "rows used", p.Rows.Column, columns, "one line out of a surface"))
		if p.Rows.Column.Given() {
			list = append(list, entry("rows.from", "from", p.Rows.From, []Option{}, "as the file writes it"), entry("rows.to", "to", p.Rows.To, []Option{}, "as the file writes it"))
		}
	}
	if p.Role.Value == study.Simulation {
		list = append(list, entry("sampling", "values held at", p.Sampling, []Option{{"", "–"}, {study.AtNodes, "nodes"}, {study.AtCellCentres, "cell centres"}, {study.AtFaces, "faces"}}, "recorded, changes nothing"))
	}
	return list
}

// coverages are the answers to what a stated uncertainty means.
func coverages() []Option {
	return []Option{{"", "–"}, {"standard", "standard, k = 1"}, {"2", "expanded, k = 2"}, {"95 %", "95 %, normal"}, {"limits", "limits, rectangular"}, {"unknown", "unknown"}}
}

// sketchPoints is the number of points of a sketch.
const sketchPoints = 60

// mostOthers is the number of other curves a sketch is drawn beside.
const mostOthers = 4

// sketch draws the columns of a slip beside the other slips of its question.
func (s *Session) sketch(p *study.Slip, t tablefile.Table) Sketch {
	own := points(p, t)
	var others [][][2]float64
	for i := range s.study.Slips {
		o := &s.study.Slips[i]
		if o.ID == p.ID || o.Case.Value != p.Case.Value || o.Quantity.Value != p.Quantity.Value || len(others) == mostOthers {
			continue
		}
		if f := s.study.File(o.File); f != nil {
			if t, err := s.readOnce(*f).Table(o.Table); err == nil {
				others = append(others, points(o, t))
			}
		}
	}
	box := [4]float64{math.Inf(1), math.Inf(-1), math.Inf(1), math.Inf(-1)}
	for _, list := range append([][][2]float64{own}, others...) {
		for _, at := range list {
			box = [4]float64{min(box[0], at[0]), max(box[1], at[0]), min(box[2], at[1]), max(box[3], at[1])}
		}
	}
	sketch := Sketch{Own: scaled(own, box), Others: [][][2]study.Number{}, Zero: study.None}
	if height := box[3] - box[2]; height > 0 && !math.IsInf(height, 0) {
		sketch.Zero = study.Number(-box[2] / height)
	}
	for _, list := range others {
		sketch.Others = append(sketch.Others, scaled(list, box))
	}
	return sketch
}

// points returns the rows of a slip as written, thinned. A scalar has its row
// number for a station.
func points(p *study.Slip, t tablefile.Table) [][2]float64 {
	y, err := t.Column(p.Y.Column.Value)
	if err != nil {
		return nil
	}
	station := p.X.Column.Value
	if p.Role.Value == study.StepValues {
		station = p.Step.Column.Value
	}
	if p.Role.Value == study.GridValues {
		station = p.Size.Column.Value
	}
	x, err := t.Column(station)
	rows := t.Rows()
	step := max(1, rows/sketchPoints)
	var list [][2]float64
	for i := 0; i < rows; i += step {
		at := float64(i)
		if err == nil {
			at = x.Values[i]
		}
		if !math.IsNaN(at) && !math.IsNaN(y.Values[i]) {
			list = append(list, [2]float64{at, y.Values[i]})
		}
	}
	return list
}

func scaled(list [][2]float64, box [4]float64) [][2]study.Number {
	out := [][2]study.Number{}
	unit := func(v, lo, hi float64) study.Number {
		if hi == lo {
			return 0.5
		}
		return study.Number(math.Round(1000*(v-lo)/(hi-lo)) / 1000)
	}
	for _, at := range list {
		out = append(out, [2]study.Number{unit(at[0], box[0], box[1]), unit(at[1], box[2], box[3])})
	}
	return out
}

// choices are the decisions whose effect shows at once.
func choices(q *study.Question, scalar bool) []Entry {
	c := q.Choices
	entry := func(field, label, value string, options []Option, hint string) Entry {
		return Entry{Target: study.Target{Kind: "question", ID: questionID(q), Field: "choices." + field}, Label: label, Value: value, By: study.Entered, Options: options, Hint: hint}
	}
	yes := func(b bool) string {
		if b {
			return "yes"
		}
		return "no"
	}
	rule, rules := c.Rule, []Option{}
	if rule == "" {
		rule = refinement.RuleThree
	}
	for _, r := range refinement.Rules {
		rules = append(rules, Option{r, study.RuleName(r)})
	}
	list := []Entry{
		entry("k", "k of the statement", quantity.Typed(c.K), []Option{}, "2 covers about 95 % of a normal distribution"),
		entry("k_num", "k_num, from U of the grids to u_num", quantity.Typed(c.KNum), []Option{}, "1.15: error of the fine grid a shifted Gaussian; 2: normal"),
		entry("bounded", "order of the three finest", yes(c.Bounded), []Option{{"yes", "bounded rule"}, {"no", "plain rule"}}, ""),
		entry("rule", "grids of one value", rule, rules, "along a curve they act with the common order"),
		entry("safety", "safety factor of three grids", quantity.Typed(cmp.Or(c.Safety, refinement.UsualSafety)), []Option{}, "1.25 with an observed order, 3 where none is credible"),
		entry("formal", "formal order", quantity.Typed(c.Formal), []Option{}, ""),
		entry("common_set", "models at different stations", yes(c.CommonSet), []Option{{"no", "not set against each other"}, {"yes", "compared at the shared stations"}}, ""),
		entry("dimension", "grids are", strconv.Itoa(c.Dimension), []Option{{"2", "two-dimensional"}, {"3", "three-dimensional"}}, ""),
		entry("k_student", "k follows", yes(c.KStudent), []Option{{"no", "as entered"}, {"yes", "from the effective degrees of freedom, 95 %"}}, ""),
		entry("sampled", "interval by sampling", yes(c.Sampled), []Option{{"no", "where bars have two sides"}, {"yes", "always"}}, ""),
		entry("interpolation", "simulation at the stations", string(c.Interpolation), []Option{{"linear", "linear"}, {"monotone", "monotone cubic"}}, "no spline: it overshoots at a jump"),
		entry("u_interp", "interpolation uncertainty", yes(c.UInterp), []Option{{"yes", "counted"}, {"no", "not counted"}}, ""),
		entry("num_linear", "parts of u_num", yes(c.NumLinear), []Option{{"no", "independent: root of the squares"}, {"yes", "dependent: sum"}}, "grid and iteration errors may depend on each other"),
		entry("num_shared", "u_num between stations", yes(c.NumShared), []Option{{"no", "independent"}, {"yes", "the same error at all"}}, ""),
	}
	if scalar {
		return list
	}
	list = append(list,
		entry("gap", "a gap is longer than, times the median spacing", quantity.Typed(c.Gap), []Option{}, "10: a stretched grid grows by less than 2 a row"),
		entry("probe", "probe averages over, in the unit of the stations", orNone(c.Probe), []Option{}, "none: values at points"),
		entry("period", "stations repeat after", orNone(c.Period), []Option{}, "none: not periodic; e.g. 360"))
	smooth := ""
	if c.Smooth > 0 {
		smooth = strconv.Itoa(c.Smooth)
	}
	return append(list, entry("smooth", "changes of sign smoothed over, rows", smooth, []Option{}, "none: as read; curves are drawn and compared as read"))
}

// orNone is a number, or nothing for zero.
func orNone(v float64) string {
	if v == 0 {
		return ""
	}
	return quantity.Typed(v)
}

// questionEntries are the requirement and what is known of the reference.
func questionEntries(q *study.Question) []Entry {
	entry := func(field, label, value string, by study.Certainty, options []Option, hint string) Entry {
		open := by == study.Guessed || value == "" && (field == "kind" || field == "use")
		return Entry{Target: study.Target{Kind: "question", ID: questionID(q), Field: field}, Label: label, Value: value, By: by, Options: options, Hint: hint, Open: open}
	}
	value, percent, who, date := "", "yes", "", ""
	if r := q.Requirement; r != nil {
		value, who, date = quantity.Typed(r.Value), r.Who, r.Date
		if !r.Percent {
			percent = "no"
		}
	}
	return []Entry{
		entry("requirement.value", "accuracy requirement ±", value, study.Entered, []Option{}, "the model error must stay within this"),
		entry("requirement.percent", "in", percent, study.Entered, []Option{{"yes", "% of |D|"}, {"no", "the unit of the data"}}, ""),
		entry("requirement.who", "set by", who, study.Entered, []Option{}, "who owns the decision"),
		entry("requirement.date", "on", date, study.Entered, []Option{}, "date"),
		entry("kind", "the reference is", q.Kind.Value, q.Kind.By, []Option{{"", "–"}, {study.KindTest, "a test"}, {study.KindLaw, "a law"}, {study.KindCorrelation, "a correlation"}, {study.KindSimulation, "another simulation"}}, ""),
		entry("use", "the data were used for", q.Use.Value, q.Use.By, []Option{{"", "–"}, {study.UseValidation, "comparison only"}, {study.UseTuning, "setting the model"}, {study.UseBoth, "in part for setting the model"}}, ""),
		entry("known", "when the simulation was made the data were", q.Known.Value, q.Known.By, []Option{{"", "–"}, {study.Blind, "not known"}, {study.Aware, "known"}}, ""),
		entry("reference_id", "name of the reference", q.ReferenceID, study.Entered, []Option{}, "e.g. campaign and run"),
		entry("resolution", "the step seen in the data", q.Resolution, study.Entered, []Option{{"", "not a source"}, {study.Counted, "counted as a source"}}, ""),
		entry("no_input", "the inputs have no uncertainty because", q.NoInput, study.Entered, []Option{}, "empty: not decided"),
		entry("baseline", "compare the change from case", q.Baseline, study.Entered, []Option{}, "a case with one value of the same quantity; empty: none"),
		entry("condition", "condition", q.Condition, study.Entered, []Option{}, "e.g. α = 4.2°"),
		entry("symbol", "symbol", q.Symbol, study.Entered, []Option{}, "e.g. Cd"),
		entry("corrected.state", "for walls and supports the data are", q.Corrected.State, study.Entered, []Option{{"", "not known"}, {study.Corrected, "corrected"}, {study.Uncorrected, "uncorrected"}}, ""),
		entry("corrected.how", "how, and by how much", q.Corrected.How, study.Entered, []Option{}, "its uncertainty is a source of its own"),
		entry("form.name", "the values are compared as", q.Form.Name, study.Entered, formOptions(false), ""),
		entry("form.simulation", "simulated values", q.Form.Simulation, study.Entered, sideOptions(), ""),
		entry("form.data", "measured values", q.Form.Data, study.Entered, sideOptions(), ""),
		entry("x_form.name", "the stations are compared as", q.XForm.Name, study.Entered, formOptions(true), ""),
		entry("x_form.simulation", "stations of the simulation", q.XForm.Simulation, study.Entered, sideOptions(), ""),
		entry("x_form.data", "stations of the data", q.XForm.Data, study.Entered, sideOptions(), ""),
		entry("plan", "the stations are", locked(q), study.Entered, []Option{{"", "open"}, {study.Locked, "locked"}}, "locked before results are seen: none was chosen by its result"),
		entry("downward", "drawn", map[bool]string{true: "yes", false: "no"}[q.Downward], study.Entered, []Option{{"no", "positive upward"}, {"yes", "negative upward"}}, ""),
	}
}

// locked says whether the stations of a question are locked.
func locked(q *study.Question) string {
	if q.Plan == nil {
		return ""
	}
	return study.Locked
}

// scoreEntries are the measures that a question asks for.
func scoreEntries(q *study.Question) EntryList {
	a := study.Scoring{}
	if q.Scores != nil {
		a = *q.Scores
	}
	entry := func(field, label, value string, options []Option, hint string) Entry {
		return Entry{Target: study.Target{Kind: "question", ID: questionID(q), Field: "scores." + field}, Label: label, Value: value, By: study.Entered, Options: options, Hint: hint}
	}
	free, asked := []Option{}, []Option{{"no", "not asked for"}, {"yes", "asked for"}}
	yes := func(b bool) string { return map[bool]string{true: "yes", false: "no"}[b] }
	typed := func(v float64) string {
		if q.Scores == nil {
			return ""
		}
		return quantity.Typed(v)
	}
	list := []Entry{
		entry("scale", "measures as parts of", a.Scale, []Option{{"", "the range of D, RMSE alone"}, {study.ScaleRange, "the range of D"}, {study.ScaleMean, "the mean of |D|"}, {study.ScaleSpeed, "the reference speed of the case"}, {study.ScalePressure, "the dynamic pressure of the case"}, {study.ScaleEntered, "an entered scale"}}, ""),
		entry("percent", "E in percent of |D|", yes(a.Percent), asked, "at each station where |D| is large enough"),
		entry("marine", "order of |E|, U_V and the requirement", yes(a.Marine), asked, "all at 95 %: one of six orders at each station"),
		entry("percent_above", "where |D| exceeds this percentage of its largest value", typed(a.PercentAbove), free, "0: 2"),
		entry("weights", "stations are weighted", a.Weights, free, "spacing, or a column of the reference; empty: all alike"),
		entry("dispersion", "scores of the dispersion field", yes(a.Dispersion), asked, "FB, NMSE, FAC2, NAD, MG, VG: values that are not negative"),
		entry("threshold", "below this a ratio says nothing, in the unit of the data", typed(a.Threshold), free, "pairs below it count as met in FAC2"),
		entry("fraction", "hit rate within, as a fraction of D", typed(a.Fraction), free, "e.g. 0.25"),
		entry("allowance", "or within, in the unit of the data", typed(a.Allowance), free, "from the uncertainty of the data"),
		entry("allowance_k", "or within this many u_D", typed(a.AllowanceK), free, "0: the value above"),
		entry("correlation", "correlation, with slope and offset", yes(a.Correlation), asked, ""),
		entry("distribution", "limits of agreement, area between distributions", yes(a.Distribution), asked, ""),
	}
	if a.Scale == study.ScaleEntered {
		list = append(list, entry("scale_value", "scale, in the unit of the data", quantity.Typed(a.ScaleValue), free, ""))
	}
	return EntryList{Course: 3, Title: "Measures", Hint: "each is printed with its scale", Items: []EntryItem{{Entries: list}}}
}

// criterionEntries are the criteria that scores are held against; changing one
// of those that the program carries makes the list the question's own.
func criterionEntries(q *study.Question, list EntryList) EntryList {
	if q.Scores == nil || !(q.Scores.Dispersion || q.Scores.Correlation || q.Scores.Fraction > 0 || q.Scores.Allowance > 0 || q.Scores.AllowanceK > 0 || q.Scores.Criteria != nil) {
		return list
	}
	scores := []Option{}
	for _, k := range metric.ScoreKeys {
		scores = append(scores, Option{k, k})
	}
	for i, c := range study.CriteriaOf(q) {
		at := func(field string) study.Target {
			return study.Target{Kind: study.ItemCriterion, ID: questionID(q), Field: strconv.Itoa(i) + "." + field}
		}
		entry := func(field, label, value string, options []Option, hint string) Entry {
			return Entry{Target: at(field), Label: label, Value: value, By: study.Entered, Options: options, Hint: hint}
		}
		free := []Option{}
		item := EntryItem{Remove: &study.Target{Kind: study.ItemCriterion, ID: questionID(q), Field: strconv.Itoa(i)}, Entries: []Entry{
			entry("name", "criterion", c.Name, free, ""), entry("score", "of", c.Score, scores, ""),
			entry("low", "from", quantity.Typed(c.Low), free, ""), entry("high", "to", quantity.Typed(c.High), free, ""),
			entry("scope", "scope", c.Scope, free, "paired or unpaired, maxima or all points"), entry("source", "source", c.Source, free, "a document, or “from memory”")}}
		if c.Score == "q" {
			item.Entries = append(item.Entries, entry("fraction", "for a fraction of D", quantity.Typed(c.Fraction), free, "0: any"))
		}
		list.Items = append(list.Items, item)
	}
	return list
}

// lists are the runs, the conditions of both sides, the regions, the point of
// application and the card of the case.
func lists(s *study.Study, q *study.Question, c *study.Cell) []EntryList {
	id := questionID(q)
	entry := func(kind, id, field, label, value string, options []Option, hint string) Entry {
		return Entry{Target: study.Target{Kind: kind, ID: id, Field: field}, Label: label, Value: value, By: study.Entered, Options: options, Hint: hint}
	}
	list := func(course int, kind, id, title, hint string) EntryList {
		return EntryList{Course: course, Title: title, Hint: hint, Add: &study.Target{Kind: kind, ID: id}, Items: []EntryItem{}}
	}
	item := func(kind, id string, i int, entries ...Entry) EntryItem {
		for j := range entries {
			entries[j].Target.Field = strconv.Itoa(i) + "." + entries[j].Target.Field
		}
		return EntryItem{Remove: &study.Target{Kind: kind, ID: id, Field: strconv.Itoa(i)}, Entries: entries}
	}
	conditions := list(2, study.ItemCondition, id, "Conditions of both sides", "what was set in the simulation and what the test had")
	for i, m := range q.Conditions {
		k := study.ItemCondition
		conditions.Items = append(conditions.Items, item(k, id, i,
			entry(k, id, "name", "condition", m.Name, []Option{}, "e.g. α"), entry(k, id, "unit", "unit", m.Unit, []Option{}, "e.g. °"),
			entry(k, id, "simulation", "simulation", quantity.Typed(m.Simulation), []Option{}, ""), entry(k, id, "data", "data", quantity.Typed(m.Data), []Option{}, ""),
			entry(k, id, "sensitivity", "change of the quantity for one unit", study.OptionalText(m.Sensitivity), []Option{}, "empty: not known"),
			entry(k, id, "handling", "a difference is", m.Handling, []Option{{"", "open"}, {study.Corrected, "corrected"}, {study.AsInput, "counted as an input uncertainty"}, {study.Tolerated, "accepted, with a reason"}}, ""),
			entry(k, id, "why", "reason", m.Why, []Option{}, "")))
	}
	regions := list(3, study.ItemRegion, id, "Regions", "parts of the stations that are told apart")
	for i, r := range q.Regions {
		k := study.ItemRegion
		regions.Items = append(regions.Items, item(k, id, i, entry(k, id, "name", "region", r.Name, []Option{}, ""), entry(k, id, "from", "from", quantity.Typed(r.From), []Option{}, ""), entry(k, id, "to", "to", quantity.Typed(r.To), []Option{}, ""),
			entry(k, id, "sign", "where D is", r.Sign, []Option{{"", "of any sign"}, {study.SignPositive, "positive"}, {study.SignNegative, "negative"}}, "with a sign, equal bounds leave the bounds out")))
	}
	anchors := list(2, study.ItemAnchor, id, "Support points", "values that physics gives the simulation beyond its rows, as u = 0 at a wall")
	for i, a := range q.Anchors {
		k := study.ItemAnchor
		anchors.Items = append(anchors.Items, item(k, id, i,
			entry(k, id, "kind", "is", a.Kind, []Option{{study.AtWall, "a known value"}, {study.AtSymmetry, "a plane of symmetry"}}, ""),
			entry(k, id, "x", "at", quantity.Typed(a.X), []Option{}, "in the unit of the stations"), entry(k, id, "value", "value", quantity.Typed(a.Value), []Option{}, "of a known value"),
			entry(k, id, "why", "physics", a.Why, []Option{}, "e.g. no slip at the wall"), entry(k, id, "model", "model", a.Model, []Option{}, "empty: all")))
	}
	application := list(4, study.ItemApplication, "", "Point of application", "the conditions the result is meant for")
	for i, c := range s.Application {
		k := study.ItemApplication
		application.Items = append(application.Items, item(k, "", i, entry(k, "", "name", "condition", c.Name, []Option{}, "e.g. α"), entry(k, "", "value", "value", quantity.Typed(c.Value), []Option{}, ""), entry(k, "", "unit", "unit", c.Unit, []Option{}, "")))
	}
	criteria := criterionEntries(q, list(3, study.ItemCriterion, id, "Criteria of the scores", "limits bound to their scope; a result beyond one is no statement on the model by itself"))
	all := []EntryList{runList(s, q, c), conditions, cardList(s, q), axesList(s, q), derivation(q), scoreEntries(q), criteria, regions, application, qualityList(s, q.Case)}
	if c.Scalar {
		return all
	}
	return append(all, anchors)
}

// readingEntries are the answers about how a file is read: those that were
// given, and those that an open question of the reader calls for.
func readingEntries(f *study.File, asked map[string]string) []Entry {
	list := []Entry{}
	entry := func(field, label, value string, options []Option, hint string) {
		list = append(list, Entry{Target: study.Target{Kind: "file", ID: f.ID, Field: field}, Label: label, Value: value, By: study.Entered, Options: options, Hint: hint})
	}
	calls := map[string][]string{
		"decimal": {"decimal-comma", "comma-ambiguous", "number-thousands"}, "delimiter": {"comma-ambiguous"},
		"sentinels": {"value-sentinel"}, "data": {"value-sentinel"}, "hidden": {"hidden-cells"}, "uneven": {"column-count"}, "zones": {"zone-count"}, "guides": {"fixed-guessed"},
	}
	words := map[string]string{"decimal": "decimals are written with", "delimiter": "columns are separated by", "sentinels": "these mark missing values", "data": "these are data", "hidden": "hidden cells are", "uneven": "rows of another number of columns are", "zones": "zones of another count than announced are", "range": "range of cells", "guides": "further columns begin after characters"}
	options := map[string][]Option{
		"decimal":   {{"", "–"}, {"point", "a point"}, {"comma", "a comma"}},
		"delimiter": {{"", "–"}, {"comma", "commas"}, {"semicolon", "semicolons"}, {"tab", "tabs"}, {"stroke", "strokes"}, {"blanks", "blanks"}},
		"uneven":    {{"", "–"}, {tablefile.LeaveOutUneven, "left out"}},
		"zones":     {{"", "–"}, {tablefile.ZonesAsFound, "used as found"}},
		"hidden":    {{"", "–"}, {"include", "included"}, {"leave out", "left out"}},
	}
	for _, field := range study.ReadingFields {
		value, called := f.ReadingValue(field), false
		for _, code := range calls[field] {
			called = called || asked[code] != ""
		}
		if value != "" || called {
			choices := options[field]
			if choices == nil {
				choices = []Option{}
			}
			entry(field, words[field], value, choices, "")
		}
	}
	codes := []string{}
	for code := range asked {
		codes = append(codes, code)
	}
	for code := range f.Answers {
		if asked[code] == "" {
			codes = append(codes, code)
		}
	}
	slices.Sort(codes)
	for _, code := range codes {
		entry("answer."+code, cmp.Or(asked[code], "answered"), f.Answers[code], []Option{}, "your answer")
	}
	return list
}
