package study_test

import (
	"fmt"
	"math"
	"strings"
	"testing"

	"weirmark/core/notice"
	"weirmark/core/refinement"
	"weirmark/core/study"
)

// gridRun is a run of one value on one grid.
type gridRun struct {
	name, head    string // head stands above the row
	cells         float64
	value         float64
	yPlus, stated string
}

// gridStudy is a study of one value over runs, each in a file of its own,
// against a measured value.
func gridStudy(runs ...gridRun) *study.Study {
	s := study.New()
	add := func(id, name, text string, p study.Slip) {
		s.Files = append(s.Files, study.File{ID: id, Name: name, SHA256: study.Hash([]byte(text)), Data: []byte(text)})
		p.ID, p.File, p.Case, p.Quantity = "s"+id, id, entered("C1"), entered("drag")
		p.Y = study.ColumnUse{Column: entered("Cd"), Unit: entered("1")}
		s.Slips = append(s.Slips, p)
	}
	for _, r := range runs {
		text := fmt.Sprintf("%sn Cd\n1 %.17g\n", r.head, r.value)
		p := study.Slip{Role: entered(study.Simulation), Model: entered("A"), Grid: entered(r.name), Cells: entered(fmt.Sprint(r.cells))}
		if r.yPlus != "" {
			p.YPlus = entered(r.yPlus)
		}
		if r.stated != "" {
			p.Settings = entered(r.stated)
		}
		add("f"+r.name, r.name+".dat", text, p)
	}
	add("ref", "ref.csv", "n Cd\n1 0.0300\n", study.Slip{Role: entered(study.Reference)})
	s.Questions = []study.Question{{Case: "C1", Quantity: "drag", Kind: entered(study.KindTest), Use: entered(study.UseValidation), Choices: study.DefaultChoices(),
		Sources: []study.Source{{Name: "balance", Of: study.OfData, Value: 2e-4, Basis: study.Absolute, Coverage: entered("standard"), Pattern: study.Common}}}}
	return s
}

// second are four runs of 0.03 + 1e-4 h², h doubling, in three dimensions.
func second(heads ...string) []gridRun {
	runs := make([]gridRun, 4)
	for i := range runs {
		h := math.Pow(2, float64(3-i))
		runs[i] = gridRun{name: fmt.Sprintf("G%d", i+1), cells: 4096e3 / (h * h * h), value: 0.03 + 1e-4*h*h}
		if i < len(heads) {
			runs[i].head = heads[i]
		}
	}
	return runs
}

func cellOf(s *study.Study) study.Cell { return study.Evaluate(s, study.Options{}).Cells[0] }

func noticeText(c study.Cell, code string) string {
	for _, n := range c.Notices {
		if n.Code == code {
			return n.Text
		}
	}
	return ""
}

// TestGridCard: counts, all ratios, y+ and settings of a family stand in the
// report.
func TestGridCard(t *testing.T) {
	runs := second("# scheme: second order\n", "# scheme: second order\n", "# scheme: second order\n", "# scheme: second order\n")
	for i := range runs {
		runs[i].yPlus = fmt.Sprint(4 * math.Pow(2, float64(3-i)))
	}
	s := gridStudy(runs...)
	for field, value := range map[string]string{"family.similar": study.SimilarYes, "family.wall": "wall functions", "family.scheme": "second-order upwind", "family.regime": study.RegimeSteady} {
		if err := s.Set(study.Target{Kind: "question", ID: "C1|drag", Field: field}, value, "", ""); err != nil {
			t.Fatal(err)
		}
	}
	g := cellOf(s).Grids
	card := g.Card
	if len(card.Ratios) != 6 || card.Similar != study.SimilarYes || card.Wall != "wall functions" || card.Scheme != "second-order upwind" || card.Regime != study.RegimeSteady {
		t.Fatalf("%+v", card)
	}
	want := map[string]study.Number{"G2 G1": 2, "G3 G1": 4, "G3 G2": 2, "G4 G1": 8, "G4 G2": 4, "G4 G3": 2}
	for _, r := range card.Ratios {
		if got := want[r.Fine+" "+r.Coarse]; math.Abs(float64(r.R-got)) > 1e-12 {
			t.Errorf("%+v, want %v", r, got)
		}
	}
	if len(card.Settings) != 1 || card.Settings[0].Key != "scheme" || card.Settings[0].Differs || card.Settings[0].Values[3] != "second order" {
		t.Errorf("%+v", card.Settings)
	}
	if g.Points[0].YPlus != 32 || g.Points[3].YPlus != 4 {
		t.Errorf("%+v", g.Points)
	}
}

