package tablefile

import (
	"bytes"
	"fmt"
	"strconv"
	"strings"
)

// heading is what stands above the rows of a zone.
type heading struct {
	name     string
	line     int
	given    bool   // a ZONE line was read
	counts   [3]int // I, J, K; 0 where not given
	block    bool   // all values of the first variable first
	unread   string // what of the layout is not read, "" for nothing
	elements bool
}

// points returns the number of points the heading announces, 0 for none.
func (h *heading) points() int {
	total, given := 1, false
	for _, n := range h.counts {
		if n > 0 {
			total, given = min(total*n, 1<<40), true
		}
	}
	if !given {
		return 0
	}
	return total
}

// title returns the name of the zone for a notice.
func (h *heading) title(number int) string {
	if h.name == "" {
		return fmt.Sprintf("number %d", number)
	}
	return h.name
}

// wordAt returns the letters at offset i, in lower case, and the offset behind
// them and the blanks that follow.
func wordAt(data []byte, i int) (word string, after int) {
	end := i
	for end < len(data) && (data[end]|0x20)-'a' < 26 {
		end++
	}
	if end-i > 32 {
		return "", end
	}
	return strings.ToLower(string(data[i:end])), skipBlanks(data, end)
}

// isAssignment reports whether a word and an equals sign stand at offset i.
func isAssignment(data []byte, i int) bool {
	word, after := wordAt(data, i)
	return word != "" && after < len(data) && data[after] == '='
}

// isHeadingOf reports whether word= stands at offset i.
func isHeadingOf(data []byte, i int, word string) bool {
	found, after := wordAt(data, i)
	return found == word && after < len(data) && data[after] == '='
}

// zoneAt returns the offset behind the word ZONE at offset i, or -1 where no
// zone begins: the word must be followed by the end of the line or by a
// keyword and an equals sign.
func zoneAt(data []byte, i int) int {
	word, after := wordAt(data, i)
	if word != "zone" {
		return -1
	}
	after = skipSeparators(data, after)
	if atLineEnd(data, after) || isAssignment(data, after) {
		return after
	}
	return -1
}

// zoneHeading reports whether a list of variables or a zone with keywords
// stands at offset i.
func (r *reader) zoneHeading(i int) bool {
	if r.data[i]|0x20 != 'z' && r.data[i]|0x20 != 'v' {
		return false
	}
	if isHeadingOf(r.data, i, "variables") {
		return true
	}
	after := zoneAt(r.data, i)
	return after >= 0 && !atLineEnd(r.data, after)
}

// looksZoned reports whether the file begins as tables in zones do: among its
// first lines, before any row, stands a list of variables or a zone.
func (r *reader) looksZoned() bool {
	at := 0
	for range sampleLines {
		if at >= len(r.data) {
			return false
		}
		kind, i := kindOfLine(r.data, at, spaces)
		if kind == lineContent {
			if r.zoneHeading(i) {
				return true
			}
			if zoneAt(r.data, i) >= 0 {
				next := afterEnd(r.data, r.lineEnd(i))
				kind, j := kindOfLine(r.data, next, spaces)
				return kind == lineContent && isAssignment(r.data, j)
			}
		}
		at = afterEnd(r.data, r.lineEnd(at))
	}
	return false
}

// assignments reads keyword=value pairs from offset i to the end of the line
// and hands them to use. It returns the offset of the end of the line; a value
// in parentheses may span lines.
func (r *reader) assignments(i int, use func(key, value string)) (end int) {
	data := r.data
	for {
		if i = skipSeparators(data, i); atLineEnd(data, i) {
			return i
		}
		if !isAssignment(data, i) {
			i++
			continue
		}
		key, after := wordAt(data, i)
		value, next := r.value(skipBlanks(data, after+1))
		use(key, value)
		i = next
	}
}

// value returns the value at offset i and the offset behind it.
func (r *reader) value(i int) (value string, end int) {
	data := r.data
	if atLineEnd(data, i) {
		return "", i
	}
	line := data[i:r.lineEnd(i)]
	switch line[0] {
	case '"', '\'':
		n := bytes.IndexByte(line[1:], line[0])
		if n < 0 {
			return string(bytes.TrimSpace(line[1:])), i + len(line)
		}
		return strings.TrimSpace(string(line[1 : n+1])), i + n + 2
	case '(':
		if n := bytes.IndexByte(data[i:min(len(data), i+4096)], ')'); n >= 0 {
			return string(data[i : i+n+1]), i + n + 1
		}
		return string(line), i + len(line)
	}
	n := bytes.IndexAny(line, ", \t")
	if n < 0 {
		n = len(line)
	}
	return string(line[:n]), i + n
}

// set takes a keyword of a zone line.
func (h *heading) set(key, value string) {
	upper := strings.ToUpper(value)
	switch key {
	case "t":
		h.name = value
	case "i", "j", "k":
		h.counts[key[0]-'i'] = count(value)
	case "f", "datapacking", "zonetype":
		h.setLayout(key, upper)
	case "et", "e", "elements":
		h.elements = true
	case "varlocation":
		if strings.Contains(upper, "CELL") {
			h.unread = "values at cell centres"
		}
	case "varsharelist", "connectivitysharezone", "passivevarlist", "d", "duplicatelist":
		h.unread = "values of another zone (" + strings.ToUpper(key) + ")"
	}
	if h.elements && h.unread == "" {
		h.unread = "a list of elements"
	}
}

func (h *heading) setLayout(key, value string) {
	switch value {
	case "POINT":
		h.block = false
	case "BLOCK":
		h.block = true
	case "ORDERED":
	case "FEPOINT", "FEBLOCK":
		h.elements = true
	default:
		if key == "zonetype" && strings.HasPrefix(value, "FE") {
			h.elements = true
			return
		}
		h.unread = fmt.Sprintf("the layout %s=%s", strings.ToUpper(key), value)
	}
}

// count returns a count of points, kept within what a file can hold.
func count(value string) int {
	n, err := strconv.Atoi(value)
	if err != nil || n < 0 {
		return 0
	}
	return min(n, 1<<30)
}
