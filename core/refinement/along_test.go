package refinement

import (
	"fmt"
	"math"
	"slices"
	"testing"

	"weirmark/core/internal/reference"
	"weirmark/core/interpolate"
	"weirmark/core/notice"
	"weirmark/core/tablefile"
)

// family returns three grids of n points on [0, 1] with r = 2 in two
// dimensions and the values f(x) + e(x, h), h = 1, 2, 4.
func family(n int, f func(x float64) float64, e func(x, h float64) float64) []Grid {
	var grids []Grid
	for k, h := range []float64{1, 2, 4} {
		g := Grid{Name: fmt.Sprintf("G%d", 3-k), Count: 16 / (h * h)}
		for i := range n {
			x := float64(i) / float64(n-1)
			g.X, g.Y = append(g.X, x), append(g.Y, f(x)+e(x, h))
		}
		grids = append(grids, g)
	}
	return grids
}

func spread(n int) []float64 {
	at := make([]float64, n)
	for i := range at {
		at[i] = float64(i) / float64(n-1)
	}
	return at
}

func one(float64) float64 { return 1 }

// TestAlongExact: an error a(x) h^p with one sign gives back p everywhere and
// U = 1.25 a(x) wherever that is not below its neighbours.
func TestAlongExact(t *testing.T) {
	grids := family(41, one, func(x, h float64) float64 { return 0.01 * (1 + x) * math.Pow(h, 1.5) })
	at := spread(41)
	l := Along(grids, at, 2, Options{Formal: 2})
	if math.Abs(l.Common-1.5) > 1e-9 || math.Abs(l.Low-1.5) > 1e-9 || math.Abs(l.High-1.5) > 1e-9 || l.Monotone != 41 || l.NonMonotone != 0 || len(l.Notices) != 0 {
		t.Errorf("%v (%v to %v), %d and %d, %v", l.Common, l.Low, l.High, l.Monotone, l.NonMonotone, l.Notices)
	}
	for i, p := range l.Points {
		want := 1.25 * 0.01 * (1 + at[i])
		// At the ends the window is one-sided: the median of three stations is one station off.
		slack := 1e-9
		if i < 2 {
			slack = 1.25 * 0.01 / 40 * 1.0001
		}
		if p.Class != Monotone || p.U < want-1e-9 || p.U > want+slack || p.StandardUncertainty(2) != p.U/2 {
			t.Errorf("at %v: %s, U %v, want %v", p.X, p.Class, p.U, want)
		}
	}
}

// TestAlongZeroCrossing: where the difference between grids passes zero the
// uncertainty does not (N7), however dense the stations.
func TestAlongZeroCrossing(t *testing.T) {
	grids := family(101, one, func(x, h float64) float64 { return 0.01 * (x - 0.5) * h * h })
	for _, n := range []int{11, 101, 1001} {
		l := Along(grids, spread(n), 2, Options{Bounded: true})
		if l.Monotone+l.NonMonotone != n {
			t.Errorf("n %d: %d and %d stations", n, l.Monotone, l.NonMonotone)
		}
		// The median of |x - 0.5| over a window of a tenth, or of five stations,
		// about 0.5 is a fortieth of the length at least.
		least := 1.25 * 0.01 * 0.024
		for _, p := range l.Points {
			if !(p.U >= least) || math.IsInf(p.U, 0) {
				t.Errorf("n %d at %v: %s, U %v below %v", n, p.X, p.Class, p.U, least)
			}
		}
	}
}

// TestAlongMixed: other classes take three times their range; the common order
// is the median of the monotone ones.
func TestAlongMixed(t *testing.T) {
	at := spread(9)
	// Below 0.5 oscillating by 0.3, 0.1; above it second order.
	grids := family(9, one, func(x, h float64) float64 {
		if x < 0.5 {
			return map[float64]float64{1: 0, 2: 0.1, 4: -0.2}[h]
		}
		return 0.01 * h * h
	})
	l := Along(grids, at, 2, Options{})
	if l.Monotone != 5 || l.NonMonotone != 4 || math.Abs(l.Common-2) > 1e-9 || !slices.Equal(codes(l.Notices), []string{"grid-local-mixed"}) {
		t.Fatalf("%+v", l)
	}
	for _, p := range l.Points {
		want, class := 1.25*0.01, Monotone
		if p.X < 0.5 {
			want, class = 3*0.3, Oscillatory
		}
		lifted := p.X == 0.5 || p.X == 0.625 // half of their neighbours oscillate
		if p.Class != class || !lifted && math.Abs(p.U-want) > 1e-12 || p.U < want-1e-12 {
			t.Errorf("at %v: %s, U %v, want %v", p.X, p.Class, p.U, want)
		}
		if math.IsNaN(p.Order) != (class != Monotone) {
			t.Errorf("at %v: %s, order %v", p.X, p.Class, p.Order)
		}
	}

	none := Along(family(9, one, func(x, h float64) float64 { return -0.1 * x / h }), at, 2, Options{})
	if none.Monotone != 0 || !math.IsNaN(none.Common) || !slices.Equal(codes(none.Notices), []string{"grid-local-none"}) {
		t.Errorf("%+v", none)
	}
	for _, p := range none.Points {
		if !(p.U > 0) {
			t.Errorf("at %v: U %v", p.X, p.U)
		}
	}
}

