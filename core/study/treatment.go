package study

import (
	"math"

	"weirmark/core/comparison"
	"weirmark/core/integrate"
	"weirmark/core/notice"
	"weirmark/core/plausibility"
	"weirmark/core/profile"
	"weirmark/core/quantity"
	"weirmark/core/uncertainty"
)

// Treatment is what was done with the curves of a cell and what they show
// beside the comparison. Numbers are in the units of the cell.
type Treatment struct {
	Orders   []OrderLine       `json:"orders"`
	Sampling string            `json:"sampling"` // where the simulation holds its values, "" where it is not recorded
	Anchors  []AnchorLine      `json:"anchors"`
	Plan     *PlanLine         `json:"plan"`     // null while the stations are not locked
	Noise    *NoiseLine        `json:"noise"`    // null where scatter does not show
	Fit      *DisplacementLine `json:"fit"`      // null where too few stations are inside
	Integral *IntegralLine     `json:"integral"` // null where no two stations are joined
	Weights  string            `json:"weights"`  // in words, "" where they are equal
}

// OrderLine is the order of the rows of a file, which is kept.
type OrderLine struct {
	File   string `json:"file"`
	Column string `json:"column"`
	Hash   string `json:"hash"`
	Sorted bool   `json:"sorted"` // a copy in order of stations was made for the comparison
}

// AnchorLine is a support point that was added to the simulation.
type AnchorLine struct {
	Kind  string `json:"kind"`
	X     Number `json:"x"`
	Value Number `json:"value"`
	Why   string `json:"why"`
}

// PlanLine is when the stations were locked and what changed since.
type PlanLine struct {
	At      string   `json:"at"`
	Late    bool     `json:"late"` // after the comparison was seen
	Changes []string `json:"changes"`
}

// NoiseLine is the scatter of the data between neighbouring stations, a lower
// bound of their random uncertainty, beside what is stated.
type NoiseLine struct {
	S      Number `json:"s"`
	Rows   int    `json:"rows"`
	Stated Number `json:"stated"` // root mean square of the sources independent between stations; null where there is none
}

// DisplacementLine is the shift and scale that would bring the simulation nearest to
// the data. Nothing is moved by it.
type DisplacementLine struct {
	N         int    `json:"n"`
	RMS       Number `json:"rms"` // of E at these stations, equal weights
	Shift     Number `json:"shift"`
	ShiftRMS  Number `json:"shift_rms"`
	Scale     Number `json:"scale"`
	ScaleRMS  Number `json:"scale_rms"`
	BothShift Number `json:"both_shift"`
	BothScale Number `json:"both_scale"`
	BothRMS   Number `json:"both_rms"`
	AtEdge    bool   `json:"at_edge"` // a shift is the largest that was tried
}

// IntegralLine is the integral over the stations where both sides have
// values, by the trapezoid, in the unit of the quantity times that of the
// stations.
type IntegralLine struct {
	E      Number `json:"e"`
	S      Number `json:"s"`
	D      Number `json:"d"`
	U      Number `json:"u"` // standard, of E; null where u_val is not known at a station
	Length Number `json:"length"`
	Whole  Number `json:"whole"` // from the first to the last station of the reference
	Pieces int    `json:"pieces"`
}

// treat fills what is told of the curves.
func (w *work) treat() {
	plan := w.plan()
	if w.cell.Scalar {
		if plan != nil {
			w.cell.Treatment = &Treatment{Orders: []OrderLine{}, Anchors: []AnchorLine{}, Plan: plan}
		}
		return
	}
	t := &Treatment{Orders: w.orders(), Anchors: append([]AnchorLine{}, w.anchors...), Plan: plan}
	w.cell.Treatment = t
	if s := w.finest(); s != nil {
		t.Sampling = s.slip.Sampling.Value
	}
	if w.q.Scores != nil && w.cell.Stations != nil && len(w.cell.Stations) > 0 && w.cell.Stations[0].Weight != nil {
		_, t.Weights, _ = w.weights(w.q.Scores)
	}
	if len(w.x) < 2 {
		return
	}
	t.Noise = w.noise()
	segments := w.segments()
	t.Integral = w.integralOfE(segments)
	w.unseen(segments)
	if !w.inner {
		t.Fit = w.fit()
	}
}

