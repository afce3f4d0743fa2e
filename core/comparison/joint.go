package comparison

import (
	"errors"
	"math"

	"gonum.org/v1/gonum/mat"
	"gonum.org/v1/gonum/stat/distuv"

	"weirmark/core/uncertainty"
)

// MaxDense is the largest number of stations treated by a dense matrix, which
// is needed only where some station has no independent uncertainty.
const MaxDense = 2000

// ErrRange says that e has a part outside the range of V: it varies in a
// combination that was declared free of uncertainty.
var ErrRange = errors.New("e varies in a combination declared free of uncertainty")

// ErrSize says that the dense treatment was refused.
var ErrSize = errors.New("too many stations without an independent uncertainty")

// ErrFinite says that e or V holds something that is no finite number: an
// uncertainty that is not known, or one whose square overflows.
var ErrFinite = errors.New("a difference or an uncertainty is not a finite number")

// Joint is the statistic e' V^-1 e and the rank of V.
type Joint struct {
	Statistic float64
	Rank      int
}

// P returns the upper tail of the chi-square distribution at the rank.
func (j Joint) P() float64 { return distuv.ChiSquared{K: float64(j.Rank)}.Survival(j.Statistic) }

// ChiSquare95 returns the 95 % point of the chi-square distribution.
func ChiSquare95(n int) float64 { return distuv.ChiSquared{K: float64(n)}.Quantile(0.95) }

// Statistic returns e' V^-1 e for the covariance V of b. Where every station
// has an independent variance the Woodbury identity is used in the form
//
//	Q = min over z of |D^-1/2 (e - C z)|^2 + |z|^2,
//
// linear in the number of stations and free of cancellation. Otherwise V is
// made dense, scaled to the unit diagonal so that a few small uncertainties do
// not pass for none, and reduced to its rank (eigenvalues below 1e-10 of the
// largest count as zero). Source: Golub and Van Loan, Matrix Computations,
// 2.1.4 (Woodbury identity; from memory); the minimum form follows from it.
//
// It fails with ErrRange, ErrSize or ErrFinite. There must be a station.
func Statistic(e []float64, b uncertainty.Budget) (Joint, error) {
	if !finite(e) || !finite(b.Variance) {
		return Joint{}, ErrFinite
	}
	for _, c := range b.Common {
		if !finite(c) {
			return Joint{}, ErrFinite
		}
	}
	if !independent(b) {
		return dense(e, b)
	}
	z, ok := commonPart(e, b)
	if !ok {
		return Joint{}, ErrFinite
	}
	q := quadratic(e, z, b)
	if !finite([]float64{q}) {
		return Joint{}, ErrFinite
	}
	return Joint{q, len(e)}, nil
}

// finite reports whether all values are finite.
func finite(values []float64) bool {
	for _, v := range values {
		if math.IsNaN(v) || math.IsInf(v, 0) {
			return false
		}
	}
	return true
}

// independent reports whether every station has an independent variance.
func independent(b uncertainty.Budget) bool {
	for _, v := range b.Variance {
		if !(v > 0) {
			return false
		}
	}
	return true
}

// commonPart returns the z that minimises the form above:
// (I + C' D^-1 C) z = C' D^-1 e. It is not ok where a square overflows: for
// finite input the matrix is positive definite.
func commonPart(e []float64, b uncertainty.Budget) (z []float64, ok bool) {
	m := len(b.Common)
	if m == 0 {
		return nil, true
	}
	a := mat.NewSymDense(m, nil)
	right := mat.NewVecDense(m, nil)
	for i, ci := range b.Common {
		for j := i; j < m; j++ {
			sum := 0.0
			for s, c := range b.Common[j] {
				sum += float64(ci[s]*c) / b.Variance[s]
			}
			if i == j {
				sum++
			}
			a.SetSym(i, j, sum)
		}
		sum := 0.0
		for s, c := range ci {
			sum += float64(c*e[s]) / b.Variance[s]
		}
		right.SetVec(i, sum)
	}
	for i := range m {
		if !finite(a.RawSymmetric().Data[i*m+i : (i+1)*m]) {
			return nil, false
		}
	}
	if !finite(right.RawVector().Data) {
		return nil, false
	}
	var chol mat.Cholesky
	if !chol.Factorize(a) {
		return nil, false
	}
	solution := mat.NewVecDense(m, nil)
	// A condition warning only: the matrix has eigenvalues of one and above.
	_ = chol.SolveVecTo(solution, right)
	return solution.RawVector().Data, true
}

