package study

import "weirmark/core/notice"

// axes compares the axes of the two sides: a flow against x turns the stations
// of that side, another upward axis is asked about.
func (w *work) axes(card *Card) {
	w.cell.Axes = append([]Axes{}, card.Axes...)
	s, d := card.axes(Simulation), card.axes(OfData)
	if s.Up != "" && d.Up != "" && s.Up != d.Up {
		w.ask(2, "the upward axis of both sides", "axes-up", s.Up, d.Up)
	}
	if s.Origin != "" && d.Origin != "" && s.Origin != d.Origin {
		w.ask(2, "the origin of both sides", "axes-origin", s.Origin, d.Origin)
	}
}

// turnAxis turns the stations of a curve whose x runs against the flow.
func (l *loader) turnAxis(c *curve) {
	card := l.e.study.card(c.slip.Case.Value)
	if card == nil || c.x == nil || c.slip.Role.Value != Simulation && c.slip.Role.Value != Reference || card.axes(c.slip.side()).Flow != AgainstX {
		return
	}
	c.x, c.xTurned = times(c.x, -1), true
	l.tell(notice.New("axes-turned", c.xUnit.name))
}
