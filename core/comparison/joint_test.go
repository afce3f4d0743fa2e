package comparison

import (
	"encoding/csv"
	"encoding/json"
	"errors"
	"math"
	"math/rand/v2"
	"os"
	"path/filepath"
	"slices"
	"strconv"
	"strings"
	"testing"

	"gonum.org/v1/gonum/mat"
	"pgregory.net/rapid"

	"weirmark/core/internal/reference"
	"weirmark/core/uncertainty"
)

func published(t *testing.T, name string) []byte {
	t.Helper()
	data, err := os.ReadFile(filepath.Join(reference.Root(t), "testdata", "published", name))
	if err != nil {
		t.Fatal(err)
	}
	return data
}

// near compares to a relative tolerance; zero stands for less than 1e-13, as
// joint.json writes what is only rounding there.
func near(got, want, tolerance float64) bool {
	return math.Abs(got-want) <= tolerance*math.Abs(want)+1e-13
}

// budget makes sources of one uncertainty for all stations.
func budget(n int, independent, common []float64) uncertainty.Budget {
	var sources []uncertainty.Source
	for _, u := range independent {
		sources = append(sources, uncertainty.Source{U: uncertainty.Constant(n, u)})
	}
	for _, u := range common {
		sources = append(sources, uncertainty.Source{U: uncertainty.Constant(n, u), Common: true})
	}
	return uncertainty.Combine(n, sources)
}

// factored writes a full covariance as common sources: the columns of its
// Cholesky factor, with no independent variance.
func factored(t *testing.T, covariance [][]float64) uncertainty.Budget {
	n := len(covariance)
	v := mat.NewSymDense(n, slices.Concat(covariance...))
	var chol mat.Cholesky
	if !chol.Factorize(v) {
		t.Fatal("the covariance is not positive definite")
	}
	var l mat.TriDense
	chol.LTo(&l)
	b := uncertainty.Budget{Variance: make([]float64, n)}
	for j := range n {
		column := make([]float64, n)
		for i := j; i < n; i++ {
			column[i] = l.At(i, j)
		}
		b.Common = append(b.Common, column)
	}
	return b
}

// TestJointAgainstNumpy: every case of testdata/published/joint.json, made by
// dense linear algebra in numpy (versions and sources in the file).
func TestJointAgainstNumpy(t *testing.T) {
	var document struct {
		Cases []struct {
			Name, Source string
			E            []float64
			Statistic    float64
			N            int     `json:"degrees_of_freedom"`
			Tail         float64 `json:"tail"`
			Point        float64 `json:"point_95"`
			Offset       float64
			UOffset      float64   `json:"u_offset"`
			Part         float64   `json:"statistic_offset"`
			Remainder    float64   `json:"statistic_remainder"`
			Independent  []float64 `json:"u_independent"`
			Common       []float64 `json:"u_common"`
			Covariance   [][]float64
		}
	}
	if err := json.Unmarshal(published(t, "joint.json"), &document); err != nil {
		t.Fatal(err)
	}
	if len(document.Cases) != 10 {
		t.Fatalf("%d cases, want 10", len(document.Cases))
	}
	// The file has 12 digits and its statistics are conditioned like V: 1e-10.
	const tolerance = 1e-10
	for _, c := range document.Cases {
		b := budget(len(c.E), c.Independent, c.Common)
		if c.Covariance != nil {
			b = factored(t, c.Covariance)
		}
		q, err := Statistic(c.E, b)
		if err != nil || q.Rank != c.N || !near(q.Statistic, c.Statistic, tolerance) || !near(q.P(), c.Tail, 1e-9) {
			t.Errorf("%s: %+v, tail %v, %v, want %v on %d, tail %v (%s)", c.Name, q, q.P(), err, c.Statistic, c.N, c.Tail, c.Source)
		}
		if point := ChiSquare95(c.N); !near(point, c.Point, tolerance) {
			t.Errorf("%s: 95 %% point %v, want %v", c.Name, point, c.Point)
		}
		s, ok := Offset(c.E, b)
		if c.Covariance != nil {
			if ok {
				t.Errorf("%s: an offset without an independent variance", c.Name)
			}
			continue
		}
		if !ok || !near(s.Offset, c.Offset, tolerance) || !near(s.U, c.UOffset, tolerance) || !near(s.Part, c.Part, tolerance) || !near(s.Remainder, c.Remainder, tolerance) {
			t.Errorf("%s: %+v, %v, want %v ± %v, %v + %v", c.Name, s, ok, c.Offset, c.UOffset, c.Part, c.Remainder)
		}
		if !near(s.Part+s.Remainder, q.Statistic, 1e-13) {
			t.Errorf("%s: parts %v and %v do not make %v", c.Name, s.Part, s.Remainder, q.Statistic)
		}
	}
}

