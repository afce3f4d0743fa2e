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

// KinematicOf reports whether u is a pressure divided by a density and v a
// pressure, the pair that needs a density.
func (u Unit) KinematicOf(v Unit) bool {
	return u.Dimension == Dimension{2, 0, -2} && v.Dimension == Dimension{-1, 1, -2}
}

// Parse returns the unit of a symbol such as "mm", "m/s", "kg/m^3", "m²/s²",
// "°C", "%", "deg". Products are written with a space, "·", "*" or ".",
// quotients with "/". The empty symbol, "1" and "-" are the pure number.
func Parse(symbol string) (Unit, error) {
	text := normal.Replace(strings.TrimSpace(symbol))
	if text == "" || text == "1" || text == "-" {
		return One, nil
	}
	if u, ok := find(text); ok {
		u.Symbol = symbol
		return u, nil
	}
	whole := Unit{Symbol: symbol, Factor: 1}
	sign := int8(1)
	for len(text) > 0 {
		end := strings.IndexAny(text, "/* ")
		piece := text
		if end >= 0 {
			piece = text[:end]
		}
		if piece != "" {
			if err := whole.multiply(piece, sign); err != nil {
				return Unit{}, &UnknownError{symbol}
			}
		}
		if end < 0 {
			break
		}
		if text[end] == '/' {
			sign = -1
		}
		text = text[end+1:]
		if text == "" {
			return Unit{}, &UnknownError{symbol}
		}
	}
	return whole, nil
}

var normal = strings.NewReplacer("²", "^2", "³", "^3", "⁻¹", "^-1", "⁻²", "^-2", "·", "*", "⋅", "*", "**", "^", "μ", "µ", "(", "", ")", "")

func (u *Unit) multiply(piece string, sign int8) error {
	name, power, ok := splitPower(piece)
	if !ok {
		return &UnknownError{piece}
	}
	part, known := find(name)
	if !known || part.Offset != 0 {
		if name == "1" {
			return nil
		}
		return &UnknownError{piece}
	}
	power *= sign
	for range abs(power) {
		if power > 0 {
			u.Factor *= part.Factor
		} else {
			u.Factor /= part.Factor
		}
	}
	for i := range u.Dimension {
		u.Dimension[i] += part.Dimension[i] * power
	}
	return nil
}

// splitPower splits "m^2", "m2", "s^-1" and "s-1" into name and exponent.
func splitPower(piece string) (name string, power int8, ok bool) {
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
		return name, int8(exponent[0] - '0'), true
	case "-1", "-2", "-3", "-4":
		return name, -int8(exponent[1] - '0'), true
	}
	return "", 0, false
}

func abs(n int8) int8 {
	if n < 0 {
		return -n
	}
	return n
}
