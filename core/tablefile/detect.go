package tablefile

import "bytes"

// The sample that the layout of a delimited file is judged by: so many lines
// with numbers are enough, and no more than so many lines are looked at.
const (
	sampleNumbers = 64
	sampleLines   = 4000
)

// proseScore is the score below which words between blanks are prose with a
// number in it, not rows.
const proseScore = 0.1

// layout is how the rows of a delimited file are written, judged by a sample
// of its first lines.
type layout struct {
	separator  byte
	columns    int
	trailing   bool   // rows end with a separator
	numeric    []bool // columns that hold numbers
	first      int    // offset of the first row
	names      int    // offset of the line of names, or -1
	units      int    // offset of the line of units, or -1
	cells      int    // cells of the line of names, where they do not fit the columns
	rowBytes   int    // of a row, on average
	stated     bool   // a person or the file itself gives the separator
	statements bool   // lines of a key and a value above the rows are no rows
}

// sample is the first lines of content, split by one separator.
type sample struct {
	separator byte
	cells     cellReader
	lines     []sampleLine
	foreign   int // text cells that hold a stronger separator
	openQuote int // offset of a quote that never closes, else -1
}

type sampleLine struct {
	at, next int
	cells    []cellKind
	count    int // of cells
	numbers  int
	texts    int
	blanks   int
	lastVoid bool // the last cell is blank
}

// sampleEnd returns the offset behind the lines from offset from on that the
// layout is judged by: enough lines of content with a digit.
func (r *reader) sampleEnd(from int) int {
	at := from
	for digits, lines := 0, 0; at < len(r.data) && digits < sampleNumbers && lines < sampleLines; lines++ {
		kind, i := kindOfLine(r.data, at, ';')
		end := r.lineEnd(at)
		if kind == lineContent && bytes.ContainsAny(r.data[i:end], "0123456789") {
			digits++
		}
		at = afterEnd(r.data, end)
	}
	return at
}

// takeSample splits the lines of content in data[from:end] by separator. With
// statements, lines of a key and a value before any number are left out.
func (r *reader) takeSample(separator byte, from, end int, statements bool) sample {
	s := sample{separator: separator, cells: r.cells, openQuote: -1}
	split := splitter{data: r.data, separator: separator, guides: r.guides, strict: r.strict}
	numbers := 0
	for at := from; at < end; {
		kind, _ := kindOfLine(r.data, at, separator)
		if kind != lineContent {
			at = afterEnd(r.data, r.lineEnd(at))
			continue
		}
		next, _ := split.split(at)
		if split.openQuote >= 0 {
			s.openQuote = split.openQuote
			break
		}
		line := s.look(&split, at, next)
		stated := false
		if statements && numbers == 0 {
			_, _, stated = rowStatement(bytes.TrimRight(r.data[at:next], "\r\n"), separator)
		}
		if !stated {
			s.lines = append(s.lines, line)
			numbers += line.numbers
		}
		at = next
	}
	return s
}

// look notes what the cells of a line hold.
func (s *sample) look(split *splitter, at, next int) sampleLine {
	line := sampleLine{at: at, next: next, count: split.count, cells: make([]cellKind, 0, len(split.cells))}
	for i, c := range split.cells {
		text := split.bytes(c)
		_, kind, _ := s.cells.read(text)
		if kind == cellText && i == len(split.cells)-1 && s.cells.isNumberAndRemark(text) {
			kind = cellNumber
		}
		switch kind {
		case cellNumber, cellOverflow:
			line.numbers++
			kind = cellNumber
		case cellMissing:
			line.blanks++
		case cellText:
			line.texts++
			if s.separator == ',' && !c.quoted && bytes.ContainsAny(text, ";\t") {
				s.foreign++
			}
		}
		line.cells = append(line.cells, kind)
		line.lastVoid = c.start == c.end && !c.quoted
	}
	return line
}

// mode returns the most frequent count of cells of the lines with numbers,
// the first of equals, and how many lines of the sample have it. Lines before
// the first with numbers are not counted in among.
func (s *sample) mode() (columns, lines, among int) {
	counts := map[int]int{}
	for i := range s.lines {
		if line := &s.lines[i]; line.numbers > 0 {
			counts[line.count]++
		}
	}
	for i := range s.lines {
		line := &s.lines[i]
		if line.numbers > 0 && counts[line.count] > lines {
			columns, lines = line.count, counts[line.count]
		}
		if line.numbers > 0 || among > 0 {
			among++
		}
	}
	return columns, lines, among
}

// score says how well the sample forms a table: the share of lines with the
// same count of cells times the share of their cells that are numbers. A mark
// of a missing value counts for less than a number, and a cell that holds a
// stronger separator counts against. One column is what every separator that
// the file does not use gives, so it counts for less.
func (s *sample) score() (score float64, columns, lines int) {
	columns, lines, among := s.mode()
	if lines == 0 {
		return 0, 0, 0
	}
	numbers, blanks, cells := 0, 0, 0
	for i := range s.lines {
		if line := &s.lines[i]; line.numbers > 0 && line.count == columns {
			numbers += line.numbers
			blanks += line.blanks
			cells += len(line.cells)
		}
	}
	share := (float64(numbers) + 0.9*float64(blanks) - float64(s.foreign)) / float64(cells)
	score = share * float64(lines) / float64(among)
	if columns == 1 {
		score *= 0.4
	}
	return score, columns, lines
}

