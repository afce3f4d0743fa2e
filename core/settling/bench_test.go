package settling

import "testing"

// BenchmarkJudge100k judges a monitor of 100,000 rows: start-up, cycle, drift
// and correlation time.
func BenchmarkJudge100k(b *testing.B) {
	const n = 100_000
	s := Series{Value: plus(sine(n, 1, 0.01, 140.3), 1e-3, markov(generator(1), 0.9, n))}
	b.ReportAllocs()
	for b.Loop() {
		if m := Judge(s, Options{}); m.Class != Cycling {
			b.Fatal(m.Class)
		}
	}
}
