package derived

import "weirmark/core/flow"

// Keys of the parameters that more than one place names.
const (
	KeyLevel     = "level"
	KeyDirection = "direction"
	KeyWhich     = "which"
	KeyNear      = "near"
	KeyEdge      = "edge"
)

// Words of the choices of a crossing.
const (
	Either      = "either"
	RisingOnly  = "rising"
	FallingOnly = "falling"
	First       = "first"
	Last        = "last"
	Nearest     = "nearest"
)

// Shapes of the section that a line stands for.
const (
	Plane = "plane"
	Round = "round"
)

var shapes = Parameter{Key: "section", Label: "the line crosses", Default: Plane, Options: []string{Plane, Round}}

var edges = []Parameter{
	{Key: KeyEdge, Label: "edge of the layer", Default: string(EdgeMax), Options: []string{string(EdgeMax), string(EdgePlateau), string(EdgeLast), string(EdgeGiven), string(EdgeTotal), string(EdgeVorticity)}},
	{Key: "velocity", Label: "velocity at the edge, where given", Unit: "y"},
}

// otherEdges are the rules that need nothing else than the profile.
var otherEdges = []Other{
	{"edge at the maximum", map[string]string{KeyEdge: string(EdgeMax)}},
	{"edge at the plateau", map[string]string{KeyEdge: string(EdgePlateau)}},
	{"edge at the last row", map[string]string{KeyEdge: string(EdgeLast)}},
}

const secondEdge = "total pressure or vorticity, for these edges only"

var viscosity = Parameter{Key: "viscosity", Label: "kinematic viscosity ν", Unit: "m^2/s", Needed: true}

var lawConstants = []Parameter{
	viscosity,
	{Key: "kappa", Label: "κ", Default: "0.41", Unit: "1", Low: 0.1},
	{Key: "kappa range", Label: "κ within ±", Default: "0.02", Unit: "1"},
	{Key: "B", Label: "B", Default: "5.0", Unit: "1"},
	{Key: "B range", Label: "B within ±", Default: "0.5", Unit: "1"},
}

// otherConstants are pairs in use; common practice, no source.
var otherConstants = []Other{
	{"κ = 0.41, B = 5.0", map[string]string{"kappa": "0.41", "B": "5.0"}},
	{"κ = 0.384, B = 4.17", map[string]string{"kappa": "0.384", "B": "4.17"}},
	{"κ = 0.40, B = 5.5", map[string]string{"kappa": "0.40", "B": "5.5"}},
}

func fitRange(low, high string) []Parameter {
	return []Parameter{{Key: "low", Label: "fit from y+", Default: low, Unit: "1"}, {Key: "high", Label: "fit to y+", Default: high, Unit: "1"}}
}

var crossingParameters = []Parameter{
	{Key: KeyLevel, Label: "level", Default: "0", Unit: "y", Low: -1e30},
	{Key: KeyDirection, Label: "direction", Default: Either, Options: []string{Either, RisingOnly, FallingOnly}},
	{Key: KeyWhich, Label: "of several", Options: []string{"", First, Last, Nearest}},
	{Key: KeyNear, Label: "nearest to", Unit: "x", Low: -1e30},
}

// The names that other packages use.
const (
	Lift         = "section lift coefficient"
	PressureDrag = "section pressure drag coefficient"
)

// Symbols of the reference quantities of a case that kinds take.
const (
	NumberAngle    = "angle"
	NumberLength   = "length"
	NumberPressure = "pressure"
)

