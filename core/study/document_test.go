package study_test

import (
	"bytes"
	"encoding/json"
	"strings"
	"testing"

	"weirmark/core/message"
	"weirmark/core/notice"
	"weirmark/core/study"
)

func saved(t *testing.T, s *study.Study) []byte {
	t.Helper()
	data, err := s.Save()
	if err != nil {
		t.Fatal(err)
	}
	return data
}

func TestSaveAndLoad(t *testing.T) {
	first := saved(t, message.Demo())
	s, notices, err := study.Load(first)
	if err != nil || len(notices) > 0 {
		t.Fatalf("loading the demo: %v, %v", err, notices)
	}
	if second := saved(t, s); !bytes.Equal(first, second) {
		t.Error("a saved study changes when it is loaded and saved again")
	}
}

// A field of a later edition is kept and told, not dropped.
func TestUnknownFieldsAreKept(t *testing.T) {
	data := bytes.Replace(saved(t, message.Demo()), []byte(`"title"`), []byte(`"mood": {"of": "day"}, "title"`), 1)
	s, notices, err := study.Load(data)
	if err != nil || !notice.Has(notices, "study-field") {
		t.Fatalf("%v, %v", err, notices)
	}
	again := saved(t, s)
	var fields map[string]any
	if err := json.Unmarshal(again, &fields); err != nil {
		t.Fatal(err)
	}
	if mood, ok := fields["mood"].(map[string]any); !ok || mood["of"] != "day" {
		t.Errorf("the unknown field became %v", fields["mood"])
	}
	if again2 := saved(t, mustLoad(t, again)); !bytes.Equal(again, again2) {
		t.Error("a study with an unknown field changes when it is saved again")
	}
}

func mustLoad(t *testing.T, data []byte) *study.Study {
	t.Helper()
	s, _, err := study.Load(data)
	if err != nil {
		t.Fatal(err)
	}
	return s
}

func TestLoadRefuses(t *testing.T) {
	for _, row := range []struct{ name, text, code string }{
		{"nothing", "", "study-format"},
		{"a list", "[1]", "study-format"},
		{"another document", `{"format":"letter"}`, "study-format"},
		{"a later edition", `{"format":"weirmark study","version":2}`, "study-newer"},
		{"a wrong type", `{"format":"weirmark study","version":1,"title":7}`, "study-damaged"},
		{"cut off", `{"format":"weirmark study",` + "\n" + `"version":1,`, "study-format"},
	} {
		_, _, err := study.Load([]byte(row.text))
		n, ok := err.(notice.Notice)
		if !ok || n.Code != row.code || n.Severity != notice.Stop {
			t.Errorf("%s: %v, want a stop notice %s", row.name, err, row.code)
		}
		if row.name == "cut off" && n.Line != 2 {
			t.Errorf("%s: line %d, want 2", row.name, n.Line)
		}
	}
}

// A hand-written document may leave out the choices.
func TestMissingChoicesTakeTheDefaults(t *testing.T) {
	s := mustLoad(t, []byte(`{"format":"weirmark study","version":1,"questions":[{"case":"C1","quantity":"q","choices":{"bounded":true}}]}`))
	c, d := s.Questions[0].Choices, study.DefaultChoices()
	if c.K != d.K || c.KNum != d.KNum || c.Formal != d.Formal || c.Dimension != d.Dimension || c.Interpolation != d.Interpolation {
		t.Errorf("choices %+v, want the defaults %+v", c, d)
	}
}

// Loading never panics; what it accepts can be evaluated and saved.
func FuzzLoad(f *testing.F) {
	data, err := message.Demo().Save()
	if err != nil {
		f.Fatal(err)
	}
	f.Add(data)
	f.Add([]byte(`{"format":"weirmark study","version":1,"slips":[{"id":"a","file":"none"}],"questions":[{}]}`))
	f.Add([]byte(`{"format":"weirmark study","version":1,"files":[{"id":"a","name":"a.csv","data":"eCx5CjEsMgo="}],"slips":[{"id":"a","file":"a","role":{"value":"simulation"},"y":{"column":{"value":"y"}}}],"questions":[{"case":"","quantity":""}]}`))
	f.Fuzz(func(t *testing.T, data []byte) {
		s, _, err := study.Load(data)
		if err != nil {
			if _, ok := err.(notice.Notice); !ok {
				t.Fatalf("the error %v is no notice", err)
			}
			return
		}
		report := study.Evaluate(s, study.Options{Alternatives: true})
		if _, err := json.Marshal(report); err != nil {
			t.Fatalf("the report cannot be written: %v", err)
		}
		first, err := s.Save()
		if err != nil {
			t.Fatal(err)
		}
		again, _, err := study.Load(first)
		if err != nil {
			t.Fatalf("a saved study cannot be loaded: %v", err)
		}
		if second, err := again.Save(); err != nil || !bytes.Equal(first, second) {
			t.Fatalf("saving twice differs: %v", err)
		}
	})
}

