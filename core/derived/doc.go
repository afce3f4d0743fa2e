// Package derived takes scalars from a curve, by the same code for simulation
// and data.
//
// A curve is two parallel slices in the order in which it runs, in any one
// unit each, NaN where there is no number. Nothing is read across a gap. The
// package cannot tell a magnitude from a signed value: a column that was
// written without its sign has no crossings.
//
// The kinds that a study can ask for stand in one table with their formula,
// unit, parameters and what they refuse. Each says what its own method leaves
// open: the rows thinned, a contour left open, a constant at the end of its
// range.
package derived
