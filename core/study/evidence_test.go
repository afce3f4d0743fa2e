package study_test

import (
	"math"
	"strings"
	"testing"

	"weirmark/core/message"
	"weirmark/core/notice"
	"weirmark/core/sentence"
	"weirmark/core/study"
)

// What is expected grows with what hangs on the result; what is missing is
// named, and no context asks for nothing.
func TestEvidenceGrowsWithTheContext(t *testing.T) {
	s := message.Demo()
	before := 0
	for _, row := range []struct{ influence, consequence string }{{"", ""}, {study.Low, ""}, {study.Low, study.Medium}, {study.High, study.Low}} {
		for field, v := range map[string]string{"context.influence": row.influence, "context.consequence": row.consequence} {
			if err := s.Set(study.Target{Kind: "study", Field: field}, v, "", ""); err != nil {
				t.Fatal(err)
			}
		}
		c := study.Evaluate(s, study.Options{}).Cells[0]
		n := len(c.Evidence)
		if n < before || row.influence == "" && n != 0 || row.influence != "" && n == before {
			t.Errorf("%+v: %d pieces after %d", row, n, before)
		}
		before = n
		for _, e := range c.Evidence {
			want := map[string]bool{"an uncertainty of the data": true, "a recorded independent check": false, "a study over three or more grids": true, "that the finest run has settled": false}
			if given, listed := want[e.What]; listed && given != e.Given {
				t.Errorf("%+v", e)
			}
		}
	}
	s.Checked.Name = "Checker"
	for _, e := range study.Evaluate(s, study.Options{}).Cells[0].Evidence {
		if e.What == "a recorded independent check" && !e.Given {
			t.Error("a recorded check is not seen")
		}
	}
	if err := s.Set(study.Target{Kind: "study", Field: "context.influence"}, "vast", "", ""); err == nil {
		t.Error("an unknown weight was taken")
	}
}

// The kind and the use of the reference, and whether it was known, change the
// words; a guess of the use withholds the statement.
func TestWordsOfKindAndUse(t *testing.T) {
	for _, row := range []struct {
		change func(*study.Question)
		want   string
	}{
		{func(q *study.Question) { q.Kind.Value = study.KindLaw }, "The reference is a law: this says how the simulation follows it in its range, and nothing of a measurement."},
		{func(q *study.Question) { q.Kind.Value = study.KindCorrelation }, "the scatter of the data behind it belongs to its uncertainty."},
		{func(q *study.Question) { q.Kind.Value, q.Use.Value = study.KindSimulation, study.UseTuning }, "agreement here is fit quality. Code-to-code comparison"},
		{func(q *study.Question) { q.Use.Value = study.UseBoth }, "A part of these data was used to set the model"},
		{func(q *study.Question) { q.Known = entered(study.Blind) }, "without the data being known, as stated."},
		{func(q *study.Question) { q.Known = entered(study.Aware) }, "The data were known when the simulation was made."},
		{func(q *study.Question) { q.Use.By = study.Guessed }, "No statement: [acceptance of what the data were used for] is open."},
	} {
		s := message.Demo()
		row.change(&s.Questions[0])
		c := study.Evaluate(s, study.Options{}).Cells[0]
		if text := sentence.Of(&c).Text(); !strings.Contains(text, row.want) {
			t.Errorf("no %q in %q", row.want, text)
		}
	}
}

// Two parameters: the point lies inside each range and outside what was
// compared, at the edge, or inside.
func TestApplicationInTwoParameters(t *testing.T) {
	for _, row := range []struct {
		alpha, speed float64
		state        string
		beyond       float64
		said         string
	}{
		{9, 40, "outside", .9 / math.Sqrt2, "No statement is made there."},
		{4, 30, "edge", 0, "lies at the edge of the compared conditions."},
		{4, 33, "inside", 0, ""},
	} {
		s := message.Demo()
		first := s.Questions[0]
		s.Questions = nil
		for i, at := range [][2]float64{{0, 30}, {10, 30}, {0, 40}} {
			q := first
			q.Case = []string{"C1", "C2", "C3"}[i]
			q.Conditions = []study.Matching{{Name: "α", Unit: "°", Simulation: at[0], Data: at[0]}, {Name: "U", Unit: "m/s", Simulation: at[1], Data: at[1]}}
			s.Questions = append(s.Questions, q)
		}
		s.Application = []study.Condition{{Name: "α", Unit: "°", Value: row.alpha}, {Name: "U", Unit: "m/s", Value: row.speed}}
		c := study.Evaluate(s, study.Options{}).Cells[0]
		p := c.Application.Place
		if p == nil || p.State != row.state || len(p.Points) != 3 || c.Application.Outside != (row.state == "outside") {
			t.Fatalf("%+v: %+v", row, p)
		}
		if math.Abs(float64(p.Beyond)-row.beyond) > 1e-9 {
			t.Errorf("%v from the hull", p.Beyond)
		}
		if text := sentence.Of(&c).Text(); row.said != "" && !strings.Contains(text, row.said) {
			t.Errorf("no %q in %q", row.said, text)
		}
	}
}

// Models compared at different stations are set against each other at the
// shared ones only where that is chosen (3-bad-inputs, 72).
func TestSharedStationsByChoice(t *testing.T) {
	s := pair("x,y\n0,2\n1,2\n2,2\n3,2\n", "x,y\n0,1\n1,1\n2,1\n3,1\n", "m", "m")
	text := "x,y\n1,2.5\n2,2.5\n3,2.5\n"
	s.Files = append(s.Files, study.File{ID: "b", Name: "b.csv", SHA256: study.Hash([]byte(text)), Data: []byte(text)})
	other := s.Slips[0]
	other.ID, other.File, other.Model = "b", "b", entered("B")
	s.Slips = append(s.Slips, other)
	r := study.Evaluate(s, study.Options{})
	if len(r.Differences) != 0 || !notice.Has(r.Notices, "models-stations") {
		t.Fatalf("differences %+v, notices %+v", r.Differences, r.Notices)
	}
	for _, n := range r.Notices {
		if n.Code == "models-stations" && !strings.Contains(n.Text, "share 3 of 4 stations") {
			t.Error(n.Text)
		}
	}
	s.Questions[0].Choices.CommonSet = true
	r = study.Evaluate(s, study.Options{})
	if len(r.Differences) != 1 || r.Differences[0].N != 3 || !r.Differences[0].Shared || r.Differences[0].Mean != -.5 {
		t.Errorf("differences %+v", r.Differences)
	}
}
