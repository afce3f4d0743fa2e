package tablefile

import (
	"errors"
	"testing"

	"weirmark/core/notice"
)

func readText(text string) File { return Read("text", []byte(text), Options{}) }

// codeOf returns the code of an error, "" for none.
func codeOf(t *testing.T, err error) string {
	t.Helper()
	if err == nil {
		return ""
	}
	var n notice.Notice
	if !errors.As(err, &n) {
		t.Fatalf("error of type %T: %v", err, err)
	}
	return n.Code
}

func TestFileTable(t *testing.T) {
	several := readText("VARIABLES = x\nZONE T=\"a\"\n1\nZONE T=\"2\"\n2\nZONE\n3\nZONE T=\"a\"\n4\nZONE T=\"out\" I=9 F=BLOCK\n5\n")
	for _, c := range []struct {
		ref   string
		first float64
		code  string
	}{
		{"2", 2, ""}, {"3", 3, ""}, {"1", 1, ""}, {"4", 4, ""},
		{"", 0, "table-needed"}, {"a", 0, "table-ambiguous"}, {"b", 0, "table-unknown"},
		{"A", 0, "table-unknown"}, {"0", 0, "table-unknown"}, {"5", 0, "table-unknown"}, {"out", 0, "zone-layout"},
	} {
		table, err := several.Table(c.ref)
		if code := codeOf(t, err); code != c.code {
			t.Errorf("%q: %q, want %q", c.ref, code, c.code)
		}
		if err == nil && table.Columns[0].Values[0] != c.first {
			t.Errorf("%q: first value %v, want %v", c.ref, table.Columns[0].Values[0], c.first)
		}
	}
	one := readText("x,y\n1,2\n")
	if table, err := one.Table(""); err != nil || table.Rows() != 1 {
		t.Errorf("the only table: %v", err)
	}
	refused := readText("x,y\n1,\"2\n")
	if _, err := refused.Table(""); codeOf(t, err) != "quote-open" || !refused.Refused() {
		t.Errorf("refused file: %v", err)
	}
	if _, err := (File{}).Table("x"); codeOf(t, err) != "table-unknown" {
		t.Errorf("file of nothing: %v", err)
	}
}

func TestTableColumn(t *testing.T) {
	table, err := readText("x,X,C_f,\"alpha, deg\",cp wall,Cp_Wall,#2\n1,2,3,4.5,5,6,7\n").Table("")
	if err != nil {
		t.Fatal(err)
	}
	for _, c := range []struct {
		ref   string
		value float64
		code  string
	}{
		{"x", 1, ""}, {"X", 2, ""}, {"C_f", 3, ""}, {"c_F", 3, ""}, {"cf", 3, ""}, {"C f", 3, ""},
		{"alpha", 4.5, ""}, {"alpha, deg", 4.5, ""}, {"ALPHA, DEG", 4.5, ""}, {"CP WALL", 5, ""},
		{"cpwall", 0, "column-ambiguous"}, {"#2", 7, ""}, {"#1", 1, ""}, {"#3", 3, ""},
		{"#0", 0, "column-unknown"}, {"#8", 0, "column-unknown"}, {"3", 0, "column-unknown"}, {"", 0, "column-unknown"}, {"beta", 0, "column-unknown"},
	} {
		column, err := table.Column(c.ref)
		if code := codeOf(t, err); code != c.code {
			t.Errorf("%q: %q, want %q", c.ref, code, c.code)
		}
		if err == nil && column.Values[0] != c.value {
			t.Errorf("%q: %v, want %v", c.ref, column.Values[0], c.value)
		}
	}
}

func TestRowLine(t *testing.T) {
	table, err := readText("x,y\n1,2\n\n# remark\n3,4\n5,6\n\"7\",8\n9,10\n").Table("")
	if err != nil {
		t.Fatal(err)
	}
	for row, want := range []int{2, 5, 6, 7, 8} {
		if got := table.RowLine(row); got != want {
			t.Errorf("row %d on line %d, want %d", row, got, want)
		}
	}
	if len(table.runs) != 2 {
		t.Errorf("%d runs of lines, want 2", len(table.runs))
	}
	bare := Table{Line: 4}
	if bare.RowLine(2) != 6 || bare.Rows() != 0 {
		t.Errorf("table made by hand: row 2 on line %d", bare.RowLine(2))
	}
}
