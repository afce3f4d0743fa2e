package chart

import (
	"fmt"
	"math"
	"strconv"

	"weirmark/core/quantity"
)

// scale is an axis: limits, step between its numbers, and how these are
// printed: with so many Decimals of v / 10^Exponent.
type scale struct {
	Min, Max, Step float64
	Decimals       int
	Exponent       int
}

// newScale returns the shortest axis that holds b, with a step of 1, 2 or 5
// times a power of ten, about as many steps as asked for, and limits on
// multiples of half a step. Bounds of no length are widened; empty ones give 0
// to 1.
func newScale(b bounds, steps int) scale {
	if b.empty() {
		b = bounds{0, 1}
	}
	lo, hi := quantity.Round(b.lo, 6), quantity.Round(b.hi, 6)
	if least := 1e-5 * math.Max(math.Abs(lo), math.Abs(hi)); hi-lo <= least {
		pad := math.Max(float64(0.05*math.Abs(lo)), math.SmallestNonzeroFloat32)
		if lo == 0 {
			pad = 1
		}
		lo, hi = lo-pad, hi+pad
	}
	digit, power := niceStep((hi - lo) / float64(steps))
	step := decimal(digit, power)
	// The quotients are rounded: a limit that is a multiple stays one on every host.
	first := math.Floor(quantity.Round(2*lo/step, 9))
	last := math.Ceil(quantity.Round(2*hi/step, 9))
	s := scale{
		Min: decimal(int(first)*digit*5, power-1), Max: decimal(int(last)*digit*5, power-1), Step: step,
		Decimals: max(0, -power),
	}
	if largest := math.Max(math.Abs(s.Min), math.Abs(s.Max)); s.Decimals > 4 || largest >= 1e5 {
		s.Exponent = thousands(largest)
		s.Decimals = max(0, s.Exponent-power)
	}
	return s
}

// niceStep returns the least digit 1, 2 or 5 and power of ten that together
// are not below v.
func niceStep(v float64) (digit, power int) {
	text := strconv.FormatFloat(v, 'e', 5, 64)
	mantissa, _ := strconv.ParseFloat(text[:7], 64)
	power, _ = strconv.Atoi(text[8:])
	for _, digit := range []int{1, 2, 5} {
		if mantissa <= float64(digit) {
			return digit, power
		}
	}
	return 1, power + 1
}

// decimal returns n times 10^power, correctly rounded.
func decimal(n, power int) float64 {
	v, _ := strconv.ParseFloat(strconv.Itoa(n)+"e"+strconv.Itoa(power), 64)
	return v
}

// thousands returns the greatest multiple of three whose power of ten is not above v.
func thousands(v float64) int {
	text := strconv.FormatFloat(v, 'e', 5, 64)
	power, _ := strconv.Atoi(text[8:])
	return int(math.Floor(float64(power)/3)) * 3
}

// numbers returns where the axis has numbers: the multiples of the step.
func (s scale) numbers() []float64 {
	at := []float64{}
	for n := math.Ceil(quantity.Round(s.Min/s.Step, 9)); n <= math.Floor(quantity.Round(s.Max/s.Step, 9)); n++ {
		at = append(at, quantity.Round(n*s.Step, 12))
	}
	return at
}

// formatter names the print function of the axis numbers.
func (s scale) formatter() string { return fmt.Sprintf("decimals:%d:%d", s.Decimals, s.Exponent) }

// digitWidth is the width of a digit in px, rounded up.
const digitWidth = 8

// digits returns the length of the longest axis number, in characters.
func (s scale) digits() int {
	longest := 0
	for _, v := range []float64{s.Min, s.Max} {
		text := strconv.FormatFloat(v/decimal(1, s.Exponent), 'f', s.Decimals, 64)
		longest = max(longest, len(text))
	}
	return longest
}
