package memo

import "strings"

// Markdown returns the document as plain text with headings, lists and pipe
// tables. Figures are given by their words and captions.
func Markdown(root Node) []byte {
	w := &markdownWriter{}
	for _, n := range root.Nodes {
		w.block(n)
	}
	return []byte(strings.TrimSpace(w.String()) + "\n")
}

type markdownWriter struct{ strings.Builder }

func (w *markdownWriter) block(n Node) {
	switch n.Kind {
	case Running:
	case Heading:
		w.WriteString(strings.Repeat("#", n.Level+1) + " " + inline(n.Nodes) + "\n\n")
	case Paragraph:
		w.WriteString(inline(n.Nodes) + "\n\n")
	case List:
		for _, i := range n.Nodes {
			w.WriteString("- " + inline(i.Nodes) + "\n")
		}
		w.WriteString("\n")
	case Table:
		w.table(n)
	case Picture:
		w.WriteString("[" + markdownText(n.Text) + "]\n\n")
		for _, c := range n.Nodes {
			w.WriteString(inline(c.Nodes) + "\n\n")
		}
	default:
		for _, m := range n.Nodes {
			w.block(m)
		}
	}
}

func (w *markdownWriter) table(n Node) {
	started := false
	for _, r := range n.Nodes {
		if r.Kind == Caption {
			w.WriteString(inline(r.Nodes) + "\n\n")
			continue
		}
		if !started && r.Role != "head" {
			w.rule(strings.Repeat("|  ", len(r.Nodes))+"|", len(r.Nodes))
		}
		cells := make([]string, len(r.Nodes))
		for i, c := range r.Nodes {
			cells[i] = inline(c.Nodes)
		}
		text := "| " + strings.Join(cells, " | ") + " |"
		if r.Role == "head" {
			w.rule(text, len(cells))
		} else {
			w.WriteString(text + "\n")
		}
		started = true
	}
	w.WriteString("\n")
}

func (w *markdownWriter) rule(head string, n int) {
	w.WriteString(head + "\n" + strings.Repeat("|---", n) + "|\n")
}

func inline(nodes []Node) string {
	var out strings.Builder
	for _, n := range nodes {
		text := markdownText(n.Text) + inline(n.Nodes)
		switch n.Kind {
		case Strong:
			text = "**" + strings.TrimSpace(text) + "**"
			if strings.HasSuffix(n.Text, " ") {
				text += " "
			}
		case Italic:
			text = "*" + text + "*"
		case Sub:
			text = "<sub>" + text + "</sub>"
		case Sup:
			text = "<sup>" + text + "</sup>"
		case Mark:
			switch n.Role {
			case "missing":
				text = "[missing: " + text + "]"
			case "guessed", "assumed":
				text += " (" + n.Role + ")"
			case "outcome":
				text = "**" + text + "**"
			}
		}
		out.WriteString(text)
	}
	return out.String()
}

var markdownEscapes = strings.NewReplacer(`\`, `\\`, "`", "\\`", "*", `\*`, "_", `\_`, "[", `\[`, "]", `\]`, "<", "&lt;", ">", "&gt;", "|", `\|`, "#", `\#`, "&", "&amp;", "\n", " ", "\r", " ")

func markdownText(s string) string { return markdownEscapes.Replace(strings.Map(visible, s)) }
