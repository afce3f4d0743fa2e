package station

import (
	"cmp"
	"math"
	"slices"
)

// stretch is a run of rows in one direction of x, from and to inclusive.
type stretch struct {
	from, to int
	up       bool
	lo, hi   float64
}

// Rows that make a stretch a branch. A shuffled file holds many stretches of
// three rows, but hardly two of six and of an eighth of all rows.
const (
	possibleRows, possiblePart = 3, 16
	certainRows, certainPart   = 6, 8
)

// apart is how many times farther from the other stretch than from its own the
// rows lie on average where two stretches are two branches.
const apart = 2

// branches returns how many branches over x the rows have in file order: one
// where they are a shuffled or pieced curve that has a single value, two and
// more where they go out and back.
//
// Stretches that overlap decide. Two that are surely no accident and run in
// opposite directions are branches. Where the curve is too short to be sure,
// or both run the same way (two surfaces in one file, or one curve sampled in
// two passes), the values decide: whether those of one stretch lie on the
// other.
func branches(rows []row) int {
	valued := make([]row, 0, len(rows))
	for _, r := range rows {
		if !math.IsNaN(r.y) {
			valued = append(valued, r)
		}
	}
	all := stretches(valued)
	if n := max(certainRows, len(valued)/certainPart); opposed(long(all, n)) {
		return count(all, valued, n)
	}
	n := max(possibleRows, len(valued)/possiblePart)
	if a, b, ok := overlapping(long(all, n)); ok && separate(valued, a, b) {
		return count(all, valued, n)
	}
	return 1
}

// stretches cuts the rows where x turns, and at a step that leads from one
// piece to another: over four times as wide as the steps on both sides of it.
// Equal abscissae continue a stretch.
func stretches(rows []row) []stretch {
	var all []stretch
	open := false
	for i := 1; i < len(rows); i++ {
		a, b := rows[i-1].x, rows[i].x
		last := len(all) - 1
		switch {
		case leads(rows, i):
			open = false
		case !open && a == b:
		case open && (a == b || (b > a) == all[last].up):
			all[last].to = i
			all[last].lo, all[last].hi = min(all[last].lo, b), max(all[last].hi, b)
		default:
			all = append(all, stretch{from: i - 1, to: i, up: b > a, lo: min(a, b), hi: max(a, b)})
			open = true
		}
	}
	return all
}

// leads reports whether the step to row i leads to another piece.
func leads(rows []row, i int) bool {
	if i < 2 || i > len(rows)-2 {
		return false
	}
	step := func(i int) float64 { return math.Abs(rows[i].x - rows[i-1].x) }
	before, behind := step(i-1), step(i+1)
	return before > 0 && behind > 0 && step(i) > 4*max(before, behind)
}

func (s stretch) rows() int { return s.to - s.from + 1 }

// long returns the stretches of n rows and more, by their lower end.
func long(all []stretch, n int) []stretch {
	var some []stretch
	for _, s := range all {
		if s.rows() >= n {
			some = append(some, s)
		}
	}
	slices.SortStableFunc(some, func(a, b stretch) int { return cmp.Compare(a.lo, b.lo) })
	return some
}

// opposed reports whether two of the stretches, given by their lower ends, run
// in opposite directions over a common part of x.
func opposed(some []stretch) bool {
	up, down := math.Inf(-1), math.Inf(-1) // highest ends so far
	for _, s := range some {
		if s.up && s.lo < down || !s.up && s.lo < up {
			return true
		}
		if s.up {
			up = max(up, s.hi)
		} else {
			down = max(down, s.hi)
		}
	}
	return false
}

// overlapping returns two of the stretches that share a part of x, the largest
// that does so with its largest partner.
func overlapping(some []stretch) (a, b stretch, ok bool) {
	bySize := slices.Clone(some)
	slices.SortStableFunc(bySize, func(a, b stretch) int { return cmp.Compare(b.rows(), a.rows()) })
	for i, a := range bySize {
		for _, b := range bySize[i+1:] {
			if a.lo < b.hi && b.lo < a.hi {
				return a, b, true
			}
		}
	}
	return a, b, false
}

// separate reports whether the values of two overlapping stretches are those
// of two branches: rows lie much farther from the straight lines of the other
// stretch than from the line between their own neighbours. A millionth of the
// range of the values is no distance.
func separate(rows []row, a, b stretch) bool {
	across, own := mean{}, mean{}
	lo, hi := math.Inf(1), math.Inf(-1)
	for _, pair := range [][2]stretch{{a, b}, {b, a}} {
		mine, other := rows[pair[0].from:pair[0].to+1], rows[pair[1].from:pair[1].to+1]
		for i, r := range mine {
			lo, hi = min(lo, r.y), max(hi, r.y)
			if y, inside := valueOn(other, pair[1].up, r.x); inside {
				across.add(math.Abs(r.y - y))
			}
			if i > 0 && i < len(mine)-1 {
				own.add(math.Abs(r.y - line(mine[i-1], mine[i+1], r.x)))
			}
		}
	}
	return across.value() > apart*own.value()+1e-6*(hi-lo)
}

type mean struct {
	sum float64
	n   int
}

func (m *mean) add(v float64) { m.sum += v; m.n++ }

func (m mean) value() float64 {
	if m.n == 0 {
		return 0
	}
	return m.sum / float64(m.n)
}

// valueOn returns the value of a stretch at x, strictly inside it.
func valueOn(rows []row, up bool, x float64) (float64, bool) {
	i, _ := slices.BinarySearchFunc(rows, x, func(r row, x float64) int {
		if up {
			return cmp.Compare(r.x, x)
		}
		return cmp.Compare(x, r.x)
	})
	if i == 0 || i == len(rows) {
		return 0, false
	}
	return line(rows[i-1], rows[i], x), true
}

func line(a, b row, x float64) float64 {
	if a.x == b.x {
		return b.y
	}
	return a.y + float64((b.y-a.y)*((x-a.x)/(b.x-a.x)))
}

// count returns the number of stretches of n rows and more. The first and the
// last are one branch where the curve closes on itself between them.
func count(all []stretch, rows []row, n int) int {
	some := 0
	for _, s := range all {
		if s.rows() >= n {
			some++
		}
	}
	first, last := all[0], all[len(all)-1]
	if closing := rows[0].x - rows[len(rows)-1].x; some > 2 && first.up == last.up && first.rows() >= n && last.rows() >= n &&
		(closing == 0 || (closing > 0) == last.up) {
		some--
	}
	return max(some, 2)
}
