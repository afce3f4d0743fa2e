package main

import (
	"os/exec"
	"regexp"
	"strconv"
	"strings"
)

// command passes where a program of another kind ends with status 0.
func command(t *tally, name, program string, arguments ...string) {
	if _, err := show(exec.Command(program, arguments...)); err != nil {
		t.fail(name + ": " + err.Error())
		return
	}
	t.pass(1)
}

// counted runs a program that counts for itself, in the manner of this one:
// "not run: NAME" and "failed: NAME" on lines of their own, and at the end
// "N passed, N failed" with ", N skipped" where some were.
func counted(t *tally, name, program string, arguments ...string) {
	said, err := show(exec.Command(program, arguments...))
	takeCount(t, name, said, err)
}

var countLine = regexp.MustCompile(`^(\d+) passed, (\d+) failed(?:, (\d+) skipped)?$`)

// takeCount adds what a program said of itself. What does not fit together, a
// count and its names or its status, is a failure.
func takeCount(t *tally, name, said string, ended error) {
	lines := strings.Split(strings.TrimSpace(said), "\n")
	count := countLine.FindStringSubmatch(lines[len(lines)-1])
	if count == nil {
		t.fail(name + ": it did not count")
		return
	}
	before := *t
	for _, line := range lines {
		if what, ok := strings.CutPrefix(line, "not run: "); ok {
			t.skip(name + ": " + what)
		} else if what, ok := strings.CutPrefix(line, "failed: "); ok {
			t.fail(name + ": " + what)
		}
	}
	failed, skipped := len(t.failed)-len(before.failed), len(t.skipped)-len(before.skipped)
	t.pass(atoi(count[1]))
	if failed != atoi(count[2]) || skipped != atoi(count[3]) {
		t.fail(name + ": it named " + strconv.Itoa(failed) + " failed and " + strconv.Itoa(skipped) + " not run, and counted " + count[0])
	} else if ended != nil && failed+skipped == 0 {
		t.fail(name + ": " + ended.Error())
	}
}

// atoi reads a count; the blank one is zero.
func atoi(digits string) int {
	n, _ := strconv.Atoi(digits)
	return n
}
