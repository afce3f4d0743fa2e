package study

import (
	"math"
	"slices"
	"strconv"

	"weirmark/core/comparison"
	"weirmark/core/interpolate"
	"weirmark/core/metric"
	"weirmark/core/refinement"
	"weirmark/core/station"
	"weirmark/core/uncertainty"
)

// read is the path of what a row of a side holds.
func read(side, column string, row int) string {
	return "read." + side + "." + column + "." + strconv.Itoa(row)
}

// atStation is the path of a number of a station.
func atStation(i int, name string) string { return "stations." + strconv.Itoa(i) + "." + name }

// atRow is the reading behind a station.
func atRow(column string) func(spot) []string {
	return func(p spot) []string {
		if p.cell.Scalar || p.rows == nil {
			return nil
		}
		return []string{read("ref", column, p.rows[p.at[0]])}
	}
}

// readings are the rows behind D.
func readings(p spot) []string {
	if !p.cell.Scalar {
		return atRow("y")(p)
	}
	if taken := p.takenFrom("reference"); taken != nil {
		return taken
	}
	return knownRows("ref", p.reference.y)
}

// distributionInputs are the one value of the simulation and the readings of
// the data; of sampled runs, each a row or column of a file of its own, there
// is no such list.
func distributionInputs(p spot) []string {
	if !p.cell.Scalar || p.sampledRuns != nil {
		return nil
	}
	return append([]string{"stations.0.s"}, readings(p)...)
}

// knownRows lists the values of a side that are numbers.
func knownRows(side string, y []float64) []string {
	var list []string
	for i, v := range y {
		if !math.IsNaN(v) {
			list = append(list, read(side, "y", i))
		}
	}
	return list
}

// mostNeighbours are the rows on either side that an interpolation looks at.
const mostNeighbours = 3

// simulationRows are the rows behind S: of a curve its neighbours, x before y,
// after the place of the station. Corrections of conditions follow.
func simulationRows(p spot) []string {
	list := []string{}
	c := p.finest()
	taken := p.takenFrom("simulation at the stations", "simulation")
	switch {
	case taken != nil:
		list = append(list, taken...)
	case p.cell.Scalar && c == p.grids:
		list = append(list, read("grids", "y", largestKnown(p.sizes, c.y)))
	case p.cell.Scalar:
		list = append(list, knownRows("sim", c.y)...)
	default:
		list = around(p)
	}
	for i, m := range p.cell.Conditions {
		if m.Handling == Corrected && m.Effect.Known() && m.Effect != 0 {
			list = append(list, "conditions."+strconv.Itoa(i)+".effect")
		}
	}
	return list
}

// around lists the place of a station and the rows of the simulation around it,
// x before y.
func around(p spot) []string {
	c := p.finest()
	list := []string{atStation(p.at[0], "x")}
	for _, i := range neighbours(inUnit(c.x, c.xUnit, p.xUnit), c.y, p.x[p.at[0]]) {
		list = append(list, read("sim", "x", i), read("sim", "y", i))
	}
	return list
}

// largestKnown returns the row with the largest size that holds a value.
func largestKnown(sizes, y []float64) int {
	best := -1
	for i, n := range sizes {
		if !math.IsNaN(n) && !math.IsNaN(y[i]) && (best < 0 || n > sizes[best]) {
			best = i
		}
	}
	return best
}

// neighbours returns the rows at most three below and three above a place, in
// ascending order of x; of equal x the first row.
func neighbours(x, y []float64, at float64) []int {
	var rows []int
	for i := range x {
		if !math.IsNaN(x[i]) && !math.IsNaN(y[i]) {
			rows = append(rows, i)
		}
	}
	slices.SortStableFunc(rows, func(a, b int) int {
		switch {
		case x[a] < x[b]:
			return -1
		case x[a] > x[b]:
			return 1
		}
		return 0
	})
	rows = slices.CompactFunc(rows, func(a, b int) bool { return x[a] == x[b] })
	above := slices.IndexFunc(rows, func(i int) bool { return x[i] >= at })
	if above < 0 {
		above = len(rows)
	}
	return rows[max(0, above-mostNeighbours):min(len(rows), above+mostNeighbours)]
}

