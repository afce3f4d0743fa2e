package comparison

import (
	"errors"
	"math"
	"math/rand/v2"
	"runtime"
	"testing"

	"gonum.org/v1/gonum/mat"

	"weirmark/core/uncertainty"
)

// scattered returns n stations out of order, uncertainties and differences.
func scattered(n int, seed uint64) (x, u, e []float64) {
	random := rand.New(rand.NewPCG(seed, 7))
	x, u, e = make([]float64, n), make([]float64, n), make([]float64, n)
	for i := range n {
		x[i] = 10 * random.Float64()
		u[i] = 0.5 + random.Float64()
		e[i] = 2 * random.NormFloat64()
	}
	return x, u, e
}

// signed gives every second value a minus.
func signed(u []float64) []float64 {
	out := make([]float64, len(u))
	for i, v := range u {
		out[i] = v
		if i%2 == 1 {
			out[i] = -v
		}
	}
	return out
}

// labels spreads n stations over groups.
func labels(n, groups, step int) []int {
	out := make([]int, n)
	for i := range out {
		out[i] = 100 - (i*step)%groups
	}
	return out
}

// TestPatternsEqualDense: 300 stations of every pattern and of their mixtures
// against the Cholesky factor of the full matrix, which is written out element
// by element. 1e-10 of the statistic: conditions are below 1e5.
func TestPatternsEqualDense(t *testing.T) {
	const n = 300
	x, u, e := scattered(n, 1)
	s := make([]float64, n)
	for i, v := range x {
		s[i] = math.Sin(v)
	}
	independent := uncertainty.Source{U: u}
	common := uncertainty.Source{U: uncertainty.Constant(n, 3), Common: true}
	scale := uncertainty.Source{U: signed(u), Common: true}
	length := func(l float64) uncertainty.Source {
		return uncertainty.Source{U: signed(u), X: x, Length: l}
	}
	group := func(groups, step int) uncertainty.Source {
		return uncertainty.Source{U: u, Group: labels(n, groups, step)}
	}
	for _, row := range []struct {
		name    string
		sources []uncertainty.Source
	}{
		{"independent", []uncertainty.Source{independent}},
		{"common", []uncertainty.Source{independent, common, scale}},
		{"length", []uncertainty.Source{independent, length(2)}},
		{"length with no independent part", []uncertainty.Source{length(0.5)}},
		{"length below every distance", []uncertainty.Source{independent, length(1e-9)}},
		{"length above every distance", []uncertainty.Source{independent, length(1e6)}},
		{"infinite length", []uncertainty.Source{independent, length(math.Inf(1))}},
		{"two lengths", []uncertainty.Source{independent, length(0.3), length(5)}},
		{"two lengths with no independent part", []uncertainty.Source{length(0.3), length(5)}},
		{"length and common", []uncertainty.Source{independent, length(2), common, scale}},
		{"groups", []uncertainty.Source{independent, group(40, 1)}},
		{"one group", []uncertainty.Source{independent, group(1, 1)}},
		{"groups of one", []uncertainty.Source{independent, group(n, 1)}},
		{"groups and common", []uncertainty.Source{independent, group(40, 1), common}},
		{"nested groups", []uncertainty.Source{independent, group(60, 1), group(6, 1)}},
		{"crossed groups", []uncertainty.Source{independent, group(7, 1), group(30, 11)}},
		{"groups and length", []uncertainty.Source{independent, group(8, 1), length(2)}},
		{"everything", []uncertainty.Source{independent, common, scale, group(40, 1), group(6, 1), length(2)}},
		{"more crossed groups than columns: dense", []uncertainty.Source{independent, group(100, 1), group(90, 7)}},
	} {
		b := uncertainty.Combine(n, row.sources)
		v := mat.NewSymDense(n, nil)
		for i := range n {
			for j := i; j < n; j++ {
				v.SetSym(i, j, b.Covariance(i, j))
			}
		}
		var chol mat.Cholesky
		if !chol.Factorize(v) {
			t.Fatalf("%s: the full matrix is not positive definite", row.name)
		}
		inner := func(a, b []float64) float64 {
			x := mat.NewVecDense(n, nil)
			if err := chol.SolveVecTo(x, mat.NewVecDense(n, b)); err != nil {
				t.Fatal(err)
			}
			return mat.Dot(mat.NewVecDense(n, a), x)
		}
		q, err := Statistic(e, b)
		if want := inner(e, e); err != nil || q.Rank != n || !near(q.Statistic, want, 1e-10) {
			t.Errorf("%s: %+v, %v, want %v", row.name, q, err, want)
		}
		r, err := Whiten(e, b)
		if err != nil || !near(dot(r.Whitened, r.Whitened), q.Statistic, 1e-13) {
			t.Errorf("%s: residuals make %v, %v, want %v", row.name, dot(r.Whitened, r.Whitened), err, q.Statistic)
		}
		d, ok := Decompose(e, s, b)
		if row.name == "more crossed groups than columns: dense" {
			if ok {
				t.Errorf("%s: decomposed %+v", row.name, d)
			}
			continue
		}
		one := uncertainty.Constant(n, 1)
		a11, a12, a22, b1, b2 := inner(one, one), inner(one, s), inner(s, s), inner(one, e), inner(s, e)
		det := a11*a22 - a12*a12
		want := []float64{(a22*b1 - a12*b2) / det, math.Sqrt(a22 / det), (a11*b2 - a12*b1) / det, math.Sqrt(a11 / det), -a12 / math.Sqrt(a11*a22), b1 * b1 / a11}
		got := []float64{d.Offset, d.UOffset, d.Scale, d.UScale, d.Correlation, d.OffsetPart}
		for i := range got {
			if !ok || math.Abs(got[i]-want[i]) > 1e-9*max(math.Abs(want[i]), 1e-3) {
				t.Errorf("%s: decomposition %v, want %v", row.name, got, want)
				break
			}
		}
		if sum := d.OffsetPart + d.ScalePart + d.ShapePart; !near(sum, q.Statistic, 1e-12) {
			t.Errorf("%s: parts sum to %v, want %v", row.name, sum, q.Statistic)
		}
		if !near(inner(d.Shape, d.Shape), d.ShapePart, 1e-9) || d.ShapeDegrees != n-2 {
			t.Errorf("%s: shape makes %v on %d, want %v", row.name, inner(d.Shape, d.Shape), d.ShapeDegrees, d.ShapePart)
		}
	}
}

