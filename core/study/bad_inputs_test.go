package study_test

import (
	"fmt"
	"math"
	"os"
	"path/filepath"
	"slices"
	"strings"
	"testing"

	"weirmark/core/memo"
	"weirmark/core/message"
	"weirmark/core/notice"
	"weirmark/core/sentence"
	"weirmark/core/study"
	"weirmark/core/tablefile"
)

// badInput is one row of the list of bad inputs (design, 3): the smallest input
// that shows it, and what is said of it.
type badInput struct {
	row  int
	want notice.Severity // by the list
	code string
	says []string // parts of the text
	// remark says why ours is another severity than the list's, or why another
	// finding stands for the row.
	remark string
	see    func(t *testing.T) seen
}

// seen is what an input came to: its findings, and the cell it was used in,
// or nil.
type seen struct {
	notices []notice.Notice
	cell    *study.Cell
}

// inCell evaluates the first cell of a study; of reads also what the reader
// said of its files.
func inCell(make func() *study.Study) func(t *testing.T) seen {
	return func(t *testing.T) seen {
		r := study.Evaluate(make(), study.Options{Alternatives: true})
		c := &r.Cells[0]
		return seen{append(slices.Clone(r.Notices), c.Notices...), c}
	}
}

// drag is inCell for the second cell of the demo.
func drag(make func() *study.Study) func(t *testing.T) seen {
	return func(t *testing.T) seen {
		c := dragOf(make())
		return seen{c.Notices, &c}
	}
}

// asData uses a text as the data of a comparison.
func asData(text string) func(t *testing.T) seen {
	return inCell(func() *study.Study { return pair(rows(30, even, smooth), text, "m", "m") })
}

// asBook uses a workbook of the reader's tests as the data of a comparison.
func asBook(name, x, y string) func(t *testing.T) seen {
	return func(t *testing.T) seen {
		data, err := os.ReadFile(filepath.Join("..", "tablefile", "testdata", "workbook", name))
		if err != nil {
			t.Fatal(err)
		}
		s := pair(rows(30, even, smooth), "", "m", "m")
		s.Files[1].Name, s.Files[1].Data, s.Files[1].SHA256 = name, data, study.Hash(data)
		s.Slips[1].X.Column, s.Slips[1].Y.Column = entered(x), entered(y)
		return inCell(func() *study.Study { return s })(t)
	}
}

// twelve are the stations of data in these studies.
func twelve(i int) float64 { return float64(i) / 11 }

func changed(s *study.Study, change func(s *study.Study, q *study.Question)) *study.Study {
	change(s, &s.Questions[0])
	return s
}

// curves compares two functions on even rows.
func curves(sim, data func(float64) float64, change func(s *study.Study, q *study.Question)) func(t *testing.T) seen {
	return inCell(func() *study.Study {
		s := pair(rows(30, even, sim), rows(12, twelve, data), "m", "m")
		if change != nil {
			change(s, &s.Questions[0])
		}
		return s
	})
}

func times(factor float64) func(float64) float64 {
	return func(x float64) float64 { return factor * smooth(x) }
}

// grids is a grid study of values from coarse to fine, each of so many times
// the cells of the one before.
func grids(factor float64, values ...float64) func() *study.Study {
	return func() *study.Study {
		runs := make([]gridRun, len(values))
		for i, v := range values {
			runs[i] = gridRun{name: "G" + itoa(i+1), cells: math.Round(8000 * math.Pow(factor, float64(i))), value: v}
		}
		return gridStudy(runs...)
	}
}

// bars compares data with bars of one column.
func bars(column, unit, factor string) func(t *testing.T) seen {
	return inCell(func() *study.Study {
		s := pair(rows(30, even, smooth), "x,y,u\n"+column, "m", "m")
		s.Slips[1].U = study.ColumnUse{Column: entered("u"), Unit: entered(unit)}
		if factor != "" {
			s.Slips[1].UFactor = entered(factor)
		}
		return s
	})
}

func twoSides(text, as string) func(t *testing.T) seen {
	return inCell(func() *study.Study {
		s := pair(rows(30, even, line), text, "m", "m")
		s.Slips[1].U, s.Slips[1].Upper = study.ColumnUse{Column: entered("lo"), Unit: entered("1")}, study.ColumnUse{Column: entered("hi"), Unit: entered("1")}
		s.Slips[1].UFactor, s.Slips[1].BarsAs = entered("2"), entered(as)
		return s
	})
}

