package study

import (
	"math"
	"slices"
	"sort"

	"weirmark/core/adequacy"
	"weirmark/core/quantity"
	"weirmark/core/refinement"
)

// judge holds the requirement against the interval of the model error.
func (w *work) judge() {
	r := w.q.Requirement
	if !r.set() {
		w.need(4, false, "an accuracy requirement", w.q.target("requirement"), "requirement-missing", w.q.label())
		return
	}
	j := &Judgement{Limit: None, Percent: None, Who: r.Who, Date: r.Date, Late: r.Late, At: None, UValNeeded: None, UNumNeeded: None, UNumReduction: None}
	if r.Percent {
		j.Percent = Number(r.Value)
	}
	w.cell.Requirement = j
	if r.Percent && w.yUnit.ByConvention() {
		n := percentOfConvention("the requirement", w.yUnit.symbol)
		w.tell(n)
		w.stop(4, "a requirement in the unit of the data", w.q.target("requirement.percent"), n)
		return
	}
	if r.Late {
		w.need(4, false, "a requirement recorded before results were seen", w.q.target("requirement"), "requirement-late")
	}
	if w.uVal == nil || len(w.tested) == 0 {
		return
	}
	limits := make([]float64, len(w.tested))
	e, u := make([]float64, len(w.tested)), slices.Clone(pick(w.uVal, w.tested))
	for n, i := range w.tested {
		e[n] = w.s[i] - w.d[i]
		if b := w.boundAt(i); b > 0 { // the interval of E is wider by it at both ends
			u[n] += b / w.choices.K
		}
		limits[n] = w.limit(r, i)
	}
	outcome, at := adequacy.JudgeAll(rounded(e), rounded(u), w.choices.K, rounded(limits))
	j.Outcome = string(outcome)
	w.marine(e, limits)
	j.Limit = w.step(limits[at])
	if !w.cell.Scalar {
		j.At = Number(w.xUnit.FromSI(w.x[w.tested[at]]))
	}
	if outcome == adequacy.NotResolved {
		w.resolve(j, e[at], w.tested[at], limits[at])
	}
}

// set reports whether there is a requirement: who wants it, or when, is none
// without its value.
func (r *Requirement) set() bool { return r != nil && r.Value > 0 }

// limit is what a requirement allows at a station, in SI.
func (w *work) limit(r *Requirement, i int) float64 {
	if r.Percent {
		return math.Abs(w.d[i]) * r.Value / 100
	}
	return w.yUnit.StepToSI(r.Value)
}

// rounded keeps ten digits, so that every host decides alike.
func rounded(values []float64) []float64 {
	out := make([]float64, len(values))
	for i, v := range values {
		out[i] = quantity.Round(v, 10)
	}
	return out
}

// resolve says what uncertainty would show the requirement at the deciding
// station, E unchanged.
func (w *work) resolve(j *Judgement, e float64, i int, limit float64) {
	bound := w.boundAt(i)
	needed, possible := adequacy.Needed(math.Abs(e)+bound, w.choices.K, limit)
	j.Toward = Shown
	if !possible {
		needed, j.Toward = (math.Abs(e)-bound-limit)/w.choices.K, NotMet
		if !(needed > 0) {
			return
		}
	}
	j.UValNeeded = w.step(needed)
	w.nextGrid(needed)
	w.ways(j, i, needed)
	if w.uNum == nil {
		return
	}
	if u, ok := adequacy.PartNeeded(w.uVal[i], w.uNum[i], needed); ok {
		j.UNumNeeded = w.step(u)
		j.UNumReduction = Number(1 - u/w.uNum[i])
	}
}

// nextGrid tells the grid that would bring u_val of a scalar to what is
// needed, the other parts unchanged.
func (w *work) nextGrid(needed float64) {
	if w.cell.Grids == nil || !w.cell.Scalar || w.gridU == nil {
		return
	}
	u, ok := adequacy.PartNeeded(w.uVal[0], w.gridU[0], needed)
	if !ok {
		return
	}
	next := refinement.NextGrid(w.refined, w.choices.dimension(), w.choices.rule(), w.gridU[0], u, w.q.costExponent())
	// An order is good for no more than three digits of a cell count.
	w.cell.Grids.CostExponent = Number(w.q.costExponent())
	w.cell.Grids.NextCells, w.cell.Grids.NextCost = Number(quantity.Round(next.Cells, 3)), Number(next.Cost)
}

// ways lists the sources of which each alone, made smaller, would bring u_val
// at station i to what is needed.
func (w *work) ways(j *Judgement, i int, needed float64) {
	for n := range w.parts {
		p := &w.parts[n]
		now := math.Abs(p.source.U[i])
		u, ok := adequacy.PartNeeded(w.uVal[i], now, needed)
		if !ok || !(u < now) {
			continue
		}
		way := Way{Source: p.line.Name, Of: p.line.Of, Now: w.step(now), Needed: w.step(u), Reduction: Number(1 - u/now)}
		if p.readings > 1 { // of a mean of n the uncertainty falls with the root of n
			way.Readings = int(math.Ceil(quantity.Round(float64(p.readings)*float64(now/u)*float64(now/u), 10)))
		}
		if g := w.cell.Grids; p.grid && g != nil && g.NextCells.Known() {
			cells, cost := g.NextCells, g.NextCost
			way.Cells, way.Cost = &cells, &cost
		}
		j.Ways = append(j.Ways, way)
	}
	sort.SliceStable(j.Ways, func(a, b int) bool { return j.Ways[a].Reduction < j.Ways[b].Reduction })
}
