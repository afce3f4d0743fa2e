package integrate

import (
	"errors"
	"math"
	"testing"

	"pgregory.net/rapid"
)

// TestExact: sums solved by hand.
func TestExact(t *testing.T) {
	for _, row := range []struct {
		what string
		rule func(x, y []float64) (float64, error)
		x, y []float64
		want float64
	}{
		{"one interval", Trapezoid, []float64{1, 3}, []float64{2, 4}, 6},
		{"two intervals", Trapezoid, []float64{0, 1, 3}, []float64{0, 2, 0}, 3},
		{"y = x^2, uneven pair", Simpson, []float64{0, 1, 3}, []float64{0, 1, 9}, 9},
		{"y = x^2, odd number of intervals", Simpson, []float64{0, 1, 2, 6}, []float64{0, 1, 4, 36}, 72},
		{"y = x^3, even pairs", Simpson, []float64{0, 1, 2, 4, 6}, []float64{0, 1, 8, 64, 216}, 324},
	} {
		if got, err := row.rule(row.x, row.y); err != nil || math.Abs(got-row.want) > 1e-12*row.want {
			t.Errorf("%s: %v, %v, want %v", row.what, got, err, row.want)
		}
	}
}

// TestRefusals breaks each stated precondition once, for both rules.
func TestRefusals(t *testing.T) {
	for _, rule := range []struct {
		name string
		f    func(x, y []float64) (float64, error)
		need int
	}{{"trapezoid", Trapezoid, 2}, {"simpson", Simpson, 3}} {
		for n := range rule.need {
			x := []float64{0, 1, 2}[:n]
			var few *FewError
			if _, err := rule.f(x, x); !errors.As(err, &few) || few.Have != n || few.Need != rule.need {
				t.Errorf("%s with %d stations: %v", rule.name, n, err)
			}
		}
		for _, row := range []struct {
			x, y []float64
			at   int
		}{
			{[]float64{0, 1, 1}, []float64{0, 0, 0}, 2},
			{[]float64{0, -1, 1}, []float64{0, 0, 0}, 1},
			{[]float64{0, 1, 2}, []float64{0, math.NaN(), 0}, 1},
			{[]float64{0, 1, math.Inf(1)}, []float64{0, 0, 0}, 2},
			{[]float64{math.NaN(), 1, 2}, []float64{0, 0, 0}, 0},
			{[]float64{0, 1, 2}, []float64{0, 0, math.Inf(-1)}, 2},
		} {
			var station *StationError
			if _, err := rule.f(row.x, row.y); !errors.As(err, &station) || station.Station != row.at {
				t.Errorf("%s of %v, %v: %v", rule.name, row.x, row.y, err)
			}
		}
		func() {
			defer func() {
				if recover() == nil {
					t.Errorf("%s: slices of different lengths were taken", rule.name)
				}
			}()
			rule.f([]float64{0, 1, 2}, []float64{0, 1})
		}()
	}
}

// TestPolynomials: the trapezoid is exact for lines, Simpson's rule for
// parabolas, on any ascending stations, and both are linear in y.
func TestPolynomials(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		steps := rapid.SliceOfN(rapid.Float64Range(0.1, 2), 2, 30).Draw(t, "steps")
		a, b, c := rapid.Float64Range(-5, 5).Draw(t, "a"), rapid.Float64Range(-5, 5).Draw(t, "b"), rapid.Float64Range(-5, 5).Draw(t, "c")
		x := []float64{rapid.Float64Range(-3, 3).Draw(t, "start")}
		for _, s := range steps {
			x = append(x, x[len(x)-1]+s)
		}
		line, parabola := make([]float64, len(x)), make([]float64, len(x))
		for i, v := range x {
			line[i] = a + b*v
			parabola[i] = line[i] + c*v*v
		}
		lo, hi := x[0], x[len(x)-1]
		wantLine := a*(hi-lo) + b*(hi*hi-lo*lo)/2
		want := wantLine + c*(hi*hi*hi-lo*lo*lo)/3
		scale := 1 + math.Abs(hi-lo)*(math.Abs(a)+math.Abs(b)*math.Abs(hi)+math.Abs(c)*hi*hi) + 500
		if got, err := Trapezoid(x, line); err != nil || math.Abs(got-wantLine) > 1e-13*scale {
			t.Fatalf("trapezoid %v, want %v, %v", got, wantLine, err)
		}
		// Steps that differ by 20 lose up to two digits in the weights.
		if got, err := Simpson(x, parabola); err != nil || math.Abs(got-want) > 1e-12*scale {
			t.Fatalf("simpson %v, want %v, %v", got, want, err)
		}
	})
}
