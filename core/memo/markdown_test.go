package memo

import (
	"strings"
	"testing"
)

func TestMarkdown(t *testing.T) {
	in := sample()
	in.Report.Purpose = "a|b *c* <d> #e"
	lines := strings.Split(string(Markdown(Document(in))), "\n")
	columns, tables := 0, 0
	for _, l := range lines {
		if !strings.HasPrefix(l, "|") {
			columns = 0
			continue
		}
		n := strings.Count(strings.ReplaceAll(l, `\|`, ""), "|")
		if columns == 0 {
			columns = n
			tables++
		}
		if n != columns {
			t.Errorf("a row of %d columns in a table of %d: %s", n-1, columns-1, l)
		}
	}
	if tables < 20 {
		t.Errorf("only %d tables", tables)
	}
	whole := strings.Join(lines, "\n")
	for _, want := range []string{"# Quillet strut fairing", "## 1\u2002Statements", `a\|b \*c\* &lt;d&gt; \#e`, "[missing: experimental uncertainty]", "reference pressure common (guessed)", "1.15 (assumed)", "**not resolved**", "*u*<sub>val</sub>"} {
		if !strings.Contains(whole, want) {
			t.Errorf("the text does not hold %q", want)
		}
	}
}
