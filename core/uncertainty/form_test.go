package uncertainty

import (
	"math"
	"testing"
)

// The divisor of each form at 95 % and at its limits. Sources: JCGM 100:2008
// 4.3.7 and 4.3.9 for the square roots of 3 and 6 (clauses from memory), the
// density of the arc sine for the square root of 2; at 95 % the quantiles of
// these densities, worked by hand: 0.95 sqrt 3 = 1.6454, sqrt 6 (1 - sqrt .05) =
// 1.9018, sqrt 2 sin(85.5 degrees) = 1.409854; t of 2 degrees 4.303 (JCGM
// 100:2008 table G.2, from memory).
func TestDivisor(t *testing.T) {
	for _, c := range []struct {
		coverage string
		form     Distribution
		degrees  float64
		want     float64
	}{
		{"limits", "", 0, 1.7320508}, {"limits", Rectangular, 0, 1.7320508}, {"limits", Triangular, 0, 2.4494897}, {"limits", ArcSine, 0, 1.4142136},
		{"95 %", "", 0, 1.959964}, {"95 %", Normal, 0, 1.959964}, {"95 %", Rectangular, 0, 1.645448}, {"95 %", Triangular, 0, 1.901768}, {"95%", ArcSine, 0, 1.409854},
		{"95 %", Student, 2, 4.302653}, {"2", Triangular, 0, 2}, {"standard", Student, 3, 1},
	} {
		k, ok := Divisor(c.coverage, c.form, c.degrees)
		if !ok || math.Abs(k-c.want) > 1e-6 {
			t.Errorf("%s of %q: %v %v, want %v", c.coverage, c.form, k, ok, c.want)
		}
	}
	for _, c := range []struct {
		coverage string
		form     Distribution
		degrees  float64
	}{{"limits", Normal, 0}, {"limits", Student, 4}, {"95 %", Student, 0}, {"unknown", Triangular, 0}, {"", Rectangular, 0}, {"95 %", "cosine", 0}} {
		if k, ok := Divisor(c.coverage, c.form, c.degrees); ok {
			t.Errorf("%s of %q is taken as %v", c.coverage, c.form, k)
		}
	}
}

// The divisor makes the drawn variance: each form, sampled over its half-width,
// has the deviation half-width/divisor within four standard errors.
func TestDivisorAgainstDraws(t *testing.T) {
	for _, form := range []Distribution{Rectangular, Triangular, ArcSine} {
		k, _ := Divisor("limits", form, 0)
		in := Input{U: 1 / k, Distribution: form}
		g := NewGenerator(5)
		largest, x := 0.0, make([]float64, 100_000)
		for i := range x {
			x[i] = in.draw(g)
			largest = max(largest, math.Abs(x[i]))
		}
		_, s, _ := Replicates(x)
		if largest > 1+1e-12 || math.Abs(s*k-1) > 4*0.0025 {
			t.Errorf("%s: largest %v, deviation %v, want %v", form, largest, s, 1/k)
		}
	}
}
