package study

import (
	"math"
	"slices"
	"strconv"

	"weirmark/core/notice"
	"weirmark/core/refinement"
)

// dimension of the grids of the question.
func (c Choices) dimension() int {
	if c.Dimension == 2 {
		return 2
	}
	return 3
}

// family makes the grid study: of a scalar from a table over grids or from
// runs with their cell counts, of a curve along its stations.
func (w *work) family() {
	var notices []notice.Notice
	switch {
	case w.cell.Scalar:
		notices = w.scalarFamily()
	default:
		notices = w.curveFamily()
	}
	for _, n := range notices {
		if w.finding(1, "a grid uncertainty", n) {
			w.blocked = true
		}
	}
	w.familyCard()
	if !w.lending {
		w.timeSteps()
		w.borrow()
	}
}

// scalarFamily studies one value over the grids.
func (w *work) scalarFamily() []notice.Notice {
	counts, values, names := w.scalarGrids()
	if len(counts) < 2 {
		return nil
	}
	r := refinement.Study(counts, values, w.choices.dimension(), w.choices.rule())
	g := w.grid(counts, names)
	for i := range g.Points {
		g.Points[i].Value = w.yNumber(values[indexOf(counts, names, g.Points[i])])
		if r.Used > 0 {
			g.Points[i].Used = i >= len(g.Points)-r.Used
		}
	}
	g.Class, g.Ratio, g.R21, g.R32, g.Rule = string(r.Class), Number(r.Ratio), Number(r.R21), Number(r.R32), r.Rule
	g.Order, g.Ea, g.Eext, g.GCI = Number(r.Order), Number(r.Ea), Number(r.Eext), Number(r.GCI)
	g.Extrapolated, g.U = w.yNumber(r.Extrapolated), w.step(r.U)
	u := r.StandardUncertainty(w.choices.KNum)
	g.UNum = w.step(u)
	w.cell.Grids, w.refined = g, r
	w.coarseTriple(r, counts, values)
	w.statedNext(r, u)
	if !w.inner {
		g.Rules, g.Fit = w.otherRules(counts, values), w.fitLine(r.Fit)
	}
	w.cell.Grid = g.Points[len(g.Points)-1].Name
	if !math.IsNaN(u) && len(w.s) > 0 {
		w.gridU = []float64{u}
	}
	return r.Notices
}

// scalarGrids collects counts and values, in SI, of a scalar over grids.
func (w *work) scalarGrids() (counts, values []float64, names []string) {
	if w.grids != nil {
		y := inUnit(w.grids.y, w.grids.yUnit, w.yUnit)
		label, err := w.grids.table.Column(w.grids.slip.Grid.Value)
		for i, n := range w.sizes {
			if math.IsNaN(n) || math.IsNaN(y[i]) {
				continue
			}
			name := ""
			if err == nil && i < len(label.Text) {
				name = label.Text[i]
			}
			counts, values, names = append(counts, n), append(values, y[i]), append(names, name)
		}
		return counts, values, names
	}
	for _, r := range w.runs {
		if v, ok := w.scalarOf(r.curve); ok && r.cells > 0 {
			counts, values, names = append(counts, r.cells), append(values, v), append(names, r.curve.slip.Grid.Value)
		}
	}
	return counts, values, names
}

// curveFamily studies a curve at the common stations, or along the finest
// run where there are no data.
func (w *work) curveFamily() []notice.Notice {
	grids := make([]refinement.Grid, 0, len(w.runs))
	counts, names := []float64{}, []string{}
	for _, r := range w.runs {
		if r.cells <= 0 || r.curve.scalar() {
			continue
		}
		name := r.curve.slip.Grid.Value
		grids = append(grids, refinement.Grid{Name: name, Count: r.cells,
			X: inUnit(r.curve.x, r.curve.xUnit, w.xUnit), Y: inUnit(r.curve.y, r.curve.yUnit, w.yUnit)})
		counts, names = append(counts, r.cells), append(names, name)
	}
	if len(grids) < 2 || len(w.x) == 0 {
		return nil
	}
	l := refinement.Along(grids, w.x, w.choices.dimension(), w.choices.rule())
	g := w.grid(counts, names)
	g.Along, g.Rule, g.R21, g.R32 = true, l.Rule, Number(l.R21), Number(l.R32)
	g.Order, g.OrderLow, g.OrderHigh = Number(l.Common), Number(l.Low), Number(l.High)
	g.Monotone, g.NonMonotone = l.Monotone, l.NonMonotone
	w.gridU = make([]float64, len(w.x))
	sum, n := 0.0, 0.0
	for i, p := range l.Points {
		u := p.StandardUncertainty(w.choices.KNum)
		w.gridU[i] = u
		g.Local = append(g.Local, LocalGrid{X: Number(w.xUnit.FromSI(w.x[i])), Class: string(p.Class), Order: Number(p.Order), U: w.step(p.U)})
		if !math.IsNaN(u) {
			sum, n = sum+float64(u*u), n+1
		}
	}
	if n > 0 {
		g.UNum = w.step(math.Sqrt(sum / n))
	}
	w.cell.Grids = g
	w.statedNext(refinement.Result{Class: refinement.Monotone, Order: l.Common, Counts: [3]float64{slices.Max(counts)}}, w.yUnit.StepToSI(float64(g.UNum)))
	return l.Notices
}

// grid returns the family, coarse to fine, without its results.
func (w *work) grid(counts []float64, names []string) *Grids {
	g := &Grids{Dimension: w.choices.dimension(), Formal: Number(w.choices.Formal), KNum: Number(w.choices.KNum),
		Ratio: None, Order: None, Extrapolated: None, Ea: None, Eext: None, GCI: None, U: None, UNum: None, R21: None, R32: None,
		OrderLow: None, OrderHigh: None, NextCells: None, NextCost: None, Local: []LocalGrid{}, Points: []GridPoint{}}
	order := make([]int, len(counts))
	for i := range order {
		order[i] = i
		for j := i; j > 0 && counts[order[j]] < counts[order[j-1]]; j-- {
			order[j], order[j-1] = order[j-1], order[j]
		}
	}
	finest := counts[order[len(order)-1]]
	for rank, i := range order {
		g.Points = append(g.Points, GridPoint{Name: names[i], Cells: Number(counts[i]), Value: None,
			H: Number(spacing(finest/counts[i], w.choices.dimension())), Used: rank >= len(order)-3})
	}
	return g
}

// spacing returns n to the power 1/dim.
func spacing(n float64, dim int) float64 {
	if dim == 2 {
		return math.Sqrt(n)
	}
	return math.Cbrt(n)
}

func indexOf(counts []float64, names []string, p GridPoint) int {
	for i, n := range counts {
		if Number(n) == p.Cells && names[i] == p.Name {
			return i
		}
	}
	panic("study: grid " + strconv.Quote(p.Name) + " is not of its family")
}

// yNumber returns a value of the quantity in the unit of the cell.
func (w *work) yNumber(si float64) Number { return Number(w.yUnit.FromSI(si)) }

// step returns a difference or uncertainty in the unit of the cell.
func (w *work) step(si float64) Number { return Number(w.yUnit.StepFromSI(si)) }
