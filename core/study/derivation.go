package study

import (
	"slices"
	"strconv"

	"weirmark/core/derived"
)

// Derivation is a scalar to take from curves: the name of a kind of package
// derived and its parameters as they were entered, by their keys.
type Derivation struct {
	Kind       string            `json:"kind"`
	Parameters map[string]string `json:"parameters,omitempty"`

	label string // of another choice, where it is one
}

// askScalar adds a question for a scalar of the curves of a question, with the
// sources of the curves; its slips stand for the same tables.
func (s *Study) askScalar(q *Question) {
	name := q.Quantity + ", scalar"
	for n := 2; s.Question(q.Case, name) != nil; n++ {
		name = q.Quantity + ", scalar " + strconv.Itoa(n)
	}
	for _, p := range append([]Slip{}, s.Slips...) {
		if !q.belongs(&p, Simulation, Reference) {
			continue
		}
		p.ID = s.freeID("s", func(id string) bool { return s.slip(id) != nil })
		p.Quantity = Field{Value: name, By: Entered}
		s.Slips = append(s.Slips, p)
	}
	s.Questions = append(s.Questions, Question{Case: q.Case, Quantity: name, Condition: q.Condition, Sources: append([]Source{}, q.Sources...),
		Kind: q.Kind, Use: q.Use, ReferenceID: q.ReferenceID, Choices: q.Choices, Excluded: append([]Exclusion{}, q.Excluded...), Derive: &Derivation{Kind: derived.Names()[0]}})
}

// enterDerive changes the scalar that a question asks for; without a kind it
// asks for the values as they are.
func (q *Question) enterDerive(key, value string) (string, error) {
	d := Derivation{}
	if q.Derive != nil {
		d = *q.Derive
	}
	if key == "kind" {
		before := d.Kind
		kind, known := derived.Named(value)
		switch {
		case value == "":
			q.Derive = nil
		case !known:
			return before, refuse("the scalar", value)
		default:
			kept := map[string]string{} // what the new kind asks for too
			for _, p := range kind.Parameters {
				if text, given := d.Parameters[p.Key]; given {
					kept[p.Key] = text
				}
			}
			q.Derive = &Derivation{Kind: value, Parameters: kept}
		}
		return before, nil
	}
	kind, known := derived.Named(d.Kind)
	if !known {
		return "", refuse("the scalar", value)
	}
	for _, p := range kind.Parameters {
		if p.Key != key {
			continue
		}
		before := d.Parameters[key]
		if p.Unit == "" && value != "" && !slices.Contains(p.Options, value) {
			return before, refuse(p.Label, value)
		}
		if p.Unit != "" && value != "" {
			if _, err := number(new(float64), value, p.Low, 1e30); err != nil {
				return before, err
			}
		}
		given := map[string]string{}
		for k, v := range d.Parameters {
			given[k] = v
		}
		given[key] = value
		if value == "" {
			delete(given, key)
		}
		q.Derive = &Derivation{Kind: d.Kind, Parameters: given}
		return before, nil
	}
	return "", refuse("the scalar", key)
}
