package adequacy

import "math"

// Where a point lies against a set of points.
const (
	Inside  = "inside"  // of the hull of the points, and not on it
	Edge    = "edge"    // on the hull
	Outside = "outside" // no combination of the points reaches it
)

// Place says where a point lies among others, in parameters scaled by the
// span that the others cover (by the size of their value where they cover
// none).
type Place struct {
	State    string
	Beyond   float64 // distance from the hull; 0 inside and on its edge
	Nearest  int     // the nearest of the points
	Distance float64 // and how far it is
}

// Locate places a point among at least one other; all have the same number of
// parameters, and all are finite. The hull is the set of weighted means of the
// points; its nearest point is found by the algorithm of Wolfe 1976,
// Mathematical Programming 11, 128 (from memory), held against exhaustive search
// in the tests.
func Locate(points [][]float64, at []float64) Place {
	scaled := relative(points, at)
	p := Place{State: Outside, Distance: math.Inf(1)}
	for i, v := range scaled {
		if d := math.Sqrt(product(v, v)); d < p.Distance {
			p.Nearest, p.Distance = i, d
		}
	}
	p.Beyond = fromOrigin(scaled)
	if p.Beyond > tolerance {
		return p
	}
	p.Beyond, p.State = 0, Inside
	// A point on the hull leaves it by a step away from the middle.
	middle := make([]float64, len(at))
	for _, v := range scaled {
		for j := range middle {
			middle[j] += v[j] / float64(len(scaled))
		}
	}
	moved := make([][]float64, len(scaled))
	for i, v := range scaled {
		moved[i] = make([]float64, len(v))
		for j := range v {
			moved[i][j] = v[j] + float64(step*middle[j])
		}
	}
	if product(middle, middle) <= tolerance*tolerance {
		if flat(scaled) {
			p.State = Edge
		}
		return p
	}
	if fromOrigin(moved) > tolerance || flat(scaled) {
		p.State = Edge
	}
	return p
}

// Distances in scaled parameters below which points are the same, and the step
// that tells the edge.
const (
	tolerance = 1e-9
	step      = 1e-6
)

// relative returns the points as seen from the place, scaled.
func relative(points [][]float64, at []float64) [][]float64 {
	out := make([][]float64, len(points))
	for i := range out {
		out[i] = make([]float64, len(at))
	}
	for j := range at {
		lo, hi := points[0][j], points[0][j]
		for _, p := range points {
			lo, hi = min(lo, p[j]), max(hi, p[j])
		}
		span := hi - lo
		if span == 0 {
			span = math.Abs(hi)
		}
		if span == 0 {
			span = 1
		}
		for i, p := range points {
			out[i][j] = (p[j] - at[j]) / span
		}
	}
	return out
}

func product(a, b []float64) float64 {
	sum := 0.0
	for i, v := range a {
		sum += float64(v * b[i])
	}
	return sum
}

// flat reports whether the points cover no volume of their space: every point
// of their hull is then on its edge.
func flat(points [][]float64) bool {
	var basis [][]float64
	for _, p := range points[1:] {
		v := make([]float64, len(p))
		for j := range v {
			v[j] = p[j] - points[0][j]
		}
		for _, b := range basis {
			along := product(v, b)
			for j := range v {
				v[j] -= float64(along * b[j])
			}
		}
		if size := math.Sqrt(product(v, v)); size > tolerance {
			for j := range v {
				v[j] /= size
			}
			basis = append(basis, v)
		}
	}
	return len(basis) < len(points[0])
}

// fromOrigin returns the distance of the hull of the points from the origin.
func fromOrigin(points [][]float64) float64 {
	first := 0
	for i := range points {
		if product(points[i], points[i]) < product(points[first], points[first]) {
			first = i
		}
	}
	in, weights := []int{first}, []float64{1}
	for range 1000 {
		x := combined(points, in, weights)
		size, next := product(x, x), -1
		least := size - 1e-13*max(1, size)
		for i := range points {
			if v := product(points[i], x); v < least {
				next, least = i, v
			}
		}
		if next < 0 || holds(in, next) {
			return math.Sqrt(size)
		}
		in, weights = append(in, next), append(weights, 0)
		for len(in) > 1 {
			wanted, ok := affine(points, in)
			if !ok { // the newest adds nothing
				in, weights = in[:len(in)-1], weights[:len(weights)-1]
				return math.Sqrt(size)
			}
			reach, out := 1.0, -1
			for k := range in {
				if wanted[k] < 1e-14 {
					if r := weights[k] / (weights[k] - wanted[k]); r < reach || out < 0 {
						reach, out = min(reach, r), k
					}
				}
			}
			for k := range weights {
				weights[k] += float64(reach * (wanted[k] - weights[k]))
			}
			if out < 0 {
				break
			}
			in, weights = append(in[:out:out], in[out+1:]...), append(weights[:out:out], weights[out+1:]...)
		}
		if len(in) == 1 {
			weights[0] = 1
		}
	}
	x := combined(points, in, weights)
	return math.Sqrt(product(x, x))
}

func holds(list []int, v int) bool {
	for _, have := range list {
		if have == v {
			return true
		}
	}
	return false
}

func combined(points [][]float64, in []int, weights []float64) []float64 {
	x := make([]float64, len(points[0]))
	for k, i := range in {
		for j := range x {
			x[j] += float64(weights[k] * points[i][j])
		}
	}
	return x
}

// affine returns the weights, of sum one, of the point nearest to the origin
// in the flat through some points; not ok where they do not span one.
func affine(points [][]float64, in []int) ([]float64, bool) {
	n := len(in) + 1
	m := make([][]float64, n)
	for r := range m {
		m[r] = make([]float64, n+1)
		for c := range in {
			if r < len(in) {
				m[r][c] = product(points[in[r]], points[in[c]])
			} else {
				m[r][c] = 1
			}
		}
		if r < len(in) {
			m[r][n-1] = 1
		} else {
			m[r][n] = 1
		}
	}
	for c := range n {
		best := c
		for r := c + 1; r < n; r++ {
			if math.Abs(m[r][c]) > math.Abs(m[best][c]) {
				best = r
			}
		}
		m[c], m[best] = m[best], m[c]
		if math.Abs(m[c][c]) < 1e-14 {
			return nil, false
		}
		for r := range n {
			if r == c {
				continue
			}
			f := m[r][c] / m[c][c]
			for k := c; k <= n; k++ {
				m[r][k] -= float64(f * m[c][k])
			}
		}
	}
	weights := make([]float64, len(in))
	for k := range weights {
		weights[k] = m[k][n] / m[k][k]
	}
	return weights, true
}
