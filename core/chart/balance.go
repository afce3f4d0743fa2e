package chart

import (
	"cmp"
	"errors"
	"math"
	"slices"
	"strings"

	"github.com/go-echarts/go-echarts/v2/opts"

	"weirmark/core/quantity"
	"weirmark/core/study"
)

// balanceHeight is the room of one balance in px: its name and its bar.
const balanceHeight = 40

// mostBalances is the number of balances of one figure; the others are in its
// table.
const mostBalances = 8

const (
	closedName  = "left over, small"
	openName    = "left over, not small"
	smallerName = "what counts as small"
)

// hasBalances reports whether there is a balance to draw.
func hasBalances(c study.Cell) bool {
	return slices.ContainsFunc(c.Balances, func(b study.BalanceLine) bool { return b.Fraction.Known() })
}

// Balances returns a bar for each balance of a cell's runs: what is left over
// as a part of the flux that matters, with its sign, and the part that counts
// as small about zero. Bars of a closed and of an open balance differ in form.
// It fails on a cell without a balance that was judged.
func Balances(c study.Cell, id string, t Theme) (Figure, error) {
	if !hasBalances(c) {
		return Figure{}, errors.New("drawing balances: the cell has none that was judged")
	}
	p, err := newPicture(t)
	if err != nil {
		return Figure{}, err
	}
	var shown []study.BalanceLine
	x := newBounds()
	x.take(0)
	for _, b := range c.Balances {
		if b.Fraction.Known() && len(shown) < mostBalances {
			shown = append(shown, b)
			x.take(inPercent(b.Fraction), inPercent(b.Limit), -inPercent(b.Limit))
		}
	}
	xs := newScale(x.padded(0.04), 9)
	rows := float64(len(shown))
	top := topEdge + keyRow*p.keys(40, topEdge, p.balanceKeys(shown)) + 10
	height := balanceHeight * len(shown)
	n := p.add(panel{left: 40, right: 40, top: top, height: height, x: xs, y: scale{Min: 0, Max: rows, Step: rows}, xName: axisName("what enters less what leaves", "", "%", xs.Exponent), inverse: true})
	y := &p.YAxis[n]
	y.Name, y.AxisLabel.Show, y.SplitLine.Show = "", opts.Bool(false), opts.Bool(false)
	p.rule(n, "zero", nil, 1, 0, 0, 0, rows)
	names := []named{}
	for i, b := range shown {
		p.balance(n, i, b)
		names = append(names, named{Name: balanceName(b), Value: []any{quantity.Number(xs.Min), quantity.Number(float64(i) + 0.27)}})
	}
	p.words(n, names, 4)
	return Figure{
		ID: id + "-balances", Title: "Balances of the runs of " + simulation(c) + ", " + c.Case, Caption: balanceCaption(c, shown), Alt: balanceAlt(c),
		Height: top + height + footRow, Table: balanceTable(c),
	}.finish(p.option)
}

func inPercent(fraction quantity.Number) float64 { return 100 * float64(fraction) }

// balance draws the bar of one balance, the range that counts as small behind it.
func (p *picture) balance(n, i int, b study.BalanceLine) {
	low, high := quantity.Number(float64(i)+0.52), quantity.Number(float64(i)+0.9)
	limit, left := quantity.Number(inPercent(b.Limit)), quantity.Number(inPercent(b.Fraction))
	p.draw(n, 1, band(smallerName, shade(p.ink, outerOpacity), [][]any{{-limit, low, high}, {limit, low, high}}))
	bar := band(closedName, shade(p.ink, 0.75), [][]any{{quantity.Number(0), low + 0.1, high - 0.1}, {left, low + 0.1, high - 0.1}})
	if !b.Closed {
		bar.Name, bar.ItemStyle, bar.Hatch = openName, shade(p.models[1], 0.9), []float64{1, -1, 5}
	}
	p.draw(n, 3, bar)
}

func (p *picture) balanceKeys(shown []study.BalanceLine) []entry {
	keys := []entry{{Name: smallerName, Icon: bandKey, ItemStyle: shade(p.ink, outerOpacity)}}
	if slices.ContainsFunc(shown, func(b study.BalanceLine) bool { return b.Closed }) {
		keys = append(keys, entry{Name: closedName, Icon: thickKey, ItemStyle: filled(p.ink)})
	}
	if slices.ContainsFunc(shown, func(b study.BalanceLine) bool { return !b.Closed }) {
		keys = append(keys, entry{Name: openName, Icon: slopeKey, ItemStyle: filled(p.models[1])})
	}
	return keys
}

// balanceName says whose balance it is and what is left over.
func balanceName(b study.BalanceLine) string {
	if !b.Fraction.Known() {
		return short(cmp.Or(b.Grid, "run")) + ", " + b.Kind
	}
	return short(cmp.Or(b.Grid, "run")) + ", " + b.Kind + ": " + quantity.SignedPercent(float64(b.Fraction)) + " % of " + short(b.ScaleOf)
}

func closedWord(b study.BalanceLine) string {
	switch {
	case !b.Fraction.Known():
		return "not judged"
	case b.Closed:
		return "closed"
	}
	return "not closed"
}

func balanceCaption(c study.Cell, shown []study.BalanceLine) string {
	text := "What enters less what leaves, as a part of the flux that matters: " + simulation(c)
	if where := setting(c); where != "" {
		text += "; " + where
	}
	open := 0
	for _, b := range c.Balances {
		if b.Fraction.Known() && !b.Closed {
			open++
		}
	}
	limits := []string{}
	for _, b := range shown {
		if limit := b.LimitOf; !slices.Contains(limits, limit) {
			limits = append(limits, limit)
		}
	}
	text += ". " + capital(counts(open, "balance is", "balances are")) + " not closed. Small is " + strings.Join(limits, " or ") + ", if the quantity changed by the same part."
	if len(shown) < len(c.Balances) {
		text += " The others are in the table."
	}
	return text
}

func balanceAlt(c study.Cell) string {
	parts := []string{}
	for _, b := range c.Balances {
		parts = append(parts, balanceName(b)+", "+closedWord(b))
	}
	return "Bars of the balances: " + strings.Join(parts, "; ") + "."
}

func balanceTable(c study.Cell) Table {
	t := Table{Head: []string{"grid", "of", "in less out", "flux that matters", "share in %", "small in %", "judgement"}, Rows: [][]string{}}
	for _, b := range c.Balances {
		t.Rows = append(t.Rows, []string{cmp.Or(b.Grid, "run"), b.Kind, quantity.Signed(float64(b.Net), 2), trimmed(b.Scale, 5) + " (" + b.ScaleOf + ")",
			quantity.SignedPercent(float64(b.Fraction)), quantity.Percent(math.Abs(float64(b.Limit))), closedWord(b)})
	}
	return t
}
