package memo

import (
	"fmt"
	"unicode/utf8"

	"weirmark/core/quantity"
	"weirmark/core/study"
)

// rowLimit is the number of rows printed of a long table, and widthLimit the
// number of characters that a row of the station table holds on A4.
const (
	rowLimit   = 120
	widthLimit = 92
)

// column is one column of the station table.
type column struct {
	title string // template
	key   string // name in the report
	kind  columnKind
	value func(study.Station) quantity.Number
}

type columnKind int

const (
	ofX columnKind = iota
	ofValue
	ofSigned
	ofUncertainty
	ofRatio
	ofPercent
	ofLine
	ofWeight
)

var stationColumns = []column{
	{"", "x", ofX, func(s study.Station) quantity.Number { return quantity.Number(s.X) }},
	{"*S*", "s", ofValue, func(s study.Station) quantity.Number { return s.S }},
	{"*D*", "d", ofValue, func(s study.Station) quantity.Number { return quantity.Number(s.D) }},
	{"*E*", "e", ofSigned, func(s study.Station) quantity.Number { return s.E }},
	{"*u*_{D}", "u_d", ofUncertainty, func(s study.Station) quantity.Number { return s.UD }},
	{"*u*_{num}", "u_num", ofUncertainty, func(s study.Station) quantity.Number { return s.UNum }},
	{"*u*_{int}", "u_interp", ofUncertainty, func(s study.Station) quantity.Number { return s.UInterp }},
	{"*u*_{in}", "u_input", ofUncertainty, func(s study.Station) quantity.Number { return s.UInput }},
	{"*u*_{val}", "u_val", ofUncertainty, func(s study.Station) quantity.Number { return s.UVal }},
	{"|*E*|/*u*_{val}", "ratio", ofRatio, func(s study.Station) quantity.Number { return s.Ratio }},
	{"from", "lo", ofSigned, func(s study.Station) quantity.Number { return s.Lo }},
	{"to", "hi", ofSigned, func(s study.Station) quantity.Number { return s.Hi }},
	{"*E*, %", "percent", ofPercent, percentOf},
	{"*w*", "weight", ofWeight, weight},
	{"Line", "line", ofLine, nil},
}

// percentOf is E in percent of |D|, where it was asked for.
func percentOf(s study.Station) quantity.Number {
	if s.Percent == nil {
		return quantity.None
	}
	return *s.Percent
}

// weight is the weight of a station; where all are equal there is none.
func weight(s study.Station) quantity.Number {
	if s.Weight == nil {
		return quantity.None
	}
	return *s.Weight
}

// stations prints the values at the stations: one row for each.
func (b *builder) stations(i int, c study.Cell) []Node {
	if len(c.Stations) == 0 {
		return []Node{paragraph(text("No station is common to simulation and reference: nothing was compared."))}
	}
	if c.Scalar {
		return b.scalar(i, c)
	}
	var nodes []Node
	var columns []column
	var without []Node
	for _, k := range stationColumns {
		if k.kind == ofLine || anyKnown(c.Stations, k.value) {
			columns = append(columns, k)
			continue
		}
		if k.kind == ofPercent || k.kind == ofWeight {
			continue // not asked for, or withheld everywhere
		}
		if len(without) > 0 {
			without = append(without, text(", "))
		}
		without = append(without, say(k.title)...)
	}
	rows := spread(len(c.Stations), rowLimit)
	grid := make([][]Node, len(columns))
	for j, k := range columns {
		grid[j] = stationColumn(i, c, k, rows)
	}
	caption := say("Values at the stations ({}) against {} ({}). “From” and “to” bound the model error.", text(unitOf(c.Unit)), given(c.XName), text(unitOf(c.XUnit)))
	parts := [][]int{all(len(columns))}
	if width(grid) > widthLimit {
		parts = halves(columns)
	}
	for _, part := range parts {
		nodes = append(nodes, b.stationTable(caption, c, columns, grid, part, len(rows)))
	}
	foot := say("Readings: noise, |*E*| does not exceed *u*_{val}; between, |*E*| lies between *u*_{val} and *k* *u*_{val}; sign, |*E*| exceeds *k* *u*_{val}. Line is the line of the reference file.")
	if len(without) > 0 {
		foot = append(foot, text(" Not known at any station, and not zero: "))
		foot = append(append(foot, without...), text("."))
	}
	if len(rows) < len(c.Stations) {
		foot = append(foot, say(" The table prints {} of {} stations, evenly spaced; the CSV of the stations holds all.", text(fmt.Sprint(len(rows))), text(fmt.Sprint(len(c.Stations))))...)
	}
	nodes = append(nodes, note(foot...))
	if len(c.Outside) > 0 {
		nodes = append(nodes, b.outside(i, c))
	}
	return nodes
}

