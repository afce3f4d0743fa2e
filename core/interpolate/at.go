package interpolate

import "fmt"

// OutsideError says that a station lies outside the abscissae of the curve.
type OutsideError struct{ At, Lo, Hi float64 }

func (e *OutsideError) Error() string {
	return fmt.Sprintf("interpolate at %g: outside %g to %g", e.At, e.Lo, e.Hi)
}

// UnknownError says that no interpolant has the name.
type UnknownError struct{ Method Method }

func (e *UnknownError) Error() string {
	return fmt.Sprintf("unknown interpolant %q", string(e.Method))
}

// Known reports whether the method is one of this package; the empty name
// stands for Linear.
func (m Method) Known() bool { return m == "" || m == Linear || m == Monotone }

// At writes into dst the value of the curve (x, y) at every station of at. A
// station that coincides with a point has that point's value exactly; between
// two points no value leaves the range of the two.
//
// x must be strictly ascending and at ascending (equal stations are allowed),
// all values finite, dst as long as at. Both slices are swept together, so the
// cost is linear in len(x) + len(at); nothing is allocated. dst may be at.
//
// Where a station lies outside x, or there is no x, dst is left alone and the
// error is an *OutsideError; for a method not known it is an *UnknownError.
// Lengths or orders other than the stated ones panic.
func At(dst, x, y, at []float64, m Method) error {
	if len(x) != len(y) || len(dst) != len(at) {
		panic(fmt.Sprintf("interpolate: %d abscissae with %d values, %d results for %d stations", len(x), len(y), len(dst), len(at)))
	}
	if !m.Known() {
		return &UnknownError{m}
	}
	if len(at) == 0 {
		return nil
	}
	if err := inside(x, at[0]); err != nil {
		return err
	}
	if err := inside(x, at[len(at)-1]); err != nil {
		return err
	}
	switch {
	case len(x) == 1:
		for i := range at {
			dst[i] = y[0]
		}
	case m == Monotone:
		monotone(dst, x, y, at)
	default:
		linear(dst, x, y, at)
	}
	return nil
}

func inside(x []float64, at float64) error {
	if len(x) == 0 {
		return &OutsideError{At: at}
	}
	if lo, hi := x[0], x[len(x)-1]; !(lo <= at && at <= hi) {
		return &OutsideError{at, lo, hi}
	}
	return nil
}

// advance returns the first interval from i on whose upper end is t or above.
func advance(x []float64, i int, t float64) int {
	ordered := true
	for x[i+1] < t {
		ordered = ordered && x[i] < x[i+1]
		i++
	}
	if !(ordered && x[i] <= t && x[i] < x[i+1]) {
		panic("interpolate: abscissae or stations are not in ascending order")
	}
	return i
}

// between returns v, or the nearer of a and b where rounding carried v past
// it.
func between(v, a, b float64) float64 {
	if a > b {
		a, b = b, a
	}
	if v < a {
		return a
	}
	if v > b {
		return b
	}
	return v
}
