package study_test

import (
	"math"
	"slices"
	"testing"

	"weirmark/core/message"
	"weirmark/core/study"
)

// fragilityOf returns the line of a change and a word, or nil.
func fragilityOf(c *study.Cell, change, what string) *study.Fragility {
	for i := range c.Fragile {
		if f := &c.Fragile[i]; f.Change == change && f.What == what {
			return f
		}
	}
	return nil
}

func closely(t *testing.T, s *study.Study) *study.Cell {
	t.Helper()
	r := study.Evaluate(s, study.Options{Alternatives: true})
	if len(r.Cells) != 1 {
		t.Fatalf("%d cells", len(r.Cells))
	}
	return &r.Cells[0]
}

// E is 0 over the front half and 0.05 over the rear with u_val = 0.0141: the
// requirement ±0.03 is refuted by the rear, and shown without it.
func TestLeavingOutRegionsTurnsTheRequirement(t *testing.T) {
	s := pair("x,y\n0,1\n1,1\n2,1\n2.5,1.05\n3,1.05\n4,1.05\n", "x,y\n0,1\n1,1\n3,1\n4,1\n", "m", "m")
	s.Questions[0].Choices.UInterp = false
	s.Questions[0].Requirement = &study.Requirement{Value: .03}
	s.Questions[0].Regions = []study.Region{{Name: "rear", From: 2.9, To: 4}}
	c := closely(t, s)
	f := fragilityOf(c, "without rear", "requirement")
	if c.Requirement.Outcome != study.NotResolved || f == nil || f.Outcome != study.Shown || !slices.Contains(c.Tried, "without rear") {
		t.Errorf("outcome %s, tried %v, fragile %+v", c.Requirement.Outcome, c.Tried, c.Fragile)
	}
}

// A correction that decides the word is listed: the effect of 0.2° moves E from
// 0.02 to 0, with u_val = 0.0141 and k = 2 against ±0.03.
func TestCorrectionIsAnAlternative(t *testing.T) {
	s := pair("y\n1.00\n", "y\n1.02\n", "m", "m")
	for i := range s.Slips {
		s.Slips[i].X = study.ColumnUse{}
	}
	q := &s.Questions[0]
	q.Requirement = &study.Requirement{Value: .03}
	q.Conditions = []study.Matching{{Name: "α", Unit: "°", Simulation: 4, Data: 4.2, Sensitivity: pointer(.1), Handling: study.Corrected}}
	c := closely(t, s)
	f := fragilityOf(c, "α not corrected", "requirement")
	if c.Requirement.Outcome != study.Shown || f == nil || f.Outcome != study.NotResolved {
		t.Errorf("outcome %s, fragile %+v", c.Requirement.Outcome, c.Fragile)
	}
	q.Conditions[0].Handling, q.Conditions[0].Why = study.Tolerated, "below the resolution"
	c = closely(t, s)
	if f := fragilityOf(c, "α corrected", "requirement"); f == nil || f.Outcome != study.Shown {
		t.Errorf("outcome %s, fragile %+v", c.Requirement.Outcome, c.Fragile)
	}
	if q.Conditions[0].Handling != study.Tolerated {
		t.Error("trying an alternative changed the study")
	}
}

// At the number where a word turns the word is the other one, a thousandth
// before it the first: Cd of B with k_num. The systematic sources of the taps
// independent turn the joint word of B, as the sum 14.5 of 6.1 says.
func TestFlipsAndCorrelations(t *testing.T) {
	r := study.Evaluate(message.Demo(), study.Options{Alternatives: true})
	drag, taps := &r.Cells[1], &r.Cells[3]
	f := fragilityOf(drag, "k_num = 2", "requirement")
	if f == nil || f.At == nil {
		t.Fatalf("fragile %+v", drag.Fragile)
	}
	for factor, want := range map[float64]string{.998: study.NotResolved, 1.002: study.Shown} {
		s := message.Demo()
		s.Questions[0].Choices.KNum = factor * float64(*f.At)
		if got := study.Evaluate(s, study.Options{}).Cells[1].Requirement.Outcome; got != want {
			t.Errorf("k_num = %v: %s, want %s", s.Questions[0].Choices.KNum, got, want)
		}
	}
	if f := fragilityOf(taps, "systematic sources independent between stations", "joint statistic"); f == nil || f.Detail != "statistic 14.5" {
		t.Errorf("fragile %+v", taps.Fragile)
	}
	if n := len(drag.Tried); n < 6 {
		t.Errorf("%d alternatives were tried: %v", n, drag.Tried)
	}
	if math.IsNaN(float64(*f.At)) {
		t.Error("it turns nowhere")
	}
}
