package memo

import (
	"fmt"

	"weirmark/core/adequacy"
	"weirmark/core/study"
)

var handlings = map[string]string{
	study.Corrected: "simulation moved to the condition of the data",
	study.AsInput:   "counted as an input uncertainty",
	study.Tolerated: "accepted",
}

var stateWords = map[string]string{adequacy.Inside: "inside", adequacy.Edge: "at the edge of", adequacy.Outside: "outside"}

// conditions prints the conditions of both sides with the effect of their
// difference.
func (b *builder) conditions(i int, c study.Cell) []Node {
	if len(c.Conditions) == 0 {
		return nil
	}
	rows := make([]Node, len(c.Conditions))
	for j, m := range c.Conditions {
		at := func(name string) string { return fmt.Sprintf("cells.%d.conditions.%d.%s", i, j, name) }
		handling := []Node{text("the same on both sides")}
		if m.Simulation != m.Data {
			handling = []Node{strong("differs, not handled")}
			if words, chosen := handlings[m.Handling]; chosen {
				handling = []Node{text(words)}
			}
		}
		if m.Why != "" {
			handling = append(handling, say(": {}", text(m.Why))...)
		}
		name := []Node{text(m.Name)}
		if m.Unit != "" && m.Unit != "1" {
			name = say("{} [{}]", text(m.Name), text(m.Unit))
		}
		rows[j] = row(cell(name...), figureCell(trimmed(m.Simulation, 8, at("simulation"))), figureCell(trimmed(m.Data, 8, at("data"))),
			figureCell(signed(m.Effect, 2, at("effect"))), cell(handling...))
	}
	caption := say("Conditions of simulation and data; the effect is that of moving the simulation to the data ({}), “{}” where no sensitivity is given.", text(unitOf(c.Unit)), text(absent))
	return []Node{b.table("plain", caption, headRow("Condition", "#Simulation", "#Data", "#Effect", "Handling"), rows...)}
}

// application says where the point of application lies: it is one of the study.
func (b *builder) application() []Node {
	for _, c := range b.in.Report.Cells {
		switch a := c.Application; {
		case a == nil:
		case a.Outside:
			return []Node{paragraph(say("Application point {}: {} the compared conditions ({}). No statement is made there.", text(a.Text), strong("outside"), text(a.Range))...)}
		case a.Range == "":
			return []Node{paragraph(say("Application point {}: whether it lies inside the compared conditions is not known.", text(a.Text))...)}
		default:
			return []Node{paragraph(say("Application point {}: inside the compared conditions ({}).", text(a.Text), text(a.Range))...)}
		}
	}
	return nil
}

// place prints where the point of application lies among the comparisons.
func (b *builder) place(i int, c study.Cell) []Node {
	if c.Application == nil || c.Application.Place == nil {
		return nil
	}
	p := c.Application.Place
	same := func(of study.Cell) any {
		if of.Application == nil {
			return nil
		}
		return of.Application.Place
	}
	if first := b.asBefore(i, same); first >= 0 {
		return []Node{paragraph(say("The application point lies {} the compared conditions, as {} tells.", strong(stateWords[p.State]), b.toCell(first))...)}
	}
	at := func(name string) string { return fmt.Sprintf("cells.%d.application.place.%s", i, name) }
	head := []string{"Case"}
	for j, name := range p.Names {
		if u := p.Units[j]; u != "" && u != "1" {
			name += " [" + u + "]"
		}
		head = append(head, "#"+name)
	}
	line := func(name Node, values []study.Number, path string) Node {
		cells := []Node{cell(name)}
		for j, v := range values {
			cells = append(cells, figureCell(trimmed(v, 8, fmt.Sprintf("%s.%d", path, j))))
		}
		return row(cells...)
	}
	rows := []Node{line(strong("application point"), p.At, at("at"))}
	for n, q := range p.Points {
		rows = append(rows, line(text(q.Case), q.At, at(fmt.Sprintf("points.%d.at", n))))
	}
	words := say("The application point lies {} the compared conditions", strong(stateWords[p.State]))
	words = append(words, say(", {} of their span from the hull of the comparisons; the nearest is {}, {} away.", trimmed(p.Beyond, 2, at("beyond")), text(p.Nearest), trimmed(p.Distance, 2, at("distance")))...)
	return []Node{b.table("plain", say("The point of application among the comparisons of this quantity."), headRow(head...), rows...), paragraph(words...)}
}

// recorded prints the order in which stations, requirement and comparison
// entered the log.
func (b *builder) recorded(i int, c study.Cell) []Node {
	if len(c.Recorded) == 0 {
		return nil
	}
	words := say("Order of recording: ")
	for n, r := range c.Recorded {
		if n > 0 {
			words = append(words, text("; then "))
		}
		words = append(words, text(r.What+" (log entry "), count(r.In, fmt.Sprintf("cells.%d.recorded.%d.in", i, n)))
		if r.At != "" {
			words = append(words, text(", "+r.At))
		}
		words = append(words, text(")"))
	}
	return []Node{paragraph(append(words, text(". Times are given by the host and are not verified."))...)}
}

// expected prints what the recorded use lets a reader expect.
func (b *builder) expected(c study.Cell) []Node {
	if len(c.Evidence) == 0 {
		return nil
	}
	rows := make([]Node, len(c.Evidence))
	for j, e := range c.Evidence {
		given := strong("missing")
		if e.Given {
			given = text("given")
		}
		rows[j] = row(cell(text(e.What)), cell(text(e.From)), cell(given))
	}
	return []Node{b.table("plain", say("Evidence that the recorded influence and consequence let a reader expect (common practice, no source). No score is made of it."), headRow("Evidence", "Expected from", ""), rows...)}
}
