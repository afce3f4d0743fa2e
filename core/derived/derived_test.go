package derived

import (
	"errors"
	"math"
	"slices"
	"testing"

	"weirmark/core/flow"
)

func near(t *testing.T, name string, got, want, tolerance float64) {
	t.Helper()
	if !(math.Abs(got-want) <= tolerance) {
		t.Errorf("%s = %.10g, want %.10g ± %.2g", name, got, want, tolerance)
	}
}

// A parabola is found exactly; a suction peak between rows to second order.
func TestExtrema(t *testing.T) {
	var x, y []float64
	for i := range 11 {
		at := float64(i) / 10
		x, y = append(x, at), append(y, 3-(at-.43)*(at-.43))
	}
	e, ok := Extrema(x, y, true)
	if !ok || e.AtEnd {
		t.Fatalf("%+v, %v", e, ok)
	}
	near(t, "place", e.X, .43, 1e-12)
	near(t, "value", e.Y, 3, 1e-12)
	near(t, "sampling", e.Sampling, .03*.03, 1e-12)
	if e, ok := Extrema(x, y, false); !ok || !e.AtEnd || e.Row != 10 {
		t.Errorf("the least value lies at the end: %+v", e)
	}
	if _, ok := Extrema([]float64{1}, []float64{math.NaN()}, true); ok {
		t.Error("a curve without numbers has an extremum")
	}
}

// joukowski returns the contour of an ellipse of thickness ratio b with its
// exact pressure in potential flow at angle alpha with circulation for a
// chosen lift: a circle of radius R mapped by z = c + k²/c.
func ellipse(n int, b, alpha float64, kutta bool) (x, y, cp []float64) {
	// Semi axes a = 1/2 and b/2: R = (a+b/2)/2, k² = R² - ... in chords.
	a, h := .5, b/2
	r := (a + h) / 2
	k2 := (a*a - h*h) / 4
	gamma := 0.0
	if kutta {
		gamma = 4 * math.Pi * r * math.Sin(alpha)
	}
	for i := range n {
		theta := -2 * math.Pi * float64(i) / float64(n) // clockwise from the trailing edge... downwards first
		cx, cy := r*math.Cos(theta), r*math.Sin(theta)
		x = append(x, cx+k2*cx/(r*r)+.5)
		y = append(y, cy-k2*cy/(r*r))
		speed := math.Abs(2*math.Sin(theta-alpha) + gamma/(2*math.Pi*r))
		// |dz/dc| = |1 - k²/c²|
		re, im := 1-k2*math.Cos(2*theta)/(r*r), k2*math.Sin(2*theta)/(r*r)
		q := speed / math.Hypot(re, im)
		cp = append(cp, 1-q*q)
	}
	return x, y, cp
}

// An ellipse in potential flow with circulation 4 pi R sin(alpha): by the
// theorem of Kutta and Joukowski its lift coefficient per chord 1 is
// 2 gamma/U = 8 pi R sin(alpha), its drag is zero. Without circulation both are.
func TestLoopOfAnEllipse(t *testing.T) {
	alpha := 4 * math.Pi / 180
	for _, row := range []struct {
		n         int
		tolerance float64
	}{{400, 1e-3}, {3200, 2e-5}} {
		x, y, cp := ellipse(row.n, .3, alpha, true)
		s, err := Loop(x, y, cp, alpha)
		if err != nil {
			t.Fatal(err)
		}
		r := (.5 + .15) / 2
		near(t, "lift", s.Lift, 8*math.Pi*r*math.Sin(alpha), row.tolerance)
		near(t, "drag", s.Drag, 0, row.tolerance)
		x, y, cp = ellipse(row.n, .3, alpha, false)
		if s, err = Loop(x, y, cp, alpha); err != nil {
			t.Fatal(err)
		}
		near(t, "lift without circulation", s.Lift, 0, row.tolerance)
		near(t, "drag without circulation", s.Drag, 0, row.tolerance)
	}
}

