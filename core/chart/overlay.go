package chart

import (
	"cmp"
	"fmt"
	"math"
	"slices"
	"strconv"
	"strings"

	"github.com/go-echarts/go-echarts/v2/opts"

	"weirmark/core/quantity"
	"weirmark/core/study"
)

// Heights of an overlay in px.
const (
	mainHeight  = 226
	stripHeight = 92
	nameRow     = 27 // a row with an axis name and keys above a panel
	footRow     = 48 // numbers and name of the x axis
)

// Overlay returns the simulation over the measured values of a curve cell:
// above, the line S with a band of k u_num and the values D with bars of
// k u_D; below, on the same x axis, E = S - D with bands of u_val and k u_val.
// Values that were not compared are hollow, those a person took out have a mark
// of their own. What is not known is left out and the caption says so.
func Overlay(c study.Cell, id string, t Theme) (Figure, error) {
	return overlay([]study.Cell{c}, id+"-overlay", t)
}

// datum is one value of the reference with k u_D; compared says whether a
// simulation was set against it.
type datum struct {
	x, d     quantity.Written
	u        quantity.Number
	line     int
	compared bool
}

// curves are the parts of an overlay of one or more models on one reference.
type curves struct {
	*picture
	cells  []study.Cell
	data   []datum // sorted by x
	k      float64
	x      scale
	main   scale
	strip  scale
	left   int
	single bool
}

func overlay(cells []study.Cell, id string, t Theme) (Figure, error) {
	p, err := newPicture(t)
	if err != nil {
		return Figure{}, err
	}
	v := &curves{picture: p, cells: make([]study.Cell, len(cells)), k: cells[0].Choices.K, single: len(cells) == 1}
	for i, c := range cells {
		v.cells[i] = drawn(c)
	}
	v.data = references(v.cells)
	v.scales()

	first := v.cells[0]
	upper := v.upperKeys()
	top := topEdge + keyRow*v.keys(v.left, topEdge, upper) + nameRow
	v.upper(v.add(panel{
		left: v.left, right: rightEdge, top: top, height: mainHeight, x: v.x, y: v.main, bare: v.striped(),
		yName: v.mainName(), xName: v.footName(!v.striped()), inverse: first.Downward,
	}))
	top += mainHeight
	for i, c := range v.cells {
		if !v.striped() {
			break
		}
		name := "E = S − D (" + unitText(c.Unit, v.strip.Exponent) + ")"
		last := i == len(v.cells)-1
		frame := panel{
			left: v.left, right: rightEdge, top: top + nameRow + 10, height: stripHeight, x: v.x, y: v.strip,
			yName: name, xName: v.footName(last), inverse: first.Downward, bare: !last,
		}
		v.stripOf(v.add(frame), i)
		if keys := v.stripKeys(i); len(keys) > 0 {
			v.keys(12+int(textWidth(name))+keyGap, frame.top-23, keys)
		}
		top = frame.top + stripHeight
	}
	return Figure{
		ID: id, Title: v.title(), Caption: v.caption(cells), Alt: v.alt(cells),
		Height: top + footRow, Table: v.table(),
	}.finish(v.option)
}

// striped reports whether there is anything to show below the curves.
func (v *curves) striped() bool {
	return slices.ContainsFunc(v.cells, func(c study.Cell) bool {
		return slices.ContainsFunc(c.Stations, func(s study.Station) bool { return s.E.Known() })
	})
}

// footName is the name of the x axis for the lowest panel, and "" for others.
func (v *curves) footName(lowest bool) string {
	if !lowest {
		return ""
	}
	c := v.cells[0]
	return axisName(c.XName, "", c.XUnit, v.x.Exponent)
}

// Room around the panels and keys in px.
const (
	topEdge   = 8
	rightEdge = 24
)

