package uncertainty

import (
	"errors"
	"math"
	"testing"
)

// TestReduceCp: the sources of Cp at four taps against the derivatives, and
// their covariance against that of draws.
func TestReduceCp(t *testing.T) {
	p := []float64{-420, 12, 300, 580}
	uP := []float64{3, 3, 2, 4}
	pRef, uRef, q, uQ := 12.0, 2.0, 574.7, 10.0
	shared := []Input{{Value: pRef, U: uRef, Distribution: Normal}, {Value: q, U: uQ, Distribution: Normal}}
	r, err := Reduce(PressureCoefficient, []Column{{p, uP}}, shared)
	if err != nil || len(r.Sources) != 3 || r.Sources[0].Common || !r.Sources[1].Common || !r.Sources[2].Common {
		t.Fatalf("%+v, %v", r, err)
	}
	for i := range p {
		cp := (p[i] - pRef) / q
		if math.Abs(r.Values[i]-cp) > 1e-15 {
			t.Errorf("Cp %v, want %v", r.Values[i], cp)
		}
		// The slope in q over a 64th of u is off by (u/64 q)^2 = 7e-8 of it.
		for k, want := range []float64{uP[i] / q, -uRef / q, -cp * uQ / q} {
			if got := r.Sources[k].U[i]; math.Abs(got-want) > 1e-7*math.Abs(want)+1e-15 {
				t.Errorf("source %d at %d: %v, want %v", k, i, got, want)
			}
		}
	}
	b := Combine(len(p), r.Sources)

	const draws = 200_000
	g := NewGenerator(11)
	n := len(p)
	sums, products := make([]float64, n), make([]float64, n*n)
	for range draws {
		ref, dynamic := shared[0].draw(g), shared[1].draw(g)
		cp := make([]float64, n)
		for i := range p {
			cp[i] = PressureCoefficient([]float64{p[i] + uP[i]*g.Normal(), ref, dynamic}) - r.Values[i]
			sums[i] += cp[i]
		}
		for i := range n {
			for j := range n {
				products[i*n+j] += cp[i] * cp[j]
			}
		}
	}
	for i := range n {
		for j := range n {
			got := products[i*n+j]/draws - sums[i]*sums[j]/draws/draws
			// Four standard errors of a covariance, sqrt(2/N) of the product.
			if limit := 4 * math.Sqrt(2./draws) * b.Total()[i] * b.Total()[j]; math.Abs(got-b.Covariance(i, j)) > limit {
				t.Errorf("V_%d%d: drawn %v, of the sources %v", i, j, got, b.Covariance(i, j))
			}
		}
	}
}

func TestReduceRefuses(t *testing.T) {
	shared := []Input{{Value: 0, U: 1, Distribution: Normal}, {Value: 0, U: 1, Distribution: Normal}}
	if _, err := Reduce(PressureCoefficient, []Column{{[]float64{1}, []float64{1}}}, shared); !errors.Is(err, ErrModel) {
		t.Errorf("q = 0: %v", err)
	}
	if _, err := Reduce(sum, []Column{{[]float64{1, 2}, []float64{1}}}, nil); !errors.Is(err, ErrInput) {
		t.Errorf("columns of different length: %v", err)
	}
	if _, err := Reduce(sum, []Column{{[]float64{1}, []float64{nan}}}, nil); !errors.Is(err, ErrInput) {
		t.Errorf("an unknown uncertainty: %v", err)
	}
	// The sign of an error of one station says nothing.
	r, err := Reduce(func(x []float64) float64 { return -x[0] }, []Column{{[]float64{1}, []float64{2}}}, nil)
	if err != nil || !same(r.Sources[0].U, []float64{2}, 1e-14) {
		t.Errorf("%+v, %v", r, err)
	}
}