// readings are the short words of the table.
var readings = map[string]string{study.SignResolved: "sign", study.Between: "between", study.WithinNoise: "noise"}

func (b *builder) stationTable(caption []Node, c study.Cell, columns []column, grid [][]Node, part []int, n int) Node {
	head := block(Row, "head")
	withReading := false
	for _, j := range part {
		title := say(columns[j].title)
		if columns[j].kind == ofX {
			title = []Node{given(c.XName)}
		}
		withReading = withReading || columns[j].kind == ofRatio
		head.Nodes = append(head.Nodes, block(Head, "number", title...))
	}
	if withReading {
		head.Nodes = append(head.Nodes, block(Head, "", text("Reading")))
	}
	at := spread(len(c.Stations), rowLimit)
	rows := make([]Node, n)
	for r := range rows {
		for _, j := range part {
			rows[r].Nodes = append(rows[r].Nodes, figureCell(grid[j][r]))
		}
		if withReading {
			rows[r].Nodes = append(rows[r].Nodes, cell(text(word(readings, c.Stations[at[r]].Reading))))
		}
		rows[r].Kind = Row
	}
	return b.table("stations", caption, head, rows...)
}

// stationColumn returns the cells of one column at the given stations, with
// one number of decimals where the uncertainties allow it.
func stationColumn(i int, c study.Cell, k column, rows []int) []Node {
	scale := scaleOf(c.Stations, func(s study.Station) quantity.Number { return s.UVal })
	own := scale
	if k.kind == ofUncertainty {
		own = scaleOf(c.Stations, k.value)
	}
	x := make([]float64, len(rows))
	for r, n := range rows {
		x[r] = float64(c.Stations[n].X)
	}
	decimals := places(x)
	cells := make([]Node, len(rows))
	for r, n := range rows {
		s := c.Stations[n]
		field := fmt.Sprintf("cells.%d.stations.%d.%s", i, n, k.key)
		u := scale
		if !u.Known() {
			u = s.UVal
		}
		switch k.kind {
		case ofX:
			cells[r] = written(s.X, atPlaces(float64(s.X), decimals), field)
		case ofWeight:
			cells[r] = digits(k.value(s), 3, field)
		case ofLine:
			cells[r] = count(s.Line, field)
		case ofPercent:
			cells[r] = signed(k.value(s), 3, field)
		case ofRatio:
			cells[r] = number(s.Ratio, quantity.Like(float64(s.Ratio), 0.1, 2), field)
		case ofUncertainty:
			if !own.Known() {
				cells[r] = digits(k.value(s), 2, field)
				continue
			}
			cells[r] = number(k.value(s), quantity.Like(float64(k.value(s)), float64(own), 2), field)
		case ofSigned:
			cells[r] = signedBeside(k.value(s), u, field)
		default:
			cells[r] = beside(k.value(s), u, field)
			if k.key == "d" {
				cells[r] = writtenBeside(s.D, u, field)
			}
		}
	}
	return cells
}

// scaleOf returns the smallest positive value where all lie within a factor of
// thirty, so that one number of decimals serves all of them, else none.
func scaleOf(stations []study.Station, value func(study.Station) quantity.Number) quantity.Number {
	low, high := quantity.None, quantity.None
	for _, s := range stations {
		v := value(s)
		if !v.Known() || v <= 0 {
			continue
		}
		if !low.Known() || v < low {
			low = v
		}
		if !high.Known() || v > high {
			high = v
		}
	}
	if low.Known() && high <= 30*low {
		return low
	}
	return quantity.None
}

