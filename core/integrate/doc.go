// Package integrate sums a curve over its stations, by the trapezoid and by
// Simpson's rule on uneven stations.
//
// Inputs are two parallel slices of one curve, in any one unit each: abscissae
// strictly ascending, all values finite. The integral runs over the stations
// given and not beyond: no end is extrapolated, no gap bridged. What a user's
// file can reach, too few stations, an order that does not ascend, a value that
// is no number, is a typed error. The package cannot tell how wrong the sum is
// between the stations.
package integrate
