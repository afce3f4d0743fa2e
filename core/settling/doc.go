// Package settling judges whether one run has come to rest: monitors and
// residuals by iteration, averages of unsteady runs by time, and balances of
// what enters and leaves.
//
// A monitor is a Series: abscissae (iterations, or time in any one unit) and
// values in any one unit; results are in the same units. Judge classifies
// first, and only then gives a mean, a window and an iterative uncertainty,
// or says why there is none. Uncertainties named U are standard ones (k = 1);
// a half-range is a bound, u = half-range/sqrt(3).
//
// What matters is measured against the grid uncertainty where that is known:
// a change below a tenth of it is small. Without it a thousandth of the value
// is used (no source).
//
// Nothing here can tell whether a settled run has settled on the right
// solution, or whether a stall or a cycle is the flow's or the solver's.
package settling
