package quantity

import (
	"math"
	"strconv"
	"strings"
)

// Number is a computed value. It is written to JSON with ten significant
// digits, so that hosts whose last bits differ write the same bytes; a value
// that is not finite is written as null.
type Number float64

// None is the Number that is absent.
var None = Number(math.NaN())

// Known reports whether the value is there and finite.
func (n Number) Known() bool { return !math.IsNaN(float64(n)) && !math.IsInf(float64(n), 0) }

// MarshalJSON writes ten significant digits, or null.
func (n Number) MarshalJSON() ([]byte, error) {
	return appendDigits(make([]byte, 0, 24), float64(n), 10), nil
}

// UnmarshalJSON reads a number or null.
func (n *Number) UnmarshalJSON(text []byte) error {
	if string(text) == "null" {
		*n = None
		return nil
	}
	v, err := strconv.ParseFloat(string(text), 64)
	*n = Number(v)
	return err
}

// Written is a value as a file states it: written to JSON with all its digits.
type Written float64

// MarshalJSON writes the shortest text that reads back to the same value.
func (w Written) MarshalJSON() ([]byte, error) {
	v := float64(w)
	if math.IsNaN(v) || math.IsInf(v, 0) {
		return []byte("null"), nil
	}
	return strconv.AppendFloat(make([]byte, 0, 24), v, 'g', -1, 64), nil
}

// UnmarshalJSON reads a number or null.
func (w *Written) UnmarshalJSON(text []byte) error { return (*Number)(w).UnmarshalJSON(text) }

// Round returns v rounded to n significant digits.
func Round(v float64, n int) float64 {
	if v == 0 || math.IsNaN(v) || math.IsInf(v, 0) {
		return v
	}
	var space [32]byte
	r, _ := strconv.ParseFloat(string(strconv.AppendFloat(space[:0], v, 'e', n-1, 64)), 64)
	return r
}

// appendDigits writes v with at most n significant digits and no trailing
// zeros, as JSON allows it.
func appendDigits(b []byte, v float64, n int) []byte {
	switch {
	case math.IsNaN(v) || math.IsInf(v, 0):
		return append(b, "null"...)
	case v == 0:
		return append(b, '0')
	}
	return strconv.AppendFloat(b, Round(v, n), 'g', -1, 64)
}

// Text returns v for a reader: n significant digits and never fewer than the
// whole part has, a typographic minus, no exponent between 1e-5 and 1e7, "–"
// where there is no value. Like every text of a value here it is made from the
// ten digits of Number, so that a tie is decided alike on every host.
func Text(v float64, n int) string {
	if math.IsNaN(v) || math.IsInf(v, 0) {
		return "–"
	}
	return plain(v, n, false)
}

// Plain returns v with at most n significant digits and no trailing zeros: the
// way a place is named.
func Plain(v float64, n int) string {
	text := Text(v, n)
	if strings.ContainsAny(text, "e–") || !strings.Contains(text, ".") {
		return text
	}
	return strings.TrimRight(strings.TrimRight(text, "0"), ".")
}

// Typed prints a number as a person typed it: the shortest text that reads
// back to the same value.
func Typed(v float64) string { return strconv.FormatFloat(v, 'g', -1, 64) }

// Counted says a number of things: "1 row", "3 rows".
func Counted(n int, noun string) string {
	if n == 1 {
		return "1 " + noun
	}
	return strconv.Itoa(n) + " " + noun + "s"
}

// Signed is Text with a plus sign on positive values.
func Signed(v float64, n int) string {
	if math.IsNaN(v) || math.IsInf(v, 0) {
		return "–"
	}
	return plain(v, n, v > 0)
}

// Like returns v with as many decimals as u needs for n significant digits:
// the way a value is printed beside its uncertainty.
func Like(v, u float64, n int) string {
	return fixed(v, decimals(u, n), false)
}

// SignedLike is Like with a plus sign on positive values.
func SignedLike(v, u float64, n int) string {
	return fixed(v, decimals(u, n), true)
}

// Percent returns v, a fraction, in percent with one decimal, or two
// significant digits where that is finer, but no more than four decimals.
func Percent(v float64) string { return percent(v, false) }

// SignedPercent is Percent with a plus sign on positive values.
func SignedPercent(v float64) string { return percent(v, true) }

func percent(v float64, plus bool) string {
	v = Round(v*100, 10)
	d := 1
	if a := math.Abs(v); a > 0 && a < 1 {
		d = min(decimals(a, 2), 4)
	}
	return fixed(v, d, plus)
}

func decimals(u float64, n int) int {
	if u == 0 || math.IsNaN(u) || math.IsInf(u, 0) {
		return n
	}
	e := exponent(Round(math.Abs(u), 10), n)
	return min(max(n-1-e, 0), 12)
}

// exponent returns the decimal exponent of v once rounded to n digits.
func exponent(v float64, n int) int {
	var space [32]byte
	s := strconv.AppendFloat(space[:0], v, 'e', n-1, 64)
	for i, c := range s {
		if c == 'e' {
			e, _ := strconv.Atoi(string(s[i+1:]))
			return e
		}
	}
	return 0
}

func plain(v float64, n int, plus bool) string {
	if v == 0 {
		return "0"
	}
	v = Round(v, 10)
	e := exponent(math.Abs(v), n)
	if e < -5 || e > 6 {
		mantissa := strconv.FormatFloat(v, 'e', n-1, 64)
		m, x, _ := strings.Cut(mantissa, "e")
		x = strings.TrimPrefix(x, "+")
		negative := strings.HasPrefix(x, "-")
		x = strings.TrimLeft(strings.TrimPrefix(x, "-"), "0")
		if negative {
			x = "-" + x
		}
		return sign(m+"e"+x, plus)
	}
	return sign(strconv.FormatFloat(v, 'f', max(n-1-e, 0), 64), plus)
}

func fixed(v float64, d int, plus bool) string {
	if math.IsNaN(v) || math.IsInf(v, 0) {
		return "–"
	}
	text := strconv.FormatFloat(Round(v, 10), 'f', d, 64)
	if strings.Trim(text, "-0.") == "" {
		text = strings.TrimPrefix(text, "-")
		plus = false
	}
	return sign(text, plus && v > 0)
}

func sign(text string, plus bool) string {
	text = strings.ReplaceAll(text, "-", "−")
	if plus {
		return "+" + text
	}
	return text
}