// TestChiSquareAgainstScipy: tails and 95 % points of distributions.csv.
func TestChiSquareAgainstScipy(t *testing.T) {
	reader := csv.NewReader(strings.NewReader(string(published(t, "distributions.csv"))))
	reader.Comment = '#'
	rows, err := reader.ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	number := func(text string) float64 {
		v, err := strconv.ParseFloat(text, 64)
		if err != nil {
			t.Fatal(err)
		}
		return v
	}
	tails, points := 0, 0
	for _, row := range rows[1:] {
		if !strings.HasPrefix(row[0], "chi2-") {
			continue
		}
		argument, nu, want := number(row[1]), int(number(row[2])), number(row[3])
		switch {
		case row[0] == "chi2-tail":
			// 1e-11: the file has 12 digits.
			if got := (Joint{argument, nu}).P(); !near(got, want, 1e-11) {
				t.Errorf("tail of %v on %d: %v, want %v", argument, nu, got, want)
			}
			tails++
		case argument == 0.95:
			if got := ChiSquare95(nu); !near(got, want, 1e-11) {
				t.Errorf("95 %% point on %d: %v, want %v", nu, got, want)
			}
			points++
		}
	}
	if tails != 42 || points != 12 {
		t.Errorf("%d tails and %d points were checked, want 42 and 12", tails, points)
	}
}

// TestPrintedChiSquare: the printed table (values from memory, published-examples
// section 7) to its three decimals.
func TestPrintedChiSquare(t *testing.T) {
	for n, want := range map[int]float64{1: 3.841, 2: 5.991, 3: 7.815, 5: 11.070, 10: 18.307, 30: 43.773} {
		if got := ChiSquare95(n); math.Abs(got-want) > 0.0005 {
			t.Errorf("95 %% point on %d: %v, want %v", n, got, want)
		}
	}
}

// TestWoodburyEqualsDense: 300 stations, five common sources from weak to far
// stronger than the independent part, against the Cholesky factor of the full
// matrix. 1e-10: the condition of that matrix is about 1e5.
func TestWoodburyEqualsDense(t *testing.T) {
	const n = 300
	random := rand.New(rand.NewPCG(20, 26))
	for _, strength := range []float64{0, 0.01, 1, 10} {
		b := uncertainty.Budget{Variance: make([]float64, n)}
		e := make([]float64, n)
		for i := range n {
			u := 0.5 + random.Float64()
			b.Variance[i] = u * u
			e[i] = random.NormFloat64() + 2*strength
		}
		for range 5 {
			c := make([]float64, n)
			for i := range n {
				c[i] = strength * (1 + 0.5*random.NormFloat64())
			}
			b.Common = append(b.Common, c)
		}
		v := mat.NewSymDense(n, nil)
		for i := range n {
			for j := i; j < n; j++ {
				sum := 0.0
				for _, c := range b.Common {
					sum += c[i] * c[j]
				}
				if i == j {
					sum += b.Variance[i]
				}
				v.SetSym(i, j, sum)
			}
		}
		var chol mat.Cholesky
		if !chol.Factorize(v) {
			t.Fatal("the full matrix is not positive definite")
		}
		solve := func(right []float64) []float64 {
			x := mat.NewVecDense(n, nil)
			if err := chol.SolveVecTo(x, mat.NewVecDense(n, right)); err != nil {
				t.Fatal(err)
			}
			return x.RawVector().Data
		}
		dot := func(a, b []float64) float64 {
			return mat.Dot(mat.NewVecDense(n, a), mat.NewVecDense(n, b))
		}
		q, err := Statistic(e, b)
		if want := dot(e, solve(e)); err != nil || q.Rank != n || !near(q.Statistic, want, 1e-10) {
			t.Errorf("strength %v: %+v, %v, want %v", strength, q, err, want)
		}
		one := uncertainty.Constant(n, 1)
		weight := dot(one, solve(one))
		offset := dot(one, solve(e)) / weight
		s, ok := Offset(e, b)
		if !ok || !near(s.Offset, offset, 1e-10) || !near(s.U, 1/math.Sqrt(weight), 1e-10) {
			t.Errorf("strength %v: %+v, want %v ± %v", strength, s, offset, 1/math.Sqrt(weight))
		}
		// The dense way of this package, on the same matrix.
		if d, err := dense(e, b); err != nil || d.Rank != n || !near(d.Statistic, q.Statistic, 1e-10) {
			t.Errorf("strength %v: dense %+v, %v, want %+v", strength, d, err, q)
		}
	}
}

