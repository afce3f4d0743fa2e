package settling

import (
	"math"

	"gonum.org/v1/gonum/dsp/fourier"
)

// LagOne returns the autocorrelation of successive values,
// sum (y_i - m)(y_(i+1) - m) / sum (y_i - m)^2, and 0 for values that are all
// equal. Source: the definition of NIST's statistical reference datasets.
func LagOne(y []float64) float64 {
	if len(y) < 2 {
		return 0
	}
	m := mean(y)
	up, down := 0., 0.
	for i, v := range y {
		down += float64((v - m) * (v - m))
		if i > 0 {
			up += float64((v - m) * (y[i-1] - m))
		}
	}
	if down == 0 {
		return 0
	}
	return up / down
}

// autocovariance returns sum (y_i - m)(y_(i+k) - m)/n for k = 0 ... n-1, by
// the transform of y padded with as many zeros, in n log n.
func autocovariance(y []float64) []float64 {
	n := len(y)
	size := 2
	for size < 2*n {
		size *= 2
	}
	padded := make([]float64, size)
	m := mean(y)
	for i, v := range y {
		padded[i] = v - m
	}
	transform := fourier.NewFFT(size)
	spectrum := transform.Coefficients(nil, padded)
	for i, c := range spectrum {
		spectrum[i] = complex(float64(real(c)*real(c))+float64(imag(c)*imag(c)), 0)
	}
	transform.Sequence(padded, spectrum)
	for i := range n {
		padded[i] /= float64(size) * float64(n)
	}
	return padded[:n]
}

// leastTime bounds the correlation time from below: alternating values can
// make the mean better than independent ones would, but not beyond all
// measure. No source.
const leastTime = 0.1

// correlationTime returns the factor by which correlation multiplies the
// variance of a mean, in rows: 1 + 2 sum r_k, summed over pairs of lags as
// long as the pairs stay positive, each no larger than the one before (the
// initial monotone sequence of Geyer, Statistical Science 7 (1992) 473, from
// memory). It is 1 for values that are all equal.
func correlationTime(y []float64) float64 {
	if len(y) < 4 {
		return 1
	}
	g := autocovariance(y)
	if _, sd := spread(y); g[0] <= 0 || sd <= rounding*largest(y) {
		return 1
	}
	sum, before := 0., math.Inf(1)
	for k := 0; k+1 < len(g); k += 2 {
		pair := min((g[k]+g[k+1])/g[0], before)
		if pair <= 0 {
			break
		}
		sum += pair
		before = pair
	}
	return max(2*sum-1, leastTime)
}

// rounding is the part of the largest value below which a spread is none.
const rounding = 1e-13

func largest(y []float64) float64 {
	m := 0.
	for _, v := range y {
		m = max(m, math.Abs(v))
	}
	return m
}

// MarkovFactor returns N var(mean)/s^2 for a first-order Markov series of
// lag-one autocorrelation rho in (-1, 1): its limit (1+rho)/(1-rho) for long
// series and the value for n >= 1 rows, which is less by
// 2 rho (1-rho^n)/(n (1-rho)^2). The formula is from memory.
func MarkovFactor(rho float64, n int) (limit, exact float64) {
	limit = (1 + rho) / (1 - rho)
	exact = limit - 2*rho*(1-math.Pow(rho, float64(n)))/(float64(n)*(1-rho)*(1-rho))
	return limit, exact
}
