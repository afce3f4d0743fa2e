package tablefile

import (
	"os"
	"path/filepath"
	"slices"
	"testing"
)

// corpusLeast guards the corpus against vanishing.
const corpusLeast = 107

// corpus says for each file of testdata/corpus what must be read, in the form
// of render, and which findings must be given. The files are of our own making
// and named after what they test; the expectations were checked against the
// files by eye.
var corpus = []struct {
	file    string
	tables  string
	notices string
}{
	{"archive-no-workbook.xlsx", ``, "workbook-damaged:0"},
	{"blank-blocks.dat", `"" 2: x; y | 1 2 | 3 4 | 1 5 | 3 6`, "delimiter-guessed:0 header-guessed:1 blank-lines:6"},
	{"bom-utf8.csv", `"" 2: x; y | 1 2`, "delimiter-guessed:0 encoding-bom:1 header-guessed:1"},
	{"column-count.csv", `"" 2: x; y | 1 2 | 7 8`, "delimiter-guessed:0 header-guessed:1 column-count:3"},
	{"comma-ambiguous.csv", `"" 1: c1; c2 | 0 125 | 0 250`, "delimiter-guessed:0 header-none:0 comma-ambiguous:1"},
	{"comma-header.csv", `"" 2: x; y | 1 2.5 | 3 4.5`, "delimiter-guessed:0 header-guessed:1"},
	{"comment-behind-row.csv", `"" 2: x; y | 1 2 | 3 4`, "delimiter-guessed:0 header-guessed:1"},
	{"comment-behind-row.dat", `"" 2: x; y | 1 2 | 3 4`, "delimiter-guessed:0 header-guessed:1"},
	{"comment-names-commas.dat", `"" 2: x; y; cp | 0 1 2 | 3 4 5`, "delimiter-guessed:0 header-comment:1"},
	{"comment-names.dat", `"" 3: x [mm]; U [m/s] | 0 1.5 | 1 2.5`, "delimiter-guessed:0 header-comment:2"},
	{"comment-switched-off-row.csv", `"" 2: x; y | 1 2 | 5 6`, "delimiter-guessed:0 header-guessed:1 comment-row:3"},
	{"comments-all-marks.dat", `"" 6: c1; c2 | 1 2 | 3 4`, "delimiter-guessed:0 header-none:0 blank-lines:9"},
	{"comma-stray-blanks.csv", `"" 2: x; Cp; mark | 0.125 0 0 | 0.25 1 0 | 1 NaN 0`, "delimiter-guessed:0 header-guessed:1 column-constant:2 value-missing:4"},
	{"constant-zero.csv", `"" 2: x; z; cp | 1 0 0.5 | 2 0 0.25 | 3 0 0.75`, "delimiter-guessed:0 header-guessed:1 column-constant:2"},
	{"date-column.csv", `"" 2: day; cp | NaN"2-Mar" 0.5 | NaN"3-Mar" 0.25`, "delimiter-guessed:0 header-guessed:1 value-missing:2"},
	{"date-month.csv", ``, "delimiter-guessed:0 header-guessed:1 value-missing:3 value-date:3"},
	{"date-points.csv", ``, "delimiter-guessed:0 header-guessed:1 decimal-comma:2 value-missing:3 value-date:3"},
	{"date-stroke.csv", ``, "delimiter-guessed:0 header-guessed:1 value-missing:3 value-date:3"},
	{"decimal-comma-quoted.csv", `"" 2: x; y | 0.5 1 | 0.75 2`, "delimiter-guessed:0 header-guessed:1 decimal-comma:2"},
	{"decimal-comma-spaces.dat", `"" 1: c1; c2 | 0.125 1.5 | 0.25 2.5`, "delimiter-guessed:0 header-none:0 decimal-comma:1"},
	{"decimal-mixed.csv", ``, "delimiter-guessed:0 header-guessed:1 decimal-mixed:3 decimal-comma:3"},
	{"empty.csv", ``, "file-empty:0"},
	{"fixed-blank-cells.txt", `"" 2: station; U; k; Tu | 1 10.5 0.25 1.5 | 2 NaN 0.5 2.5 | 3 12.5 NaN 3.5 | 4 13.5 0.75 4.5`, "fixed-guessed:0 header-guessed:1 value-missing:3 value-missing:4"},
	{"fixed-joined.txt", `"" 1: c1; c2; c3 | -1.234 -105.678 3 | 2.5 10.25 -100.125 | 10 -1.5 0.25`, "fixed-guessed:0 header-none:0"},
	{"fortran-exponents.dat", `"" 1: c1; c2 | 0.001 250 | 3.14e-114 1500`, "delimiter-guessed:0 header-none:0 number-fortran:1"},
	{"header-blank.csv", `"" 2: x; c2; z | 1 2 3.5`, "delimiter-guessed:0 header-guessed:1 header-blank:1"},
	{"header-count.csv", `"" 2: c1; c2 | 1 2.5 | 3 4.5`, "delimiter-guessed:0 header-count:1"},
	{"header-duplicate.csv", `"" 2: x; cp; cp (2); cp (3) | 1 2 3 4`, "delimiter-guessed:0 header-guessed:1 header-duplicate:1"},
	{"header-none.csv", `"" 1: c1; c2 | 1.5 2 | 3 4`, "delimiter-guessed:0 header-none:0"},
	{"header-number-name.csv", `"" 2: x; 2.5; 5.0 | 1 2 3 | 4 5 6`, "delimiter-guessed:0 header-guessed:1"},
	{"header-only.csv", ``, "file-empty:0 text-line:1"},
	{"header-repeated.csv", `"" 2: x; y | 1 2 | 3 4`, "delimiter-guessed:0 header-guessed:1 text-line:3"},
	{"header-stroke-unit.csv", `"" 2: x [mm]; y / H | 1 2.5 | 3 4.5`, "delimiter-guessed:0 header-guessed:1 unit-guessed:1"},
	{"header-units-brackets.csv", `"" 2: x [mm]; p [Pa]; u [m/s]; x/c | 1 2 3 4 | 5 6 7 8`, "delimiter-guessed:0 header-guessed:1"},
	{"header-units-kept.csv", `"" 2: C_f,x=0.97; h=sqrt(1/N); log(y+); alpha [deg] | 1 2 3 4.5`, "delimiter-guessed:0 header-guessed:1"},
	{"json-other.json", ``, "json-form:0"},
	{"latin1.csv", `"" 2: x; T [°C] | 1 20.5`, "encoding-latin:0 delimiter-guessed:0 header-guessed:1"},
	{"line-ends-cr.csv", `"" 2: x; y | 1 2 | 3 4`, "delimiter-guessed:0 header-guessed:1"},
	{"line-ends-crlf.csv", `"" 2: x; y | 1 2 | 3 4`, "delimiter-guessed:0 header-guessed:1 blank-lines:4"},
	{"line-ends-mixed.csv", `"" 2: x; y | 1 2 | 3 4 | 5 6`, "delimiter-guessed:0 header-guessed:1"},
	{"meta-cells.csv", `"" 5: x [mm]; y; u; v | 1 2 3 4 | 5 6 7 8`, "delimiter-guessed:0 statement-line:1 text-line:3 header-guessed:4"},
	{"meta-lines.csv", `"" 8: x; u | 1 2 | 3 4`, "delimiter-guessed:0 text-line:1 statement-line:2 header-guessed:7"},
	{"meta-none.txt", `"" 1: c1; c2 | NaN"P1:" 0.5 | NaN"P2:" 0.75 | NaN"P3:" 0.25`, "delimiter-guessed:0 header-none:0 value-missing:1"},
	{"meta-zone.dat", `"a" 6: x; cf | 1 2`, ""},
	{"missing-first-cell.csv", `"" 2: x; a | 1 2 | NaN 4`, "delimiter-guessed:0 header-guessed:1 value-missing:3"},
	{"missing-marks.csv", `"" 2: x; a; b | 1 NaN 2 | 2 NaN NaN | 3 NaN NaN | 4 5 NaN`, "delimiter-guessed:0 header-guessed:1 value-missing:2 value-missing:3"},
	{"no-break-groups.csv", `"" 2: x; y | 1 12345 | 2 7`, "delimiter-guessed:0 header-guessed:1 number-signs:2"},
	{"not-text.bin", ``, "file-not-text:0"},
	{"one-number.txt", `"" 1: c1 | 42.5`, "header-none:0"},
	{"overflow.csv", `"" 2: x; y | 1 NaN | 2 NaN | 3 4`, "delimiter-guessed:0 header-guessed:1 value-overflow:2 value-missing:2"},
	{"profile-comma.json", ``, "profile-damaged:2"},
	{"profile-ends.json", ``, "profile-damaged:1"},
	{"profile-lengths.json", ``, "profile-damaged:3"},
	{"profile-newer.json", ``, "profile-newer:0"},
	{"profile-same-names.json", ``, "profile-damaged:1"},
	{"profile-true.json", ``, "profile-damaged:1"},
	{"profile.json", `"x/H = 2" 3: y [mm]; U; mark | 0.5 1.25 NaN"a" | 1 NaN 2"2" | 2.5 -3 NaN"c"`, "value-missing:4 value-missing:6 profile-field:8"},
	{"prose.txt", ``, "file-empty:0 text-line:1"},
	{"quote-open.csv", ``, "quote-open:3"},
	{"quoted-newline.csv", `"" 2: x; note, long; y | 1 NaN"two\nlines" 3 | 4 NaN"a \"b\" c" 6`, "delimiter-guessed:0 header-guessed:1 value-missing:2"},
	{"semicolon-decimal-comma.csv", `"" 2: x; y | 0.125 1 | 0.25 2.5`, "delimiter-guessed:0 header-guessed:1 decimal-comma:2"},
	{"semicolon-text.csv", `"" 2: case; code; rig; y | NaN"A" NaN"B" NaN"C" 0.5 | NaN"A" NaN"B" NaN"D" 0.75`, "delimiter-guessed:0 header-guessed:1 value-missing:2 value-missing:2 value-missing:2 decimal-comma:2"},
	{"sentinel-999.csv", `"" 2: x; a; b | 1 999 999 | 2 5 998.5 | 3 999 1000`, "delimiter-guessed:0 header-guessed:1 value-sentinel:2"},
	{"sentinel-large.dat", `"" 2: x; y | 1 1e+30 | 2 9.9999e+37 | 3 4`, "delimiter-guessed:0 header-guessed:1 value-sentinel:2 value-sentinel:3"},
	{"sentinel-negative.csv", `"" 2: x; cp | 1 0.5 | 2 -999 | 3 0.25 | 4 -999`, "delimiter-guessed:0 header-guessed:1 value-sentinel:3"},
	{"sep-line.csv", `"" 3: x; y | 1 2`, "header-guessed:2"},
	{"spaces-ragged.dat", `"" 2: x; y | 1 2 | 10 20 | 100 200`, "delimiter-guessed:0 header-guessed:1"},
	{"spaces-short-rows.txt", `"" 2: x; y; z | 1 2 3 | 7 8 9 | 10 11 12`, "delimiter-guessed:0 header-guessed:1 column-count:3"},
	{"spreadsheet-first-blank.csv", `"" 2: c1; y | NaN 0.5 | 1 2 | 3 4`, "delimiter-guessed:0 header-guessed:1 header-blank:1 value-missing:2 decimal-comma:2"},
	{"stars.dat", `"" 2: x; y | 1 2.5 | 2 NaN`, "delimiter-guessed:0 header-guessed:1 value-missing:3"},
	{"tab-blank-cells.tsv", `"" 2: x; y; z | 1 NaN 3.5 | 4 5 6 | 7 8 9`, "delimiter-guessed:0 header-guessed:1 value-missing:2"},
	{"text-cell.csv", `"" 2: x; y | 1 2"2" | 3 NaN"about 4" | 5 6"6"`, "delimiter-guessed:0 header-guessed:1 value-missing:3"},
	{"text-column.csv", `"" 2: grid; x; y | NaN"fine" 1 2 | NaN"coarse" 3 4`, "delimiter-guessed:0 header-guessed:1 value-missing:2"},
	{"text-lines.dat", `"" 2: x; y | 1 2 | 3 4`, "delimiter-guessed:0 header-guessed:1 text-line:3"},
	{"text-padded.csv", `"" 2: x; y; remark | 1 2 NaN"" | 3 4 NaN"ok"`, "delimiter-guessed:0 header-guessed:1 value-missing:2 text-line:3"},
	{"thousands-decimal-comma.csv", `"" 2: x; y | 1 1234.5 | 2 0.5`, "delimiter-guessed:0 header-guessed:1 decimal-comma:2 number-thousands:2"},
	{"thousands.csv", `"" 2: x; y | 1 1234.5 | 2 999.5`, "delimiter-guessed:0 header-guessed:1 number-thousands:2"},
	{"title-above-header.csv", `"" 4: x; y | 1 2 | 3 4`, "delimiter-guessed:0 text-line:1 header-guessed:3"},
	{"trailing-separator.csv", `"" 2: x; y | 1 2 | 3 4`, "delimiter-guessed:0 delimiter-trailing:0 header-guessed:1"},
	{"typographic-minus.csv", `"" 2: x; y | -1.5 2 | 3 -4`, "delimiter-guessed:0 header-guessed:1 number-signs:2"},
	{"unit-row-brackets.dat", `"" 3: x [mm]; y [-] | 1 2 | 3 4`, "delimiter-guessed:0 header-guessed:1 unit-row:2"},
	{"unit-row.csv", `"" 3: x [m]; u [m/s]; cp [-] | 0.5 1 2 | 1.5 3 4`, "delimiter-guessed:0 header-guessed:1 unit-row:2"},
	{"utf16-high-first.csv", `"" 2: x; y | 1 2.5`, "encoding-utf16:0 delimiter-guessed:0 header-guessed:1"},
	{"utf16-low-first.csv", `"" 2: x; ° | 1 2`, "encoding-utf16:0 delimiter-guessed:0 header-guessed:1"},
	{"zone-after-rows.dat", `"" 1: c1; c2 | 1 2 | 3 4
"late" 4: c1; c2 | 5 6`, "zone-no-variables:0"},
	{"zone-block-cell-centred.dat", ``, "zone-layout:2"},
	{"zone-block-missing.dat", `"b" 3: x; y | 1 4 | 2 NaN | 3 6`, "value-missing:4"},
	{"zone-block-repeat-spans.dat", `"b" 3: x; y; z | 0 2 7 | 0 2 7 | 0 -0.1 7 | 1.5 -0.1 7`, "column-constant:3 number-fortran:4"},
	{"zone-block-repeat.dat", `"b" 3: x; y | 1 0 | 2 0 | 3 0 | 4 1.5`, "number-fortran:4"},
	{"zone-block-short.dat", `"c" 5: x; y | 1 2`, "zone-layout:2"},
	{"zone-block-two-directions.dat", `"grid" 3: x; y | 1 5 | 2 6 | 3 7 | 4 8`, ""},
	{"zone-block.dat", `"b" 3: x; y | 1 10 | 2 20 | 3 30`, ""},
	{"zone-cell-centred.dat", `"ok" 5: x; y | 1 2`, "zone-layout:2"},
	{"zone-commas.dat", `"a" 3: x; y | 1.5 2 | 3 4.5`, "delimiter-guessed:0"},
	{"zone-count.dat", `"short" 3: x; y | 1 2 | 3 4
"full" 6: x; y | 5 6`, "zone-count:2"},
	{"zone-data-before.dat", `"" 2: x; y | 1 2
"later" 4: x; y | 3 4`, ""},
	{"zone-elements.dat", `"line" 8: x; y | 1 2`, "zone-layout:2"},
	{"zone-empty.dat", `"b" 4: x; y | 3 4`, "zone-empty:2"},
	{"zone-heading-lines.dat", `"a" 8: x; y | 1 2 | 3 4`, ""},
	{"zone-no-variables.dat", `"g" 2: c1; c2; c3 | 1 2 3 | 4 5 6`, "zone-no-variables:1"},
	{"zone-none.dat", `"" 2: x; y | 1 2 | 3 4`, ""},
	{"zone-quoted.dat", `"line a, left" 4: x [mm]; u/Uref; C_f,x=0.97 | 1 2 3 | 4 5 6
"b" 7: x [mm]; u/Uref; C_f,x=0.97 | 7 8 9`, ""},
	{"zone-records.dat", `"a" 4: x; y | 1 2
"b" 11: x; y | 3 4`, "record-skipped:2 record-skipped:5 record-skipped:6"},
	{"zone-repeat.dat", `"" 3: x; y; z | 1 0.5 0.5 | 7 7 7`, ""},
	{"zone-same-names.dat", `"a" 3: x; y | 1 2
"a" 5: x; y | 3 4`, ""},
	{"zone-variables-bare.dat", `"" 4: x; y; cp; z [mm] | 1 2 3 4`, ""},
	{"zone-variables-lines.dat", `"one" 7: x [m]; y; two words | 1 2 3`, ""},
	{"zone-wrapped.dat", `"w" 3: a; b; c; d | 1 2 3 4 | 5 6 7 8`, "zone-wrapped:2"},
}

func TestCorpus(t *testing.T) {
	if len(corpus) < corpusLeast {
		t.Fatalf("%d files in the corpus, at least %d expected", len(corpus), corpusLeast)
	}
	var listed []string
	for _, c := range corpus {
		listed = append(listed, c.file)
		t.Run(c.file, func(t *testing.T) {
			data, err := os.ReadFile(filepath.Join("testdata", "corpus", c.file))
			if err != nil {
				t.Fatal(err)
			}
			f := Read(c.file, data, Options{})
			tables, notices := render(f)
			if tables != c.tables {
				t.Errorf("tables\n%s\nwant\n%s", tables, c.tables)
			}
			if notices != c.notices {
				t.Errorf("notices\n%s\nwant\n%s", notices, c.notices)
			}
			checkFile(t, f, data)
		})
	}
	entries, err := os.ReadDir(filepath.Join("testdata", "corpus"))
	if err != nil {
		t.Fatal(err)
	}
	for _, e := range entries {
		if !slices.Contains(listed, e.Name()) {
			t.Errorf("%s is in the folder but not in the table", e.Name())
		}
	}
}
