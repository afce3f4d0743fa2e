package chart

import (
	"cmp"
	"errors"
	"fmt"
	"math"
	"slices"
	"strings"

	"github.com/go-echarts/go-echarts/v2/opts"

	"weirmark/core/quantity"
	"weirmark/core/study"
)

// Measures of the figure of sources in px.
const (
	shareWidth  = 330 // of the panel along the stations
	shareHeight = 170 // least height beside it
	pileWidth   = 44  // of the bar of all sources
	pileGap     = 26
	pileLine    = 18 // least distance of the names beside the bar
)

// mostSources is the number of sources that the bar names; the least of more
// are put together.
const mostSources = 11

// sides are the three parts of u_val, in the order of stacking, with the look
// that tells them apart without hue.
var sides = [3]struct {
	of, name, icon string
	opacity        float32
	hatch          []float64
	part           func(study.Station) float64 // of u_val squared
}{
	{study.OfData, "data", bandKey, 0.32, nil, func(s study.Station) float64 { return square2(s.UD) }},
	{study.OfInput, "input", levelKey, 0.05, []float64{1, 0, 4}, func(s study.Station) float64 { return square2(s.UInput) }},
	{study.OfNumerical, "numerical", slopeKey, 0.16, []float64{1, -1, 5}, func(s study.Station) float64 { return float64(square2(s.UNum) + square2(s.UInterp)) }},
}

// Keys of hatched areas.
const (
	slopeKey = room + "M0 12l10-12h1.6l-10 12zM8 12l10-12h1.6l-10 12zM16 12l10-12h1.6l-10 12z"
	levelKey = room + "M0 1h28v1.2h-28zM0 5.4h28v1.2h-28zM0 9.8h28v1.2h-28z"
)

// square2 returns the square of an uncertainty, nothing for one that is not there.
func square2(u quantity.Number) float64 {
	if !u.Known() {
		return 0
	}
	return float64(u) * float64(u)
}

// hasShares reports whether there are shares of u_val to draw.
func hasShares(c study.Cell) bool {
	return slices.ContainsFunc(c.Sources, func(s study.SourceLine) bool { return s.Share.Known() && s.Share > 0 })
}

// Budget returns what u_val squared is made of: a bar of all sources with their
// names, stacked by data, input and numerical, and for curves the shares of
// these three along the stations. It fails on a cell without known shares.
func Budget(c study.Cell, id string, t Theme) (Figure, error) {
	if !hasShares(c) {
		return Figure{}, errors.New("drawing sources: no share of u_val is known")
	}
	p, err := newPicture(t)
	if err != nil {
		return Figure{}, err
	}
	if c.Shared != nil {
		c.Stations = leftInE(c.Stations)
	}
	columns := shareColumns(c)
	height := 20 + pileLine*min(len(c.Sources)+1, mostSources+len(sides))
	if len(columns) > 0 {
		height = max(height, shareHeight)
	}
	pile := piled(c.Sources, height)
	left := 20 + 3*digitWidth
	top := topEdge + keyRow*p.keys(left, topEdge, p.sideKeys(pile)) + nameRow
	ys := scale{Min: 0, Max: 100, Step: 25}
	if height < shareHeight {
		ys.Step = 50
	}
	share := "share of u²_{val} (%)"
	bar := panel{left: left, right: rightEdge, top: top, height: height, y: ys, yName: share, bare: true}
	foot := 16
	if len(columns) > 0 {
		foot = footRow
		p.shares(columns, p.add(panel{
			left: left, right: width - left - shareWidth, top: top, height: height, x: columnScale(columns), y: ys,
			yName: share, xName: axisName(c.XName, "", c.XUnit, columnScale(columns).Exponent),
		}))
		bar.left, bar.yName = left+shareWidth+pileGap, ""
	}
	// The x axis counts widths of the bar: names and their lines stand on it.
	bar.x = scale{Min: 0, Max: float64(width-bar.left-rightEdge) / pileWidth, Step: 1}
	p.pile(pile, bar)
	return Figure{
		ID: id + "-budget", Title: "Sources of u_val of " + subject(c) + ", " + simulation(c), Caption: budgetCaption(c, columns), Alt: budgetAlt(c),
		Height: top + height + foot, Table: budgetTable(c),
	}.finish(p.option)
}

// leftInE puts what the data leave in u_val in the place of u_D, for cells with
// sources that act on both sides.
func leftInE(stations []study.Station) []study.Station {
	left := slices.Clone(stations)
	for i, s := range left {
		rest := square2(s.UVal) - square2(s.UInput) - square2(s.UNum) - square2(s.UInterp)
		left[i].UD = quantity.Number(math.Sqrt(max(rest, 0)))
	}
	return left
}

