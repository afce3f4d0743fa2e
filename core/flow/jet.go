package flow

import "math"

// sech2 is 1/cosh^2.
func sech2(x float64) float64 {
	c := math.Cosh(x)
	return 1 / c / c
}

// bickley is the laminar plane jet of kinematic momentum k = integral u^2 dy:
// u = (3 k^2/(32 nu x))^(1/3) sech^2((k/(48 nu^2 x^2))^(1/3) y).
func bickley(k, nu, x, y float64) float64 {
	return math.Cbrt(3*k/32*k/nu/x) * sech2(math.Cbrt(k/48/nu/nu/x/x)*y)
}

// jetLaws are the plane jet, laminar and turbulent.
func jetLaws() []Law {
	across := plain("y/y_half", "distance from the axis over that where the velocity is half", "1", anything)
	across.Stated = Range{Lo: -2, Hi: 2, Source: "from memory: measured profiles fall off faster outside"}
	along := plain("x/d", "distance from the slot over its height", "1", positive)
	along.Stated = Range{Lo: 20, Hi: infinite, Source: "from memory: self-similar beyond"}
	return []Law{
		{ID: "plane-jet-laminar", Name: "Laminar plane jet", Kind: Exact, Formula: "u = (3 K^2/(32 nu x))^(1/3) sech^2((K/(48 nu^2 x^2))^(1/3) y)",
			Station: plain("y", "distance from the axis", "m", anything), Value: result("u", "velocity along the jet", "m/s"),
			Parameters: []Symbol{
				plain("K", "momentum flow over density and width, integral u^2 dy", "m^3/s^2", positive),
				plain("nu", "kinematic viscosity", "m^2/s", positive),
				plain("x", "distance from the slot's virtual origin", "m", positive)},
			Conditions: []Condition{{"Re", "(K x/nu^2)^(1/3)", Range{Lo: 10, Hi: 300, Source: "no source: thin-layer theory needs it large, and jets turn turbulent early"},
				func(p []float64) float64 { return math.Cbrt(p[0] / p[1] * p[2] / p[1]) }}},
			Source: "H. Schlichting (1933), W. G. Bickley (1937), from memory", Reach: Memory, Uncertainty: noneStated, Caveat: "similarity solution of the boundary-layer equations, still surroundings",
			at: func(p []float64, y float64) float64 { return bickley(p[0], p[1], p[2], y) }},
		{ID: "plane-jet-turbulent", Name: "Turbulent plane jet, velocity", Kind: Correlation, Formula: "u/u_c = sech^2(ln(1 + sqrt 2) y/y_half)",
			Station: across, Value: result("u/u_c", "mean velocity over that on the axis", "1"),
			Source: "H. Görtler, ZAMM 22 (1942) 244, uniform eddy viscosity (from memory)", Reach: Memory, Uncertainty: noneStated, Caveat: "self-similar region, still surroundings",
			at: func(_ []float64, y float64) float64 { return sech2(math.Log(1+math.Sqrt2) * y) }},
		{ID: "plane-jet-spread", Name: "Turbulent plane jet, half width", Kind: Correlation, Formula: "y_half/d = S (x - x0)/d",
			Station: along, Value: result("y_half/d", "half width over height of the slot", "1"),
			Parameters: []Symbol{
				{Name: "S", Meaning: "rate of spread", Unit: "1", Domain: positive, Default: number(0.10), Stated: Range{Lo: 0.09, Hi: 0.12, Source: "values in use, from memory"}},
				{Name: "x0/d", Meaning: "virtual origin over height of the slot", Unit: "1", Domain: anything, Stated: anything, Default: number(0)}},
			Source: "S. B. Pope, Turbulent Flows (2000), from memory", Reach: Memory, Uncertainty: noneStated, Caveat: "self-similar region, still surroundings; the virtual origin depends on the slot",
			at:     func(p []float64, x float64) float64 { return p[0] * (x - p[1]) },
			domain: func(p []float64) Range { return Range{Lo: max(0, p[1]), OpenLo: true, Hi: infinite} },
		},
	}
}
