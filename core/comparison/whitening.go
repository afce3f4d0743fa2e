package comparison

import (
	"errors"
	"math"
	"slices"

	"weirmark/core/uncertainty"
)

// MaxColumns is the number of groups, common sources included, up to which
// grouped sources that cut across another one or stand beside a correlation
// length are treated at any number of stations.
const MaxColumns = 64

// ErrPattern says that the patterns of the sources cannot be treated together
// at this number of stations.
var ErrPattern = errors.New("too many stations for sources whose patterns cut across each other")

// whitening is a linear map W with |W x|^2 = x' V^-1 x. Every step of it takes
// out the covariance of one part and is linear in the number of stations:
//
//  1. the independent variance together with the sources of a correlation
//     length: the innovations of a Kalman filter along the stations, over their
//     standard deviations; without a length, x/sqrt(variance);
//  2. for every column g of the other sources, as the steps before have left it,
//     the symmetric root (I + g g')^-1/2, on the stations of the column only.
//
// So a common source stays with its own station as far as can be. Where V has
// no such form, the dense symmetric root is used, reduced to the rank of V.
// Source: the identity (I + g g')^-1/2 = I - g g'/(s (1+s)), s^2 = 1 + |g|^2,
// which is the Woodbury identity for one column; Kalman filter of a sum of
// first-order Markov processes with observation noise (Gelb, Applied Optimal
// Estimation, chapter 4; from memory).
type whitening struct {
	n       int
	scale   []float64 // 1/sqrt(variance); nil with a filter
	filter  *filter
	columns []column
	root    *root // the dense form; nil without
}

// column is g on some of the stations, all of them where at is nil, and the
// factor 1/(s (1+s)).
type column struct {
	at     []int
	g      []float64
	factor float64
}

// newWhitening returns the map for the covariance of b. It fails with ErrFinite,
// ErrSize, ErrPattern or ErrRange.
func newWhitening(b uncertainty.Budget) (*whitening, error) {
	if err := usable(b); err != nil {
		return nil, err
	}
	w := &whitening{n: len(b.Variance)}
	if w.base(b) && w.patterns(b) {
		if !w.finite() {
			return nil, ErrFinite
		}
		return w, nil
	}
	if w.n > MaxDense {
		if independent(b) {
			return nil, ErrPattern
		}
		return nil, ErrSize
	}
	r, err := newRoot(b)
	if err != nil {
		return nil, err
	}
	return &whitening{n: w.n, root: r}, nil
}

// usable reports ErrFinite where something of b is no finite number, or a
// length is not positive.
func usable(b uncertainty.Budget) error {
	all := append([][]float64{b.Variance}, b.Common...)
	for _, g := range b.Groups {
		all = append(all, g.U)
	}
	for _, m := range b.Markov {
		if !(m.Length > 0) {
			return ErrFinite
		}
		all = append(all, m.U, m.X)
	}
	for _, values := range all {
		if !finite(values) {
			return ErrFinite
		}
	}
	return nil
}

// base prepares the first step; it is false where some station has no variance
// of its own.
func (w *whitening) base(b uncertainty.Budget) bool {
	if len(b.Markov) > 0 {
		w.filter = newFilter(b)
		return w.filter != nil
	}
	if !independent(b) {
		return false
	}
	w.scale = make([]float64, w.n)
	for i, v := range b.Variance {
		w.scale[i] = 1 / math.Sqrt(v)
	}
	return true
}

// patterns prepares the second step: first the groups of the source that has
// most of them, which are disjoint, then all other columns. It is false where
// groups make them more than MaxColumns.
func (w *whitening) patterns(b uncertainty.Budget) bool {
	groups := slices.Clone(b.Groups)
	slices.SortStableFunc(groups, func(a, b uncertainty.Grouped) int { return groupCount(b) - groupCount(a) })
	if len(groups) > 0 && w.filter == nil {
		w.disjoint(groups[0])
		groups = groups[1:]
	}
	wide := slices.Clone(b.Common)
	for _, g := range groups {
		number, count := uncertainty.GroupNumbers(g.Label)
		if len(wide)+count > MaxColumns {
			return false
		}
		for k := range count {
			c := make([]float64, w.n)
			for i, u := range g.U {
				if number[i] == k {
					c[i] = u
				}
			}
			wide = append(wide, c)
		}
	}
	for _, c := range wide {
		g := w.apply(c)
		w.columns = append(w.columns, column{g: g, factor: rootFactor(g)})
	}
	return true
}

func groupCount(g uncertainty.Grouped) int {
	_, count := uncertainty.GroupNumbers(g.Label)
	return count
}

// disjoint adds the columns of one grouped source, each on its stations.
func (w *whitening) disjoint(source uncertainty.Grouped) {
	number, count := uncertainty.GroupNumbers(source.Label)
	first := len(w.columns)
	w.columns = append(w.columns, make([]column, count)...)
	for i, u := range source.U {
		c := &w.columns[first+number[i]]
		c.at = append(c.at, i)
		c.g = append(c.g, u*w.scale[i])
	}
	for k := first; k < len(w.columns); k++ {
		w.columns[k].factor = rootFactor(w.columns[k].g)
	}
}

// rootFactor returns 1/(s (1+s)) for s^2 = 1 + |g|^2.
func rootFactor(g []float64) float64 {
	square := 1.0
	for _, v := range g {
		square += float64(v * v)
	}
	s := math.Sqrt(square)
	if math.IsInf(s, 1) {
		return math.NaN()
	}
	return 1 / (s * (1 + s))
}

