package memo

import (
	"fmt"
	"strings"

	"weirmark/core/notice"
	"weirmark/core/quantity"
	"weirmark/core/study"
)

// statementSection prints every statement in a box with what limits it.
func (b *builder) statementSection() Node {
	s := b.open(1, "statements", "Statements")
	box := block(Box, "statements")
	seen := map[key]bool{}
	for i, c := range b.in.Report.Cells {
		box.Nodes = append(box.Nodes, b.statement(i, c))
		seen[keyOf(c)] = true
	}
	for _, statement := range b.in.Statements {
		k := key{statement.Case, statement.Quantity, statement.Model}
		if seen[k] {
			continue
		}
		seen[k] = true
		box.Nodes = append(box.Nodes, block(Box, "statement",
			block(Paragraph, "of", say("Case {} · {} · model {}", text(k.Case), text(k.Quantity), text(k.Model))...),
			paragraph(phrases(statement.Phrases, "")...),
			list(item(text("The report holds no results for this statement.")))))
	}
	if len(box.Nodes) == 0 {
		box.Nodes = append(box.Nodes, paragraph(text("No statement: the study holds no comparison yet.")))
	}
	box.Nodes = append(box.Nodes, b.cautions())
	s.Nodes = append(s.Nodes, box, note(say("Marks: a {} is something that was not given; {} rests on a guess no one has accepted; {} rests on an assumption that is printed in this memo.",
		Node{Kind: Mark, Role: study.Missing, Text: "dashed box"}, Node{Kind: Mark, Role: study.Guess, Text: "hatched underline"}, Node{Kind: Mark, Role: study.Assumed, Text: "dotted underline"})...))
	return s
}

func (b *builder) statement(i int, c study.Cell) Node {
	given, found := b.statements[keyOf(c)]
	status := given.Status
	if status == "" {
		status = statusOf(c)
	}
	head := append(names(c), say(" · {} · {}", strong(status), Node{Kind: Link, ID: cellID(i), Text: "details"})...)
	sentence := paragraph(phrases(given.Phrases, fmt.Sprintf("cells.%d.", i))...)
	if !found || len(given.Phrases) == 0 {
		sentence = paragraph(text("No statement was made of this cell."))
	}
	sentence.Role = "sentence"
	box := block(Box, "statement", block(Paragraph, "of", head...), sentence)
	if limits := b.restrictions(i, c, !found); len(limits) > 0 {
		box.Nodes = append(box.Nodes, list(limits...))
	}
	return box
}

func statusOf(c study.Cell) string {
	switch {
	case c.Withheld:
		return "withheld"
	case c.Provisional:
		return "provisional"
	}
	return "stated"
}

func cellID(i int) string { return fmt.Sprintf("cell-%d", i+1) }

// phrases returns the pieces of a statement with their marks. Numbers stand in
// the report below the place of the cell; without a cell they are words.
func phrases(list []study.Phrase, cell string) []Node {
	var nodes []Node
	for _, p := range list {
		inner := Node{Kind: Text, Text: p.Text}
		if p.Value != nil && cell != "" {
			inner = number(*p.Value, p.Text, cell+p.Path)
			if p.Over != "" {
				inner.Over = cell + p.Over
			}
		}
		switch {
		case p.Mark == study.Plain && inner.Kind == Number:
			nodes = append(nodes, inner)
		case p.Mark == study.Plain:
			nodes = append(nodes, typeset(p.Text)...)
		case inner.Kind == Number:
			nodes = append(nodes, Node{Kind: Mark, Role: p.Mark, Nodes: []Node{inner}})
		default:
			nodes = append(nodes, Node{Kind: Mark, Role: p.Mark, Text: p.Text})
		}
	}
	return nodes
}