// simulationAt interpolates between the neighbours and adds the corrections.
func simulationAt(a args) float64 {
	if a.cell.Scalar {
		return sum(a.v)
	}
	rows := 1 + 2*len(a.neighbourhood())
	x, y := pairs(a.v[1:rows])
	at := make([]float64, 1)
	if interpolate.At(at, x, y, []float64{a.n(0)}, a.choices.Interpolation) != nil {
		return math.NaN()
	}
	return at[0] + sum(a.v[rows:])
}

// pairs parts values that lie x before y.
func pairs(v [][]float64) (x, y []float64) {
	for i := 0; i+1 < len(v); i += 2 {
		x, y = append(x, v[i]...), append(y, v[i+1]...)
	}
	return x, y
}

func (a args) neighbourhood() []int {
	c := a.finest()
	return neighbours(inUnit(c.x, c.xUnit, a.xUnit), c.y, a.x[a.spot.at[0]])
}

// allSquares sums the squares of all values.
func allSquares(lists [][]float64) float64 {
	sum := 0.0
	for _, list := range lists {
		sum += squares(list, all(len(list)))
	}
	return sum
}

func sum(lists [][]float64) float64 {
	s := 0.0
	for _, list := range lists {
		for _, v := range list {
			s += v
		}
	}
	return s
}

// partsOf lists the sources of one side at the station of the path.
func partsOf(of string, interp bool) func(spot) []string {
	return func(p spot) []string {
		var list []string
		for j, part := range p.parts {
			if part.line.Of == of && part.interp == interp {
				list = append(list, "sources."+strconv.Itoa(j)+".at."+strconv.Itoa(p.at[0]))
			}
		}
		return list
	}
}

// sourceInputs are what a source at a station is made from.
func sourceInputs(p spot) []string {
	part, k := p.parts[p.at[0]], p.at[1]
	if part.plain != nil || part.own != nil || part.sides != nil || part.members != nil {
		return nil // its text says what was made of it
	}
	if part.interp {
		return around(spot{p.work, atStation(k, "s"), []int{k}})
	}
	entry := "entered.sources." + strconv.Itoa(part.number) + "."
	switch part.made {
	case madeOfColumn:
		return []string{read("ref", "u", p.rows[k])}
	case madeOfReadings:
		return knownRows("ref", p.reference.y)
	case madeOfGrids:
		if p.cell.Scalar {
			return []string{"grids.u_num"}
		}
		return []string{"grids.local." + strconv.Itoa(k) + ".u", "choices.k_num"}
	case madeOfMonitor:
		return []string{"monitors." + strconv.Itoa(part.number) + ".u"}
	case madeOfCondition:
		return []string{"conditions." + strconv.Itoa(part.number) + ".effect"}
	case madeOfEntry:
		s := &p.q.Sources[part.number]
		switch {
		case s.Column != "" && s.Of != OfNumerical:
			for i, c := range p.reference.table.Columns {
				if c.Name == s.Column {
					return []string{read("ref", "c"+strconv.Itoa(i), p.rows[k])}
				}
			}
		case s.Column != "":
			return nil
		case s.Basis == OfReading:
			return []string{entry + "value", atStation(k, "d")}
		case s.Basis == OfFullScale:
			return []string{entry + "value", entry + "full_scale"}
		case s.Basis == OfCounts:
			return []string{entry + "value", entry + "per_count"}
		}
		return []string{entry + "value"}
	}
	return nil
}

