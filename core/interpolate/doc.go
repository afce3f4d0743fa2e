// Package interpolate evaluates a curve between its points, by straight lines
// or by a cubic that keeps monotone data monotone.
//
// Inputs are slices of one curve: abscissae strictly ascending, values
// parallel to them, stations ascending; all finite, in any one unit. A station
// outside the abscissae is refused by a typed error: nothing is ever
// extrapolated. The package cannot tell how wrong the interpolated value is,
// nor whether two neighbours belong to one curve: core/station does.
package interpolate
