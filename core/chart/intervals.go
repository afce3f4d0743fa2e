package chart

import (
	"fmt"
	"strings"

	"github.com/go-echarts/go-echarts/v2/opts"

	"weirmark/core/quantity"
	"weirmark/core/study"
)

// Intervals returns E of a scalar cell with bars of u_val and k u_val on one
// axis with zero and, where there is a requirement, its limits. It fails on a
// cell without a station.
func Intervals(c study.Cell, id string, t Theme) (Figure, error) {
	return intervals([]study.Cell{c}, id+"-intervals", t)
}

// rowHeight is the room of one interval in px.
const rowHeight = 46

func intervals(cells []study.Cell, id string, t Theme) (Figure, error) {
	p, err := newPicture(t)
	if err != nil {
		return Figure{}, err
	}
	for _, c := range cells {
		if len(c.Stations) == 0 {
			return Figure{}, fmt.Errorf("drawing intervals: %s of %s was not compared", c.Quantity, simulation(c))
		}
	}
	first := cells[0]
	k := first.Choices.K
	x := newBounds()
	x.take(0)
	for _, c := range cells {
		s := c.Stations[0]
		x.around(float64(s.E), float64(k*float64(s.UVal)))
		if r := c.Requirement; r != nil {
			x.take(-float64(r.Limit), float64(r.Limit))
		}
	}
	xs := newScale(x.padded(0.04), 9)
	bottom := float64(len(cells))
	keys := p.intervalKeys(cells, k)
	const left = 40
	top := topEdge + keyRow*p.keys(left, topEdge, keys) + 10
	height := rowHeight*len(cells) + 14
	n := p.add(panel{
		left: left, right: left, top: top, height: height, x: xs, y: scale{Min: 0, Max: bottom, Step: bottom},
		xName: "E = S − D of " + axisName(first.Quantity, first.Symbol, first.Unit, xs.Exponent), inverse: true,
	})
	y := &p.YAxis[n]
	y.Name, y.AxisLabel.Show, y.SplitLine.Show = "", opts.Bool(false), opts.Bool(false)
	p.rule(n, "zero", nil, 1, 0, 0, 0, bottom)
	if r := first.Requirement; r != nil && r.Limit.Known() {
		a := float64(r.Limit)
		p.rule(n, requirementKey(first), limitDash, 1.2, -a, 0, -a, bottom)
		p.rule(n, requirementKey(first), limitDash, 1.2, a, 0, a, bottom)
	}
	for i, c := range cells {
		p.interval(n, i, c, k)
	}
	return Figure{
		ID: id, Title: intervalTitle(first), Caption: intervalCaption(cells, k), Alt: intervalAlt(cells, k),
		Height: top + height + footRow, Table: intervalTable(cells, k),
	}.finish(p.option)
}

// interval draws E of model i with its bars. Rows hold the height in rows,
// then the ends.
func (p *picture) interval(n, i int, c study.Cell, k float64) {
	s := c.Stations[0]
	y := quantity.Number(float64(i) + 0.62)
	if s.UVal.Known() {
		wide := quantity.Number(float64(k * float64(s.UVal)))
		p.draw(n, 3, p.span("± "+times(k, "u_{val}"), 1.6, 6, p.models[i], []any{y, s.E - wide, s.E + wide}))
		if k != 1 {
			p.draw(n, 4, p.span(innerName, 6, 0, p.models[i], []any{y, s.E - s.UVal, s.E + s.UVal}))
		}
	}
	p.draw(n, 5, series{
		Type: "scatter", Name: intervalName(c), Symbol: looks[i].symbol(), SymbolSize: 14,
		ItemStyle: &opts.ItemStyle{Color: p.models[i], BorderColor: p.paper, BorderWidth: 1.5, Opacity: opts.Float(1)},
		Data:      [][]any{{s.E, y}},
	})
}

func (p *picture) span(name string, thick, end float64, color string, row []any) series {
	return series{
		Type: "custom", Name: name, RenderItem: "intervalBar", Thick: thick, Cap: end, Silent: true,
		Encode: &encode{X: []int{1, 2}, Y: []int{0}}, ItemStyle: filled(color), Data: [][]any{row},
	}
}

func intervalName(c study.Cell) string { return "E, " + short(simulation(c)) }

func requirementKey(c study.Cell) string {
	name := "requirement ± "
	if c.Requirement.Percent.Known() {
		return name + trimmed(c.Requirement.Percent, 3) + " % of |D|"
	}
	name += trimmed(c.Requirement.Limit, 3)
	if c.Unit != "" && c.Unit != "1" {
		name += " " + c.Unit
	}
	return name
}