// loopOf is a closed curve, out along the lower side and back along the upper.
func loopOf() string {
	at := steps(41, 0, 2*math.Pi)
	return table("x,y", each(at, math.Cos), each(at, math.Sin))
}

func shuffled(x float64) float64 {
	if int(math.Round(x*29))%2 == 0 {
		return -1 + x
	}
	return .4 - .3*x
}

func slipOfTen(x float64) float64 {
	if math.Abs(x-5./11) < 1e-9 {
		return 10 * smooth(x)
	}
	return smooth(x)
}

// swapped are four runs of which the last has the headers of its two columns
// exchanged.
func swapped() *study.Study {
	text := func(head string) string {
		at := steps(30, 0, 1)
		return table(head, at, each(at, smooth), each(at, func(x float64) float64 { return math.Cos(20 * x) }))
	}
	s := pair(text("x,v,y"), rows(12, twelve, smooth), "m", "m")
	s.Slips[0].Grid, s.Slips[0].Cells = entered("G4"), entered("64000")
	for i := 1; i < 4; i++ {
		cells := math.Pow(10, float64(i))
		attach(s, "g"+itoa(i), study.Simulation, text("x,y,v")+strings.Repeat("\n", i), func(p *study.Slip) { p.Grid, p.Cells = entered("G"+itoa(i)), entered(fmt.Sprint(cells)) })
	}
	return s
}

func shortRecord() *study.Study { return inTime(unsteady(500, .02995, .002)) }

func cycling(half float64) string {
	return history(func(i float64) float64 { return .02995 + half*math.Sin(2*math.Pi*i/70) })
}

func zeroResiduals() *study.Study {
	s := monitored(map[string]string{"G4": history(settled(.02995))})
	text := "iteration,continuity\n"
	for i := range 60 {
		text += fmt.Sprintf("%d,%g\n", i+1, float64(max(0, 55-i)))
	}
	addTable(s, "zero.csv", text, study.Slip{Role: entered(study.Residual), Model: entered("B"), Grid: entered("G4"),
		X: study.ColumnUse{Column: entered("iteration")}, Y: study.ColumnUse{Column: entered("continuity")}})
	return s
}

func threeRigs() *study.Study {
	s := oneValue("104", "y,rig\n99,a\n101,a\n107,b\n109,b\n")
	s.Slips[1].Levels.Rig = entered("rig")
	s.Questions[0].Sources[0].Value = 1
	return s
}

// sharedParts are data whose whole covariance is of sources shared by groups.
func sharedParts(shift func(x float64) float64, grouped bool) *study.Study {
	ref := "x,y,part\n"
	for i := range 12 {
		ref += fmt.Sprintf("%.6g,%.6g,%d\n", twelve(i), 2+shift(twelve(i)), 1+i/4)
	}
	s := pair(rows(30, even, func(float64) float64 { return 2.01 }), ref, "m", "m")
	q := &s.Questions[0]
	q.Choices.UInterp = false
	for i := range q.Sources {
		q.Sources[i].Pattern = study.Common
		if grouped {
			q.Sources[i].Pattern, q.Sources[i].Group = study.Grouped, "part"
		}
	}
	return s
}

func lateExclusion(t *testing.T) seen {
	s := pair(rows(30, even, smooth), rows(12, twelve, smooth), "m", "m")
	if err := s.Reveal("C|q", "09:00"); err != nil {
		t.Fatal(err)
	}
	if err := s.Exclude(study.Target{Kind: "question", ID: "C|q", Field: "5"}, "looks odd", "09:01"); err != nil {
		t.Fatal(err)
	}
	return inCell(func() *study.Study { return s })(t)
}

func lateRequirement(t *testing.T) seen {
	s := pair(rows(30, even, smooth), rows(12, twelve, smooth), "m", "m")
	if err := s.Reveal("C|q", "09:00"); err != nil {
		t.Fatal(err)
	}
	setQuestion(t, s, "requirement.value", "0.1")
	return inCell(func() *study.Study { return s })(t)
}

// refusal makes what an error says a finding.
func refusal(err error) seen {
	n, _ := err.(notice.Notice)
	return seen{notices: []notice.Notice{n}}
}

