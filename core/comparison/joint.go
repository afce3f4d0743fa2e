package comparison

import (
	"errors"
	"math"

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
func ChiSquare95(n int) float64 { return ChiSquare(0.95, n) }

// ChiSquare returns the value that a chi-square variable on n degrees of
// freedom lies below with probability p.
func ChiSquare(p float64, n int) float64 { return distuv.ChiSquared{K: float64(n)}.Quantile(p) }

// Statistic returns e' V^-1 e for the covariance V of b, as the squared length
// of the whitened e: linear in the number of stations where every station has a
// variance that the patterns leave it. Otherwise V is made dense, scaled to the
// unit diagonal so that a few small uncertainties do not pass for none, and
// reduced to its rank (eigenvalues below 1e-10 of the largest count as zero).
// See whitening for the sources.
//
// It fails with ErrRange, ErrSize, ErrPattern or ErrFinite. There must be a
// station.
func Statistic(e []float64, b uncertainty.Budget) (Joint, error) {
	if !finite(e) {
		return Joint{}, ErrFinite
	}
	w, err := newWhitening(b)
	if err != nil {
		return Joint{}, err
	}
	return w.joint(e)
}

// joint returns the statistic of e.
func (w *whitening) joint(e []float64) (Joint, error) {
	if err := w.reaches(e); err != nil {
		return Joint{}, err
	}
	y := w.apply(e)
	q := dot(y, y)
	if !finite([]float64{q}) {
		return Joint{}, ErrFinite
	}
	return Joint{q, w.rank()}, nil
}

func dot(a, b []float64) float64 {
	sum := 0.0
	for i, v := range a {
		sum += float64(v * b[i])
	}
	return sum
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
// It needs a variance of its own at every station, finite numbers, and two
// stations or more; else it is not ok.
func Offset(e []float64, b uncertainty.Budget) (Split, bool) {
	if len(e) < 2 || !finite(e) {
		return Split{}, false
	}
	w, err := newWhitening(b)
	if err != nil || w.root != nil {
		return Split{}, false
	}
	one, y := w.apply(uncertainty.Constant(len(e), 1)), w.apply(e)
	information := dot(one, one)
	a := dot(one, y) / information
	remainder := 0.0
	for i, v := range y {
		rest := v - float64(a*one[i])
		remainder += float64(rest * rest)
	}
	split := Split{Offset: a, U: 1 / math.Sqrt(information), Part: float64(a*a) * information, Remainder: remainder}
	return split, finite([]float64{split.Offset, split.U, split.Part, split.Remainder})
}
