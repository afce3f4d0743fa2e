package study_test

import (
	"fmt"
	"math"
	"strings"
	"testing"

	"weirmark/core/notice"
	"weirmark/core/study"
)

// attach adds a file with a slip of the question of pair.
func attach(s *study.Study, id, role, text string, change func(*study.Slip)) {
	s.Files = append(s.Files, study.File{ID: id, Name: id + ".csv", SHA256: study.Hash([]byte(text)), Data: []byte(text)})
	p := study.Slip{ID: id, File: id, Role: entered(role), Case: entered("C"), Quantity: entered("q"), Model: entered("A"),
		X: study.ColumnUse{Column: entered("x"), Unit: entered("m")}, Y: study.ColumnUse{Column: entered("y"), Unit: entered("1")}}
	if change != nil {
		change(&p)
	}
	s.Slips = append(s.Slips, p)
}

// oneValue is a study of one value against one or more readings.
func oneValue(sim string, readings string) *study.Study {
	s := pair("y\n"+sim+"\n", readings, "", "")
	for i := range s.Slips {
		s.Slips[i].X = study.ColumnUse{}
	}
	return s
}

func near(t *testing.T, what string, got study.Number, want, within float64) {
	t.Helper()
	if !(math.Abs(float64(got)-want) <= within) {
		t.Errorf("%s = %v, want %v", what, float64(got), want)
	}
}

const threeStations = "x,y\n0.1,2\n0.4,-3\n0.8,4\n"

func line(x float64) float64 { return 2 + x }

// Counts and forms of distribution, u by hand: 3 counts of 0.0001; 0.06 as
// limits of a triangle, 0.06/√6, and of a cycle, 0.06/√2; at 95 % of t with two
// degrees of freedom 0.06/4.3027.
func TestSourceForms(t *testing.T) {
	for _, row := range []struct {
		name string
		s    study.Source
		want float64
	}{
		{"counts", study.Source{Value: 3, Basis: study.OfCounts, PerCount: .0001, Coverage: entered("standard")}, .0003},
		{"triangular", study.Source{Value: .06, Basis: study.Absolute, Form: "triangular", Coverage: entered("limits")}, .024494897},
		{"arc sine", study.Source{Value: .06, Basis: study.Absolute, Form: "arc sine", Coverage: entered("limits")}, .042426407},
		{"t", study.Source{Value: .06, Basis: study.Absolute, Form: "Student", Degrees: 2, Coverage: entered("95 %")}, .013944886},
	} {
		p := pair(rows(30, even, line), threeStations, "m", "m")
		row.s.Name, row.s.Of, row.s.Pattern = row.name, study.OfData, study.Independent
		p.Questions[0].Sources[0] = row.s
		c := only(t, p)
		near(t, row.name, c.Stations[1].UD, row.want, 1e-8)
		if c.Withheld {
			t.Errorf("%s: withheld", row.name)
		}
		p.Questions[0].Sources[0].Form, p.Questions[0].Sources[0].Coverage = "normal", entered("limits")
		if c := only(t, p); !c.Withheld || !notice.Has(c.Notices, "u-form") {
			t.Errorf("%s: limits of a normal distribution are taken", row.name)
		}
	}
	p := pair(rows(30, even, line), threeStations, "m", "m")
	p.Questions[0].Sources[0] = study.Source{Name: "counts", Of: study.OfData, Value: 3, Basis: study.OfCounts, Coverage: entered("1"), Pattern: study.Independent}
	if c := only(t, p); !c.Withheld {
		t.Error("counts of no size are taken")
	}
}

