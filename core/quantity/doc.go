// Package quantity knows units: it parses their symbols, checks dimensions,
// converts to SI and back, and prints numbers.
//
// Values are float64. A unit carries five exponents (length, mass, time,
// temperature, angle), a factor to SI and, for temperatures only, an offset.
// Angle is kept as a dimension of its own so that degrees and plain numbers
// cannot be mixed unseen. The package refuses symbols it does not know and
// never guesses one.
package quantity