// TestCommonOrderIsClipped between 0.5 and the formal order.
func TestCommonOrderIsClipped(t *testing.T) {
	for _, row := range []struct{ p, formal, want float64 }{{0.2, 2, 0.5}, {1.3, 2, 1.3}, {4, 2, 2}, {4, 0, 2}, {4, 3.5, 3.5}, {1.3, 1, 1}} {
		grids := family(5, one, func(_, h float64) float64 { return 0.01 * math.Pow(h, row.p) })
		l := Along(grids, spread(5), 2, Options{Formal: row.formal})
		if math.Abs(l.Common-row.want) > 1e-9 || math.Abs(l.Low-row.p) > 1e-9 || math.Abs(l.High-row.p) > 1e-9 {
			t.Errorf("p %v, formal %v: common %v, %v to %v", row.p, row.formal, l.Common, l.Low, l.High)
		}
		e21 := 0.01 * (math.Pow(2, row.p) - 1)
		if want := 1.25 * e21 / (math.Pow(2, row.want) - 1); math.Abs(l.Points[2].U-want) > 1e-9*want {
			t.Errorf("p %v, formal %v: U %v, want %v", row.p, row.formal, l.Points[2].U, want)
		}
	}
}

// TestAlongInput: what a family may lack, and stations that it cannot answer.
func TestAlongInput(t *testing.T) {
	good := family(9, one, func(x, h float64) float64 { return 0.01 * (1 + x) * h })
	with := func(change func(g []Grid) []Grid) []Grid {
		copied := make([]Grid, len(good))
		for i, g := range good {
			copied[i] = Grid{g.Name, g.Count, slices.Clone(g.X), slices.Clone(g.Y)}
		}
		return change(copied)
	}
	at := spread(5)
	for _, row := range []struct {
		what    string
		grids   []Grid
		dim     int
		notices []string
		u       int // stations with an uncertainty
	}{
		{"as it is", good, 2, nil, 5},
		{"coarse first", with(func(g []Grid) []Grid { slices.Reverse(g); return g }), 2, nil, 5},
		{"a fourth grid", with(func(g []Grid) []Grid { return append(g, Grid{"G0", 0.1, g[0].X, g[0].Y}) }), 2, []string{"grid-finest-three"}, 5},
		{"the same grid twice", with(func(g []Grid) []Grid { return append(g, g[1]) }), 2, nil, 5},
		{"one count twice", with(func(g []Grid) []Grid { return append(g, Grid{"G9", 4, g[0].X, g[0].Y}) }), 2, []string{"grid-duplicate"}, 0},
		{"two grids", good[:2], 2, []string{"grid-two"}, 5},
		{"one grid", good[:1], 2, []string{"grid-few"}, 0},
		{"no count", with(func(g []Grid) []Grid { g[1].Count = nan; return g }), 2, []string{"grid-two"}, 5},
		{"no dimension", good, 0, []string{"grid-dimension"}, 0},
		{"all the same", with(func(g []Grid) []Grid { g[1].Y, g[2].Y = g[0].Y, g[0].Y; return g }), 2, []string{"grid-flat"}, 0},
		{"one curve shorter", with(func(g []Grid) []Grid { g[2].X, g[2].Y = g[2].X[:5], g[2].Y[:5]; return g }), 2, []string{"grid-support"}, 3},
		{"a gap", with(func(g []Grid) []Grid { g[0].Y[4] = nan; return g }), 2, []string{"grid-support"}, 4},
		{"a curve elsewhere", with(func(g []Grid) []Grid { g[1].X = []float64{7, 8}; g[1].Y = g[1].Y[:2]; return g }), 2, []string{"station-none", "grid-curve"}, 0},
		{"a reversed curve", with(func(g []Grid) []Grid { slices.Reverse(g[1].X); slices.Reverse(g[1].Y); return g }), 2, []string{"curve-unsorted"}, 5},
		{"close grids", with(func(g []Grid) []Grid { g[0].Count = 5; return g }), 2, []string{"grid-ratio"}, 5},
	} {
		l := Along(row.grids, at, row.dim, Options{})
		got := codes(l.Notices)
		got = slices.DeleteFunc(got, func(code string) bool { return code == "grid-local-none" || code == "grid-local-mixed" })
		if !slices.Equal(got, row.notices) {
			t.Errorf("%s: notices %v", row.what, l.Notices)
		}
		if len(l.Points) != len(at) || l.Rule == "" {
			t.Errorf("%s: %d points for %d stations, rule %q", row.what, len(l.Points), len(at), l.Rule)
		}
		u := 0
		for i, p := range l.Points {
			if p.X != at[i] {
				t.Errorf("%s: point %d at %v", row.what, i, p.X)
			}
			if p.U > 0 {
				u++
			} else if !math.IsNaN(p.U) {
				t.Errorf("%s: U %v at %v", row.what, p.U, p.X)
			}
		}
		if u != row.u {
			t.Errorf("%s: %d stations with an uncertainty, want %d", row.what, u, row.u)
		}
	}
}