// sourceAt makes the standard uncertainty of a source from its inputs.
func sourceAt(a args) float64 {
	part := a.parts[a.spot.at[0]]
	if len(a.v) == 0 {
		return math.NaN()
	}
	if part.interp {
		x, y := pairs(a.v[1:])
		r := station.Resample("", "", x, y, []float64{a.n(0)}, station.Options{Method: a.choices.Interpolation})
		if len(r.UInterp) == 0 {
			return math.NaN()
		}
		return r.UInterp[0]
	}
	switch part.made {
	case madeOfReadings:
		_, _, u := uncertainty.Replicates(slices.Concat(a.v...))
		return u
	case madeOfGrids:
		if a.cell.Scalar {
			return a.n(0)
		}
		return a.n(0) / a.n(1)
	case madeOfCondition:
		return math.Abs(a.n(0))
	case madeOfEntry:
		s := &a.q.Sources[part.number]
		k, known := uncertainty.Divisor(s.Coverage.Value, uncertainty.Distribution(s.Form), s.Degrees)
		if !known {
			k = 1
		}
		u := a.n(0) / k
		if s.Basis == OfCounts && len(a.v) > 1 {
			u = float64(a.step(uncertainty.OfCounts(1, a.n(0), a.yUnit.StepToSI(a.n(1)))[0])) / k
		} else if s.Column == "" && s.Basis != Absolute && len(a.v) > 1 {
			u = a.n(0) / 100 * math.Abs(a.n(1)) / k
			if s.Basis == OfReading && part.source.Common {
				u = math.Copysign(u, a.n(1))
			}
		}
		return u
	}
	return a.n(0)
}

// rowOf returns the reading of the reference at a place.
func (p spot) rowOf(x float64) []string {
	for i, v := range inUnit(p.reference.x, p.reference.xUnit, p.xUnit) {
		if p.xUnit.FromSI(v) == x {
			return []string{read("ref", "x", i)}
		}
	}
	return nil
}

// excludedRow is the reading that was taken out.
func excludedRow(column string) func(spot) []string {
	return func(p spot) []string {
		for i := range p.reference.y {
			if p.reference.table.RowLine(i) == p.cell.Excluded[p.at[0]].Line {
				return []string{read("ref", column, i)}
			}
		}
		return nil
	}
}

// conditionEntry is what was entered of a condition of the cell.
func conditionEntry(name string) func(spot) []string {
	return func(p spot) []string {
		n := p.at[0]
		for i, m := range p.q.Conditions {
			if m.Model != "" && m.Model != p.model {
				continue
			}
			if n == 0 {
				return []string{"entered.conditions." + strconv.Itoa(i) + "." + name}
			}
			n--
		}
		return nil
	}
}

// jointParts are the squares that the statistic sums.
func jointParts(p spot) []string {
	if p.cell.Scalar {
		return []string{"stations.*.ratio"}
	}
	return []string{"stations.*.whitened"}
}

// budget is the covariance of the stations of the joint statistic.
func (a args) budget(change func(*part)) uncertainty.Budget {
	return a.covarianceOf(a.v[1], a.joined, change)
}

// counted are the differences that the joint statistic counts.
func (a args) counted() []float64 { return pick(a.v[0], a.joined) }

func (a args) residuals() (comparison.Residuals, bool) {
	r, err := comparison.Whiten(a.counted(), a.budget(nil))
	return r, err == nil
}

// with is the statistic with altered sources.
func (a args) with(change func(*part)) float64 {
	q, err := comparison.Statistic(a.counted(), a.budget(change))
	if err != nil {
		return math.NaN()
	}
	return q.Statistic
}

func (a args) offset() comparison.Split {
	s, ok := comparison.Offset(a.counted(), a.budget(nil))
	if !ok || len(a.joined) < 3 {
		return comparison.Split{Offset: math.NaN(), U: math.NaN()}
	}
	return s
}

func (a args) decomposed() comparison.Decomposition {
	d, ok := comparison.Decompose(a.counted(), pick(a.v[2], a.joined), a.budget(nil))
	if !ok {
		return comparison.Decomposition{Scale: math.NaN(), UScale: math.NaN()}
	}
	return d
}