// TestPatternsRefuse: what cannot be treated at this size, and what is unknown.
func TestPatternsRefuse(t *testing.T) {
	n := MaxDense + 1
	x, u, e := scattered(n, 2)
	backwards := make([]float64, n)
	for i, v := range x {
		backwards[i] = -v * v * math.Sin(v)
	}
	one := uncertainty.Constant(n, 1)
	twice := append([]float64{}, x...)
	twice[1] = twice[0]
	for _, row := range []struct {
		name string
		b    uncertainty.Budget
		want error
	}{
		{"crossed groups", uncertainty.Budget{Variance: one, Groups: []uncertainty.Grouped{{U: u, Label: labels(n, 200, 1)}, {U: u, Label: labels(n, 199, 1)}}}, ErrPattern},
		{"many groups beside a length", uncertainty.Budget{Variance: one, Groups: []uncertainty.Grouped{{U: u, Label: labels(n, 200, 1)}}, Markov: []uncertainty.Markov{{U: u, X: x, Length: 1}}}, ErrPattern},
		{"two lengths along different lines", uncertainty.Budget{Variance: one, Markov: []uncertainty.Markov{{U: u, X: x, Length: 1}, {U: u, X: backwards, Length: 1}}}, ErrPattern},
		{"groups without an independent part", uncertainty.Budget{Variance: make([]float64, n), Groups: []uncertainty.Grouped{{U: u, Label: labels(n, 200, 1)}}}, ErrSize},
		{"a length without an independent part, two stations in one place", uncertainty.Budget{Variance: make([]float64, n), Markov: []uncertainty.Markov{{U: u, X: twice, Length: 1}}}, ErrSize},
		{"unknown group part", uncertainty.Budget{Variance: one, Groups: []uncertainty.Grouped{{U: uncertainty.Constant(n, math.NaN()), Label: labels(n, 2, 1)}}}, ErrFinite},
		{"unknown position", uncertainty.Budget{Variance: one, Markov: []uncertainty.Markov{{U: u, X: uncertainty.Constant(n, math.NaN()), Length: 1}}}, ErrFinite},
		{"no length", uncertainty.Budget{Variance: one, Markov: []uncertainty.Markov{{U: u, X: x}}}, ErrFinite},
		{"groups cross up to the columns", uncertainty.Budget{Variance: one, Groups: []uncertainty.Grouped{{U: u, Label: labels(n, 200, 1)}, {U: u, Label: labels(n, MaxColumns, 1)}}}, nil},
		{"nothing but a length", uncertainty.Budget{Variance: make([]float64, n), Markov: []uncertainty.Markov{{U: u, X: x, Length: 1}}}, nil},
	} {
		if q, err := Statistic(e, row.b); !errors.Is(err, row.want) {
			t.Errorf("%s: %+v, %v, want %v", row.name, q, err, row.want)
		}
	}
}

