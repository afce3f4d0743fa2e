package study

import "strings"

// RunTarget is the place of an entry of one run.
func (q *Question) RunTarget(field, model, grid string) Target {
	return Target{Kind: ItemRun, ID: q.id(), Field: field + "|" + model + "|" + grid}
}

// Run returns what was entered of a run; nothing where nothing was.
func (q *Question) Run(model, grid string) RunEntry {
	for _, r := range q.Runs {
		if r.Model == model && r.Grid == grid {
			return r
		}
	}
	return RunEntry{Model: model, Grid: grid}
}

// enterRun changes an entry of one run; a run of which nothing is left is
// taken out.
func (q *Question) enterRun(path, value string) (string, error) {
	parts := strings.SplitN(path, "|", 3)
	if len(parts) != 3 {
		return "", refuse("an entry of a run", path)
	}
	field, model, grid := parts[0], parts[1], parts[2]
	if field == "stand_in" || field == "stand_in_why" {
		return q.enterStandIn(field, value)
	}
	r := q.Run(model, grid)
	before, err := r.enter(field, value)
	if err != nil {
		return before, err
	}
	kept := []RunEntry{}
	for _, have := range q.Runs {
		if have.Model != model || have.Grid != grid {
			kept = append(kept, have)
		}
	}
	if r != (RunEntry{Model: model, Grid: grid}) {
		kept = append(kept, r)
	}
	q.Runs = kept
	return before, nil
}

func (r *RunEntry) enter(field, value string) (string, error) {
	switch field {
	case "start":
		return optional(&r.Start, value, -1e30)
	case "period":
		return optional(&r.Period, value, 1e-30)
	case "u_iter":
		return optional(&r.UIter, value, 0)
	case "u_iter_why":
		return exchange(&r.UIterWhy, value)
	case "effect":
		return optional(&r.Effect, value, 0)
	case "effect_why":
		return exchange(&r.EffectWhy, value)
	}
	return "", refuse(field, value)
}

// enterStandIn names the quantity whose monitors stand for this one, or why.
func (q *Question) enterStandIn(field, value string) (string, error) {
	other := StandIn{}
	if q.StandIn != nil {
		other = *q.StandIn
	}
	if field == "stand_in" && value == q.Quantity {
		return other.Quantity, refuse("monitors that stand for themselves", value)
	}
	text := &other.Quantity
	if field == "stand_in_why" {
		text = &other.Why
	}
	before, err := exchange(text, value)
	q.StandIn = &other
	if other == (StandIn{}) {
		q.StandIn = nil
	}
	return before, err
}
