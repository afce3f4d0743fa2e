package uncertainty

import (
	"math"
	"testing"

	"gonum.org/v1/gonum/stat/distuv"
)

// TestGeneratorBits: the first numbers of seed 20, computed in Python integers
// from the published recurrence of the generator (PCG-DXSM, 128 bits of state).
// They hold in every host and for good: a stored result depends on them.
func TestGeneratorBits(t *testing.T) {
	g := NewGenerator(20)
	for i, want := range []float64{0.49315809402658284, 0.588438891877544, 0.9457548380520123} {
		if got := g.Uniform(); got != want {
			t.Errorf("number %d: %v, want %v", i, got, want)
		}
	}
}

// TestGeneratorRepeats: same seed, same draws; another seed, others.
func TestGeneratorRepeats(t *testing.T) {
	a, b, c := NewGenerator(1), NewGenerator(1), NewGenerator(2)
	for range 1000 {
		x, y, z := a.Normal(), b.Normal(), c.Normal()
		if x != y || x == z {
			t.Fatalf("%v, %v, %v", x, y, z)
		}
	}
}

// TestDrawsFollowTheirDistribution: Kolmogorov's distance of 100,000 draws from
// the distribution function. 1.95/sqrt n is exceeded once in a thousand seeds
// (asymptotic formula, from memory); the seed is fixed.
func TestDrawsFollowTheirDistribution(t *testing.T) {
	const n = 100_000
	student := func(nu float64) func(float64) float64 { return distuv.StudentsT{Sigma: 1, Nu: nu}.CDF }
	rectangle := func(half float64) func(float64) float64 {
		return func(x float64) float64 { return min(max((x+half)/(2*half), 0), 1) }
	}
	for _, row := range []struct {
		name string
		draw func(g *Generator) float64
		cdf  func(float64) float64
	}{
		{"uniform", (*Generator).Uniform, rectangle(1)},
		{"normal", (*Generator).Normal, distuv.UnitNormal.CDF},
		{"t of 1", func(g *Generator) float64 { return g.Student(1) }, student(1)},
		{"t of 4", func(g *Generator) float64 { return g.Student(4) }, student(4)},
		{"t of 4.5", func(g *Generator) float64 { return g.Student(4.5) }, student(4.5)},
		{"t of 1e6", func(g *Generator) float64 { return g.Student(1e6) }, distuv.UnitNormal.CDF},
		{"t of infinity", func(g *Generator) float64 { return g.Student(inf) }, distuv.UnitNormal.CDF},
		{"rectangular", Input{Value: 3, U: 2, Distribution: Rectangular}.draw, func(x float64) float64 { return rectangle(2 * math.Sqrt(3))(x - 3) }},
		{"triangular", Input{U: 1, Distribution: Triangular}.draw, func(x float64) float64 {
			z := min(max(x/math.Sqrt(6), -1), 1)
			if z < 0 {
				return (1 + z) * (1 + z) / 2
			}
			return 1 - (1-z)*(1-z)/2
		}},
		{"arc sine", Input{U: 1, Distribution: ArcSine}.draw, func(x float64) float64 {
			return 0.5 + math.Asin(min(max(x/math.Sqrt2, -1), 1))/math.Pi
		}},
		{"Student", Input{Value: 1, U: 2, Distribution: Student, Degrees: 3}.draw, func(x float64) float64 { return student(3)((x - 1) / 2) }},
		{"two-piece", Input{Value: 1, Distribution: Split, Sides: TwoPiece{1, 3}}.draw, func(x float64) float64 {
			if x < 1 {
				return 2. / 4 * distuv.UnitNormal.CDF(x-1)
			}
			return 1. / 4 * (1 + 3*(2*distuv.UnitNormal.CDF((x-1)/3)-1))
		}},
	} {
		g := NewGenerator(7)
		x := make([]float64, n)
		for i := range x {
			x[i] = row.draw(g)
			if row.name == "uniform" {
				x[i] = 2*x[i] - 1
			}
		}
		x, _ = sorted(x)
		distance := 0.0
		for i, v := range x {
			f := row.cdf(v)
			distance = max(distance, math.Abs(f-float64(i)/n), math.Abs(f-float64(i+1)/n))
		}
		if distance > 1.95/math.Sqrt(n) {
			t.Errorf("%s: distance %v", row.name, distance)
		}
	}
}
