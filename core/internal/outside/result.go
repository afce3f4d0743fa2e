package main

import (
	"bufio"
	"encoding/json"
	"fmt"
	"io"
	"os"
	"os/exec"
	"slices"
	"strings"
)

// state is what a check came to.
type state string

const (
	passed state = "passed"
	failed state = "failed"
	// notMade is a test that skipped itself, or any part of itself.
	notMade state = "not made"
)

// module is the path of the project, which stands before the folder of a
// package.
const module = "weirmark/"

// results runs the tests of the checks once, past the cache, and returns one
// state a check.
func results(checks []check) ([]state, error) {
	var names, folders []string
	for _, c := range checks {
		names = append(names, c.Test)
		folders = append(folders, "./"+c.folder())
	}
	slices.Sort(names)
	slices.Sort(folders)
	pattern := "^(" + strings.Join(slices.Compact(names), "|") + ")$"
	arguments := []string{"test", "-tags", "noasm", "-count=1", "-json", "-run", pattern}
	cmd := exec.Command("go", append(arguments, slices.Compact(folders)...)...)
	cmd.Stderr = os.Stderr
	out, err := cmd.StdoutPipe()
	if err != nil {
		return nil, err
	}
	if err := cmd.Start(); err != nil {
		return nil, err
	}
	// What failed stands in the events: a package that was not built, or ended
	// early, leaves its tests without a state, which counts as failed.
	states, err := decide(checks, out, os.Stdout)
	if ended := cmd.Wait(); err == nil && ended != nil && count(states, failed) == 0 {
		err = fmt.Errorf("go test: %w, though no check failed", ended)
	}
	return states, err
}

// event is one line of go test -json.
type event struct {
	Action  string
	Package string
	Test    string
	Output  string
}

// outcome is what the events say of one test with its subtests.
type outcome struct {
	action  string
	skipped bool
	output  strings.Builder
}

// decide reads the events of go test and returns one state a check; it copies
// what the failed ones said to log. A check passes where its test passed and
// no subtest was skipped. A test without an end failed, and so did one that
// was skipped though its row does not name the folder shared.
func decide(checks []check, events io.Reader, log io.Writer) ([]state, error) {
	outcomes := map[string]*outcome{}
	lines := bufio.NewReader(events)
	for {
		line, err := lines.ReadString('\n')
		take(outcomes, line, log)
		if err == io.EOF {
			break
		}
		if err != nil {
			return nil, fmt.Errorf("reading the events of go test: %w", err)
		}
	}
	states := make([]state, len(checks))
	for i, c := range checks {
		o := outcomes[module+c.folder()+" "+c.Test]
		switch {
		case o == nil:
			states[i] = failed
			fmt.Fprintf(log, "%s %s did not run\n", c.File, c.Test)
		case o.action == "pass" && !o.skipped:
			states[i] = passed
		case (o.action == "pass" || o.action == "skip") && c.Shared != "":
			states[i] = notMade
		default:
			states[i] = failed
			fmt.Fprint(log, o.output.String())
		}
	}
	return states, nil
}

// take notes one line of events; what is no event of a test and tells of a
// failed build goes to log.
func take(outcomes map[string]*outcome, line string, log io.Writer) {
	var e event
	if json.Unmarshal([]byte(line), &e) != nil {
		fmt.Fprint(log, line)
		return
	}
	if e.Test == "" {
		if e.Action == "build-output" {
			fmt.Fprint(log, e.Output)
		}
		return
	}
	test, _, below := strings.Cut(e.Test, "/")
	name := e.Package + " " + test
	o := outcomes[name]
	if o == nil {
		o = &outcome{}
		outcomes[name] = o
	}
	switch e.Action {
	case "output":
		o.output.WriteString(e.Output)
	case "skip":
		o.skipped = true
	}
	if !below && (e.Action == "pass" || e.Action == "fail" || e.Action == "skip") {
		o.action = e.Action
	}
}
