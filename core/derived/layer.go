package derived

import (
	"errors"
	"math"
)

// Edge is a rule for the edge velocity of a boundary layer.
type Edge string

// The rules. None is right for every profile: the rule is printed.
const (
	EdgeMax   Edge = "maximum"  // the largest velocity
	EdgeLast  Edge = "last row" // the outermost row
	EdgeGiven Edge = "given"    // a stated velocity
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
	// Quadrature are the changes of the two thicknesses when every second row
	// is left out: what the spacing leaves open, with their signs.
	QuadratureDisplacement float64
	QuadratureMomentum     float64
	Reached                bool
}

// Thicknesses integrates a velocity profile u(y), y from the wall outwards,
//
//	δ* = ∫(1 - u/U)dy,  θ = ∫ u/U (1 - u/U) dy,  H = δ*/θ,
//
// by the trapezium rule from the wall, where u = 0 at y = 0 is added if no
// row is there, to the edge: beyond the first row at which u reaches U nothing
// is added, so that a slow rise outside does not count. δ99 is where u first
// reaches 0.99 U, linearly between rows.
func Thicknesses(y, u []float64, rule Edge, given float64) (Layer, error) {
	wy, wu := []float64{0}, []float64{0}
	for i := range y {
		switch {
		case math.IsNaN(y[i]) || math.IsNaN(u[i]):
			continue
		case y[i] < 0 || len(wy) > 1 && y[i] <= wy[len(wy)-1]:
			return Layer{}, ErrProfile
		case y[i] == 0:
			wu[0] = u[i]
			continue
		}
		wy, wu = append(wy, y[i]), append(wu, u[i])
	}
	if len(wy) < 6 {
		return Layer{}, ErrRows
	}
	l := Layer{Delta99: math.NaN()}
	top := 0
	switch rule {
	case EdgeGiven:
		l.Edge = given
	case EdgeLast:
		l.Edge = wu[len(wu)-1]
	default:
		for i, v := range wu {
			if v > wu[top] {
				top = i
			}
		}
		l.Edge = wu[top]
	}
	if !(l.Edge > 0) {
		return Layer{}, ErrProfile
	}
	end := len(wy) - 1
	for i, v := range wu {
		if v >= l.Edge {
			end = i
			break
		}
	}
	// A maximum at the last row, still rising, is no edge.
	l.Reached = wu[end] >= 0.99*l.Edge && (rule == EdgeGiven || end < len(wy)-1 || slow(wy, wu))
	if l.Reached {
		l.Delta99 = firstReach(wy, wu, 0.99*l.Edge)
	}
	l.Displacement, l.Momentum = integrals(wy[:end+1], wu[:end+1], l.Edge, 1)
	d2, m2 := integrals(wy[:end+1], wu[:end+1], l.Edge, 2)
	l.QuadratureDisplacement, l.QuadratureMomentum = d2-l.Displacement, m2-l.Momentum
	l.Shape = l.Displacement / l.Momentum
	return l, nil
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

// integrals returns δ* and θ from every step-th row, first and last included.
func integrals(y, u []float64, edge float64, step int) (displacement, momentum float64) {
	last := 0
	for i := step; ; i += step {
		if i >= len(y) {
			i = len(y) - 1
		}
		if i == last {
			return displacement, momentum
		}
		a, b := u[last]/edge, u[i]/edge
		dy := y[i] - y[last]
		displacement += float64(((1-a)+(1-b))/2) * dy
		momentum += float64((float64(a*(1-a))+float64(b*(1-b)))/2) * dy
		last = i
	}
}
