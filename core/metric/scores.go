package metric

import (
	"errors"
	"math"

	"weirmark/core/quantity"
	"weirmark/core/uncertainty"
)

// ErrSigned refuses scores whose definitions need values that do not change
// sign: of a velocity that does, they mean nothing.
var ErrSigned = errors.New("the scores need values that are not negative; these change sign")

// ErrPositive refuses the geometric scores where a value is zero.
var ErrPositive = errors.New("the geometric scores need positive values")

// ErrEmpty refuses scores of no pairs.
var ErrEmpty = errors.New("there are no pairs to score")

// Scores are the measures of the dispersion and wind fields. FB above zero is
// under-prediction, while E = S - D above zero is over-prediction: whoever
// prints FB prints the word with it.
type Scores struct {
	N    int
	FB   float64 // fractional bias, 2(mean D - mean S)/(mean D + mean S)
	NMSE float64 // mean (D - S)² / (mean D · mean S)
	// Systematic is the part of NMSE that the mean bias alone makes,
	// 4 FB²/(4 - FB²).
	Systematic float64
	FAC2       float64 // share of pairs with 0.5 <= S/D <= 2
	NAD        float64 // mean |D - S| / (mean D + mean S)
	R          float64 // correlation; only beside bias and slope
	Slope      float64 // of S on D, least squares
	Below      int     // pairs with both values below the threshold: they count in FAC2 as met
}

// Dispersion returns the scores of s against d, which must not be negative.
// Pairs with both values at or below the threshold count as met in FAC2, pairs
// with D alone at or below it by S against the threshold. Source of the
// definitions: Chang and Hanna 2004, Meteorol. Atmos. Phys. 87, 167 (as
// recorded with the published examples); the threshold rule is common
// practice, no source.
func Dispersion(s, d []float64, threshold float64) (Scores, error) {
	if len(d) == 0 {
		return Scores{}, ErrEmpty
	}
	n := float64(len(d))
	var meanS, meanD, square, absolute float64
	r := Scores{N: len(d)}
	met := 0
	for i := range d {
		if s[i] < 0 || d[i] < 0 {
			return Scores{}, ErrSigned
		}
		meanS += s[i] / n
		meanD += d[i] / n
		e := s[i] - d[i]
		square += float64(e*e) / n
		absolute += math.Abs(e) / n
		below := s[i] <= threshold && d[i] <= threshold
		if below {
			r.Below++
		}
		if below || within2(s[i], max(d[i], threshold)) {
			met++
		}
	}
	if !(meanS > 0) || !(meanD > 0) {
		return Scores{}, ErrPositive
	}
	r.FB = 2 * (meanD - meanS) / (meanD + meanS)
	r.NMSE = square / float64(meanD*meanS)
	r.Systematic = 4 * float64(r.FB*r.FB) / (4 - float64(r.FB*r.FB))
	r.FAC2 = float64(met) / n
	r.NAD = absolute / (meanD + meanS)
	l := Fit(s, d)
	r.R, r.Slope = l.R, l.Slope
	return r, nil
}

// within2 decides on rounded values, so that every host counts alike.
func within2(s, d float64) bool {
	ratio := quantity.Round(s/d, 10)
	return ratio >= 0.5 && ratio <= 2
}

// Geometric returns the geometric mean bias MG = exp(mean ln D - mean ln S)
// and variance VG = exp(mean (ln D - ln S)²) of positive values.
func Geometric(s, d []float64) (mg, vg float64, err error) {
	if len(d) == 0 {
		return 0, 0, ErrEmpty
	}
	n, mean, square := float64(len(d)), 0.0, 0.0
	for i := range d {
		if !(s[i] > 0) || !(d[i] > 0) {
			if s[i] < 0 || d[i] < 0 {
				return 0, 0, ErrSigned
			}
			return 0, 0, ErrPositive
		}
		l := math.Log(d[i]) - math.Log(s[i])
		mean += l / n
		square += float64(l*l) / n
	}
	return math.Exp(mean), math.Exp(square), nil
}

// HitRate returns the share of pairs with |S - D| <= fraction·|D| or
// |S - D| <= allowance, the allowance in the unit of the data: it comes from
// their uncertainty. Signs do not matter.
func HitRate(s, d []float64, fraction, allowance float64) (float64, error) {
	return HitRateWithin(s, d, fraction, uncertainty.Constant(len(d), allowance))
}

// HitRateWithin is HitRate with an allowance at every station; NaN allows
// nothing.
func HitRateWithin(s, d []float64, fraction float64, allowance []float64) (float64, error) {
	if len(d) == 0 {
		return 0, ErrEmpty
	}
	hits := 0
	for i := range d {
		e := quantity.Round(math.Abs(s[i]-d[i]), 10)
		if e <= quantity.Round(fraction*math.Abs(d[i]), 10) || e <= quantity.Round(allowance[i], 10) {
			hits++
		}
	}
	return float64(hits) / float64(len(d)), nil
}

// Percent returns 100 (S - D)/|D| where |D| is above the threshold, NaN
// elsewhere, and the number withheld.
func Percent(s, d []float64, threshold float64) (percent []float64, withheld int) {
	percent = make([]float64, len(d))
	for i := range d {
		if math.Abs(d[i]) > threshold {
			percent[i] = 100 * (s[i] - d[i]) / math.Abs(d[i])
			continue
		}
		percent[i] = math.NaN()
		withheld++
	}
	return percent, withheld
}

// Weighted returns the bias, MAE and RMSE with weights that are scaled to sum
// one. It is not ok where they are negative or all zero.
func Weighted(e, weight []float64) (bias, mae, rmse float64, ok bool) {
	sum := 0.0
	for _, w := range weight {
		if !(w >= 0) {
			return 0, 0, 0, false
		}
		sum += w
	}
	if !(sum > 0) {
		return 0, 0, 0, false
	}
	square := 0.0
	for i, v := range e {
		w := weight[i] / sum
		bias += float64(w * v)
		mae += float64(w * math.Abs(v))
		square += float64(w * float64(v*v))
	}
	return bias, mae, math.Sqrt(square), true
}

// Agreement are the limits of agreement of paired readings after Bland and
// Altman 1986, Lancet i, 307: mean difference ± 1.96 standard deviations.
type Agreement struct {
	N                   int
	Bias, SD, Low, High float64
	BiasU, LimitU       float64 // standard uncertainties of the bias and of a limit, SD/√n and SD·√(3/n)
}

// Limits returns the limits of agreement of e; fewer than two differences have
// none.
func Limits(e []float64) (Agreement, bool) {
	n := float64(len(e))
	if len(e) < 2 {
		return Agreement{}, false
	}
	a := Agreement{N: len(e)}
	for _, v := range e {
		a.Bias += v / n
	}
	square := 0.0
	for _, v := range e {
		square += float64((v - a.Bias) * (v - a.Bias))
	}
	a.SD = math.Sqrt(square / (n - 1))
	a.Low, a.High = a.Bias-float64(1.96*a.SD), a.Bias+float64(1.96*a.SD)
	a.BiasU, a.LimitU = a.SD/math.Sqrt(n), a.SD*math.Sqrt(3/n)
	return a, true
}
