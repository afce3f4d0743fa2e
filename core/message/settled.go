package message

import (
	"cmp"
	"math"
	"strconv"

	"weirmark/core/quantity"
	"weirmark/core/study"
)

func settledAnswer(c *study.Cell) string {
	if text := c.SettledText(); text != "" {
		return capitalised(text) + "."
	}
	if c.Summary == nil && c.Grids == nil {
		return "No simulation is read yet."
	}
	return "Not shown: no monitor is given for " + c.Quantity + "."
}

// settledNumbers are those of the finest run, and the imbalance that is largest
// beside what counts as small: three at most.
func settledNumbers(c *study.Cell) []Headline {
	var list []Headline
	for _, m := range c.Monitors {
		u, k := m.UIter()
		if m.Grid != c.Grid || !u.Known() || m.Quantity != "" {
			continue
		}
		name := "U_iter of " + cmp.Or(m.Grid, "the run")
		if m.Sampling != nil && m.Entered == "" {
			name = "U of the mean of " + cmp.Or(m.Grid, "the run")
		}
		if k.Known() {
			name += ", k = " + quantity.Typed(float64(k))
		} else {
			name += ", a bound"
		}
		list = append(list, Headline{"± " + text(u, 2) + c.UnitSuffix(), name})
		if m.OfGrid.Known() {
			list = append(list, Headline{text(m.OfGrid, 2), "of the grid uncertainty; aim at 0.1 or less"})
		}
		if m.Sampling != nil {
			list = append(list, Headline{text(m.Sampling.Independent, 2), "independent samples"})
		}
		break
	}
	var worst *study.BalanceLine
	for i := range c.Balances {
		b := &c.Balances[i]
		if b.Fraction.Known() && (worst == nil || ofLimit(b) > ofLimit(worst)) {
			worst = b
		}
	}
	if worst != nil && len(list) < 3 {
		list = append(list, Headline{quantity.SignedPercent(float64(worst.Fraction)) + " %", worst.Kind + " of " + cmp.Or(worst.Grid, "the run") + " left over, of " + worst.ScaleOf})
	}
	return list
}

// ofLimit is an imbalance over the one that counts as small.
func ofLimit(b *study.BalanceLine) float64 { return math.Abs(float64(b.Fraction)) / float64(b.Limit) }

// settledTables lists monitors, averages, balances and residuals.
func settledTables(c *study.Cell) []Table {
	tables := monitorTables(c)
	if len(c.Balances) > 0 {
		t := Table{Title: "Balances", Head: []string{"grid", "file", "of", "in", "out", "in less out", "flux that matters", "share", "small is", "of U_grid", "of |E|", "effect entered"}, Rows: [][]string{}}
		for _, b := range c.Balances {
			effect := ""
			if b.Effect.Known() {
				effect = "± " + text(b.Effect, 3) + c.UnitSuffix() + ": " + b.EffectWhy
			}
			t.Rows = append(t.Rows, []string{cmp.Or(b.Grid, "–"), b.File, b.Kind, text(b.In, 5), text(b.Out, 5), text(b.Net, 2), text(b.Scale, 5) + " (" + b.ScaleOf + ")",
				quantity.SignedPercent(float64(b.Fraction)) + " %", quantity.Percent(float64(b.Limit)) + " % (" + b.LimitOf + ")", text(b.OfGrid, 2), text(b.OfE, 2), effect})
		}
		tables = append(tables, t)
	}
	if len(c.Residuals) > 0 {
		t := Table{Title: "Residuals", Head: []string{"grid", "file", "residual", "decades fallen", "decades for each", "in all", "in the last third", ""}, Rows: [][]string{}}
		for _, r := range c.Residuals {
			stalled := ""
			if r.Stalled {
				stalled = "stalled"
			}
			t.Rows = append(t.Rows, []string{cmp.Or(r.Grid, "–"), r.File, r.Name, text(r.Decades, 2), text(r.Per, 3) + " iterations", text(r.PerFirst, 2), text(r.PerLast, 2), stalled})
		}
		tables = append(tables, t)
	}
	return tables
}

func monitorTables(c *study.Cell) []Table {
	if len(c.Monitors) == 0 {
		return nil
	}
	t := Table{Title: "Monitors", Head: []string{"grid", "file", "class", "mean", "u", "window", "to come", "U_iter / U_grid", "rule"}, Rows: [][]string{}}
	averages := Table{Title: "Averages in time", Head: []string{"grid", "rows left out", "rows averaged", "standard deviation", "correlation time", "independent samples", "u by batches", "u from successive rows", "part of u_num"}, Rows: [][]string{}}
	for _, m := range c.Monitors {
		name, rule := cmp.Or(m.Grid, "–"), m.Rule
		if m.Quantity != "" {
			name += " (" + m.Quantity + ")"
		}
		if m.Entered != "" {
			rule += "; U_iter entered: " + m.Entered
		}
		t.Rows = append(t.Rows, []string{name, m.File, m.Class, text(m.Mean, 5), text(m.U, 2), text(m.From, 4) + " to " + text(m.To, 4), text(m.Remaining, 2), text(m.OfGrid, 2), rule})
		if s := m.Sampling; s != nil {
			batches := "–"
			if s.UBatches.Known() {
				batches = text(s.UBatches, 2) + " (" + strconv.Itoa(s.Batches) + ")"
			}
			share := "–"
			if s.Share.Known() {
				share = quantity.Percent(float64(s.Share)) + " %"
			}
			averages.Rows = append(averages.Rows, []string{name, strconv.Itoa(s.StartUp), strconv.Itoa(s.Rows), text(s.SD, 2), text(s.Tau, 2), text(s.Independent, 2), batches, text(s.UMarkov, 2), share})
		}
	}
	tables := []Table{t}
	if len(averages.Rows) > 0 {
		tables = append(tables, averages)
	}
	return tables
}
