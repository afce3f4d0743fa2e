package study_test

import (
	"testing"

	"weirmark/core/study"
)

// What a file states of itself is taken as stated, what its names suggest as
// a guess, and what neither says stays open.
func TestProposals(t *testing.T) {
	for _, row := range []struct {
		name, text                    string
		role, quantity, x, unit, kind string
		u                             string
	}{
		{"C2-B-G3-cf.csv", "x [mm],Cf\n0,0.003\n1,0.004\n", study.Simulation, "Cf", "x", "mm", "", ""},
		{"taps_test.csv", "x/c,Cp,u(Cp)\n0,1,0.01\n0.5,-1,0.01\n", study.Reference, "Cp", "x/c", "1", "", "u(Cp)"},
		{"plate.csv", "# law: a plate\n# kind: law\nRe,cf\n1000,0.02\n2000,0.01\n", study.Reference, "cf", "Re", "", study.KindLaw, ""},
		{"grids.csv", "cells,Cd\n1000,0.4\n8000,0.3\n64000,0.29\n", study.GridValues, "Cd", "", "", "", ""},
	} {
		s := study.New()
		data := []byte(row.text)
		added := s.Add(row.name, data, study.Read(study.File{Name: row.name, Data: data}), "09:00")
		if len(added) != 1 {
			t.Fatalf("%s: %d slips", row.name, len(added))
		}
		p := added[0]
		if p.Role.Value != row.role || p.Role.By != study.Guessed || p.Quantity.Value != row.quantity || p.X.Column.Value != row.x || p.X.Unit.Value != row.unit || p.U.Column.Value != row.u {
			t.Errorf("%s: %+v", row.name, p)
		}
		if q := s.Question(p.Case.Value, p.Quantity.Value); q == nil || q.Kind.Value != row.kind || row.kind != "" && q.Kind.By != study.Stated {
			t.Errorf("%s: question %+v", row.name, q)
		}
	}
	s := study.New()
	data := []byte("x,y\n1,2\n")
	p := s.Add("C2-B-G3-cf.csv", data, study.Read(study.File{Name: "a", Data: data}), "")[0]
	if p.Case.Value != "C2" || p.Model.Value != "B" || p.Grid.Value != "G3" {
		t.Errorf("case %q, model %q, grid %q from the name", p.Case.Value, p.Model.Value, p.Grid.Value)
	}
}
