package core_test

import (
	"encoding/json"
	"os"
	"path/filepath"
	"regexp"
	"strings"
	"testing"

	"weirmark/core/internal/reference"
)

func text(t *testing.T, root, name string) string {
	t.Helper()
	data, err := os.ReadFile(filepath.Join(root, name))
	if err != nil {
		t.Fatal(err)
	}
	return string(data)
}

// firstCells returns the first cell of every row of the tables of a text.
func firstCells(text string) map[string]bool {
	cells := map[string]bool{}
	for _, row := range regexp.MustCompile(`(?m)^\| (\S[^|]*?) \|`).FindAllStringSubmatch(text, -1) {
		cells[row[1]] = true
	}
	return cells
}

// TestMapIsComplete: DEVELOPERS.md has a row for every folder that holds Go
// code, or for the unit or tool it is part of, and for no folder that is gone.
func TestMapIsComplete(t *testing.T) {
	root := reference.Root(t)
	_, rest, _ := strings.Cut(text(t, root, "DEVELOPERS.md"), "\n## The map")
	chart, _, found := strings.Cut(rest, "\n## ")
	if !found {
		t.Fatal("DEVELOPERS.md has no chapter The map")
	}
	rows := firstCells(chart)
	for folder := range sources(t, root) {
		known := false
		for row := range rows {
			known = known || within(folder, row)
		}
		if !known {
			t.Errorf("%s is not on the map", folder)
		}
	}
	for row := range rows {
		if row == "package" || strings.Trim(row, "-") == "" {
			continue
		}
		if _, err := os.Stat(filepath.Join(root, filepath.FromSlash(row))); err != nil {
			t.Errorf("on the map: %v", err)
		}
	}
}

// TestDependenciesHaveReasons: every module that go.mod requires for itself,
// and every npm package, has its line in DEVELOPERS.md.
func TestDependenciesHaveReasons(t *testing.T) {
	root := reference.Root(t)
	_, chapter, found := strings.Cut(text(t, root, "DEVELOPERS.md"), "\n## Dependencies\n")
	if !found {
		t.Fatal("DEVELOPERS.md has no chapter Dependencies")
	}
	reasons := firstCells(chapter)

	var wanted []string
	for _, line := range regexp.MustCompile(`(?m)^(?:require )?\t?(\S+\.\S+/\S+) v\S+$`).FindAllStringSubmatch(text(t, root, "go.mod"), -1) {
		wanted = append(wanted, line[1])
	}
	var front struct{ Dependencies, DevDependencies map[string]string }
	if err := json.Unmarshal([]byte(text(t, root, "web/package.json")), &front); err != nil {
		t.Fatal(err)
	}
	for _, list := range []map[string]string{front.Dependencies, front.DevDependencies} {
		for name := range list {
			wanted = append(wanted, name)
		}
	}
	if len(wanted) < 5 {
		t.Errorf("only %v were found", wanted)
	}
	for _, name := range wanted {
		if !reasons[name] {
			t.Errorf("%s has no line", name)
		}
	}
}
