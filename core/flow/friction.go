package flow

import "math"

// schoenherr returns C of 0.242/sqrt(C) = log10(Re C), for Re > 1. With
// y = 1/sqrt(C) the equation rises in y.
func schoenherr(re float64) float64 {
	l := math.Log10(re)
	y := root(func(y float64) float64 {
		return float64(0.242*y) + float64(2*math.Log10(y)) - l
	}, 1e-3, 1+l/0.242)
	return 1 / (y * y)
}

// ittc57 is C = 0.075/(log10 Re - 2)^2.
func ittc57(re float64) float64 {
	l := math.Log10(re) - 2
	return 0.075 / (l * l)
}

// prandtlSchlichting is C = 0.455/(log10 Re)^2.58.
func prandtlSchlichting(re float64) float64 { return 0.455 / math.Pow(math.Log10(re), 2.58) }

// whiteMean is C = 0.523/ln(0.06 Re)^2.
func whiteMean(re float64) float64 {
	l := math.Log(0.06 * re)
	return 0.523 / (l * l)
}

// meanPlateLaws are correlations of the mean friction of a plate or hull.
func meanPlateLaws() []Law {
	law := func(id, name, formula, source, caveat string, reach Reach, domain Range, at func(float64) float64) Law {
		return Law{ID: id, Name: name, Kind: Correlation, Formula: formula,
			Station: Symbol{Name: "Re_L", Meaning: "Reynolds number U L/nu", Unit: "1", Domain: domain,
				Stated: Range{Lo: 1e6, Hi: 1e9, Source: "common practice, no source; the range checked here"}},
			Value:  result("CF", "friction force over rho U^2/2 and wetted area", "1"),
			Source: source, Reach: reach, Uncertainty: noneStated, Caveat: caveat,
			at: func(_ []float64, x float64) float64 { return at(x) }}
	}
	return []Law{
		law("line-schoenherr", "Mean plate friction, Karman-Schoenherr", "0.242/sqrt(CF) = log10(Re_L CF)",
			"K. E. Schoenherr, Trans. SNAME 40 (1932) 279 (from memory); form of NASA TN D-6945", plateCaveat, Quoted, past(1), schoenherr),
		law("line-ittc-57", "Ship-model friction line ITTC-57", "CF = 0.075/(log10 Re_L - 2)^2",
			"8th International Towing Tank Conference, 1957; form of CFD-Wiki",
			"a model-ship correlation line, not the friction of a flat plate; it holds a form effect", Quoted, past(100), ittc57),
		law("line-prandtl-schlichting", "Mean plate friction, Prandtl-Schlichting", "CF = 0.455/(log10 Re_L)^2.58",
			"form of CFD-Wiki", plateCaveat, Quoted, past(1), prandtlSchlichting),
		law("line-white", "Mean plate friction, White", "CF = 0.523/ln(0.06 Re_L)^2",
			"F. M. White, Viscous Fluid Flow (from memory)", plateCaveat, Memory, past(1/0.06), whiteMean),
	}
}
