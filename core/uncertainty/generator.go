package uncertainty

import (
	"math"
	"math/rand/v2"
)

// Generator draws random numbers from a seed. The bits come from the permuted
// congruential generator of math/rand/v2; what is made of them is here, so that
// the same seed gives the same numbers in every host: rejection is decided on
// sums and products only, and what uses logarithms depends on them without a
// step.
type Generator struct {
	bits     *rand.PCG
	spare    float64
	hasSpare bool
}

// NewGenerator returns the generator of a seed.
func NewGenerator(seed uint64) *Generator {
	return &Generator{bits: rand.NewPCG(seed, 0x776569726d61726b)}
}

// Uniform returns a number between 0 and 1, both excluded.
func (g *Generator) Uniform() float64 { return (float64(g.bits.Uint64()>>12) + 0.5) * 0x1p-52 }

// disc returns a point of the unit disc and the square w of its distance from
// the centre, 0 < w < 1.
func (g *Generator) disc() (x, y, w float64) {
	for {
		x, y = float64(2*g.Uniform())-1, float64(2*g.Uniform())-1
		w = float64(x*x) + float64(y*y)
		if 0 < w && w < 1 {
			return x, y, w
		}
	}
}

// Normal returns a draw of the normal distribution of mean 0 and deviation 1 by
// the polar method (Marsaglia and Bray 1964; from memory).
func (g *Generator) Normal() float64 {
	if g.hasSpare {
		g.hasSpare = false
		return g.spare
	}
	x, y, w := g.disc()
	r := math.Sqrt(-2 * math.Log(w) / w)
	g.spare, g.hasSpare = y*r, true
	return x * r
}

// Student returns a draw of Student's distribution of nu > 0 degrees of freedom
// by the polar method of Bailey (Mathematics of Computation 62, 1994; from
// memory); +Inf gives the normal distribution.
func (g *Generator) Student(nu float64) float64 {
	if math.IsInf(nu, 1) {
		return g.Normal()
	}
	x, _, w := g.disc()
	return x * math.Sqrt(nu*math.Expm1(-2/nu*math.Log(w))/w)
}
