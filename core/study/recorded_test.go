package study_test

import (
	"fmt"
	"strings"
	"testing"

	"weirmark/core/study"
)

// The order in which stations, requirement and comparison entered the log is
// told, with what was missing when the comparison was shown.
func TestOrderOfRecording(t *testing.T) {
	const id = "C|q"
	target := study.Target{Kind: "question", ID: id}
	requirement := func(s *study.Study) error {
		return s.Set(study.Target{Kind: "question", ID: id, Field: "requirement.value"}, "5", "09:00", "")
	}
	planned := func(s *study.Study) error { return s.RevealPlanned(target.ID, "09:01") }
	shown := func(s *study.Study) error { return s.Reveal(target.ID, "09:02") }
	for _, row := range []struct {
		name string
		do   []func(*study.Study) error
		want string
		why  string // logged with the showing
	}{
		{"one keystroke", []func(*study.Study) error{planned}, "stations locked 1 09:01; comparison shown, requirement not set 2 09:01", "requirement not set"},
		{"nothing before", []func(*study.Study) error{shown, requirement}, "comparison shown, requirement not set, stations not locked 1 09:02; requirement recorded 2 09:00", "requirement not set, stations not locked"},
		{"requirement first", []func(*study.Study) error{requirement, planned}, "requirement recorded 1 09:00; stations locked 2 09:01; comparison shown 3 09:01", ""},
		{"not shown", []func(*study.Study) error{requirement}, "requirement recorded 1 09:00", ""},
	} {
		s := of(steps(40, 0, 1), steps(9, .1, .9), raised, wave)
		for _, do := range row.do {
			if err := do(s); err != nil {
				t.Fatal(row.name, err)
			}
		}
		var got []string
		for _, r := range only(t, s).Recorded {
			got = append(got, fmt.Sprint(r.What, " ", r.In, " ", r.At))
		}
		if text := strings.Join(got, "; "); text != row.want {
			t.Errorf("%s: %s", row.name, text)
		}
		for _, e := range s.Log {
			if strings.HasPrefix(e.What, "Comparison of") && e.Why != row.why {
				t.Errorf("%s: logged %q", row.name, e.Why)
			}
		}
	}
}

// The basis of a requirement is a part of it: a change of it after the
// comparison was seen is late.
func TestLateBasisOfRequirement(t *testing.T) {
	s := of(steps(40, 0, 1), steps(9, .1, .9), raised, wave)
	setQuestion(t, s, "requirement.value", "5")
	if err := s.Reveal("C|q", ""); err != nil {
		t.Fatal(err)
	}
	setQuestion(t, s, "requirement.percent", "yes")
	if only(t, s).Requirement.Late {
		t.Error("the same basis again is no change")
	}
	setQuestion(t, s, "requirement.percent", "no")
	if !only(t, s).Requirement.Late {
		t.Error("a basis changed after the comparison was seen is not late")
	}
}
