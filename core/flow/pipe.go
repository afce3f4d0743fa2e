package flow

import "math"

// colebrook returns f of 1/sqrt(f) = -2 log10(eps/3.7 + 2.51/(Re sqrt(f))) for
// Re > 1 and eps < 1. With y = 1/sqrt(f) the equation rises in y.
func colebrook(eps, re float64) float64 {
	y := root(func(y float64) float64 {
		return y + float64(2*math.Log10(eps/3.7+2.51*y/re))
	}, 1e-6, 1+float64(2*math.Log10(re)))
	return 1 / (y * y)
}

// haaland is 1/sqrt(f) = -1.8 log10((eps/3.7)^1.11 + 6.9/Re), for Re above 6.9
// and such eps that the logarithm is negative.
func haaland(eps, re float64) float64 {
	y := -1.8 * math.Log10(math.Pow(eps/3.7, 1.11)+6.9/re)
	return 1 / (y * y)
}

// smoothPipe returns f of 1/sqrt(f) = 2 log10(Re sqrt(f)) - 0.8 for Re > 1.
func smoothPipe(re float64) float64 {
	l := math.Log10(re)
	y := root(func(y float64) float64 {
		return y + float64(2*math.Log10(y)) - float64(2*l) + 0.8
	}, 1e-3, 1+float64(2*l))
	return 1 / (y * y)
}

// pipeLaws are Darcy's friction factors of pipe flow.
func pipeLaws() []Law {
	reynolds := func(domain, stated Range) Symbol {
		return Symbol{Name: "Re", Meaning: "Reynolds number U D/nu", Unit: "1", Domain: domain, Stated: stated}
	}
	turbulent := func(hi float64) Range { return Range{Lo: 4000, Hi: hi, Source: "common practice, no source"} }
	f := result("f", "Darcy's friction factor, four times Fanning's", "1")
	rough := Symbol{Name: "eps/D", Meaning: "sand-grain roughness over diameter", Unit: "1", Domain: Range{Lo: 0, Hi: 1, OpenHi: true, Source: "roughness smaller than the pipe"},
		Stated: Range{Lo: 0, Hi: 0.05, Source: "common practice, no source"}}
	const caveat = "steady, fully developed, round pipe"
	return []Law{
		{ID: "pipe-laminar", Name: "Pipe friction, laminar", Kind: Exact, Formula: "f = 64/Re", Station: reynolds(positive, laminarDuct), Value: f,
			Source: "exact solution of the Navier-Stokes equations (Poiseuille flow)", Reach: Memory, Uncertainty: noneStated, Caveat: caveat,
			at: func(_ []float64, re float64) float64 { return 64 / re }},
		{ID: "pipe-colebrook", Name: "Pipe friction, Colebrook", Kind: Correlation, Formula: "1/sqrt(f) = -2 log10(eps/(3.7 D) + 2.51/(Re sqrt(f)))",
			Station: reynolds(past(1), turbulent(1e8)), Value: f, Parameters: []Symbol{rough},
			Source: "C. F. Colebrook, J. Inst. Civ. Eng. 11 (1939) 133 (from memory)", Reach: Memory, Uncertainty: noneStated, Caveat: caveat,
			at: func(p []float64, re float64) float64 { return colebrook(p[0], re) }},
		{ID: "pipe-haaland", Name: "Pipe friction, Haaland", Kind: Correlation, Formula: "1/sqrt(f) = -1.8 log10((eps/(3.7 D))^1.11 + 6.9/Re)",
			Station: reynolds(past(20), turbulent(1e8)), Value: f, Parameters: []Symbol{rough},
			Source: "S. E. Haaland, J. Fluids Eng. 105 (1983) 89 (from memory)", Reach: Memory, Uncertainty: noneStated,
			Caveat: caveat + "; an explicit stand-in for Colebrook's formula",
			at:     func(p []float64, re float64) float64 { return haaland(p[0], re) }},
		{ID: "pipe-prandtl", Name: "Pipe friction, smooth, Prandtl", Kind: Correlation, Formula: "1/sqrt(f) = 2 log10(Re sqrt(f)) - 0.8",
			Station: reynolds(past(1), turbulent(3.4e6)), Value: f,
			Source: "L. Prandtl, after Nikuradse's tests (from memory)", Reach: Memory, Uncertainty: noneStated, Caveat: caveat + ", smooth wall",
			at: func(_ []float64, re float64) float64 { return smoothPipe(re) }},
		{ID: "pipe-blasius", Name: "Pipe friction, smooth, Blasius", Kind: Correlation, Formula: "f = 0.3164 Re^(-1/4)",
			Station: reynolds(positive, turbulent(1e5)), Value: f,
			Source: "H. Blasius (1913, from memory)", Reach: Memory, Uncertainty: noneStated, Caveat: caveat + ", smooth wall",
			at: func(_ []float64, re float64) float64 { return 0.3164 / math.Sqrt(math.Sqrt(re)) }},
	}
}
