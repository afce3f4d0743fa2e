package derived

import (
	"errors"
	"math"
	"testing"

	"weirmark/core/uncertainty"
)

// table returns a curve of n rows from lo to hi.
func table(n int, lo, hi float64, y func(x float64) float64) Curve {
	c := Curve{}
	for i := range n {
		x := lo + (hi-lo)*float64(i)/float64(n-1)
		c.X, c.Y = append(c.X, x), append(c.Y, y(x))
	}
	return c
}

// Every kind that a line gives, on a case solved by hand; the sources of the
// forms are textbook integrals, and each name is a term of its field.
func TestKindsSolvedByHand(t *testing.T) {
	gauss := func(x float64) float64 { return math.Exp(-x * x / 2) }
	wake := table(801, -8, 8, func(x float64) float64 { return 1 - .3*gauss(x) })
	jet := table(801, -8, 8, func(x float64) float64 { return .1 + 2*gauss(x) })
	ramp := table(101, 0, 1, func(x float64) float64 { return x })
	pipe := table(401, 0, 1, func(r float64) float64 { return r * r }) // a temperature
	for _, r := range pipe.X {
		pipe.Second = append(pipe.Second, 1-r*r) // a laminar profile
	}
	tank := table(4001, 0, 40, func(t float64) float64 { return math.Exp(-t) })
	tanks := table(4001, 0, 40, func(t float64) float64 { return 13.5 * t * t * math.Exp(-3*t) })
	level := map[string]float64{KeyLevel: .3}
	round := map[string]string{"section": Round}
	for _, row := range []struct {
		kind      string
		curve     Curve
		words     map[string]string
		numbers   map[string]float64
		want      float64
		tolerance float64
	}{
		{"drag coefficient of a wake", wake, nil, map[string]float64{"length": 4}, .5 * (.3*math.Sqrt(2*math.Pi) - .09*math.Sqrt(math.Pi)), 1e-6},
		{"greatest deficit of a wake", wake, nil, nil, .3, 1e-6},
		{"full width at half height", wake, nil, nil, 2 * math.Sqrt(2*math.Ln2), 1e-4},
		{"full width at half height", jet, nil, nil, 2 * math.Sqrt(2*math.Ln2), 1e-4},
		{"greatest value", jet, nil, nil, 2.1, 1e-6},
		{"place of the greatest value", jet, nil, nil, 0, 1e-9},
		{"least value", wake, nil, nil, .7, 1e-6},
		{"place of the least value", wake, nil, nil, 0, 1e-9},
		{"slope of a straight line", table(7, 2, 20, func(x float64) float64 { return .094*x - .1 }), nil, nil, .094, 1e-12}, // spread of a round jet
		{"mean along the line", pipe, nil, nil, 1. / 3, 2e-6},
		{"mean along the line", pipe, round, nil, .5, 4e-6},
		{"flow-weighted mean", pipe, round, nil, 1. / 3, 4e-6}, // bulk temperature of r² in a laminar pipe
		{"integral along the line", ramp, nil, nil, .5, 1e-12},
		{"coefficient of variation", ramp, nil, nil, 1 / math.Sqrt(3), 1e-4},
		{"mixing index", ramp, nil, nil, 1 - 1/math.Sqrt(3), 1e-4},
		{"recirculation ratio", table(101, 0, 1, func(x float64) float64 { return x - .255 }), nil, nil, .255 * .255 / (.745 * .745), 1e-12},
		{"fall between the ends", table(11, 0, 1, func(x float64) float64 { return 7 - 2*x*x }), nil, nil, 2, 1e-12},
		{"loss coefficient", table(11, 0, 1, func(x float64) float64 { return 7 - 2*x*x }), nil, map[string]float64{"scale": 8}, .25, 1e-12},
		{"mean residence time", tank, nil, nil, 1, 1e-4}, // one stirred tank
		{"variance of the residence time", tank, nil, nil, 1, 1e-4},
		{"mean residence time", tanks, nil, nil, 1, 1e-6}, // three in series
		{"variance of the residence time", tanks, nil, nil, 1. / 3, 1e-6},
		{"part of the line beyond a limit", ramp, nil, level, .7, 1e-12},
		{"crossing of a level", ramp, map[string]string{KeyDirection: RisingOnly}, level, .3, 1e-12},
	} {
		got := take(t, row.kind, row.curve, row.words, row.numbers)
		near(t, row.kind, got.Value, row.want, row.tolerance)
	}
}

