package uncertainty

import (
	"encoding/csv"
	"math"
	"os"
	"path/filepath"
	"strconv"
	"testing"

	"weirmark/core/internal/reference"
)

func TestCoverageFactor(t *testing.T) {
	for _, row := range []struct {
		text   string
		k      float64
		source string
	}{
		{"standard", 1, "name"},
		{" Standard uncertainty ", 1, "name"},
		{"1", 1, "written"},
		{"2", 2, "written"},
		{"k=2", 2, "written"},
		{"k = 2.0", 2, "written"},
		{"K = 3", 3, "written"},
		{"1.15", 1.15, "written"},
		{"k = 63.66", 63.66, "written: Student factor of one degree of freedom at 99 %"},
		{"k = 0.6745", 0.6745, "written: probable error"},
		{"k=2e0", 2, "written"},
		{"limits", math.Sqrt(3), "JCGM 100:2008 4.3.7 (clause from memory)"},
		{"rectangular", math.Sqrt(3), "JCGM 100:2008 4.3.7 (clause from memory)"},
		{"68.268949213708589717 %", 1, "normal: erf(1/sqrt 2), scipy"},
		{"90 %", 1.64485362695147, "scipy.stats.norm.ppf(0.95)"},
		{"95 %", 1.95996398454005, "scipy.stats.norm.ppf(0.975)"},
		{"95%", 1.95996398454005, "scipy.stats.norm.ppf(0.975)"},
		{"99 %", 2.57582930354890, "scipy.stats.norm.ppf(0.995)"},
		{"50 %", 0.674489750196082, "scipy.stats.norm.ppf(0.75)"},
	} {
		// The references carry 15 digits.
		if k, ok := CoverageFactor(row.text); !ok || math.Abs(k-row.k) > 1e-14*row.k {
			t.Errorf("%q: %v, %v, want %v (%s)", row.text, k, ok, row.k, row.source)
		}
	}
}

func TestCoverageFactorRefuses(t *testing.T) {
	for _, row := range []struct{ text, reason string }{
		{"", "blank is not known"},
		{"unknown", "stated as not known"},
		{"k", "no number"},
		{"k=", "no number"},
		{"%", "no number"},
		{"95", "a level without its sign"},
		{"0.95", "a level without its sign"},
		{"0.95 %", "a fraction with a percent sign"},
		{"100 %", "no normal distribution has it"},
		{"99.99999999999999999 %", "rounds to 100"},
		{"1e-300 %", "would divide by zero"},
		{"0", "would divide by zero"},
		{"k=0", "would divide by zero"},
		{"-2", "negative"},
		{"k=-2", "negative"},
		{"nan", "no number"},
		{"k=nan", "no number"},
		{"inf", "not finite"},
		{"k=inf", "not finite"},
		{"k=1e999", "not finite"},
		{"k=0x1p1", "not decimal"},
		{"k=1_0", "not decimal"},
		{"k=k=2", "twice"},
		{"2,0", "a decimal comma is asked about"},
		{"2 sigma", "not among the forms"},
	} {
		if k, ok := CoverageFactor(row.text); ok || k != 0 {
			t.Errorf("%q (%s): %v, %v", row.text, row.reason, k, ok)
		}
	}
}

// TestCoverageAgainstScipy: the level of every normal quantile of
// testdata/published/distributions.csv (scipy, versions in its head).
func TestCoverageAgainstScipy(t *testing.T) {
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
	for _, row := range rows {
		if row[0] != "normal-quantile" {
			continue
		}
		p, err1 := strconv.ParseFloat(row[1], 64)
		want, err2 := strconv.ParseFloat(row[3], 64)
		if err1 != nil || err2 != nil {
			t.Fatalf("%v: %v, %v", row, err1, err2)
		}
		level := strconv.FormatFloat(200*p-100, 'f', 6, 64) + " %"
		// 1e-11: the file has 12 digits.
		if k, ok := CoverageFactor(level); !ok || math.Abs(k-want) > 1e-11*want {
			t.Errorf("%s: %v, %v, want %v", level, k, ok, want)
		}
		checked++
	}
	if checked != 6 {
		t.Errorf("%d quantiles were checked, want 6", checked)
	}
}

// FuzzCoverageFactor: what is ok is a factor one can divide by, not too far
// from use; what is not ok is zero.
func FuzzCoverageFactor(f *testing.F) {
	for _, seed := range []string{"standard", "k = 2", "95 %", "limits", "1e-300 %", "k=1e308", "99.9999%", "k=1e-308", "+2", "k=.5"} {
		f.Add(seed)
	}
	f.Fuzz(func(t *testing.T, text string) {
		k, ok := CoverageFactor(text)
		if ok != (k > 0) || math.IsInf(k, 0) || math.IsNaN(k) {
			t.Errorf("%q: %v, %v", text, k, ok)
		}
	})
}
