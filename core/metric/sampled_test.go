package metric

import (
	"math"
	"testing"

	"weirmark/core/uncertainty"
)

// The mean of one common error is that error: its size has mean u √(2/π), 95 %
// of it lies below 1.959964 u, and the bias itself spreads by u (solvable).
func TestSampleOfCommonError(t *testing.T) {
	n := 24
	b := uncertainty.Combine(n, []uncertainty.Source{{U: uncertainty.Constant(n, .02), Common: true}})
	s, ok := Sample(make([]float64, n), b, 1)
	if !ok || s.Draws != 2000 {
		t.Fatalf("%+v, %v", s, ok)
	}
	near(t, "u of the bias", s.Bias.U, .02, 3*.02/math.Sqrt(2*2000))
	near(t, "floor of the bias", s.Bias.Floor, .02*math.Sqrt(2/math.Pi), 3*.02*.6028/math.Sqrt(2000))
	near(t, "95 % point of the floor", s.Bias.FloorHi, .02*1.959964, .02*.15)
	near(t, "floor of the RMSE", s.RMSE.Floor, s.Bias.Floor, 1e-15)
}

// The RMSE of n independent errors is u √(χ²(n)/n): for n = 100 its mean is
// 0.997503 u and its 95 % point 1.115088 u (from Γ(50.5)/Γ(50) √(2/100) and the
// point 124.342113 of scipy.stats.chi2).
func TestPureNoiseStaysAtItsFloor(t *testing.T) {
	n, u := 100, 3.0
	b := uncertainty.Combine(n, []uncertainty.Source{{U: uncertainty.Constant(n, u)}})
	s, _ := Sample(make([]float64, n), b, 2)
	near(t, "floor", s.RMSE.Floor, .997503*u, .01*u)
	near(t, "95 % point", s.RMSE.FloorHi, 1.115088*u, .015*u)
	above := 0
	draws := uncertainty.NewRealisation(b, 77)
	e := make([]float64, n)
	for range 400 {
		draws.Next(e)
		if Summarise(e).RMSE > s.RMSE.FloorHi {
			above++
		}
	}
	if above < 6 || above > 40 { // 20 expected, 4.4 standard deviation
		t.Errorf("%d of 400 pieces of pure noise lie above the 95 %% point of the floor", above)
	}
	for i := range e {
		e[i] = 5 * u
	}
	if Summarise(e).RMSE <= s.RMSE.FloorHi {
		t.Error("an offset of five u does not rise above the floor")
	}
}

func TestSampleRefuses(t *testing.T) {
	if _, ok := Sample(nil, uncertainty.Combine(0, nil), 1); ok {
		t.Error("no stations were sampled")
	}
	if _, ok := Sample([]float64{1}, uncertainty.Combine(1, []uncertainty.Source{{U: []float64{math.NaN()}}}), 1); ok {
		t.Error("an unknown uncertainty was sampled")
	}
}
