package study_test

import (
	"math"
	"testing"

	"weirmark/core/notice"
	"weirmark/core/study"
)

// Bars of two columns: the side facing E counts. At the three stations E is
// positive, positive and negative, so that the upper, upper and lower half-width
// is u_D, divided by 2. The shift of the mean is √(2/π)(u₊ − u₋). As limits the
// same bars give the same; a limit on the wrong side is refused.
func TestBarsOfTwoSides(t *testing.T) {
	bars := func(text, as string) *study.Study {
		p := pair(rows(30, even, line), text, "m", "m")
		p.Questions[0].Sources = p.Questions[0].Sources[1:]
		r := &p.Slips[1]
		r.U, r.Upper = study.ColumnUse{Column: entered("lo"), Unit: entered("1")}, study.ColumnUse{Column: entered("hi"), Unit: entered("1")}
		r.UFactor, r.BarsAs = entered("2"), entered(as)
		return p
	}
	for as, text := range map[string]string{
		study.BarsWidths: "x,y,lo,hi\n0.1,2,0.2,0.4\n0.4,-3,0.2,0.6\n0.8,4,0.2,0.4\n",
		study.BarsLimits: "x,y,lo,hi\n0.1,2,1.8,2.4\n0.4,-3,-3.2,-2.4\n0.8,4,3.8,4.4\n",
	} {
		c := only(t, bars(text, as))
		for i, want := range []float64{.2, .3, .1} {
			near(t, as+": u_D", c.Stations[i].UD, want, 1e-9)
		}
		if !notice.Has(c.Notices, "sides-unequal") || c.Withheld || c.Sampled == nil {
			t.Fatalf("%s: withheld %v, sampled %+v", as, c.Withheld, c.Sampled)
		}
		near(t, as+": station of the draws", c.Sampled.At, .4, 1e-12)
		near(t, as+": shift", c.Sampled.Shift, math.Sqrt(2/math.Pi)*.2, 1e-9)
		near(t, as+": mean", c.Sampled.Value, 5.4-math.Sqrt(2/math.Pi)*.2, .002)
		// Of the bars alone: √((1 − 2/π) 0.2² + 0.03), and u_num 0.01.
		near(t, as+": u", c.Sampled.U, math.Sqrt((1-2/math.Pi)*.04+.03+1e-4), .002)
	}
	c := only(t, bars("x,y,lo,hi\n0.1,2,2.1,2.4\n0.4,-3,-3.2,-2.4\n0.8,4,4.2,4.4\n", study.BarsLimits))
	if !c.Withheld || !notice.Has(c.Notices, "limits-crossed") {
		t.Error("a lower limit above its value is taken")
	}
}

// Equal sides are the symmetric bars, and sampling on request gives the interval
// of the normal distribution: 1.96 u_val about E.
func TestEqualSidesAreSymmetric(t *testing.T) {
	same := .02
	p := oneValue("10.2", "y\n10\n")
	q := &p.Questions[0]
	q.Sources[0].Value = .02
	before := only(t, p)
	q.Sources[0].Upper, q.Choices.Sampled = &same, true
	c := only(t, p)
	near(t, "u_D", c.Stations[0].UD, float64(before.Stations[0].UD), 0)
	u := float64(c.Stations[0].UVal)
	near(t, "lower end", c.Sampled.Lo, .2-1.959964*u, .05*u)
	near(t, "upper end", c.Sampled.Hi, .2+1.959964*u, .05*u)
	if notice.Has(c.Notices, "sides-unequal") || c.Sampled.Shift.Known() || !c.Sampled.Settled {
		t.Errorf("sampled %+v", c.Sampled)
	}
}

// Three readings are drawn from t of two degrees of freedom, which has no
// deviation: an interval only. Alone beside a small u_num its half-width is
// t s/√n = 4.3027 · 0.1/√3.
func TestFewReadingsAreAnInterval(t *testing.T) {
	p := oneValue("10.2", "y\n9.9\n10\n10.1\n")
	q := &p.Questions[0]
	q.Sources = q.Sources[1:]
	q.Sources[0].Value, q.Choices.Sampled = 1e-4, true
	c := only(t, p)
	half := 4.302653 * .1 / math.Sqrt(3)
	if c.Sampled.U.Known() {
		t.Errorf("a deviation %v of two degrees of freedom", c.Sampled.U)
	}
	near(t, "length", (c.Sampled.Hi-c.Sampled.Lo)/2, half, .03*half)
	q.Choices.KStudent = true
	c = only(t, p)
	near(t, "k", study.Number(c.Choices.K), 4.3, .005)
	near(t, "upper end", c.Stations[0].Hi, .2+float64(c.Choices.K)*.1/math.Sqrt(3), 1e-5)
}

