package study_test

import (
	"math"
	"strings"
	"testing"

	"weirmark/core/message"
	"weirmark/core/notice"
	"weirmark/core/sentence"
	"weirmark/core/study"
)

func pointer(v float64) *float64 { return &v }

// A difference of conditions is asked about, and each way to treat it does
// what it says: S = 0.02995 at 4.0°, dCd/dα = 0.001 per degree, D at 4.2°.
func TestConditionHandling(t *testing.T) {
	for _, row := range []struct {
		handling, why string
		s, input      float64
		code          string
	}{
		{"", "", .02995, .00025, "condition-differs"},
		{study.Corrected, "", .03015, .00025, "condition-corrected"},
		{study.AsInput, "", .02995, math.Hypot(.00025, .0002), ""},
		{study.Tolerated, "below the resolution of the balance", .02995, .00025, "condition-accepted"},
		{study.Tolerated, "", .02995, .00025, "condition-differs"},
	} {
		s := message.Demo()
		s.Questions[0].Conditions = []study.Matching{{Name: "α", Unit: "°", Simulation: 4, Data: 4.2, Sensitivity: pointer(.001), Handling: row.handling, Why: row.why}}
		c := study.Evaluate(s, study.Options{}).Cells[1]
		if got := float64(c.Stations[0].S); math.Abs(got-row.s) > 1e-12 {
			t.Errorf("%s: S = %v, want %v", row.handling, got, row.s)
		}
		if got := float64(c.Stations[0].UInput); math.Abs(got-row.input) > 1e-12 {
			t.Errorf("%s: u_input = %v, want %v", row.handling, got, row.input)
		}
		for _, code := range []string{"condition-differs", "condition-corrected", "condition-accepted"} {
			if found := notice.Has(c.Notices, code); found != (code == row.code) {
				t.Errorf("%s: %s found %v", row.handling, code, found)
			}
		}
	}
}

func TestEffectIsToldInPercent(t *testing.T) {
	s := message.Demo()
	s.Questions[0].Conditions = []study.Matching{{Name: "α", Unit: "°", Simulation: 4, Data: 4.2, Sensitivity: pointer(.001)}}
	c := study.Evaluate(s, study.Options{}).Cells[1]
	for _, n := range c.Notices {
		if n.Code == "condition-differs" && !strings.Contains(n.Text, "simulation at 4°, data at 4.2°. With the sensitivity 0.00100 per ° the effect is 0.00020 (0.68 % of the data).") {
			t.Errorf("notice %q", n.Text)
		}
	}
}

func TestApplicationPoint(t *testing.T) {
	for _, row := range []struct {
		alpha   float64
		outside bool
	}{{11, true}, {4.2, false}, {6, false}, {4, true}} {
		s := message.Demo()
		s.Questions[0].Conditions = []study.Matching{{Name: "α", Unit: "°", Simulation: 4.2, Data: 4.2}}
		other := s.Questions[0]
		other.Case, other.Conditions = "C2", []study.Matching{{Name: "α", Unit: "°", Simulation: 9, Data: 9}}
		s.Questions[1].Conditions = []study.Matching{{Name: "α", Unit: "°", Simulation: 20, Data: 20}} // another quantity
		s.Questions = append(s.Questions, other)
		for _, p := range s.Slips[:3] {
			p.Case.Value = "C2"
			s.Slips = append(s.Slips, p)
		}
		s.Application = []study.Condition{{Name: "α", Unit: "°", Value: row.alpha}}
		c := study.Evaluate(s, study.Options{}).Cells[0]
		if c.Application == nil || c.Application.Outside != row.outside {
			t.Errorf("α = %v: %+v", row.alpha, c.Application)
			continue
		}
		if told := strings.Contains(sentence.Of(&c).Text(), "No statement is made there"); told != row.outside {
			t.Errorf("α = %v: told %v", row.alpha, told)
		}
		if row.outside && c.Application.Range != "α 4.2° to 9°" {
			t.Errorf("range %q", c.Application.Range)
		}
	}
}

// A pressure divided by density needs the density of the case: without it the
// two sides are not compared, with it they are.
func TestDensity(t *testing.T) {
	s := pair("x,y\n0,100\n1,200\n", "x,y\n0.5,180\n", "m", "m")
	s.Slips[0].Y.Unit, s.Slips[1].Y.Unit = entered("m^2/s^2"), entered("Pa")
	if c := only(t, s); !notice.Has(c.Notices, "density-needed") || c.Summary != nil || !c.Withheld {
		t.Errorf("without a density: %+v", c.Notices)
	}
	s.Cases = []study.Card{{Name: "C", References: []study.ReferenceQuantity{{Symbol: study.Density, Value: 1.196, Unit: "kg/m^3", Origin: "test log"}}}}
	c := only(t, s)
	if !notice.Has(c.Notices, "density-used") || c.Unit != "Pa" || len(c.Stations) != 1 || math.Abs(float64(c.Stations[0].S)-150*1.196) > 1e-9 {
		t.Errorf("with a density: %+v, stations %+v", c.Notices, c.Stations)
	}
	// A missing conversion shows as a constant ratio 1/ρ.
	s = pair(rows(30, even, func(x float64) float64 { return 100 * smooth(x) / 1.196 }), rows(20, func(i int) float64 { return float64(i) / 19 }, func(x float64) float64 { return 100 * smooth(x) }), "m", "m")
	s.Slips[0].Y.Unit, s.Slips[1].Y.Unit = entered("Pa"), entered("Pa")
	s.Cases = []study.Card{{Name: "C", References: []study.ReferenceQuantity{{Symbol: study.Density, Value: 1.196, Unit: "kg/m^3"}}}}
	for _, n := range only(t, s).Notices {
		if n.Code == "ratio-constant" && !strings.Contains(n.Text, "1/ρ = 0.836") {
			t.Errorf("notice %q", n.Text)
		}
	}
}
