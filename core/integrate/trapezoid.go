package integrate

// Trapezoid returns the sum of (x_i - x_{i-1})(y_i + y_{i-1})/2, exact for a
// curve of straight lines between its stations. It needs two stations; the
// errors are *FewError and *StationError.
func Trapezoid(x, y []float64) (float64, error) {
	if err := refuse(x, y, 2); err != nil {
		return 0, err
	}
	sum := 0.0
	for i := 1; i < len(x); i++ {
		sum += float64((x[i] - x[i-1]) * (float64(0.5*y[i]) + float64(0.5*y[i-1])))
	}
	return sum, nil
}
