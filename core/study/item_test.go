package study_test

import (
	"math"
	"testing"

	"weirmark/core/message"
	"weirmark/core/study"
)

// Conditions, regions, the point of application and the density of a case
// are entered field by field, as on the page, and do what they say.
func TestItems(t *testing.T) {
	s := message.Demo()
	const q = "C1|drag coefficient"
	do := func(err error) {
		t.Helper()
		if err != nil {
			t.Fatal(err)
		}
	}
	set := func(kind, id, field, value string) {
		t.Helper()
		do(s.Set(study.Target{Kind: kind, ID: id, Field: field}, value, "09:00", ""))
	}
	do(s.AddItem(study.Target{Kind: study.ItemCondition, ID: q}, "09:00"))
	for field, value := range map[string]string{"name": "α", "unit": "°", "simulation": "4", "data": "4.2", "sensitivity": "0.001", "handling": study.Corrected} {
		set(study.ItemCondition, q, "0."+field, value)
	}
	do(s.AddItem(study.Target{Kind: study.ItemApplication}, "09:00"))
	set(study.ItemApplication, "", "0.name", "α")
	set(study.ItemApplication, "", "0.unit", "°")
	set(study.ItemApplication, "", "0.value", "11")
	do(s.AddItem(study.Target{Kind: study.ItemReference, ID: "C1"}, "09:00"))
	set(study.ItemReference, "C1", "0.symbol", "rho")
	set(study.ItemReference, "C1", "0.value", "1.196")
	set("question", q, "scores.fraction", "0.25")
	c := study.Evaluate(s, study.Options{}).Cells[1]
	if math.Abs(float64(c.Stations[0].S)-.03015) > 1e-12 || c.Application == nil || !c.Application.Outside || s.Cases[0].References[0].Value != 1.196 {
		t.Errorf("S %v, application %+v, cases %+v", c.Stations[0].S, c.Application, s.Cases)
	}
	do(s.RemoveItem(study.Target{Kind: study.ItemCondition, ID: q, Field: "0"}, "09:01", "not needed"))
	do(s.RemoveItem(study.Target{Kind: study.ItemApplication, Field: "0"}, "09:01", ""))
	do(s.RemoveItem(study.Target{Kind: study.ItemReference, ID: "C1", Field: "0"}, "09:01", ""))
	if len(s.Questions[0].Conditions)+len(s.Application)+len(s.Cases[0].References) != 0 {
		t.Errorf("%+v", s)
	}
	for _, bad := range []study.Target{{Kind: study.ItemCondition, ID: q, Field: "7.name"}, {Kind: study.ItemRegion, ID: "nowhere", Field: "0.from"}, {Kind: study.ItemReference, ID: "C1", Field: "0.colour"}} {
		if err := s.Set(bad, "1", "", ""); err == nil {
			t.Errorf("%+v was taken", bad)
		}
	}
}
