package study

import (
	"math"
	"strconv"

	"weirmark/core/derived"
	"weirmark/core/interpolate"
	"weirmark/core/quantity"
)

// takenSide is a curve from which a scalar was taken, to walk back to: one of
// each side of the cell's Derived, in their order.
type takenSide struct {
	taking *taking
	curve  *curve        // as read
	from   derived.Curve // brought to the stations, or cut to them
}

// takenFrom is the path of the scalar of a side, where one was taken.
func (w *work) takenFrom(sides ...string) []string {
	if w.cell.Derived == nil {
		return nil
	}
	for i, line := range w.cell.Derived.Sides {
		for _, side := range sides {
			if line.Side == side {
				return []string{"derived.sides." + strconv.Itoa(i) + ".value"}
			}
		}
	}
	return nil
}

// takenPart parts a path of what a scalar was taken from: its side, the
// values in SI, and the unit they are told in.
func (w *work) takenPart(side int, column string) ([]float64, unit) {
	if side < 0 || side >= len(w.takes) {
		return nil, unit{}
	}
	t := w.takes[side]
	switch column {
	case "x":
		return t.from.X, t.taking.x
	case "y":
		return t.from.Y, t.taking.y
	}
	return t.from.Second, unit{Unit: quantity.One}
}

// takenAt returns a value of what a scalar was taken from.
func (w *work) takenAt(side int, column string, row int) (float64, bool) {
	values, u := w.takenPart(side, column)
	if row < 0 || row >= len(values) {
		return 0, false
	}
	return u.FromSI(values[row]), true
}

// takenInputs are the rows that a scalar was taken from.
func takenInputs(p spot) []string {
	side := "taken." + strconv.Itoa(p.at[0])
	list := []string{side + ".x.*", side + ".y.*"}
	if p.takes[p.at[0]].from.Second != nil {
		list = append(list, side+".second.*")
	}
	return list
}

// takenBy is the rule of a number that the taking of a scalar gives.
func takenBy(path, name, formula string, get func(*taking, args, derived.Scalar) float64) walkRule {
	return walkRule{path: "derived.sides.*." + path, name: name, formula: formula, in: takenInputs, direct: true, say: takenSaid, calc: func(a args) float64 {
		t := a.takes[a.spot.at[0]].taking
		c := derived.Curve{X: inSI(a.v[0], t.x.Unit), Y: inSI(a.v[1], t.y.Unit)}
		if len(a.v) > 2 {
			c.Second = a.v[2]
		}
		got, err := t.take(c)
		if err != nil {
			return math.NaN()
		}
		return get(t, a, got)
	}}
}

func takenSaid(p spot) string {
	d := p.cell.Derived
	text := d.Kind + " of the " + d.Sides[p.at[0]].Side + ": " + d.Formula
	for _, s := range d.Settings {
		text += "; " + s.Name + " " + s.Value
	}
	return text
}

// takenRow is the row of the file that a value was taken from, or the rows
// around it. A place that is no row is a station of the data.
func takenRow(p spot) []string {
	side, row := p.at[0], p.at[1]
	t := p.takes[side]
	column := "y"
	if p.path[:len("taken.")+len(strconv.Itoa(side))+2] == "taken."+strconv.Itoa(side)+".x" {
		column = "x"
	}
	x, y := inUnit(t.curve.x, t.curve.xUnit, t.taking.x), inUnit(t.curve.y, t.curve.yUnit, t.taking.y)
	of := "take" + strconv.Itoa(side)
	at, value := t.from.X[row], t.from.Y[row]
	for i := range x {
		if x[i] == at && (y[i] == value || math.IsNaN(y[i]) && math.IsNaN(value)) {
			return []string{read(of, column, i)}
		}
	}
	if column == "x" {
		for i, v := range p.takes[0].from.X {
			if side > 0 && v == at {
				return []string{"taken.0.x." + strconv.Itoa(i)}
			}
		}
		return nil
	}
	if t.taking.kind.Loop {
		return nil
	}
	list := []string{"taken." + strconv.Itoa(side) + ".x." + strconv.Itoa(row)}
	for _, i := range neighbours(x, y, at) {
		list = append(list, read(of, "x", i), read(of, "y", i))
	}
	return list
}

func takenValue(a args) float64 {
	if len(a.v) < 2 {
		return a.n(0)
	}
	x, y := pairs(a.v[1:])
	at := make([]float64, 1)
	if interpolate.At(at, x, y, []float64{a.n(0)}, a.choices.Interpolation) != nil {
		return math.NaN()
	}
	return at[0]
}
