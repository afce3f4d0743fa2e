package uncertainty

import (
	"math"
	"slices"
	"strconv"
	"strings"

	"weirmark/core/quantity"
)

// The sizes of sampling: draws in a block, blocks before their scatter is
// trusted, and blocks at most.
const (
	blockDraws = 10_000
	minBlocks  = 10
	maxBlocks  = 100
)

// Sampled is the distribution of a model drawn from those of its inputs.
type Sampled struct {
	// Value is the mean and U the standard deviation of the draws. Where an input
	// has two degrees of freedom or fewer there is no deviation: U is NaN, Value
	// the median, and the interval is the result.
	Value, U     float64
	IntervalOnly bool
	Low, High    float64 // shortest interval of the level: averages of the blocks
	Level        float64
	Draws        int
	Settled      bool // false: the most draws were made and the second digit may still change
}

// Sample draws the model in blocks of 10,000 until twice the standard deviation
// of the block averages of value, U and both ends is below half a unit of the
// second digit of U, ten blocks at least, and 1,000,000 draws at most. Where
// there is no U, a quarter of the length of the interval stands for it. Means of
// n readings are drawn from Student's distribution of n-1 degrees of freedom.
// Source: JCGM 101:2008 6.4.9 and 7.9 (clauses from memory); the ten blocks are
// ours, since a few block averages may agree by luck.
//
// Low and High are the averages of the blocks, to which the criterion applies:
// the ends of one shortest interval wander with the cube root of the draws, by
// 0.05 u in 10,000 and still 0.01 u in 1,000,000 of a normal distribution, while
// the average of a hundred blocks is good to 0.005 u, and too narrow by 0.4 %.
//
// The seed gives the same draws in every host. It fails with ErrInput, for a
// level outside 0 to 1 too, or ErrModel.
func (m Model) Sample(level float64, seed uint64) (Sampled, error) {
	return m.sample(level, seed, minBlocks, maxBlocks)
}

func (m Model) sample(level float64, seed uint64, least, most int) (Sampled, error) {
	factor, err := m.factor()
	if err != nil {
		return Sampled{}, err
	}
	if !(level > 0 && level < 1) {
		return Sampled{}, ErrInput
	}
	s := Sampled{Level: level}
	for _, in := range m.Inputs {
		s.IntervalOnly = s.IntervalOnly || in.Distribution == Student && in.degrees() <= 2
	}
	g := NewGenerator(seed)
	var all []float64
	var averages [4][]float64
	scratch := make([]float64, blockDraws)
	for block := 1; block <= most && !s.Settled; block++ {
		at := len(all)
		all = slices.Grow(all, blockDraws)[:at+blockDraws]
		if err := m.fill(all[at:], factor, g); err != nil {
			return Sampled{}, err
		}
		copy(scratch, all[at:])
		one := s
		one.describe(scratch)
		for k, v := range []float64{one.Value, one.U, one.Low, one.High} {
			averages[k] = append(averages[k], v)
		}
		if block >= least {
			s.Settled = settled(averages, s.IntervalOnly)
		}
	}
	s.Draws = len(all)
	s.describe(all)
	s.Low, _, _ = Replicates(averages[2])
	s.High, _, _ = Replicates(averages[3])
	return s, nil
}

// fill draws the model.
func (m Model) fill(y []float64, factor [][]float64, g *Generator) error {
	x := make([]float64, len(m.Inputs))
	z := make([]float64, len(m.Inputs))
	for k := range y {
		if factor == nil {
			for i := range m.Inputs {
				x[i] = m.Inputs[i].draw(g)
			}
		} else {
			for i := range z {
				z[i] = g.Normal()
			}
			for i, row := range factor {
				sum := 0.0
				for j := 0; j <= i; j++ {
					sum += float64(row[j] * z[j])
				}
				x[i] = m.Inputs[i].Value + float64(m.Inputs[i].U*sum)
			}
		}
		v, err := m.at(x)
		if err != nil {
			return err
		}
		y[k] = v
	}
	return nil
}

// describe sets value, U and interval from the draws, which it reorders.
func (s *Sampled) describe(draws []float64) {
	s.Value, s.U = math.NaN(), math.NaN()
	if !s.IntervalOnly {
		s.Value, s.U, _ = Replicates(draws)
	}
	s.Low, s.High, _ = ShortestInterval(draws, s.Level)
	if s.IntervalOnly {
		s.Value = median(draws)
	}
}

// settled compares the scatter of the block averages with half a unit of the
// second digit of U, on rounded values so that every host stops alike.
func settled(averages [4][]float64, intervalOnly bool) bool {
	var mean, scatter [4]float64
	for k, a := range averages {
		mean[k], _, scatter[k] = Replicates(a)
	}
	u := mean[1]
	if intervalOnly {
		u = (mean[3] - mean[2]) / 4
	}
	limit := halfUnit(u)
	for k := range averages {
		if k == 1 && intervalOnly {
			continue
		}
		if 2*scatter[k] != 0 && !(quantity.Round(2*scatter[k], 10) < limit) {
			return false
		}
	}
	return true
}

// halfUnit returns half a unit of the second significant digit of u, as u is
// printed with two digits; 0 where u is 0.
func halfUnit(u float64) float64 {
	if !(u > 0) {
		return 0
	}
	_, exponent, _ := strings.Cut(strconv.FormatFloat(quantity.Round(u, 10), 'e', 1, 64), "e")
	power, _ := strconv.Atoi(exponent) // strconv wrote it
	half, _ := strconv.ParseFloat("5e"+strconv.Itoa(power-2), 64)
	return half
}

// Gap is the distance between the ends of the interval of the first order and
// those of sampling.
type Gap struct {
	Low, High float64 // >= 0
	Allowed   float64 // half a unit of the second digit of the first order's U
	Agrees    bool    // both are within Allowed
}

// Compare returns the gap at the level of the sampling. The first order is good
// enough where it agrees: JCGM 101:2008 8.1 (clause from memory). It is not ok
// where the first order has no interval.
func Compare(first FirstOrder, sampled Sampled) (Gap, bool) {
	low, high, ok := first.Interval(sampled.Level)
	if !ok {
		return Gap{}, false
	}
	g := Gap{Low: math.Abs(low - sampled.Low), High: math.Abs(high - sampled.High), Allowed: halfUnit(first.U)}
	g.Agrees = quantity.Round(max(g.Low, g.High), 10) <= g.Allowed
	return g, true
}
