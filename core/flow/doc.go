// Package flow computes reference curves from published laws: plates, walls,
// pipes, spheres, potential flow, free shear.
//
// Every Law states its formula, symbols with units, ranges, source, how its
// source was reached, and an uncertainty or that none is stated. Stations and
// parameters are finite numbers in the units of their symbols (SI, angles in
// radians); stations may come in any order. Each quantity has two ranges.
// Outside the domain the formula says nothing: a parameter is refused by a
// typed error, a station gets no value (NaN) and a notice. Outside the stated
// range, which is narrower, the value is computed and flagged, station by
// station and in a notice. Nothing is extended in silence.
//
// The package cannot tell whether a flow at hand is the flow of the law:
// smooth, fully developed, free of pressure gradient, turbulent or laminar.
// Laws say so in their caveats. Agreement with a law or a correlation is no
// validation.
package flow
