package study

import (
	"math"
	"slices"
	"strconv"
	"strings"

	"weirmark/core/adequacy"
	"weirmark/core/quantity"
	"weirmark/core/refinement"
	"weirmark/core/settling"
)

// judgedBy is the rule of a number that the judgement of a monitor gives.
func judgedBy(path, name, formula string, get func(settling.Monitor) float64) walkRule {
	return walkRule{path: "monitors.*." + path, name: name, formula: formula, say: monitorSaid, in: monitorInputs, direct: true, calc: func(a args) float64 {
		if len(a.v) == 0 {
			return math.NaN()
		}
		return get(a.judgedAgain())
	}}
}

// sampledBy is that of a number of an unsteady run.
func sampledBy(path, name, formula string, get func(*settling.Stat) float64) walkRule {
	return judgedBy("sampling."+path, name, formula, func(m settling.Monitor) float64 {
		if m.Stat == nil {
			return math.NaN()
		}
		return get(m.Stat)
	})
}

func monitorSaid(p spot) string {
	m := p.cell.Monitors[p.at[0]]
	if m.Entered != "" {
		return "U_iter as entered: " + m.Entered
	}
	return m.Class + ": " + m.Rule
}

// entryOfRun is the path of an entry of the run of a monitor, "" where there
// is none.
func (p spot) entryOfRun(name string) string {
	m := p.cell.Monitors[p.at[0]]
	for i, r := range p.q.Runs {
		if r.Model == p.model && r.Grid == m.Grid {
			return "entered.runs." + strconv.Itoa(i) + "." + name
		}
	}
	return ""
}

// monitorInputs are the rows of a monitor of the quantity itself, and what
// else its judgement looks at.
func monitorInputs(p spot) []string {
	m, side := p.cell.Monitors[p.at[0]], "monitor"+strconv.Itoa(p.at[0])
	c := p.curveOf(side)
	if c == nil || m.Quantity != "" || p.e.study.fileName(c.slip) != m.File || c.slip.Grid.Value != m.Grid {
		return nil
	}
	if m.Entered != "" && strings.HasSuffix(p.path, ".u") {
		return []string{p.entryOfRun("u_iter")}
	}
	list := []string{"read." + side + ".x.*", "read." + side + ".y.*"}
	if g := p.cell.Grids; g != nil && g.U.Known() {
		list = append(list, "grids.u")
	}
	if p.cell.Scalar && len(p.cell.Stations) == 1 {
		list = append(list, "stations.0.s", "stations.0.e")
	}
	for _, name := range []string{"start", "period"} {
		if path := p.entryOfRun(name); path != "" {
			if _, given := p.valueAt(path); given {
				list = append(list, path)
			}
		}
	}
	return list
}

// judgedAgain judges a monitor from its rows.
func (a args) judgedAgain() settling.Monitor {
	var opt settling.Options
	opt.Time = a.cell.Monitors[a.spot.at[0]].Axis == AxisTime
	for i, path := range monitorInputs(a.spot) {
		switch v := a.v[i]; path[strings.LastIndex(path, ".")+1:] {
		case "u_iter":
			return settling.Monitor{U: v[0] / 2}
		case "u":
			opt.UGrid = v[0]
		case "s":
			opt.Scale = math.Abs(v[0])
		case "e":
			opt.E = v[0]
		case "start":
			opt.Declared, opt.Start = true, v[0]
		case "period":
			opt.Period = v[0]
		}
	}
	return settling.Judge(settling.Series{At: a.v[0], Value: a.v[1]}, opt)
}

// ofGrid is U_iter of a monitor over U of the grids.
func ofGrid(a args) float64 {
	m := a.cell.Monitors[a.spot.at[0]]
	m.U, m.HalfRange = Number(a.n(0)), Number(a.n(1))
	u, _ := m.UIter()
	return settling.Weigh("", float64(u), a.n(2), 0, 0).OfGrid
}

// gridInputs are what a grid study is made from: the values on the grids, or
// along a curve the rows of all runs.
func gridInputs(p spot) []string {
	if !p.cell.Grids.Along {
		return gridPoints(p)
	}
	var list []string
	for i, r := range p.runs {
		if r.cells > 0 && !r.curve.scalar() {
			side := "read.run" + strconv.Itoa(i)
			list = append(list, side+".cells.0", side+".x.*", side+".y.*")
		}
	}
	return append(list, "stations.*.x", "choices.formal", "choices.dimension")
}

// ofGrids is the rule of a number of either grid study.
func ofGrids(path, name, formula string, one func(args, refinement.Result) float64, along func(args, refinement.Local) float64) walkRule {
	return walkRule{path: "grids." + path, name: name, formula: formula, say: func(p spot) string { return p.cell.Grids.Rule }, in: gridInputs, calc: func(a args) float64 {
		switch g := a.cell.Grids; {
		case g.Along && along != nil:
			return along(a, a.along())
		case !g.Along && one != nil:
			return one(a, a.study())
		}
		return math.NaN()
	}}
}

