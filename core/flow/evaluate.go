package flow

import (
	"fmt"
	"math"
	"slices"

	"weirmark/core/notice"
	"weirmark/core/quantity"
)

// UnknownError says that no law has the ID.
type UnknownError struct{ ID string }

func (e *UnknownError) Error() string { return fmt.Sprintf("unknown law %q", e.ID) }

// ParameterError refuses a parameter: missing, not known to the law, not
// finite, or outside the domain.
type ParameterError struct {
	Law, Name string
	Value     float64 // NaN where it was not given
	Reason    string
}

func (e *ParameterError) Error() string {
	if math.IsNaN(e.Value) {
		return fmt.Sprintf("law %s: parameter %q %s", e.Law, e.Name, e.Reason)
	}
	return fmt.Sprintf("law %s: parameter %q = %g %s", e.Law, e.Name, e.Value, e.Reason)
}

// Evaluate returns the values of the law at the stations, both in the units
// of their symbols. A station that is not finite, or outside the domain, has
// no value. Parameters that are not given take their default, and a notice
// says so. A parameter that is missing, unknown or outside its domain is
// refused: the curve is empty and the error is a *ParameterError.
func (l Law) Evaluate(parameters map[string]float64, stations []float64) (Curve, error) {
	p, notices, beyond, err := l.take(parameters)
	if err != nil {
		return Curve{}, err
	}
	domain, stated := l.Station.Domain, l.Station.Stated
	if l.domain != nil {
		domain = l.domain(p)
	}
	if l.stated != nil {
		stated = l.stated(p)
	}
	c := Curve{Values: make([]float64, len(stations)), Flagged: make([]bool, len(stations)), Notices: notices}
	outside, flagged := 0, 0
	for i, x := range stations {
		if math.IsNaN(x) || math.IsInf(x, 0) || !domain.Holds(x) {
			c.Values[i] = math.NaN()
			outside++
			continue
		}
		c.Values[i] = l.at(p, x)
		if math.IsNaN(c.Values[i]) || math.IsInf(c.Values[i], 0) {
			// Finite arguments whose result no double can hold.
			c.Values[i] = math.NaN()
			outside++
			continue
		}
		if !stated.Holds(x) {
			flagged++
		}
		c.Flagged[i] = beyond || !stated.Holds(x)
	}
	if outside > 0 {
		c.Notices = append(c.Notices, notice.New("law-outside", outside, len(stations), l.ID, l.Station.Name, domain.String()))
	}
	if flagged > 0 {
		c.Notices = append(c.Notices, notice.New("law-beyond", flagged, len(stations), l.ID, l.Station.Name, stated.String(), stated.Source))
	}
	return c, nil
}

// take puts the parameters in their order and checks them. beyond says that a
// parameter or a condition lies outside its stated range.
func (l Law) take(given map[string]float64) (p []float64, notices []notice.Notice, beyond bool, err error) {
	if err := l.known(given); err != nil {
		return nil, nil, false, err
	}
	for _, s := range l.Parameters {
		v, ok := given[s.Name]
		switch {
		case !ok && s.Optional:
			notices = append(notices, notice.New("law-unchecked", s.Name, l.ID, s.Meaning))
			p = append(p, math.NaN())
			continue
		case !ok && s.Default == nil:
			return nil, nil, false, &ParameterError{l.ID, s.Name, math.NaN(), "is missing"}
		case !ok:
			v = *s.Default
			notices = append(notices, notice.New("law-default", s.Name, l.ID, digits(v), unitBehind(s.Unit)))
		case math.IsNaN(v) || math.IsInf(v, 0):
			return nil, nil, false, &ParameterError{l.ID, s.Name, v, "is not finite"}
		case !s.Domain.Holds(v):
			return nil, nil, false, &ParameterError{l.ID, s.Name, v, "is outside " + s.Domain.String()}
		}
		if !s.Stated.Holds(v) {
			beyond = true
			notices = append(notices, notice.New("law-condition", s.Name, digits(v), l.ID, s.Stated.String(), s.Stated.Source))
		}
		p = append(p, v)
	}
	for _, c := range l.Conditions {
		if v := c.value(p); !c.Stated.Holds(v) {
			beyond = true
			notices = append(notices, notice.New("law-condition", c.Name+" = "+c.Formula, digits(v), l.ID, c.Stated.String(), c.Stated.Source))
		}
	}
	return p, notices, beyond, nil
}

// known refuses a parameter that the law does not have, the first by name.
func (l Law) known(given map[string]float64) error {
	var strange []string
	for name := range given {
		if !slices.ContainsFunc(l.Parameters, func(s Symbol) bool { return s.Name == name }) {
			strange = append(strange, name)
		}
	}
	if len(strange) == 0 {
		return nil
	}
	slices.Sort(strange)
	return &ParameterError{l.ID, strange[0], math.NaN(), "is not one of this law"}
}

func digits(v float64) string { return fmt.Sprintf("%g", quantity.Round(v, 6)) }

// unitBehind returns " m" for "m", and nothing for a pure number.
func unitBehind(unit string) string {
	if unit == "1" {
		return ""
	}
	return " " + unit
}
