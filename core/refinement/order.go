package refinement

import "math"

// observedOrder returns the positive p with
//
//	e32/e21 = r21^p (r32^p - 1)/(r21^p - 1),
//
// for monotone values (0 < R* < 1), found by bracketing: with a = ln r32 and
// b = ln r21 the logarithm of the right side is
// a p + ln(1 - e^(-a p)) - ln(1 - e^(-b p)), which rises with p from ln(a/b)
// without bound, so there is one root. For r21 = r32 it is ln(e32/e21)/ln r.
//
// Source: the order formula of Celik et al., J. Fluids Eng. 130 (2008) 078001,
// whose iteration need not converge for unequal ratios.
func observedOrder(r21, r32, e21, e32 float64) float64 {
	target := math.Log(e32 / e21)
	a, b := math.Log(r32), math.Log(r21)
	if r21 == r32 {
		return target / b
	}
	excess := func(p float64) float64 {
		return float64(a*p) + math.Log1p(-math.Exp(-a*p)) - math.Log1p(-math.Exp(-b*p)) - target
	}
	hi := 1.0
	for excess(hi) < 0 {
		hi *= 2
	}
	return bisect(excess, 0, hi)
}

// bisect returns the root of a rising function between lo and hi, to the last
// bits. f is not asked for its value at lo.
func bisect(f func(float64) float64, lo, hi float64) float64 {
	for {
		middle := lo + (hi-lo)/2
		if middle <= lo || middle >= hi {
			return middle
		}
		if f(middle) < 0 {
			lo = middle
		} else {
			hi = middle
		}
	}
}

// highestOrder is where the search of usualOrder ends.
const highestOrder = 100

// usualOrder returns the order that the usual formula prints whatever the
// class of the values, the least positive root of
//
//	p = |ln|e32/e21| + q(p)|/ln r21, q = ln[(r21^p - s)/(r32^p - s)],
//	s = sign(e32/e21),
//
// or NaN where it has none. It is for the notice that says why it does not
// apply. Source: Celik et al. as above.
func usualOrder(r21, r32, e21, e32 float64) float64 {
	target := math.Log(math.Abs(e32 / e21))
	a, b := math.Log(r32), math.Log(r21)
	if r21 == r32 {
		return math.Abs(target) / b
	}
	s := math.Copysign(1, e32/e21)
	// The logarithms are put together so that no power overflows.
	excess := func(p float64) float64 {
		q := float64((b-a)*p) + math.Log1p(-s*math.Exp(-b*p)) - math.Log1p(-s*math.Exp(-a*p))
		return p - math.Abs(target+q)/b
	}
	const step = 0.125
	for p := step; p <= highestOrder; p += step {
		if excess(p) >= 0 {
			return bisect(excess, p-step, p)
		}
	}
	return math.NaN()
}
