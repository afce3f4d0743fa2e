package plausibility

import (
	"math"
	"math/rand/v2"
	"testing"
)

// wave is a smooth curve with a mean.
func wave(n int, f func(float64) float64) (x, y []float64) {
	for i := range n {
		at := float64(i) / float64(n-1)
		x, y = append(x, at), append(y, f(at))
	}
	return x, y
}

func cp(x float64) float64 {
	return -1.05*math.Exp(-(x-.16)*(x-.16)/.04) - .35*(1-x) + .28*x*x
}

func scaled(y []float64, f float64) []float64 {
	out := make([]float64, len(y))
	for i, v := range y {
		out[i] = v * f
	}
	return out
}

func TestConstantRatio(t *testing.T) {
	_, d := wave(24, cp)
	for _, row := range []struct {
		name  string
		ratio float64
		known []Cause
		found bool
		cause bool
	}{
		{"equal", 1, nil, false, false},
		{"three percent", 1.03, nil, false, false},
		{"millimetres", 1000, nil, true, true},
		{"inches", 1 / 25.4, nil, true, true},
		{"half model", .5, nil, true, true},
		{"kinematic pressure", 1 / 1.196, []Cause{{1.196, "kinematic pressure"}}, true, true},
		{"kinematic pressure, density not given", 1 / 1.196, nil, true, false},
		{"degrees", 180 / math.Pi, nil, true, true},
		{"no known cause", 3.3, nil, true, false},
		{"sign", -1, nil, true, false},
	} {
		s := scaled(d, row.ratio)
		for i := range s {
			s[i] *= 1 + .003*math.Sin(float64(7*i)) // what two models differ by besides
		}
		r, found := ConstantRatio(s, d, row.known)
		if found != row.found || (r.Cause != "") != row.cause {
			t.Errorf("%s: found %v, %+v", row.name, found, r)
		}
		if found && math.Abs(r.Value/row.ratio-1) > .01 {
			t.Errorf("%s: ratio %v, want %v", row.name, r.Value, row.ratio)
		}
	}
}

// Ten clean pairs: simulations that differ from their data as simulations do.
func TestCleanPairsStaySilent(t *testing.T) {
	rng := rand.New(rand.NewPCG(1, 2))
	shapes := []func(float64) float64{
		cp,
		func(x float64) float64 { return math.Pow(x, 1./7) },
		func(x float64) float64 { return math.Sin(2*math.Pi*x) * .003 },
		func(x float64) float64 { return 300 + 40*math.Exp(-3*x) },
		func(x float64) float64 { return 1 - math.Exp(-8*x) },
		func(x float64) float64 { return .003 * (x - .3) / (.2 + x) },
		func(x float64) float64 { return 101325 - 800*x },
		func(x float64) float64 { return math.Exp(-(x - .5) * (x - .5) / .02) },
		func(x float64) float64 { return 5 * x },
		func(x float64) float64 { return 2 + math.Cos(3*x) },
	}
	for n, f := range shapes {
		x, d := wave(40, f)
		s := make([]float64, len(d))
		lo, hi := math.Inf(1), math.Inf(-1)
		for _, v := range d {
			lo, hi = min(lo, v), max(hi, v)
		}
		for i := range d {
			s[i] = d[i]*(1+.06*x[i]) + .02*(hi-lo)*math.Sin(9*x[i]) + .004*(hi-lo)*rng.NormFloat64()
			d[i] += .004 * (hi - lo) * rng.NormFloat64()
		}
		if r, found := ConstantRatio(s, d, nil); found {
			t.Errorf("pair %d: a ratio %+v was found", n, r)
		}
		e := make([]float64, len(d))
		for i := range e {
			e[i] = s[i] - d[i]
		}
		if o, _, found := ConstantOffset(e, hi-lo); found {
			t.Errorf("pair %d: an offset %v was found", n, o)
		}
		if turns, found := Shuffled(x, d); found {
			t.Errorf("pair %d: %d turns", n, turns)
		}
		if out := Outliers(d); out != nil {
			t.Errorf("pair %d: outliers %+v", n, out)
		}
		if least, found := Magnitude(d); found {
			t.Errorf("pair %d: a magnitude that reaches %v", n, least)
		}
		if f, found := ScaledRange(0, 1, .02, .97); found {
			t.Errorf("pair %d: a factor %v", n, f)
		}
		if at, ratio, found := ReplicateRatio([]float64{1, 1.01, .99, 1.02, .98}); found {
			t.Errorf("pair %d: reading %d is %v times the others", n, at, ratio)
		}
	}
}

