package study_test

import (
	"fmt"
	"math"
	"strings"
	"testing"

	"weirmark/core/notice"
	"weirmark/core/study"
)

func entered(v string) study.Field { return study.Field{Value: v, By: study.Entered} }

// pair makes a study of one simulation and one reference, each with columns x
// and y in the given units, everything else entered.
func pair(sim, ref, xs, xr string) *study.Study {
	s := study.New()
	for _, f := range []struct{ id, name, text string }{{"s", "sim.csv", sim}, {"r", "ref.csv", ref}} {
		s.Files = append(s.Files, study.File{ID: f.id, Name: f.name, SHA256: study.Hash([]byte(f.text)), Data: []byte(f.text)})
	}
	slip := func(id, role, unit string) study.Slip {
		return study.Slip{ID: id, File: id, Role: entered(role), Case: entered("C"), Quantity: entered("q"), Model: entered("A"),
			X: study.ColumnUse{Column: entered("x"), Unit: entered(unit)}, Y: study.ColumnUse{Column: entered("y"), Unit: entered("1")}}
	}
	s.Slips = []study.Slip{slip("s", study.Simulation, xs), slip("r", study.Reference, xr)}
	s.Questions = []study.Question{{Case: "C", Quantity: "q", Kind: entered(study.KindTest), Use: entered(study.UseValidation), Choices: study.DefaultChoices(),
		Sources: []study.Source{
			{Name: "random", Of: study.OfData, Value: .01, Basis: study.Absolute, Coverage: entered("1"), Pattern: study.Independent},
			{Name: "grid", Of: study.OfNumerical, Value: .01, Basis: study.Absolute, Coverage: entered("1"), Pattern: study.Independent},
		}}}
	return s
}

func rows(n int, x func(i int) float64, y func(x float64) float64) string {
	var b strings.Builder
	b.WriteString("x,y\n")
	for i := range n {
		at := x(i)
		fmt.Fprintf(&b, "%.6g,%.6g\n", at, y(at))
	}
	return b.String()
}

func even(i int) float64 { return float64(i) / 29 }

func smooth(x float64) float64 { return 1 + math.Sin(3*x) }

func only(t *testing.T, s *study.Study) *study.Cell {
	t.Helper()
	r := study.Evaluate(s, study.Options{Alternatives: true})
	if len(r.Cells) != 1 {
		t.Fatalf("%d cells", len(r.Cells))
	}
	return &r.Cells[0]
}

// doubts are the codes that ask whether something is a mistake.
var doubts = []string{"ratio-constant", "offset-constant", "range-scaled", "curve-shuffled", "curve-outlier", "curve-magnitude", "readings-ratio", "curve-constant"}

func TestMistakesAreAskedAbout(t *testing.T) {
	plain := rows(30, even, smooth)
	for _, row := range []struct {
		name     string
		sim, ref string
		code     string
	}{
		{"clean", plain, rows(20, func(i int) float64 { return .01 + float64(i)/21 }, func(x float64) float64 { return smooth(x) * (1 + .05*x) }), ""},
		{"factor two", rows(30, even, func(x float64) float64 { return 2 * smooth(x) }), rows(20, func(i int) float64 { return float64(i) / 19 }, smooth), "ratio-constant"},
		{"datum", rows(30, even, func(x float64) float64 { return smooth(x) + 5 }), rows(20, func(i int) float64 { return float64(i) / 19 }, smooth), "offset-constant"},
		{"millimetres under metres", plain, rows(20, func(i int) float64 { return 1000 * float64(i) / 19 }, func(x float64) float64 { return smooth(x / 1000) }), "range-scaled"},
		{"magnitude", rows(30, even, func(x float64) float64 { return math.Abs(x - .41) }), rows(20, func(i int) float64 { return float64(i) / 19 }, func(x float64) float64 { return x - .41 }), "curve-magnitude"},
		{"placeholder", rows(30, even, func(float64) float64 { return 0 }), rows(20, func(i int) float64 { return float64(i) / 19 }, smooth), "curve-constant"},
		{"slip of ten", plain, rows(20, func(i int) float64 { return float64(i) / 19 }, func(x float64) float64 {
			if math.Abs(x-10./19) < 1e-9 {
				return 10 * smooth(x)
			}
			return smooth(x)
		}), "curve-outlier"},
		{"shuffled loop", rows(48, func(i int) float64 { return float64(i) / 47 }, func(x float64) float64 {
			if int(math.Round(x*47))%2 == 0 {
				return -1 + x
			}
			return .4 - .3*x
		}), rows(20, func(i int) float64 { return float64(i) / 19 }, smooth), "curve-shuffled"},
	} {
		c := only(t, pair(row.sim, row.ref, "m", "m"))
		for _, code := range doubts {
			if found := notice.Has(c.Notices, code); found != (code == row.code) {
				t.Errorf("%s: %s found %v, want %v", row.name, code, found, code == row.code)
			}
		}
	}
}

