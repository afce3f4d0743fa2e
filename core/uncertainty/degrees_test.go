package uncertainty

import (
	"encoding/csv"
	"errors"
	"math"
	"os"
	"path/filepath"
	"strconv"
	"testing"

	"weirmark/core/internal/reference"
)

var inf = math.Inf(1)

func TestEffectiveDegrees(t *testing.T) {
	for _, row := range []struct {
		name      string
		terms     []Term
		want      float64
		tolerance float64
		source    string
	}{
		{"two terms", []Term{{U: 0.57, Degrees: 9}, {U: 0.25, Degrees: inf}}, 12.7956490, 1e-8, "published-examples 3.4: 12.8 printed (quoted), 12.7956490 recomputed"},
		{"d of the end gauge, rounded u", []Term{{U: 5.8, Degrees: 24}, {U: 3.9, Degrees: 5}, {U: 6.7, Degrees: 8}}, 25.447251, 1e-7,
			"JCGM 100 H.1, published-examples 3.1: 25.6 printed, with u rounded to 9.7; 25.447251 recomputed unrounded"},
		{"end gauge, printed terms", []Term{{U: 25, Degrees: 18}, {U: 9.7, Degrees: 25.6}, {U: 2.9, Degrees: 50}, {U: 16.6, Degrees: 2}}, 16.7645, 1e-5,
			"JCGM 100 H.1 with its own rounded terms; its 16.7 comes from unrounded ones (TestEndGauge). The 17.47 of published-examples divides 32^4, a rounded sum"},
		{"one term keeps its degrees", []Term{{U: 3, Degrees: 7}}, 7, 1e-14, "n - 1 of one mean"},
		{"equal terms add their degrees", []Term{{U: 2, Degrees: 5}, {U: 2, Degrees: 5}}, 10, 1e-14, "exact"},
		{"all known", []Term{{U: 2, Degrees: inf}}, inf, 0, "nothing is estimated"},
		{"nothing uncertain", []Term{{U: 0, Degrees: 3}}, inf, 0, "nothing is estimated"},
		{"correlated and all known", []Term{{U: 2, Degrees: inf, Correlated: true}, {U: 2, Degrees: inf, Correlated: true}}, inf, 0, "nothing is estimated"},
		{"tiny and huge units", []Term{{U: 0.57e-200, Degrees: 9}, {U: 0.25e-200, Degrees: inf}}, 12.7956490, 1e-8, "a unit changes nothing"},
	} {
		got, err := EffectiveDegrees(row.terms)
		if err != nil || !same([]float64{got}, []float64{row.want}, row.tolerance) && got != row.want {
			t.Errorf("%s: %v, %v, want %v (%s)", row.name, got, err, row.want, row.source)
		}
	}
}

func TestEffectiveDegreesRefuses(t *testing.T) {
	for _, row := range []struct {
		name  string
		terms []Term
		want  error
	}{
		{"correlated", []Term{{U: 1, Degrees: 4, Correlated: true}, {U: 1, Degrees: inf, Correlated: true}}, ErrCorrelated},
		{"no degrees", []Term{{U: 1}}, ErrDegrees},
		{"negative degrees", []Term{{U: 1, Degrees: -1}}, ErrDegrees},
		{"negative uncertainty", []Term{{U: -1, Degrees: 1}}, ErrDegrees},
		{"unknown uncertainty", []Term{{U: nan, Degrees: 1}}, ErrDegrees},
		{"unknown degrees", []Term{{U: 1, Degrees: nan}}, ErrDegrees},
		{"infinite uncertainty", []Term{{U: inf, Degrees: 1}}, ErrDegrees},
	} {
		if got, err := EffectiveDegrees(row.terms); !errors.Is(err, row.want) || !math.IsNaN(got) {
			t.Errorf("%s: %v, %v", row.name, got, err)
		}
	}
}

