package uncertainty

import "math"

// Source is the standard uncertainty of one cause at every station, with its
// pattern: independent between stations where none is given, else the first
// that is given of common, group and length.
type Source struct {
	// U is >= 0 and NaN where it is not known. Where the error is shared, U
	// carries the sign with which the shared error acts: a common scale error
	// has the sign of the reading (see OfScale).
	U      []float64
	Common bool      // the same unknown error at all stations, scaled by U
	Group  []int     // a label for every station: one error for each label
	X      []float64 // positions of the stations, in the unit of Length
	Length float64   // > 0: correlation exp(-|x_i - x_j|/Length)
}

// Grouped is a source whose error is shared within each group of stations and
// independent between groups: V_ij = U_i U_j where Label_i = Label_j, else 0.
type Grouped struct {
	U     []float64
	Label []int
}

// Markov is a source with a correlation length:
// V_ij = U_i U_j exp(-|X_i - X_j|/Length).
type Markov struct {
	U, X   []float64
	Length float64
}

// Budget is the covariance of the stations: V = diag(Variance) + sum of
// c cᵀ over the columns of Common + the sources of Groups and Markov.
type Budget struct {
	Variance []float64
	Common   [][]float64
	Groups   []Grouped
	Markov   []Markov
}

// Combine returns the budget of independent causes over n stations. Stations
// where a source is NaN have a NaN variance: unknown, not zero.
func Combine(n int, sources []Source) Budget {
	b := Budget{Variance: make([]float64, n)}
	for _, s := range sources {
		switch {
		case s.Common:
			b.Common = append(b.Common, s.U)
		case s.Group != nil:
			b.Groups = append(b.Groups, Grouped{s.U, s.Group})
		case s.Length > 0:
			b.Markov = append(b.Markov, Markov{s.U, s.X, s.Length})
		default:
			addSquares(b.Variance, s.U)
		}
	}
	return b
}

// addSquares adds the squares of u to the variance.
func addSquares(variance, u []float64) {
	for i, v := range u {
		variance[i] += float64(v * v)
	}
}

// Total returns the standard uncertainty at every station, the square root of
// the diagonal of V.
func (b Budget) Total() []float64 {
	total := make([]float64, len(b.Variance))
	copy(total, b.Variance)
	for _, c := range b.Common {
		addSquares(total, c)
	}
	for _, g := range b.Groups {
		addSquares(total, g.U)
	}
	for _, m := range b.Markov {
		addSquares(total, m.U)
	}
	for i, v := range total {
		total[i] = math.Sqrt(v)
	}
	return total
}

// Covariance returns the element V_ij.
func (b Budget) Covariance(i, j int) float64 {
	sum := 0.0
	if i == j {
		sum = b.Variance[i]
	}
	for _, c := range b.Common {
		sum += float64(c[i] * c[j])
	}
	for _, g := range b.Groups {
		if g.Label[i] == g.Label[j] {
			sum += float64(g.U[i] * g.U[j])
		}
	}
	for _, m := range b.Markov {
		sum += float64(float64(m.U[i]*m.U[j]) * math.Exp(-math.Abs(m.X[i]-m.X[j])/m.Length))
	}
	return sum
}

// Weighted returns the variance of the sum of weight times value over the
// stations, wᵀ V w.
func (b Budget) Weighted(weight []float64) float64 {
	sum := 0.0
	for i, v := range b.Variance {
		sum += float64(float64(weight[i]*weight[i]) * v)
	}
	for _, c := range b.Common {
		one := 0.0
		for i, u := range c {
			one += float64(weight[i] * u)
		}
		sum += float64(one * one)
	}
	rest := Budget{Variance: make([]float64, len(b.Variance)), Groups: b.Groups, Markov: b.Markov}
	if len(b.Groups)+len(b.Markov) > 0 {
		for i := range weight {
			for j := range weight {
				sum += float64(float64(weight[i]*weight[j]) * rest.Covariance(i, j))
			}
		}
	}
	return sum
}

// At returns the budget of some of the stations, in the order of rows.
func (b Budget) At(rows []int) Budget {
	part := Budget{Variance: pick(b.Variance, rows)}
	for _, c := range b.Common {
		part.Common = append(part.Common, pick(c, rows))
	}
	for _, g := range b.Groups {
		part.Groups = append(part.Groups, Grouped{pick(g.U, rows), pick(g.Label, rows)})
	}
	for _, m := range b.Markov {
		part.Markov = append(part.Markov, Markov{pick(m.U, rows), pick(m.X, rows), m.Length})
	}
	return part
}

func pick[T any](values []T, rows []int) []T {
	out := make([]T, len(rows))
	for k, i := range rows {
		out[k] = values[i]
	}
	return out
}

// Through returns the standard uncertainty of the sum of c_i times the value
// at station i: sqrt(cᵀVc). Stations with a slope of zero do not count, known
// or not.
func (b Budget) Through(c []float64) float64 {
	total := 0.0
	for i, v := range b.Variance {
		if c[i] != 0 {
			total += float64(float64(c[i]*c[i]) * v)
		}
	}
	sum := func(u []float64, over func(i int) bool) float64 {
		s := 0.0
		for i, v := range u {
			if c[i] != 0 && over(i) {
				s += float64(c[i] * v)
			}
		}
		return s
	}
	for _, u := range b.Common {
		s := sum(u, func(int) bool { return true })
		total += float64(s * s)
	}
	for _, g := range b.Groups {
		done := map[int]bool{}
		for _, label := range g.Label {
			if !done[label] {
				done[label] = true
				s := sum(g.U, func(i int) bool { return g.Label[i] == label })
				total += float64(s * s)
			}
		}
	}
	for _, m := range b.Markov {
		for i := range m.U {
			for j := range m.U {
				if c[i] != 0 && c[j] != 0 {
					total += float64(float64(c[i]*c[j])*float64(m.U[i]*m.U[j])) * math.Exp(-math.Abs(m.X[i]-m.X[j])/m.Length)
				}
			}
		}
	}
	return math.Sqrt(max(0, total))
}