// chance is the probability of at least the found number beyond k u_val.
func (a args) chance() float64 {
	k := a.n(1)
	ratio := pick(a.v[0], a.joined)
	found := len(ratio) - metric.Within(ratio, k)
	if found == 0 {
		return 1
	}
	c, err := comparison.BeyondByChance(args{a.spot, [][]float64{nil, a.v[2]}}.budget(nil), k, found, samplingSeed)
	if err != nil {
		return math.NaN()
	}
	return c.AtLeast
}

// ofTurn is a number of the curve of a source that turns the conclusion: the
// last of a list, or the one named.
func ofTurn(list, name string) func(spot) []string {
	return func(p spot) []string {
		j := p.cell.Joint
		for i, line := range j.Correlations {
			if line.Source != j.Turns[p.at[0]].Source {
				continue
			}
			path := "joint.correlations." + strconv.Itoa(i) + "." + list
			switch list {
			case "flips":
				path += "." + strconv.Itoa(len(line.Flips)-1)
			case "points":
				path += "." + strconv.Itoa(len(line.Points)-1)
			}
			return []string{path + name}
		}
		return nil
	}
}

// atCorrelation is the statistic with a source parted by a correlation.
func (a args) atCorrelation() float64 {
	source, rho := a.cell.Joint.Correlations[a.spot.at[0]].Source, a.n(2)
	n := len(a.x)
	parts := []part{}
	for j, p := range a.parts {
		u := a.v[1][j*n : (j+1)*n]
		if p.line.Name != source || p.line.Of != OfData || !p.source.Common {
			p.source.U = u
			parts = append(parts, p)
			continue
		}
		own, shared := make([]float64, n), make([]float64, n)
		for i, v := range u {
			own[i], shared[i] = math.Sqrt(1-rho)*math.Abs(v), math.Sqrt(rho)*v
		}
		parts = append(parts, part{source: uncertainty.Source{U: own}}, part{source: uncertainty.Source{U: shared, Common: true}})
	}
	q, err := comparison.Statistic(a.counted(), a.covariance(parts, a.joined))
	if err != nil {
		return math.NaN()
	}
	return q.Statistic
}

// withoutRegion is the statistic without a region, told by its name.
func (a args) withoutRegion(i int) comparison.Joint {
	for _, r := range a.q.Regions {
		if r.Name != a.cell.Joint.Without[i].Region {
			continue
		}
		inside := a.regionRows(r)
		var rows []int
		for n, i := range a.joined {
			if slices.Contains(inside, i) {
				rows = append(rows, n)
			}
		}
		if left, err := comparison.LeaveOut(a.counted(), a.budget(nil), [][]int{rows}); err == nil {
			return left[0]
		}
	}
	return comparison.Joint{Statistic: math.NaN()}
}

// eachLeft is the statistic without each station in turn, and that of all.
func (a args) eachLeft() ([]comparison.Joint, comparison.Joint) {
	whole, ok := a.residuals()
	left, err := comparison.LeaveOut(a.counted(), a.budget(nil), comparison.EachStation(len(a.joined)))
	if !ok || err != nil {
		return nil, comparison.Joint{}
	}
	return left, whole.Joint
}

func (a args) withoutStation() comparison.Joint {
	left, whole := a.eachLeft()
	if left == nil {
		return comparison.Joint{Statistic: math.NaN()}
	}
	most := left[0]
	for _, q := range left {
		if math.Abs(q.Statistic-whole.Statistic) > math.Abs(most.Statistic-whole.Statistic) {
			most = q
		}
	}
	return most
}

func (a args) turning() float64 {
	if a.cell.Joint.Station == nil {
		return 0
	}
	left, whole := a.eachLeft()
	beyond := func(q comparison.Joint) bool { return exceeds(q.Statistic, comparison.ChiSquare95(q.Rank)) }
	n := 0.0
	for _, q := range left {
		if beyond(q) != beyond(whole) {
			n++
		}
	}
	return n
}

