package derived

import "math"

// Smooth returns the curve with every value replaced by the straight line of
// least squares through the window rows around it, an odd number; towards an
// end the window is the widest even-sided one that fits. Rows without a number
// part the curve and stay as they are. Only quantities taken from a curve may
// use it; the curve itself is drawn and compared as it is.
func Smooth(x, y []float64, window int) []float64 {
	out := make([]float64, len(y))
	copy(out, y)
	for from := 0; from < len(y); from++ {
		if !usable(x, y, from) {
			continue
		}
		to := from
		for to < len(y) && usable(x, y, to) {
			to++
		}
		for i := from; i < to; i++ {
			half := min(window/2, i-from, to-1-i)
			out[i] = lineAt(x[i-half:i+half+1], y[i-half:i+half+1], x[i])
		}
		from = to
	}
	return out
}

// lineAt returns the value at a place of the straight line of least squares.
func lineAt(x, y []float64, at float64) float64 {
	n := float64(len(x))
	mx, my := 0.0, 0.0
	for i := range x {
		mx, my = mx+x[i]/n, my+y[i]/n
	}
	xx, xy := 0.0, 0.0
	for i := range x {
		xx += float64((x[i] - mx) * (x[i] - mx))
		xy += float64((x[i] - mx) * (y[i] - my))
	}
	if xx == 0 || math.IsInf(xx, 0) {
		return my
	}
	return my + float64(xy/xx*(at-mx))
}
