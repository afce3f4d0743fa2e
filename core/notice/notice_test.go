package notice

import (
	"errors"
	"go/ast"
	"go/parser"
	"go/token"
	"io/fs"
	"path/filepath"
	"regexp"
	"slices"
	"strconv"
	"strings"
	"testing"

	"weirmark/core/internal/reference"
)

func TestNewFillsTheRow(t *testing.T) {
	got := New("column-count", 12, 3, 4, `line 12 "1,2,3"`)
	want := Notice{
		Code: "column-count", Severity: Ask,
		Text: "Row at line 12 has 3 columns where 4 were expected. Held back: line 12 \"1,2,3\". Mend the file, or say that they are to be left out.",
	}
	if got != want {
		t.Errorf("%+v, want %+v", got, want)
	}
}

func TestNewRefusesAnUnknownCode(t *testing.T) {
	defer func() {
		if said, _ := recover().(string); !strings.Contains(said, "no-such-code") {
			t.Errorf("panic %q does not name the code", said)
		}
	}()
	New("no-such-code")
	t.Error("an unknown code was taken")
}

func TestPlace(t *testing.T) {
	n := Notice{Text: "text"}
	for _, row := range []struct {
		notice Notice
		place  string
	}{
		{n, ""},
		{n.In("a.csv"), "a.csv: "},
		{n.In("a.csv").At(7), "a.csv:7: "},
		{n.In("a.csv").AtColumn(7, 3), "a.csv:7:3: "},
		{n.AtColumn(7, 3).In("a.csv"), "a.csv:7:3: "},
		{n.At(7), ":7: "},
	} {
		if got := row.notice.Place(); got != row.place {
			t.Errorf("%+v: place %q, want %q", row.notice, got, row.place)
		}
		var err error = row.notice
		if err.Error() != row.place+"text" {
			t.Errorf("%+v: error %q, want %q", row.notice, err, row.place+"text")
		}
		var back Notice
		if !errors.As(err, &back) || back != row.notice {
			t.Errorf("%+v: came back from an error as %+v", row.notice, back)
		}
	}
	if n != (Notice{Text: "text"}) {
		t.Errorf("placing a notice changed it: %+v", n)
	}
}

func TestAnyAndHas(t *testing.T) {
	list := []Notice{New("header-none", 3), New("u-missing")}
	for _, row := range []struct {
		list     []Notice
		severity Severity
		any      bool
		code     string
		has      bool
	}{
		{list, Note, true, "header-none", true},
		{list, Ask, true, "u-missing", true},
		{list, Stop, false, "u-zero", false},
		{nil, Note, false, "header-none", false},
	} {
		if Any(row.list, row.severity) != row.any || Has(row.list, row.code) != row.has {
			t.Errorf("%s, %s: any %v, has %v", row.severity, row.code, Any(row.list, row.severity), Has(row.list, row.code))
		}
	}
}

// places returns the verbs of a format that take an argument.
func places(format string) []string {
	var verbs []string
	for _, v := range regexp.MustCompile(`%.`).FindAllString(format, -1) {
		if v != "%%" {
			verbs = append(verbs, v)
		}
	}
	return verbs
}