// drawn returns c with its stations sorted by x and thinned, and its curve thinned.
func drawn(c study.Cell) study.Cell {
	stations := slices.Clone(c.Stations)
	slices.SortStableFunc(stations, func(a, b study.Station) int { return cmp.Compare(a.X, b.X) })
	kept := thin(len(stations), mostMarks, func(i int) float64 { return float64(stations[i].E) })
	c.Stations = pick(stations, kept)
	outside := thin(len(c.Outside), mostMarks, func(i int) float64 { return float64(c.Outside[i]) })
	c.Outside = pick(c.Outside, outside)
	n := min(len(c.Curve.X), len(c.Curve.Y))
	corners := thin(n, mostCorners, func(i int) float64 { return float64(c.Curve.Y[i]) })
	if len(c.Curve.UNum) < n {
		c.Curve.UNum = nil
	} else {
		c.Curve.UNum = pick(c.Curve.UNum, corners)
	}
	c.Curve.X, c.Curve.Y = pick(c.Curve.X, corners), pick(c.Curve.Y, corners)
	return c
}

// pick returns the elements of list at the places kept.
func pick[T any](list []T, kept []int) []T {
	picked := make([]T, len(kept))
	for i, k := range kept {
		picked[i] = list[k]
	}
	return picked
}

// references returns every value of the reference once, sorted by x. Values
// are the same where station and line of the file are.
func references(cells []study.Cell) []datum {
	type place struct {
		x    quantity.Written
		line int
	}
	at := map[place]int{}
	data := []datum{}
	for _, c := range cells {
		for _, s := range c.Stations {
			key := place{s.X, s.Line}
			i, seen := at[key]
			if !seen || len(cells) == 1 {
				i = len(data)
				at[key] = i
				data = append(data, datum{x: s.X, d: s.D, u: s.UD, line: s.Line})
			}
			data[i].compared = data[i].compared || s.E.Known()
		}
	}
	slices.SortStableFunc(data, func(a, b datum) int { return cmp.Compare(a.x, b.x) })
	return data
}

// scales chooses the axes. The stations rule the x axis; a simulation that
// reaches farther is shown a little beyond them.
func (v *curves) scales() {
	x, reach := newBounds(), newBounds()
	for _, d := range v.data {
		x.take(float64(d.x))
	}
	for _, a := range v.supports() {
		x.take(float64(a[0].(quantity.Number)))
	}
	for _, c := range v.cells {
		for _, o := range c.Outside {
			x.take(float64(o))
		}
		for _, o := range c.Excluded {
			x.take(float64(o.X))
		}
		for _, cx := range c.Curve.X {
			reach.take(float64(cx))
		}
	}
	if x.empty() || x.lo == x.hi {
		x.take(reach.lo, reach.hi)
	} else if !reach.empty() {
		room := x.padded(0.05)
		x.take(math.Max(reach.lo, room.lo), math.Min(reach.hi, room.hi))
	}
	v.x = newScale(x, 9)

	y, e := newBounds(), newBounds()
	for _, a := range v.supports() {
		y.take(float64(a[1].(quantity.Number)))
	}
	for _, d := range v.data {
		y.around(float64(d.d), float64(v.k*float64(d.u)))
	}
	for _, c := range v.cells {
		for i := range c.Curve.X {
			if cx := float64(c.Curve.X[i]); cx < v.x.Min || cx > v.x.Max {
				continue
			}
			y.take(float64(c.Curve.Y[i]))
			if v.single && c.Curve.UNum != nil {
				y.around(float64(c.Curve.Y[i]), float64(v.k*float64(c.Curve.UNum[i])))
			}
		}
		for _, o := range c.Excluded {
			y.take(float64(o.D))
		}
		for _, s := range c.Stations {
			y.take(float64(s.S))
			e.take(float64(s.E))
			e.around(0, float64(v.k*float64(s.UVal)))
		}
	}
	if !y.empty() {
		y = y.padded(0.03)
	}
	if !e.empty() {
		e.take(0)
		if limit, fixed := v.limit(); fixed && limit < 2*math.Max(-e.lo, e.hi) {
			e.take(-limit, limit)
		}
		e = e.padded(0.05)
	}
	v.main, v.strip = newScale(y, 5), newScale(e, 4)
	v.left = 20 + digitWidth*max(v.main.digits(), v.strip.digits())
}

