package comparison

import (
	"math"
	"testing"

	"weirmark/core/metric"
)

// million returns simulation, data and uncertainty at 1,000,000 stations, as
// testdata/bench/bench.py makes them but for the interpolation.
func million() (s, d, u []float64) {
	const stations = 1_000_000
	s, d, u = make([]float64, stations), make([]float64, stations), make([]float64, stations)
	for i := range stations {
		x := float64(i) / stations
		s[i] = math.Sin(7 * x)
		d[i] = s[i] + 0.01*math.Cos(41*x)
		u[i] = 0.004
	}
	return s, d, u
}

// BenchmarkPointwise1M makes what a pointwise comparison states: differences,
// ratios, their summary and both counts.
func BenchmarkPointwise1M(b *testing.B) {
	s, d, u := million()
	b.ReportAllocs()
	for b.Loop() {
		e := Error(s, d)
		ratio := Ratio(e, u)
		if m := metric.Summarise(e); m.N != len(s) || !(m.MaxAbs > 0.0099) {
			b.Fatalf("%+v", m)
		}
		if one, two := metric.Within(ratio, 1), metric.Within(ratio, 2); !(0 < one && one < two && two < len(s)) {
			b.Fatalf("%d within 1, %d within 2", one, two)
		}
	}
}

// BenchmarkJoint1M makes the joint statistic with one common source, and its
// offset.
func BenchmarkJoint1M(b *testing.B) {
	s, d, _ := million()
	e := Error(s, d)
	v := budget(len(e), []float64{0.004}, []float64{0.02})
	b.ReportAllocs()
	for b.Loop() {
		q, err := Statistic(e, v)
		split, ok := Offset(e, v)
		if err != nil || !ok || !near(split.Part+split.Remainder, q.Statistic, 1e-9) {
			b.Fatalf("%+v, %v, %+v", q, err, split)
		}
	}
}
