package metric

import (
	"math"
	"slices"

	"weirmark/core/uncertainty"
)

// Sampled says how sure the measures of an e are, since e itself is measured
// and computed with errors of a known covariance.
type Sampled struct {
	Bias, MAE, RMSE, MaxAbs Spread
	Draws                   int
}

// Spread is the uncertainty of one measure, in its unit.
type Spread struct {
	U       float64 // standard deviation of the measure when the stated errors are drawn anew on e
	Floor   float64 // mean of the measure of the stated errors alone: no model comes below it by merit
	FloorHi float64 // and their 95 % point
}

// The draws of Sample: fewer for many stations, so that it stays a moment.
const (
	sampleDraws = 2000
	sampleWork  = 20_000_000
	fewestDraws = 100
)

// Sample draws normal errors of covariance b, n = len(e), from the seed and
// returns the spread of the measures of e and the floor that the errors alone
// make. It is not ok where b holds anything that is not finite.
func Sample(e []float64, b uncertainty.Budget, seed uint64) (Sampled, bool) {
	for _, u := range b.Total() {
		if math.IsNaN(u) || math.IsInf(u, 0) {
			return Sampled{}, false
		}
	}
	if len(e) == 0 {
		return Sampled{}, false
	}
	s := Sampled{Draws: max(fewestDraws, min(sampleDraws, sampleWork/(len(e)*(1+len(b.Common)+len(b.Groups)+len(b.Markov)))))}
	var moved, alone [4][]float64
	noise, with := make([]float64, len(e)), make([]float64, len(e))
	draws := uncertainty.NewRealisation(b, seed)
	for range s.Draws {
		draws.Next(noise)
		for i, v := range noise {
			with[i] = e[i] + v
		}
		keep(&moved, Summarise(with))
		keep(&alone, Summarise(noise))
	}
	for i, into := range []*Spread{&s.Bias, &s.MAE, &s.RMSE, &s.MaxAbs} {
		if i == 0 { // a bias has a sign; what is sought is its size
			for j, v := range alone[0] {
				alone[0][j] = math.Abs(v)
			}
		}
		*into = Spread{U: deviation(moved[i]), Floor: mean(alone[i]), FloorHi: upper(alone[i])}
	}
	return s, true
}

func keep(lists *[4][]float64, m Summary) {
	for i, v := range []float64{m.Bias, m.MAE, m.RMSE, m.MaxAbs} {
		lists[i] = append(lists[i], v)
	}
}

func mean(v []float64) float64 {
	sum := 0.0
	for _, x := range v {
		sum += x / float64(len(v))
	}
	return sum
}

func deviation(v []float64) float64 {
	m, sum := mean(v), 0.0
	for _, x := range v {
		sum += float64((x - m) * (x - m))
	}
	return math.Sqrt(sum / float64(len(v)-1))
}

// upper returns the 95 % point of the values, which it sorts.
func upper(v []float64) float64 {
	slices.Sort(v)
	return v[int(math.Ceil(0.95*float64(len(v))))-1]
}
