package tablefile

import (
	"encoding/json"
	"math"
	"reflect"
	"strings"
	"testing"

	"weirmark/core/notice"
)

// TestAnswers reads files with answers to what the reader asks about them.
func TestAnswers(t *testing.T) {
	for _, c := range []struct {
		name, text string
		opt        Options
		tables     string
		notices    string
	}{
		{"comma stated", "x;y\n1;0,125\n2;1.234,5\n", Options{Decimal: "comma"},
			`"" 2: x; y | 1 0.125 | 2 1234.5`, "delimiter-guessed:0 header-guessed:1 decimal-stated:2 groups-stated:3"},
		{"comma stated, points group", "x;y\n1;1.234\n2;0,5\n", Options{Decimal: "comma"},
			`"" 2: x; y | 1 1234 | 2 0.5`, "delimiter-guessed:0 header-guessed:1 groups-stated:2 decimal-stated:3"},
		{"comma stated, a point that groups nothing", "x;y\n1;0.125\n2;0,5\n", Options{Decimal: "comma"},
			`"" 2: x; y | 1 NaN"0.125" | 2 0.5"0,5"`, "delimiter-guessed:0 header-guessed:1 value-missing:2 decimal-stated:3"},
		{"point stated", "x;y\n1;1,234\n2;5.5\n", Options{Decimal: "point"},
			`"" 2: x; y | 1 1234 | 2 5.5`, "delimiter-guessed:0 header-guessed:1 groups-stated:2"},
		{"point stated, a comma that groups nothing", "x;y\n1;0,125\n2;5.5\n", Options{Decimal: "point"},
			`"" 2: x; y | 1 NaN"0,125" | 2 5.5"5.5"`, "delimiter-guessed:0 header-guessed:1 value-missing:2"},
		{"both signs, point stated", "x;y\n1;0.5\n2;\"0,75\"\n", Options{Decimal: "point"},
			`"" 2: x; y | 1 0.5"0.5" | 2 NaN"0,75"`, "delimiter-guessed:0 header-guessed:1 value-missing:3"},
		{"delimiter stated", "0,125\n0,250\n", Options{Delimiter: "blanks"},
			`"" 1: c1 | 0.125 | 0.25`, "header-none:0 decimal-comma:1"},
		{"commas stated", "0,125\n0,250\n", Options{Delimiter: "comma"},
			`"" 1: c1; c2 | 0 125 | 0 250`, "header-none:0"},
		{"strokes stated", "x|y\n1|2\n", Options{Delimiter: "stroke"},
			`"" 2: x; y | 1 2`, "header-guessed:1"},
		{"marks stated", "x,y\n1,-999\n2,5\n3,n.m.\n", Options{Sentinels: []string{"-999", "n.m."}},
			`"" 2: x; y | 1 NaN | 2 5 | 3 NaN`, "delimiter-guessed:0 header-guessed:1 sentinel-stated:2 value-missing:4"},
		{"a date stated as missing", "x,y\n1,0.5\n2,3/2\n", Options{Sentinels: []string{"3/2"}},
			`"" 2: x; y | 1 0.5 | 2 NaN`, "delimiter-guessed:0 header-guessed:1 value-missing:3"},
		{"a mark stated as data", "x,y\n1,-999\n2,5\n", Options{Data: []string{"-999"}},
			`"" 2: x; y | 1 -999 | 2 5`, "delimiter-guessed:0 header-guessed:1"},
		{"guides stated", "x  y  note\n1  2.5\n12   3 a b\n", Options{Guides: []int{3, 6}},
			`"" 2: x; y; note | 1 2.5 NaN"" | 12 3 NaN"a b"`, "fixed-stated:0 header-guessed:1 value-missing:2"},
		{"guides between digits", "100200300\n110220330\n", Options{Guides: []int{3, 6}},
			`"" 1: c1; c2; c3 | 100 200 300 | 110 220 330`, "fixed-stated:0 header-none:0"},
		{"guides count characters", "°C p\n12 5\n13 6\n", Options{Guides: []int{2}},
			`"" 2: °C; p | 12 5 | 13 6`, "fixed-stated:0 header-guessed:1"},
		{"zones, mark stated", "VARIABLES = x y\nZONE T=\"a\" I=2 F=BLOCK\n1 -999\n3 4\n", Options{Sentinels: []string{"-999.0"}},
			`"a" 3: x; y | 1 3 | NaN 4`, "sentinel-stated:3"},
		{"uneven rows left out", "x,y\n1,2\n3\n4,5,6\n7,8\n", Options{Uneven: LeaveOutUneven},
			`"" 2: x; y | 1 2 | 7 8`, "delimiter-guessed:0 header-guessed:1 rows-left-out:3"},
		{"zone as found", "VARIABLES = x y\nZONE T=\"a\" I=3\n1 2\n3 4\n", Options{Zones: ZonesAsFound},
			`"a" 3: x; y | 1 2 | 3 4`, "zone-as-found:2"},
		{"unknown answer on uneven rows", "1\n", Options{Uneven: "fill"}, ``, "option-bad:0"},
		{"unknown answer on zones", "1\n", Options{Zones: "any"}, ``, "option-bad:0"},
		{"unknown decimal", "1\n", Options{Decimal: "dot"}, ``, "option-bad:0"},
		{"unknown delimiter", "1\n", Options{Delimiter: "x"}, ``, "option-bad:0"},
		{"unknown answer on hidden cells", "1\n", Options{Hidden: "yes"}, ``, "option-bad:0"},
		{"guides that do not rise", "1\n", Options{Guides: []int{3, 3}}, ``, "option-bad:0"},
		{"data that are no number", "1\n", Options{Data: []string{"a"}}, ``, "option-bad:0"},
	} {
		f := Read("text", []byte(c.text), c.opt)
		if tables, notices := render(f); tables != c.tables || notices != c.notices {
			t.Errorf("%s: tables\n%s\nwant\n%s\nnotices\n%s\nwant\n%s", c.name, tables, c.tables, notices, c.notices)
		}
		checkFile(t, f, []byte(c.text))
	}
}

