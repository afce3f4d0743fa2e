package chart

import (
	"bytes"
	"encoding/json"
	"fmt"
	"math"
	"strings"
	"testing"

	"weirmark/core/internal/golden"
	"weirmark/core/quantity"
	"weirmark/core/study"
)

// decoded is what a drawing library sees of an option.
type decoded struct {
	Grid   []any
	XAxis  []decodedAxis
	YAxis  []decodedAxis
	Legend []struct {
		Data []struct{ Name, Icon string }
	}
	Series []decodedSeries
}

type decodedAxis struct {
	Name         string
	NameLocation string
	Inverse      bool
	Min, Max     float64
	AxisLabel    struct {
		Formatter    string
		CustomValues []float64
	}
}

type decodedSeries struct {
	Type, Name, RenderItem string
	XAxisIndex             int
	Data                   []json.RawMessage
}

func decode(t *testing.T, f Figure) decoded {
	t.Helper()
	var d decoded
	if err := json.Unmarshal(f.Option, &d); err != nil {
		t.Fatalf("%s: %v", f.ID, err)
	}
	return d
}

// rows returns the rows of the first series of that name and draw function
// ("" for one without) in panel n.
func (d decoded) rows(t *testing.T, n int, name, renderItem string) [][]*float64 {
	t.Helper()
	for _, s := range d.Series {
		if s.Name != name || s.RenderItem != renderItem || s.XAxisIndex != n {
			continue
		}
		rows := make([][]*float64, len(s.Data))
		for i, raw := range s.Data {
			if err := json.Unmarshal(raw, &rows[i]); err != nil {
				t.Fatalf("%s, row %d: %v", name, i, err)
			}
		}
		return rows
	}
	t.Fatalf("panel %d has no series %q drawn by %q", n, name, renderItem)
	return nil
}

func models() []study.Cell {
	return []study.Cell{taps("A", -0.03), taps("B", 0.004), taps("C", 0.015)}
}

// all returns every figure of the sample cells.
func all(t *testing.T, theme Theme) []Figure {
	t.Helper()
	var figures []Figure
	for _, c := range []struct {
		id   string
		cell study.Cell
	}{{"taps", taps("B", 0.004)}, {"friction", friction()}, {"drag", run()}} {
		some, err := Figures(c.cell, c.id, theme)
		if err != nil {
			t.Fatal(err)
		}
		figures = append(figures, some...)
	}
	for _, cells := range [][]study.Cell{models(), {drag("A", 0.0021), drag("B", 0.00035)}} {
		f, err := Compared(cells, cells[0].Symbol, theme)
		if err != nil {
			t.Fatal(err)
		}
		figures = append(figures, f)
	}
	f, err := Overview([]study.Cell{taps("B", 0.004), friction(), drag("A", 0.0021), drag("B", 0.00035)}, theme)
	if err != nil {
		t.Fatal(err)
	}
	return append(figures, f)
}

func TestFiguresAreWhole(t *testing.T) {
	drawn := map[string]bool{"": true, "errorBar": true, "band": true, "intervalBar": true}
	for _, theme := range []Theme{Light, Dark, Mono} {
		figures, again := all(t, theme), all(t, theme)
		if len(figures) != 13 {
			t.Fatalf("%s: %d figures, want 13", theme, len(figures))
		}
		ids := map[string]bool{}
		for i, f := range figures {
			if !bytes.Equal(f.Option, again[i].Option) || fmt.Sprint(f.Table, f.Caption, f.Alt) != fmt.Sprint(again[i].Table, again[i].Caption, again[i].Alt) {
				t.Errorf("%s: a second call differs", f.ID)
			}
			if ids[f.ID] {
				t.Errorf("two figures have the ID %s", f.ID)
			}
			ids[f.ID] = true
			if f.Title == "" || f.Caption == "" || f.Alt == "" || f.Width != 760 || f.Height < 100 || f.Height > 800 {
				t.Errorf("%s: title %q, caption %q, alternative %q, %d by %d px", f.ID, f.Title, f.Caption, f.Alt, f.Width, f.Height)
			}
			if strings.Contains(f.Caption+f.Alt+fmt.Sprint(f.Table), "NaN") || strings.Contains(string(f.Option), "function") {
				t.Errorf("%s: a number that is none, or code, is in it", f.ID)
			}
			d := decode(t, f)
			names := map[string]bool{}
			for _, s := range d.Series {
				names[s.Name] = true
				if !drawn[s.RenderItem] {
					t.Errorf("%s: no draw function is named %q", f.ID, s.RenderItem)
				}
				if s.XAxisIndex >= len(d.Grid) {
					t.Errorf("%s: series %q lies in panel %d of %d", f.ID, s.Name, s.XAxisIndex, len(d.Grid))
				}
			}
			keys := 0
			for _, l := range d.Legend {
				for _, k := range l.Data {
					keys++
					if !names[k.Name] {
						t.Errorf("%s: the key %q has no marks", f.ID, k.Name)
					}
				}
			}
			if keys < 2 {
				t.Errorf("%s: %d keys", f.ID, keys)
			}
			if len(f.Table.Rows) == 0 {
				t.Errorf("%s: no table", f.ID)
			}
			for _, row := range f.Table.Rows {
				if len(row) != len(f.Table.Head) {
					t.Errorf("%s: a row of %d under %d headings", f.ID, len(row), len(f.Table.Head))
				}
			}
		}
	}
}

