// Package comparison sets simulation against data: the comparison error
// E = S - D, the validation uncertainty u_val, the interval E ± k u_val of
// the model error, and the joint statistic of all stations.
//
// Inputs are slices over the common stations in one unit; uncertainties are
// standard. The package cannot tell why S and D differ: the joint statistic
// says only whether the stated uncertainties account for the difference.
package comparison
