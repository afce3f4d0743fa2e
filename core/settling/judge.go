package settling

import (
	"math"

	"weirmark/core/notice"
	"weirmark/core/quantity"
)

// Class says how a monitor behaves at its end.
type Class string

// The classes.
const (
	Settled  Class = "settled"  // what still changes is small
	Drifting Class = "drifting" // it still moves one way, or has a way to go
	Cycling  Class = "cycling"  // iterates repeat themselves with a period
	Stalled  Class = "stalled"  // iterates keep changing without drift or period
	Unsteady Class = "unsteady" // samples of an unsteady run, averaged
	Short    Class = "short"    // too few rows, or too few independent ones
	Broken   Class = "broken"   // the rows end without numbers
)

// Monitor is the judgement of one monitor. Numbers that a class does not have
// are NaN, and Rule says what was done instead.
type Monitor struct {
	Class     Class
	Mean      float64    // over Window
	Last      float64    // last row
	U         float64    // standard iterative or statistical uncertainty of Mean
	Window    [2]float64 // At of the first and last row of Mean
	Per       float64    // At over which Drift is stated
	Drift     float64    // change per Per by a straight fit, a fraction of Scale
	Scale     float64    // magnitude of which Drift is a fraction
	Limit     float64    // change that counts as small, in the unit of the values
	Period    float64    // in At
	Cycles    int        // whole cycles in Window
	HalfRange float64    // of the rows in Window: U_iter where they cycle or stall
	Remaining float64    // to be added to Last, by geometric extrapolation; NaN where the end does not close in so
	Stat      *Stat      // of an unsteady run
	Rule      string
	Notices   []notice.Notice
}

// Judge classifies s and gives its mean and uncertainty where the class has
// them. The window is what lies behind the start-up (see StartUp; the second
// half where that cannot be told).
//
//	cycling: mean over whole cycles at the end, u = half-range/sqrt(3).
//	drifting: the straight fit over the last third of the window, at least
//	  Per, changes by more than the limit per Per and clearly beyond the
//	  scatter; or more than the limit remains by geometric extrapolation.
//	  There is no u.
//	stalled: sqrt(2) times the standard deviation exceeds the limit, the
//	  amplitude of a sine of that scatter; u = half-range/sqrt(3).
//	settled: u is that of the mean of correlated rows, with what remains, but
//	  no less than that of the smallest printed step, q/sqrt(12).
//
// The limit is a tenth of U_grid, or a thousandth of the scale where U_grid is
// not known. Samples of an unsteady run are judged for drift and then averaged
// as by Statistics. Cost n log n.
func Judge(s Series, opt Options) Monitor {
	r := newRecord(s, opt)
	m := Monitor{Notices: r.notices}
	m.none()
	switch {
	case r.broken:
		m.Class, m.Rule = Broken, "not judged: no numbers at the end"
		return m
	case len(r.y) < leastRows:
		m.Class, m.Rule = Short, "not judged: too few rows"
		m.tell("monitor-short", opt.name(), len(r.y), leastRows)
		return m
	}
	m.Last = r.y[len(r.y)-1]
	from, ok := r.begin(opt)
	switch {
	case len(r.y)-from < leastRows:
		m.Class, m.Rule = Short, "not judged: too few rows behind the declared start"
		m.tell("monitor-short", opt.name(), len(r.y)-from, leastRows)
		return m
	case !ok && opt.Time:
		m.tell("sampling-startup", opt.name())
	}
	j := judgement{Monitor: &m, record: r, opt: opt, from: from}
	j.scale()
	switch {
	case r.quantum == 0:
		j.constant()
	case opt.Time:
		j.samples()
	default:
		j.iterates()
	}
	return m
}

func (m *Monitor) none() {
	nan := math.NaN()
	m.Mean, m.Last, m.U, m.Window = nan, nan, nan, [2]float64{nan, nan}
	m.Per, m.Drift, m.Scale, m.Limit = nan, nan, nan, nan
	m.Period, m.HalfRange, m.Remaining = nan, nan, nan
}

func (m *Monitor) tell(code string, args ...any) {
	m.Notices = append(m.Notices, notice.New(code, args...))
}