func (a args) hitRate() float64 {
	allowance, _, asked := a.allowance(a.q.Scores)
	if !asked {
		return math.NaN()
	}
	rows := a.regionAt(a.spot.at[0])
	q, err := metric.HitRateWithin(a.inSI(pick(a.v[0], rows)), a.inSI(pick(a.v[1], rows)), a.q.Scores.Fraction, pick(allowance, rows))
	if err != nil {
		return math.NaN()
	}
	return q
}

// inSI returns values of the quantity in SI.
func (w *work) inSI(values []float64) []float64 {
	out := make([]float64, len(values))
	for i, v := range values {
		out[i] = w.yUnit.ToSI(v)
	}
	return out
}

// regionAt returns the stations of a region of the report.
func (w *work) regionAt(at int) []int {
	if !w.cell.Regions[at].Rest {
		return w.regionRows(w.q.Regions[at])
	}
	var inside []int
	for _, r := range w.q.Regions {
		inside = append(inside, w.regionRows(r)...)
	}
	var rows []int
	for i := range w.x {
		if !slices.Contains(inside, i) {
			rows = append(rows, i)
		}
	}
	return rows
}

// regionOf keeps the values at the stations of the region of the path.
func (a args) regionOf(values []float64) []float64 { return pick(values, a.regionAt(a.spot.at[0])) }

// coverageInputs are what the coverage factor comes from.
func coverageInputs(p spot) []string {
	if p.q.Choices.KStudent && p.cell.K95.Known() {
		return []string{"k_95"}
	}
	return []string{"entered.choices.k"}
}

// uValInputs are the sides of u_val; where a source acts on both of them, all
// sources as they are left in E.
func uValInputs(p spot) []string {
	list := []string{}
	for _, part := range p.parts {
		if part.own != nil {
			for k := range p.parts {
				list = append(list, "sources."+strconv.Itoa(k)+".at."+strconv.Itoa(p.at[0]))
			}
			return list
		}
	}
	return from("@.u_d", "@.u_num", "@.u_interp", "@.u_input")(p)
}

// leastDegrees are the effective degrees of freedom of the station that has
// the fewest.
func (a args) leastDegrees() float64 {
	n, least := len(a.x), math.Inf(1)
	for _, i := range a.tested {
		var terms []uncertainty.Term
		for j, p := range a.parts {
			terms = append(terms, uncertainty.Term{U: math.Abs(a.v[0][j*n+i]), Degrees: p.degrees})
		}
		if nu, err := uncertainty.EffectiveDegrees(terms); err == nil {
			least = min(least, nu)
		}
	}
	return least
}

func regionEntry(name string) func(spot) []string {
	return func(p spot) []string { return []string{"entered.regions." + strconv.Itoa(p.at[0]) + "." + name} }
}

// crossingRows are the two rows between which a side changes sign, or the one
// that is zero.
func crossingRows(side string) func(spot) []string {
	return func(p spot) []string {
		list := map[string][]Crossing{"sim": p.cell.Crossings.Simulation, "ref": p.cell.Crossings.Reference}[side]
		c := p.curveOf(side)
		at := p.xUnit.ToSI(float64(list[p.at[0]].X))
		x, y := inUnit(c.x, c.xUnit, p.xUnit), inUnit(c.y, c.yUnit, p.yUnit)
		near := 1e-12 * math.Abs(at)
		for i := 1; i < len(x); i++ {
			switch {
			case y[i] == 0 && math.Abs(x[i]-at) <= near:
				return []string{read(side, "x", i)}
			case y[i-1]*y[i] < 0 && at >= min(x[i-1], x[i])-near && at <= max(x[i-1], x[i])+near:
				return []string{read(side, "x", i-1), read(side, "y", i-1), read(side, "x", i), read(side, "y", i)}
			}
		}
		return nil
	}
}

