package published

import (
	"math"
	"testing"

	"weirmark/core/comparison"
	"weirmark/core/internal/reference"
	"weirmark/core/station"
)

// karmanSchoenherr is the correlation of the skin friction of a flat plate,
// cf = 1/(17.08 L^2 + 25.11 L + 6.012) with L = log10 Re_theta. Source: NASA
// Turbulence Modeling Resource, flatplate_val.html and flatplate/theory/cf_K-S.dat.
func karmanSchoenherr(retheta float64) float64 {
	l := math.Log10(retheta)
	return 1 / (float64(17.08*l*l) + float64(25.11*l) + 6.012)
}

const correlation = "nasa-tmr/flatplate/theory/cf_K-S.dat"

// TestKarmanSchoenherr needs the committed figures only.
func TestKarmanSchoenherr(t *testing.T) {
	rows := figures(t, "flatplate-karman-schoenherr.csv")
	if len(rows) != 100 {
		t.Fatalf("%d rows, want 100", len(rows))
	}
	for _, row := range rows {
		at := number(t, row, "retheta")
		cf := karmanSchoenherr(at)
		if want := number(t, row, "formula"); !equal(cf, want, 0) {
			t.Errorf("Re_theta = %v: %v, numpy has %v", at, cf, want)
		}
		// Eight decimals are printed; the largest difference is 4.9e-9 (published-examples 6.1).
		if printed := number(t, row, "printed"); math.Abs(cf-printed) > 5e-9 {
			t.Errorf("Re_theta = %v: %v, printed %v", at, cf, printed)
		}
	}
}

// TestKarmanSchoenherrAsRead: the printed table, read from the source's file,
// is the committed one.
func TestKarmanSchoenherrAsRead(t *testing.T) {
	columns := curve(t, correlation, "retheta", "cf")
	rows := figures(t, "flatplate-karman-schoenherr.csv")
	if len(columns[0]) != len(rows) {
		t.Fatalf("%d rows read, %d committed", len(columns[0]), len(rows))
	}
	for i, row := range rows {
		if columns[0][i] != number(t, row, "retheta") || columns[1][i] != number(t, row, "printed") {
			t.Errorf("row %d: read %v, %v, committed %v", i+1, columns[0][i], columns[1][i], row)
		}
	}
}

// TestFlatPlateFriction: CFL3D with two models against the correlation, at the
// stations of its table within each curve. The reference carries no
// uncertainty: this is a comparison, not a validation.
func TestFlatPlateFriction(t *testing.T) {
	reference.SharedDir(t)
	all := figures(t, "flatplate-friction.csv")
	checked := 0
	for _, model := range []struct{ name, file string }{
		{"SA", "nasa-tmr/flatplate/theory/sa-cf_cfl3d.dat"},
		{"SST", "nasa-tmr/flatplate/theory/sst-cf_cfl3d.dat"},
	} {
		t.Run(model.name, func(t *testing.T) {
			at := curve(t, correlation, "retheta")[0]
			columns := curve(t, model.file, "retheta", "cf")
			r := station.Resample("cf", "retheta", columns[0], columns[1], at, station.Options{})
			if r.Refused || len(r.Kept)+len(r.Outside) != len(at) {
				t.Fatalf("%d kept and %d outside of %d, notices %v", len(r.Kept), len(r.Outside), len(at), r.Notices)
			}
			var rows []map[string]string
			for _, row := range all {
				if row["model"] == model.name {
					rows = append(rows, row)
				}
			}
			if len(rows) < 40 || len(rows) != len(r.Kept) {
				t.Fatalf("%d stations kept, %d committed", len(r.Kept), len(rows))
			}
			d := make([]float64, len(r.Kept))
			for j, i := range r.Kept {
				d[j] = karmanSchoenherr(at[i])
			}
			e := comparison.Error(r.S, d)
			for j, row := range rows {
				x := at[r.Kept[j]]
				for _, value := range []struct {
					name      string
					got, size float64
				}{
					{"retheta", x, 0},
					{"s", r.S[j], 0},
					{"d", d[j], 0},
					{"e", e[j], d[j]},
					{"relative", e[j] / d[j], 1},
				} {
					if want := number(t, row, value.name); !equal(value.got, want, value.size) {
						t.Errorf("Re_theta = %v: %s = %v, numpy has %v", x, value.name, value.got, want)
					}
				}
				checked++
			}
		})
	}
	if checked != len(all) {
		t.Errorf("%d rows were checked, %d are committed", checked, len(all))
	}
}
