package study_test

import (
	"fmt"
	"math"
	"strings"
	"testing"

	"weirmark/core/message"
	"weirmark/core/notice"
	"weirmark/core/study"
)

// Signed values have no FB: the refusal is told, the hit rate is given.
func TestScoresOfSignedValues(t *testing.T) {
	f := func(x float64) float64 { return math.Cos(4 * x) }
	s := pair(rows(30, even, f), rows(20, func(i int) float64 { return float64(i) / 19 }, f), "m", "m")
	s.Questions[0].Scores = &study.Scoring{Dispersion: true, Fraction: .25, Allowance: .01}
	c := only(t, s)
	if !notice.Has(c.Notices, "scores-signed") {
		t.Errorf("notices %+v", c.Notices)
	}
	names := map[string]float64{}
	for _, l := range c.Scores {
		names[l.Name] = float64(l.Value)
	}
	if names["hit rate"] != 1 {
		t.Errorf("scores %v", names)
	}
	if _, there := names["fractional bias FB"]; there {
		t.Error("FB was computed of values that change sign")
	}
}

func TestScoresAndRegions(t *testing.T) {
	f := func(x float64) float64 { return 1 + x }
	s := pair(rows(30, even, func(x float64) float64 {
		if x > .5 {
			return 1.5 * f(x)
		}
		return f(x)
	}), rows(20, func(i int) float64 { return float64(i) / 19 }, f), "m", "m")
	s.Questions[0].Scores = &study.Scoring{Dispersion: true, Fraction: .25}
	s.Questions[0].Regions = []study.Region{{Name: "front", From: 0, To: .45}, {Name: "rear", From: .55, To: 1}}
	c := only(t, s)
	for _, l := range c.Scores {
		if l.Name == "fractional bias FB" && (l.Value >= 0 || l.Word != "over-prediction" || len(l.Criteria) != 2) {
			t.Errorf("FB %+v", l)
		}
		if l.Scale == "" {
			t.Errorf("%s has no scale", l.Name)
		}
	}
	if len(c.Scores) != 8 {
		t.Errorf("%d scores", len(c.Scores))
	}
	front, rear := c.Regions[0], c.Regions[1]
	if front.HitRate != 1 || rear.HitRate != 0 || front.N+rear.N > c.Summary.N || rear.RMSE < .5 || front.RMSE > 1e-5 {
		t.Errorf("regions %+v, %+v", front, rear)
	}
}

// The data cancel from the difference of two models: for drag of the demo
// S_A - S_B = .00183 with u = hypot of both u_num and of the inputs counted
// twice.
func TestModelDifference(t *testing.T) {
	r := study.Evaluate(message.Demo(), study.Options{})
	if len(r.Differences) != 2 {
		t.Fatalf("%d differences", len(r.Differences))
	}
	d := r.Differences[0]
	a, b := r.Cells[0].Stations[0], r.Cells[1].Stations[0]
	want := math.Sqrt(float64(a.UNum*a.UNum+b.UNum*b.UNum) + 2*.00025*.00025)
	if math.Abs(float64(d.Mean)-.00183) > 1e-9 || math.Abs(float64(d.U)-want) > 1e-9 || !d.Resolved {
		t.Errorf("%+v, want u %v", d, want)
	}
	// Models compared at different stations are not set against each other.
	s := message.Demo()
	s.Slips[5].X.Unit = study.Field{Value: "%", By: study.Entered} // stations shrink by 100: other rows remain
	r = study.Evaluate(s, study.Options{})
	if len(r.Differences) != 1 {
		t.Errorf("%d differences of models at different stations", len(r.Differences))
	}
}

// scoreOf returns a score by its name.
func scoreOf(t *testing.T, c *study.Cell, name string) study.ScoreLine {
	t.Helper()
	for _, l := range c.Scores {
		if l.Name == name {
			return l
		}
	}
	t.Fatalf("no score %q in %+v", name, c.Scores)
	return study.ScoreLine{}
}

// four compares S = 12, 18, 33, 40 with D = 10, 20, 30, 40 m/s at x = 0, 1, 2, 4.
func four() *study.Study {
	s := pair("x,y\n0,12\n1,18\n2,33\n4,40\n", "x,y,w\n0,10,1\n1,20,1\n2,30,2\n4,40,0\n", "m", "m")
	s.Slips[0].Y.Unit, s.Slips[1].Y.Unit = entered("m/s"), entered("m/s")
	return s
}

