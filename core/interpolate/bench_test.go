package interpolate

import (
	"math"
	"testing"
)

// BenchmarkLinear1M brings a curve of 1,000,000 points to as many stations
// that interleave with it: the kernel alone, the input of testdata/bench/bench.py.
func BenchmarkLinear1M(b *testing.B) {
	const points = 1_000_000
	x, y, at, s := make([]float64, points), make([]float64, points), make([]float64, points), make([]float64, points)
	for i := range points {
		x[i] = float64(i) / points
		y[i] = math.Sin(7 * x[i])
	}
	for i := range points {
		at[i] = (float64(i) + 0.37) / points * (x[points-1] / ((points - 1 + 0.37) / points))
	}
	b.ReportAllocs()
	for b.Loop() {
		if err := At(s, x, y, at, Linear); err != nil {
			b.Fatal(err)
		}
	}
}
