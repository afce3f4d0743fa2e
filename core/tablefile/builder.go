package tablefile

import (
	"bytes"
	"fmt"
	"math"
	"slices"
	"strings"

	"weirmark/core/notice"
)

// builder gathers the rows of one table.
type builder struct {
	r        *reader
	split    splitter
	trailing bool        // a blank cell behind the last column is no column
	numeric  []bool      // columns that held numbers in the sample; nil: all
	columns  []gather    // one per column
	values   [][]float64 // of the columns, capacity rows long
	rows     int
	capacity int
	runs     []run
	next     int // line of the next row if it follows the last

	start, startLine int  // where the rows of the table begin
	blank            bool // a blank line since the last row
	held             tellOnce
	heldCells        int      // of the first row held back
	heldShown        []string // the first rows held back, with their lines
	heldLines        int
	texts            int            // lines of text passed over among the rows
	rowsBefore       int            // lines counted as rows before those of the table
	stop             *notice.Notice // why the table cannot be used, else nil
}

// gather is what was seen in one column beside plain numbers.
type gather struct {
	missing  tellOnce
	overflow tellOnce
	comma    tellOnce // cells with a decimal comma
	date     tellOnce // cells that hold a date or a time of day
	text     bool     // some cell holds text that is no mark of a missing value
}

// newBuilder returns a builder of n columns with room for about rows rows.
func (r *reader) newBuilder(n int, separator byte, rows int) *builder {
	b := &builder{r: r, split: splitter{data: r.data, separator: separator}, start: r.at, startLine: r.line, rowsBefore: r.tally.row}
	b.columns = make([]gather, n)
	b.values = make([][]float64, n)
	b.reserve(max(rows, 8))
	return b
}

// reserve makes room for rows rows.
func (b *builder) reserve(rows int) {
	for c, old := range b.values {
		b.values[c] = make([]float64, rows)
		copy(b.values[c], old[:b.rows])
	}
	b.capacity = rows
}

// commit makes the values just written a row that begins on line.
func (b *builder) commit(line int) {
	if line != b.next || b.rows == 0 {
		b.runs = append(b.runs, run{b.rows, line})
	}
	b.next = line + 1
	b.rows++
}

// plainRow reads a row of plain numbers at offset i straight into the next
// row and returns the offset of the next line. It returns -1 where anything
// else is met; the row is then read the long way. This is the hot spot.
func (b *builder) plainRow(i int) int {
	if b.rows == b.capacity {
		b.reserve(2 * b.capacity)
	}
	data, separator, row := b.r.data, b.split.separator, b.rows
	last := len(b.values) - 1
	for c, column := range b.values {
		for i < len(data) && (data[i] == ' ' || data[i] == '\t' && separator != '\t') {
			i++
		}
		value, end := scanNumber(data, i)
		if end < 0 {
			return -1
		}
		column[row] = value
		i = end
		for i < len(data) && (data[i] == ' ' || data[i] == '\t' && separator != '\t') {
			i++
		}
		if c == last {
			break
		}
		if separator == spaces {
			if i == end {
				return -1
			}
			continue
		}
		if i >= len(data) || data[i] != separator {
			return -1
		}
		i++
	}
	if i >= len(data) || data[i] == '\n' {
		return min(i+1, len(data))
	}
	if data[i] == '\r' {
		return afterEnd(data, i)
	}
	return -1
}

// content reads a line of content at the reader's place, the long way: a row,
// a row held back, or a line of text. rows says whether rows may begin here.
// It reports false where a quote never closes.
func (b *builder) content(rows bool) bool {
	r := b.r
	at, line := r.at, r.line
	next, lines := b.split.split(at)
	if quote := b.split.openQuote; quote >= 0 {
		r.refuse(openQuote(r.data, quote, at, line))
		return false
	}
	r.at, r.line = next, line+lines
	switch {
	case rows && b.fits() && b.readRow(line):
		r.tally.row += lines
		b.noteGap(line)
	case !b.fits() && b.mostlyNumbers():
		if b.held.count == 0 {
			b.heldCells = b.split.count
		}
		if b.held.count < heldShown {
			b.heldShown = append(b.heldShown, fmt.Sprintf("line %d %q", line, excerpt(r.text(at))))
		}
		b.held.tell(line, nil)
		b.heldLines += lines
		r.tally.held += lines
	case !rows && b.statement(at, line):
		r.tally.stated += lines
	default:
		r.passed.tell(line, r.text(at))
		b.texts++
		r.tally.text += lines
	}
	return true
}

