package main

import (
	"bytes"
	"errors"
	"reflect"
	"strings"
	"testing"
)

// recordOf reads events written one a line as "action test output".
func recordOf(events ...string) *record {
	r := newRecord()
	for _, e := range events {
		r.line(e)
	}
	return r
}

func TestCount(t *testing.T) {
	const p = `"Package":"p"`
	for _, row := range []struct {
		name   string
		events []string
		want   tally
	}{
		{"passed", []string{
			`{"Action":"run",` + p + `,"Test":"TestA"}`,
			`{"Action":"pass",` + p + `,"Test":"TestA"}`,
			`{"Action":"pass",` + p + `}`,
		}, tally{passed: 1}},
		{"subtests count, their parent does not", []string{
			`{"Action":"pass",` + p + `,"Test":"TestA/x"}`,
			`{"Action":"fail",` + p + `,"Test":"TestA/y"}`,
			`{"Action":"fail",` + p + `,"Test":"TestA"}`,
			`{"Action":"fail",` + p + `}`,
		}, tally{passed: 1, failed: []string{"p TestA/y (native)"}}},
		{"a parent that fails by itself", []string{
			`{"Action":"pass",` + p + `,"Test":"TestA/x"}`,
			`{"Action":"fail",` + p + `,"Test":"TestA"}`,
			`{"Action":"fail",` + p + `}`,
		}, tally{passed: 1, failed: []string{"p TestA (native)"}}},
		{"skipped, with its reason", []string{
			`{"Action":"output",` + p + `,"Test":"TestA","Output":"=== RUN   TestA\n"}`,
			`{"Action":"output",` + p + `,"Test":"TestA","Output":"    a_test.go:3: no folder\n"}`,
			`{"Action":"output",` + p + `,"Test":"TestA","Output":"--- SKIP: TestA (0.00s)\n"}`,
			`{"Action":"skip",` + p + `,"Test":"TestA"}`,
			`{"Action":"pass",` + p + `}`,
		}, tally{skipped: []string{"p TestA (native): a_test.go:3: no folder"}}},
		{"a package that does not build", []string{
			`{"ImportPath":"p","Action":"build-output","Output":"a.go:1: undefined: x\n"}`,
			`{"Action":"fail",` + p + `,"FailedBuild":"p"}`,
		}, tally{failed: []string{"p (native)"}}},
		{"a test that never ends", []string{
			`{"Action":"run",` + p + `,"Test":"TestA"}`,
			`{"Action":"fail",` + p + `}`,
		}, tally{failed: []string{"p TestA (native): it never ended"}}},
		{"a package without tests", []string{
			`{"Action":"skip",` + p + `}`,
		}, tally{}},
	} {
		got := &tally{}
		recordOf(row.events...).count(got, native)
		if !reflect.DeepEqual(*got, row.want) {
			t.Errorf("%s: %+v, want %+v", row.name, *got, row.want)
		}
	}
}

func TestRecordKeepsTheRunnersLines(t *testing.T) {
	r := recordOf(
		`go: some usage error`,
		`{"Action":"output","Package":"p","Output":"ok  \tp\t0.1s\n"}`,
		`{"Action":"output","Package":"q","Output":"FAIL\tq [build failed]\n"}`,
	)
	if want := []string{"ok  \tp\t0.1s", "FAIL\tq [build failed]"}; !reflect.DeepEqual(r.closing, want) {
		t.Errorf("closing %q, want %q", r.closing, want)
	}
	if want := []string{"go: some usage error"}; !reflect.DeepEqual(r.loose, want) {
		t.Errorf("loose %q, want %q", r.loose, want)
	}
}

func TestClose(t *testing.T) {
	for _, row := range []struct {
		name   string
		tally  tally
		strict bool
		last   string
		status int
	}{
		{"all passed", tally{passed: 3}, true, "3 passed, 0 failed", 0},
		{"one failed", tally{passed: 3, failed: []string{"x"}}, false, "3 passed, 1 failed", 1},
		{"nothing ran", tally{}, false, "0 passed, 0 failed", 1},
		{"skipped at home", tally{passed: 3, skipped: []string{"x"}}, false, "3 passed, 0 failed, 1 skipped", 0},
		{"skipped where all must run", tally{passed: 3, skipped: []string{"x"}}, true, "3 passed, 0 failed, 1 skipped", 1},
	} {
		var out bytes.Buffer
		status := row.tally.close(&out, row.strict)
		printed := strings.Split(strings.TrimSpace(out.String()), "\n")
		if last := printed[len(printed)-1]; last != row.last || status != row.status {
			t.Errorf("%s: last line %q status %d, want %q %d", row.name, last, status, row.last, row.status)
		}
		for _, name := range append(row.tally.failed, row.tally.skipped...) {
			if !strings.Contains(out.String(), ": "+name+"\n") {
				t.Errorf("%s: %q is not named in %q", row.name, name, out.String())
			}
		}
	}
}

