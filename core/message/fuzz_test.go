package message

import (
	"encoding/json"
	"testing"
)

// FuzzHandle: whatever comes in, as two requests of one session with an
// attached file, each answer is one JSON reply of our protocol, a refusal has
// a reason, and what was refused left the study as it was.
func FuzzHandle(f *testing.F) {
	for _, request := range []string{
		`{"protocol":1,"number":1,"kind":"about"}`,
		`{"protocol":1,"number":2,"kind":"drop","names":["a.csv"]}`,
		`{"protocol":1,"number":3,"kind":"set","target":{"kind":"question","id":"C1|drag coefficient","field":"choices.k"},"value":"1"}`,
		`{"protocol":1,"number":3,"kind":"set","target":{"kind":"slip","id":"s1","field":"x.column"},"value":"x"}`,
		`{"protocol":1,"number":4,"kind":"add item","target":{"kind":"condition","id":"C1|drag coefficient","field":""}}`,
		`{"protocol":1,"number":5,"kind":"compare","names":["a.csv","a.csv"],"compare":{"x":"x","y":"y","u":"5%","u_k":"2","u_interp":true}}`,
		`{"protocol":1,"number":6,"kind":"grids","names":["a.csv"],"grids":{"limits":true}}`,
		`{"protocol":1,"number":7,"kind":"memo","drawings":{"c1-grids":"<svg/>"}}`,
		`{"protocol":1,"number":8,"kind":"undo"}`, `{"protocol":2}`, `{"kind":7}`, `null`, `[`,
	} {
		f.Add([]byte(request), []byte("x,y\n1,2\n2,3\n3,5\n"))
	}
	f.Fuzz(func(t *testing.T, request, file []byte) {
		s := &Session{}
		s.start(Demo(), nil)
		for range 2 {
			before, err := s.study.Save()
			if err != nil {
				t.Fatal(err)
			}
			raw, files := s.Handle(request, [][]byte{file, file})
			var reply Reply
			if err := json.Unmarshal(raw, &reply); err != nil || reply.Protocol != Protocol {
				t.Fatalf("the reply is %q: %v", raw, err)
			}
			if len(files) != len(reply.Files) {
				t.Fatalf("%d files come with %d names", len(files), len(reply.Files))
			}
			if reply.Error == nil {
				continue
			}
			if reply.Error.Text == "" || reply.Status != Refused {
				t.Fatalf("a refusal without a reason: %+v", reply)
			}
			if after, err := s.study.Save(); err != nil || string(after) != string(before) {
				t.Fatalf("a refused request changed the study: %v", err)
			}
		}
	})
}