// orders tells the order of the rows of both sides.
func (w *work) orders() []OrderLine {
	lines := []OrderLine{}
	for _, c := range []*curve{w.finest(), w.reference} {
		if c == nil || c.scalar() {
			continue
		}
		read := w.e.study.slip(c.slip.ID)
		if read == nil {
			continue
		}
		column, err := c.table.Column(read.X.Column.Value)
		if err != nil {
			continue // told where the curve was read
		}
		lines = append(lines, OrderLine{File: w.e.study.fileName(read), Column: column.Name, Hash: OrderHash(column.Values), Sorted: !ordered(c.x)})
	}
	return lines
}

// ordered reports whether the known values never descend.
func ordered(x []float64) bool {
	before := math.Inf(-1)
	for _, v := range x {
		if v < before {
			return false
		}
		if !math.IsNaN(v) {
			before = v
		}
	}
	return true
}

// noise estimates the scatter of the data and offers it where it is above
// what is stated.
func (w *work) noise() *NoiseLine {
	x, d := ascending(w.x, w.d)
	s, rows, ok := plausibility.Noise(x, d)
	if !ok || s == 0 {
		return nil
	}
	line := &NoiseLine{S: w.step(s), Rows: rows, Stated: None}
	var random []uncertainty.Source
	for _, p := range w.parts {
		if p.line.Of == OfData && patternOf(p.source) == Independent {
			random = append(random, p.source)
		}
	}
	if random != nil {
		u := uncertainty.Combine(len(w.x), random).Total()
		line.Stated = w.step(math.Sqrt(squares(u, all(len(u))) / float64(len(u))))
	}
	switch {
	case !line.Stated.Known():
		w.tell(notice.New("noise-unstated", quantity.Text(float64(line.S), 2)+w.cell.UnitSuffix(), rows))
	case exceeds(float64(line.S), float64(line.Stated)):
		w.tell(notice.New("noise-more", quantity.Text(float64(line.S), 2)+w.cell.UnitSuffix(), rows, quantity.Text(float64(line.Stated), 2)))
	}
	return line
}

// fit looks for a shift and a scale of the simulation.
func (w *work) fit() *DisplacementLine {
	c := w.finest()
	if len(w.x) > mostTurned {
		return nil
	}
	x, y := ascending(bothKnown(inUnit(c.x, c.xUnit, w.xUnit), inUnit(c.y, c.yUnit, w.yUnit)))
	p, ok := comparison.Displace(x, y, w.x, w.d)
	if !ok {
		return nil
	}
	shift := func(v float64) Number { return Number(w.xUnit.StepFromSI(v)) }
	return &DisplacementLine{N: p.N, RMS: w.step(p.RMS), Shift: shift(p.Shift), ShiftRMS: w.step(p.ShiftRMS), Scale: Number(p.Scale), ScaleRMS: w.step(p.ScaleRMS),
		BothShift: shift(p.BothShift), BothScale: Number(p.BothScale), BothRMS: w.step(p.BothRMS), AtEdge: p.AtEdge}
}

// integralOfE sums E over the segments.
func (w *work) integralOfE(segments [][]int) *IntegralLine {
	e := w.errors()
	weights := make([]float64, len(w.x))
	line := &IntegralLine{U: None}
	var sumE, sumS, sumD, length float64
	for _, rows := range segments {
		if len(rows) < 2 {
			continue
		}
		line.Pieces++
		for k, share := range integrate.Weights(pick(w.x, rows)) {
			i := rows[k]
			weights[i] = share
			sumE, sumS, sumD = sumE+float64(share*e[i]), sumS+float64(share*w.s[i]), sumD+float64(share*w.d[i])
			length += share
		}
	}
	if line.Pieces == 0 {
		return nil
	}
	step := func(v float64) Number { return Number(w.xUnit.StepFromSI(w.yUnit.StepFromSI(v))) }
	line.E, line.S, line.D = step(sumE), step(sumS), step(sumD)
	if w.yUnit.Offset != 0 { // the integral of a value on a scale with another zero
		shift := w.yUnit.FromSI(0) * w.xUnit.StepFromSI(length)
		line.S, line.D = line.S+Number(shift), line.D+Number(shift)
	}
	lo, hi := profile.Limits(append(append([]float64{}, w.x...), w.skipped...))
	line.Length, line.Whole = Number(w.xUnit.StepFromSI(length)), Number(w.xUnit.StepFromSI(hi-lo))
	if w.uVal != nil {
		line.U = step(math.Sqrt(w.covariance(w.parts, all(len(w.x))).Weighted(weights)))
	}
	return line
}
