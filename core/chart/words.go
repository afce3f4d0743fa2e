package chart

import (
	"fmt"
	"math"
	"strconv"
	"strings"
	"unicode"
	"unicode/utf8"

	"weirmark/core/quantity"
	"weirmark/core/study"
)

// longest is the number of characters of a name in a drawing; captions and
// tables write it in full.
const longest = 40

// short returns a name of a user's for a drawing: one line, not too long.
func short(name string) string {
	name = strings.Join(strings.FieldsFunc(name, func(r rune) bool {
		return unicode.IsSpace(r) || unicode.IsControl(r)
	}), " ")
	if utf8.RuneCountInString(name) <= longest {
		return name
	}
	return string([]rune(name)[:longest-1]) + "…"
}

// marked returns a symbol with what follows its first underscore as subscript.
func marked(symbol string) string {
	base, sub, found := strings.Cut(symbol, "_")
	if !found || base == "" || sub == "" {
		return symbol
	}
	return base + "_{" + sub + "}"
}

// textWidth returns about how wide a text is in px, rather more than less: the
// drawing side measures it, here it only parts rows and places what stands
// beside it.
func textWidth(text string) float64 {
	const (
		narrow = "ijlftrI.,:;'|!()[]-/ ·°"
		broad  = "mwMWGOQ%@+=<>~−±×≤≥…"
	)
	width := 0.0
	for _, r := range strings.ReplaceAll(text, "_{", "") {
		switch {
		case strings.ContainsRune(narrow, r):
			width += 0.40
		case strings.ContainsRune(broad, r) || r >= 0x2e80:
			width += 0.90
		case unicode.IsUpper(r):
			width += 0.72
		default:
			width += 0.64
		}
	}
	return textSize * width
}

// dimensionless stands where a unit would.
const dimensionless = "–"

// unitText returns the unit of an axis whose numbers are divided by ten to an exponent.
func unitText(unit string, exponent int) string {
	bare := unit == "" || unit == "1"
	switch {
	case exponent == 0 && bare:
		return dimensionless
	case exponent == 0:
		return unit
	case bare:
		return "10" + superscript(exponent)
	}
	return "10" + superscript(exponent) + " " + unit
}

var superscripts = strings.NewReplacer("-", "⁻", "0", "⁰", "1", "¹", "2", "²", "3", "³", "4", "⁴", "5", "⁵", "6", "⁶", "7", "⁷", "8", "⁸", "9", "⁹")

func superscript(n int) string { return superscripts.Replace(strconv.Itoa(n)) }

// axisName returns "quantity symbol (unit)" for an axis.
func axisName(quantityName, symbol, unit string, exponent int) string {
	parts := make([]string, 0, 3)
	if quantityName != symbol {
		parts = append(parts, short(quantityName))
	}
	if symbol != "" {
		parts = append(parts, marked(short(symbol)))
	}
	return strings.Join(append(parts, "("+unitText(unit, exponent)+")"), " ")
}

// headUnit returns a name with its unit for the head of a table.
func headUnit(name, unit string) string {
	if unit == "" || unit == "1" {
		return name
	}
	return name + " (" + unit + ")"
}

// factor returns a coverage factor as a reader writes it: "2", "1.96".
func factor(k float64) string { return strconv.FormatFloat(quantity.Round(k, 4), 'g', -1, 64) }

// times returns "k u" for a text: "2 u_{val}"; k = 1 is not written.
func times(k float64, u string) string {
	if k == 1 {
		return u
	}
	return factor(k) + " " + u
}

// written returns a value of a file with all its digits.
func written(v quantity.Written) string {
	f := float64(v)
	if math.IsNaN(f) || math.IsInf(f, 0) {
		return "–"
	}
	return strings.ReplaceAll(strconv.FormatFloat(f, 'g', -1, 64), "-", "−")
}

// trimmed returns v with at most n digits and no closing zeros.
func trimmed(v quantity.Number, n int) string {
	text := quantity.Text(float64(v), n)
	if strings.Contains(text, ".") && !strings.Contains(text, "e") {
		text = strings.TrimRight(strings.TrimRight(text, "0"), ".")
	}
	return text
}

// beside returns a computed value with the digits that go with an uncertainty,
// or with five digits where that is not known.
func beside(v, u quantity.Number) string {
	if !v.Known() || !u.Known() || u == 0 {
		return quantity.Text(float64(v), 5)
	}
	return quantity.Like(float64(v), float64(u), 2)
}

// grouped returns a count with a narrow space between groups of three digits.
func grouped(n int) string {
	text := strconv.Itoa(n)
	for i := len(text) - 3; i > 0; i -= 3 {
		text = text[:i] + "\u202f" + text[i:]
	}
	return text
}

// subject returns "pressure coefficient Cp" and the like.
func subject(c study.Cell) string {
	switch {
	case c.Symbol == "" || c.Symbol == c.Quantity:
		return c.Quantity
	case c.Quantity == "":
		return c.Symbol
	}
	return c.Quantity + " " + c.Symbol
}

// simulation returns "model B, grid G4".
func simulation(c study.Cell) string {
	name := "simulation"
	if c.Model != "" {
		name = "model " + c.Model
	}
	if c.Grid != "" {
		name += ", grid " + c.Grid
	}
	return name
}

// reference returns what the data are called, or their kind.
func reference(c study.Cell) string {
	switch {
	case c.Reference != "":
		return c.Reference
	case c.Kind != "":
		return c.Kind
	}
	return "reference"
}

// setting returns "case C1, α = 4.2°".
func setting(c study.Cell) string {
	parts := []string{}
	if c.Case != "" {
		parts = append(parts, "case "+c.Case)
	}
	if c.Condition != "" {
		parts = append(parts, c.Condition)
	}
	return strings.Join(parts, ", ")
}

// units returns the sentence of a caption that names the units.
func units(c study.Cell) string {
	in := func(unit string) string {
		if unit == "" || unit == "1" {
			return "dimensionless"
		}
		return "in " + unit
	}
	switch value, x := in(c.Unit), in(c.XUnit); {
	case c.Scalar || c.XName == "":
		return "Values are " + value + "."
	case value == x:
		return "Values and " + c.XName + " are " + value + "."
	default:
		return "Values are " + value + ", " + c.XName + " is " + x + "."
	}
}

// unlike names the conditions that differ between simulation and data and are
// neither corrected nor counted nor accepted; "" where there is none.
func unlike(c study.Cell) string {
	names := []string{}
	for _, m := range c.Conditions {
		handled := m.Handling == study.Tolerated && m.Why != "" || (m.Handling == study.Corrected || m.Handling == study.AsInput) && m.Effect.Known()
		if m.Simulation == m.Data || handled {
			continue
		}
		unit := ""
		switch {
		case strings.HasPrefix(m.Unit, "°"):
			unit = m.Unit
		case m.Unit != "" && m.Unit != "1":
			unit = " " + m.Unit
		}
		names = append(names, fmt.Sprintf("%s %s against %s%s", m.Name, trimmed(m.Simulation, 6), trimmed(m.Data, 6), unit))
	}
	if len(names) == 0 {
		return ""
	}
	return "Not the same on both sides: " + strings.Join(names, ", ") + "."
}

// capital returns a text with its first letter in upper case.
func capital(text string) string {
	first, size := utf8.DecodeRuneInString(text)
	if size == 0 {
		return text
	}
	return string(unicode.ToUpper(first)) + text[size:]
}