// E = 2, -2, 3, 0: mean 0.75, mean |E| 1.75, RMSE √4.25, by hand.
func TestScalesOfMeasures(t *testing.T) {
	for _, row := range []struct {
		scale, name string
		value       float64
	}{
		{study.ScaleRange, "range of D", 30}, {study.ScaleMean, "mean |D|", 25},
		{study.ScaleSpeed, "reference speed U", 31}, {study.ScaleEntered, "entered scale", 50},
	} {
		s := four()
		s.Questions[0].Scores = &study.Scoring{Scale: row.scale, ScaleValue: 50}
		s.Cases = []study.Card{{Name: "C", References: []study.ReferenceQuantity{{Symbol: study.RefSpeed, Value: 31, Unit: "m/s"}}}}
		c := only(t, s)
		for measure, want := range map[string]float64{"mean E": .75, "mean |E|": 1.75, "RMSE": math.Sqrt(4.25), "largest |E|": 3} {
			l := scoreOf(t, c, measure+" / "+row.name)
			if math.Abs(float64(l.Value)-want/row.value) > 1e-12 || !strings.HasPrefix(l.Scale, fmt.Sprintf("%.1f", row.value)) {
				t.Errorf("%s: %+v, want %v", row.scale, l, want/row.value)
			}
		}
	}
	s := four()
	s.Questions[0].Scores = &study.Scoring{Scale: study.ScalePressure}
	if c := only(t, s); !notice.Has(c.Notices, "scale-missing") || len(c.Scores) != 0 {
		t.Errorf("a velocity was divided by a pressure: %+v", c.Scores)
	}
}

// Percentages stand where |D| exceeds the part of its largest value; the
// others are counted, not printed as infinities (3-bad-inputs, 56).
func TestPercentIsWithheld(t *testing.T) {
	s := four()
	s.Questions[0].Scores = &study.Scoring{Percent: true, PercentAbove: 60}
	c := only(t, s)
	for i, want := range []float64{math.NaN(), math.NaN(), 10, 0} {
		got := float64(*c.Stations[i].Percent)
		if math.IsNaN(want) != math.IsNaN(got) || math.Abs(got-want) > 1e-12 {
			t.Errorf("station %d: %v %%, want %v", i, got, want)
		}
	}
	if l := scoreOf(t, c, "mean |E| / |D|"); l.Value != 5 || !strings.Contains(l.Scale, "2 of 4 stations") {
		t.Errorf("%+v", l)
	}
	if !notice.Has(c.Notices, "percent-withheld") {
		t.Error("the withheld stations are not told")
	}
}

// Spacing weights of x = 0, 1, 2, 4 are 0.5, 1, 1.5, 1; the column has 1, 1, 2, 0.
func TestWeightedMeasures(t *testing.T) {
	for _, row := range []struct {
		weights string
		bias    float64
	}{{study.WeightSpacing, (1 - 2 + 4.5) / 4}, {"w", (2 - 2 + 6) / 4.}} {
		s := four()
		s.Questions[0].Scores = &study.Scoring{Weights: row.weights}
		if l := scoreOf(t, only(t, s), "weighted mean E"); math.Abs(float64(l.Value)-row.bias) > 1e-12 {
			t.Errorf("%s: %+v, want %v", row.weights, l, row.bias)
		}
	}
	s := four()
	s.Questions[0].Scores = &study.Scoring{Weights: "y"}
	s.Files[1].Data = []byte("x,y,w\n0,-10,1\n1,20,1\n")
	s.Files[1].SHA256 = study.Hash(s.Files[1].Data)
	if c := only(t, s); !notice.Has(c.Notices, "weights-refused") {
		t.Errorf("a negative weight was taken: %+v", c.Notices)
	}
}

