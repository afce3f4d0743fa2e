package study

import (
	"math"
	"slices"
	"strconv"
	"strings"

	"weirmark/core/comparison"
	"weirmark/core/metric"
	"weirmark/core/uncertainty"
)

// scoreInputs are what a measure is made from.
func scoreInputs(p spot) []string {
	name := p.cell.Scores[p.at[0]].Name
	switch {
	case strings.HasSuffix(name, " / |D|"):
		return from("stations.*.percent")(p)
	case strings.HasPrefix(name, "weighted "):
		return from("stations.*.e", "stations.*.weight")(p)
	case strings.HasSuffix(name, " / entered scale"):
		return from("stations.*.e", "entered.scores.scale_value")(p)
	case name == "hit rate" && p.q.Scores.AllowanceK > 0:
		return from("stations.*.s", "stations.*.d", "stations.*.u_d")(p)
	}
	return allSD(p)
}

// summaryOf is a measure of E by its name.
func summaryOf(name string, e []float64) float64 {
	m := metric.Summarise(e)
	measure, _, _ := strings.Cut(name, " / ")
	switch measure {
	case "mean E":
		return m.Bias
	case "mean |E|":
		return m.MAE
	case "RMSE":
		return m.RMSE
	case "largest |E|":
		return m.MaxAbs
	}
	return math.NaN()
}

// scaleOf is the scale of a measure, from the data.
func scaleOfMeasure(name string, d []float64) float64 {
	switch _, scale, _ := strings.Cut(name, " / "); scale {
	case "range of D":
		return slices.Max(d) - slices.Min(d)
	case "mean |D|":
		return metric.Summarise(d).MAE
	}
	return math.NaN() // from the card of the case
}

// score repeats a measure over the stations.
func (a args) score() float64 {
	name := a.cell.Scores[a.spot.at[0]].Name
	switch {
	case strings.HasSuffix(name, " / |D|"):
		return summaryOf(name, known(a.v[0]))
	case strings.HasPrefix(name, "weighted "):
		return weightedScore(name, a.v[0], a.v[1])
	case strings.HasSuffix(name, " / entered scale"):
		return summaryOf(name, a.v[0]) / a.n(1)
	case strings.Contains(name, " / "):
		return summaryOf(name, comparison.Error(a.v[0], a.v[1])) / scaleOfMeasure(name, a.v[1])
	}
	s, d := a.inSI(a.v[0]), a.inSI(a.v[1])
	switch name {
	case "hit rate":
		allowance := uncertainty.Constant(len(d), a.yUnit.StepToSI(a.q.Scores.Allowance))
		if len(a.v) > 2 {
			for i, u := range a.v[2] {
				allowance[i] = a.q.Scores.AllowanceK * a.yUnit.StepToSI(u)
			}
		}
		q, _ := metric.HitRateWithin(s, d, a.q.Scores.Fraction, allowance)
		return q
	case "geometric mean bias MG", "geometric variance VG":
		mg, vg, _ := metric.Geometric(s, d)
		if name == "geometric mean bias MG" {
			return mg
		}
		return vg
	case "lower limit of agreement", "upper limit of agreement":
		l, _ := metric.Limits(comparison.Error(a.v[0], a.v[1]))
		if name == "lower limit of agreement" {
			return l.Low
		}
		return l.High
	case "area between the distributions of S and D":
		return float64(a.step(metric.Area(s, d)))
	}
	if v, ok := a.fitted(name, s, d); ok {
		return v
	}
	return a.dispersed(name, s, d)
}

func weightedScore(name string, e, weights []float64) float64 {
	bias, mae, rmse, ok := metric.Weighted(e, weights)
	switch {
	case !ok:
		return math.NaN()
	case name == "weighted mean E":
		return bias
	case name == "weighted mean |E|":
		return mae
	}
	return rmse
}

// fitted is a number of the straight line of S on D.
func (a args) fitted(name string, s, d []float64) (float64, bool) {
	l := metric.Fit(s, d)
	switch name {
	case "correlation R":
		return l.R, true
	case "R²":
		return l.R * l.R, true
	case "slope of S on D":
		return l.Slope, true
	case "intercept of S on D":
		return float64(a.step(l.Intercept)), true
	}
	return 0, false
}

// dispersed is a score of dispersion.
func (a args) dispersed(name string, s, d []float64) float64 {
	r, err := metric.Dispersion(s, d, a.yUnit.ToSI(a.q.Scores.Threshold))
	if err != nil {
		return math.NaN()
	}
	switch name {
	case "fractional bias FB":
		return r.FB
	case "normalised mean square error NMSE":
		return r.NMSE
	case "within a factor of two, FAC2":
		return r.FAC2
	case "normalised absolute difference NAD":
		return r.NAD
	}
	return math.NaN()
}

// measuredSpread is the spread of a measure by sampling.
func measuredSpread(get func(metric.Spread) float64) func(args) float64 {
	return func(a args) float64 {
		s, ok := metric.Sample(pick(a.v[0], a.tested), a.covarianceOf(a.v[1], a.tested, nil), samplingSeed)
		if !ok {
			return math.NaN()
		}
		return get(map[string]metric.Spread{"mean E": s.Bias, "mean |E|": s.MAE, "RMSE": s.RMSE, "largest |E|": s.MaxAbs}[a.cell.Measured[a.spot.at[0]].Name])
	}
}

// numericalParts are the sources of u_num at all stations.
func numericalParts(p spot) []string {
	var list []string
	for j, part := range p.parts {
		if part.plain != nil { // raised to their plain sum
			return nil
		}
		if part.line.Of == OfNumerical && !part.interp {
			list = append(list, "sources."+strconv.Itoa(j)+".at.*")
		}
	}
	return list
}

// summedBy is the root mean square over the stations of what the sources sum
// to.
func summedBy(sum func(a, b float64) float64) func(args) float64 {
	return func(a args) float64 {
		if len(a.v) == 0 {
			return math.NaN()
		}
		total := make([]float64, len(a.x))
		for _, list := range a.v {
			for i, u := range list {
				total[i] = sum(total[i], math.Abs(u))
			}
		}
		return rms(known(total))
	}
}
