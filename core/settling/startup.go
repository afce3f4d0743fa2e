package settling

import (
	"math"

	"weirmark/core/quantity"
)

// StartUp returns how many of the first values belong to the start-up: the d
// that makes sum_{i>=d} (y_i - mean)^2/(n-d)^2 least (the smallest such d),
// searched with at least a tenth of the values, and five, left behind. Where
// d lies in the second half the record is too short for the rule: ok is
// false. Linear in len(y). Source: White, Simulation 69 (1997) 323 (MSER).
func StartUp(y []float64) (d int, ok bool) {
	n := len(y)
	keep := max(5, n/10)
	if n < 2*keep {
		return 0, false
	}
	best := 0.
	m, squares := 0., 0.
	for i := n - 1; i >= 0; i-- {
		left := float64(n - i)
		off := y[i] - m
		m += off / left
		squares += float64(off * (y[i] - m))
		if n-i < keep {
			continue
		}
		// Equal but for rounding counts as equal, and then the longer record wins.
		if objective := squares / (left * left); n-i == keep || objective <= best*(1+1e-9) {
			best, d = objective, i
		}
	}
	return d, 2*d <= n
}

// begin returns the first row that is judged: the declared one, or that behind
// the start-up, of which ok says whether it could be told (else the second half
// is taken). At least 20 rows are left where the rule decides; a declared start
// may leave fewer.
func (r record) begin(opt Options) (from int, ok bool) {
	n := len(r.y)
	if opt.Declared {
		at := math.Ceil(quantity.Round((opt.Start-r.start)/r.step, 10))
		return int(min(max(at, 0), float64(n))), true
	}
	from, ok = StartUp(r.y)
	if !ok {
		from = n / 2
	}
	return min(from, n-leastRows), ok
}

// startWords names what ends the start-up.
func (o Options) startWords() string {
	if o.Declared {
		return "the declared start"
	}
	return "the start-up"
}
