package memo

import (
	"math"
	"strconv"
	"strings"

	"weirmark/core/quantity"
)

// count returns a whole number of the report.
func count(n int, field string) Node {
	digits := strconv.Itoa(n)
	return Node{Kind: Number, Text: grouped(digits), Value: digits, Field: field}
}

// hundredths returns a statistic with two decimals.
func hundredths(v quantity.Number, field string) Node {
	return number(v, quantity.Like(float64(v), 0.01, 1), field)
}

// trimmed returns v with at most n digits and no zeros at the end.
func trimmed(v quantity.Number, n int, field string) Node {
	shown := quantity.Text(float64(v), n)
	if strings.Contains(shown, ".") && !strings.Contains(shown, "e") {
		shown = strings.TrimRight(strings.TrimRight(shown, "0"), ".")
	}
	return number(v, shown, field)
}

// places returns the number of decimals that serves all of a column of
// abscissae: as many as the values need, of six digits at most.
func places(values []float64) int {
	most, top := 0, 0.0
	for _, v := range values {
		top = max(top, math.Abs(v))
		_, decimals, _ := strings.Cut(strconv.FormatFloat(quantity.Round(v, 6), 'f', -1, 64), ".")
		most = max(most, len(decimals))
	}
	for most > 0 && top*math.Pow10(most) >= 1e6 {
		most--
	}
	return min(most, 9)
}

// atPlaces returns v with the given number of decimals, or with four digits
// where those would leave nothing of it.
func atPlaces(v float64, decimals int) string {
	if v != 0 && math.Abs(v) < math.Pow10(-decimals) {
		return quantity.Text(v, 4)
	}
	return quantity.Like(v, math.Pow10(-decimals), 1)
}

// cellCount returns a number of grid cells: whole, in groups of three digits.
func cellCount(v quantity.Number, field string) Node {
	if v.Known() && float64(v) == math.Trunc(float64(v)) && math.Abs(float64(v)) < 1e10 {
		return number(v, grouped(strconv.FormatFloat(float64(v), 'f', 0, 64)), field)
	}
	return number(v, quantity.Text(float64(v), 4), field)
}

// grouped sets narrow no-break spaces between groups of three digits.
func grouped(digits string) string {
	if len(digits) < 5 {
		return digits
	}
	groups := ""
	for len(digits) > 3 {
		groups = "\u202f" + digits[len(digits)-3:] + groups
		digits = digits[:len(digits)-3]
	}
	return digits + groups
}

// digits returns v with n significant digits.
func digits(v quantity.Number, n int, field string) Node {
	return number(v, quantity.Text(float64(v), n), field)
}

// percent returns v, a fraction, in percent; the sign stands inside the number
// and says that the value is a fraction.
func percent(v quantity.Number, field string) Node {
	return number(v, quantity.Percent(float64(v))+"\u202f%", field)
}

// signedPercent is percent with a plus sign on positive values.
func signedPercent(v quantity.Number, field string) Node {
	return number(v, quantity.SignedPercent(float64(v))+"\u202f%", field)
}

// signed returns v with n significant digits and its sign.
func signed(v quantity.Number, n int, field string) Node {
	return number(v, quantity.Signed(float64(v), n), field)
}

// beside returns v with the decimals that u needs for two digits, the way a
// value is printed beside its uncertainty; five digits where u is not known.
func beside(v, u quantity.Number, field string) Node {
	return number(v, textBeside(float64(v), float64(u), false), field)
}

// signedBeside is beside with a plus sign on positive values.
func signedBeside(v, u quantity.Number, field string) Node {
	return number(v, textBeside(float64(v), float64(u), true), field)
}

// writtenBeside is beside for a value as a file states it.
func writtenBeside(v quantity.Written, u quantity.Number, field string) Node {
	return written(v, textBeside(float64(v), float64(u), false), field)
}

func textBeside(v, u float64, plus bool) string {
	known := u > 0 && !math.IsInf(u, 0)
	switch {
	case known && plus:
		return quantity.SignedLike(v, u, 2)
	case known:
		return quantity.Like(v, u, 2)
	case plus:
		return quantity.Signed(v, 4)
	}
	return quantity.Text(v, 5)
}

// asWritten returns an entered value with all its digits.
func asWritten(v float64, field string) Node {
	w := quantity.Written(v)
	full, _ := w.MarshalJSON()
	shown := string(full)
	if v < 0 {
		shown = "−" + shown[1:]
	}
	return written(w, shown, field)
}

// spread returns the indices of at most limit rows of n, evenly spaced, the
// first and the last among them.
func spread(n, limit int) []int {
	if n <= limit {
		limit = n
	}
	rows := make([]int, limit)
	for i := range rows {
		rows[i] = i
		if n > limit {
			rows[i] = i * (n - 1) / (limit - 1)
		}
	}
	return rows
}
