package message

import (
	"encoding/json"
	"strings"
	"testing"
)

// ask sends one request to a session and returns the reply.
func ask(t *testing.T, s *Session, request string, attached ...[]byte) Reply {
	t.Helper()
	reply, _ := s.Handle([]byte(`{"protocol":1,"number":1,"at":"2026-09-01 08:00",`+request[1:]), attached)
	var r Reply
	if err := json.Unmarshal(reply, &r); err != nil {
		t.Fatal(err)
	}
	if r.Error != nil {
		t.Fatalf("%s: %s", request, r.Error.Text)
	}
	return r
}

// TestGroup drops four like tables, one with swapped columns, accepts the
// reading of one and takes it over; the odd one is told and left open.
func TestGroup(t *testing.T) {
	s := &Session{}
	usual := []byte("y [mm],u [m/s]\n0,0\n1,2\n2,3\n3,3.5\n")
	odd := []byte("u [m/s],y [mm]\n0,0\n2,1\n3,2\n3.5,3\n")
	r := ask(t, s, `{"kind":"drop","names":["C1-A-G1.csv","C1-A-G2.csv","C1-A-G3.csv","C1-A-G4.csv"]}`, usual, usual[:len(usual)-6], odd, append(usual, "4,3.6\n"...))
	cards := r.View.Slips
	if cards[2].Odd == "" || !strings.Contains(cards[2].Odd, "u [m/s], y [mm]") || !strings.Contains(cards[2].Odd, "3 like tables are y [mm], u [m/s]") {
		t.Fatalf("the odd table says %q", cards[2].Odd)
	}
	for i, c := range cards {
		if i != 2 && (c.Odd != "" || c.Group != cards[2].Group) {
			t.Errorf("%s: group %q, odd %q", c.Name, c.Group, c.Odd)
		}
	}
	before := openFields(r, 1)
	reply, _ := s.Handle([]byte(`{"protocol":1,"number":2,"kind":"accept like","target":{"kind":"slip","id":"s1","field":""}}`), nil)
	if !strings.Contains(string(reply), "while a guess of it is open") {
		t.Errorf("a reading with open guesses was taken over: %s", reply)
	}
	for _, e := range cards[0].Entries {
		if e.Open {
			r = ask(t, s, `{"kind":"accept","target":{"kind":"slip","id":"s1","field":"`+e.Target.Field+`"}}`)
		}
	}
	r = ask(t, s, `{"kind":"accept like","target":{"kind":"slip","id":"s1","field":""}}`)
	after := openFields(r, 1)
	for _, field := range []string{"role", "quantity", "x.column", "y.column"} {
		if !before[field] || after[field] {
			t.Errorf("%s of the second: open before %v, after %v", field, before[field], after[field])
		}
	}
	for _, field := range []string{"case", "model", "grid"} {
		if !after[field] {
			t.Errorf("%s of the second was accepted with the reading", field)
		}
	}
	if !openFields(r, 2)["y.column"] {
		t.Error("the odd table was read like the others")
	}
	r = ask(t, s, `{"kind":"set","target":{"kind":"study","id":"","field":"pattern"},"value":"case-model-grid"}`)
	if n := r.View.Names; n.Table == nil || len(n.Table.Rows) != 4 || n.Table.Rows[1][3] != "G2" {
		t.Fatalf("names: %+v", n)
	}
	r = ask(t, s, `{"kind":"accept names","value":"grid"}`)
	if after = openFields(r, 1); after["grid"] || !after["model"] {
		t.Errorf("open after the grids were accepted: %v", after)
	}
}

// openFields lists the open entries of a card.
func openFields(r Reply, card int) map[string]bool {
	open := map[string]bool{}
	for _, e := range r.View.Slips[card].Entries {
		open[e.Target.Field] = e.Open
	}
	return open
}

// TestMillimetres drops three files of which one is in millimetres under a
// header that says metres: the first view says so, before anything is accepted.
func TestMillimetres(t *testing.T) {
	metres := []byte("x [m],Cp\n0.00,1.0\n0.03,-0.8\n0.06,-0.6\n0.12,-0.3\n0.18,-0.1\n0.24,0.1\n")
	milli := []byte("x [m],Cp\n0,0.98\n24,-0.82\n60,-0.61\n120,-0.31\n180,-0.12\n240,0.11\n")
	for _, row := range []struct {
		name string
		a, b []byte
		told bool
	}{{"the test in millimetres", metres, milli, true}, {"the simulation in millimetres", milli, metres, true}, {"all in metres", metres, metres, false}} {
		s := &Session{}
		r := ask(t, s, `{"kind":"drop","names":["C1-A-G1.csv","C1-A-G2.csv","C1-test.csv"]}`, row.a, append(row.a, "0.25,0.12\n"...), row.b)
		told := strings.Join(r.View.Clashes, "\n")
		if found := strings.Contains(told, "illimetre"); found != row.told {
			t.Errorf("%s: told %v, want %v:\n%s", row.name, found, row.told, told)
		}
	}
}