// An error of the dynamic pressure that both sides share moves S and D by the
// same part: what is left in E is that part of E. Of an offset that both share
// nothing is left. By hand, with S = 2 + x.
func TestSharedSourceCancels(t *testing.T) {
	p := pair(rows(30, even, line), threeStations, "m", "m")
	q := &p.Questions[0]
	q.Sources = append(q.Sources, study.Source{Name: "q", Of: study.OfData, Value: 10, Basis: study.OfReading, Coverage: entered("1"), Pattern: study.Common, Shared: true})
	c := only(t, p)
	for i, e := range []float64{.1, 5.4, -1.2} {
		rest := .01*.01 + .01*.01
		near(t, "E", c.Stations[i].E, e, 1e-5)
		near(t, "u_val", c.Stations[i].UVal, math.Sqrt(rest+.01*e*e), 1e-6)
		near(t, "u_D", c.Stations[i].UD, math.Sqrt(1e-4+.01*[]float64{4, 9, 16}[i]), 1e-6)
	}
	near(t, "left", c.Shared[0].Left, .1*math.Sqrt((.01+29.16+1.44)/3), 1e-6)
	if !notice.Has(c.Notices, "source-shared") {
		t.Error("the sharing is not told")
	}
	q.Sources[2].Basis = study.Absolute
	near(t, "u_val of a shared offset", only(t, p).Stations[1].UVal, .01*math.Sqrt2, 1e-6)
	half := .5
	q.Sources[2].Sensitivity = &half
	near(t, "u_val of an offset of which the simulation has half", only(t, p).Stations[1].UVal, math.Sqrt(2e-4+25), 1e-6)
}

// Sensitivities from runs of S = 2 + x + 3 U: 3 exactly, whatever the runs; of
// S = x + U² at U = 2 from unequal steps 4, from one side 4 + step.
func TestInputsFromRuns(t *testing.T) {
	linear := func(u float64) func(x float64) float64 { return func(x float64) float64 { return 2 + x + 3*(u-2) } }
	square := func(u float64) func(x float64) float64 { return func(x float64) float64 { return x + u*u } }
	for _, row := range []struct {
		name   string
		of     func(u float64) func(x float64) float64
		at     []float64
		want   float64
		method string
	}{
		{"central", linear, []float64{1.9, 2.1}, 3, "central, two runs"},
		{"above", linear, []float64{2.5}, 3, "one-sided, two runs"},
		{"below", linear, []float64{1.5}, 3, "one-sided, two runs"},
		{"unequal", square, []float64{1.5, 3}, 4, "three runs, unequal steps"},
		{"one side of a parabola", square, []float64{2.5}, 4.5, "one-sided, two runs"},
	} {
		p := pair(rows(30, even, row.of(2)), threeStations, "m", "m")
		for i, u := range row.at {
			attach(p, fmt.Sprintf("run%d", i), study.InputRun, rows(30, even, row.of(u)), func(s *study.Slip) { s.Input, s.InputAt = entered("U"), entered(fmt.Sprint(u)) })
		}
		p.Questions[0].Sources = append(p.Questions[0].Sources, study.Source{Name: "speed", Of: study.OfInput, Input: "U", Unit: "m/s", Nominal: 2, Value: 2, Basis: study.OfReading, Coverage: entered("2")})
		c := only(t, p)
		if len(c.Inputs) != 1 || c.Inputs[0].Method != row.method {
			t.Errorf("%s: inputs %+v", row.name, c.Inputs)
			continue
		}
		near(t, row.name, c.Inputs[0].Sensitivity, row.want, 1e-4)
		near(t, row.name+", u of the input", c.Inputs[0].U, .02, 1e-12)
		near(t, row.name+", u_input", c.Stations[0].UInput, .02*row.want, 1e-5)
		if c.InputForm != study.InputsCounted || c.Withheld {
			t.Errorf("%s: form %q, withheld %v", row.name, c.InputForm, c.Withheld)
		}
	}
}

// Without runs and without an entered sensitivity an input is an open point; an
// input that acts on the data too counts by the difference of the two
// sensitivities, and not once more as a source of the data.
func TestInputsEntered(t *testing.T) {
	p := pair(rows(30, even, line), threeStations, "m", "m")
	q := &p.Questions[0]
	q.Sources = append(q.Sources, study.Source{Name: "T", Of: study.OfInput, Input: "T", Value: .3, Basis: study.Absolute, Coverage: entered("1")})
	if c := only(t, p); !c.Withheld || !notice.Has(c.Notices, "input-sensitivity") {
		t.Error("an input without a sensitivity is taken")
	}
	set := func(field, value string) {
		t.Helper()
		if err := p.Set(study.Target{Kind: "source", ID: "C|q", Field: field}, value, "", ""); err != nil {
			t.Fatal(err)
		}
	}
	set("2.sensitivity", "5")
	near(t, "u_input", only(t, p).Stations[0].UInput, 1.5, 1e-12)
	set("2.shared", "yes")
	if c := only(t, p); !c.Withheld || !notice.Has(c.Notices, "input-shared") {
		t.Error("a shared input without its effect on the data is taken")
	}
	set("2.data_sensitivity", "3")
	near(t, "u_input of the shared input", only(t, p).Stations[0].UInput, .6, 1e-12)
	q.Sources[0].Name = "T"
	if c := only(t, p); !c.Withheld || !notice.Has(c.Notices, "shared-twice") {
		t.Error("a shared input counts twice")
	}
}

