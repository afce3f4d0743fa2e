package interpolate

import (
	"bytes"
	"encoding/csv"
	"errors"
	"math"
	"os"
	"path/filepath"
	"slices"
	"strconv"
	"strings"
	"testing"

	"github.com/gocarina/gocsv"
	"pgregory.net/rapid"

	"weirmark/core/internal/reference"
)

var methods = []Method{Linear, Monotone}

// TestExact holds both methods to cases solved by hand.
func TestExact(t *testing.T) {
	for _, row := range []struct {
		what string
		m    Method
		x, y []float64
		at   []float64
		want []float64
	}{
		{"straight line", Linear, []float64{0, 1, 4}, []float64{1, 3, 9}, []float64{0, 0.5, 1, 2.5, 4}, []float64{1, 2, 3, 6, 9}},
		{"straight line", Monotone, []float64{0, 1, 4}, []float64{1, 3, 9}, []float64{0, 0.5, 1, 2.5, 4}, []float64{1, 2, 3, 6, 9}},
		{"empty name is linear", "", []float64{0, 2}, []float64{0, 4}, []float64{1}, []float64{2}},
		{"two points", Monotone, []float64{0, 2}, []float64{0, 4}, []float64{1}, []float64{2}},
		{"one point", Linear, []float64{3}, []float64{7}, []float64{3, 3}, []float64{7, 7}},
		{"one point", Monotone, []float64{3}, []float64{7}, []float64{3}, []float64{7}},
		{"equal stations", Linear, []float64{0, 1}, []float64{0, 1}, []float64{0.25, 0.25, 1, 1}, []float64{0.25, 0.25, 1, 1}},
		{"skipped intervals", Linear, []float64{0, 1, 2, 3}, []float64{0, 5, 5, 1}, []float64{0.5, 2.5}, []float64{2.5, 3}},
		// Slopes at 0, 1, 2 are 0, 1.5 (harmonic mean of 1 and 3), 4 (three-point,
		// (3*3 - 1)/2); at 0.5 the line gives 0.5 and the bend 0.125*(0 - 1.5).
		{"convex", Monotone, []float64{0, 1, 2}, []float64{0, 1, 4}, []float64{0.5, 1.5}, []float64{0.5 - 0.1875, 2.5 - 0.3125}},
		// The slope at a peak is zero: 0 + 0.5 + 0.125*(slope0), slope0 = 2.
		{"peak stays", Monotone, []float64{0, 1, 2}, []float64{0, 1, 0}, []float64{0.5, 1, 1.5}, []float64{0.75, 1, 0.75}},
		{"step without overshoot", Monotone, []float64{0, 1, 2, 3}, []float64{0, 0, 1, 1}, []float64{0.5, 1.5, 2.5}, []float64{0, 0.5, 1}},
	} {
		dst := make([]float64, len(row.at))
		if err := At(dst, row.x, row.y, row.at, row.m); err != nil {
			t.Errorf("%s, %s: %v", row.what, row.m, err)
			continue
		}
		if !slices.Equal(dst, row.want) {
			t.Errorf("%s, %s: %v, want %v", row.what, row.m, dst, row.want)
		}
	}
}

