package published

import (
	"os"
	"path/filepath"
	"regexp"
	"strings"
	"testing"

	"weirmark/core/internal/reference"
)

// TestListIsTrue: the list of outside checks names every file of its folder
// and none that is not there, and every test it names exists.
func TestListIsTrue(t *testing.T) {
	root := reference.Root(t)
	folder := filepath.Join(root, "testdata", "published")
	list, err := os.ReadFile(filepath.Join(folder, "README.md"))
	if err != nil {
		t.Fatal(err)
	}
	_, rest, found := strings.Cut(string(list), "\n## Files\n")
	files, checks, found2 := strings.Cut(rest, "\n## Checks\n")
	if !found || !found2 {
		t.Fatal("no chapters Files and Checks")
	}

	listed := map[string]bool{}
	for _, row := range regexp.MustCompile(`(?m)^\| (\S+\.\S+) \|`).FindAllStringSubmatch(files, -1) {
		listed[row[1]] = true
		if _, err := os.Stat(filepath.Join(folder, row[1])); err != nil {
			t.Errorf("listed: %v", err)
		}
	}
	entries, err := os.ReadDir(folder)
	if err != nil {
		t.Fatal(err)
	}
	for _, entry := range entries {
		if name := entry.Name(); name != "README.md" && !entry.IsDir() && !listed[name] {
			t.Errorf("%s is in the folder and not in its list", name)
		}
	}

	named := regexp.MustCompile(`(?m)^\| .* \| (\S+_test\.go) (Test\w+) \|$`).FindAllStringSubmatch(checks, -1)
	if rows := strings.Count(checks, "\n|") - 2; rows != len(named) || rows < 15 {
		t.Errorf("%d checks are listed, %d of them name their test", rows, len(named))
	}
	for _, check := range named {
		source, err := os.ReadFile(filepath.Join(root, filepath.FromSlash(check[1])))
		if err != nil {
			t.Errorf("check: %v", err)
		} else if !strings.Contains(string(source), "\nfunc "+check[2]+"(") {
			t.Errorf("%s has no %s", check[1], check[2])
		}
	}
}
