package derived

// Slopes returns the derivative of a curve at its rows, by the parabola
// through a row and its neighbours, at the ends through the first or last
// three; of two rows, the straight line. x must ascend strictly and all
// numbers be finite. Fewer than two rows have none: nil.
func Slopes(x, y []float64) []float64 {
	n := len(x)
	if n < 2 {
		return nil
	}
	chord := make([]float64, n-1)
	for i := range chord {
		chord[i] = (y[i+1] - y[i]) / (x[i+1] - x[i])
	}
	if n == 2 {
		return []float64{chord[0], chord[0]}
	}
	out := make([]float64, n)
	for i := range out {
		k := min(max(i, 1), n-2) // the middle of the three rows
		left, right := x[k]-x[k-1], x[k+1]-x[k]
		second := (chord[k] - chord[k-1]) / (left + right) // half the second derivative
		out[i] = chord[k-1] + float64(second*((x[i]-x[k-1])+(x[i]-x[k])))
	}
	return out
}
