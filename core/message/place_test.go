package message

import (
	"slices"
	"testing"

	"weirmark/core/study"
)

// Every entry of a question and its choices stands in one place.
func TestPlaceOfEntries(t *testing.T) {
	q := &study.Question{Case: "C1", Quantity: "drag", Choices: study.DefaultChoices()}
	held := map[string]int{}
	said := slices.Concat(questionEntries(q), choices(q, false))
	for _, p := range places {
		for _, e := range p.of(said) {
			held[e.Target.Field]++
		}
	}
	for _, e := range said {
		if n := held[e.Target.Field]; n != 1 {
			t.Errorf("%s stands in %d places of the table", e.Target.Field, n)
		}
	}
}

// What a person said does not stand aside, and what holds by itself does.
func TestAside(t *testing.T) {
	q := &study.Question{Case: "C1", Quantity: "drag", Choices: study.DefaultChoices()}
	aside := func() map[string]bool {
		found := map[string]bool{}
		for _, e := range entriesOfLists(entryLists(&study.Study{}, q, &study.Cell{Case: "C1", Quantity: "drag"})) {
			found[e.Target.Field] = e.Aside
		}
		return found
	}
	before := aside()
	if before["kind"] {
		t.Error("what has to be filled stands aside")
	}
	for field := range before {
		if field != "kind" && field != "use" && !before[field] {
			t.Errorf("%s does not stand aside, and nobody said it", field)
		}
	}
	q.Choices.Formal, q.Conditions = 1, []study.Matching{{Name: "α", Unit: "°", Simulation: 4, Data: 4.2}}
	q.Family = &study.Family{Wall: "wall functions"}
	after := aside()
	for _, field := range []string{"choices.formal", "0.name", "family.wall"} {
		if held, there := after[field]; held || !there {
			t.Errorf("%s: there %t, aside %t", field, there, held)
		}
	}
	if !after["choices.rule"] {
		t.Error("the rule stands among what was said")
	}
}