// limit returns the requirement where it is one value for all stations.
func (v *curves) limit() (float64, bool) {
	r := v.cells[0].Requirement
	if r == nil || r.Percent.Known() || !r.Limit.Known() {
		return 0, false
	}
	return float64(r.Limit), true
}

// Names of series: keys of the legend and marks share them.
func (v *curves) lineName(i int) string {
	if v.single {
		return "S, " + short(simulation(v.cells[i]))
	}
	return short(simulation(v.cells[i]))
}

// errorName is the name of the line where there are several models, so that one
// key shows and hides both.
func (v *curves) errorName(i int) string {
	if v.single {
		return "E"
	}
	return v.lineName(i)
}

func (v *curves) bandName() string { return "± " + times(v.k, "u_{num}") }

func (v *curves) dataName() string {
	name := "D, " + short(reference(v.cells[0]))
	if v.barred() {
		name += ", ± " + times(v.k, "u_{D}")
	}
	return name
}

const (
	hollowName  = "not compared"
	outsideName = "outside, not compared"
	removedName = "excluded"
	supportName = "support point, declared"
)

// barred reports whether any u_D is known.
func (v *curves) barred() bool {
	return slices.ContainsFunc(v.data, func(d datum) bool { return d.u.Known() })
}

// uncompared counts the values that are drawn hollow.
func (v *curves) uncompared() int {
	n := 0
	for _, d := range v.data {
		if !d.compared {
			n++
		}
	}
	return n
}

// outside returns the x of stations that no cell's simulation reaches, from
// the cell that has most of them.
func (v *curves) outside() []quantity.Number {
	var most []quantity.Number
	for _, c := range v.cells {
		if len(c.Outside) > len(most) {
			most = c.Outside
		}
	}
	return most
}

// removed returns the values that a person took out of any cell's comparison, once each.
func (v *curves) removed() []study.Excluded {
	var all []study.Excluded
	for _, c := range v.cells {
		for _, x := range c.Excluded {
			if !slices.ContainsFunc(all, func(o study.Excluded) bool { return o.X == x.X && o.Line == x.Line }) {
				all = append(all, x)
			}
		}
	}
	return all
}

// supports are the points that were added to the simulations, once each.
func (v *curves) supports() [][]any {
	rows := [][]any{}
	for _, c := range v.cells {
		if c.Treatment == nil {
			continue
		}
		for _, a := range c.Treatment.Anchors {
			if !slices.ContainsFunc(rows, func(r []any) bool { return r[0] == a.X && r[1] == a.Value }) {
				rows = append(rows, []any{a.X, a.Value})
			}
		}
	}
	return rows
}

func (v *curves) upperKeys() []entry {
	keys := []entry{}
	for i, c := range v.cells {
		keys = append(keys, entry{Name: v.lineName(i), Icon: lineKey(looks[i].dash), ItemStyle: filled(v.models[i])})
		if v.single && c.Curve.UNum != nil {
			keys = append(keys, entry{Name: v.bandName(), Icon: bandKey, ItemStyle: shade(v.models[i], bandOpacity)})
		}
	}
	if len(v.data) > 0 {
		icon := discKey
		if v.barred() {
			icon = barredKey
		}
		keys = append(keys, entry{Name: v.dataName(), Icon: icon, ItemStyle: filled(v.ink)})
	}
	if v.uncompared() > 0 {
		keys = append(keys, entry{Name: hollowName, Icon: discKey, ItemStyle: v.hollow(v.ink)})
	}
	if len(v.removed()) > 0 {
		keys = append(keys, entry{Name: removedName, Icon: square.key(), ItemStyle: v.hollow(v.ink)})
	}
	if len(v.supports()) > 0 {
		keys = append(keys, entry{Name: supportName, Icon: diamond.key(), ItemStyle: v.hollow(v.ink)})
	}
	if len(v.outside()) > 0 {
		keys = append(keys, entry{Name: outsideName, Icon: triangle.key(), ItemStyle: v.hollow(v.ink)})
	}
	return keys
}

