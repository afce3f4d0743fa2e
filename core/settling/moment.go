package settling

import (
	"math"

	"weirmark/core/quantity"
)

// mean returns the mean of y, summed about its first value.
func mean(y []float64) float64 {
	sum := 0.
	for _, v := range y {
		sum += v - y[0]
	}
	return y[0] + sum/float64(len(y))
}

// spread returns the mean and the standard deviation with divisor n-1; the
// latter is 0 for one value.
func spread(y []float64) (m, sd float64) {
	m = mean(y)
	if len(y) < 2 {
		return m, 0
	}
	sum := 0.
	for _, v := range y {
		sum += float64((v - m) * (v - m))
	}
	return m, math.Sqrt(sum / float64(len(y)-1))
}

// halfRange returns half the difference of the extremes of y.
func halfRange(y []float64) float64 {
	lo, hi := y[0], y[0]
	for _, v := range y {
		lo, hi = min(lo, v), max(hi, v)
	}
	return (hi - lo) / 2
}

// line is a straight fit y = m + slope (i - (n-1)/2) over the rows i.
type line struct{ mean, slope float64 }

func fit(y []float64) line {
	n := float64(len(y))
	l := line{mean: mean(y)}
	sum := 0.
	for i, v := range y {
		sum += float64((float64(i) - (n-1)/2) * (v - l.mean))
	}
	if n > 1 {
		l.slope = sum * 12 / (n * (n - 1) * (n + 1))
	}
	return l
}

func (l line) at(i, n int) float64 {
	return l.mean + float64(l.slope*(float64(i)-float64(n-1)/2))
}

// rest returns y less the line.
func (l line) rest(y []float64) []float64 {
	e := make([]float64, len(y))
	for i, v := range y {
		e[i] = v - l.at(i, len(y))
	}
	return e
}

// clear reports whether the slope exceeds four of its standard deviations, more
// where few independent rows are left: as many as the autocorrelation of the
// rest says, two of which the line takes. (Four: no source.)
func (l line) clear(y []float64) bool {
	n := len(y)
	if n < 4 {
		return false
	}
	e := l.rest(y)
	_, sd := spread(e)
	independent := max(float64(n)/max(correlationTime(e), 1), 3)
	span := float64(n - 1)
	return quantity.Round(math.Abs(l.slope*span), 10) > quantity.Round(4*sd*math.Sqrt(12/(independent-2)), 10)
}
