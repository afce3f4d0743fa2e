package study

import (
	"math"
	"sort"

	"weirmark/core/integrate"
	"weirmark/core/notice"
	"weirmark/core/profile"
	"weirmark/core/quantity"
)

// stationWeights returns the weights of the stations that the measures use,
// scaled to sum one; nil where none are asked for, or where they cannot be had,
// which the measures tell.
func (w *work) stationWeights() []float64 {
	if w.cell.Scalar || w.q.Scores == nil {
		return nil
	}
	raw, _, err := w.weights(w.q.Scores)
	if err != nil {
		return nil
	}
	sum := 0.0
	for _, v := range raw {
		if !(v >= 0) {
			return nil
		}
		sum += v
	}
	if !(sum > 0) || math.IsInf(sum, 0) {
		return nil
	}
	out := make([]float64, len(raw))
	for i, v := range raw {
		out[i] = v / sum
	}
	return out
}

// weights returns the weights of the stations as asked for, and what they are.
func (w *work) weights(ask *Scoring) ([]float64, string, error) {
	switch ask.Weights {
	case "":
		return nil, "", nil
	case WeightSpacing:
		return w.lengths(), "each station by the length it stands for", nil
	}
	column, err := w.reference.table.Column(ask.Weights)
	if err != nil {
		return nil, "", err
	}
	return pickRows(column.Values, w.rows), "weights in column " + ask.Weights, nil
}

func pickRows(values []float64, rows []int) []float64 {
	out := make([]float64, len(rows))
	for j, i := range rows {
		out[j] = values[i]
	}
	return out
}

// lengths returns the length that each station stands for: along the contour
// where the reference states its second coordinate, else along the stations.
func (w *work) lengths() []float64 {
	order := byPlace(w.x)
	x := pickRows(w.x, order)
	along := x
	if c := w.reference; c.along == "" && c.slip.Contour.Column.Given() {
		l := loader{table: c.table}
		if y, unit := l.column(c.slip.Contour); y != nil && unit.known && unit.unit.Same(w.xUnit.Unit) {
			along = profile.Arc(x, pickRows(y, pickInts(w.rows, order)))
		}
	}
	out := make([]float64, len(x))
	for k, v := range integrate.Weights(along) {
		out[order[k]] = v
	}
	return out
}

func pickInts(values, at []int) []int {
	out := make([]int, len(at))
	for j, i := range at {
		out[j] = values[i]
	}
	return out
}

// byPlace returns the indices of stations in order of their place.
func byPlace(x []float64) []int {
	order := all(len(x))
	sort.SliceStable(order, func(i, j int) bool { return x[order[i]] < x[order[j]] })
	return order
}

// segments returns the runs of stations, in order of place, between which
// both sides have values: no gap of the simulation and no station that is not
// compared lies between.
func (w *work) segments() [][]int {
	apart := append([]float64{}, w.skipped...)
	sort.Float64s(apart)
	var out [][]int
	for k, i := range byPlace(w.x) {
		last := len(out) - 1
		if k > 0 {
			before := out[last][len(out[last])-1]
			next := sort.SearchFloat64s(apart, w.x[before])
			blocked := next < len(apart) && apart[next] <= w.x[i]
			if !blocked && w.linePart[before] == w.linePart[i] {
				out[last] = append(out[last], i)
				continue
			}
		}
		out = append(out, []int{i})
	}
	return out
}

// hidden is the part of the range of S at the stations above which a peak that
// no station sees is told (common practice, no source).
const hidden = 0.05

// unseen tells of extrema of the simulation between two stations that see
// nothing of them.
func (w *work) unseen(segments [][]int) {
	c := w.finest()
	x, y := ascending(bothKnown(inUnit(c.x, c.xUnit, w.xUnit), inUnit(c.y, c.yUnit, w.yUnit)))
	lo, hi := profile.Limits(w.s)
	limit, worst, count, at, value := float64(hidden*(hi-lo)), 0.0, 0, 0.0, 0.0
	var from, to float64
	for _, rows := range segments {
		for k := 1; k < len(rows); k++ {
			a, b := rows[k-1], rows[k]
			least, most := min(w.s[a], w.s[b]), max(w.s[a], w.s[b])
			found := false
			for r := sort.SearchFloat64s(x, w.x[a]); r < len(x) && x[r] < w.x[b]; r++ {
				beyond := max(y[r]-most, least-y[r])
				if beyond > limit && hi > lo {
					found = true
					if beyond > worst {
						worst, at, value, from, to = beyond, x[r], y[r], w.x[a], w.x[b]
					}
				}
			}
			if found {
				count++
			}
		}
	}
	if count > 0 {
		w.tell(notice.New("station-unseen", quantity.Text(w.yUnit.FromSI(value), 3)+w.cell.UnitSuffix(), w.place(at), w.place(from), w.place(to), quantity.Percent(worst/(hi-lo)), count))
	}
}
