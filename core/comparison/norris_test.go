package comparison

import (
	"math"
	"strconv"
	"strings"
	"testing"

	"weirmark/core/internal/reference"
)

// TestNorris: NIST StRD Norris (shared folder), a line through 36 points. With
// the certified residual deviation as independent uncertainty the fit is the
// certified one: B0 -0.262323073774029 (0.232818234301152), B1 1.00211681802045
// (0.429796848199937E-03), residual sum of squares 26.6173985294224.
func TestNorris(t *testing.T) {
	lines := strings.Split(string(reference.Shared(t, "references/nist/nist_Norris.dat")), "\n")
	var x, y []float64
	for _, line := range lines[60:96] {
		cells := strings.Fields(line)
		if len(cells) != 2 {
			t.Fatalf("line %q", line)
		}
		v, err1 := strconv.ParseFloat(cells[0], 64)
		w, err2 := strconv.ParseFloat(cells[1], 64)
		if err1 != nil || err2 != nil {
			t.Fatalf("line %q: %v, %v", line, err1, err2)
		}
		y, x = append(y, v), append(x, w)
	}
	const s = 0.884796396144373
	d, ok := Decompose(y, x, budget(len(y), []float64{s}, nil))
	// The certified values have 15 digits; B0 is a difference of numbers near 400,
	// which takes three of a double's.
	for _, row := range []struct {
		name                 string
		got, want, tolerance float64
	}{
		{"B0", d.Offset, -0.262323073774029, 1e-11},
		{"s(B0)", d.UOffset, 0.232818234301152, 1e-13},
		{"B1", d.Scale, 1.00211681802045, 1e-13},
		{"s(B1)", d.UScale, 0.429796848199937e-3, 1e-13},
		{"residual sum of squares", d.ShapePart * s * s, 26.6173985294224, 1e-11},
	} {
		if !ok || math.Abs(row.got-row.want) > row.tolerance*math.Abs(row.want) {
			t.Errorf("%s: %v, want %v", row.name, row.got, row.want)
		}
	}
}
