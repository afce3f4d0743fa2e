package uncertainty

import (
	"math"
	"strings"
)

// Divisor returns the number by which a stated half-width is divided to give
// the standard uncertainty where the form of the distribution is stated too;
// the empty form is that of CoverageFactor. A factor k divides whatever the
// form. A level p of a form, or its limits (p = 1), divides by
//
//	rectangular sqrt 3 p, triangular sqrt 6 (1 - sqrt(1-p)), arc sine
//	sqrt 2 sin(pi p/2), Student t_p(degrees),
//
// the half-widths over the standard deviations of these forms. Source: JCGM
// 101:2008 6.4 for the forms (clause from memory), integration of the densities
// for the levels. It is not ok where CoverageFactor is not, for limits of a form
// that has none, and for Student without degrees of freedom.
func Divisor(coverage string, form Distribution, degrees float64) (k float64, ok bool) {
	k, ok = CoverageFactor(coverage)
	p, leveled := level(coverage)
	if !ok || !leveled || form == "" {
		return k, ok
	}
	switch form {
	case Normal:
		return k, p < 1
	case Student:
		if p == 1 {
			return 0, false
		}
		return StudentFactor(p, degrees)
	case Rectangular:
		return p * math.Sqrt(3), true
	case Triangular:
		return math.Sqrt(6) * (1 - math.Sqrt(1-p)), true
	case ArcSine:
		return math.Sqrt2 * math.Sin(math.Pi/2*p), true
	}
	return 0, false
}

// level reads the two-sided level of a coverage: of "95 %" 0.95, of limits 1.
func level(coverage string) (p float64, ok bool) {
	t := strings.ToLower(strings.TrimSpace(coverage))
	if t == "limits" || t == "rectangular" {
		return 1, true
	}
	text, percent := strings.CutSuffix(t, "%")
	p, number := decimal(strings.TrimSpace(text))
	return p / 100, percent && number
}
