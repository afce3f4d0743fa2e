package main

import (
	"bytes"
	"os"
	"path/filepath"
	"regexp"
	"slices"
	"strings"
	"testing"

	"weirmark/core/internal/reference"
)

// file returns the bytes of a file of the repository.
func file(t *testing.T, name string) []byte {
	t.Helper()
	data, err := os.ReadFile(filepath.Join(reference.Root(t), filepath.FromSlash(name)))
	if err != nil {
		t.Fatal(err)
	}
	return data
}

// committed returns the checks and the states that stand on the page.
func committed(t *testing.T) ([]check, []state) {
	t.Helper()
	checks, err := read(file(t, list))
	if err != nil {
		t.Fatal(err)
	}
	_, table, found := strings.Cut(string(file(t, page)), "\n## Checks\n")
	if !found {
		t.Fatal("no chapter Checks")
	}
	var states []state
	for _, row := range regexp.MustCompile(`(?m)^\| [^|]* \| (passed|failed|not made) \|`).FindAllStringSubmatch(table, -1) {
		states = append(states, state(row[1]))
	}
	return checks, states
}

// TestPageIsMade: the committed page is what its rows and its states make, and
// no check on it was left out.
func TestPageIsMade(t *testing.T) {
	checks, states := committed(t)
	made, err := render(checks, states)
	if err != nil {
		t.Fatalf("%v: go run -tags noasm ./core/internal/outside -write", err)
	}
	if want := file(t, page); !bytes.Equal(made, want) {
		t.Errorf("the page differs (- committed, + from checks.csv): go run -tags noasm ./core/internal/outside -write\n%s",
			difference(string(want), string(made)))
	}
	if slices.Contains(states, notMade) {
		t.Error("the page holds a check that was not made")
	}
}

// TestEveryTestExists: each row names a test that stands in its file, and no
// two rows are the same.
func TestEveryTestExists(t *testing.T) {
	checks, _ := committed(t)
	if len(checks) < 60 {
		t.Errorf("only %d checks", len(checks))
	}
	seen := map[string]bool{}
	for _, c := range checks {
		if !strings.Contains(string(file(t, c.File)), "\nfunc "+c.Test+"(t *testing.T) {") {
			t.Errorf("%s has no %s", c.File, c.Test)
		}
		if seen[c.What] {
			t.Errorf("two rows for %q", c.What)
		}
		seen[c.What] = true
	}
}

// TestEveryFileIsListed: the page names every file of its folder and none that
// is not there.
func TestEveryFileIsListed(t *testing.T) {
	_, rest, found := strings.Cut(string(file(t, page)), "\n## Files\n")
	files, _, found2 := strings.Cut(rest, "\n## Checks\n")
	if !found || !found2 {
		t.Fatal("no chapters Files and Checks")
	}
	var listed, there []string
	for _, row := range regexp.MustCompile(`(?m)^\| (\S+\.\S+) \|`).FindAllStringSubmatch(files, -1) {
		listed = append(listed, row[1])
	}
	entries, err := os.ReadDir(filepath.Join(reference.Root(t), folder))
	if err != nil {
		t.Fatal(err)
	}
	for _, entry := range entries {
		if name := entry.Name(); name != filepath.Base(page) && !entry.IsDir() {
			there = append(there, name)
		}
	}
	slices.Sort(listed)
	slices.Sort(there)
	if !slices.Equal(listed, there) {
		t.Errorf("listed %v\nin the folder %v", listed, there)
	}
}

// sample returns checks of one file, named by their tests; those whose name
// ends in S read the folder shared.
func sample(tests ...string) []check {
	var checks []check
	for _, test := range tests {
		c := check{What: test, Printed: "1.5", Here: "1.53", Difference: "none", Source: "invented", Mark: "exact", File: "core/metric/a_test.go", Test: test}
		if strings.HasSuffix(test, "S") {
			c.Shared = "yes"
		}
		checks = append(checks, c)
	}
	return checks
}

