package message

import (
	"encoding/json"
	"fmt"
	"slices"
	"testing"

	"weirmark/core/sentence"
	"weirmark/core/study"
)

// spoken returns the sentence of every cell of a study, by case, quantity and
// model, and what the cell holds of grids, balances and notices.
func spoken(s *study.Study, memory *study.Memory) (said, cells map[string]string) {
	said, cells = map[string]string{}, map[string]string{}
	r := study.Evaluate(s, study.Options{Memory: memory})
	for i := range r.Cells {
		c := &r.Cells[i]
		at := c.Case + "|" + c.Quantity + "|" + c.Model
		said[at] = sentence.Of(c).Text()
		data, _ := json.Marshal(struct {
			Grids    any
			Balances any
			Notices  any
		}{c.Grids, c.Balances, c.Notices})
		cells[at] = string(data)
	}
	return said, cells
}

// Removing any piece of evidence of the worked demo changes a sentence: every
// table in use, source, requirement, kind, use and exclusion in turn. Monitors of
// a model go together: what they leave out is told where the last is gone.
// Three kinds may leave the digits of the sentence as they are, and then change
// the cell in the memo and on the page: a coarser grid of a family, a further
// reference that was answered, and a balance that closes.
func TestEveryPieceOfEvidenceIsSaid(t *testing.T) {
	worked := DemoWorked()
	memory := &study.Memory{}
	plain, cells := spoken(worked, memory)
	tried := 0
	quietly := false
	without := func(what string, remove func(*study.Study)) {
		t.Helper()
		tried++
		s := worked.Clone()
		remove(s)
		said, now := spoken(s, memory)
		for cell, text := range plain {
			if said[cell] != text {
				return
			}
			if quietly && now[cell] != cells[cell] {
				return
			}
		}
		t.Errorf("without %s no sentence changes", what)
	}
	gone := map[string]bool{}
	references := map[string]bool{}
	for i, p := range worked.Slips {
		key := p.Case.Value + p.Quantity.Value
		quietly = p.Role.Value == study.Balance || p.Role.Value == study.Simulation && p.Grid.Value != "G4" || p.Role.Value == study.Reference && references[key]
		references[key] = references[key] || p.Role.Value == study.Reference
		switch p.Role.Value {
		case study.Unused:
		case study.Monitor, study.Balance:
			of := p.Role.Value + " of " + p.Quantity.Value + " at " + p.Case.Value + ", model " + p.Model.Value
			if gone[of] {
				continue
			}
			gone[of] = true
			without("every "+of, func(s *study.Study) {
				for j := range s.Slips {
					q := &s.Slips[j]
					if q.Role.Value == p.Role.Value && q.Case.Value == p.Case.Value && q.Quantity.Value == p.Quantity.Value && q.Model.Value == p.Model.Value {
						q.Role.Value = study.Unused
					}
				}
			})
		default:
			without(fmt.Sprintf("%s %s, %s %s %s", p.Role.Value, p.ID, p.Quantity.Value, p.Model.Value, p.Grid.Value), func(s *study.Study) { s.Slips[i].Role.Value = study.Unused })
		}
	}
	quietly = false
	for i, q := range worked.Questions {
		for j, source := range q.Sources {
			without("the source "+source.Name+" of "+q.Quantity, func(s *study.Study) {
				s.Questions[i].Sources = slices.Delete(slices.Clone(s.Questions[i].Sources), j, j+1)
			})
		}
		if q.Requirement != nil {
			without("the requirement of "+q.Quantity, func(s *study.Study) { s.Questions[i].Requirement = nil })
		}
		without("the kind of "+q.Quantity, func(s *study.Study) { s.Questions[i].Kind = study.Field{} })
		without("the use of "+q.Quantity, func(s *study.Study) { s.Questions[i].Use = study.Field{} })
		for j, e := range q.Excluded {
			without(fmt.Sprintf("the exclusion of line %d of %s", e.Line, q.Quantity), func(s *study.Study) {
				s.Questions[i].Excluded = slices.Delete(slices.Clone(s.Questions[i].Excluded), j, j+1)
			})
		}
	}
	without("the application point", func(s *study.Study) { s.Application = nil })
	if tried < 130 {
		t.Errorf("only %d pieces of evidence were removed", tried)
	}
}
