package memo

import (
	"fmt"

	"weirmark/core/study"
)

var handlings = map[string]string{
	study.Corrected: "simulation moved to the condition of the data",
	study.AsInput:   "counted as an input uncertainty",
	study.Tolerated: "accepted",
}

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