// TestOptionsKeep checks that answers survive being kept as JSON.
func TestOptionsKeep(t *testing.T) {
	want := Options{MaxBytes: 7, Decimal: "comma", Delimiter: "tab", Sentinels: []string{"-999"}, Data: []string{"999"},
		Hidden: LeaveOutHidden, Uneven: LeaveOutUneven, Zones: ZonesAsFound, Guides: []int{8, 16}, Range: "a!B2:C9"}
	text, err := json.Marshal(want)
	if err != nil {
		t.Fatal(err)
	}
	var got Options
	if err := json.Unmarshal(text, &got); err != nil || !reflect.DeepEqual(got, want) {
		t.Errorf("%s came back as %+v: %v", text, got, err)
	}
	if text, err = json.Marshal(Options{Progress: func(int, int) bool { return true }}); err != nil || string(text) != "{}" {
		t.Errorf("no answers are %s, %v", text, err)
	}
}

// TestProgress reads a file of several megabytes, delimited and in zones, to
// its end and up to a moment in between.
func TestProgress(t *testing.T) {
	rows := strings.Repeat("0.125 2.5\n", 400_000)
	for name, text := range map[string]string{"delimited": rows, "zones": "VARIABLES = x y\nZONE T=\"a\"\n" + rows} {
		last, calls := 0, 0
		f := Read(name, []byte(text), Options{Progress: func(done, total int) bool {
			if done < last || done > total || total != len(text) {
				t.Errorf("%s: %d of %d after %d", name, done, total, last)
			}
			last = done
			calls++
			return true
		}})
		if calls < 3 || f.Refused() {
			t.Errorf("%s: %d calls, notices %v", name, calls, f.Notices)
		}
		f = Read(name, []byte(text), Options{Progress: func(done, total int) bool { return done < total/2 }})
		if !f.Refused() || !notice.Has(f.Notices, "read-ended") {
			t.Errorf("%s: notices %v", name, f.Notices)
		}
	}
	f := Read("book", readFixture(t, "sheets.xlsx"), Options{Progress: func(done, total int) bool { return done < 1 }})
	if !f.Refused() || !notice.Has(f.Notices, "read-ended") {
		t.Errorf("workbook: notices %v", f.Notices)
	}
}

// TestStatedDecimals holds the forms whose value hangs on a stated sign.
func TestStatedDecimals(t *testing.T) {
	nan := math.NaN()
	for _, c := range []struct {
		text               string
		open, point, comma float64
	}{
		{"1.5", 1.5, 1.5, nan},
		{"1,5", 1.5, nan, 1.5},
		{"1.234", 1.234, 1.234, 1234},
		{"1,234", 1.234, 1234, 1.234},
		{"0.125", 0.125, 0.125, nan},
		{"0,125", 0.125, nan, 0.125},
		{"0,125,000", nan, nan, nan},
		{"1.234,5", 1234.5, nan, 1234.5},
		{"1,234.5", 1234.5, 1234.5, nan},
		{"1.234.567", nan, nan, 1234567},
		{"1,234,567", 1234567, 1234567, nan},
		{"1,234.567", 1234.567, 1234.567, nan},
		{"1.234,567", 1234.567, nan, 1234.567},
		{"-12", -12, -12, -12},
		{"1,5D-3", 1.5e-3, nan, 1.5e-3},
	} {
		for i, want := range []float64{c.open, c.point, c.comma} {
			got, _, _ := cellReader{decimal: decimalSign(i)}.read([]byte(c.text))
			if got != want && !(math.IsNaN(got) && math.IsNaN(want)) {
				t.Errorf("%q with sign %d: %v, want %v", c.text, i, got, want)
			}
		}
	}
}
