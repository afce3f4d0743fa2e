package refinement

import (
	"math"
	"slices"
	"strings"
	"testing"

	"weirmark/core/notice"
)

// even is a family of n grids with r = 2 in two dimensions whose error is
// 0.01 h^p everywhere: no floor acts.
func even(n int, p float64) []Grid {
	var grids []Grid
	for k := range n {
		h := math.Pow(2, float64(k))
		g := Grid{Name: "G", Count: 4096 / (h * h)}
		for i := range 9 {
			g.X, g.Y = append(g.X, float64(i)/8), append(g.Y, 1+0.01*math.Pow(h, p))
		}
		grids = append(grids, g)
	}
	return grids
}

// TestAlongRules: of an exact family every rule gives, at every station, the U
// of its formula, from the error 0.01 of the finest grid.
func TestAlongRules(t *testing.T) {
	const p, formal = 1.5, 2.0
	e21 := 0.01 * (math.Pow(2, p) - 1)
	c := (math.Pow(2, p) - 1) / (math.Pow(2, formal) - 1)
	for _, row := range []struct {
		rule  string
		want  float64
		words string
	}{
		{"", 1.25 * 0.01, "1.25 times"},
		{RuleThree, 1.25 * 0.01, "1.25 times"},
		{RuleTwo, 3 * e21 / (math.Pow(2, formal) - 1), "assumed and not observed"},
		{RuleFormal, 1.25 * 0.01, "1.25 times"},
		{RuleLeastSquares, 1.25 * 0.01, "implemented from a description"},
		{RuleCorrection, (2*(1-c) + 1) * 0.01, "coefficients from memory"},
		{RuleFactor, (2.45 - 0.85*p/formal) * 0.01, "coefficients from memory"},
		{RuleRange, 3 * 0.01 * (math.Pow(4, p) - 1), "3 times the range"},
	} {
		l := Along(even(4, p), spread(9), 2, Options{Rule: row.rule, Formal: formal})
		for _, q := range l.Points {
			if math.Abs(q.U-row.want) > 1e-9*row.want || math.Abs(q.Order-p) > 1e-6 {
				t.Errorf("%q at %v: U %v, want %v; order %v", row.rule, q.X, q.U, row.want, q.Order)
				break
			}
		}
		if !strings.Contains(l.Rule, row.words) {
			t.Errorf("%q: %s", row.rule, l.Rule)
		}
	}
	if l := Along(even(3, p), spread(9), 2, Options{Rule: RuleLeastSquares}); !notice.Has(l.Notices, "grid-rule-few") || math.Abs(l.Points[4].U-1.25*0.01) > 1e-12 {
		t.Errorf("three grids by least squares: %+v", l)
	}
	if l := Along(even(3, p), spread(9), 2, Options{Rule: "best"}); !notice.Has(l.Notices, "grid-rule-unknown") {
		t.Errorf("an unknown rule: %v", l.Notices)
	}
}

// TestAlongLeastSquares: of exact power laws with orders from 0.5 to 2, U is
// 1.25 times the error on four and on six grids; where the finest three do not
// converge it is three times their range.
func TestAlongLeastSquares(t *testing.T) {
	for _, n := range []int{4, 6} {
		for _, p := range []float64{0.5, 0.8, 1, 1.7, 2} {
			l := Along(even(n, p), spread(9), 2, Options{Rule: RuleLeastSquares})
			for _, q := range l.Points {
				if math.Abs(q.U-1.25*0.01) > 1e-8 {
					t.Fatalf("%d grids, p %v: U %v", n, p, q.U)
				}
			}
			if !slices.Contains(codes(l.Notices), "grid-local-fitted") {
				t.Errorf("%v", l.Notices)
			}
		}
	}
	diverging := even(4, 1)
	for k := range diverging {
		for i := range diverging[k].Y {
			diverging[k].Y[i] = 1 - 0.1/math.Pow(2, float64(k))
		}
	}
	l := Along(diverging, spread(9), 2, Options{Rule: RuleLeastSquares})
	for _, q := range l.Points {
		if q.Class != Diverging || !math.IsNaN(q.Order) || math.Abs(q.U-3*0.075) > 1e-12 {
			t.Errorf("%+v", q)
		}
	}
}

// TestAlongTwoGrids: two grids have no class and no order along a curve; where
// their difference passes zero the uncertainty does not; two that are the same
// have none.
func TestAlongTwoGrids(t *testing.T) {
	l := Along(even(2, 2), spread(9), 2, Options{Formal: 2})
	for _, q := range l.Points {
		if q.Class != Insufficient || !math.IsNaN(q.Order) || math.Abs(q.U-3*0.01) > 1e-12 {
			t.Errorf("%+v", q)
		}
	}
	if !math.IsNaN(l.Common) || !slices.Equal(codes(l.Notices), []string{"grid-two"}) || !strings.Contains(l.Rule, "assumed and not observed") || l.R21 != 2 {
		t.Errorf("%+v", l)
	}
	crossing := family(101, one, func(x, h float64) float64 { return 0.01 * (x - 0.5) * h * h })[:2]
	for _, q := range Along(crossing, spread(101), 2, Options{}).Points {
		if !(q.U > 0.0005) {
			t.Errorf("at %v: U %v", q.X, q.U)
		}
	}
	same := family(9, one, func(x, h float64) float64 { return x })[:2]
	if l := Along(same, spread(9), 2, Options{}); !math.IsNaN(l.Points[4].U) || !slices.Equal(codes(l.Notices), []string{"grid-flat"}) {
		t.Errorf("%+v", l)
	}
	if l := Along(even(2, 2), spread(9), 2, Options{Rule: RuleThree}); !math.IsNaN(l.Points[4].U) || !slices.Equal(codes(l.Notices), []string{"grid-few"}) {
		t.Errorf("%+v", l)
	}
}

// TestFitLines: the line behind U goes through the finest value, or as near as
// the fit does, and there is none where there is no order to draw by.
func TestFitLines(t *testing.T) {
	counts, values := []float64{4096, 1024, 256, 64}, []float64{1.01, 1.04, 1.16, 1.64} // 1 + 0.01 h²
	for _, row := range []struct {
		opt  Options
		fit  bool
		base float64
	}{
		{Options{}, false, 0}, {Options{Rule: RuleLeastSquares}, true, 1}, {Options{Rule: RuleTwo, Formal: 1}, true, 0.98}, {Options{Rule: RuleFormal, Formal: 1}, true, 0.98}, {Options{Rule: RuleFormal, Formal: 3}, false, 0},
	} {
		r := Study(counts, values, 2, row.opt)
		if (r.Fit != nil) != row.fit || row.fit && (math.Abs(r.Fit.Base-row.base) > 1e-9 || math.Abs(r.Fit.At(1)-1.01) > 1e-9) {
			t.Errorf("%+v: %+v", row.opt, r.Fit)
		}
	}
	for _, v := range [][]float64{{1, 2, 2.25, 2.3}, {1, 1.25, 0.25, 3}, {3, 3, 3, 4}} {
		for _, rule := range Rules {
			if r := Study(counts, v, 2, Options{Rule: rule}); r.Fit != nil {
				t.Errorf("%v, %s: %+v", v, rule, r.Fit)
			}
		}
	}
	both := &expansion{linear: linear{c: []float64{0.5, 2, 3}}, form: formBoth}
	if got := both.line(1, math.NaN()).At(2); got != 1.5+4+12 {
		t.Errorf("f0 + a h + b h²: %v", got)
	}
}
