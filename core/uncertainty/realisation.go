package uncertainty

import (
	"math"
	"slices"
)

// Realisation draws errors of the stations with the covariance of a budget.
type Realisation struct {
	b      Budget
	g      *Generator
	number [][]int // of every grouped source: the group of each station
	groups []int   // and how many there are
	order  [][]int // of every source with a length: the stations along it
}

// NewRealisation returns draws of normal errors from a seed. Everything in b
// must be finite.
func NewRealisation(b Budget, seed uint64) *Realisation {
	r := &Realisation{b: b, g: NewGenerator(seed)}
	for _, source := range b.Groups {
		number, count := GroupNumbers(source.Label)
		r.number, r.groups = append(r.number, number), append(r.groups, count)
	}
	for _, source := range b.Markov {
		r.order = append(r.order, Along(source.X))
	}
	return r
}

// Next fills e, one error a station.
func (r *Realisation) Next(e []float64) {
	for i, v := range r.b.Variance {
		e[i] = math.Sqrt(v) * r.g.Normal()
	}
	for _, c := range r.b.Common {
		z := r.g.Normal()
		for i, u := range c {
			e[i] += float64(u * z)
		}
	}
	for k, source := range r.b.Groups {
		z := make([]float64, r.groups[k])
		for i := range z {
			z[i] = r.g.Normal()
		}
		for i, u := range source.U {
			e[i] += float64(u * z[r.number[k][i]])
		}
	}
	for k, source := range r.b.Markov {
		state, before := 0.0, math.Inf(-1)
		for _, i := range r.order[k] {
			keep, fresh := Step(source.X[i]-before, source.Length)
			state = float64(keep*state) + float64(math.Sqrt(fresh)*r.g.Normal())
			before = source.X[i]
			e[i] += float64(source.U[i] * state)
		}
	}
}

// GroupNumbers returns the number of each station's group, from 0 in the order
// in which the labels first appear, and how many groups there are.
func GroupNumbers(label []int) (number []int, count int) {
	known := map[int]int{}
	number = make([]int, len(label))
	for i, l := range label {
		k, seen := known[l]
		if !seen {
			k = len(known)
			known[l] = k
		}
		number[i] = k
	}
	return number, len(known)
}

// Along returns the stations in the order of x, equal ones as they stand.
func Along(x []float64) []int {
	order := make([]int, len(x))
	for i := range order {
		order[i] = i
	}
	slices.SortStableFunc(order, func(i, j int) int {
		switch {
		case x[i] < x[j]:
			return -1
		case x[i] > x[j]:
			return 1
		}
		return 0
	})
	return order
}

// Step returns, for a first-order Markov process of variance 1, the factor
// exp(-distance/length) of its state over a distance, and the variance that is
// new there, 1 - factor^2.
func Step(distance, length float64) (keep, fresh float64) {
	t := distance / length
	if math.IsNaN(t) { // infinite length, first station
		return 0, 1
	}
	return math.Exp(-t), -math.Expm1(-2 * t)
}
