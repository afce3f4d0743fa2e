package study

import (
	"cmp"
	"math"
	"strconv"

	"weirmark/core/notice"
	"weirmark/core/quantity"
	"weirmark/core/settling"
)

// judgeBalances judges the balances of the runs. What an open one of the
// finest run does to the quantity counts in u_num, where a person entered it.
func (w *work) judgeBalances() {
	counted := false
	for _, p := range w.slips(Balance) {
		c := w.use(p)
		if c == nil {
			continue
		}
		run := w.q.Run(w.model, p.Grid.Value)
		if w.judgeBalance(c, run) && !counted && p.Grid.Value == w.cell.Grid && len(w.x) > 0 {
			counted = true
			w.addToRun("imbalance", "entered effect of what does not balance, as a bound divided by √3", run.EffectWhy, w.yUnit.StepToSI(*run.Effect)/math.Sqrt(3))
		}
	}
}

// judgeBalance judges one balance and reports whether it is open with an
// effect that was entered with its reason.
func (w *work) judgeBalance(c *curve, run RunEntry) (effect bool) {
	p := c.slip
	flux, known := w.flux(c)
	if !known {
		return false
	}
	name := cmp.Or(p.Grid.Value, "the run")
	b := settling.Balance(flux, w.balanceOptions())
	line := BalanceLine{Grid: p.Grid.Value, File: w.e.study.fileName(p), Kind: string(b.Kind), In: None, Out: None, Net: Number(b.Net),
		Scale: Number(b.Scale), ScaleOf: b.ScaleOf, Fraction: Number(b.Fraction), Limit: Number(b.Limit), LimitOf: b.LimitOf,
		OfGrid: Number(b.OfGrid), OfE: Number(b.OfE), Closed: b.Closed, Effect: None}
	if c.x != nil {
		line.In, line.Out = Number(flux.In[0]), Number(flux.Out[0])
	}
	for _, n := range b.Notices {
		if p.Grid.Given() && n.Severity != notice.Note {
			n.Text = "Grid " + p.Grid.Value + ": " + n.Text
		}
		switch {
		case n.Code != "balance-open":
			w.finding(0, "a closed balance of "+name, n)
		case run.Effect != nil && run.EffectWhy != "":
			effect = true
			line.Effect, line.EffectWhy = Number(*run.Effect), run.EffectWhy
			n.Severity = notice.Note
			w.tell(n)
			w.tell(notice.New("balance-effect", capital(string(b.Kind)), name, quantity.Typed(*run.Effect)+w.cell.UnitSuffix(), w.q.Quantity, run.EffectWhy))
		case run.Effect != nil:
			w.tell(notice.New("iteration-reason", "The effect of the open balance", name))
			w.findingAt(0, "the reason of the effect of an open balance", n, w.q.RunTarget("effect_why", w.model, p.Grid.Value))
		default:
			w.findingAt(0, "a closed balance of "+name, n, w.q.RunTarget(byEntry[n.Code], w.model, p.Grid.Value))
		}
	}
	w.cell.Balances = append(w.cell.Balances, line)
	return effect
}

// flux returns what enters (the station column) and leaves (the value column)
// in the unit of the latter; of a history, the last row counts. With the value
// column alone that is what is left over, positive where more enters, and the
// flux that matters has to be given.
func (w *work) flux(c *curve) (settling.Flux, bool) {
	p := c.slip
	f := settling.Flux{Kind: settling.Kind(cmp.Or(p.BalanceOf.Value, string(settling.Mass))), ScaleOf: p.ScaleName.Value}
	switch f.Kind {
	case settling.Mass, settling.Energy, settling.Species, settling.Force:
	default:
		w.need(0, true, "the kind of balance", slipTarget(p, "balance_of"), "field-bad", "kind of balance", w.e.study.fileName(p), string(f.Kind))
		return f, false
	}
	if p.Scale.Given() {
		scale, err := strconv.ParseFloat(p.Scale.Value, 64)
		if err != nil || !(scale > 0) || math.IsInf(scale, 1) {
			w.need(0, true, "the flux that matters", slipTarget(p, "scale"), "field-bad", "flux that matters", w.e.study.fileName(p), p.Scale.Value)
			return f, false
		}
		f.Scale = scale
	}
	u := axisUnit(c.yUnit)
	y := inUnit(c.y, c.yUnit, u)
	row := -1
	for i := range y {
		if !math.IsNaN(y[i]) && (c.x == nil || !math.IsNaN(c.x[i])) {
			row = i
		}
	}
	switch {
	case row < 0:
		w.need(0, true, "a row of the balance", slipTarget(p, "y.column"), "field-bad", "balance", w.e.study.fileName(p), "no row with numbers")
		return f, false
	case c.x != nil:
		f.In, f.Out = []float64{u.FromSI(inUnit(c.x, c.xUnit, u)[row])}, []float64{u.FromSI(y[row])}
	case f.Scale == 0:
		w.need(0, true, "the flux that matters", slipTarget(p, "scale"), "balance-scale-missing", w.e.study.fileName(p))
		return f, false
	default:
		f.In = []float64{u.FromSI(y[row])}
	}
	return f, true
}

// balanceOptions holds what an imbalance is judged against: of a curve, root
// mean squares over the stations.
func (w *work) balanceOptions() settling.Options {
	opt := w.settlingOptions()
	if w.cell.Scalar || len(w.s) == 0 {
		return opt
	}
	e := make([]float64, len(w.s))
	for i := range e {
		e[i] = w.s[i] - w.d[i]
	}
	opt.Scale, opt.E = w.yUnit.StepFromSI(rms(w.s)), w.yUnit.StepFromSI(rms(e))
	if g := w.cell.Grids; g != nil && g.Along {
		local := []float64{}
		for _, p := range g.Local {
			if p.U.Known() {
				local = append(local, float64(p.U))
			}
		}
		opt.UGrid = rms(local)
	}
	return opt
}