// statement keeps what the line at offset at states, and reports whether it
// states anything.
func (b *builder) statement(at, line int) bool {
	r := b.r
	if !r.statements {
		return false
	}
	key, value, ok := rowStatement(r.text(at), b.split.separator)
	if ok {
		r.state(key, value, line)
		r.stated.tell(line, r.text(at))
	}
	return ok
}

// openQuote returns the stop notice for a quote at offset quote in a row that
// begins at offset at on line.
func openQuote(data []byte, quote, at, line int) notice.Notice {
	column := quote - at + 1
	for i := at; i < quote; i++ {
		if data[i] == '\n' || data[i] == '\r' && (i+1 == len(data) || data[i+1] != '\n') {
			line++
			column = quote - i
		}
	}
	return notice.New("quote-open").AtColumn(line, column)
}

// noteGap records blank lines between the row just read and the one before.
func (b *builder) noteGap(line int) {
	if b.blank && b.rows > 1 {
		b.r.gaps.tell(line, nil)
	}
	b.blank = false
}

// fits reports whether the row just split has the cells of the table.
func (b *builder) fits() bool {
	n := len(b.values)
	if b.split.count == n {
		return true
	}
	if !b.trailing || b.split.count != n+1 {
		return false
	}
	last := b.split.cells[len(b.split.cells)-1]
	return last.start == last.end && !last.quoted
}

// mostlyNumbers reports whether at least half of the cells just split, and
// one of them, are numbers.
func (b *builder) mostlyNumbers() bool {
	numbers := 0
	for _, c := range b.split.cells {
		if _, kind, _ := b.r.cells.read(b.split.bytes(c)); kind == cellNumber {
			numbers++
		}
	}
	return numbers > 0 && 2*numbers >= len(b.split.cells)
}

// readRow reads the row just split, which fits. It reports false, and records
// nothing, where every column of numbers holds text: such a line is no row.
func (b *builder) readRow(line int) bool {
	if b.rows == b.capacity {
		b.reserve(2 * b.capacity)
	}
	if !b.holdsData() {
		return false
	}
	column := 0
	for _, c := range b.split.cells {
		text := b.split.bytes(c)
		for range c.repeat {
			if column == len(b.values) {
				break // the blank cell behind the last column
			}
			b.values[column][b.rows] = b.readValue(column, line, text, column == len(b.values)-1)
			column++
		}
	}
	b.commit(line)
	return true
}

// holdsData reports whether the row just split can be one: some column of
// numbers holds a number or a mark of a missing value, or none holds text.
func (b *builder) holdsData() bool {
	column, text := 0, false
	for _, c := range b.split.cells {
		for range c.repeat {
			if column == len(b.values) {
				break
			}
			if b.numeric == nil || b.numeric[column] {
				cell := b.split.bytes(c)
				_, kind, _ := b.r.cells.read(cell)
				isText := kind == cellText && !(column == len(b.values)-1 && b.r.cells.isNumberAndRemark(cell))
				if !isText && len(cell) > 0 {
					return true
				}
				text = text || isText
			}
			column++
		}
	}
	return !text
}

// readValue returns the number of a cell and records what is not plain. A
// remark behind the number of the last cell of a row is left out.
func (b *builder) readValue(column, line int, text []byte, last bool) float64 {
	value, kind, form := b.r.cells.read(text)
	if kind == cellText && last {
		if head, ok := beforeRemark(text); ok {
			text = head
			value, kind, form = b.r.cells.read(text)
		}
	}
	g := &b.columns[column]
	switch kind {
	case cellNumber:
		if form &^= formPoint; form != 0 {
			b.r.forms.tell(form, line, text, value)
			if form&formComma != 0 {
				g.comma.tell(line, text)
			}
		}
		return value
	case cellText:
		g.text = true
		if isDate(text) {
			g.date.tell(line, text)
		}
	case cellOverflow:
		g.overflow.tell(line, text)
	}
	g.missing.tell(line, text)
	return math.NaN()
}

