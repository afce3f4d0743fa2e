package flow

import (
	"math"
	"testing"

	"pgregory.net/rapid"
)

// TestJets: half at the half width (the definition), and the published
// constants of the laminar jet: u_max = 0.4543 (K^2/(nu x))^(1/3), argument
// 0.2752 (K/nu^2)^(1/3) y/x^(2/3), from memory with four digits.
func TestJets(t *testing.T) {
	check(t, []printed{
		{"plane-jet-turbulent", nil, 0, 1, 0},
		{"plane-jet-turbulent", nil, 1, 0.5, 1e-15},
		{"plane-jet-turbulent", nil, -1, 0.5, 1e-15},
		{"plane-jet-spread", map[string]float64{"S": 0.1, "x0/d": -5}, 25, 3, 1e-14},
		{"plane-jet-laminar", map[string]float64{"K": 1, "nu": 1, "x": 1}, 0, 0.4543, 5e-5},
		{"plane-jet-laminar", map[string]float64{"K": 1, "nu": 1, "x": 1}, 1 / 0.2752, 0.4543 / math.Cosh(1) / math.Cosh(1), 1e-4},
	})
}

// TestLaminarJet: the momentum flow is K at every x, and the volume flow
// 3.3019 (K nu x)^(1/3) (published, from memory), by a sum over even stations
// out to where the profile has ended (exact to rounding for sech^2).
func TestLaminarJet(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		k := math.Pow(10, rapid.Float64Range(-6, 2).Draw(t, "log K"))
		nu := math.Pow(10, rapid.Float64Range(-6, -2).Draw(t, "log nu"))
		x := rapid.Float64Range(0.01, 10).Draw(t, "x")
		width := math.Cbrt(48 * nu * nu * x * x / k)
		const n, far = 800, 40.0
		h := far * width / n
		momentum, volume := 0.0, 0.0
		for i := -n / 2; i <= n/2; i++ {
			u := bickley(k, nu, x, float64(i)*h)
			momentum += u * u * h
			volume += u * h
		}
		if math.Abs(momentum/k-1) > 1e-11 || math.Abs(volume/math.Cbrt(k*nu*x)-3.3019) > 5e-5 {
			t.Fatalf("momentum %v of %v, volume %v", momentum, k, volume/math.Cbrt(k*nu*x))
		}
	})
}

// TestMixingLayer: the streams far out, their mean in the middle, and the
// vorticity thickness from the steepest slope of the profile.
func TestMixingLayer(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		r, sigma := rapid.Float64Range(0, 0.95).Draw(t, "r"), rapid.Float64Range(9, 13.5).Draw(t, "sigma0")
		p := []float64{r, sigma}
		laws := mixingLaws()
		u := func(y float64) float64 { return laws[0].at(p, y) }
		if math.Abs(u(0)-(1+r)/2) > 1e-15 || u(10) != 1 || math.Abs(u(-10)-r) > 1e-15 {
			t.Fatalf("streams %v, %v, middle %v", u(-10), u(10), u(0))
		}
		h := 1e-3 / spread(sigma, r) // the difference is short by (1e-3)^2/3
		slope := (u(h) - u(-h)) / (2 * h)
		if got, want := laws[1].at(p, 1), (1-r)/slope; math.Abs(got/want-1) > 1e-6 {
			t.Fatalf("thickness %v, by slope %v", got, want)
		}
	})
	// By hand: sigma 11, slow stream at rest: sqrt(pi)/11 of the distance.
	check(t, []printed{{"mixing-layer-thickness", map[string]float64{"U2/U1": 0, "sigma0": 11}, 2, 2 * 1.7724538509055159 / 11, 1e-15}})
}
