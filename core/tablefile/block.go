package tablefile

import (
	"fmt"
	"math"

	"weirmark/core/notice"
)

// stream is the values of a section in the order of the file, whatever the
// lines they stand on.
type stream struct {
	values []float64
	odd    []oddValue
	lines  []int32 // of every value
	end    int     // offset of the section that follows
	count  int     // lines of content
	texts  int     // cells of text
	over   bool    // repeat counts promise more than can be held
}

// oddValue is a cell of a stream that was no plain number.
type oddValue struct {
	at   int // index of its value
	kind cellKind
	text string
	form cellForm
}

// streamLimit bounds the values that repeat counts may add to a stream.
const streamLimit = 1 << 22

// readStream reads the values from offset at, on line, up to the next section.
// Values are separated by blanks and commas. The reader is not moved.
func (r *reader) readStream(at, line int) stream {
	var s stream
	room := streamLimit + (len(r.data)-at)/2
	for at < len(r.data) {
		kind, i := kindOfLine(r.data, at, spaces)
		if kind == lineContent {
			if beginsSection(r.data, i) {
				break
			}
			s.count++
			s.readLine(r.data, r.cells, i, r.lineEnd(i), line, room)
			if s.over {
				break
			}
		}
		at = afterEnd(r.data, r.lineEnd(at))
		line++
	}
	s.end = at
	return s
}

// readLine reads the values of data[i:end], which stand on line.
func (s *stream) readLine(data []byte, cells cellReader, i, end, line, room int) {
	split := splitter{data: data, separator: spaces, repeats: true}
	for i < end {
		if i = skipSeparators(data, i); i >= end || beginsRemark(data, i) {
			return
		}
		value, after := scanNumber(data, i)
		if after > 0 && cells.decimal != decimalComma && (after >= end || data[after] == ',' || blankAt(data, after) > 0) {
			s.put(value, line)
			i = after
			continue
		}
		start := i
		for i < end && data[i] != ',' && blankAt(data, i) == 0 {
			i++
		}
		c := split.repeated(start, i)
		if c.repeat > room-len(s.values) {
			s.over = true
			return
		}
		value, kind, form := cells.read(data[c.start:c.end])
		if kind == cellText {
			s.texts++
		}
		for range c.repeat {
			if kind != cellNumber || form&^formPoint != 0 {
				s.odd = append(s.odd, oddValue{len(s.values), kind, string(data[c.start:c.end]), form &^ formPoint})
			}
			s.put(value, line)
		}
	}
}

func (s *stream) put(value float64, line int) {
	s.values = append(s.values, value)
	s.lines = append(s.lines, int32(line))
}

// blockRows reads a zone in block order: all values of the first variable,
// then all of the second, and so on.
func (z *zones) blockRows(columns int) {
	r, h := z.reader, &z.heading
	s := r.readStream(r.at, r.line)
	n := h.points()
	switch {
	case z.headers == nil:
		z.leaveOutStream("block order without a list of variables")
		return
	case n == 0:
		z.leaveOutStream("block order without a count of points")
		return
	case s.over || len(s.values) != n*columns:
		z.leaveOutStream(fmt.Sprintf("block order with %d values where %d are announced", len(s.values), n*columns))
		return
	case s.texts > 0:
		z.leaveOutStream("block order with text among the numbers")
		return
	}
	t := Table{Name: h.name, Line: int(s.lines[0]), Columns: z.columns(columns)}
	for c := range t.Columns {
		t.Columns[c].Values = s.values[c*n : (c+1)*n : (c+1)*n]
	}
	t.runs = runsOf(s.lines[:n], 1)
	z.finishStream(t, &s, func(i int) int { return i / n })
}

// leaveOutStream leaves out the zone in hand, rows and all.
func (z *zones) leaveOutStream(why string) {
	z.leaveOut(why)
	z.skipSection()
}

// wrapped reads a zone in point order anew where its rows span lines: the
// values, whatever their lines, are as many as the heading announces. b is
// what was read from the same lines, from offset at on line. It reports
// false, and changes nothing, where the values are not as many.
func (z *zones) wrapped(b *builder, at, line int) bool {
	r, h := z.reader, &z.heading
	columns, n := len(b.values), h.points()
	if n == 0 || b.texts > 0 {
		return false
	}
	s := r.readStream(at, line)
	if s.over || s.texts > 0 || len(s.values) != n*columns {
		return false
	}
	r.forms = z.before
	r.tally.row += b.heldLines
	r.tally.held -= b.heldLines
	t := Table{Name: h.name, Line: int(s.lines[0]), Columns: z.columns(columns)}
	for c := range t.Columns {
		values := make([]float64, n)
		for i := range values {
			values[i] = s.values[i*columns+c]
		}
		t.Columns[c].Values = values
	}
	t.runs = runsOf(s.lines, columns)
	r.add(notice.New("zone-wrapped", h.title(z.number)).At(h.line))
	z.finishStream(t, &s, func(i int) int { return i % columns })
	return true
}

// finishStream adds the table of a stream and its notices, and moves behind
// the stream if that was not done. columnOf returns the column of a value.
func (z *zones) finishStream(t Table, s *stream, columnOf func(i int) int) {
	r := z.reader
	b := &builder{r: r, columns: make([]gather, len(t.Columns))}
	for _, odd := range s.odd {
		line, text := int(s.lines[odd.at]), []byte(odd.text)
		g := &b.columns[columnOf(odd.at)]
		if odd.kind == cellNumber {
			r.forms.tell(odd.form, line, text, s.values[odd.at])
			continue
		}
		if odd.kind == cellOverflow {
			g.overflow.tell(line, text)
		}
		g.missing.tell(line, text)
	}
	for c, column := range t.Columns {
		b.describe(&t, c, column)
	}
	r.file.Tables = append(r.file.Tables, t)
	for r.at < s.end {
		switch kind, _ := kindOfLine(r.data, r.at, spaces); kind {
		case lineBlank:
			r.tally.blank++
		case lineComment:
			r.tally.comment++
		case lineContent:
			r.tally.row++
		}
		r.skipLine()
	}
}

// runsOf returns the runs of rows of step values whose lines are given.
func runsOf(lines []int32, step int) []run {
	var runs []run
	next := math.MinInt
	for i := 0; i < len(lines); i += step {
		if line := int(lines[i]); line != next || i == 0 {
			runs = append(runs, run{i / step, line})
		}
		next = int(lines[i]) + 1
	}
	return runs
}
