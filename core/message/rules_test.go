package message

import (
	"math"
	"strings"
	"testing"

	"weirmark/core/notice"
	"weirmark/core/refinement"
	"weirmark/core/study"
)

// ruled returns the cell of a quantity of the worked demo under a rule, which
// is entered as the card offers it.
func ruled(t *testing.T, caseName, quantity, model, rule string, change func(*study.Study)) *study.Cell {
	t.Helper()
	s := DemoWorked()
	q := s.Question(caseName, quantity)
	if change != nil {
		change(s)
	}
	for _, e := range choices(q, true) {
		if e.Target.Field != "choices.rule" {
			continue
		}
		for _, o := range e.Options {
			if o.Value == rule {
				if err := s.Set(e.Target, rule, "", ""); err != nil {
					t.Fatal(err)
				}
				return cellAt(t, study.Evaluate(s, study.Options{}), caseName, quantity, model)
			}
		}
	}
	t.Fatalf("the card does not offer %q", rule)
	return nil
}

// TestRulesOnTheCard: every rule is offered, and makes the U that package
// refinement gives from the values of the design (6.1), over as many grids as
// the table marks.
func TestRulesOnTheCard(t *testing.T) {
	cells, values := []float64{0.41e6, 0.98e6, 2.35e6, 5.60e6}, []float64{5.92, 6.18, 6.31, 6.38}
	seen := map[study.Number]bool{}
	for _, rule := range refinement.Rules {
		c := ruled(t, "C3", demoLengthName, "A", rule, nil)
		want := refinement.Study(cells, values, 3, refinement.Options{Rule: rule, Bounded: true, Formal: 2})
		used := 0
		for i, p := range c.Grids.Points {
			if p.Used {
				used++
			} else if i > 0 && c.Grids.Points[i-1].Used {
				t.Errorf("%s: a coarser grid is used and %s is not", rule, p.Name)
			}
		}
		if math.Abs(float64(c.Grids.U)-want.U) > 1e-9 || math.Abs(float64(c.Grids.UNum)-want.U/1.15) > 1e-9 || used != want.Used || c.Grids.Rule != want.Rule {
			t.Errorf("%s: U %v, u_num %v, %d grids used, %s; want U %v, %d grids", rule, c.Grids.U, c.Grids.UNum, used, c.Grids.Rule, want.U, want.Used)
		}
		seen[c.Grids.U] = true
		answer := gridAnswer(c)
		if named := strings.Contains(answer, study.RuleName(rule)); named != (rule != refinement.RuleThree) {
			t.Errorf("%s: %s", rule, answer)
		}
	}
	// The range matters where values oscillate only: two rules agree here.
	if len(seen) != len(refinement.Rules)-1 {
		t.Errorf("%d different U by %d rules", len(seen), len(refinement.Rules))
	}
}

// TestRulesAndConvergence: no rule gives an order or a statement to what
// diverges, nor an order to what oscillates, and the answer prints none.
func TestRulesAndConvergence(t *testing.T) {
	for _, rule := range refinement.Rules {
		c := ruled(t, "C3", demoLeastName, "B", rule, nil)
		if c.Grids.Order.Known() || c.Grids.U.Known() || c.Grids.UNum.Known() || !c.Withheld || strings.Contains(gridAnswer(c), "observed order") {
			t.Errorf("%s: %+v", rule, c.Grids)
		}
		c = ruled(t, "C1", demoLiftName, "A", rule, nil)
		if c.Grids.Order.Known() || !c.Grids.UNum.Known() || c.Withheld || !strings.Contains(gridAnswer(c), "oscillate") || strings.Contains(gridAnswer(c), "observed order") {
			t.Errorf("%s: %+v, %s", rule, c.Grids, gridAnswer(c))
		}
	}
}

// TestTwoGridsOfAStudy: a family of two grids takes the rule of two grids,
// asked for or not, and names it.
func TestTwoGridsOfAStudy(t *testing.T) {
	shorten := func(s *study.Study) {
		for i := range s.Files {
			if f := &s.Files[i]; f.Name == "C3-floor.csv" {
				f.Data = withoutCoarse(t, f.Data)
				f.SHA256 = study.Read(*f).SHA256
			}
		}
	}
	want := 3 * .045 / (math.Pow(5.6/2.35, 2./3) - 1)
	for _, rule := range []string{refinement.RuleThree, refinement.RuleTwo} {
		c := ruled(t, "C3", demoLengthName, "B", rule, shorten)
		if math.Abs(float64(c.Grids.U)-want) > 1e-9 || c.Grids.Order.Known() || c.Withheld || !notice.Has(c.Notices, "grid-two") || !strings.HasPrefix(gridAnswer(c), "Two grids: whether the value converges cannot be told") {
			t.Errorf("%s: U %v, want %v; withheld %v, open %+v, %s", rule, c.Grids.U, want, c.Withheld, c.Open, gridAnswer(c))
		}
		if !strings.Contains(gridAnswer(c), "factor 3") {
			t.Errorf("%s: %s", rule, gridAnswer(c))
		}
		if len(gridNumbers(c)) != 1 {
			t.Errorf("%+v", gridNumbers(c))
		}
	}
}

// withoutCoarse drops the rows of grids G1 and G2.
func withoutCoarse(t *testing.T, data []byte) []byte {
	t.Helper()
	var kept []string
	dropped := 0
	for _, line := range strings.Split(string(data), "\n") {
		if strings.Contains(line, "G1") || strings.Contains(line, "G2") {
			dropped++
			continue
		}
		kept = append(kept, line)
	}
	if dropped == 0 {
		t.Fatal("no row of a coarse grid")
	}
	return []byte(strings.Join(kept, "\n"))
}
