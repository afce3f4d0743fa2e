package refinement

import (
	"math"
	"slices"
	"testing"
)

// sine solves -u" = pi² sin(pi x), u(0) = u(1) = 0, by central differences on n
// intervals and returns the errors against sin(pi x) at the points from 0, each of
// which stands for one interval; at 0 and 1 the value is given. The manufactured
// problem and its solution are our own.
func sine(n int) []float64 {
	h := 1 / float64(n)
	c, d := make([]float64, n), make([]float64, n) // elimination of the tridiagonal system, 1 to n-1
	for i := 1; i < n; i++ {
		source := h * h * math.Pi * math.Pi * math.Sin(math.Pi*float64(i)*h)
		pivot := 2 + c[i-1]
		c[i], d[i] = -1/pivot, (source+d[i-1])/pivot
	}
	errors := make([]float64, n)
	u := 0.0
	for i := n - 1; i > 0; i-- {
		u = d[i] - c[i]*u
		errors[i] = u - math.Sin(math.Pi*float64(i)*h)
	}
	return errors
}

// TestVerifySecondOrder: the observed order of a second-order scheme on four
// grids is 2 within 0.05, in every norm (the tolerance of the design's check).
func TestVerifySecondOrder(t *testing.T) {
	var h, mean, rms, most []float64
	for _, n := range []int{16, 8, 64, 32} {
		norms := NormsOf(sine(n))
		h, mean, rms, most = append(h, 1/float64(n)), append(mean, norms.Mean), append(rms, norms.RMS), append(most, norms.Max)
	}
	for name, norms := range map[string][]float64{"mean": mean, "rms": rms, "largest": most} {
		v := Verify(h, norms)
		if math.Abs(v.Order-2) > 0.05 || len(v.Orders) != 3 || len(v.Notices) != 0 {
			t.Errorf("%s: %+v", name, v)
		}
		for _, p := range v.Orders {
			if math.Abs(p-2) > 0.05 {
				t.Errorf("%s: %v between neighbours", name, v.Orders)
			}
		}
	}
	// The same problem as a grid study of u(1/2), whose error is known.
	counts, values := []float64{8, 16, 32, 64}, make([]float64, 4)
	for i, n := range counts {
		values[i] = 1 + sine(int(n))[int(n)/2]
	}
	for _, rule := range []string{RuleThree, RuleLeastSquares} {
		r := Study(counts, values, 1, Options{Rule: rule, Formal: 2})
		if math.Abs(r.Order-2) > 0.05 || math.Abs(values[3]-1) > r.U {
			t.Errorf("%s: order %v, U %v for the error %v", rule, r.Order, r.U, values[3]-1)
		}
	}
}

func TestVerifyExact(t *testing.T) {
	v := Verify([]float64{4, 1, 2}, []float64{64, 1, 8})
	if math.Abs(v.Order-3) > 1e-12 || len(v.Orders) != 2 || math.Abs(v.Orders[0]-3) > 1e-12 {
		t.Errorf("%+v", v)
	}
	for what, norms := range map[string][]float64{"growing": {1, 2, 3}, "once growing": {4, 1, 2}, "equal": {2, 2, 1}, "zero": {2, 1, 0}, "unknown": {2, math.NaN(), 1}} {
		if v := Verify([]float64{3, 2, 1}, norms); !math.IsNaN(v.Order) || v.Orders != nil || !slices.Equal(codes(v.Notices), []string{"grid-verify-none"}) {
			t.Errorf("%s: %+v", what, v)
		}
	}
	for _, h := range [][]float64{nil, {1}, {1, 1}, {2, -1}} {
		if v := Verify(h, []float64{2, 1}[:len(h)]); !math.IsNaN(v.Order) || len(v.Notices) != 1 {
			t.Errorf("h %v: %+v", h, v)
		}
	}
}

func TestNorms(t *testing.T) {
	if n := NormsOf([]float64{3, -4, 0, 0}); n.Mean != 1.75 || n.RMS != 2.5 || n.Max != 4 {
		t.Errorf("%+v", n)
	}
	if n := NormsOf(nil); !math.IsNaN(n.Mean) || !math.IsNaN(n.RMS) || !math.IsNaN(n.Max) {
		t.Errorf("%+v", n)
	}
}
