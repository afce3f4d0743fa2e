package interpolate

// monotone fills dst with the cubic Hermite interpolant whose slopes are
// those of slopeAt. Monotone data stay monotone, and an extremum of the data
// stays where it is.
//
// Source: Fritsch and Butland, SIAM J. Sci. Stat. Comput. 5 (1984) 300, the
// weighted harmonic mean; the ends are three-point formulas kept within the
// limit of Fritsch and Carlson, SIAM J. Numer. Anal. 17 (1980) 238 (both from
// memory). The same variant is computed by scipy.interpolate.PchipInterpolator.
func monotone(dst, x, y, at []float64) {
	i := -1
	var m0, m1 float64 // slopes at both ends of interval i
	for j, t := range at {
		k := advance(x, max(i, 0), t)
		if k != i {
			if k == i+1 && i >= 0 {
				m0 = m1
			} else {
				m0 = slopeAt(x, y, k)
			}
			i, m1 = k, slopeAt(x, y, k+1)
		}
		switch t {
		case x[i+1]:
			dst[j] = y[i+1]
			continue
		case x[i]:
			dst[j] = y[i]
			continue
		}
		h := x[i+1] - x[i]
		w := (t - x[i]) / h
		d := (y[i+1] - y[i]) / h
		// Newton form of the cubic: the straight line first, so that a
		// constant is kept exactly.
		bend := float64((m0-d)*(1-w)) - float64((m1-d)*w)
		v := y[i] + float64(w*(y[i+1]-y[i])) + float64(h*w*(1-w)*bend)
		dst[j] = between(v, y[i], y[i+1])
	}
}

// slopeAt returns the slope of the interpolant at point i.
func slopeAt(x, y []float64, i int) float64 {
	n := len(x)
	if n == 2 {
		return (y[1] - y[0]) / (x[1] - x[0])
	}
	switch i {
	case 0:
		return endSlope(x[1]-x[0], x[2]-x[1], (y[1]-y[0])/(x[1]-x[0]), (y[2]-y[1])/(x[2]-x[1]))
	case n - 1:
		return endSlope(x[n-1]-x[n-2], x[n-2]-x[n-3], (y[n-1]-y[n-2])/(x[n-1]-x[n-2]), (y[n-2]-y[n-3])/(x[n-2]-x[n-3]))
	}
	h0, h1 := x[i]-x[i-1], x[i+1]-x[i]
	d0, d1 := (y[i]-y[i-1])/h0, (y[i+1]-y[i])/h1
	if !(d0 > 0 && d1 > 0 || d0 < 0 && d1 < 0) {
		return 0
	}
	w0, w1 := float64(2*h1)+h0, h1+float64(2*h0)
	return (w0 + w1) / (w0/d0 + w1/d1)
}

// endSlope returns the slope at an end from the two intervals next to it, h0
// and d0 the width and slope of the nearer: the parabola through three points,
// kept to the sign of d0 and to three times d0 where the data turn.
func endSlope(h0, h1, d0, d1 float64) float64 {
	m := (float64((float64(2*h0)+h1)*d0) - float64(h0*d1)) / (h0 + h1)
	if m > 0 && d0 <= 0 || m < 0 && d0 >= 0 {
		return 0
	}
	if !(d0 > 0 && d1 > 0 || d0 < 0 && d1 < 0) && (m > 0 && m > 3*d0 || m < 0 && m < 3*d0) {
		return 3 * d0
	}
	return m
}
