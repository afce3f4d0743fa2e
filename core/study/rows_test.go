package study_test

import (
	"strconv"
	"strings"
	"testing"

	"weirmark/core/notice"
	"weirmark/core/study"
	"weirmark/core/tablefile"
)

// TestRowsOfASurface compares one line out of an exported surface: only its
// rows are used and none is a gap, and what cannot select is refused.
func TestRowsOfASurface(t *testing.T) {
	var surface strings.Builder
	surface.WriteString("x [m],z [m],Cp\n")
	for i := range 11 {
		for k := range 5 {
			surface.WriteString(strconv.Itoa(i) + ",0." + strconv.Itoa(k) + "," + strconv.Itoa(i+10*k) + "\n")
		}
	}
	build := func(from, to string) *study.Study {
		s := study.New()
		for _, f := range []struct{ name, text string }{{"C1-A-G1.csv", surface.String()}, {"C1-test.csv", "x [m],Cp,u\n0.5,20.4,0.1\n4.5,24.6,0.1\n8.5,28.5,0.1\n"}} {
			s.Add(f.name, []byte(f.text), tablefile.Read(f.name, []byte(f.text), tablefile.Options{}), "")
		}
		for field, value := range map[string]string{"y.column": "Cp", "y.unit": "1", "quantity": "Cp", "rows.column": "z", "rows.from": from, "rows.to": to} {
			if err := s.Set(study.Target{Kind: "slip", ID: "s1", Field: field}, value, "", ""); err != nil {
				t.Fatal(err)
			}
		}
		return s
	}
	c := study.Evaluate(build("0.15", "0.25"), study.Options{}).Cells[0]
	if len(c.Stations) != 3 || !notice.Has(c.Notices, "rows-selected") {
		t.Fatalf("%d stations, %v", len(c.Stations), c.Notices)
	}
	for i, want := range []float64{20.5, 24.5, 28.5} {
		if got := float64(c.Stations[i].S); got != want {
			t.Errorf("S at station %d is %g, want %g", i+1, got, want)
		}
	}
	for _, row := range []struct{ from, to, code string }{{"5", "6", "rows-none"}, {"0.3", "0.1", "rows-bounds"}, {"", "1", "rows-bounds"}} {
		c := study.Evaluate(build(row.from, row.to), study.Options{}).Cells[0]
		if !notice.Has(c.Notices, row.code) || !c.Withheld || len(c.Stations) != 0 {
			t.Errorf("from %q to %q: withheld %v, %v", row.from, row.to, c.Withheld, c.Notices)
		}
	}
}
