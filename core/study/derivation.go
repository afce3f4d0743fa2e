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
// sources of the curves; its slips stand for the same tables. Where the curves
// were compared before the eyes of a person, so was what the scalar is of.
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
		Kind: q.Kind, Use: q.Use, Known: q.Known, ReferenceID: q.ReferenceID, Choices: q.Choices, Form: q.Form, XForm: q.XForm, Corrected: q.Corrected, Revealed: q.Revealed, RevealedIn: q.RevealedIn, Excluded: append([]Exclusion{}, q.Excluded...), Derive: &Derivation{Kind: derived.Names()[0]}})
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

// otherChoices lists the values under the other choices of the kind.
func (w *work) otherChoices(t *taking, reference, simulation *derived.Curve) {
	for _, o := range t.kind.Others {
		other := *t
		other.settings = derived.Settings{Words: map[string]string{}, Numbers: map[string]float64{}}
		same := true
		for k, v := range t.settings.Words {
			other.settings.Words[k] = v
		}
		for k, v := range t.settings.Numbers {
			other.settings.Numbers[k] = v
		}
		for _, p := range t.kind.Parameters {
			text, given := o.Set[p.Key]
			if !given {
				continue
			}
			if p.Unit == "" {
				same = same && t.settings.Words[p.Key] == text
				other.settings.Words[p.Key] = text
				continue
			}
			v := 0.0
			if _, err := number(&v, text, -1e30, 1e30); err == nil {
				v, _ = t.toSI(p.Unit, v)
				same = same && t.settings.Numbers[p.Key] == v
				other.settings.Numbers[p.Key] = v
			}
		}
		if same {
			continue
		}
		s, errS := other.take(*simulation)
		d, errD := other.take(*reference)
		line := DerivedOther{Change: o.Label, Simulation: None, Reference: None, E: None}
		if errS == nil {
			line.Simulation = t.value(s.Value)
		}
		if errD == nil {
			line.Reference = t.value(d.Value)
		}
		if errS == nil && errD == nil {
			line.E = t.step(s.Value - d.Value)
		}
		w.cell.Derived.Others = append(w.cell.Derived.Others, line)
	}
}

// otherDerivations lists the choices of a derived scalar that another careful
// person might have made.
func otherDerivations(d *Derivation) []Derivation {
	if d == nil {
		return nil
	}
	kind, known := derived.Named(d.Kind)
	if !known {
		return nil
	}
	var list []Derivation
	for _, o := range kind.Others {
		other := Derivation{Kind: d.Kind, Parameters: map[string]string{}, label: o.Label}
		for k, v := range d.Parameters {
			other.Parameters[k] = v
		}
		for k, v := range o.Set {
			other.Parameters[k] = v
		}
		list = append(list, other)
	}
	return list
}
