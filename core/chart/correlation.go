package chart

import (
	"fmt"
	"strings"

	"weirmark/core/quantity"
	"weirmark/core/study"
)

// correlationHeight is the height of the panel in px.
const correlationHeight = 170

const (
	highName = "95 % point"
	lowName  = "1 % point"
)

// Correlation draws the joint statistic against the assumed correlation of each
// common source of the data, with the points it is held against and the
// places where the conclusion turns.
func Correlation(c study.Cell, id string, t Theme) (Figure, error) {
	p, err := newPicture(t)
	if err != nil {
		return Figure{}, err
	}
	lines := c.Joint.Correlations
	lines = lines[:min(len(lines), len(looks))]
	q := newBounds()
	q.take(0)
	keys := []entry{}
	for i, line := range lines {
		q.take(float64(line.Top))
		for _, point := range line.Points {
			q.take(float64(point.Statistic))
		}
		keys = append(keys, entry{Name: short(line.Source), Icon: lineKey(looks[i].dash), ItemStyle: filled(p.models[i])})
	}
	keys = append(keys, entry{Name: highName, Icon: lineKey(limitDash), ItemStyle: filled(p.ink)}, entry{Name: lowName, Icon: lineKey(lowDash), ItemStyle: filled(p.ink)})
	xs, qs := newScale(bounds{0, 1}, 10), newScale(bounds{0, 1.05 * q.hi}, 5)
	left := 20 + digitWidth*qs.digits()
	top := topEdge + keyRow*p.keys(left, topEdge, keys) + nameRow
	n := p.add(panel{
		left: left, right: rightEdge, top: top, height: correlationHeight, x: xs, y: qs,
		yName: "joint statistic (–)", xName: "part ρ of the variance of the source that all stations share",
	})
	p.rule(n, highName, limitDash, 1.2, 0, float64(lines[0].Top), 1, float64(lines[0].Top))
	p.rule(n, lowName, lowDash, 1, 0, float64(lines[0].Low), 1, float64(lines[0].Low))
	for i, line := range lines {
		p.correlation(n, i, line)
	}
	return Figure{
		ID: id + "-correlation", Title: "Joint statistic of " + subject(c) + " against assumed correlation, " + simulation(c),
		Caption: correlationCaption(c, lines), Alt: correlationAlt(c, lines), Height: top + correlationHeight + footRow, Table: correlationTable(lines),
	}.finish(p.option)
}

// lowDash is the pattern of the lower point.
var lowDash = []int{2, 4}

// correlation draws the line of source i with marks where it turns.
func (p *picture) correlation(n, i int, line study.CorrelationLine) {
	// The line goes through its turns, which lie between the computed points.
	rows, flips := [][]any{}, [][]any{}
	for _, point := range line.Points {
		for len(flips) < len(line.Flips) && line.Flips[len(flips)] < point.Rho {
			turn := []any{line.Flips[len(flips)], line.Top}
			rows, flips = append(rows, turn), append(flips, turn)
		}
		rows = append(rows, []any{point.Rho, point.Statistic})
	}
	style := &lineStyle{Type: looks[i].dash}
	style.Color, style.Width = p.models[i], 1.8
	p.draw(n, 3, series{Type: "line", Name: short(line.Source), Symbol: "none", Clip: true, ItemStyle: filled(p.models[i]), LineStyle: style, Data: rows})
	p.points(n, "turns", flips, p.hollow(p.models[i]))
}

func correlationCaption(c study.Cell, lines []study.CorrelationLine) string {
	text := "Joint statistic of " + subject(c) + ", " + simulation(c)
	if where := setting(c); where != "" {
		text += "; " + where
	}
	text += fmt.Sprintf(", with a part ρ of the variance of a source shared by all stations and the rest independent; on %s, 95 %% point %s, 1 %% point %s.",
		grouped(lines[0].N), trimmed(lines[0].Top, 3), trimmed(lines[0].Low, 3))
	for _, line := range lines {
		text += " " + turnsWords(line)
	}
	return text
}

// turnsWords says where the conclusion turns.
func turnsWords(line study.CorrelationLine) string {
	if len(line.Flips) == 0 {
		return "No correlation of " + line.Source + " turns the reading."
	}
	at := make([]string, len(line.Flips))
	for i, f := range line.Flips {
		at[i] = trimmed(f, 3)
	}
	return "The reading turns where the correlation of " + line.Source + " is " + strings.Join(at, " and ") + "."
}

func correlationAlt(c study.Cell, lines []study.CorrelationLine) string {
	text := "Joint statistic of " + subject(c) + " against correlation."
	for _, line := range lines {
		first, last := line.Points[0], line.Points[len(line.Points)-1]
		text += " " + capital(line.Source) + ": from " + trimmed(first.Statistic, 3) + " when independent to " + trimmed(last.Statistic, 3) + " when fully shared; 95 % point " + trimmed(line.Top, 3) + ". " + turnsWords(line)
	}
	return text
}

func correlationTable(lines []study.CorrelationLine) Table {
	t := Table{Head: []string{"ρ"}, Rows: [][]string{}}
	for _, line := range lines {
		t.Head = append(t.Head, "statistic, "+line.Source)
	}
	for j, point := range lines[0].Points {
		row := []string{trimmed(point.Rho, 3)}
		for _, line := range lines {
			row = append(row, quantity.Text(float64(line.Points[j].Statistic), 4))
		}
		t.Rows = append(t.Rows, row)
	}
	return t
}
