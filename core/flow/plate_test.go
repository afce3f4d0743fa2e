package flow

import (
	"bytes"
	"encoding/csv"
	"math"
	"os"
	"path/filepath"
	"testing"

	"github.com/gocarina/gocsv"
	"pgregory.net/rapid"

	"weirmark/core/internal/reference"
)

// TestPlateCorrelations: rows of the data files of the NASA Turbulence Modeling
// Resource, flat plate validation (seen), as printed there with 8 decimals; the
// unit Reynolds number is 5e6, whatever the file's label says. The files of
// 6-121 and 6-134 lie up to 1.8e-7 and 3.6e-8 from the formula.
func TestPlateCorrelations(t *testing.T) {
	check(t, []printed{
		{"plate-power-5", nil, 0.97 * 5e6, 0.00272379, 5.1e-9},
		{"plate-power-5", nil, 5e6, 0.00270725, 5.1e-9},
		{"plate-power-7", nil, 5e6, 0.00287051, 1.8e-7},
		{"plate-white", nil, 5e6, 0.00286072, 3.6e-8},
		{"plate-karman-schoenherr", nil, 200, 0.00648403, 5e-9},
		{"plate-karman-schoenherr", nil, 4000, 0.00314396, 5e-9},
		{"plate-karman-schoenherr", nil, 5000, 0.00300672, 5e-9},
		{"plate-karman-schoenherr", nil, 10000, 0.00263344, 5e-9},
		{"plate-karman-schoenherr", nil, 13000, 0.00251014, 5e-9},
		{"plate-karman-schoenherr", nil, 20000, 0.00232574, 5e-9},
	})
}

// TestKarmanSchoenherrTable: all 100 rows of the resource's table, transcribed
// in testdata/published.
func TestKarmanSchoenherrTable(t *testing.T) {
	data, err := os.ReadFile(filepath.Join(reference.Root(t), "testdata", "published", "flatplate-karman-schoenherr.csv"))
	if err != nil {
		t.Fatal(err)
	}
	reader := csv.NewReader(bytes.NewReader(data))
	reader.Comment = '#'
	var rows []struct {
		ReTheta float64 `csv:"retheta"`
		Printed float64 `csv:"printed"`
	}
	if err := gocsv.UnmarshalCSV(reader, &rows); err != nil {
		t.Fatal(err)
	}
	if len(rows) != 100 {
		t.Fatalf("%d rows, want 100", len(rows))
	}
	for _, r := range rows {
		// 8 decimals: half a digit.
		if got := value(t, "plate-karman-schoenherr", nil, r.ReTheta); math.Abs(got-r.Printed) > 5e-9 {
			t.Errorf("Re_theta %v: %v, printed %v", r.ReTheta, got, r.Printed)
		}
	}
}

// TestFrictionLines: formulas from texts that quote them, numbers recomputed
// with scipy, twelve decimals at most.
func TestFrictionLines(t *testing.T) {
	check(t, []printed{
		{"line-ittc-57", nil, 1e6, 0.0046875, 1e-16},
		{"line-ittc-57", nil, 1e7, 0.003, 1e-16},
		{"line-ittc-57", nil, 1e8, 0.00208333333, 5e-12},
		{"line-ittc-57", nil, 1e9, 0.00153061224, 5e-12},
		{"line-schoenherr", nil, 1e6, 0.00440943316, 5e-12},
		{"line-schoenherr", nil, 1e7, 0.00293427861, 5e-12},
		{"line-schoenherr", nil, 1e8, 0.00207203017, 5e-12},
		{"line-schoenherr", nil, 1e9, 0.00153093700, 5e-12},
		{"line-prandtl-schlichting", nil, 1e6, 0.00447075809, 5e-12},
		{"line-prandtl-schlichting", nil, 1e7, 0.00300371313, 5e-12},
		{"line-prandtl-schlichting", nil, 1e8, 0.00212833129, 5e-12},
		{"line-prandtl-schlichting", nil, 1e9, 0.00157060047, 5e-12},
		{"line-white", nil, 1e6, 0.00432066431, 5e-12},
		{"line-white", nil, 1e7, 0.00295455786, 5e-12},
		{"line-white", nil, 1e8, 0.00214707789, 5e-12},
		{"line-white", nil, 1e9, 0.00163048776, 5e-12},
	})
}

// TestSchoenherrSolves: the implicit equation holds, and C falls with Re.
func TestSchoenherrSolves(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		re := math.Pow(10, rapid.Float64Range(0.01, 30).Draw(t, "log10 Re"))
		c := schoenherr(re)
		if left, right := 0.242/math.Sqrt(c), math.Log10(re*c); math.Abs(left-right) > 1e-12*(1+math.Abs(left)) {
			t.Fatalf("Re %v: %v and %v", re, left, right)
		}
		if schoenherr(1.1*re) >= c {
			t.Fatalf("C does not fall at %v", re)
		}
	})
}
