package study_test

import (
	"math"
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
	if len(c.Scores) != 7 {
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
