package comparison

import (
	"math"

	"weirmark/core/uncertainty"
)

// Decomposition is what a difference consists of: an offset, a part that grows
// with the simulation, and a remainder of shape.
type Decomposition struct {
	Offset, UOffset float64 // a and u(a) of E = a + b S + rest
	Scale, UScale   float64 // b and u(b)
	Correlation     float64 // of a and b
	// Parts of the statistic: the offset alone (1 degree of freedom), the scale
	// beside an offset (1), and the shape (ShapeDegrees). They sum to it.
	OffsetPart, ScalePart, ShapePart float64
	ShapeDegrees                     int
	Shape                            []float64 // E - a - b S at the stations
}

// Decompose fits E = a + b S + rest by generalised least squares with the full
// V, so that u(a) and u(b) contain the common sources. Source: the normal
// equations (X'V^-1 X) beta = X'V^-1 E with covariance (X'V^-1 X)^-1, written as
// two projections of whitened columns.
//
// It needs three stations, finite numbers, a variance of its own at every
// station and a simulation that varies; else it is not ok. E and S are in one
// unit, b is a number.
func Decompose(e, s []float64, b uncertainty.Budget) (Decomposition, bool) {
	if len(e) < 3 || !finite(e) || !finite(s) {
		return Decomposition{}, false
	}
	w, err := newWhitening(b)
	if err != nil || w.root != nil {
		return Decomposition{}, false
	}
	// The slope is taken about the middle of S, where it costs the offset least
	// of its digits.
	middle, spread, _ := uncertainty.Replicates(s)
	if !(spread > 1e-12*math.Abs(middle)) || spread == 0 {
		return Decomposition{}, false
	}
	about := make([]float64, len(s))
	for i, v := range s {
		about[i] = v - middle
	}
	one, slope, y := w.apply(uncertainty.Constant(len(e), 1)), w.apply(about), w.apply(e)

	ones := dot(one, one)
	d := Decomposition{ShapeDegrees: len(e) - 2}
	plain := dot(one, y) / ones // the offset without a scale
	d.OffsetPart = float64(plain*plain) * ones
	lean := dot(one, slope) / ones
	takeOut(slope, one, lean)
	slopes := dot(slope, slope)
	takeOut(y, one, plain)
	d.Scale = dot(slope, y) / slopes
	d.ScalePart = float64(d.Scale*d.Scale) * slopes
	takeOut(y, slope, d.Scale)
	d.ShapePart = dot(y, y)

	// E = plain + Scale (S - middle - lean) + rest.
	arm := middle + lean
	d.Offset = plain - float64(d.Scale*arm)
	d.UScale = 1 / math.Sqrt(slopes)
	d.UOffset = math.Sqrt(1/ones + float64(arm*arm)/slopes)
	d.Correlation = -arm / slopes / (d.UOffset * d.UScale)
	d.Shape = make([]float64, len(e))
	for i := range e {
		d.Shape[i] = e[i] - plain - float64(d.Scale*(about[i]-lean))
	}
	return d, finite([]float64{d.Offset, d.UOffset, d.Scale, d.UScale, d.Correlation, d.OffsetPart, d.ScalePart, d.ShapePart})
}

// takeOut subtracts factor times x from y.
func takeOut(y, x []float64, factor float64) {
	for i, v := range x {
		y[i] -= float64(factor * v)
	}
}
