package message

import (
	"strings"
	"testing"
)

// TestUnevenRowsAreShownAndAnswered drops a file with rows of another number of
// columns and a zone short of its count: the card shows the rows and offers the
// answers, and with them the file asks no more and the memo says what was done.
func TestUnevenRowsAreShownAndAnswered(t *testing.T) {
	for _, row := range []struct{ name, text, field, answer, shown, done string }{
		{"C1-A.csv", "x,y\n0,1\n0.5\n1,2\n1.5,3,4\n2,3\n", "uneven", "leave out", `line 3 "0.5", line 5 "1.5,3,4"`, `were left out, as stated: line 3 "0.5", line 5 "1.5,3,4"`},
		{"C1-B.dat", "VARIABLES = x y\nZONE T=\"a\" I=4\n0 1\n1 2\n2 3\n", "zones", "as found", `"a" announces 4 points, 3 were found`, `announces 4 points; the 3 that were found were used, as stated`},
	} {
		s := &Session{}
		r := ask(t, s, `{"kind":"drop","names":["`+row.name+`"]}`, []byte(row.text))
		entry := func() (Entry, string) {
			told := ""
			var found Entry
			for _, e := range r.View.Files[0].Reading {
				told += e.Label + "\n"
				if e.Target.Field == row.field {
					found = e
				}
			}
			return found, told
		}
		e, told := entry()
		if e.Value != "" || len(e.Options) != 2 || e.Options[1].Value != row.answer || !strings.Contains(told, row.shown) {
			t.Errorf("%s: %+v\n%s", row.name, e, told)
			continue
		}
		r = ask(t, s, `{"kind":"set","target":{"kind":"file","id":"`+e.Target.ID+`","field":"`+row.field+`"},"value":"`+row.answer+`"}`)
		if e, told = entry(); e.Value != row.answer || strings.Contains(told, row.shown) {
			t.Errorf("%s answered: %+v\n%s", row.name, e, told)
		}
		pages, err := writeMemo(s, &Request{}, nil, &Reply{})
		if err != nil {
			t.Fatal(err)
		}
		if memo := plainText(string(pages[0])); !strings.Contains(memo, row.done) {
			t.Errorf("%s: the memo does not say %q", row.name, row.done)
		}
	}
}
