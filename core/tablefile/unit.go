package tablefile

import (
	"bytes"
	"strings"

	"weirmark/core/quantity"
)

// splitUnit parts a header into name and unit as written:
//
//	x [mm]      brackets behind the name hold a unit, known or not
//	p (Pa)      parentheses hold one if it is known
//	alpha, deg  what follows the last comma and a blank, if it is a known unit
//	x / mm      what follows a stroke between blanks, if known; a guess
//
// Anything else is name alone: x/c, h=sqrt(1/N), C_f,x=0.97.
func splitUnit(header string) (name, unit string, guess bool) {
	if before, inside, ok := enclosed(header, '[', ']'); ok && !isIndex(inside) {
		return strings.TrimSpace(before), inside, false
	}
	if before, inside, ok := enclosed(header, '(', ')'); ok {
		if name := strings.TrimRight(before, " \t"); name != before && knownUnit(inside) {
			stroke, ok := strings.CutSuffix(name, " /")
			return strings.TrimSpace(stroke), inside, ok
		}
		if isPlainName(before) && knownUnit(inside) && !strings.HasPrefix(inside, "1") && inside != "-" {
			return before, inside, len(inside) == 1
		}
	}
	if at := strings.LastIndexByte(header, ','); at > 0 && at+1 < len(header) && header[at+1] == ' ' {
		if unit := strings.TrimSpace(header[at+1:]); knownUnit(unit) {
			return strings.TrimSpace(header[:at]), unit, false
		}
	}
	if at := strings.LastIndex(header, " / "); at > 0 {
		unit := strings.Trim(header[at+3:], " ()")
		if knownUnit(unit) && !dividesAsName(unit) {
			return strings.TrimSpace(header[:at]), unit, true
		}
	}
	return header, "", false
}

// enclosed returns the text before and inside the last pair of brackets,
// which must end the header.
func enclosed(header string, open, shut byte) (before, inside string, ok bool) {
	if len(header) < 3 || header[len(header)-1] != shut {
		return "", "", false
	}
	depth := 0
	for i := len(header) - 1; i > 0; i-- {
		switch header[i] {
		case shut:
			depth++
		case open:
			if depth--; depth == 0 {
				return header[:i], strings.TrimSpace(header[i+1 : len(header)-1]), true
			}
		}
	}
	return "", "", false
}

// isIndex reports whether text is the index of a component, as in U[0].
func isIndex(text string) bool {
	return text == "" || len(text) < 3 && text != "1" && strings.Trim(text, "0123456789") == ""
}

// isPlainName tells a name such as p_wall from a function such as sqrt or log.
func isPlainName(text string) bool {
	switch strings.ToLower(text) {
	case "", "log", "ln", "log10", "lg", "sqrt", "exp", "sin", "cos", "tan", "abs", "max", "min", "mean", "rms", "f":
		return false
	}
	return !strings.ContainsAny(text, "=+*^()[]{} ")
}

// dividesAsName reports whether a symbol behind a stroke is rather the name of
// a quantity than a unit: x / h and y / s divide by a height and a span.
func dividesAsName(unit string) bool {
	switch unit {
	case "h", "s", "L", "l", "g", "C", "N", "W", "J", "K", "1", "-":
		return true
	}
	return false
}

func knownUnit(symbol string) bool {
	if symbol == "" {
		return false
	}
	_, err := quantity.Parse(symbol)
	return err == nil
}

// unitRow returns the units of a line of units: every cell is a unit, in
// brackets or known, blank, 1 or -, and at least one is written out.
func unitRow(cells []string) ([]string, bool) {
	units := make([]string, len(cells))
	written := false
	for i, cell := range cells {
		cell = strings.TrimSpace(cell)
		inside := strings.TrimSpace(strings.Trim(cell, "[]()"))
		bracketed := inside != cell && len(cell) > 1 && bytes.IndexByte([]byte("[("), cell[0]) >= 0
		switch {
		case cell == "":
		case inside == "-" || inside == "1" || inside == "" && bracketed:
			units[i] = inside
			written = written || bracketed
		case bracketed || knownUnit(inside):
			units[i] = inside
			written = true
		default:
			return nil, false
		}
	}
	return units, written
}