// That the inputs have no uncertainty is said by a person, with a reason.
func TestNoInputUncertaintyIsDecided(t *testing.T) {
	p := pair(rows(30, even, line), threeStations, "m", "m")
	has := func(c *study.Cell, missing string) bool {
		for _, o := range c.Open {
			if o.Missing == missing {
				return true
			}
		}
		return false
	}
	if c := only(t, p); !has(c, "the input uncertainty") || c.InputForm != study.InputsNominal {
		t.Errorf("open points %+v, form %q", c.Open, c.InputForm)
	}
	if err := p.Set(study.Target{Kind: "question", ID: "C|q", Field: "no_input"}, "the inlet is prescribed", "", ""); err != nil {
		t.Fatal(err)
	}
	if c := only(t, p); has(c, "the input uncertainty") || !notice.Has(c.Notices, "u-input-none") {
		t.Errorf("open points %+v", c.Open)
	}
}

// The scatter of three runs at two stations is their sample covariance, by hand
// from runs (0,0),
// (1,4), (2,2): variances 1 and 4, covariance 1; with the independent 0.02 of
// the pair the joint statistic of E = (1, 2) is Eᵀ V⁻¹ E.
func TestMembers(t *testing.T) {
	p := pair("x,y\n0,1\n1,2\n", "x,y\n0,0\n1,0\n", "m", "m")
	p.Questions[0].Choices.UInterp = false
	attach(p, "members", study.Members, "x,y,b,c\n0,0,1,2\n1,0,4,2\n", nil)
	c := only(t, p)
	if c.Members == nil || c.Members.N != 3 || c.Members.Rank != 2 {
		t.Fatalf("members %+v", c.Members)
	}
	near(t, "u_input", c.Stations[0].UInput, 1, 1e-12)
	near(t, "u_input", c.Stations[1].UInput, 2, 1e-12)
	a, b, d := 1+2e-4, 1.0, 4+2e-4
	near(t, "statistic", c.Joint.Statistic, (d-4*b+4*a)/(a*d-b*b), 1e-9)
	near(t, "statistic if independent", c.Joint.Independent, 1/a+4/d, 1e-9)
	attach(p, "few", study.Members, "x,y\n0,0\n1,0\n", nil)
	if c := only(t, p); !c.Withheld || !notice.Has(c.Notices, "members-few") {
		t.Error("one run makes a scatter")
	}
}

// An interval of the inputs is an interval of E: the standard uncertainty stays,
// the ends move by the sensitivity times the half-width, and a requirement is
// held against the wider interval.
func TestIntervalsStayApart(t *testing.T) {
	five := 5.0
	p := oneValue("10.2", "y\n10\n")
	q := &p.Questions[0]
	q.Requirement = &study.Requirement{Value: .5}
	before := only(t, p)
	q.Sources = append(q.Sources, study.Source{Name: "roughness", Of: study.OfInput, Input: "k", Value: .1, Basis: study.Absolute, Form: study.Interval, Sensitivity: &five})
	c := only(t, p)
	if before.Requirement.Outcome != study.Shown || c.Requirement.Outcome != study.NotResolved || c.Withheld {
		t.Errorf("outcomes %q and %q, withheld %v", before.Requirement.Outcome, c.Requirement.Outcome, c.Withheld)
	}
	near(t, "u_val", c.Stations[0].UVal, float64(before.Stations[0].UVal), 0)
	near(t, "lower end", c.Stations[0].Lo, float64(before.Stations[0].Lo)-.5, 1e-9)
	near(t, "upper end", c.Stations[0].Hi, float64(before.Stations[0].Hi)+.5, 1e-9)
	near(t, "half-width", c.Bound.Half, .5, 1e-12)
	if before.Stations[0].Reading != study.SignResolved || c.Stations[0].Reading != study.WithinNoise {
		t.Errorf("readings %q and %q", before.Stations[0].Reading, c.Stations[0].Reading)
	}
}

