// Package core_test holds the import rule of the whole project.
package core_test

import (
	"fmt"
	"go/parser"
	"go/token"
	"io/fs"
	"path"
	"path/filepath"
	"sort"
	"strconv"
	"strings"
	"testing"

	"weirmark/core/internal/reference"
)

// levels is the order of the project: a folder may import folders of a lower
// level only, never one of its own. A folder that is not listed is refused:
// decide its level first.
var levels = map[string]int{
	"core/notice":      0,
	"core/quantity":    0,
	"core/interpolate": 0,
	"core/integrate":   0,
	"datasets":         0,

	"core/profile": 1,

	"core/tablefile":   2,
	"core/station":     2,
	"core/uncertainty": 2,
	"core/settling":    2,
	"core/flow":        2,

	"core/refinement":   3,
	"core/comparison":   3,
	"core/metric":       3,
	"core/derived":      3,
	"core/plausibility": 3,
	"core/dataset":      3,

	"core/adequacy": 4,
	"core/study":    5,

	"core/sentence": 6,
	"core/chart":    6,
	"core/memo":     6,

	"core/message": 7,

	"core/cmd":  8,
	"wasm":      8,
	"web/build": 8,
}

// tools are folders that only tests and our own checks use: nothing that
// is delivered imports them.
var tools = []string{"core/internal"}

// host lists the standard packages that reach outside the program, or differ
// from host to host. Only the folders of hosts may import them.
var host = []string{"os", "net", "time", "syscall", "plugin"}

// hosts are the folders that may import the packages of host.
var hosts = []string{"core/cmd", "core/internal", "datasets/duct/make", "wasm", "web/build"}

// only names the folders that may import a package from outside; the longest
// listed path that fits decides. A module that is not listed is refused.
var only = map[string][]string{
	"gonum.org/v1/gonum":        {"core"},
	"github.com/go-echarts":     {"core/chart"},
	"github.com/gocarina/gocsv": {"core/dataset", "core/internal/outside"},
	"github.com/dop251/goja":    {"core/cmd"},
	"github.com/evanw/esbuild":  {"web/build"},
	"github.com/syumai/workers": {"wasm/edge"},
	"syscall/js":                {"wasm/bridge"},
}

// within says whether folder p is the folder of the table or lies in it.
func within(p, folder string) bool {
	return p == folder || strings.HasPrefix(p, folder+"/")
}

func withinAny(p string, folders []string) bool {
	for _, folder := range folders {
		if within(p, folder) {
			return true
		}
	}
	return false
}

// unit returns the folder of the level table that p belongs to.
func unit(p string) (string, bool) {
	for folder := p; folder != "."; folder = path.Dir(folder) {
		if _, known := levels[folder]; known {
			return folder, true
		}
	}
	return "", false
}

// refusal says why the folder from may not import the path, or returns "".
func refusal(from, imported string) string {
	if to, ours := strings.CutPrefix(imported, "weirmark/"); ours {
		return refusalInside(from, to)
	}
	for prefix := imported; prefix != "."; prefix = path.Dir(prefix) {
		if folders, listed := only[prefix]; listed {
			if withinAny(from, folders) {
				return ""
			}
			return fmt.Sprintf("%s is for %v only", prefix, folders)
		}
	}
	if withinAny(imported, host) && !withinAny(from, hosts) {
		return fmt.Sprintf("%s reaches the host: the core is bytes in, bytes out", imported)
	}
	if strings.Contains(strings.Split(imported, "/")[0], ".") {
		return fmt.Sprintf("module %s is not in the table of this test", imported)
	}
	return ""
}

func refusalInside(from, to string) string {
	if withinAny(from, tools) {
		return ""
	}
	if withinAny(to, tools) {
		return fmt.Sprintf("%s is for tests and our own checks", to)
	}
	fromUnit, known := unit(from)
	if !known {
		return fmt.Sprintf("%s has no level in the table of this test", from)
	}
	toUnit, known := unit(to)
	if !known {
		return fmt.Sprintf("%s has no level in the table of this test", to)
	}
	if fromUnit != toUnit && levels[toUnit] >= levels[fromUnit] {
		return fmt.Sprintf("%s (level %d) is not below %s (level %d)", toUnit, levels[toUnit], fromUnit, levels[fromUnit])
	}
	return ""
}

