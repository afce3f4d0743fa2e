package study

import (
	"cmp"
	"math"
	"strconv"
	"strings"

	"weirmark/core/adequacy"
	"weirmark/core/notice"
	"weirmark/core/quantity"
)

// density returns the density of the case for a side, in SI.
func (w *work) density(side string) (float64, bool) {
	rho, known := w.e.cardValue(w.q.Case, Density, side)
	return rho, known && rho > 0
}

// byDensity brings a pressure divided by density to a pressure, where the
// other side is one and the case states its density.
func (w *work) byDensity(sides ...*curve) {
	for i, c := range sides {
		other := sides[1-i]
		rho, known := w.density(c.slip.side())
		if !known || !c.yUnit.known || !other.yUnit.known || !c.yUnit.unit.KinematicOf(other.yUnit.unit) {
			continue
		}
		for _, r := range w.curves(c) {
			r.y, r.u, r.uPlus = times(r.y, rho), times(r.u, rho), times(r.uPlus, rho)
			r.parts, r.yTurned = w.withDensity(r, rho), true
			r.yUnit = axis{unit: quantity.Unit{Symbol: "Pa", Dimension: other.yUnit.unit.Dimension, Factor: 1}, known: true, name: r.yUnit.name, symbol: "Pa"}
		}
		if c == w.reference || w.reference == nil {
			w.yUnit = unit{c.yUnit.unit, "Pa"}
		}
		w.tell(notice.New("density-used", c.yUnit.name+" of "+w.e.study.fileName(c.slip), quantity.Text(rho, 6)+" kg/m³", w.q.Case))
	}
}

// withDensity returns the parts of a curve that was multiplied by the density,
// with the density's own.
func (w *work) withDensity(c *curve, rho float64) []cardPart {
	slope := make([]float64, len(c.y))
	for i := range slope {
		slope[i] = rho
	}
	parts := scaledParts(c.parts, slope)
	in, err := w.e.input(w.q.Case, Density, c.slip.side())
	if err != nil || in.u == 0 {
		return parts
	}
	return addParts(parts, []cardPart{{in, times(c.y, in.u/rho)}})
}

// curves returns the curve, and with the finest run all runs of its family.
func (w *work) curves(c *curve) []*curve {
	if c != w.finest() {
		return []*curve{c}
	}
	all := []*curve{}
	for _, r := range w.runs {
		all = append(all, r.curve)
	}
	if w.grids != nil {
		all = append(all, w.grids)
	}
	return all
}

func times(values []float64, f float64) []float64 {
	if values == nil {
		return nil
	}
	out := make([]float64, len(values))
	for i, v := range values {
		out[i] = v * f
	}
	return out
}

// matchConditions treats the differences of conditions between the two sides.
func (w *work) matchConditions() {
	for i := range w.q.Conditions {
		m := &w.q.Conditions[i]
		if m.Model == "" || m.Model == w.model {
			w.matchCondition(i, m)
		}
	}
}

func (w *work) matchCondition(at int, m *Matching) {
	line := Compared{Name: m.Name, Unit: m.Unit, Simulation: Number(m.Simulation), Data: Number(m.Data), Effect: None, Handling: m.Handling, Why: m.Why}
	effect := math.NaN() // in SI
	if m.Sensitivity != nil {
		effect = w.yUnit.StepToSI(*m.Sensitivity * (m.Data - m.Simulation))
		line.Effect = w.step(effect)
	}
	w.cell.Conditions = append(w.cell.Conditions, line)
	if m.Simulation == m.Data {
		return
	}
	s, d := valueUnit(m.Simulation, m.Unit), valueUnit(m.Data, m.Unit)
	target := Target{Kind: "condition", ID: w.q.id(), Field: strconv.Itoa(at) + ".handling"}
	switch {
	case m.Handling == Corrected && m.Sensitivity != nil:
		for i := range w.s {
			w.s[i] += effect
		}
		w.tell(notice.New("condition-corrected", m.Name, s, d, quantity.Signed(float64(line.Effect), 3)+w.cell.UnitSuffix()))
	case m.Handling == AsInput && m.Sensitivity != nil:
		u := make([]float64, len(w.s))
		for i := range u {
			u[i] = math.Abs(effect)
		}
		w.add(OfInput, "difference of "+m.Name, s+" against "+d+", the whole effect as a standard uncertainty", cmp.Or(m.Why, "entered"), u, true, false).made = madeOfCondition
		w.parts[len(w.parts)-1].number = len(w.cell.Conditions) - 1
	case m.Handling == Tolerated && m.Why != "":
		w.tell(notice.New("condition-accepted", m.Name, s, d, m.Why))
	default:
		w.need(2, false, "the same "+m.Name+" on both sides", target, "condition-differs", m.Name, s, d, w.effectWords(m, effect))
	}
}

