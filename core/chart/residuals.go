package chart

import (
	"fmt"
	"math"

	"weirmark/core/quantity"
	"weirmark/core/study"
)

// residualHeight is the height of the panel in px.
const residualHeight = 150

// sure is the number of standard uncertainties within which most residuals
// are expected.
const sure = 2

// hasResiduals reports whether the joint statistic has parts to show: those of
// no difference at all are no picture.
func hasResiduals(c study.Cell) bool {
	return !c.Scalar && c.Joint != nil && c.Joint.Worst.Known() && c.Joint.Worst != 0
}

// Residuals draws E at every station with its covariance taken out, in standard
// uncertainties: the squares of what is drawn sum to the joint statistic.
func Residuals(c study.Cell, id string, t Theme) (Figure, error) {
	p, err := newPicture(t)
	if err != nil {
		return Figure{}, err
	}
	counted := make([]study.Station, 0, len(c.Stations))
	for _, s := range c.Stations {
		if s.Whitened.Known() {
			counted = append(counted, s)
		}
	}
	shown := pick(counted, thin(len(counted), mostMarks, func(i int) float64 { return math.Abs(float64(counted[i].Whitened)) }))
	x, w := newBounds(), newBounds()
	w.take(-sure, sure)
	stems, marks := [][]any{}, [][]any{}
	for _, s := range shown {
		x.take(float64(s.X))
		w.take(float64(s.Whitened))
		stems = append(stems, []any{s.X, min(s.Whitened, 0), max(s.Whitened, 0)})
		marks = append(marks, []any{s.X, s.Whitened})
	}
	xs, ws := newScale(x.padded(0.02), 9), newScale(w.padded(0.04), 5)
	left := 20 + digitWidth*ws.digits()
	limit := fmt.Sprintf("± %d", sure)
	keys := []entry{
		{Name: residualName, Icon: looks[0].key(), ItemStyle: filled(p.models[0])},
		{Name: limit, Icon: lineKey(limitDash), ItemStyle: filled(p.ink)},
	}
	top := topEdge + keyRow*p.keys(left, topEdge, keys) + nameRow
	n := p.add(panel{
		left: left, right: rightEdge, top: top, height: residualHeight, x: xs, y: ws,
		yName: "E without its covariance (standard uncertainties)", xName: axisName(c.XName, "", c.XUnit, xs.Exponent),
	})
	p.rule(n, "zero", nil, 1, xs.Min, 0, xs.Max, 0)
	p.rule(n, limit, limitDash, 1, xs.Min, sure, xs.Max, sure)
	p.rule(n, limit, limitDash, 1, xs.Min, -sure, xs.Max, -sure)
	p.draw(n, 3, p.bars("stems", stems))
	p.draw(n, 5, series{Type: "scatter", Name: residualName, Symbol: looks[0].symbol(), SymbolSize: markSize(len(marks)), ItemStyle: filled(p.models[0]), Data: marks})
	return Figure{
		ID: id + "-residuals", Title: "Whitened residuals of " + subject(c) + ", " + simulation(c),
		Caption: residualCaption(c, len(shown), len(counted)), Alt: residualAlt(c, len(counted)),
		Height: top + residualHeight + footRow, Table: residualTable(c, shown),
	}.finish(p.option)
}

const residualName = "residual"

func residualCaption(c study.Cell, shown, counted int) string {
	text := "Whitened residuals: E = S − D of " + subject(c) + ", " + simulation(c) + ", with its covariance taken out (" + c.Joint.Pattern + " sources)"
	if where := setting(c); where != "" {
		text += "; " + where
	}
	text += fmt.Sprintf("; the squares over %s sum to the joint statistic %s.", counts(counted, "station", "stations"), trimmed(c.Joint.Statistic, 4))
	if shown < counted {
		text += fmt.Sprintf(" %s are drawn: the least and the greatest of every stretch.", grouped(shown))
	}
	return text
}

func residualAlt(c study.Cell, counted int) string {
	return fmt.Sprintf("Whitened residuals of %s at %s. The largest is %s, at %s = %s. The numbers are in the table.",
		subject(c), counts(counted, "station", "stations"), quantity.Signed(float64(c.Joint.Worst), 3), c.XName, trimmed(c.Joint.WorstAt, 4))
}

func residualTable(c study.Cell, shown []study.Station) Table {
	t := Table{Head: []string{headUnit(c.XName, c.XUnit), headUnit("E", c.Unit), "whitened"}, Rows: [][]string{}}
	for _, s := range shown {
		t.Rows = append(t.Rows, []string{written(s.X), signedBeside(s.E, s.UVal), quantity.Signed(float64(s.Whitened), 3)})
	}
	return t
}