// judgement is a monitor being made from a record.
type judgement struct {
	*Monitor
	record record
	opt    Options
	from   int // first row behind the start-up
}

// use makes the last rows of the record the window and gives its mean and
// half-range.
func (j *judgement) use(rows int) {
	n := len(j.record.y)
	y := j.record.y[n-rows:]
	j.Window = [2]float64{j.record.at(n - rows), j.record.at(n - 1)}
	j.Mean, j.HalfRange = mean(y), halfRange(y)
}

// scale settles Scale, Limit and Per. A mean that is no larger than the
// scatter is no scale: the largest value takes its place.
func (j *judgement) scale() {
	y := j.record.y[j.from:]
	j.Scale = j.opt.Scale
	if !(j.Scale > 0) {
		m, sd := spread(y)
		j.Scale = math.Abs(m)
		if j.Scale <= sd || j.Scale == 0 {
			j.Scale = largest(j.record.y)
			if !j.opt.Time && !(j.opt.UGrid > 0) && j.record.quantum > 0 {
				j.tell("monitor-scale", j.opt.name(), quantity.Text(m, 2), quantity.Text(j.Scale, 2))
			}
		}
	}
	j.Limit = j.opt.limit(j.Scale)
	j.Per = j.opt.Per
	switch {
	case j.Per > 0:
	case j.opt.Time:
		j.Per = float64(len(y)-1) * j.record.step
	default:
		j.Per = usualPer
	}
}

// fraction returns v of the scale in percent for a reader.
func (j *judgement) fraction(v float64) string {
	return quantity.Text(100*math.Abs(v)/j.Scale, 2)
}

// constant is the answer to rows that are all equal: perhaps a placeholder,
// perhaps printed too coarsely, and no evidence that nothing changes.
func (j *judgement) constant() {
	j.Class, j.Rule = Settled, "all rows equal: no evidence of the uncertainty"
	j.use(len(j.record.y))
	j.Drift = 0
	j.Cycles = 0
	j.tell("monitor-constant", j.opt.name(), quantity.Text(j.Last, 6), len(j.record.y))
}

// moves states the drift of a slope per row, and whether it is more than small.
func (j *judgement) moves(slope float64) bool {
	change := slope / j.record.step * j.Per
	j.Drift = change / j.Scale
	return quantity.Round(math.Abs(change), 10) > quantity.Round(j.Limit, 10)
}

// drifting closes the judgement of a monitor that still moves.
func (j *judgement) drifting(slope float64) {
	j.Class, j.Rule = Drifting, "drift: no uncertainty"
	direction := "rises"
	if slope < 0 {
		direction = "falls"
	}
	come := "It has no end in sight: no iterative uncertainty was computed."
	if !math.IsNaN(j.Remaining) {
		come = "Geometric extrapolation leaves " + quantity.Signed(j.Remaining, 2) + " to come; no iterative uncertainty was computed."
	}
	j.tell("monitor-drift", j.opt.name(), direction, j.fraction(slope/j.record.step*j.Per), quantity.Text(j.Per, 3), j.opt.axis(), come)
}

// cycle looks for a cycle behind the start-up and takes over what is told.
func (j *judgement) cycle() (from int, period float64, ok bool) {
	j.record.notices = nil
	from, period, ok = j.record.cycle(j.from, j.opt)
	j.Notices = append(j.Notices, j.record.notices...)
	return from, period, ok
}

// iterates judges the rows of an iteration.
func (j *judgement) iterates() {
	from, period, ok := j.cycle()
	y := j.record.y[from:]
	if ok {
		c := cycleOf(y, period)
		j.Period, j.Cycles = period*j.record.step, c.count
		if j.between(y, period) {
			return
		}
		j.use(c.length)
		j.Mean, j.U = c.mean, c.halfRange/math.Sqrt(3)
		j.Rule = "mean over whole cycles; their half-range is a bound, u = half-range/√3"
		if j.small(c.halfRange) {
			j.Class = Settled
			return
		}
		j.Class = Cycling
		j.cycleNotice(c)
		return
	}
	j.last(y)
}