// R stands beside slope and mean E; limits of agreement and area by hand: E has
// mean 0.75 and standard deviation √(14.75/3), and sorted S and D differ by 2,
// 2, 3 and 0.
func TestCorrelationAndDistribution(t *testing.T) {
	s := four()
	s.Questions[0].Scores = &study.Scoring{Correlation: true, Distribution: true}
	c := only(t, s)
	if r := scoreOf(t, c, "correlation R"); !strings.Contains(r.Scale, "beside slope 0.990 and mean E +0.750 m/s") || r.Value > 1 || r.Value < .98 {
		t.Errorf("%+v", r)
	}
	sd := math.Sqrt(14.75 / 3)
	for name, want := range map[string]float64{"slope of S on D": .99, "intercept of S on D": 1, "lower limit of agreement": .75 - 1.96*sd, "upper limit of agreement": .75 + 1.96*sd, "area between the distributions of S and D": 7. / 4} {
		if l := scoreOf(t, c, name); math.Abs(float64(l.Value)-want) > 1e-12 {
			t.Errorf("%s: %v, want %v", name, l.Value, want)
		}
	}
}

// The parts, weighted by their stations, make the whole; a sign parts the
// stations too.
func TestRegionsMakeTheWhole(t *testing.T) {
	s := pair("x,y\n0,3\n1,-1\n2,4\n3,-6\n4,2\n", "x,y\n0,1\n1,-2\n2,5\n3,-3\n4,1\n", "m", "m")
	for name, regions := range map[string][]study.Region{
		"bounds": {{Name: "a", From: 0, To: 1}, {Name: "b", From: 2.5, To: 3.5}},
		"signs":  {{Name: "up", Sign: study.SignPositive}, {Name: "down", Sign: study.SignNegative}},
		"both":   {{Name: "up in front", From: 0, To: 2, Sign: study.SignPositive}},
	} {
		s.Questions[0].Regions = regions
		c := only(t, s)
		n, bias, square, beyond := 0, 0.0, 0.0, 0
		for _, r := range c.Regions {
			n, beyond = n+r.N, beyond+r.Beyond
			bias += float64(r.N) * float64(r.Bias)
			square += float64(r.N) * float64(r.RMSE*r.RMSE)
		}
		m := c.Summary
		if n != m.N || math.Abs(bias/float64(n)-float64(m.Bias)) > 1e-12 || math.Abs(math.Sqrt(square/float64(n))-float64(m.RMSE)) > 1e-12 || beyond != m.Tested-m.WithinKUVal {
			t.Errorf("%s: n %d, bias %v, square %v, beyond %d against %+v", name, n, bias, square, beyond, m)
		}
		if name == "signs" && (len(c.Regions) != 2 || c.Regions[0].N != 3 || c.Regions[0].From.Known()) {
			t.Errorf("signs: %+v", c.Regions)
		}
	}
}

// A criterion of the study takes the place of those the program carries, and
// one without a source says so.
func TestCriteriaCanBeChanged(t *testing.T) {
	s := four()
	s.Questions[0].Scores = &study.Scoring{Dispersion: true}
	at := study.Target{Kind: study.ItemCriterion, ID: "C|" + s.Questions[0].Quantity}
	before := len(scoreOf(t, only(t, s), "fractional bias FB").Criteria)
	if err := s.AddItem(at, ""); err != nil {
		t.Fatal(err)
	}
	last := len(s.Questions[0].Scores.Criteria) - 1
	set := func(field, value string) {
		t.Helper()
		at.Field = fmt.Sprintf("%d.%s", last, field)
		if err := s.Set(at, value, "", ""); err != nil {
			t.Fatal(err)
		}
	}
	set("low", "-0.01")
	set("high", "0.01")
	got := scoreOf(t, only(t, s), "fractional bias FB").Criteria
	if len(got) != before+1 || got[before].Met || got[before].Source != "no source entered" || got[before].Scope != "no scope entered" {
		t.Errorf("%+v", got)
	}
	set("source", "house rule")
	for i := range last {
		if err := s.RemoveItem(study.Target{Kind: at.Kind, ID: at.ID, Field: "0"}, "", ""); err != nil {
			t.Fatal(i, err)
		}
	}
	if got := scoreOf(t, only(t, s), "fractional bias FB").Criteria; len(got) != 1 || got[0].Source != "house rule" {
		t.Errorf("%+v", got)
	}
	at.Field = "0.score"
	if err := s.Set(at, "luck", "", ""); err == nil {
		t.Error("an unknown score was taken")
	}
}

