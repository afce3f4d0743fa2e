package profile

import (
	"errors"
	"math"
)

// Names of branches: by the second coordinate where it is given, else by
// their order in the file.
const (
	Upper  = "upper"
	Lower  = "lower"
	First  = "first"
	Second = "second"
)

// ErrNoLoop says that a curve does not go out and back once.
var ErrNoLoop = errors.New("the curve does not go out and back once")

// Branch is a part of a curve that runs one way in x. Rows are in the order
// of rising x.
type Branch struct {
	Name string
	Rows []int
}

// Loop reports whether x goes out and back: about as far one way as the
// other, each more than half its range, with two turns at most.
func Loop(x []float64) bool {
	up, down, turns := travel(usable(x), x)
	lo, hi := Limits(x)
	return hi > lo && up > (hi-lo)/2 && down > (hi-lo)/2 && turns <= 2
}

// Branches splits a closed loop or a hairpin at its least and its greatest x,
// whichever way round it runs and wherever it starts. Height is the second
// coordinate, or nil: with it the branches are upper and lower, without it
// first and second in the order of the file. Rows at the greatest x of a blunt
// end go to the branch they are next to.
func Branches(x, height []float64) ([2]Branch, error) {
	if !Loop(x) {
		return [2]Branch{}, ErrNoLoop
	}
	rows := usable(x)
	rows = rotate(rows, x)
	// From the greatest x down to the least, then up again.
	least := 0
	for i, r := range rows {
		if x[r] < x[rows[least]] {
			least = i
		}
	}
	out := [2]Branch{{First, reversed(rows[:least+1])}, {Second, append([]int{}, rows[least:]...)}}
	trim(&out[0].Rows, x)
	trim(&out[1].Rows, x)
	if len(out[0].Rows) < 2 || len(out[1].Rows) < 2 {
		return [2]Branch{}, ErrNoLoop
	}
	if height == nil {
		if firstRow(out[1].Rows) < firstRow(out[0].Rows) {
			out[0].Rows, out[1].Rows = out[1].Rows, out[0].Rows
		}
		return out, nil
	}
	if mean(height, out[0].Rows) < mean(height, out[1].Rows) {
		out[0].Rows, out[1].Rows = out[1].Rows, out[0].Rows
	}
	out[0].Name, out[1].Name = Upper, Lower
	return out, nil
}

// usable returns the rows with a number.
func usable(x []float64) []int {
	rows := make([]int, 0, len(x))
	for i, v := range x {
		if !math.IsNaN(v) {
			rows = append(rows, i)
		}
	}
	return rows
}

// Limits returns the least and the greatest of the known values.
func Limits(x []float64) (lo, hi float64) {
	lo, hi = math.Inf(1), math.Inf(-1)
	for _, v := range x {
		if !math.IsNaN(v) {
			lo, hi = min(lo, v), max(hi, v)
		}
	}
	return lo, hi
}

// Ends returns the first and the last of the known values, in the order of the
// rows; NaN where there is none.
func Ends(x []float64) (first, last float64) {
	first, last = math.NaN(), math.NaN()
	for _, v := range x {
		if !math.IsNaN(v) {
			if math.IsNaN(first) {
				first = v
			}
			last = v
		}
	}
	return first, last
}

// travel returns how far x runs up and down over the rows, and how often it
// turns; the way from the last row back to the first does not count.
func travel(rows []int, x []float64) (up, down float64, turns int) {
	last := 0.0
	for i := 1; i < len(rows); i++ {
		step := x[rows[i]] - x[rows[i-1]]
		if step == 0 {
			continue
		}
		if step > 0 {
			up += step
		} else {
			down -= step
		}
		if last != 0 && (step > 0) != (last > 0) {
			turns++
		}
		last = step
	}
	return up, down, turns
}

// rotate begins the rows at the greatest x, behind the last of equal ones, so
// that a curve that starts anywhere reads from end to end.
func rotate(rows []int, x []float64) []int {
	top := 0
	for i, r := range rows {
		if x[r] > x[rows[top]] {
			top = i
		}
	}
	// A blunt end has several rows of nearly the greatest x: begin at the one
	// after which x falls for good.
	n := len(rows)
	for range rows {
		next := (top + 1) % n
		if x[rows[next]] < x[rows[top]] {
			break
		}
		top = next
	}
	return append(append([]int{}, rows[top:]...), rows[:top]...)
}

func reversed(rows []int) []int {
	out := make([]int, len(rows))
	for i, r := range rows {
		out[len(rows)-1-i] = r
	}
	return out
}

// trim leaves out rows at the two ends of a branch that do not rise in x: the
// rows of a blunt end that belong to the other branch.
func trim(rows *[]int, x []float64) {
	r := *rows
	for len(r) > 1 && x[r[len(r)-1]] <= x[r[len(r)-2]] {
		r = r[:len(r)-1]
	}
	for len(r) > 1 && x[r[0]] >= x[r[1]] {
		r = r[1:]
	}
	*rows = r
}

func firstRow(rows []int) int {
	first := rows[0]
	for _, r := range rows {
		first = min(first, r)
	}
	return first
}

func mean(v []float64, rows []int) float64 {
	sum, n := 0.0, 0.0
	for _, r := range rows {
		if !math.IsNaN(v[r]) {
			sum, n = sum+v[r], n+1
		}
	}
	return sum / n
}
