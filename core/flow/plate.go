package flow

import "math"

const plateCaveat = "smooth plate, no pressure gradient, low speed, turbulent from the leading edge"

// turbulentPlate is the range usually given for power and logarithm formulas.
func turbulentPlate(hi float64) Range {
	return Range{Lo: 5e5, Hi: hi, Source: "common practice, no source"}
}

// power5 is cf = 0.0592 Re_x^(-1/5).
func power5(re float64) float64 { return 0.0592 * math.Pow(re, -0.2) }

// power7 is cf = 0.026 Re_x^(-1/7).
func power7(re float64) float64 { return 0.026 * math.Pow(re, -1./7) }

// whiteLocal is cf = 0.455/ln(0.06 Re_x)^2.
func whiteLocal(re float64) float64 {
	l := math.Log(0.06 * re)
	return 0.455 / (l * l)
}

// karmanSchoenherr is cf = 1/(17.08 L^2 + 25.11 L + 6.012), L = log10 Re_theta.
func karmanSchoenherr(retheta float64) float64 {
	l := math.Log10(retheta)
	return 1 / (float64(17.08*l*l) + float64(25.11*l) + 6.012)
}

// plateLaws are correlations of the local skin friction of a turbulent plate.
func plateLaws() []Law {
	rex := func(domain Range, hi float64) Symbol {
		return Symbol{Name: "Re_x", Meaning: "Reynolds number U x/nu", Unit: "1", Domain: domain, Stated: turbulentPlate(hi)}
	}
	retheta := Symbol{Name: "Re_theta", Meaning: "Reynolds number U theta/nu of the momentum thickness", Unit: "1",
		Domain: Range{Lo: 1, Hi: infinite, Source: "the formula: its denominator is positive"},
		Stated: Range{Lo: 200, Hi: 20000, Source: "the table of the source"}}
	law := func(id, name, formula, source, caveat string, station Symbol, at func(float64) float64) Law {
		return Law{ID: id, Name: name, Kind: Correlation, Formula: formula, Station: station,
			Value:  result("cf", "wall shear stress over rho U^2/2", "1"),
			Source: source, Reach: Seen, Uncertainty: noneStated, Caveat: caveat,
			at: func(_ []float64, x float64) float64 { return at(x) }}
	}
	return []Law{
		law("plate-power-5", "Turbulent flat plate, power 1/5", "cf = 0.0592 Re_x^(-1/5)",
			"NASA Turbulence Modeling Resource, flat plate validation, there as F. M. White, Viscous Fluid Flow, 6-112a", plateCaveat, rex(positive, 1e7), power5),
		law("plate-power-7", "Turbulent flat plate, power 1/7", "cf = 0.026 Re_x^(-1/7)",
			"NASA Turbulence Modeling Resource, flat plate validation, there as F. M. White, Viscous Fluid Flow, 6-121",
			plateCaveat+"; the factor is that of the resource's file, books often print 0.027", rex(positive, 1e9), power7),
		law("plate-white", "Turbulent flat plate, logarithm", "cf = 0.455/ln(0.06 Re_x)^2",
			"NASA Turbulence Modeling Resource, flat plate validation, there as F. M. White, Viscous Fluid Flow, 6-134", plateCaveat, rex(past(1/0.06), 1e9), whiteLocal),
		law("plate-karman-schoenherr", "Turbulent flat plate, Karman-Schoenherr over Re_theta", "cf = 1/(17.08 L^2 + 25.11 L + 6.012), L = log10 Re_theta",
			"NASA Turbulence Modeling Resource, flat plate validation, cf_K-S.dat", plateCaveat, retheta, karmanSchoenherr),
	}
}

// past is the domain above a pole of the formula.
func past(pole float64) Range {
	return Range{Lo: pole, OpenLo: true, Hi: infinite, Source: "the formula: it has a pole there"}
}
