package flow

import "math"

// spread returns sigma of two streams: sigma0 (1 + r)/(1 - r).
func spread(sigma0, r float64) float64 { return sigma0 * (1 + r) / (1 - r) }

// mixingLaws are the turbulent plane mixing layer of two streams, U2 = r U1.
func mixingLaws() []Law {
	streams := []Symbol{
		{Name: "U2/U1", Meaning: "velocity of the slow stream over that of the fast one", Unit: "1", Domain: Range{Lo: 0, Hi: 1, OpenHi: true, Source: "the formula"}, Stated: Range{Lo: 0, Hi: 1, OpenHi: true, Source: "the formula"}},
		{Name: "sigma0", Meaning: "spreading parameter where the slow stream is at rest", Unit: "1", Domain: positive, Default: number(11), Stated: Range{Lo: 9, Hi: 13.5, Source: "values in use, from memory"}},
	}
	const source = "H. Görtler, ZAMM 22 (1942) 244, uniform eddy viscosity; sigma over the velocity ratio after Abramovich and Sabin (from memory)"
	const caveat = "self-similar region, equal densities, low speed; the spread measured in different facilities differs by tens of per cent"
	return []Law{
		{ID: "mixing-layer", Name: "Turbulent mixing layer, velocity", Kind: Correlation, Formula: "u/U1 = r + (1 - r)(1 + erf(sigma y/x))/2, sigma = sigma0 (1 + r)/(1 - r), r = U2/U1",
			Station: plain("y/x", "distance towards the fast stream over distance from the virtual origin", "1", anything), Value: result("u/U1", "mean velocity over that of the fast stream", "1"),
			Parameters: streams, Source: source, Reach: Memory, Uncertainty: noneStated, Caveat: caveat,
			at: func(p []float64, y float64) float64 {
				r := p[0]
				return r + float64((1-r)/2*math.Erfc(-spread(p[1], r)*y))
			}},
		{ID: "mixing-layer-thickness", Name: "Turbulent mixing layer, vorticity thickness", Kind: Correlation, Formula: "delta_w = sqrt(pi) x/sigma, sigma = sigma0 (1 + r)/(1 - r), r = U2/U1",
			Station: plain("x", "distance from the virtual origin", "m", positive), Value: result("delta_w", "velocity difference over the steepest slope", "m"),
			Parameters: streams, Source: source, Reach: Memory, Uncertainty: noneStated, Caveat: caveat,
			at: func(p []float64, x float64) float64 { return math.Sqrt(math.Pi) * x / spread(p[1], p[0]) }},
	}
}
