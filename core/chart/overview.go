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

// Measures of the overview in px.
const (
	overviewRow   = 24
	overviewLeft  = 268 // room of the names
	overviewRight = 104 // room of the outcomes
	panelGap      = 14
)

// mostRows is the number of cells of an overview that stays on one page.
const mostRows = 24

// Overview returns one line per cell: E ± k u_val in parts of the requirement,
// the farthest reach first, and below those without a requirement in parts of
// u_val, largest |E| first. Of a curve the line is the envelope of its
// stations. Cells without an interval are named, without a line. It fails where
// no cell has one.
func Overview(cells []study.Cell, t Theme) (Figure, error) {
	p, err := newPicture(t)
	if err != nil {
		return Figure{}, err
	}
	judged, others, bare := rowsOf(cells)
	if len(judged)+len(others) == 0 {
		return Figure{}, errors.New("drawing an overview: no cell has an interval")
	}
	all := len(judged) + len(others)
	judged = judged[:min(len(judged), mostRows)]
	others = others[:min(len(others), mostRows-len(judged))]
	rows := append(slices.Clone(judged), others...)
	top := topEdge + keyRow*p.keys(40, topEdge, p.overviewKeys(rows)) + 8
	if len(judged) > 0 {
		top = p.overviewPanel(judged, overviewInterval(rows), top, 1, "E in parts of the requirement") + panelGap
	}
	for _, k := range factors(others) {
		same := slices.DeleteFunc(slices.Clone(others), func(r reachOf) bool { return r.k != k })
		top = p.overviewPanel(same, overviewInterval(rows), top, k, "no requirement: E in parts of u_{val}") + panelGap
	}
	return Figure{
		ID: "overview", Title: "Overview of all comparisons", Caption: overviewCaption(judged, others, bare, all), Alt: overviewAlt(judged, others, bare),
		Height: top - panelGap, Table: overviewTable(judged, others, bare),
	}.finish(p.option)
}

// reachOf is the interval of one cell in parts of a scale: its ends, the range
// of E itself, and its mark.
type reachOf struct {
	cell     study.Cell
	lo, hi   float64
	from, to float64
	mean     float64
	k        float64
	stations int
	partly   bool // stations without a scale are left out
}

// rowsOf sorts the cells into those with a requirement, those with u_val alone,
// and those without an interval.
func rowsOf(cells []study.Cell) (judged, others []reachOf, bare []study.Cell) {
	for _, c := range cells {
		r := c.Requirement
		inRequirement, inUVal := parted(c, requirementAt), parted(c, func(c study.Cell, s study.Station) float64 { return float64(s.UVal) })
		switch {
		case c.Withheld || inUVal.stations == 0:
			bare = append(bare, c)
		case r != nil && inRequirement.stations > 0:
			judged = append(judged, inRequirement)
		default:
			others = append(others, inUVal)
		}
	}
	// Digits beyond the sixth differ between hosts and decide no order.
	size := func(v float64) float64 { return quantity.Round(v, 6) }
	slices.SortStableFunc(judged, func(a, b reachOf) int {
		return cmp.Compare(size(math.Max(-b.lo, b.hi)), size(math.Max(-a.lo, a.hi)))
	})
	slices.SortStableFunc(others, func(a, b reachOf) int {
		return cmp.Compare(size(math.Max(-b.from, b.to)), size(math.Max(-a.from, a.to)))
	})
	return judged, others, bare
}

// requirementAt returns the limit at a station, 0 where there is none.
func requirementAt(c study.Cell, s study.Station) float64 {
	r := c.Requirement
	switch {
	case r == nil:
		return 0
	case r.Percent.Known():
		return float64(math.Abs(float64(s.D)) * float64(r.Percent) / 100)
	}
	return float64(r.Limit)
}

// parted returns the interval of a cell in parts of a scale that its stations have.
func parted(c study.Cell, scale func(study.Cell, study.Station) float64) reachOf {
	ends, e := newBounds(), newBounds()
	out := reachOf{cell: c, k: c.Choices.K}
	sum := 0.0
	for _, s := range c.Stations {
		if !s.E.Known() || !s.UVal.Known() {
			continue
		}
		a := scale(c, s)
		if !(a > 0) || math.IsInf(a, 0) {
			out.partly = true
			continue
		}
		at, wide := float64(s.E)/a, float64(out.k*float64(s.UVal))/a
		ends.take(at-wide, at+wide)
		e.take(at)
		sum += at
		out.stations++
	}
	if out.stations > 0 {
		out.lo, out.hi, out.from, out.to, out.mean = ends.lo, ends.hi, e.lo, e.hi, sum/float64(out.stations)
	}
	return out
}

