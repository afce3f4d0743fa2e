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
	// Gap is the number of median spacings above which a spacing is a gap (see
	// partWide); 0: none is.
	Gap float64
	// Period of a periodic curve, in the unit of x; 0: it has none. Stations
	// and rows a whole number of periods apart are the same place.
	Period float64
	// Width over which the curve is averaged at each station, in the unit of x;
	// 0: the value at the place itself.
	Width float64
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
	Part    []int     // number of the unbroken part of the curve that answered, parallel to Kept
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

// answers are what a curve says at ascending stations, all parallel to them.
type answers struct {
	s, u    []float64
	states  []uint8
	parts   []int
	clipped int // stations without room for the width they are averaged over
}

func newAnswers(n int) answers {
	return answers{s: make([]float64, n), u: make([]float64, n), states: make([]uint8, n), parts: make([]int, n)}
}

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

	if opt.Gap > 0 {
		c.partWide(opt.Gap)
	}
	places := at
	if opt.Period > 0 {
		if span := c.x[len(c.x)-1] - c.x[0]; span > opt.Period*(1+seam) {
			r.refuse(notice.New("curve-period", name, opt.show(c.x[0]), opt.show(c.x[len(c.x)-1]), quantity.Plain(opt.Period, 6)))
			return r
		}
		places = within(at, c.x[0], opt.Period)
		c = c.repeated(opt.Period)
	}

	sorted, order := ascending(places)
	if len(sorted) == 0 {
		return r
	}
	a := c.answer(sorted, opt.Method)
	if opt.Width > 0 {
		c.average(&a, sorted, opt)
	}
	r.collect(a, order)
	r.tell(name, c, sorted, a.clipped, opt)
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
func (c curve) answer(at []float64, m interpolate.Method) answers {
	a := newAnswers(len(at))
	s, u, states := a.s, a.u, a.states
	next, part := 0, 0
	for k, p := range c.pieces {
		if !p.jumpBefore {
			part++
		}
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
			fill(a.parts[next:to], part)
		}
		next = beyond
	}
	fill(states[next:], isOutside)
	return a
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

func fill[T any](values []T, v T) {
	for i := range values {
		values[i] = v
	}
}

// collect sorts the answers into r, in the order the stations were given in.
func (r *Resampled) collect(a answers, order []int) {
	if order != nil {
		given := newAnswers(slices.Max(order) + 1)
		for i, k := range order {
			given.s[k], given.u[k], given.states[k], given.parts[k] = a.s[i], a.u[i], a.states[i], a.parts[i]
		}
		a = given
	}
	s, u, states := a.s, a.u, a.states
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
			s[len(r.Kept)], u[len(r.Kept)], a.parts[len(r.Kept)] = s[i], u[i], a.parts[i]
			r.Kept = append(r.Kept, i)
		case isOutside:
			r.Outside = append(r.Outside, i)
		case isGap:
			r.Gap = append(r.Gap, i)
		case isJump:
			r.Jump = append(r.Jump, i)
		}
	}
	r.S, r.UInterp, r.Part = s[:kept], u[:kept], a.parts[:kept]
}

// tell adds what the reader must know of the stations left out.
func (r *Resampled) tell(name string, c curve, at []float64, clipped int, opt Options) {
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
	if clipped > 0 {
		r.Notices = append(r.Notices, notice.New("station-width", clipped, quantity.Plain(opt.Width, 6)))
	}
	for _, g := range c.wide {
		if first, _ := slices.BinarySearch(at, math.Nextafter(g.from, g.to)); first < len(at) && at[first] < g.to {
			r.Notices = append(r.Notices, notice.New("curve-gap", name, opt.show(g.from), opt.show(g.to), quantity.Text(g.ratio, 2), quantity.Plain(opt.Gap, 3)))
		}
	}
	if len(r.Gap) > 0 {
		r.Notices = append(r.Notices, notice.New("station-gap", len(r.Gap)))
	}
}
