package uncertainty

import "testing"

func TestBasis(t *testing.T) {
	// 3-bad-inputs row 49: 0.25 % of 2500 Pa is 6.25 Pa, of a reading of 120 Pa 0.3 Pa.
	if got := OfFullScale(2, 0.0025, 2500); !same(got, []float64{6.25, 6.25}, 1e-15) {
		t.Errorf("full scale: %v", got)
	}
	if got := OfReading([]float64{120, -120}, 0.0025); !same(got, []float64{0.3, 0.3}, 1e-15) {
		t.Errorf("reading: %v", got)
	}
	if got := OfFullScale(1, 0.01, -50); !same(got, []float64{0.5}, 1e-15) {
		t.Errorf("a range below zero: %v", got)
	}
	// 5 drag counts of 0.0001; 2 steps of 12 bits over 2500 Pa.
	if got := OfCounts(1, 5, 0.0001); !same(got, []float64{0.0005}, 1e-15) {
		t.Errorf("drag counts: %v", got)
	}
	if got := OfCounts(1, 2, 2500./4096); !same(got, []float64{1.220703125}, 1e-15) {
		t.Errorf("converter: %v", got)
	}
	scale := OfScale([]float64{-2, 0, 10, nan}, 0.05)
	if !scale.Common || !same(scale.U, []float64{-0.1, 0, 0.5, nan}, 1e-15) {
		t.Errorf("scale: %+v", scale)
	}
	// One unknown factor: stations of opposite sign are fully anticorrelated.
	b := Combine(4, []Source{scale})
	if got := b.Covariance(0, 2); !same([]float64{got}, []float64{-0.05}, 1e-15) {
		t.Errorf("covariance %v", got)
	}
}