// Names of series and keys.
const (
	overviewMean  = "E, of a curve its mean"
	overviewRange = "range of E along a curve"
	limitsName    = "limits"
)

// overviewInterval names the lines: of one coverage factor where all rows have it.
func overviewInterval(rows []reachOf) string {
	if k := factors(rows); len(k) == 1 {
		return "E ± " + times(k[0], "u_{val}")
	}
	return "E ± k u_{val}"
}

// factors returns the coverage factors of the rows, each once.
func factors(rows []reachOf) []float64 {
	var all []float64
	for _, r := range rows {
		if !slices.Contains(all, r.k) {
			all = append(all, r.k)
		}
	}
	return all
}

func (p *picture) overviewKeys(rows []reachOf) []entry {
	keys := []entry{{Name: overviewMean, Icon: diamond.key(), ItemStyle: filled(p.models[0])}}
	if slices.ContainsFunc(rows, func(r reachOf) bool { return !r.cell.Scalar }) {
		keys = append(keys, entry{Name: overviewRange, Icon: thickKey, ItemStyle: filled(p.models[0])})
	}
	return append(keys,
		entry{Name: overviewInterval(rows), Icon: thinKey, ItemStyle: filled(p.models[0])},
		entry{Name: limitsName, Icon: lineKey(limitDash), ItemStyle: filled(p.ink)})
}

// overviewPanel draws rows on one axis with limits at ± a, and returns where
// the next panel may begin.
func (p *picture) overviewPanel(rows []reachOf, interval string, top int, a float64, name string) int {
	x := newBounds()
	x.take(-a, a)
	for _, r := range rows {
		x.take(r.lo, r.hi)
	}
	xs := newScale(x.padded(0.03), 7)
	bottom := float64(len(rows))
	height := overviewRow*len(rows) + 6
	n := p.add(panel{
		left: overviewLeft, right: overviewRight, top: top, height: height, x: xs, y: scale{Min: 0, Max: bottom, Step: bottom},
		xName: name, inverse: true,
	})
	y := &p.YAxis[n]
	y.Name, y.AxisLabel.Show, y.SplitLine.Show = "", opts.Bool(false), opts.Bool(false)
	p.rule(n, "zero", nil, 1, 0, 0, 0, bottom)
	p.rule(n, limitsName, limitDash, 1.2, -a, 0, -a, bottom)
	p.rule(n, limitsName, limitDash, 1.2, a, 0, a, bottom)
	names, outcomes, marks := []named{}, []named{}, [][]any{}
	for i, r := range rows {
		at := quantity.Number(float64(i) + 0.5)
		p.draw(n, 3, p.span(interval, 1.4, 5, p.models[0], []any{at, quantity.Number(r.lo), quantity.Number(r.hi)}))
		if !r.cell.Scalar {
			p.draw(n, 4, p.span(overviewRange, 7, 0, p.models[0], []any{at, quantity.Number(r.from), quantity.Number(r.to)}))
		}
		marks = append(marks, []any{quantity.Number(r.mean), at})
		names = append(names, named{Name: rowName(r.cell), Value: []any{quantity.Number(xs.Min), at}})
		if o := r.cell.Requirement; o != nil && o.Outcome != "" {
			outcomes = append(outcomes, named{Name: o.Outcome, Value: []any{quantity.Number(xs.Max), at}})
		}
	}
	p.draw(n, 5, series{
		Type: "scatter", Name: overviewMean, Symbol: diamond.symbol(), SymbolSize: 11, Data: marks,
		ItemStyle: &opts.ItemStyle{Color: p.models[0], BorderColor: p.paper, BorderWidth: 1.2, Opacity: opts.Float(1)},
	})
	p.words(n, names, 12-overviewLeft)
	if len(outcomes) > 0 {
		p.words(n, outcomes, 12)
	}
	return top + height + footRow
}