// restrictions lists what limits a statement: it stands with the statement,
// not in an appendix. What the sentence itself says is left to it, unless it is
// missing.
func (b *builder) restrictions(i int, c study.Cell, alone bool) []Node {
	var items []Node
	add := func(template string, args ...Node) { items = append(items, item(say(template, args...)...)) }
	at := func(name string) string { return fmt.Sprintf("cells.%d.%s", i, name) }

	if first := firstOpen(c); first != "" && (alone || c.Open[0].Blocks) {
		words := append([]Node{strong("Open: ")}, typeset(sentenceEnd(first))...)
		if more := len(c.Open) - 1; more > 0 {
			words = append(words, text(fmt.Sprintf(" Further open points: %d.", more)))
		}
		items = append(items, item(words...))
	}
	switch {
	case c.Requirement == nil && alone:
		add("No accuracy requirement is recorded: adequacy is not judged.")
	case c.Requirement == nil:
	case alone:
		items = append(items, item(append(b.requirementWords(i, c), text("."+late(c)))...))
	case c.Requirement.Late:
		items = append(items, item(text(strings.TrimSpace(late(c)))))
	}
	if n := len(c.Outside); n > 0 {
		add("{} of {} stations lie outside the simulated range and were not compared. No statement is made there.", text(fmt.Sprint(n)), count(c.StationsAll, at("stations_all")))
	}
	if n, late := len(c.Excluded), lateOf(c.Excluded); n > 0 {
		words := quantity.Counted(n, "station") + " excluded by a person; the reasons are in the details."
		if late > 0 {
			words += fmt.Sprintf(" Of these, %d after the comparison had been seen.", late)
		}
		add("{}", text(words))
	}
	if a := c.Application; a != nil && a.Outside && alone {
		add("The application point ({}) lies outside the compared conditions ({}). No statement is made there.", text(a.Text), text(a.Range))
	}
	if alone && c.Use == study.UseTuning {
		add("These data were used to set the model: agreement here is fit quality.")
	}
	if alone && c.Kind == study.KindSimulation {
		add("The reference is another simulation: this is a comparison of codes.")
	}
	if alone && c.Joint != nil && c.Joint.Exceeds {
		add("The joint statistic {} exceeds its 95 % point {}.", hundredths(c.Joint.Statistic, at("joint.statistic")), hundredths(c.Joint.Reference, at("joint.reference")))
	}
	for _, n := range c.Notices {
		if n.Severity == notice.Stop {
			items = append(items, item(typeset(n.Text)...))
		}
	}
	for _, f := range c.Fragile {
		if alone {
			add("Changes if: {} ({}: {}).", text(f.Change), text(f.What), strong(f.Outcome))
		}
	}
	return items
}

// late says that a requirement came after the comparison.
func late(c study.Cell) string {
	if c.Requirement.Late {
		return " The requirement was recorded after the comparison had been seen."
	}
	return ""
}

// requirementWords returns "requirement ± a (who, date): outcome".
func (b *builder) requirementWords(i int, c study.Cell) []Node {
	q := c.Requirement
	at := fmt.Sprintf("cells.%d.requirement.", i)
	limit := withUnit(trimmed(q.Limit, 5, at+"limit"), c.Unit)
	if !q.Limit.Known() {
		limit = nil
	}
	if q.Percent.Known() {
		shown := say("{}\u202f% of the reference value", asWritten(float64(q.Percent), at+"percent"))
		if limit == nil {
			limit = shown
		} else {
			limit = append(append(limit, text(" (")), append(shown, text(")"))...)
		}
	}
	words := append(say("Requirement ±"), limit...)
	outcome := strong(q.Outcome)
	if q.Outcome == "" {
		outcome = text("not judged")
	}
	return append(words, say(", set by {}, {}: {}", given(q.Who), given(q.Date), outcome)...)
}

// lateOf counts the exclusions made after the comparison was seen.
func lateOf(list []study.Excluded) int {
	n := 0
	for _, e := range list {
		if e.Late {
			n++
		}
	}
	return n
}

func firstOpen(c study.Cell) string {
	for _, o := range c.Open {
		if o.Blocks || !c.Withheld {
			return o.Text
		}
	}
	if len(c.Open) > 0 {
		return c.Open[0].Text
	}
	return ""
}

// sentenceEnd closes a text with a full stop where it has none.
func sentenceEnd(s string) string {
	if s == "" {
		return s
	}
	switch s[len(s)-1] {
	case '.', '?', '!':
		return s
	}
	return s + "."
}

// cautions are printed with the statements.
func (b *builder) cautions() Node {
	n := 0
	for _, a := range b.assumed {
		if a.Kind == study.Guess || a.Kind == study.Assumed {
			n++
		}
	}
	items := []Node{
		item(text("This comparison applies to the stated quantities, conditions and configuration. Use elsewhere needs separate justification.")),
		item(say("Coverage statements assume the entered uncertainties, distributions and correlations. Items marked *guessed* or *assumed*: {}.", text(fmt.Sprint(n)))...),
		item(say("Agreement within *u*_{val} may result from large uncertainty. Check *u*_{val} against the requirement.")...),
	}
	if b.in.Report.Checked.Name == "" {
		items = append(items, item(text("The calculation has not been independently reviewed.")))
	}
	items = append(items,
		item(text("Decisions affecting safety need the responsible organisation's process, qualified review and, where applicable, the authority. This memo is supporting evidence only.")))
	return block(Box, "cautions", heading("Cautions"), list(items...))
}
