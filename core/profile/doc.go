// Package profile splits curves that go out and back, such as the pressure
// round a section, into branches with one value at every station.
//
// Inputs are parallel slices in file order, in any one unit each, NaN where
// there is no number. Results are row numbers: nothing is moved or changed.
//
// It refuses curves that do not turn, or turn more than twice. It cannot tell
// which branch is the upper one without the second coordinate.
package profile
