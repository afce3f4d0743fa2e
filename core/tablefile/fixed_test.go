package tablefile

import (
	"slices"
	"strings"
	"testing"

	"weirmark/core/notice"
)

// TestFindGuides holds what shows positions and what does not.
func TestFindGuides(t *testing.T) {
	for _, c := range []struct {
		name, text string
		want       []int
	}{
		{"a blank cell between others", "a   b   c\n1   2   3\n4       6\n7   8   9\n", []int{1, 5}},
		{"blank cells in every row, names above", " aa  bb  cc\n  1       3\n      5   6\n  7   8\n", []int{3, 7}},
		{"joined numbers aligned to the right", " 1.0-2.0\n-3.0 4.0\n 5.0-6.0\n", []int{4}},
		{"short last cells only", "1 2 3\n4 5\n6 7 8\n", nil},
		{"two rows only", "1   2   3\n4       6\n", nil},
		{"ragged blanks", "1 2 3\n10  20 30\n   5  6\n100 200 300\n", nil},
		{"joined numbers not aligned", "1.0-2.0\n-13.0 4.0\n5.0-6.0\n", nil},
		{"missing exponent letters", "1.0-100 2.0\n3.0-101 4.0\n5.0-102 6.0\n", nil},
		{"tabs", "1   2   3\n4\t6\n7   8   9\n", nil},
		{"equal counts", "1 2\n3 4\n5 6\n", nil},
	} {
		r := &reader{data: []byte(c.text)}
		if got := r.findGuides(0, len(c.text)); !slices.Equal(got, c.want) {
			t.Errorf("%s: %v, want %v", c.name, got, c.want)
		}
	}
}

// TestLateCrossing holds back a row, far behind the sample, that crosses the
// guides found there.
func TestLateCrossing(t *testing.T) {
	text := strings.Repeat("   1    2    3\n   4         6\n", 500) + "   7 12345678 9\n   7    8    9\n"
	f := readText(text)
	if len(f.Tables) != 1 || f.Tables[0].Rows() != 1001 || !notice.Has(f.Notices, "fixed-guessed") || !notice.Has(f.Notices, "column-count") {
		t.Errorf("%d tables, notices %v", len(f.Tables), f.Notices)
	}
	checkFile(t, f, []byte(text))
}
