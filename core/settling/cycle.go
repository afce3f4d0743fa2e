package settling

import (
	"math"

	"weirmark/core/quantity"
)

// Limits of the search for a cycle. No source.
const (
	leastCycles      = 3    // whole cycles in the window
	leastRepeat      = 0.4  // autocorrelation one period on
	leastSecond      = 0.3  // and two periods on
	leastRepeatLater = 0.2  // and at further periods, to sharpen the period
	wholeSlack       = 0.01 // of a period that may lack in a whole number of them
)

// findPeriod returns the period of y in rows, where y less a straight line
// repeats itself: the autocorrelation has a clear trough, a peak one period on
// and another two periods on, and the record holds three whole periods. The
// period is sharpened at the latest peak that still stands out.
func findPeriod(y []float64) (period float64, ok bool) {
	n := len(y)
	if n < 12 {
		return 0, false
	}
	e := fit(y).rest(y)
	if _, sd := spread(e); sd <= rounding*largest(y) {
		return 0, false
	}
	r := correlogram(e)
	first := 1
	for first < len(r) && r[first] >= 0 {
		first++
	}
	lag := firstPeak(r, first, n/leastCycles)
	if lag == 0 || r[lag] < leastRepeat || lowest(r[:lag]) > -r[lag]/5 {
		return 0, false
	}
	period = sharpened(r, lag)
	for m := 2; float64(m)*period < float64(len(r)-1); m++ {
		peak := highest(r, float64(m)*period, max(period/4, 1))
		least := leastRepeatLater
		if m == 2 {
			least = leastSecond
		}
		if peak == 0 || r[peak] < least {
			if m == 2 {
				return 0, false
			}
			break
		}
		period = sharpened(r, peak) / float64(m)
	}
	whole := int(math.Floor(float64(n)/period)*period + 0.5)
	period = fitted(e[n-min(whole, n):], period)
	return period, float64(n) >= (leastCycles-wholeSlack)*period
}

// cycleFrom looks for a period behind the start-up, and where there is none
// also from earlier rows on: a cycle misleads the rule for the start-up, and
// whole cycles are counted from the end. It returns the first row of the part
// that repeats itself, and the period in rows.
func cycleFrom(y []float64, startUp int) (from int, period float64, ok bool) {
	for part := 3; part > 0; part-- {
		from = startUp * part / 3
		if period, ok = findPeriod(y[from:]); ok {
			return from, period, true
		}
		if startUp == 0 {
			break
		}
	}
	return startUp, 0, false
}

// cycle returns the first row of the part that repeats itself and its period in
// rows: the declared one where it is two rows or more and three whole cycles of
// it lie behind from, else what is found. A declared start is kept.
func (r *record) cycle(from int, opt Options) (first int, period float64, ok bool) {
	if opt.Period > 0 {
		period = opt.Period / r.step
		if period >= 2 && float64(len(r.y)-from) >= (leastCycles-wholeSlack)*period {
			return from, period, true
		}
		r.tell("sampling-period", quantity.Text(opt.Period, 4), opt.axis(), opt.name(), leastCycles)
	}
	if opt.Declared {
		period, ok = findPeriod(r.y[from:])
		return from, period, ok
	}
	return cycleFrom(r.y, from)
}

// fitted returns the period near the given one, within two fifths of what the
// record resolves, for which a sine on a straight line leaves the least of e:
// the autocorrelation of a few cycles is skewed by the line taken off. e holds
// whole cycles, nearly. Forty
// steps of a golden section, each linear in len(e).
func fitted(e []float64, period float64) float64 {
	reach := period * min(0.06, 0.4*period/float64(len(e)))
	lo, hi := period-reach, period+reach
	golden := (math.Sqrt(5) - 1) / 2
	a, b := hi-golden*(hi-lo), lo+golden*(hi-lo)
	fa, fb := explained(e, a), explained(e, b)
	for range 40 {
		if fa >= fb {
			hi, b, fb = b, a, fa
			a = hi - golden*(hi-lo)
			fa = explained(e, a)
		} else {
			lo, a, fa = a, b, fb
			b = lo + golden*(hi-lo)
			fb = explained(e, b)
		}
	}
	return (lo + hi) / 2
}

// explained returns the sum of squares of e that a constant, a line, a cosine
// and a sine of the period explain together: b·x of the normal equations
// A x = b, whose matrix is positive definite for two periods or more.
func explained(e []float64, period float64) float64 {
	const terms = 4
	var a [terms][terms]float64
	var b [terms]float64
	n := float64(len(e))
	turnSin, turnCos := math.Sincos(2 * math.Pi / period)
	sin, cos := 0., 1.
	for i, v := range e {
		row := [terms]float64{1, 2*float64(i)/n - 1, cos, sin}
		for j := range terms {
			for k := range j + 1 {
				a[j][k] += float64(row[j] * row[k])
			}
			b[j] += float64(row[j] * v)
		}
		sin, cos = float64(sin*turnCos)+float64(cos*turnSin), float64(cos*turnCos)-float64(sin*turnSin)
	}
	// With A = L L^T the sum is |L^-1 b|^2.
	sum := 0.
	for j := range terms {
		for k := range j + 1 {
			for m := range k {
				a[j][k] -= float64(a[j][m] * a[k][m])
			}
			if k < j {
				a[j][k] /= a[k][k]
				b[j] -= float64(a[j][k] * b[k])
			}
		}
		// A period of two rows has no sine: what is left of it explains nothing.
		if a[j][j] <= rounding*n {
			return sum
		}
		a[j][j] = math.Sqrt(a[j][j])
		b[j] /= a[j][j]
		sum += float64(b[j] * b[j])
	}
	return sum
}

