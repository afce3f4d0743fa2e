package message

import (
	"weirmark/core/study"
	"weirmark/datasets/duct"
)

// Demo returns the demo study: case C1 of the invented campaign, drag and the
// pressure coefficient of the upper branch, models A and B.
func Demo() *study.Study {
	s := study.New()
	s.Title = "Strut fairing in the Orrowby duct, case C1"
	s.Purpose = "Choose the fairing setting for a duct retrofit. All of it is invented."
	ids := map[string]string{}
	for i, name := range []string{"C1-balance.csv", "C1-forces.csv", "C1-taps-upper.csv", "C1-A-G4-cp.csv", "C1-B-G4-cp.csv"} {
		data, err := duct.Files.ReadFile("second/" + name)
		if err != nil {
			panic("message: the demo lacks " + name)
		}
		id := "f" + string(rune('1'+i))
		ids[name] = id
		s.Files = append(s.Files, study.File{ID: id, Name: name, SHA256: study.Hash(data), Data: data})
	}
	demoDrag(s, ids)
	demoPressure(s, ids)
	return s
}

func entered(value string) study.Field { return study.Field{Value: value, By: study.Entered} }

func pureColumn(name string) study.ColumnUse {
	return study.ColumnUse{Column: entered(name), Unit: entered("1")}
}

func demoDrag(s *study.Study, ids map[string]string) {
	const quantity = "drag coefficient"
	s.Slips = append(s.Slips, study.Slip{ID: "s1", File: ids["C1-balance.csv"], Role: entered(study.Reference),
		Case: entered("C1"), Quantity: entered(quantity), Y: pureColumn("Cd")})
	for i, model := range []string{"A", "B"} {
		s.Slips = append(s.Slips, study.Slip{ID: "s" + string(rune('2'+i)), File: ids["C1-forces.csv"], Role: entered(study.GridValues),
			Case: entered("C1"), Quantity: entered(quantity), Model: entered(model), Grid: entered("grid"),
			Y: pureColumn("Cd " + model), Size: study.ColumnUse{Column: entered("cells")}})
	}
	s.Questions = append(s.Questions, study.Question{
		Case: "C1", Quantity: quantity, Symbol: "Cd", Condition: "α = 4.2°", ReferenceID: "OR-26/5",
		Requirement: &study.Requirement{Value: 5, Percent: true, Who: "decision owner", Date: "2026-09-14"},
		Kind:        entered(study.KindTest), Use: entered(study.UseValidation),
		Sources: []study.Source{
			{Name: "balance calibration and corrections", Of: study.OfData, Value: .000393, Basis: study.Absolute, Coverage: entered("standard"), Pattern: study.Common, Origin: "stated by the test lead"},
			{Name: "inputs (α, U, turbulence)", Of: study.OfInput, Value: .00025, Basis: study.Absolute, Coverage: entered("standard"), Pattern: study.Common, Origin: "run pairs of the analyst"},
		},
		Choices: study.DefaultChoices(),
	})
}

func demoPressure(s *study.Study, ids map[string]string) {
	const quantity = "pressure coefficient, upper branch"
	reference := study.Slip{ID: "s4", File: ids["C1-taps-upper.csv"], Role: entered(study.Reference), Case: entered("C1"), Quantity: entered(quantity),
		X: pureColumn("x/c"), Y: pureColumn("Cp"), U: pureColumn("u(Cp)"), UFactor: entered("standard")}
	s.Slips = append(s.Slips, reference)
	for i, model := range []string{"A", "B"} {
		s.Slips = append(s.Slips, study.Slip{ID: "s" + string(rune('5'+i)), File: ids["C1-"+model+"-G4-cp.csv"], Role: entered(study.Simulation),
			Case: entered("C1"), Quantity: entered(quantity), Model: entered(model), Grid: entered("G4"), Cells: entered("5600000"),
			X: pureColumn("x/c"), Y: pureColumn("Cp")})
	}
	s.Questions = append(s.Questions, study.Question{
		Case: "C1", Quantity: quantity, Symbol: "Cp", Condition: "α = 4.2°", ReferenceID: "OR-26 taps", Downward: true,
		Kind: entered(study.KindTest), Use: entered(study.UseValidation),
		Sources: []study.Source{
			{Name: "reference pressure of the tunnel", Of: study.OfData, Value: .020, Basis: study.Absolute, Coverage: entered("standard"), Pattern: study.Common, Origin: "stated by the test lead"},
			{Name: "grid, from a study at other taps", Of: study.OfNumerical, Value: .004, Basis: study.Absolute, Coverage: entered("standard"), Pattern: study.Independent, Origin: "borrowed from a study of the same family"},
		},
		Choices: study.DefaultChoices(),
	})
}
