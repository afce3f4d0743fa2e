package profile

import "math"

// bend is the turn, in radians, below which a corner of a contour belongs to a
// smooth curve; from there on the sides that meet are taken as straight.
const bend = 0.35

// Arc returns the length along a contour (x, y) from its first row, in the
// unit of both coordinates, NaN at rows without a place, which are passed
// over. Between two rows the contour is an arc where it turns smoothly: its
// turn over a side h is h times the mean curvature of both ends, and the
// length h (t/2)/sin(t/2). Where it does not turn, turns to and fro, or has a
// corner, it is straight.
func Arc(x, y []float64) []float64 {
	rows := make([]int, 0, len(x))
	s := make([]float64, len(x))
	for i := range x {
		s[i] = math.NaN()
		if !math.IsNaN(x[i]) && !math.IsNaN(y[i]) {
			rows = append(rows, i)
		}
	}
	side := make([]float64, len(rows)) // from row k-1 to row k
	for k := 1; k < len(rows); k++ {
		side[k] = math.Hypot(x[rows[k]]-x[rows[k-1]], y[rows[k]]-y[rows[k-1]])
	}
	curvature := make([]float64, len(rows))
	for k := 1; k+1 < len(rows); k++ {
		a, b, c := rows[k-1], rows[k], rows[k+1]
		turn := turnOf(x[b]-x[a], y[b]-y[a], x[c]-x[b], y[c]-y[b])
		curvature[k] = math.NaN()
		if math.Abs(turn) < bend {
			curvature[k] = 2 * turn / (side[k] + side[k+1])
		}
	}
	if n := len(rows); n > 2 { // an end turns as its neighbours do, where they agree
		if n == 3 || curvature[1]*curvature[2] > 0 {
			curvature[0] = curvature[1]
		}
		if n == 3 || curvature[n-2]*curvature[n-3] > 0 {
			curvature[n-1] = curvature[n-2]
		}
	}
	total := 0.0
	for k, r := range rows {
		if k > 0 {
			length := side[k]
			if a, b := curvature[k-1], curvature[k]; a*b > 0 {
				if half := math.Abs(a+b) / 4 * side[k]; half > 0 {
					length *= half / math.Sin(half)
				}
			}
			total += length
		}
		s[r] = total
	}
	return s
}

// turnOf returns the angle from one direction to another.
func turnOf(ax, ay, bx, by float64) float64 {
	return math.Atan2(float64(ax*by)-float64(ay*bx), float64(ax*bx)+float64(ay*by))
}