// TestGridsThatAreNoFamily: one run with another setting is caught and named,
// from the file or as entered; what differs on every grid is of the grid. A
// wall treatment that changes, a first cell off the spacing and a stated lack
// of similarity are told.
func TestGridsThatAreNoFamily(t *testing.T) {
	same := "# scheme: second order\n"
	odd := "# scheme: first order\n"
	heights := func(y ...string) []gridRun {
		runs := second()
		for i := range runs {
			runs[i].yPlus = y[i]
		}
		return runs
	}
	entering := second()
	entering[0].stated, entering[1].stated = "limiter: none; scheme: b", "limiter: minmod"
	close := second()
	close[2].cells = close[3].cells / 1.3 // r = 1.09
	for _, row := range []struct {
		what, code string
		runs       []gridRun
		words      []string
		asks       bool
	}{
		{"one run set apart", "grid-settings", second(same, same, same, odd), []string{"scheme is “first order” on G4 and “second order” on G1, G2, G3"}, true},
		{"the coarsest set apart", "grid-settings", second(odd, same, same, same), []string{"“first order” on G1"}, true},
		{"two and two", "grid-settings", second(odd, odd, same, same), []string{"on G1, G2", "on G3, G4"}, true},
		{"all the same", "", second(same, same, same, same), nil, false},
		{"one does not say", "", second(same, same, same), nil, false},
		{"of the grid", "", second("# time step: 4\n", "# time step: 3\n", "# time step: 2\n", "# time step: 1\n"), nil, false},
		{"of the run", "", second("# date: a\n", "# date: a\n", "# date: a\n", "# date: b\n"), nil, false},
		{"entered on two of four", "grid-settings", entering, []string{"limiter is “none” on G1 and “minmod” on G2"}, true},
		{"wall treatment", "grid-wall", heights("38", "27", "12", "0.9"), []string{"38, 27, 12, 0.90"}, true},
		{"first cells", "grid-first-cell", heights("1", "1", "1", "1"), []string{"1.0, 1.0, 1.0, 1.0"}, false},
		{"close grids", "grid-ratio", close, []string{"1.09", "below 1.3"}, false},
	} {
		c := cellOf(gridStudy(row.runs...))
		found := ""
		for _, code := range []string{"grid-settings", "grid-wall", "grid-first-cell", "grid-ratio"} {
			if text := noticeText(c, code); text != "" && (row.code == code || row.code == "") {
				found = text
			}
		}
		if (found != "") != (row.code != "") {
			t.Errorf("%s: %q", row.what, found)
		}
		for _, word := range row.words {
			if !strings.Contains(found, word) {
				t.Errorf("%s: %q does not say %q", row.what, found, word)
			}
		}
		asks := false
		for _, o := range c.Open {
			asks = asks || o.Course == 1 && o.Text == found && found != ""
		}
		if asks != row.asks {
			t.Errorf("%s: asked %v", row.what, asks)
		}
	}
	s := gridStudy(second(same, same, same, odd)...)
	s.Questions[0].Family = &study.Family{Similar: study.SimilarNo, Regime: study.RegimeScales}
	s.Questions[0].Answers = map[string]string{"grid-settings": "the same to four digits on G3"}
	c := cellOf(s)
	if !notice.Has(c.Notices, "grid-not-similar") || !notice.Has(c.Notices, "grid-scales") || !strings.Contains(noticeText(c, "finding-answered"), "the same to four digits") {
		t.Errorf("%+v", c.Notices)
	}
}

// TestRulesOfAValue: the report holds what every rule makes of the values, and
// the line behind U where it is another than that of the observed order.
func TestRulesOfAValue(t *testing.T) {
	s := gridStudy(second()...)
	c := cellOf(s)
	if len(c.Grids.Rules) != len(refinement.Rules) || c.Grids.Fit != nil {
		t.Fatalf("%+v, %+v", c.Grids.Rules, c.Grids.Fit)
	}
	for _, r := range c.Grids.Rules {
		if !r.U.Known() || math.Abs(float64(r.UNum-r.U/1.15)) > 1e-12 {
			t.Errorf("%+v", r)
		}
	}
	if u := float64(c.Grids.Rules[0].U); math.Abs(u-1.25e-4) > 1e-12 || c.Grids.Rules[0].Rule != "three finest grids, bounded" {
		t.Errorf("%+v", c.Grids.Rules[0])
	}
	for i, mark := range map[int]string{3: "implemented from its description", 4: "coefficients from memory", 5: "coefficients from memory"} {
		if !strings.Contains(c.Grids.Rules[i].Rule, mark) {
			t.Errorf("%q is not marked: %s", c.Grids.Rules[i].Rule, mark)
		}
	}
	s.Questions[0].Choices.Rule = refinement.RuleLeastSquares
	f := cellOf(s).Grids.Fit
	if f == nil || math.Abs(float64(f.Base)-0.03) > 1e-9 || len(f.Terms) != 1 || math.Abs(float64(f.Terms[0].Power)-2) > 1e-6 || math.Abs(float64(f.Terms[0].Coefficient)-1e-4) > 1e-9 {
		t.Errorf("%+v", f)
	}
}