// An answer closes the finding but keeps it in the record.
func TestAnswersCloseFindings(t *testing.T) {
	s := pair(rows(30, even, func(x float64) float64 { return smooth(x) + 5 }), rows(20, func(i int) float64 { return float64(i) / 19 }, smooth), "m", "m")
	before := only(t, s)
	target := study.Target{}
	for _, o := range before.Open {
		if o.Target.Kind == "answer" {
			target = o.Target
		}
	}
	if target.Field != "offset-constant" {
		t.Fatalf("no open point asks for an answer: %+v", before.Open)
	}
	if err := s.Answer(target, "absolute against gauge pressure, kept as the test's own datum", "09:00"); err != nil {
		t.Fatal(err)
	}
	after := only(t, s)
	if len(after.Open) != len(before.Open)-1 || !notice.Has(after.Notices, "offset-constant") || !notice.Has(after.Notices, "finding-answered") {
		t.Errorf("open points %d → %d, notices %+v", len(before.Open), len(after.Open), after.Notices)
	}
}

func TestExclusions(t *testing.T) {
	s := pair(rows(30, even, smooth), rows(20, func(i int) float64 { return float64(i) / 19 }, func(x float64) float64 {
		if x > .99 {
			return smooth(x) + .5
		}
		return smooth(x) + .005
	}), "m", "m")
	with := only(t, s)
	q := study.Target{Kind: "question", ID: "C|q", Field: "21"}
	if err := s.Exclude(q, "", "09:00"); err == nil {
		t.Error("an exclusion without a reason was taken")
	}
	if err := s.Exclude(q, "probe broken", "09:00"); err != nil {
		t.Fatal(err)
	}
	if err := s.Exclude(q, "again", "09:00"); err == nil {
		t.Error("the same station was excluded twice")
	}
	without := only(t, s)
	if without.Summary.N != with.Summary.N-1 || without.StationsAll != with.StationsAll || len(without.Excluded) != 1 || without.Excluded[0].Why != "probe broken" || without.Excluded[0].Late {
		t.Errorf("n %d of %d, excluded %+v", without.Summary.N, without.StationsAll, without.Excluded)
	}
	told := false
	for _, f := range without.Fragile {
		told = told || f.Change == "the excluded stations counted"
	}
	if !told {
		t.Errorf("the result with the station is not among the alternatives: %+v", without.Fragile)
	}
	if err := s.Include(q, "09:01"); err != nil {
		t.Fatal(err)
	}
	if err := s.Reveal("C|q", "09:02"); err != nil {
		t.Fatal(err)
	}
	if err := s.Exclude(q, "looks odd", "09:03"); err != nil {
		t.Fatal(err)
	}
	late := only(t, s)
	if !notice.Has(late.Notices, "station-excluded-late") || !late.Excluded[0].Late {
		t.Errorf("an exclusion after the results were shown is not marked: %+v", late.Notices)
	}
}

// Leaving the correlation of a systematic source unset withholds the
// statement and shows both statistics.
func TestCorrelationMustBeStated(t *testing.T) {
	s := pair(rows(30, even, smooth), rows(20, func(i int) float64 { return float64(i) / 19 }, func(x float64) float64 { return smooth(x) + .02 }), "m", "m")
	s.Questions[0].Sources = append(s.Questions[0].Sources, study.Source{Name: "zero of the gauge", Of: study.OfData, Value: .02, Basis: study.Absolute, Coverage: entered("1")})
	c := only(t, s)
	if !notice.Has(c.Notices, "correlation-unset") || !c.Withheld {
		t.Errorf("withheld %v, notices %+v", c.Withheld, c.Notices)
	}
}
