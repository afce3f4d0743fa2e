package flow

import (
	"math"
	"testing"

	"pgregory.net/rapid"
)

// TestBlasiusConstants: the series is exact to rounding, so the tolerances are
// a few units of the last place, or half the last digit recomputed.
func TestBlasiusConstants(t *testing.T) {
	f, slope, _ := blasius(0)
	for _, row := range []struct {
		what              string
		got, want, within float64
	}{
		{"f(0)", f, 0, 0},
		{"f'(0)", slope, 0, 0},
		// Attributed to Boyd; a second text has 0.3320573362151962989371801 (quoted).
		{"f''(0)", wallSlope(), 0.33205733621519630, 4e-16},
		// Recomputed from the equation by scipy, eleven decimals.
		{"delta* sqrt(Re)/x", displacement(), 1.72078765752, 5e-12},
		{"theta sqrt(Re)/x", 2 * wallSlope(), 0.66411467243, 5e-12},
		{"H", displacement() / (2 * wallSlope()), 2.59110019543, 5e-11},
		{"eta_99", edge(), 4.90998951330, 5e-11},
	} {
		if math.Abs(row.got-row.want) > row.within {
			t.Errorf("%s = %.16g, want %.16g within %g", row.what, row.got, row.want, row.within)
		}
	}
	check(t, []printed{
		{"blasius-velocity", nil, 5, 0.9915419002, 5e-11},    // recomputed by scipy
		{"blasius-friction", nil, 1e5, 0.00210011499, 5e-12}, // recomputed by scipy
		{"blasius-drag", nil, 1, 1.32822934, 5e-9},           // recomputed by scipy
		{"blasius-displacement", nil, 1e4, 0.0172078765752, 5e-14},
		{"blasius-momentum", nil, 1e4, 0.0066411467243, 5e-14},
		{"blasius-edge", nil, 1e4, 0.0490998951330, 5e-13},
		{"blasius-normal", nil, 0, 0, 0},
		{"blasius-normal", nil, 1e6, 1.72078765752 / 2, 5e-12}, // half the displacement, exactly
	})
}

// TestBlasiusEquation: f”' + f f”/2 = 0 by differences of f”, the profile
// rises, and nodes join without a step.
func TestBlasiusEquation(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		eta := rapid.Float64Range(0.01, 12).Draw(t, "eta")
		const h = 1e-4
		_, below, lower := blasius(eta - h)
		f, _, f2 := blasius(eta)
		_, above, upper := blasius(eta + h)
		// Truncation h^2/6 of a fifth derivative below 0.2, rounding 1e-16/h.
		if residual := (upper-lower)/(2*h) + f*f2/2; math.Abs(residual) > 5e-9 {
			t.Fatalf("residual %g", residual)
		}
		if above < below {
			t.Fatalf("f' falls from %v to %v", below, above)
		}
	})
	s := plate()
	for i := range nodes - 1 {
		f, f1, f2 := sum(&s.series[i], step)
		a := s.series[i+1]
		if f != a[0] || f1 != a[1] || f2 != 2*a[2] {
			t.Errorf("node %d does not join", i+1)
		}
	}
}

// TestBlasiusSums: displacement and momentum thickness as integrals of the
// profile, by Simpson's rule on 2001 stations to eta = 20 (error far below
// 1e-10: the integrand is analytic and flat at the far end).
func TestBlasiusSums(t *testing.T) {
	const n, far = 2000, 20.0
	lost, momentum := 0.0, 0.0
	for i := 0; i <= n; i++ {
		weight := 2 + 2*float64(i%2)
		if i == 0 || i == n {
			weight = 1
		}
		_, u, _ := blasius(far * float64(i) / n)
		lost += weight * (1 - u)
		momentum += weight * u * (1 - u)
	}
	h := far / n / 3
	if math.Abs(lost*h-displacement()) > 1e-10 || math.Abs(momentum*h-2*wallSlope()) > 1e-10 {
		t.Errorf("integrals %v and %v, want %v and %v", lost*h, momentum*h, displacement(), 2*wallSlope())
	}
}