// between judges the drift of the means of whole cycles; the means of the
// rows alone would show the phase in which the window ends.
func (j *judgement) between(y []float64, period float64) bool {
	width := unit(period)
	means := unitMeans(y, width)
	l := fit(means)
	if moving := j.moves(l.slope / width); !moving || !l.clear(means) {
		return false
	}
	j.use(len(y))
	j.drifting(l.slope / width)
	return true
}

func (j *judgement) cycleNotice(c cycle) {
	code := "monitor-cycle"
	if c.shrinking {
		code = "monitor-cycle-shrinking"
	}
	j.tell(code, j.opt.name(), quantity.Text(j.Period, 3), j.opt.axis(), j.fraction(c.halfRange), c.count, quantity.Text(c.halfRange, 3))
}

func (j *judgement) small(change float64) bool {
	return quantity.Round(change, 10) <= quantity.Round(j.Limit, 10)
}

// last judges the end of y, the rows behind the start-up, which do not cycle.
func (j *judgement) last(y []float64) {
	rows := int(math.Round(min(j.Per/j.record.step, float64(len(y)))))
	rows = min(max(rows, len(y)/3, leastRows), len(y))
	end := y[len(y)-rows:]
	l := fit(end)
	moving := j.moves(l.slope) && l.clear(end)
	j.use(rows)

	size, fromMean, fromEnd, approach := decay(y)
	_, sd := spread(end)
	if approach {
		j.Remaining = fromEnd
		if !j.small(math.Abs(fromEnd)) {
			j.drifting(l.slope)
			return
		}
		_, sdLast := spread(y[len(y)-size:])
		if (moving || !j.small(math.Sqrt2*sd)) && j.small(math.Sqrt2*sdLast) {
			j.approached(size, fromMean)
			return
		}
	}
	u, _, _ := standardOfMean(end)
	switch {
	case moving:
		j.drifting(l.slope)
	case !j.small(math.Sqrt2 * sd):
		j.Class, j.U = Stalled, j.HalfRange/math.Sqrt(3)
		j.Rule = "no drift and no cycle, changes do not shrink; the half-range is a bound, u = half-range/√3"
		j.tell("monitor-stalled", j.opt.name(), j.fraction(j.HalfRange), quantity.Text(j.Window[1]-j.Window[0], 3), j.opt.axis(), quantity.Text(j.HalfRange, 3))
	default:
		j.Class, j.Rule = Settled, "mean of the window; u from the correlation time"
		if math.IsNaN(u) {
			u = j.HalfRange / math.Sqrt(3)
			j.Rule = "mean of the window; the half-range is a bound, u = half-range/√3"
		}
		if approach {
			u = math.Hypot(u, fromMean/math.Sqrt(3))
		}
		j.U = max(u, j.record.quantum/math.Sqrt(12))
	}
}

// approached closes the judgement of rows that have come so near to their
// limit that little remains: the last block stands for the mean.
func (j *judgement) approached(size int, fromMean float64) {
	j.use(size)
	j.Class = Settled
	j.U = math.Hypot(max(j.HalfRange, math.Abs(fromMean))/math.Sqrt(3), j.record.quantum/math.Sqrt(12))
	j.Rule = "mean of the end of a geometric approach; what remains is a bound, u = remaining/√3"
}

// samples judges the rows of an unsteady run.
func (j *judgement) samples() {
	from, period, cyclic := j.cycle()
	y := j.record.y[from:]
	if cyclic {
		j.Period = period * j.record.step
		if j.between(y, period) {
			return
		}
	} else if l := fit(y); j.moves(l.slope) && l.clear(y) {
		j.use(len(y))
		j.drifting(l.slope)
		return
	}
	st := average(j.record, from, period, j.opt)
	j.Notices = append(j.Notices, st.Notices...)
	st.Notices = nil
	j.use(st.Rows)
	j.Mean, j.U, j.Cycles, j.Rule, j.Stat = st.Mean, st.U, st.Cycles, st.Rule, &st
	switch {
	case math.IsNaN(st.U):
		j.Class = Short
	case j.small(math.Sqrt2 * st.SD):
		j.Class = Settled
	default:
		j.Class = Unsteady
	}
}