// What a kind does not apply to is refused.
func TestKindsRefuse(t *testing.T) {
	ramp := table(11, 0, 1, func(x float64) float64 { return x })
	layer := table(11, 0, 1, math.Sqrt)
	loop := Curve{X: []float64{0, .5, 1, .5, 0, .1}, Y: []float64{1, 2, 3, 4, 5, 6}}
	for _, row := range []struct {
		kind  string
		curve Curve
		words map[string]string
		want  error
	}{
		{"crossing of a level", ramp, map[string]string{KeyDirection: FallingOnly}, ErrNone},
		{"flow-weighted mean", ramp, nil, ErrSecond},
		{Lift, ramp, nil, ErrSecond},
		{"mean along the line", loop, nil, ErrLoop},
		{"full width at half height", ramp, nil, ErrNone},
		{"boundary layer thickness δ99", ramp, nil, ErrEdge},
		{"displacement thickness δ*", layer, map[string]string{KeyEdge: string(EdgeTotal)}, ErrSecond},
		{"recirculation ratio", table(5, 0, 1, func(float64) float64 { return -1 }), nil, ErrZero},
		{"mixing index", table(5, 0, 1, func(float64) float64 { return 1 }), nil, ErrZero},
		{"friction velocity from the wall gradient", layer, nil, ErrWall},
		{"mean along the line", Curve{X: []float64{1}, Y: []float64{1}}, nil, ErrRows},
	} {
		k, ok := Named(row.kind)
		if !ok {
			t.Fatal(row.kind)
		}
		if got, err := k.Take(row.curve, Settings{row.words, map[string]float64{"viscosity": 1e-9}}); !errors.Is(err, row.want) {
			t.Errorf("%s: %+v, %v, want %v", row.kind, got, err, row.want)
		}
	}
	if _, ok := Named("drag of a thought"); ok {
		t.Error("an unknown kind was found")
	}
}

// Every kind has a formula and parameters whose options hold their default.
func TestTableOfKinds(t *testing.T) {
	seen := map[string]bool{}
	for _, k := range kinds {
		if seen[k.Name] || k.Formula == "" || k.take == nil {
			t.Errorf("%q: %+v", k.Name, k)
		}
		seen[k.Name] = true
		for _, o := range k.Others {
			for key := range o.Set {
				found := false
				for _, p := range k.Parameters {
					found = found || p.Key == key
				}
				if !found {
					t.Errorf("%s: the other choice %q sets %q, which is no parameter", k.Name, o.Label, key)
				}
			}
		}
	}
	if len(Names()) != len(kinds) {
		t.Error("names are missing")
	}
}

// blasius integrates f”' + f f”/2 = 0 with f”(0) = 0.332057336215196 (Boyd,
// as printed in published-examples.md, 6.2) by the classical Runge-Kutta rule
// and returns u/U = f' over eta.
func blasius(step, end float64) Curve {
	f := [3]float64{0, 0, 0.33205733621519630}
	slope := func(f [3]float64) [3]float64 { return [3]float64{f[1], f[2], -f[0] * f[2] / 2} }
	ahead := func(f, d [3]float64, h float64) [3]float64 {
		return [3]float64{f[0] + h*d[0], f[1] + h*d[1], f[2] + h*d[2]}
	}
	c := Curve{X: []float64{0}, Y: []float64{0}}
	for i := 1; float64(i)*step <= end+step/2; i++ {
		a := slope(f)
		b := slope(ahead(f, a, step/2))
		d := slope(ahead(f, b, step/2))
		e := slope(ahead(f, d, step))
		for j := range f {
			f[j] += step / 6 * (a[j] + 2*b[j] + 2*d[j] + e[j])
		}
		c.X, c.Y = append(c.X, float64(i)*step), append(c.Y, f[1])
	}
	return c
}