func anyKnown(stations []study.Station, value func(study.Station) quantity.Number) bool {
	for _, s := range stations {
		if value(s).Known() {
			return true
		}
	}
	return false
}

// width returns the characters of the widest row: the longest text of every
// column and a gap.
func width(grid [][]Node) int {
	sum := 0
	for _, cells := range grid {
		longest := 3
		for _, n := range cells {
			longest = max(longest, utf8.RuneCountInString(n.Text))
		}
		sum += longest + 1
	}
	return sum + 8 // the reading
}

func all(n int) []int { return spread(n, n) }

// halves parts a table that is too wide: the comparison, then the
// uncertainties, both with the abscissa.
func halves(columns []column) [][]int {
	var comparison, uncertainty []int
	for j, k := range columns {
		if k.kind == ofX {
			comparison, uncertainty = append(comparison, j), append(uncertainty, j)
			continue
		}
		if k.kind == ofUncertainty || k.kind == ofWeight || k.kind == ofLine {
			uncertainty = append(uncertainty, j)
			continue
		}
		comparison = append(comparison, j)
	}
	return [][]int{comparison, uncertainty}
}

// outside lists stations without support.
func (b *builder) outside(i int, c study.Cell) Node {
	nodes := say("Outside the simulated range, not compared and not extrapolated: {} = ", given(c.XName))
	rows := spread(len(c.Outside), 30)
	for r, n := range rows {
		if r > 0 {
			nodes = append(nodes, text(", "))
		}
		nodes = append(nodes, trimmed(c.Outside[n], 5, fmt.Sprintf("cells.%d.outside.%d", i, n)))
	}
	if c.XUnit != "" && c.XUnit != "1" {
		nodes = append(nodes, text("\u202f"+c.XUnit))
	}
	if len(rows) < len(c.Outside) {
		nodes = append(nodes, text(fmt.Sprintf(" (%d of %d are printed)", len(rows), len(c.Outside))))
	}
	return paragraph(append(nodes, text("."))...)
}

// scalar prints the one station of a scalar.
func (b *builder) scalar(i int, c study.Cell) []Node {
	s := c.Stations[0]
	at := func(name string) string { return fmt.Sprintf("cells.%d.stations.0.%s", i, name) }
	from := []Node{text(absent)}
	if known(s.Lo, s.Hi) {
		from = interval(signedBeside(s.Lo, s.UVal, at("lo")), signedBeside(s.Hi, s.UVal, at("hi")))
	}
	reading := s.Reading
	if reading == "" {
		reading = "none"
	}
	values := row(figureCell(beside(s.S, s.UVal, at("s"))), figureCell(writtenBeside(s.D, s.UVal, at("d"))), figureCell(signedBeside(s.E, s.UVal, at("e"))),
		figureCell(digits(s.UD, 2, at("u_d"))), figureCell(digits(s.UNum, 2, at("u_num"))), figureCell(digits(s.UInput, 2, at("u_input"))), figureCell(digits(s.UVal, 2, at("u_val"))),
		figureCell(digits(s.Ratio, 2, at("ratio"))), figureCell(from...), cell(text(reading)))
	caption := say("Values ({}), *k* = {}. Uncertainties are standard. “{}” is a value that is not known; it is not zero.",
		text(unitOf(c.Unit)), asWritten(c.Choices.K, fmt.Sprintf("cells.%d.choices.k", i)), text(absent))
	if known(c.Degrees, c.K95) {
		caption = append(append(caption, text(" ")), needs(i, c)...)
	}
	return []Node{b.table("plain", caption, headRow("#*S*", "#*D*", "#*E* = *S* − *D*", "#*u*_{D}", "#*u*_{num}", "#*u*_{input}", "#*u*_{val}", "#|*E*|/*u*_{val}", "#Model error within", "Reading"), values)}
}
