package study

import (
	"math"
	"strconv"

	"weirmark/core/interpolate"
	"weirmark/core/notice"
	"weirmark/core/quantity"
	"weirmark/core/station"
	"weirmark/core/uncertainty"
)

// ReferenceLine is a quantity of the case card that the cell was made with.
// Values are in its own unit.
type ReferenceLine struct {
	Symbol string `json:"symbol"` // as it is shown
	Words  string `json:"words"`
	Side   string `json:"side"` // "" for both
	Kind   string `json:"kind"`
	Value  Number `json:"value"`
	U      Number `json:"u"` // standard; null where it is not known
	Unit   string `json:"unit"`
	Origin string `json:"origin"`
	// Formula, of a quantity that was computed from others of the card.
	Formula string `json:"formula"`
}

// takeCard lists the case card in the cell, with what follows from it, and the
// axes of the case.
func (w *work) takeCard() {
	card := w.e.study.card(w.q.Case)
	if card == nil {
		return
	}
	for i := range card.References {
		r := &card.References[i]
		known, _ := cardSymbol(r.Symbol)
		line := ReferenceLine{Symbol: known.Shown, Words: known.Words, Side: r.Side, Kind: r.Kind, Value: Number(r.Value), U: None, Unit: r.Unit, Origin: r.Origin}
		if r.U != nil {
			line.U = Number(*r.U)
		}
		w.cell.References = append(w.cell.References, line)
		if _, err := r.unit(); err != nil {
			n := asNotice(err)
			w.tell(n)
			w.stop(2, "a unit of "+known.Shown, Target{Kind: ItemReference, ID: w.q.Case, Field: strconv.Itoa(i) + ".unit"}, n)
		}
	}
	if line, follows := w.e.computedLine(w.q.Case, DynamicPressure); follows {
		w.cell.References = append(w.cell.References, line)
	}
	w.axes(card)
}

// computedLine is a quantity of the card that follows from others on it, with
// its uncertainty by the first order.
func (e *evaluation) computedLine(caseName, symbol string) (ReferenceLine, bool) {
	if _, err := e.input(caseName, symbol, ""); err == nil {
		return ReferenceLine{}, false
	}
	b := &binding{e: e, caseName: caseName}
	o, err := b.cardOperand(symbol)
	if err != nil {
		return ReferenceLine{}, false
	}
	known, _ := cardSymbol(symbol)
	unit, err := quantity.Parse(known.Unit)
	if err != nil {
		return ReferenceLine{}, false
	}
	said := b.said(quantity.Name{Text: symbol, Card: true})
	line := ReferenceLine{Symbol: known.Shown, Words: known.Words, Value: Number(unit.FromSI(o.Value(b.values(nil)))), U: None, Unit: known.Unit, Origin: "computed", Formula: known.Shown + " = " + said[1:len(said)-1]}
	model := uncertainty.Model{F: o.Value}
	for _, in := range b.inputs {
		if in.entry.U == nil {
			return line, true
		}
		model.Inputs = append(model.Inputs, uncertainty.Input{Value: in.value, U: in.u, Distribution: uncertainty.Normal})
	}
	if first, err := model.FirstOrder(); err == nil {
		line.U = Number(unit.StepFromSI(first.U))
	}
	return line, true
}

// cardSources makes the uncertainties of the case card sources of the budget.
// An error that acts on both sides counts by the difference of what it does to
// them: what is common to S and D cancels from E.
func (w *work) cardSources() {
	s, d := w.finest(), w.reference
	w.cardUnknown(s, d)
	ofS, ofD := w.runParts(s), w.dataParts(d)
	used := make([]bool, len(ofS))
	for _, data := range ofD {
		partner := -1
		for k, run := range ofS {
			if run.in.entry.Symbol == data.in.entry.Symbol && shared(run.in.entry, data.in.entry) {
				partner = k
			}
		}
		if partner < 0 {
			w.cardSource(OfData, data, "the data")
			continue
		}
		used[partner] = true
		both := cardPart{data.in, make([]float64, len(data.at))}
		for i := range both.at {
			both.at[i] = cancelled(ofS[partner].at[i], data.at[i])
		}
		w.cardSource(OfInput, both, "both sides, of which what is common cancels")
	}
	for k, run := range ofS {
		if !used[k] {
			w.cardSource(OfInput, run, "the simulation")
		}
	}
}

