package memo

import (
	"fmt"
	"slices"

	"weirmark/core/study"
)

// assumption is a thing the statements rest on that no computation gave, as a
// text or in words of ours. Kind is the mark of a phrase, or "chosen".
type assumption struct {
	Kind  string
	What  string
	Value []Node
	Where []Node
}

// assumptions lists guesses, assumptions and blanks of the statements, open
// uncertainty sources, then the choices of every question, each once.
func assumptions(in Input) []assumption {
	var all []assumption
	type once struct {
		kind, what string
		of         key
	}
	seen := map[once]bool{}
	add := func(of key, a assumption) {
		if o := (once{a.Kind, a.What, of}); !seen[o] {
			seen[o] = true
			all = append(all, a)
		}
	}
	for _, s := range in.Statements {
		for _, p := range s.Phrases {
			if p.Mark == study.Guess || p.Mark == study.Assumed || p.Mark == study.Missing {
				add(key{s.Case, s.Quantity, s.Model}, assumption{Kind: p.Mark, What: p.Text,
					Where: say("{}, {}, {}", text(s.Case), text(s.Quantity), text(s.Model))})
			}
		}
	}
	for _, c := range in.Report.Cells {
		for _, source := range c.Sources {
			if source.Open {
				add(key{c.Case, c.Quantity, ""}, assumption{Kind: study.Guess, What: "uncertainty source: " + source.Name,
					Where: say("{}, {}", text(c.Case), text(c.Quantity))})
			}
		}
	}
	for i, c := range in.Report.Cells {
		add(key{c.Case, c.Quantity, ""}, assumption{Kind: chosen, Value: choices(i, c), Where: say("{}, {}", text(c.Case), text(c.Quantity))})
	}
	return all
}

const chosen = "chosen"

// choices returns the decisions behind the numbers of a cell, in words.
func choices(i int, c study.Cell) []Node {
	at := func(name string) string { return fmt.Sprintf("cells.%d.choices.%s", i, name) }
	pick := func(yes bool, a, b string) Node {
		if yes {
			return text(a)
		}
		return text(b)
	}
	h := c.Choices
	words := say("*k* = {}; *k*_{num} = {}; grid study by the {}, formal order {}, {} dimensions",
		asWritten(h.K, at("k")), asWritten(h.KNum, at("k_num")), text(h.RuleName()), asWritten(h.Formal, at("formal")), count(h.Dimension, at("dimension")))
	if h.NumLinear {
		words = append(words, text("; the parts of u_num are summed, as if they depend on each other"))
	}
	if c.Scalar {
		return words
	}
	words = append(words, say("; interpolation {}, its uncertainty {}; numerical uncertainty {} between stations",
		text(string(h.Interpolation)), pick(h.UInterp, "counted", "left out"), pick(h.NumShared, "fully shared", "independent"))...)
	if h.Gap > 0 {
		words = append(words, say("; a spacing of the simulation above *m* = {} times the median is a gap", asWritten(h.Gap, at("gap")))...)
	}
	if h.Period > 0 {
		words = append(words, say("; the stations repeat after {}{}", asWritten(h.Period, at("period")), text(suffix(c.XUnit)))...)
	}
	if h.Probe > 0 {
		words = append(words, say("; the simulation is averaged over {}{} at each station, as the probe does", asWritten(h.Probe, at("probe")), text(suffix(c.XUnit)))...)
	}
	if h.Smooth > 0 {
		words = append(words, say("; changes of sign are those of a curve smoothed over {} rows", count(h.Smooth, at("smooth")))...)
	}
	return words
}

func (b *builder) assumptionSection() Node {
	s := b.open(1, "assumptions", "Assumptions, guesses and choices")
	if len(b.assumed) == 0 {
		s.Nodes = append(s.Nodes, paragraph(text("None is recorded.")))
		return s
	}
	var rows []Node
	for i, a := range b.assumed {
		first := slices.IndexFunc(b.assumed, func(o assumption) bool { return o.Kind == a.Kind && o.What == a.What && a.What != "" })
		if first >= 0 && first < i {
			continue
		}
		what, where := a.Value, a.Where
		if a.What != "" {
			what = typeset(a.What)
			for _, o := range b.assumed[i+1:] {
				if o.Kind == a.Kind && o.What == a.What {
					where = append(append(where, text("; ")), o.Where...)
				}
			}
		}
		rows = append(rows, row(figureCell(text(fmt.Sprint(len(rows)+1))), cell(text(a.Kind)), cell(what...), cell(where...)))
	}
	s.Nodes = append(s.Nodes, b.table("plain", say("What the statements rest on and no computation gave."), headRow("#No.", "Kind", "What", "Where"), rows...))
	return s
}
