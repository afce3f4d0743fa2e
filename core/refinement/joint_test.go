package refinement

import (
	"math"
	"slices"
	"testing"
)

// TestSteps: the order in time of two schemes for y' = -y to t = 1, whose
// amplification is known: first order by backward differences, second by the
// trapezium (observed order within 0.05).
func TestSteps(t *testing.T) {
	for _, row := range []struct {
		what  string
		order float64
		grow  func(dt float64) float64
	}{
		{"backward", 1, func(dt float64) float64 { return 1 / (1 + dt) }},
		{"trapezium", 2, func(dt float64) float64 { return (1 - dt/2) / (1 + dt/2) }},
	} {
		steps, values := []float64{.04, .02, .01}, make([]float64, 3)
		for i, dt := range steps {
			values[i] = math.Pow(row.grow(dt), math.Round(1/dt))
		}
		r := Steps(steps, values, Options{Formal: row.order})
		if e := values[2] - math.Exp(-1); r.Class != Monotone || math.Abs(r.Order-row.order) > 0.05 || math.Abs(r.R21-2) > 1e-12 || math.Abs(e) > r.U {
			t.Errorf("%s: error %v, %+v", row.what, e, r)
		}
	}
	if r := Steps([]float64{0, -1, 2}, []float64{1, 2, 3}, Options{}); r.Class != Insufficient {
		t.Errorf("%+v", r)
	}
}

// TestJoint: values f0 + a h² + b dt give back their parts, and U 1.25 times
// the sum of their sizes.
func TestJoint(t *testing.T) {
	var counts, steps, values []float64
	for _, h := range []float64{1, 2, 4} {
		for _, dt := range []float64{.1, .2} {
			counts, steps, values = append(counts, 6.4e5/(h*h*h)), append(steps, dt), append(values, 7+.03*h*h-4*dt)
		}
	}
	j := Joint(counts, steps, values, 3, 2, 1)
	if math.Abs(j.Extrapolated-7) > 1e-12 || math.Abs(j.Space-.03) > 1e-12 || math.Abs(j.Time+.4) > 1e-12 || math.Abs(j.U-1.25*.43) > 1e-12 || j.Used != 6 || j.Scatter > 1e-12 {
		t.Errorf("%+v", j)
	}
	// A wrong order leaves scatter, which U counts.
	if wrong := Joint(counts, steps, values, 3, 1, 1); wrong.Scatter < 1e-3 || math.Abs(wrong.U-1.25*(math.Abs(wrong.Space)+math.Abs(wrong.Time))-wrong.Scatter) > 1e-12 {
		t.Errorf("%+v", wrong)
	}
	for _, row := range []struct {
		what                  string
		counts, steps, values []float64
		dim                   int
		code                  string
	}{
		{"three runs", counts[:3], steps[:3], values[:3], 3, "grid-joint-few"},
		{"a step of zero", counts[:4], []float64{.1, .2, 0, .1}, values[:4], 3, "grid-joint-few"},
		{"step in proportion", []float64{8, 4, 2, 1}, []float64{1, 2, 4, 8}, []float64{1, 2, 3, 4}, 1, "grid-joint-tied"},
		{"one step", counts[:4], []float64{1, 1, 1, 1}, values[:4], 3, "grid-joint-tied"},
		{"four dimensions", counts, steps, values, 4, "grid-dimension"},
	} {
		q := 1.0
		j := Joint(row.counts, row.steps, row.values, row.dim, 1, q)
		if !math.IsNaN(j.U) || !math.IsNaN(j.Space) || !slices.Equal(codes(j.Notices), []string{row.code}) {
			t.Errorf("%s: %+v", row.what, j)
		}
	}
}

// TestRoundOff: the floor of a pair, here one sum in single and in double
// precision, and the doubt where it reaches the difference of grids.
func TestRoundOff(t *testing.T) {
	f := RoundOff([]float64{1, 2, math.NaN(), 4}, []float64{1.03, 1.96, 3, 4})
	if math.Abs(f.Max-.04) > 1e-12 || math.Abs(f.RMS-math.Sqrt(.0025/3)) > 1e-12 {
		t.Errorf("%+v", f)
	}
	if none := RoundOff([]float64{math.NaN()}, []float64{1}); !math.IsNaN(none.Max) || none.Doubt(Three(pressureCounts, pressureValues, 2, Options{})) != nil {
		t.Errorf("%+v", none)
	}
	single, double := float32(0), 0.0
	for i := 1; i <= 10000; i++ {
		single, double = single+1/float32(i), double+1/float64(i)
	}
	floor := RoundOff([]float64{float64(single)}, []float64{double})
	if !(floor.Max > 1e-6 && floor.Max < 1e-3) {
		t.Errorf("a sum of 10000 in single precision is off by %v", floor.Max)
	}
	near := Three([]float64{16, 4, 1}, []float64{double, double + floor.Max, double + 5*floor.Max}, 2, Options{})
	far := Three([]float64{16, 4, 1}, []float64{double, double + 3*floor.Max, double + 15*floor.Max}, 2, Options{})
	if !slices.Equal(codes(floor.Doubt(near)), []string{"grid-noise"}) || floor.Doubt(far) != nil {
		t.Errorf("near %v, far %v", floor.Doubt(near), floor.Doubt(far))
	}
}
