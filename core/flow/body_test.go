package flow

import (
	"math"
	"testing"

	"pgregory.net/rapid"
)

// TestCylinder: cp is 1 at the stagnation points, 0 at 30 degrees, -3 at the
// shoulder (closed form). Angles in radians are rounded: 1e-15 each.
func TestCylinder(t *testing.T) {
	check(t, []printed{
		{"cylinder-pressure", nil, 0, 1, 0},
		{"cylinder-pressure", nil, math.Pi, 1, 1e-15},
		{"cylinder-pressure", nil, math.Pi / 6, 0, 1e-15},
		{"cylinder-pressure", nil, -math.Pi / 2, -3, 1e-15},
		{"cylinder-speed", nil, math.Pi / 2, 2, 1e-15},
		{"cylinder-speed", nil, math.Pi / 6, 1, 1e-15},
	})
}

// TestEllipse: the shoulder speed is 1 + b/a (closed form), the plate along the
// flow leaves it undisturbed, and the round ellipse is the cylinder turned by
// the flow.
func TestEllipse(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		ratio := rapid.Float64Range(0.01, 100).Draw(t, "b/a")
		alpha, phi := rapid.Float64Range(-2, 2).Draw(t, "alpha"), rapid.Float64Range(-7, 7).Draw(t, "phi")
		if got := ellipseSpeed(ratio, 0, math.Pi/2); math.Abs(got-(1+ratio)) > 1e-14*(1+ratio) {
			t.Fatalf("shoulder %v of ratio %v", got, ratio)
		}
		if got, want := ellipseSpeed(1, alpha, phi), 2*math.Abs(math.Sin(phi-alpha)); math.Abs(got-want) > 1e-14 {
			t.Fatalf("round: %v, want %v", got, want)
		}
		if got := ellipseSpeed(ratio, alpha, alpha); got != 0 {
			t.Fatalf("stagnation point: %v", got)
		}
		// The same ellipse, its axes renamed: a quarter turn.
		if a, b := ellipseSpeed(ratio, alpha, phi), ellipseSpeed(1/ratio, alpha+math.Pi/2, phi+math.Pi/2); math.Abs(a-b) > 1e-12*(1+a) {
			t.Fatalf("quarter turn: %v and %v", a, b)
		}
	})
	if got := ellipseSpeed(1e-12, 0, 1); math.Abs(got-1) > 1e-11 {
		t.Errorf("thin plate along the flow: %v", got)
	}
}

// TestEllipseForces: pressure gives no force (d'Alembert, and no lift without
// circulation), and no circulation is what goes round: sums over even angles
// are exact to rounding for so smooth a curve.
func TestEllipseForces(t *testing.T) {
	const n = 2000
	for _, row := range []struct{ ratio, alpha float64 }{{1, 0}, {0.5, 0}, {0.5, 0.3}, {2, -0.7}, {0.2, 1}} {
		drag, lift, round := 0.0, 0.0, 0.0
		for i := range n {
			phi := 2 * math.Pi * (float64(i) + 0.5) / n
			s, c := math.Sincos(phi)
			q := ellipseSpeed(row.ratio, row.alpha, phi)
			cp := pressure(q)
			drag += cp * row.ratio * c
			lift += cp * s
			// The speed is signed by the side of the stagnation points.
			round += math.Copysign(q, math.Sin(phi-row.alpha)) * math.Hypot(s, row.ratio*c)
		}
		if math.Abs(drag)/n > 1e-12 || math.Abs(lift)/n > 1e-12 || math.Abs(round)/n > 1e-12 {
			t.Errorf("%+v: %g, %g, %g", row, drag/n, lift/n, round/n)
		}
	}
}
