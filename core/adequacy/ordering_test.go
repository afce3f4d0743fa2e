package adequacy

import (
	"math"
	"testing"
)

// All six orders of three numbers, each by hand, of either sign of E, and ties.
func TestSixOrderings(t *testing.T) {
	for _, row := range []struct {
		e, u, required float64
		want           string
	}{
		{1, 2, 3, "|E| ≤ U_V ≤ U_reqd"},
		{-1, 3, 2, "|E| ≤ U_reqd < U_V"},
		{2, 3, 1, "U_reqd < |E| ≤ U_V"},
		{-2, 1, 3, "U_V < |E| ≤ U_reqd"},
		{3, 1, 2, "U_V ≤ U_reqd < |E|"},
		{-3, 2, 1, "U_reqd < U_V < |E|"},
		{2, 2, 2, "|E| ≤ U_V ≤ U_reqd"},
		{2, 2, 1, "U_reqd < |E| ≤ U_V"},
		{2, 1, 2, "U_V < |E| ≤ U_reqd"},
		{2, 1, 1, "U_V ≤ U_reqd < |E|"},
	} {
		if got := Order(row.e, row.u, row.required); got < 0 || Orderings[got].Order != row.want {
			t.Errorf("E %v, U_V %v, U_reqd %v: place %d, want %s", row.e, row.u, row.required, got, row.want)
		}
	}
	for _, unknown := range [][3]float64{{math.NaN(), 1, 1}, {1, math.NaN(), 1}, {1, 1, math.NaN()}} {
		if got := Order(unknown[0], unknown[1], unknown[2]); got != -1 {
			t.Errorf("%v has the place %d", unknown, got)
		}
	}
}