// A size that is unknown withholds u_val; what u_D would have to be is told. By
// hand: E = 0.2, u_num = 0.01, k = 2, requirement 0.5: shown while u_D stays
// below √(0.15² − 0.01²); requirement 0.1: not met below √(0.05² − 0.01²); with
// none the sign is resolved below √(0.1² − 0.01²); at 0.19 not resolved at all.
func TestUnknownIsAValue(t *testing.T) {
	p := oneValue("10.2", "y\n10\n")
	at := study.Target{Kind: "source", ID: "C|q", Field: "0.value"}
	if err := p.Set(at, "unknown", "", ""); err != nil {
		t.Fatal(err)
	}
	for _, row := range []struct {
		limit float64
		word  string
		u     float64
	}{{.5, study.Shown, .149666295}, {.1, study.NotMet, .048989795}, {0, study.SignResolved, .099498744}, {.19, study.NotResolved, math.NaN()}} {
		p.Questions[0].Requirement = nil
		if row.limit > 0 {
			p.Questions[0].Requirement = &study.Requirement{Value: row.limit}
		}
		c := only(t, p)
		if c.Stations[0].UVal.Known() || !c.Withheld || !notice.Has(c.Notices, "u-unknown") || c.Bounding == nil || c.Bounding.Word != row.word {
			t.Fatalf("limit %v: withheld %v, bounding %+v", row.limit, c.Withheld, c.Bounding)
		}
		if c.Bounding.UD.Known() != !math.IsNaN(row.u) {
			t.Errorf("limit %v: u_D %v", row.limit, c.Bounding.UD)
		} else if c.Bounding.UD.Known() {
			near(t, "u_D", c.Bounding.UD, row.u, 1e-9)
			// The word holds just below and no longer just above.
			for _, side := range []float64{.999, 1.001} {
				q := p.Clone()
				q.Questions[0].Sources[0].Unknown, q.Questions[0].Sources[0].Value = false, row.u*side
				got := only(t, q)
				word := got.Stations[0].Reading
				if row.limit > 0 {
					word = got.Requirement.Outcome
				}
				if (word == row.word) != (side < 1) {
					t.Errorf("limit %v: at %v u_D the word is %q", row.limit, side, word)
				}
			}
		}
	}
	if err := p.Set(at, "0.01", "", ""); err != nil || only(t, p).Withheld {
		t.Errorf("a value does not take the unknown back: %v", err)
	}
}

// Every field of a source can be set and is refused what it cannot be.
func TestEveryFieldOfASourceIsEntered(t *testing.T) {
	p := oneValue("10.2", "y\n10\n")
	for _, row := range []struct {
		field, value string
		refused      bool
	}{
		{"value", "0.5", false}, {"value", "much", true}, {"upper", "0.7", false}, {"upper", "", false}, {"upper", "-1", true}, {"per_count", "0.0001", false}, {"basis", "counts", false}, {"basis", "some", true},
		{"form", "triangular", false}, {"form", "interval", false}, {"form", "round", true}, {"type", "A", false}, {"type", "C", true}, {"shared", "yes", false}, {"shared", "often", true},
		{"input", "U", false}, {"unit", "m/s", false}, {"nominal", "-3", false}, {"sensitivity", "-0.1", false}, {"data_sensitivity", "x", true}, {"degrees", "4", false},
	} {
		err := p.Set(study.Target{Kind: "source", ID: "C|q", Field: "0." + row.field}, row.value, "", "")
		if (err != nil) != row.refused {
			t.Errorf("%s = %q: %v", row.field, row.value, err)
		}
	}
	data, err := p.Save()
	if err != nil || !strings.Contains(string(data), `"per_count": 0.0001`) {
		t.Errorf("not saved: %v", err)
	}
}

