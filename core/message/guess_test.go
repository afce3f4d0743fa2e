package message

import (
	"reflect"
	"slices"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"weirmark/core/sentence"
	"weirmark/core/study"
)

// entriesOf returns the entries with an origin of a struct, by their path.
func entriesOf(v reflect.Value, path string, found map[string]*study.Field) {
	for i := range v.NumField() {
		name, f := path+v.Type().Field(i).Name, v.Field(i)
		if e, is := f.Addr().Interface().(*study.Field); is {
			found[name] = e
			continue
		}
		if f.Kind() == reflect.Struct {
			entriesOf(f, name+".", found)
		}
	}
}

// rests reports whether a cell rests on a guess: of one of its slips, of the
// reference, or of a source, found without the help of the program's own list.
func rests(s *study.Study, c *study.Cell) (string, bool) {
	open := func(v any, of string) (string, bool) {
		found := map[string]*study.Field{}
		entriesOf(reflect.ValueOf(v).Elem(), "", found)
		for name, f := range found {
			if f.Open() {
				return of + " " + name + " = " + f.Value, true
			}
		}
		return "", false
	}
	for i := range s.Slips {
		p := &s.Slips[i]
		own := p.Role.Value == study.Reference || (p.Role.Value == study.Simulation || p.Role.Value == study.GridValues) && p.Model.Value == c.Model
		if p.Case.Value == c.Case && p.Quantity.Value == c.Quantity && own {
			if where, is := open(p, "slip "+p.ID); is {
				return where, true
			}
		}
	}
	q := s.Question(c.Case, c.Quantity)
	for i := range q.Sources {
		if m := q.Sources[i].Model; m == "" || m == c.Model {
			if where, is := open(&q.Sources[i], "source "+q.Sources[i].Name); is {
				return where, true
			}
		}
	}
	if q.Kind.Open() || q.Use.Open() {
		return "kind or use", true
	}
	return "", false
}

// No path yields "shown", or any other outcome, while a guess that the cell
// rests on is not accepted: random entries of the demo become guesses, some are
// accepted again, requirements and choices change.
func TestNoOutcomeOnAGuess(t *testing.T) {
	first := Demo()
	withheld, stated := 0, 0
	rapid.Check(t, func(t *rapid.T) {
		s := first.Clone()
		entries := map[string]*study.Field{}
		for i := range s.Slips {
			entriesOf(reflect.ValueOf(&s.Slips[i]).Elem(), "slip "+s.Slips[i].ID+" ", entries)
		}
		for i := range s.Questions {
			q := &s.Questions[i]
			entriesOf(reflect.ValueOf(q).Elem(), "question "+q.Quantity+" ", entries)
			for j := range q.Sources {
				entriesOf(reflect.ValueOf(&q.Sources[j]).Elem(), "source "+q.Sources[j].Name+" ", entries)
			}
		}
		var names []string
		for name, f := range entries {
			if f.Given() {
				names = append(names, name)
			}
		}
		slices.Sort(names)
		for range rapid.IntRange(0, 3).Draw(t, "guesses") {
			name := rapid.SampledFrom(names).Draw(t, "guess")
			entries[name].By = study.Guessed
		}
		if rapid.Bool().Draw(t, "accept one") {
			entries[rapid.SampledFrom(names).Draw(t, "accepted")].By = study.Accepted
		}
		q := &s.Questions[rapid.IntRange(0, len(s.Questions)-1).Draw(t, "question")]
		q.Requirement = &study.Requirement{Value: rapid.Float64Range(1, 1000).Draw(t, "requirement"), Percent: true}
		q.Choices.KNum = rapid.Float64Range(1, 2).Draw(t, "k_num")
		r := study.Evaluate(s, study.Options{})
		for i := range r.Cells {
			c := &r.Cells[i]
			where, is := rests(s, c)
			said := sentence.Of(c)
			judged := strings.Contains(said.Text(), " is shown") || strings.Contains(said.Text(), "refuted") || boardCell("", c).Letter != ""
			if is && (!c.Withheld || judged || said.Status != sentence.Withheld) {
				t.Fatalf("%s, model %s, rests on the guess of %s: withheld %v, %s", c.Quantity, c.Model, where, c.Withheld, said.Text())
			}
			if c.Withheld {
				withheld++
			} else {
				stated++
			}
		}
	})
	if withheld < 20 || stated < 20 {
		t.Errorf("%d cells withheld and %d stated: the search saw one side only", withheld, stated)
	}
}
