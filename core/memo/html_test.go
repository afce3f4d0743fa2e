package memo

import (
	"bytes"
	"encoding/json"
	"encoding/xml"
	"errors"
	"fmt"
	"io"
	"math"
	"strconv"
	"strings"
	"testing"

	"weirmark/core/study"
)

// element is a parsed element of a page.
type element struct {
	name     string
	attr     map[string]string
	children []*element
	content  string // all text inside
	text     strings.Builder
}

// parse reads a page as strict XML: what HTML emits must be both.
func parse(t *testing.T, page []byte) *element {
	t.Helper()
	d := xml.NewDecoder(bytes.NewReader(page))
	d.Strict = true
	root := &element{name: "root"}
	open := []*element{root}
	for {
		token, err := d.Token()
		if errors.Is(err, io.EOF) {
			break
		}
		if err != nil {
			t.Fatalf("the page is not well formed: %v", err)
		}
		switch x := token.(type) {
		case xml.StartElement:
			e := &element{name: x.Name.Local, attr: map[string]string{}}
			for _, a := range x.Attr {
				e.attr[a.Name.Local] = a.Value
			}
			open[len(open)-1].children = append(open[len(open)-1].children, e)
			open = append(open, e)
		case xml.EndElement:
			last := open[len(open)-1]
			open = open[:len(open)-1]
			last.content = last.text.String()
			open[len(open)-1].text.WriteString(last.content)
		case xml.CharData:
			open[len(open)-1].text.Write(x)
		}
	}
	root.content = root.text.String()
	return root
}

func (e *element) all(name string) []*element {
	var found []*element
	for _, c := range e.children {
		if c.name == name {
			found = append(found, c)
		}
		found = append(found, c.all(name)...)
	}
	return found
}

func (e *element) byID(id string) *element {
	for _, c := range e.children {
		if c.attr["id"] == id {
			return c
		}
		if found := c.byID(id); found != nil {
			return found
		}
	}
	return nil
}

// lookUp returns the number at a path of the report's JSON, as written there.
func lookUp(tree any, path string) (string, bool) {
	for _, step := range strings.Split(path, ".") {
		switch v := tree.(type) {
		case map[string]any:
			tree = v[step]
		case []any:
			i, err := strconv.Atoi(step)
			if err != nil || i < 0 || i >= len(v) {
				return "", false
			}
			tree = v[i]
		default:
			return "", false
		}
	}
	n, ok := tree.(json.Number)
	return n.String(), ok
}

func treeOf(t *testing.T, r study.Report) any {
	t.Helper()
	data, err := json.Marshal(r)
	if err != nil {
		t.Fatal(err)
	}
	d := json.NewDecoder(bytes.NewReader(data))
	d.UseNumber()
	var tree any
	if err := d.Decode(&tree); err != nil {
		t.Fatal(err)
	}
	return tree
}

func TestEveryNumberIsTheReports(t *testing.T) {
	in := sample()
	tree := treeOf(t, in.Report)
	numbers := parse(t, HTML(Document(in))).all("data")
	if len(numbers) < 900 {
		t.Errorf("only %d numbers are in the page", len(numbers))
	}
	printed := map[string]bool{}
	for _, n := range numbers {
		field := n.attr["data-field"]
		printed[field] = true
		want, ok := lookUp(tree, field)
		if !ok {
			t.Errorf("%s is no number of the report", field)
			continue
		}
		if over := n.attr["data-over"]; over != "" {
			of, _ := lookUp(tree, over)
			want = partOf(t, want, of)
			if !agrees(n.attr["value"], want) {
				t.Errorf("%s over %s: value %s, the report gives %s", field, over, n.attr["value"], want)
			}
		} else if n.attr["value"] != want {
			t.Errorf("%s: value %s, the report has %s", field, n.attr["value"], want)
		}
		if !agrees(n.content, want) {
			t.Errorf("%s: text %q does not round %s", field, n.content, want)
		}
	}
	// Numbers of the report that no memo prints: places, the curve to draw,
	// counts of a study along a curve where there is none, a k_num that the
	// estimate did not use (it stands among the choices), the choices of the
	// second model of a question (they are those of the question), and the cycles
	// of a monitor that has none.
	unprinted := func(path string) bool {
		for _, part := range []string{".curve.", ".target.", ".course", ".line", ".column", "s.2.grids.monotone", "s.2.grids.non_monotone", "s.3.grids.monotone", "s.3.grids.non_monotone", "s.3.grids.k_num", "s.1.choices.", "monitors.0.cycles"} {
			if strings.Contains(path, part) {
				return true
			}
		}
		return false
	}
	// What is the same as in a cell before stands there: the case and the point
	// of application are told once.
	before := func(path string) bool {
		cell, rest, _ := strings.Cut(strings.TrimPrefix(path, "cells."), ".")
		at, err := strconv.Atoi(cell)
		if err != nil || !strings.HasPrefix(rest, "references.") && !strings.HasPrefix(rest, "application.place.") {
			return false
		}
		own, _ := lookUp(tree, path)
		for i := range at {
			first := fmt.Sprintf("cells.%d.%s", i, rest)
			if there, ok := lookUp(tree, first); ok && there == own && printed[first] {
				return true
			}
		}
		return false
	}
	missing := 0
	walk(tree, "", func(path string) {
		if !printed[path] && !unprinted(path) && !before(path) {
			missing++
			t.Errorf("%s is in the report and not in the memo", path)
		}
	})
	if missing == 0 && len(printed) < 700 {
		t.Errorf("only %d different numbers are in the page", len(printed))
	}
}

