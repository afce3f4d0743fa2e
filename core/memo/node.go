package memo

import (
	"strings"

	"weirmark/core/quantity"
)

// Kind says what a node of the document is.
type Kind string

// The kinds of nodes. Blocks hold blocks or inline nodes, inline nodes hold
// text.
const (
	Root      Kind = "root"      // Text: the title
	Running   Kind = "running"   // Role: place on the page; Text
	Section   Kind = "section"   // Level; the first node is its Heading
	Heading   Kind = "heading"   // Level
	Paragraph Kind = "paragraph" // Role: "", "note", "formula", "lead"
	Box       Kind = "box"       // what must be read together
	List      Kind = "list"      // of Items
	Item      Kind = "item"
	Table     Kind = "table"   // a Caption first where it has one, then Rows
	Row       Kind = "row"     // Role: "head" or ""
	Head      Kind = "head"    // a cell that names
	Cell      Kind = "cell"    // Role: "number" or ""
	Picture   Kind = "figure"  // Value: the svg; Text: what it shows, in words
	Caption   Kind = "caption" // of a table or figure

	Text   Kind = "text"
	Number Kind = "number" // Text: rounded; Value: ten digits; Field: path in the report
	Mark   Kind = "mark"   // Role: mark of a phrase; Text, or a Number
	Strong Kind = "strong"
	Italic Kind = "italic"
	Sub    Kind = "sub"
	Sup    Kind = "sup"
	Code   Kind = "code"
	Link   Kind = "link" // ID: the section it points to
)

// Node is a piece of the document: plain data, the same for every renderer.
type Node struct {
	Kind  Kind   `json:"kind"`
	Role  string `json:"role,omitempty"`
	ID    string `json:"id,omitempty"`
	Level int    `json:"level,omitempty"`
	Text  string `json:"text,omitempty"`
	Value string `json:"value,omitempty"`
	Field string `json:"field,omitempty"`
	Over  string `json:"over,omitempty"` // of a Number in percent: path of what it is a part of
	Nodes []Node `json:"nodes,omitempty"`
}

func text(s string) Node { return Node{Kind: Text, Text: s} }

func strong(s string) Node { return Node{Kind: Strong, Text: s} }

func code(s string) Node { return Node{Kind: Code, Text: s} }

func block(kind Kind, role string, nodes ...Node) Node {
	return Node{Kind: kind, Role: role, Nodes: nodes}
}

func paragraph(nodes ...Node) Node { return block(Paragraph, "", nodes...) }

func note(nodes ...Node) Node { return block(Paragraph, "note", nodes...) }

func item(nodes ...Node) Node { return block(Item, "", nodes...) }

func list(items ...Node) Node { return block(List, "", items...) }

// say returns the inline nodes of one of our own templates: *x* is italic,
// _{x} below, ^{x} above the line, and each {} takes the next of args. Texts
// of users go in as args only.
func say(template string, args ...Node) []Node {
	var nodes []Node
	plain := func(s string) {
		if s != "" {
			nodes = append(nodes, text(s))
		}
	}
	for {
		at := strings.IndexAny(template, "*_^{")
		if at < 0 {
			plain(template)
			return nodes
		}
		plain(template[:at])
		rest := template[at:]
		switch {
		case strings.HasPrefix(rest, "{}"):
			nodes = append(nodes, args[0])
			args, template = args[1:], rest[2:]
		case rest[0] == '*':
			inner, after, _ := strings.Cut(rest[1:], "*")
			nodes, template = append(nodes, Node{Kind: Italic, Text: inner}), after
		case strings.HasPrefix(rest, "_{"):
			inner, after, _ := strings.Cut(rest[2:], "}")
			nodes, template = append(nodes, Node{Kind: Sub, Text: inner}), after
		case strings.HasPrefix(rest, "^{"):
			inner, after, _ := strings.Cut(rest[2:], "}")
			nodes, template = append(nodes, Node{Kind: Sup, Text: inner}), after
		default:
			plain(rest[:1])
			template = rest[1:]
		}
	}
}

// symbols are names of quantities that texts handed over write with an
// underscore.
var symbols = []string{"u_val", "u_num", "u_input", "u_interp", "u_D", "k_num", "U_iter", "U_grid"}

// typeset returns a text with these symbols set as in the tables.
func typeset(s string) []Node {
	var nodes []Node
	for {
		first, which := -1, ""
		for _, symbol := range symbols {
			if at := strings.Index(s, symbol); at >= 0 && (first < 0 || at < first) {
				first, which = at, symbol
			}
		}
		if first < 0 {
			break
		}
		if first > 0 {
			nodes = append(nodes, text(s[:first]))
		}
		nodes = append(nodes, Node{Kind: Italic, Text: which[:1]}, Node{Kind: Sub, Text: which[2:]})
		s = s[first+len(which):]
	}
	if s != "" {
		nodes = append(nodes, text(s))
	}
	return nodes
}

// absent is printed where the report has no value. It is never a zero.
const absent = "–"

// number returns a value of the report: shown is its rounded text, field its
// path. A value that is not known has neither.
func number(v quantity.Number, shown, field string) Node {
	if !v.Known() {
		return text(absent)
	}
	full, _ := v.MarshalJSON()
	return Node{Kind: Number, Text: shown, Value: string(full), Field: field}
}

// written is number for a value as a file or a person states it.
func written(v quantity.Written, shown, field string) Node {
	if !quantity.Number(v).Known() {
		return text(absent)
	}
	full, _ := v.MarshalJSON()
	return Node{Kind: Number, Text: shown, Value: string(full), Field: field}
}
