package study

import (
	"math"
	"strconv"

	"weirmark/core/notice"
	"weirmark/core/plausibility"
	"weirmark/core/quantity"
	"weirmark/core/tablefile"
)

// mergeRepeats does what a person answered about different values at one
// station: the mean of all of them, or the first, stands in the first row.
func (l *loader) mergeRepeats(c *curve) {
	if c.slip.Repeats.Value == KeptBoth {
		l.tell(notice.New("rows-kept", l.file))
		return
	}
	if c.slip.Repeats.Value != Averaged && c.slip.Repeats.Value != FirstKept {
		l.tell(notice.New("rows-answer", c.slip.Repeats.Value, l.file))
		return
	}
	first := map[float64]int{}
	groups, order := map[int][]int{}, []int{}
	for i, x := range c.x {
		if math.IsNaN(x) || math.IsNaN(c.y[i]) {
			continue
		}
		at, seen := first[x]
		if !seen {
			first[x] = i
			order = append(order, i)
			at = i
		}
		groups[at] = append(groups[at], i)
	}
	m := merger{c: c, x: append([]float64{}, c.x...), y: append([]float64{}, c.y...)}
	if c.u != nil {
		m.u = append([]float64{}, c.u...)
	}
	for _, at := range order {
		if rows := groups[at]; len(rows) > 1 {
			m.merge(rows)
		}
	}
	c.x, c.y, c.u, c.left = m.x, m.y, m.u, m.left
	if m.places == 0 {
		return
	}
	if c.slip.Repeats.Value == FirstKept {
		l.tell(notice.New("rows-first", m.left, l.file, m.places))
		return
	}
	scatter := c.yUnit.unit.StepFromSI(math.Sqrt(m.squares / float64(m.left)))
	l.tell(notice.New("rows-averaged", m.left+m.places, l.file, m.places, quantity.Text(scatter, 3)+unitAfter(c.slip.Y.Unit.Value)))
}

// merger puts the rows of one station together.
type merger struct {
	c            *curve
	x, y, u      []float64
	places, left int
	squares      float64 // of the values about their means
}

func (m *merger) merge(rows []int) {
	m.places++
	m.left += len(rows) - 1
	if m.c.slip.Repeats.Value == Averaged {
		mean, u := 0.0, 0.0
		for _, r := range rows {
			mean += m.c.y[r] / float64(len(rows))
			if m.u != nil {
				u += m.c.u[r] / float64(len(rows))
			}
		}
		for _, r := range rows {
			m.squares += float64((m.c.y[r] - mean) * (m.c.y[r] - mean))
		}
		m.y[rows[0]] = mean
		if m.u != nil {
			m.u[rows[0]] = u // not divided by the root of their number: what they share is not known
		}
	}
	for _, r := range rows[1:] {
		m.y[r] = math.NaN()
		if m.c.slip.Role.Value == Reference {
			m.x[r] = math.NaN() // in a simulation that would part the line
		}
	}
}

// repeatCodes are the notices of the likely causes of repeated stations.
var repeatCodes = map[string]string{
	plausibility.Readings: "rows-repeated", plausibility.Step: "rows-jump", plausibility.Sides: "rows-sides", plausibility.Zones: "rows-zones",
}

// doubtRepeated asks about rows of a curve with one station and different
// values, by their likely cause; the answer on the slip acts.
func (w *work) doubtRepeated(c *curve) {
	if c == nil || c.scalar() || c.slip.Repeats.Given() || c != w.reference && len(w.x) == 0 {
		return
	}
	count, pairs := map[string]int{}, map[string]plausibility.Repeat{}
	most := ""
	for _, r := range plausibility.Repeats(c.x, c.y) {
		a, b := r.Rows[0], r.Rows[1]
		if c == w.reference && (w.isExcluded(c.table.RowLine(a)) || w.isExcluded(c.table.RowLine(b))) || !samePlace(c.table, a, b) {
			continue
		}
		if count[r.Cause]++; count[r.Cause] == 1 {
			pairs[r.Cause] = r
		}
		if most == "" || count[r.Cause] > count[most] {
			most = r.Cause
		}
	}
	if most == "" {
		return
	}
	a, b := pairs[most].Rows[0], pairs[most].Rows[1]
	value := func(row int) string { return quantity.Text(c.yUnit.unit.FromSI(c.y[row]), 4) }
	line := c.table.RowLine(b)
	n := notice.New(repeatCodes[most], place(c, a), value(a), value(b), c.table.RowLine(a), line, count[most]).In(w.e.study.fileName(c.slip))
	missing := "the two values at line " + strconv.Itoa(line)
	if w.q.Answers[n.Code] != "" {
		w.finding(2, missing, n)
		return
	}
	w.findingAt(2, missing, n, slipTarget(c.slip, "repeats"))
}

// samePlace reports whether a row repeats another column of an earlier one
// beside the stations, such as a tap number or a second coordinate; a table of
// two columns has none and counts.
func samePlace(t tablefile.Table, a, b int) bool {
	if len(t.Columns) <= 2 {
		return true
	}
	same := 0
	for _, c := range t.Columns {
		if c.Values[a] == c.Values[b] {
			same++
		}
	}
	return same >= 2
}