// The laminar layer of Blasius: δ* = 1.72078765752, θ = 0.66411467243,
// H = 2.59110019543, η99 = 4.90998951330 in units of √(νx/U)
// (published-examples.md, 6.2), from 200 rows to η = 10 and from 20, where the
// stated u must hold the difference.
func TestBlasiusLayer(t *testing.T) {
	want := map[string]float64{"displacement thickness δ*": 1.72078765752, "momentum thickness θ": .66411467243, "shape factor H": 2.59110019543, "boundary layer thickness δ99": 4.90998951330}
	for name, value := range want {
		for _, edge := range []Edge{EdgeMax, EdgePlateau, EdgeLast} {
			tolerance := .001
			if edge == EdgePlateau {
				tolerance = .01 // rows within 1 % of the last are in its mean
			}
			words := map[string]string{KeyEdge: string(edge)}
			near(t, name+", edge at the "+string(edge), take(t, name, blasius(.05, 10), words, nil).Value, value, tolerance*value)
		}
		coarse := take(t, name, blasius(.5, 10), map[string]string{KeyEdge: string(EdgeMax)}, nil)
		near(t, name+" from 21 rows", coarse.Value, value, coarse.U()+1e-3*value)
	}
}

// Edges by total pressure and vorticity: a layer under a stream whose velocity
// falls outwards (U = 1.1 - 0.1 y) has its edge where the total pressure is
// reached and the vorticity is gone, not at the last row.
func TestEdgesByASecondColumn(t *testing.T) {
	u := func(y float64) float64 { return (1.1 - .05*y) * math.Tanh(5*y) }
	pressure, vorticity := table(101, 0, 2, u), table(101, 0, 2, u)
	for _, y := range pressure.X {
		pressure.Second = append(pressure.Second, math.Pow(math.Tanh(5*y), 2))
		vorticity.Second = append(vorticity.Second, -5*(1-math.Pow(math.Tanh(5*y), 2)))
	}
	name := "displacement thickness δ*"
	p := take(t, name, pressure, map[string]string{KeyEdge: string(EdgeTotal)}, nil)
	v := take(t, name, vorticity, map[string]string{KeyEdge: string(EdgeVorticity)}, nil)
	last := take(t, name, table(101, 0, 2, u), map[string]string{KeyEdge: string(EdgeLast)}, nil)
	// tanh² = 0.99 at 5 y = 2.993, and 1 - tanh² = 0.01 there too.
	near(t, "edge by total pressure", p.Edge, u(.6), 1e-12)
	near(t, "edge by vorticity", v.Edge, u(.6), 1e-12)
	if !(last.Edge < .99*p.Edge) || last.Overshoot < .04 {
		t.Errorf("edge at the last row %v with overshoot %v, by total pressure %v", last.Edge, last.Overshoot, p.Edge)
	}
}

// The nearest place of a contour: an ellipse of 400 rows answers the points of
// one of 37 with their own values, and a point that is off it is told.
func TestOnto(t *testing.T) {
	x, y, cp := ellipse(400, .3, .07, true)
	px, py, pc := ellipse(40, .3, .07, true) // every tenth of the same points
	at, apart := Onto(x, y, cp, px, py)
	if apart > 1e-12 {
		t.Errorf("points of the contour lie %v apart from it", apart)
	}
	for i := range at {
		near(t, "value", at[i], pc[i], 1e-9)
	}
	if _, apart := Onto(x, y, cp, []float64{.5}, []float64{.2}); math.Abs(apart-.05) > 1e-3 {
		t.Errorf("a point 0.05 above the ellipse lies %v apart", apart)
	}
	if at, _ := Onto([]float64{0}, []float64{0}, []float64{1}, px, py); at != nil {
		t.Errorf("one row is a contour: %v", at)
	}
}