// partOf returns a number in percent of the magnitude of another, as JSON has it.
func partOf(t *testing.T, part, whole string) string {
	t.Helper()
	p, err := strconv.ParseFloat(part, 64)
	w, other := strconv.ParseFloat(whole, 64)
	if err != nil || other != nil || w == 0 {
		t.Fatalf("%q in percent of %q", part, whole)
	}
	return strconv.FormatFloat(100*p/math.Abs(w), 'g', -1, 64)
}

func walk(tree any, path string, number func(string)) {
	join := func(step string) string { return strings.TrimPrefix(path+"."+step, ".") }
	switch v := tree.(type) {
	case map[string]any:
		for step, inner := range v {
			walk(inner, join(step), number)
		}
	case []any:
		for i, inner := range v {
			walk(inner, join(strconv.Itoa(i)), number)
		}
	case json.Number:
		number(path)
	}
}

// agrees reports whether a printed text is the value rounded to the digits it
// shows.
func agrees(shown, value string) bool {
	v, err := strconv.ParseFloat(value, 64)
	if err != nil {
		return false
	}
	s := strings.ReplaceAll(shown, "−", "-")
	if cut, percent := strings.CutSuffix(s, "%"); percent {
		s, v = cut, v*100
	}
	s = strings.TrimPrefix(strings.ReplaceAll(s, "\u202f", ""), "+")
	r, err := strconv.ParseFloat(s, 64)
	if err != nil {
		return false
	}
	mantissa, exponent, _ := strings.Cut(s, "e")
	e, _ := strconv.Atoi(exponent)
	_, decimals, _ := strings.Cut(mantissa, ".")
	return math.Abs(r-v) <= 0.5*math.Pow10(e-len(decimals))*(1+1e-9)
}

func TestAgrees(t *testing.T) {
	for _, row := range []struct {
		shown, value string
		want         bool
	}{
		{"0.0213", "0.0212602916", true}, {"0.0212", "0.0212602916", false}, {"−0.042", "-0.0421", true}, {"0.042", "-0.0421", false},
		{"36.5\u202f%", "0.3646", true}, {"36.4\u202f%", "0.3646", false}, {"1.2e-15", "1.2e-15", true}, {"1.3e-15", "1.2e-15", false},
		{"5\u202f600\u202f000", "5600000", true}, {"0", "0.4", true}, {"0.0", "0.4", false}, {"x", "1", false},
	} {
		if got := agrees(row.shown, row.value); got != row.want {
			t.Errorf("agrees(%q, %s) = %v", row.shown, row.value, got)
		}
	}
}

