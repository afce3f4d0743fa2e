package tablefile

import (
	"bytes"
	"math"
	"strconv"
	"strings"
)

// cellKind says what a cell holds.
type cellKind uint8

const (
	cellNumber   cellKind = iota
	cellMissing           // blank, or a mark such as nan
	cellOverflow          // a number outside the range of doubles
	cellText
)

// cellForm says how a number departs from plain writing.
type cellForm uint8

const (
	formFortran   cellForm = 1 << iota // 1.0D-03, 3.14-114
	formSign                           // typographic minus, no-break space
	formComma                          // decimal comma
	formThousands                      // grouped digits, decimal sign evident
	formPoint                          // a decimal point, told only by readCell
)

// cellReader reads cells as a person stated that they are written; its zero
// value reads them as they come.
type cellReader struct {
	decimal decimalSign
	missing map[string]bool // marks of missing values beside the usual ones
}

// readCell says what a cell holds. The value is NaN unless it is a number.
func readCell(text []byte) (float64, cellKind, cellForm) {
	return cellReader{}.read(text)
}

// read is readCell with what was stated about the file.
func (r cellReader) read(text []byte) (float64, cellKind, cellForm) {
	if len(r.missing) > 0 && r.missing[string(text)] {
		return math.NaN(), cellMissing, 0
	}
	if value, end := scanNumber(text, 0); end == len(text) && end > 0 {
		switch point := bytes.IndexByte(text, '.') >= 0; {
		case !point:
			return value, cellNumber, 0
		case r.decimal != decimalComma:
			return value, cellNumber, formPoint
		}
	}
	if len(text) > 64 {
		return math.NaN(), cellText, 0
	}
	var buffer [64]byte
	plain, form := normalise(buffer[:0], text)
	if kind, ok := markKind(plain); ok {
		return math.NaN(), kind, 0
	}
	plain, separators, ok := decimal(plain, r.decimal)
	if !ok {
		return math.NaN(), cellText, 0
	}
	plain, fortran, ok := exponentForm(plain)
	if !ok {
		return math.NaN(), cellText, 0
	}
	value, err := strconv.ParseFloat(string(plain), 64)
	if err != nil {
		return math.NaN(), cellOverflow, 0
	}
	return value, cellNumber, form | separators | fortran
}

// normalise appends text to plain with typographic minus signs and no-break
// spaces replaced: at the ends they are dropped, between digits they group.
func normalise(plain, text []byte) ([]byte, cellForm) {
	var form cellForm
	text = bytes.Trim(text, " \t\v\f\r\n")
	trimmed := bytes.TrimSpace(text)
	if len(trimmed) != len(text) {
		form = formSign
	}
	for i := 0; i < len(trimmed); i++ {
		rest := trimmed[i:]
		switch {
		case trimmed[i] < 0x80:
			plain = append(plain, trimmed[i])
		case bytes.HasPrefix(rest, []byte("\u2212")), bytes.HasPrefix(rest, []byte("\u2013")):
			plain = append(plain, '-')
			form = formSign
			i += 2
		case bytes.HasPrefix(rest, []byte("\u00a0")) && groupsDigits(trimmed, i, i+2):
			form = formSign
			i++
		case (bytes.HasPrefix(rest, []byte("\u202f")) || bytes.HasPrefix(rest, []byte("\u2009"))) && groupsDigits(trimmed, i, i+3):
			form = formSign
			i += 2
		default:
			plain = append(plain, trimmed[i])
		}
	}
	return plain, form
}

// groupsDigits reports whether text[from:to] stands before exactly three
// digits and behind one.
func groupsDigits(text []byte, from, to int) bool {
	if from == 0 || !isDigit(text[from-1]) || to+3 > len(text) {
		return false
	}
	for _, c := range text[to : to+3] {
		if !isDigit(c) {
			return false
		}
	}
	return to+3 == len(text) || !isDigit(text[to+3])
}

func isDigit(c byte) bool { return c-'0' <= 9 }