func TestSeriesCounts(t *testing.T) {
	// name: panels; marks, lines, custom series
	want := map[string][4]int{
		"taps-overlay":     {2, 2, 2, 4}, // D, E; S, zero; bars, u_num, u_val, 2 u_val
		"taps-residuals":   {1, 1, 3, 1}, // residuals; zero, two limits; stems
		"taps-correlation": {1, 1, 3, 0}, // the turn; statistic, 95 % and 1 % points
		"friction-overlay": {2, 4, 4, 3}, // D, not compared, outside, E; S, zero, two limits; bars, u_val, k u_val
		"friction-grids":   {2, 4, 1, 0}, // U, U without order, order, beyond; formal order
		"drag-intervals":   {1, 1, 3, 2}, // E; zero, two limits; u_val, 2 u_val
		"drag-grids":       {2, 4, 1, 2}, // used, other, extrapolated, D; order; U, bar of D
		"Cp-compared":      {4, 4, 6, 7}, // D, three E; three S, three zeros; bars, three times two bands
		"C_D-compared":     {1, 2, 3, 4},
		"friction-budget":  {2, 1, 5, 5}, // names; two seams, three leaders; data and numerical along x, three sources
		"drag-monitors":    {3, 0, 6, 3}, // three values, three means; three windows
		"drag-budget":      {1, 1, 7, 4}, // names; three seams, four leaders; four sources
		"overview":         {2, 5, 6, 6}, // marks, names twice, outcomes once; zero, two limits twice; four lines, two ranges
	}
	for _, f := range all(t, Light) {
		d := decode(t, f)
		got := [4]int{len(d.Grid)}
		for _, s := range d.Series {
			got[map[string]int{"scatter": 1, "line": 2, "custom": 3}[s.Type]]++
		}
		if got != want[f.ID] {
			t.Errorf("%s: panels, marks, lines, custom %v, want %v", f.ID, got, want[f.ID])
		}
	}
}

// near allows for the ten digits that are printed.
func near(a, b float64) bool { return math.Abs(a-b) <= 1e-9*math.Max(1, math.Abs(b)) }