func TestTextsOfUsersAreEscaped(t *testing.T) {
	nasty := `<script>alert("1")</script> & 'x' ]]> {} *a* _{b} \ ` + "\x01\u202e"
	clean := `<script>alert("1")</script> & 'x' ]]> {} *a* _{b} \ ` + "\ufffd\ufffd"
	in := sample()
	r := &in.Report
	r.Title, r.Purpose, in.Product, in.Made, in.Hash, in.Edition = nasty, nasty, nasty, nasty, nasty, nasty
	r.Prepared = study.Signature{Name: nasty, Date: nasty}
	for i := range r.Files {
		r.Files[i].Name, r.Files[i].Uses = nasty, []string{nasty}
	}
	for i := range r.Cells {
		c := &r.Cells[i]
		c.Case, c.Condition, c.Symbol, c.Model, c.Grid, c.Reference, c.Unit, c.XName, c.XUnit = nasty, nasty, nasty, nasty, nasty, nasty, nasty, nasty, nasty
		c.Quantity += nasty
		c.Sources[0].Name, c.Sources[0].Text, c.Sources[0].Origin = nasty, nasty, nasty
		c.Open[0].Text = nasty
		c.Fragile = []study.Fragility{{Change: nasty, Outcome: nasty, Detail: nasty}}
		if c.Requirement != nil {
			c.Requirement.Who, c.Requirement.Date = nasty, nasty
		}
	}
	for i := range r.Log {
		r.Log[i].What, r.Log[i].Why = nasty, nasty
	}
	for i := range in.Statements {
		in.Statements[i].Status = nasty
		for j := range in.Statements[i].Phrases {
			in.Statements[i].Phrases[j].Text = nasty
		}
	}
	in.Figures[2].Title, in.Figures[2].Caption, in.Figures[2].Alt = nasty, nasty, nasty
	page := HTML(Document(in))
	root := parse(t, page)
	if n := len(root.all("script")); n != 0 {
		t.Errorf("%d scripts are in the page", n)
	}
	if got := root.all("title")[0].content; got != clean {
		t.Errorf("title %q, want %q", got, clean)
	}
	if n := strings.Count(root.content, clean); n < 100 {
		t.Errorf("the text stands only %d times in the page", n)
	}
	if style := root.all("style")[0].content; strings.Contains(style, "alert(") || strings.Count(style, "{") != strings.Count(style, "}") {
		t.Error("a text of a user reaches the style sheet unescaped")
	}
	if label := root.all("figure")[0].all("div")[0].attr["aria-label"]; label != clean {
		t.Errorf("words of the figure %q, want %q", label, clean)
	}
}

func TestLongWordsMayBreak(t *testing.T) {
	for _, row := range []struct{ in, want string }{
		{"short words only, but a long text of them", "short words only, but a long text of them"},
		{"abcdefghijklmnopqrstuvwx", "abcdefghijklmnopqrstuvwx"},
		{"x abcdefghijklmnopqrstuvwxy", "x abcdefghijkl<wbr/>mnopqrstuvwx<wbr/>y"},
		{"<<<<<<<<<<<<<<<<<<<<<<<<<<", strings.Repeat("&lt;", 12) + "<wbr/>" + strings.Repeat("&lt;", 12) + "<wbr/>&lt;&lt;"},
	} {
		if got := breakable(row.in); got != row.want {
			t.Errorf("breakable(%q) = %q, want %q", row.in, got, row.want)
		}
	}
}

func TestPageIsSelfContained(t *testing.T) {
	page := string(HTML(Document(sample())))
	for _, outside := range []string{"<script", "<link", "<img", "<iframe", "src=", "@import", "http-equiv=\"refresh\""} {
		if strings.Contains(page, outside) {
			t.Errorf("the page holds %s", outside)
		}
	}
	root := parse(t, []byte(page))
	ids := map[string]bool{}
	var links []string
	var visit func(e *element)
	visit = func(e *element) {
		if id := e.attr["id"]; id != "" {
			if ids[id] {
				t.Errorf("the id %s stands twice", id)
			}
			ids[id] = true
		}
		if e.name == "a" {
			links = append(links, e.attr["href"])
		}
		for _, c := range e.children {
			visit(c)
		}
	}
	visit(root)
	if len(links) < 8 {
		t.Errorf("only %d links are in the page", len(links))
	}
	for _, l := range links {
		if !strings.HasPrefix(l, "#") || !ids[l[1:]] {
			t.Errorf("the link %s leads nowhere", l)
		}
	}
}

func TestSameBytes(t *testing.T) {
	first := HTML(Document(sample()))
	for range 5 {
		if !bytes.Equal(first, HTML(Document(sample()))) {
			t.Fatal("two memos of one report differ")
		}
	}
}
