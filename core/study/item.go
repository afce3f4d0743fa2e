package study

import (
	"slices"
	"strconv"

	"weirmark/core/metric"
)

// Kinds of list items that a person can add to a question or to the study.
const (
	ItemCondition   = "condition"   // of a question
	ItemRegion      = "region"      // of a question
	ItemCriterion   = "criterion"   // of the scores of a question
	ItemAnchor      = "anchor"      // of a question
	ItemApplication = "application" // of the study
	ItemRun         = "run"         // of a question; there is one for each of its runs, named by field, model and grid
	ItemDerived     = "derived"     // a further question: a scalar of the same curves
)

// AddItem appends an empty item of a kind.
func (s *Study) AddItem(t Target, at string) error {
	q := s.questionOf(t.ID)
	switch {
	case t.Kind == ItemCondition && q != nil:
		q.Conditions = append(q.Conditions, Matching{})
	case t.Kind == ItemRegion && q != nil:
		q.Regions = append(q.Regions, Region{Name: "region " + strconv.Itoa(len(q.Regions)+1)})
	case t.Kind == ItemCriterion && q != nil:
		list := q.criteria()
		*list = append(*list, metric.Criterion{Name: "criterion " + strconv.Itoa(len(*list)+1), Score: "FB"})
	case t.Kind == ItemAnchor && q != nil:
		q.Anchors = append(q.Anchors, Anchor{Kind: AtWall})
	case t.Kind == ItemApplication:
		s.Application = append(s.Application, Condition{})
	case t.Kind == ItemDerived && q != nil:
		s.askScalar(q)
	case t.Kind == ItemReference && s.hasCase(t.ID):
		c := s.cardMade(t.ID)
		c.References = append(c.References, ReferenceQuantity{Origin: "entered"})
	case t.Kind == ItemAxes && s.hasCase(t.ID):
		c := s.cardMade(t.ID)
		c.Axes = append(c.Axes, Axes{})
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
	case t.Kind == ItemCriterion && q != nil && i < len(CriteriaOf(q)):
		list := q.criteria()
		*list = append((*list)[:i:i], (*list)[i+1:]...)
	case t.Kind == ItemAnchor && q != nil && i < len(q.Anchors):
		q.Anchors = append(q.Anchors[:i:i], q.Anchors[i+1:]...)
	case t.Kind == ItemApplication && i < len(s.Application):
		s.Application = append(s.Application[:i:i], s.Application[i+1:]...)
	case t.Kind == ItemReference && i < len(s.Card(t.ID).References):
		c := s.cardMade(t.ID)
		c.References = append(c.References[:i:i], c.References[i+1:]...)
	case t.Kind == ItemAxes && i < len(s.Card(t.ID).Axes):
		c := s.cardMade(t.ID)
		c.Axes = append(c.Axes[:i:i], c.Axes[i+1:]...)
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
		case "sign":
			switch value {
			case "", SignPositive, SignNegative:
				return exchange(&r.Sign, value)
			}
		}
	case t.Kind == ItemCriterion && q != nil && i < len(CriteriaOf(q)):
		return enterCriterion(&(*q.criteria())[i], field, value)
	case t.Kind == ItemAnchor && q != nil && i < len(q.Anchors):
		return q.Anchors[i].enter(field, value)
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
	if c := s.card(t.ID); ok && c != nil {
		switch {
		case t.Kind == ItemReference && i < len(c.References):
			return c.References[i].enter(field, value)
		case t.Kind == ItemAxes && i < len(c.Axes):
			return c.Axes[i].enter(field, value)
		}
	}
	return "", refuse(s.Name(t), value)
}

// hasCase reports whether a question is of a case.
func (s *Study) hasCase(name string) bool {
	for i := range s.Questions {
		if s.Questions[i].Case == name {
			return true
		}
	}
	return false
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

// CriteriaOf returns the criteria of the scores of a question: its own, or
// those that the program carries.
func CriteriaOf(q *Question) []metric.Criterion {
	if q.Scores == nil || q.Scores.Criteria == nil {
		return metric.Criteria
	}
	return q.Scores.Criteria
}

// criteria returns the question's own list to change, copied from the one
// the program carries where there was none.
func (q *Question) criteria() *[]metric.Criterion {
	if q.Scores == nil {
		q.Scores = &Scoring{}
	}
	if q.Scores.Criteria == nil {
		q.Scores.Criteria = append([]metric.Criterion{}, metric.Criteria...)
	}
	return &q.Scores.Criteria
}

func enterCriterion(c *metric.Criterion, field, value string) (string, error) {
	switch field {
	case "name":
		return exchange(&c.Name, value)
	case "scope":
		return exchange(&c.Scope, value)
	case "source":
		return exchange(&c.Source, value)
	case "score":
		if slices.Contains(metric.ScoreKeys, value) {
			return exchange(&c.Score, value)
		}
	case "low":
		return number(&c.Low, value, -1e30, 1e30)
	case "high":
		return number(&c.High, value, -1e30, 1e30)
	case "fraction":
		return number(&c.Fraction, value, 0, 10)
	}
	return "", refuse(field, value)
}

// enterScoring changes what measures are asked for.
func (q *Question) enterScoring(path, value string) (string, error) {
	ask := Scoring{}
	if q.Scores != nil {
		ask = *q.Scores
	}
	before, err := ask.enter(path, value)
	if err == nil {
		q.Scores = &ask
	}
	return before, err
}

func (a *Scoring) enter(path, value string) (string, error) {
	switch path {
	case "dispersion":
		return yesNo(&a.Dispersion, value)
	case "correlation":
		return yesNo(&a.Correlation, value)
	case "marine":
		return yesNo(&a.Marine, value)
	case "distribution":
		return yesNo(&a.Distribution, value)
	case "percent":
		return yesNo(&a.Percent, value)
	case "percent_above":
		return number(&a.PercentAbove, value, 0, 100)
	case "threshold":
		return number(&a.Threshold, value, 0, 1e30)
	case "fraction":
		return number(&a.Fraction, value, 0, 10)
	case "allowance":
		return number(&a.Allowance, value, 0, 1e30)
	case "allowance_k":
		return number(&a.AllowanceK, value, 0, 10)
	case "weights":
		return exchange(&a.Weights, value)
	case "scale_value":
		return number(&a.ScaleValue, value, 0, 1e30)
	case "scale":
		switch value {
		case "", ScaleRange, ScaleMean, ScaleSpeed, ScalePressure, ScaleEntered:
			return exchange(&a.Scale, value)
		}
	}
	return "", refuse("scores."+path, value)
}