func TestBarsAndBandsAreKTimesU(t *testing.T) {
	c := taps("B", 0.004)
	for _, k := range []float64{1, 1.96, 2} {
		c.Choices.K = k
		f, err := Overlay(c, "x", Light)
		if err != nil {
			t.Fatal(err)
		}
		d := decode(t, f)
		name := func(u string) string { return "± " + times(k, u) }

		bars := d.rows(t, 0, "D, test OR-26/5, "+name("u_{D}"), "errorBar")
		outer := d.rows(t, 1, name("u_{val}"), "band")
		if len(bars) != 24 || len(outer) != 24 {
			t.Fatalf("k = %g: %d bars, %d rows of the band, want 24", k, len(bars), len(outer))
		}
		for i, s := range c.Stations {
			if !near(*bars[i][0], float64(s.X)) || !near(*bars[i][1], float64(s.D)-k*float64(s.UD)) || !near(*bars[i][2], float64(s.D)+k*float64(s.UD)) {
				t.Errorf("k = %g, station %d: bar %v to %v of D = %v", k, i, *bars[i][1], *bars[i][2], s.D)
			}
			if !near(*outer[i][1], -k*float64(s.UVal)) || !near(*outer[i][2], k*float64(s.UVal)) {
				t.Errorf("k = %g, station %d: band %v to %v of u_val = %v", k, i, *outer[i][1], *outer[i][2], s.UVal)
			}
		}
		for i, row := range d.rows(t, 0, name("u_{num}"), "band") {
			y, u := float64(c.Curve.Y[i]), float64(c.Curve.UNum[i])
			if !near(*row[1], y-k*u) || !near(*row[2], y+k*u) {
				t.Errorf("k = %g, curve point %d: band %v to %v of S = %v", k, i, *row[1], *row[2], y)
			}
		}
		if k == 1 {
			continue
		}
		for i, row := range d.rows(t, 1, "± u_{val}", "band") {
			if u := float64(c.Stations[i].UVal); !near(*row[1], -u) || !near(*row[2], u) {
				t.Errorf("k = %g, station %d: inner band %v to %v of u_val = %v", k, i, *row[1], *row[2], u)
			}
		}
	}
}

func TestGridBar(t *testing.T) {
	f, err := Refinement(drag("B", 0.00035), "x", Light)
	if err != nil {
		t.Fatal(err)
	}
	d := decode(t, f)
	bar := d.rows(t, 0, gridBarName, "errorBar")[0]
	if *bar[0] != 1 || !near(*bar[1], 0.02995-0.00041) || !near(*bar[2], 0.02995+0.00041) {
		t.Errorf("the bar of U is %v %v %v", *bar[0], *bar[1], *bar[2])
	}
	bar = d.rows(t, 1, "D, test OR-26/5, ± 2 u_{D}", "errorBar")[0]
	if !near(*bar[1], 0.0296-0.0008) || !near(*bar[2], 0.0296+0.0008) {
		t.Errorf("the bar of D is %v to %v", *bar[1], *bar[2])
	}
	line := d.rows(t, 0, orderName, "")
	if *line[0][0] != 0 || !near(*line[0][1], 0.02962) {
		t.Errorf("the line of the order begins at %v %v, not at the extrapolated value", *line[0][0], *line[0][1])
	}
	// It passes the finest grid: between its neighbours on the line.
	for i := 1; i < len(line); i++ {
		if *line[i-1][0] <= 1 && 1 <= *line[i][0] && (*line[i-1][1] > 0.02995+1e-9 || *line[i][1] < 0.02995-1e-9) {
			t.Errorf("the line of the order misses the finest grid: %v to %v", *line[i-1][1], *line[i][1])
		}
	}
}

// A fit over more than three grids does not go through the line of the order
// and the finest value: there is no line, and no key of one.
func TestNoLineOfAFit(t *testing.T) {
	c := drag("B", 0.00035)
	before, err := Refinement(c, "x", Light)
	if err != nil {
		t.Fatal(err)
	}
	c.Grids.Points[0].Used = true
	after, err := Refinement(c, "x", Light)
	if err != nil {
		t.Fatal(err)
	}
	if had, has := strings.Contains(string(before.Option), orderName), strings.Contains(string(after.Option), orderName); !had || has {
		t.Errorf("the line is drawn over three grids: %v, over four: %v", had, has)
	}
}

// The line behind U is drawn as the report states it: from its base at h = 0
// through the finest value, whatever the number of grids.
func TestLineOfAFit(t *testing.T) {
	c := drag("B", 0.00035)
	c.Grids.Points[0].Used = true
	c.Grids.Fit = &study.FitLine{Base: 0.0295, Terms: []study.FitTerm{{Coefficient: 0.0003, Power: 1}, {Coefficient: 0.00015, Power: 2}}}
	f, err := Refinement(c, "x", Light)
	if err != nil {
		t.Fatal(err)
	}
	line := decode(t, f).rows(t, 0, fitName, "")
	for _, point := range line {
		h := *point[0]
		if want := 0.0295 + 0.0003*h + 0.00015*h*h; math.Abs(*point[1]-want) > 1e-7 {
			t.Errorf("at h = %v: %v, want %v", h, *point[1], want)
		}
	}
	if *line[0][0] != 0 || len(line) < 20 {
		t.Errorf("%d points from h = %v", len(line), *line[0][0])
	}
	if strings.Contains(string(f.Option), orderName) {
		t.Error("the line of the observed order is drawn beside it")
	}
}

