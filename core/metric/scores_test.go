package metric

import (
	"errors"
	"math"
	"testing"
)

// Seven pairs whose scores were recomputed apart from this program
// (../shared/references/published-examples.md, 4.3, mark C: no published
// numeric example was seen).
var (
	scoreD = []float64{1, 2, 3, 4, 5, .5, .02}
	scoreS = []float64{1.2, 1.4, 3.3, 9.0, 4.9, .55, .05}
)

func near(t *testing.T, name string, got, want, tolerance float64) {
	t.Helper()
	if !(math.Abs(got-want) <= tolerance) {
		t.Errorf("%s = %.12g, want %.12g", name, got, want)
	}
}

func TestDispersion(t *testing.T) {
	r, err := Dispersion(scoreS, scoreD, 0)
	if err != nil {
		t.Fatal(err)
	}
	const digits = 5e-11 // the values are recorded to ten decimals
	near(t, "FB", r.FB, -.2717149220, digits)
	near(t, "NMSE", r.NMSE, .5638638316, digits)
	near(t, "NMSE systematic", r.Systematic, .0752173034, digits)
	near(t, "FAC2", r.FAC2, 5./7, 1e-15)
	near(t, "R", r.R, .8316630053, digits)
	mg, vg, err := Geometric(scoreS, scoreD)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "MG", mg, .7817786757, digits)
	near(t, "VG", vg, 1.2705648390, digits)
	for w, want := range map[float64]float64{0: 4. / 7, .05: 5. / 7} {
		q, err := HitRate(scoreS, scoreD, .25, w)
		if err != nil {
			t.Fatal(err)
		}
		near(t, "q", q, want, 1e-15)
	}
	e := make([]float64, len(scoreD))
	for i := range e {
		e[i] = scoreS[i] - scoreD[i]
	}
	m := Summarise(e)
	near(t, "bias", m.Bias, .6971428571, digits)
	near(t, "RMSE", m.RMSE, 1.9087542684, digits)
	near(t, "MAE", m.MAE, .8971428571, digits)
}

// p = o/2 everywhere: FB = 2/3, MG = 2, VG = exp(ln² 2), FAC2 = 1, exactly.
func TestHalfEverywhere(t *testing.T) {
	s := make([]float64, len(scoreD))
	for i, d := range scoreD {
		s[i] = d / 2
	}
	r, err := Dispersion(s, scoreD, 0)
	if err != nil {
		t.Fatal(err)
	}
	mg, vg, err := Geometric(s, scoreD)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "FB", r.FB, 2./3, 1e-14)
	near(t, "FAC2", r.FAC2, 1, 0)
	near(t, "MG", mg, 2, 1e-14)
	near(t, "VG", vg, math.Exp(math.Ln2*math.Ln2), 1e-14)
}

// A velocity that changes sign has no FB; the hit rate does not mind.
func TestScoresRefuse(t *testing.T) {
	signed := []float64{1, -.5, .2}
	if _, err := Dispersion(signed, []float64{1, .5, .3}, 0); !errors.Is(err, ErrSigned) {
		t.Errorf("signed data: %v", err)
	}
	if _, _, err := Geometric([]float64{1, 2}, []float64{0, 2}); !errors.Is(err, ErrPositive) {
		t.Errorf("a zero: %v", err)
	}
	if _, _, err := Geometric([]float64{-1, 2}, []float64{1, 2}); !errors.Is(err, ErrSigned) {
		t.Errorf("a sign: %v", err)
	}
	if _, err := Dispersion(nil, nil, 0); !errors.Is(err, ErrEmpty) {
		t.Errorf("nothing: %v", err)
	}
	if _, err := Dispersion([]float64{0, 0}, []float64{1, 1}, 0); !errors.Is(err, ErrPositive) {
		t.Errorf("all zero: %v", err)
	}
	if q, err := HitRate(signed, []float64{1, -.6, .2}, .25, 0); err != nil || q != 1 {
		t.Errorf("hit rate of signed data %v, %v", q, err)
	}
}

// Below the threshold a ratio says nothing: such pairs count as met.
func TestThreshold(t *testing.T) {
	r, err := Dispersion([]float64{.001, 1}, []float64{.0001, 1}, .01)
	if err != nil || r.Below != 1 || r.FAC2 != 1 {
		t.Errorf("%+v, %v", r, err)
	}
}

func TestPercent(t *testing.T) {
	p, withheld := Percent([]float64{1.1, .5, -.9}, []float64{1, .001, -1}, .02)
	if withheld != 1 || !math.IsNaN(p[1]) {
		t.Errorf("%v, %d withheld", p, withheld)
	}
	near(t, "first", p[0], 10, 1e-12)
	near(t, "third", p[2], 10, 1e-12) // above a negative value by a tenth of its size
}

func TestWeighted(t *testing.T) {
	e := []float64{1, -1, 2}
	bias, mae, rmse, ok := Weighted(e, []float64{1, 1, 2})
	if !ok {
		t.Fatal("refused")
	}
	near(t, "bias", bias, 1, 1e-15)
	near(t, "MAE", mae, 1.5, 1e-15)
	near(t, "RMSE", rmse, math.Sqrt(10./4), 1e-15)
	if _, _, _, ok := Weighted(e, []float64{0, 0, 0}); ok {
		t.Error("weights that are all zero were taken")
	}
	if _, _, _, ok := Weighted(e, []float64{1, -1, 1}); ok {
		t.Error("a negative weight was taken")
	}
}

// Bland and Altman 1986, Lancet i, 307, peak flow of 17 persons with two
// meters (data and recomputed values: published-examples.md, 4.4). The paper
// prints limits from rounded values; these are the unrounded ones.
func TestLimitsOfAgreement(t *testing.T) {
	wright := []float64{494, 395, 516, 434, 476, 557, 413, 442, 650, 433, 417, 656, 267, 478, 178, 423, 427}
	mini := []float64{512, 430, 520, 428, 500, 600, 364, 380, 658, 445, 432, 626, 260, 477, 259, 350, 451}
	e := make([]float64, len(mini))
	for i := range e {
		e[i] = wright[i] - mini[i]
	}
	a, ok := Limits(e)
	if !ok {
		t.Fatal("refused")
	}
	near(t, "mean difference", a.Bias, -2.1176470588, 5e-11)
	near(t, "SD", a.SD, 38.7651298736, 5e-11)
	near(t, "lower limit", a.Low, -78.0973016, 5e-8)
	near(t, "upper limit", a.High, 73.8620075, 5e-8)
	near(t, "printed mean difference", a.Bias, -2.1, .05)
	near(t, "printed SD", a.SD, 38.8, .05)
	if _, ok := Limits(e[:1]); ok {
		t.Error("one difference has limits")
	}
}

func TestCriteriaNameTheirSource(t *testing.T) {
	if len(Criteria) < 10 {
		t.Fatalf("%d criteria", len(Criteria))
	}
	for _, c := range Criteria {
		if c.Source == "" || c.Scope == "" || !(c.Low < c.High) {
			t.Errorf("%+v", c)
		}
		if c.Met(math.NaN()) || !c.Met(c.Low) || !c.Met(c.High) || c.Met(c.High+1) {
			t.Errorf("%s decides wrongly", c.Name)
		}
	}
}
