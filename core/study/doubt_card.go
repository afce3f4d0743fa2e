package study

import (
	"math"
	"slices"
	"strconv"
	"strings"

	"weirmark/core/notice"
	"weirmark/core/plausibility"
	"weirmark/core/profile"
	"weirmark/core/quantity"
)

// Limits beyond which values are asked about (common practice, no source).
const (
	highestCp    = 1.05 // of low-speed flow; at a stagnation point it is 1
	highestSpeed = 3.0  // of the reference speed
	lowestCp     = 12.0 // of a suction peak, with its sign turned
	leastCpRange = 0.05 // of Cp along a line
	lowestPeak   = 0.9  // of Cp at a stagnation point
	nearPeak     = 0.1  // of Cp between a peak that is resolved and the rows beside it
	sameFriction = 0.01 // of two friction velocities
)

// doubtCard asks about values that the case card makes implausible.
func (w *work) doubtCard(c *curve) {
	lo, hi := profile.Limits(c.y)
	file := w.e.study.fileName(c.slip)
	if w.isCp(c) {
		w.doubtStagnation(c, file)
	}
	if w.isCp(c) && hi > highestCp {
		w.ask(2, "the largest Cp of "+file, "cp-high", file, quantity.Text(hi, 3), quantity.Typed(highestCp))
	}
	if c.slip.Datum.Value == DatumAbsolute && !c.yTurned && lo < 0 {
		w.ask(2, "the datum of "+file, "absolute-negative", file, quantity.Text(c.yUnit.unit.FromSI(lo), 3))
	}
	if !c.yUnit.known {
		return
	}
	kelvin, speed := quantity.Dimension{0, 0, 0, 1}, quantity.Dimension{1, 0, -1}
	print := func(v float64) string { return valueUnit(quantity.Round(c.yUnit.unit.FromSI(v), 5), c.yUnit.symbol) }
	if c.yUnit.unit.Dimension == kelvin && !c.yUnit.unit.Step && !c.yTurned && lo < 0 {
		w.ask(2, "the temperatures of "+file, "temperature-below", file, print(lo), print(0))
	}
	if w.isEnergy() && lo < 0 {
		w.ask(2, "the sign of "+w.q.Quantity+" in "+file, "energy-negative", w.q.Quantity, file, print(lo))
	}
	w.doubtLength(c, file)
	ref, known := w.e.cardValue(w.q.Case, RefSpeed, c.slip.side())
	if w.q.Form.Name == "u/U" && c.yUnit.unit.Same(quantity.One) {
		ref, known = 1, true
	} else if c.yUnit.unit.Dimension != speed {
		known = false
	}
	if largest := max(math.Abs(lo), math.Abs(hi)); known && largest > highestSpeed*ref {
		w.ask(2, "the speeds of "+file, "speed-high", file, quantity.Text(largest/ref, 3))
	}
}

// isCp reports whether the values of a curve are pressure coefficients: by the
// form of the question, or by the name of a pure number.
func (w *work) isCp(c *curve) bool {
	if w.q.Form.Name != "" {
		return w.q.Form.Name == "Cp"
	}
	named := func(text string) bool {
		return slices.Contains([]string{"cp", "c_p", "pressure coefficient"}, strings.ToLower(text))
	}
	return c.yUnit.known && c.yUnit.unit.Same(quantity.One) && (named(w.q.Symbol) || named(w.q.Quantity) || named(c.slip.Y.Column.Value))
}

// isEnergy reports whether the values are means of squares: by the form of the
// question or the name of its quantity.
func (w *work) isEnergy() bool {
	if w.q.Form.Name != "" {
		return w.q.Form.Name == "k/U²" || w.q.Form.Name == "u'u'/U²"
	}
	return slices.Contains([]string{"k", "tke", "turbulent kinetic energy"}, strings.ToLower(w.q.Quantity))
}

// doubtStagnation asks about a closed section whose largest Cp is well below 1
// at a peak that its rows resolve; taps that miss the peak say nothing.
func (w *work) doubtStagnation(c *curve, file string) {
	whole := c
	if c.slip.Branch.Given() {
		p := *c.slip
		p.Branch = Field{}
		if full, _ := w.e.load(&p); full != nil {
			whole = full
		}
	}
	if whole.scalar() || !profile.Loop(whole.x) {
		return
	}
	y, at := known(whole.y), 0
	for i, v := range y {
		if v > y[at] {
			at = i
		}
	}
	if at == 0 || at == len(y)-1 || y[at] >= lowestPeak || y[at]-min(y[at-1], y[at+1]) > nearPeak {
		return
	}
	w.ask(2, "the stagnation point of "+file, "cp-stagnation", file, quantity.Text(y[at], 3))
}

// doubtLength asks about stations that lie along the reference length of the
// case only with another unit.
func (w *work) doubtLength(c *curve, file string) {
	length, known := w.e.cardValue(w.q.Case, RefLength, c.slip.side())
	if c.scalar() || !known || !(length > 0) || !c.xUnit.known || c.xUnit.unit.Dimension != (quantity.Dimension{1}) {
		return
	}
	lo, hi := profile.Limits(c.x)
	reach := max(math.Abs(lo), math.Abs(hi)) / length
	factor, found := plausibility.ScaledLength(reach)
	if !found {
		return
	}
	symbol, _ := cardSymbol(RefLength)
	r := w.e.study.card(w.q.Case).entry(RefLength, c.slip.side())
	print := func(v float64) string { return valueUnit(quantity.Round(c.xUnit.unit.FromSI(v), 4), c.xUnit.symbol) }
	w.ask(2, "the unit of "+c.xUnit.name+" in "+file, "length-scaled", c.xUnit.name, file, print(lo), print(hi), quantity.Text(reach, 3), symbol.Shown+" = "+valueUnit(r.Value, r.Unit), quantity.Text(factor, 3), scaleWords(factor))
}

