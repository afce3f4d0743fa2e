package flow

import "math"

// LogLaw is u+ = ln(y+)/kappa + B.
func LogLaw(kappa, b, y float64) float64 { return math.Log(y)/kappa + b }

// spaldingY is y+ = u+ + e^(-kappa B) (e^k - 1 - k - k^2/2 - k^3/6), k = kappa u+.
func spaldingY(kappa, b, u float64) float64 {
	k := kappa * u
	rest := math.Expm1(k) - k - float64(k*k/2) - float64(k*k*k/6)
	return u + float64(math.Exp(-kappa*b)*rest)
}

// SpaldingU returns the u+ whose y+ is given. y+ is never below u+ and rises
// with it, so that the answer lies between 0 and y+.
func SpaldingU(kappa, b, y float64) float64 {
	if y == 0 {
		return 0
	}
	// From k = 60 on the exponential outweighs the other terms, so that y+ is
	// passed there, and the exponential is not evaluated where it overflows.
	far := (60 + max(0, math.Log(y)+float64(kappa*b))) / kappa
	return min(y, root(func(u float64) float64 { return spaldingY(kappa, b, u) - y }, 0, min(2*y, far)))
}

// wallLaws are the layers of a turbulent wall flow in wall units.
func wallLaws() []Law {
	const caveat = "smooth wall, mild pressure gradient, no wake: the outer layer lies above it"
	uplus := plain("u+", "velocity over friction velocity", "1", fromZero)
	yplus := plain("y+", "distance from the wall over nu/u_tau", "1", fromZero)
	kappa := Symbol{Name: "kappa", Meaning: "slope of the logarithm", Unit: "1", Domain: Range{Lo: 0.1, Hi: 1, Source: "bounds of this program"}, Default: number(0.41),
		Stated: Range{Lo: 0.38, Hi: 0.42, Source: "values in use, from memory"}}
	b := Symbol{Name: "B", Meaning: "offset of the logarithm", Unit: "1", Domain: Range{Lo: -20, Hi: 20, Source: "bounds of this program"}, Default: number(5.0),
		Stated: Range{Lo: 4, Hi: 5.5, Source: "values in use, from memory"}}
	retau := Symbol{Name: "Re_tau", Meaning: "thickness of the layer in wall units, for the outer end 0.15 Re_tau", Unit: "1", Domain: positive, Stated: positive, Optional: true}
	constants := []Symbol{kappa, b, retau}

	// below ends a range at 0.15 Re_tau, where that is given.
	below := func(lo float64) func(p []float64) Range {
		return func(p []float64) Range {
			r := Range{Lo: lo, Hi: infinite, Source: "common practice, no source"}
			if !math.IsNaN(p[2]) {
				r.Hi = 0.15 * p[2]
			}
			return r
		}
	}
	viscous := yplus
	viscous.Stated = Range{Lo: 0, Hi: 5, Source: "common practice, no source"}
	logStation := yplus
	logStation.Domain = positive
	logStation.Stated = Range{Lo: 30, Hi: infinite, Source: "common practice, no source; ends at 0.15 Re_tau where that is given"}
	spaldingStation := yplus
	spaldingStation.Stated = Range{Lo: 0, Hi: infinite, Source: "common practice, no source; ends at 0.15 Re_tau where that is given"}
	const tmr = "NASA Turbulence Modeling Resource, flat plate validation (constants 0.41 and 5.0)"
	return []Law{
		{ID: "wall-viscous", Name: "Law of the wall, viscous sublayer", Kind: Exact, Formula: "u+ = y+", Station: viscous, Value: uplus,
			Source: "limit of the wall shear at the wall", Reach: Memory, Uncertainty: "none stated; Spalding's law lies 2.7 % lower at y+ = 5 (kappa 0.41, B 5.0)", Caveat: caveat,
			at: func(_ []float64, y float64) float64 { return y }},
		{ID: "wall-log", Name: "Law of the wall, logarithm", Kind: Correlation, Formula: "u+ = ln(y+)/kappa + B", Station: logStation,
			Value: result("u+", "velocity over friction velocity", "1"), Parameters: constants,
			Source: tmr, Reach: Seen, Uncertainty: noneStated, Caveat: caveat,
			at: func(p []float64, y float64) float64 { return LogLaw(p[0], p[1], y) }, stated: below(30)},
		{ID: "wall-spalding", Name: "Law of the wall, Spalding, u+ over y+", Kind: Correlation,
			Formula: "y+ = u+ + e^(-kappa B) (e^k - 1 - k - k^2/2 - k^3/6), k = kappa u+, solved for u+", Station: spaldingStation, Value: uplus, Parameters: constants,
			Source: "D. B. Spalding, J. Appl. Mech. 28 (1961) 455 (from memory); table of " + tmr, Reach: Seen, Uncertainty: noneStated, Caveat: caveat,
			at: func(p []float64, y float64) float64 { return SpaldingU(p[0], p[1], y) }, stated: below(0)},
		{ID: "wall-spalding-inverse", Name: "Law of the wall, Spalding, y+ over u+", Kind: Correlation,
			Formula: "y+ = u+ + e^(-kappa B) (e^k - 1 - k - k^2/2 - k^3/6), k = kappa u+", Station: uplus, Value: yplus, Parameters: constants,
			Source: "D. B. Spalding, J. Appl. Mech. 28 (1961) 455 (from memory); table of " + tmr, Reach: Seen, Uncertainty: noneStated, Caveat: caveat,
			at: func(p []float64, u float64) float64 { return spaldingY(p[0], p[1], u) },
			stated: func(p []float64) Range {
				r := below(0)(p)
				if !math.IsInf(r.Hi, 1) {
					r.Hi = SpaldingU(p[0], p[1], r.Hi)
				}
				return r
			}},
	}
}
