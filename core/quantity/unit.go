package quantity

import (
	"fmt"
	"strings"
)

// Dimension holds the exponents of length, mass, time, temperature and angle.
type Dimension [5]int8

// Unit is a unit of measurement: value in SI = value*Factor + Offset.
type Unit struct {
	Symbol    string
	Dimension Dimension
	Factor    float64
	Offset    float64
	Step      bool // of differences only, such as Δ°C
}

// One is the unit of a pure number.
var One = Unit{Symbol: "1", Factor: 1}

// UnknownError is the refusal of a symbol.
type UnknownError struct{ Symbol string }

func (e *UnknownError) Error() string { return fmt.Sprintf("unknown unit %q", e.Symbol) }

// ToSI returns v, given in u, in SI units.
func (u Unit) ToSI(v float64) float64 { return float64(v*u.Factor) + u.Offset }

// FromSI returns v, given in SI units, in u.
func (u Unit) FromSI(v float64) float64 { return (v - u.Offset) / u.Factor }

// StepToSI returns a difference or an uncertainty, given in u, in SI units:
// a step of 1 °C is a step of 1 K.
func (u Unit) StepToSI(v float64) float64 { return v * u.Factor }

// StepFromSI is the inverse of StepToSI.
func (u Unit) StepFromSI(v float64) float64 { return v / u.Factor }

// Same reports whether both units measure the same dimension.
func (u Unit) Same(v Unit) bool { return u.Dimension == v.Dimension }

// ByConvention reports whether the zero of the unit is a convention, as that of
// °C: parts and ratios of its values mean nothing.
func (u Unit) ByConvention() bool { return u.Offset != 0 }

// StepAgainst reports whether one of the two units is of differences and the
// other of values from a zero of its own: 5 Δ°C and 20 °C have no difference.
func (u Unit) StepAgainst(v Unit) bool {
	return u.Step && v.ByConvention() || v.Step && u.ByConvention()
}

// KinematicOf reports whether u is a pressure divided by a density and v a
// pressure, the pair that needs a density.
func (u Unit) KinematicOf(v Unit) bool {
	return u.Dimension == Dimension{2, 0, -2} && v.Dimension == Dimension{-1, 1, -2}
}

// Parse returns the unit of a symbol such as "mm", "m/s", "kg/m^3", "(m/s)²",
// "J/(kg K)", "°C", "%", "deg". Products are written with a blank, "·", "*" or
// ".", quotients with "/". The empty symbol, "1" and "-" are the pure number.
//
// A product behind a stroke without parentheses ("J/kg K") is refused: it is
// read in two ways. So are temperatures with a zero of their own in a product,
// exponents above 4 in one factor, and symbols longer than 64 bytes.
func Parse(symbol string) (Unit, error) {
	symbol = strings.TrimSpace(symbol)
	text := normal.Replace(symbol)
	if text == "" || text == "-" {
		return One, nil
	}
	if u, ok := find(text); ok {
		u.Symbol = symbol
		return u, nil
	}
	p := parser{text}
	whole, ok := p.product()
	if len(symbol) > longest || !ok || p.rest != "" {
		return Unit{}, &UnknownError{symbol}
	}
	whole.Symbol = symbol
	return whole, nil
}

const (
	longest   = 64   // bytes of a symbol
	steepest  = 12   // exponent of one dimension in a whole unit
	farthest  = 1e60 // factor to SI, and its inverse
	separator = "/* ()"
)

var normal = strings.NewReplacer(
	"²", "^2", "³", "^3", "⁴", "^4", "⁻¹", "^-1", "⁻²", "^-2", "⁻³", "^-3", "⁻⁴", "^-4",
	"**", "^", "·", "*", "⋅", "*", ".", "*", "μ", "µ", "∆", "Δ", "\t", " ", "\u00a0", " ")

// parser holds what is left of a symbol in normal form.
type parser struct{ rest string }

// product reads factors up to the end or a closing parenthesis.
func (p *parser) product() (Unit, bool) {
	whole := One
	power := 1
	for {
		factor, ok := p.factor()
		if !ok {
			return Unit{}, false
		}
		if whole, ok = whole.times(factor, power); !ok {
			return Unit{}, false
		}
		blank := p.skip()
		switch {
		case p.rest == "" || p.rest[0] == ')':
			return whole, true
		case p.rest[0] == '/':
			power = -1
		case power < 0 || p.rest[0] != '*' && !blank:
			return Unit{}, false
		}
		if p.rest[0] == '/' || p.rest[0] == '*' {
			p.rest = p.rest[1:]
			p.skip()
		}
	}
}

// factor reads a symbol with its exponent, or a product in parentheses.
func (p *parser) factor() (Unit, bool) {
	if inside, open := strings.CutPrefix(p.rest, "("); open {
		p.rest = inside
		p.skip()
		u, ok := p.product()
		if !ok || p.rest == "" {
			return Unit{}, false
		}
		_, power, ok := splitPower("u" + p.piece(p.rest[1:]))
		if !ok {
			return Unit{}, false
		}
		return One.times(u, power)
	}
	name, power, ok := splitPower(p.piece(p.rest))
	u, known := find(name)
	if !ok || !known || u.Offset != 0 {
		return Unit{}, false
	}
	return One.times(u, power)
}

// piece returns the text up to the next separator and leaves the rest.
func (p *parser) piece(text string) string {
	end := strings.IndexAny(text, separator)
	if end < 0 {
		end = len(text)
	}
	p.rest = text[end:]
	return text[:end]
}

// skip leaves out blanks and says whether there were some.
func (p *parser) skip() bool {
	rest := strings.TrimLeft(p.rest, " ")
	blank := len(rest) < len(p.rest)
	p.rest = rest
	return blank
}

// times returns the product of u and v to a power, and false where it is
// outside the range that units have.
func (u Unit) times(v Unit, power int) (Unit, bool) {
	for range max(power, -power) {
		if power > 0 {
			u.Factor *= v.Factor
		} else {
			u.Factor /= v.Factor
		}
	}
	for i := range u.Dimension {
		e := int(u.Dimension[i]) + int(v.Dimension[i])*power
		if max(e, -e) > steepest {
			return Unit{}, false
		}
		u.Dimension[i] = int8(e)
	}
	return u, u.Factor > 1/farthest && u.Factor < farthest
}

// splitPower splits "m^2", "m2", "s^-1" and "s-1" into name and exponent.
func splitPower(piece string) (name string, power int, ok bool) {
	name, exponent, marked := strings.Cut(piece, "^")
	if !marked {
		cut := strings.IndexAny(piece, "-0123456789")
		if cut <= 0 {
			return piece, 1, true
		}
		name, exponent = piece[:cut], piece[cut:]
	}
	switch exponent {
	case "1", "2", "3", "4":
		return name, int(exponent[0] - '0'), true
	case "-1", "-2", "-3", "-4":
		return name, -int(exponent[1] - '0'), true
	}
	return "", 0, false
}
