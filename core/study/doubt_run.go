package study

import (
	"math"
	"strconv"
	"strings"

	"weirmark/core/interpolate"
	"weirmark/core/notice"
	"weirmark/core/plausibility"
	"weirmark/core/quantity"
)

// wallUnits reports whether a column is a wall distance in wall units by its
// name.
func wallUnits(name string) bool {
	switch strings.ToLower(strings.ReplaceAll(name, " ", "")) {
	case "y+", "y⁺", "yplus", "y_plus", "ystar", "y*":
		return true
	}
	return false
}

// doubtWallUnits stops a comparison of wall units with a length: whose
// friction velocity made them is not known. It reports whether it did.
func (w *work) doubtWallUnits(s, d *curve) bool {
	if s.scalar() || d.scalar() || wallUnits(s.xUnit.name) == wallUnits(d.xUnit.name) {
		return false
	}
	plus, other := s, d
	if wallUnits(d.xUnit.name) {
		plus, other = d, s
	}
	n := notice.New("wall-units", plus.xUnit.name, w.e.study.fileName(plus.slip), other.xUnit.name, w.e.study.fileName(other.slip))
	w.tell(n)
	w.stop(2, "a length for "+plus.xUnit.name, slipTarget(plus.slip, "x.column"), n)
	return true
}

// Two limits of practice for the first cell of a wall (common practice, no
// source): above the upper a wall function is meant, below the lower the
// sublayer is resolved.
const (
	wallFunction = 11.0
	resolvedWall = 5.0
)

// doubtWallTreatment asks about grids whose y+ crosses from wall functions to a
// resolved wall: such grids are not one family.
func (w *work) doubtWallTreatment() {
	lists := [][]float64{}
	if w.grids != nil {
		for _, c := range w.grids.table.Columns {
			if wallUnits(c.Name) {
				lists = append(lists, c.Values)
			}
		}
	} else {
		entered := []float64{}
		for i := len(w.runs) - 1; i >= 0; i-- { // coarse to fine
			if v, err := strconv.ParseFloat(w.runs[i].curve.slip.YPlus.Value, 64); err == nil {
				entered = append(entered, v)
			}
		}
		lists = append(lists, entered)
	}
	for _, values := range lists {
		lo, hi, texts := math.Inf(1), math.Inf(-1), []string{}
		for _, v := range known(values) {
			lo, hi = min(lo, v), max(hi, v)
			texts = append(texts, quantity.Text(v, 2))
		}
		if lo < resolvedWall && hi > wallFunction {
			w.ask(1, "one wall treatment over the grids", "grid-wall", strings.Join(texts, ", "))
		}
	}
}

// likeness below and above which a column is taken as another's.
const (
	unlike = 0.9
	alike  = 0.99
)

// doubtSwapped asks about a run of the question whose values do not follow
// those of the other runs while another column of its table does.
func (w *work) doubtSwapped() {
	runs := w.e.curvesOf(w.q)
	if len(runs) < 3 {
		return
	}
	for _, c := range runs {
		if c.slip.Model.Value != w.model {
			continue
		}
		own, n := likeness(c, c.y, runs)
		if n < 2 || own > unlike {
			continue
		}
		for _, other := range c.table.Columns {
			if other.Name == c.slip.Y.Column.Value || other.Name == c.slip.X.Column.Value || len(known(other.Values)) < len(other.Values) {
				continue
			}
			if r, _ := likeness(c, other.Values, runs); r > alike {
				w.ask(2, "the column of "+w.q.Quantity+" in "+w.e.study.fileName(c.slip), "columns-swapped", other.Name, w.e.study.fileName(c.slip), c.yUnit.name, strconv.Itoa(n), quantity.Text(r, 3), quantity.Text(own, 2))
				return
			}
		}
	}
}

// curvesOf loads the curves of all runs of a question, of all models.
func (e *evaluation) curvesOf(q *Question) []*curve {
	var runs []*curve
	for i := range e.study.Slips {
		p := &e.study.Slips[i]
		if !q.belongs(p, Simulation) || !p.X.Given() {
			continue
		}
		if c, _ := e.load(p); c != nil && c.x != nil {
			runs = append(runs, c)
		}
	}
	return runs
}

// likeness returns the median correlation of values at the rows of one run
// with the other runs there, and how many answered at five rows or more.
func likeness(c *curve, values []float64, runs []*curve) (median float64, n int) {
	var all []float64
	for _, o := range runs {
		if o == c {
			continue
		}
		x, y := ascending(o.x, o.y)
		var a, b []float64
		at := make([]float64, 1)
		for i, v := range c.x {
			if interpolate.At(at, x, y, []float64{v}, interpolate.Linear) == nil && !math.IsNaN(at[0]) && !math.IsNaN(values[i]) {
				a, b = append(a, values[i]), append(b, at[0])
			}
		}
		if len(a) >= 5 {
			all = append(all, plausibility.Correlation(a, b))
		}
	}
	if len(all) == 0 {
		return 0, 0
	}
	return medianOf(all), len(all)
}

func medianOf(values []float64) float64 {
	sorted, _ := ascending(values, values)
	if len(sorted) == 0 {
		return math.NaN()
	}
	return sorted[len(sorted)/2]
}