// cancelled is a - b, zero where nothing but rounding is left.
func cancelled(a, b float64) float64 {
	const rounding = 1e-9 // of slopes taken by differences
	if rest := a - b; !(math.Abs(rest) <= rounding*max(math.Abs(a), math.Abs(b))) {
		return rest
	}
	return 0
}

// shared reports whether the two sides see one error.
func shared(s, d *ReferenceQuantity) bool {
	if s == d {
		return s.Shared != ErrorApart
	}
	return s.Shared == ErrorShared || d.Shared == ErrorShared
}

// cardSource adds one source; nothing where it does nothing.
func (w *work) cardSource(of string, p cardPart, acts string) {
	any := false
	for _, v := range p.at {
		any = any || v != 0
	}
	if !any {
		return
	}
	r := p.in.entry
	known, _ := cardSymbol(r.Symbol)
	text := known.Shown + " = " + valueUnit(r.Value, r.Unit) + " ± " + quantity.Typed(*r.U) + " (standard), acting on " + acts
	w.add(of, "reference "+known.Shown, text, r.Origin, p.at, true, false).aside = true
}

// cardUnknown asks for the uncertainties of the quantities that were used.
func (w *work) cardUnknown(curves ...*curve) {
	asked := map[*ReferenceQuantity]bool{}
	card := w.e.study.card(w.q.Case)
	for _, c := range curves {
		if c == nil || c.slope == nil && !c.yTurned {
			continue
		}
		for _, in := range c.inputs {
			if in.entry.U != nil || asked[in.entry] {
				continue
			}
			asked[in.entry] = true
			for i := range card.References {
				if &card.References[i] == in.entry {
					known, _ := cardSymbol(in.entry.Symbol)
					w.need(2, false, "the uncertainty of "+known.Shown, Target{Kind: ItemReference, ID: w.q.Case, Field: strconv.Itoa(i) + ".u"}, "card-uncertainty", known.Shown, w.q.Case)
				}
			}
		}
	}
}

// cardLost tells that the uncertainties of the case card are not followed into
// a scalar that is taken from each side by itself.
func (w *work) cardLost(scalar string) {
	for _, c := range []*curve{w.finest(), w.reference} {
		if c == nil {
			continue
		}
		for _, p := range c.parts {
			if p.in.u > 0 {
				w.tell(notice.New("form-unfollowed", w.e.study.fileName(c.slip), scalar, "the scalar is taken from each side by itself"))
				break
			}
		}
	}
}

// dataParts are the parts of the reference at the stations.
func (w *work) dataParts(c *curve) []cardPart {
	parts := []cardPart{}
	for _, p := range c.parts {
		at := pick(p.at, w.rows)
		if c.scalar() { // the mean of the readings
			at = []float64{uncertaintyMean(known(p.at))}
		}
		if p.in.u > 0 {
			parts = append(parts, cardPart{p.in, at})
		}
	}
	return parts
}

func uncertaintyMean(values []float64) float64 {
	mean, _, _ := uncertainty.Replicates(values)
	return mean
}

// runParts are the parts of the simulation, brought to the stations as S is.
func (w *work) runParts(c *curve) []cardPart {
	parts := []cardPart{}
	for _, p := range c.parts {
		if !(p.in.u > 0) {
			continue
		}
		if c.scalar() {
			if row := w.scalarRow(c); row >= 0 {
				parts = append(parts, cardPart{p.in, []float64{p.at[row]}})
			}
			continue
		}
		got := station.Resample(w.e.study.fileName(c.slip), c.xUnit.name, inUnit(c.x, c.xUnit, w.xUnit), p.at, w.x, station.Options{Method: interpolate.Linear, Show: w.place})
		at := blank(len(w.x))
		for j, i := range got.Kept {
			at[i] = got.S[j]
		}
		parts = append(parts, cardPart{p.in, at})
	}
	return parts
}

