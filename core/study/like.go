package study

import (
	"strconv"

	"weirmark/core/quantity"
)

// readingOf lists the fields of a slip that say how its table is read; what
// differs from run to run, such as the grid, is not among them.
var readingOf = []string{"role", "quantity", "x.column", "x.unit", "y.column", "y.unit", "u.column", "u.unit", "u_factor", "u_basis", "size.column", "axis", "contour.column", "contour.unit"}

// Like takes over the reading of a slip, of which no guess is open any more,
// for other slips of the same shape: guesses that say the same are accepted,
// gaps are filled. A guess that says something else is left open.
func (s *Study) Like(id string, others []string, at string) error {
	p := s.slip(id)
	if p == nil || len(others) == 0 {
		return refuse("the same reading for other tables", id)
	}
	for _, field := range readingOf {
		if p.entry(field).Open() {
			return refuse("the reading of "+s.fileName(p)+" for other tables while a guess of it is open", fieldName(field))
		}
	}
	done := 0
	for _, other := range others {
		o := s.slip(other)
		if o == nil || o == p {
			continue
		}
		left := s.Question(o.Case.Value, o.Quantity.Value)
		for _, field := range readingOf {
			mine, its := p.entry(field), o.entry(field)
			switch {
			case !mine.Given():
			case !its.Given():
				*its = Field{Value: mine.Value, By: Entered}
				done++
			case its.Open() && its.Value == mine.Value:
				its.By = Accepted
				done++
			}
		}
		s.follow(left, o)
		s.askOf(o)
	}
	s.log(at, "The reading of "+s.fileName(p)+" taken over for "+quantity.Counted(len(others), "like table")+": "+strconv.Itoa(done)+" entries accepted or filled", "", false)
	return nil
}

// AcceptNames accepts one part, such as the grid, of what all names say under
// the pattern, where the guess is what the name says.
func (s *Study) AcceptNames(part, at string) error {
	n, ok := ParseNaming(s.Pattern)
	if !ok || !n.has(part) {
		return refuse("acceptance of what the names say", part)
	}
	done := 0
	for i := range s.Slips {
		p := &s.Slips[i]
		names := n.Of(s.fileName(p))
		said := names[part]
		if part == "station" || part == "quantity" {
			said = nameQuantity(names, p.Quantity.Value)
		}
		f := map[string]*Field{"case": &p.Case, "model": &p.Model, "grid": &p.Grid, "quantity": &p.Quantity, "station": &p.Quantity}[part]
		if said == "" || !f.Open() || f.Value != said {
			continue
		}
		f.By = Accepted
		done++
	}
	s.log(at, "The "+part+" that names say under "+s.Pattern+" accepted for "+quantity.Counted(done, "table"), "", false)
	return nil
}
