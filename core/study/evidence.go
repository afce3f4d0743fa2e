package study

import (
	"weirmark/core/adequacy"
)

func enterWeight(into *string, value string) (string, error) {
	switch value {
	case "", Low, Medium, High:
		return exchange(into, value)
	}
	return *into, refuse("low, medium or high", value)
}

// weight returns the heavier of influence and consequence, 0 where neither is
// stated.
func (c Context) weight() int {
	of := map[string]int{Low: 1, Medium: 2, High: 3}
	return max(of[c.Influence], of[c.Consequence])
}

// evidence lists what the recorded use of the result lets a reader expect
// (common practice, no source), and whether the study has it. What is missing
// is said; no score is made of it.
func (w *work) evidence() {
	weight := w.e.study.Context.weight()
	c := &w.cell
	expect := func(from int, what string, given bool) {
		if weight >= from {
			c.Evidence = append(c.Evidence, EvidenceLine{What: what, From: []string{Low, Medium, High}[from-1], Given: given})
		}
	}
	r, a := c.Requirement, c.Application
	expect(1, "an uncertainty of the data", w.uD != nil)
	expect(1, "a numerical uncertainty", w.has(OfNumerical))
	expect(1, "an accuracy requirement and who set it", r != nil && r.Who != "")
	expect(2, "a requirement recorded before results were seen", r != nil && !r.Late)
	expect(2, "an input uncertainty", w.has(OfInput))
	expect(2, "a study over three or more grids", c.Grids != nil && len(c.Grids.Points) >= 3)
	expect(2, "that the finest run has settled", len(c.Monitors) > 0)
	expect(2, "the conditions of both sides", len(c.Conditions) > 0)
	expect(2, "an application point inside the compared conditions", a != nil && a.Place != nil && a.Place.State == adequacy.Inside)
	expect(3, "data kept apart from the setting of the model", c.Use == UseValidation)
	expect(3, "a simulation made without the data being known", c.Known == Blind)
	expect(3, "a comparison without open points", len(c.Open) == 0)
	expect(3, "a recorded independent check", w.e.study.Checked.Name != "")
}
