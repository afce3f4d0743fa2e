package study_test

import (
	"fmt"
	"math"
	"testing"

	"weirmark/core/notice"
	"weirmark/core/study"
)

// forces is a study of one value on both sides: "m" is the column of values,
// "n" and "a" are forces in N.
func forces(m, n, a float64, unit string) *study.Study {
	text := fmt.Sprintf("run,m,n,a\n1,%.10g,%.10g,%.10g\n", m, n, a)
	s := pair(text, text, "", "")
	for i := range s.Slips {
		s.Slips[i].X, s.Slips[i].Y = study.ColumnUse{}, study.ColumnUse{Column: entered("m"), Unit: entered(unit)}
	}
	return s
}

// Own hand calculation: about (0.06, 0) m a moment of 12 N m, with 100 N up and
// 10 N aft; about (0.10, 0.02) m it is 12 + 0.04·100 − 0.02·10 = 15.8 N m. At 30°
// 100 N normal and 10 N axial are 100 cos 30° − 10 sin 30° = 81.6025 N of lift
// and 100 sin 30° + 10 cos 30° = 58.6603 N of drag; a half model has twice as much.
func TestForces(t *testing.T) {
	centres := []study.ReferenceQuantity{given("x_m", 60, "mm"), given("z_m", 0, "m"), given("x_c", .1, "m"), given("z_c", .02, "m"), given("α", 30, "deg"), given("L", .5, "m")}
	for _, row := range []struct {
		name    string
		m       float64
		unit    string
		force   study.Forces
		want    float64
		mapping string
	}{
		{"moment", 12, "N m", study.Forces{As: entered(study.AsMoment), Normal: entered("n"), Axial: entered("a")}, 15.8, "sim.csv: m + (x_c − x_m) n − (z_c − z_m) a in N m with x_c = 0.1 m ± 0, x_m = 60 mm ± 0, z_c = 0.02 m ± 0, z_m = 0 m ± 0."},
		{"moment, normal force alone", 12, "N m", study.Forces{As: entered(study.AsMoment), Normal: entered("n")}, 16, ""},
		{"moment coefficient", 12, "1", study.Forces{As: entered(study.AsMoment), Normal: entered("n"), Axial: entered("a")}, 12 + .04/.5*100 - .02/.5*10, ""},
		{"lift", 100, "N", study.Forces{As: entered(study.AsLift), Axial: entered("a")}, 81.60254038, ""},
		{"drag", 100, "N", study.Forces{As: entered(study.AsDrag), Axial: entered("a")}, 58.66025404, ""},
		{"lift of a half model", 100, "N", study.Forces{As: entered(study.AsLift), Axial: entered("a"), Half: entered("yes")}, 163.2050808, ""},
		{"half model", 100, "N", study.Forces{Half: entered("yes")}, 200, ""},
		{"as it is", 100, "N", study.Forces{}, 100, ""},
	} {
		s := forces(row.m, 100, 10, row.unit)
		s.Slips[0].Force = row.force
		s.Cases = card(centres...)
		c := only(t, s)
		if len(c.Stations) != 1 || math.Abs(float64(c.Stations[0].S)-row.want) > 1e-7 || math.Abs(float64(c.Stations[0].D)-row.m) > 1e-9 {
			t.Errorf("%s: %+v, want %v: %+v", row.name, c.Stations, row.want, c.Notices)
		}
		if row.mapping != "" && c.Mapping[0] != row.mapping {
			t.Errorf("%s: %q", row.name, c.Mapping[0])
		}
	}
}

// Wherever the moments of one force are taken, at its centre they agree.
func TestMomentsOfOneForce(t *testing.T) {
	const xF, zF, n, a = .31, .04, 70., -12.
	about := func(x, z float64) float64 { return -(xF-x)*n + (zF-z)*a }
	for _, from := range [][2]float64{{0, 0}, {.25, .01}, {-1, 2}} {
		s := forces(about(from[0], from[1]), n, a, "N m")
		s.Slips[0].Force = study.Forces{As: entered(study.AsMoment), Normal: entered("n"), Axial: entered("a")}
		s.Cases = card(given("x_m", from[0], "m"), given("z_m", from[1], "m"), given("x_c", xF, "m"), given("z_c", zF, "m"))
		if c := only(t, s); math.Abs(float64(c.Stations[0].S)) > 1e-9 {
			t.Errorf("from %v: %v about the point that the force acts at", from, c.Stations[0].S)
		}
	}
}

