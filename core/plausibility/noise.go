package plausibility

import "math"

// fewestNoisy is the number of inner rows below which nothing is said of noise.
const fewestNoisy = 6

// Noise returns the standard deviation of the scatter of a curve about what is
// smooth in it, by differences: at every inner row, the value less the
// straight line through its two neighbours, divided by its standard deviation
// for independent errors of one (Gasser, Sroka and Jennen-Steinmetz 1986,
// Biometrika 73, 625, formula from memory). Abscissae may be uneven; they must
// ascend. Repeated abscissae and rows without a number are passed over. Of the
// root mean square of these and their median over that of a normal
// distribution the lesser is taken, so that a single bend or jump does not
// pass for scatter.
//
// It is not ok where there are few rows, or where the differences do not
// change sign as scatter does: those of independent errors do so in 73 of 100
// pairs (correlation -2/3, arccos(-2/3)/pi), those of a curve's own bends
// hardly ever; six in ten are asked for. Bends add to the estimate, slow drift does
// not show: it bounds the random uncertainty from below only as far as the
// curve is smooth between stations.
func Noise(x, y []float64) (s float64, rows int, ok bool) {
	var px, py []float64
	for i := range x {
		if !math.IsNaN(x[i]) && !math.IsNaN(y[i]) && (len(px) == 0 || x[i] > px[len(px)-1]) {
			px, py = append(px, x[i]), append(py, y[i])
		}
	}
	rows = len(px) - 2
	if rows < fewestNoisy {
		return 0, max(rows, 0), false
	}
	sum, turns, before := 0.0, 0, 0.0
	sizes := make([]float64, 0, rows)
	for i := 1; i+1 < len(px); i++ {
		b := (px[i] - px[i-1]) / (px[i+1] - px[i-1])
		a := 1 - b
		off := float64(a*py[i-1]) + float64(b*py[i+1]) - py[i]
		off /= math.Sqrt(float64(a*a) + float64(b*b) + 1)
		sum += float64(off * off)
		sizes = append(sizes, off)
		if off*before < 0 {
			turns++
		}
		before = off
	}
	return min(math.Sqrt(sum/float64(rows)), 1.4826*medianAbs(sizes)), rows, 10*turns >= 6*(rows-1)
}
