package tablefile

import (
	"os"
	"path/filepath"
	"slices"
	"testing"
)

func TestStatement(t *testing.T) {
	for _, c := range []struct{ line, key, value string }{
		{"Re: 36000", "Re", "36000"},
		{"U_ref = 12.5 m/s", "U_ref", "12.5 m/s"},
		{"free stream velocity = 10 m/s", "free stream velocity", "10 m/s"},
		{"alpha=4.2", "alpha", "4.2"},
		{"x/c = 0.3", "x/c", "0.3"},
		{"date of test: 2 March 2024", "date of test", "2 March 2024"},
		{"h=sqrt(1/N)", "", ""},
		{"x u=U/Uref v", "", ""},
		{"http://example.invalid/a", "", ""},
		{"time:12", "", ""},
		{"12:30 start", "", ""},
		{"a: b: c", "", ""},
		{"x = 1, y = 2", "", ""},
		{"x, y: z", "", ""},
		{"key:", "", ""},
		{": value", "", ""},
		{"3 = 4", "", ""},
		{"x y cp", "", ""},
		{"", "", ""},
	} {
		key, value, ok := statement([]byte(c.line))
		if !ok {
			key, value = "", ""
		}
		if key != c.key || value != c.value {
			t.Errorf("%q: %q, %q, want %q, %q", c.line, key, value, c.key, c.value)
		}
	}
}

// TestMeta checks what files state beside their tables.
func TestMeta(t *testing.T) {
	corpus, books := filepath.Join("testdata", "corpus"), filepath.Join("testdata", "workbook")
	for _, c := range []struct {
		folder, file string
		want         []Meta
	}{
		{corpus, "meta-lines.csv", []Meta{{"Re", "36000", 2, ""}, {"U_ref", "12.5 m/s", 3, ""}, {"alpha", "4.2", 4, ""}, {"rig", "channel 2", 5, ""}, {"p_ref", "101325 Pa", 6, ""}}},
		{corpus, "meta-cells.csv", []Meta{{"Density", "1.204 kg/m3", 1, ""}, {"Run", "17", 2, ""}}},
		{corpus, "meta-zone.dat", []Meta{{"solver", "own", 1, ""}, {"Re", "5e6", 2, ""}, {"title", "wall line", 3, ""}}},
		{corpus, "meta-none.txt", nil},
		{corpus, "profile.json", []Meta{{"Re", "36000", 7, ""}, {"rig", "channel 2", 7, ""}}},
		{books, "metadata.xlsx", []Meta{{"Rig", "channel 2", 1, "run"}, {"Re", "36000", 2, "run"}, {"U_ref", "12.5 m/s", 3, "run"}}},
		{books, "metadata-run.csv", []Meta{{"Rig", "channel 2", 1, ""}, {"Re", "36000", 2, ""}, {"U_ref", "12.5 m/s", 3, ""}}},
	} {
		data, err := os.ReadFile(filepath.Join(c.folder, c.file))
		if err != nil {
			t.Fatal(err)
		}
		if got := Read(c.file, data, Options{}).Meta; !slices.Equal(got, c.want) {
			t.Errorf("%s: %+v, want %+v", c.file, got, c.want)
		}
	}
}
