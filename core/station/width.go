package station

import (
	"math"
	"sort"

	"weirmark/core/integrate"
	"weirmark/core/interpolate"
)

// average replaces the answers of kept stations by the mean of the curve over
// the width around them: the trapezoid through the rows inside and the
// interpolated ends, exact for the straight lines between rows. A station
// whose width leaves its piece is outside, or in a gap. The uncertainty is the
// largest of the interpolation at the middles of the parts.
func (c curve) average(a *answers, at []float64, opt Options) {
	half := opt.Width / 2
	for j, t := range at {
		if a.states[j] != isKept {
			continue
		}
		k := sort.Search(len(c.pieces), func(k int) bool { p := c.pieces[k]; return c.x[p.to-1] >= t })
		p := c.pieces[k]
		x, y := c.x[p.from:p.to], c.y[p.from:p.to]
		if t-half < x[0] || t+half > x[len(x)-1] {
			a.states[j] = isGap
			if k == 0 && t-half < x[0] || k == len(c.pieces)-1 && t+half > x[len(x)-1] {
				a.states[j] = isOutside
			}
			a.clipped++
			continue
		}
		a.s[j], a.u[j] = meanOver(x, y, t-half, t+half, opt.Method)
	}
}

// meanOver returns the mean of a piece over an interval inside it, and the
// uncertainty of the interpolation there.
func meanOver(x, y []float64, lo, hi float64, m interpolate.Method) (value, u float64) {
	first := sort.SearchFloat64s(x, math.Nextafter(lo, hi))
	last := sort.SearchFloat64s(x, hi)
	px := append(append([]float64{lo}, x[first:last]...), hi)
	py := make([]float64, len(px))
	copy(py[1:], y[first:last])
	ends := []float64{lo, hi}
	if err := interpolate.At(ends, x, y, ends, m); err != nil {
		panic(err) // the interval lies inside the piece
	}
	py[0], py[len(py)-1] = ends[0], ends[1]
	sum, err := integrate.Trapezoid(px, py)
	if err != nil {
		panic(err) // ascending and finite by construction
	}
	middles := make([]float64, len(px)-1)
	for i := range middles {
		middles[i] = px[i] + (px[i+1]-px[i])/2
	}
	at := make([]float64, len(middles))
	if err := interpolate.At(at, x, y, middles, m); err != nil {
		panic(err) // between the ends of the interval
	}
	us := make([]float64, len(middles))
	uncertainties(us, at, x, y, middles, m)
	for _, v := range us {
		u = max(u, v)
	}
	return sum / (hi - lo), u
}