// hostileNames prints a study whose names hold markup, and reports as a finding
// that they stand in the memo as text.
func hostileNames(t *testing.T) seen {
	s := pair(rows(30, even, smooth), rows(12, twelve, smooth), "m", "m")
	const script = `<b>A</b>`
	s.Files[0].Name, s.Title, s.Questions[0].ReferenceID = script+".csv", script, script
	for i := range s.Slips {
		s.Slips[i].Model = entered(script)
	}
	r := study.Evaluate(s, study.Options{})
	page := string(memo.HTML(memo.Document(memo.Input{Report: r})))
	if strings.Contains(page, script) || strings.Count(page, "&lt;b&gt;A") < 3 {
		t.Errorf("names are not text in the memo: %d as text", strings.Count(page, "&lt;b&gt;A"))
	}
	if text := sentence.Of(&r.Cells[0]).Text(); !strings.Contains(text, script) {
		t.Errorf("the name is lost from the statement: %s", text)
	}
	return seen{}
}

func twoModels(t *testing.T) seen {
	s := pair("x,y\n0,2\n1,2\n2,2.5\n3,2\n", "x,y\n0,1\n1,1.5\n2,1\n3,1\n", "m", "m")
	attach(s, "b", study.Simulation, "x,y\n1,2.5\n2,2.5\n3,2\n", func(p *study.Slip) { p.Model = entered("B") })
	return inCell(func() *study.Study { return s })(t)
}

func frictions(s *study.Study, q *study.Question) {
	for i := range s.Slips {
		s.Slips[i].Y.Unit = entered("m/s")
	}
	s.Cases = []study.Card{{Name: "C", References: []study.ReferenceQuantity{{Symbol: "ν", Value: 1e-5, Unit: "m^2/s"},
		{Symbol: study.FrictionSpeed, Value: 1.31, Unit: "m/s", Side: study.Simulation}, {Symbol: study.FrictionSpeed, Value: 1.24, Unit: "m/s", Side: study.OfData}}}}
	q.XForm = study.Form{Name: "y⁺", Simulation: study.FormTurned, Data: study.FormTurned}
}

