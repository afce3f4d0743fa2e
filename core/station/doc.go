// Package station brings a simulated curve to the stations of the reference:
// which stations the curve can answer, its value there, and how far the
// interpolation may be off.
//
// A curve is two parallel slices in file order, abscissa and value, NaN or an
// infinity where the file holds no number; the stations are abscissae in the
// same unit. Nothing is extrapolated, no gap is bridged, and a curve that goes
// out and back is refused: it has no single value at a station. Every station
// left out is listed with its reason.
//
// The package cannot tell whether two curves are in the same unit, nor, unless
// it is asked to part them by a number of median spacings, a gap in the
// physics from a wide spacing of the points.
package station
