package tablefile

import (
	"bytes"
	"fmt"
	"math"
	"strconv"
	"testing"
)

// millionRows returns about 39 MB: a line of names and 1,000,000 rows of three
// numbers of at most 12 digits.
func millionRows(separator byte) []byte {
	const rows = 1_000_000
	data := make([]byte, 0, 42*rows)
	data = append(data, "x [m]"...)
	data = append(data, separator)
	data = append(data, "y"...)
	data = append(data, separator)
	data = append(data, "cp\n"...)
	for i := range rows {
		x := float64(i) / rows
		data = strconv.AppendFloat(data, x, 'f', 9, 64)
		data = append(data, separator)
		data = strconv.AppendFloat(data, math.Sqrt(x)*0.1, 'f', 10, 64)
		data = append(data, separator)
		data = strconv.AppendFloat(data, 1-4*x, 'e', 6, 64)
		data = append(data, '\n')
	}
	return data
}

func benchmarkRead(b *testing.B, data []byte, rows int) {
	b.SetBytes(int64(len(data)))
	b.ReportAllocs()
	for b.Loop() {
		f := Read("million.csv", data, Options{})
		if len(f.Tables) != 1 || f.Tables[0].Rows() != rows {
			b.Fatalf("%d tables, notices %v", len(f.Tables), f.Notices)
		}
	}
}

func BenchmarkRead1M(b *testing.B) { benchmarkRead(b, millionRows(','), 1_000_000) }

func BenchmarkRead1MSpaces(b *testing.B) { benchmarkRead(b, millionRows(' '), 1_000_000) }

func BenchmarkRead1MZone(b *testing.B) {
	data := millionRows(' ')
	head := []byte("VARIABLES = x y cp\nZONE T=\"a\"\n")
	benchmarkRead(b, append(head, data[bytes.IndexByte(data, '\n')+1:]...), 1_000_000)
}

// BenchmarkReadWorkbook reads a sheet of 100,000 rows of three numbers.
func BenchmarkReadWorkbook(b *testing.B) {
	rows := []string{`<c t="str"><v>x</v></c><c t="str"><v>y</v></c><c t="str"><v>cp</v></c>`}
	for i := range 100_000 {
		x := float64(i) / 1e5
		row := ""
		for c, v := range []float64{x, math.Sqrt(x), 1 - 4*x} {
			row += fmt.Sprintf(`<c r="%s"><v>%v</v></c>`, cellReference(i+2, c+1), v)
		}
		rows = append(rows, row)
	}
	benchmarkRead(b, makeBook(rowsXML(rows...)), 100_000)
}