// segment is a piece of the bar, in percent.
type segment struct {
	side     int
	low, mid float64
	high     float64
	name     string
	mark     float64 // height of its name beside the bar, percent
}

// piled stacks the sources by side, the greatest of a side first. Sources
// without a share are left out, and the least ones beyond mostSources are one
// for each side.
func piled(sources []study.SourceLine, height int) []segment {
	var list []study.SourceLine
	for _, s := range sources {
		if s.Share.Known() && s.Share > 0 {
			list = append(list, s)
		}
	}
	slices.SortStableFunc(list, func(a, b study.SourceLine) int { return cmp.Compare(b.Share, a.Share) })
	rest := list[min(len(list), mostSources):]
	list = list[:len(list)-len(rest)]
	var pile []segment
	at := 0.0
	put := func(side int, share float64, name string) {
		high := at + float64(100*share)
		pile = append(pile, segment{side: side, low: at, mid: (at + high) / 2, high: high, name: quantity.Text(100*share, 2) + " %  " + name})
		at = high
	}
	for side := range sides {
		for _, s := range list {
			if s.Of == sides[side].of {
				put(side, float64(s.Share), short(s.Name))
			}
		}
		n, sum := 0, 0.0
		for _, s := range rest {
			if s.Of == sides[side].of {
				n, sum = n+1, sum+float64(s.Share)
			}
		}
		if n > 0 {
			put(side, sum, counts(n, "further source", "further sources")+" of "+sides[side].name)
		}
	}
	spreadMarks(pile, 100*pileLine/float64(height))
	return pile
}

// spreadMarks places the names beside the bar so that none lies on another:
// at the middle of its segment, pushed upward, then down from the top. Marks and
// the least distance are in percent of the height.
func spreadMarks(pile []segment, least float64) {
	for i := range pile {
		pile[i].mark = math.Max(pile[i].mid, 3)
		if i > 0 {
			pile[i].mark = math.Max(pile[i].mark, pile[i-1].mark+least)
		}
	}
	ceiling := 100 - 3.
	for i := len(pile) - 1; i >= 0; i-- {
		pile[i].mark = math.Min(pile[i].mark, ceiling)
		ceiling = pile[i].mark - least
	}
}

// column is a station's place on the x axis with the shares up to each side,
// in percent; they are unknown where u_val is.
type column struct {
	x, from, to float64
	upTo        [len(sides)]quantity.Number
}

// shareColumns returns the stations of a curve as columns side by side: each
// reaches to the middle between its neighbours.
func shareColumns(c study.Cell) []column {
	if c.Scalar {
		return nil
	}
	stations := drawn(c).Stations
	var list []column
	for _, s := range stations {
		col := column{x: float64(s.X)}
		sum := 0.0
		for i := range sides {
			sum += sides[i].part(s)
			col.upTo[i] = quantity.Number(sum)
		}
		for i := range sides {
			if !s.UVal.Known() || sum == 0 {
				col.upTo[i] = quantity.None
				continue
			}
			col.upTo[i] = quantity.Number(100 * float64(col.upTo[i]) / sum)
		}
		if len(list) == 0 || col.x > list[len(list)-1].x {
			list = append(list, col)
		}
	}
	for i := range list {
		if len(list) == 1 {
			list[i].from, list[i].to = list[i].x-0.5, list[i].x+0.5
			break
		}
		before, after := max(i, 1), min(i, len(list)-2)
		list[i].from = list[i].x - (list[before].x-list[before-1].x)/2
		list[i].to = list[i].x + (list[after+1].x-list[after].x)/2
	}
	return list
}

func columnScale(columns []column) scale {
	return newScale(bounds{columns[0].from, columns[len(columns)-1].to}, 5)
}

// area returns the look of a side.
func (p *picture) area(side int, rows [][]any) series {
	s := band(sides[side].name, shade(p.ink, sides[side].opacity), rows)
	s.Hatch, s.Thick = sides[side].hatch, 0.8
	return s
}

// shares draws the columns into panel n.
func (p *picture) shares(columns []column, n int) {
	for side := range sides {
		rows := [][]any{}
		solid := false
		for _, col := range columns {
			low, high := quantity.Number(0), col.upTo[side]
			if side > 0 {
				low = col.upTo[side-1]
			}
			solid = solid || high.Known() && high > low
			for _, x := range []float64{col.from, col.to} {
				rows = append(rows, []any{quantity.Number(x), low, high})
			}
		}
		if solid {
			p.draw(n, 2, p.area(side, rows))
		}
	}
}

