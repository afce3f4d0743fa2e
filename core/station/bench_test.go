package station

import (
	"math"
	"testing"

	"weirmark/core/interpolate"
)

// million returns a curve of 1,000,000 rows and as many stations, both sorted,
// that interleave without coinciding.
func million() (x, y, at []float64) {
	const rows = 1_000_000
	x, y, at = make([]float64, rows), make([]float64, rows), make([]float64, rows)
	for i := range rows {
		x[i] = float64(i) / rows
		y[i] = math.Sin(7 * x[i])
	}
	last := (rows - 1 + 0.37) / rows
	for i := range rows {
		at[i] = (float64(i) + 0.37) / rows * (x[rows-1] / last)
	}
	return x, y, at
}

func benchmarkResample(b *testing.B, m interpolate.Method) {
	x, y, at := million()
	b.ReportAllocs()
	for b.Loop() {
		if r := Resample("s", "x", x, y, at, Options{Method: m}); len(r.Kept) != len(at) {
			b.Fatalf("%d stations kept, notices %v", len(r.Kept), r.Notices)
		}
	}
}

func BenchmarkResample1MLinear(b *testing.B)   { benchmarkResample(b, interpolate.Linear) }
func BenchmarkResample1MMonotone(b *testing.B) { benchmarkResample(b, interpolate.Monotone) }
