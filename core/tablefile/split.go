package tablefile

import "bytes"

// spaces is the separator of whitespace tables: any run of blanks.
const spaces = ' '

// cell is one cell of a row: data[start:end], without quotes and blanks.
type cell struct {
	start, end int
	quoted     bool
	repeat     int // how many cells it stands for, 1 but for 3*0.0
}

// splitter splits rows into cells. It keeps at most maxColumns+1 cells of a
// row, enough to see that the row has too many.
type splitter struct {
	data      []byte
	separator byte
	repeats   bool  // n*value stands for n cells
	guides    []int // of columns known by position, else nil
	strict    bool  // the guides are a guess
	cells     []cell
	count     int // cells of the row, repeats counted
	openQuote int // offset of a quote that never closes, else -1
}

// split splits the row at offset i and returns the offset of the next line
// and the number of lines the row spans.
func (s *splitter) split(i int) (next, lines int) {
	s.cells, s.count, s.openQuote = s.cells[:0], 0, -1
	switch s.separator {
	case spaces:
		return s.splitSpaces(i), 1
	case fixed:
		return s.splitGuides(i), 1
	}
	return s.splitSeparated(i)
}

func (s *splitter) splitSeparated(i int) (next, lines int) {
	data := s.data
	lines = 1
	for {
		for i < len(data) && data[i] != s.separator && blankAt(data, i) > 0 {
			i += blankAt(data, i)
		}
		start, end, quoted := i, i, false
		if i < len(data) && data[i] == '"' {
			closing, crossed := closingQuote(data, i+1)
			if closing < 0 {
				s.openQuote = i
				return len(data), lines + crossed
			}
			start, end, quoted = i+1, closing, true
			lines += crossed
			i = closing + 1
		}
		tail := i
		for !atLineEnd(data, i) && data[i] != s.separator {
			i++
		}
		if rest := bytes.TrimSpace(data[tail:i]); !quoted || len(rest) > 0 {
			// Text behind a closing quote belongs to the cell, quotes and all.
			if quoted {
				start, quoted = start-1, false
			}
			end = start + len(bytes.TrimRight(data[start:i], " \t\v\f"))
		}
		if quoted {
			s.put(cell{start: start, end: end, quoted: true, repeat: 1})
		} else {
			s.put(s.repeated(start, end))
		}
		if atLineEnd(data, i) {
			return afterEnd(data, i), lines
		}
		i++
	}
}

// closingQuote returns the offset of the quote that closes a field begun
// before i, or -1, and the number of line ends between. Two quotes are one
// that belongs to the text.
func closingQuote(data []byte, i int) (closing, lines int) {
	for ; i < len(data); i++ {
		switch data[i] {
		case '"':
			if i+1 >= len(data) || data[i+1] != '"' {
				return i, lines
			}
			i++
		case '\n':
			lines++
		case '\r':
			if i+1 >= len(data) || data[i+1] != '\n' {
				lines++
			}
		}
	}
	return -1, lines
}

func (s *splitter) splitSpaces(i int) (next int) {
	data := s.data
	for {
		i = skipBlanks(data, i)
		if atLineEnd(data, i) {
			return afterEnd(data, i)
		}
		if s.count > 0 && beginsRemark(data, i) {
			for !atLineEnd(data, i) {
				i++
			}
			return afterEnd(data, i)
		}
		start := i
		if data[i] == '"' {
			if end := quoteOnLine(data, i+1); end >= 0 {
				s.put(cell{start: start + 1, end: end, quoted: true, repeat: 1})
				i = end + 1
				continue
			}
		}
		for !atLineEnd(data, i) && blankAt(data, i) == 0 {
			i++
		}
		s.put(s.repeated(start, i))
	}
}

// beginsRemark reports whether a comment begins at i behind the cells of a row.
func beginsRemark(data []byte, i int) bool {
	switch data[i] {
	case '#':
		return !spreadsheetError(data[i:])
	case '!':
		return true
	case '/':
		return i+1 < len(data) && data[i+1] == '/'
	}
	return false
}

// quoteOnLine returns the offset of the next quote of the line, or -1.
func quoteOnLine(data []byte, i int) int {
	for ; !atLineEnd(data, i); i++ {
		if data[i] == '"' {
			return i
		}
	}
	return -1
}

// repeated returns the cell of data[start:end], which may be a repeat count,
// an asterisk and a value.
func (s *splitter) repeated(start, end int) cell {
	c := cell{start: start, end: end, repeat: 1}
	if !s.repeats {
		return c
	}
	star := bytes.IndexByte(s.data[start:end], '*')
	if star <= 0 || star > 9 || start+star+1 == end {
		return c
	}
	count := 0
	for _, d := range s.data[start : start+star] {
		if !isDigit(d) {
			return c
		}
		count = count*10 + int(d-'0')
	}
	if count == 0 {
		return c
	}
	return cell{start: start + star + 1, end: end, repeat: count}
}

func (s *splitter) put(c cell) {
	s.count += c.repeat
	if len(s.cells) <= maxColumns {
		s.cells = append(s.cells, c)
	}
}

// bytes returns the text of a cell, doubled quotes made single.
func (s *splitter) bytes(c cell) []byte {
	text := s.data[c.start:c.end]
	if c.quoted && bytes.Contains(text, []byte(`""`)) {
		return bytes.ReplaceAll(text, []byte(`""`), []byte(`"`))
	}
	return text
}
