package uncertainty

import (
	"math"
	"testing"
)

// mixed is a budget with every pattern, stations not in order.
func mixed() Budget {
	return Combine(6, []Source{
		{U: []float64{1, 1, 2, 1, 1, 0.5}},
		{U: []float64{1, -1, 0.5, 0, 2, 1}, Common: true},
		{U: []float64{1, 2, 1, 2, -1, 1}, Group: []int{5, 7, 5, 7, 7, 9}},
		{U: []float64{1, 1, 3, 1, 1, 2}, X: []float64{0, 2, 1, 5, 4, 4}, Length: 2},
	})
}

// TestPatterns: single elements of V by hand.
func TestPatterns(t *testing.T) {
	b := mixed()
	if len(b.Common) != 1 || len(b.Groups) != 1 || len(b.Markov) != 1 {
		t.Fatalf("%+v", b)
	}
	for _, row := range []struct {
		i, j int
		want float64
	}{
		{0, 0, 1 + 1 + 1 + 1},
		{0, 1, -1 + math.Exp(-1)},
		{0, 2, 0.5 + 1 + 3*math.Exp(-0.5)},
		{1, 4, -2 - 2 + math.Exp(-1)},
		{4, 5, 2 + 2},
		{5, 5, 0.25 + 1 + 1 + 4},
	} {
		if got, back := b.Covariance(row.i, row.j), b.Covariance(row.j, row.i); math.Abs(got-row.want) > 1e-14 || got != back {
			t.Errorf("V_%d%d %v, %v, want %v", row.i, row.j, got, back, row.want)
		}
	}
	for i, u := range b.Total() {
		if math.Abs(u*u-b.Covariance(i, i)) > 1e-13 {
			t.Errorf("total %v at %d, variance %v", u, i, b.Covariance(i, i))
		}
	}
	rows := []int{4, 0, 2}
	part := b.At(rows)
	for k, i := range rows {
		for l, j := range rows {
			if part.Covariance(k, l) != b.Covariance(i, j) {
				t.Errorf("part %d, %d: %v, whole %v", k, l, part.Covariance(k, l), b.Covariance(i, j))
			}
		}
	}
}

// TestRealisationHasTheCovariance: of 200,000 draws, within four standard errors
// of a covariance of normal errors, sqrt((V_ii V_jj + V_ij^2)/N).
func TestRealisationHasTheCovariance(t *testing.T) {
	const draws = 200_000
	b := mixed()
	b.Markov = append(b.Markov, Markov{U: Constant(6, 1), X: []float64{0, 1, 2, 3, 4, 5}, Length: inf})
	r := NewRealisation(b, 12)
	n := len(b.Variance)
	e, products := make([]float64, n), make([]float64, n*n)
	for range draws {
		r.Next(e)
		for i := range n {
			for j := range n {
				products[i*n+j] += e[i] * e[j]
			}
		}
	}
	for i := range n {
		for j := range n {
			want := b.Covariance(i, j)
			limit := 4 * math.Sqrt((b.Covariance(i, i)*b.Covariance(j, j)+want*want)/draws)
			if got := products[i*n+j] / draws; math.Abs(got-want) > limit {
				t.Errorf("V_%d%d: drawn %v, want %v", i, j, got, want)
			}
		}
	}
}
