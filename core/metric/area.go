package metric

import (
	"math"
	"slices"

	"gonum.org/v1/gonum/stat/distuv"
)

// Area returns the area between the distribution functions of two samples, in
// their unit: the mean distance one must move values to turn one sample into
// the other. No form of the distributions is assumed, and equal means can be
// far apart. Source: Ferson, Oberkampf and Ginzburg 2008, Computer Methods in
// Applied Mechanics and Engineering 197, 2408 (formula from memory):
//
//	d = integral of |F_a(x) - F_b(x)| dx.
//
// NaN where a sample is empty or holds a value that is not finite.
func Area(a, b []float64) float64 {
	a, okA := ascending(a)
	b, okB := ascending(b)
	if !okA || !okB {
		return math.NaN()
	}
	sum, i, j := 0.0, 0, 0
	before := min(a[0], b[0])
	for i < len(a) || j < len(b) {
		var x float64
		if j == len(b) || i < len(a) && a[i] <= b[j] {
			x = a[i]
		} else {
			x = b[j]
		}
		height := math.Abs(float64(i)/float64(len(a)) - float64(j)/float64(len(b)))
		sum += float64(height * (x - before))
		for i < len(a) && a[i] == x {
			i++
		}
		for j < len(b) && b[j] == x {
			j++
		}
		before = x
	}
	return sum
}

// AreaNormal returns the area between a normal distribution and the
// distribution function of a sample, by the integral s (z Phi(z) + phi(z)) of
// Phi((x - mean)/s). NaN for an empty sample, a value that is not finite, or a
// deviation that is not positive.
func AreaNormal(mean, deviation float64, sample []float64) float64 {
	x, ok := ascending(sample)
	if !ok || !(deviation > 0) || math.IsInf(deviation, 1) || math.IsNaN(mean) || math.IsInf(mean, 0) {
		return math.NaN()
	}
	n := float64(len(x))
	z := func(v float64) float64 { return (v - mean) / deviation }
	// below and above are the integrals of Phi up to z, and of 1 - Phi from z on.
	below := func(z float64) float64 { return float64(z*distuv.UnitNormal.CDF(z)) + distuv.UnitNormal.Prob(z) }
	above := func(z float64) float64 { return distuv.UnitNormal.Prob(z) - float64(z*distuv.UnitNormal.Survival(z)) }
	between := func(from, to, height float64) float64 {
		return below(to) - below(from) - float64(height*(to-from))
	}
	sum := below(z(x[0])) + above(z(x[len(x)-1]))
	for k := 1; k < len(x); k++ {
		from, to, height := z(x[k-1]), z(x[k]), float64(k)/n
		cross := min(max(distuv.UnitNormal.Quantile(height), from), to)
		sum += math.Abs(between(from, cross, height)) + math.Abs(between(cross, to, height))
	}
	return sum * deviation
}

// ascending returns the values in order, not ok where there are none or one is
// not finite.
func ascending(values []float64) ([]float64, bool) {
	for _, v := range values {
		if math.IsNaN(v) || math.IsInf(v, 0) {
			return nil, false
		}
	}
	sorted := slices.Clone(values)
	slices.Sort(sorted)
	return sorted, len(sorted) > 0
}
