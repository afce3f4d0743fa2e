package study_test

import (
	"fmt"
	"math"
	"testing"

	"weirmark/core/notice"
	"weirmark/core/study"
)

// temperatures is a study of two curves that fall from -5 to 20 °C, both in one
// unit; the data lie 0.5 K lower.
func temperatures(unit string, from func(celsius float64) float64) *study.Study {
	t := func(x float64) float64 { return 20 - 25*x*x }
	s := pair(rows(30, even, func(x float64) float64 { return from(t(x)) }), rows(12, func(i int) float64 { return float64(i) / 11 }, func(x float64) float64 { return from(t(x) - .5) }), "m", "m")
	for i := range s.Slips {
		s.Slips[i].Y.Unit = entered(unit)
	}
	s.Questions[0].Sources[0].Value, s.Questions[0].Sources[1].Value = .2, .1
	return s
}

func celsius(c float64) float64    { return c }
func fahrenheit(c float64) float64 { return 32 + 1.8*c }
func kelvin(c float64) float64     { return c + 273.15 }

// One comparison in three units: E and u are steps of temperature, so that one
// of 1 K is one of 1 °C and of 1.8 °F. Ordinary temperatures below zero raise
// no question.
func TestTemperatureSteps(t *testing.T) {
	for _, row := range []struct {
		unit string
		from func(float64) float64
		step float64
	}{{"°C", celsius, 1}, {"°F", fahrenheit, 1.8}, {"K", kelvin, 1}, {"degC", celsius, 1}} {
		s := temperatures(row.unit, row.from)
		s.Questions[0].Sources[0].Value *= row.step
		c := only(t, s)
		if len(c.Stations) != 12 || c.Unit != row.unit || notice.Has(c.Notices, "temperature-below") || notice.Has(c.Notices, "absolute-negative") {
			t.Fatalf("%s: %d stations in %s: %+v", row.unit, len(c.Stations), c.Unit, c.Notices)
		}
		if at := c.Stations[0]; math.Abs(float64(at.E)-.5*row.step) > 1e-4 || math.Abs(float64(at.UD)-.2*row.step) > 1e-9 || math.Abs(float64(at.D)-row.from(19.5)) > 1e-3 {
			t.Errorf("%s: %+v", row.unit, at)
		}
	}
	// Bars in another unit of the same steps: 0.36 °F beside °C is 0.2 K.
	for unit, u := range map[string]float64{"°C": .2, "K": .2, "Δ°C": .2, "Δ°F": .36, "°F": .36} {
		s := temperatures("°C", celsius)
		text := "x,y,u\n"
		for i := range 12 {
			x := float64(i) / 11
			text += fmt.Sprintf("%.6g,%.6g,%g\n", x, 19.5-25*x*x, u)
		}
		s.Files[1].Data, s.Files[1].SHA256 = []byte(text), study.Hash([]byte(text))
		s.Slips[1].U, s.Slips[1].UFactor = study.ColumnUse{Column: entered("u"), Unit: entered(unit)}, entered("1")
		if line := budgetLine(only(t, s), "column u"); line == nil || math.Abs(float64(line.U)-.2) > 1e-12 {
			t.Errorf("%s: %+v", unit, line)
		}
	}
}

// Differences are compared with differences, in any of their units, and not with
// temperatures.
func TestTemperatureDifferences(t *testing.T) {
	for _, row := range []struct {
		simulation, data string
		code             string
	}{{"Δ°C", "Δ°C", ""}, {"ΔK", "Δ°C", ""}, {"Δ°C", "K", "temperature-below"}, {"Δ°C", "°C", "temperature-step"}, {"°C", "Δ°C", "temperature-step"}, {"K", "°C", "temperature-below"}} {
		s := temperatures(row.data, celsius)
		s.Slips[0].Y.Unit = entered(row.simulation)
		c := only(t, s)
		for _, code := range []string{"temperature-step", "temperature-below"} {
			if notice.Has(c.Notices, code) != (code == row.code) {
				t.Errorf("%s against %s: %s: %+v", row.simulation, row.data, code, c.Notices)
			}
		}
		if stopped := row.code == "temperature-step"; (c.Summary == nil) != stopped || stopped && !c.Withheld {
			t.Errorf("%s against %s: %+v", row.simulation, row.data, c.Summary)
		}
	}
	cold := temperatures("°C", func(c float64) float64 { return c - 280 })
	if c := only(t, cold); !told(c, "temperature-below", "reach −285 °C, below absolute zero (−273.15 °C)") {
		t.Errorf("%+v", c.Notices)
	}
	// A reference temperature is a temperature.
	theta := temperatures("°C", celsius)
	theta.Questions[0].Form = study.Form{Name: "Θ", Simulation: study.FormTurned, Data: study.FormTurned}
	theta.Cases = []study.Card{{Name: "C", References: []study.ReferenceQuantity{{Symbol: "T_ref", Value: 20, Unit: "Δ°C", U: pointer(0)}, {Symbol: "T_w", Value: 122, Unit: "°F", U: pointer(0)}}}}
	if c := only(t, theta); !notice.Has(c.Notices, "card-unit") || c.Summary != nil {
		t.Errorf("%+v", c.Notices)
	}
	theta.Cases[0].References[0].Unit = "°C"
	if c := only(t, theta); len(c.Stations) != 12 || math.Abs(float64(c.Stations[11].S)+25./30) > 1e-6 {
		t.Errorf("Θ of °C: %+v", c.Stations)
	}
	for i := range theta.Slips {
		theta.Slips[i].Y.Unit = entered("Δ°C")
	}
	if c := only(t, theta); len(c.Stations) != 12 || math.Abs(float64(c.Stations[0].S)-20./30) > 1e-6 {
		t.Errorf("Θ of Δ°C: %+v", c.Stations)
	}
}

