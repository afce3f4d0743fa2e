package uncertainty

import (
	"testing"

	"pgregory.net/rapid"
)

// TestSensitivities: exact for a linear simulation, and central for a parabola.
func TestSensitivities(t *testing.T) {
	linear := func(x float64) []float64 { return []float64{3 * x, 5 - 2*x} }
	if got := OneSided(linear(4), linear(4.5), 0.5); !same(got, []float64{3, -2}, 1e-15) {
		t.Errorf("one-sided: %v", got)
	}
	if got := OneSided(linear(4), linear(3.5), -0.5); !same(got, []float64{3, -2}, 1e-15) {
		t.Errorf("one-sided, down: %v", got)
	}
	if got := Central([]float64{3 * 3}, []float64{5 * 5}, 1); !same(got, []float64{8}, 1e-15) {
		t.Errorf("x^2 at 4: %v", got)
	}
}

// TestSharedInputCancels: Q4, failure of counting a shared input twice. S and D
// with the same sensitivity leave nothing of it; published-examples section 2
// (from memory, derivable): ((dS/dx - dD/dx) u)^2.
func TestSharedInputCancels(t *testing.T) {
	if got := OfInput([]float64{2, 3}, []float64{2, 3}, 0.5); !got.Common || !same(got.U, []float64{0, 0}, 0) {
		t.Errorf("cancels: %+v", got)
	}
	if got := OfInput([]float64{2, -3}, []float64{1, 1}, 0.5); !same(got.U, []float64{0.5, -2}, 1e-15) {
		t.Errorf("difference: %+v", got)
	}
	if got := OfInput([]float64{2, -3}, nil, 0.5); !same(got.U, []float64{1, -1.5}, 1e-15) {
		t.Errorf("of the simulation only: %+v", got)
	}
}

// TestMembersMakeSampleCovariance: the sources of runs have the sample
// covariance of the runs at any two stations.
func TestMembersMakeSampleCovariance(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		m, n := rapid.IntRange(2, 8).Draw(t, "runs"), rapid.IntRange(1, 5).Draw(t, "stations")
		runs := make([][]float64, m)
		for k := range runs {
			runs[k] = rapid.SliceOfN(rapid.Float64Range(-10, 10), n, n).Draw(t, "run")
		}
		mean, sources, ok := OfMembers(runs)
		if !ok || len(sources) != m {
			t.Fatal(ok, len(sources))
		}
		b := Combine(n, sources)
		for i := range n {
			for j := range n {
				want := 0.0
				for _, run := range runs {
					want += (run[i] - mean[i]) * (run[j] - mean[j]) / float64(m-1)
				}
				// Sums of products below 400 in another order.
				if got := b.Covariance(i, j); got-want > 1e-12 || want-got > 1e-12 {
					t.Errorf("V_%d%d %v, want %v", i, j, got, want)
				}
			}
			column := make([]float64, m)
			for k, run := range runs {
				column[k] = run[i]
			}
			plain, s, _ := Replicates(column)
			if !same([]float64{mean[i]}, []float64{plain}, 1e-13) && plain != mean[i] {
				t.Errorf("mean %v, want %v", mean[i], plain)
			}
			if got := b.Total()[i]; got-s > 1e-12 || s-got > 1e-12 {
				t.Errorf("u %v, want %v", got, s)
			}
		}
	})
	if _, _, ok := OfMembers([][]float64{{1}}); ok {
		t.Error("one run has a scatter")
	}
}

// TestBounds: intervals in, an interval out: |2| 0.1 + |-3| 0.2.
func TestBounds(t *testing.T) {
	if got := Bounds([][]float64{{2, 0}, {-3, 1}}, []float64{0.1, 0.2}); !same(got, []float64{0.8, 0.2}, 1e-15) {
		t.Error(got)
	}
}