func TestOperationsAreLogged(t *testing.T) {
	s := message.Demo()
	q := "C1|drag coefficient"
	steps := []struct {
		do   func() error
		want string
	}{
		{func() error {
			return s.Set(study.Target{Kind: "question", ID: q, Field: "choices.k_num"}, "2", "09:00", "as the reviewer asked")
		}, "k_num of drag coefficient at C1: 1.15 → 2"},
		{func() error {
			return s.Set(study.Target{Kind: "question", ID: q, Field: "choices.rule"}, "least squares", "09:00", "")
		}, "rule of the grid study of drag coefficient at C1: three → least squares"},
		{func() error {
			return s.Set(study.Target{Kind: "question", ID: q, Field: "choices.rule"}, "three", "09:00", "")
		}, "rule of the grid study of drag coefficient at C1: least squares → three"},
		{func() error {
			return s.Set(study.Target{Kind: "question", ID: q, Field: "requirement.value"}, "4", "09:01", "")
		}, "requirement of drag coefficient at C1: 5 → 4"},
		{func() error {
			return s.Set(study.Target{Kind: "source", ID: q, Field: "0.value"}, "0.0005", "09:02", "")
		}, "value of balance calibration and corrections, drag coefficient at C1: 0.000393 → 0.0005"},
		{func() error {
			return s.Set(study.Target{Kind: "slip", ID: "s1", Field: "y.unit"}, "", "09:03", "")
		}, "unit of values of C1-balance.csv: 1 → (none)"},
		{func() error { return s.Set(study.Target{Kind: "study", Field: "title"}, "T", "09:04", "") }, "title: Strut fairing"},
		{func() error { return s.Reveal(q, "09:05") }, "Comparison of drag coefficient at C1 shown"},
		{func() error {
			return s.Set(study.Target{Kind: "question", ID: q, Field: "requirement.value"}, "6", "09:06", "")
		}, "requirement of drag coefficient at C1: 4 → 6"},
		{func() error {
			return s.AddSource(study.Target{Kind: "source", ID: q}, study.OfInput, "09:07")
		}, "A source of input uncertainty"},
		{func() error {
			return s.RemoveSource(study.Target{Kind: "source", ID: q, Field: "2"}, "09:08", "a slip of the hand")
		}, "Source source 3 of drag coefficient at C1 removed"},
	}
	for i, step := range steps {
		if err := step.do(); err != nil {
			t.Fatalf("%s: %v", step.want, err)
		}
		last := s.Log[len(s.Log)-1]
		if !strings.HasPrefix(last.What, step.want) || last.Number != i+1 || last.At == "" {
			t.Errorf("entry %+v, want %q", last, step.want)
		}
	}
	if s.Log[0].Why != "as the reviewer asked" || s.Log[0].Shown || !s.Log[8].Shown {
		t.Errorf("log %+v", s.Log)
	}
	if r := s.Questions[0].Requirement; !r.Late || r.Value != 6 {
		t.Errorf("a requirement changed after the comparison was shown is not late: %+v", r)
	}
}

func TestRefusedOperations(t *testing.T) {
	q := "C1|drag coefficient"
	for _, row := range []struct {
		target study.Target
		value  string
	}{
		{study.Target{Kind: "question", ID: q, Field: "choices.k"}, "two"},
		{study.Target{Kind: "question", ID: q, Field: "choices.k"}, "-1"},
		{study.Target{Kind: "question", ID: q, Field: "choices.dimension"}, "2.5"},
		{study.Target{Kind: "question", ID: q, Field: "choices.interpolation"}, "spline"},
		{study.Target{Kind: "question", ID: q, Field: "choices.rule"}, "best"},
		{study.Target{Kind: "question", ID: "nowhere", Field: "choices.k"}, "2"},
		{study.Target{Kind: "source", ID: q, Field: "9.value"}, "2"},
		{study.Target{Kind: "source", ID: q, Field: "0.value"}, "-2"},
		{study.Target{Kind: "source", ID: q, Field: "0.pattern"}, "striped"},
		{study.Target{Kind: "slip", ID: "s1", Field: "colour"}, "red"},
		{study.Target{Kind: "slip", ID: "s99", Field: "role"}, "reference"},
		{study.Target{}, "x"},
	} {
		s := message.Demo()
		before := saved(t, s)
		if err := s.Set(row.target, row.value, "", ""); err == nil {
			t.Errorf("%+v took %q", row.target, row.value)
		}
		if len(s.Log) > 0 || !bytes.Equal(before, saved(t, s)) {
			t.Errorf("a refused entry changed the study: %+v", row)
		}
	}
}
