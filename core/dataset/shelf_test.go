package dataset

import (
	"fmt"
	"io/fs"
	"math"
	"os"
	"path/filepath"
	"strconv"
	"strings"
	"testing"

	"weirmark/core/flow"
	"weirmark/core/internal/reference"
	"weirmark/core/tablefile"
	"weirmark/datasets/shelf"
)

// shelved opens every entry of the shelf.
func shelved(t *testing.T) []Entry {
	t.Helper()
	names, err := Names(shelf.Files)
	if err != nil {
		t.Fatal(err)
	}
	if len(names) < 20 {
		t.Fatalf("only %d entries", len(names))
	}
	entries := make([]Entry, len(names))
	for i, name := range names {
		if entries[i], err = Open(shelf.Files, name); err != nil {
			t.Fatal(err)
		}
	}
	return entries
}

// TestShelf: every entry has a complete manifest and the recorded hash, every
// file belongs to an entry, and the README has the row of each.
func TestShelf(t *testing.T) {
	readme, err := os.ReadFile(filepath.Join(reference.Root(t), "datasets", "shelf", "README.md"))
	if err != nil {
		t.Fatal(err)
	}
	owned := map[string]bool{}
	for _, e := range shelved(t) {
		owned[e.Name+".json"], owned[e.Table] = true, true
		row := fmt.Sprintf("\n| %s | %s | %s | %s | %d |\n", e.Name, e.Title, e.Kind, e.Reach, len(e.Rows))
		if !strings.Contains(string(readme), row) {
			t.Errorf("the README has no row %q", row)
		}
		for _, c := range e.Curves {
			if e.Reach == Seen && c.Origin == nil {
				t.Errorf("%s, %s: seen, and its file is not named", e.Name, c.Name)
			}
		}
		if e.Kind != Test && e.Coverage != "not stated" {
			t.Errorf("%s: coverage %q", e.Name, e.Coverage)
		}
	}
	if rows := strings.Count(string(readme), "\n| ") - 1; rows != len(owned)/2 {
		t.Errorf("the README lists %d entries, the shelf has %d", rows, len(owned)/2)
	}
	err = fs.WalkDir(shelf.Files, ".", func(name string, entry fs.DirEntry, err error) error {
		if err == nil && !entry.IsDir() && !owned[name] {
			t.Errorf("%s belongs to no entry", name)
		}
		return err
	})
	if err != nil {
		t.Fatal(err)
	}
}

// TestShelfAgainstItsFiles: every curve with an origin holds the rows of that
// file (NASA Turbulence Modeling Resource, public copy), no more and no fewer,
// to the last bit.
func TestShelfAgainstItsFiles(t *testing.T) {
	curves := 0
	for _, e := range shelved(t) {
		for _, c := range e.Curves {
			if c.Origin == nil {
				continue
			}
			curves++
			compare(t, e, c)
		}
	}
	if curves < 59 {
		t.Errorf("only %d curves were compared", curves)
	}
}

func compare(t *testing.T, e Entry, c CurveOf) {
	o := *c.Origin
	table, err := tablefile.Read(o.File, reference.Shared(t, o.File), tablefile.Options{}).Table(strconv.Itoa(o.Table))
	if err != nil {
		t.Errorf("%s, %s: %v", e.Name, c.Name, err)
		return
	}
	rows := e.Curve(c.Name)
	n := 0
	for i, x := range table.Columns[o.Station-1].Values {
		if o.From < o.To && (x < o.From || x > o.To) {
			continue
		}
		if n == len(rows) {
			t.Errorf("%s, %s: the file has more than %d rows", e.Name, c.Name, n)
			return
		}
		u := math.NaN()
		if o.U > 0 {
			u = table.Columns[o.U-1].Values[i]
		}
		if r := rows[n]; r.X.Value != x || r.Value.Value != table.Columns[o.Value-1].Values[i] || math.Float64bits(r.U.Value) != math.Float64bits(u) && !(math.IsNaN(u) && r.U.Text == "") {
			t.Errorf("%s, %s, row %d: %+v, the file has x %v", e.Name, c.Name, n, r, x)
		}
		n++
	}
	if n != len(rows) {
		t.Errorf("%s, %s: %d rows, the file has %d", e.Name, c.Name, len(rows), n)
	}
}

