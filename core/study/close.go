package study

import (
	"sort"

	"weirmark/core/interpolate"
	"weirmark/core/notice"
)

// maxDrawn is the number of points above which a curve is drawn as its
// envelope; every number is computed from all of them.
const maxDrawn = 4000

// draw keeps the simulation as read, for the figure.
func (w *work) draw() {
	c := w.finest()
	if c == nil || c.scalar() {
		return
	}
	x, y := inUnit(c.x, c.xUnit, w.xUnit), inUnit(c.y, c.yUnit, w.yUnit)
	rows := envelope(y)
	if len(rows) < len(y) {
		w.tell(notice.New("curve-envelope", len(y), len(rows)))
	}
	curve := Curve{X: make([]Written, len(rows)), Y: make([]Written, len(rows)), UNum: []Number{}}
	for j, i := range rows {
		curve.X[j], curve.Y[j] = Written(w.xUnit.FromSI(x[i])), Written(w.yUnit.FromSI(y[i]))
	}
	if u := w.drawnU(pick(x, rows)); u != nil {
		curve.UNum = u
	}
	w.cell.Curve = curve
}

// envelope returns the rows to draw: all, or the least and greatest of each
// of maxDrawn/2 runs of rows.
func envelope(y []float64) []int {
	if len(y) <= maxDrawn {
		return all(len(y))
	}
	rows := make([]int, 0, maxDrawn)
	buckets := maxDrawn / 2
	for b := range buckets {
		lo, hi := b*len(y)/buckets, (b+1)*len(y)/buckets
		least, most := lo, lo
		for i := lo; i < hi; i++ {
			if y[i] < y[least] {
				least = i
			}
			if y[i] > y[most] {
				most = i
			}
		}
		rows = append(rows, min(least, most))
		if least != most {
			rows = append(rows, max(least, most))
		}
	}
	return rows
}

// drawnU returns u_num between the stations, for the band of the figure
// only; null outside them.
func (w *work) drawnU(x []float64) []Number {
	if w.uNum == nil || len(w.x) < 2 {
		return nil
	}
	sx, su := ascending(w.x, w.uNum)
	if len(sx) < 2 {
		return nil
	}
	out, at := make([]Number, len(x)), make([]float64, 1)
	for i, v := range x {
		out[i] = None
		if interpolate.At(at, sx, su, []float64{v}, interpolate.Linear) == nil {
			out[i] = w.step(at[0])
		}
	}
	return out
}

// ascending returns the pairs in order of x, each x once.
func ascending(x, y []float64) ([]float64, []float64) {
	order := all(len(x))
	sort.SliceStable(order, func(i, j int) bool { return x[order[i]] < x[order[j]] })
	sx, sy := make([]float64, 0, len(x)), make([]float64, 0, len(x))
	for _, i := range order {
		if n := len(sx); n > 0 && sx[n-1] == x[i] {
			continue
		}
		sx, sy = append(sx, x[i]), append(sy, y[i])
	}
	return sx, sy
}

// close lists what no part of the evaluation lists by itself, decides whether
// a statement is made, and fills the courses.
func (w *work) close() {
	if w.reference != nil {
		w.referenceDoubts()
	}
	w.identicalFiles()
	sort.SliceStable(w.cell.Open, func(i, j int) bool {
		a, b := w.cell.Open[i], w.cell.Open[j]
		if a.Blocks != b.Blocks {
			return a.Blocks
		}
		if altered := (a.Target.Kind == "file") != (b.Target.Kind == "file"); altered && a.Blocks {
			return a.Target.Kind == "file" // what the files are comes before what they say
		}
		return a.Course < b.Course
	})
	for _, o := range w.cell.Open {
		w.cell.Withheld = w.cell.Withheld || o.Blocks
	}
	if len(w.tested) == 0 {
		w.cell.Withheld = true
	}
	w.cell.Provisional = !w.cell.Withheld && len(w.cell.Open) > 0
	w.courses()
	w.evidence()
}

// referenceDoubts asks what kind of reference the data are, and says what
// follows from it.
func (w *work) referenceDoubts() {
	switch {
	case !w.q.Kind.Given():
		w.need(2, false, "the kind of reference", w.q.target("kind"), "field-missing", "The kind of reference", w.q.label())
	case w.q.Kind.Open():
		w.need(2, true, "acceptance of the kind of reference", w.q.target("kind"), "guess-open", "The kind of reference", w.q.label(), w.q.Kind.Value)
	case w.q.Kind.Value == KindSimulation:
		w.tell(notice.New("reference-simulation"))
	}
	switch {
	case !w.q.Use.Given():
		w.need(2, false, "what the data were used for", w.q.target("use"), "field-missing", "Whether the data were used to set the model", w.q.label())
	case w.q.Use.Open():
		w.need(2, true, "acceptance of what the data were used for", w.q.target("use"), "guess-open", "The use of the data", w.q.label(), w.q.Use.Value)
	case w.q.Use.Value == UseTuning:
		w.tell(notice.New("reference-tuning"))
	case w.q.Use.Value == UseBoth:
		w.tell(notice.New("reference-both"))
	}
}

// courses sets the state of the five courses of evidence.
func (w *work) courses() {
	given := [5]bool{
		len(w.cell.Monitors)+len(w.cell.Balances)+len(w.cell.Residuals) > 0,
		w.cell.Grids != nil || w.has(OfNumerical),
		w.reference != nil && w.finest() != nil,
		w.cell.Summary != nil,
		w.cell.Requirement != nil && w.cell.Requirement.Outcome != "",
	}
	for i := range w.cell.Courses {
		state := Settled
		if !given[i] {
			state = Empty
		}
		for _, o := range w.cell.Open {
			if o.Course == i && state == Settled {
				state = Doubts
			}
		}
		w.cell.Courses[i] = state
	}
	for _, n := range w.cell.Notices {
		if n.Severity == notice.Stop {
			if course, known := stopsCourse[n.Code]; known && (w.q.Answers[n.Code] == "" || byEntry[n.Code] != "") {
				w.cell.Courses[course] = Blocked
			}
		}
	}
	if !w.cell.Withheld {
		return
	}
	for _, i := range []int{3, 4} { // what stands on an open course is itself in doubt
		if w.cell.Courses[i] == Settled {
			w.cell.Courses[i] = Doubts
		}
	}
}

// stopsCourse names the course that a stop notice blocks.
var stopsCourse = map[string]int{
	"monitor-drift": 0, "monitor-broken": 0, "sampling-none": 0, "balance-open": 0,
	"grid-diverging": 1, "grid-steps-diverging": 1,
	"unit-dimension": 2, "density-needed": 2, "curve-loop": 2, "station-none": 2, "curve-short": 2, "curve-constant": 2, "stations-constant": 2, "u-negative": 2, "limits-crossed": 2, "scalar-curve": 2, "derive-refused": 2, "derive-edge": 2,
	"covariance-range": 3, "covariance-size": 3,
}