// correlogram returns the autocorrelation up to two thirds of the record,
// each lag over as many products as it has, to nine decimals, so that what is
// a peak does not hang on last bits.
func correlogram(e []float64) []float64 {
	n := len(e)
	g := autocovariance(e)
	r := make([]float64, 2*n/3+2)
	for k := range r {
		r[k] = math.Round(g[k]/g[0]*float64(n)/float64(n-k)*1e9) / 1e9
	}
	return r
}

// firstPeak returns the first peak of r from lag first to last that reaches
// nine tenths of the highest there, moved to the top of its surroundings; 0
// where there is none.
func firstPeak(r []float64, first, last int) int {
	peak := func(k int) bool { return r[k] >= r[k-1] && r[k] >= r[k+1] }
	last = min(last, len(r)-2)
	top := 0.
	for k := max(first, 2); k <= last; k++ {
		if peak(k) {
			top = max(top, r[k])
		}
	}
	for k := max(first, 2); k <= last; k++ {
		if peak(k) && top > 0 && r[k] >= 0.9*top {
			return highest(r, float64(k), max(float64(k)/5, 1))
		}
	}
	return 0
}

// highest returns the lag of the peak of r within reach of about; 0 where the
// highest value there is no peak.
func highest(r []float64, about, reach float64) int {
	lo, hi := max(int(math.Ceil(about-reach)), 1), min(int(math.Floor(about+reach)), len(r)-2)
	best := 0
	for k := lo; k <= hi; k++ {
		if best == 0 || r[k] > r[best] {
			best = k
		}
	}
	if best > 0 && (r[best] < r[best-1] || r[best] < r[best+1]) {
		return 0
	}
	return best
}

// sharpened returns the place of the parabola's top through a peak and its
// neighbours.
func sharpened(r []float64, k int) float64 {
	down := r[k-1] - 2*r[k] + r[k+1]
	if down >= 0 {
		return float64(k)
	}
	return float64(k) + (r[k-1]-r[k+1])/(2*down)
}

func lowest(r []float64) float64 {
	least := r[0]
	for _, v := range r {
		least = min(least, v)
	}
	return least
}

// cycle is the part of a window that holds whole cycles, up to its end.
type cycle struct {
	period    float64 // rows
	count     int     // whole cycles
	length    int     // rows they take, rounded
	mean      float64 // over the whole cycles
	halfRange float64
	shrinking bool // the first cycle is more than twice the last: the last three are used
}

// cycleOf returns the whole cycles at the end of y.
func cycleOf(y []float64, period float64) cycle {
	c := cycle{period: period, count: int(float64(len(y))/period + wholeSlack)}
	rows := func(k int) int { return min(int(math.Round(float64(k)*period)), len(y)) }
	one := rows(1)
	oldest := y[len(y)-rows(c.count):]
	if halfRange(oldest[:one]) > 2*halfRange(y[len(y)-one:]) && c.count > leastCycles {
		c.shrinking, c.count = true, leastCycles
	}
	c.length = rows(c.count)
	c.halfRange = halfRange(y[len(y)-c.length:])
	means := unitMeans(y, min(float64(c.count)*period, float64(len(y))))
	c.mean = means[len(means)-1]
	return c
}

// unitMeans returns the means over successive stretches of length rows, which
// need not be whole: the rows at the ends count by their part. The stretches
// end at the end of y; what does not fill one, to half a row, is left out at
// its front.
func unitMeans(y []float64, length float64) []float64 {
	n := len(y)
	count := int((float64(n) + 0.5) / length)
	base := mean(y)
	total := make([]float64, n+1)
	for i, v := range y {
		total[i+1] = total[i] + (v - base)
	}
	until := func(x float64) float64 {
		x = min(max(x, 0), float64(n))
		i := min(int(x), n-1)
		return total[i] + float64((x-float64(i))*(total[i+1]-total[i]))
	}
	means := make([]float64, count)
	for j := range means {
		end := float64(n) - float64(count-1-j)*length
		means[j] = base + (until(end)-until(end-length))/length
	}
	return means
}

// unit returns the length in rows of the least number of whole cycles that
// takes eight rows or more: over fewer, the ends weigh too much.
func unit(period float64) float64 { return period * math.Ceil(8/period) }
