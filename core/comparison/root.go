package comparison

import (
	"math"

	"gonum.org/v1/gonum/mat"

	"weirmark/core/uncertainty"
)

// root is the symmetric root of V^-1 on the combinations that carry variance,
// for V scaled to the unit diagonal.
type root struct {
	at      []int     // stations that have an uncertainty
	total   []float64 // theirs
	values  []float64 // eigenvalues, ascending
	vectors mat.Dense
	rank    int
}

// null is the part of the largest eigenvalue below which one counts as zero.
const null = 1e-10

// newRoot fails with ErrRange where no station has an uncertainty, and with
// ErrFinite.
func newRoot(b uncertainty.Budget) (*root, error) {
	total := b.Total()
	if !finite(total) {
		return nil, ErrFinite
	}
	r := &root{}
	for i, u := range total {
		if u > 0 {
			r.at, r.total = append(r.at, i), append(r.total, u)
		}
	}
	if len(r.at) == 0 {
		return nil, ErrRange
	}
	v := mat.NewSymDense(len(r.at), nil)
	for row := range r.at {
		v.SetSym(row, row, 1)
	}
	r.correlate(v, b)
	var eigen mat.EigenSym
	if !eigen.Factorize(v, true) {
		return nil, ErrFinite
	}
	r.values = eigen.Values(nil)
	eigen.VectorsTo(&r.vectors)
	for _, value := range r.values {
		if value > null*r.values[len(r.values)-1] {
			r.rank++
		}
	}
	return r, nil
}

// correlate fills the elements beside the diagonal. Factors are scaled before
// they are multiplied, so that no square overflows.
func (r *root) correlate(v *mat.SymDense, b uncertainty.Budget) {
	for row, i := range r.at {
		for column := row + 1; column < len(r.at); column++ {
			j := r.at[column]
			sum := 0.0
			for _, c := range b.Common {
				sum += float64(c[i] / r.total[row] * (c[j] / r.total[column]))
			}
			for _, g := range b.Groups {
				if g.Label[i] == g.Label[j] {
					sum += float64(g.U[i] / r.total[row] * (g.U[j] / r.total[column]))
				}
			}
			for _, m := range b.Markov {
				keep, _ := uncertainty.Step(math.Abs(m.X[i]-m.X[j]), m.Length)
				sum += float64(m.U[i] / r.total[row] * (m.U[j] / r.total[column]) * keep)
			}
			v.SetSym(row, column, sum)
		}
	}
}

// coordinates returns x over the uncertainties on the eigenvectors, and its
// squared length.
func (r *root) coordinates(x []float64) (p []float64, norm float64) {
	scaled := make([]float64, len(r.at))
	for row, i := range r.at {
		scaled[row] = x[i] / r.total[row]
		norm += float64(scaled[row] * scaled[row])
	}
	p = make([]float64, len(r.at))
	for k := range p {
		for row, v := range scaled {
			p[k] += float64(r.vectors.At(row, k) * v)
		}
	}
	return p, norm
}

// apply returns the image of x; stations without an uncertainty have 0.
func (r *root) apply(x []float64) []float64 {
	p, _ := r.coordinates(x)
	y := make([]float64, len(x))
	for k := len(p) - r.rank; k < len(p); k++ {
		c := p[k] / math.Sqrt(r.values[k])
		for row, i := range r.at {
			y[i] += float64(r.vectors.At(row, k) * c)
		}
	}
	return y
}

// reaches returns ErrRange where x has a part outside the range of V, and
// ErrFinite where it is not a number there.
func (r *root) reaches(x []float64) error {
	has := make([]bool, len(x))
	for _, i := range r.at {
		has[i] = true
	}
	for i, v := range x {
		if !has[i] && v != 0 {
			return ErrRange
		}
	}
	p, norm := r.coordinates(x)
	if !finite(p) {
		return ErrFinite
	}
	for k := range len(p) - r.rank {
		if float64(p[k]*p[k]) > 1e-12*norm {
			return ErrRange
		}
	}
	return nil
}
