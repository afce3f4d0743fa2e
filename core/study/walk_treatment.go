package study

import (
	"math"
	"strconv"

	"weirmark/core/adequacy"
	"weirmark/core/comparison"
	"weirmark/core/integrate"
	"weirmark/core/uncertainty"
)

// Inputs of what is told of the curves beside the comparison.
var (
	xAndD       = from("stations.*.x", "stations.*.d")
	fitInputs   = from("read.sim.x.*", "read.sim.y.*", "stations.*.x", "stations.*.d")
	placeInputs = from("application.place.points.*.at.*", "application.place.at.*")
)

// weightInputs are the stations, or the column that states the weights. The
// length along a contour has no such list.
func weightInputs(p spot) []string {
	if p.q.Scores.Weights == WeightSpacing {
		if p.reference.along == "" && p.reference.slip.Contour.Column.Given() {
			return nil
		}
		return from("stations.*.x")(p)
	}
	for i, c := range p.reference.table.Columns {
		if c.Name == p.q.Scores.Weights {
			list := make([]string, len(p.rows))
			for k, row := range p.rows {
				list[k] = read("ref", "c"+strconv.Itoa(i), row)
			}
			return list
		}
	}
	return nil
}

func weightAt(a args) float64 {
	var weights []float64
	switch {
	case len(a.v) == 0:
		return math.NaN()
	case a.q.Scores.Weights == WeightSpacing:
		order := byPlace(a.v[0])
		weights = make([]float64, len(order))
		for k, v := range integrate.Weights(pickRows(a.v[0], order)) {
			weights[order[k]] = v
		}
	default:
		for _, v := range a.v {
			weights = append(weights, v...)
		}
	}
	return weights[a.spot.at[0]] / sum([][]float64{weights})
}

// anchorInputs are the entry of a support point and, of a plane of symmetry,
// the row that it repeats.
func anchorInputs(column string) func(spot) []string {
	return func(p spot) []string {
		line := p.cell.Treatment.Anchors[p.at[0]]
		for i, a := range p.q.Anchors {
			if a.Why != line.Why || a.Kind != line.Kind || a.Model != "" && a.Model != p.model {
				continue
			}
			entry := "entered.anchors." + strconv.Itoa(i) + "."
			if a.Kind != AtSymmetry {
				return []string{entry + map[string]string{"x": "x", "y": "value"}[column]}
			}
			c := p.finest()
			row := read("sim", column, nearestRow(inUnit(c.x, c.xUnit, p.xUnit), c.y, p.xUnit.ToSI(a.X)))
			if column == "x" {
				return []string{entry + "x", row}
			}
			return []string{row}
		}
		return nil
	}
}

func anchorAt(a args) float64 {
	if len(a.v) == 2 {
		return 2*a.n(0) - a.n(1)
	}
	return a.n(0)
}

// randomParts are the sources of the data that are independent between
// stations, at all of them.
func randomParts(p spot) []string {
	var list []string
	for j, part := range p.parts {
		if part.line.Of == OfData && patternOf(part.source) == Independent {
			list = append(list, "sources."+strconv.Itoa(j)+".at.*")
		}
	}
	return list
}

// displaced repeats the search for a shift and a scale.
func (a args) displaced() comparison.Displacement {
	si := func(values []float64) []float64 {
		out := make([]float64, len(values))
		for i, v := range values {
			out[i] = a.xUnit.ToSI(v)
		}
		return out
	}
	x, y := ascending(bothKnown(si(a.v[0]), a.inSI(a.v[1])))
	d, ok := comparison.Displace(x, y, si(a.v[2]), a.inSI(a.v[3]))
	if !ok {
		d.RMS, d.Scale, d.Shift = math.NaN(), math.NaN(), math.NaN()
	}
	return d
}

func integralOf(name string) func(spot) []string {
	return from("stations.*.x", "stations.*."+name)
}

// lengthsOf are the lengths that stations stand for in the integral, by the
// pieces that have no gap.
func (a args) lengthsOf(x []float64) []float64 {
	out := make([]float64, len(x))
	for _, rows := range a.segments() {
		if len(rows) < 2 {
			continue
		}
		for k, v := range integrate.Weights(pick(x, rows)) {
			out[rows[k]] = v
		}
	}
	return out
}

// integral sums the values of the second list, or one, over the places of the
// first.
func (a args) integral() float64 {
	sum := 0.0
	for i, length := range a.lengthsOf(a.v[0]) {
		v := 1.0
		if len(a.v) > 1 {
			v = a.v[1][i]
		}
		sum += float64(length * v)
	}
	return sum
}

func (a args) uIntegral() float64 {
	return math.Sqrt(a.covarianceOf(a.v[1], all(len(a.x)), nil).Weighted(a.lengthsOf(a.v[0])))
}

// covarianceOf is the covariance at some stations from the sources as they are
// given, in the unit of the cell; change alters a source.
func (a args) covarianceOf(u []float64, rows []int, change func(*part)) uncertainty.Budget {
	parts := append([]part{}, a.parts...)
	n := len(a.x)
	for j := range parts {
		parts[j].source.U = u[j*n : (j+1)*n]
		if change != nil {
			change(&parts[j])
		}
	}
	return a.covariance(parts, rows)
}

// pieceLengths are the numbers of stations of the pieces.
func pieceLengths(pieces [][]int) []float64 {
	out := make([]float64, len(pieces))
	for i, rows := range pieces {
		out[i] = float64(len(rows))
	}
	return out
}

// comparedAt is the entry of a condition of a compared case.
func comparedAt(p spot) []string {
	place := p.cell.Application.Place
	n := p.at[0]
	for i := range p.e.study.Questions {
		q := &p.e.study.Questions[i]
		if q.Quantity != p.q.Quantity {
			continue
		}
		if _, ok := q.stated(p.e.study.Application); !ok {
			continue
		}
		if n > 0 {
			n--
			continue
		}
		for j := len(q.Conditions) - 1; j >= 0; j-- { // the last of one name counts
			if m := q.Conditions[j]; m.Name == place.Names[p.at[1]] && m.Unit == place.Units[p.at[1]] {
				return []string{"stated.questions." + strconv.Itoa(i) + ".conditions." + strconv.Itoa(j) + ".data"}
			}
		}
	}
	return nil
}

// located repeats the place of the point of application.
func (a args) located() adequacy.Place {
	n := len(a.v[1])
	var points [][]float64
	for i := 0; i+n <= len(a.v[0]); i += n {
		points = append(points, a.v[0][i:i+n])
	}
	return adequacy.Locate(points, a.v[1])
}
