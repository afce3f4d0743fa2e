// Package golden compares results with committed files. A test that finds a
// difference shows it line by line; the flag -update writes the files anew,
// after which the difference is read before it is committed:
//
//	go test -tags noasm ./core/chart -update
package golden

import (
	"bytes"
	"flag"
	"fmt"
	"os"
	"path/filepath"
	"strings"
	"testing"
)

var update = flag.Bool("update", false, "write golden files anew")

// Compare fails the test where got is not, byte for byte, what the file of
// that name in the test's folder testdata/golden holds. A missing file fails.
func Compare(t testing.TB, name string, got []byte) {
	t.Helper()
	file := filepath.Join("testdata", "golden", filepath.FromSlash(name))
	if *update {
		if err := os.MkdirAll(filepath.Dir(file), 0o755); err != nil {
			t.Fatal(err)
		}
		if err := os.WriteFile(file, got, 0o644); err != nil {
			t.Fatal(err)
		}
		return
	}
	want, err := os.ReadFile(file)
	if err != nil {
		t.Fatalf("golden file: %v; with -update it is written", err)
	}
	if !bytes.Equal(got, want) {
		t.Errorf("%s differs (- committed, + now):\n%s", file, Difference(string(want), string(got)))
	}
}

// most is how many lines of a difference are shown.
const most = 40

// Difference returns the lines of want that are not in got, marked "-", and
// those of got that are not in want, marked "+", each with its number, between
// the first and the last line that differ.
func Difference(want, got string) string {
	old, now := strings.Split(want, "\n"), strings.Split(got, "\n")
	head := 0
	for head < min(len(old), len(now)) && old[head] == now[head] {
		head++
	}
	tail := 0
	for tail < min(len(old), len(now))-head && old[len(old)-1-tail] == now[len(now)-1-tail] {
		tail++
	}
	var b strings.Builder
	write := func(mark string, lines []string) {
		for i := head; i < len(lines)-tail; i++ {
			if i-head == most {
				fmt.Fprintf(&b, "%s and %d more lines\n", mark, len(lines)-tail-i)
				return
			}
			fmt.Fprintf(&b, "%s %d: %s\n", mark, i+1, lines[i])
		}
	}
	write("-", old)
	write("+", now)
	return b.String()
}
