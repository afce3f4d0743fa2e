package study

import (
	"slices"
	"strings"

	"weirmark/core/notice"
	"weirmark/core/quantity"
)

// Locked is the value of a question's plan once its stations are locked.
const Locked = "locked"

// setPlan locks the stations of a question as they are, or opens them again.
func (s *Study) setPlan(id, value, at, why string) error {
	q := s.questionOf(id)
	switch {
	case q == nil || value != "" && value != Locked:
		return refuse("the locking of stations", value)
	case value == "":
		q.Plan = nil
		s.log(at, "Stations of "+q.label()+" opened again", why, q.Revealed)
		return nil
	}
	q.Plan = &StationPlan{At: at, Late: q.Revealed, Data: s.stationData(q), Policy: q.stationPolicy(), Excluded: q.excludedLines()}
	what := "all used"
	if n := len(q.Plan.Excluded); n > 0 {
		what = "all used but " + quantity.Counted(n, "excluded one")
	}
	s.log(at, "Stations of "+q.label()+" locked: "+what, why, q.Revealed)
	q.Plan.In = len(s.Log)
	return nil
}

// RevealPlanned locks the stations of a question where they are not, all of
// them used, and records that the comparison was looked at, with no
// requirement set.
func (s *Study) RevealPlanned(id, at string) error {
	q := s.questionOf(id)
	if q == nil {
		return refuse("the showing of a comparison", id)
	}
	if q.Plan == nil {
		why := ""
		if q.Requirement == nil {
			why = "requirement not set"
		}
		if err := s.setPlan(id, Locked, at, why); err != nil {
			return err
		}
	}
	return s.Reveal(id, at)
}

// stationData names the rows that the stations of a question come from.
func (s *Study) stationData(q *Question) string {
	for i := range s.Slips {
		p := &s.Slips[i]
		if !q.belongs(p, Reference) {
			continue
		}
		hash := ""
		if f := s.File(p.File); f != nil {
			hash = f.SHA256
		}
		return strings.Join([]string{hash, p.Table, p.X.Column.Value, p.Y.Column.Value, p.Branch.Value, p.Abscissa.Value, p.Repeats.Value}, " | ")
	}
	return ""
}

// stationPolicy names the choices that decide which stations are compared.
func (q *Question) stationPolicy() string {
	c := q.Choices
	return "gap " + quantity.Typed(c.Gap) + ", period " + quantity.Typed(c.Period) + ", probe " + quantity.Typed(c.Probe) + ", support points " + quantity.Typed(float64(len(q.Anchors)))
}

// excludedLines are the lines of the excluded stations, ascending.
func (q *Question) excludedLines() []int {
	lines := make([]int, len(q.Excluded))
	for i, e := range q.Excluded {
		lines[i] = e.Line
	}
	slices.Sort(lines)
	return lines
}

// plan sets the stations as they are against the plan.
func (w *work) plan() *PlanLine {
	p := w.q.Plan
	if p == nil {
		return nil
	}
	line := &PlanLine{At: p.At, Late: p.Late, Changes: []string{}}
	if p.Data != w.e.study.stationData(w.q) {
		line.Changes = append(line.Changes, "the reference rows")
	}
	if p.Policy != w.q.stationPolicy() {
		line.Changes = append(line.Changes, "the choices that decide which stations are compared")
	}
	now := w.q.excludedLines()
	if out := missingFrom(now, p.Excluded); out > 0 {
		line.Changes = append(line.Changes, quantity.Counted(out, "station")+" excluded")
	}
	if back := missingFrom(p.Excluded, now); back > 0 {
		line.Changes = append(line.Changes, quantity.Counted(back, "station")+" taken back")
	}
	if len(line.Changes) > 0 {
		w.need(2, false, "the stations as they were locked", w.q.target("plan"), "plan-changed", p.At, strings.Join(line.Changes, ", "))
	}
	if p.Late {
		w.tell(notice.New("plan-late", p.At))
	}
	return line
}

// missingFrom counts the lines of one list that another does not have.
func missingFrom(lines, other []int) int {
	n := 0
	for _, l := range lines {
		if !slices.Contains(other, l) {
			n++
		}
	}
	return n
}