// kinds are the scalars that can be taken, in the order in which they are
// offered. The formulas are standard terms of the field; where a rule is a
// habit of the trade the formula says so.
var kinds = []Kind{
	{Name: "crossing of a level", Formula: "x where the straight line between neighbours meets the level; u_x = u/|slope|", X: 1, Signed: true,
		Parameters: crossingParameters, take: takeCrossing},
	{Name: "greatest value", Formula: "top of the parabola through the greatest row and its neighbours", Y: 1, take: takeExtremum(true, false)},
	{Name: "place of the greatest value", Formula: "x of the top of the parabola through the greatest row and its neighbours", X: 1, take: takeExtremum(true, true)},
	{Name: "least value", Formula: "bottom of the parabola through the least row and its neighbours", Y: 1, take: takeExtremum(false, false)},
	{Name: "place of the least value", Formula: "x of the bottom of the parabola through the least row and its neighbours", X: 1, take: takeExtremum(false, true)},

	{Name: Lift, Formula: "Cl = Cn cos α − Ca sin α, Cn = −∮Cp d(x/L), Ca = ∮Cp d(y/L), clockwise, trapezium", Loop: true, Sampled: true, Second: "second coordinate", take: takeLoop(func(s Coefficients, _ float64) float64 { return s.Lift })},
	{Name: PressureDrag, Formula: "Cd,p = Cn sin α + Ca cos α: the pressure part only, without friction", Loop: true, Sampled: true, Second: "second coordinate", take: takeLoop(func(s Coefficients, _ float64) float64 { return s.Drag })},
	{Name: "section pitching moment coefficient", Formula: "Cm = ∮Cp (x dx + y dy)/L² + (x0/L) Cn, nose up positive, about (x0, 0)", Loop: true, Sampled: true, Second: "second coordinate",
		Parameters: []Parameter{{Key: "about", Label: "about x0/L", Default: "0.25", Unit: "1", Low: -100}}, take: takeLoop(func(s Coefficients, about float64) float64 { return s.Moment + float64(about*s.Normal) })},

	{Name: "boundary layer thickness δ99", Formula: "y where u first reaches 0.99 of the edge velocity", X: 1, Sampled: true, Range: ToEnd, Second: secondEdge, Parameters: edges, Others: otherEdges, take: takeLayer(delta99)},
	{Name: "displacement thickness δ*", Formula: "δ* = ∫(1 − u/U) dy from the wall to the edge, trapezium", X: 1, Sampled: true, Range: ToEnd, Second: secondEdge, Parameters: edges, Others: otherEdges, take: takeLayer(displacement)},
	{Name: "momentum thickness θ", Formula: "θ = ∫u/U (1 − u/U) dy from the wall to the edge, trapezium", X: 1, Sampled: true, Range: ToEnd, Second: secondEdge, Parameters: edges, Others: otherEdges, take: takeLayer(momentum)},
	{Name: "shape factor H", Formula: "H = δ*/θ", Sampled: true, Range: ToEnd, Second: secondEdge, Parameters: edges, Others: otherEdges, take: takeLayer(shape)},

	{Name: "friction velocity from the wall gradient", Formula: "u_τ = √(ν u/y), mean of u/y over the rows with y+ ≤ 5", Velocity: true, Range: ToEnd, Parameters: []Parameter{viscosity}, take: takeWall},
	{Name: "friction velocity from the log law", Formula: "u_τ for which u+ = ln(y+)/κ + B fits the rows in range, least squares", Velocity: true, Range: ToEnd, Sampled: true,
		Parameters: append(append([]Parameter{}, lawConstants...), fitRange("30", "300")...), Others: otherConstants, take: takeFit(flow.LogLaw)},
	{Name: "friction velocity from a composite profile", Formula: "u_τ for which Spalding's y+(u+) fits the rows in range, least squares", Velocity: true, Range: ToEnd, Sampled: true,
		Parameters: append(append([]Parameter{}, lawConstants...), fitRange("0", "300")...), Others: otherConstants, take: takeFit(flow.SpaldingU)},

	{Name: "drag coefficient of a wake", Formula: "Cd = (2/L) ∫u/U (1 − u/U) dy, U from the ends or as given; pressure recovered, no fluctuations", Range: Between, Sampled: true,
		Parameters: []Parameter{{Key: "length", Label: "reference length L", Unit: "x", Needed: true}, {Key: "velocity", Label: "undisturbed velocity, else mean of the ends", Unit: "y"}}, take: takeWakeDrag},
	{Name: "greatest deficit of a wake", Formula: "U − u_min, U the mean of the two ends", Y: 1, Difference: true, take: takeDeficit},
	{Name: "full width at half height", Formula: "distance between the places where the departure from the mean of the ends is half its extreme", X: 1, Sampled: true, take: takeWidth},
	{Name: "slope of a straight line", Formula: "dy/dx by least squares, e.g. spread of a jet from half-widths over x", X: -1, Y: 1, Sampled: true, take: takeSlope},

	{Name: "mean along the line", Formula: "∫φ dx / ∫dx (round: weight |x|), trapezium", Y: 1, Range: Between, Sampled: true, Parameters: []Parameter{shapes}, take: takeMean},
	{Name: "flow-weighted mean", Formula: "∫φ w dx / ∫w dx, w the mass flux (round: weight |x| w): bulk temperature, mass-averaged total pressure", Y: 1, Range: Between, Sampled: true, Second: "mass flux, or velocity at constant density", Parameters: []Parameter{shapes}, take: takeFlowMean},
	{Name: "integral along the line", Formula: "∫φ dx, trapezium", X: 1, Y: 1, Range: Between, Sampled: true, take: takeIntegral},
	{Name: "coefficient of variation", Formula: "CoV = √(mean of (c − c̄)²)/c̄, means along the line (round: weight |x|)", Range: Between, Sampled: true, Parameters: []Parameter{shapes}, take: takeVariation(false)},
	{Name: "mixing index", Formula: "1 − √(mean of (c − c̄)² / (c̄ (1 − c̄))), c a fraction from 0 to 1", Pure: true, Range: Between, Sampled: true, Parameters: []Parameter{shapes}, take: takeVariation(true)},
	{Name: "recirculation ratio", Formula: "∫max(−u, 0) dx / ∫max(u, 0) dx (round: weight |x|)", Range: Between, Sampled: true, Signed: true, Parameters: []Parameter{shapes}, take: takeBackflow},

	{Name: "fall between the ends", Formula: "first value less last value, e.g. pressure loss", Y: 1, Difference: true, Range: Between, take: takeFall},
	{Name: "loss coefficient", Formula: "ζ = (first value − last value)/q", Range: Between, Parameters: []Parameter{{Key: "scale", Label: "dynamic pressure q", Unit: "y", Needed: true}}, take: takeLoss},
	{Name: "mean residence time", Formula: "t̄ = ∫t E dt / ∫E dt", X: 1, Range: Between, Sampled: true, take: takeResidence(false)},
	{Name: "variance of the residence time", Formula: "σ² = ∫(t − t̄)² E dt / ∫E dt", X: 2, Range: Between, Sampled: true, take: takeResidence(true)},
	{Name: "part of the line beyond a limit", Formula: "length with φ above the limit over the whole length, straight between rows, e.g. of a comfort limit", Range: Between, Sampled: true,
		Parameters: []Parameter{{Key: KeyLevel, Label: "limit", Unit: "y", Needed: true, Low: -1e30}}, take: takeBeyond},
}