func quadratic(e, z []float64, b uncertainty.Budget) float64 {
	sum := 0.0
	for s, v := range e {
		for i, c := range b.Common {
			v -= float64(c[s] * z[i])
		}
		sum += float64(v*v) / b.Variance[s]
	}
	for _, v := range z {
		sum += float64(v * v)
	}
	return sum
}

// dense treats V as a matrix of correlations between the stations that have an
// uncertainty; a station that has none must have no difference.
func dense(e []float64, b uncertainty.Budget) (Joint, error) {
	if len(e) > MaxDense {
		return Joint{}, ErrSize
	}
	total := b.Total()
	if !finite(total) {
		return Joint{}, ErrFinite
	}
	var at []int
	for i, u := range total {
		switch {
		case u > 0:
			at = append(at, i)
		case e[i] != 0:
			return Joint{}, ErrRange
		}
	}
	if len(at) == 0 {
		return Joint{}, ErrRange
	}
	scaled := make([]float64, len(at))
	v := mat.NewSymDense(len(at), nil)
	for row, i := range at {
		scaled[row] = e[i] / total[i]
		v.SetSym(row, row, 1)
		for column := row + 1; column < len(at); column++ {
			j := at[column]
			sum := 0.0
			for _, c := range b.Common {
				sum += float64(c[i] / total[i] * (c[j] / total[j]))
			}
			v.SetSym(row, column, sum)
		}
	}
	if !finite(scaled) {
		return Joint{}, ErrFinite
	}
	return reduced(scaled, v)
}

// reduced returns the statistic on the eigenvectors of v that carry variance.
func reduced(e []float64, v *mat.SymDense) (Joint, error) {
	var eigen mat.EigenSym
	if !eigen.Factorize(v, true) {
		return Joint{}, ErrFinite
	}
	values := eigen.Values(nil)
	var vectors mat.Dense
	eigen.VectorsTo(&vectors)
	largest := values[len(e)-1]
	norm := 0.0
	for _, x := range e {
		norm += float64(x * x)
	}
	q, rank := 0.0, 0
	for k, value := range values {
		p := 0.0
		for i, x := range e {
			p += float64(vectors.At(i, k) * x)
		}
		if value > 1e-10*largest {
			q += float64(p*p) / value
			rank++
		} else if p*p > 1e-12*norm {
			return Joint{}, ErrRange
		}
	}
	return Joint{q, rank}, nil
}

// Split is the decomposition of the statistic into a common offset of E and
// the remainder.
type Split struct {
	Offset, U       float64 // generalised least squares estimate and its standard uncertainty
	Part, Remainder float64 // parts of the statistic, on 1 and n-1 degrees of freedom
}

// Offset fits E = a + rest by generalised least squares with the full V:
//
//	a = 1'V^-1 e / 1'V^-1 1,  u(a) = (1'V^-1 1)^-1/2,
//	part = (a/u(a))^2,  remainder = (e - a)' V^-1 (e - a).
//
// It needs an independent variance at every station, finite numbers, and two
// stations or more; else it is not ok.
func Offset(e []float64, b uncertainty.Budget) (Split, bool) {
	if len(e) < 2 || !independent(b) {
		return Split{}, false
	}
	one := uncertainty.Constant(len(e), 1)
	z, ok := commonPart(one, b)
	if !ok {
		return Split{}, false
	}
	information := quadratic(one, z, b)
	weighted := 0.0
	for s, v := range e {
		w := 1.0
		for i, c := range b.Common {
			w -= float64(c[s] * z[i])
		}
		weighted += float64(w*v) / b.Variance[s]
	}
	a := weighted / information
	rest := make([]float64, len(e))
	for i, v := range e {
		rest[i] = v - a
	}
	if z, ok = commonPart(rest, b); !ok {
		return Split{}, false
	}
	split := Split{
		Offset: a, U: 1 / math.Sqrt(information), Part: float64(a*a) * information,
		Remainder: quadratic(rest, z, b),
	}
	return split, finite([]float64{split.Offset, split.U, split.Part, split.Remainder})
}