// TestStatisticNeedsNoUnit: another unit for all stations, or another order of
// them, changes nothing.
func TestStatisticNeedsNoUnit(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		n := rapid.IntRange(1, 12).Draw(t, "stations")
		values := rapid.SliceOfN(rapid.Float64Range(-10, 10), n, n)
		e := values.Draw(t, "e")
		u := rapid.SliceOfN(rapid.Float64Range(0.1, 10), n, n).Draw(t, "u")
		c := values.Draw(t, "common")
		unit := rapid.Float64Range(1e-6, 1e6).Draw(t, "unit")
		turn := func(in []float64, factor float64) []float64 {
			out := make([]float64, n)
			for i, v := range in {
				out[n-1-i] = v * factor
			}
			return out
		}
		statistic := func(e, u, c []float64) Joint {
			q, err := Statistic(e, uncertainty.Combine(n, []uncertainty.Source{{U: u}, {U: c, Common: true}}))
			if err != nil {
				t.Fatal(err)
			}
			return q
		}
		q := statistic(e, u, c)
		again := statistic(turn(e, unit), turn(u, unit), turn(c, unit))
		if again.Rank != q.Rank || !near(again.Statistic, q.Statistic, 1e-10) {
			t.Errorf("%+v, then %+v", q, again)
		}
		if plain := statistic(e, u, make([]float64, n)); q.Statistic > plain.Statistic*(1+1e-12)+1e-12 {
			t.Errorf("a common source raised the statistic from %v to %v", plain.Statistic, q.Statistic)
		}
	})
}

