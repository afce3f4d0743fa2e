package station

import (
	"slices"
	"testing"

	"weirmark/core/internal/reference"
	"weirmark/core/tablefile"
)

// TestAirfoilsAreLoops: every measured and simulated pressure distribution of
// the NACA 0012 in the shared folder (NASA Turbulence Modeling Resource) runs
// round the airfoil: two branches, at no angle a single curve. The symmetric
// ones at zero incidence have the same values on both.
func TestAirfoilsAreLoops(t *testing.T) {
	loops := 0
	for _, name := range []string{"CP_Ladson.dat", "n0012cp_cfl3d_sa.dat", "n0012cp_cfl3d_sst.dat"} {
		file := tablefile.Read(name, reference.Shared(t, "nasa-tmr/naca0012/"+name), tablefile.Options{})
		for _, table := range file.Tables {
			loops++
			x, cp := table.Columns[0].Values, table.Columns[1].Values
			r := Resample("cp", "x", x, cp, []float64{0.5}, Options{})
			if !r.Refused || !slices.Equal(codes(r.Notices), []string{"curve-loop"}) || branches(usable(x, cp)) != 2 {
				t.Errorf("%s, %s: %d branches, %v", name, table.Name, branches(usable(x, cp)), r.Notices)
			}
		}
	}
	if loops != 15 {
		t.Errorf("%d pressure distributions, want 15", loops)
	}
}