// Five set-ups of three readings, levels by a column of words. Readings are the
// deviations 0, 2, 4, 6, 8 of the set-ups with −1, 0, 1 within them: mean squares
// 3·10 and 1, so that u of the mean is √(30/15) = √2 with 4 degrees of freedom,
// where readings without levels would give s/√15 = √(130/14/15).
func TestNestedReadings(t *testing.T) {
	text := "y,rig\n"
	for i, rig := range []string{"a", "b", "c", "d", "e"} {
		for k := -1; k <= 1; k++ {
			text += itoa(100+2*i+k) + "," + rig + "\n"
		}
	}
	p := oneValue("104", text)
	p.Slips[1].Levels.Rig = entered("rig")
	q := &p.Questions[0]
	q.Sources[0].Value = 10
	c := only(t, p)
	r := c.Replicates
	if r == nil || r.Counts != "set-up" || len(r.Levels) != 2 || r.Of != "mean" {
		t.Fatalf("replicates %+v", r)
	}
	near(t, "u", r.U, math.Sqrt2, 1e-9)
	near(t, "degrees", r.Degrees, 4, 0)
	near(t, "without levels", r.Plain, math.Sqrt(130.0/14/15), 1e-9)
	near(t, "deviation of set-ups", r.Levels[0].Deviation, math.Sqrt(29.0/3), 1e-9)
	near(t, "deviation of readings", r.Levels[1].Deviation, 1, 1e-9)
	near(t, "degrees of the cell", c.Degrees, 4*math.Pow(102.0001/2, 2), 1)
	if notice.Has(c.Notices, "repeats-apart") || !c.Consistency[0].Holds {
		t.Error("set-ups within the stated uncertainty are told apart")
	}
	// The set-ups lie 8 apart: against a stated 2 that is four of it.
	q.Sources[0].Value = 2
	if c := only(t, p); !notice.Has(c.Notices, "repeats-apart") || c.Consistency[0].Holds {
		t.Errorf("set-ups 4 stated u apart are not told: %+v", c.Consistency)
	}
}

func itoa(n int) string {
	return string(rune('0'+n/100)) + string(rune('0'+n/10%10)) + string(rune('0'+n%10))
}

// Repeated readings at the stations of a curve: where the data are their means,
// u of the mean counts; where they are one of them, the deviation.
func TestRepeatedReadingsAtStations(t *testing.T) {
	repeats := "x,y\n0.1,1.9\n0.1,2.1\n0.4,-3.1\n0.4,-2.9\n0.8,3.9\n0.8,4.1\n"
	p := pair(rows(30, even, line), threeStations, "m", "m")
	p.Questions[0].Sources = p.Questions[0].Sources[1:]
	attach(p, "repeats", study.Replicates, repeats, nil)
	c := only(t, p)
	near(t, "u of means", c.Stations[0].UD, .1, 1e-9)
	near(t, "degrees of the station with the fewest", c.Degrees, math.Pow(1.01, 2), .001)
	if c.Replicates.Of != "mean" || c.Withheld {
		t.Errorf("replicates %+v", c.Replicates)
	}
	p.Files[1].Data = []byte("x,y\n0.1,2.3\n0.4,-3\n0.8,4\n")
	p.Files[1].SHA256 = study.Hash(p.Files[1].Data)
	c = only(t, p)
	near(t, "u of a reading", c.Stations[0].UD, .1*math.Sqrt2, 1e-9)
	p.Files[2].Data = []byte("x,y\n0.1,1.9\n0.1,2.1\n")
	p.Files[2].SHA256 = study.Hash(p.Files[2].Data)
	if c := only(t, p); !notice.Has(c.Notices, "repeats-missing") || c.Summary.Tested != 1 {
		t.Error("stations without repeated readings are tested")
	}
}

