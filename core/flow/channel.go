package flow

import "math"

// planePoiseuille is u = 6 U (y/h)(1 - y/h), U the mean velocity.
func planePoiseuille(mean, h, y float64) float64 { return 6 * mean * (y / h) * ((h - y) / h) }

// pipePoiseuille is u = 2 U (1 - (2r/D)^2), U the mean velocity, written as a
// product so that it is zero at the wall.
func pipePoiseuille(mean, d, r float64) float64 {
	s := 2 * r / d
	return 2 * mean * (1 - s) * (1 + s)
}

// laminarDuct is the range in which duct flow is usually laminar.
var laminarDuct = Range{Lo: 0, Hi: 2300, Source: "common practice, no source"}

// channelLaws are the steady laminar flows between plates and in a pipe.
func channelLaws() []Law {
	velocity := plain("U", "mean velocity", "m/s", anything)
	gap := plain("h", "distance between the walls", "m", positive)
	diameter := plain("D", "diameter", "m", positive)
	viscosity := plain("nu", "kinematic viscosity", "m^2/s", positive)
	across := plain("y", "distance from a wall at rest, 0 to h", "m", fromZero)
	radius := plain("r", "distance from the axis, 0 to D/2", "m", fromZero)
	u := result("u", "velocity along the walls", "m/s")
	acrossGap := func(p []float64) Range { return Range{Lo: 0, Hi: p[1], Source: "the walls"} }
	const derived = "exact solution of the Navier-Stokes equations"
	const caveat = "steady, fully developed, constant properties; exact at any Reynolds number, but found in nature only where the flow is laminar"
	return []Law{
		{ID: "plane-poiseuille", Name: "Plane Poiseuille flow", Kind: Exact, Formula: "u = 6 U (y/h)(1 - y/h)",
			Station: across, Value: u, Parameters: []Symbol{velocity, gap, viscosity},
			Conditions: []Condition{{"Re", "2 |U| h/nu", laminarDuct, func(p []float64) float64 { return 2 * math.Abs(p[0]) * p[1] / p[2] }}},
			Source:     derived, Reach: Memory, Uncertainty: noneStated, Caveat: caveat,
			at: func(p []float64, y float64) float64 { return planePoiseuille(p[0], p[1], y) }, domain: acrossGap, stated: acrossGap},
		{ID: "couette", Name: "Plane Couette flow", Kind: Exact, Formula: "u = U y/h",
			Station: across, Value: u, Parameters: []Symbol{plain("U", "velocity of the moving wall", "m/s", anything), gap, viscosity},
			Conditions: []Condition{{"Re", "|U| h/nu", Range{Lo: 0, Hi: 1300, Source: "turbulence is sustained above about 4 x 325, from memory"},
				func(p []float64) float64 { return math.Abs(p[0]) * p[1] / p[2] }}},
			Source: derived, Reach: Memory, Uncertainty: noneStated, Caveat: caveat,
			at: func(p []float64, y float64) float64 { return p[0] * (y / p[1]) }, domain: acrossGap, stated: acrossGap},
		{ID: "pipe-poiseuille", Name: "Pipe Poiseuille flow", Kind: Exact, Formula: "u = 2 U (1 - (2 r/D)^2)",
			Station: radius, Value: u, Parameters: []Symbol{velocity, diameter, viscosity},
			Conditions: []Condition{{"Re", "|U| D/nu", laminarDuct, func(p []float64) float64 { return math.Abs(p[0]) * p[1] / p[2] }}},
			Source:     derived, Reach: Memory, Uncertainty: noneStated, Caveat: caveat,
			at:     func(p []float64, r float64) float64 { return pipePoiseuille(p[0], p[1], r) },
			domain: withinPipe, stated: withinPipe},
	}
}

func withinPipe(p []float64) Range { return Range{Lo: 0, Hi: p[1] / 2, Source: "the wall"} }
