package study_test

import (
	"math"
	"strings"
	"testing"

	"weirmark/core/study"
)

// A decimal comma is asked about; while no one has answered, no statement is
// made; the answer is kept with the file and the file is read by it.
func TestReaderQuestionsWithholdTheStatement(t *testing.T) {
	s := pair(rows(30, even, smooth), "x;y\n0,1;1,29\n0,4;1,93\n0,8;1,67\n", "m", "m")
	before := only(t, s)
	var target study.Target
	for _, o := range before.Open {
		if o.Target.Kind == "file" && o.Target.Field == "answer.decimal-comma" {
			target = o.Target
		}
	}
	if target.ID == "" || !before.Withheld {
		t.Fatalf("withheld %v, open %+v", before.Withheld, before.Open)
	}
	if err := s.Set(study.Target{Kind: "file", ID: "r", Field: "decimal"}, "comma", "09:00", ""); err != nil {
		t.Fatal(err)
	}
	after := only(t, s)
	if after.Withheld || math.Abs(float64(after.Stations[0].D)-1.29) > 1e-12 {
		t.Errorf("withheld %v, open %+v, stations %+v", after.Withheld, after.Open, after.Stations)
	}
	again := mustLoad(t, saved(t, s))
	if f := again.File("r"); f.ReadingValue("decimal") != "comma" || only(t, again).Withheld {
		t.Errorf("the answer was not kept: %+v", f.Reading)
	}
	if err := s.Set(target, "checked against the printout", "09:01", ""); err != nil {
		t.Fatal(err)
	}
	if err := s.Set(study.Target{Kind: "file", ID: "r", Field: "decimal"}, "", "09:02", ""); err != nil {
		t.Fatal(err)
	}
	answered := only(t, s)
	told := false
	for _, n := range answered.Notices {
		told = told || n.Code == "finding-answered" && strings.Contains(n.Text, "checked against the printout")
	}
	if answered.Withheld || !told {
		t.Errorf("withheld %v, notices %+v", answered.Withheld, answered.Notices)
	}
	for field, value := range map[string]string{"guides": "x", "colour": "red"} {
		if err := s.Set(study.Target{Kind: "file", ID: "r", Field: field}, value, "", ""); err == nil {
			t.Errorf("%s = %s was taken", field, value)
		}
	}
	if err := s.Set(study.Target{Kind: "file", ID: "r", Field: "decimal"}, "dots", "", ""); err != nil {
		t.Fatal(err)
	}
	if c := only(t, s); !c.Withheld {
		t.Error("an answer that the reader cannot follow is no stop")
	}
}
