package station

import (
	"math"
	"slices"
)

// gap is a spacing that is too wide to be bridged, and how many median
// spacings it is wide.
type gap struct{ from, to, ratio float64 }

// around is the number of spacings on either side that a spacing is held
// against, and fewest the number below which there is nothing to hold it
// against.
const (
	around = 4
	fewest = 4
)

// partWide parts the pieces where a spacing is above m times the median
// spacing: that of the spacings around it, and of the whole curve as well. The
// first keeps a stretched grid whole, whose spacing grows by less than a
// factor two a row; the second keeps whole what is only coarse against a
// finely resolved neighbourhood.
func (c *curve) partWide(m float64) {
	overall := math.NaN()
	var pieces []piece
	for _, p := range c.pieces {
		from := p.from
		for i := p.from + 1; i < p.to; i++ {
			h := c.x[i] - c.x[i-1]
			local, ok := c.medianAround(i, h/m)
			if !ok {
				continue
			}
			if math.IsNaN(overall) {
				overall = c.medianSpacing()
			}
			if median := max(local, overall); h > float64(m*median) {
				c.wide = append(c.wide, gap{c.x[i-1], c.x[i], h / median})
				pieces = append(pieces, piece{from: from, to: i, jumpBefore: p.jumpBefore && from == p.from})
				from = i
			}
		}
		pieces = append(pieces, piece{from: from, to: p.to, jumpBefore: p.jumpBefore && from == p.from, jumpAfter: p.jumpAfter})
	}
	c.pieces = pieces
}

// pair is the part of the widest spacing around below which two rows are a
// close pair, such as a cut along the edges of cells leaves: no spacing.
const pair = 1e-3

// medianAround returns the median of the spacings around the one before row
// i, close pairs left out. It is not ok where there are too few, or where none
// is below limit, so that the median cannot be.
func (c *curve) medianAround(i int, limit float64) (median float64, ok bool) {
	var near [2 * around]float64
	n, widest := 0, 0.0
	for k := max(1, i-around); k <= min(len(c.x)-1, i+around); k++ {
		h := c.x[k] - c.x[k-1]
		if k == i || h == 0 {
			continue
		}
		near[n] = h
		n++
		widest = max(widest, h)
		ok = ok || h < limit
	}
	if !ok {
		return 0, false
	}
	some := slices.DeleteFunc(near[:n], func(h float64) bool { return h < pair*widest })
	if len(some) < fewest {
		return 0, false
	}
	return medianOf(some), true
}

func (c *curve) medianSpacing() float64 {
	all := make([]float64, 0, len(c.x))
	for i := 1; i < len(c.x); i++ {
		if h := c.x[i] - c.x[i-1]; h > 0 {
			all = append(all, h)
		}
	}
	return medianOf(all)
}

// medianOf sorts the values, one or more, and returns their median.
func medianOf(values []float64) float64 {
	slices.Sort(values)
	n := len(values)
	return (values[(n-1)/2] + values[n/2]) / 2
}