// The moment of an ellipse about its centre in potential flow is that of the
// couple π (a² - b²) sin 2α per chord squared, nose up, with any circulation
// (theorem of Blasius; exact). About the leading edge the lift adds half a
// chord of nose down.
func TestMomentOfAnEllipse(t *testing.T) {
	alpha := .07
	name := "section pitching moment coefficient"
	couple := math.Pi * (.25 - .0225) * math.Sin(2*alpha)
	for _, circulation := range []bool{true, false} {
		x, y, cp := ellipse(3200, .3, alpha, circulation)
		c := Curve{X: x, Y: cp, Second: y}
		near(t, "about the centre", take(t, name, c, nil, map[string]float64{NumberAngle: alpha, "about": .5}).Value, couple, 1e-4)
		normal := take(t, Lift, c, nil, map[string]float64{NumberAngle: 0}).Value
		near(t, "about the nose", take(t, name, c, nil, map[string]float64{NumberAngle: alpha}).Value, couple-normal/2, 1e-4)
		near(t, PressureDrag, take(t, PressureDrag, c, nil, map[string]float64{NumberAngle: alpha}).Value, 0, 1e-4)
	}
}

// First-order slopes against the formula: δ* with a fixed edge is a sum with
// the weights of the trapezium rule over -U.
func TestSensitivities(t *testing.T) {
	k, _ := Named("displacement thickness δ*")
	c := table(11, 0, 1, func(y float64) float64 { return .9 * math.Sqrt(y) })
	u := make([]float64, 11)
	for i := range u {
		u[i] = .001
	}
	got, ok := k.Sensitivities(c, Settings{map[string]string{KeyEdge: string(EdgeGiven)}, map[string]float64{"velocity": 1}}, u, 1e-3)
	if !ok {
		t.Fatal("no slopes")
	}
	for i, v := range got {
		want := -.1
		if i == 0 || i == 10 {
			want = -.05
		}
		near(t, "slope", v, want, 1e-9)
	}
	crossing, _ := Named("crossing of a level")
	u[0] = 2
	if _, ok := crossing.Sensitivities(table(11, -.1, .9, func(x float64) float64 { return x }), Settings{map[string]string{KeyDirection: RisingOnly, KeyWhich: First}, map[string]float64{}}, u, 1e-3); ok {
		t.Error("a crossing that vanishes within u has slopes")
	}
}

// First order against sampling, for scalars that are not linear in the values:
// 10,000 draws of a Blasius profile whose rows have an independent u of 0.002
// give the same standard deviation within 5 % (of which sampling is 0.7 %).
func TestFirstOrderAgainstSampling(t *testing.T) {
	c := blasius(.5, 10)
	u := make([]float64, len(c.X))
	for i := range u {
		u[i] = .002
	}
	// An edge above all rows keeps the range of the integral the same in every
	// draw; for δ99 it lies at 1.
	for name, edge := range map[string]float64{"displacement thickness δ*": 1.01, "momentum thickness θ": 1.01, "shape factor H": 1.01, "boundary layer thickness δ99": 1} {
		k, _ := Named(name)
		p := Settings{map[string]string{KeyEdge: string(EdgeGiven)}, map[string]float64{"velocity": edge}}
		slopes, ok := k.Sensitivities(c, p, u, 1e-4)
		if !ok {
			t.Fatal(name)
		}
		first := uncertainty.Combine(len(u), []uncertainty.Source{{U: u}}).Through(slopes)
		g := uncertainty.NewGenerator(7)
		sum, squares, n := 0.0, 0.0, 0.0
		drawn := Curve{X: c.X, Y: make([]float64, len(c.Y))}
		for range 10_000 {
			for i, v := range c.Y {
				drawn.Y[i] = v + .002*g.Normal()
			}
			v, err := k.value(drawn, p)
			if err != nil {
				continue
			}
			sum, squares, n = sum+v, squares+v*v, n+1
		}
		sampled := math.Sqrt((squares - sum*sum/n) / (n - 1))
		if n < 9_900 || math.Abs(first/sampled-1) > .05 {
			t.Errorf("%s: first order %v, %v draws %v", name, first, n, sampled)
		}
	}
}
