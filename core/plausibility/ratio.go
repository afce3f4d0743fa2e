package plausibility

import (
	"math"
	"sort"
)

// Cause is a known reason for a constant ratio between two sides.
type Cause struct {
	Ratio float64
	Words string
}

// causes are ratios of units and references that are mixed up in practice
// (common practice, no source); each also counts the other way round.
var causes = []Cause{
	{1000, "millimetres against metres, or kilopascals against pascals"},
	{100, "centimetres against metres, or percent against fractions"},
	{25.4, "inches against millimetres"},
	{2, "a factor 2: half model, dynamic pressure without its ½, or peak against amplitude"},
	{180 / math.Pi, "degrees against radians"},
	{1.8, "temperature steps in °F against °C"},
	{9.80665, "kilogram-force against newton"},
}

// Ratio is a nearly constant ratio S/D.
type Ratio struct {
	Value  float64 // median
	Spread float64 // half the width that holds the middle two thirds
	Cause  string  // "" where no known cause is near
}

const (
	leastStations = 5     // fewer say nothing about constancy
	steady        = 0.02  // relative spread that counts as constant
	nearOne       = 0.05  // ratios this close to one are differences of models
	nearCause     = 0.015 // relative distance to a known cause
)

// ConstantRatio returns the ratio of s to d where it is nearly the same at all
// stations, is far from one, and d varies enough that this means something.
// Known adds causes of the case, such as its density. Stations where |d| is
// below a twentieth of its largest value have no meaningful ratio.
func ConstantRatio(s, d []float64, known []Cause) (Ratio, bool) {
	largest, lo, hi := 0.0, math.Inf(1), math.Inf(-1)
	for _, v := range d {
		largest, lo, hi = max(largest, math.Abs(v)), min(lo, v), max(hi, v)
	}
	if !(hi-lo > 0.1*largest) {
		return Ratio{}, false
	}
	var ratios []float64
	for i := range d {
		if math.Abs(d[i]) >= largest/20 {
			ratios = append(ratios, s[i]/d[i])
		}
	}
	if len(ratios) < leastStations || 2*len(ratios) < len(d) {
		return Ratio{}, false
	}
	r := Ratio{}
	r.Value, r.Spread = middle(ratios)
	if r.Value == 0 || !(r.Spread <= steady*math.Abs(r.Value)) || math.Abs(r.Value-1) < nearOne {
		return Ratio{}, false
	}
	r.Cause = causeOf(r.Value, known)
	return r, true
}

// causeOf returns the words of the nearest known cause.
func causeOf(ratio float64, known []Cause) string {
	words, nearest := "", nearCause
	for _, c := range append(append([]Cause{}, known...), causes...) {
		for _, target := range []float64{c.Ratio, 1 / c.Ratio} {
			if far := math.Abs(ratio/target - 1); far < nearest {
				words, nearest = c.Words, far
			}
		}
	}
	return words
}

// middle returns the median and half the width of the middle two thirds.
func middle(values []float64) (median, half float64) {
	sorted := append([]float64{}, values...)
	sort.Float64s(sorted)
	return quantile(sorted, 0.5), (quantile(sorted, 5./6) - quantile(sorted, 1./6)) / 2
}

// quantile interpolates linearly in sorted values.
func quantile(sorted []float64, q float64) float64 {
	at := q * float64(len(sorted)-1)
	i := int(at)
	if i+1 >= len(sorted) {
		return sorted[len(sorted)-1]
	}
	return sorted[i] + float64((at-float64(i))*(sorted[i+1]-sorted[i]))
}

// ConstantOffset returns the median of e and half its spread where e is
// nearly the same everywhere against its own size and small changes only.
// Scale is the range of d: an offset below a hundredth of it says nothing.
func ConstantOffset(e []float64, scale float64) (offset, half float64, ok bool) {
	if len(e) < leastStations {
		return 0, 0, false
	}
	offset, half = middle(e)
	return offset, half, math.Abs(offset) > 0.05*scale && half <= 0.05*math.Abs(offset)
}

// ScaledRange returns the factor of ten, a thousand or an inch by which the
// range of a would have to be multiplied to lie like the range of b, where the
// two do not overlap as they are but would then nearly coincide.
func ScaledRange(aLo, aHi, bLo, bHi float64) (factor float64, ok bool) {
	if !(aHi > aLo) || !(bHi > bLo) {
		return 0, false
	}
	if coincide(aLo, aHi, bLo, bHi) {
		return 0, false
	}
	nearest := math.Inf(1)
	for _, f := range []float64{1000, 1. / 1000, 100, 1. / 100, 10, 0.1, 25.4, 1 / 25.4, 0.0254, 1 / 0.0254} {
		far := math.Abs(math.Log(f * (aHi - aLo) / (bHi - bLo)))
		if far < nearest && coincide(f*aLo, f*aHi, bLo, bHi) {
			factor, nearest, ok = f, far, true
		}
	}
	return factor, ok
}

// ScaledLength returns the factor of a thousand or a hundred by which stations
// would have to be multiplied to lie along a reference length, where they reach
// so many times as far; not ok where they may lie as they are. Wakes of tens of
// lengths and wall layers of hundredths are lines too, so that nothing else is
// asked about (common practice, no source).
func ScaledLength(reach float64) (factor float64, ok bool) {
	for _, s := range []struct{ factor, least, most float64 }{{1. / 1000, 0.15, 3}, {1. / 100, 0.5, 1.5}, {1000, 0.5, 1.5}} {
		if at := s.factor * reach; at >= s.least && at <= s.most {
			return s.factor, true
		}
	}
	return 0, false
}

// coincide reports whether the widths of two ranges are within a factor 1.6
// and most of the shorter lies in the longer.
func coincide(aLo, aHi, bLo, bHi float64) bool {
	width := (aHi - aLo) / (bHi - bLo)
	common := min(aHi, bHi) - max(aLo, bLo)
	return width > 1/1.6 && width < 1.6 && common > 0.6*min(aHi-aLo, bHi-bLo)
}

// ReplicateRatio returns the index and the ratio of the one reading that is a
// steady multiple, at least 1.5 times or at most two thirds, of all others.
func ReplicateRatio(readings []float64) (at int, ratio float64, ok bool) {
	if len(readings) < 4 {
		return 0, 0, false
	}
	median, _ := middle(readings)
	found := -1
	for i, v := range readings {
		r := v / median
		switch {
		case !(r > 0):
			return 0, 0, false
		case r > 1.5 || r < 1/1.5:
			if found >= 0 {
				return 0, 0, false
			}
			found, ratio = i, r
		case math.Abs(r-1) > 0.1:
			return 0, 0, false
		}
	}
	return found, ratio, found >= 0
}
