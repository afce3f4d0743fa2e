package tablefile

import (
	"crypto/sha256"
	"encoding/hex"
	"fmt"
	"math"
	"slices"
	"strings"
	"testing"

	"weirmark/core/notice"
)

func TestReadRefusesLargeFiles(t *testing.T) {
	f := Read("big", []byte("x\n1\n"), Options{MaxBytes: 3})
	if _, notices := render(f); notices != "file-too-large:0" || !f.Refused() {
		t.Errorf("notices %s", notices)
	}
	if f = Read("fits", []byte("x\n1\n"), Options{MaxBytes: 4}); f.Refused() {
		t.Errorf("notices %v", f.Notices)
	}
}

func TestReadHash(t *testing.T) {
	data := []byte("\xef\xbb\xbfx\n1\n")
	sum := sha256.Sum256(data)
	if f := Read("a", data, Options{}); f.SHA256 != hex.EncodeToString(sum[:]) || f.Size != len(data) {
		t.Errorf("hash %s, size %d", f.SHA256, f.Size)
	}
}

// TestLateIrregularities puts each irregularity far behind the sample that the
// layout is judged by.
func TestLateIrregularities(t *testing.T) {
	const before = 3000
	for _, c := range []struct{ line, code string }{
		{"1,2,3", "column-count"},
		{"1,\"2\n", "quote-open"},
		{"1,nan", "value-missing"},
		{"1,word", "value-missing"},
		{"a remark without marks", "text-line"},
		{"1,2.0D3", "number-fortran"},
		{"1,\u22122", "number-signs"},
		{"1,\"0,5\"", "decimal-mixed"},
		{"1,1e999", "value-overflow"},
		{"1,-999", "value-sentinel"},
		{"#1,2", "comment-row"},
		{"", "blank-lines"},
	} {
		var text strings.Builder
		text.WriteString("x,y\n")
		for i := range before {
			fmt.Fprintf(&text, "%d,%d.5\n", i, i)
		}
		text.WriteString(c.line + "\n1,2\n")
		f := readText(text.String())
		if !notice.Has(f.Notices, c.code) {
			t.Errorf("%q: no %s in %v", c.line, c.code, f.Notices)
		}
		for _, n := range f.Notices {
			if n.Code == c.code && (n.Line < before+2 || n.Line > before+3) && c.code != "quote-open" {
				t.Errorf("%q: %s at line %d", c.line, c.code, n.Line)
			}
		}
	}
}

// TestLateZone meets a zone behind the sample of a file that began as a
// delimited table: it is read anew as zones.
func TestLateZone(t *testing.T) {
	text := strings.Repeat("1 2.5\n", 5000) + "ZONE T=\"late\"\n3 4\n"
	f := readText(text)
	if len(f.Tables) != 2 || f.Tables[0].Rows() != 5000 || f.Tables[1].Name != "late" {
		tables, _ := render(f)
		t.Errorf("%d tables: %.200s", len(f.Tables), tables)
	}
	checkFile(t, f, []byte(text))
}

// TestPointAndBlock reads one table written in both orders.
func TestPointAndBlock(t *testing.T) {
	const n = 37
	point, block := "VARIABLES = x y\nZONE T=\"a\", I=37, F=POINT\n", "VARIABLES = x y\nZONE T=\"a\", I=37, F=BLOCK\n"
	var xs, ys []string
	for i := range n {
		x, y := fmt.Sprint(math.Sqrt(float64(i))), fmt.Sprint(math.Cbrt(float64(i))*1e-7)
		point += x + " " + y + "\n"
		xs, ys = append(xs, x), append(ys, y)
	}
	for line := range slices.Chunk(append(xs, ys...), 5) {
		block += strings.Join(line, " ") + "\n"
	}
	a, b := readText(point), readText(block)
	if len(a.Tables) != 1 || len(b.Tables) != 1 || len(a.Notices)+len(b.Notices) != 0 {
		t.Fatalf("notices %v %v", a.Notices, b.Notices)
	}
	for c := range 2 {
		if got, want := b.Tables[0].Columns[c].Values, a.Tables[0].Columns[c].Values; !slices.Equal(got, want) || len(want) != n {
			t.Errorf("column %d: %v, want %v", c, got, want)
		}
	}
	if line := b.Tables[0].RowLine(7); line != 4 {
		t.Errorf("row 7 of five values a line is on line %d, want 4", line)
	}
}

// TestColumnLimit refuses more columns than a table can have.
func TestColumnLimit(t *testing.T) {
	f := readText(strings.Repeat("1,", maxColumns+1) + "1\n")
	if !notice.Has(f.Notices, "columns-many") || !f.Refused() {
		t.Errorf("%d tables, notices %v", len(f.Tables), f.Notices)
	}
}

// TestRepeatLimit leaves out a zone whose repeat counts promise more values
// than its file can be meant to hold.
func TestRepeatLimit(t *testing.T) {
	f := readText("VARIABLES = x\nZONE T=\"a\" I=900000000 F=BLOCK\n900000000*0.0\n")
	if !notice.Has(f.Notices, "zone-layout") || len(f.Tables) != 0 {
		t.Errorf("%d tables, notices %v", len(f.Tables), f.Notices)
	}
}

// TestTextKeepsCells checks that a column with one word keeps every cell.
func TestTextKeepsCells(t *testing.T) {
	table, err := readText("x,note\n1,2.50\n\n2,\"a, \"\"b\"\"\"\n3,\n").Table("")
	if err != nil {
		t.Fatal(err)
	}
	if want := []string{"2.50", `a, "b"`, ""}; !slices.Equal(table.Columns[1].Text, want) {
		t.Errorf("%q, want %q", table.Columns[1].Text, want)
	}
	if table.Columns[0].Text != nil {
		t.Errorf("a column of numbers has text %q", table.Columns[0].Text)
	}
}
