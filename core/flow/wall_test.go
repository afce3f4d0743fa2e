package flow

import (
	"math"
	"testing"

	"pgregory.net/rapid"

	"weirmark/core/internal/reference"
	"weirmark/core/tablefile"
)

// TestWall: constants 0.41 and 5.0; numbers recomputed with scipy, ten
// decimals, and the log10 y+ of the resource's theory file (seen).
func TestWall(t *testing.T) {
	c := map[string]float64{"kappa": 0.41, "B": 5.0}
	second := map[string]float64{"kappa": 0.40, "B": 5.5}
	var rows []printed
	for i, y := range []float64{1, 5, 10, 30, 100, 300, 1000} {
		want := []float64{0.9998352078, 4.8656480481, 8.2944984708, 12.6338008971, 16.0771010741, 18.8793646679, 21.8482343693}[i]
		rows = append(rows, printed{"wall-spalding", c, y, want, 5e-11})
	}
	for i, y := range []float64{30, 100, 300, 1000} {
		want := []float64{13.2956033699, 16.2321224048, 18.9116645723, 21.8481836073}[i]
		rows = append(rows, printed{"wall-log", c, y, want, 5e-11})
	}
	check(t, append(rows,
		printed{"wall-spalding-inverse", c, 10, 14.550579852, 5e-10},
		printed{"wall-spalding-inverse", c, 20, 471.37490716, 5e-9},
		printed{"wall-viscous", nil, 3.25, 3.25, 0},
		printed{"wall-log", c, 10.8048708141, 10.8048708141, 5e-10}, // where it meets u+ = y+
		printed{"wall-spalding", c, 0, 0, 0},
	))
	for _, row := range []struct {
		c       map[string]float64
		u, want float64
	}{{c, 10, 1.1629}, {c, 20, 2.6734}, {second, 10, 1.1280}, {second, 20, 2.5267}} {
		if got := math.Log10(value(t, "wall-spalding-inverse", row.c, row.u)); math.Abs(got-row.want) > 5.1e-5 {
			t.Errorf("%v at u+ %v: log10 y+ %v, printed %v", row.c, row.u, got, row.want)
		}
	}
}

// TestSpaldingTable: the table of the NASA Turbulence Modeling Resource,
// flatplate/theory/u+y+spalding.dat (log10 y+ with 6 digits, u+).
func TestSpaldingTable(t *testing.T) {
	const name = "nasa-tmr/flatplate/theory/u+y+spalding.dat"
	table, err := tablefile.Read(name, reference.Shared(t, name), tablefile.Options{}).Table("")
	if err != nil {
		t.Fatal(err)
	}
	if table.Rows() < 40 {
		t.Fatalf("%d rows", table.Rows())
	}
	for i := range table.Rows() {
		want, u := table.Columns[0].Values[i], table.Columns[1].Values[i]
		if got := math.Log10(spaldingY(0.40, 5.5, u)); math.Abs(got-want) > 6e-6 {
			t.Errorf("u+ %v: log10 y+ %v, printed %v", u, got, want)
		}
	}
}

// TestSpaldingBothWays: each form undoes the other over the whole range, and
// the law runs between its limits u+ = y+ at the wall and the logarithm far out.
func TestSpaldingBothWays(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		kappa, b := rapid.Float64Range(0.38, 0.42).Draw(t, "kappa"), rapid.Float64Range(4, 5.5).Draw(t, "B")
		y := math.Pow(10, rapid.Float64Range(-300, 300).Draw(t, "log10 y+"))
		u := SpaldingU(kappa, b, y)
		// Far out a unit of the last place of u+ is kappa u+ of them in y+.
		if back := spaldingY(kappa, b, u); math.Abs(back-y) > 1e-15*y*(10+10*kappa*u) {
			t.Fatalf("%v -> %v -> %v", y, u, back)
		}
		if u > y || y > 1e5 && math.Abs(u-LogLaw(kappa, b, y)) > 1e-2 {
			t.Fatalf("u+ %v at y+ %v", u, y)
		}
	})
}
