package uncertainty

import "math"

// Source is the standard uncertainty of one cause at every station.
type Source struct {
	U      []float64 // >= 0; NaN where it is not known
	Common bool      // the same unknown error at all stations, scaled by U
}

// Budget is the covariance of the stations: V = diag(Variance) + sum of
// c cᵀ over the columns of Common.
type Budget struct {
	Variance []float64
	Common   [][]float64
}

// Combine returns the budget of independent causes over n stations. Stations
// where a source is NaN have a NaN variance: unknown, not zero.
func Combine(n int, sources []Source) Budget {
	b := Budget{Variance: make([]float64, n)}
	for _, s := range sources {
		if s.Common {
			b.Common = append(b.Common, s.U)
			continue
		}
		for i, u := range s.U {
			b.Variance[i] += float64(u * u)
		}
	}
	return b
}

// Total returns the standard uncertainty at every station, the square root of
// the diagonal of V.
func (b Budget) Total() []float64 {
	total := make([]float64, len(b.Variance))
	copy(total, b.Variance)
	for _, c := range b.Common {
		for i, u := range c {
			total[i] += float64(u * u)
		}
	}
	for i, v := range total {
		total[i] = math.Sqrt(v)
	}
	return total
}

// Constant returns n stations of the same standard uncertainty.
func Constant(n int, u float64) []float64 {
	all := make([]float64, n)
	for i := range all {
		all[i] = u
	}
	return all
}

// OfReading returns fraction times |d| at every station.
func OfReading(d []float64, fraction float64) []float64 {
	all := make([]float64, len(d))
	for i, v := range d {
		all[i] = math.Abs(v) * fraction
	}
	return all
}

// Scaled returns u divided by the coverage factor k.
func Scaled(u []float64, k float64) []float64 {
	all := make([]float64, len(u))
	for i, v := range u {
		all[i] = v / k
	}
	return all
}

// Replicates returns the mean of repeated readings, their standard deviation
// (divisor n-1) and the standard uncertainty of the mean s/sqrt(n), JCGM
// 100:2008 4.2 (clause from memory). Fewer than two readings have no s, none
// have no mean. Readings are taken from the first one, so that a large common
// part takes no digits.
func Replicates(x []float64) (mean, s, u float64) {
	if len(x) == 0 {
		return math.NaN(), math.NaN(), math.NaN()
	}
	n := float64(len(x))
	sum := 0.0
	for _, v := range x {
		sum += v - x[0]
	}
	mean = x[0] + sum/n
	if len(x) < 2 {
		return mean, math.NaN(), math.NaN()
	}
	squares := 0.0
	for _, v := range x {
		squares += float64((v - mean) * (v - mean))
	}
	s = math.Sqrt(squares / (n - 1))
	return mean, s, s / math.Sqrt(n)
}