// A digitised curve D = 2 + 3 x needs the whole record; with it the calibrations
// are common lines, those of x by the slope 3, and line and pixel independent.
func TestDigitisedCurve(t *testing.T) {
	p := pair(rows(30, even, line), rows(11, func(i int) float64 { return float64(i) / 10 }, func(x float64) float64 { return 2 + 3*x }), "m", "m")
	p.Questions[0].Sources = p.Questions[0].Sources[1:]
	r := &p.Slips[1]
	r.Digitised = study.Digitising{Is: entered("yes"), XScale: entered("1"), XZero: entered("0.01"), YScale: entered("2"), YZero: entered("0.03"), Line: entered("0.12")}
	if c := only(t, p); !c.Withheld || !notice.Has(c.Notices, "digitised-record") {
		t.Fatal("a record without its pixel is taken")
	}
	r.Digitised.Pixel = entered("0.06")
	c := only(t, p)
	if c.Withheld {
		t.Fatalf("withheld: %+v", c.Open)
	}
	independent := (.12*.12 + .06*.06) / 12
	for i, s := range c.Stations {
		x := float64(i) / 10
		d := 2 + 3*x
		want := math.Sqrt(math.Pow(3*x*.01, 2) + .03*.03 + math.Pow(.02*d, 2) + .03*.03 + independent)
		near(t, "u_D", s.UD, want, 1e-6)
	}
	common := 0
	for _, l := range c.Sources {
		if l.Of == study.OfData && l.Pattern == study.Common {
			common++
		}
	}
	if common != 4 {
		t.Errorf("%d common lines, want 4", common)
	}
}

// The integral of D = 1 + x over 0 to 1 is 1.5; its u with an independent 0.01 at
// eleven stations is 0.01 · 0.1 √(9 + 1/2). Against 1.5 it holds, against 1.6
// with u 0.02 it does not.
func TestStatedFlowRate(t *testing.T) {
	p := pair(rows(30, even, line), rows(11, func(i int) float64 { return float64(i) / 10 }, func(x float64) float64 { return 1 + x }), "m", "m")
	p.Slips[1].FlowRate = entered("1.5")
	c := only(t, p)
	if len(c.Consistency) != 1 || !c.Consistency[0].Holds {
		t.Fatalf("consistency %+v", c.Consistency)
	}
	near(t, "integral", c.Consistency[0].Value, 1.5, 1e-12)
	near(t, "u", c.Consistency[0].U, .001*math.Sqrt(9.5), 1e-12)
	p.Slips[1].FlowRate, p.Slips[1].FlowRateU = entered("1.6"), entered("0.02")
	c = only(t, p)
	near(t, "ratio", c.Consistency[0].Ratio, .1/math.Hypot(.02, .001*math.Sqrt(9.5)), 1e-9)
	if c.Consistency[0].Holds || !notice.Has(c.Notices, "flow-rate-differs") {
		t.Errorf("consistency %+v", c.Consistency)
	}
}

// Values in steps of 0.05 cannot be known to 0.01: 0.05/√12 is offered, and
// counted once a person says so.
func TestResolutionOfTheData(t *testing.T) {
	p := pair(rows(30, even, line), rows(11, func(i int) float64 { return float64(i) / 10 }, func(x float64) float64 { return math.Round((2+x*x)/.05) * .05 }), "m", "m")
	c := only(t, p)
	if c.Resolution == nil || !notice.Has(c.Notices, "resolution-coarse") {
		t.Fatalf("the step is not seen: %+v", c.Notices)
	}
	near(t, "step", c.Resolution.Step, .05, 1e-9)
	if err := p.Set(study.Target{Kind: "question", ID: "C|q", Field: "resolution"}, study.Counted, "", ""); err != nil {
		t.Fatal(err)
	}
	c = only(t, p)
	near(t, "u_D", c.Stations[0].UD, math.Hypot(.01, .05/math.Sqrt(12)), 1e-9)
	if notice.Has(c.Notices, "resolution-coarse") {
		t.Error("the counted step is asked about")
	}
	p.Questions[0].Resolution, p.Questions[0].Sources[0].Value = "", .02
	if notice.Has(only(t, p).Notices, "resolution-coarse") {
		t.Error("a step below the stated uncertainty is asked about")
	}
}