// TestRefusals breaks each stated precondition once.
func TestRefusals(t *testing.T) {
	x, y := []float64{0, 1}, []float64{5, 6}
	for _, m := range methods {
		for _, row := range []struct {
			what string
			x, y []float64
			at   []float64
		}{
			{"below", x, y, []float64{-0.1, 0.5}},
			{"above", x, y, []float64{0.5, math.Nextafter(1, 2)}},
			{"no points", nil, nil, []float64{0}},
			{"not a number", x, y, []float64{math.NaN()}},
			{"infinite", x, y, []float64{0, math.Inf(1)}},
			{"one point, elsewhere", x[:1], y[:1], []float64{0.5}},
		} {
			dst := []float64{-7, -7}[:len(row.at)]
			err := At(dst, row.x, row.y, row.at, m)
			var outside *OutsideError
			if !errors.As(err, &outside) || !strings.Contains(err.Error(), "outside") {
				t.Errorf("%s, %s: error %v", row.what, m, err)
			}
			for _, v := range dst {
				if v != -7 {
					t.Errorf("%s, %s: %v was written in spite of the refusal", row.what, m, v)
				}
			}
		}
		for _, row := range []struct {
			what         string
			dst, x, y, a []float64
		}{
			{"values missing", make([]float64, 1), x, y[:1], []float64{0}},
			{"result too short", nil, x, y, []float64{0}},
			{"abscissae descend", make([]float64, 1), []float64{0, 2, 1, 3}, []float64{0, 0, 0, 0}, []float64{2.5}},
			{"abscissae equal", make([]float64, 2), []float64{0, 0, 1}, []float64{0, 0, 0}, []float64{0, 0}},
			{"stations descend", make([]float64, 3), []float64{0, 1, 2}, []float64{0, 0, 0}, []float64{0.5, 1.5, 0.5}},
		} {
			if !panics(func() { _ = At(row.dst, row.x, row.y, row.a, m) }) {
				t.Errorf("%s, %s: no panic", row.what, m)
			}
		}
	}
	var unknown *UnknownError
	if err := At(make([]float64, 1), x, y, []float64{0}, "spline"); !errors.As(err, &unknown) || !strings.Contains(err.Error(), `"spline"`) {
		t.Errorf("unknown method: %v", err)
	}
	if err := At(nil, x, y, nil, Linear); err != nil {
		t.Errorf("no stations: %v", err)
	}
}

func panics(f func()) (did bool) {
	defer func() { did = recover() != nil }()
	f()
	return false
}

// ascending draws n abscissae with spacings over four decades.
func ascending(t *rapid.T, n int) []float64 {
	x := make([]float64, n)
	at := rapid.Float64Range(-100, 100).Draw(t, "start")
	for i := range x {
		x[i] = at
		at += rapid.Float64Range(1e-3, 10).Draw(t, "spacing")
	}
	return x
}

func stations(t *rapid.T, x []float64) []float64 {
	at := rapid.SliceOfN(rapid.Float64Range(x[0], x[len(x)-1]), 1, 50).Draw(t, "stations")
	at = append(at, x...)
	slices.Sort(at)
	return at
}

// TestBetweenNeighbours: no value leaves the range of its two neighbours, and
// points are met exactly.
func TestBetweenNeighbours(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		n := rapid.IntRange(2, 30).Draw(t, "points")
		x := ascending(t, n)
		y := rapid.SliceOfN(rapid.Float64Range(-1e6, 1e6), n, n).Draw(t, "values")
		at := stations(t, x)
		for _, m := range methods {
			dst := make([]float64, len(at))
			if err := At(dst, x, y, at, m); err != nil {
				t.Fatal(err)
			}
			for j, a := range at {
				i, found := slices.BinarySearch(x, a)
				if found {
					if dst[j] != y[i] {
						t.Fatalf("%s at point %d: %v, want %v", m, i, dst[j], y[i])
					}
					continue
				}
				if lo, hi := min(y[i-1], y[i]), max(y[i-1], y[i]); !(lo <= dst[j] && dst[j] <= hi) {
					t.Fatalf("%s at %v: %v outside %v to %v", m, a, dst[j], lo, hi)
				}
			}
		}
	})
}

// TestMonotoneStaysMonotone: ascending data give an ascending curve. The
// slack is the rounding of values of size one.
func TestMonotoneStaysMonotone(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		n := rapid.IntRange(2, 20).Draw(t, "points")
		x, y := ascending(t, n), make([]float64, n)
		for i := 1; i < n; i++ {
			y[i] = y[i-1] + rapid.Float64Range(0, 1).Draw(t, "rise")
		}
		at := stations(t, x)
		dst := make([]float64, len(at))
		if err := At(dst, x, y, at, Monotone); err != nil {
			t.Fatal(err)
		}
		for j := 1; j < len(dst); j++ {
			if dst[j] < dst[j-1]-1e-13*float64(n) {
				t.Fatalf("falls from %v to %v between %v and %v", dst[j-1], dst[j], at[j-1], at[j])
			}
		}
	})
}

