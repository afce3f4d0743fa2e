package uncertainty

import (
	"math"
	"strconv"
	"strings"

	"gonum.org/v1/gonum/stat/distuv"
)

// CoverageFactor returns the number by which a stated half-width is divided
// to give the standard uncertainty. It reads "standard", a factor ("2",
// "k = 2"), a level of a normal distribution ("95 %"), and "limits" for the
// half-width of a rectangular distribution (divisor sqrt 3, JCGM 100:2008
// 4.3.7, clause from memory). Anything else, the empty text and "unknown"
// included, is not ok.
func CoverageFactor(text string) (k float64, ok bool) {
	t := strings.ToLower(strings.TrimSpace(text))
	switch t {
	case "standard", "standard uncertainty":
		return 1, true
	case "limits", "rectangular":
		return math.Sqrt(3), true
	}
	if level, isLevel := strings.CutSuffix(t, "%"); isLevel {
		p, err := strconv.ParseFloat(strings.TrimSpace(level), 64)
		if err != nil || !(p > 0 && p < 100) {
			return 0, false
		}
		return distuv.UnitNormal.Quantile(0.5 + p/200), true
	}
	t = strings.TrimSpace(strings.TrimPrefix(strings.ReplaceAll(t, " ", ""), "k="))
	k, err := strconv.ParseFloat(t, 64)
	if err != nil || !(k > 0) || math.IsInf(k, 0) {
		return 0, false
	}
	return k, true
}
