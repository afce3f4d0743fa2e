package study

import (
	"strconv"
	"strings"

	"weirmark/core/quantity"
)

// Kinds of list items that a person can add to a question or to the study.
const (
	ItemCondition   = "condition"   // of a question
	ItemRegion      = "region"      // of a question
	ItemApplication = "application" // of the study
)

// AddItem appends an empty item of a kind.
func (s *Study) AddItem(t Target, at string) error {
	q := s.questionOf(t.ID)
	switch {
	case t.Kind == ItemCondition && q != nil:
		q.Conditions = append(q.Conditions, Matching{})
	case t.Kind == ItemRegion && q != nil:
		q.Regions = append(q.Regions, Region{Name: "region " + strconv.Itoa(len(q.Regions)+1)})
	case t.Kind == ItemApplication:
		s.Application = append(s.Application, Condition{})
	default:
		return refuse("a new "+t.Kind, t.ID)
	}
	s.log(at, "A "+t.Kind+" was added"+ofQuestion(q), "", q != nil && q.Revealed)
	return nil
}

// RemoveItem removes the item that a target's field numbers.
func (s *Study) RemoveItem(t Target, at, why string) error {
	q := s.questionOf(t.ID)
	i, err := strconv.Atoi(t.Field)
	if err != nil || i < 0 {
		return refuse("removal of a "+t.Kind, t.Field)
	}
	switch {
	case t.Kind == ItemCondition && q != nil && i < len(q.Conditions):
		q.Conditions = append(q.Conditions[:i:i], q.Conditions[i+1:]...)
	case t.Kind == ItemRegion && q != nil && i < len(q.Regions):
		q.Regions = append(q.Regions[:i:i], q.Regions[i+1:]...)
	case t.Kind == ItemApplication && i < len(s.Application):
		s.Application = append(s.Application[:i:i], s.Application[i+1:]...)
	default:
		return refuse("removal of a "+t.Kind, t.Field)
	}
	s.log(at, "A "+t.Kind+" was removed"+ofQuestion(q), why, q != nil && q.Revealed)
	return nil
}

func ofQuestion(q *Question) string {
	if q == nil {
		return ""
	}
	return " of " + q.label()
}

// enterItem changes a field of an item.
func (s *Study) enterItem(t Target, value string) (string, error) {
	i, field, ok := sourceField(t.Field)
	q := s.questionOf(t.ID)
	switch {
	case !ok:
	case t.Kind == ItemCondition && q != nil && i < len(q.Conditions):
		return q.Conditions[i].enter(field, value)
	case t.Kind == ItemRegion && q != nil && i < len(q.Regions):
		r := &q.Regions[i]
		switch field {
		case "name":
			return exchange(&r.Name, value)
		case "from":
			return number(&r.From, value, -1e30, 1e30)
		case "to":
			return number(&r.To, value, -1e30, 1e30)
		}
	case t.Kind == ItemApplication && i < len(s.Application):
		c := &s.Application[i]
		switch field {
		case "name":
			return exchange(&c.Name, value)
		case "unit":
			return exchange(&c.Unit, value)
		case "value":
			return number(&c.Value, value, -1e30, 1e30)
		}
	}
	return "", refuse(s.Name(t), value)
}

func exchange(text *string, value string) (string, error) {
	before := *text
	*text = value
	return before, nil
}

func (m *Matching) enter(field, value string) (string, error) {
	switch field {
	case "name":
		return exchange(&m.Name, value)
	case "unit":
		return exchange(&m.Unit, value)
	case "model":
		return exchange(&m.Model, value)
	case "why":
		return exchange(&m.Why, value)
	case "simulation":
		return number(&m.Simulation, value, -1e30, 1e30)
	case "data":
		return number(&m.Data, value, -1e30, 1e30)
	case "sensitivity":
		return optional(&m.Sensitivity, value, -1e30)
	case "handling":
		switch value {
		case "", Corrected, AsInput, Tolerated:
			return exchange(&m.Handling, value)
		}
	}
	return "", refuse(field, value)
}

// cardFields are the reference quantities of a case that are entered by name.
var cardFields = map[string]ReferenceQuantity{
	"density":  {Symbol: Density, Unit: "kg/m^3"},
	"pressure": {Symbol: DynamicPressure, Unit: "Pa"},
	"length":   {Symbol: RefLength, Unit: "m"},
	"angle":    {Symbol: Angle, Unit: "deg"},
}

// CardValue returns what was entered for a field of a case card, as text.
func (s *Study) CardValue(caseName, field string) string {
	for _, c := range s.Cases {
		for _, r := range c.References {
			if c.Name == caseName && r.Symbol == cardFields[field].Symbol {
				return quantity.Typed(r.Value)
			}
		}
	}
	return ""
}

// enterCard sets a reference quantity of a case in the unit of its field; the
// empty value takes it back.
func (s *Study) enterCard(caseName string, r ReferenceQuantity, value string) (string, error) {
	card := s.card(caseName)
	before := ""
	kept := []ReferenceQuantity{}
	for _, have := range card.References {
		if have.Symbol == r.Symbol {
			before = quantity.Typed(have.Value)
			continue
		}
		kept = append(kept, have)
	}
	if strings.TrimSpace(value) != "" {
		lowest := 1e-12
		if r.Symbol == Angle {
			lowest = -360
		}
		if _, err := number(&r.Value, value, lowest, 1e12); err != nil {
			return before, err
		}
		r.Origin = "entered"
		kept = append(kept, r)
	}
	card.References = kept
	return before, nil
}

// card returns the card of a case, made where there is none.
func (s *Study) card(name string) *Card {
	for i := range s.Cases {
		if s.Cases[i].Name == name {
			return &s.Cases[i]
		}
	}
	s.Cases = append(s.Cases, Card{Name: name, References: []ReferenceQuantity{}})
	return &s.Cases[len(s.Cases)-1]
}

// enterScoring changes what measures are asked for.
func (q *Question) enterScoring(path, value string) (string, error) {
	ask := Scoring{}
	if q.Scores != nil {
		ask = *q.Scores
	}
	var before string
	var err error
	switch path {
	case "dispersion":
		before, err = yesNo(&ask.Dispersion, value)
	case "threshold":
		before, err = number(&ask.Threshold, value, 0, 1e30)
	case "fraction":
		before, err = number(&ask.Fraction, value, 0, 10)
	case "allowance":
		before, err = number(&ask.Allowance, value, 0, 1e30)
	default:
		err = refuse("scores."+path, value)
	}
	if err == nil {
		q.Scores = &ask
	}
	return before, err
}
