package derived

import (
	"bytes"
	"encoding/csv"
	"math"
	"os"
	"path/filepath"
	"slices"
	"testing"

	"github.com/gocarina/gocsv"
	"pgregory.net/rapid"

	"weirmark/core/internal/reference"
	"weirmark/core/tablefile"
)

func TestCrossings(t *testing.T) {
	nan, inf := math.NaN(), math.Inf(1)
	for _, row := range []struct {
		what string
		x, y []float64
		want []Crossing
	}{
		{"none", []float64{0, 1, 2}, []float64{1, 2, 3}, nil},
		{"up", []float64{0, 1}, []float64{-1, 3}, []Crossing{{0.25, true}}},
		{"down", []float64{0, 1}, []float64{3, -1}, []Crossing{{0.75, false}}},
		{"up and down", []float64{0, 1, 2}, []float64{-1, 1, -3}, []Crossing{{0.5, true}, {1.25, false}}},
		{"falling abscissae", []float64{2, 1, 0}, []float64{-1, 1, 2}, []Crossing{{1.5, true}}},
		{"one zero between signs", []float64{0, 1, 2}, []float64{-1, 0, 1}, []Crossing{{1, true}}},
		{"one zero between signs, down", []float64{0, 1, 2}, []float64{1, 0, -1}, []Crossing{{1, false}}},
		{"zero touched", []float64{0, 1, 2}, []float64{1, 0, 1}, nil},
		{"run of zeros", []float64{0, 1, 2, 3}, []float64{-1, 0, 0, 1}, nil},
		{"zero at the ends", []float64{0, 1, 2}, []float64{0, 1, 0}, nil},
		{"negative zero", []float64{0, 1, 2}, []float64{-1, math.Copysign(0, -1), 1}, []Crossing{{1, true}}},
		{"all zero", []float64{0, 1, 2}, []float64{0, 0, 0}, nil},
		{"value missing between", []float64{0, 1, 2}, []float64{-1, nan, 1}, nil},
		{"value missing behind a zero", []float64{0, 1, 2, 3}, []float64{-1, 0, nan, 1}, nil},
		{"abscissa missing", []float64{0, nan, 2}, []float64{-1, -1, 1}, nil},
		{"infinite value", []float64{0, 1}, []float64{-1, inf}, nil},
		{"after a gap", []float64{0, 1, 2, 3}, []float64{-1, nan, -1, 1}, []Crossing{{2.5, true}}},
		{"at one abscissa", []float64{0, 1, 1, 2}, []float64{-1, -1, 1, 1}, []Crossing{{1, true}}},
		{"huge values", []float64{0, 1}, []float64{-1e308, 1e308}, []Crossing{{0.5, true}}},
		{"one row", []float64{0}, []float64{1}, nil},
		{"nothing", nil, nil, nil},
	} {
		if got := Crossings(row.x, row.y); !slices.Equal(got, row.want) {
			t.Errorf("%s: %v, want %v", row.what, got, row.want)
		}
	}
}

// TestCrossingsAlternate: without gaps and zeros the directions alternate, as
// many as there are changes of sign, each between its neighbours.
func TestCrossingsAlternate(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		y := rapid.SliceOfN(rapid.Float64Range(-10, 10).Filter(func(v float64) bool { return v != 0 }), 2, 40).Draw(t, "values")
		x := make([]float64, len(y))
		for i := range x {
			x[i] = float64(i)
		}
		found := Crossings(x, y)
		k := 0
		for i := 1; i < len(y); i++ {
			if (y[i] > 0) == (y[i-1] > 0) {
				continue
			}
			if k >= len(found) || found[k].X < x[i-1] || found[k].X > x[i] || found[k].Rising != (y[i] > 0) {
				t.Fatalf("crossing %d of %v between %v and %v", k, found, x[i-1], x[i])
			}
			k++
		}
		if k != len(found) {
			t.Fatalf("%d changes of sign, %d crossings", k, len(found))
		}
	})
}

// crossingRow is a row of testdata/published/backstep-crossings.csv.
type crossingRow struct {
	Curve     string  `csv:"curve"`
	Direction string  `csv:"direction"`
	X         float64 `csv:"x"`
}

// TestBackstep: the changes of sign of the skin friction behind the backward-
// facing step (NASA Turbulence Modeling Resource). Every crossing agrees with
// testdata/published/backstep-crossings.csv (computed with numpy, 12 digits).
// Reattachment, the crossing beyond x/H = 3, is printed there near 6.1 (SA),
// 6.50 (SST), 6.8 (W06), measured 6.26 ± 0.10; straight lines between the
// stations give 6.07, 6.54, 6.82 and 6.28.
func TestBackstep(t *testing.T) {
	data, err := os.ReadFile(filepath.Join(reference.Root(t), "testdata", "published", "backstep-crossings.csv"))
	if err != nil {
		t.Fatal(err)
	}
	reader := csv.NewReader(bytes.NewReader(data))
	reader.Comment = '#'
	var rows []crossingRow
	if err := gocsv.UnmarshalCSV(reader, &rows); err != nil {
		t.Fatal(err)
	}
	if len(rows) != 14 {
		t.Fatalf("%d rows, want 14", len(rows))
	}
	for _, c := range []struct {
		curve, file         string
		reattached, printed float64
		within              float64 // of the printed value: half its last digit and the line between stations
	}{
		{"SA", "backstep_cfl3d_cf_sa.dat", 6.07, 6.1, 0.05},
		{"SST", "backstep_cfl3d_cf_sst.dat", 6.54, 6.50, 0.05},
		{"W06", "backstep_cfl3d_cf_w06.dat", 6.82, 6.8, 0.05},
		{"measured", "cf.exp.dat", 6.28, 6.26, 0.10}, // the printed uncertainty
	} {
		table, err := tablefile.Read(c.file, reference.Shared(t, "nasa-tmr/backstep/"+c.file), tablefile.Options{}).Table("")
		if err != nil {
			t.Fatal(err)
		}
		found := Crossings(table.Columns[0].Values, table.Columns[1].Values)
		var want []crossingRow
		for _, r := range rows {
			if r.Curve == c.curve {
				want = append(want, r)
			}
		}
		if len(found) != len(want) {
			t.Errorf("%s: %v, want %v", c.curve, found, want)
			continue
		}
		var beyond []Crossing
		for i, f := range found {
			if math.Abs(f.X-want[i].X) > 1e-10 || f.Rising != (want[i].Direction == "up") {
				t.Errorf("%s: %v, want %v", c.curve, f, want[i])
			}
			if f.X > 3 {
				beyond = append(beyond, f)
			}
		}
		if len(beyond) != 1 || !beyond[0].Rising || math.Abs(beyond[0].X-c.reattached) > 0.005 || math.Abs(beyond[0].X-c.printed) > c.within {
			t.Errorf("%s: reattachment %v, want %v, printed %v", c.curve, beyond, c.reattached, c.printed)
		}
	}
}
