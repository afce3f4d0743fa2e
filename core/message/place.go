package message

import (
	"slices"
	"strings"

	"weirmark/core/study"
)

// place is a group of entries of a question: the course where it stands and
// the fields in the order of their use. A field that ends in a point names all
// that begin so.
type place struct {
	course      int
	title, hint string
	main        bool
	fields      []string
}

// places holds every entry of a question and its choices once.
var places = []place{
	{1, "Rule of the grids", "how an uncertainty is made of the grids", false, []string{"choices.rule", "choices.bounded", "choices.formal", "choices.dimension", "choices.safety", "choices.k_num"}},
	{1, "Sum of u_num", "how its parts and its stations depend on each other", false, []string{"choices.num_linear", "choices.num_shared"}},
	{2, "The reference", "", true, []string{"kind", "use", "known", "reference_id", "symbol", "condition"}},
	{2, "The measured values", "their step, their corrections, inputs without uncertainty", false, []string{"resolution", "corrected.", "no_input"}},
	{2, "Stations", "how the simulation is brought to them", false, []string{"choices.interpolation", "choices.u_interp", "choices.gap", "choices.probe", "choices.period", "choices.smooth", "choices.common_set", "plan"}},
	{2, "Form of the values", "ratios and other forms, the same on both sides", false, []string{"form.", "x_form."}},
	{3, "Change from another case", "what changes alike on both sides cancels", false, []string{"baseline"}},
	{3, "The picture", "which way its values are drawn", false, []string{"downward"}},
	{4, "The requirement", "", true, []string{"requirement.", "choices.k"}},
	{4, "The interval", "where k and its bounds come from", false, []string{"choices.k_student", "choices.sampled"}},
}

// of returns the entries of the place in its order.
func (p place) of(entries []Entry) []Entry {
	own := []Entry{}
	for _, field := range p.fields {
		for _, e := range entries {
			if e.Target.Field == field || strings.HasSuffix(field, ".") && strings.HasPrefix(e.Target.Field, field) {
				own = append(own, e)
			}
		}
	}
	return own
}

// entryLists are all entries of a question, those of its choices first in each
// course. What holds without an answer of a person stands aside.
func entryLists(s *study.Study, q *study.Question, c *study.Cell) []EntryList {
	all := listsAsSaid(s, q, c)
	blank := &study.Question{Case: q.Case, Quantity: q.Quantity, Choices: study.DefaultChoices()}
	usual := map[study.Target]string{}
	for _, e := range entriesOfLists(listsAsSaid(&study.Study{}, blank, c)) {
		usual[e.Target] = e.Value
	}
	for i := range all {
		for j := range all[i].Items {
			for k := range all[i].Items[j].Entries {
				e := &all[i].Items[j].Entries[k]
				e.Aside = !e.Open && e.Value == usual[e.Target]
			}
		}
	}
	return all
}

func listsAsSaid(s *study.Study, q *study.Question, c *study.Cell) []EntryList {
	said := slices.Concat(questionEntries(q), choices(q, c.Scalar))
	all := []EntryList{}
	for _, p := range places {
		all = append(all, EntryList{Course: p.course, Title: p.title, Hint: p.hint, Main: p.main, Items: []EntryItem{{Entries: p.of(said)}}})
	}
	return append(append(all, lists(s, q, c)...), familyList(q), codeList(s))
}

// entriesOfLists returns the entries of all lists.
func entriesOfLists(all []EntryList) []Entry {
	var entries []Entry
	for _, l := range all {
		for _, item := range l.Items {
			entries = append(entries, item.Entries...)
		}
	}
	return entries
}
