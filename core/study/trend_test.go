package study_test

import (
	"math"
	"strings"
	"testing"

	"weirmark/core/notice"
	"weirmark/core/study"
)

// twoCases is one scalar in two cases: S = 12 and 15, D = 10 and 12.5, with a
// common offset of .3, a factor of 2 % of the reading, a random part and a grid
// part in both.
func twoCases() *study.Study {
	s := study.New()
	for _, c := range []struct{ name, sim, ref string }{{"C0", "y\n12\n", "y\n10\n"}, {"C1", "y\n15\n", "y\n12.5\n"}} {
		for _, f := range []struct{ role, text string }{{study.Simulation, c.sim}, {study.Reference, c.ref}} {
			id := c.name + f.role
			s.Files = append(s.Files, study.File{ID: id, Name: id + ".csv", SHA256: study.Hash([]byte(f.text)), Data: []byte(f.text)})
			s.Slips = append(s.Slips, study.Slip{ID: id, File: id, Role: entered(f.role), Case: entered(c.name), Quantity: entered("q"), Model: entered("A"), Y: study.ColumnUse{Column: entered("y"), Unit: entered("1")}})
		}
		s.Questions = append(s.Questions, study.Question{Case: c.name, Quantity: "q", Kind: entered(study.KindTest), Use: entered(study.UseValidation), Choices: study.DefaultChoices(), Sources: []study.Source{
			{Name: "zero", Of: study.OfData, Value: .3, Basis: study.Absolute, Coverage: entered("1"), Pattern: study.Common},
			{Name: "calibration", Of: study.OfData, Value: 2, Basis: study.OfReading, Coverage: entered("1"), Pattern: study.Common},
			{Name: "readings", Of: study.OfData, Value: .05, Basis: study.Absolute, Coverage: entered("1"), Pattern: study.Common, Random: true},
			{Name: "angle", Of: study.OfInput, Value: .04, Basis: study.Absolute, Coverage: entered("1"), Pattern: study.Common},
			{Name: "grid", Of: study.OfNumerical, Value: .03, Basis: study.Absolute, Coverage: entered("1"), Pattern: study.Independent},
		}})
	}
	s.Questions[1].Baseline = "C0"
	return s
}

// By hand: ΔS = 3, ΔD = 2.5; the zero and the angle cancel, of the calibration
// 2 % of 2.5 remains, random and grid parts add: u² = .05² + 2 .05² + 2 .03².
func TestChangeFromAnotherCase(t *testing.T) {
	near := func(n study.Number, want float64) bool { return math.Abs(float64(n)-want) < 1e-9 }
	r := study.Evaluate(twoCases(), study.Options{})
	if r.Cells[0].Trend != nil {
		t.Error("a change was compared that no one asked for")
	}
	l := r.Cells[1].Trend
	if l == nil {
		t.Fatalf("no change: %+v", r.Cells[1].Notices)
	}
	u := math.Sqrt(.05*.05 + 2*.05*.05 + 2*.03*.03)
	own := .05*.05 + .03*.03 + .3*.3 + .04*.04
	apart := math.Sqrt(2*own + .2*.2 + .25*.25)
	if !near(l.S, 3) || !near(l.D, 2.5) || !near(l.E, .5) || !near(l.U, u) || !near(l.Apart, apart) || !near(l.Lo, .5-2*u) || !near(l.Hi, .5+2*u) || l.Reading != study.SignResolved {
		t.Errorf("%+v, want u %v and %v", l, u, apart)
	}
	if got := strings.Join(l.Common, ","); got != "zero,calibration,angle" {
		t.Errorf("one error in both: %s", got)
	}
	// Another name is another error, and so is the name a new source bears.
	for _, name := range []string{"balance zero", "source 1"} {
		s := twoCases()
		s.Questions[0].Sources[0].Name, s.Questions[1].Sources[0].Name = name, "zero"
		if name == "source 1" {
			s.Questions[1].Sources[0].Name = name
		}
		if l := study.Evaluate(s, study.Options{}).Cells[1].Trend; !near(l.U, math.Sqrt(u*u+2*.3*.3)) {
			t.Errorf("%s: u %v", name, l.U)
		}
	}
	// Two cases that name each other end.
	s := twoCases()
	s.Questions[0].Baseline = "C1"
	if l := study.Evaluate(s, study.Options{}).Cells[0].Trend; l == nil || !near(l.E, -.5) {
		t.Errorf("back: %+v", l)
	}
	s.Questions[1].Baseline = "C7"
	if c := study.Evaluate(s, study.Options{}).Cells[1]; c.Trend != nil || !notice.Has(c.Notices, "trend-none") {
		t.Error("a case that is not there is not told")
	}
	// Without an uncertainty of the other case the change has none.
	s = twoCases()
	s.Questions[0].Sources = nil
	if l := study.Evaluate(s, study.Options{}).Cells[1].Trend; l == nil || l.U.Known() || l.Apart.Known() || l.Reading != "" || !near(l.E, .5) {
		t.Errorf("without u: %+v", l)
	}
}

// A kept cell is not kept when the other case changes.
func TestChangeIsNotRemembered(t *testing.T) {
	memory := &study.Memory{}
	s := twoCases()
	study.Evaluate(s, study.Options{Memory: memory})
	s.Questions[0].Sources[2].Value = .5
	got, want := study.Evaluate(s, study.Options{Memory: memory}).Cells[1].Trend, study.Evaluate(s, study.Options{}).Cells[1].Trend
	if got.U != want.U {
		t.Errorf("u %v from memory, %v anew", got.U, want.U)
	}
}

// |E|, U_V and the requirement of one value: E = 2.5, U_V = 2 u_val.
func TestOrderOfMarineSet(t *testing.T) {
	for _, row := range []struct {
		required float64
		order    string
	}{{3, "U_V < |E| ≤ U_reqd"}, {1, "U_V ≤ U_reqd < |E|"}, {.5, "U_reqd < U_V < |E|"}} {
		s := twoCases()
		q := &s.Questions[1]
		q.Scores, q.Requirement = &study.Scoring{Marine: true}, &study.Requirement{Value: row.required}
		m := study.Evaluate(s, study.Options{}).Cells[1].Marine
		if m == nil || len(m.Orderings) != 6 || m.K != 2 || m.E != 2.5 || math.Abs(float64(m.UV)-2*math.Sqrt(.3*.3+.25*.25+.05*.05+.04*.04+.03*.03)) > 1e-9 || float64(m.Required) != row.required {
			t.Fatalf("%+v", m)
		}
		for _, o := range m.Orderings {
			if (o.N == 1) != (o.Order == row.order) {
				t.Errorf("required %v: %+v", row.required, o)
			}
		}
	}
	s := twoCases()
	s.Questions[1].Scores = &study.Scoring{Marine: true}
	if study.Evaluate(s, study.Options{}).Cells[1].Marine != nil {
		t.Error("an order without a requirement")
	}
}