func TestWhatIsNotKnownIsAGap(t *testing.T) {
	f, err := Overlay(friction(), "x", Light)
	if err != nil {
		t.Fatal(err)
	}
	d := decode(t, f)
	outer := d.rows(t, 1, "± 1.96 u_{val}", "band")
	for i, row := range outer {
		if gap := row[1] == nil || row[2] == nil; gap != (i == 12 || i == 20) {
			t.Errorf("station %d: a gap in the band: %v", i, gap)
		}
	}
	if n := len(d.rows(t, 1, "E", "")); n != 30 {
		t.Errorf("%d values of E, want 30", n)
	}
	if n := len(d.rows(t, 0, hollowName, "")); n != 1 {
		t.Errorf("%d hollow values, want 1", n)
	}
	if n := len(d.rows(t, 0, outsideName, "")); n != 3 {
		t.Errorf("%d stations outside, want 3", n)
	}
	for _, text := range []string{"30 of 34 stations compared, 3 outside the simulation", "k = 1.96", "u_num along it is not known", "requirement is ± 0.0004"} {
		if !strings.Contains(f.Caption, text) {
			t.Errorf("the caption lacks %q: %s", text, f.Caption)
		}
	}
}

func TestBareComparison(t *testing.T) {
	c := taps("B", 0.004)
	c.Withheld, c.Curve.UNum = true, nil
	for i := range c.Stations {
		c.Stations[i].UD, c.Stations[i].UVal, c.Stations[i].Ratio = quantity.None, quantity.None, quantity.None
	}
	f, err := Overlay(c, "x", Light)
	if err != nil {
		t.Fatal(err)
	}
	for _, s := range decode(t, f).Series {
		if s.RenderItem != "" {
			t.Errorf("without any uncertainty %q is drawn for %q", s.RenderItem, s.Name)
		}
	}
	for _, text := range []string{"D has no bars: u_D is not known", "u_val is not known", "No statement is made."} {
		if !strings.Contains(f.Caption, text) {
			t.Errorf("the caption lacks %q: %s", text, f.Caption)
		}
	}
}

func TestNothingCompared(t *testing.T) {
	c := taps("B", 0.004)
	c.Stations, c.Summary = nil, nil
	f, err := Overlay(c, "x", Light)
	if err != nil {
		t.Fatal(err)
	}
	if d := decode(t, f); len(d.Grid) != 1 || d.XAxis[0].Name != "x/c (–)" {
		t.Errorf("%d panels, the x axis is named %q", len(d.Grid), d.XAxis[0].Name)
	}
	if want := "0 of 24 stations compared. No value of the reference is drawn."; !strings.Contains(f.Caption, want) {
		t.Errorf("the caption lacks %q: %s", want, f.Caption)
	}
}

func TestUnitsOfTheCaption(t *testing.T) {
	for _, row := range []struct {
		cell study.Cell
		want string
	}{
		{study.Cell{Unit: "1", XName: "x/c", XUnit: "1"}, "Values and x/c are dimensionless."},
		{study.Cell{Unit: "Pa", XName: "x", XUnit: "mm"}, "Values are in Pa, x is in mm."},
		{study.Cell{Unit: "N", Scalar: true, XName: "x"}, "Values are in N."},
	} {
		if got := units(row.cell); got != row.want {
			t.Errorf("%q, want %q", got, row.want)
		}
	}
}

func TestNegativeUpward(t *testing.T) {
	for _, downward := range []bool{true, false} {
		c := taps("B", 0.004)
		c.Downward = downward
		f, err := Overlay(c, "x", Light)
		if err != nil {
			t.Fatal(err)
		}
		for i, y := range decode(t, f).YAxis {
			if y.Inverse != downward {
				t.Errorf("downward %v: axis %d is turned: %v", downward, i, y.Inverse)
			}
		}
		if name := decode(t, f).YAxis[0].Name; strings.Contains(name, "negative values upward") != downward {
			t.Errorf("downward %v: the axis is named %q", downward, name)
		}
	}
}