// TestCavitiesAgainstTheList: the figures of both cavities, digit for digit, as
// the collection of published examples prints them ("printed / converged").
func TestCavitiesAgainstTheList(t *testing.T) {
	list := string(reference.Shared(t, "references/published-examples.md"))
	list = strings.ReplaceAll(list, "**", "")
	checked := 0
	for _, row := range []struct{ printed, converged string }{
		{"cavity-u-ghia", "cavity-u-converged"}, {"cavity-v-ghia", "cavity-v-converged"},
		{"buoyant-cavity-de-vahl-davis", "buoyant-cavity-converged"},
	} {
		first, err := Open(shelf.Files, row.printed)
		if err != nil {
			t.Fatal(err)
		}
		second, err := Open(shelf.Files, row.converged)
		if err != nil {
			t.Fatal(err)
		}
		for _, c := range first.Curves {
			printed, converged := first.Curve(c.Name), second.Curve(c.Name)
			for i, r := range printed {
				line := lineOf(list, "| "+r.X.Text+" |", r.Value.Text+" / "+converged[i].Value.Text)
				if line == "" || converged[i].X.Text != r.X.Text {
					t.Errorf("%s, %s at %s: %s / %s is not in the list", row.printed, c.Name, r.X.Text, r.Value.Text, converged[i].Value.Text)
				}
				checked++
			}
		}
	}
	if checked != 2*45+20 {
		t.Errorf("%d figures were compared", checked)
	}
}

// lineOf returns the line of text that begins with start and holds part.
func lineOf(text, start, part string) string {
	for line := range strings.Lines(text) {
		if strings.HasPrefix(line, start) && strings.Contains(line, part) {
			return line
		}
	}
	return ""
}

// TestFlaggedFigures: what the collection of published examples (6.4, 6.5)
// calls a misprint or wrong is flagged, and nothing else of the printed tables.
func TestFlaggedFigures(t *testing.T) {
	want := map[string]Flag{
		"cavity-u-ghia, Re = 100, 0.0703":           Doubtful,
		"cavity-v-ghia, Re = 400, 0.9063":           Misprint,
		"buoyant-cavity-de-vahl-davis, max u, 1e5":  Misprint,
		"buoyant-cavity-de-vahl-davis, max v, 1e5":  Misprint,
		"buoyant-cavity-de-vahl-davis, Nu max, 1e6": Doubtful,
	}
	found := 0
	for _, e := range shelved(t) {
		if e.Reach == Computed {
			continue
		}
		for _, r := range e.Rows {
			flag := want[e.Name+", "+r.Curve+", "+r.X.Text]
			if r.Flag != flag {
				t.Errorf("%s, %s at %s: flag %q, want %q", e.Name, r.Curve, r.X.Text, r.Flag, flag)
			}
			if flag != Good {
				found++
			}
		}
	}
	if found != len(want) {
		t.Errorf("%d flagged figures, want %d", found, len(want))
	}
}

// TestUnflaggedCavity: rows that are not flagged lie within what the manifest
// says of the table: 0.009 (Re 100) and 0.018 of the converged solution.
func TestUnflaggedCavity(t *testing.T) {
	for _, q := range []string{"u", "v"} {
		printed, err := Open(shelf.Files, "cavity-"+q+"-ghia")
		if err != nil {
			t.Fatal(err)
		}
		converged, err := Open(shelf.Files, "cavity-"+q+"-converged")
		if err != nil {
			t.Fatal(err)
		}
		for i, r := range printed.Rows {
			d := math.Abs(r.Value.Value - converged.Rows[i].Value.Value)
			limit := 0.0185 // 0.018 as rounded
			if r.Curve == "Re = 100" {
				limit = 0.0095
			}
			if r.Flag != Misprint && d > limit || r.Flag == Misprint && d < 0.1 {
				t.Errorf("%s, %s at %s: differs by %v, flag %q", printed.Name, r.Curve, r.X.Text, d, r.Flag)
			}
		}
	}
}

// TestLawsAgainstTheShelf: two tables and the laws they are said to follow.
func TestLawsAgainstTheShelf(t *testing.T) {
	for _, row := range []struct {
		entry, curve, law string
		parameters        map[string]float64
		toStation         func(x float64) float64
		within            float64 // of the value: the digits of the table
	}{
		{"flatplate-karman-schoenherr", "Karman-Schoenherr", "plate-karman-schoenherr", nil, func(x float64) float64 { return x }, 5e-9},
		// log10 y+ has six digits after the point; u+ changes by up to ln(10) u+ of it.
		{"flatplate-spalding", "Spalding", "wall-spalding", map[string]float64{"kappa": 0.40, "B": 5.5}, func(x float64) float64 { return math.Pow(10, x) }, 5e-5},
	} {
		e, err := Open(shelf.Files, row.entry)
		if err != nil {
			t.Fatal(err)
		}
		law, err := flow.Find(row.law)
		if err != nil {
			t.Fatal(err)
		}
		x, want, _ := e.Usable(row.curve)
		if len(x) < 40 {
			t.Fatalf("%s has %d rows", row.entry, len(x))
		}
		for i := range x {
			x[i] = row.toStation(x[i])
		}
		got, err := law.Evaluate(row.parameters, x)
		if err != nil {
			t.Fatal(err)
		}
		for i := range x {
			if !(math.Abs(got.Values[i]-want[i]) <= row.within) {
				t.Errorf("%s at %v: %v, the table has %v", row.law, x[i], got.Values[i], want[i])
			}
		}
	}
}
