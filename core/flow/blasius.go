package flow

import (
	"math"
	"sync"
)

// The laminar flat plate, f”' + f f”/2 = 0, f(0) = f'(0) = 0, f'(inf) = 1,
// with eta = y sqrt(U/(nu x)) and u/U = f'(eta).
//
// The scaled problem F”(0) = 1 needs no shooting: f(eta) = c F(c eta) with
// c = F'(inf)^(-1/2), so that f”(0) = c^3. F is held as Taylor series about
// nodes a fixed step apart; the recurrence follows from the equation.
type similarity struct {
	c      float64 // eta = t/c
	series [][terms]float64
}

const (
	terms = 28   // of each series; the nearest singularity is 5.7 away in eta, so 0.125^28 is far below rounding
	step  = 0.25 // of t between nodes
	nodes = 60   // to t = 15: f” is then below 1e-40
)

// expand returns the Taylor coefficients of F about a node with the given F,
// F' and F”: (k+3)(k+2)(k+1) a_(k+3) = -1/2 sum_i a_i (k-i+2)(k-i+1) a_(k-i+2).
func expand(f, f1, f2 float64) [terms]float64 {
	a := [terms]float64{f, f1, f2 / 2}
	for k := 0; k+3 < terms; k++ {
		sum := 0.0
		for i := 0; i <= k; i++ {
			sum += float64(a[i] * float64((k-i+2)*(k-i+1)) * a[k-i+2])
		}
		a[k+3] = -sum / float64(2*(k+3)*(k+2)*(k+1))
	}
	return a
}

// sum returns F, F' and F” at t behind the node of the series.
func sum(a *[terms]float64, t float64) (f, f1, f2 float64) {
	for k := terms - 1; k >= 0; k-- {
		f2 = float64(f2*t) + 2*f1
		f1 = float64(f1*t) + f
		f = float64(f*t) + a[k]
	}
	return f, f1, f2
}

// plate is solved on first use.
var plate = sync.OnceValue(func() similarity {
	var s similarity
	f, f1, f2 := 0.0, 0.0, 1.0
	for range nodes {
		a := expand(f, f1, f2)
		s.series = append(s.series, a)
		f, f1, f2 = sum(&a, step)
	}
	s.c = 1 / math.Sqrt(f1)
	return s
})

// blasius returns f, f' and f” at eta >= 0.
func blasius(eta float64) (f, f1, f2 float64) {
	s := plate()
	t := s.c * eta
	node := nodes - 1
	if t < nodes*step {
		node = int(t / step)
	}
	behind := t - float64(node)*step
	if behind > step {
		// Beyond the last node the slope is 1 to the last bit.
		f, f1, _ = sum(&s.series[node], step)
		return s.c * (f + float64(f1*(behind-step))), 1, 0
	}
	f, f1, f2 = sum(&s.series[node], behind)
	return s.c * f, s.c * s.c * f1, s.c * s.c * s.c * f2
}

// wallSlope is f”(0), displacement the limit of eta - f, edge the eta where
// u/U = 0.99.
func wallSlope() float64 {
	_, _, f2 := blasius(0)
	return f2
}

func displacement() float64 {
	const far = 20
	f, _, _ := blasius(far)
	return far - f
}

func edge() float64 {
	return root(func(eta float64) float64 { _, f1, _ := blasius(eta); return f1 - 0.99 }, 1, 10)
}

const (
	blasiusSource = "H. Blasius, Z. Math. Phys. 56 (1908) 1; f''(0) = 0.3320573362151963 attributed to Boyd"
	blasiusCaveat = "steady, laminar, no pressure gradient, sharp leading edge; first order in boundary-layer theory"
)

// laminarPlate is the range of Re_x in which a plate's boundary layer is
// usually laminar and thin.
var laminarPlate = Range{Lo: 1e3, Hi: 5e5, Source: "common practice, no source: thin layer above, transition below"}

func overLength(name, meaning string) Symbol {
	return Symbol{Name: name, Meaning: meaning, Unit: "1", Domain: positive, Stated: laminarPlate}
}

// blasiusLaws are the profile and the scales of the laminar flat plate.
func blasiusLaws() []Law {
	eta := plain("eta", "similarity coordinate y sqrt(U/(nu x))", "1", fromZero)
	rex := overLength("Re_x", "Reynolds number U x/nu")
	law := func(id, name, formula string, station, value Symbol, at func(x float64) float64) Law {
		return Law{ID: id, Name: name, Kind: Exact, Formula: formula, Station: station, Value: value,
			Source: blasiusSource, Reach: Quoted, Uncertainty: noneStated, Caveat: blasiusCaveat,
			at: func(_ []float64, x float64) float64 { return at(x) }}
	}
	overRoot := func(constant func() float64) func(float64) float64 {
		constant = sync.OnceValue(constant)
		return func(re float64) float64 { return constant() / math.Sqrt(re) }
	}
	return []Law{
		law("blasius-velocity", "Laminar flat plate, velocity", "u/U = f'(eta), f''' + f f''/2 = 0, f(0) = f'(0) = 0, f'(inf) = 1",
			eta, result("u/U", "velocity along the plate over that outside", "1"),
			func(x float64) float64 { _, f1, _ := blasius(x); return f1 }),
		law("blasius-normal", "Laminar flat plate, velocity away from the plate", "(v/U) sqrt(Re_x) = (eta f' - f)/2",
			eta, result("v/U sqrt(Re_x)", "velocity normal to the plate, scaled", "1"),
			normal),
		law("blasius-friction", "Laminar flat plate, local skin friction", "cf = 2 f''(0)/sqrt(Re_x)",
			rex, result("cf", "wall shear stress over rho U^2/2", "1"), overRoot(func() float64 { return 2 * wallSlope() })),
		law("blasius-drag", "Laminar flat plate, mean friction of one side", "CF = 4 f''(0)/sqrt(Re_L)",
			overLength("Re_L", "Reynolds number U L/nu"), result("CF", "friction force of one side over rho U^2/2 and area", "1"), overRoot(func() float64 { return 4 * wallSlope() })),
		law("blasius-displacement", "Laminar flat plate, displacement thickness", "delta*/x = lim(eta - f)/sqrt(Re_x)",
			rex, result("delta*/x", "displacement thickness over distance", "1"), overRoot(displacement)),
		law("blasius-momentum", "Laminar flat plate, momentum thickness", "theta/x = 2 f''(0)/sqrt(Re_x)",
			rex, result("theta/x", "momentum thickness over distance", "1"), overRoot(func() float64 { return 2 * wallSlope() })),
		law("blasius-edge", "Laminar flat plate, thickness to 99 % of the outer velocity", "delta99/x = eta(u/U = 0.99)/sqrt(Re_x)",
			rex, result("delta99/x", "distance where u/U = 0.99, over distance along the plate", "1"), overRoot(edge)),
	}
}

// normal returns (eta f' - f)/2. Far out it is half the displacement; written
// out there, since eta f' and f are large and nearly equal.
func normal(eta float64) float64 {
	f, f1, _ := blasius(eta)
	if f1 == 1 {
		return displacement() / 2
	}
	return float64(0.5 * (float64(eta*f1) - f))
}