// Percent of a value in °C or °F is refused wherever it is stated: it would
// count from a zero that is a convention. In K, and of differences, it is taken.
func TestNoPercentOfCelsius(t *testing.T) {
	bars := func(s *study.Study) {
		text := "x,y,u\n"
		for i := range 12 {
			x := float64(i) / 11
			text += fmt.Sprintf("%.6g,%.6g,1\n", x, 19.5-25*x*x)
		}
		s.Files[1].Data, s.Files[1].SHA256 = []byte(text), study.Hash([]byte(text))
		s.Slips[1].U, s.Slips[1].UFactor, s.Slips[1].UBasis = study.ColumnUse{Column: entered("u"), Unit: entered("%")}, entered("1"), entered("reading")
	}
	for _, row := range []struct {
		name   string
		change func(*study.Study)
		code   string
		blocks bool
	}{
		{"a source", func(s *study.Study) {
			s.Questions[0].Sources[0].Basis, s.Questions[0].Sources[0].Value = study.OfReading, 1
		}, "percent-zero", true},
		{"a column", bars, "percent-zero", true},
		{"the requirement", func(s *study.Study) {
			s.Questions[0].Requirement = &study.Requirement{Value: 5, Percent: true, Who: "the client"}
		}, "percent-zero", true},
		{"an input", func(s *study.Study) {
			s.Questions[0].Sources = append(s.Questions[0].Sources, study.Source{Name: "inflow", Of: study.OfInput, Input: "T_in", Unit: "°C", Nominal: 20, Value: 1, Basis: study.OfReading, Coverage: entered("1"), Sensitivity: pointer(1)})
		}, "percent-zero", true},
		{"E in percent", func(s *study.Study) { s.Questions[0].Scores = &study.Scoring{Percent: true} }, "scores-zero", false},
		{"a scale", func(s *study.Study) { s.Questions[0].Scores = &study.Scoring{Scale: study.ScaleMean} }, "scores-zero", false},
		{"dispersion", func(s *study.Study) { s.Questions[0].Scores = &study.Scoring{Dispersion: true} }, "scores-zero", false},
		{"nothing", func(*study.Study) {}, "", false},
	} {
		for _, unit := range []string{"°C", "°F", "Δ°C"} {
			s := temperatures(unit, celsius)
			row.change(s)
			if last := len(s.Questions[0].Sources) - 1; unit == "Δ°C" && s.Questions[0].Sources[last].Input != "" {
				s.Questions[0].Sources[last].Unit = unit
			}
			c := only(t, s)
			want := row.code
			if unit == "Δ°C" {
				want = ""
			}
			for _, code := range []string{"percent-zero", "scores-zero"} {
				if notice.Has(c.Notices, code) != (code == want) {
					t.Errorf("%s in %s: %s: %+v", row.name, unit, code, c.Notices)
				}
			}
			if want != "" && row.blocks && !c.Withheld {
				t.Errorf("%s in %s: a statement is made", row.name, unit)
			}
		}
	}
	k := temperatures("K", kelvin)
	k.Questions[0].Sources[0].Basis, k.Questions[0].Sources[0].Value = study.OfReading, 1
	if c := only(t, k); len(c.Stations) == 0 || math.Abs(float64(c.Stations[0].UD)-.01*292.65) > 1e-4 {
		t.Errorf("1 %% of a reading in K: %+v", c.Stations)
	}
}