// TestStatedNext: the grid that brings u_num to a stated value follows from
// u ~ h², and its cost from the exponent entered.
func TestStatedNext(t *testing.T) {
	s := gridStudy(second()...)
	have := float64(cellOf(s).Grids.UNum)
	set := func(field, value string) {
		t.Helper()
		if err := s.Set(study.Target{Kind: "question", ID: "C1|drag", Field: "family." + field}, value, "", ""); err != nil {
			t.Fatal(err)
		}
	}
	set("target", fmt.Sprint(have/4)) // h half, cells eightfold
	n := cellOf(s).Grids.Stated
	if n == nil || n.Met || math.Abs(float64(n.Cells)/(8*4096e3)-1) > 5e-3 || math.Abs(float64(n.Cost)-16) > 1e-6 {
		t.Errorf("%+v", n)
	}
	set("cost_exponent", "1")
	if n := cellOf(s).Grids.Stated; math.Abs(float64(n.Cost)-8) > 1e-6 {
		t.Errorf("%+v", n)
	}
	set("target", fmt.Sprint(2*have))
	if n := cellOf(s).Grids.Stated; !n.Met || n.Cells.Known() {
		t.Errorf("%+v", n)
	}
	set("target", "")
	set("cost_exponent", "")
	if c := cellOf(s); c.Grids.Stated != nil || s.Questions[0].Family != nil {
		t.Errorf("%+v, %+v", c.Grids.Stated, s.Questions[0].Family)
	}
	for _, bad := range [][2]string{{"similar", "perhaps"}, {"regime", "x"}, {"target", "-1"}, {"cost_exponent", "0"}, {"colour", "x"}} {
		if err := s.Set(study.Target{Kind: "question", ID: "C1|drag", Field: "family." + bad[0]}, bad[1], "", ""); err == nil {
			t.Errorf("%v was taken", bad)
		}
	}
}

// TestCoarseTriple: beside an oscillation it is said that a coarse triple can
// mislead, and what the three grids before do.
func TestCoarseTriple(t *testing.T) {
	runs := second()
	runs[3].value = runs[2].value + 5e-5 // up again
	c := cellOf(gridStudy(runs...))
	if c.Grids.Class != string(refinement.Oscillatory) || !strings.Contains(noticeText(c, "grid-coarse-triple"), "the three next are monotone") {
		t.Errorf("%s, %q", c.Grids.Class, noticeText(c, "grid-coarse-triple"))
	}
	if c := cellOf(gridStudy(second()...)); notice.Has(c.Notices, "grid-coarse-triple") {
		t.Error("said of a monotone family")
	}
}

// TestDivergingNeedsATypedReason: a family that diverges blocks the statement
// even where a numerical uncertainty is entered; a typed reason lets that
// stand, and without one entered there is still no statement.
func TestDivergingNeedsATypedReason(t *testing.T) {
	runs := second()
	for i := range runs {
		runs[i].value = 0.03 + 1e-4*math.Pow(2, float64(i))
	}
	s := gridStudy(runs...)
	held := func(want bool, what string) {
		t.Helper()
		if c := cellOf(s); c.Withheld != want || c.Grids.U.Known() || c.Grids.UNum.Known() {
			t.Errorf("%s: withheld %v, open %+v", what, c.Withheld, c.Open)
		}
	}
	held(true, "nothing entered")
	q := &s.Questions[0]
	q.Answers = map[string]string{"grid-diverging": "the quantity has a singular point at the edge; see report 12"}
	held(true, "a reason alone")
	q.Sources = append(q.Sources, study.Source{Name: "grid, judged", Of: study.OfNumerical, Value: 1e-3, Basis: study.Absolute, Coverage: entered("standard"), Pattern: study.Common, Origin: "report 12"})
	held(false, "a reason and a value")
	q.Answers = nil
	held(true, "a value alone")
}
