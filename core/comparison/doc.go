// Package comparison sets simulation against data: the comparison error
// E = S - D, the validation uncertainty u_val, the interval E ± k u_val of
// the model error, and the joint statistic of all stations with what can be
// asked of it: parts of offset, scale and shape, whitened residuals, the effect
// of an assumed correlation, of stations left out, and of chance.
//
// Inputs are slices over the common stations in one unit; uncertainties are
// standard. Covariances keep the structure of their sources and are linear in
// the number of stations; where patterns cut across each other the package goes
// dense up to MaxDense stations and refuses above. It cannot tell why S and D
// differ: the joint statistic says only whether the stated uncertainties account
// for the difference.
package comparison
