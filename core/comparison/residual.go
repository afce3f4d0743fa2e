package comparison

import (
	"math"

	"weirmark/core/uncertainty"
)

// Residuals are differences freed of their covariance: each is a number of
// standard uncertainties, and their squares sum to the joint statistic.
type Residuals struct {
	Joint    // the sum of their squares, and the rank
	Whitened []float64
	Worst    int // the station with the largest |Whitened|, the first of equal ones
}

// Whiten returns the residuals W e with W'W = V^-1. W is taken as near to the
// single stations as the patterns allow: symmetric for common sources and
// groups; along a correlation length each residual is what the stations before
// it did not foretell. It fails as Statistic does.
func Whiten(e []float64, b uncertainty.Budget) (Residuals, error) {
	if !finite(e) {
		return Residuals{}, ErrFinite
	}
	w, err := newWhitening(b)
	if err != nil {
		return Residuals{}, err
	}
	if err := w.reaches(e); err != nil {
		return Residuals{}, err
	}
	r := Residuals{Whitened: w.apply(e)}
	r.Joint = Joint{dot(r.Whitened, r.Whitened), w.rank()}
	if !finite([]float64{r.Statistic}) {
		return Residuals{}, ErrFinite
	}
	for i, v := range r.Whitened {
		if math.Abs(v) > math.Abs(r.Whitened[r.Worst]) {
			r.Worst = i
		}
	}
	return r, nil
}
