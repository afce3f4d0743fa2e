package settling

import (
	"math"

	"weirmark/core/quantity"
)

// Geometric is what a sequence that closes in on its limit by a constant
// ratio leaves to come.
type Geometric struct {
	Ratio     float64 // of successive changes; negative where they alternate
	Remaining float64 // limit less last value: to be added
	Fit       float64 // share of the scatter of ln|change| that the ratio explains, 0 to 1
}

// Extrapolate fits the ratio rho by least squares of ln|change| against its
// number and returns what remains, change_n rho/(1-rho) with the last change.
// It needs three changes, all of one sign or strictly alternating, none zero,
// and |rho| < 1: else ok is false. The formula is from memory.
func Extrapolate(y []float64) (g Geometric, ok bool) {
	if len(y) < 4 {
		return Geometric{}, false
	}
	n := len(y) - 1
	logs := make([]float64, n)
	same, alternate := 0, 0
	for i := range logs {
		d := y[i+1] - y[i]
		if d == 0 {
			return Geometric{}, false
		}
		logs[i] = math.Log(math.Abs(d))
		if i == 0 {
			continue
		}
		if (d > 0) == (y[i]-y[i-1] > 0) {
			same++
		} else {
			alternate++
		}
	}
	if same > 0 && alternate > 0 {
		return Geometric{}, false
	}
	l := fit(logs)
	_, all := spread(logs)
	_, left := spread(l.rest(logs))
	if !(l.slope < 0) || !(math.Exp(l.slope) < 1) || all == 0 {
		return Geometric{}, false
	}
	g.Ratio = math.Exp(l.slope)
	if alternate > 0 {
		g.Ratio = -g.Ratio
	}
	g.Remaining = (y[n] - y[n-1]) * g.Ratio / (1 - g.Ratio)
	g.Fit = max(1-float64(left/all)*float64(left/all), 0)
	return g, true
}

// Blocks of a window whose means are extrapolated, and the fit they must
// have to be believed. No source.
const (
	blocks   = 8
	leastFit = 0.9
)

// decay extrapolates the means of eight equal blocks of y, so that noise from
// row to row does not hide the approach. It returns the length of a block, what
// remains from the mean of the last block and what remains from the last row.
func decay(y []float64) (size int, fromMean, fromEnd float64, ok bool) {
	size = len(y) / blocks
	if size < 2 {
		return 0, 0, 0, false
	}
	y = y[len(y)-blocks*size:]
	means := make([]float64, blocks)
	for i := range means {
		means[i] = mean(y[i*size : (i+1)*size])
	}
	g, ok := Extrapolate(means)
	if !ok || g.Ratio <= 0 || quantity.Round(g.Fit, 10) < leastFit {
		return 0, 0, 0, false
	}
	// A block's mean is off the limit by a (1-q^m)/(m (1-q)), its last row by
	// a q^(m-1), with q the ratio from row to row and m rows a block.
	m := float64(size)
	log := math.Log(g.Ratio) / m
	share := m * math.Expm1(log) / math.Expm1(m*log) * math.Exp(log*(m-1))
	return size, g.Remaining, g.Remaining * share, true
}
