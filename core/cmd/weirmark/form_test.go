package main

import (
	"os"
	"path/filepath"
	"strings"
	"testing"

	"weirmark/core/study"
)

// A study whose columns are turned into a form with its case card, and whose
// forces are turned by the angle of attack, is evaluated without the page:
// report, memo and stations hold the card, the formulas and what they make.
func TestRunWithACaseCard(t *testing.T) {
	by := func(v string) study.Field { return study.Field{Value: v, By: study.Entered} }
	zero, one := 0.0, 1.0
	s := study.New()
	for id, text := range map[string]string{"s": "x,p\n0,520\n0.12,20\n0.24,-230\n", "r": "x,p\n0.03,400\n0.12,30\n0.21,-160\n", "n": "N,A\n100,10\n"} {
		s.Files = append(s.Files, study.File{ID: id, Name: id + ".csv", SHA256: study.Hash([]byte(text)), Data: []byte(text)})
	}
	add := func(id, role, quantity, x, y, unit string) *study.Slip {
		p := study.Slip{ID: id + quantity, File: id, Role: by(role), Case: by("C"), Quantity: by(quantity), Model: by("A"), Y: study.ColumnUse{Column: by(y), Unit: by(unit)}}
		if x != "" {
			p.X = study.ColumnUse{Column: by(x), Unit: by("m")}
		}
		s.Slips = append(s.Slips, p)
		return &s.Slips[len(s.Slips)-1]
	}
	add("s", study.Simulation, "wall pressure", "x", "p", "Pa")
	add("r", study.Reference, "wall pressure", "x", "p", "Pa")
	for _, role := range []string{study.Simulation, study.Reference} {
		add("n", role, "lift", "", "N", "N").Force = study.Forces{As: by(study.AsLift), Axial: by("A")}
	}
	turned := func(name string) study.Form {
		return study.Form{Name: name, Simulation: study.FormTurned, Data: study.FormTurned}
	}
	for _, quantity := range []string{"wall pressure", "lift"} {
		s.Questions = append(s.Questions, study.Question{Case: "C", Quantity: quantity, Kind: by(study.KindTest), Use: by(study.UseValidation), Choices: study.DefaultChoices()})
	}
	s.Questions[0].Form, s.Questions[0].XForm, s.Questions[1].Form = turned("Cp"), turned("x/L"), turned("Cl")
	s.Cases = []study.Card{{Name: "C", References: []study.ReferenceQuantity{
		{Symbol: "ρ", Value: 1.25, Unit: "kg/m^3", U: &zero}, {Symbol: "U_ref", Value: 20, Unit: "m/s", U: &zero}, {Symbol: "p_ref", Value: 20, Unit: "Pa", U: &one},
		{Symbol: "L", Value: 240, Unit: "mm", U: &zero}, {Symbol: "A_ref", Value: .5, Unit: "m^2", U: &zero}, {Symbol: "α", Value: 30, Unit: "deg", U: &zero}}}}
	data, err := s.Save()
	if err != nil {
		t.Fatal(err)
	}
	out := t.TempDir()
	if status, _, errs := call(t, map[string]string{"card.json": string(data)}, "run", "card.json", "--out", out); status > 2 {
		t.Fatalf("status %d, %s", status, errs)
	}
	for name, wants := range map[string][]string{
		"report.json":  {`"symbol": "q∞"`, "q∞ = ρ U_ref²/2", "becomes Cp = (p − p_ref)/(ρ U_ref²/2) with p_ref = 20 Pa ± 1", "N cos(α) − A sin(α)"},
		"memo.html":    {"becomes Cp = (p − p_ref)/(ρ U_ref²/2)", "becomes x/L", "becomes Cl"},
		"stations.csv": {"wall pressure", "0.125", "1.52"},
	} {
		text, err := os.ReadFile(filepath.Join(out, name))
		if err != nil {
			t.Fatal(err)
		}
		for _, want := range wants {
			if !strings.Contains(string(text), want) {
				t.Errorf("%s: without %q\n%.1500s", name, want, text)
			}
		}
	}
}
