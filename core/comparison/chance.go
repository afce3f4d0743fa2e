package comparison

import (
	"math"

	"gonum.org/v1/gonum/stat/distuv"

	"weirmark/core/uncertainty"
)

// Chance says how many stations lie beyond k u_val when only the stated errors
// are present.
type Chance struct {
	Expected float64 // correlation leaves it
	AtLeast  float64 // probability of the found number or more; correlation changes it
	Draws    int     // made for AtLeast
}

// The draws for a count: fewer for many stations, so that it stays seconds.
const (
	mostDraws   = 10_000
	fewestDraws = 100
	drawWork    = 100_000_000
)

// BeyondByChance returns the expected number of stations with |e| > k u under
// normal errors of covariance V, n P(|z| > k), and the probability of at least
// the found number by sampling with V from the seed. It fails with ErrFinite
// where V is not known.
func BeyondByChance(b uncertainty.Budget, k float64, found int, seed uint64) (Chance, error) {
	if err := usable(b); err != nil {
		return Chance{}, err
	}
	limit := b.Total()
	if !finite(limit) {
		return Chance{}, ErrFinite
	}
	n := len(limit)
	c := Chance{Draws: mostDraws}
	for i, u := range limit {
		if u > 0 {
			c.Expected += 2 * distuv.UnitNormal.Survival(k)
		}
		limit[i] = k * u
	}
	if work := n * (1 + len(b.Common) + len(b.Groups) + len(b.Markov)); work > drawWork/mostDraws {
		c.Draws = max(fewestDraws, drawWork/work)
	}
	draws := uncertainty.NewRealisation(b, seed)
	e := make([]float64, n)
	times := 0
	for range c.Draws {
		draws.Next(e)
		beyond := 0
		for i, v := range e {
			if math.Abs(v) > limit[i] {
				beyond++
			}
		}
		if beyond >= found {
			times++
		}
	}
	c.AtLeast = float64(times) / float64(c.Draws)
	return c, nil
}