func TestForceDoubts(t *testing.T) {
	apart := forces(12, 100, 10, "N m")
	apart.Questions[0].Form = study.Form{Name: "Cm", Simulation: study.FormTurned, Data: study.FormTurned}
	apart.Cases = card(given("x_m", .06, "m"), given("x_m", .1, "m"), given("q", 500, "Pa"), given("A_ref", .1, "m^2"), given("L", .5, "m"), given("x_c", .1, "m"))
	apart.Cases[0].References[0].Side, apart.Cases[0].References[1].Side = study.Simulation, study.OfData
	if c := only(t, apart); !told(c, "moment-centres", "about x = 0.06000 m in the simulation and about x = 0.1000 m in the data") || math.Abs(float64(c.Stations[0].S)-12/(500*.1*.5)) > 1e-9 {
		t.Errorf("%+v", c.Notices)
	}
	apart.Slips[0].Force = study.Forces{As: entered(study.AsMoment), Normal: entered("n")}
	if c := only(t, apart); notice.Has(c.Notices, "moment-centres") || math.Abs(float64(c.Stations[0].S)-16/(500*.1*.5)) > 1e-9 {
		t.Errorf("%+v %+v", c.Notices, c.Stations)
	}
	half := forces(100, 100, 10, "N")
	half.Questions[0].Form = study.Form{Name: "Cl", Simulation: study.FormTurned, Data: study.FormTurned}
	half.Cases = card(given("q", 500, "Pa"), given("A_ref", .1, "m^2"))
	half.Slips[1].Force.Half = entered("yes")
	for kind, doubted := range map[string]bool{study.AreaKinds[0]: false, study.AreaKinds[4]: true} {
		half.Cases[0].References[1].Kind = kind
		if c := only(t, half); notice.Has(c.Notices, "force-half-area") != doubted {
			t.Errorf("%s: %+v", kind, c.Notices)
		}
	}
	for _, row := range []struct {
		force study.Forces
		code  string
	}{
		{study.Forces{As: entered("thrust")}, "force-unknown"},
		{study.Forces{As: entered(study.AsLift), Axial: entered("a")}, "formula-refused"}, // no angle on the card
		{study.Forces{As: entered(study.AsMoment)}, "field-missing"},
	} {
		s := forces(100, 100, 10, "N")
		s.Slips[0].Force = row.force
		if c := only(t, s); !notice.Has(c.Notices, row.code) || !c.Withheld {
			t.Errorf("%+v: %+v", row.force, c.Notices)
		}
	}
}

// Whether the data are corrected for walls and supports is recorded with the
// result, and the uncertainty of the correction is a source like others.
func TestCorrectionsAreRecorded(t *testing.T) {
	s := pressures(10)
	target := func(field string) study.Target { return study.Target{Kind: "question", ID: "C|q", Field: field} }
	if err := s.Set(target("corrected.state"), study.Corrected, "", "09:00"); err != nil {
		t.Fatal(err)
	}
	if err := s.Set(target("corrected.how"), "blockage, 1.8 % of q", "", "09:01"); err != nil {
		t.Fatal(err)
	}
	if err := s.Set(target("corrected.state"), "perhaps", "", "09:02"); err == nil {
		t.Error("an unknown state was taken")
	}
	s.Questions[0].Sources = append(s.Questions[0].Sources, study.Source{Name: "wall correction", Of: study.OfData, Value: .9, Basis: study.OfReading, Coverage: entered("1"), Pattern: study.Common})
	c := only(t, s)
	if c.Corrected != (study.Correction{State: study.Corrected, How: "blockage, 1.8 % of q"}) || len(s.Log) != 2 {
		t.Errorf("%+v, log %+v", c.Corrected, s.Log)
	}
	line := budgetLine(c, "wall correction")
	sum := 0.0
	for _, at := range c.Stations {
		sum += math.Pow(.009*float64(at.D), 2) / float64(len(c.Stations))
	}
	if line == nil || line.Pattern != study.Common || math.Abs(float64(line.U)-math.Sqrt(sum)) > 1e-9 {
		t.Errorf("%+v, want u = %v", line, math.Sqrt(sum))
	}
}
