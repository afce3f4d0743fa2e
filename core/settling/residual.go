package settling

import (
	"math"

	"weirmark/core/notice"
	"weirmark/core/quantity"
)

// Residual is the course of one residual. Numbers are NaN where there are
// fewer than 20 usable rows.
type Residual struct {
	Stalled  bool
	Decades  float64 // fall from the first level to the last
	PerFirst float64 // decades fallen per Per over the fall so far
	PerLast  float64 // decades fallen per Per over the last third; negative where it rises
	Per      float64 // At
	Window   [2]float64
	Notices  []notice.Notice
}

// Limits of the residual's judgement. No source.
const (
	stallRate    = 0.1 // of the rate so far: slower counts as stalled
	stallDecades = 3   // a stall behind a deeper fall is not told
)

// Depth judges how far a residual has fallen: the first level is the largest
// of the first twentieth (five rows at least), the last the mean of the
// logarithms of the last twentieth. It is stalled where the last third falls
// at less than a tenth of the rate so far, which is told where the fall is
// less than three decades. Residuals are positive; rows that are not are left
// out. A depth says nothing of the error of a quantity: that needs a monitor.
func Depth(s Series, opt Options) Residual {
	logs, none := logarithms(s)
	r := newRecord(logs, opt)
	nan := math.NaN()
	d := Residual{Decades: nan, PerFirst: nan, PerLast: nan, Per: nan, Window: [2]float64{nan, nan}, Notices: r.notices}
	if none > 0 {
		d.Notices = append(d.Notices, notice.New("residual-zero", none, opt.name()))
	}
	n := len(r.y)
	if r.broken || n < leastRows {
		if !r.broken {
			d.Notices = append(d.Notices, notice.New("monitor-short", opt.name(), n, leastRows))
		}
		return d
	}
	d.Per = opt.Per
	if !(d.Per > 0) {
		d.Per = usualPer
	}
	few := max(n/20, 5)
	first := r.y[0]
	for _, v := range r.y[:few] {
		first = max(first, v)
	}
	third := n - n/3
	d.Window = [2]float64{r.at(third), r.at(n - 1)}
	d.Decades = first - mean(r.y[n-few:])
	d.PerFirst = d.Decades / (float64(n-1) * r.step) * d.Per
	d.PerLast = -fit(r.y[third:]).slope / r.step * d.Per
	d.Stalled = quantity.Round(d.PerLast, 10) < quantity.Round(stallRate*max(d.PerFirst, 0), 10) || d.PerFirst <= 0
	if d.Stalled && quantity.Round(d.Decades, 10) < stallDecades {
		d.Notices = append(d.Notices, notice.New("residual-stalled", opt.name(), quantity.Text(d.Decades, 2), quantity.Text(d.PerLast, 2), quantity.Text(d.Per, 3), opt.axis()))
	}
	return d
}

// logarithms returns the logarithms of the positive rows at their places, and
// how many rows are zero or less. Rows without a number stay as they are: at the
// end they are the mark of a run that broke down, which zeros are not.
func logarithms(s Series) (logs Series, none int) {
	for i, v := range s.Value {
		if v <= 0 {
			none++
			continue
		}
		at := float64(i + 1)
		if s.At != nil {
			at = s.At[i]
		}
		logs.At, logs.Value = append(logs.At, at), append(logs.Value, math.Log10(v))
	}
	return logs, none
}
