package study

import (
	"math"
	"strconv"

	"weirmark/core/integrate"
	"weirmark/core/notice"
	"weirmark/core/quantity"
	"weirmark/core/uncertainty"
)

// consistent lists a test of the data against themselves.
func (w *work) consistent(line ConsistencyLine) {
	w.cell.Consistency = append(w.cell.Consistency, line)
}

// flowRate holds the integral of the data over their stations against the flow
// rate that is stated for them.
func (w *work) flowRate() {
	if w.reference == nil || w.cell.Scalar || w.uD == nil || !w.reference.slip.FlowRate.Given() {
		return
	}
	p := w.reference.slip
	stated, err := strconv.ParseFloat(p.FlowRate.Value, 64)
	u, errU := 0.0, error(nil)
	if p.FlowRateU.Given() {
		u, errU = strconv.ParseFloat(p.FlowRateU.Value, 64)
	}
	if err != nil || errU != nil || u < 0 {
		w.need(2, false, "the stated flow rate", slipTarget(p, "flow_rate"), "field-bad", "stated flow rate", w.e.study.fileName(p), p.FlowRate.Value+" ± "+p.FlowRateU.Value)
		return
	}
	value, own, err := w.integral()
	if err != nil {
		w.tell(notice.New("flow-rate-none", w.e.study.fileName(p), err.Error()))
		return
	}
	both := math.Hypot(own, u)
	line := ConsistencyLine{Name: "integral over the stations against the stated flow rate", Value: Number(value), Expected: Number(stated), U: Number(both), Ratio: Number(math.Abs(value-stated) / both)}
	line.Holds = !exceeds(math.Abs(value-stated), float64(w.choices.K*both))
	w.consistent(line)
	if !line.Holds {
		w.ask(2, "the flow rate of the data", "flow-rate-differs", quantity.Like(value, both, 2), quantity.Like(stated, both, 2), quantity.Text(float64(line.Ratio), 2))
	}
}

// integral is the trapezium rule over the stations, in the units of the cell,
// with the standard uncertainty that the sources of the data make.
func (w *work) integral() (value, u float64, err error) {
	order := uncertainty.Along(w.x)
	x, y := make([]float64, len(order)), make([]float64, len(order))
	for j, i := range order {
		x[j], y[j] = w.xUnit.FromSI(w.x[i]), w.yUnit.FromSI(w.d[i])
	}
	if value, err = integrate.Trapezoid(x, y); err != nil {
		return 0, 0, err
	}
	weight := make([]float64, len(order)) // of each station, in SI
	for j, i := range order {
		lo, hi := order[max(j-1, 0)], order[min(j+1, len(order)-1)]
		weight[i] = (w.x[hi] - w.x[lo]) / 2
	}
	variance := 0.0
	for i := range w.parts {
		p := &w.parts[i]
		if p.line.Of != OfData {
			continue
		}
		source := p.source
		if p.own != nil {
			source.U = p.own
		}
		one := uncertainty.Combine(len(w.x), []uncertainty.Source{source})
		variance += one.Weighted(weight)
	}
	step := w.yUnit.StepFromSI(w.xUnit.StepFromSI(1))
	return value, math.Sqrt(variance) * step, nil
}

// resolved makes a source of the resolution that shows in the data, where that
// was chosen, and offers it where their uncertainty is smaller than it allows.
func (w *work) resolved() {
	if w.reference == nil || len(w.x) == 0 || w.cell.Scalar {
		return
	}
	c := w.reference
	step, found := uncertainty.Quantised(known(inUnit(c.y, c.yUnit, w.yUnit)))
	if !found {
		return
	}
	least := uncertainty.OfResolution(step)
	line := &ResolutionLine{Step: w.step(step), U: w.step(least), Counted: w.q.Resolution == Counted}
	if line.Counted {
		w.add(OfData, "resolution of the data", "steps of "+quantity.Text(float64(line.Step), 3)+w.cell.UnitSuffix()+", rectangular", "seen in "+w.e.study.fileName(c.slip), uncertainty.Constant(len(w.x), least), false, false)
		w.cell.Resolution = line
		return
	}
	var sources []uncertainty.Source
	for i := range w.parts {
		if w.parts[i].line.Of == OfData {
			sources = append(sources, w.parts[i].ofSide())
		}
	}
	if sources == nil {
		return
	}
	below := 0
	for _, u := range uncertainty.Combine(len(w.x), sources).Total() {
		if u < least {
			below++
		}
	}
	if below > 0 {
		w.cell.Resolution = line
		w.ask(2, "the resolution of the data", "resolution-coarse", w.e.study.fileName(c.slip), quantity.Text(float64(line.Step), 3), quantity.Text(float64(line.U), 2)+w.cell.UnitSuffix(), below)
	}
}
