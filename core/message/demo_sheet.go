package message

import "weirmark/core/study"

// What the campaign sheet states, by question. The numbers are invented.

const (
	demoSheet       = "stated in the campaign sheet"
	demoScanner     = "pressure scanner, 0.25 % of full scale (2500 Pa)"
	demoScannerHalf = 6.25 // Pa
	demoPressureRef = "reference pressure of the tunnel"
)

// demoLimit is a requirement of the campaign, set two days before the runs.
func demoLimit(percent float64) *study.Requirement {
	return &study.Requirement{Value: percent, Percent: true, Who: "decision owner", Date: "2026-09-14"}
}

func demoSource(of, name string, value float64, pattern, origin string) study.Source {
	return study.Source{Name: name, Of: of, Value: value, Basis: study.Absolute, Coverage: entered("standard"), Pattern: pattern, Origin: origin}
}

// demoQuestion is a question on test data with the usual choices.
func demoQuestion(caseName, quantity, symbol, reference string, sources ...study.Source) study.Question {
	return study.Question{Case: caseName, Quantity: quantity, Symbol: symbol, ReferenceID: reference,
		Kind: entered(study.KindTest), Use: entered(study.UseValidation), Sources: sources, Choices: study.DefaultChoices()}
}

// demoAngle is the angle of both sides; slope is the change of the quantity
// for one degree, 0 where it is not known.
func demoAngle(simulation, data, slope float64) []study.Matching {
	m := study.Matching{Name: "α", Unit: "°", Simulation: simulation, Data: data}
	if slope != 0 {
		m.Sensitivity = &slope
	}
	return []study.Matching{m}
}

// demoSetting puts what both states share into a study: the cases with their
// density, and the point of application.
func demoSetting(s *study.Study) {
	s.Title = "Strut fairing in the Orrowby duct, campaign OR-26"
	s.Purpose = "Choose the fairing setting for a duct retrofit. All of it is invented."
	for _, name := range []string{"C1", "C2", "C3"} {
		s.Cases = append(s.Cases, study.Card{Name: name, References: []study.ReferenceQuantity{{Symbol: study.Density, Value: 1.196, Unit: "kg/m³", Origin: demoSheet}}})
	}
	s.Cases[0].References = append(s.Cases[0].References,
		study.ReferenceQuantity{Symbol: study.DynamicPressure, Value: 574.7, Unit: "Pa", Origin: demoSheet},
		study.ReferenceQuantity{Symbol: study.RefLength, Value: 0.240, Unit: "m", Origin: demoSheet},
		study.ReferenceQuantity{Symbol: study.Angle, Value: 4.2, Unit: "deg", Origin: demoSheet})
	s.Application = []study.Condition{{Name: "α", Unit: "°", Value: 11}}
}