// markKind tells marks of a missing value and of infinity from other text.
func markKind(text []byte) (cellKind, bool) {
	if len(text) == 0 || len(bytes.Trim(text, "*")) == 0 {
		return cellMissing, true
	}
	if len(text) > 16 || isDigit(text[0]) && !bytes.Contains(text, []byte("#")) {
		return 0, false
	}
	switch strings.ToLower(strings.TrimLeft(string(text), "+-")) {
	case "", "nan", "n.a.", "n.a", "na", "n/a", "null", "none", "nil", ".", "?", "\u2014",
		"#n/a", "#na", "#div/0!", "#value!", "#num!", "#ref!", "#name?", "#null!",
		"nan(ind)", "nan(snan)", "1.#ind", "1.#qnan", "1.#snan":
		return cellMissing, true
	case "inf", "infinity", "1.#inf":
		return cellOverflow, true
	}
	return 0, false
}

// decimal brings a number with a decimal comma or with grouped digits into
// plain writing, in place. It fails where the marks form no number, or none
// with the stated decimal sign.
func decimal(text []byte, stated decimalSign) ([]byte, cellForm, bool) {
	commas, points := bytes.Count(text, []byte(",")), bytes.Count(text, []byte("."))
	switch {
	case stated == decimalPoint && commas == 1 && points == 0:
		text, ok := ungroup(text, ',')
		return text, formThousands, ok
	case stated == decimalComma && points > 0 && commas == 0:
		text, ok := ungroup(text, '.')
		return text, formThousands, ok
	case stated == decimalComma && commas > 1,
		stated == decimalComma && commas == 1 && bytes.IndexByte(text, ',') < bytes.LastIndexByte(text, '.'),
		stated == decimalPoint && points > 0 && bytes.IndexByte(text, '.') < bytes.LastIndexByte(text, ','):
		return text, 0, false
	case commas == 0 && points == 0:
		return text, 0, true
	case commas == 0 && points == 1:
		return text, formPoint, true
	case commas == 1 && points == 0:
		at := bytes.IndexByte(text, ',')
		text[at] = '.'
		return text, formComma, at+1 < len(text) && isDigit(text[at+1])
	case points == 1 && commas >= 1 && bytes.IndexByte(text, '.') > bytes.LastIndexByte(text, ','):
		text, ok := ungroup(text, ',')
		return text, formThousands | formPoint, ok
	case points == 0:
		text, ok := ungroup(text, ',')
		return text, formThousands, ok
	case commas == 1 && bytes.IndexByte(text, ',') > bytes.LastIndexByte(text, '.'):
		text, ok := ungroup(text, '.')
		if ok {
			text[bytes.IndexByte(text, ',')] = '.'
		}
		return text, formThousands | formComma, ok
	}
	return text, 0, false
}

// ungroup removes mark, in place, where every mark parts a group of three and
// the first group does not begin with zero, as no grouped number does.
func ungroup(text []byte, mark byte) ([]byte, bool) {
	leading := bytes.TrimLeft(text[:bytes.IndexByte(text, mark)], "+-")
	if len(leading) > 3 || len(leading) > 0 && leading[0] == '0' {
		return text, false
	}
	for i, c := range text {
		if c == mark && !groupsDigits(text, i, i+1) {
			return text, false
		}
	}
	kept := text[:0]
	for _, c := range text {
		if c != mark {
			kept = append(kept, c)
		}
	}
	return kept, true
}

// exponentForm checks that text is a decimal number and brings a Fortran
// exponent (D, or three digits without a letter) to the form with e.
func exponentForm(text []byte) ([]byte, cellForm, bool) {
	i := 0
	if i < len(text) && (text[i] == '-' || text[i] == '+') {
		i++
	}
	digits, point := 0, false
	for ; i < len(text) && (isDigit(text[i]) || text[i] == '.' && !point); i++ {
		if text[i] == '.' {
			point = true
		} else {
			digits++
		}
	}
	if digits == 0 {
		return nil, 0, false
	}
	if i == len(text) {
		return text, 0, true
	}
	var form cellForm
	switch c := text[i]; {
	case c|0x20 == 'e':
	case c|0x20 == 'd':
		text[i], form = 'e', formFortran
	case (c == '-' || c == '+') && point && len(text) == i+4:
		text = append(text[:i+1], text[i:]...)
		text[i], form = 'e', formFortran
	default:
		return nil, 0, false
	}
	_, end := scanExponent(text, i+1)
	return text, form, end == len(text)
}