// effectWords says what the difference does to the quantity.
func (w *work) effectWords(m *Matching, effect float64) string {
	if m.Sensitivity == nil {
		return "Its effect is not known: enter a sensitivity."
	}
	text := "With the sensitivity " + quantity.Text(*m.Sensitivity, 3) + " per " + cmp.Or(m.Unit, "unit") + " the effect is " + quantity.Text(float64(w.step(effect)), 2) + w.cell.UnitSuffix()
	if w.cell.Scalar && len(w.d) == 1 && w.d[0] != 0 && !w.yUnit.ByConvention() {
		text += " (" + quantity.Percent(math.Abs(effect/w.d[0])) + " % of the data)"
	}
	return text + "."
}

func valueUnit(v float64, unit string) string {
	text := strings.ReplaceAll(quantity.Typed(v), "-", "−")
	switch unit {
	case "", "1":
		return text
	case "°", "deg":
		return text + "°"
	}
	return text + " " + unit
}

// application sets the point of application against the conditions of all
// questions of the same quantity.
func (w *work) application() {
	points := w.e.study.Application
	if len(points) == 0 {
		return
	}
	a := &Application{}
	var texts, ranges []string
	for _, p := range points {
		lo, hi, found := w.e.conditionRange(w.q.Quantity, p)
		text := p.Name + " = " + valueUnit(p.Value, p.Unit)
		texts = append(texts, text)
		if !found {
			w.tell(notice.New("application-unmatched", text))
			continue
		}
		span := valueUnit(lo, p.Unit)
		if hi > lo {
			span += " to " + valueUnit(hi, p.Unit)
		}
		ranges = append(ranges, p.Name+" "+span)
		a.Outside = a.Outside || p.Value < lo || p.Value > hi
	}
	w.e.placed(w.q.Quantity, points, a)
	a.Text, a.Range = strings.Join(texts, ", "), strings.Join(ranges, ", ")
	w.cell.Application = a
	if a.Outside {
		w.tell(notice.New("application-outside", a.Text, a.Range))
	}
}

// placed puts the point among the questions of a quantity that state all of
// its conditions: in two and more of them it can lie inside every range and
// outside what was compared.
func (e *evaluation) placed(quantity string, at []Condition, a *Application) {
	p := &AppliedPlace{Points: []ComparedPoint{}}
	var points [][]float64
	to := make([]float64, len(at))
	for j, c := range at {
		to[j] = c.Value
		p.Names, p.Units, p.At = append(p.Names, c.Name), append(p.Units, c.Unit), append(p.At, Number(c.Value))
	}
	for i := range e.study.Questions {
		q := &e.study.Questions[i]
		if q.Quantity != quantity {
			continue
		}
		if values, ok := q.stated(at); ok {
			points = append(points, values)
			line := ComparedPoint{Case: q.Case}
			for _, v := range values {
				line.At = append(line.At, Number(v))
			}
			p.Points = append(p.Points, line)
		}
	}
	if len(points) == 0 {
		return
	}
	found := adequacy.Locate(points, to)
	p.State, p.Beyond, p.Distance, p.Nearest = found.State, Number(found.Beyond), Number(found.Distance), p.Points[found.Nearest].Case
	a.Place = p
	a.Outside = a.Outside || found.State == adequacy.Outside
}

// stated returns the conditions of the data of a question that a point names,
// not ok where one is missing.
func (q *Question) stated(at []Condition) ([]float64, bool) {
	values := make([]float64, len(at))
	for j, c := range at {
		found := false
		for _, m := range q.Conditions {
			if m.Name == c.Name && m.Unit == c.Unit {
				values[j], found = m.Data, true
			}
		}
		if !found {
			return nil, false
		}
	}
	return values, true
}

// conditionRange returns the range of a condition over all questions of one
// quantity that state it in the same unit.
func (e *evaluation) conditionRange(quantity string, p Condition) (lo, hi float64, found bool) {
	lo, hi = math.Inf(1), math.Inf(-1)
	for i := range e.study.Questions {
		if e.study.Questions[i].Quantity != quantity {
			continue
		}
		for _, m := range e.study.Questions[i].Conditions {
			if m.Name == p.Name && m.Unit == p.Unit {
				lo, hi, found = min(lo, m.Data), max(hi, m.Data), true
			}
		}
	}
	return lo, hi, found
}
