package uncertainty

import "math"

// TwoPiece is the two-piece normal distribution about a value: half of a
// normal distribution of deviation Minus below it and half of one of deviation
// Plus above, joined without a step. Both are standard, in the unit of the
// value, and >= 0.
type TwoPiece struct{ Minus, Plus float64 }

// Shift returns how far the mean lies above the value, sqrt(2/pi) (Plus-Minus).
func (t TwoPiece) Shift() float64 { return math.Sqrt(2/math.Pi) * (t.Plus - t.Minus) }

// U returns the standard deviation about the mean,
// sqrt((1-2/pi) (Plus-Minus)^2 + Plus Minus). Source: integration of the
// density; the symmetric case is Minus = Plus = U.
func (t TwoPiece) U() float64 {
	difference := t.Plus - t.Minus
	return math.Sqrt(float64((1-2/math.Pi)*float64(difference*difference)) + float64(t.Plus*t.Minus))
}

// Facing returns at every station the standard uncertainty of the data on the
// side on which the simulation lies: plus where e = s - d > 0, minus where
// e < 0, and the larger one where e = 0.
func Facing(e, minus, plus []float64) []float64 {
	u := make([]float64, len(e))
	for i, v := range e {
		switch {
		case v > 0:
			u[i] = plus[i]
		case v < 0:
			u[i] = minus[i]
		case v == 0:
			u[i] = max(minus[i], plus[i])
		default:
			u[i] = math.NaN()
		}
	}
	return u
}

// Times returns the two pieces of an error times a factor; a negative one
// exchanges them.
func (t TwoPiece) Times(factor float64) TwoPiece {
	if factor < 0 {
		return TwoPiece{Minus: -factor * t.Plus, Plus: -factor * t.Minus}
	}
	return TwoPiece{Minus: factor * t.Minus, Plus: factor * t.Plus}
}