// pile draws the bar of all sources with their names beside it.
func (p *picture) pile(pile []segment, frame panel) {
	n := p.add(frame)
	rows := make([]named, len(pile))
	if frame.yName == "" {
		p.YAxis[n].AxisLabel.Show = opts.Bool(false)
		rows = append(rows, named{Name: "mean", Value: []any{quantity.Number(0), quantity.Number(-100 * 15 / float64(frame.height))}})
	}
	p.YAxis[n].SplitLine.Show = opts.Bool(false)
	for _, s := range pile {
		low, high := quantity.Number(s.low), quantity.Number(s.high)
		p.draw(n, 2, p.area(s.side, [][]any{{quantity.Number(0), low, high}, {quantity.Number(1), low, high}}))
	}
	for i, s := range pile {
		if i > 0 {
			p.edge(n, s.low, 0, 1, s.low)
		}
		p.edge(n, s.mid, 1.06, 1.36, s.mark)
	}
	for i, s := range pile {
		rows[i] = named{Name: s.name, Value: []any{quantity.Number(1.42), quantity.Number(s.mark)}}
	}
	p.words(n, rows, 4)
}

// edge is a thin line from one height to another.
func (p *picture) edge(n int, y0, x0, x1, y1 float64) {
	p.draw(n, 3, series{
		Type: "line", Name: "edge", Symbol: "none", Silent: true, ItemStyle: filled(p.ink),
		LineStyle: &lineStyle{LineStyle: opts.LineStyle{Color: p.ink, Width: 0.8}},
		Data:      [][]any{{quantity.Number(x0), quantity.Number(y0)}, {quantity.Number(x1), quantity.Number(y1)}},
	})
}

func (p *picture) sideKeys(pile []segment) []entry {
	keys := []entry{}
	for side := range sides {
		if !slices.ContainsFunc(pile, func(s segment) bool { return s.side == side }) {
			continue
		}
		style := filled(p.ink)
		if sides[side].hatch == nil {
			style = shade(p.ink, sides[side].opacity)
		}
		keys = append(keys, entry{Name: sides[side].name, Icon: sides[side].icon, ItemStyle: style})
	}
	return keys
}

func budgetCaption(c study.Cell, columns []column) string {
	text := "Shares of u_val² of " + subject(c) + " by source: " + simulation(c)
	if where := setting(c); where != "" {
		text += "; " + where
	}
	text += "."
	n := 0
	for _, s := range c.Stations {
		if s.UVal.Known() {
			n++
		}
	}
	if !c.Scalar {
		text += fmt.Sprintf(" Left, along the stations (%s of %s with a known u_val); right, of the mean over them.", grouped(n), counts(len(c.Stations), "station", "stations"))
		if len(columns) < len(c.Stations) {
			text += fmt.Sprintf(" %s stations are drawn.", grouped(len(columns)))
		}
	} else if n > 0 {
		text += " u_val = " + quantity.Text(float64(c.Stations[0].UVal), 2) + unitAfter(c) + " (standard)."
	}
	if missing := missingSides(c); missing != "" {
		text += " Not given, and not zero: " + missing + "."
	}
	return text
}

// missingSides names the sides that have no source.
func missingSides(c study.Cell) string {
	names := []string{}
	for _, side := range sides {
		if !slices.ContainsFunc(c.Sources, func(s study.SourceLine) bool { return s.Of == side.of }) {
			names = append(names, side.name)
		}
	}
	return strings.Join(names, ", ")
}

func budgetAlt(c study.Cell) string {
	parts := []string{}
	for _, s := range c.Sources {
		if s.Share.Known() {
			parts = append(parts, s.Name+" ("+s.Of+") "+quantity.Text(float64(100*float64(s.Share)), 2)+" %")
		}
	}
	return "Shares of u_val squared of " + subject(c) + ": " + strings.Join(parts, ", ") + "."
}

func budgetTable(c study.Cell) Table {
	t := Table{Head: []string{"source", "of", headUnit("u", c.Unit), "share (%)"}, Rows: [][]string{}}
	for _, s := range c.Sources {
		share := "–"
		if s.Share.Known() {
			share = quantity.Text(float64(100*float64(s.Share)), 2)
		}
		t.Rows = append(t.Rows, []string{s.Name, s.Of, quantity.Text(float64(s.U), 2), share})
	}
	return t
}
