package study

import (
	"math"

	"weirmark/core/notice"
	"weirmark/core/quantity"
	"weirmark/core/uncertainty"
)

// asymmetric gives an entered source of the data its upper side.
func (w *work) asymmetric(p *part, s *Source, k float64, target Target) {
	if s.Of != OfData {
		w.need(2, true, "one half-width of "+s.Name, Target{Kind: "source", ID: w.q.id(), Field: target.Field + ".upper"}, "sides-data", s.Name)
		return
	}
	upper := *s
	upper.Value = *s.Upper
	if plus, ok := w.sourceValues(&upper, k, target); ok {
		w.twoSided(p, absolutes(p.source.U), plus)
	}
}

func absolutes(values []float64) []float64 {
	out := make([]float64, len(values))
	for i, v := range values {
		out[i] = math.Abs(v)
	}
	return out
}

// twoSided gives a part of the data the standard uncertainty of the side on
// which the simulation lies.
func (w *work) twoSided(p *part, minus, plus []float64) {
	e := make([]float64, len(w.x))
	p.sides = make([]uncertainty.TwoPiece, len(w.x))
	unequal := 0
	both := len(w.s) == len(w.d) // else the data are a curve and the simulation one value: the larger side
	for i := range e {
		if both {
			e[i] = w.s[i] - w.d[i]
		}
		p.sides[i] = uncertainty.TwoPiece{Minus: minus[i], Plus: plus[i]}
		if minus[i] != plus[i] {
			unequal++
		}
	}
	facing := uncertainty.Facing(e, minus, plus)
	for i, u := range facing {
		p.source.U[i] = math.Copysign(u, p.source.U[i])
	}
	if unequal == 0 {
		return
	}
	shift := 0.0
	for _, t := range p.sides {
		if s := t.Shift(); math.Abs(s) > math.Abs(shift) {
			shift = s
		}
	}
	if both {
		p.line.Text += ", unequal sides: the one facing E"
	} else {
		p.line.Text += ", unequal sides: the larger"
	}
	w.tell(notice.New("sides-unequal", p.line.Name, quantity.Counted(unequal, "station"), quantity.Signed(float64(w.step(shift)), 2)+w.cell.UnitSuffix()))
}

// sample draws the model error at the one value, or at the station of the
// largest |E|/u_val, where bars have two sides or a person asks for it.
func (w *work) sample() {
	if w.inner || w.uVal == nil || len(w.tested) == 0 {
		return
	}
	at, asked := w.tested[0], w.choices.Sampled
	for _, i := range w.tested {
		if math.Abs(w.s[i]-w.d[i])/w.uVal[i] > math.Abs(w.s[at]-w.d[at])/w.uVal[at] {
			at = i
		}
	}
	for i := range w.parts {
		asked = asked || w.parts[i].skewed(at)
	}
	if !asked {
		return
	}
	model, sides := w.errorModel(at)
	got, err := model.Sample(0.95, samplingSeed)
	if err != nil {
		w.tell(notice.New("sampled-none", err.Error()))
		return
	}
	line := &SampledLine{At: None, Value: w.step(got.Value), U: w.step(got.U), Lo: w.step(got.Low), Hi: w.step(got.High), Level: Number(got.Level), Draws: got.Draws, Settled: got.Settled, Minus: None, Plus: None, Shift: None}
	if !w.cell.Scalar {
		line.At = Number(w.xUnit.FromSI(w.x[at]))
	}
	if sides != nil {
		line.Minus, line.Plus, line.Shift = w.step(sides.Minus), w.step(sides.Plus), w.step(sides.Shift())
	}
	w.cell.Sampled = line
	if !got.Settled {
		w.tell(notice.New("sampled-cap", got.Draws))
	}
}

// skewed reports whether a part has two different sides at a station.
func (p *part) skewed(at int) bool { return p.sides != nil && p.sides[at].Minus != p.sides[at].Plus }

// errorModel is E less the errors of all parts at a station; sides are those of
// the parts with two of them together.
func (w *work) errorModel(at int) (uncertainty.Model, *uncertainty.TwoPiece) {
	e := w.s[at] - w.d[at]
	var inputs []uncertainty.Input
	var sides *uncertainty.TwoPiece
	for i := range w.parts {
		p := &w.parts[i]
		in := uncertainty.Input{U: math.Abs(p.source.U[at]), Distribution: uncertainty.Normal}
		switch {
		case p.skewed(at):
			in = uncertainty.Input{Distribution: uncertainty.Split, Sides: p.sides[at]}
			if sides == nil {
				sides = &uncertainty.TwoPiece{}
			}
			sides.Minus, sides.Plus = math.Hypot(sides.Minus, p.sides[at].Minus), math.Hypot(sides.Plus, p.sides[at].Plus)
		case !math.IsInf(p.degrees, 1):
			in.Distribution, in.Degrees = uncertainty.Student, p.degrees
		case p.form != "":
			in.Distribution = p.form
		}
		inputs = append(inputs, in)
	}
	sum := func(x []float64) float64 {
		total := e
		for _, v := range x {
			total -= v
		}
		return total
	}
	return uncertainty.Model{F: sum, Inputs: inputs}, sides
}
