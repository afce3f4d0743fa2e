package profile

import (
	"errors"
	"math"
	"slices"
	"testing"

	"weirmark/core/internal/reference"
	"weirmark/core/tablefile"
)

// section is a closed contour from the trailing edge over the upper side and
// back, n rows a side.
func section(n int) (x, y []float64) {
	for i := range 2*n - 1 {
		t := float64(i) / float64(n-1)
		at := math.Abs(1 - t)
		h := .1 * math.Sqrt(at) * (1 - at)
		if t > 1 {
			h = -h
		}
		x, y = append(x, at), append(y, h)
	}
	return x, y
}

// places returns the coordinates of a branch, which must not depend on how
// the contour was written.
func places(x []float64, b Branch) []float64 {
	out := []float64{}
	for _, r := range b.Rows {
		out = append(out, x[r])
	}
	return out
}

func TestAnyWayRound(t *testing.T) {
	x, y := section(25)
	want, err := Branches(x, y)
	if err != nil {
		t.Fatal(err)
	}
	if want[0].Name != Upper || want[1].Name != Lower || len(want[0].Rows) < 24 || len(want[1].Rows) < 24 {
		t.Fatalf("branches %+v", want)
	}
	turn := func(v []float64, k int) []float64 { // a closed contour without its repeated end
		v = v[:len(v)-1]
		return append(slices.Clone(v[k:]), v[:k]...)
	}
	reverse := func(v []float64) []float64 { w := slices.Clone(v); slices.Reverse(w); return w }
	for name, c := range map[string][2][]float64{
		"reversed":            {reverse(x), reverse(y)},
		"starting at 13":      {turn(x, 13), turn(y, 13)},
		"starting at 24":      {turn(x, 24), turn(y, 24)}, // the leading edge
		"reversed, at 30":     {reverse(turn(x, 30)), reverse(turn(y, 30))},
		"trailing edge once":  {x[:len(x)-1], y[:len(y)-1]},
		"trailing edge twice": {append(slices.Clone(x), x[0]), append(slices.Clone(y), y[0])},
		"blunt trailing edge": {append([]float64{1}, x...), append([]float64{-.002}, y...)},
	} {
		got, err := Branches(c[0], c[1])
		if err != nil {
			t.Errorf("%s: %v", name, err)
			continue
		}
		for i := range got {
			a, b := places(c[0], got[i]), places(x, want[i])
			// The end rows may fall to either branch.
			a, b = inner(a), inner(b)
			if got[i].Name != want[i].Name || !slices.Equal(a, b) {
				t.Errorf("%s: %s has %v, want %v", name, got[i].Name, a, b)
			}
			for k := 1; k < len(got[i].Rows); k++ {
				if c[0][got[i].Rows[k]] <= c[0][got[i].Rows[k-1]] {
					t.Errorf("%s: %s does not rise", name, got[i].Name)
				}
			}
		}
	}
}

// inner leaves out the leading and the trailing edge.
func inner(x []float64) []float64 {
	return slices.DeleteFunc(slices.Clone(x), func(v float64) bool { return v == 0 || v == 1 })
}

func TestWithoutHeight(t *testing.T) {
	x, _ := section(10)
	b, err := Branches(x, nil)
	if err != nil || b[0].Name != First || b[1].Name != Second || firstRow(b[0].Rows) != 0 {
		t.Errorf("%+v, %v", b, err)
	}
}

func TestNoLoop(t *testing.T) {
	for name, x := range map[string][]float64{
		"straight": {0, 1, 2, 3}, "falling": {3, 2, 1}, "short way back": {0, 1, 2, 3, 4, 5, 4.5}, "zigzag": {0, 3, 1, 4, 0, 3, 1, 4}, "nothing": {}, "no number": {math.NaN(), math.NaN()},
	} {
		if Loop(x) {
			t.Errorf("%s is taken as a loop", name)
		}
		if _, err := Branches(x, nil); !errors.Is(err, ErrNoLoop) {
			t.Errorf("%s: %v", name, err)
		}
	}
}

// The airfoil loops of the NASA Turbulence Modeling Resource (CFL3D, NACA
// 0012): every zone splits into two branches that hold all its rows but the
// shared ends.
func TestAirfoilLoops(t *testing.T) {
	f := tablefile.Read("n0012cp_cfl3d_sa.dat", reference.Shared(t, "nasa-tmr/naca0012/n0012cp_cfl3d_sa.dat"), tablefile.Options{})
	if len(f.Tables) < 2 {
		t.Fatalf("%d tables", len(f.Tables))
	}
	for _, table := range f.Tables {
		x := table.Columns[0].Values
		b, err := Branches(x, nil)
		if err != nil {
			t.Errorf("%s: %v", table.Name, err)
			continue
		}
		if n := len(b[0].Rows) + len(b[1].Rows); n < len(x)-2 || n > len(x)+1 {
			t.Errorf("%s: %d of %d rows in branches", table.Name, n, len(x))
		}
	}
}

// TestEnds takes the first and last known values in the order of the rows.
func TestEnds(t *testing.T) {
	nan := math.NaN()
	for _, row := range []struct {
		x           []float64
		first, last float64
	}{{[]float64{nan, 3, 1, nan, 2, nan}, 3, 2}, {[]float64{5}, 5, 5}, {[]float64{nan}, nan, nan}, {nil, nan, nan}} {
		first, last := Ends(row.x)
		if first != row.first && !(math.IsNaN(first) && math.IsNaN(row.first)) || last != row.last && !(math.IsNaN(last) && math.IsNaN(row.last)) {
			t.Errorf("%v: %g and %g, want %g and %g", row.x, first, last, row.first, row.last)
		}
	}
}
