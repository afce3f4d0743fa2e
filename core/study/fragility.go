package study

import (
	"cmp"
	"slices"

	"weirmark/core/interpolate"
	"weirmark/core/quantity"
	"weirmark/core/refinement"
)

// alternative is a choice that another careful person might have made: a
// change of the question, or of what its evaluation leaves out.
type alternative struct {
	change string
	apply  func(*Question, *work)
	number *dial // of a choice that is a number
}

// dial is a number between what is chosen and the alternative.
type dial struct {
	from, to float64
	set      func(*Question, float64)
}

// turned is the alternative of a number.
func turned(name string, from, to float64, set func(*Question, float64)) alternative {
	return alternative{name + " = " + quantity.Typed(to), func(q *Question, _ *work) { set(q, to) }, &dial{from, to, set}}
}

// alternatives lists the other choices open to a cell.
func alternatives(q *Question, have *Cell) []alternative {
	c, grids := q.Choices, have.Grids
	all := []alternative{}
	choice := func(change string, apply func(*Choices)) {
		all = append(all, alternative{change: change, apply: func(q *Question, _ *work) { apply(&q.Choices) }})
	}
	either := func(yes bool, ifYes, ifNo string, flip func(*Choices)) {
		if yes {
			choice(ifYes, flip)
			return
		}
		choice(ifNo, flip)
	}
	kNum := 2.0
	if c.KNum == 2 {
		kNum = 1.15
	}
	all = append(all, turned("k_num", c.KNum, kNum, func(q *Question, v float64) { q.Choices.KNum = v }))
	either(c.Bounded, "plain rule of the grid study", "bounded rule of the grid study", func(c *Choices) { c.Bounded = !c.Bounded })
	for _, r := range rules(c, grids) {
		choice(r.change, r.apply)
	}
	if grids != nil {
		now, then := cmp.Or(c.Safety, refinement.UsualSafety), 3.0
		if now == then {
			then = refinement.UsualSafety
		}
		all = append(all, turned("safety factor of the grid study", now, then, func(q *Question, v float64) { q.Choices.Safety = v }))
	}
	if have.NumSums != nil && have.NumSums.Apart {
		either(c.NumLinear, "parts of u_num independent of each other", "parts of u_num summed, as if they depend on each other", func(c *Choices) { c.NumLinear = !c.NumLinear })
	}
	for _, d := range otherDerivations(q.Derive) {
		all = append(all, alternative{change: d.label, apply: func(q *Question, _ *work) { q.Derive = &d }})
	}
	if !have.Scalar {
		either(c.NumShared, "u_num independent between stations", "u_num shared by all stations", func(c *Choices) { c.NumShared = !c.NumShared })
		other := interpolate.Monotone
		if c.Interpolation == interpolate.Monotone {
			other = interpolate.Linear
		}
		choice(string(other)+" interpolation", func(c *Choices) { c.Interpolation = other })
		either(c.UInterp, "no interpolation uncertainty", "interpolation uncertainty counted", func(c *Choices) { c.UInterp = !c.UInterp })
		all = append(all, correlations(q)...)
		for i := range q.Regions {
			r := q.Regions[i]
			all = append(all, alternative{change: "without " + r.Name, apply: func(_ *Question, w *work) { w.without = &r }})
		}
	}
	if have.K95.Known() {
		either(c.KStudent, "k as entered", "k by the degrees of freedom", func(c *Choices) { c.KStudent = !c.KStudent })
	}
	all = append(all, corrections(q)...)
	if len(have.Excluded) > 0 {
		all = append(all, alternative{change: "the excluded stations counted", apply: func(_ *Question, w *work) { w.withExcluded = true }})
	}
	return all
}

// correlations are the two ends of what may be assumed of the systematic
// sources between stations.
func correlations(q *Question) []alternative {
	all := []alternative{}
	add := func(change, pattern string) {
		for _, s := range q.Sources {
			if s.Of != OfNumerical && !s.Random && s.Pattern != pattern {
				all = append(all, alternative{change: change, apply: func(q *Question, _ *work) {
					for i := range q.Sources {
						if s := &q.Sources[i]; s.Of != OfNumerical && !s.Random {
							s.Pattern = pattern
						}
					}
				}})
				return
			}
		}
	}
	add("systematic sources independent between stations", Independent)
	add("systematic sources shared by all stations", Common)
	return all
}