// doubtDatum asks about pressures from two datums that the case card does not
// bring together.
func (w *work) doubtDatum() {
	s, d := w.finest(), w.reference
	if s == nil || d == nil || !s.slip.Datum.Given() || !d.slip.Datum.Given() || s.slip.Datum.Value == d.slip.Datum.Value {
		return
	}
	ofS, errS := w.e.input(w.q.Case, RefPressure, Simulation)
	ofD, errD := w.e.input(w.q.Case, RefPressure, OfData)
	if s.yTurned && d.yTurned && errS == nil && errD == nil && ofS.entry != ofD.entry {
		return
	}
	w.ask(2, "one datum of both sides", "datum-differs", s.slip.Datum.Value, d.slip.Datum.Value)
}

// unitsThatFit says which units a column of pressures without one could have,
// by the Cp that the case card would make of it.
func (w *work) unitsThatFit(p *Slip, f slipField) string {
	if f.path != "y.unit" || p.Role.Value != Simulation && p.Role.Value != Reference || !p.Y.Column.Given() {
		return ""
	}
	q, known := w.e.cardValue(w.q.Case, DynamicPressure, p.side())
	c, _ := w.e.load(p)
	if !known || !(q > 0) || c == nil || c.yUnit.known {
		return ""
	}
	zero, _ := w.e.cardValue(w.q.Case, RefPressure, p.side())
	lo, hi := profile.Limits(c.y)
	var list []string
	fits := func(symbol string, factor float64) {
		from, to := (factor*lo-zero)/q, (factor*hi-zero)/q
		if to <= highestCp && from > -lowestCp && to-from > leastCpRange {
			list = append(list, symbol+" (Cp "+quantity.Text(from, 3)+" to "+quantity.Text(to, 3)+")")
		}
	}
	fits("Pa", 1)
	fits("kPa", 1000)
	if rho, have := w.density(p.side()); have {
		fits("m^2/s^2", rho)
	} else if len(list) > 0 {
		list = append(list, "m^2/s^2 (needs ρ)")
	}
	if list == nil {
		return ""
	}
	return " Its range fits " + strings.Join(list, " or ") + "."
}

// doubtFirstCell asks about the wall distance of the first cells of one grid
// that the stated wall treatment, or any, does not go with.
func (w *work) doubtFirstCell() {
	s := w.finest()
	if s == nil || s == w.grids {
		return
	}
	y, err := strconv.ParseFloat(s.slip.YPlus.Value, 64)
	if err != nil {
		return
	}
	treatment := ""
	if f := w.q.Family; f != nil {
		treatment = strings.ToLower(f.Wall)
	}
	for _, set := range enteredSettings(s.slip.Settings.Value) {
		if strings.HasPrefix(strings.ToLower(set.key), "wall") {
			treatment = strings.ToLower(set.value)
		}
	}
	function, resolved := strings.Contains(treatment, "function"), strings.Contains(treatment, "resolved")
	why := ""
	switch {
	case function && y < wallFunction:
		why = ", where wall functions are stated: below " + quantity.Typed(wallFunction) + " they do not hold"
	case resolved && y > resolvedWall:
		why = ", where a resolved wall is stated: above " + quantity.Typed(resolvedWall) + " the sublayer is not resolved"
	case !function && !resolved && y > resolvedWall && y < wallFunction:
		why = ": too far out to resolve the sublayer (" + quantity.Typed(resolvedWall) + "), too near for wall functions (" + quantity.Typed(wallFunction) + ")"
	default:
		return
	}
	w.ask(1, "the wall treatment of "+w.e.study.fileName(s.slip), "first-cell", w.e.study.fileName(s.slip), quantity.Text(y, 2), why)
}

// doubtFriction tells of two friction velocities: wall units then differ by
// them, and not by the flow alone.
func (w *work) doubtFriction() {
	if w.q.Form.Name != "u⁺" && w.q.XForm.Name != "y⁺" {
		return
	}
	s, knownS := w.e.cardValue(w.q.Case, FrictionSpeed, Simulation)
	d, knownD := w.e.cardValue(w.q.Case, FrictionSpeed, OfData)
	if knownS && knownD && d > 0 && math.Abs(s/d-1) > sameFriction {
		w.tell(notice.New("friction-two", quantity.Text(s, 3), quantity.Text(d, 3), quantity.Percent(math.Abs(s/d-1))))
	}
}

// areaCauses is the ratio that two reference areas of the card would explain.
func (w *work) areaCauses() []plausibility.Cause {
	var list []plausibility.Cause
	card := w.e.study.Card(w.q.Case)
	for i, a := range card.References {
		for _, b := range card.References[:i] {
			ua, errA := a.unit()
			ub, errB := b.unit()
			if a.Symbol == RefArea && b.Symbol == RefArea && errA == nil && errB == nil && a.Value > 0 && b.Value > 0 {
				ratio := ua.ToSI(a.Value) / ub.ToSI(b.Value)
				list = append(list, plausibility.Cause{Ratio: ratio, Words: "one reference area against the other (their ratio is " + quantity.Text(ratio, 3) + ")"})
			}
		}
	}
	return list
}
