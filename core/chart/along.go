package chart

import (
	"cmp"
	"fmt"
	"math"
	"slices"

	"github.com/go-echarts/go-echarts/v2/opts"

	"weirmark/core/quantity"
	"weirmark/core/study"
)

// Heights of the figure of a study along a curve in px.
const (
	alongHeight = 150
	orderHeight = 110
)

const (
	monotoneName = "monotone"
	otherName    = "not monotone: no order"
	formalName   = "formal order"
	beyondName   = "order beyond the axis"
)

// along draws U (95 %) and the observed order at every station. Stations
// without an order are hollow above and absent below; orders beyond the axis
// stand on its edge.
func (p *picture) along(c study.Cell, id string) (Figure, error) {
	local := slices.Clone(c.Grids.Local)
	slices.SortStableFunc(local, func(a, b study.LocalGrid) int { return cmp.Compare(a.X, b.X) })
	local = pick(local, thin(len(local), mostMarks, func(i int) float64 { return float64(local[i].U) }))

	x, u := newBounds(), newBounds()
	u.take(0)
	for _, l := range local {
		x.take(float64(l.X))
		u.take(float64(l.U))
	}
	xs, us := newScale(x, 9), newScale(bounds{0, float64(1.05 * u.hi)}, 4)
	orders, edge := p.orderScale(c.Grids)

	left := 20 + digitWidth*max(us.digits(), orders.digits())
	marks := p.localMarks(local, edge)
	keys := p.alongKeys(c.Grids, marks)
	top := topEdge + keyRow*p.keys(left, topEdge, keys) + nameRow

	n := p.add(panel{
		left: left, right: rightEdge, top: top, height: alongHeight, x: xs, y: us, bare: true,
		yName: "numerical uncertainty U, 95 % (" + unitText(c.Unit, us.Exponent) + ")",
	})
	p.points(n, monotoneName, marks.u, filled(p.models[0]))
	p.points(n, otherName, marks.uOther, p.hollow(p.models[0]))

	second := top + alongHeight + nameRow + 10
	m := p.add(panel{
		left: left, right: rightEdge, top: second, height: orderHeight, x: xs, y: orders,
		yName: "observed order p (–)", xName: axisName(c.XName, "", c.XUnit, xs.Exponent),
	})
	if c.Grids.Formal.Known() {
		formal := float64(c.Grids.Formal)
		p.rule(m, formalName, limitDash, 1, xs.Min, formal, xs.Max, formal)
	}
	p.points(m, monotoneName, marks.order, filled(p.models[0]))
	if len(marks.beyond) > 0 {
		p.draw(m, 5, series{Type: "scatter", Name: beyondName, Symbol: triangle.symbol(), SymbolSize: 8, ItemStyle: p.hollow(p.models[0]), Data: marks.beyond})
	}
	return Figure{
		ID: id, Title: "Grid study along " + c.XName + " of " + subject(c) + ", " + simulation(c),
		Caption: alongCaption(c, len(local), len(marks.beyond)), Alt: alongAlt(c),
		Height: second + orderHeight + footRow, Table: alongTable(c, local),
	}.finish(p.option)
}

// orderScale returns an axis from 0 to twice the formal order, or to the
// greatest order where that is less; edge is its upper end.
func (p *picture) orderScale(g *study.Grids) (scale, float64) {
	o := bounds{0, 0}
	for _, l := range g.Local {
		o.take(float64(l.Order))
	}
	if g.Formal.Known() {
		o.take(float64(g.Formal))
		o.hi = math.Min(o.hi, float64(2*g.Formal))
	}
	o.lo = math.Max(o.lo, -1)
	s := newScale(o, 4)
	return s, s.Max
}

// localMarks are the rows of both panels.
type localMarks struct{ u, uOther, order, beyond [][]any }

func (p *picture) localMarks(local []study.LocalGrid, edge float64) localMarks {
	var m localMarks
	for _, l := range local {
		if !l.Order.Known() {
			m.uOther = append(m.uOther, []any{l.X, l.U})
			continue
		}
		m.u = append(m.u, []any{l.X, l.U})
		if float64(l.Order) > edge {
			m.beyond = append(m.beyond, []any{l.X, quantity.Number(edge)})
		} else {
			m.order = append(m.order, []any{l.X, l.Order})
		}
	}
	return m
}

func (p *picture) alongKeys(g *study.Grids, m localMarks) []entry {
	keys := []entry{}
	if len(m.u) > 0 {
		keys = append(keys, entry{Name: monotoneName, Icon: discKey, ItemStyle: filled(p.models[0])})
	}
	if len(m.uOther) > 0 {
		keys = append(keys, entry{Name: otherName, Icon: discKey, ItemStyle: p.hollow(p.models[0])})
	}
	if g.Formal.Known() {
		keys = append(keys, entry{Name: formalName, Icon: lineKey(limitDash), ItemStyle: filled(p.ink)})
	}
	if len(m.beyond) > 0 {
		keys = append(keys, entry{Name: beyondName, Icon: triangle.key(), ItemStyle: p.hollow(p.models[0])})
	}
	return keys
}

func (p *picture) points(n int, name string, rows [][]any, style *opts.ItemStyle) {
	if len(rows) == 0 {
		return
	}
	p.draw(n, 4, series{Type: "scatter", Name: name, Symbol: disc, SymbolSize: markSize(len(rows)), ItemStyle: style, Data: rows})
}

func alongCaption(c study.Cell, shown, beyond int) string {
	g := c.Grids
	text := fmt.Sprintf("Numerical uncertainty U (95 %%) and observed order along %s: %s", c.XName, simulation(c))
	if where := setting(c); where != "" {
		text += "; " + where
	}
	text += fmt.Sprintf("; %s, %s. %s monotone, %s not.", counts(len(g.Points), "grid", "grids"),
		counts(len(g.Local), "station", "stations"), grouped(g.Monotone), grouped(g.NonMonotone))
	if g.OrderLow.Known() && g.OrderHigh.Known() {
		text += fmt.Sprintf(" Half of the local orders lie between %s and %s", quantity.Text(float64(g.OrderLow), 2), quantity.Text(float64(g.OrderHigh), 2))
		if g.Order.Known() {
			text += "; common order " + trimmed(g.Order, 3)
		}
		text += "."
	}
	if beyond > 0 {
		text += " " + counts(beyond, "order lies", "orders lie") + " beyond the axis."
	}
	if shown < len(g.Local) {
		text += fmt.Sprintf(" %s of %s stations are drawn: the least and the greatest U of every stretch.", grouped(shown), grouped(len(g.Local)))
	}
	return text + " " + units(c)
}

func alongAlt(c study.Cell) string {
	g := c.Grids
	u := newBounds()
	for _, l := range g.Local {
		u.take(float64(l.U))
	}
	text := fmt.Sprintf("Grid study of %s along %s: %s monotone, %s not.", subject(c), c.XName, counts(g.Monotone, "station", "stations"), grouped(g.NonMonotone))
	if !u.empty() {
		text += " U from " + quantity.Text(u.lo, 2) + " to " + quantity.Text(u.hi, 2) + "."
	}
	return text + " The numbers are in the table."
}

func alongTable(c study.Cell, local []study.LocalGrid) Table {
	t := Table{Head: []string{headUnit(c.XName, c.XUnit), "class", "observed order", headUnit("U (95 %)", c.Unit)}, Rows: [][]string{}}
	for _, l := range local {
		t.Rows = append(t.Rows, []string{trimmed(l.X, 6), l.Class, quantity.Text(float64(l.Order), 3), quantity.Text(float64(l.U), 2)})
	}
	return t
}
