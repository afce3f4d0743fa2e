package tablefile

import (
	"math"
	"strconv"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"weirmark/core/notice"
)

// written draws a number of up to six digits as a person writes it, with a
// point.
func written(t *rapid.T) string {
	places := rapid.IntRange(0, 4).Draw(t, "places")
	return strconv.FormatFloat(float64(rapid.IntRange(-99999, 99999).Draw(t, "digits"))/math.Pow10(places), 'f', places, 64)
}

// statedAs names the separators that are read only where they are stated.
var statedAs = map[string]string{"|": "stroke"}

// drawCells draws a table of names a, b, c with numbers written with a point,
// the first of which has decimals.
func drawCells(t *rapid.T) [][]string {
	cells := [][]string{}
	for range rapid.IntRange(2, 9).Draw(t, "rows") {
		cells = append(cells, []string{written(t), written(t), written(t)})
	}
	cells[0][0] = "0.125"
	return cells
}

func join(cells [][]string, separator string) string {
	text := strings.Join([]string{"a", "b", "c"}, separator) + "\n"
	for _, row := range cells {
		text += strings.Join(row, separator) + "\n"
	}
	return text
}

// TestDecimalCommaIsNoFactor writes tables with the decimal comma and with the
// point, stated and not stated: the same numbers are read, never a multiple,
// and what was not stated is asked about.
func TestDecimalCommaIsNoFactor(t *testing.T) {
	for _, separator := range []string{";", "\t", "  ", "|"} {
		rapid.Check(t, func(t *rapid.T) {
			cells := drawCells(t)
			point := join(cells, separator)
			comma := strings.ReplaceAll(point, ".", ",")
			want, err := Read("point", []byte(point), Options{Delimiter: statedAs[separator]}).Table("")
			if err != nil {
				t.Fatal(err)
			}
			for _, stated := range []string{"", "comma"} {
				f := Read("comma", []byte(comma), Options{Decimal: stated, Delimiter: statedAs[separator]})
				got, err := f.Table("")
				if err != nil || got.Rows() != len(cells) || !notice.Has(f.Notices, map[string]string{"": "decimal-comma", "comma": "decimal-stated"}[stated]) {
					t.Fatalf("%v, %d rows, %v of\n%s", err, got.Rows(), f.Notices, comma)
				}
				for c := range want.Columns {
					if !sameBits(got.Columns[c].Values, want.Columns[c].Values) {
						t.Fatalf("stated %q: %v, with points %v of\n%s", stated, got.Columns[c].Values, want.Columns[c].Values, comma)
					}
				}
			}
		})
	}
}

// TestBlankIsNoZero empties cells of random tables, or puts a usual mark of a
// missing value there: nothing is read of them, and how many is told.
func TestBlankIsNoZero(t *testing.T) {
	for _, separator := range []string{",", ";", "\t", "|"} {
		rapid.Check(t, func(t *rapid.T) {
			cells := drawCells(t)
			marks := []string{"", "  ", "-", "nan", "n.a.", "N/A"}
			blank := map[[2]int]bool{}
			for i := 1; i < len(cells); i++ { // the first row shows which columns hold numbers
				for c := 1; c < 3; c++ {
					if rapid.Bool().Draw(t, "blank") {
						cells[i][c], blank[[2]int{i, c}] = rapid.SampledFrom(marks).Draw(t, "mark"), true
					}
				}
			}
			text := join(cells, separator)
			f := Read("blank", []byte(text), Options{Delimiter: statedAs[separator]})
			table, err := f.Table("")
			if err != nil || table.Rows() != len(cells) {
				t.Fatalf("%v, %d rows, %v of\n%s", err, table.Rows(), f.Notices, text)
			}
			for c, column := range table.Columns {
				for i, v := range column.Values {
					want, err := strconv.ParseFloat(cells[i][c], 64)
					if missing := blank[[2]int{i, c}]; missing != math.IsNaN(v) || !missing && (err != nil || v != want) {
						t.Fatalf("row %d of %s is %v, written %q in\n%s", i, column.Name, v, cells[i][c], text)
					}
				}
			}
			if told := notice.Has(f.Notices, "value-missing"); told != (len(blank) > 0) {
				t.Fatalf("%d blanks, told %v: %v", len(blank), told, f.Notices)
			}
		})
	}
}

// TestNoRowVanishes puts rows of other lengths, text, comments and blank lines
// among the rows of random tables: rows read and rows held back are all rows
// written, in their order and at their lines, and whatever else is passed over
// is told.
func TestNoRowVanishes(t *testing.T) {
	for _, separator := range []string{",", ";", "\t", "|"} {
		rapid.Check(t, func(t *rapid.T) {
			text, line := strings.Join([]string{"a", "b", "c"}, separator)+"\n", 2
			var lines []int // of whole rows
			var held, prose int
			add := func(s string) {
				text += s + "\n"
				line++
			}
			whole := func() {
				lines = append(lines, line)
				add(strings.Join([]string{strconv.Itoa(line), "0.5", written(t)}, separator))
			}
			whole()
			whole()
			for range rapid.IntRange(1, 12).Draw(t, "lines") {
				switch rapid.IntRange(0, 5).Draw(t, "kind") {
				case 0:
					held++
					add(strings.Join([]string{"1", "2"}, separator))
				case 1:
					held++
					add(strings.Join([]string{"1", "2", "3", "4"}, separator))
				case 2:
					prose++
					add("a remark without a mark")
				case 3:
					add("# a comment")
				case 4:
					add("")
				}
				whole() // whole rows are the most, else others would set the columns
				whole()
			}
			f := Read("rows", []byte(text), Options{Delimiter: statedAs[separator]})
			table, err := f.Table("")
			if err != nil || table.Rows() != len(lines) || f.tally.held != held || f.tally.text != prose {
				t.Fatalf("%v: %d rows and %d held back and %d of text, written %d and %d and %d:\n%s", err, table.Rows(), f.tally.held, f.tally.text, len(lines), held, prose, text)
			}
			for i, at := range lines {
				if table.RowLine(i) != at || table.Columns[0].Values[i] != float64(at) {
					t.Fatalf("row %d is %v on line %d, written on %d:\n%s", i, table.Columns[0].Values[i], table.RowLine(i), at, text)
				}
			}
			if notice.Has(f.Notices, "column-count") != (held > 0) || notice.Has(f.Notices, "text-line") != (prose > 0) {
				t.Fatalf("%d held back, %d of text: %v", held, prose, f.Notices)
			}
		})
	}
}
