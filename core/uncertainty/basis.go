package uncertainty

import "math"

// Constant returns n stations of the same standard uncertainty.
func Constant(n int, u float64) []float64 {
	all := make([]float64, n)
	for i := range all {
		all[i] = u
	}
	return all
}

// OfReading returns fraction times |d| at every station.
func OfReading(d []float64, fraction float64) []float64 {
	all := make([]float64, len(d))
	for i, v := range d {
		all[i] = math.Abs(v) * fraction
	}
	return all
}

// Scaled returns u divided by the coverage factor k.
func Scaled(u []float64, k float64) []float64 {
	all := make([]float64, len(u))
	for i, v := range u {
		all[i] = v / k
	}
	return all
}

// OfScale returns the common source of a scale error: fraction times d with
// the sign of d, since one unknown factor acts on all readings.
func OfScale(d []float64, fraction float64) Source {
	u := make([]float64, len(d))
	for i, v := range d {
		u[i] = v * fraction
	}
	return Source{U: u, Common: true}
}

// OfFullScale returns n stations of fraction times the full scale of the
// instrument, in the unit of full scale.
func OfFullScale(n int, fraction, fullScale float64) []float64 {
	return Constant(n, math.Abs(fullScale)*fraction)
}

// OfCounts returns n stations of a number of counts, one count being worth
// perCount in the unit of the quantity: a digital step, or 0.0001 for the
// counts in which drag coefficients are stated (common practice, no source).
func OfCounts(n int, counts, perCount float64) []float64 {
	return Constant(n, counts*math.Abs(perCount))
}