// The hit rate may take its allowance from the data: k u_D of each station.
func TestAllowanceFromTheData(t *testing.T) {
	s := four()
	s.Questions[0].Sources = []study.Source{{Name: "u", Of: study.OfData, Value: 2, Basis: study.Absolute, Coverage: entered("2"), Pattern: study.Independent}}
	for k, want := range map[float64]float64{1.9: .25, 2: .75, 3: 1} {
		s.Questions[0].Scores = &study.Scoring{AllowanceK: k}
		if l := scoreOf(t, only(t, s), "hit rate"); float64(l.Value) != want {
			t.Errorf("k = %v: hit rate %v, want %v", k, l.Value, want)
		}
	}
	s.Questions[0].Sources = nil
	if c := only(t, s); !notice.Has(c.Notices, "allowance-none") {
		t.Error("a hit rate took its allowance from nowhere")
	}
}

// RMSE and the rest are measurements: each comes with its uncertainty, and
// with the floor that the stated errors make alone.
func TestSampledMeasures(t *testing.T) {
	r := study.Evaluate(message.Demo(), study.Options{Alternatives: true})
	for _, c := range r.Cells {
		if c.Scalar != (len(c.Measured) == 0) {
			t.Fatalf("%s: %d sampled measures", c.Quantity, len(c.Measured))
		}
		for _, m := range c.Measured {
			// With a common source of 0.020 and independent ones of 0.0072 the mean of
			// 24 stations spreads by 0.0201, as the offset does (6.1).
			if m.Name == "mean E" && math.Abs(float64(m.U)-.0201) > .001 || !(m.FloorHi > m.Floor) || !(m.Floor > 0) {
				t.Errorf("%+v", m)
			}
		}
	}
}

// The difference of two models holds what their interpolation leaves open, and a
// u_num that was declared the same at all stations does not average out.
func TestDifferenceOfModelsKeepsItsCorrelation(t *testing.T) {
	s := pair(rows(30, even, line), threeStations, "m", "m")
	attach(s, "b", study.Simulation, rows(30, even, func(x float64) float64 { return 2.5 + x }), func(p *study.Slip) { p.Model = entered("B") })
	q := &s.Questions[0]
	q.Sources = append(q.Sources, study.Source{Name: "inlet", Of: study.OfInput, Value: 0, Basis: study.Absolute, Coverage: entered("1"), Pattern: study.Common})
	q.Choices.UInterp = false
	u := func() (study.Number, []study.Cell) {
		r := study.Evaluate(s, study.Options{})
		if len(r.Differences) != 1 {
			t.Fatalf("%+v", r.Notices)
		}
		return r.Differences[0].U, r.Cells
	}
	got, _ := u()
	near(t, "independent", got, .01*math.Sqrt(2./3), 1e-9)
	q.Choices.NumShared = true
	got, _ = u()
	near(t, "shared", got, .01*math.Sqrt2, 1e-9)
	q.Choices.UInterp = true
	text := rows(5, func(i int) float64 { return float64(i) / 4 }, smooth) // coarse, and curved
	s.Files[0].Data, s.Files[0].SHA256 = []byte(text), study.Hash([]byte(text))
	got, cells := u()
	want := 2e-4
	for _, c := range cells {
		for _, station := range c.Stations {
			want += math.Pow(float64(station.UInterp)/3, 2)
		}
	}
	if !(want > 3e-4) {
		t.Fatalf("the interpolation leaves too little open for a test: %g", want)
	}
	near(t, "with interpolation", got, math.Sqrt(want), 1e-9)
}

// A station of a region lies beyond k u_val by what is left of E beyond an
// interval, as its own reading says.
func TestRegionsKnowIntervals(t *testing.T) {
	s := pair(rows(30, even, line), threeStations, "m", "m")
	s.Questions[0].Sources = append(s.Questions[0].Sources, study.Source{Name: "box", Of: study.OfInput, Value: .15, Basis: study.Absolute, Form: study.Interval, Coverage: entered("limits"), Pattern: study.Common})
	s.Questions[0].Regions = []study.Region{{Name: "front", From: 0, To: .2}}
	c := only(t, s)
	if c.Stations[0].Reading == study.SignResolved || c.Regions[0].Beyond != 0 {
		t.Errorf("the reading %q, beyond in the region %d", c.Stations[0].Reading, c.Regions[0].Beyond)
	}
}