// The data-quality card of a case: what is not known is listed, and no item is
// known by default.
func TestQualityOfTheData(t *testing.T) {
	p := pair(rows(30, even, line), threeStations, "m", "m")
	if len(only(t, p).Quality) != 0 {
		t.Error("a card without entries is listed")
	}
	set := func(field, value string) error {
		return p.Set(study.Target{Kind: "quality", ID: "C", Field: field}, value, "", "")
	}
	for _, row := range []struct {
		field, value string
		refused      bool
	}{{"0.state", study.QualityKnown, false}, {"0.note", "traverse at inlet", false}, {"3.state", study.QualityUnknown, false}, {"1.state", "perhaps", true}, {"9.state", study.QualityKnown, true}, {"0.colour", "red", true}} {
		if err := set(row.field, row.value); (err != nil) != row.refused {
			t.Errorf("%s = %q: %v", row.field, row.value, err)
		}
	}
	c := only(t, mustLoad(t, saved(t, p)))
	if len(c.Quality) != len(study.QualityItems) || c.Quality[0] != (study.QualityLine{Item: "inlet profiles", State: study.QualityKnown, Note: "traverse at inlet"}) || c.Quality[3].State != study.QualityUnknown || c.Quality[4].State != "" {
		t.Errorf("card %+v", c.Quality)
	}
}

// What a file states of its digitising is taken as stated; a file that states
// nothing has no record.
func TestStatedDigitising(t *testing.T) {
	text := "# digitised: yes\n# y scale: 0.5\n# pixel: 0.002\nx/c,Cp\n0.1,-0.5\n0.2,-0.4\n0.3,-0.3\n"
	for _, row := range []struct{ text, is, scale string }{{text, "yes", "0.5"}, {text[len("# digitised: yes\n"):], "", ""}} {
		s := study.New()
		p := s.Add("curve.csv", []byte(row.text), study.Read(study.File{Name: "curve.csv", Data: []byte(row.text)}), "")[0]
		if d := p.Digitised; d.Is.Value != row.is || d.YScale.Value != row.scale || d.XScale.Given() || row.is != "" && d.Is.By != study.Stated {
			t.Errorf("record %+v", d)
		}
	}
}

// Readings of one value with a stated uncertainty: their scatter is no reason to
// leave it out.
func TestStatedUncertaintyOfRepeatedReadings(t *testing.T) {
	s := oneValue("2", "y,u\n1.9,0.3\n2.1,0.3\n2.0,0.3\n")
	s.Questions[0].Sources = s.Questions[0].Sources[1:]
	s.Slips[1].U, s.Slips[1].UFactor = study.ColumnUse{Column: entered("u"), Unit: entered("1")}, entered("1")
	c := only(t, s)
	near(t, "u_D", c.Stations[0].UD, math.Hypot(.3, .1/math.Sqrt(3)), 1e-9)
	s.Files[1].Data = []byte("y,u\n2.0,0.3\n,0.4\n") // a row without a value is no reason either
	s.Files[1].SHA256 = study.Hash(s.Files[1].Data)
	near(t, "u_D of one reading", only(t, s).Stations[0].UD, .3, 1e-9)
}

// Who set a requirement is no requirement of 0, and one whose basis is changed
// after the comparison was seen is a late one.
func TestRequirementWithoutAValue(t *testing.T) {
	s := oneValue("2", "y\n1.5\n")
	if err := s.Set(study.Target{Kind: "question", ID: "C|q", Field: "requirement.who"}, "someone", "", ""); err != nil {
		t.Fatal(err)
	}
	c := only(t, s)
	if c.Requirement != nil || !notice.Has(c.Notices, "requirement-missing") {
		t.Errorf("a requirement without a value is judged: %+v", c.Requirement)
	}
	q := &s.Questions[0]
	q.Requirement, q.Revealed = &study.Requirement{Value: 5}, true
	if err := s.Set(study.Target{Kind: "question", ID: "C|q", Field: "requirement.percent"}, "yes", "", ""); err != nil {
		t.Fatal(err)
	}
	if !q.Requirement.Late {
		t.Error("a requirement that became one in percent after the comparison was seen is not late")
	}
}