// badInputs has every row of the list, in its order.
var badInputs = []badInput{
	{1, notice.Stop, "file-empty", []string{"No data rows", "0 rows", "Nothing was loaded"}, "", asData("x,y\n")},
	{1, notice.Stop, "file-empty", []string{"No data rows", "0 rows"}, "", asData("")},
	{2, notice.Stop, "file-not-text", []string{"neither text nor a workbook", "First bytes", "Nothing was loaded"}, "", asData("\x7fELF\x00\x01\x02\x00\x00")},
	{3, notice.Ask, "column-count", []string{"line 4 has 1 column where 2", `line 4 "0.7"`, `line 6 "0.9,1,2"`}, "", asData("x,y\n0,1\n0.5,2\n0.7\n0.8,2\n0.9,1,2\n1,3\n")},
	{4, notice.Ask, "decimal-comma", []string{`"0,125" was read as 0.125`, "wrong by 1000", "Confirm"}, "", asData("x;y\n0,125;1,5\n0,5;2,5\n")},
	{5, notice.Stop, "decimal-mixed", []string{`"0.12"`, `"0,13"`, "column 2", "cannot be read both ways"}, "", asData("x;y\n1;0.12\n2;0,13\n")},
	{6, notice.Note, "number-fortran", []string{"2 numbers in Fortran form", `"3.14-114"`, "3.14e-114"}, "", asData("x y\n0 3.14-114\n1 1.5D+3\n")},
	{7, notice.Ask, "value-sentinel", []string{"2 values equal -999", "if they mark missing data, say so"}, "", asData("x,y\n0,-999\n0.2,2\n0.5,-999\n1,1\n")},
	{8, notice.Stop, "value-date", []string{"Cell C14", "2 March", "spreadsheet may have changed", "at the source"}, "", asBook("date.xlsx", "x", "ratio")},
	{8, notice.Stop, "value-date", []string{"Line 3, column 2", "is a date", "at the source"}, "", asData("x,y\n0,0.5\n1,3/2/2024\n")},
	{9, notice.Stop, "formula-no-value", []string{"Cell B3", "no stored result", "Save the workbook"}, "", asBook("formula-no-value.xlsx", "x", "y")},
	{10, notice.Ask, "hidden-cells", []string{"Hidden in the workbook", "Include them or leave them out"}, "", asBook("hidden.xlsx", "x", "b")},
	{11, notice.Ask, "zone-count", []string{`"x/H=2" announces 4 points`, "2 were found before the next zone"}, "", asData("VARIABLES = x y\nZONE T=\"x/H=2\" I=4\n0 1\n1 2\n")},
	{12, notice.Ask, "grid-identical", []string{"same bytes", "needs different runs"}, "", inCell(grids(8, .0312, .03, .03))},
	{12, notice.Ask, "files-identical", []string{"sim.csv and ref.csv are byte-identical"}, "", inCell(func() *study.Study { return pair(rows(30, even, smooth), rows(30, even, smooth), "m", "m") })},
	{13, notice.Ask, "range-scaled", []string{"millimetres against metres", "Nothing was changed"}, "", inCell(func() *study.Study {
		return pair(rows(30, even, smooth), rows(12, func(i int) float64 { return 1000 * twelve(i) }, func(x float64) float64 { return smooth(x / 1000) }), "m", "m")
	})},
	{14, notice.Ask, "unit-missing", []string{`No unit is stated for "y"`, "Nothing is assumed", "Choose a unit"}, "", curves(smooth, smooth, func(s *study.Study, _ *study.Question) { s.Slips[1].Y.Unit = study.Field{} })},
	{15, notice.Ask, "ratio-constant", []string{"S/D is 0.836", "1/ρ = 0.836", "Nothing was changed"}, "", curves(times(1/1.196), smooth, func(s *study.Study, _ *study.Question) {
		s.Cases = []study.Card{{Name: "C", References: []study.ReferenceQuantity{{Symbol: "ρ", Value: 1.196, Unit: "kg/m^3"}}}}
	})},
	{16, notice.Ask, "offset-constant", []string{"E is 5.00", "different datums", "Nothing was removed"}, "", curves(func(x float64) float64 { return smooth(x) + 5 }, smooth, nil)},
	{17, notice.Ask, "columns-swapped", []string{`"v" of sim.csv matches`, `not "y"`, "headers swapped"}, "", inCell(swapped)},
	{18, notice.Stop, "wall-units", []string{"in wall units", "u_tau and nu are needed", "whose u_tau"}, "", curves(smooth, smooth, func(s *study.Study, _ *study.Question) {
		s.Files[0].Data = []byte(strings.Replace(string(s.Files[0].Data), "x,", "y+,", 1))
		s.Files[0].SHA256 = study.Hash(s.Files[0].Data)
		s.Slips[0].X = study.ColumnUse{Column: entered("y+"), Unit: entered("1")}
	})},
	{19, notice.Note, "friction-two", []string{"1.31 m/s", "1.24 m/s", "5.6 %", "opposite senses", "physical units too"}, "", curves(smooth, smooth, frictions)},
	{20, notice.Note, "residual-zero", []string{"zero or less and have no decades", "left out"},
		"no figure of stations has a logarithmic axis, so that none is left out of one; decades are taken of residuals only", drag(zeroResiduals)},
	{21, notice.Ask, "curve-loop", []string{"goes out and back in x", "2 branches", "Split it into branches first"},
		"a stop: without a branch there is no value at a station to go on with; the choice of a branch is offered on the same card", inCell(func() *study.Study { return pair(loopOf(), "x,y\n-0.5,0.8\n0.1,1\n0.5,0.8\n", "m", "m") })},
	{22, notice.Ask, "curve-shuffled", []string{"alternate at neighbouring rows", "shuffled by sorting", "supply the unsorted file"}, "", curves(shuffled, smooth, nil)},
	{23, notice.Note, "arc-missing", []string{"No second coordinate", "arc length is not available", "first 2 %"}, "", inCell(func() *study.Study {
		return changed(pair(rows(30, even, smooth), rows(12, twelve, smooth), "m", "m"), func(s *study.Study, _ *study.Question) {
			s.Slips[0].Abscissa, s.Slips[1].Abscissa = entered(study.AlongArc), entered(study.AlongArc)
		})
	})},
	{24, notice.Note, "curve-duplicate", []string{"1 repeated rows", "same abscissa, same value", "used once"}, "", inCell(func() *study.Study {
		return pair(rows(30, even, smooth)+"1,1.14112\n", rows(12, twelve, smooth), "m", "m")
	})},
	{25, notice.Ask, "rows-repeated", []string{"0.4200 and 0.4700 (lines 3 and 4", "read again", "Average them"}, "", inCell(func() *study.Study {
		return pair(rows(30, even, smooth), "x,y\n0,1\n0.2,0.42\n0.2,0.47\n0.5,0.5\n0.8,0.45\n1,0.4\n", "m", "m")
	})},
	{26, notice.Note, "curve-unsorted", []string{"not in order of x", "The file order is kept"}, "", inCell(func() *study.Study {
		return pair(rows(30, func(i int) float64 { return even(29 - i) }, smooth), rows(12, twelve, smooth), "m", "m")
	})},
	{27, notice.Ask, "curve-outlier", []string{"line 7", "robust deviations", "Not removed", "with a reason"}, "", curves(smooth, slipOfTen, nil)},
	{28, notice.Stop, "curve-constant", []string{"All values of sim.csv are 0", "placeholder"}, "", curves(func(float64) float64 { return 0 }, smooth, nil)},
	{28, notice.Stop, "stations-constant", []string{"All stations of sim.csv are 0.5", "Check the column"}, "", inCell(func() *study.Study {
		return pair(rows(30, func(int) float64 { return .5 }, smooth), rows(12, twelve, smooth), "m", "m")
	})},
	{29, notice.Note, "station-outside", []string{"4 of 12 stations", "no extrapolation"}, "", inCell(func() *study.Study {
		return pair(rows(30, func(i int) float64 { return .3 + even(i) }, smooth), rows(12, twelve, smooth), "m", "m")
	})},
	{30, notice.Stop, "station-none", []string{"No station lies inside", "data 1 m to 12 m", "simulation 0 m to 0.001 m", "Check the units"}, "", inCell(func() *study.Study {
		return pair(rows(30, func(i int) float64 { return even(i) / 1000 }, times(1)), rows(12, func(i int) float64 { return 1 + float64(i) }, smooth), "m", "m")
	})},
	{31, notice.Note, "station-interp", []string{"interpolation uncertainty reaches", "% of u_val", "coarse against the stations"}, "", inCell(func() *study.Study {
		return pair(rows(9, func(i int) float64 { return float64(i) / 8 }, func(x float64) float64 { return math.Sin(9 * x) }), rows(40, func(i int) float64 { return float64(i) / 39 }, func(x float64) float64 { return math.Sin(9 * x) }), "m", "m")
	})},
	{32, notice.Note, "curve-gap", []string{"no rows from 0.3", "to 0.5", "not bridged"}, "", inCell(func() *study.Study {
		return of(append(steps(31, 0, .3), steps(31, .5, .8)...), steps(17, 0, .8), raised, wave)
	})},
	{33, notice.Note, "grid-two", []string{"order cannot be observed", "formal order 2", "factor 3"}, "", inCell(grids(8, .0301, .03))},
	{34, notice.Ask, "grid-one", []string{"One grid", "unknown", "a validation statement is not"}, "", inCell(grids(8, .03))},
	{35, notice.Note, "grid-ratio", []string{"1.1", "below 1.3", "close to the noise", "unreliable"}, "", inCell(grids(1.4, .0316, .0304, .03))},
	{36, notice.Note, "grid-oscillatory", []string{"alternate with refinement", "No order is given", "half-range"}, "", inCell(grids(8, .0301, .031, .0305))},
	{37, notice.Stop, "grid-diverging", []string{"grow with refinement (ratio 1.93)", "no grid uncertainty", "it does not apply"}, "", inCell(grids(8, .03, .031, .03293))},
	{38, notice.Note, "grid-order-low", []string{"Observed order 0.19", "not asymptotic", "indicative only"}, "", inCell(grids(8, .03, .031, .031+.001*math.Pow(2, -.19)))},
	{38, notice.Note, "grid-order-high", []string{"Observed order 6", "not asymptotic"}, "", inCell(grids(8, .03, .0364, .0365))},
	{39, notice.Note, "iteration-noise", []string{"Fine–medium change (0.00026)", "below the iterative uncertainty", "noise"}, "", drag(func() *study.Study { return monitored(map[string]string{"G4": cycling(.00036)}) })},
	{40, notice.Ask, "grid-wall", []string{"38, 27, 12, 0.90", "wall treatment changes", "not one family"}, "", inCell(func() *study.Study {
		runs := second()
		for i, y := range []string{"38", "27", "12", "0.9"} {
			runs[i].yPlus = y
		}
		return gridStudy(runs...)
	})},
	{41, notice.Note, "monitor-missing", []string{"No monitor", "not shown"}, "", drag(message.Demo)},
	{42, notice.Stop, "monitor-drift", []string{"still falls 0.60 % per 200 iterations", "Continue the run", "U_iter with a reason"}, "", drag(func() *study.Study { return monitored(map[string]string{"G4": drifting(.02995)}) })},
	{43, notice.Ask, "monitor-cycle", []string{"cycles every 70.0 iterations", "±1.1 %", "whole cycles", "Is the flow steady?"}, "", drag(func() *study.Study { return monitored(map[string]string{"G4": cycling(.011 * .02995)}) })},
	{44, notice.Stop, "balance-open", []string{"imbalance 1.3 %", "Its effect on the quantity is unknown", "with a reason"}, "", drag(func() *study.Study {
		return balanced("in,out\n1000,987\n", study.Slip{X: study.ColumnUse{Column: entered("in")}, Y: study.ColumnUse{Column: entered("out")}})
	})},
	{45, notice.Note, "sampling-short", []string{"independent samples", "% of u_num", "longer average"}, "", drag(shortRecord)},
	{46, notice.Ask, "u-blank", []string{"2 stations have no uncertainty", "Blank is not zero", "leave the test"}, "", bars("0.1,1.3,0.1\n0.3,1.8,\n0.5,2,\n0.8,1.7,0.1\n", "1", "1")},
	{47, notice.Ask, "u-zero", []string{"exactly 0", "Exact by definition?", "mark it unknown"}, "", bars("0.1,1.3,0\n0.3,1.8,0.1\n0.5,2,0.1\n", "1", "1")},
	{48, notice.Ask, "u-coverage", []string{"column u of ref.csv is not stated", "standard (k = 1), 95 %, or limits", "No statement"}, "", bars("0.1,1.3,0.1\n0.3,1.8,0.1\n0.5,2,0.1\n", "1", "")},
	{49, notice.Ask, "u-basis", []string{`"u" of ref.csv is in percent`, "of the reading, or of a full scale", "No statement"}, "", bars("0.1,1.3,1\n0.3,1.8,1\n0.5,2,1\n", "%", "1")},
	{50, notice.Note, "sides-unequal", []string{"two sides", "side facing E is used", "by sampling"}, "", twoSides("x,y,lo,hi\n0.1,2,0.2,0.4\n0.4,-3,0.2,0.6\n0.8,4,0.2,0.4\n", study.BarsWidths)},
	{51, notice.Note, "readings-few", []string{"3 readings", "factor 4.30, not 2"}, "", inCell(func() *study.Study { return oneValue("10.2", "y\n9.9\n10\n10.1\n") })},
	{52, notice.Ask, "repeats-apart", []string{"differ by", "times the uncertainty that is stated", "A source is missing"}, "", inCell(threeRigs)},
	{53, notice.Stop, "limits-crossed", []string{"limits or half-widths?", "Columns swapped?"}, "", twoSides("x,y,lo,hi\n0.1,2,2.1,2.4\n0.4,-3,-3.2,-2.4\n0.8,4,4.2,4.4\n", study.BarsLimits)},
	{53, notice.Stop, "u-negative", []string{"negative uncertainty (-0.1)", "Limits or half-widths?"}, "", bars("0.1,1.3,-0.1\n0.3,1.8,0.1\n0.5,2,0.1\n", "1", "1")},
	{54, notice.Ask, "correlation-unset", []string{`Is the error of "zero of the gauge" common to all stations?`, "Independent makes the joint statistic", "common"}, "", curves(smooth, func(x float64) float64 { return smooth(x) + .02*math.Cos(4*x) }, func(_ *study.Study, q *study.Question) {
		q.Sources = append(q.Sources, study.Source{Name: "zero of the gauge", Of: study.OfData, Value: .02, Basis: study.Absolute, Coverage: entered("1")})
	})},
	{55, notice.Note, "covariance-rank", []string{"rank 3 of 12", "3 combinations"}, "", inCell(func() *study.Study { return sharedParts(func(float64) float64 { return 0 }, true) })},
	{55, notice.Stop, "covariance-range", []string{"a combination declared free of uncertainty", "no joint statistic"}, "", inCell(func() *study.Study { return sharedParts(func(x float64) float64 { return x / 10 }, false) })},
	{56, notice.Note, "percent-withheld", []string{"withheld at", "|D| is below"}, "", curves(smooth, func(x float64) float64 { return x - .3 }, func(_ *study.Study, q *study.Question) {
		q.Scores = &study.Scoring{Percent: true, PercentAbove: 20}
	})},
	{57, notice.Stop, "scores-signed", []string{"FB", "not negative", "changes sign", "hit rate"}, "", curves(smooth, func(x float64) float64 { return x - .3 }, func(_ *study.Study, q *study.Question) {
		q.Scores = &study.Scoring{Dispersion: true, Fraction: .25}
	})},
	{58, notice.Ask, "condition-differs", []string{"simulation at 4°, data at 4.2°", "effect is 0.00020", "accept it with a reason"}, "", drag(func() *study.Study {
		return changed(message.Demo(), func(_ *study.Study, q *study.Question) {
			q.Conditions = []study.Matching{{Name: "α", Unit: "°", Simulation: 4, Data: 4.2, Sensitivity: pointer(.001)}}
		})
	})},
	{59, notice.Note, "reference-tuning", []string{"used to set the model", "fit quality, not validation"}, "", curves(smooth, smooth, func(_ *study.Study, q *study.Question) { q.Use = entered(study.UseTuning) })},
	{60, notice.Note, "reference-simulation", []string{"code-to-code comparison", "no validation wording"}, "", curves(smooth, smooth, func(_ *study.Study, q *study.Question) { q.Kind = entered(study.KindSimulation) })},
	{61, notice.Note, "station-excluded-late", []string{"after results were seen: 1 station", "Logged", "result with them"},
		"an ask: the text of the list does not say why the stations were taken out, and a sceptical reader will ask; the statement is not withheld by it", lateExclusion},
	{62, notice.Note, "requirement-late", []string{"recorded after results were seen"}, "", lateRequirement},
	{63, notice.Ask, "curve-magnitude", []string{"never negative", "a magnitude?", "signed component"}, "", curves(func(x float64) float64 { return math.Abs(x - .41) }, func(x float64) float64 { return x - .41 }, nil)},
	{64, notice.Ask, "derive-several", []string{"3 candidates", "Which is the physical event?", "Uncertainty of the values"}, "", inCell(func() *study.Study {
		wave := func(x float64) float64 { return math.Sin(9*x + .5) }
		return scalarPair("crossing of a level", nil, rows(40, func(i int) float64 { return float64(i) / 39 }, wave), rows(40, func(i int) float64 { return float64(i) / 39 }, wave), "m", "1")
	})},
	{65, notice.Note, "derive-edge", []string{"Edge not reached", "at the last row", "withheld"},
		"a stop: there is no thickness to compare; the displacement thickness goes on as a bound (derive-bound, a note)", inCell(func() *study.Study {
			ramp := rows(20, func(i int) float64 { return float64(i) / 20 }, func(y float64) float64 { return y })
			return scalarPair("boundary layer thickness δ99", nil, ramp, ramp, "m", "m/s")
		})},
	{65, notice.Note, "derive-bound", []string{"only a bound", "rows end before the edge"}, "", inCell(func() *study.Study {
		ramp := rows(20, func(i int) float64 { return float64(i) / 20 }, func(y float64) float64 { return y })
		return scalarPair("displacement thickness δ*", nil, ramp, ramp, "m", "m/s")
	})},
	{66, notice.Note, "references-differ", []string{"18.8 % apart", "more than", "do not agree", "Which one holds?"},
		"an ask: which of two references holds is for a person to say, and the statement on either is of that one alone", inCell(func() *study.Study {
			at := func(i int) float64 { return float64(i) / 20 }
			profile := func(a float64) string {
				return rows(21, at, func(x float64) float64 { return a * (1 - (x-.5)*(x-.5)) })
			}
			s := scalarPair("greatest value", nil, profile(1), profile(1.01), "m", "1")
			attach(s, "o", study.Reference, profile(1.2), nil)
			return s
		})},
	{67, notice.Stop, "hash-changed", []string{"ref.csv differs from its recorded SHA-256", "It was not used"}, "", curves(smooth, smooth, func(s *study.Study, _ *study.Question) { s.Files[1].Data = append(s.Files[1].Data, "2,2\n"...) })},
	{68, notice.Stop, "study-newer", []string{"version 9", "up to 1", "Nothing was loaded"},
		"not opened read-only: what a later version means by a field is not known here, so that a number shown from it could be another", func(t *testing.T) seen {
			_, _, err := study.Load([]byte(`{"format":"weirmark study","version":9}`))
			return refusal(err)
		}},
	{69, notice.Stop, "file-too-large", []string{"12 bytes", "limit of 8", "Nothing was loaded", "line of interest"}, "", func(t *testing.T) seen {
		return seen{notices: tablefile.Read("a.csv", []byte("x,y\n0,1\n1,2\n"), tablefile.Options{MaxBytes: 8}).Notices}
	}},
	{70, notice.Note, "", nil, "nothing is said: names are text wherever they stand, which the input itself checks in the memo and the statement", hostileNames},
	{71, notice.Note, "curve-envelope", []string{"Numbers use all 9000 points", "figures show an envelope"}, "", inCell(func() *study.Study {
		return pair(rows(9000, func(i int) float64 { return float64(i) / 8999 }, smooth), rows(12, twelve, smooth), "m", "m")
	})},
	{72, notice.Stop, "models-stations", []string{"share 3 of 4 stations", "or not at all"}, "", twoModels},
	{73, notice.Ask, "readings-ratio", []string{"One of 5 readings", "7.69 times the others", "another reference area", "Nothing was changed"}, "", inCell(func() *study.Study {
		return oneValue("0.0301", "y\n0.03\n0.0301\n0.0299\n0.03\n0.2307\n")
	})},
	{74, notice.Note, "application-outside", []string{"α = 11°", "lies outside the compared conditions", "no statement is made there"}, "", drag(func() *study.Study {
		return changed(message.Demo(), func(s *study.Study, q *study.Question) {
			q.Conditions = []study.Matching{{Name: "α", Unit: "°", Simulation: 4.2, Data: 4.2}}
			s.Application = []study.Condition{{Name: "α", Unit: "°", Value: 11}}
		})
	})},
}

