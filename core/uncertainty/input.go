package uncertainty

import "math"

// Central returns the sensitivities (plus - minus)/(2 step) at the stations
// from runs with one input lowered and raised by step, in the unit of the
// simulation over that of the input.
func Central(minus, plus []float64, step float64) []float64 {
	return slope(minus, plus, 2*step)
}

// OneSided returns the sensitivities (changed - base)/step from a run with one
// input changed by step, which may be negative.
func OneSided(base, changed []float64, step float64) []float64 {
	return slope(base, changed, step)
}

func slope(from, to []float64, step float64) []float64 {
	c := make([]float64, len(from))
	for i := range c {
		c[i] = (to[i] - from[i]) / step
	}
	return c
}

// OfInput returns the common source of one input of standard uncertainty u:
// sensitivity times u with its sign. Where the data depend on the same input,
// ofData holds their sensitivity and the difference counts, since
// E = S(x) - D(x) sees one error of x; nil where they do not. This stands for
// both sides: the input then belongs to neither u_input nor u_D again. Source:
// derivation from E = S - D.
func OfInput(ofSimulation, ofData []float64, u float64) Source {
	c := make([]float64, len(ofSimulation))
	for i, s := range ofSimulation {
		if ofData != nil {
			s -= ofData[i]
		}
		c[i] = s * u
	}
	return Source{U: c, Common: true}
}

// OfMembers returns the mean of m runs at every station and their scatter as
// common sources, one for each run: (run - mean)/sqrt(m-1). The covariance they
// make is the sample covariance of the runs, of rank m-1 at most. Fewer than two
// runs have no scatter: there is no source, and it is not ok.
func OfMembers(runs [][]float64) (mean []float64, sources []Source, ok bool) {
	if len(runs) < 2 {
		return nil, nil, false
	}
	m := float64(len(runs))
	mean = make([]float64, len(runs[0]))
	for i := range mean {
		sum := 0.0
		for _, run := range runs {
			sum += run[i] - runs[0][i]
		}
		mean[i] = runs[0][i] + sum/m
	}
	for _, run := range runs {
		u := make([]float64, len(mean))
		for i, v := range run {
			u[i] = (v - mean[i]) / math.Sqrt(m-1)
		}
		sources = append(sources, Source{U: u, Common: true})
	}
	return mean, sources, true
}

// Bounds returns the largest part that inputs known only to lie in an interval
// can have in the simulation: the sum of |sensitivity| times half-width. Such a
// part is an interval of E, added to its ends, and no standard uncertainty.
func Bounds(sensitivities [][]float64, halfWidths []float64) []float64 {
	var sum []float64
	for k, c := range sensitivities {
		if sum == nil {
			sum = make([]float64, len(c))
		}
		for i, v := range c {
			sum[i] += float64(math.Abs(v) * halfWidths[k])
		}
	}
	return sum
}

// Between returns the sensitivities at a value from runs below and above it at
// unequal steps,
//
//	(below^2 (plus - base) + above^2 (base - minus))/(below above (below + above)),
//
// exact for a parabola, as Central is at equal steps. Both steps are > 0. Source:
// the parabola through three points.
func Between(minus, base, plus []float64, below, above float64) []float64 {
	c := make([]float64, len(base))
	for i := range c {
		rise := float64(below*below*(plus[i]-base[i])) + float64(above*above*(base[i]-minus[i]))
		c[i] = rise / (below * above * (below + above))
	}
	return c
}
