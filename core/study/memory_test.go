package study_test

import (
	"bytes"
	"encoding/json"
	"testing"

	"weirmark/core/message"
	"weirmark/core/study"
)

// Whatever is changed, an evaluation with memory gives the bytes of a fresh
// one.
func TestMemoryChangesNothing(t *testing.T) {
	s := message.Demo()
	memory := &study.Memory{}
	steps := []func(){
		func() {},
		func() { s.Questions[0].Choices.KNum = 2 },
		func() { s.Questions[1].Choices.NumShared = true },
		func() { s.Slips[0].Role.By = study.Guessed },
		func() { s.Slips[0].Role.By = study.Accepted },
		func() { s.Questions[0].Sources[0].Value = .0005 },
		func() { s.Files[0].Data = append(append([]byte{}, s.Files[0].Data...), "6,0.0299\n"...) },
		func() { s.Files[0].SHA256 = study.Hash(s.Files[0].Data) },
		func() {
			s.Questions[0].Conditions = []study.Matching{{Name: "α", Unit: "°", Simulation: 4, Data: 4.2}}
		},
		func() { s.Application = []study.Condition{{Name: "α", Unit: "°", Value: 11}} },
		func() { s.Questions[0].Conditions[0].Data = 12 },
		func() { s.Cases = []study.Card{{Name: "C1"}} },
		func() { s.Questions[0].Answers = map[string]string{"monitor-missing": "x"} },
		func() { s.Questions[0].Excluded = []study.Exclusion{{Line: 3, Why: "y"}} },
		func() { s.Slips = s.Slips[:len(s.Slips)-1] },
		func() { s.Questions[0].Requirement = nil },
	}
	for i, step := range steps {
		step()
		kept, err := json.Marshal(study.Evaluate(s, study.Options{Alternatives: true, Memory: memory}))
		if err != nil {
			t.Fatal(err)
		}
		fresh, err := json.Marshal(study.Evaluate(s, study.Options{Alternatives: true}))
		if err != nil {
			t.Fatal(err)
		}
		if !bytes.Equal(kept, fresh) {
			t.Errorf("step %d: an evaluation with memory differs from a fresh one", i)
		}
	}
}