// The result does not depend on the sense or the start of the contour.
func TestLoopAnyWayRound(t *testing.T) {
	alpha := .1
	x, y, cp := ellipse(200, .2, alpha, true)
	want, err := Loop(x, y, cp, alpha)
	if err != nil {
		t.Fatal(err)
	}
	turn := func(v []float64, k int) []float64 { return append(slices.Clone(v[k:]), v[:k]...) }
	reverse := func(v []float64) []float64 { w := slices.Clone(v); slices.Reverse(w); return w }
	for name, c := range map[string][3][]float64{
		"reversed": {reverse(x), reverse(y), reverse(cp)},
		"turned":   {turn(x, 77), turn(y, 77), turn(cp, 77)},
		"both":     {reverse(turn(x, 31)), reverse(turn(y, 31)), reverse(turn(cp, 31))},
	} {
		got, err := Loop(c[0], c[1], c[2], alpha)
		if err != nil {
			t.Fatal(err)
		}
		near(t, name+": lift", got.Lift, want.Lift, 1e-12)
		near(t, name+": drag", got.Drag, want.Drag, 1e-12)
		near(t, name+": moment", got.Moment, want.Moment, 1e-12)
	}
	if _, err := Loop(x[:150], y[:150], cp[:150], alpha); !errors.Is(err, ErrOpen) {
		t.Errorf("an open contour: %v", err)
	}
}

// The length of a circle of radius 1 from 1000 rows, to 1e-6 of the polygon's
// own length 2n sin(pi/n).
func TestArcLength(t *testing.T) {
	var x, y []float64
	n := 1000
	for i := range n + 1 {
		a := 2 * math.Pi * float64(i) / float64(n)
		x, y = append(x, math.Cos(a)), append(y, math.Sin(a))
	}
	s := ArcLength(x, y)
	near(t, "polygon", s[n], 2*float64(n)*math.Sin(math.Pi/float64(n)), 1e-9)
	near(t, "circle", s[n]/(2*math.Pi), 1, 2e-6)
}

// The power law u = y^(1/7) to the edge at y = 1: δ* = 1/8, θ = 7/72, H = 9/7,
// exactly (published-examples.md, 6.2). 25 rows log-spaced from 0.001 give
// both within 1 %; 26 uniform rows are off by +7.8 % and -5.1 % by the
// trapezium, and the step-doubling estimate must cover that.
func TestPowerLawLayer(t *testing.T) {
	law := func(y []float64) (u []float64) {
		for _, v := range y {
			u = append(u, math.Pow(v, 1./7))
		}
		return u
	}
	var logs, uniform []float64
	for i := range 25 {
		logs = append(logs, math.Pow(10, -3+3*float64(i)/24))
	}
	for i := range 26 {
		uniform = append(uniform, float64(i)/25)
	}
	l, err := Thicknesses(logs, law(logs), nil, EdgeGiven, 1)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "δ*", l.Displacement, 1./8, .01/8)
	near(t, "θ", l.Momentum, 7./72, .01*7/72)
	near(t, "δ99", l.Delta99, math.Pow(.99, 7), .01) // straight between rows at 0.75 and 1
	c, err := Thicknesses(uniform, law(uniform), nil, EdgeGiven, 1)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "δ99 of uniform rows", c.Delta99, math.Pow(.99, 7), 2e-4)
	near(t, "δ* of uniform rows", c.Displacement/(1./8)-1, .078, .0005)
	near(t, "θ of uniform rows", c.Momentum/(7./72)-1, -.051, .0005)
	for _, row := range []struct {
		kind string
		want float64
	}{{"displacement thickness δ*", 1. / 8}, {"momentum thickness θ", 7. / 72}, {"shape factor H", 9. / 7}} {
		for name, y := range map[string][]float64{"uniform": uniform, "logarithmic": logs} {
			got := take(t, row.kind, Curve{X: y, Y: law(y)}, map[string]string{KeyEdge: string(EdgeGiven)}, map[string]float64{"velocity": 1})
			if off := math.Abs(got.Value - row.want); off > got.U() || got.U() > row.want/2 {
				t.Errorf("%s of %s rows: off by %v, u %v", row.kind, name, off, got.U())
			}
		}
	}
}

// take takes a scalar by its name.
func take(t *testing.T, name string, c Curve, words map[string]string, numbers map[string]float64) Scalar {
	t.Helper()
	k, ok := Named(name)
	if !ok {
		t.Fatalf("no kind %q", name)
	}
	s, err := k.Take(c, Settings{words, numbers})
	if err != nil {
		t.Fatalf("%s: %v", name, err)
	}
	return s
}

