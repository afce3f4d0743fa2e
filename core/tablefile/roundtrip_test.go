package tablefile

import (
	"encoding/json"
	"fmt"
	"math"
	"strconv"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"weirmark/core/notice"
)

// writers write a table, columns of equal lengths, in each form that is read.
// Missing values are written as the form asks.
var writers = []struct {
	name  string
	write func(columns [][]float64) []byte
	opt   Options
}{
	{"commas", func(c [][]float64) []byte { return lines(c, ",", "", plain) }, Options{}},
	{"tabs", func(c [][]float64) []byte { return lines(c, "\t", "nan", plain) }, Options{}},
	{"semicolons and decimal commas", func(c [][]float64) []byte {
		return lines(c, ";", "-", func(v float64) string { return strings.Replace(plain(v), ".", ",", 1) })
	}, Options{Decimal: "comma"}},
	{"blanks", func(c [][]float64) []byte { return lines(c, "  ", "nan", plain) }, Options{}},
	{"fixed", func(c [][]float64) []byte {
		return lines(c, "", "", func(v float64) string { return fmt.Sprintf("%24s", plain(v)) })
	}, Options{Guides: []int{24, 48}}},
	{"point order", func(c [][]float64) []byte {
		text := string(lines(c, " ", "nan", plain))
		return []byte("VARIABLES = a b c\nZONE T=\"z\"\n" + text[strings.IndexByte(text, '\n')+1:])
	}, Options{}},
	{"block order", func(c [][]float64) []byte {
		text := fmt.Sprintf("VARIABLES = a b c\nZONE T=\"z\" I=%d F=BLOCK\n", len(c[0]))
		for _, column := range c {
			for _, v := range column {
				text += strconv.FormatFloat(v, 'g', -1, 64) + "\n" // NaN for a missing value
			}
		}
		return []byte(text)
	}, Options{}},
	{"profile", func(c [][]float64) []byte {
		var text strings.Builder
		text.WriteString(`{"format": "weirmark profile", "version": 1, "columns": [`)
		for i, column := range c {
			values := make([]any, len(column))
			for k, v := range column {
				if !math.IsNaN(v) {
					values[k] = v
				}
			}
			list, _ := json.Marshal(values)
			fmt.Fprintf(&text, `%s{"name": %q, "values": %s}`, strings.Repeat(", ", min(i, 1)), "abc"[i:i+1], list)
		}
		return []byte(text.String() + "]}")
	}, Options{}},
	{"workbook", func(c [][]float64) []byte {
		rows := []string{`<c t="str"><v>a</v></c><c t="str"><v>b</v></c><c t="str"><v>c</v></c>`}
		for i := range c[0] {
			row := ""
			for _, column := range c {
				row += "<c><v>" + plain(column[i]) + "</v></c>"
			}
			rows = append(rows, row)
		}
		return makeBook(rowsXML(rows...))
	}, Options{}},
}

func plain(v float64) string {
	if math.IsNaN(v) {
		return ""
	}
	return strconv.FormatFloat(v, 'g', -1, 64)
}

// lines writes names and rows with a separator and a mark for missing values.
func lines(columns [][]float64, separator, missing string, number func(float64) string) []byte {
	var text strings.Builder
	cell := func(i int, s string) {
		if i > 0 {
			text.WriteString(separator)
		}
		text.WriteString(s)
	}
	width := len(number(1))
	for i, name := range []string{"a", "b", "c"} {
		if width == 24 {
			name = fmt.Sprintf("%24s", name)
		}
		cell(i, name)
	}
	for row := range columns[0] {
		text.WriteByte('\n')
		for i, column := range columns {
			if math.IsNaN(column[row]) && width != 24 {
				cell(i, missing)
			} else {
				cell(i, number(column[row]))
			}
		}
	}
	text.WriteByte('\n')
	return []byte(text.String())
}

// TestWriteThenRead writes tables of any numbers in every form and reads the
// same bits back.
func TestWriteThenRead(t *testing.T) {
	value := rapid.OneOf(rapid.Float64(), rapid.Map(rapid.IntRange(-20, 20), func(i int) float64 { return float64(i) / 8 }), rapid.Just(math.NaN()))
	for _, w := range writers {
		t.Run(w.name, func(t *testing.T) {
			rapid.Check(t, func(t *rapid.T) {
				rows := rapid.IntRange(1, 12).Draw(t, "rows")
				columns := make([][]float64, 3)
				for c := range columns {
					columns[c] = rapid.SliceOfN(value, rows, rows).Draw(t, "column")
				}
				for i := range columns[0] { // a row of nothing is no row
					if math.IsNaN(columns[0][i]) && (math.IsNaN(columns[1][i]) || math.IsNaN(columns[2][i])) || i == 0 && math.IsNaN(columns[0][i]) {
						columns[0][i] = float64(i)
					}
				}
				for c := range columns { // the first row shows which columns hold numbers
					if math.IsNaN(columns[c][0]) {
						columns[c][0] = 0.5
					}
				}
				data := w.write(columns)
				f := Read(w.name, data, w.opt)
				table, err := f.Table("")
				if err != nil || len(table.Columns) != 3 || notice.Any(f.Notices, notice.Stop) {
					t.Fatalf("%v, %d columns, %v of\n%s", err, len(table.Columns), f.Notices, data)
				}
				for c := range columns {
					if !sameBits(table.Columns[c].Values, columns[c]) || table.Columns[c].Name != "abc"[c:c+1] {
						t.Fatalf("column %q: %v, want %v of\n%s", table.Columns[c].Name, table.Columns[c].Values, columns[c], data)
					}
				}
			})
		})
	}
}

func sameBits(a, b []float64) bool {
	if len(a) != len(b) {
		return false
	}
	for i := range a {
		if math.Float64bits(a[i]) != math.Float64bits(b[i]) && !(math.IsNaN(a[i]) && math.IsNaN(b[i])) {
			return false
		}
	}
	return true
}
