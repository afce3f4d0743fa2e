package station

import (
	"cmp"
	"math"
	"slices"

	"weirmark/core/notice"
	"weirmark/core/quantity"
)

// curve is a curve made ready: abscissae ascending, equal only across two
// pieces, all numbers finite.
type curve struct {
	x, y   []float64
	pieces []piece
	wide   []gap
}

// piece is a run of rows that may be interpolated, from and to as in a slice
// expression. A jump at an end says that the next piece has another value at
// the same abscissa.
type piece struct {
	from, to              int
	jumpBefore, jumpAfter bool
}

// maxJumps is the number of jumps that are told one by one.
const maxJumps = 8

// row is a row of the file. Where y is NaN the file holds no value at x. A
// broken row is parted from the row before it in file order by a row whose
// abscissa is missing.
type row struct {
	x, y   float64
	broken bool
	place  int // among the rows with an abscissa, in file order
}

func finite(v float64) bool { return !math.IsNaN(v) && !math.IsInf(v, 0) }

// prepare orders the rows, parts them at gaps and jumps, and says what it did.
// After a stop notice the curve is empty.
func prepare(name, xname string, x, y []float64) (curve, []notice.Notice) {
	if plain(x, y) {
		return curve{x: x, y: y, pieces: []piece{{to: len(x)}}}, nil
	}
	rows := usable(x, y)
	var notices []notice.Notice
	switch direction(rows) {
	case 1:
	case -1:
		notices = append(notices, notice.New("curve-unsorted", name, xname))
		reverse(rows)
	default:
		if n := branches(rows); n > 1 {
			return curve{}, []notice.Notice{notice.New("curve-loop", name, xname, n)}
		}
		notices = append(notices, notice.New("curve-unsorted", name, xname))
		rows = ordered(rows)
	}
	c, more := assemble(name, xname, rows)
	return c, append(notices, more...)
}

// plain reports whether the slices are a curve as they stand: one row or more,
// strictly ascending, all finite.
func plain(x, y []float64) bool {
	if len(x) == 0 {
		return false
	}
	before := math.Inf(-1)
	for i, v := range x {
		if !(before < v) || math.IsNaN(y[i]) || math.IsInf(y[i], 0) {
			return false
		}
		before = v
	}
	return finite(x[len(x)-1]) // the largest: the others lie below it
}

// usable returns the rows with an abscissa.
func usable(x, y []float64) []row {
	rows := make([]row, 0, len(x))
	broken := false
	for i, v := range x {
		if !finite(v) {
			broken = len(rows) > 0
			continue
		}
		r := row{x: v, y: y[i], broken: broken, place: len(rows)}
		if !finite(r.y) {
			r.y = math.NaN()
		}
		rows = append(rows, r)
		broken = false
	}
	return rows
}

// direction returns 1 where the rows never descend, -1 where they never
// ascend, else 0.
func direction(rows []row) int {
	up, down := true, true
	for i := 1; i < len(rows); i++ {
		up = up && rows[i].x >= rows[i-1].x
		down = down && rows[i].x <= rows[i-1].x
	}
	switch {
	case up:
		return 1
	case down:
		return -1
	}
	return 0
}

// reverse turns the rows round. A break before a row becomes one behind it.
func reverse(rows []row) {
	slices.Reverse(rows)
	for i := len(rows) - 1; i > 0; i-- {
		rows[i].broken = rows[i-1].broken
	}
	if len(rows) > 0 {
		rows[0].broken = false
	}
}

// ordered returns the rows by abscissa, equal ones by value so that the order
// of the file does not matter. A row without an abscissa parts two rows only
// where its neighbours in the file are neighbours still: where else it belongs
// cannot be known.
func ordered(rows []row) []row {
	sorted := slices.Clone(rows)
	slices.SortStableFunc(sorted, func(a, b row) int {
		return cmp.Or(cmp.Compare(a.x, b.x), cmp.Compare(a.y, b.y))
	})
	for from := 0; from < len(sorted); {
		to := from + 1
		for to < len(sorted) && sorted[to].x == sorted[from].x {
			to++
		}
		if towards(sorted, from, to) {
			slices.Reverse(sorted[from:to])
		}
		from = to
	}
	for i := range sorted {
		sorted[i].broken = false
		if i > 0 {
			a, b := sorted[i-1].place, sorted[i].place
			sorted[i].broken = (a-b == 1 || b-a == 1) && rows[max(a, b)].broken
		}
	}
	return sorted
}

// towards reports whether the equal abscissae from to to-1, ascending in
// value, fit the rows around them better the other way round: the value nearer
// to the row before comes first, or at the start the nearer to the row behind
// last.
func towards(rows []row, from, to int) bool {
	switch {
	case to-from == 1:
		return false
	case from > 0:
		y := rows[from-1].y
		return math.Abs(rows[to-1].y-y) < math.Abs(rows[from].y-y)
	case to < len(rows):
		y := rows[to].y
		return math.Abs(rows[from].y-y) < math.Abs(rows[to-1].y-y)
	}
	return false
}

// assemble turns ordered rows into a curve.
func assemble(name, xname string, rows []row) (curve, []notice.Notice) {
	c := curve{x: make([]float64, 0, len(rows)), y: make([]float64, 0, len(rows))}
	var notices []notice.Notice
	repeated, jumps := 0, 0
	open := false // the last piece may be continued
	for from := 0; from < len(rows); {
		g := groupAt(rows, from)
		if g.broken {
			open = false
		}
		from = g.to
		if g.values == 0 {
			open = false
			continue
		}
		c.put(g.x, g.first, open)
		open = true
		if g.lo == g.hi {
			repeated += g.values - 1
			continue
		}
		c.pieces[len(c.pieces)-1].jumpAfter = true
		c.put(g.x, g.last, false)
		c.pieces[len(c.pieces)-1].jumpBefore = true
		if jumps++; jumps <= maxJumps {
			notices = append(notices, notice.New("curve-jump", xname, quantity.Plain(g.x, 10), name, quantity.Plain(g.lo, 10), quantity.Plain(g.hi, 10)))
		}
	}
	if jumps > maxJumps {
		notices = append(notices, notice.New("curve-jumps", jumps-maxJumps, xname, name))
	}
	if repeated > 0 {
		notices = append(notices, notice.New("curve-duplicate", repeated, name))
	}
	return c, notices
}

// put adds a point, to the last piece or as the first of a new one.
func (c *curve) put(x, y float64, open bool) {
	if !open {
		c.pieces = append(c.pieces, piece{from: len(c.x), to: len(c.x)})
	}
	c.x, c.y = append(c.x, x), append(c.y, y)
	c.pieces[len(c.pieces)-1].to++
}

// group is the rows of one abscissa.
type group struct {
	x           float64
	values      int     // rows with a value
	first, last float64 // values on the lower and the upper side
	lo, hi      float64
	broken      bool
	to          int // the row behind the group
}

// groupAt gathers the rows from one on that share its abscissa. A row without
// a value beside one that has it loses nothing.
func groupAt(rows []row, from int) group {
	g := group{x: rows[from].x, broken: rows[from].broken, to: from}
	for ; g.to < len(rows) && rows[g.to].x == g.x; g.to++ {
		v := rows[g.to].y
		if math.IsNaN(v) {
			continue
		}
		if g.values == 0 {
			g.first, g.lo, g.hi = v, v, v
		}
		g.last, g.lo, g.hi = v, min(g.lo, v), max(g.hi, v)
		g.values++
	}
	return g
}
