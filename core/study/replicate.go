package study

import (
	"math"
	"strconv"

	"weirmark/core/notice"
	"weirmark/core/quantity"
	"weirmark/core/tablefile"
	"weirmark/core/uncertainty"
)

// level is a level of replication with the column that tells its groups apart.
type level struct {
	name, path string
	column     Field
}

// levels are the levels of a slip, from the outermost inwards. Readings that no
// column tells apart are repeats.
func (p *Slip) levels() []level {
	var given []level
	for _, l := range []level{{"facility", "levels.facility", p.Levels.Facility}, {"day", "levels.day", p.Levels.Day}, {"set-up", "levels.rig", p.Levels.Rig}, {"run", "levels.run", p.Levels.Run}} {
		if l.column.Given() {
			given = append(given, l)
		}
	}
	return given
}

// Level returns the column of a level: facility, day, rig or run.
func (p *Slip) Level(name string) Field { return *p.entry("levels." + name) }

// repeats is the name of the innermost level.
const repeats = "repeated reading"

// replicated is one set of readings of the same quantity, in SI, analysed by
// its levels.
type replicated struct {
	readings []float64
	by       [][]int // group of each reading, a slice a level
	names    []string
	nest     uncertainty.Nest
	counts   int // the outermost level that varies
}

// replicated analyses the readings of a table at some rows; nil where they do
// not repeat anything, or a column is missing, which is told.
func (w *work) replicated(c *curve, values []float64, rows []int) *replicated {
	r := &replicated{readings: pick(values, rows)}
	if len(rows) == len(values) {
		r.readings = append([]float64{}, values...)
	}
	for _, l := range c.slip.levels() {
		of, err := labels(c.table, l.column.Value, rows)
		if err != nil {
			w.tell(asNotice(err))
			w.stop(2, "the column of the "+l.name, slipTarget(c.slip, l.path), asNotice(err))
			return nil
		}
		r.by, r.names = append(r.by, of), append(r.names, l.name)
	}
	var err error
	if r.nest, err = uncertainty.Nested(r.readings, r.by...); err != nil {
		return nil
	}
	r.by, r.names = append(r.by, all(len(rows))), append(r.names, repeats)
	for r.nest.Levels[r.counts].Degrees == 0 {
		r.counts++
	}
	return r
}

// labels numbers the entries of a column at some rows by their first
// appearance; cells of text count as they are written.
func labels(t tablefile.Table, name string, rows []int) ([]int, error) {
	column, err := t.Column(name)
	if err != nil {
		return nil, err
	}
	number := map[string]int{}
	out := make([]int, len(rows))
	for j, i := range rows {
		text := strconv.FormatFloat(column.Values[i], 'g', -1, 64)
		if column.Text != nil {
			text = column.Text[i]
		}
		n, known := number[text]
		if !known {
			n = len(number)
			number[text] = n
		}
		out[j] = n
	}
	return out, nil
}

// single is the standard deviation of one reading, all levels together.
func (r *replicated) single() float64 {
	sum := 0.0
	for _, l := range r.nest.Levels {
		if l.Degrees > 0 {
			sum += max(l.Variance, 0)
		}
	}
	return math.Sqrt(sum)
}

// apart is the range of the means of the groups of the level that counts.
func (r *replicated) apart() float64 {
	of := r.by[r.counts] // outside it there is one group only
	sum, n := map[int]float64{}, map[int]float64{}
	lo, hi := math.Inf(1), math.Inf(-1)
	for i, v := range r.readings {
		sum[of[i]] += v
		n[of[i]]++
	}
	for i := range r.readings {
		mean := sum[of[i]] / n[of[i]]
		lo, hi = min(lo, mean), max(hi, mean)
	}
	return hi - lo
}

// spread is how far repeated groups lie apart at a station.
type spread struct {
	level string
	at    int
	apart float64 // in SI
}

// leveled takes the repeated readings of a scalar by their levels, where the
// slip tells levels apart.
func (w *work) leveled(c *curve, values []float64) bool {
	if c.slip.levels() == nil {
		return false
	}
	r := w.replicated(c, values, rowsOf(values))
	if r == nil {
		return false
	}
	w.scatter(c, []*replicated{r}, []float64{r.nest.U}, "mean")
	return true
}

// repeated takes a table of repeated readings at the stations of a curve. Where
// the data are the means of the readings, u of the mean counts, else the
// deviation of a single one.
func (w *work) repeated() {
	for i := range w.e.study.Slips {
		p := &w.e.study.Slips[i]
		if !w.q.belongs(p, Replicates) || w.cell.Scalar {
			continue
		}
		if c := w.use(p); c != nil && !c.scalar() && w.inCellUnit(c) {
			w.repeatedCurve(c)
		}
	}
}

