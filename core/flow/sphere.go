package flow

import "math"

// schillerNaumann is C_D = 24/Re (1 + 0.15 Re^0.687).
func schillerNaumann(re float64) float64 {
	return 24 / re * (1 + float64(0.15*math.Pow(re, 0.687)))
}

// brownLawler is C_D = 24/Re (1 + 0.15 Re^0.681) + 0.407/(1 + 8710/Re).
func brownLawler(re float64) float64 {
	return float64(24/re*(1+float64(0.15*math.Pow(re, 0.681)))) + 0.407/(1+8710/re)
}

// sphereLaws are the drag of a smooth sphere in steady uniform flow.
func sphereLaws() []Law {
	re := func(hi float64, source string) Symbol {
		return Symbol{Name: "Re", Meaning: "Reynolds number U D/nu", Unit: "1", Domain: positive, Stated: Range{Lo: 0, OpenLo: true, Hi: hi, Source: source}}
	}
	cd := result("C_D", "drag over rho U^2/2 and frontal area", "1")
	const caveat = "smooth rigid sphere, steady uniform flow without walls or turbulence outside"
	return []Law{
		{ID: "sphere-stokes", Name: "Sphere drag, Stokes", Kind: Exact, Formula: "C_D = 24/Re", Station: re(0.1, "Oseen's term 3 Re/16 is below 2 % there"), Value: cd,
			Source: "G. G. Stokes (1851, from memory)", Reach: Memory, Uncertainty: "none stated; the next term, 3 Re/16 of the value, is Oseen's (1910, from memory)", Caveat: caveat,
			at: func(_ []float64, re float64) float64 { return 24 / re }},
		{ID: "sphere-schiller-naumann", Name: "Sphere drag, Schiller-Naumann", Kind: Correlation, Formula: "C_D = 24/Re (1 + 0.15 Re^0.687)", Station: re(800, "from memory"), Value: cd,
			Source: "L. Schiller, A. Naumann, Z. VDI 77 (1935) 318 (from memory)", Reach: Memory, Uncertainty: "about 5 % for Re below 800 (Clift, Grace, Weber, Bubbles, Drops and Particles, 1978, from memory); coverage not stated", Caveat: caveat,
			at: func(_ []float64, re float64) float64 { return schillerNaumann(re) }},
		{ID: "sphere-brown-lawler", Name: "Sphere drag, Brown-Lawler", Kind: Correlation, Formula: "C_D = 24/Re (1 + 0.15 Re^0.681) + 0.407/(1 + 8710/Re)", Station: re(2e5, "from memory: below the drag crisis"), Value: cd,
			Source: "P. P. Brown, D. F. Lawler, J. Environ. Eng. 129 (2003) 222 (from memory)", Reach: Memory, Uncertainty: noneStated, Caveat: caveat,
			at: func(_ []float64, re float64) float64 { return brownLawler(re) }},
	}
}
