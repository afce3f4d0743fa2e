package message

import (
	"testing"

	"weirmark/core/study"
)

// BenchmarkDemoView is what a page waits for after every change.
func BenchmarkDemoView(b *testing.B) {
	s := &Session{}
	s.start(Demo(), nil)
	for b.Loop() {
		if _, err := s.view(); err != nil {
			b.Fatal(err)
		}
	}
}

// BenchmarkDemoEvaluate is the evaluation alone.
func BenchmarkDemoEvaluate(b *testing.B) {
	s := &Session{}
	s.start(Demo(), nil)
	for b.Loop() {
		study.Evaluate(s.study, study.Options{Read: s.readOnce, Alternatives: true})
	}
}

// BenchmarkChange is one changed coverage factor in the whole campaign.
func BenchmarkChange(b *testing.B) {
	s := &Session{}
	s.start(DemoWorked(), nil)
	if _, err := s.view(); err != nil {
		b.Fatal(err)
	}
	k := 2.0
	for b.Loop() {
		k = 3 - k
		s.study.Questions[0].Choices.K = k
		if _, err := s.view(); err != nil {
			b.Fatal(err)
		}
	}
}
