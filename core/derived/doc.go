// Package derived takes scalars from a curve, by the same code for simulation
// and data.
//
// A curve is two parallel slices in the order in which it runs, in any one
// unit each, NaN where there is no number. Nothing is read across a gap. The
// package cannot tell a magnitude from a signed value: a column that was
// written without its sign has no crossings.
package derived
