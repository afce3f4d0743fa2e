package study

import (
	"errors"
	"math"

	"weirmark/core/comparison"
	"weirmark/core/notice"
	"weirmark/core/quantity"
	"weirmark/core/uncertainty"
)

// mergeRepeated leaves each reading of the data in the joint statistic once,
// however often the file lists it.
func (w *work) mergeRepeated() {
	kept := comparison.Distinct(pick(w.x, w.tested), pick(w.d, w.tested), pick(w.uD, w.tested))
	w.joined = w.tested
	if n := len(w.tested) - len(kept); n > 0 {
		w.joined = make([]int, len(kept))
		for j, i := range kept {
			w.joined[j] = w.tested[i]
		}
		w.tell(notice.New("covariance-repeated", n, len(kept)))
	}
}

// residuals puts the whitened residuals at their stations, and the largest
// beside the statistic.
func (w *work) residuals(j *Joint, r comparison.Residuals) {
	if w.cell.Scalar {
		return // |E|/u_val says it already
	}
	for n, i := range w.joined {
		w.cell.Stations[i].Whitened = Number(r.Whitened[n])
	}
	worst := &w.cell.Stations[w.joined[r.Worst]]
	j.Worst, j.WorstAt = worst.Whitened, Number(worst.X)
}

// correlationSteps part the range of a correlation for its picture.
const correlationSteps = 20

// lowTail is the probability below which a statistic is told to be small.
const lowTail = 0.01

// correlationLine keeps the statistic against the correlation of a source, and
// tells where it would be smaller than the stated uncertainties allow.
func (w *work) correlationLine(j *Joint, source string, curve comparison.CorrelationCurve) {
	line := CorrelationLine{Source: source, N: curve.Points[0].Rank, Top: Number(curve.Points[0].Reference), Points: []CorrelationPoint{}, Flips: []Number{}}
	line.Low = Number(comparison.ChiSquare(lowTail, line.N))
	least := curve.Points[0]
	for _, p := range curve.Points {
		line.Points = append(line.Points, CorrelationPoint{Number(p.Rho), Number(p.Statistic)})
		if p.Statistic < least.Statistic {
			least = p
		}
	}
	for _, f := range curve.Flips {
		line.Flips = append(line.Flips, Number(f))
	}
	if least.Low {
		w.tell(notice.New("joint-low-correlation", source, quantity.Text(least.Rho, 2), quantity.Text(least.Statistic, 3), quantity.Text(float64(line.Low), 3)))
	}
	j.Correlations = append(j.Correlations, line)
}

// withoutStations finds the single station without which the statistic
// changes most, and counts those that turn the conclusion.
func (w *work) withoutStations(j *Joint, e []float64, budget uncertainty.Budget) {
	if len(e) < 3 {
		return
	}
	left, err := comparison.LeaveOut(e, budget, comparison.EachStation(len(e)))
	if err != nil {
		if errors.Is(err, comparison.ErrWork) {
			w.tell(notice.New("joint-stations", len(e)))
		}
		return // else told with the statistic itself
	}
	most := 0
	for n, q := range left {
		if math.Abs(q.Statistic-float64(j.Statistic)) > math.Abs(left[most].Statistic-float64(j.Statistic)) {
			most = n
		}
		if exceeds(q.Statistic, comparison.ChiSquare95(q.Rank)) != j.Exceeds {
			j.Turning++
		}
	}
	at := w.leaving(w.place(w.x[w.joined[most]]), left[most])
	j.Station = &at
}

// leaving is the line of what was left out.
func (w *work) leaving(name string, q comparison.Joint) Leaving {
	reference := comparison.ChiSquare95(q.Rank)
	return Leaving{Region: name, Statistic: Number(q.Statistic), N: q.Rank, Reference: Number(reference), Exceeds: exceeds(q.Statistic, reference)}
}

// mostEigenvalues bounds the list of eigenvalues; of a longer one the ends are
// kept.
const mostEigenvalues = 24

// conditioning says how far the covariance is from being singular.
func (w *work) conditioning(j *Joint, budget uncertainty.Budget) {
	c, err := comparison.Condition(budget)
	if err != nil {
		return // told with the statistic itself
	}
	j.Condition = Number(c.Condition)
	n := len(c.Eigenvalues)
	for i, v := range c.Eigenvalues {
		if i < n-c.Rank {
			v = 0 // it counts as zero, and its digits are rounding
		}
		if n <= mostEigenvalues || i < mostEigenvalues/2 || i >= n-mostEigenvalues/2 {
			j.Eigenvalues = append(j.Eigenvalues, Number(v))
		}
	}
}