// TestAlongStations: the order of the stations does not matter, and a station
// that is no number has no answer.
func TestAlongStations(t *testing.T) {
	grids := family(21, one, func(x, h float64) float64 { return 0.01 * (x - 0.3) * h * h })
	at := spread(21)
	plain := Along(grids, at, 2, Options{})
	turned := append(slices.Clone(at), nan)
	slices.Reverse(turned)
	back := Along(grids, turned, 2, Options{})
	if !math.IsNaN(back.Points[0].U) || notice.Has(back.Notices, "grid-support") {
		t.Errorf("%+v, %v", back.Points[0], back.Notices)
	}
	for i, p := range plain.Points {
		if q := back.Points[len(at)-i]; q.U != p.U || q.Class != p.Class || q.X != p.X {
			t.Errorf("%+v, turned %+v", p, q)
		}
	}
}

// TestFiveGridBump studies Cf along the bump of the NASA Turbulence Modeling
// Resource on five grids (code USM3D, files fort.1000.grid0 to 4, column 2 x,
// column 5 Cf): every station has an order or a range, and an uncertainty that
// is neither nothing nor everything.
func TestFiveGridBump(t *testing.T) {
	var grids []Grid
	for k, cells := range []float64{901120, 225280, 56320, 14080, 3520} {
		name := fmt.Sprintf("nasa-tmr/bump/sa-five-grids/fort.1000.grid%d", k)
		table, err := tablefile.Read(name, reference.Shared(t, name), tablefile.Options{}).Table("")
		if err != nil {
			t.Fatal(err)
		}
		if len(table.Columns) != 10 || table.Rows() != 640>>k {
			t.Fatalf("%s: %d columns, %d rows", name, len(table.Columns), table.Rows())
		}
		grids = append(grids, Grid{fmt.Sprintf("grid%d", k), cells, table.Columns[1].Values, table.Columns[4].Values})
	}
	at := make([]float64, 0, 200)
	for i := range 200 {
		at = append(at, 0.01+1.48*float64(i)/199)
	}
	for _, m := range []interpolate.Method{interpolate.Linear, interpolate.Monotone} {
		for _, bounded := range []bool{false, true} {
			l := Along(grids, at, 2, Options{Bounded: bounded, Formal: 2, Method: m})
			if l.R21 != 2 || l.R32 != 2 || !notice.Has(l.Notices, "grid-finest-three") {
				t.Errorf("%s: r %v, %v, %v", m, l.R21, l.R32, l.Notices)
			}
			if l.Monotone+l.NonMonotone != len(at) || l.Monotone < 150 || !(l.Low <= l.High) || !(0.5 <= l.Common && l.Common <= 2) {
				t.Errorf("%s: %d and %d stations, order %v (%v to %v)", m, l.Monotone, l.NonMonotone, l.Common, l.Low, l.High)
			}
			t.Logf("%s, bounded %v: %d monotone, %d not, order %.3f (quartiles %.3f to %.3f)", m, bounded, l.Monotone, l.NonMonotone, l.Common, l.Low, l.High)
			for _, p := range l.Points {
				// Cf is between 0.001 and 0.012 there; the fine grids differ by at
				// most some per cent of it.
				if cf := p.Values[0]; !(cf > 0.001 && cf < 0.012) || !(p.U > 1e-7 && p.U < 0.1*cf) {
					t.Errorf("%s at %v: Cf %v, %s, U %v", m, p.X, p.Values[0], p.Class, p.U)
				}
			}
		}
	}

	// The resource prints Cf of this code at three stations
	// (cf_convergence_sa.dat, six digits): straight lines give the same, and the
	// order of the printed values to their digits.
	at = []float64{0.75, 0.6321975, 0.8678025}
	l := Along(grids, at, 2, Options{Bounded: true, Formal: 2})
	for i, printed := range [][]float64{{0.00615067, 0.00614271, 0.00611982}, {0.00518279, 0.00517941, 0.00517352}, {0.00267765, 0.00267613, 0.00267374}} {
		for k, v := range printed {
			if got := l.Points[i].Values[k]; math.Abs(got-v) > 0.51e-8 {
				t.Errorf("x = %v, grid %d: %v, printed %v", at[i], k, got, v)
			}
		}
		if r := Three([]float64{901120, 225280, 56320}, printed, 2, Options{}); r.Class != l.Points[i].Class || math.Abs(r.Order-l.Points[i].Order) > 0.02 {
			t.Errorf("x = %v: %s of order %v, from printed values %s of order %v", at[i], l.Points[i].Class, l.Points[i].Order, r.Class, r.Order)
		}
	}
}
