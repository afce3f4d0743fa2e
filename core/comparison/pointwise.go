package comparison

import "math"

// Error returns the comparison error e = s - d at every station.
func Error(s, d []float64) []float64 {
	e := make([]float64, len(s))
	for i := range e {
		e[i] = s[i] - d[i]
	}
	return e
}

// RootSum returns the root of the sum of squares of standard uncertainties,
// u_val where all parts are given. A nil part is left out; a NaN stays.
func RootSum(parts ...[]float64) []float64 {
	var all []float64
	for _, p := range parts {
		if p == nil {
			continue
		}
		if all == nil {
			all = make([]float64, len(p))
		}
		for i, u := range p {
			all[i] += float64(u * u)
		}
	}
	for i, v := range all {
		all[i] = math.Sqrt(v)
	}
	return all
}

// Ratio returns |e|/u; NaN where u is zero or unknown.
func Ratio(e, u []float64) []float64 {
	r := make([]float64, len(e))
	for i, v := range e {
		q := math.NaN()
		if w := u[i]; w > 0 {
			q = math.Abs(v) / w
		}
		r[i] = q
	}
	return r
}
