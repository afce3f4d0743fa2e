package comparison

import (
	"gonum.org/v1/gonum/mat"

	"weirmark/core/uncertainty"
)

// Conditioning says how far a covariance is from being singular.
type Conditioning struct {
	Dense bool
	Rank  int
	// Eigenvalues of V scaled to the unit diagonal, ascending; dense only.
	Eigenvalues []float64
	// Condition is the largest over the smallest eigenvalue that counts: of V
	// where it is dense, else of I + G'G for the whitened common columns G, the
	// matrix on which the structured form rests. 1 without such columns.
	Condition float64
}

// Condition examines the covariance as Statistic treats it, and fails as that
// does.
func Condition(b uncertainty.Budget) (Conditioning, error) {
	w, err := newWhitening(b)
	if err != nil {
		return Conditioning{}, err
	}
	c := Conditioning{Rank: w.rank(), Condition: 1}
	if r := w.root; r != nil {
		c.Dense, c.Eigenvalues = true, r.values
		n := len(r.values)
		c.Condition = r.values[n-1] / r.values[n-r.rank]
		return c, nil
	}
	m := len(b.Common)
	if m == 0 {
		return c, nil
	}
	own := b
	own.Common = nil
	if w, err = newWhitening(own); err != nil {
		return Conditioning{}, err
	}
	images := make([][]float64, m)
	gram := mat.NewSymDense(m, nil)
	for i, column := range b.Common {
		images[i] = w.apply(column)
		for j := 0; j <= i; j++ {
			v := dot(images[i], images[j])
			if i == j {
				v++
			}
			gram.SetSym(i, j, v)
		}
	}
	var eigen mat.EigenSym
	if !eigen.Factorize(gram, false) {
		return Conditioning{}, ErrFinite
	}
	values := eigen.Values(nil)
	// The smallest is 1 at least, but for rounding.
	c.Condition = values[m-1] / max(values[0], 1)
	return c, nil
}
