package published

import (
	"math"
	"testing"

	"weirmark/core/derived"
	"weirmark/core/internal/reference"
)

// TestBackstepCrossings: every change of sign of the skin friction, near-wall
// and corner ones among them, on the measured and the simulated curves by the
// same code; and the reattachment beside what the resource prints.
func TestBackstepCrossings(t *testing.T) {
	reference.SharedDir(t)
	rows := figures(t, "backstep-crossings.csv")
	checked := 0
	for _, row := range []struct {
		name, file string
		ours       float64 // reattachment x/H, to 0.05: issue 2
		printed    string  // by the resource
	}{
		{"measured", "nasa-tmr/backstep/cf.exp.dat", 6.28, "6.26 ± 0.10, by another method"},
		{"SA", models[0].simulated, 6.07, "6.1"},
		{"SST", models[1].simulated, 6.54, "6.50"},
		{"W06", models[2].simulated, 6.82, "6.8"},
	} {
		columns := curve(t, row.file, "x", "cf")
		found := derived.Crossings(columns[0], columns[1])
		var want []map[string]string
		for _, figure := range rows {
			if figure["curve"] == row.name {
				want = append(want, figure)
			}
		}
		if len(found) != len(want) || len(found) == 0 {
			t.Errorf("%s: %d crossings, scipy has %d: %v", row.name, len(found), len(want), found)
			continue
		}
		for i, c := range found {
			if at := number(t, want[i], "x"); !equal(c.X, at, 0) || c.Rising != (want[i]["direction"] == "up") {
				t.Errorf("%s: crossing %+v, numpy has %v", row.name, c, want[i])
			}
			checked++
		}
		if last := found[len(found)-1]; last.X < 3 || !last.Rising || math.Abs(last.X-row.ours) > 0.05 {
			t.Errorf("%s: reattachment %+v, want %v within 0.05 (the resource prints %s)", row.name, last, row.ours, row.printed)
		}
	}
	if checked != len(rows) {
		t.Errorf("%d crossings were checked, %d are committed", checked, len(rows))
	}
}
