package main

import (
	"fmt"
	"io"
)

// tally counts checks and keeps the names of those that failed or did not run.
type tally struct {
	passed  int
	failed  []string
	skipped []string
}

func (t *tally) pass(n int)       { t.passed += n }
func (t *tally) fail(name string) { t.failed = append(t.failed, name) }
func (t *tally) skip(name string) { t.skipped = append(t.skipped, name) }

// add counts what another tally counted.
func (t *tally) add(other *tally) {
	t.passed += other.passed
	t.failed = append(t.failed, other.failed...)
	t.skipped = append(t.skipped, other.skipped...)
}

// counts returns "N passed, N failed", and ", N skipped" where some were.
func (t *tally) counts() string {
	text := fmt.Sprintf("%d passed, %d failed", t.passed, len(t.failed))
	if len(t.skipped) > 0 {
		text += fmt.Sprintf(", %d skipped", len(t.skipped))
	}
	return text
}

// close prints the names and, as the last line, the counts. It returns the exit
// status: 1 where a check failed, where none passed, or where one was left out
// although everything must run (strict).
func (t *tally) close(out io.Writer, strict bool) int {
	fmt.Fprintln(out)
	for _, name := range t.skipped {
		fmt.Fprintln(out, "not run:", name)
	}
	for _, name := range t.failed {
		fmt.Fprintln(out, "failed:", name)
	}
	status := 0
	if len(t.failed) > 0 || t.passed == 0 {
		status = 1
	}
	if strict && len(t.skipped) > 0 {
		fmt.Fprintln(out, "CI=true: a check that did not run fails the run")
		status = 1
	}
	fmt.Fprintln(out, t.counts())
	return status
}