// TestWithoutIndependentPart: what the dense way does where V is singular or
// nearly so.
func TestWithoutIndependentPart(t *testing.T) {
	three := []float64{3, 3, 3}
	for _, row := range []struct {
		name      string
		e         []float64
		b         uncertainty.Budget
		want      Joint
		err       error
		tolerance float64
	}{
		{"one common source and equal differences: one degree of freedom",
			[]float64{2, 2, 2}, budget(3, nil, []float64{0.5}), Joint{16, 1}, nil, 1e-12},
		{"a common source in proportion",
			[]float64{2, 4, 6}, uncertainty.Budget{Variance: []float64{0, 0, 0}, Common: [][]float64{{1, 2, 3}}}, Joint{4, 1}, nil, 1e-12},
		{"differences that the common source cannot make",
			[]float64{2, 2, 2.001}, budget(3, nil, []float64{0.5}), Joint{}, ErrRange, 0},
		{"the same reading twice counts once: (1, 2, 2) is (1, 2)",
			[]float64{1, 2, 2}, uncertainty.Budget{Variance: []float64{0.25, 0, 0}, Common: [][]float64{{0, 0.5, 0.5}}}, Joint{20, 2}, nil, 1e-12},
		{"one station without an independent part",
			[]float64{1, 1}, uncertainty.Budget{Variance: []float64{0.36, 0}, Common: [][]float64{{0.8, 0.8}}}, Joint{1 / 0.64, 2}, nil, 1e-12},
		{"no uncertainty and no difference: left out",
			[]float64{1, 0}, uncertainty.Budget{Variance: []float64{0.25, 0}}, Joint{4, 1}, nil, 1e-12},
		{"no uncertainty and a difference",
			[]float64{1, 1e-9}, uncertainty.Budget{Variance: []float64{0.25, 0}}, Joint{}, ErrRange, 0},
		{"no uncertainty anywhere",
			[]float64{0, 0}, uncertainty.Budget{Variance: []float64{0, 0}}, Joint{}, ErrRange, 0},
		{"uncertainties of very different size all count: 4 + 9 on the first two",
			[]float64{2, 3e-8, 0}, uncertainty.Budget{Variance: []float64{1, 1e-16, 0}}, Joint{13, 2}, nil, 1e-12},
		{"opposite signs of one common source",
			[]float64{3, -3, 3}, uncertainty.Budget{Variance: []float64{0, 0, 0}, Common: [][]float64{{1, -1, 1}}}, Joint{9, 1}, nil, 1e-12},
		{"unknown difference", []float64{1, math.NaN()}, budget(2, []float64{1}, nil), Joint{}, ErrFinite, 0},
		{"unknown variance", []float64{1, 1}, uncertainty.Budget{Variance: []float64{1, math.NaN()}}, Joint{}, ErrFinite, 0},
		{"unknown common part", three, uncertainty.Budget{Variance: three, Common: [][]float64{{1, math.NaN(), 1}}}, Joint{}, ErrFinite, 0},
		{"infinite common part", three, uncertainty.Budget{Variance: three, Common: [][]float64{{1, math.Inf(1), 1}}}, Joint{}, ErrFinite, 0},
		{"a square that overflows", three, uncertainty.Budget{Variance: three, Common: [][]float64{{1, 1e200, 1}}}, Joint{}, ErrFinite, 0},
		{"a square that overflows, dense", three, uncertainty.Budget{Variance: []float64{0, 1, 1}, Common: [][]float64{{1, 1e200, 1}}}, Joint{}, ErrFinite, 0},
		{"a difference whose square overflows", []float64{1e200, 1}, budget(2, []float64{1}, nil), Joint{}, ErrFinite, 0},
	} {
		got, err := Statistic(row.e, row.b)
		if !errors.Is(err, row.err) || got.Rank != row.want.Rank || !near(got.Statistic, row.want.Statistic, row.tolerance) {
			t.Errorf("%s: %+v, %v, want %+v, %v", row.name, got, err, row.want, row.err)
		}
	}
}

func TestDenseIsBounded(t *testing.T) {
	n := MaxDense + 1
	if _, err := Statistic(make([]float64, n), budget(n, nil, []float64{1})); !errors.Is(err, ErrSize) {
		t.Errorf("%v, want %v", err, ErrSize)
	}
	if _, err := Statistic(make([]float64, n), budget(n, []float64{1}, []float64{1})); err != nil {
		t.Errorf("with an independent part: %v", err)
	}
}

func TestOffsetRefuses(t *testing.T) {
	for _, row := range []struct {
		name string
		e    []float64
		b    uncertainty.Budget
	}{
		{"one station", []float64{1}, budget(1, []float64{1}, nil)},
		{"no station", nil, uncertainty.Budget{}},
		{"no independent part", []float64{1, 2}, budget(2, nil, []float64{1})},
		{"unknown variance", []float64{1, 2}, uncertainty.Budget{Variance: []float64{1, math.NaN()}}},
		{"unknown common part", []float64{1, 2}, uncertainty.Budget{Variance: []float64{1, 1}, Common: [][]float64{{1, math.NaN()}}}},
		{"unknown difference", []float64{1, math.NaN()}, budget(2, []float64{1}, nil)},
	} {
		if s, ok := Offset(row.e, row.b); ok {
			t.Errorf("%s: %+v", row.name, s)
		}
	}
}
