package tablefile

import "bytes"

// lineKind says what a line is before its cells are looked at.
type lineKind uint8

const (
	lineBlank lineKind = iota
	lineComment
	lineContent
)

// lineEnd returns the offset of the end of the line that holds offset i: of
// its terminator, or of the end of the text.
func (r *reader) lineEnd(i int) int {
	if !r.returns {
		if n := bytes.IndexByte(r.data[i:], '\n'); n >= 0 {
			return i + n
		}
		return len(r.data)
	}
	for i < len(r.data) && r.data[i] != '\n' && r.data[i] != '\r' {
		i++
	}
	return i
}

// afterEnd returns the offset of the line after a terminator at end.
func afterEnd(data []byte, end int) int {
	if end >= len(data) {
		return end
	}
	if data[end] == '\r' && end+1 < len(data) && data[end+1] == '\n' {
		return end + 2
	}
	return end + 1
}

// text returns the line that begins at offset i, without its terminator.
func (r *reader) text(i int) []byte { return r.data[i:r.lineEnd(i)] }

// skipLine moves to the next line.
func (r *reader) skipLine() {
	r.at = afterEnd(r.data, r.lineEnd(r.at))
	r.line++
}

// skipBlanks returns the offset of the first character at or behind i that is
// neither blank nor a no-break space.
func skipBlanks(data []byte, i int) int {
	for i < len(data) {
		n := blankAt(data, i)
		if n == 0 {
			break
		}
		i += n
	}
	return i
}

// blankAt returns the length of the blank character at i, or 0.
func blankAt(data []byte, i int) int {
	switch data[i] {
	case ' ', '\t', '\v', '\f':
		return 1
	case 0xc2:
		if i+1 < len(data) && data[i+1] == 0xa0 {
			return 2
		}
	}
	return 0
}

// skipSeparators returns the offset of the first character at or behind i that
// is neither blank nor a comma.
func skipSeparators(data []byte, i int) int {
	for i = skipBlanks(data, i); i < len(data) && data[i] == ','; {
		i = skipBlanks(data, i+1)
	}
	return i
}

func atLineEnd(data []byte, i int) bool {
	return i >= len(data) || data[i] == '\n' || data[i] == '\r'
}

// kindOfLine tells blank lines and comments from content and returns the
// offset of the first character behind leading blanks. Where a semicolon
// separates cells it does not begin a comment.
func kindOfLine(data []byte, i int, separator byte) (lineKind, int) {
	i = skipBlanks(data, i)
	if atLineEnd(data, i) {
		return lineBlank, i
	}
	switch data[i] {
	case '%', '!':
		return lineComment, i
	case '#':
		if !spreadsheetError(data[i:]) {
			return lineComment, i
		}
	case ';':
		if separator != ';' {
			return lineComment, i
		}
	case '/':
		if i+1 < len(data) && data[i+1] == '/' {
			return lineComment, i
		}
	}
	return lineContent, i
}

// spreadsheetError reports whether text begins with an error value of a
// spreadsheet, which would otherwise look like a comment.
func spreadsheetError(text []byte) bool {
	for _, mark := range []string{"#N/A", "#DIV/0!", "#VALUE!", "#NUM!", "#REF!", "#NAME?", "#NULL!"} {
		if bytes.HasPrefix(text, []byte(mark)) {
			return true
		}
	}
	return false
}

// commentText returns a comment without the marks around it.
func commentText(line []byte) []byte {
	return bytes.TrimSpace(bytes.Trim(bytes.TrimSpace(line), "#%!;/*"))
}
