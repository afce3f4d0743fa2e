package message

import (
	"encoding/json"
	"strings"
	"testing"

	"weirmark/core/study"
)

// TestSharedSourceUnderTheVeil: what one error of both sides leaves in E is a
// part of E, and is told with it only.
func TestSharedSourceUnderTheVeil(t *testing.T) {
	s := Demo()
	q := &s.Questions[0]
	q.Sources = append(q.Sources, study.Source{Name: "q of the tunnel", Of: study.OfData, Value: 10, Basis: study.OfReading, Coverage: study.Field{Value: "1", By: study.Entered}, Pattern: study.Common, Shared: true})
	r := study.Evaluate(s, study.Options{})
	for i := range r.Cells {
		c := &r.Cells[i]
		if c.Shared == nil {
			continue
		}
		for _, veiled := range []bool{false, true} {
			text, err := json.Marshal(courses(c, nil, veiled)[2])
			if err != nil {
				t.Fatal(err)
			}
			if told := strings.Contains(string(text), "left in E"); told == veiled {
				t.Errorf("veiled %v, told %v", veiled, told)
			}
		}
		return
	}
	t.Fatal("no cell with a source that acts on both sides")
}
