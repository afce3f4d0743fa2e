package uncertainty

import (
	"errors"
	"math"

	"gonum.org/v1/gonum/mat"
)

// ErrInput says that an input has a value, width, distribution or correlation
// that cannot be used.
var ErrInput = errors.New("an input of the model cannot be used")

// ErrModel says that the model has no finite value at a place that was asked.
var ErrModel = errors.New("the model has no finite value at a drawn or shifted input")

// Distribution names the form of an input.
type Distribution string

// The forms of an input. Source of the widths: JCGM 101:2008 6.4 (clause from
// memory).
const (
	Normal      Distribution = "normal"
	Rectangular Distribution = "rectangular" // half-width sqrt 3 U
	Triangular  Distribution = "triangular"  // half-width sqrt 6 U
	ArcSine     Distribution = "arc sine"    // half-width sqrt 2 U; a cycle
	Student     Distribution = "Student"     // U = s/sqrt n of n readings, Degrees = n-1
	Split       Distribution = "two-piece"   // Sides about Value
)

// Input is one input of a model in its own unit.
type Input struct {
	Value        float64
	U            float64 // standard uncertainty; not used for Split
	Distribution Distribution
	Degrees      float64 // of U; 0 where U is taken as known
	Sides        TwoPiece
}

// Model is a measured or computed quantity as a function of inputs.
type Model struct {
	F      func(x []float64) float64 // keeps nothing of x
	Inputs []Input
	// Correlation of the inputs; nil where they are independent. Only inputs of
	// normal form can be correlated: a shared error of another form is an input
	// of its own.
	Correlation [][]float64
}

// degrees returns the degrees of freedom of an input, +Inf where U is known.
func (in Input) degrees() float64 {
	if in.Degrees == 0 {
		return math.Inf(1)
	}
	return in.Degrees
}

// mean and u are the moments the first order works with.
func (in Input) mean() float64 {
	if in.Distribution == Split {
		return in.Value + in.Sides.Shift()
	}
	return in.Value
}

func (in Input) u() float64 {
	if in.Distribution == Split {
		return in.Sides.U()
	}
	return in.U
}

// usable reports whether the input can be drawn.
func (in Input) usable() bool {
	switch in.Distribution {
	case Normal, Rectangular, Triangular, ArcSine:
	case Student:
		if math.IsInf(in.degrees(), 1) {
			return false
		}
	case Split:
		if !(in.Sides.Minus >= 0 && in.Sides.Plus >= 0) {
			return false
		}
	default:
		return false
	}
	u, mean := in.u(), in.mean()
	return u >= 0 && !math.IsInf(u, 0) && !math.IsNaN(mean) && !math.IsInf(mean, 0) && in.degrees() > 0
}

// draw returns one value of the input.
func (in Input) draw(g *Generator) float64 {
	switch in.Distribution {
	case Rectangular:
		return in.Value + float64(in.U*math.Sqrt(3)*(float64(2*g.Uniform())-1))
	case Triangular:
		return in.Value + float64(in.U*math.Sqrt(6)*(g.Uniform()-g.Uniform()))
	case ArcSine:
		// The direction of a point of the disc is uniform: x^2/w = cos^2, and
		// the double angle is as uniform as the angle.
		x, y, w := g.disc()
		return in.Value + float64(in.U*math.Sqrt2*((float64(x*x)-float64(y*y))/w))
	case Student:
		return in.Value + float64(in.U*g.Student(in.degrees()))
	case Split:
		z := math.Abs(g.Normal())
		if float64(g.Uniform()*(in.Sides.Minus+in.Sides.Plus)) < in.Sides.Minus {
			return in.Value - float64(in.Sides.Minus*z)
		}
		return in.Value + float64(in.Sides.Plus*z)
	}
	return in.Value + float64(in.U*g.Normal())
}

// factor checks the model and returns the Cholesky factor of its correlation,
// row by row, nil where the inputs are independent.
func (m Model) factor() ([][]float64, error) {
	for _, in := range m.Inputs {
		if !in.usable() || m.Correlation != nil && in.Distribution != Normal {
			return nil, ErrInput
		}
	}
	n := len(m.Inputs)
	if n == 0 || m.Correlation == nil {
		return nil, nil
	}
	if len(m.Correlation) != n {
		return nil, ErrInput
	}
	matrix := mat.NewSymDense(n, nil)
	for i, row := range m.Correlation {
		if len(row) != n || row[i] != 1 {
			return nil, ErrInput
		}
		for j, r := range row {
			if !(math.Abs(r) <= 1) || len(m.Correlation[j]) != n || r != m.Correlation[j][i] {
				return nil, ErrInput
			}
			matrix.SetSym(i, j, r)
		}
	}
	var chol mat.Cholesky
	if !chol.Factorize(matrix) {
		return nil, ErrInput
	}
	var lower mat.TriDense
	chol.LTo(&lower)
	rows := make([][]float64, n)
	for i := range rows {
		rows[i] = make([]float64, n)
		for j := 0; j <= i; j++ {
			rows[i][j] = lower.At(i, j)
		}
	}
	return rows, nil
}

// at returns the value of the model, ErrModel where it is not finite.
func (m Model) at(x []float64) (float64, error) {
	y := m.F(x)
	if math.IsNaN(y) || math.IsInf(y, 0) {
		return math.NaN(), ErrModel
	}
	return y, nil
}