// rowName names a cell in the room of the names: by its quantity or, where that
// is too long, by its symbol.
func rowName(c study.Cell) string {
	const room = overviewLeft - 30
	name := ""
	for _, what := range []string{c.Quantity, c.Symbol} {
		if what == "" {
			continue
		}
		name = short(what)
		for _, more := range []string{c.Model, c.Case} {
			if more != "" {
				name += ", " + short(more)
			}
		}
		if textWidth(name) <= room {
			return name
		}
	}
	letters := []rune(name)
	for len(letters) > 0 && textWidth(string(letters)+"…") > room {
		letters = letters[:len(letters)-1]
	}
	return string(letters) + "…"
}

// rowWords names a cell in full.
func rowWords(c study.Cell) string {
	name := subject(c) + ", " + simulation(c)
	if where := setting(c); where != "" {
		name += ", " + where
	}
	return name
}

func overviewCaption(judged, others []reachOf, bare []study.Cell, all int) string {
	rows := append(slices.Clone(judged), others...)
	text := counts(len(rows), "comparison", "comparisons") + " as E ± " + strings.ReplaceAll(strings.TrimPrefix(overviewInterval(rows), "E ± "), "u_{val}", "u_val")
	if k := factors(rows); len(k) == 1 {
		text += " (k = " + factor(k[0]) + ")"
	}
	text += "."
	if len(judged) > 0 {
		text += " With a requirement: in parts of it, limits at ± 1, farthest reach first."
	}
	if len(others) > 0 {
		text += " Without one: in parts of u_val, limits at ± k, largest |E| first."
	}
	if slices.ContainsFunc(rows, func(r reachOf) bool { return !r.cell.Scalar }) {
		text += " Of a curve the line is the envelope of its stations, the thick bar the range of E, the mark its mean."
	}
	if slices.ContainsFunc(rows, func(r reachOf) bool { return r.partly }) {
		text += " Stations at which the requirement is zero are left out."
	}
	if len(rows) < all {
		text += fmt.Sprintf(" %s of %s are drawn.", grouped(len(rows)), grouped(all))
	}
	if len(bare) > 0 {
		names := make([]string, min(len(bare), mostNames))
		for i := range names {
			names[i] = bare[i].Quantity + " of model " + bare[i].Model
		}
		text += " No interval: " + strings.Join(names, "; ")
		if more := len(bare) - len(names); more > 0 {
			text += fmt.Sprintf("; and %s more", grouped(more))
		}
		text += "."
	}
	return text
}

// mostNames is the number of cells without an interval that a caption names.
const mostNames = 6

func overviewAlt(judged, others []reachOf, bare []study.Cell) string {
	parts := []string{}
	for _, r := range judged {
		text := rowWords(r.cell) + ": " + quantity.Signed(r.lo, 2) + " to " + quantity.Signed(r.hi, 2) + " requirements"
		if r.cell.Requirement.Outcome != "" {
			text += ", " + r.cell.Requirement.Outcome
		}
		parts = append(parts, text)
	}
	for _, r := range others {
		parts = append(parts, rowWords(r.cell)+": "+quantity.Signed(r.lo, 2)+" to "+quantity.Signed(r.hi, 2)+" u_val, no requirement")
	}
	if len(bare) > 0 {
		parts = append(parts, counts(len(bare), "comparison has", "comparisons have")+" no interval")
	}
	return "Overview of intervals. " + strings.Join(parts, ". ") + "."
}

func overviewTable(judged, others []reachOf, bare []study.Cell) Table {
	t := Table{Head: []string{"comparison", "in parts of", "E from", "E to", "line from", "line to", "requirement"}, Rows: [][]string{}}
	add := func(rows []reachOf, scale string) {
		for _, r := range rows {
			outcome := "none recorded"
			if o := r.cell.Requirement; o != nil {
				outcome = o.Outcome
			}
			t.Rows = append(t.Rows, []string{
				rowWords(r.cell), scale, quantity.Signed(r.from, 3), quantity.Signed(r.to, 3), quantity.Signed(r.lo, 3), quantity.Signed(r.hi, 3), outcome,
			})
		}
	}
	add(judged, "the requirement")
	add(others, "u_val")
	for _, c := range bare {
		t.Rows = append(t.Rows, []string{rowWords(c), "–", "–", "–", "–", "–", "no interval"})
	}
	return t
}
