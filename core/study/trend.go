package study

import (
	"math"
	"strings"

	"weirmark/core/comparison"
	"weirmark/core/notice"
)

// TrendLine sets the change of a scalar from another case to this one, in the
// simulation, against the change in the data. Numbers are in the unit of the
// cell.
type TrendLine struct {
	From    string   `json:"from"`  // the other case
	S       Number   `json:"s"`     // change of the simulation
	D       Number   `json:"d"`     // change of the data
	E       Number   `json:"e"`     // the one less the other
	U       Number   `json:"u"`     // standard; null where u_val of a case is not known
	Apart   Number   `json:"apart"` // the same, if no source were common to both cases
	Lo      Number   `json:"lo"`
	Hi      Number   `json:"hi"`
	Reading string   `json:"reading"`
	Common  []string `json:"common"` // sources that are one error in both cases
}

// trend compares the change from the case that the question names. A source
// that is named alike in both cases, is of the same side and systematic is one
// error in both, so that only the difference of what it does remains. All others
// are independent: of the grid uncertainties too it is not known how they
// cancel.
func (w *work) trend() {
	from := w.q.Baseline
	if from == "" || w.inner || len(w.s) == 0 {
		return
	}
	other := w.e.study.Question(from, w.q.Quantity)
	if other == nil || other == w.q || !w.cell.Scalar || len(w.s) != 1 {
		w.tell(notice.New("trend-none", w.q.label(), from))
		return
	}
	b := &work{e: w.e, q: other, model: w.model, choices: other.Choices, inner: true}
	c := w.e.workWith(b)
	if !c.Scalar || len(b.s) != 1 || !w.yUnit.Same(b.yUnit.Unit) {
		w.tell(notice.New("trend-none", w.q.label(), from))
		return
	}
	s, d := w.s[0]-b.s[0], w.d[0]-b.d[0]
	t := &TrendLine{From: from, S: w.step(s), D: w.step(d), E: w.step(s - d), U: None, Apart: None, Lo: None, Hi: None, Common: []string{}}
	w.cell.Trend = t
	if w.uVal == nil || b.uVal == nil || math.IsNaN(w.uVal[0]) || math.IsNaN(b.uVal[0]) || w.bound != nil || b.bound != nil {
		return
	}
	square := float64(w.uVal[0]*w.uVal[0]) + float64(b.uVal[0]*b.uVal[0])
	t.Apart = w.step(math.Sqrt(square))
	for i := range w.parts {
		p := &w.parts[i]
		if q := b.sameError(p); q != nil {
			square -= 2 * p.source.U[0] * q.source.U[0]
			t.Common = append(t.Common, p.line.Name)
		}
	}
	u := math.Sqrt(max(square, 0))
	half := float64(w.choices.K * u)
	t.U, t.Lo, t.Hi = w.step(u), w.step(s-d-half), w.step(s-d+half)
	if u > 0 {
		t.Reading = reading(comparison.Ratio([]float64{s - d}, []float64{u})[0], w.choices.K)
	}
}

// sameError returns the part of this cell that is one error with a part of
// another, or nil.
func (w *work) sameError(p *part) *part {
	if p.members != nil || !w.systematic(p) {
		return nil
	}
	for i := range w.parts {
		q := &w.parts[i]
		if q.members == nil && q.line.Name == p.line.Name && q.line.Of == p.line.Of && w.systematic(q) {
			return q
		}
	}
	return nil
}

// systematic reports whether a part was entered as one error of all stations.
func (w *work) systematic(p *part) bool {
	if p.line.Of == OfNumerical || !p.source.Common || unnamed(p.line.Name) {
		return false
	}
	for _, s := range w.q.Sources {
		if s.Name == p.line.Name && s.Of == p.line.Of {
			return !s.Random
		}
	}
	return false
}

// unnamed reports whether a source bears the name it was given when it was
// added: two such are not known to be the same.
func unnamed(name string) bool { return strings.HasPrefix(name, newSource) }
