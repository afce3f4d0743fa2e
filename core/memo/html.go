package memo

import (
	_ "embed"
	"encoding/xml"
	"fmt"
	"strings"
	"unicode"
)

//go:embed memo.css
var sheetOfStyles string

// HTML returns the document as one self-contained page for print: well-formed
// XML as well as HTML, without scripts and without requests.
func HTML(root Node) []byte {
	w := &htmlWriter{}
	w.raw("<!DOCTYPE html>\n" + `<html xmlns="http://www.w3.org/1999/xhtml" lang="en"><head><meta charset="utf-8"/>`)
	w.raw(`<meta http-equiv="Content-Security-Policy" content="default-src 'none'; style-src 'unsafe-inline'; img-src data:"/>`)
	w.raw(`<meta name="viewport" content="width=device-width, initial-scale=1"/><meta name="color-scheme" content="light"/>`)
	w.raw("<title>" + escape(root.Text) + "</title><style>" + sheetOfStyles + pageMargins(root) + "</style></head><body><main>\n")
	for _, n := range root.Nodes {
		w.node(n)
	}
	w.raw("</main></body></html>\n")
	return []byte(w.String())
}

type htmlWriter struct{ strings.Builder }

func (w *htmlWriter) raw(s string) { w.WriteString(s) }

func (w *htmlWriter) nodes(nodes []Node) {
	for _, n := range nodes {
		w.node(n)
	}
}

// in writes an element around the nodes of n.
func (w *htmlWriter) in(element, class string, n Node, after string) {
	w.raw("<" + element)
	if class != "" {
		w.raw(` class="` + escape(class) + `"`)
	}
	if n.ID != "" {
		w.raw(` id="` + escape(n.ID) + `"`)
	}
	w.raw(">" + breakable(n.Text))
	w.nodes(n.Nodes)
	w.raw("</" + element + ">" + after)
}

func (w *htmlWriter) node(n Node) {
	switch n.Kind {
	case Running:
	case Section:
		w.in("section", strings.TrimSpace(n.Role+fmt.Sprintf(" level-%d", n.Level)), n, "\n")
	case Heading:
		w.in(fmt.Sprintf("h%d", n.Level+1), "", n, "\n")
	case Paragraph:
		w.in("p", n.Role, n, "\n")
	case Box:
		w.in("div", n.Role, n, "\n")
	case List:
		w.in("ul", "", n, "\n")
	case Item:
		w.in("li", "", n, "\n")
	case Table:
		w.table(n)
	case Picture:
		w.picture(n)
	case Text:
		w.raw(breakable(n.Text))
	case Number:
		w.raw(`<data value="` + escape(n.Value) + `" data-field="` + escape(n.Field) + `"`)
		if n.Over != "" {
			w.raw(` data-over="` + escape(n.Over) + `"`)
		}
		w.raw(">" + escape(n.Text) + "</data>")
	case Mark:
		w.in("span", n.Role, n, "")
	case Strong:
		w.in("strong", "", n, "")
	case Italic:
		w.in("i", "", n, "")
	case Sub:
		w.in("sub", "", n, "")
	case Sup:
		w.in("sup", "", n, "")
	case Code:
		w.in("code", "", n, "")
	case Link:
		w.raw(`<a href="#` + escape(n.ID) + `">` + breakable(n.Text) + "</a>")
	default:
		panic("memo: no HTML for a node of kind " + string(n.Kind))
	}
}

func (w *htmlWriter) table(n Node) {
	w.raw("<table")
	if n.Role != "" {
		w.raw(` class="` + escape(n.Role) + `"`)
	}
	if n.ID != "" {
		w.raw(` id="` + escape(n.ID) + `"`)
	}
	w.raw(">")
	body := false
	for _, r := range n.Nodes {
		switch {
		case r.Kind == Caption:
			w.in("caption", "", r, "")
		case r.Role == "head":
			w.raw("<thead>")
			w.row(r, "col")
			w.raw("</thead>")
		default:
			if !body {
				w.raw("<tbody>\n")
				body = true
			}
			w.row(r, "row")
		}
	}
	if body {
		w.raw("</tbody>")
	}
	w.raw("</table>\n")
}

