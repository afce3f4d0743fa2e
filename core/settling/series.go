package settling

import (
	"fmt"
	"math"
	"slices"

	"weirmark/core/interpolate"
	"weirmark/core/notice"
	"weirmark/core/quantity"
)

// Series is a monitor: one value a row, in file order. At is the iteration or
// the time of the row, as long as Value; without At the rows are counted from
// one.
type Series struct{ At, Value []float64 }

// Options are the choices of a judgement. The zero value judges iterations.
type Options struct {
	Name  string  // the quantity in messages; "The value" if empty
	Axis  string  // unit of At in messages; "iterations" if empty, "s" for Time
	Time  bool    // the rows are samples of an unsteady run, not iterates
	Per   float64 // At over which drift is stated; 0 stands for 200, for Time the window
	Scale float64 // magnitude of which changes are a fraction; 0 stands for |mean|
	UGrid float64 // grid uncertainty U (about 95 %) in the unit of the values; 0 unknown
	UNum  float64 // u_num in the unit of the values; 0 unknown
	E     float64 // comparison error in the unit of the values; 0 unknown

	Declared bool    // the start-up ends at Start, in place of the rule for it
	Start    float64 // At
	Period   float64 // declared period in At; 0 looks for one
}

func (o Options) name() string {
	if o.Name == "" {
		return "The value"
	}
	return o.Name
}

func (o Options) axis() string {
	switch {
	case o.Axis != "":
		return o.Axis
	case o.Time:
		return "s"
	}
	return "iterations"
}

// Limits of this package. No source: chosen, and stated where they decide.
const (
	leastRows    = 20    // fewer rows are not judged
	smallShare   = 0.1   // of U_grid: a change below it is small
	smallChange  = 0.001 // of the scale, where U_grid is not known
	usualPer     = 200   // iterations over which drift is stated
	gapFactor    = 10    // a step this many times the usual one is a break
	largestValue = 1e100 // beyond it a row holds no usable number
)

// limit returns the change that is small, in the unit of the values.
func (o Options) limit(scale float64) float64 {
	if o.UGrid > 0 {
		return smallShare * o.UGrid
	}
	return smallChange * scale
}

// record is the part of a series that is judged: evenly spaced, finite.
type record struct {
	start, step float64
	y           []float64
	quantum     float64 // smallest change between rows, 0 where there is none
	broken      bool    // the series ends without numbers
	notices     []notice.Notice
}

// at returns the abscissa of row i, which may be one past the end.
func (r record) at(i int) float64 { return r.start + float64(r.step*float64(i)) }

// newRecord returns the rows of s behind its last break, in even steps. A
// break is a step back or one that is gapFactor times the larger of the step
// before it and the usual one. Of rows with one abscissa the last counts.
func newRecord(s Series, opt Options) record {
	if s.At != nil && len(s.At) != len(s.Value) {
		panic(fmt.Sprintf("settling: %d abscissae with %d values", len(s.At), len(s.Value)))
	}
	var r record
	at, y := r.clean(s, opt)
	if r.broken {
		return r
	}
	at, y = r.behindBreaks(at, y, opt)
	if len(y) > 0 {
		r.even(at, y, opt)
	}
	r.quantum = smallestChange(y)
	return r
}

func usable(v float64) bool { return math.Abs(v) <= largestValue }

// clean leaves out rows without numbers and all but the last of rows that
// share their abscissa, and says so. Rows without numbers at the end are the
// mark of a run that broke down.
func (r *record) clean(s Series, opt Options) (at, y []float64) {
	left, tail, repeated := 0, 0, 0
	for i, v := range s.Value {
		a := float64(i + 1)
		if s.At != nil {
			a = s.At[i]
		}
		switch {
		case !usable(a) || !usable(v):
			left++
			tail++
			continue
		case len(at) > 0 && a == at[len(at)-1]:
			repeated++
			y[len(y)-1] = v
		default:
			at, y = append(at, a), append(y, v)
		}
		tail = 0
	}
	if tail > 0 && len(at) > 0 {
		r.broken = true
		r.tell("monitor-broken", opt.name(), tail, quantity.Text(at[len(at)-1], 6), opt.axis())
		return nil, nil
	}
	if left > 0 {
		r.tell("monitor-rows", left, opt.name())
	}
	if repeated > 0 {
		r.tell("monitor-repeated", repeated, opt.name(), opt.axis())
	}
	return at, y
}

func (r *record) tell(code string, args ...any) {
	r.notices = append(r.notices, notice.New(code, args...))
}

// behindBreaks returns the rows behind the last break and reports the breaks.
func (r *record) behindBreaks(at, y []float64, opt Options) ([]float64, []float64) {
	usual := usualStep(at)
	breaks, last := 0, 0
	before := usual
	for i := 1; i < len(at); i++ {
		step := at[i] - at[i-1]
		if step < 0 || step > gapFactor*max(before, usual) {
			breaks, last = breaks+1, i
			continue
		}
		before = step
	}
	if breaks > 0 {
		r.tell("monitor-restart", opt.name(), breaks, quantity.Text(at[last-1], 6), quantity.Text(at[last], 6), opt.axis(),
			quantity.Signed(y[last]-y[last-1], 3), len(y)-last)
	}
	return at[last:], y[last:]
}

// usualStep returns the (lower) median of the forward steps, 0 where there is none.
func usualStep(at []float64) float64 {
	var steps []float64
	for i := 1; i < len(at); i++ {
		if step := at[i] - at[i-1]; step > 0 {
			steps = append(steps, step)
		}
	}
	if len(steps) == 0 {
		return 0
	}
	slices.Sort(steps)
	return steps[(len(steps)-1)/2]
}

// even brings the rows to even steps: as they are where the steps differ by
// less than a millionth, else by linear interpolation to the usual step, so
// that a missing row among even ones moves no other.
func (r *record) even(at, y []float64, opt Options) {
	n := len(at)
	r.start, r.step, r.y = at[0], 1, y
	if n < 2 {
		return
	}
	span := at[n-1] - at[0]
	r.step = span / float64(n-1)
	lo, hi := math.Inf(1), 0.
	for i := 1; i < n; i++ {
		step := at[i] - at[i-1]
		lo, hi = min(lo, step), max(hi, step)
	}
	if hi-lo <= 1e-6*r.step {
		return
	}
	steps := min(max(math.Round(span/usualStep(at)), 1), float64(gapFactor*n))
	r.step = span / steps
	grid := make([]float64, int(steps)+1)
	for i := range grid {
		grid[i] = min(r.at(i), at[n-1])
	}
	r.y = make([]float64, len(grid))
	if err := interpolate.At(r.y, at, y, grid, interpolate.Linear); err != nil {
		panic("settling: " + err.Error()) // the grid lies within the rows
	}
	r.tell("monitor-uneven", opt.name(), quantity.Text(lo, 3), quantity.Text(hi, 3), opt.axis(), quantity.Text(r.step, 3))
}

// smallestChange returns the smallest change from row to row that is not
// zero, or 0: values printed with few digits move in steps of it.
func smallestChange(y []float64) float64 {
	least := math.Inf(1)
	for i := 1; i < len(y); i++ {
		if d := math.Abs(y[i] - y[i-1]); d > 0 {
			least = min(least, d)
		}
	}
	if math.IsInf(least, 1) {
		return 0
	}
	return least
}
