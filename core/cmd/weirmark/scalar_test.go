package main

import (
	"os"
	"path/filepath"
	"strings"
	"testing"

	"weirmark/core/message"
	"weirmark/core/study"
)

// A study whose question asks for a scalar of its curves is evaluated without
// the page too: report, memo and stations hold it.
func TestRunAScalar(t *testing.T) {
	s := message.Demo()
	var id string
	for _, q := range s.Questions {
		if strings.Contains(q.Quantity, "pressure coefficient") && id == "" {
			id = q.Case + "|" + q.Quantity
		}
	}
	if err := s.AddItem(study.Target{Kind: study.ItemDerived, ID: id}, ""); err != nil {
		t.Fatal(err)
	}
	if err := s.Set(study.Target{Kind: "question", ID: id + ", scalar", Field: "derive.kind"}, "least value", "", ""); err != nil {
		t.Fatal(err)
	}
	data, err := s.Save()
	if err != nil {
		t.Fatal(err)
	}
	out := t.TempDir()
	status, printed, errs := call(t, map[string]string{"scalar.json": string(data)}, "run", "scalar.json", "--out", out)
	if status > 2 {
		t.Fatalf("status %d, %s", status, errs)
	}
	if !strings.Contains(printed, "(least value, taken from the curves)") {
		t.Errorf("the command prints %q", printed)
	}
	for name, want := range map[string]string{"report.json": `"kind": "least value"`, "memo.html": "Taken from the curves", "stations.csv": ", scalar"} {
		text, err := os.ReadFile(filepath.Join(out, name))
		if err != nil || !strings.Contains(string(text), want) {
			t.Errorf("%s: %v, without %q", name, err, want)
		}
	}
}
