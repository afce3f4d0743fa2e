package memo

import (
	"bytes"
	"encoding/json"
	"fmt"
	"strings"

	"weirmark/core/study"
)

// sideWords name the side of an entry of the case card.
var sideWords = map[string]string{"": "both", study.Simulation: "simulation", study.OfData: "data"}

// reference prints the case card, how the columns were used, the axes, and what
// was done to the data.
func (b *builder) reference(i int, c study.Cell) []Node {
	var nodes []Node
	if len(c.Mapping) > 0 {
		nodes = append(nodes, paragraph(append([]Node{strong("Columns. ")}, text(strings.Join(c.Mapping, " ")))...))
	}
	if len(c.References) > 0 {
		same := func(of study.Cell) any { return [2]any{of.Case, of.References} }
		if first := b.asBefore(i, same); first >= 0 {
			nodes = append(nodes, paragraph(say("{} of case {} are in the table of {}.", strong("Reference quantities"), text(c.Case), b.toCell(first))...))
		} else {
			nodes = append(nodes, b.card(i, c))
		}
	}
	for _, a := range c.Axes {
		words := []string{}
		for _, of := range [][2]string{{"origin ", a.Origin}, {"upward ", a.Up}, {"flow along ", strings.ReplaceAll(a.Flow, "-", "−")}} {
			if of[1] != "" {
				words = append(words, of[0]+of[1])
			}
		}
		if len(words) > 0 {
			nodes = append(nodes, paragraph(strong("Axes. "), text("Of "+sideOf(a.Side)+": "+strings.Join(words, ", ")+".")))
		}
	}
	if words := corrections(c.Corrected); words != "" {
		nodes = append(nodes, paragraph(strong("Corrections. "), text(words)))
	}
	return nodes
}

// asBefore returns the first cell before the i-th of which the same is said, or
// -1: what is printed there is not printed again.
func (b *builder) asBefore(i int, of func(study.Cell) any) int {
	said, err := json.Marshal(of(b.in.Report.Cells[i]))
	for j := 0; j < i && err == nil; j++ {
		if other, err := json.Marshal(of(b.in.Report.Cells[j])); err == nil && bytes.Equal(said, other) {
			return j
		}
	}
	return -1
}

// toCell is a link to a cell, by its number.
func (b *builder) toCell(i int) Node {
	return Node{Kind: Link, ID: cellID(i), Text: fmt.Sprintf("%d.%d", b.section[1], i+1)}
}

func sideOf(side string) string {
	if side == "" {
		return "both sides"
	}
	return "the " + sideWords[side]
}

// corrections says what was done to the data for walls and supports.
func corrections(c study.Correction) string {
	how := ""
	if c.How != "" {
		how = ": " + strings.TrimRight(c.How, ".")
	}
	switch c.State {
	case study.Corrected:
		return "The data are recorded as corrected for walls and supports" + how + ". The uncertainty of the correction is a source of its own."
	case study.Uncorrected:
		return "The data are recorded as uncorrected for walls and supports" + how + "."
	}
	return ""
}

func (b *builder) card(i int, c study.Cell) Node {
	rows := make([]Node, len(c.References))
	for j, r := range c.References {
		at := func(name string) string { return fmt.Sprintf("cells.%d.references.%d.%s", i, j, name) }
		words := r.Words
		if r.Kind != "" {
			words += " (" + r.Kind + ")"
		}
		origin := r.Origin
		if r.Formula != "" {
			origin = r.Formula
		}
		rows[j] = row(cell(text(r.Symbol)), cell(text(words)), cell(text(sideWords[r.Side])), figureCell(trimmed(r.Value, 10, at("value"))),
			figureCell(trimmed(r.U, 10, at("u"))), cell(text(unitOf(r.Unit))), cell(text(origin)))
	}
	return b.table("plain", say("Reference quantities of case {}; *u* is the standard uncertainty, “{}” where it is not given.", text(c.Case), text(absent)),
		headRow("", "Quantity", "Of", "#Value", "#*u*", "Unit", "Origin"), rows...)
}

// reduction prints the uncertainty of a reduced value both ways.
func (b *builder) reduction(i int, c study.Cell) []Node {
	r := c.Reduction
	if r == nil {
		return nil
	}
	at := func(name string) string { return fmt.Sprintf("cells.%d.reduction.%s", i, name) }
	rows := []Node{
		row(cell(text("First order")), figureCell(beside(r.Value, r.U, at("value"))), figureCell(digits(r.U, 2, at("u"))), figureCell(interval(beside(r.Low, r.U, at("low")), beside(r.High, r.U, at("high")))...)),
		row(cell(say("Sampling, {} draws", count(r.Draws, at("draws")))...), figureCell(beside(r.Sampled, r.U, at("sampled"))), figureCell(digits(r.SU, 2, at("sampled_u"))), figureCell(interval(beside(r.SLow, r.U, at("sampled_low")), beside(r.SHigh, r.U, at("sampled_high")))...)),
	}
	verdict := "The two differ by more than half a unit of the second digit of u."
	if r.Agrees {
		verdict = "The two agree within half a unit of the second digit of u."
	}
	words := say("At line {}", count(r.Line, at("line")))
	if r.X.Known() {
		words = append(words, say(", {} = {},", given(c.XName), trimmed(r.X, 6, at("x")))...)
	}
	words = append(words, say(" the inputs do: ")...)
	for j, in := range r.Inputs {
		if j > 0 {
			words = append(words, text("; "))
		}
		of := "of one station"
		if in.Common {
			of = "one error of all stations"
		}
		words = append(words, say("{} {} ({})", text(in.Name), signed(in.Part, 2, fmt.Sprintf(at("inputs.%d.part"), j)), text(of))...)
	}
	words = append(words, text(". "+verdict))
	return []Node{
		b.table("plain", say("Reduction of the data, {}, at the station where its inputs do most ({}); 95 % intervals.", text(r.Text), text(unitOf(c.Unit))), headRow("", "#Value", "#*u*", "#Interval"), rows...),
		paragraph(words...),
	}
}