func crossingAt(a args) float64 {
	if len(a.v) == 4 {
		return a.n(0) + (a.n(2)-a.n(0))*a.n(1)/(a.n(1)-a.n(3))
	}
	if len(a.v) == 1 {
		return a.n(0)
	}
	return math.NaN()
}

// monitorRow is the row behind a drawn point of a monitor.
func monitorRow(column string) func(spot) []string {
	return func(p spot) []string {
		side := "monitor" + strconv.Itoa(p.at[0])
		c := p.curveOf(side)
		return []string{read(side, column, p.at[1]*max(1, (len(c.y)+monitorPoints-1)/monitorPoints))}
	}
}

// balanceRow is the last row of a balance.
func balanceRow(column string) func(spot) []string {
	return func(p spot) []string {
		side := "balance" + strconv.Itoa(p.at[0])
		c := p.curveOf(side)
		for i := len(c.y) - 1; i >= 0; i-- {
			if !math.IsNaN(c.x[i]) && !math.IsNaN(c.y[i]) {
				return []string{read(side, column, i)}
			}
		}
		return nil
	}
}

// gridRow is the table and row of a grid, or its run.
func gridRow(p spot) (side string, row int) {
	point := p.cell.Grids.Points[p.at[0]]
	for i, n := range p.sizes {
		if Number(n) == point.Cells {
			return "grids", i
		}
	}
	for i, r := range p.runs {
		if Number(r.cells) == point.Cells && r.curve.slip.Grid.Value == point.Name {
			return "run" + strconv.Itoa(i), -1
		}
	}
	return "", 0
}

func gridCells(p spot) []string {
	side, row := gridRow(p)
	if side == "grids" {
		return []string{read(side, "size", row)}
	}
	return []string{read(side, "cells", 0)}
}

func gridValue(p spot) []string {
	side, row := gridRow(p)
	if side == "grids" {
		return []string{read(side, "y", row)}
	}
	if side == "run0" {
		if taken := p.takenFrom("simulation at the stations", "simulation"); taken != nil {
			return taken
		}
	}
	if taken := p.takenFrom("simulation, grid " + p.cell.Grids.Points[p.at[0]].Name); taken != nil {
		return taken
	}
	if c := p.curveOf(side); c != nil {
		return knownRows(side, c.y)
	}
	return nil
}

// study repeats the grid study from its points.
func (a args) study() refinement.Result { return a.studyWith(a.choices.rule()) }

// studyBy does so by another rule.
func (a args) studyBy(rule string) refinement.Result {
	opt := a.choices.rule()
	opt.Rule = rule
	return a.studyWith(opt)
}

func (a args) studyWith(opt refinement.Options) refinement.Result {
	values := make([]float64, len(a.v[0]))
	for i, v := range a.v[0] {
		values[i] = a.yUnit.ToSI(v)
	}
	return refinement.Study(a.v[1], values, int(a.n(3)), opt)
}

// averaged are the stations that the lines of the sources are taken over.
func (w *work) averaged() []int {
	if len(w.tested) > 0 {
		return w.tested
	}
	return all(len(w.x))
}

// deciding is a number of the station that decides the requirement.
func deciding(name string) func(spot) []string {
	return func(p spot) []string {
		for i, s := range p.cell.Stations {
			if p.cell.Scalar || Number(s.X) == p.cell.Requirement.At {
				return []string{atStation(i, name)}
			}
		}
		return nil
	}
}

func requirementInputs(p spot) []string {
	list := []string{"entered.requirement.value"}
	if p.q.Requirement.Percent {
		list = append(list, deciding("d")(p)...)
	}
	return list
}

// drawnRow is the row behind a drawn point of the curve.
func drawnRow(column string) func(spot) []string {
	return func(p spot) []string {
		rows := envelope(p.finest().y)
		return []string{read("sim", column, rows[p.at[0]])}
	}
}
