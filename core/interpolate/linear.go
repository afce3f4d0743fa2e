package interpolate

// linear fills dst with y_i + (y_{i+1} - y_i)(t - x_i)/(x_{i+1} - x_i), for
// x_i < t <= x_{i+1}.
func linear(dst, x, y, at []float64) {
	i, slope := 0, (y[1]-y[0])/(x[1]-x[0])
	for j, t := range at {
		if k := advance(x, i, t); k != i {
			i, slope = k, (y[k+1]-y[k])/(x[k+1]-x[k])
		}
		switch t {
		case x[i+1]:
			dst[j] = y[i+1]
			continue
		case x[i]:
			dst[j] = y[i]
			continue
		}
		dst[j] = between(y[i]+float64(slope*(t-x[i])), y[i], y[i+1])
	}
}
