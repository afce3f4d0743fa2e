package tablefile

import (
	"bytes"
	"fmt"
	"strconv"
	"strings"
)

// months are the names of months that a date in a table may have, by their
// first letters, in English, German, French and Spanish (from memory).
var months = [...][]string{
	{"jan", "ene"}, {"feb", "fév", "fev"}, {"mar", "mär", "mrz"}, {"apr", "avr", "abr"}, {"may", "mai"}, {"jun", "juin"},
	{"jul", "juil"}, {"aug", "aoû", "ago"}, {"sep"}, {"oct", "okt"}, {"nov"}, {"dec", "dez", "déc", "dic"},
}

var monthNames = [...]string{"January", "February", "March", "April", "May", "June",
	"July", "August", "September", "October", "November", "December"}

// isDate reports whether a cell that is no number is written as a date or a
// time of day: 3/2, 03/02/2024, 2.3.2024, 2024-03-02, 2-Mar, Mar 24, 12:30.
func isDate(text []byte) bool {
	if len(text) < 3 || len(text) > 30 || !bytes.ContainsAny(text, "0123456789") {
		return false
	}
	s := strings.ToLower(string(text))
	if at := strings.IndexAny(s, "t "); at > 0 && isClock(s[at+1:]) {
		s = s[:at]
	}
	return isClock(s) || isDayMonth(s) || hasMonth(s)
}

// isClock reports whether s is hours and minutes, and perhaps seconds.
func isClock(s string) bool {
	parts := strings.Split(strings.TrimSuffix(s, "z"), ":")
	if len(parts) < 2 || len(parts) > 3 || !isCount(parts[0], 1, 2) || !isCount(parts[1], 2, 2) {
		return false
	}
	if len(parts) == 2 {
		return true
	}
	whole, part, _ := strings.Cut(parts[2], ".")
	return isCount(whole, 2, 2) && (part == "" || isCount(part, 1, 9))
}

// isDayMonth reports whether s is two or three numbers that can be a day, a
// month and a year, parted by one mark.
func isDayMonth(s string) bool {
	for _, mark := range []string{"/", "-", "."} {
		parts := strings.Split(s, mark)
		if mark == "." && len(parts) == 3 && parts[2] == "" {
			parts = parts[:2] // 2.3.
		} else if mark != "/" && len(parts) == 2 {
			continue // 2-3 and 2.3
		}
		switch {
		case len(parts) == 2:
			return dayMonth(parts[0], parts[1])
		case len(parts) == 3 && isCount(parts[0], 4, 4):
			return dayMonth(parts[1], parts[2])
		case len(parts) == 3 && (isCount(parts[2], 4, 4) || isCount(parts[2], 2, 2)):
			return dayMonth(parts[0], parts[1])
		}
	}
	return false
}

// dayMonth reports whether one of two numbers can be a month and the other a
// day of it.
func dayMonth(a, b string) bool {
	if !isCount(a, 1, 2) || !isCount(b, 1, 2) {
		return false
	}
	m, _ := strconv.Atoi(a)
	n, _ := strconv.Atoi(b)
	return m >= 1 && n >= 1 && min(m, n) <= 12 && max(m, n) <= 31
}

// hasMonth reports whether s is the name of a month with a day or a year.
func hasMonth(s string) bool {
	parts := strings.FieldsFunc(s, func(c rune) bool { return c == '-' || c == ' ' || c == '.' || c == '/' || c == ',' })
	if len(parts) < 2 || len(parts) > 3 {
		return false
	}
	named := 0
	for _, part := range parts {
		switch {
		case isMonth(part):
			named++
		case !isCount(part, 1, 4):
			return false
		}
	}
	return named == 1
}

// isMonth reports whether word begins like a month and is not much longer.
func isMonth(word string) bool {
	for m, names := range months {
		for _, name := range names {
			if word == name || word == strings.ToLower(monthNames[m]) {
				return true
			}
		}
	}
	return false
}

// isCount reports whether s is a number of least to most digits.
func isCount(s string, least, most int) bool {
	return len(s) >= least && len(s) <= most && strings.Trim(s, "0123456789") == ""
}

// dateWords writes a date of the form 2024-03-02 as 2 March 2024, and leaves
// any other text as it is.
func dateWords(text string) string {
	var year, month, day int
	if n, err := fmt.Sscanf(text, "%4d-%2d-%2d", &year, &month, &day); n < 3 || err != nil || month < 1 || month > 12 {
		return text
	}
	return strconv.Itoa(day) + " " + monthNames[month-1] + " " + strconv.Itoa(year)
}

// cellName names a cell for a notice: Cell C14 of a workbook, else its line
// and column. c counts columns of the table from zero.
func (r *reader) cellName(line, c int) string {
	if r.region != nil {
		return "Cell " + r.region.cellName(line, c)
	}
	return fmt.Sprintf("Line %d, column %d", line, c+1)
}
