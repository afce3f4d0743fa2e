package study

import (
	"math"

	"weirmark/core/derived"
	"weirmark/core/quantity"
	"weirmark/core/uncertainty"
)

// remainders are what the effects of the method leave in the difference of the
// two sides: an effect that is the same on both is not in E.
func remainders(s, d derived.Scalar) []part {
	var parts []part
	left := map[string]bool{}
	add := func(name string, change, factor float64) {
		u := factor * math.Abs(change)
		parts = append(parts, part{aside: true, degrees: math.Inf(1), source: uncertainty.Source{U: []float64{u}},
			line: SourceLine{Name: "taking of the scalar: " + name, Of: OfNumerical, Text: "difference of the effect on the two sides, times " + quantity.Text(factor, 3), Pattern: Independent, Origin: "computed"}})
	}
	for _, e := range s.Effects {
		change := e.Change
		for _, other := range d.Effects {
			if other.Name == e.Name {
				change -= other.Change
				left[e.Name] = true
			}
		}
		add(e.Name, change, e.Factor)
	}
	for _, e := range d.Effects {
		if !left[e.Name] {
			add(e.Name, e.Change, e.Factor)
		}
	}
	return parts
}

// ofCurve reports whether an entered source is of the values of the curve.
func (w *work) ofCurve(s *Source) bool {
	if w.cell.Derived == nil || s.OfScalar || s.Input != "" {
		return false
	}
	if s.Of == OfData {
		return w.derivedData
	}
	return w.derivedBoth
}

// propagated carries the sources of the curves to the scalar: of the data
// through the curve of the data, all others through that of the simulation,
// which has no rows where it is a value. First order: sqrt(cᵀVc), with c from
// differences over one standard uncertainty at each row and V the declared
// pattern of the source.
func (w *work) propagated(t *taking, reference, simulation derived.Curve) []part {
	w.derivedData, w.derivedBoth = true, len(simulation.X) > 0
	parts, halves := w.curveParts(t)
	slopes := map[bool][]float64{}
	for _, data := range []bool{true, false} {
		from := reference
		if !data {
			from = simulation
		}
		var sources []uncertainty.Source
		for _, p := range parts {
			if (p.line.Of == OfData) == data {
				sources = append(sources, p.sources()...)
			}
		}
		if len(sources) == 0 && len(halves) == 0 || len(from.X) == 0 {
			continue
		}
		u := uncertainty.Combine(len(from.X), sources).Total()
		c, ok := t.slopes(from, u)
		if !ok {
			w.need(2, true, "the uncertainty of "+w.q.label(), w.q.target("derive.kind"), "derive-lost", t.kind.Name)
			continue
		}
		slopes[data] = c
		w.placesU(t, from, u, data)
	}
	w.cell.Derived.Propagation = "first order, by differences over ± one standard uncertainty at each row, with the declared correlation between stations"
	var carried []part
	for _, p := range parts {
		c := slopes[p.line.Of == OfData]
		if c == nil {
			continue
		}
		at := carriedThrough(p, c)
		carried = append(carried, at)
		for i := range w.cell.Shared {
			if at.own != nil && w.cell.Shared[i].Source == at.line.Name {
				w.cell.Shared[i].U, w.cell.Shared[i].Left = t.step(at.own[0]), t.step(at.source.U[0])
			}
		}
	}
	w.carryIntervals(t, halves, slopes)
	return carried
}

// carriedThrough is a part at the stations as one of their scalar, with the
// slopes c. What was drawn or two-sided at the stations is a standard
// uncertainty of the scalar.
func carriedThrough(p part, c []float64) part {
	through := func(sources ...uncertainty.Source) []float64 {
		return []float64{uncertainty.Combine(len(c), sources).Through(c)}
	}
	at := part{line: p.line, degrees: p.degrees, aside: p.interp, source: uncertainty.Source{U: through(p.sources()...)}}
	if p.own != nil {
		own := p.source
		own.U = p.own
		at.own = through(own)
	}
	at.line.Text += "; carried through the curve"
	return at
}

// curveParts collects the sources of the curves at their stations, those known
// as intervals apart.
func (w *work) curveParts(t *taking) (parts []part, halves []interval) {
	w.parts = nil
	if !w.reference.scalar() {
		w.dataColumn()
		w.ofTheCurve(t)
	}
	for i := range w.q.Sources {
		if s := &w.q.Sources[i]; w.ofCurve(s) && (s.Model == "" || s.Model == w.model) {
			w.source(i, s)
			if w.bound != nil {
				halves = append(halves, interval{w.bound, s.Of == OfData})
				w.bound = nil
			}
		}
	}
	w.overlaps()
	w.spreads = nil // they are of stations
	if w.q.Resolution == Counted {
		w.resolved()
	}
	if w.derivedBoth && !t.kind.Loop {
		w.cardSources()
		w.interpolationPart()
	} else {
		w.cardLost(t.kind.Name)
	}
	parts, w.parts = w.parts, nil
	return parts, halves
}

// ofTheCurve takes what repeated readings and a digitising bring at the stations.
// Along a contour a place on the axis is two of the curve, so that neither can be
// given its stations: a source of the scalar has to be entered.
func (w *work) ofTheCurve(t *taking) {
	if !t.kind.Loop {
		w.repeated()
		w.digitised()
		return
	}
	if w.reference.slip.Digitised.Is.Value == "yes" {
		w.need(2, true, "the uncertainty of "+w.q.label(), w.q.target("derive.kind"), "derive-lost", t.kind.Name)
	}
}

// interval holds the half-widths of a source that is known as an interval.
type interval struct {
	half []float64
	data bool
}

// carryIntervals carries half-widths to the scalar: at most, all act together.
func (w *work) carryIntervals(t *taking, halves []interval, slopes map[bool][]float64) {
	total := 0.0
	for _, h := range halves {
		for i, c := range slopes[h.data] {
			total += float64(math.Abs(c) * h.half[i])
		}
	}
	if len(halves) > 0 {
		w.bound = []float64{total}
		w.cell.Bound = &BoundLine{Half: t.step(total), At: None}
	}
}

// slopes are the changes of the scalar with the value at each row, in SI of
// the columns.
func (t *taking) slopes(c derived.Curve, u []float64) ([]float64, bool) {
	lo, hi := math.Inf(1), math.Inf(-1)
	for _, v := range known(c.Y) {
		lo, hi = min(lo, v), max(hi, v)
	}
	if !(hi > lo) {
		return nil, false
	}
	s, ok := t.kind.Sensitivities(t.scaled(c), t.settings, times(u, 1/t.pressure), (hi-lo)/t.pressure*1e-4)
	return times(s, 1/t.pressure), ok
}

// placesU gives the candidates of the last side taken their uncertainty:
// that of the values there over the slope.
func (w *work) placesU(t *taking, from derived.Curve, u []float64, data bool) {
	name := "simulation at the stations"
	if data {
		name = "reference"
	}
	level := make([]float64, len(from.Y))
	for i, v := range from.Y {
		level[i] = v - t.settings.Numbers[derived.KeyLevel]
	}
	for i := range w.cell.Derived.Sides {
		side := &w.cell.Derived.Sides[i]
		for j := range side.Places {
			if at := t.x.ToSI(float64(side.Places[j].X)); side.Side == name {
				if v, known := w.between(at, u); known {
					side.Places[j].U = Number(t.x.StepFromSI(derived.CrossingU(from.X, level, at, v)))
				}
			}
		}
	}
}
