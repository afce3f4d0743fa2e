package study

import (
	"cmp"

	"weirmark/core/notice"
	"weirmark/core/quantity"
)

// What is made of a force or a moment before it is compared. Axes are x along
// the body and z up; the normal force acts along z, the axial along x; moments
// turn the nose up; α is that of the case card.
const (
	AsLift   = "lift"   // N cos α - A sin α, of the column of values N
	AsDrag   = "drag"   // N sin α + A cos α
	AsMoment = "moment" // M + (x_c - x_m) N - (z_c - z_m) A, of the column of values M
)

// Forces is what a slip of a force or a moment asks to be made of it. Columns
// are of the same table.
type Forces struct {
	As     Field `json:"as,omitzero"`     // AsLift, AsDrag, AsMoment, or empty: as it is
	Normal Field `json:"normal,omitzero"` // column of the normal force, for a moment
	Axial  Field `json:"axial,omitzero"`  // column of the axial force; of a moment only where z_c differs from z_m
	Unit   Field `json:"unit,omitzero"`   // of both; empty: of the values, or N for a moment in N m
	Half   Field `json:"half,omitzero"`   // "yes": of a half model, so that it is doubled
}

// values are the column of values of a slip, or the formula that is made of it:
// of statics (own derivation; see the test's hand example).
func (p *Slip) values() ColumnUse {
	f := p.Force
	if p.Y.Formula.Given() || !f.As.Given() && f.Half.Value != "yes" {
		return p.Y
	}
	quoted := func(column, unit string) string { return `"` + column + " in " + cmp.Or(unit, "1") + `"` }
	of := p.Y.Unit.Value
	y := quoted(p.Y.Column.Value, of)
	force := cmp.Or(f.Unit.Value, of)
	angle := "card." + Angle
	switch f.As.Value {
	case AsLift:
		y += "*cos(" + angle + ") - " + quoted(f.Axial.Value, force) + "*sin(" + angle + ")"
	case AsDrag:
		y += "*sin(" + angle + ") + " + quoted(f.Axial.Value, force) + "*cos(" + angle + ")"
	case AsMoment:
		over := "*"
		if unit, err := quantity.Parse(of); err == nil && unit.Same(quantity.One) {
			over = "/card." + RefLength + "*"
		} else if !f.Unit.Given() {
			force = "N"
		}
		y += " + (card.x_c - card.x_m)" + over + quoted(f.Normal.Value, force)
		if f.Axial.Given() {
			y += " - (card.z_c - card.z_m)" + over + quoted(f.Axial.Value, force)
		}
	}
	if f.Half.Value == "yes" {
		y = "2*(" + y + ")"
	}
	return ColumnUse{Column: p.Y.Column, Unit: p.Y.Unit, Formula: Field{Value: y, By: p.Y.Column.By}}
}

// knownForces reports whether a slip asks for something that can be made.
func (l *loader) knownForces(f Forces) bool {
	switch f.As.Value {
	case "", AsLift, AsDrag, AsMoment:
		return true
	}
	l.tell(notice.New("force-unknown", f.As.Value))
	return false
}

// doubtForces asks about moments about two centres, and about half models whose
// reference area is halved too.
func (w *work) doubtForces() {
	s, d := w.finest(), w.reference
	for _, c := range []*curve{s, d} {
		if c == nil || c.slip.Force.Half.Value != "yes" || w.q.Form.of(c.slip.side()) != FormTurned {
			continue
		}
		if in, err := w.e.input(w.q.Case, RefArea, c.slip.side()); err == nil && in.entry.Kind == halfArea {
			file := w.e.study.fileName(c.slip)
			w.ask(2, "the factor of the half model of "+file, "force-half-area", file, w.q.Case)
		}
	}
	if s == nil || d == nil || w.q.Form.Name != "Cm" && s.slip.Force.As.Value != AsMoment && d.slip.Force.As.Value != AsMoment {
		return
	}
	for _, along := range []string{"x", "z"} {
		ofS, knownS := w.centre(s, along)
		ofD, knownD := w.centre(d, along)
		if knownS && knownD && ofS != ofD {
			metres := func(v float64) string { return along + " = " + quantity.Text(v, 4) + " m" }
			w.ask(2, "one centre of the moments", "moment-centres", metres(ofS), metres(ofD))
			return
		}
	}
}

// centre is a coordinate of the point that the moments of a curve are about.
func (w *work) centre(c *curve, along string) (float64, bool) {
	symbol := along + "_m"
	if c.slip.Force.As.Value == AsMoment && (along == "x" || c.slip.Force.Axial.Given()) {
		symbol = along + "_c"
	}
	return w.e.cardValue(w.q.Case, symbol, c.slip.side())
}