// Opacities of bands; the band of u_val lies on that of k u_val.
const (
	bandOpacity  = 0.22
	innerOpacity = 0.13
	outerOpacity = 0.08
)

func (v *curves) mainName() string {
	c := v.cells[0]
	name := axisName(c.Quantity, c.Symbol, c.Unit, v.main.Exponent)
	if c.Downward {
		name += ", negative values upward"
	}
	return name
}

// upper draws S and D into panel n.
func (v *curves) upper(n int) {
	for i, c := range v.cells {
		if v.single && c.Curve.UNum != nil {
			v.draw(n, 1, v.numBand(c, i))
		}
	}
	for i, c := range v.cells {
		v.draw(n, 2, v.line(c, i))
	}
	bars, solid, hollow := [][]any{}, [][]any{}, [][]any{}
	for _, d := range v.data {
		if d.u.Known() {
			u := float64(v.k * float64(d.u))
			bars = append(bars, []any{d.x, quantity.Number(float64(d.d) - u), quantity.Number(float64(d.d) + u)})
		}
		if d.compared {
			solid = append(solid, []any{d.x, d.d})
		} else {
			hollow = append(hollow, []any{d.x, d.d})
		}
	}
	size := markSize(len(v.data))
	if len(v.data) > 0 {
		v.draw(n, 5, series{Type: "scatter", Name: v.dataName(), Symbol: disc, SymbolSize: size, ItemStyle: filled(v.ink), Data: solid})
	}
	if len(bars) > 0 {
		v.draw(n, 4, v.bars(v.dataName(), bars))
	}
	if len(hollow) > 0 {
		v.draw(n, 5, series{Type: "scatter", Name: hollowName, Symbol: disc, SymbolSize: size, ItemStyle: v.hollow(v.ink), Data: hollow})
	}
	if removed := v.removed(); len(removed) > 0 {
		rows := make([][]any, len(removed))
		for i, x := range removed {
			rows[i] = []any{x.X, x.D}
		}
		v.draw(n, 5, series{Type: "scatter", Name: removedName, Symbol: square.symbol(), SymbolSize: 9, ItemStyle: v.hollow(v.ink), Data: rows})
	}
	if supports := v.supports(); len(supports) > 0 {
		v.draw(n, 5, series{Type: "scatter", Name: supportName, Symbol: diamond.symbol(), SymbolSize: 10, ItemStyle: v.hollow(v.ink), Data: supports})
	}
	if outside := v.outside(); len(outside) > 0 {
		edge := v.main.Min
		if v.cells[0].Downward {
			edge = v.main.Max
		}
		rows := make([][]any, len(outside))
		for i, x := range outside {
			rows[i] = []any{x, quantity.Number(edge)}
		}
		v.draw(n, 5, series{Type: "scatter", Name: outsideName, Symbol: triangle.symbol(), SymbolSize: 8, ItemStyle: v.hollow(v.ink), Data: rows})
	}
}

// markSize returns the diameter of a mark in px where n share a width.
func markSize(n int) float64 {
	switch {
	case n > 200:
		return 3
	case n > 80:
		return 4.5
	}
	return 6
}

// bars returns vertical bars of rows x, low end, high end. Where they stand
// close they are thin and have no end strokes.
func (p *picture) bars(name string, rows [][]any) series {
	thick, end := 1.0, 3.0
	if len(rows) > 80 {
		thick, end = 0.6, 0
	}
	return series{
		Type: "custom", Name: name, RenderItem: "errorBar", Thick: thick, Cap: end, Silent: true,
		Encode: &encode{X: []int{0}, Y: []int{1, 2}}, ItemStyle: filled(p.ink), Data: rows,
	}
}

// band returns the area between rows x, low edge, high edge; a null ends it.
func band(name string, style *opts.ItemStyle, rows [][]any) series {
	return series{
		Type: "custom", Name: name, RenderItem: "band", Silent: true, Clip: true,
		Encode: &encode{X: []int{0}, Y: []int{1, 2}}, ItemStyle: style, Data: rows,
	}
}