func (w *htmlWriter) row(r Node, scope string) {
	w.raw("<tr>")
	for _, c := range r.Nodes {
		element, class := "<td", ""
		if c.Kind == Head {
			element = `<th scope="` + scope + `"`
		}
		if c.Role != "" {
			class = ` class="` + escape(c.Role) + `"`
		}
		w.raw(element + class + ">")
		w.nodes(c.Nodes)
		w.raw("</" + element[1:3] + ">")
	}
	w.raw("</tr>\n")
}

func (w *htmlWriter) picture(n Node) {
	w.raw(`<figure id="` + escape(n.ID) + `">`)
	svg, err := drawing(n.Value, n.ID+"-")
	if err != nil {
		w.raw(`<p class="note">The figure is not shown: ` + escape(err.Error()) + ". " + escape(n.Text) + "</p>")
	} else {
		w.raw(`<div role="img" aria-label="` + escape(n.Text) + `">` + svg + "</div>")
	}
	for _, c := range n.Nodes {
		w.in("figcaption", "", c, "")
	}
	w.raw("</figure>\n")
}

// longWord is the number of characters from which a word may be parted.
const longWord = 24

// breakable is escape for running text: words too long for a narrow column get
// places where the line may break.
func breakable(s string) string {
	if len(s) <= longWord {
		return escape(s)
	}
	var out strings.Builder
	start, run := 0, 0 // of the piece not yet written; length of the word so far
	for i, r := range s {
		switch {
		case unicode.IsSpace(r):
			run = 0
			continue
		case run > 0 && run%(longWord/2) == 0 && wordLength(s[i:])+run > longWord:
			out.WriteString(escape(s[start:i]) + "<wbr/>")
			start = i
		}
		run++
	}
	return out.String() + escape(s[start:])
}

// wordLength returns the number of characters before the first space, counted
// no further than needed.
func wordLength(s string) int {
	n := 0
	for _, r := range s {
		if unicode.IsSpace(r) || n > longWord {
			return n
		}
		n++
	}
	return n
}

// escape makes any text safe between tags and in quoted attributes. Controls
// that cannot stand in XML, and those that reorder text, become U+FFFD.
func escape(s string) string {
	var out strings.Builder
	// A strings.Builder takes every write.
	_ = xml.EscapeText(&out, []byte(strings.Map(visible, s)))
	return out.String()
}

func visible(r rune) rune {
	if (r >= '\u202a' && r <= '\u202e') || (r >= '\u2066' && r <= '\u2069') {
		return '\ufffd'
	}
	return r
}

// pageMargins returns the rules for the running texts. Engines without margin
// boxes leave them out; what they say stands in the title block too.
func pageMargins(root Node) string {
	var out strings.Builder
	out.WriteString("@page{")
	for _, n := range root.Nodes {
		if n.Kind == Running {
			out.WriteString("@" + n.Role + `{content:"` + cssText(clip(n.Text, 70)) + `"}`)
		}
	}
	out.WriteString(`@bottom-right{content:"page " counter(page) " of " counter(pages)}}`)
	return out.String()
}

func clip(s string, n int) string {
	runes := []rune(s)
	if len(runes) <= n {
		return s
	}
	return string(runes[:n-1]) + "…"
}

// cssText writes everything but letters, digits and spaces as CSS escapes.
func cssText(s string) string {
	var out strings.Builder
	for _, r := range strings.Map(visible, s) {
		switch {
		case r == ' ' || (r >= '0' && r <= '9') || (r >= 'a' && r <= 'z') || (r >= 'A' && r <= 'Z'):
			out.WriteRune(r)
		case r < ' ':
			out.WriteByte(' ')
		default:
			fmt.Fprintf(&out, "\\%06x ", r) // the space ends the escape
		}
	}
	return out.String()
}
