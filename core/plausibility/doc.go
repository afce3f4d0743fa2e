// Package plausibility looks for the usual mistakes behind numbers that read
// without error: a unit off by a power of ten, a pressure divided by density,
// swapped columns, two branches shuffled by sorting, a magnitude where a sign
// belongs.
//
// Inputs are slices over rows or common stations, both sides in SI. Results
// are findings with the numbers that raised them. It proposes and never
// applies: no value is changed here or because of it.
//
// It cannot tell a coincidence from a mistake; every finding is a question.
package plausibility