// numBand is S - k u_num to S + k u_num along the curve.
func (v *curves) numBand(c study.Cell, i int) series {
	rows := make([][]any, len(c.Curve.X))
	for j := range rows {
		u := quantity.Number(float64(v.k * float64(c.Curve.UNum[j])))
		rows[j] = []any{c.Curve.X[j], nil, nil}
		if y := quantity.Number(c.Curve.Y[j]); u.Known() && y.Known() {
			rows[j] = []any{c.Curve.X[j], y - u, y + u}
		}
	}
	return band(v.bandName(), shade(v.models[i], bandOpacity), rows)
}

// line is S along the curve as it was read or, where no curve was, from station to station.
func (v *curves) line(c study.Cell, i int) series {
	rows := make([][]any, 0, len(c.Curve.X))
	for j := range c.Curve.X {
		rows = append(rows, []any{c.Curve.X[j], c.Curve.Y[j]})
	}
	if len(rows) == 0 {
		for _, s := range c.Stations {
			rows = append(rows, []any{s.X, s.S})
		}
	}
	symbol := "none"
	if len(rows) == 1 {
		symbol = looks[i].symbol()
	}
	return series{
		Type: "line", Name: v.lineName(i), Symbol: symbol, Clip: true, ItemStyle: filled(v.models[i]), Data: rows,
		LineStyle: &lineStyle{LineStyle: opts.LineStyle{Color: v.models[i], Width: 1.8}, Type: looks[i].dash},
	}
}

// stripOf draws E and its bands for model i into panel n.
func (v *curves) stripOf(n, i int) {
	c := v.cells[i]
	inner, outer, marks := [][]any{}, [][]any{}, [][]any{}
	known := false
	for _, s := range c.Stations {
		in, out := []any{s.X, nil, nil}, []any{s.X, nil, nil}
		if s.UVal.Known() {
			known = true
			wide := quantity.Number(float64(v.k * float64(s.UVal)))
			in, out = []any{s.X, -s.UVal, s.UVal}, []any{s.X, -wide, wide}
		}
		inner, outer = append(inner, in), append(outer, out)
		if s.E.Known() {
			marks = append(marks, []any{s.X, s.E})
		}
	}
	if known {
		v.draw(n, 1, band(v.outerName(), shade(v.ink, outerOpacity), outer))
		if v.k != 1 {
			v.draw(n, 1, band(innerName, shade(v.ink, innerOpacity), inner))
		}
	}
	v.rule(n, "zero", nil, 1, v.x.Min, 0, v.x.Max, 0)
	if limit, fixed := v.limit(); fixed && limit <= math.Max(-v.strip.Min, v.strip.Max) {
		v.rule(n, requirementName, limitDash, 1, v.x.Min, limit, v.x.Max, limit)
		v.rule(n, requirementName, limitDash, 1, v.x.Min, -limit, v.x.Max, -limit)
	}
	size := 8 * markSize(len(c.Stations)) / 6
	v.draw(n, 5, series{
		Type: "scatter", Name: v.errorName(i), Symbol: looks[i].symbol(), SymbolSize: size,
		ItemStyle: filled(v.models[i]), Data: marks,
	})
}

// limitDash is the pattern of limits and of the formal order.
var limitDash = []int{6, 3}

const (
	innerName       = "± u_{val}"
	requirementName = "requirement"
)

func (v *curves) outerName() string { return "± " + times(v.k, "u_{val}") }

// stripKeys are the keys of strip i; the bands are named once.
func (v *curves) stripKeys(i int) []entry {
	c := v.cells[i]
	keys := []entry{{Name: v.errorName(i), Icon: looks[i].key(), ItemStyle: filled(v.models[i])}}
	if v.single {
		keys = keys[:0]
	}
	if i > 0 {
		return keys
	}
	if slices.ContainsFunc(c.Stations, func(s study.Station) bool { return s.UVal.Known() }) {
		if v.k != 1 {
			keys = append(keys, entry{Name: innerName, Icon: bandKey, ItemStyle: shade(v.ink, innerOpacity+outerOpacity)})
		}
		keys = append(keys, entry{Name: v.outerName(), Icon: bandKey, ItemStyle: shade(v.ink, outerOpacity)})
	}
	if limit, fixed := v.limit(); fixed && limit <= math.Max(-v.strip.Min, v.strip.Max) {
		keys = append(keys, entry{Name: requirementName, Icon: lineKey(limitDash), ItemStyle: filled(v.ink)})
	}
	return keys
}