func TestOneXAxisForLineAndStrip(t *testing.T) {
	for _, f := range all(t, Light) {
		if !strings.HasSuffix(f.ID, "overlay") {
			continue
		}
		x := decode(t, f).XAxis
		if x[0].Min != x[1].Min || x[0].Max != x[1].Max {
			t.Errorf("%s: %v to %v above, %v to %v below", f.ID, x[0].Min, x[0].Max, x[1].Min, x[1].Max)
		}
	}
}

func TestTheCurveDoesNotRuleTheAxis(t *testing.T) {
	// friction's simulation begins at -40, its first station is -3.4.
	f, err := Overlay(friction(), "x", Light)
	if err != nil {
		t.Fatal(err)
	}
	if x := decode(t, f).XAxis[0]; x.Min < -6 || x.Max > 26 {
		t.Errorf("the axis runs from %v to %v", x.Min, x.Max)
	}
}

func TestComparedDrawsTheReferenceOnce(t *testing.T) {
	f, err := Compared(models(), "x", Light)
	if err != nil {
		t.Fatal(err)
	}
	d := decode(t, f)
	if n := len(d.rows(t, 0, "D, test OR-26/5, ± 2 u_{D}", "")); n != 24 {
		t.Errorf("%d values of D, want 24", n)
	}
	icons := map[string]bool{}
	for _, l := range d.Legend {
		for _, k := range l.Data {
			icons[k.Icon] = true
		}
	}
	if len(icons) != 3+1+3+1 { // patterns, D, markers, band
		t.Errorf("%d different keys, want 8", len(icons))
	}
	if n := len(f.Table.Rows); n != 24 {
		t.Errorf("%d rows in the table, want 24", n)
	}
}

func TestLooksDifferWithoutColour(t *testing.T) {
	seen := map[string]bool{}
	for i, l := range looks {
		for _, key := range []string{lineKey(l.dash), l.key()} {
			if seen[key] {
				t.Errorf("model %d repeats a pattern or marker", i)
			}
			seen[key] = true
		}
	}
}

func TestRefused(t *testing.T) {
	other := func(change func(*study.Cell)) []study.Cell {
		cells := models()
		change(&cells[1])
		return cells
	}
	for _, row := range []struct {
		name  string
		cells []study.Cell
		want  string
	}{
		{"one model", models()[:1], "fewer than two"},
		{"nine models", append(append(models(), models()...), models()...), "8 can be told apart"},
		{"another case", other(func(c *study.Cell) { c.Case = "C2" }), "case"},
		{"another quantity", other(func(c *study.Cell) { c.Quantity = "p" }), "quantity"},
		{"another unit", other(func(c *study.Cell) { c.Unit = "Pa" }), "unit"},
		{"another abscissa", other(func(c *study.Cell) { c.XUnit = "mm" }), "abscissa"},
		{"another reference", other(func(c *study.Cell) { c.Reference = "law" }), "reference"},
		{"another direction", other(func(c *study.Cell) { c.Downward = false }), "direction"},
		{"another k", other(func(c *study.Cell) { c.Choices.K = 3 }), "coverage factor"},
	} {
		if _, err := Compared(row.cells, "x", Light); err == nil || !strings.Contains(err.Error(), row.want) {
			t.Errorf("%s: error %v, want %q", row.name, err, row.want)
		}
	}
	if _, err := Figures(taps("B", 0), "x", "sepia"); err == nil {
		t.Error("a theme that does not exist is accepted")
	}
	if _, err := Refinement(taps("B", 0), "x", Light); err == nil {
		t.Error("a grid study is drawn of a cell without one")
	}
	c := drag("B", 0)
	c.Stations = nil
	if _, err := Intervals(c, "x", Light); err == nil {
		t.Error("an interval is drawn of a cell without a station")
	}
	figures, err := Figures(study.Cell{Quantity: "nothing"}, "x", Light)
	if err != nil || len(figures) != 0 {
		t.Errorf("a cell without anything gives %d figures, error %v", len(figures), err)
	}
}

