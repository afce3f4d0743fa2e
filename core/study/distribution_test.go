package study_test

import (
	"math"
	"testing"

	"weirmark/core/study"
)

// Runs that are the data moved by one shift lie that far from them in area, at
// each of two stations; runs about the data without a shift of the mean do not
// lie at zero: of -1, 0, 1 against 0 the area is 2/3.
func TestAreaBetweenDistributions(t *testing.T) {
	for _, row := range []struct {
		runs        string
		area, shift float64
	}{
		{"x,y,b,c\n0,.3,.3,.3\n1,.3,.3,.3\n", .3, .3},
		{"x,y,b,c\n0,-1,0,1\n1,1,-1,0\n", 2. / 3, 0},
		{"x,y,b\n0,.2,.4\n1,-.2,-.4\n", .3, 0},
	} {
		p := pair("x,y\n0,.1\n1,.2\n", "x,y\n0,0\n1,0\n", "m", "m")
		attach(p, "members", study.Members, row.runs, nil)
		l := only(t, p).Distributions
		if l == nil {
			t.Fatalf("%q: no line", row.runs)
		}
		if math.Abs(float64(l.Area)-row.area) > 1e-12 || math.Abs(float64(l.Shift)-row.shift) > 1e-12 || l.Readings != 1 || l.Runs < 2 {
			t.Errorf("%q: %+v, want area %v, shift %v", row.runs, *l, row.area, row.shift)
		}
	}
	if l := only(t, pair("x,y\n0,.1\n1,.2\n", "x,y\n0,0\n1,0\n", "m", "m")).Distributions; l != nil {
		t.Errorf("one value on either side is a distribution: %+v", *l)
	}
}
