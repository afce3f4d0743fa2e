package study

import (
	"reflect"
	"testing"

	"pgregory.net/rapid"

	"weirmark/core/notice"
	"weirmark/core/tablefile"
)

// TestNaming reads names of our own making under patterns.
func TestNaming(t *testing.T) {
	for _, row := range []struct {
		pattern, name string
		want          map[string]string
	}{
		{"case-model-grid", "C1-A-G2.dat", map[string]string{"case": "C1", "model": "A", "grid": "G2"}},
		{"case-model-grid-*", "C1-A-G2-profile.v2.csv", map[string]string{"case": "C1", "model": "A", "grid": "G2"}},
		{"case_model_grid_quantity_station", "ramp_k-w_fine_u_x=2.dat", nil}, // the sign - is of no part
		{"case_model_grid_quantity_station", "ramp_kw_fine_u_x=2.dat", map[string]string{"case": "ramp", "model": "kw", "grid": "fine", "quantity": "u", "station": "x=2"}},
		{"run*_grid.csv", "run17_coarse.csv", map[string]string{"grid": "coarse"}},
		{"run*_grid.csv", "run17_coarse.dat", nil},
		{"case (model)", "Kanal 3 (B).txt", nil},
		{"*case (model)", "Kanal C3 (B).txt", map[string]string{"case": "C3", "model": "B"}},
		{"CASE-model", "case-x.dat", map[string]string{"model": "x"}}, // in capitals it stands for itself
	} {
		n, ok := ParseNaming(row.pattern)
		if !ok {
			t.Errorf("%q is refused", row.pattern)
			continue
		}
		if got := n.Of(row.name); !reflect.DeepEqual(got, row.want) {
			t.Errorf("%q of %q: %v, want %v", row.pattern, row.name, got, row.want)
		}
	}
	for _, bad := range []string{"", "*", "abc", "casemodel", "case-case", "station*-station"} {
		if _, ok := ParseNaming(bad); ok {
			t.Errorf("%q is taken", bad)
		}
	}
}

// TestNamingProperty writes a name from parts and reads the parts again.
func TestNamingProperty(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		part := rapid.StringMatching(`[A-Za-z0-9.+=]{1,8}`)
		c, m, g := part.Draw(t, "case"), part.Draw(t, "model"), part.Draw(t, "grid")
		n, _ := ParseNaming("case_model-grid.dat")
		want := map[string]string{"case": c, "model": m, "grid": g}
		if got := n.Of(c + "_" + m + "-" + g + ".dat"); !reflect.DeepEqual(got, want) {
			t.Fatalf("%v, want %v", got, want)
		}
	})
}

// TestPattern changes the guesses of slips, and only these, and finds two
// files that claim to be one run.
func TestPattern(t *testing.T) {
	s := New()
	for _, name := range []string{"ramp-lin-coarse.csv", "ramp-lin-fine.csv", "notes.csv", "ramp-lin-fine-old.csv"} {
		data := []byte("x [m],u [m/s]\n0,1\n1," + name[5:6] + "2\n2,3\n")
		s.Add(name, data, tablefile.Read(name, data, tablefile.Options{}), "")
	}
	if err := s.Set(Target{Kind: "slip", ID: "s2", Field: "model"}, "mine", "", ""); err != nil {
		t.Fatal(err)
	}
	if err := s.Set(Target{Kind: "study", Field: "pattern"}, "case-model-grid*", "", ""); err != nil {
		t.Fatal(err)
	}
	for _, row := range []struct{ got, want Field }{
		{s.Slips[0].Case, guess("ramp")}, {s.Slips[0].Model, guess("lin")},
		{s.Slips[1].Model, Field{Value: "mine", By: Entered}}, {s.Slips[2].Case, guess("C1")},
	} {
		if row.got != row.want {
			t.Errorf("%+v, want %+v", row.got, row.want)
		}
	}
	if names := s.Names(); names[2].Said != nil || names[1].Said["model"] != "lin" {
		t.Errorf("names: %+v", names)
	}
	if err := s.Set(Target{Kind: "study", Field: "pattern"}, "casemodel", "", ""); err == nil {
		t.Error("a pattern that no name can be read by is taken")
	}
	for i, grid := range []string{"fine", "fine"} {
		if err := s.Set(Target{Kind: "slip", ID: s.Slips[2*i+1].ID, Field: "grid"}, grid, "", ""); err != nil {
			t.Fatal(err)
		}
	}
	s.Slips[3].Model = s.Slips[1].Model
	if c := s.Collisions(); len(c) != 1 || len(c[0].Files) != 2 || c[0].Run != "u at ramp, model mine, grid fine" {
		t.Errorf("collisions: %+v", c)
	}
	found := false
	for _, c := range Evaluate(s, Options{}).Cells {
		for _, n := range c.Notices {
			found = found || n.Code == "names-collide" && n.Severity == notice.Ask
		}
	}
	if !found {
		t.Error("the cell does not tell of two files for one run")
	}
}

// TestAcceptStations accepts the stations that names say, and leaves a guess
// that says another quantity open.
func TestAcceptStations(t *testing.T) {
	s := New()
	for _, name := range []string{"ramp_x2.csv", "ramp_x5.csv"} {
		data := []byte("y [m],u [m/s]\n0,0\n1,2\n2," + name[6:7] + "\n")
		s.Add(name, data, tablefile.Read(name, data, tablefile.Options{}), "")
	}
	if err := s.Set(Target{Kind: "study", Field: "pattern"}, "case_station", "", ""); err != nil {
		t.Fatal(err)
	}
	s.Slips[1].Quantity = guess("v at x7")
	if err := s.AcceptNames("station", ""); err != nil {
		t.Fatal(err)
	}
	if got, want := s.Slips[0].Quantity, (Field{Value: "u at x2", By: Accepted}); got != want {
		t.Errorf("%+v, want %+v", got, want)
	}
	if got, want := s.Slips[1].Quantity, guess("v at x7"); got != want {
		t.Errorf("a guess that the name does not say: %+v, want %+v", got, want)
	}
}