func TestDecide(t *testing.T) {
	events := strings.Join([]string{
		`{"Action":"run","Package":"weirmark/core/metric","Test":"TestA"}`,
		`{"Action":"pass","Package":"weirmark/core/metric","Test":"TestA"}`,
		`{"Action":"output","Package":"weirmark/core/metric","Test":"TestB","Output":"B said 2\n"}`,
		`{"Action":"fail","Package":"weirmark/core/metric","Test":"TestB"}`,
		`{"Action":"skip","Package":"weirmark/core/metric","Test":"TestCS"}`,
		`{"Action":"skip","Package":"weirmark/core/metric","Test":"TestD"}`,
		`{"Action":"skip","Package":"weirmark/core/metric","Test":"TestES/part"}`,
		`{"Action":"pass","Package":"weirmark/core/metric","Test":"TestES"}`,
		`{"Action":"run","Package":"weirmark/core/metric","Test":"TestF"}`,
		`{"Action":"pass","Package":"weirmark/core/metric","Test":"TestF/part"}`,
		`{"Action":"pass","Package":"weirmark/core/flow","Test":"TestG"}`,
		`{"Action":"build-output","ImportPath":"weirmark/core/flow","Output":"undefined: x\n"}`,
		`{"Action":"fail","Package":"weirmark/core/metric"}`,
	}, "\n")
	var log bytes.Buffer
	got, err := decide(sample("TestA", "TestB", "TestCS", "TestD", "TestES", "TestF", "TestG"), strings.NewReader(events), &log)
	if err != nil {
		t.Fatal(err)
	}
	// D is skipped for no reason that its row knows, F never ended, and G ran
	// in another package only.
	if want := []state{passed, failed, notMade, failed, notMade, failed, failed}; !slices.Equal(got, want) {
		t.Errorf("states %q, want %q", got, want)
	}
	if want := "undefined: x\nB said 2\ncore/metric/a_test.go TestG did not run\n"; log.String() != want {
		t.Errorf("log %q, want %q", log.String(), want)
	}
}

func TestRender(t *testing.T) {
	checks := sample("TestA", "TestB", "TestCS")
	checks[0].Mark = "memory"
	checks[1].Mark, checks[1].Difference = "memory, scipy", "the source cuts 1.53"
	got, err := render(checks, []state{passed, failed, notMade})
	if err != nil {
		t.Fatal(err)
	}
	for _, want := range []string{
		"\n**3 checks: 1 passed, 1 failed, 1 not made; 1 need the folder shared, 1 rest on memory alone, 1 state a known difference or limit.**\n",
		"\n| memory | written from memory; the test says so beside it | 2 | 1 |\n",
		"\n| exact | no published number: a published formula on a case that can be solved exactly | 1 | 0 |\n",
		"\n| TestB | failed | 1.5 | 1.53 | the source cuts 1.53 | invented | memory, scipy | core/metric/a_test.go TestB |\n",
		"\n| TestCS (folder shared) | not made | 1.5 | 1.53 | none | invented | exact | core/metric/a_test.go TestCS |\n",
	} {
		if !strings.Contains(string(got), want) {
			t.Errorf("the page lacks %q", want)
		}
	}
	if _, err := render(checks, []state{passed}); err == nil {
		t.Error("three checks and one state make a page")
	}
}

func TestReadRefuses(t *testing.T) {
	const head = "what,printed,here,difference,source,mark,shared,file,test\n"
	const good = "a,1,1,none,b,exact,,core/metric/a_test.go,TestA\n"
	if _, err := read([]byte("# remark\n" + head + good)); err != nil {
		t.Fatal(err)
	}
	for _, row := range []struct{ text, want string }{
		{head, "no rows"},
		{head + strings.Replace(good, "none", "", 1), "empty cell"},
		{strings.Replace(head, "source", "sauce", 1) + good, "empty cell"},
		{head + strings.Replace(good, "a,1", "a|b,1", 1), "a bar"},
		{head + strings.Replace(good, "exact", "exact; memory", 1), `unknown mark "exact; memory"`},
		{head + strings.Replace(good, "exact,", "exact,no", 1), `shared is "no"`},
		{head + strings.Replace(good, "_test.go", ".go", 1), "no test file"},
		{head + strings.Replace(good, "TestA", "TestA|B", 1), "no name of a test"},
	} {
		if _, err := read([]byte(row.text)); err == nil || !strings.Contains(err.Error(), row.want) {
			t.Errorf("%q: error %v, want %q", row.text, err, row.want)
		}
	}
}

func TestDifference(t *testing.T) {
	for _, row := range []struct{ want, got, shown string }{
		{"a\nb\nc", "x\nb\ny", "- a\n- c\n+ x\n+ y\n"},
		{"a\nb", "a\nb\nd", "+ d\n"},
		{"a\n\nb", "a\nb\n", "the same lines, in another order or number\n"},
	} {
		if shown := difference(row.want, row.got); shown != row.shown {
			t.Errorf("%q, %q: %q, want %q", row.want, row.got, shown, row.shown)
		}
	}
}
