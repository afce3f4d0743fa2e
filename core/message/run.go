package message

import (
	"cmp"
	"slices"

	"weirmark/core/study"
)

// runList holds what a person can enter about the settling of each run behind
// a cell.
func runList(s *study.Study, q *study.Question, c *study.Cell) EntryList {
	list := EntryList{Course: 0, Title: "Runs", Hint: "common practice, no source: integrated forces stop changing with the iterations, and what enters leaves", Items: []EntryItem{}}
	for _, grid := range runsOf(c) {
		list.Items = append(list.Items, EntryItem{Entries: runEntries(q, c, grid)})
	}
	if stand := standInEntries(s, q, c); len(stand) > 0 {
		list.Items = append(list.Items, EntryItem{Entries: stand})
	}
	return list
}

// runsOf names the runs of a cell, coarse to fine.
func runsOf(c *study.Cell) []string {
	var names []string
	add := func(name string) {
		if !slices.Contains(names, name) {
			names = append(names, name)
		}
	}
	if c.Grids != nil {
		for _, p := range c.Grids.Points {
			if p.Used {
				add(p.Name)
			}
		}
	} else if c.Summary != nil || c.Grid != "" {
		add(c.Grid)
	}
	for _, m := range c.Monitors {
		add(m.Grid)
	}
	for _, b := range c.Balances {
		add(b.Grid)
	}
	return names
}

func runEntries(q *study.Question, c *study.Cell, grid string) []Entry {
	r := q.Run(c.Model, grid)
	name := cmp.Or(grid, "the run")
	entry := func(field, label, value, hint string) Entry {
		return Entry{Target: q.RunTarget(field, c.Model, grid), Label: label, Value: value, By: study.Entered, Options: []Option{}, Hint: hint}
	}
	list := []Entry{entry("u_iter", name+": U_iter, k = 2", study.OptionalText(r.UIter), "in the unit of the data; empty: from the monitor")}
	if r.UIter != nil {
		list = append(list, entry("u_iter_why", "because", r.UIterWhy, "where the number comes from"))
	}
	if slices.ContainsFunc(c.Monitors, func(m study.MonitorLine) bool { return m.Grid == grid }) {
		list = append(list, entry("start", "averaged from", study.OptionalText(r.Start), "iteration or time; empty: found"), entry("period", "period", study.OptionalText(r.Period), "of a cycle; empty: found"))
	}
	if r.Effect != nil || slices.ContainsFunc(c.Balances, func(b study.BalanceLine) bool { return b.Grid == grid && !b.Closed }) {
		list = append(list, entry("effect", "what does not balance changes the quantity by at most", study.OptionalText(r.Effect), "in the unit of the data"))
	}
	if r.Effect != nil {
		list = append(list, entry("effect_why", "because", r.EffectWhy, "where the number comes from"))
	}
	for i := range list {
		f := &list[i]
		f.Open = f.Label == "because" && f.Value == ""
	}
	return list
}

// standInEntries name another quantity of the case whose monitors stand for
// those of this one, where it has none.
func standInEntries(s *study.Study, q *study.Question, c *study.Cell) []Entry {
	if len(c.Monitors) > 0 && c.Monitors[0].Quantity == "" {
		return nil
	}
	options := []Option{{"", "–"}}
	for i := range s.Slips {
		p := &s.Slips[i]
		o := Option{p.Quantity.Value, p.Quantity.Value}
		if p.Role.Value == study.Monitor && p.Case.Value == q.Case && p.Model.Value == c.Model && p.Quantity.Value != q.Quantity && !slices.Contains(options, o) {
			options = append(options, o)
		}
	}
	if len(options) == 1 && q.StandIn == nil {
		return nil
	}
	have := study.StandIn{}
	if q.StandIn != nil {
		have = *q.StandIn
	}
	entry := func(field, label, value string, options []Option, hint string) Entry {
		return Entry{Target: q.RunTarget(field, "", ""), Label: label, Value: value, By: study.Entered, Options: options, Hint: hint}
	}
	list := []Entry{entry("stand_in", "monitors are those of", have.Quantity, options, "")}
	if have.Quantity != "" {
		why := entry("stand_in_why", "because", have.Why, []Option{}, "why they show that this quantity has settled")
		why.Open = have.Why == ""
		list = append(list, why)
	}
	return list
}
