// Package refinement judges a family of grids: it classifies how a value
// changes with refinement first, and only then computes an order, an
// extrapolated value and an uncertainty, or says why there is none.
//
// Inputs are cell counts (pure numbers, the larger the finer) and values in
// any one unit, in any order; for curves one pair of slices a grid. Grid 1 is
// the finest of the three used, grid 3 the coarsest: r21 = h2/h1 with
// h = count^(-1/dimension), e21 = f2 - f1, e32 = f3 - f2.
//
// Uncertainties U are expanded, at about 95 %, and in the unit of the values.
// Study is the entry for one value, by one of Rules; Along for a curve; Steps and
// Joint for time steps; NextGrid for what a finer grid would cost; Verify for the
// order against an exact solution; RoundOff for the floor below all of them.
//
// Nothing here can tell whether the grids are similar, whether the runs have
// settled, or whether the three values lie in the asymptotic range.
package refinement
