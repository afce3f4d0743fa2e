package integrate

// Weights returns the length that every station stands for: half the distance
// to the station before and half that to the one behind. The sum of weight
// times value is the Trapezoid. x must not descend; equal stations share their
// length. It is all zeros for fewer than two different stations.
func Weights(x []float64) []float64 {
	w := make([]float64, len(x))
	for i := 1; i < len(x); i++ {
		half := (x[i] - x[i-1]) / 2
		w[i-1] += half
		w[i] += half
	}
	return w
}
