package interpolate

// Method names an interpolant.
type Method string

// The interpolants.
const (
	Linear   Method = "linear"   // straight lines between neighbours
	Monotone Method = "monotone" // cubic that keeps monotone data monotone
)
