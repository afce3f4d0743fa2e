package message

import (
	"encoding/json"
	"strings"
	"testing"
)

// stepBack asks for one step back.
func stepBack(t *testing.T, s *Session, path string) (Reply, string) {
	t.Helper()
	request, err := json.Marshal(Request{Protocol: Protocol, Kind: "walk", Value: path})
	if err != nil {
		t.Fatal(err)
	}
	raw, _ := s.Handle(request, nil)
	var r Reply
	if err := json.Unmarshal(raw, &r); err != nil {
		t.Fatal(err)
	}
	if r.Walk == nil {
		return r, ""
	}
	return r, r.Walk.Shown + " | " + strings.Join(r.Walk.Said, " | ")
}

// From the E of a tap to the number in the file of the taps, step by step, as
// the page shows it.
func TestWalkFromATapToItsFile(t *testing.T) {
	s := &Session{}
	if r, _ := stepBack(t, s, "cells.3.stations.5.e"); r.Error == nil || r.Error.Code != "request-study" {
		t.Errorf("without a study: %+v", r.Error)
	}
	s.Handle([]byte(`{"protocol":1,"kind":"demo"}`), nil)
	for _, row := range []struct {
		path string
		says []string
		way  string // the input to go on with
	}{
		{"cells.3.stations.5.e", []string{"0.0153", "E = S − D", "Computed again from the numbers below: the same."}, "data D = −1.3517"},
		{"cells.3.stations.5.d", []string{"−1.3517"}, "Cp of C1-taps-upper.csv = −1.3517"},
		{"cells.3.read.ref.y.5", []string{"as written", "Written in C1-taps-upper.csv, line 8, field 2, column Cp: “-1.3517”."}, ""},
		{"cells.3.joint.statistic", []string{"125.033", "Σ w²"}, "whitened residual: 24 numbers"},
		// Of a cell that is not the selected one too what only a closer look gives.
		{"cells.2.joint.turns.0.rho", []string{"0.0214", "the same"}, "correlation at which the conclusion turns"},
	} {
		r, said := stepBack(t, s, row.path)
		if r.Error != nil {
			t.Errorf("%s: %+v", row.path, r.Error)
			continue
		}
		for _, want := range row.says {
			if !strings.Contains(said, want) {
				t.Errorf("%s says %q, no %q", row.path, said, want)
			}
		}
		found := row.way == ""
		for _, in := range r.Walk.Ways {
			found = found || strings.HasPrefix(in.Text, row.way)
		}
		if !found {
			t.Errorf("%s: ways %+v, want %q", row.path, r.Walk.Ways, row.way)
		}
	}
	if r, _ := stepBack(t, s, "cells.3.nothing"); r.Status != Refused || r.Error.Code != "walk-unknown" {
		t.Errorf("a path that leads nowhere: %+v", r.Error)
	}
}

// After a change the walk is in the new report.
func TestWalkFollowsAChange(t *testing.T) {
	s := &Session{}
	s.Handle([]byte(`{"protocol":1,"kind":"demo"}`), nil)
	_, before := stepBack(t, s, "cells.1.stations.0.lo")
	s.Handle([]byte(`{"protocol":1,"kind":"set","target":{"kind":"question","id":"C1|drag coefficient","field":"choices.k"},"value":"3"}`), nil)
	r, after := stepBack(t, s, "cells.1.stations.0.lo")
	if r.Error != nil || before == after || !strings.Contains(after, "the same") {
		t.Errorf("before %q, after %q", before, after)
	}
}