// Reduction is the uncertainty of a reduced value at one station, by the first
// order and by sampling. Values are in the cell's unit, of the inputs in theirs.
type Reduction struct {
	Text    string         `json:"text"` // the formula in words
	X       Number         `json:"x"`    // station; null for a scalar
	Line    int            `json:"line"`
	Value   Number         `json:"value"`
	U       Number         `json:"u"`
	Low     Number         `json:"low"`
	High    Number         `json:"high"`
	Sampled Number         `json:"sampled"` // mean of the draws
	SU      Number         `json:"sampled_u"`
	SLow    Number         `json:"sampled_low"`
	SHigh   Number         `json:"sampled_high"`
	Draws   int            `json:"draws"`
	Agrees  bool           `json:"agrees"`
	Inputs  []ReducedInput `json:"inputs"`
}

// ReducedInput is an input of a reduction: its standard uncertainty and what it
// does to the value.
type ReducedInput struct {
	Name   string `json:"name"`
	Part   Number `json:"part"`
	Common bool   `json:"common"` // one error of all stations
}

const (
	reductionLevel = 0.95
	reductionSeed  = 1
)

// reduction holds the first order against sampling at the station of the data
// where the inputs do most, since there it is worst.
func (w *work) reduction() {
	c := w.reference
	if w.inner || c == nil || c.reduced == nil {
		return
	}
	best, at, largest := -1, 0, 0.0
	for j, row := range w.reductionRows() {
		m := c.reduced.model(row)
		first, err := m.FirstOrder()
		if err == nil && quantity.Round(first.U, 10) > largest {
			best, at, largest = row, j, quantity.Round(first.U, 10)
		}
	}
	if best < 0 {
		return
	}
	m := c.reduced.model(best)
	first, err := m.FirstOrder()
	sampled, serr := m.Sample(reductionLevel, reductionSeed)
	if err != nil || serr != nil {
		w.tell(notice.New("reduction-none", c.reduced.text))
		return
	}
	r := &Reduction{Text: c.reduced.text, X: None, Line: c.table.RowLine(best), Value: w.yNumber(first.Value), U: w.step(first.U), Low: None, High: None,
		Sampled: w.yNumber(sampled.Value), SU: w.step(sampled.U), SLow: w.yNumber(sampled.Low), SHigh: w.yNumber(sampled.High), Draws: sampled.Draws, Inputs: []ReducedInput{}}
	if !w.cell.Scalar {
		r.X = Number(w.xUnit.FromSI(w.x[at]))
	}
	if lo, hi, ok := first.Interval(reductionLevel); ok {
		r.Low, r.High = w.yNumber(lo), w.yNumber(hi)
	}
	if gap, ok := uncertainty.Compare(first, sampled); ok {
		r.Agrees = gap.Agrees
	}
	b := c.reduced.binding
	for i, part := range first.Parts {
		in := ReducedInput{Part: w.step(part)}
		if i < len(b.columns) {
			in.Name = b.columns[i].called
		} else {
			known, _ := cardSymbol(b.inputs[i-len(b.columns)].entry.Symbol)
			in.Name, in.Common = known.Shown, true
		}
		r.Inputs = append(r.Inputs, in)
	}
	w.cell.Reduction = r
	if !r.Agrees {
		w.tell(notice.New("reduction-apart", c.reduced.text, quantity.Text(float64(r.U), 2), quantity.Text(float64(r.SU), 2)))
	}
}

// reductionRows are the rows of the data that are compared.
func (w *work) reductionRows() []int {
	if !w.cell.Scalar {
		return w.rows
	}
	for i, v := range w.reference.y {
		if !math.IsNaN(v) {
			return []int{i}
		}
	}
	return nil
}

// model is the reduction at one row; columns without a known uncertainty have
// none there.
func (r *reducing) model(row int) uncertainty.Model {
	m := uncertainty.Model{F: r.operand.Value}
	for i, c := range r.binding.columns {
		in := uncertainty.Input{Value: c.values[row], Distribution: uncertainty.Normal}
		if i == 0 && r.u != nil && !math.IsNaN(r.u[row]) {
			in.U = r.u[row]
		}
		m.Inputs = append(m.Inputs, in)
	}
	for _, in := range r.binding.inputs {
		m.Inputs = append(m.Inputs, uncertainty.Input{Value: in.value, U: in.u, Distribution: uncertainty.Normal})
	}
	return m
}
