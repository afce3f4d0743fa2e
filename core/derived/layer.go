package derived

import (
	"errors"
	"math"
)

// Edge is a rule for the edge velocity of a boundary layer.
type Edge string

// The rules. None is right for every profile: the rule is printed. The limits
// of one percent are common practice, no source.
const (
	EdgeMax       Edge = "maximum"        // the largest velocity
	EdgePlateau   Edge = "plateau"        // the mean of the outermost rows within 1 % of the last
	EdgeLast      Edge = "last row"       // the outermost row
	EdgeGiven     Edge = "given"          // a stated velocity
	EdgeTotal     Edge = "total pressure" // where it has come to 99 % of its rise from the wall
	EdgeVorticity Edge = "vorticity"      // where it has fallen to 1 % of its largest magnitude
)

// ErrProfile says that the rows are no profile from a wall outwards.
var ErrProfile = errors.New("the rows do not run outwards from the wall")

// Layer holds the thicknesses of a boundary layer in the unit of y.
type Layer struct {
	Edge         float64 // velocity at the edge
	Delta99      float64 // NaN where the edge is not reached inside the rows
	Displacement float64 // a lower bound where the edge is not reached
	Momentum     float64
	Shape        float64
	Overshoot    float64 // largest velocity over that at the edge, less one
	Reached      bool
}

// Thicknesses integrates a velocity profile u(y), y from the wall outwards,
//
//	δ* = ∫(1 - u/U)dy,  θ = ∫ u/U (1 - u/U) dy,  H = δ*/θ,
//
// by the trapezium rule from the wall, where u = 0 at y = 0 is added if no
// row is there, to the edge: beyond the first row at which u reaches U nothing
// is added, so that neither a slow rise nor an overshoot outside counts. δ99 is
// where u first reaches 0.99 U, linearly between rows. The second column is the
// total pressure or the vorticity that two of the rules need, else nil.
func Thicknesses(y, u, second []float64, rule Edge, given float64) (Layer, error) {
	wy, wu, ws := []float64{0}, []float64{0}, []float64{math.NaN()}
	for i := range y {
		v := math.NaN()
		if second != nil {
			v = second[i]
		}
		switch {
		case math.IsNaN(y[i]) || math.IsNaN(u[i]):
			continue
		case y[i] < 0 || len(wy) > 1 && y[i] <= wy[len(wy)-1]:
			return Layer{}, ErrProfile
		case y[i] == 0:
			wu[0], ws[0] = u[i], v
			continue
		}
		wy, wu, ws = append(wy, y[i]), append(wu, u[i]), append(ws, v)
	}
	if len(wy) < 6 {
		return Layer{}, ErrRows
	}
	l := Layer{Delta99: math.NaN()}
	end, err := l.edge(wy, wu, ws, rule, given)
	if err != nil {
		return Layer{}, err
	}
	l.Overshoot = wu[highest(wu)]/l.Edge - 1
	if l.Reached {
		l.Delta99 = firstReach(wy, wu, 0.99*l.Edge)
	}
	l.Displacement, l.Momentum = integrals(wy[:end+1], wu[:end+1], l.Edge)
	l.Shape = l.Displacement / l.Momentum
	return l, nil
}

// edge finds the velocity at the edge, whether it is reached, and the row to
// which is integrated.
func (l *Layer) edge(y, u, second []float64, rule Edge, given float64) (end int, err error) {
	last := len(u) - 1
	at := -1 // the row of the edge, for rules that name one
	switch rule {
	case EdgeGiven:
		l.Edge = given
	case EdgeLast:
		l.Edge = u[last]
	case EdgePlateau:
		n := 0
		for i := last; i >= 0 && math.Abs(u[i]-u[last]) <= 0.01*math.Abs(u[last]); i-- {
			l.Edge, n = l.Edge+u[i], n+1
		}
		l.Edge /= float64(n)
		l.Reached = n >= 3
	case EdgeTotal, EdgeVorticity:
		if at = edgeRow(second, rule == EdgeVorticity); at < 0 {
			return 0, ErrSecond
		}
		l.Edge = u[at]
	default:
		l.Edge = u[highest(u)]
	}
	if !(l.Edge > 0) {
		return 0, ErrProfile
	}
	end = last
	for i, v := range u {
		if v >= l.Edge || i == at {
			end = i
			break
		}
	}
	// A maximum at the last row, still rising, is no edge.
	if rule != EdgePlateau {
		l.Reached = u[end] >= 0.99*l.Edge && (rule == EdgeGiven || end < last || slow(y, u))
	}
	return end, nil
}

func highest(u []float64) int {
	top := 0
	for i, v := range u {
		if v > u[top] {
			top = i
		}
	}
	return top
}

// edgeRow returns the row at which the total pressure has risen to 99 % of the
// way from its least to its greatest value, or beyond the largest vorticity the
// row at which that has fallen to a hundredth; -1 where there is none.
func edgeRow(v []float64, vorticity bool) int {
	lo, hi, top := math.Inf(1), math.Inf(-1), -1
	for i, x := range v {
		if math.IsNaN(x) {
			continue
		}
		if vorticity {
			x = math.Abs(x)
		}
		lo = min(lo, x)
		if x > hi {
			hi, top = x, i
		}
	}
	for i, x := range v {
		switch {
		case top < 0 || math.IsNaN(x):
		case vorticity && i > top && math.Abs(x) <= 0.01*hi:
			return i
		case !vorticity && x-lo >= 0.99*(hi-lo):
			return i
		}
	}
	return -1
}

// slow reports whether the velocity changes by less than a percent over the
// outermost tenth of the profile.
func slow(y, u []float64) bool {
	last := len(y) - 1
	for i := last; i >= 0; i-- {
		if y[i] <= 0.9*y[last] {
			return math.Abs(u[last]-u[i]) <= 0.01*math.Abs(u[last])
		}
	}
	return false
}

func firstReach(y, u []float64, level float64) float64 {
	for i := 1; i < len(u); i++ {
		if u[i] >= level {
			return y[i-1] + float64((y[i]-y[i-1])*((level-u[i-1])/(u[i]-u[i-1])))
		}
	}
	return math.NaN()
}

// integrals returns δ* and θ by the trapezium rule.
func integrals(y, u []float64, edge float64) (displacement, momentum float64) {
	displacement = sum(y, func(i int) float64 { return 1 - u[i]/edge })
	momentum = sum(y, func(i int) float64 {
		v := u[i] / edge
		return float64(v * (1 - v))
	})
	return displacement, momentum
}

func delta99(l Layer) float64      { return l.Delta99 }
func displacement(l Layer) float64 { return l.Displacement }
func momentum(l Layer) float64     { return l.Momentum }
func shape(l Layer) float64        { return l.Shape }

// takeLayer takes one thickness of a boundary layer.
func takeLayer(of func(Layer) float64) taker {
	return func(c *Curve, p *Settings, s *Scalar) error {
		l, err := Thicknesses(c.X, c.Y, c.Second, Edge(p.Words[KeyEdge]), p.Numbers["velocity"])
		if err != nil {
			return err
		}
		s.Value = of(l)
		switch {
		case math.IsNaN(s.Value) && l.Reached:
			return ErrProfile // no velocity below the edge
		case math.IsNaN(s.Value):
			return ErrEdge
		}
		s.Edge, s.Overshoot, s.Bound = l.Edge, l.Overshoot, !l.Reached
		return nil
	}
}
