package settling

import "math"

// Limits of the search for a cycle. No source.
const (
	leastCycles      = 3   // whole cycles in the window
	leastRepeat      = 0.4 // autocorrelation one period on
	leastSecond      = 0.3 // and two periods on
	leastRepeatLater = 0.2 // and at further periods, to sharpen the period
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
	return period, float64(n) >= leastCycles*period*(1-1e-9)
}

// correlogram returns the autocorrelation up to two thirds of the record,
// each lag over as many products as it has.
func correlogram(e []float64) []float64 {
	n := len(e)
	g := autocovariance(e)
	r := make([]float64, 2*n/3+2)
	for k := range r {
		r[k] = g[k] / g[0] * float64(n) / float64(n-k)
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
	c := cycle{period: period, count: int(float64(len(y))/period + 1e-9)}
	rows := func(k int) int { return min(int(math.Round(float64(k)*period)), len(y)) }
	one := rows(1)
	oldest := y[len(y)-rows(c.count):]
	if halfRange(oldest[:one]) > 2*halfRange(y[len(y)-one:]) && c.count > leastCycles {
		c.shrinking, c.count = true, leastCycles
	}
	c.length = rows(c.count)
	c.halfRange = halfRange(y[len(y)-c.length:])
	means := unitMeans(y, float64(c.count)*period)
	c.mean = means[len(means)-1]
	return c
}

// unitMeans returns the means over successive stretches of length rows, which
// need not be whole: the rows at the ends count by their part. The stretches
// end at the end of y; what does not fill one is left out at its front.
func unitMeans(y []float64, length float64) []float64 {
	n := len(y)
	count := int(float64(n)/length + 1e-9)
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
