package main

import (
	"fmt"
	"strings"
	"time"
)

// fuzzAll runs every fuzz target of the packages for a short time. Their seeds
// run as plain tests as well; this looks a little beyond them each time.
func fuzzAll(t *tally, pattern string, each time.Duration) {
	packages, err := native.packages(pattern)
	if err != nil {
		t.fail("fuzz: the packages could not be listed")
		return
	}
	found := 0
	for _, name := range packages {
		targets, err := fuzzTargets(name)
		if err != nil {
			t.fail("fuzz: listing the targets of " + name)
			continue
		}
		found += len(targets)
		for _, target := range targets {
			fuzz(t, name, target, each)
		}
	}
	if found == 0 {
		t.fail("fuzz: no target was found")
	}
}

// fuzzTargets returns the names of the fuzz targets of a package.
func fuzzTargets(name string) ([]string, error) {
	var targets, said []string
	err := lines(native.command("test", "-list", "^Fuzz", name), func(line string) {
		said = append(said, line)
		if strings.HasPrefix(line, "Fuzz") {
			targets = append(targets, line)
		}
	})
	if err != nil {
		fmt.Println(strings.Join(said, "\n"))
	}
	return targets, err
}

// fuzz runs one target. The runner at times reports its own time limit as a
// failure, with no failing input: that says nothing about the code, so the target
// is run once more, and the second answer counts.
func fuzz(t *tally, name, target string, each time.Duration) {
	for attempt := 1; ; attempt++ {
		var said []string
		cmd := native.command("test", "-run", "^$", "-fuzz", "^"+target+"$", "-fuzztime", each.String(), name)
		err := lines(cmd, func(line string) { said = append(said, line) })
		if err == nil {
			fmt.Println(target, "-", executions(said))
			fmt.Println(said[len(said)-1])
			t.pass(1)
			return
		}
		fmt.Println(strings.Join(said, "\n"))
		if attempt > 1 || !onlyDeadline(said) {
			t.fail("fuzz " + name + " " + target)
			return
		}
		fmt.Println(target, "- the runner's time limit, no failing input: run again")
	}
}

// onlyDeadline says whether the runner met its own time limit and nothing else.
func onlyDeadline(said []string) bool {
	text := strings.Join(said, "\n")
	return strings.Contains(text, "context deadline exceeded") && !strings.Contains(text, "Failing input written to")
}

// executions returns the last progress line of a fuzz run.
func executions(said []string) string {
	for i := len(said) - 1; i >= 0; i-- {
		if strings.HasPrefix(said[i], "fuzz: elapsed") {
			return strings.TrimPrefix(said[i], "fuzz: ")
		}
	}
	return "no progress line"
}
