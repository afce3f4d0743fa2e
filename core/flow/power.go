package flow

import "math"

// powerLaws is the 1/7-power profile of a turbulent boundary layer. Its
// thicknesses are exact: delta* = delta/8, theta = 7 delta/72, H = 9/7.
func powerLaws() []Law {
	whole := Range{Lo: 0, Hi: 1, Source: "the profile ends at the edge of the layer"}
	return []Law{{
		ID: "power-profile-7", Name: "Turbulent boundary layer, power 1/7", Kind: Correlation, Formula: "u/U = (y/delta)^(1/7)",
		Station: plain("y/delta", "distance from the wall over thickness of the layer", "1", whole),
		Value:   result("u/U", "velocity over that outside", "1"),
		Source:  "L. Prandtl (from memory)", Reach: Memory, Uncertainty: noneStated,
		Caveat: "infinite slope at the wall: it gives no wall friction; slope above zero at the edge; fits moderate Reynolds numbers",
		at:     func(_ []float64, y float64) float64 { return math.Pow(y, 1./7) },
	}}
}
