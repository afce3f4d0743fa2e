package study_test

import (
	"path"
	"testing"

	"weirmark/core/internal/reference"
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

// Tables of the NASA Turbulence Modeling Resource and how a practitioner would
// use them: the place of a profile and a running number are no stations, a
// profile may be written as it is drawn, a spacing is no value over grids.
func TestProposalsForPublishedTables(t *testing.T) {
	for _, row := range []struct{ file, role, x, y, u string }{
		{"backstep/backstep_cfl3d_vel_sa.dat", study.Simulation, "y/H", "u/Uref", ""},
		{"backstep/profiles.exp.dat", study.Reference, "y", "u", ""},
		{"backstep/cf.exp.dat", study.Reference, "x", "cf", "error"},
		{"backstep/cp.expnew.dat", study.Reference, "x", "cp", ""},
		{"bump/sa/bump_u.dat", study.Simulation, "y-y0", "u", ""},
		{"bump/sa/cp_bump.dat", study.Simulation, "x", "cp", ""},
		{"bump/sa-five-grids/cf_convergence_sa.dat", study.GridValues, "", "C_f", ""},
		{"bump/sst/force_convergence_sst.dat", study.GridValues, "", "C_L", ""},
		{"flatplate/sa/cf_convergence.dat", study.GridValues, "", "C_f,x=0.97", ""},
		{"flatplate/sa/flatplate_u.dat", study.Simulation, "y", "u", ""},
		{"flatplate/sa/flatplate_u+y+.dat", study.Simulation, "log(y+)", "u+", ""},
		{"flatplate/sa/mut_0.97.dat", study.Simulation, "y", "mut", ""},
		{"flatplate/theory/sa-cf_cfl3d.dat", study.Simulation, "retheta", "cf", ""},
		{"naca0012/CLCD_Ladson_expdata.dat", study.Reference, "alpha", "cl", ""},
		{"naca0012/CP_Gregory_expdata.dat", study.Reference, "x/c", "cp", ""},
		{"naca0012/n0012cp_cfl3d_sa.dat", study.Simulation, "x", "cp", ""},
	} {
		data := reference.Shared(t, "nasa-tmr/"+row.file)
		name := path.Base(row.file)
		for i, p := range study.New().Add(name, data, study.Read(study.File{Name: name, Data: data}), "") {
			if i > 0 {
				break
			}
			if p.Role.Value != row.role || p.X.Column.Value != row.x || p.Y.Column.Value != row.y || p.U.Column.Value != row.u {
				t.Errorf("%s: %s, stations %q, values %q, uncertainty %q", row.file, p.Role.Value, p.X.Column.Value, p.Y.Column.Value, p.U.Column.Value)
			}
		}
	}
}