func TestSteps(t *testing.T) {
	seen := map[string]bool{}
	for _, s := range steps("./...", 0) {
		if s.name == "" || seen[s.name] || len(s.tools) == 0 || s.run == nil {
			t.Errorf("step %q: every step has a name of its own, tools and something to run", s.name)
		}
		seen[s.name] = true
	}
}

func TestMissing(t *testing.T) {
	for _, row := range []struct {
		tools []string
		want  string
	}{
		{[]string{"go"}, ""},
		{[]string{"go", "no-such-program"}, "no-such-program"},
		{[]string{"no/such/place"}, "no/such/place"},
	} {
		if got := missing(row.tools); got != row.want {
			t.Errorf("%v: %q, want %q", row.tools, got, row.want)
		}
	}
}

func TestCommand(t *testing.T) {
	got := &tally{}
	command(got, "a", "go", "version")
	command(got, "b", "go", "no-such-verb")
	if want := (tally{passed: 1, failed: []string{"b: exit status 2"}}); !reflect.DeepEqual(*got, want) {
		t.Errorf("%+v, want %+v", *got, want)
	}
}

func TestTakeCount(t *testing.T) {
	broken := errors.New("exit status 1")
	for _, row := range []struct {
		name, said string
		ended      error
		want       tally
	}{
		{"passed", "pass one\n2 passed, 0 failed\n", nil, tally{passed: 2}},
		{"one failed", "FAIL a: why\nfailed: a\n1 passed, 1 failed\n", broken, tally{passed: 1, failed: []string{"x: a"}}},
		{"one not run", "not run: b: no browser\n1 passed, 0 failed, 1 skipped\n", broken, tally{passed: 1, skipped: []string{"x: b: no browser"}}},
		{"no count", "Segmentation fault\n", broken, tally{failed: []string{"x: it did not count"}}},
		{"nothing said", "", nil, tally{failed: []string{"x: it did not count"}}},
		{"counted in the middle only", "1 passed, 0 failed\npanic\n", broken, tally{failed: []string{"x: it did not count"}}},
		{"a failure without a name", "1 passed, 1 failed\n", broken,
			tally{passed: 1, failed: []string{"x: it named 0 failed and 0 not run, and counted 1 passed, 1 failed"}}},
		{"a status without a failure", "1 passed, 0 failed\n", broken, tally{passed: 1, failed: []string{"x: exit status 1"}}},
	} {
		got := tally{}
		takeCount(&got, "x", row.said, row.ended)
		if !reflect.DeepEqual(got, row.want) {
			t.Errorf("%s: %+v, want %+v", row.name, got, row.want)
		}
	}
}

func TestOnlyDeadline(t *testing.T) {
	for _, row := range []struct {
		said string
		want bool
	}{
		{"--- FAIL: FuzzA (5.01s)\n    context deadline exceeded", true},
		{"--- FAIL: FuzzA\n    Failing input written to testdata/fuzz/FuzzA/1\ncontext deadline exceeded", false},
		{"panic: index out of range", false},
	} {
		if got := onlyDeadline(strings.Split(row.said, "\n")); got != row.want {
			t.Errorf("%q: %v, want %v", row.said, got, row.want)
		}
	}
}

func TestForeign(t *testing.T) {
	text := "first\npath /" + "work/main/core\nhost registry." + "npmjs.org\n"
	want := []string{"2: /" + "work/main", "3: registry." + "npmjs"}
	if got := foreign(text); !reflect.DeepEqual(got, want) {
		t.Errorf("%q, want %q", got, want)
	}
	if got := foreign("network, teamwork/maintenance"); got != nil {
		t.Errorf("%q in plain words", got)
	}
}

func TestWasmEnvironmentIsSmall(t *testing.T) {
	t.Setenv("SOMETHING_LONG", strings.Repeat("x", 20000))
	t.Setenv("WEIRMARK_SHARED", "/somewhere")
	size, shared := 0, false
	for _, variable := range wasm.environment() {
		size += len(variable)
		shared = shared || variable == "WEIRMARK_SHARED=/somewhere"
	}
	if size > 6000 || !shared {
		t.Errorf("%d bytes, WEIRMARK_SHARED kept: %v", size, shared)
	}
}