// TestSameReadingTwice: J2. Where two rows are one reading, merged or not, the
// statistic and its rank are those of the reading alone.
func TestSameReadingTwice(t *testing.T) {
	x, e := []float64{0, 1, 2, 1}, []float64{0.5, -1, 2, -1}
	u := []float64{1, 2, 1, 2}
	rows := Distinct(x, e, u)
	if len(rows) != 3 || rows[2] != 2 {
		t.Fatalf("%v", rows)
	}
	b := uncertainty.Combine(4, []uncertainty.Source{{U: u, X: x, Length: 1}, {U: uncertainty.Constant(4, 0.5), Common: true}})
	all, err := Statistic(e, b)
	if err != nil {
		t.Fatal(err)
	}
	alone, err := Statistic(e[:3], b.At(rows))
	if err != nil || all.Rank != 3 || alone.Rank != 3 || !near(all.Statistic, alone.Statistic, 1e-10) {
		t.Errorf("%+v, merged %+v, %v", all, alone, err)
	}
	if c, err := Condition(b); err != nil || !c.Dense || c.Rank != 3 || len(c.Eigenvalues) != 4 || math.Abs(c.Eigenvalues[0]) > 1e-14 {
		t.Errorf("%+v, %v", c, err)
	}
}

func TestDistinct(t *testing.T) {
	nan := math.NaN()
	for _, row := range []struct {
		name    string
		columns [][]float64
		want    int
	}{
		{"no columns", nil, 0},
		{"equal values at different places", [][]float64{{1, 2}, {5, 5}}, 2},
		{"different values at one place", [][]float64{{1, 1}, {5, 6}}, 2},
		{"one reading three times", [][]float64{{1, 1, 1}, {5, 5, 5}}, 1},
		{"both zeros are zero", [][]float64{{0, math.Copysign(0, -1)}}, 1},
		{"unknown is never the same", [][]float64{{nan, nan}}, 2},
	} {
		if got := Distinct(row.columns...); len(got) != row.want {
			t.Errorf("%s: %v", row.name, got)
		}
	}
}

// TestCondition: 1 + n c^2/u^2 for one common source.
func TestCondition(t *testing.T) {
	if c, err := Condition(budget(24, []float64{0.5}, []float64{1})); err != nil || c.Dense || c.Rank != 24 || c.Condition != 1 {
		// One column: the matrix is one number.
		t.Errorf("%+v, %v", c, err)
	}
	b := budget(24, []float64{0.5}, []float64{1})
	b.Common = append(b.Common, signed(b.Common[0]))
	b.Common[1] = append([]float64{}, b.Common[1]...)
	for i := range b.Common[1] {
		b.Common[1][i] *= 0.5
	}
	if c, err := Condition(b); err != nil || math.Abs(c.Condition-(1+24*4)/(1+24.)) > 1e-12 {
		t.Errorf("%+v, %v", c, err)
	}
	if c, err := Condition(budget(3, []float64{1}, nil)); err != nil || c.Condition != 1 {
		t.Errorf("%+v, %v", c, err)
	}
	if c, err := Condition(uncertainty.Budget{Variance: []float64{math.NaN()}}); !errors.Is(err, ErrFinite) {
		t.Errorf("%+v, %v", c, err)
	}
}

// BenchmarkPatterns1M: the statistic of 1,000,000 stations with eight common
// sources, with groups of ten, and with a correlation length.
func BenchmarkPatterns1M(b *testing.B) {
	s, d, _ := million()
	e := Error(s, d)
	x, label := make([]float64, len(e)), make([]int, len(e))
	for i := range x {
		x[i], label[i] = float64(i)/float64(len(e)), i/10
	}
	independent := uncertainty.Source{U: uncertainty.Constant(len(e), 0.004)}
	common := []uncertainty.Source{independent}
	for k := range 8 {
		c := make([]float64, len(e))
		for i := range c {
			c[i] = 0.01 * math.Cos(float64(k)*x[i])
		}
		common = append(common, uncertainty.Source{U: c, Common: true})
	}
	for _, row := range []struct {
		name    string
		sources []uncertainty.Source
	}{
		{"EightCommon", common},
		{"Groups", []uncertainty.Source{independent, {U: independent.U, Group: label}}},
		{"Length", []uncertainty.Source{independent, {U: independent.U, X: x, Length: 0.01}}},
	} {
		v := uncertainty.Combine(len(e), row.sources)
		b.Run(row.name, func(b *testing.B) {
			for b.Loop() {
				if q, err := Statistic(e, v); err != nil || !(q.Statistic > 0) {
					b.Fatal(q, err)
				}
			}
		})
	}
}

// TestLinearInStations: ten times the stations with eight common sources take
// no more than ten times the memory: nothing grows with their square. The time
// is measured by BenchmarkPatterns1M.
func TestLinearInStations(t *testing.T) {
	bytes := func(n int) uint64 {
		_, u, e := scattered(n, 4)
		var common [][]float64
		for range 8 {
			common = append(common, u)
		}
		var before, after runtime.MemStats
		runtime.ReadMemStats(&before)
		if _, err := Statistic(e, uncertainty.Budget{Variance: u, Common: common}); err != nil {
			t.Fatal(err)
		}
		runtime.ReadMemStats(&after)
		return after.TotalAlloc - before.TotalAlloc
	}
	few, many := bytes(10_000), bytes(100_000)
	if few == 0 || many > 11*few {
		t.Errorf("%d bytes for 10,000 stations, %d for 100,000", few, many)
	}
}