func (w *work) repeatedCurve(c *curve) {
	x, y := inUnit(c.x, c.xUnit, w.xUnit), inUnit(c.y, c.yUnit, w.yUnit)
	sets := make([]*replicated, len(w.x))
	missing, means := 0, true
	for i := range w.x {
		var rows []int
		for j := range x {
			if quantity.Round(x[j], 9) == quantity.Round(w.x[i], 9) && !math.IsNaN(y[j]) {
				rows = append(rows, j)
			}
		}
		if len(rows) >= 2 {
			sets[i] = w.replicated(c, y, rows)
		}
		if sets[i] == nil {
			missing++
			continue
		}
		means = means && !exceeds(math.Abs(w.d[i]-sets[i].nest.Mean), sets[i].nest.U)
	}
	if missing > 0 {
		w.need(2, false, "repeated readings at all stations", slipTarget(c.slip, "x.column"), "repeats-missing", missing, w.e.study.fileName(c.slip))
	}
	if missing == len(sets) {
		return
	}
	of := "mean"
	if !means {
		of = "single reading"
	}
	u := blank(len(sets))
	for i, r := range sets {
		switch {
		case r == nil:
		case means:
			u[i] = r.nest.U
		default:
			u[i] = r.single()
		}
	}
	w.scatter(c, sets, u, of)
}

// scatter adds the scatter of readings as a source, with the levels they show.
func (w *work) scatter(c *curve, sets []*replicated, u []float64, of string) {
	line := &ReplicateLine{U: w.step(rms(u)), Of: of, Levels: []LevelLine{}}
	degrees, n := math.Inf(1), 0
	var deviations, plains []float64
	var first *replicated
	for i, r := range sets {
		if r == nil {
			continue
		}
		if first == nil {
			first = r
		}
		n++
		line.Readings += len(r.readings)
		degrees = min(degrees, r.nest.Degrees)
		_, s, plain := uncertainty.Replicates(r.readings)
		deviations, plains = append(deviations, s), append(plains, plain)
		w.spreads = append(w.spreads, spread{r.names[r.counts], i, r.apart()})
	}
	line.Stations, line.Counts, line.Degrees = n, first.names[first.counts], Number(degrees)
	line.S, line.Plain = w.step(rms(deviations)), w.step(rms(plains))
	for l, name := range first.names {
		line.Levels = append(line.Levels, w.levelLine(sets, l, name))
	}
	w.cell.Replicates = line
	text := of + " of " + quantity.Counted(line.Readings, "reading") + "; the level " + line.Counts + " counts"
	p := w.add(OfData, "scatter of repeated readings", text, "computed from "+w.e.study.fileName(c.slip), u, false, false)
	p.degrees = degrees
	w.tell(notice.New("readings-level", line.Readings, line.Counts, quantity.Text(degrees, 2), of, quantity.Text(float64(line.U), 2), quantity.Text(float64(line.Plain), 2)+w.cell.UnitSuffix()))
	w.fewReadings(int(degrees) + 1)
}

// levelLine is one level over all stations: its deviation as a root mean square.
func (w *work) levelLine(sets []*replicated, l int, name string) LevelLine {
	line := LevelLine{Name: name, Deviation: None, Degrees: None}
	var variances []float64
	for _, r := range sets {
		if r == nil {
			continue
		}
		of := r.nest.Levels[l]
		if line.Groups == 0 || of.Groups < line.Groups {
			line.Groups, line.Degrees = of.Groups, Number(of.Degrees)
		}
		if of.Degrees > 0 {
			variances = append(variances, math.Sqrt(max(of.Variance, 0)))
		}
	}
	if len(variances) > 0 {
		line.Deviation = w.step(rms(variances))
	}
	return line
}

// apartLimit is the range of repeated groups, in stated standard uncertainties,
// above which a source is missing: two deviations of a difference of two.
const apartLimit = 2 * math.Sqrt2

// overlaps holds the range of repeated groups against what is stated for the
// data beside their scatter.
func (w *work) overlaps() {
	var stated []uncertainty.Source
	for i := range w.parts {
		if p := &w.parts[i]; p.line.Of == OfData && p.line.Name != "scatter of repeated readings" {
			stated = append(stated, p.ofSide())
		}
	}
	if stated == nil || w.spreads == nil {
		return
	}
	u := uncertainty.Combine(len(w.x), stated).Total()
	worst := w.spreads[0]
	for _, s := range w.spreads {
		if s.apart*u[worst.at] > worst.apart*u[s.at] {
			worst = s
		}
	}
	if !(u[worst.at] > 0) {
		return
	}
	ratio := worst.apart / u[worst.at]
	holds := !exceeds(ratio, apartLimit)
	w.consistent(ConsistencyLine{Name: "overlap of repeats (level " + worst.level + ")", Value: w.step(worst.apart), Expected: 0, U: w.step(math.Sqrt2 * u[worst.at]), Ratio: Number(ratio / math.Sqrt2), Holds: holds})
	if !holds {
		w.ask(2, "a further source of the data", "repeats-apart", worst.level, quantity.Text(ratio, 2))
	}
}

// rowsOf returns the rows with a number.
func rowsOf(values []float64) []int {
	var rows []int
	for i, v := range values {
		if !math.IsNaN(v) {
			rows = append(rows, i)
		}
	}
	return rows
}
