package message

import (
	"encoding/json"
	"fmt"
	"html"
	"regexp"
	"strings"
	"testing"

	"weirmark/core/refinement"
	"weirmark/core/study"
)

// orders finds a printed order: the word with a number soon after it.
var orders = regexp.MustCompile(`(?i)\border\b[^.;|]{0,30}?\d|\border p\|\d|\bp = \d`)

// allowed are the words in which a number stands by the word order without
// being the order of the values: the formal order, and the notice that says why
// the usual formula does not apply.
var allowed = regexp.MustCompile(`\(The usual formula would print order [0-9.–]+; it does not apply\.\)|formal order [0-9.]+|\(formal [0-9.]+\)`)

var (
	inline = regexp.MustCompile(`</?(i|em|b|strong|sub|sup|span|data|a|code)\b[^>]*>`)
	tags   = regexp.MustCompile(`(<[^>]*>\s*)+`)
)

// plainText returns what a reader sees of a page, with a stroke between blocks.
func plainText(page string) string {
	return html.UnescapeString(tags.ReplaceAllString(inline.ReplaceAllString(page, ""), "|"))
}

// family is a study of one value over four grids against a measured value.
func family(values [4]float64, rule string) *study.Study {
	grids := "grid,cells,Cd\n"
	for i, v := range values {
		grids += fmt.Sprintf("G%d,%d,%.6f\n", i+1, 1000*(1<<(3*i)), v)
	}
	s := study.New()
	yes := func(v string) study.Field { return study.Field{Value: v, By: study.Entered} }
	for _, f := range [][2]string{{"a", grids}, {"b", "Cd\n2\n"}} {
		s.Files = append(s.Files, study.File{ID: f[0], Name: f[0] + ".csv", SHA256: study.Hash([]byte(f[1])), Data: []byte(f[1])})
	}
	y := study.ColumnUse{Column: yes("Cd"), Unit: yes("1")}
	s.Slips = []study.Slip{
		{ID: "s1", File: "a", Role: yes(study.GridValues), Case: yes("C1"), Quantity: yes("drag"), Model: yes("A"), Grid: yes("grid"), Size: study.ColumnUse{Column: yes("cells")}, Y: y},
		{ID: "s2", File: "b", Role: yes(study.Reference), Case: yes("C1"), Quantity: yes("drag"), Y: y},
	}
	s.Questions = []study.Question{{Case: "C1", Quantity: "drag", Kind: yes(study.KindTest), Use: yes(study.UseValidation), Choices: study.DefaultChoices(),
		Requirement: &study.Requirement{Value: 5, Percent: true, Who: "head of design", Date: "2026-03-02"},
		Sources:     []study.Source{{Name: "balance", Of: study.OfData, Value: .02, Basis: study.Absolute, Coverage: yes("standard"), Pattern: study.Common, Origin: "calibration"}}}}
	s.Questions[0].Choices.Rule = rule
	return s
}

// texts are all words that the page, the memo, the statement and the table of
// numbers print of a study, by where they stand.
func texts(t *testing.T, s *study.Study) map[string]string {
	t.Helper()
	session := &Session{study: s}
	view, err := session.view()
	if err != nil {
		t.Fatal(err)
	}
	var words []string
	var walk func(any)
	walk = func(v any) {
		switch x := v.(type) {
		case string:
			words = append(words, x)
		case []any:
			for _, inner := range x {
				walk(inner)
			}
		case map[string]any:
			if alt, figure := x["alt"]; figure {
				walk([]any{alt, x["caption"], x["title"], x["table"]})
				return // the option holds numbers to draw
			}
			for _, inner := range x {
				walk(inner)
			}
		}
	}
	data, err := json.Marshal([]any{view.Courses, view.Statement, view.Spoken, view.Board, view.Next})
	if err != nil {
		t.Fatal(err)
	}
	var tree any
	if err := json.Unmarshal(data, &tree); err != nil {
		t.Fatal(err)
	}
	walk(tree)
	found := map[string]string{"page": strings.Join(words, " | ")}
	pages, err := writeMemo(session, &Request{}, nil, &Reply{})
	if err != nil {
		t.Fatal(err)
	}
	// The methods say how every rule works, with their numbers.
	memo := string(pages[0])
	from, to := strings.Index(memo, `id="methods"`), strings.Index(memo, `id="assumptions"`)
	if from < 0 || to < from {
		t.Fatal("the memo has no methods before its assumptions")
	}
	found["memo"] = plainText(memo[strings.Index(memo, "<body"):from] + memo[to:])
	command, err := gridsText(s)
	if err != nil {
		t.Fatal(err)
	}
	found["command"] = command
	return found
}

// gridsText is what the command prints of the first file.
func gridsText(s *study.Study) (string, error) {
	r := &Reply{}
	q := &Request{Names: []string{s.Files[0].Name}, Grids: &GridsRequest{Limits: true, Rule: s.Questions[0].Choices.Rule}}
	if _, err := grids(nil, q, [][]byte{s.Files[0].Data}, r); err != nil {
		return "", err
	}
	c := (*r.Grids)[0]
	words := []string{c.Class, c.Rule}
	if c.Order.Known() {
		words = append(words, "order "+text(c.Order, 3))
	}
	for _, n := range c.Notices {
		words = append(words, n.Text)
	}
	return strings.Join(words, " | "), nil
}

// TestNoOrderWithoutConvergence: of values that do not converge monotonically
// no order is printed, by any rule, on the page, in the memo or by the command;
// of values that do one is, so that the search finds what it looks for.
func TestNoOrderWithoutConvergence(t *testing.T) {
	for _, row := range []struct {
		what   string
		values [4]float64
		order  bool
	}{
		{"monotone", [4]float64{2.64, 2.16, 2.04, 2.01}, true},
		{"oscillating", [4]float64{2.3, 1.9, 2.08, 2.01}, false},
		{"diverging", [4]float64{2.00, 2.02, 2.06, 2.14}, false},
		{"oscillating without end", [4]float64{2, 2.1, 1.9, 2.2}, false},
		{"flat", [4]float64{2.1, 2.05, 2.05, 2.05}, false},
		{"two equal", [4]float64{2.4, 2.2, 2.1, 2.1}, false},
	} {
		for _, rule := range append([]string{""}, refinement.Rules...) {
			for where, words := range texts(t, family(row.values, rule)) {
				if len(words) < 60 {
					t.Fatalf("%s: only %q was looked at", where, words)
				}
				at := orders.FindString(allowed.ReplaceAllString(words, "|"))
				if (at != "") != row.order {
					t.Errorf("%s, rule %q, %s: %q in %s", row.what, rule, where, at, words)
				}
			}
		}
	}
}
