// Command check runs every check of the project and counts what ran.
//
// It is started by make test from the root of the repository. Each step prints
// the closing lines of its own runner; at the end stand the checks that did not
// run, by name, and one line "N passed, N failed" or "N passed, N failed,
// N skipped". Nothing is left out in silence: a missing tool and a test that
// skips itself are counted as skipped, and with CI=true they fail the run.
//
// It cannot tell whether the tests assert enough; it only sees that they ran.
package main

import (
	"flag"
	"fmt"
	"os"
	"os/exec"
	"strings"
	"time"
)

// step is one kind of check; tools are the programs it needs, on the path or by
// their place in the repository.
type step struct {
	name  string
	tools []string
	run   func(*tally)
}

// steps is the table of all checks, in the order in which they run: what is
// quick and most often wrong comes first.
func steps(packages string, fuzz time.Duration) []step {
	return []step{
		{"gofmt", []string{"gofmt"}, checkFormat},
		{"committed text", []string{"git"}, checkCommitted},
		{"TypeScript", []string{"node", compiler}, func(t *tally) { command(t, "TypeScript", compiler, "-p", "web") }},
		{"go vet", []string{"go"}, func(t *tally) { vet(t, native, packages) }},
		{"go vet, js/wasm", []string{"go"}, func(t *tally) { vet(t, wasm, packages) }},
		{"go test", []string{"go"}, func(t *tally) { test(t, native, packages) }},
		{"go test, js/wasm", []string{"go", "node", "bash"}, func(t *tally) { test(t, wasm, packages) }},
		{"front end", []string{"go", "node"}, func(t *tally) { counted(t, "front end", "node", "web/test/run.mjs") }},
		{"fuzz", []string{"go"}, func(t *tally) { fuzzAll(t, packages, fuzz) }},
	}
}

// compiler checks the types of the front end; npm ci in web puts it there.
const compiler = "web/node_modules/.bin/tsc"

func main() {
	only := flag.String("only", "", "run only the steps whose name contains this text")
	packages := flag.String("packages", "./...", "Go packages to check, as a pattern")
	fuzz := flag.Duration("fuzz", 4*time.Second, "time for each fuzz target")
	flag.Parse()

	total := &tally{}
	for _, s := range steps(*packages, *fuzz) {
		if !strings.Contains(s.name, *only) {
			continue
		}
		fmt.Printf("\n== %s\n", s.name)
		t := &tally{}
		start := time.Now()
		if tool := missing(s.tools); tool != "" {
			t.skip(s.name + ": " + tool + " is not there")
		} else {
			s.run(t)
		}
		fmt.Printf("== %s: %s (%.0f s)\n", s.name, t.counts(), time.Since(start).Seconds())
		total.add(t)
	}
	os.Exit(total.close(os.Stdout, os.Getenv("CI") == "true"))
}

// missing returns the first of the tools that is not on the path, or "".
func missing(tools []string) string {
	for _, tool := range tools {
		if _, err := exec.LookPath(tool); err != nil {
			return tool
		}
	}
	return ""
}