// judge returns the layout of a delimited file from offset from on, or false
// where the sample holds no number, or none before a quote that never closes.
// stated is the separator that a person or the file itself gives, or 0. Where
// the rows show that they are parted by position, it sets the guides.
func (r *reader) judge(from int, stated byte) (layout, bool) {
	candidates := []byte{'\t', ';', ',', spaces}
	switch {
	case len(r.guides) > 0:
		candidates = []byte{fixed}
	case stated != 0:
		candidates = []byte{stated}
	}
	end := r.sampleEnd(from)
	best := r.best(candidates, from, end, true)
	statements := best.columns > 0
	if !statements {
		best = r.best(candidates, from, end, false)
	}
	if len(r.guides) == 0 && stated == 0 && (best.columns == 0 || best.separator == spaces) {
		if guides := r.findGuides(from, end); guides != nil {
			r.guides, r.strict = guides, true
			best = r.best([]byte{fixed}, from, end, true)
			statements = true
		}
	}
	if best.columns == 0 || best.separator == spaces && best.value < proseScore {
		if best.quote >= 0 {
			r.refuse(openQuote(r.data, best.quote, from, r.line))
		}
		return layout{}, false
	}
	if best.columns > maxColumns {
		return layout{columns: best.columns}, true
	}
	l := best.layout(best.columns)
	l.stated, l.statements = stated != 0, statements
	return l, true
}

// judged is the sample by the separator that fits best, with its score.
type judged struct {
	sample
	value   float64
	columns int
	rows    int // lines with that number of columns
	quote   int // offset of a quote that never closes by some separator, else -1
}

// nearlyAsGood is the part of the better score above which the separator that
// makes more rows is taken: a stray blank in one row of a clean table must not
// leave the others out as text.
const nearlyAsGood = 0.9

// beats reports whether j fits better than other.
func (j judged) beats(other judged) bool {
	switch {
	case j.value > nearlyAsGood*other.value && j.rows > other.rows:
		return true
	case other.value > nearlyAsGood*j.value && other.rows > j.rows:
		return false
	}
	return j.value > other.value || j.value == other.value && j.columns > other.columns
}

// best judges the lines in data[from:end] by every candidate.
func (r *reader) best(candidates []byte, from, end int, statements bool) judged {
	best := judged{quote: -1}
	quote := -1
	for _, separator := range candidates {
		s := r.takeSample(separator, from, end, statements)
		value, columns, rows := s.score()
		quote = max(quote, s.openQuote)
		if j := (judged{sample: s, value: value, columns: columns, rows: rows}); value > 0 && j.beats(best) {
			best = j
		}
	}
	best.quote = quote
	return best
}

// layout finds the first row and the lines of names and units above it.
func (s *sample) layout(columns int) layout {
	l := layout{separator: s.separator, columns: columns, names: -1, units: -1}
	l.trailing = s.endsVoid(columns)
	l.numeric = s.numericColumns(columns)
	if l.trailing {
		l.columns--
		l.numeric = l.numeric[:l.columns]
	}
	first := 0
	for first < len(s.lines) && !s.isRow(first, l, columns) {
		first++
	}
	for first > 0 && s.lines[first-1].texts == 0 && s.lines[first-1].count == columns {
		first--
	}
	if first == len(s.lines) {
		first = 0 // a table of names that are numbers
	}
	l.first = s.lines[first].at
	l.rowBytes = s.rowBytes(first)
	return l
}

// endsVoid reports whether every row of the sample ends with a separator, and
// no line of names gives the column behind it a name.
func (s *sample) endsVoid(columns int) bool {
	if s.separator == spaces || s.separator == fixed || columns < 2 {
		return false
	}
	for i := range s.lines {
		if line := &s.lines[i]; line.count == columns && !line.lastVoid {
			return false
		}
	}
	return true
}

// numericColumns tells the columns that hold numbers in at least half of the
// rows that hold numbers or text there. The first row with numbers may be a
// line of names and is left out where there are enough others.
func (s *sample) numericColumns(columns int) []bool {
	numbers, texts := make([]int, columns), make([]int, columns)
	var rows []*sampleLine
	for i := range s.lines {
		if line := &s.lines[i]; line.numbers > 0 && line.count == columns {
			rows = append(rows, line)
		}
	}
	if len(rows) > 2 {
		rows = rows[1:]
	}
	for _, line := range rows {
		for c, kind := range line.cells {
			if c >= columns {
				break
			}
			switch kind {
			case cellNumber:
				numbers[c]++
			case cellText:
				texts[c]++
			}
		}
	}
	numeric := make([]bool, columns)
	for c := range numeric {
		numeric[c] = numbers[c] > 0 && numbers[c] >= texts[c]
	}
	return numeric
}

// isRow reports whether line i of the sample is a row: it has the columns and
// numbers, and is no line of names or units, which hold text in more than half
// of the columns of numbers. The first line is one of names too where its
// first cell is text above numbers: names may be numbers, as those of stations.
func (s *sample) isRow(i int, l layout, columns int) bool {
	line := &s.lines[i]
	if line.count != columns || line.numbers == 0 {
		return false
	}
	if i == 0 && len(s.lines) > 2 && l.numeric[0] && line.cells[0] == cellText {
		return false
	}
	numeric, texts := 0, 0
	for c, is := range l.numeric {
		if !is || c >= len(line.cells) {
			continue
		}
		numeric++
		if line.cells[c] == cellText {
			texts++
		}
	}
	return 2*texts <= numeric
}

// rowBytes returns the average length of the rows of the sample.
func (s *sample) rowBytes(first int) int {
	last := s.lines[len(s.lines)-1]
	return max(1, (last.next-s.lines[first].at)/(len(s.lines)-first))
}
