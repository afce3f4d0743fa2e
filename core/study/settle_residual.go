package study

import (
	"math"

	"weirmark/core/quantity"
	"weirmark/core/settling"
)

// judgeResidual judges how far one residual has fallen.
func (w *work) judgeResidual(c *curve) {
	p := c.slip
	// The abscissae and values as written: units do not matter to decades.
	column, err := c.table.Column(p.Y.Column.Value)
	if err != nil {
		w.finding(0, "a readable residual", asNotice(err))
		return
	}
	at := c.x
	if at == nil {
		at = make([]float64, len(column.Values))
		for i := range at {
			at[i] = float64(i + 1)
		}
	}
	d := settling.Depth(settling.Series{At: at, Value: column.Values}, settling.Options{Name: runName("residual "+column.Name, p.Grid.Value)})
	line := ResidualLine{Grid: p.Grid.Value, File: w.e.study.fileName(p), Name: column.Name,
		Decades: Number(d.Decades), PerFirst: Number(d.PerFirst), PerLast: Number(d.PerLast), Per: Number(d.Per),
		From: Number(d.Window[0]), To: Number(d.Window[1]), Stalled: d.Stalled}
	logs := make([]float64, len(column.Values))
	for i, v := range column.Values {
		logs[i] = math.NaN()
		if v > 0 {
			logs[i] = math.Log10(v)
		}
	}
	line.X, line.Y = thinned(at, logs)
	w.cell.Residuals = append(w.cell.Residuals, line)
	for _, n := range d.Notices {
		w.finding(0, "a readable residual "+column.Name, n)
	}
}

// residualText says in one line how far the residuals fell.
func (c *Cell) residualText() string {
	least, stalled := math.Inf(1), 0
	for _, r := range c.Residuals {
		if r.Decades.Known() {
			least = min(least, float64(r.Decades))
		}
		if r.Stalled {
			stalled++
		}
	}
	if len(c.Residuals) == 0 || math.IsInf(least, 1) {
		return ""
	}
	text := quantity.Counted(len(c.Residuals), "residual") + ", fallen by " + quantity.Text(least, 2) + " decades"
	if len(c.Residuals) > 1 {
		text += " at the least"
	}
	if stalled > 0 {
		text += ", " + quantity.Counted(stalled, "stall")
	}
	return text
}
