package study

import (
	"strings"

	"weirmark/core/quantity"
	"weirmark/core/uncertainty"
)

// enterSource changes a number, switch or choice of a source.
func (q *Question) enterSource(path, value string) (string, error) {
	i, field, ok := sourceField(path)
	if !ok || i >= len(q.Sources) {
		return "", refuse(path, value)
	}
	s := &q.Sources[i]
	switch field {
	case "value":
		return s.enterValue(value)
	case "upper":
		return optional(&s.Upper, value, 0)
	case "sensitivity":
		return optional(&s.Sensitivity, value, -1e30)
	case "data_sensitivity":
		return optional(&s.DataSensitivity, value, -1e30)
	case "nominal":
		return number(&s.Nominal, value, -1e30, 1e30)
	case "per_count":
		return number(&s.PerCount, value, 0, 1e30)
	case "basis":
		return oneOf(&s.Basis, value, Absolute, OfReading, OfFullScale, OfCounts, OfPosition)
	case "form":
		return oneOf(&s.Form, value, "", string(uncertainty.Normal), string(uncertainty.Rectangular), string(uncertainty.Triangular), string(uncertainty.ArcSine), string(uncertainty.Student), Interval)
	case "type":
		return oneOf(&s.Type, value, "", TypeA, TypeB)
	case "pattern":
		return oneOf(&s.Pattern, value, Independent, Common, Grouped, Length)
	case "full_scale":
		return number(&s.FullScale, value, 0, 1e30)
	case "length":
		return number(&s.Length, value, 0, 1e30)
	case "degrees":
		return number(&s.Degrees, value, 0, 1e9)
	case "of":
		return oneOf(&s.Of, value, OfData, OfInput, OfNumerical)
	case "random":
		return yesNo(&s.Random, value)
	case "of_scalar":
		return yesNo(&s.OfScalar, value)
	case "shared":
		return yesNo(&s.Shared, value)
	}
	return "", refuse(field, value)
}

// enterValue takes a number, or "unknown".
func (s *Source) enterValue(value string) (string, error) {
	before := s.ValueText()
	if strings.EqualFold(strings.TrimSpace(value), "unknown") {
		s.Unknown = true
		return before, nil
	}
	_, err := number(&s.Value, value, 0, 1e30)
	if err == nil {
		s.Unknown = false
	}
	return before, err
}

// ValueText is the value as it is entered.
func (s *Source) ValueText() string {
	if s.Unknown {
		return "unknown"
	}
	return quantity.Typed(s.Value)
}

// oneOf takes one of the allowed words.
func oneOf(into *string, value string, allowed ...string) (string, error) {
	for _, a := range allowed {
		if value == a {
			return exchange(into, value)
		}
	}
	return "", refuse("one of "+strings.Join(allowed, ", "), value)
}

// OptionalText is an optional number as it is entered.
func OptionalText(v *float64) string {
	if v == nil {
		return ""
	}
	return quantity.Typed(*v)
}

// optional keeps "not known", the empty text, apart from zero.
func optional(into **float64, value string, lo float64) (string, error) {
	before := OptionalText(*into)
	if strings.TrimSpace(value) == "" {
		*into = nil
		return before, nil
	}
	v := 0.0
	if _, err := number(&v, value, lo, 1e30); err != nil {
		return before, err
	}
	*into = &v
	return before, nil
}
