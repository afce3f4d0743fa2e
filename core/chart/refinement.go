package chart

import (
	"errors"
	"fmt"
	"math"
	"strings"

	"github.com/go-echarts/go-echarts/v2/opts"

	"weirmark/core/quantity"
	"weirmark/core/study"
)

// hasGrids reports whether there is a grid study to draw.
func hasGrids(g *study.Grids) bool {
	if g == nil {
		return false
	}
	if g.Along {
		return len(g.Local) > 0
	}
	for _, p := range g.Points {
		if p.Value.Known() && p.H.Known() {
			return true
		}
	}
	return false
}

// Refinement returns the grid study of a cell: of a scalar, its values against
// the relative spacing h with the bar of U on the finest grid, the line of the
// observed order to the extrapolated value, and D with its bar in the margin;
// along a curve, U and the observed order at every station. It fails on a cell
// without a grid study.
func Refinement(c study.Cell, id string, t Theme) (Figure, error) {
	if !hasGrids(c.Grids) {
		return Figure{}, errors.New("drawing a grid study: the cell has none")
	}
	p, err := newPicture(t)
	if err != nil {
		return Figure{}, err
	}
	if c.Grids.Along {
		return p.along(c, id+"-grids")
	}
	return p.family(c, id+"-grids")
}

// Measures of the figure of a family in px.
const (
	familyHeight = 220
	marginWidth  = 54
)

func (p *picture) family(c study.Cell, id string) (Figure, error) {
	g, k := c.Grids, c.Choices.K
	x, y := newBounds(), newBounds()
	x.take(0)
	for _, q := range g.Points {
		if q.Value.Known() {
			x.take(float64(q.H))
		}
		y.take(float64(q.Value))
	}
	finest, known := finestOf(g)
	if known {
		y.around(float64(finest.Value), float64(g.U))
	}
	y.take(float64(g.Extrapolated))
	if g.Fit != nil {
		y.take(float64(g.Fit.Base))
	}
	d, u, measured := margin(c)
	if measured {
		y.around(d, float64(k*u))
	}
	xs, ys := newScale(x.padded(0.03).from(0), 7), newScale(y.padded(0.05), 5)
	left := 20 + digitWidth*ys.digits()
	right := rightEdge
	if measured {
		right += marginWidth + 18
	}
	keys := p.familyKeys(c, measured)
	top := topEdge + keyRow*p.keys(left, topEdge, keys) + nameRow
	n := p.add(panel{
		left: left, right: right, top: top, height: familyHeight, x: xs, y: ys,
		xName: "relative grid spacing h (" + unitText("", xs.Exponent) + ")",
		yName: axisName(c.Quantity, c.Symbol, c.Unit, ys.Exponent),
	})
	p.familyMarks(n, g, finest, known, xs)
	if measured {
		p.margin(c, d, u, top, ys)
	}
	return Figure{
		ID: id, Title: "Grid study of " + subject(c) + ", " + simulation(c), Caption: familyCaption(c, measured), Alt: familyAlt(c),
		Height: top + familyHeight + footRow, Table: familyTable(c),
	}.finish(p.option)
}

// from returns b with its lower end at v.
func (b bounds) from(v float64) bounds { return bounds{v, b.hi} }

// finestOf returns the grid of the least spacing that has a value.
func finestOf(g *study.Grids) (study.GridPoint, bool) {
	best, found := study.GridPoint{}, false
	for _, q := range g.Points {
		if q.Value.Known() && q.H.Known() && (!found || q.H < best.H) {
			best, found = q, true
		}
	}
	return best, found
}

// margin returns D and u_D of a scalar cell.
func margin(c study.Cell) (d, u float64, known bool) {
	if !c.Scalar || len(c.Stations) == 0 {
		return 0, 0, false
	}
	s := c.Stations[0]
	return float64(s.D), float64(s.UD), quantity.Number(s.D).Known()
}

const (
	usedName    = "grids used"
	unusedName  = "other grids"
	orderName   = "line of the observed order"
	fitName     = "line behind U"
	extraName   = "extrapolated to h = 0"
	gridBarName = "± U_{grid}, 95 %"
)

// lined reports whether a line can be drawn: the one behind U where that is
// another than that of the observed order through the three finest grids.
func lined(g *study.Grids, finest study.GridPoint) bool {
	used, _ := usedPoints(g)
	return g.Fit != nil || len(used) <= 3 && g.Extrapolated.Known() && g.Order.Known() && g.Order > 0 && finest.H > 0
}

