package plausibility

import "math"

// Causes of two different values at one abscissa.
const (
	Readings = "readings" // the same place was read again
	Step     = "step"     // a jump: each value continues the rows on its side
	Sides    = "sides"    // the curve goes out and back: two places with one abscissa
	Zones    = "zones"    // parts of a line were written one behind the other and overlap
)

// Repeat is a pair of rows with one abscissa and different values.
type Repeat struct {
	Rows  [2]int
	Cause string
}

// clear is the part that the distances to the own side must stay below, of
// those to the other side, for a pair to be a jump.
const clear = 0.25

// large is how many times the steps to the rows on either side a jump is: a
// smaller one cannot be told from two readings on a slope.
const large = 2

// Repeats returns the pairs of rows with one abscissa and different values, in
// file order, each row paired with the last before it, and what is likely
// behind each. Rows without a number are passed over.
//
// Neighbours in the file are a jump where the first continues the two rows
// before and the second the two rows behind, and they differ by more than the
// rows around do, else repeated readings. Rows
// apart are two sides of a curve where x runs opposite ways at them. Where it
// runs the same way the file was begun anew: repeated readings if that gives
// most rows a partner, else parts that overlap. The cause is a proposal.
func Repeats(x, y []float64) []Repeat {
	if monotone(x) {
		return nil
	}
	rows := make([]int, 0, len(x))
	last := map[float64]int{} // place among rows
	var found []Repeat
	var places [][2]int
	for i := range x {
		if math.IsNaN(x[i]) || math.IsNaN(y[i]) {
			continue
		}
		at := len(rows)
		rows = append(rows, i)
		if before, seen := last[x[i]]; seen && y[rows[before]] != y[i] {
			found = append(found, Repeat{Rows: [2]int{rows[before], i}})
			places = append(places, [2]int{before, at})
		}
		last[x[i]] = at
	}
	again := 0
	for n, p := range places {
		r := &found[n]
		switch {
		case p[1] == p[0]+1 && steps(x, y, rows, p[0]):
			r.Cause = Step
		case p[1] == p[0]+1:
			r.Cause = Readings
		case way(x, rows, p[0]) == -way(x, rows, p[1]):
			r.Cause = Sides
		default:
			r.Cause = Zones
			again++
		}
	}
	if 4*again > len(rows) { // half of the rows: two in each pair
		for n := range found {
			if found[n].Cause == Zones {
				found[n].Cause = Readings
			}
		}
	}
	return found
}

// monotone reports whether x strictly rises or strictly falls, with a number
// in every row: then no abscissa repeats.
func monotone(x []float64) bool {
	up, down := true, true
	for i := 1; i < len(x) && (up || down); i++ {
		up, down = up && x[i] > x[i-1], down && x[i] < x[i-1]
	}
	return up || down
}

// way returns 1 or -1 as most of the four steps of x around a place rise or
// fall: one of them may turn, or lead to a part that was begun anew.
func way(x []float64, rows []int, at int) int {
	rising := 0
	for k := max(at-2, 0); k < min(at+2, len(rows)-1); k++ {
		switch h := x[rows[k+1]] - x[rows[k]]; {
		case h > 0:
			rising++
		case h < 0:
			rising--
		}
	}
	if rising < 0 {
		return -1
	}
	return 1
}

// steps reports whether the values at a place and the next are a jump.
func steps(x, y []float64, rows []int, at int) bool {
	if at < 2 || at+3 >= len(rows) {
		return false
	}
	line := func(i, j int, to float64) float64 {
		a, b := rows[i], rows[j]
		return y[b] + float64((y[b]-y[a])/(x[b]-x[a])*(to-x[b]))
	}
	to := x[rows[at]]
	before, behind := line(at-2, at-1, to), line(at+3, at+2, to)
	first, second := y[rows[at]], y[rows[at+1]]
	if size := math.Abs(second - first); !(size > large*math.Abs(first-y[rows[at-1]]) && size > large*math.Abs(y[rows[at+2]]-second)) {
		return false
	}
	own := math.Abs(first-before) + math.Abs(second-behind)
	other := math.Abs(first-behind) + math.Abs(second-before)
	return own < clear*other // NaN and infinity, of rows at one place, are no jump
}
