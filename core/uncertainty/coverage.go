package uncertainty

import (
	"math"
	"strconv"
	"strings"

	"gonum.org/v1/gonum/stat/distuv"
)

// CoverageFactor returns the number by which a stated half-width is divided
// to give the standard uncertainty. It reads "standard", a factor ("2",
// "k = 2"), a two-sided level of a normal distribution ("95 %"), and "limits"
// for the half-width of a rectangular distribution (divisor sqrt 3, JCGM
// 100:2008 4.3.7, clause from memory).
//
// Anything else, the empty text and "unknown" included, is not ok. Neither is
// what could be misread: a bare number outside 1 to 10 ("95" and "0.95" are
// levels without their sign), and a level outside 50 % to 99.9999 %.
func CoverageFactor(text string) (k float64, ok bool) {
	t := strings.ReplaceAll(strings.ToLower(strings.TrimSpace(text)), " ", "")
	switch t {
	case "standard", "standarduncertainty":
		return 1, true
	case "limits", "rectangular":
		return math.Sqrt(3), true
	}
	if level, isLevel := strings.CutSuffix(t, "%"); isLevel {
		p, ok := decimal(level)
		if !ok || p < 50 || p > 99.9999 {
			return 0, false
		}
		return distuv.UnitNormal.Quantile(0.5 + p/200), true
	}
	factor, named := strings.CutPrefix(t, "k=")
	k, ok = decimal(factor)
	if !ok || !(k > 0) || !named && (k < 1 || k > 10) {
		return 0, false
	}
	return k, true
}

// decimal reads a finite number in decimal digits.
func decimal(text string) (float64, bool) {
	if strings.Trim(text, "0123456789.e+-") != "" {
		return 0, false
	}
	v, err := strconv.ParseFloat(text, 64)
	return v, err == nil
}