// finite reports whether no square overflowed on the way.
func (w *whitening) finite() bool {
	for _, c := range w.columns {
		if math.IsNaN(c.factor) || math.IsInf(c.factor, 0) {
			return false
		}
	}
	return true
}

// apply returns W x, n values.
func (w *whitening) apply(x []float64) []float64 {
	if w.root != nil {
		return w.root.apply(x)
	}
	y := make([]float64, w.n)
	if w.filter != nil {
		w.filter.apply(x, y)
	} else {
		for i, v := range x {
			y[i] = v * w.scale[i]
		}
	}
	for _, c := range w.columns {
		c.apply(y)
	}
	return y
}

// apply takes the column out of y.
func (c column) apply(y []float64) {
	sum := 0.0
	if c.at == nil {
		for i, g := range c.g {
			sum += float64(g * y[i])
		}
		sum *= c.factor
		for i, g := range c.g {
			y[i] -= float64(g * sum)
		}
		return
	}
	for k, i := range c.at {
		sum += float64(c.g[k] * y[i])
	}
	sum *= c.factor
	for k, i := range c.at {
		y[i] -= float64(c.g[k] * sum)
	}
}

// rank returns the number of combinations of the stations that carry variance.
func (w *whitening) rank() int {
	if w.root != nil {
		return w.root.rank
	}
	return w.n
}

// reaches reports whether x lies in the range of V, but for rounding.
func (w *whitening) reaches(x []float64) error {
	if w.root != nil {
		return w.root.reaches(x)
	}
	return nil
}

// filter holds the gains of the Kalman filter along the stations.
type filter struct {
	order  []int
	keep   [][]float64 // of every source, at each place of the order
	u      [][]float64
	gain   [][]float64
	spread []float64 // standard deviation of each innovation
}

// newFilter returns the filter for the independent variance and the sources
// with a correlation length; nil where their stations do not run the same way,
// or where an innovation has no variance (below 1e-10 of that of its station,
// as the same reading twice).
func newFilter(b uncertainty.Budget) *filter {
	n, m := len(b.Variance), len(b.Markov)
	f := &filter{order: uncertainty.Along(b.Markov[0].X), spread: make([]float64, n)}
	for _, source := range b.Markov {
		for k := 1; k < n; k++ {
			if source.X[f.order[k]] < source.X[f.order[k-1]] {
				return nil
			}
		}
		f.keep = append(f.keep, make([]float64, n))
		f.gain = append(f.gain, make([]float64, n))
		f.u = append(f.u, source.U)
	}
	p := square(m)
	load, gain, keep := make([]float64, m), make([]float64, m), make([]float64, m)
	before := -1
	for k, i := range f.order {
		for j, source := range b.Markov {
			distance := math.Inf(1)
			if before >= 0 {
				distance = source.X[i] - source.X[before]
			}
			fresh := 0.0
			keep[j], fresh = uncertainty.Step(distance, source.Length)
			f.keep[j][k] = keep[j]
			for l := range j {
				p[j][l] *= keep[j] * keep[l]
				p[l][j] = p[j][l]
			}
			p[j][j] = float64(keep[j]*keep[j]*p[j][j]) + fresh
		}
		before = i
		variance, total := b.Variance[i], b.Variance[i]
		for j := range m {
			load[j] = 0
			for l := range m {
				load[j] += float64(p[j][l] * f.u[l][i])
			}
			variance += float64(f.u[j][i] * load[j])
			total += float64(f.u[j][i] * f.u[j][i])
		}
		if !(variance > null*total) || math.IsInf(total, 1) {
			return nil
		}
		f.spread[k] = math.Sqrt(variance)
		for j := range m {
			gain[j] = load[j] / variance
			f.gain[j][k] = gain[j]
		}
		p = updated(p, gain, f.u, i, b.Variance[i])
	}
	return f
}

// updated returns the covariance of the states after the reading at station i,
// A P A' + variance K K' with A = I - K U', a form that stays positive.
func updated(p [][]float64, gain []float64, u [][]float64, i int, variance float64) [][]float64 {
	m := len(p)
	left := func(j, l int) float64 {
		a := -float64(gain[j] * u[l][i])
		if j == l {
			a++
		}
		return a
	}
	half, out := square(m), square(m)
	for j := range m {
		for l := range m {
			for h := range m {
				half[j][l] += float64(left(j, h) * p[h][l])
			}
		}
	}
	for j := range m {
		for l := range m {
			out[j][l] = float64(variance * gain[j] * gain[l])
			for h := range m {
				out[j][l] += float64(half[j][h] * left(l, h))
			}
		}
	}
	return out
}

func square(m int) [][]float64 {
	rows := make([][]float64, m)
	for i := range rows {
		rows[i] = make([]float64, m)
	}
	return rows
}

// apply writes the innovations of x over their deviations to y, each at its
// station.
func (f *filter) apply(x, y []float64) {
	state := make([]float64, len(f.u))
	for k, i := range f.order {
		rest := x[i]
		for j := range state {
			state[j] *= f.keep[j][k]
			rest -= float64(f.u[j][i] * state[j])
		}
		for j := range state {
			state[j] += float64(f.gain[j][k] * rest)
		}
		y[i] = rest / f.spread[k]
	}
}