// TestMirror: a curve read from the other end gives the same values. 1e-9 of
// the largest value covers the rounding of differently ordered differences.
func TestMirror(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		n := rapid.IntRange(2, 20).Draw(t, "points")
		x := ascending(t, n)
		y := rapid.SliceOfN(rapid.Float64Range(-1, 1), n, n).Draw(t, "values")
		at := stations(t, x)
		negated := func(v []float64) []float64 {
			r := slices.Clone(v)
			slices.Reverse(r)
			for i := range r {
				r[i] = -r[i]
			}
			return r
		}
		back := slices.Clone(y)
		slices.Reverse(back)
		for _, m := range methods {
			a, b := make([]float64, len(at)), make([]float64, len(at))
			if At(a, x, y, at, m) != nil || At(b, negated(x), back, negated(at), m) != nil {
				t.Fatal("refused")
			}
			slices.Reverse(b)
			for j := range a {
				if math.Abs(a[j]-b[j]) > 1e-9 {
					t.Fatalf("%s at %v: %v and %v", m, at[j], a[j], b[j])
				}
			}
		}
	})
}

// saRow is a row of testdata/published/backstep-monotone.csv.
type saRow struct {
	X        float64 `csv:"x"`
	Linear   float64 `csv:"linear"`
	Monotone float64 `csv:"monotone"`
}

// TestPublishedBackstep compares with numpy.interp and scipy's
// PchipInterpolator (testdata/published/backstep-monotone.csv) on the SA curve
// of the NASA Turbulence Modeling Resource.
func TestPublishedBackstep(t *testing.T) {
	text, err := os.ReadFile(filepath.Join(reference.Root(t), "testdata", "published", "backstep-monotone.csv"))
	if err != nil {
		t.Fatal(err)
	}
	reader := csv.NewReader(bytes.NewReader(text))
	reader.Comment = '#'
	var rows []saRow
	if err := gocsv.UnmarshalCSV(reader, &rows); err != nil {
		t.Fatal(err)
	}
	if len(rows) != 20 {
		t.Fatalf("%d rows, want 20", len(rows))
	}
	x, y := backstepSA(t)
	at := make([]float64, len(rows))
	for i, r := range rows {
		at[i] = r.X
	}
	for _, m := range methods {
		dst := make([]float64, len(at))
		if err := At(dst, x, y, at, m); err != nil {
			t.Fatal(err)
		}
		for i, r := range rows {
			want := r.Linear
			if m == Monotone {
				want = r.Monotone
			}
			// The committed figures carry 12 digits.
			if math.Abs(dst[i]-want) > 1e-11*math.Abs(want) {
				t.Errorf("%s at x = %v: %.12g, want %.12g", m, r.X, dst[i], want)
			}
		}
	}
}

// backstepSA reads the two columns of the shared curve.
func backstepSA(t *testing.T) (x, y []float64) {
	for line := range strings.Lines(string(reference.Shared(t, "nasa-tmr/backstep/backstep_cfl3d_cf_sa.dat"))) {
		fields := strings.Fields(line)
		if len(fields) != 2 {
			continue
		}
		a, errA := strconv.ParseFloat(fields[0], 64)
		b, errB := strconv.ParseFloat(fields[1], 64)
		if errA == nil && errB == nil {
			x, y = append(x, a), append(y, b)
		}
	}
	if len(x) < 100 {
		t.Fatalf("only %d points of the shared curve", len(x))
	}
	return x, y
}

func TestNoAllocation(t *testing.T) {
	x, y, at := []float64{0, 1, 2}, []float64{0, 1, 4}, []float64{0.5, 1.5}
	dst := make([]float64, 2)
	for _, m := range methods {
		if n := testing.AllocsPerRun(100, func() { _ = At(dst, x, y, at, m) }); n != 0 {
			t.Errorf("%s: %v allocations", m, n)
		}
	}
}
