package study

import (
	"weirmark/core/interpolate"
	"weirmark/core/quantity"
	"weirmark/core/refinement"
)

// alternative is a choice that another careful person might have made.
type alternative struct {
	change string
	apply  func(*Choices)
}

// alternatives lists the other choices open to a cell.
func alternatives(c Choices, grids *Grids, sums *NumSums) []alternative {
	all := []alternative{}
	kNum := 2.0
	if c.KNum == 2 {
		kNum = 1.15
	}
	all = append(all, alternative{"k_num = " + quantity.Typed(kNum), func(c *Choices) { c.KNum = kNum }})
	if c.Bounded {
		all = append(all, alternative{"plain rule of the grid study", func(c *Choices) { c.Bounded = false }})
	} else {
		all = append(all, alternative{"bounded rule of the grid study", func(c *Choices) { c.Bounded = true }})
	}
	all = append(all, rules(c, grids)...)
	if c.NumShared {
		all = append(all, alternative{"u_num independent between stations", func(c *Choices) { c.NumShared = false }})
	} else {
		all = append(all, alternative{"u_num shared by all stations", func(c *Choices) { c.NumShared = true }})
	}
	if sums != nil && sums.Apart {
		change := "parts of u_num summed, as if they depend on each other"
		if c.NumLinear {
			change = "parts of u_num independent of each other"
		}
		all = append(all, alternative{change, func(c *Choices) { c.NumLinear = !c.NumLinear }})
	}
	other := interpolate.Monotone
	if c.Interpolation == interpolate.Monotone {
		other = interpolate.Linear
	}
	all = append(all, alternative{string(other) + " interpolation", func(c *Choices) { c.Interpolation = other }})
	if c.UInterp {
		all = append(all, alternative{"no interpolation uncertainty", func(c *Choices) { c.UInterp = false }})
	} else {
		all = append(all, alternative{"interpolation uncertainty counted", func(c *Choices) { c.UInterp = true }})
	}
	return all
}

// rules lists the other rules that fit a grid study of one value.
func rules(c Choices, g *Grids) []alternative {
	all := []alternative{}
	if g == nil || g.Along {
		return all
	}
	add := func(change, rule string) {
		if c.Rule != rule {
			all = append(all, alternative{change, func(c *Choices) { c.Rule = rule }})
		}
	}
	add("three finest grids", "")
	if len(g.Points) >= 4 {
		add("least squares over all grids", refinement.RuleLeastSquares)
	}
	if g.Order > g.Formal {
		add("order held at the formal one", refinement.RuleFormal)
	}
	if g.Class == string(refinement.Oscillatory) {
		add("3 times the range of the oscillating grids as U", refinement.RuleRange)
	}
	return all
}

// fragile evaluates the cell under every alternative and lists those that
// change an outcome word.
func (e *evaluation) fragile(q *Question, model string, have Cell) []Fragility {
	list := []Fragility{}
	for _, a := range alternatives(q.Choices, have.Grids, have.NumSums) {
		choices := q.Choices
		a.apply(&choices)
		other := e.workWith(&work{e: e, q: q, model: model, choices: choices, inner: true})
		list = append(list, changes(a.change, have, other)...)
	}
	for _, d := range otherDerivations(q.Derive) {
		asked := *q
		asked.Derive = &d
		other := e.workWith(&work{e: e, q: &asked, model: model, choices: q.Choices, inner: true})
		list = append(list, changes(d.label, have, other)...)
	}
	if j := have.Joint; j != nil {
		for _, r := range j.Without {
			if r.Exceeds != j.Exceeds {
				word := Cell{Joint: &Joint{Exceeds: r.Exceeds}}
				list = append(list, Fragility{Change: "without " + r.Region, What: "joint statistic", From: have.jointWord(), Outcome: word.jointWord(), Detail: "statistic " + quantity.Text(float64(r.Statistic), 3)})
			}
		}
		if j.Turning > 0 {
			word := Cell{Joint: &Joint{Exceeds: !j.Exceeds}}
			list = append(list, Fragility{Change: "one station left out, any of " + quantity.Counted(j.Turning, "station"), What: "joint statistic", From: have.jointWord(), Outcome: word.jointWord(), Detail: "largest change without " + j.Station.Region})
		}
		for _, t := range j.Turns {
			word := Cell{Joint: &Joint{Exceeds: !j.Exceeds}}
			list = append(list, Fragility{Change: "correlation of " + t.Source + " below " + quantity.Text(float64(t.Rho), 3), What: "joint statistic", From: have.jointWord(), Outcome: word.jointWord(), Detail: "statistic " + quantity.Text(float64(t.At0), 3) + " when independent"})
		}
	}
	if len(have.Excluded) > 0 {
		other := e.workWith(&work{e: e, q: q, model: model, choices: q.Choices, withExcluded: true, inner: true})
		list = append(list, changes("the excluded stations counted", have, other)...)
	}
	return list
}

// changes lists the outcome words that differ between two evaluations.
func changes(change string, have, other Cell) []Fragility {
	var list []Fragility
	add := func(what, from, to, detail string) {
		if from != to {
			list = append(list, Fragility{Change: change, What: what, From: from, Outcome: to, Detail: detail})
		}
	}
	add("requirement", have.requirementWord(), other.requirementWord(), other.intervalWord())
	if have.Scalar {
		add("reading", have.readingWord(), other.readingWord(), "")
		return list
	}
	add("joint statistic", have.jointWord(), other.jointWord(), other.jointDetail())
	add("remainder", have.remainderWord(), other.remainderWord(), "")
	return list
}

func (c *Cell) requirementWord() string {
	if c.Requirement == nil || c.Requirement.Outcome == "" {
		return "no outcome"
	}
	return c.Requirement.Outcome
}

func (c *Cell) readingWord() string {
	if len(c.Stations) != 1 || c.Stations[0].Reading == "" {
		return "no reading"
	}
	return c.Stations[0].Reading
}

func (c *Cell) jointWord() string {
	switch {
	case c.Joint == nil:
		return "no statistic"
	case c.Joint.Exceeds:
		return "exceeds its 95 % point"
	}
	return "does not exceed its 95 % point"
}

func (c *Cell) remainderWord() string {
	switch {
	case c.Joint == nil || !c.Joint.Remainder.Known():
		return "no remainder"
	case c.Joint.RemainderExceeds:
		return "exceeds its 95 % point"
	}
	return "does not exceed its 95 % point"
}

// intervalWord is the interval of the model error of a scalar.
func (c *Cell) intervalWord() string {
	if !c.Scalar || len(c.Stations) != 1 || !c.Stations[0].Lo.Known() {
		return ""
	}
	s := c.Stations[0]
	return IntervalText(c, s)
}

func (c *Cell) jointDetail() string {
	if c.Joint == nil {
		return ""
	}
	return "statistic " + quantity.Text(float64(c.Joint.Statistic), 3)
}