// TestTable: every row is a code in small letters, a known severity and whole
// sentences whose places are filled by texts, quoted texts and counts. Numbers
// come as texts already: their digits are decided where they are computed.
func TestTable(t *testing.T) {
	code := regexp.MustCompile(`^[a-z]+(-[a-z0-9]+)+$`)
	codes := Codes()
	if len(codes) < 80 || !slices.IsSorted(codes) {
		t.Errorf("%d codes, sorted %v", len(codes), slices.IsSorted(codes))
	}
	for _, name := range codes {
		row := table[name]
		if !code.MatchString(name) {
			t.Errorf("%s: form of the code", name)
		}
		if row.severity != Stop && row.severity != Ask && row.severity != Note {
			t.Errorf("%s: severity %q", name, row.severity)
		}
		var args []any
		for _, place := range places(row.format) {
			switch place {
			case "%d":
				args = append(args, 7)
			case "%s", "%q":
				args = append(args, "x")
			default:
				t.Errorf("%s: place %s", name, place)
			}
		}
		text := New(name, args...).Text
		if strings.Contains(text, "%!") || strings.Contains(text, "  ") || text != strings.TrimSpace(text) {
			t.Errorf("%s: %q", name, text)
		}
		if first := text[0]; first >= 'a' && first <= 'z' && !strings.HasPrefix(row.format, "%") {
			t.Errorf("%s: begins with a small letter: %q", name, text)
		}
		if !strings.HasSuffix(row.format, "%s") && !strings.ContainsAny(text[len(text)-1:], ".?)") {
			t.Errorf("%s: no end of sentence: %q", name, text)
		}
	}
}

// TestEveryUseFitsTheTable reads the source of the core: wherever a notice is
// made with its code written out, the code is in the table and has as many
// arguments as places; and the code of every row is written somewhere.
func TestEveryUseFitsTheTable(t *testing.T) {
	written := map[string]bool{}
	calls := 0
	root := filepath.Join(reference.Root(t), "core")
	err := filepath.WalkDir(root, func(name string, entry fs.DirEntry, err error) error {
		own := filepath.Dir(name) == filepath.Join(root, "notice")
		if err != nil || own || entry.IsDir() || !strings.HasSuffix(name, ".go") || strings.HasSuffix(name, "_test.go") {
			return err
		}
		files := token.NewFileSet()
		parsed, err := parser.ParseFile(files, name, nil, 0)
		if err != nil {
			return err
		}
		ast.Inspect(parsed, func(n ast.Node) bool {
			switch n := n.(type) {
			case *ast.BasicLit:
				if text, err := strconv.Unquote(n.Value); n.Kind == token.STRING && err == nil {
					written[text] = true
				}
			case *ast.CallExpr:
				if isNew(n) {
					calls++
					checkUse(t, files, n)
				}
			}
			return true
		})
		return nil
	})
	if err != nil {
		t.Fatal(err)
	}
	if calls < 50 {
		t.Errorf("only %d uses were found", calls)
	}
	for _, code := range Codes() {
		if !written[code] {
			t.Errorf("%s is in the table and raised nowhere", code)
		}
	}
}

// isNew tells a call of notice.New.
func isNew(call *ast.CallExpr) bool {
	selector, ok := call.Fun.(*ast.SelectorExpr)
	if !ok || selector.Sel.Name != "New" {
		return false
	}
	pkg, ok := selector.X.(*ast.Ident)
	return ok && pkg.Name == "notice"
}

// checkUse checks a call whose code and arguments are written out.
func checkUse(t *testing.T, files *token.FileSet, call *ast.CallExpr) {
	literal, ok := call.Args[0].(*ast.BasicLit)
	if !ok || call.Ellipsis.IsValid() {
		return
	}
	at := files.Position(call.Pos())
	code, err := strconv.Unquote(literal.Value)
	row, known := table[code]
	if err != nil || !known {
		t.Errorf("%s: %s is not in the table", at, literal.Value)
		return
	}
	if want := len(places(row.format)); len(call.Args)-1 != want {
		t.Errorf("%s: %s has %d places and gets %d", at, code, want, len(call.Args)-1)
	}
}

func TestSingular(t *testing.T) {
	for text, want := range map[string]string{
		"1 rows of 11 rows": "1 row of 11 rows", "at 1 stations": "at 1 station", "0.1 values": "0.1 values", "1 cellsize": "1 cellsize", "21 lines, 1 lines.": "21 lines, 1 line.",
	} {
		if got := singular(text); got != want {
			t.Errorf("%q became %q, want %q", text, got, want)
		}
	}
}