// TestStudentFactorPrinted: JCGM 100 table G.2, values from memory
// (published-examples 3.4), to their printed digits. The last column of that
// table is three sigma exactly (99.73002 %), as 235.80 at one degree shows.
func TestStudentFactorPrinted(t *testing.T) {
	sigma := func(k float64) float64 { return math.Erf(k / math.Sqrt2) }
	levels := []float64{sigma(1), 0.90, 0.95, sigma(2), 0.99, sigma(3)}
	for _, row := range []struct {
		nu      float64
		printed []string
	}{
		{1, []string{"1.84", "6.31", "12.71", "13.97", "63.66", "235.80"}},
		{2, []string{"1.32", "2.92", "4.30", "4.53", "9.92", "19.21"}},
		{3, []string{"1.20", "2.35", "3.18", "3.31", "5.84", "9.22"}},
		{5, []string{"1.11", "2.02", "2.57", "2.65", "4.03", "5.51"}},
		{10, []string{"1.05", "1.81", "2.23", "2.28", "3.17", "3.96"}},
		{16, []string{"1.03", "1.75", "2.12", "2.17", "2.92", "3.54"}},
		{20, []string{"1.03", "1.72", "2.09", "2.13", "2.85", "3.42"}},
		{50, []string{"1.01", "1.68", "2.01", "2.05", "2.68", "3.16"}},
		{100, []string{"1.005", "1.660", "1.984", "2.025", "2.626", "3.077"}},
		{inf, []string{"1.000", "1.645", "1.960", "2.000", "2.576", "3.000"}},
	} {
		for i, printed := range row.printed {
			k, ok := StudentFactor(levels[i], row.nu)
			decimals := 2
			if len(printed) == 5 && printed[1] == '.' {
				decimals = 3
			}
			if !ok || strconv.FormatFloat(k, 'f', decimals, 64) != printed {
				t.Errorf("nu %v at %v: %v, printed %s", row.nu, levels[i], k, printed)
			}
		}
	}
}

// TestStudentFactorAgainstScipy: every factor of distributions.csv, and far out.
func TestStudentFactorAgainstScipy(t *testing.T) {
	file, err := os.Open(filepath.Join(reference.Root(t), "testdata", "published", "distributions.csv"))
	if err != nil {
		t.Fatal(err)
	}
	defer file.Close()
	reader := csv.NewReader(file)
	reader.Comment = '#'
	rows, err := reader.ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	checked := 0
	check := func(level, nu, want, tolerance float64) {
		if k, ok := StudentFactor(level, nu); !ok || math.Abs(k-want) > tolerance*want {
			t.Errorf("nu %v at %v: %v, %v, want %v", nu, level, k, ok, want)
		}
		checked++
	}
	for _, row := range rows {
		if row[0] != "student-factor" {
			continue
		}
		var v [3]float64
		for i := range v {
			if v[i], err = strconv.ParseFloat(row[1+i], 64); err != nil {
				t.Fatal(err)
			}
		}
		// The incomplete beta function of gonum has an error of up to 2e-9 here.
		check(v[0], v[1], v[2], 5e-9)
	}
	// scipy 1.10.1, stats.t.ppf(0.975, nu).
	check(0.95, 1.5, 6.016663107990447, 5e-9)
	check(0.95, 1e3, 1.9623390808264074, 5e-9)
	check(0.95, 1e5, 1.9599877075346093, 5e-9)
	check(0.95, 1e7, 1.959964221767205, 5e-9)
	if checked != 70 {
		t.Errorf("%d factors were checked, want 70", checked)
	}
}

func TestStudentFactorRefuses(t *testing.T) {
	for _, row := range [][2]float64{{0.95, 0}, {0.95, -1}, {0.95, nan}, {0, 5}, {1, 5}, {nan, 5}, {95, 5}} {
		if k, ok := StudentFactor(row[0], row[1]); ok || !math.IsNaN(k) {
			t.Errorf("%v: %v", row, k)
		}
	}
}
