package study

import (
	"math"

	"weirmark/core/notice"
	"weirmark/core/quantity"
	"weirmark/core/refinement"
)

// StepValues is the role of a table of scalars of runs with several time
// steps, and of several grids where a column of cell counts is named.
const StepValues = "step values"

// Apart says of a table of time steps over several grids that its steps are
// studied on the finest grid alone.
const Apart = "apart"

// defaultTimeOrder is the formal order in time where none is stated.
const defaultTimeOrder = 2

// StepStudy is the study of the time step behind a scalar.
type StepStudy struct {
	File     string      `json:"file"`
	Points   []StepPoint `json:"points"` // in the order of the file
	StepUnit string      `json:"step_unit"`
	Joint    bool        `json:"joint"` // grid and time step fitted together
	Class    string      `json:"class"` // of the steps; empty in a joint fit
	Order    Number      `json:"order"` // observed in time
	Formal   Number      `json:"formal"`
	Space    Number      `json:"space"` // formal order in space, of a joint fit

	Extrapolated Number `json:"extrapolated"`
	SpaceError   Number `json:"space_error"` // of the finest run, with its sign
	TimeError    Number `json:"time_error"`
	Scatter      Number `json:"scatter"`
	U            Number `json:"u"` // expanded, 95 %
	UNum         Number `json:"u_num"`
	Rule         string `json:"rule"`
}

// StepPoint is one run.
type StepPoint struct {
	Step  Number `json:"step"`
	Cells Number `json:"cells"` // null where the table does not state them
	Value Number `json:"value"`
}

// formalTime returns the formal order in time.
func (q *Question) formalTime() float64 {
	if q.Family != nil && q.Family.FormalTime != nil && *q.Family.FormalTime > 0 {
		return *q.Family.FormalTime
	}
	return defaultTimeOrder
}

// timeSteps studies the first table of time steps of a scalar and takes its
// uncertainty into the budget: beside the grid, or in its place where both are
// fitted together.
func (w *work) timeSteps() {
	slips := w.slips(StepValues)
	if len(slips) == 0 {
		return
	}
	if !w.cell.Scalar {
		w.tell(notice.New("grid-steps-curve"))
		return
	}
	if len(slips) > 1 {
		w.tell(notice.New("grid-steps-many", len(slips), w.e.study.fileName(slips[0])))
	}
	c := w.use(slips[0])
	if c == nil {
		return
	}
	column, err := c.table.Column(c.slip.Step.Column.Value)
	if err != nil {
		w.tell(asNotice(err))
		w.stop(1, "the column of time steps", slipTarget(c.slip, "step.column"), asNotice(err))
		return
	}
	values, steps := inUnit(c.y, c.yUnit, w.yUnit), column.Values
	var counts []float64
	if c.slip.Size.Column.Given() {
		size, err := c.table.Column(c.slip.Size.Column.Value)
		if err != nil {
			w.tell(asNotice(err))
			w.stop(1, "the column of cell counts", slipTarget(c.slip, "size.column"), asNotice(err))
			return
		}
		counts = size.Values
	}
	s := &StepStudy{File: w.e.study.fileName(c.slip), Points: []StepPoint{}, StepUnit: c.slip.Step.Unit.Value, Order: None, Formal: Number(w.q.formalTime()), Space: None,
		Extrapolated: None, SpaceError: None, TimeError: None, Scatter: None, U: None, UNum: None}
	for i, v := range values {
		p := StepPoint{Step: Number(steps[i]), Cells: None, Value: w.yNumber(v)}
		if counts != nil {
			p.Cells = Number(counts[i])
		}
		s.Points = append(s.Points, p)
	}
	w.cell.Steps = s
	if several(counts) && !(w.q.Family != nil && w.q.Family.Steps == Apart) {
		w.jointSteps(s, counts, steps, values)
		return
	}
	w.stepsAlone(s, counts, steps, values)
}

// several reports whether cell counts hold more than one value.
func several(counts []float64) bool {
	for _, n := range counts {
		if n > 0 && n != counts[0] && counts[0] > 0 {
			return true
		}
	}
	return false
}

// stepsAlone studies the steps of the finest grid.
func (w *work) stepsAlone(s *StepStudy, counts, steps, values []float64) {
	if counts != nil {
		finest := 0.0
		for _, n := range counts {
			if n > finest {
				finest = n
			}
		}
		var ownSteps, ownValues []float64
		for i, n := range counts {
			if n == finest {
				ownSteps, ownValues = append(ownSteps, steps[i]), append(ownValues, values[i])
			}
		}
		steps, values = ownSteps, ownValues
	}
	opt := w.choices.rule()
	opt.Formal = w.q.formalTime()
	r := refinement.Steps(steps, values, opt)
	u := r.StandardUncertainty(w.choices.KNum)
	s.Class, s.Order, s.Rule = string(r.Class), Number(r.Order), "time steps in the part of grids: "+r.Rule
	s.Extrapolated, s.U, s.UNum = w.yNumber(r.Extrapolated), w.step(r.U), w.step(u)
	for _, n := range r.Notices {
		if n.Severity == notice.Stop {
			w.finding(1, "an uncertainty of the time step", notice.New("grid-steps-diverging"))
			continue
		}
		n.Text = "Time steps taken as grids are. " + n.Text
		w.tell(n)
	}
	if !math.IsNaN(u) && len(w.x) > 0 {
		w.addSteps("time step", "U of the study of time steps divided by "+quantity.Typed(w.choices.KNum), u).aside = true
	}
}

// jointSteps fits grid and time step together.
func (w *work) jointSteps(s *StepStudy, counts, steps, values []float64) {
	p := w.choices.rule().Formal
	j := refinement.Joint(counts, steps, values, w.choices.dimension(), p, w.q.formalTime())
	s.Joint, s.Space = true, Number(p)
	s.Extrapolated, s.SpaceError, s.TimeError, s.Scatter, s.U = w.yNumber(j.Extrapolated), w.step(j.Space), w.step(j.Time), w.step(j.Scatter), w.step(j.U)
	s.Rule = "f0 + a h^p + b Δt^q with the formal orders, " + quantity.Counted(j.Used, "run") + "; U = 1.25 (|error in space| + |error in time|) + scatter"
	for _, n := range j.Notices {
		w.tell(n)
	}
	u := j.U / w.choices.KNum
	s.UNum = w.step(u)
	if math.IsNaN(u) || len(w.x) == 0 {
		return
	}
	if w.gridU != nil {
		w.tell(notice.New("grid-steps-joint"))
		w.gridU = nil
	}
	w.addSteps("grid and time step", "U of the joint fit divided by "+quantity.Typed(w.choices.KNum), u)
}

// addSteps takes a standard uncertainty of the time step into the budget.
func (w *work) addSteps(name, text string, u float64) *part {
	all := make([]float64, len(w.x))
	for i := range all {
		all[i] = u
	}
	return w.add(OfNumerical, name, text, "computed from "+w.cell.Steps.File, all, w.choices.NumShared, false)
}
