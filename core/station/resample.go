package station

import (
	"math"
	"slices"

	"weirmark/core/interpolate"
	"weirmark/core/notice"
	"weirmark/core/quantity"
)

// Options are the choices of a resampling. The zero value is linear.
type Options struct {
	Method interpolate.Method
	// Show prints a place on the axis of stations in messages; nil prints up to
	// six digits. A host that keeps values in SI prints them in their own unit.
	Show func(x float64) string
}

func (o Options) show(x float64) string {
	if o.Show != nil {
		return o.Show(x)
	}
	return quantity.Plain(x, 6)
}

// Resampled is a curve at the stations it can answer. Kept, Outside, Gap and
// Jump hold indices of the stations, each ascending, and share none; a station
// that is NaN is in none of them.
type Resampled struct {
	Kept    []int
	S       []float64 // value, parallel to Kept
	UInterp []float64 // standard uncertainty of the interpolation, parallel to Kept
	Outside []int     // beyond the ends of the curve
	Gap     []int     // between rows that a row without a number parts
	Jump    []int     // where the curve has two values
	Notices []notice.Notice
	Refused bool // a stop notice says why nothing was compared
}

// What became of a station.
const (
	isNone = iota // NaN
	isKept
	isOutside
	isGap
	isJump
)

// Resample returns the curve (x, y) at the stations of at, and the standard
// uncertainty of the interpolation (see uncertainties). name and xname are
// what notices call the values and the abscissa.
//
// Rows may come in any order; where they do not ascend they are ordered, with
// the notice curve-unsorted, unless they go out and back (curve-loop, nothing
// is compared). Rows without a number part the curve. Repeated equal rows are
// used once (curve-duplicate). Where one abscissa has different values
// (curve-jump) a station there is left out, and the stations on either side
// are interpolated towards the value of their own side: the first of the rows
// is the value on the side one comes from. One usable row answers a station at
// the same abscissa only. The stations may come in any order.
//
// Sorted rows and stations cost O(rows + stations).
func Resample(name, xname string, x, y, at []float64, opt Options) Resampled {
	var r Resampled
	if !opt.Method.Known() {
		r.refuse(notice.New("interpolation-unknown", string(opt.Method)))
		return r
	}
	c, notices := prepare(name, xname, x, y)
	r.Notices = notices
	if notice.Any(notices, notice.Stop) {
		r.Refused = true
		return r
	}
	if len(c.x) == 0 {
		r.refuse(notice.New("curve-short", name, 0))
		return r
	}

	sorted, order := ascending(at)
	if len(sorted) == 0 {
		return r
	}
	s, u, states := c.answer(sorted, opt.Method)
	r.collect(s, u, states, order)
	r.tell(name, c, sorted, opt)
	return r
}

func (r *Resampled) refuse(n notice.Notice) {
	r.Notices = append(r.Notices, n)
	r.Refused = true
}

// ascending returns the stations that are numbers in ascending order, and the
// index each has in at; order is nil where at is already so.
func ascending(at []float64) (sorted []float64, order []int) {
	inOrder := true
	for i, t := range at {
		if math.IsNaN(t) || i > 0 && t < at[i-1] {
			inOrder = false
			break
		}
	}
	if inOrder {
		return at, nil
	}
	order = make([]int, 0, len(at))
	for i, t := range at {
		if !math.IsNaN(t) {
			order = append(order, i)
		}
	}
	slices.SortStableFunc(order, func(a, b int) int {
		if at[a] < at[b] {
			return -1
		} else if at[a] > at[b] {
			return 1
		}
		return 0
	})
	sorted = make([]float64, len(order))
	for i, k := range order {
		sorted[i] = at[k]
	}
	return sorted, order
}

// answer returns value, interpolation uncertainty and state of every station
// of the ascending list.
func (c curve) answer(at []float64, m interpolate.Method) (s, u []float64, states []uint8) {
	s, u, states = make([]float64, len(at)), make([]float64, len(at)), make([]uint8, len(at))
	next := 0
	for k, p := range c.pieces {
		x, y := c.x[p.from:p.to], c.y[p.from:p.to]
		first, _ := slices.BinarySearch(at[next:], x[0])
		first += next
		between := uint8(isGap)
		if k == 0 {
			between = isOutside
		}
		fill(states[next:first], between)
		next = first
		if p.jumpBefore {
			next = passEqual(at, states, next, x[0])
		}
		beyond := next + upTo(at[next:], x[len(x)-1])
		to := beyond
		if p.jumpAfter {
			for to > next && at[to-1] == x[len(x)-1] {
				to--
			}
			fill(states[to:beyond], isJump)
		}
		if to > next {
			fill(states[next:to], isKept)
			if err := interpolate.At(s[next:to], x, y, at[next:to], m); err != nil {
				panic(err) // the stations were cut to the piece and the method is known
			}
			uncertainties(u[next:to], s[next:to], x, y, at[next:to], m)
		}
		next = beyond
	}
	fill(states[next:], isOutside)
	return s, u, states
}

// passEqual marks the stations from next on that equal x as lying on a jump,
// and returns the first behind them.
func passEqual(at []float64, states []uint8, next int, x float64) int {
	for next < len(at) && at[next] == x {
		states[next] = isJump
		next++
	}
	return next
}

// upTo returns how many of the ascending stations are at most x.
func upTo(at []float64, x float64) int {
	i, found := slices.BinarySearch(at, x)
	for found && i < len(at) && at[i] == x {
		i++
	}
	return i
}

func fill(states []uint8, state uint8) {
	for i := range states {
		states[i] = state
	}
}

// collect sorts the answers into r, in the order the stations were given in.
func (r *Resampled) collect(s, u []float64, states []uint8, order []int) {
	if order != nil {
		n := slices.Max(order) + 1
		givenS, givenU, given := make([]float64, n), make([]float64, n), make([]uint8, n)
		for i, k := range order {
			givenS[k], givenU[k], given[k] = s[i], u[i], states[i]
		}
		s, u, states = givenS, givenU, given
	}
	kept := 0
	for _, state := range states {
		if state == isKept {
			kept++
		}
	}
	r.Kept = make([]int, 0, kept)
	for i, state := range states {
		switch state {
		case isKept:
			s[len(r.Kept)], u[len(r.Kept)] = s[i], u[i]
			r.Kept = append(r.Kept, i)
		case isOutside:
			r.Outside = append(r.Outside, i)
		case isGap:
			r.Gap = append(r.Gap, i)
		case isJump:
			r.Jump = append(r.Jump, i)
		}
	}
	r.S, r.UInterp = s[:kept], u[:kept]
}

// tell adds what the reader must know of the stations left out.
func (r *Resampled) tell(name string, c curve, at []float64, opt Options) {
	lo, hi := opt.show(c.x[0]), opt.show(c.x[len(c.x)-1])
	switch {
	case len(c.x) == 1 && len(r.Kept) == 0 && len(r.Jump) == 0:
		r.refuse(notice.New("curve-short", name, 1))
		return
	case len(r.Outside) == len(at):
		r.refuse(notice.New("station-none", opt.show(at[0]), opt.show(at[len(at)-1]), lo, hi))
		return
	case len(r.Outside) > 0:
		r.Notices = append(r.Notices, notice.New("station-outside", len(r.Outside), len(at), lo, hi))
	}
	if len(r.Gap) > 0 {
		r.Notices = append(r.Notices, notice.New("station-gap", len(r.Gap)))
	}
}
