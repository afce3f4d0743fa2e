package refinement

import "math"

// linear is a weighted least-squares fit c[0] + sum c[j+1] columns[j].
type linear struct {
	c        []float64
	fit      []float64
	residual []float64 // value less fit
	squares  float64   // weighted sum of squared residuals
}

// fitLinear fits values on a constant and columns by orthogonalising the
// columns under the weights. ok is false where a column depends on those
// before it. All slices have one length, no less than the number of
// coefficients.
func fitLinear(values, weights []float64, columns ...[]float64) (l linear, ok bool) {
	n, m := len(values), len(columns)+1
	base := make([][]float64, m)
	upper := make([][]float64, m) // columns in terms of the base
	for j := range m {
		v := make([]float64, n)
		for i := range v {
			v[i] = 1
			if j > 0 {
				v[i] = columns[j-1][i]
			}
		}
		size := norm(v, weights)
		upper[j] = make([]float64, m)
		for k := range j {
			upper[j][k] = inner(base[k], v, weights)
			for i := range v {
				v[i] -= float64(upper[j][k] * base[k][i])
			}
		}
		left := norm(v, weights)
		if !(left > 1e-10*size) {
			return l, false
		}
		upper[j][j] = left
		for i := range v {
			v[i] /= left
		}
		base[j] = v
	}
	l.residual = append([]float64{}, values...)
	part := make([]float64, m)
	for j := range m {
		part[j] = inner(base[j], l.residual, weights)
		for i := range l.residual {
			l.residual[i] -= float64(part[j] * base[j][i])
		}
	}
	l.c = make([]float64, m)
	for j := m - 1; j >= 0; j-- {
		sum := part[j]
		for k := j + 1; k < m; k++ {
			sum -= float64(upper[k][j] * l.c[k])
		}
		l.c[j] = sum / upper[j][j]
	}
	l.fit = make([]float64, n)
	for i, v := range values {
		l.fit[i] = v - l.residual[i]
	}
	l.squares = inner(l.residual, l.residual, weights)
	return l, true
}

func inner(a, b, weights []float64) float64 {
	sum := 0.0
	for i, w := range weights {
		sum += float64(float64(w*a[i]) * b[i])
	}
	return sum
}

func norm(a, weights []float64) float64 { return math.Sqrt(inner(a, a, weights)) }