// along repeats the grid study along a curve. Places keep twelve digits, so
// that a station at a row stays there whatever unit the file is in.
func (a args) along() refinement.Local {
	places := func(x []float64) []float64 {
		out := make([]float64, len(x))
		for i, v := range x {
			out[i] = v
			if !math.IsNaN(v) {
				out[i] = quantity.Round(v, 12)
			}
		}
		return out
	}
	n := len(a.v) - 3
	var grids []refinement.Grid
	for i := 0; i+2 < n; i += 3 {
		grids = append(grids, refinement.Grid{Count: a.v[i][0], X: places(a.v[i+1]), Y: a.inSI(a.v[i+2])})
	}
	return refinement.Along(grids, places(a.v[n]), int(a.v[n+2][0]), a.choices.rule())
}

// localGrid is a number of the study at one station.
func localGrid(get func(args, refinement.LocalPoint) float64) func(args, refinement.Local) float64 {
	return func(a args, l refinement.Local) float64 {
		if at := a.spot.at[0]; at < len(l.Points) {
			return get(a, l.Points[at])
		}
		return math.NaN()
	}
}

// alongStandard is the root mean square of u_num over the stations that have
// one.
func alongStandard(a args, l refinement.Local) float64 {
	var u []float64
	for _, p := range l.Points {
		if v := p.StandardUncertainty(float64(a.cell.Grids.KNum)); !math.IsNaN(v) {
			u = append(u, v)
		}
	}
	return float64(a.step(rms(u)))
}

// nextInputs are what the next grid is reckoned from, for the requirement or
// for a stated u_num.
func nextInputs(p spot) []string {
	list := from("grids.u_num", "grids.order", "grids.points.*.cells", "choices.dimension", "grids.cost_exponent")(p)
	if strings.HasPrefix(p.path, "grids.stated.") {
		return append(list, "grids.stated.u")
	}
	return append(list, "stations.0.u_val", "requirement.u_val_needed")
}

func (a args) nextAgain() refinement.Next {
	target := a.n(5)
	if len(a.v) > 6 {
		target, _ = adequacy.PartNeeded(a.n(5), a.n(0), a.n(6))
	}
	r := refinement.Result{Class: refinement.Monotone, Order: a.n(1), Counts: [3]float64{slices.Max(a.v[2])}}
	return refinement.NextGrid(r, int(a.n(3)), a.choices.rule(), a.n(0), target, a.n(4))
}

// otherRule repeats the grid study by the rule of a line.
func (a args) otherRule() refinement.Result {
	name := a.cell.Grids.Rules[a.spot.at[0]].Rule
	best, longest := "", 0
	for _, rule := range refinement.Rules {
		if n := RuleName(rule); strings.HasPrefix(name, n) && len(n) > longest {
			best, longest = rule, len(n)
		}
	}
	return a.studyBy(best)
}

// fitTerm is a term of the line behind U.
func fitTerm(get func(args, refinement.Term) float64) func(args, refinement.Result) float64 {
	return func(a args, r refinement.Result) float64 {
		if at := a.spot.at[0]; r.Fit != nil && at < len(r.Fit.Terms) {
			return get(a, r.Fit.Terms[at])
		}
		return math.NaN()
	}
}

// ratioCells are the cells of the two grids of a ratio, fine before coarse.
func ratioCells(p spot) []string {
	n := p.at[0]
	points := p.cell.Grids.Points
	for i := range points {
		for j := range i {
			if points[i].Cells == points[j].Cells {
				continue
			}
			if n == 0 {
				at := func(k int) string { return "grids.points." + strconv.Itoa(k) + ".cells" }
				return []string{at(i), at(j), "grids.dimension"}
			}
			n--
		}
	}
	return nil
}

// wayNow is the source of a way at the deciding station.
func wayNow(p spot) []string {
	way := p.cell.Requirement.Ways[p.at[0]]
	station := deciding("u_val")(p)
	if station == nil {
		return nil
	}
	at := strings.Split(station[0], ".")[1]
	for j, part := range p.parts {
		if part.line.Name == way.Source && part.line.Of == way.Of {
			return []string{"sources." + strconv.Itoa(j) + ".at." + at}
		}
	}
	return nil
}

// wayReadings is the number of readings that would do.
func wayReadings(a args) float64 {
	way := a.cell.Requirement.Ways[a.spot.at[0]]
	if way.Readings == 0 {
		return 0
	}
	for _, part := range a.parts {
		if part.line.Name == way.Source && part.line.Of == way.Of {
			ratio := a.n(0) / a.n(1)
			return math.Ceil(quantity.Round(float64(part.readings)*ratio*ratio, 10))
		}
	}
	return math.NaN()
}
