package station

import (
	"math"

	"weirmark/core/interpolate"
)

// margin is the part by which a second difference may fall short of the
// second derivative between its points.
const margin = 1.05

// uncertainties writes into u the standard uncertainty of the interpolation
// at the ascending stations at of one unbroken piece (x, y): the bound below
// over sqrt(3), the half-width of a rectangular distribution.
//
// Linear: 1.05 (t - x_i)(x_{i+1} - t)/2 max|f”|, the error of linear
// interpolation, f” by the divided differences centred on both ends of the
// interval. Monotone: the difference
// between linear and s, the monotone value. A piece of two points shows no
// curvature: the largest with which a parabola stays monotone between them,
// 2|y_1 - y_0|/h^2, is taken for either method. At a point of the curve the
// uncertainty is zero.
func uncertainties(u, s, x, y, at []float64, m interpolate.Method) {
	if len(x) == 1 {
		return // answered only at the point itself
	}
	if m != interpolate.Monotone || len(x) == 2 {
		linearBound(u, x, y, at)
	} else {
		if err := interpolate.At(u, x, y, at, interpolate.Linear); err != nil {
			panic(err) // the monotone value was answered at the same stations
		}
		for j, v := range u {
			u[j] = math.Abs(v - s[j])
		}
	}
	for j := range u {
		u[j] *= 1 / math.Sqrt(3)
	}
}

func linearBound(bound, x, y, at []float64) {
	if len(x) == 2 {
		h := x[1] - x[0]
		curvature := 2 * math.Abs(y[1]-y[0]) / float64(h*h)
		for j, t := range at {
			bound[j] = margin / 2 * float64(t-x[0]) * float64(x[1]-t) * curvature
		}
		return
	}
	i := -1
	var right, curvature float64 // |f''| at the upper end of interval i, and the larger of both ends
	var ahead float64            // slope of interval i+1
	for j, t := range at {
		k := max(i, 0)
		for x[k+1] < t {
			k++
		}
		if k != i {
			left := right
			if i < 0 || k != i+1 {
				left = secondAt(x, y, k)
				ahead = (y[k+1] - y[k]) / (x[k+1] - x[k])
			}
			if k+2 < len(x) {
				next := (y[k+2] - y[k+1]) / (x[k+2] - x[k+1])
				right = 2 * math.Abs(next-ahead) / (x[k+2] - x[k])
				ahead = next
			} else {
				right = secondAt(x, y, k+1)
			}
			i, curvature = k, max(left, right)
		}
		bound[j] = margin / 2 * float64(t-x[i]) * float64(x[i+1]-t) * curvature
	}
}

// secondAt returns |f”| at point i of three or more, by the divided
// difference centred on it. An end has none: there it is the one of its
// neighbour, or what the two nearest give extrapolated to the end if that is
// larger, since a curvature that grows towards the end would else be missed.
func secondAt(x, y []float64, i int) float64 {
	n := len(x)
	near, next := 1, 2
	switch {
	case 0 < i && i < n-1:
		return math.Abs(second(x, y, i))
	case i > 0:
		near, next = n-2, n-3
	}
	f := second(x, y, near)
	if n == 3 {
		return math.Abs(f)
	}
	slope := (f - second(x, y, next)) / (x[near] - x[next])
	return max(math.Abs(f), math.Abs(f+float64(slope*(x[i]-x[near]))))
}

// second returns f” at an inner point.
func second(x, y []float64, i int) float64 {
	left := (y[i] - y[i-1]) / (x[i] - x[i-1])
	right := (y[i+1] - y[i]) / (x[i+1] - x[i])
	return 2 * (right - left) / (x[i+1] - x[i-1])
}
