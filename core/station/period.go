package station

import "math"

// seam is the part of a period within which two places are one.
const seam = 1e-9

// seamSpacings is how many times the widest spacing the two ends of a periodic
// curve may lie apart: beyond, a part of the period is not there.
const seamSpacings = 2

// within returns the stations moved by whole periods into the one that begins
// at base.
func within(at []float64, base, period float64) []float64 {
	out := make([]float64, len(at))
	for i, t := range at {
		out[i] = t - float64(period*math.Floor((t-base)/period))
		if out[i] >= base+period { // by rounding
			out[i] = base
		}
	}
	return out
}

// repeated returns the curve three times, a period apart, joined where the
// last row of one and the first of the next are the same place or no farther
// apart than rows are.
func (c curve) repeated(period float64) curve {
	var out curve
	join := c.x[0]+period-c.x[len(c.x)-1] <= float64(seamSpacings*c.widest())
	for turn := -1; turn <= 1; turn++ {
		shift := float64(turn) * period
		for k, p := range c.pieces {
			for i := p.from; i < p.to; i++ {
				x := c.x[i] + shift
				switch {
				case i > p.from:
					out.put(x, c.y[i], true)
				case k > 0:
					out.put(x, c.y[i], false)
					out.pieces[len(out.pieces)-1].jumpBefore = p.jumpBefore
				case len(out.x) == 0:
					out.put(x, c.y[i], false)
				default:
					out.close(x, c.y[i], period, join)
				}
			}
			out.pieces[len(out.pieces)-1].jumpAfter = p.jumpAfter
		}
	}
	out.wide = c.wide
	return out
}

// close adds the first row of a further period.
func (c *curve) close(x, y, period float64, join bool) {
	last := len(c.x) - 1
	switch {
	case x-c.x[last] > seam*period:
		c.put(x, y, join)
	case y != c.y[last]:
		c.pieces[len(c.pieces)-1].jumpAfter = true
		c.put(c.x[last], y, false)
		c.pieces[len(c.pieces)-1].jumpBefore = true
	}
}

// widest returns the widest spacing inside the pieces.
func (c curve) widest() float64 {
	w := 0.0
	for _, p := range c.pieces {
		for i := p.from + 1; i < p.to; i++ {
			w = max(w, c.x[i]-c.x[i-1])
		}
	}
	return w
}
