package memo

import (
	"fmt"
	"strings"

	"weirmark/core/study"
)

// figuresOf returns the figures of a cell and of one kind that are not printed
// yet. Those of no model stand with the first cell of their question.
func (b *builder) figuresOf(c study.Cell, kind string) []Node {
	var nodes []Node
	for i, f := range b.in.Figures {
		if b.printed[i] || f.Case != c.Case || f.Quantity != c.Quantity || (f.Model != c.Model && f.Model != "") || kindOf(f) != kind {
			continue
		}
		b.printed[i] = true
		nodes = append(nodes, b.figure(f, f.Case == "" && f.Quantity == ""))
	}
	return nodes
}

// kindOf tells by its name where a figure stands: with the runs, the grids, the
// sources or, "", the comparison.
func kindOf(f Figure) string {
	switch _, kind, _ := strings.Cut(f.ID, "-"); kind {
	case "monitors", "balances", "grids", "budget":
		return kind
	}
	return ""
}

// figure returns a drawing with its caption. The numbers of a figure of a cell
// are in the tables of the cell; others keep their own for later.
func (b *builder) figure(f Figure, own bool) Node {
	b.figures++
	id := fmt.Sprintf("figure-%d", b.figures)
	caption := []Node{strong(fmt.Sprintf("Figure %d. ", b.figures))}
	if f.Caption == "" {
		caption = append(caption, text(sentenceEnd(f.Title)))
	}
	caption = append(caption, typeset(f.Caption)...)
	if own && len(f.Rows) > 0 {
		caption = append(caption, say(" Numbers: {}.", Node{Kind: Link, ID: id + "-data", Text: "data of the figure"})...)
		b.data = append(b.data, b.dataOf(f, id))
	}
	alt := f.Alt
	if alt == "" {
		alt = f.Title
	}
	return Node{Kind: Picture, ID: id, Text: alt, Value: f.SVG, Nodes: []Node{block(Caption, "", caption...)}}
}

// dataOf returns the table behind a figure, as texts: the drawing was made
// from the report by others.
func (b *builder) dataOf(f Figure, id string) Node {
	head := block(Row, "head")
	for _, h := range f.Head {
		head.Nodes = append(head.Nodes, block(Head, "", text(h)))
	}
	at := spread(len(f.Rows), rowLimit)
	table := block(Table, whole("data", len(at)), block(Caption, "", strong(fmt.Sprintf("Data of figure %d. ", b.figures)), text(f.Title)), head)
	for _, n := range at {
		r := block(Row, "")
		for _, value := range f.Rows[n] {
			r.Nodes = append(r.Nodes, cell(text(value)))
		}
		table.Nodes = append(table.Nodes, r)
	}
	table.ID = id + "-data"
	if len(at) < len(f.Rows) {
		table.Nodes[0].Nodes = append(table.Nodes[0].Nodes, text(fmt.Sprintf(" (%d of %d rows, evenly spaced)", len(at), len(f.Rows))))
	}
	return table
}

// figureData prints the tables behind the figures, and says which figures
// belong to no cell of the report. Without either it is left out.
func (b *builder) figureData() Node {
	var lost []string
	for i, f := range b.in.Figures {
		if !b.printed[i] {
			lost = append(lost, f.Title)
		}
	}
	if len(b.data)+len(lost) == 0 {
		return Node{}
	}
	s := b.open(1, "figure-data", "Data of the figures")
	s.Nodes = append(s.Nodes, b.data...)
	if len(lost) > 0 {
		s.Nodes = append(s.Nodes, note(text("Left out, since the report holds no such cell: "+strings.Join(lost, "; ")+".")))
	}
	return s
}