func (p *picture) intervalKeys(cells []study.Cell, k float64) []entry {
	keys := []entry{}
	known := false
	for i, c := range cells {
		keys = append(keys, entry{Name: intervalName(c), Icon: looks[i].key(), ItemStyle: filled(p.models[i])})
		known = known || c.Stations[0].UVal.Known()
	}
	if known {
		if k != 1 {
			keys = append(keys, entry{Name: innerName, Icon: thickKey, ItemStyle: filled(p.ink)})
		}
		keys = append(keys, entry{Name: "± " + times(k, "u_{val}"), Icon: thinKey, ItemStyle: filled(p.ink)})
	}
	if r := cells[0].Requirement; r != nil && r.Limit.Known() {
		keys = append(keys, entry{Name: requirementKey(cells[0]), Icon: lineKey(limitDash), ItemStyle: filled(p.ink)})
	}
	return keys
}

func intervalTitle(c study.Cell) string {
	title := capital(subject(c)) + ": difference from " + reference(c)
	if where := setting(c); where != "" {
		title += ", " + where
	}
	return title
}

func intervalCaption(cells []study.Cell, k float64) string {
	first := cells[0]
	names := make([]string, len(cells))
	known := false
	for i, c := range cells {
		names[i] = simulation(c)
		known = known || c.Stations[0].UVal.Known()
	}
	text := fmt.Sprintf("E = S − D of %s: %s; against %s", subject(first), strings.Join(names, "; "), reference(first))
	if where := setting(first); where != "" {
		text += "; " + where
	}
	text += "; n = 1."
	switch {
	case !known:
		text += " There are no bars: u_val is not known."
	case k == 1:
		text += " The bar is E ± u_val (k = 1)."
	default:
		text += fmt.Sprintf(" The thick bar is E ± u_val, the thin one E ± %s (k = %s).", times(k, "u_val"), factor(k))
	}
	if r := first.Requirement; r != nil && r.Limit.Known() {
		text += " Dashed lines are the limits of the requirement, ± " + headLimit(first) + "."
	}
	text += " " + units(first)
	for _, c := range cells {
		if apart := unlike(c); apart != "" {
			text += " " + capital(simulation(c)) + ": " + apart
		}
		if c.Withheld && len(cells) == 1 {
			text += " No statement is made."
		} else if c.Withheld {
			text += " No statement is made for " + simulation(c) + "."
		}
	}
	return text
}

// headLimit returns the limit in the cell's unit, with the percentage it was entered as.
func headLimit(c study.Cell) string {
	text := trimmed(c.Requirement.Limit, 3)
	if c.Unit != "" && c.Unit != "1" {
		text += " " + c.Unit
	}
	if c.Requirement.Percent.Known() {
		text += " (" + trimmed(c.Requirement.Percent, 3) + " % of |D|)"
	}
	return text
}

func intervalAlt(cells []study.Cell, k float64) string {
	parts := []string{"Interval figure: E of " + subject(cells[0]) + "."}
	for _, c := range cells {
		s := c.Stations[0]
		text := capital(simulation(c)) + ": E " + signedBeside(s.E, s.UVal)
		if s.UVal.Known() {
			text += ", from " + beside(s.Lo, s.UVal) + " to " + beside(s.Hi, s.UVal) + " with " + times(k, "u_val")
		}
		if r := c.Requirement; r != nil && r.Outcome != "" {
			text += "; requirement " + r.Outcome
		}
		parts = append(parts, text+".")
	}
	return strings.Join(parts, " ")
}

// signedBeside is beside with a plus sign on positive values.
func signedBeside(v, u quantity.Number) string {
	if text := beside(v, u); !v.Known() || v <= 0 {
		return text
	} else {
		return "+" + text
	}
}

func intervalTable(cells []study.Cell, k float64) Table {
	unit := cells[0].Unit
	t := Table{
		Head: []string{"model", headUnit("S", unit), headUnit("D", unit), "E", "u_val", "E − " + times(k, "u_val"), "E + " + times(k, "u_val"), "requirement"},
		Rows: [][]string{},
	}
	for _, c := range cells {
		s := c.Stations[0]
		wide := quantity.Number(float64(k * float64(s.UVal)))
		limit := "–"
		if c.Requirement != nil {
			limit = "± " + trimmed(c.Requirement.Limit, 3)
		}
		t.Rows = append(t.Rows, []string{
			simulation(c), beside(s.S, s.UVal), written(s.D), signedBeside(s.E, s.UVal), quantity.Text(float64(s.UVal), 2),
			beside(s.E-wide, s.UVal), beside(s.E+wide, s.UVal), limit,
		})
	}
	return t
}