// corrections turn the correction of each condition on or off.
func corrections(q *Question) []alternative {
	all := []alternative{}
	for i, m := range q.Conditions {
		if m.Sensitivity == nil || m.Simulation == m.Data {
			continue
		}
		change, handling := m.Name+" corrected", Corrected
		if m.Handling == Corrected {
			change, handling = m.Name+" not corrected", Tolerated
		}
		all = append(all, alternative{change: change, apply: func(q *Question, _ *work) {
			q.Conditions[i].Handling, q.Conditions[i].Why = handling, "an alternative"
		}})
	}
	return all
}

// chosen is another rule of the grid study.
type chosen struct {
	change string
	apply  func(*Choices)
}

// rules lists the other rules that fit a grid study of one value.
func rules(c Choices, g *Grids) []chosen {
	all := []chosen{}
	if g == nil || g.Along {
		return all
	}
	add := func(change, rule string) {
		if c.Rule != rule {
			all = append(all, chosen{change, func(c *Choices) { c.Rule = rule }})
		}
	}
	add("three finest grids", "")
	if len(g.Points) >= 4 {
		add("least squares over all grids", refinement.RuleLeastSquares)
	}
	if g.Order > g.Formal {
		add("order held at the formal one", refinement.RuleFormal)
	}
	if g.Class == string(refinement.Monotone) {
		add("factor of safety of the grid study by its order", refinement.RuleFactor)
	}
	if g.Class == string(refinement.Oscillatory) {
		add("3 times the range of the oscillating grids as U", refinement.RuleRange)
	}
	return all
}

// under evaluates the cell of a question and model as an alternative has it.
func (e *evaluation) under(q *Question, model string, apply func(*Question, *work)) Cell {
	other := *q
	other.Sources = slices.Clone(q.Sources)
	other.Conditions = slices.Clone(q.Conditions)
	w := &work{e: e, q: &other, model: model, inner: true}
	apply(&other, w)
	w.choices = other.Choices
	return e.workWith(w)
}

// fragile evaluates the cell under every alternative, names those that were
// tried, and lists those that change an outcome word.
func (e *evaluation) fragile(q *Question, model string, have *Cell) {
	for _, a := range alternatives(q, have) {
		have.Tried = append(have.Tried, a.change)
		other := e.under(q, model, a.apply)
		for _, f := range changes(a.change, *have, other) {
			if a.number != nil && len(have.Stations) <= mostFlipped {
				f.At = e.flip(q, model, have, f, *a.number)
			}
			have.Fragile = append(have.Fragile, f)
		}
	}
	j := have.Joint
	if j == nil {
		return
	}
	word := Cell{Joint: &Joint{Exceeds: !j.Exceeds}}
	if j.Turning > 0 {
		have.Fragile = append(have.Fragile, Fragility{Change: "one station left out, any of " + quantity.Counted(j.Turning, "station"), What: "joint statistic", From: have.jointWord(), Outcome: word.jointWord(), Detail: "largest change without " + j.Station.Region})
	}
	for _, t := range j.Turns {
		have.Fragile = append(have.Fragile, Fragility{Change: "correlation of " + t.Source + " below " + quantity.Text(float64(t.Rho), 3), What: "joint statistic", From: have.jointWord(), Outcome: word.jointWord(), Detail: "statistic " + quantity.Text(float64(t.At0), 3) + " when independent"})
	}
}

// mostFlipped is the number of stations above which the place of a flip is not
// searched.
const mostFlipped = 200

// flip returns the number nearest to the chosen one, to three digits, from
// which on the word of a fragility is another.
func (e *evaluation) flip(q *Question, model string, have *Cell, f Fragility, d dial) *Number {
	same, other := d.from, d.to
	for range 40 {
		if quantity.Round(same, 4) == quantity.Round(other, 4) {
			break
		}
		middle := same + (other-same)/2
		turned := false
		for _, g := range changes("", *have, e.under(q, model, func(q *Question, _ *work) { d.set(q, middle) })) {
			turned = turned || g.What == f.What
		}
		if turned {
			other = middle
		} else {
			same = middle
		}
	}
	at := Number(quantity.Round(other, 3))
	return &at
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
