package tablefile

import (
	"bytes"
	"runtime"
	"strings"
	"testing"

	"weirmark/core/notice"
)

// TestLongLines reads files that are one line of 8 MB, each of another kind,
// and holds what that costs to a few times the size of the file.
func TestLongLines(t *testing.T) {
	const size = 8 << 20
	for _, c := range []struct{ name, unit, code string }{
		{"numbers by commas", "1,", "columns-many"},
		{"numbers by blanks", "1 ", "columns-many"},
		{"one number", "1", ""},
		{"one word", "a", "file-empty"},
		{"words", "ab ", "file-empty"},
		{"words by commas", "ab,", "file-empty"},
		{"a quote that never closes", "\"a,", ""},
		{"statements", "a: b ", "file-empty"},
		{"blanks", " ", "file-empty"},
		{"one comment", "#", "file-empty"},
		{"nested objects", "{", "profile-damaged"},
		{"repeat counts", "9*1 ", ""},
	} {
		data := []byte(strings.Repeat(c.unit, size/len(c.unit)))
		var before, after runtime.MemStats
		runtime.ReadMemStats(&before)
		f := Read(c.name, data, Options{})
		runtime.ReadMemStats(&after)
		if c.code != "" && !notice.Has(f.Notices, c.code) {
			t.Errorf("%s: %d tables, notices %.300v", c.name, len(f.Tables), f.Notices)
		}
		if spent := after.TotalAlloc - before.TotalAlloc; spent > 4*size {
			t.Errorf("%s: %d MB were spent on %d MB", c.name, spent>>20, size>>20)
		}
	}
}

// TestHugeLines refuses a line of 200 MB and one of a million columns with a
// reason, and spends little memory on them.
func TestHugeLines(t *testing.T) {
	for _, c := range []struct {
		name string
		size int
	}{{"200 MB", 200 << 20}, {"a million columns", 2_000_000}} {
		data := bytes.Repeat([]byte("1,"), c.size/2)
		var before, after runtime.MemStats
		runtime.ReadMemStats(&before)
		f := Read(c.name, data, Options{})
		runtime.ReadMemStats(&after)
		if !f.Refused() || !notice.Has(f.Notices, "columns-many") {
			t.Errorf("%s: %d tables, %.300v", c.name, len(f.Tables), f.Notices)
		}
		if spent := after.TotalAlloc - before.TotalAlloc; spent > 4<<20 {
			t.Errorf("%s: %d bytes were spent", c.name, spent)
		}
	}
}
