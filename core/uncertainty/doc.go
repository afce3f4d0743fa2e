// Package uncertainty turns stated uncertainties into standard uncertainties
// at the stations and keeps their correlation structure.
//
// Inputs are slices over the stations, in the unit of the quantity. A source
// is either independent between stations or common to all of them; nothing is
// ever entered as a matrix. The package refuses coverage it does not
// understand, negative widths, and blanks: a blank is never zero.
package uncertainty
