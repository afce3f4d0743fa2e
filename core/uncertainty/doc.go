// Package uncertainty turns stated uncertainties into standard uncertainties
// at the stations and keeps their correlation structure, and propagates the
// uncertainty of inputs through a reduction, by slopes and by sampling.
//
// Inputs are slices over the stations, in the unit of the quantity. A source is
// independent between stations, common to all of them (an offset, or a scale
// with the sign of the reading), shared within groups, or correlated over a
// length; no covariance between stations is ever entered as a matrix. Inputs of
// a model are few and may carry a correlation matrix.
//
// The package refuses coverage it does not understand, negative widths, blanks
// (a blank is never zero), effective degrees of freedom of correlated terms, and
// a standard deviation for means of three readings or fewer. It cannot tell
// whether a source is missing.
package uncertainty
