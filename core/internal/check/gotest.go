package main

import (
	"encoding/json"
	"fmt"
	"os/exec"
	"path/filepath"
	"sort"
	"strings"
)

// event is one line of go test -json.
type event struct {
	Action     string
	Package    string
	ImportPath string
	Test       string
	Output     string
}

// result is what one test, or one package under the name "", came to.
type result struct {
	action string
	output []string
}

// record collects the events of one run of go test.
type record struct {
	packages map[string]map[string]*result
	// closing are the runner's own last lines, one a package.
	closing []string
	// loose is output that belongs to no package: a failed build, a usage error.
	loose []string
}

func newRecord() *record { return &record{packages: map[string]map[string]*result{}} }

// line takes in one line of output.
func (r *record) line(text string) {
	var e event
	if json.Unmarshal([]byte(text), &e) != nil || e.Action == "" {
		r.loose = append(r.loose, text)
		return
	}
	if e.Action == "build-output" {
		r.loose = append(r.loose, strings.TrimSuffix(e.Output, "\n"))
		return
	}
	if e.Package == "" {
		return
	}
	tests := r.packages[e.Package]
	if tests == nil {
		tests = map[string]*result{}
		r.packages[e.Package] = tests
	}
	test := tests[e.Test]
	if test == nil {
		test = &result{}
		tests[e.Test] = test
	}
	switch e.Action {
	case "pass", "fail", "skip":
		test.action = e.Action
	case "output":
		output := strings.TrimSuffix(e.Output, "\n")
		test.output = append(test.output, output)
		if e.Test == "" && isClosing(output) {
			r.closing = append(r.closing, output)
		}
	}
}

func isClosing(output string) bool {
	return strings.HasPrefix(output, "ok  \t") || strings.HasPrefix(output, "FAIL\t") || strings.HasPrefix(output, "?   \t")
}

// count adds the tests to the tally. A test that has subtests counts only
// where it did not pass and none of them says so; a package counts only where
// it failed without a failed test.
func (r *record) count(t *tally, on target) {
	for _, name := range keys(r.packages) {
		tests := r.packages[name]
		for _, test := range keys(tests) {
			one := tests[test]
			label := strings.TrimSpace(name+" "+test) + " (" + on.name + ")"
			if test == "" {
				if one.action == "fail" && !has(tests, "", "fail") {
					t.fail(label)
				}
				continue
			}
			parent := hasSubtests(tests, test)
			switch one.action {
			case "pass":
				if !parent {
					t.pass(1)
				}
			case "skip":
				t.skip(label + ": " + strings.TrimSpace(strings.Join(reason(one.output), " ")))
			case "fail":
				if !parent || !has(tests, test+"/", "fail") {
					t.fail(label)
				}
			default:
				t.fail(label + ": it never ended")
			}
		}
	}
}

// hasSubtests says whether a test has tests below it.
func hasSubtests(tests map[string]*result, test string) bool {
	for name := range tests {
		if strings.HasPrefix(name, test+"/") {
			return true
		}
	}
	return false
}

// has says whether a test whose name begins with the prefix came to the action,
// or never ended and thus failed.
func has(tests map[string]*result, prefix, action string) bool {
	for name, one := range tests {
		if name != "" && strings.HasPrefix(name, prefix) && (one.action == action || one.action == "") {
			return true
		}
	}
	return false
}

// reason keeps what a test said itself, without the runner's marks.
func reason(output []string) []string {
	var said []string
	for _, line := range output {
		trimmed := strings.TrimSpace(line)
		if !strings.HasPrefix(trimmed, "===") && !strings.HasPrefix(trimmed, "---") {
			said = append(said, trimmed)
		}
	}
	return said
}

// print shows what failed in full, then the closing lines.
func (r *record) print() {
	for _, line := range r.loose {
		fmt.Println(line)
	}
	for _, name := range keys(r.packages) {
		tests := r.packages[name]
		for _, test := range keys(tests) {
			if action := tests[test].action; action == "fail" || action == "" {
				for _, line := range tests[test].output {
					if !isClosing(line) {
						fmt.Println(line)
					}
				}
			}
		}
	}
	for _, line := range r.closing {
		fmt.Println(line)
	}
}

// test runs the tests of the packages on the target.
func test(t *tally, on target, pattern string) {
	packages, err := on.packages(pattern)
	if err != nil {
		t.fail("go test " + on.name + ": the packages could not be listed")
		return
	}
	arguments := []string{"-json"}
	if on.wasm {
		root, err := exec.Command("go", "env", "GOROOT").Output()
		if err != nil {
			t.fail("go test " + on.name + ": go env GOROOT: " + err.Error())
			return
		}
		start := filepath.Join(strings.TrimSpace(string(root)), "lib", "wasm", "go_js_wasm_exec")
		arguments = append(arguments, "-exec", start)
	}
	r := newRecord()
	err = lines(on.command("test", append(arguments, packages...)...), r.line)
	r.print()
	r.count(t, on)
	if err != nil && len(t.failed) == 0 {
		t.fail("go test " + on.name + ": " + err.Error())
	}
}

func keys[V any](m map[string]V) []string {
	names := make([]string, 0, len(m))
	for name := range m {
		names = append(names, name)
	}
	sort.Strings(names)
	return names
}