func (p *picture) familyKeys(c study.Cell, measured bool) []entry {
	g := c.Grids
	keys := []entry{}
	used, unused := usedPoints(g)
	if len(used) > 0 {
		keys = append(keys, entry{Name: usedName, Icon: triangle.key(), ItemStyle: filled(p.models[0])})
	}
	if len(unused) > 0 {
		keys = append(keys, entry{Name: unusedName, Icon: triangle.key(), ItemStyle: p.hollow(p.models[0])})
	}
	if finest, known := finestOf(g); known && lined(g, finest) {
		keys = append(keys, entry{Name: lineName(g), Icon: lineKey(orderDash), ItemStyle: filled(p.models[0])})
	}
	if g.Extrapolated.Known() {
		keys = append(keys, entry{Name: extraName, Icon: plus.key(), ItemStyle: filled(p.models[0])})
	}
	if g.U.Known() {
		keys = append(keys, entry{Name: gridBarName, Icon: uprightKey, ItemStyle: filled(p.models[0])})
	}
	if measured {
		keys = append(keys, entry{Name: marginName(c), Icon: barredKey, ItemStyle: filled(p.ink)})
	}
	return keys
}

// orderDash is the pattern of the line of the observed order.
var orderDash = []int{2, 3}

func marginName(c study.Cell) string {
	name := "D, " + short(reference(c))
	if c.Stations[0].UD.Known() {
		name += ", ± " + times(c.Choices.K, "u_{D}")
	}
	return name
}

// usedPoints parts the grids with a value into those behind the result and the others.
func usedPoints(g *study.Grids) (used, unused []study.GridPoint) {
	for _, q := range g.Points {
		switch {
		case !q.Value.Known() || !q.H.Known():
		case q.Used:
			used = append(used, q)
		default:
			unused = append(unused, q)
		}
	}
	return used, unused
}

func (p *picture) familyMarks(n int, g *study.Grids, finest study.GridPoint, known bool, xs scale) {
	used, unused := usedPoints(g)
	mark := func(name string, points []study.GridPoint, style *opts.ItemStyle) {
		rows := make([]named, len(points))
		for i, q := range points {
			rows[i] = named{Name: short(q.Name), Value: []any{q.H, q.Value}}
		}
		p.draw(n, 5, series{
			Type: "scatter", Name: name, Symbol: triangle.symbol(), SymbolSize: 10, ItemStyle: style, Data: rows,
			Label: &label{
				Label:    opts.Label{Show: opts.Bool(true), Formatter: "{b}", Color: p.ink, FontSize: textSize},
				Position: []int{12, aside(g)},
			},
			LabelLayout: &opts.LabelLayout{HideOverlap: opts.Bool(true)},
		})
	}
	if len(used) > 0 {
		mark(usedName, used, filled(p.models[0]))
	}
	if len(unused) > 0 {
		mark(unusedName, unused, p.hollow(p.models[0]))
	}
	if known && lined(g, finest) {
		p.draw(n, 2, series{
			Type: "line", Name: lineName(g), Symbol: "none", Silent: true, Clip: true, ItemStyle: filled(p.models[0]),
			LineStyle: &lineStyle{LineStyle: opts.LineStyle{Color: p.models[0], Width: 1.4}, Type: orderDash},
			Data:      orderLine(g, finest, xs.Max),
		})
	}
	if g.Extrapolated.Known() {
		p.draw(n, 5, series{
			Type: "scatter", Name: extraName, Symbol: plus.symbol(), SymbolSize: 10, ItemStyle: filled(p.models[0]),
			Data: [][]any{{quantity.Number(0), g.Extrapolated}},
		})
	}
	if known && g.U.Known() {
		bar := p.bars(gridBarName, [][]any{{finest.H, finest.Value - g.U, finest.Value + g.U}})
		bar.ItemStyle = filled(p.models[0])
		p.draw(n, 4, bar)
	}
}

// aside returns how far below the top of its mark a grid's name stands, in px:
// on the side that the line of the values leaves free.
func aside(g *study.Grids) int {
	used, unused := usedPoints(g)
	all := append(unused, used...)
	coarse, fine := all[0], all[0]
	for _, q := range all {
		if q.H > coarse.H {
			coarse = q
		}
		if q.H < fine.H {
			fine = q
		}
	}
	if coarse.Value < fine.Value {
		return -8
	}
	return 9
}

// lineName names the line of a family.
func lineName(g *study.Grids) string {
	if g.Fit != nil {
		return fitName
	}
	return orderName
}

// lineAt returns the value of that line at a spacing.
func lineAt(g *study.Grids, finest study.GridPoint, h float64) float64 {
	if g.Fit == nil {
		rise := float64(finest.Value-g.Extrapolated) * math.Pow(h/float64(finest.H), float64(g.Order))
		return float64(g.Extrapolated) + rise
	}
	v := float64(g.Fit.Base)
	for _, t := range g.Fit.Terms {
		v += float64(float64(t.Coefficient) * math.Pow(h/float64(finest.H), float64(t.Power)))
	}
	return v
}

