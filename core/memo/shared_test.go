package memo

import (
	"strings"
	"testing"

	"weirmark/core/study"
)

// The reference quantities of a case are printed with its first cell, and in
// full where another cell says something else.
func TestReferencesOfACaseOnce(t *testing.T) {
	cell := func(name, model string, density float64) study.Cell {
		return study.Cell{Case: name, Quantity: "drag", Model: model, References: []study.ReferenceLine{{Symbol: "ρ", Value: study.Number(density)}}}
	}
	in := Input{Report: study.Report{Cells: []study.Cell{cell("C1", "A", 1.2), cell("C1", "B", 1.2), cell("C2", "A", 1.2), cell("C1", "C", 1.3)}}}
	page := string(HTML(Document(in)))
	if n := strings.Count(page, "Reference quantities of case"); n != 3 {
		t.Errorf("%d tables of reference quantities", n)
	}
	if !strings.Contains(page, `are in the table of <a href="#cell-1">`) {
		t.Error("the second cell does not lead to the first")
	}
}

// A long table of few columns loses no row when it is laid out in four.
func TestBeside4(t *testing.T) {
	for _, n := range []int{4, 5, 8, 21} {
		rows := make([]Node, n)
		for i := range rows {
			rows[i] = row(figureCell(text(string(rune('a' + i)))))
		}
		head, laid := beside4(headRow("#x"), rows)
		for _, r := range laid {
			if len(r.Nodes) != len(head.Nodes) {
				t.Fatalf("%d rows: a row of %d under a head of %d", n, len(r.Nodes), len(head.Nodes))
			}
		}
		seen := ""
		for p := range head.Nodes {
			for _, r := range laid {
				for _, one := range r.Nodes[p].Nodes {
					seen += one.Text
				}
			}
		}
		if want := "abcdefghijklmnopqrstu"[:n]; seen != want {
			t.Errorf("%d rows read as %q", n, seen)
		}
	}
}
