package study

import (
	"math"

	"weirmark/core/quantity"
)

// IntervalText prints the interval of the model error at a station: in
// percent of |D| for scalars that are not near zero, else in the unit.
func IntervalText(c *Cell, s Station) string {
	if c.InPercent() {
		d := math.Abs(float64(s.D))
		return quantity.SignedPercent(float64(s.Lo)/d) + " % to " + quantity.SignedPercent(float64(s.Hi)/d) + " %"
	}
	u := float64(s.UVal)
	text := quantity.SignedLike(float64(s.Lo), u, 2) + " to " + quantity.SignedLike(float64(s.Hi), u, 2)
	return text + c.UnitSuffix()
}

// InPercent reports whether differences of the cell are told in percent of
// |D|: of a scalar whose requirement is in percent, or that has none, and
// that is not zero.
func (c *Cell) InPercent() bool {
	if !c.Scalar || len(c.Stations) != 1 || c.Stations[0].D == 0 {
		return false
	}
	if unit, err := quantity.Parse(c.Unit); err == nil && unit.ByConvention() {
		return false // a part of a value in °C means nothing
	}
	return c.Requirement == nil || c.Requirement.Percent.Known()
}

// UnitSuffix is the unit with a space before it, or nothing for pure numbers.
func (c *Cell) UnitSuffix() string { return unitAfter(c.Unit) }

// unitAfter is a unit with a space before it, or nothing for pure numbers.
func unitAfter(unit string) string {
	if unit == "" || unit == "1" {
		return ""
	}
	return " " + unit
}

// ProductUnit is the unit of a product of two quantities, "1" for pure numbers.
func ProductUnit(a, b string) string {
	switch {
	case a == "" || a == "1":
		return b
	case b == "" || b == "1":
		return a
	}
	return a + "·" + b
}