func TestLayerRefusals(t *testing.T) {
	y := []float64{.1, .2, .3, .4, .5, .6, .7}
	rising := []float64{1, 2, 3, 4, 5, 6, 7}
	l, err := Thicknesses(y, rising, nil, EdgeMax, 0)
	if err != nil || l.Reached || !math.IsNaN(l.Delta99) {
		t.Errorf("a profile still rising at its last row: %+v, %v", l, err)
	}
	if _, err := Thicknesses([]float64{.3, .2, .1, .4, .5, .6}, rising[:6], nil, EdgeMax, 0); !errors.Is(err, ErrProfile) {
		t.Errorf("rows out of order: %v", err)
	}
	if _, err := Thicknesses(y[:3], rising[:3], nil, EdgeMax, 0); !errors.Is(err, ErrRows) {
		t.Errorf("three rows: %v", err)
	}
	if _, err := Thicknesses(y, make([]float64, 7), nil, EdgeMax, 0); !errors.Is(err, ErrProfile) {
		t.Errorf("no velocity: %v", err)
	}
}

// A profile made of the log law itself gives its friction velocity within
// 0.5 %, and the other constants move it visibly.
func TestLogFit(t *testing.T) {
	nu, tau := 1.5e-5, 1.24
	var y, u []float64
	for i := range 40 {
		plus := 20 * math.Pow(500./20, float64(i)/39)
		y, u = append(y, plus*nu/tau), append(u, tau*(math.Log(plus)/.41+5))
	}
	f, err := wallLaw(flow.LogLaw).Fit(y, u, nu, .41, 5, 30, 300)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "u_tau", f.UTau, tau, .005*tau)
	if f.Rows < 20 || f.Residual > 1e-9 {
		t.Errorf("%+v", f)
	}
	if _, err := wallLaw(flow.LogLaw).Fit(y[:3], u[:3], nu, .41, 5, 30, 300); !errors.Is(err, ErrFit) {
		t.Errorf("three rows were fitted: %v", err)
	}
	numbers := map[string]float64{"viscosity": nu, "kappa": .41, "kappa range": .02, "B": 5, "B range": .5, "low": 30, "high": 300}
	s := take(t, "friction velocity from the log law", Curve{X: y, Y: u}, nil, numbers)
	near(t, "u_tau by its kind", s.Value, tau, 1e-9)
	if len(s.Effects) != 3 || s.U() < .005*tau || s.U() > .05*tau {
		t.Errorf("the constants leave %v open: %+v", s.U(), s.Effects)
	}
	// The other pair of constants moves the result visibly.
	numbers["kappa"], numbers["B"] = .384, 4.17
	if o := take(t, "friction velocity from the log law", Curve{X: y, Y: u}, nil, numbers); math.Abs(o.Value-tau) < .001*tau {
		t.Errorf("κ = 0.384, B = 4.17 gives %v, as κ = 0.41, B = 5", o.Value)
	}
}

// A profile made of Spalding's law, from the viscous layer outwards, gives its
// friction velocity by the composite fit.
func TestCompositeFit(t *testing.T) {
	nu, tau := 1.5e-5, .9
	var y, u []float64
	for i := range 40 {
		plus := 2 * math.Pow(250, float64(i)/39)
		y, u = append(y, plus*nu/tau), append(u, tau*flow.SpaldingU(.41, 5, plus))
	}
	numbers := map[string]float64{"viscosity": nu, "kappa": .41, "kappa range": .02, "B": 5, "B range": .5, "low": 0, "high": 300}
	s := take(t, "friction velocity from a composite profile", Curve{X: y, Y: u}, nil, numbers)
	near(t, "u_tau", s.Value, tau, 1e-6*tau)
}

// A linear profile near the wall: u = tau² y/nu.
func TestWallGradient(t *testing.T) {
	nu, tau := 1.5e-5, 1.3
	var y, u []float64
	for i := 1; i <= 12; i++ {
		plus := float64(i)
		y = append(y, plus*nu/tau)
		u = append(u, tau*min(plus, 5+2*math.Log(plus/5+1e-9)+0))
	}
	f := WallGradient(y, u, nu)
	near(t, "u_tau", f.UTau, tau, 1e-12)
	if f.Rows != 5 {
		t.Errorf("%d rows within five units", f.Rows)
	}
	if g := WallGradient([]float64{1}, []float64{1}, nu); g.Rows != 0 || !math.IsNaN(g.UTau) {
		t.Errorf("a row far from the wall gave %+v", g)
	}
}

func TestCrossingU(t *testing.T) {
	x, y := []float64{0, 1, 2}, []float64{-1, 1, 5}
	near(t, "u_x", CrossingU(x, y, .5, .1), .05, 1e-15)
	if !math.IsNaN(CrossingU(x, []float64{0, 0, 0}, .5, .1)) {
		t.Error("a flat curve locates its crossing")
	}
}