// beforeRemark returns the part of a cell before " #" or " !".
func beforeRemark(text []byte) ([]byte, bool) {
	at := bytes.IndexAny(text, "#!")
	if at < 1 || blankAt(text, at-1) == 0 {
		return nil, false
	}
	return bytes.TrimSpace(text[:at]), true
}

func (r cellReader) isNumberAndRemark(text []byte) bool {
	head, ok := beforeRemark(text)
	if !ok {
		return false
	}
	_, kind, _ := r.read(head)
	return kind == cellNumber
}

// comment passes over the comment whose first mark is at offset i. A comment
// that holds a row is told: someone may have switched the row off.
func (b *builder) comment(i int) {
	r := b.r
	for i < len(r.data) && bytes.IndexByte([]byte("#%!;/ \t"), r.data[i]) >= 0 {
		i++
	}
	if len(b.values) > 1 && b.plainRow(i) >= 0 {
		r.disabled.tell(r.line, r.text(r.at))
	} else if key, value, ok := statement(commentText(r.text(r.at))); ok && b.rows == 0 {
		r.state(key, value, r.line)
	}
	r.tally.comment++
	r.skipLine()
}

// blankLine passes over a blank line.
func (b *builder) blankLine() {
	b.blank = b.rows > 0
	b.r.tally.blank++
	b.r.skipLine()
}

// table returns the finished table, or false where it has no rows, and adds
// its notices to the file. columns are its columns, as yet without values.
func (b *builder) table(name string, columns []Column) (Table, bool) {
	r := b.r
	if b.held.count > 0 {
		if r.opt.Uneven == LeaveOutUneven {
			r.add(notice.New("rows-left-out", len(b.values), b.heldWords()).At(b.held.line))
		} else {
			r.add(notice.New("column-count", b.held.line, b.heldCells, len(b.values), b.heldWords()).At(b.held.line))
		}
	}
	if b.rows == 0 {
		return Table{}, false
	}
	t := Table{Name: name, Line: b.runs[0].line, runs: b.runs, Columns: columns}
	for c := range t.Columns {
		t.Columns[c].Values = b.finished(c)
	}
	b.review(&t)
	for c, column := range t.Columns {
		b.describe(&t, c, column)
	}
	return t, true
}

// heldShown is the number of rows held back that are shown as written.
const heldShown = 5

// heldWords shows the rows held back as written, and counts those not shown.
func (b *builder) heldWords() string {
	text := strings.Join(b.heldShown, ", ")
	if more := b.held.count - len(b.heldShown); more > 0 {
		text += " and " + plural(more, "further row")
	}
	return text
}

// finished returns the values of column c without much spare room.
func (b *builder) finished(c int) []float64 {
	if b.rows < b.capacity-b.capacity/8 {
		return append(make([]float64, 0, b.rows), b.values[c][:b.rows]...)
	}
	return b.values[c][:b.rows:b.rows]
}

// describe adds the notices of a column.
func (b *builder) describe(t *Table, c int, column Column) {
	g, r := &b.columns[c], b.r
	if g.overflow.count > 0 {
		r.add(notice.New("value-overflow", g.overflow.first).At(g.overflow.line))
	}
	if g.missing.count > 0 {
		r.add(notice.New("value-missing", g.missing.count, g.missing.first, column.Name).At(g.missing.line))
	}
	r.dropSentinels(t, column)
	r.sentinels(t, column)
	b.constant(t, column)
	b.dates(c, column)
}

// constantRows is the least number of rows of which a column of one value is
// told.
const constantRows = 3

// constant tells of a column that holds one value in every row.
func (b *builder) constant(t *Table, column Column) {
	if value, ok := column.Constant(); ok && len(column.Values) >= constantRows {
		b.r.add(notice.New("column-constant", column.Name, formatValue(value), len(column.Values)).At(t.Line))
	}
}

// dates stops the use of a table that holds a date among the numbers of a
// column: a spreadsheet may have made it of a number.
func (b *builder) dates(c int, column Column) {
	g := &b.columns[c]
	if g.date.count == 0 || !slices.ContainsFunc(column.Values, func(v float64) bool { return !math.IsNaN(v) }) {
		return
	}
	place := b.r.cellName(g.date.line, c)
	n := notice.New("value-date", place, dateWords(g.date.first), column.Name, g.date.count).At(g.date.line)
	b.r.add(n)
	if b.stop == nil {
		b.stop = &n
	}
}