// orderLine returns points of the line, f0 + (f1 - f0) (h/h1)^p or the fit
// behind U, from 0 to the edge, to six digits: powers differ between hosts in
// their last bits.
func orderLine(g *study.Grids, finest study.GridPoint, edge float64) [][]any {
	const pieces = 60
	rows := make([][]any, pieces+1)
	for i := range rows {
		h := float64(i) * edge / pieces
		rows[i] = []any{quantity.Number(quantity.Round(h, 6)), quantity.Number(quantity.Round(lineAt(g, finest, h), 6))}
	}
	return rows
}

// margin draws D with its bar into a narrow panel on the right, on the same scale.
func (p *picture) margin(c study.Cell, d, u float64, top int, ys scale) {
	n := p.add(panel{
		left: width - rightEdge - marginWidth, right: rightEdge, top: top, height: familyHeight,
		x: scale{Min: 0, Max: 1, Step: 1}, y: ys, bare: true, xName: "D",
	})
	p.YAxis[n].Name = ""
	p.YAxis[n].AxisLabel.Show = opts.Bool(false)
	x := quantity.Number(0.5)
	p.draw(n, 5, series{Type: "scatter", Name: marginName(c), Symbol: disc, SymbolSize: 7, ItemStyle: filled(p.ink), Data: [][]any{{x, c.Stations[0].D}}})
	if wide := quantity.Number(float64(c.Choices.K * u)); wide.Known() {
		p.draw(n, 4, p.bars(marginName(c), [][]any{{x, quantity.Number(d) - wide, quantity.Number(d) + wide}}))
	}
}

func familyCaption(c study.Cell, measured bool) string {
	g := c.Grids
	used, unused := usedPoints(g)
	text := fmt.Sprintf("%s against relative grid spacing h (finest = 1): %s", capital(subject(c)), simulation(c))
	if where := setting(c); where != "" {
		text += "; " + where
	}
	text += fmt.Sprintf("; %s, %s used.", counts(len(used)+len(unused), "grid", "grids"), grouped(len(used)))
	if g.Class != "" {
		text += " The family is classed as " + g.Class + "."
	}
	if g.Order.Known() {
		text += " Observed order " + trimmed(g.Order, 3) + " against " + trimmed(g.Formal, 2) + "."
	}
	if g.U.Known() {
		text += " The bar on the finest grid is ± U = " + quantity.Text(float64(g.U), 2) + unitAfter(c) + " (95 %)."
	} else if g.UNum.Known() {
		text += " There is no bar: of such a family only a bound is known, u_num = " + quantity.Text(float64(g.UNum), 2) + unitAfter(c) + " (standard)."
	} else {
		text += " There is no bar: no grid uncertainty is available."
	}
	if measured && c.Stations[0].UD.Known() {
		text += fmt.Sprintf(" In the margin: D ± %s (k = %s).", times(c.Choices.K, "u_D"), factor(c.Choices.K))
	} else if measured {
		text += " In the margin: D; u_D is not known."
	}
	return text + " " + units(c)
}

// counts returns "1 grid" or "4 grids".
func counts(n int, one, many string) string {
	if n == 1 {
		return "1 " + one
	}
	return grouped(n) + " " + many
}

func unitAfter(c study.Cell) string {
	if c.Unit == "" || c.Unit == "1" {
		return ""
	}
	return " " + c.Unit
}

func familyAlt(c study.Cell) string {
	values := []string{}
	for _, q := range c.Grids.Points {
		if q.Value.Known() {
			values = append(values, q.Name+" "+trimmed(q.Value, 5))
		}
	}
	text := "Grid study of " + subject(c) + ", coarse to fine: " + strings.Join(values, ", ") + "."
	if c.Grids.Extrapolated.Known() {
		text += " Extrapolated to h = 0: " + trimmed(c.Grids.Extrapolated, 5) + "."
	}
	return text
}

func familyTable(c study.Cell) Table {
	t := Table{Head: []string{"grid", "cells", "h", headUnit("value", c.Unit), "used"}, Rows: [][]string{}}
	for _, q := range c.Grids.Points {
		used := "no"
		if q.Used {
			used = "yes"
		}
		cells := "–"
		if q.Cells.Known() {
			cells = grouped(int(q.Cells))
		}
		t.Rows = append(t.Rows, []string{q.Name, cells, trimmed(q.H, 4), beside(q.Value, c.Grids.U), used})
	}
	if c.Grids.Extrapolated.Known() {
		t.Rows = append(t.Rows, []string{"extrapolated", "–", "0", beside(c.Grids.Extrapolated, c.Grids.U), "–"})
	}
	if c.Grids.U.Known() {
		t.Rows = append(t.Rows, []string{"U (95 %)", "–", "–", quantity.Text(float64(c.Grids.U), 2), "–"})
	}
	return t
}
