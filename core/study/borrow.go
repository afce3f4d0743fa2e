package study

import (
	"math"

	"weirmark/core/notice"
	"weirmark/core/profile"
	"weirmark/core/quantity"
)

// Borrowing takes the relative grid uncertainty of another question for one
// whose runs have no family.
type Borrowing struct {
	Case     string   `json:"case,omitempty"`
	Quantity string   `json:"quantity,omitempty"`
	Penalty  *float64 `json:"penalty,omitempty"` // factor of 1 or more
	Why      string   `json:"why,omitempty"`
}

// Borrowed says what was borrowed. It is never computed from runs of the cell.
type Borrowed struct {
	From     string `json:"from"`     // the question of the lender
	Relative Number `json:"relative"` // standard u_num of the lender over its value, or over its range along a curve
	Penalty  Number `json:"penalty"`
	U        Number `json:"u"` // standard, of this cell
	Why      string `json:"why"`
}

// borrow takes the relative grid uncertainty of the lender, times the penalty,
// where the cell has no grid uncertainty of its own.
func (w *work) borrow() {
	f := w.q.Family
	if f == nil || f.Borrow == nil || f.Borrow.Case == "" && f.Borrow.Quantity == "" {
		return
	}
	b := f.Borrow
	lender := w.e.study.Question(b.Case, b.Quantity)
	target := w.q.target("family.borrow.case")
	switch {
	case w.gridU != nil:
		w.tell(notice.New("grid-borrow-idle", b.Quantity+" at "+b.Case))
		return
	case lender == nil || lender == w.q:
		w.need(1, true, "the question that lends its grid uncertainty", target, "grid-borrow-none", b.Quantity+" at "+b.Case)
		return
	case b.Penalty == nil || *b.Penalty < 1 || b.Why == "":
		w.need(1, true, "the penalty and the reason of a borrowed grid uncertainty", w.q.target("family.borrow.penalty"), "grid-borrow-penalty", lender.label())
		return
	}
	relative, scalar := w.lend(lender)
	if math.IsNaN(relative) || scalar != w.cell.Scalar {
		w.need(1, true, "the question that lends its grid uncertainty", target, "grid-borrow-none", lender.label())
		return
	}
	scale := math.NaN()
	if len(w.s) > 0 {
		scale = spanOf(w.s, scalar)
	}
	u := relative * *b.Penalty * scale
	w.cell.Borrowed = &Borrowed{From: lender.label(), Relative: Number(relative), Penalty: Number(*b.Penalty), U: w.step(u), Why: b.Why}
	w.tell(notice.New("grid-borrowed", lender.label(), quantity.Typed(*b.Penalty), b.Why))
	if math.IsNaN(u) || len(w.x) == 0 {
		return
	}
	all := make([]float64, len(w.x))
	for i := range all {
		all[i] = u
	}
	of := "the value"
	if !scalar {
		of = "the range along the curve"
	}
	w.add(OfNumerical, "grid, borrowed", quantity.Percent(relative)+" % of "+of+", times the penalty "+quantity.Typed(*b.Penalty), "borrowed from "+lender.label()+": "+b.Why, all, w.choices.NumShared, false)
}

// lend returns the standard grid uncertainty of another question for the same
// model, relative to its value or to its range along a curve; NaN where it has
// none of its own.
func (w *work) lend(q *Question) (relative float64, scalar bool) {
	l := &work{e: w.e, q: q, model: w.model, choices: q.Choices, inner: true, lending: true}
	l.findReference()
	l.findSimulation()
	if !l.settleUnits() {
		return math.NaN(), false
	}
	l.commonStations()
	l.family()
	g := l.cell.Grids
	if g == nil || l.blocked {
		return math.NaN(), l.cell.Scalar
	}
	values := l.s
	if l.cell.Scalar {
		values = []float64{l.yUnit.ToSI(float64(g.Points[len(g.Points)-1].Value))}
	}
	if len(values) == 0 {
		return math.NaN(), l.cell.Scalar
	}
	if l.cell.Scalar && l.yUnit.ByConvention() {
		return math.NaN(), true // no part of a value whose zero is a convention
	}
	return l.yUnit.StepToSI(float64(g.UNum)) / spanOf(values, l.cell.Scalar), l.cell.Scalar
}

// spanOf is the size that a relative uncertainty is of: of one value its
// magnitude, of a curve its range.
func spanOf(values []float64, scalar bool) float64 {
	if scalar {
		return math.Abs(values[0])
	}
	lo, hi := profile.Limits(values)
	return hi - lo
}

// enterBorrow changes what a question borrows.
func (f *Family) enterBorrow(path, value string) (string, error) {
	b := Borrowing{}
	if f.Borrow != nil {
		b = *f.Borrow
	}
	var before string
	var err error
	switch path {
	case "case":
		before, err = exchange(&b.Case, value)
	case "quantity":
		before, err = exchange(&b.Quantity, value)
	case "penalty":
		before, err = optional(&b.Penalty, value, 1)
	case "why":
		before, err = exchange(&b.Why, value)
	default:
		err = refuse("family.borrow."+path, value)
	}
	if err != nil {
		return before, err
	}
	if f.Borrow = &b; b == (Borrowing{}) {
		f.Borrow = nil
	}
	return before, nil
}