func (v *curves) title() string {
	title := capital(subject(v.cells[0])) + ": simulation over " + reference(v.cells[0])
	if where := setting(v.cells[0]); where != "" {
		title += ", " + where
	}
	return title
}

// caption counts and names what is drawn; cells are the whole, not the drawn part.
func (v *curves) caption(cells []study.Cell) string {
	c := cells[0]
	sentences := []string{}
	models := make([]string, len(cells))
	for i, cell := range cells {
		models[i] = simulation(cell)
	}
	opening := capital(subject(c))
	if c.XName != "" {
		opening += " along " + c.XName
	}
	opening += ": " + strings.Join(models, "; ") + "; against " + reference(c)
	if where := setting(c); where != "" {
		opening += "; " + where
	}
	sentences = append(sentences, opening+".")
	for _, cell := range cells {
		who := ""
		if !v.single {
			who = capital(simulation(cell)) + ": "
		}
		sentences = append(sentences, who+counted(cell)+".")
	}
	if len(v.data) == 0 {
		sentences = append(sentences, "No value of the reference is drawn.")
	} else if v.barred() {
		sentences = append(sentences, "Bars are D ± "+times(v.k, "u_D")+" (k = "+factor(v.k)+").")
	} else {
		sentences = append(sentences, "D has no bars: u_D is not known.")
	}
	switch {
	case !v.single:
	case v.cells[0].Curve.UNum != nil:
		sentences = append(sentences, "The band along S is ± "+times(v.k, "u_num")+".")
	default:
		sentences = append(sentences, "S has no band: u_num along it is not known.")
	}
	if n := len(v.supports()); n > 0 {
		sentences = append(sentences, "Diamonds are support points that were declared for S: "+strconv.Itoa(n)+".")
	}
	if v.striped() {
		sentences = append(sentences, v.stripCaption())
	}
	sentences = append(sentences, units(c))
	for _, cell := range cells {
		if text := unlike(cell); text != "" {
			who := ""
			if !v.single {
				who = capital(simulation(cell)) + ": "
			}
			sentences = append(sentences, who+text)
		}
	}
	if note := v.thinned(cells); note != "" {
		sentences = append(sentences, note)
	}
	for _, cell := range cells {
		if cell.Withheld {
			who := ""
			if !v.single {
				who = " for " + simulation(cell)
			}
			sentences = append(sentences, "No statement is made"+who+".")
		}
	}
	return strings.Join(sentences, " ")
}

func (v *curves) stripCaption() string {
	text := "Below, E = S − D"
	known := slices.ContainsFunc(v.cells, func(c study.Cell) bool {
		return slices.ContainsFunc(c.Stations, func(s study.Station) bool { return s.UVal.Known() })
	})
	switch {
	case !known:
		text += "; u_val is not known"
	case v.k == 1:
		text += " with a band of ± u_val"
	default:
		text += " with bands of ± u_val and ± " + times(v.k, "u_val")
	}
	if limit, fixed := v.limit(); fixed {
		text += "; the requirement is ± " + trimmed(quantity.Number(limit), 3)
		if limit > math.Max(-v.strip.Min, v.strip.Max) {
			text += ", beyond the strip"
		}
	}
	return text + "."
}

// counted returns "23 of 26 stations compared, 3 excluded".
func counted(c study.Cell) string {
	n := 0
	for _, s := range c.Stations {
		if s.E.Known() {
			n++
		}
	}
	if c.Summary != nil {
		n = c.Summary.N
	}
	all := max(c.StationsAll, n)
	text := fmt.Sprintf("%s of %s stations compared", grouped(n), grouped(all))
	if outside := len(c.Outside); outside > 0 {
		text += ", " + grouped(outside) + " outside the simulation"
	}
	if excluded := len(c.Excluded); excluded > 0 {
		text += ", " + grouped(excluded) + " excluded"
	}
	return text
}

