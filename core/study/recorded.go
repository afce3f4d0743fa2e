package study

import (
	"math"
	"sort"
	"strings"
)

// RecordedLine is one of the steps whose order tells whether a requirement and
// a choice of stations can have been fitted to the result.
type RecordedLine struct {
	What string `json:"what"`
	In   int    `json:"in"` // entry of the log
	At   string `json:"at"` // time, given by the host
}

// recorded lists what recordedIn has, as far as the log has it, with its time.
func (w *work) recorded() {
	log := w.e.study.Log
	for _, r := range w.q.recordedIn() {
		if r.In >= 1 && r.In <= len(log) {
			r.At = log[r.In-1].At
			w.cell.Recorded = append(w.cell.Recorded, r)
		}
	}
}

// recordedIn lists, in the order of the log, when the stations were locked, the
// requirement was changed last and the comparison was shown.
func (q *Question) recordedIn() []RecordedLine {
	var list []RecordedLine
	if p := q.Plan; p != nil {
		list = append(list, RecordedLine{What: "stations locked", In: p.In})
	}
	if r := q.Requirement; r != nil {
		list = append(list, RecordedLine{What: "requirement recorded", In: r.In})
	}
	if q.Revealed {
		list = append(list, RecordedLine{What: strings.TrimSuffix("comparison shown, "+q.lackedAt(q.RevealedIn), ", "), In: q.RevealedIn})
	}
	sort.SliceStable(list, func(a, b int) bool { return list[a].In < list[b].In })
	return list
}

// lacks says what a question does not have before its comparison is shown.
func (q *Question) lacks() string { return q.lackedAt(math.MaxInt) }

// lackedAt says what a question did not have at an entry of the log.
func (q *Question) lackedAt(entry int) string {
	var lacks []string
	if q.Requirement == nil || q.Requirement.In > entry {
		lacks = append(lacks, "requirement not set")
	}
	if q.Plan == nil || q.Plan.In > entry {
		lacks = append(lacks, "stations not locked")
	}
	return strings.Join(lacks, ", ")
}