// beside are the rows that refuse a part beside the statement, which goes on
// without it: scores, and the difference of two models.
var beside = map[int]bool{57: true, 72: true}

// quietNotices are the findings of a comparison and a grid study with nothing
// wrong.
func quietNotices() []notice.Notice {
	list := []notice.Notice{}
	for _, s := range []*study.Study{
		pair(rows(60, func(i int) float64 { return float64(i) / 59 }, smooth), rows(20, func(i int) float64 { return .01 + float64(i)/21 }, func(x float64) float64 { return smooth(x) * (1 + .05*x) }), "m", "m"),
		gridStudy(second()...),
	} {
		r := study.Evaluate(s, study.Options{})
		list = append(append(list, r.Notices...), r.Cells[0].Notices...)
	}
	return list
}

// TestBadInputs: every row of the list is seen and said with its words and its
// severity. What stops or asks holds the statement back or is an open point,
// and nothing of it is said of clean input.
func TestBadInputs(t *testing.T) {
	rows := map[int]bool{}
	quiet := quietNotices()
	for _, b := range badInputs {
		rows[b.row] = true
		t.Run(fmt.Sprintf("%d %s", b.row, b.code), func(t *testing.T) {
			got := b.see(t)
			if b.code == "" {
				return
			}
			var found *notice.Notice
			texts := []string{}
			for i, n := range got.notices {
				texts = append(texts, n.Code+": "+n.Text)
				if n.Code == b.code && (found == nil || !holds(found.Text, b.says)) {
					found = &got.notices[i]
				}
			}
			if found == nil || !holds(found.Text, b.says) {
				t.Fatalf("no %s with %q in\n%s", b.code, b.says, strings.Join(texts, "\n"))
			}
			if found.Severity != b.want && b.remark == "" {
				t.Errorf("severity %v, by the list %v", found.Severity, b.want)
			}
			if c := got.cell; c != nil && !beside[b.row] && found.Severity != notice.Note && !c.Withheld && !slices.ContainsFunc(c.Open, func(o study.Open) bool { return strings.Contains(o.Text, found.Text) }) {
				t.Errorf("%s neither holds the statement back nor is it an open point: %+v", b.code, c.Open)
			}
			if notice.Has(quiet, b.code) && b.code != "monitor-missing" { // clean input has no monitor either
				t.Errorf("%s is said of clean input", b.code)
			}
		})
	}
	for n := 1; n <= 74; n++ {
		if !rows[n] {
			t.Errorf("row %d of the list has no input", n)
		}
	}
}

func holds(text string, parts []string) bool {
	for _, p := range parts {
		if !strings.Contains(text, p) {
			return false
		}
	}
	return true
}