func TestVeryManyStations(t *testing.T) {
	c := taps("B", 0.004)
	const n = 100000
	c.Stations, c.Curve, c.Summary = make([]study.Station, n), study.Curve{}, &study.Summary{N: n}
	c.StationsAll = n
	for i := range n {
		c.Stations[i] = study.Station{X: file(i), D: 1, S: 1, E: number(float64(i%7) / 1e3), UVal: 0.01, UD: 0.01, Line: i}
	}
	c.Stations[54321].E = 0.5
	f, err := Overlay(c, "x", Light)
	if err != nil {
		t.Fatal(err)
	}
	marks := decode(t, f).rows(t, 1, "E", "")
	kept := false
	for _, row := range marks {
		kept = kept || *row[1] == 0.5
	}
	if len(marks) > mostMarks || len(marks) < mostMarks/2 || !kept {
		t.Errorf("%d marks of at most %d; the greatest is among them: %v", len(marks), mostMarks, kept)
	}
	if !strings.Contains(f.Caption, "of 100\u202f000 stations are drawn") {
		t.Errorf("the caption does not say that stations are left out: %s", f.Caption)
	}
}

func TestGolden(t *testing.T) {
	f, err := Overlay(taps("B", 0.004), "taps", Light)
	if err != nil {
		t.Fatal(err)
	}
	text, err := json.MarshalIndent(f, "", " ")
	if err != nil {
		t.Fatal(err)
	}
	golden.Compare(t, "taps-overlay.json", append(text, '\n'))
}

func TestExcludedAreHollowAndCounted(t *testing.T) {
	c := taps("B", 0.004)
	c.Excluded = []study.Excluded{{X: 0.3, D: -1.2, Line: 40, Why: "blocked"}, {X: 1.3, D: 0.1, Line: 41, Why: "leak", Late: true}}
	c.StationsAll = 26
	f, err := Overlay(c, "x", Light)
	if err != nil {
		t.Fatal(err)
	}
	d := decode(t, f)
	rows := d.rows(t, 0, removedName, "")
	if len(rows) != 2 || *rows[0][0] != 0.3 || *rows[0][1] != -1.2 || d.XAxis[0].Max < 1.3 {
		t.Errorf("excluded values %v, the axis ends at %v", rows, d.XAxis[0].Max)
	}
	if !strings.Contains(f.Caption, "24 of 26 stations compared, 2 excluded.") {
		t.Errorf("caption %q", f.Caption)
	}
	if row := f.Table.Rows[len(f.Table.Rows)-1]; row[0] != "1.3" || row[1] != "excluded, not compared" || row[2] != "0.1" {
		t.Errorf("last row of the table %v", row)
	}
	other := taps("A", 0)
	other.Excluded = c.Excluded[:1]
	f, err = Compared([]study.Cell{c, other}, "x", Light)
	if err != nil {
		t.Fatal(err)
	}
	if n := len(decode(t, f).rows(t, 0, removedName, "")); n != 2 {
		t.Errorf("%d excluded values under two models, want 2", n)
	}
}

func TestConditionsThatDifferAreNamed(t *testing.T) {
	for _, row := range []struct {
		of   study.Compared
		want string
	}{
		{study.Compared{Name: "α", Unit: "°", Simulation: 4, Data: 4.2, Effect: quantity.None}, "Not the same on both sides: α 4 against 4.2°."},
		{study.Compared{Name: "M", Simulation: 0.2, Data: 0.21, Effect: quantity.None, Handling: study.Corrected}, "Not the same on both sides: M 0.2 against 0.21."},
		{study.Compared{Name: "M", Simulation: 0.2, Data: 0.21, Effect: 0.1, Handling: study.Corrected}, ""},
		{study.Compared{Name: "M", Simulation: 0.2, Data: 0.21, Effect: quantity.None, Handling: study.Tolerated, Why: "low speed"}, ""},
		{study.Compared{Name: "M", Simulation: 0.2, Data: 0.2, Effect: quantity.None}, ""},
	} {
		c := drag("B", 0)
		c.Conditions = []study.Compared{row.of}
		if got := unlike(c); got != row.want {
			t.Errorf("%+v: %q, want %q", row.of, got, row.want)
		}
		f, err := Intervals(c, "x", Light)
		if err != nil {
			t.Fatal(err)
		}
		if strings.Contains(f.Caption, "Not the same") != (row.want != "") {
			t.Errorf("caption %q", f.Caption)
		}
	}
}