func TestConstantOffset(t *testing.T) {
	var e []float64
	for i := range 24 {
		e = append(e, 41.8+2*math.Sin(float64(i)))
	}
	if o, half, found := ConstantOffset(e, 700); !found || math.Abs(o-41.8) > 1 || half > 2.1 {
		t.Errorf("offset %v ± %v, found %v", o, half, found)
	}
}

func TestScaledRange(t *testing.T) {
	for _, row := range []struct {
		a      [2]float64
		b      [2]float64
		factor float64
		found  bool
	}{
		{[2]float64{0, 240}, [2]float64{0, .24}, .001, true},
		{[2]float64{.4, 60}, [2]float64{.0005, .058}, .001, true},
		{[2]float64{0, 1.2}, [2]float64{0, .0012}, .001, true},
		{[2]float64{0, 9.45}, [2]float64{0, .24}, .0254, true},
		{[2]float64{0, 1}, [2]float64{0, 1.2}, 0, false},
		{[2]float64{0, 1}, [2]float64{5, 9}, 0, false},
		{[2]float64{0, .3}, [2]float64{0, 1}, 0, false},
	} {
		f, found := ScaledRange(row.a[0], row.a[1], row.b[0], row.b[1])
		if found != row.found || found && math.Abs(f/row.factor-1) > 1e-12 {
			t.Errorf("%v to %v: factor %v, found %v", row.a, row.b, f, found)
		}
	}
}

func TestShuffledLoop(t *testing.T) {
	var x, y []float64
	for i := range 24 {
		at := float64(i) / 23
		x, y = append(x, at, at+1e-4), append(y, cp(at), .4*(1-at)-.1)
	}
	if turns, found := Shuffled(x, y); !found || turns < 20 {
		t.Errorf("%d turns, found %v", turns, found)
	}
}

func TestMagnitude(t *testing.T) {
	_, y := wave(15, func(x float64) float64 { return .003 * (x - .31) })
	for i := range y {
		y[i] = math.Abs(y[i])
	}
	if least, found := Magnitude(y); !found || least > .0001 {
		t.Errorf("least %v, found %v", least, found)
	}
	_, boundary := wave(15, func(x float64) float64 { return x * (1 - x) }) // zero at both ends only
	if _, found := Magnitude(boundary); found {
		t.Error("a curve that is zero at its ends is no magnitude")
	}
	_, parabola := wave(41, func(x float64) float64 { return (x - .5) * (x - .5) }) // touches zero smoothly
	if _, found := Magnitude(parabola); found {
		t.Error("a curve that touches zero smoothly is no magnitude")
	}
}

func TestOutliers(t *testing.T) {
	_, y := wave(24, cp)
	y[16] *= 10
	found := Outliers(y)
	if len(found) != 1 || found[0].Row != 16 || math.Abs(found[0].Ratio-10) > 1 {
		t.Errorf("found %+v, want row 16 about ten times off", found)
	}
	_, step := wave(40, func(x float64) float64 { // a shock is no outlier
		if x < .5 {
			return -1.2
		}
		return -.4
	})
	if found := Outliers(step); found != nil {
		t.Errorf("a step has outliers %+v", found)
	}
}

func TestReplicateRatio(t *testing.T) {
	at, ratio, found := ReplicateRatio([]float64{.02951, .02968, .22756, .02983, .02940})
	if !found || at != 2 || math.Abs(ratio-7.69) > .1 {
		t.Errorf("reading %d is %v times the others, found %v", at, ratio, found)
	}
}

func TestCorrelation(t *testing.T) {
	if r := Correlation([]float64{1, 2, 3, 4}, []float64{2, 4, 6, 8}); math.Abs(r-1) > 1e-12 {
		t.Errorf("r = %v", r)
	}
	if r := Correlation([]float64{1, 1}, []float64{2, 4}); r != 0 {
		t.Errorf("a constant side has r = %v", r)
	}
}

// Lines may reach from a hundredth of a length to tens of it; a thousand or a
// hundred times as far is a unit.
func TestScaledLength(t *testing.T) {
	for _, row := range []struct{ reach, factor float64 }{{1, 0}, {.004, 0}, {30, 0}, {1000, .001}, {250, .001}, {100, .01}, {.001, 1000}, {1e6, 0}} {
		if f, found := ScaledLength(row.reach); f != row.factor || found != (row.factor != 0) {
			t.Errorf("%v lengths: factor %v, found %v", row.reach, f, found)
		}
	}
}
