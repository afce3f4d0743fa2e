package comparison

import (
	"math"

	"gonum.org/v1/gonum/stat/distuv"

	"weirmark/core/quantity"
	"weirmark/core/uncertainty"
)

// Shared is the joint statistic with a part Rho of the variance of one source
// shared by all stations.
type Shared struct {
	Rho float64
	Joint
	Reference float64 // 95 % point at the rank
	Exceeds   bool
	Low       bool // the statistic lies below the 1 % point
}

// CorrelationCurve is the statistic against an assumed correlation, and the
// correlations at which the conclusion changes.
type CorrelationCurve struct {
	Points []Shared
	Flips  []float64
}

// Correlate splits the source u into an independent part of variance
// u^2 (1-rho) and a shared part u^2 rho, and returns the statistic beside the
// rest of the budget at steps+1 values of rho from 0 to 1. Between neighbours of
// different conclusion the flip is found by bisection. u carries signs as in
// uncertainty.Source. It fails as Statistic does, and takes one step at least.
func Correlate(e []float64, rest uncertainty.Budget, u []float64, steps int) (CorrelationCurve, error) {
	var curve CorrelationCurve
	for k := range steps + 1 {
		p, err := sharedAt(e, rest, u, float64(k)/float64(steps))
		if err != nil {
			return CorrelationCurve{}, err
		}
		if k > 0 && curve.Points[k-1].Exceeds != p.Exceeds {
			flip, err := flipBetween(e, rest, u, curve.Points[k-1], p)
			if err != nil {
				return CorrelationCurve{}, err
			}
			curve.Flips = append(curve.Flips, flip)
		}
		curve.Points = append(curve.Points, p)
	}
	return curve, nil
}

func sharedAt(e []float64, rest uncertainty.Budget, u []float64, rho float64) (Shared, error) {
	b := rest
	b.Variance = make([]float64, len(u))
	c := make([]float64, len(u))
	for i, v := range u {
		b.Variance[i] = rest.Variance[i] + float64((1-rho)*float64(v*v))
		c[i] = math.Sqrt(rho) * v
	}
	b.Common = append(append([][]float64{}, rest.Common...), c)
	q, err := Statistic(e, b)
	if err != nil {
		return Shared{}, err
	}
	p := Shared{Rho: rho, Joint: q, Reference: ChiSquare95(q.Rank)}
	p.Exceeds = quantity.Round(q.Statistic, 10) > quantity.Round(p.Reference, 10)
	p.Low = quantity.Round(distuv.ChiSquared{K: float64(q.Rank)}.CDF(q.Statistic), 10) < 0.01
	return p, nil
}

// flipBetween halves the distance forty times: to 1e-12 of it.
func flipBetween(e []float64, rest uncertainty.Budget, u []float64, low, high Shared) (float64, error) {
	for range 40 {
		middle, err := sharedAt(e, rest, u, (low.Rho+high.Rho)/2)
		if err != nil {
			return 0, err
		}
		if middle.Exceeds == low.Exceeds {
			low = middle
		} else {
			high = middle
		}
	}
	return (low.Rho + high.Rho) / 2, nil
}