// sources returns the Go files that are not tests, by folder, as slash paths
// from the root of the repository.
func sources(t *testing.T, root string) map[string][]string {
	files := map[string][]string{}
	for _, top := range []string{"core", "datasets", "wasm", "web"} {
		err := filepath.WalkDir(filepath.Join(root, top), func(name string, entry fs.DirEntry, err error) error {
			if err != nil {
				if name == filepath.Join(root, top) && top != "core" {
					return filepath.SkipDir // the hosts come after the core
				}
				return err
			}
			if entry.IsDir() {
				if entry.Name() == "node_modules" || entry.Name() == "testdata" {
					return filepath.SkipDir
				}
				return nil
			}
			if !strings.HasSuffix(name, ".go") || strings.HasSuffix(name, "_test.go") {
				return nil
			}
			relative, err := filepath.Rel(root, name)
			if err != nil {
				return err
			}
			relative = filepath.ToSlash(relative)
			files[path.Dir(relative)] = append(files[path.Dir(relative)], relative)
			return nil
		})
		if err != nil {
			t.Fatal(err)
		}
	}
	return files
}

func TestImportsPointDown(t *testing.T) {
	root := reference.Root(t)
	files := sources(t, root)
	folders := make([]string, 0, len(files))
	for folder := range files {
		folders = append(folders, folder)
	}
	sort.Strings(folders)

	inside := 0
	for _, folder := range folders {
		if _, known := unit(folder); !known && !withinAny(folder, tools) {
			t.Errorf("%s has no level in the table of this test", folder)
		}
		for _, name := range files[folder] {
			parsed, err := parser.ParseFile(token.NewFileSet(), filepath.Join(root, name), nil, parser.ImportsOnly)
			if err != nil {
				t.Errorf("reading the imports: %v", err)
				continue
			}
			for _, spec := range parsed.Imports {
				imported, err := strconv.Unquote(spec.Path.Value)
				if err != nil {
					t.Fatalf("%s: import %s: %v", name, spec.Path.Value, err)
				}
				if strings.HasPrefix(imported, "weirmark/") {
					inside++
				}
				if reason := refusal(folder, imported); reason != "" {
					t.Errorf("%s imports %q: %s", name, imported, reason)
				}
			}
		}
	}
	// A walk that finds nothing would agree with any rule.
	if len(folders) < 10 || inside < 20 {
		t.Errorf("only %d folders and %d imports between them were looked at", len(folders), inside)
	}
}

func TestRefusal(t *testing.T) {
	for _, row := range []struct {
		from, imported string
		refused        bool
	}{
		{"core/profile", "weirmark/core/notice", false},
		{"core/profile", "weirmark/core/station", true},
		{"core/station", "weirmark/core/tablefile", true},
		{"core/notice", "weirmark/core/quantity", true},
		{"core/message", "weirmark/core/memo", false},
		{"core/memo", "weirmark/core/message", true},
		{"core/cmd/weirmark", "weirmark/core/message", false},
		{"core/cmd/weirmark", "weirmark/core/cmd/weirmark/renderer", false},
		{"core/message", "weirmark/core/cmd/weirmark", true},
		{"core/study", "weirmark/core/internal/golden", true},
		{"core/internal/reference", "weirmark/core/profile", false},
		{"core/elsewhere", "weirmark/core/notice", true},
		{"core/study", "weirmark/core/elsewhere", true},
		{"core/chart", "github.com/go-echarts/go-echarts/v2/opts", false},
		{"core/memo", "github.com/go-echarts/go-echarts/v2/opts", true},
		{"core/cmd/weirmark", "github.com/dop251/goja", false},
		{"core/memo", "github.com/dop251/goja", true},
		{"wasm/bridge", "syscall/js", false},
		{"wasm/browser", "syscall/js", true},
		{"core/study", "syscall/js", true},
		{"wasm/edge", "github.com/syumai/workers", false},
		{"wasm/browser", "github.com/syumai/workers", true},
		{"core/uncertainty", "gonum.org/v1/gonum/stat/distuv", false},
		{"core/study", "example.org/unknown", true},
		{"core/study", "os", true},
		{"core/study", "os/exec", true},
		{"core/study", "net/url", true},
		{"core/study", "time", true},
		{"core/study", "encoding/json", false},
		{"core/cmd/weirmark", "os", false},
	} {
		if reason := refusal(row.from, row.imported); (reason != "") != row.refused {
			t.Errorf("%s imports %s: refusal %q, want refused %v", row.from, row.imported, reason, row.refused)
		}
	}
}
