package uncertainty

import (
	"errors"
	"math"

	"gonum.org/v1/gonum/stat/distuv"
)

// ErrCorrelated says that effective degrees of freedom were asked of terms
// that share errors: the formula holds for independent terms only.
var ErrCorrelated = errors.New("no effective degrees of freedom for correlated terms")

// ErrDegrees says that a term is negative or unknown, or has no degrees of
// freedom.
var ErrDegrees = errors.New("a term has no uncertainty or no degrees of freedom")

// Term is one part of a combined standard uncertainty, its sensitivity
// included, with its degrees of freedom: +Inf where U is taken as known.
type Term struct {
	U, Degrees float64
	Correlated bool // shares an error with another term
}

// EffectiveDegrees returns the degrees of freedom of the root sum of squares u:
//
//	nu = u^4 / sum of U_i^4/nu_i,
//
// +Inf where no term with an uncertainty has finite degrees. Source: JCGM
// 100:2008 G.4.1, equation G.2b (clause from memory), the formula of Welch and
// Satterthwaite. It fails with ErrCorrelated where a correlated term has
// finite degrees, and with ErrDegrees.
func EffectiveDegrees(terms []Term) (float64, error) {
	largest := 0.0
	for _, t := range terms {
		if !(t.U >= 0) || math.IsInf(t.U, 0) || !(t.Degrees > 0) {
			return math.NaN(), ErrDegrees
		}
		if t.Correlated && !math.IsInf(t.Degrees, 1) {
			return math.NaN(), ErrCorrelated
		}
		largest = max(largest, t.U)
	}
	if largest == 0 {
		return math.Inf(1), nil
	}
	// In units of the largest term no fourth power overflows.
	square, fourth := 0.0, 0.0
	for _, t := range terms {
		r := t.U / largest
		square += float64(r * r)
		fourth += float64(r*r) * float64(r*r) / t.Degrees
	}
	return square * square / fourth, nil
}

// StudentFactor returns the coverage factor k with P(|t| <= k) = level for
// Student's distribution of nu degrees of freedom, whole or not; +Inf gives
// the normal distribution. It is good to eight digits, as the incomplete beta
// function behind it is. Source: JCGM 100:2008 table G.2 (from memory). It is
// not ok for nu <= 0 and for a level outside 0 to 1, both ends excluded.
func StudentFactor(level, nu float64) (k float64, ok bool) {
	if !(nu > 0) || !(level > 0 && level < 1) {
		return math.NaN(), false
	}
	upper := 0.5 + level/2
	if math.IsInf(nu, 1) {
		return distuv.UnitNormal.Quantile(upper), true
	}
	return distuv.StudentsT{Sigma: 1, Nu: nu}.Quantile(upper), true
}
