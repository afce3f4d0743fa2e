package tablefile

import (
	"bytes"
	"strings"
)

// Meta is a statement of the file about its tables: a line "key: value" or
// "key = value" above the rows, also behind a comment mark.
type Meta struct {
	Key, Value string
	Line       int
	Table      string // the table it stands above, "" for the whole file
}

// Lengths that a statement and its key have at most.
const (
	statementBytes = 400
	keyBytes       = 48
)

// statement parts a line of the form "key: value", "key = value" or, without
// blanks and with a number behind, "key=value".
func statement(line []byte) (key, value string, ok bool) {
	if len(line) > statementBytes {
		return "", "", false
	}
	text := strings.TrimSpace(string(line))
	at := strings.IndexAny(text, ":=")
	if at < 1 || at > keyBytes {
		return "", "", false
	}
	mark := text[at]
	key, value = strings.TrimSpace(text[:at]), strings.TrimSpace(text[at+1:])
	if !isKey(key) || value == "" {
		return "", "", false
	}
	if mark == ':' {
		apart := text[at+1] == ' ' || text[at+1] == '\t'
		return key, value, apart && !strings.Contains(value, ": ")
	}
	if strings.Contains(value, "=") {
		return "", "", false
	}
	if text[at-1] == ' ' && at+1 < len(text) && text[at+1] == ' ' {
		return key, value, true
	}
	_, kind, _ := readCell([]byte(value))
	return key, value, kind == cellNumber && !strings.ContainsAny(key, " ")
}

// isKey reports whether text can name a condition: it begins with a letter
// and holds no mark that separates cells.
func isKey(text string) bool {
	return text != "" && (text[0]|0x20 >= 'a' && text[0]|0x20 <= 'z' || text[0] >= 0x80) &&
		!strings.ContainsAny(text, ",;\t\"'|\x1f{}<>!?")
}

// cellStatement is statement for the cells of a row: a key with its colon or
// equals sign, a value and perhaps a unit, each in a cell of its own.
func cellStatement(cells []string) (key, value string, ok bool) {
	var filled []string
	for _, c := range cells {
		if c = strings.TrimSpace(c); c != "" {
			filled = append(filled, c)
		}
	}
	if len(filled) == 0 || len(filled) > 3 {
		return "", "", false
	}
	if len(filled) == 1 {
		return statement([]byte(filled[0]))
	}
	key, marked := strings.CutSuffix(filled[0], ":")
	if !marked {
		key, marked = strings.CutSuffix(filled[0], "=")
	}
	if len(filled) == 3 {
		if _, kind, _ := readCell([]byte(filled[2])); kind != cellText {
			return "", "", false
		}
	}
	key = strings.TrimSpace(key)
	return key, strings.Join(filled[1:], " "), marked && isKey(key)
}

// rowStatement is statement for a line of content whose cells are parted by
// separator.
func rowStatement(text []byte, separator byte) (key, value string, ok bool) {
	if key, value, ok = statement(bytes.TrimRight(text, ",;\t| \x1f")); ok {
		return key, value, true
	}
	if separator == spaces || separator == fixed || len(text) > statementBytes {
		return "", "", false
	}
	return cellStatement(namesBetween(text, separator))
}

// state keeps a statement that stands on a line of its own above the rows.
func (r *reader) state(key, value string, line int) {
	r.file.Meta = append(r.file.Meta, Meta{Key: key, Value: value, Line: line})
}
