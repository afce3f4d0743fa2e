package golden

import "testing"

func TestDifference(t *testing.T) {
	for _, row := range []struct{ name, want, got, difference string }{
		{"the same", "a\nb", "a\nb", ""},
		{"a line changed", "a\nb\nc", "a\nx\nc", "- 2: b\n+ 2: x\n"},
		{"a line more", "a\nc", "a\nb\nc", "+ 2: b\n"},
		{"a line less", "a\nb\nc", "a\nc", "- 2: b\n"},
		{"a line twice", "a\na", "a", "- 2: a\n"},
		{"empty before", "", "a", "- 1: \n+ 1: a\n"},
	} {
		if difference := Difference(row.want, row.got); difference != row.difference {
			t.Errorf("%s: %q, want %q", row.name, difference, row.difference)
		}
	}
}

// watcher stands in for a test and keeps what Compare says.
type watcher struct {
	testing.TB
	failed bool
}

func (w *watcher) Helper()               {}
func (w *watcher) Errorf(string, ...any) { w.failed = true }

func TestCompare(t *testing.T) {
	if *update {
		t.Fatal("this package has a fixed file: run it without -update")
	}
	for _, row := range []struct {
		got    string
		failed bool
	}{
		{"one\ntwo\n", false},
		{"one\ntwo", true},
		{"one\nthree\n", true},
	} {
		w := &watcher{TB: t}
		Compare(w, "two-lines.txt", []byte(row.got))
		if w.failed != row.failed {
			t.Errorf("%q: failed %v, want %v", row.got, w.failed, row.failed)
		}
	}
}
