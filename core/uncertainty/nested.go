package uncertainty

import (
	"errors"
	"math"
)

// ErrNested says that readings cannot be analysed by their levels.
var ErrNested = errors.New("the readings do not form nested groups with a replicated level")

// Level is one level of replication: what varies between its groups beyond
// what varies within them.
type Level struct {
	Groups     int     // groups of this level; of the lowest level, readings
	Degrees    float64 // degrees of freedom of MeanSquare
	MeanSquare float64 // NaN where there is no degree of freedom
	// Variance is the component of the level. Below zero it is an estimate of a
	// component too small to be seen; it counts as zero in Nest.U.
	Variance float64
}

// Nest is the analysis of variance of readings in nested levels.
type Nest struct {
	Mean    float64 // of all readings
	U       float64 // standard uncertainty of Mean
	Degrees float64 // of U: groups of the highest level that varies, less one
	Levels  []Level // from the outermost to the single readings
}

// Nested separates the scatter of readings by level of replication: labels
// holds one slice for each level from the outermost (day) inwards (re-rig), each
// with one label per reading. Readings with the same labels are repeats. A label
// counts within its outer groups only: rig 1 of Monday is not rig 1 of Tuesday.
//
// The components follow from equating the mean squares with their expectations,
// for unequal numbers too; u(mean)^2 = sum over levels of component times sum of
// (group size/N)^2, which for equal numbers is the outermost mean square over N.
// A level without replication has no component of its own: it stays in the level
// above. Source: JCGM 100:2008 H.5 (two levels, equal numbers; clause from
// memory); Searle, Casella and McCulloch, Variance Components, chapter 3 (from
// memory) for more.
//
// It fails with ErrNested where lengths differ, a reading is not finite, or no
// level varies.
func Nested(x []float64, labels ...[]int) (Nest, error) {
	n := len(x)
	for _, l := range labels {
		if len(l) != n {
			return Nest{}, ErrNested
		}
	}
	for _, v := range x {
		if math.IsNaN(v) || math.IsInf(v, 0) {
			return Nest{}, ErrNested
		}
	}
	if n < 2 {
		return Nest{}, ErrNested
	}
	groups := nest(n, labels)
	nested := Nest{Levels: make([]Level, len(groups)-1)}
	nested.Mean, _, _ = Replicates(x)
	means := make([][]float64, len(groups))
	for l, of := range groups {
		means[l] = groupMeans(x, of)
	}
	for l := range nested.Levels {
		inner, outer := groups[l+1], groups[l]
		square := 0.0
		for i := range x {
			d := means[l+1][inner.of[i]] - means[l][outer.of[i]]
			square += float64(d * d)
		}
		degrees := float64(len(inner.size) - len(outer.size))
		nested.Levels[l] = Level{Groups: len(inner.size), Degrees: degrees, MeanSquare: math.NaN(), Variance: math.NaN()}
		if degrees > 0 {
			nested.Levels[l].MeanSquare = square / degrees
		}
	}
	if !nested.components(groups) {
		return Nest{}, ErrNested
	}
	return nested, nil
}

// partition says which group each reading is in, and how many are in each.
type partition struct {
	of   []int
	size []float64
}

// nest returns the partitions from the whole (one group) to the readings.
func nest(n int, labels [][]int) []partition {
	whole := partition{of: make([]int, n), size: []float64{float64(n)}}
	all := []partition{whole}
	for _, l := range labels {
		outer := all[len(all)-1]
		number := map[[2]int]int{}
		inner := partition{of: make([]int, n)}
		for i := range n {
			key := [2]int{outer.of[i], l[i]}
			g, known := number[key]
			if !known {
				g = len(inner.size)
				number[key] = g
				inner.size = append(inner.size, 0)
			}
			inner.of[i] = g
			inner.size[g]++
		}
		all = append(all, inner)
	}
	readings := partition{of: make([]int, n), size: Constant(n, 1)}
	for i := range n {
		readings.of[i] = i
	}
	return append(all, readings)
}

// groupMeans returns the mean of every group, from its first reading so that a
// large common part takes no digits.
func groupMeans(x []float64, p partition) []float64 {
	first := make([]float64, len(p.size))
	seen := make([]bool, len(p.size))
	sum := make([]float64, len(p.size))
	for i, v := range x {
		g := p.of[i]
		if !seen[g] {
			first[g], seen[g] = v, true
		}
		sum[g] += v - first[g]
	}
	for g := range sum {
		sum[g] = first[g] + sum[g]/p.size[g]
	}
	return sum
}

// components solves for the components from the readings outwards, and sets U
// and its degrees. The expected mean square of level l is the sum over itself
// and all levels within it of a coefficient times the component there:
//
//	(sum over groups g of m of n_g^2 (1/n_inner(l) - 1/n_outer(l)))/degrees.
func (nested *Nest) components(groups []partition) bool {
	levels := nested.Levels
	n := groups[0].size[0]
	varies := false
	square := 0.0
	for l := len(levels) - 1; l >= 0; l-- {
		if levels[l].Degrees == 0 {
			continue
		}
		rest := levels[l].MeanSquare
		for m := l + 1; m < len(levels); m++ {
			if levels[m].Degrees > 0 {
				rest -= float64(coefficient(groups, l, m) / levels[l].Degrees * levels[m].Variance)
			}
		}
		levels[l].Variance = rest / (coefficient(groups, l, l) / levels[l].Degrees)
		varies = true
		sizes := 0.0
		for _, size := range groups[l+1].size {
			sizes += float64(size / n * (size / n))
		}
		square += float64(max(levels[l].Variance, 0) * sizes)
		nested.Degrees = levels[l].Degrees
	}
	nested.U = math.Sqrt(square)
	return varies
}

// coefficient returns the weight of the component of level m in the sum of
// squares of level l.
func coefficient(groups []partition, l, m int) float64 {
	part, inner, outer := groups[m+1], groups[l+1], groups[l]
	seen := make([]bool, len(part.size))
	sum := 0.0
	for i, g := range part.of {
		if !seen[g] {
			seen[g] = true
			size := part.size[g]
			sum += float64(size * size * (1/inner.size[inner.of[i]] - 1/outer.size[outer.of[i]]))
		}
	}
	return sum
}