// thinned says how many of the stations are drawn, or "" where all are.
func (v *curves) thinned(cells []study.Cell) string {
	for i, c := range cells {
		if len(v.cells[i].Stations) < len(c.Stations) {
			return fmt.Sprintf("%s of %s stations are drawn: the least and the greatest E of every stretch.",
				grouped(len(v.cells[i].Stations)), grouped(len(c.Stations)))
		}
	}
	return ""
}

// alt tells what the drawing shows; the table follows it.
func (v *curves) alt(cells []study.Cell) string {
	parts := []string{"Line figure with an error strip below: " + subject(cells[0]) + "."}
	for _, c := range cells {
		finding := capital(simulation(c)) + ": " + counted(c)
		if s := c.Summary; s != nil {
			finding += "; largest |E| " + trimmed(s.MaxAbs, 3) + " at " + c.XName + " = " + trimmed(s.MaxAt, 4)
			if s.MaxRatio.Known() {
				finding += fmt.Sprintf("; |E| within u_val at %s, within %s at %s", grouped(s.WithinUVal), times(v.k, "u_val"), grouped(s.WithinKUVal))
			}
		}
		parts = append(parts, finding+".")
	}
	return strings.Join(append(parts, "The numbers are in the table."), " ")
}

// table holds the numbers of the drawn stations.
func (v *curves) table() Table {
	if !v.single {
		return v.tableOfModels()
	}
	c := v.cells[0]
	t := Table{
		Head: []string{headUnit(c.XName, c.XUnit), headUnit("S", c.Unit), headUnit("D", c.Unit), "E", "u_D", "u_num", "u_input", "u_val", "|E| / u_val"},
		Rows: [][]string{},
	}
	for _, s := range c.Stations {
		t.Rows = append(t.Rows, []string{
			written(s.X), beside(s.S, s.UVal), written(s.D), beside(s.E, s.UVal), quantity.Text(float64(s.UD), 2),
			quantity.Text(float64(s.UNum), 2), quantity.Text(float64(s.UInput), 2), quantity.Text(float64(s.UVal), 2),
			quantity.Text(float64(s.Ratio), 2),
		})
	}
	for _, x := range c.Outside {
		t.Rows = append(t.Rows, []string{trimmed(x, 6), "outside, not compared", "–", "–", "–", "–", "–", "–", "–"})
	}
	for _, x := range c.Excluded {
		t.Rows = append(t.Rows, []string{written(x.X), "excluded, not compared", written(x.D), "–", "–", "–", "–", "–", "–"})
	}
	return t
}

// tableOfModels has one row per reference value, with the columns of each model.
func (v *curves) tableOfModels() Table {
	first := v.cells[0]
	t := Table{Head: []string{headUnit(first.XName, first.XUnit), headUnit("D", first.Unit), "u_D"}, Rows: [][]string{}}
	for _, c := range v.cells {
		name := simulation(c)
		t.Head = append(t.Head, "S, "+name, "E, "+name, "u_val, "+name)
	}
	next := make([]int, len(v.cells))
	for _, d := range v.data {
		row := []string{written(d.x), written(d.d), quantity.Text(float64(d.u), 2)}
		for i, c := range v.cells {
			s, found := stationAt(c.Stations, &next[i], d)
			if !found {
				row = append(row, "–", "–", "–")
				continue
			}
			row = append(row, beside(s.S, s.UVal), beside(s.E, s.UVal), quantity.Text(float64(s.UVal), 2))
		}
		t.Rows = append(t.Rows, row)
	}
	return t
}

// stationAt returns the station of a reference value. Both are sorted by x, so
// that the search goes on from *next.
func stationAt(stations []study.Station, next *int, d datum) (study.Station, bool) {
	for *next < len(stations) && stations[*next].X < d.x {
		*next++
	}
	for i := *next; i < len(stations) && stations[i].X == d.x; i++ {
		if stations[i].Line == d.line {
			return stations[i], true
		}
	}
	return study.Station{}, false
}