// A heat flow q = ρ Q cp (Ti − To) of five inputs: u 4524.6132364 where all are
// independent, 2853.4788393 where both thermometers share one error of 0.3 K.
// Source: published-examples.md of the references, "shared input"; u by the
// slopes q/ρ, q/Q, q/cp and ± ρ Q cp.
func TestHeatFlowOfFiveInputs(t *testing.T) {
	const slope = 990 * 2e-3 * 4180
	p := oneValue("248292", "y\n248000\n")
	input := func(name string, sensitivity, u float64) study.Source {
		return study.Source{Name: name, Of: study.OfInput, Input: name, Value: u, Basis: study.Absolute, Coverage: entered("1"), Sensitivity: &sensitivity}
	}
	q := &p.Questions[0]
	q.Sources = append(q.Sources, input("rho", 248292.0/990, 3), input("Q", 248292/2e-3, 2e-5), input("cp", 248292.0/4180, 20), input("Ti", slope, .3), input("To", -slope, .3))
	near(t, "u of independent thermometers", only(t, p).Stations[0].UInput, 4524.6132364, 1e-6)
	q.Sources = q.Sources[:5]
	both := input("T", slope, .3)
	other := slope
	both.Shared, both.DataSensitivity = true, &other
	q.Sources = append(q.Sources, both)
	near(t, "u of one error of both", only(t, p).Stations[0].UInput, 2853.4788393, 1e-6)
}

// Members of a quantity that is brought into a form are brought into it as the
// finest run is: 515 and 525 Pa over q = 500 Pa scatter by 10/√2/500.
func TestMembersTakeTheForm(t *testing.T) {
	s := pressures(0)
	attach(s, "members", study.Members, "x,y,b\n0,515,525\n1,515,525\n", func(p *study.Slip) { p.Y.Unit = entered("Pa") })
	c := only(t, s)
	if c.Members == nil {
		t.Fatalf("%+v", c.Notices)
	}
	near(t, "u of the members", c.Members.U, 10/math.Sqrt2/500, 1e-9)
}

// A column of the numerical uncertainty in a file in kPa is in kPa, whatever the
// data are in, and one that states percent is of the value.
func TestColumnsOfUncertaintyKeepTheirUnit(t *testing.T) {
	s := pair("x,y,un\n0,1,0.002\n1,1,0.002\n", "x,y,ud (%)\n0.2,1000,2\n0.6,1000,2\n", "m", "m")
	s.Slips[0].Y.Unit, s.Slips[1].Y.Unit = entered("kPa"), entered("Pa")
	q := &s.Questions[0]
	q.Sources[1].Column, q.Sources[0].Column = "un", "ud"
	c := only(t, s)
	near(t, "u_num", c.Stations[0].UNum, 2, 1e-9)
	near(t, "u_D", c.Stations[0].UD, 20, 1e-9)
	s.Files[1].Data = []byte("x,y,ud (K)\n0.2,1000,2\n0.6,1000,2\n")
	s.Files[1].SHA256 = study.Hash(s.Files[1].Data)
	if c := only(t, s); !c.Withheld || !notice.Has(c.Notices, "unit-dimension") {
		t.Error("kelvins are taken as pascals")
	}
}

// Of a source that acts on both sides and has two of its own only what is left
// of both counts, in the sampled interval too.
func TestSharedSourceOfTwoSides(t *testing.T) {
	s := oneValue("2", "y\n1.5\n")
	upper := .4
	s.Questions[0].Sources = append(s.Questions[0].Sources, study.Source{Name: "q", Of: study.OfData, Value: .2, Upper: &upper, Basis: study.Absolute, Coverage: entered("1"), Pattern: study.Common, Shared: true})
	c := only(t, s)
	near(t, "u_val", c.Stations[0].UVal, .01*math.Sqrt2, 1e-9)
	if c.Sampled != nil {
		t.Errorf("two sides of which nothing is left are sampled: %+v", c.Sampled)
	}
	part := .5
	s.Questions[0].Sources[2].Sensitivity = &part
	c = only(t, s)
	near(t, "what is left of the side facing E", c.Stations[0].UVal, math.Sqrt(2e-4+.04), 1e-9)
	near(t, "sampled: lower side", c.Sampled.Minus, .1, 1e-9)
	near(t, "sampled: upper side", c.Sampled.Plus, .2, 1e-9)
	part = 3 // S moves by three times D: what is left has the other sign, and the other side faces E
	c = only(t, s)
	near(t, "the other side facing E", c.Stations[0].UVal, math.Sqrt(2e-4+.16), 1e-9)
}
