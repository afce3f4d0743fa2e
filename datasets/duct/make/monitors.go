package main

import (
	"math"
	"strconv"
)

// history says how a monitor behaves.
type history struct {
	iterations int
	drift      float64 // fraction per 200 iterations at the end
	cycle      float64 // half-range of a cycle of 140 iterations, a fraction
}

// monitors writes P7: every second iteration of every run, and what enters and
// leaves the runs of C3. The monitor of C2-A-G2 is lost.
func (d delivery) monitors() {
	seed := uint64(700)
	for m, model := range models {
		for g, grid := range grids {
			seed += 10
			d["first/"+runName("C1", model, grid)+".mon"] = monitor(seed, "Cd", "Cl", dragC1[m][g]-dragSlope*angleLack, liftC1[m][g]-liftSlope*angleLack, history{iterations: 600})
			if !(model == "A" && grid == "G2") {
				h := history{iterations: 600}
				if model == "A" && grid == "G4" {
					h = history{iterations: 1200, cycle: .011}
				}
				d["first/"+runName("C2", model, grid)+".mon"] = monitor(seed+1, "Cd", "Cl", dragC2[m][g], liftC2[m][g], h)
			}
			d["first/"+runName("C3", model, grid)+".mon"] = monitor(seed+2, "x_r/H", "Cf_min", reattachment[m][g], frictionMin[m][g], history{iterations: 600})
			out := 13.3487 * (1 + 2e-5*float64(g-2) + 1e-5*float64(m))
			if model == "B" && grid == "G3" {
				d["second/"+runName("C3", model, grid)+".flux"] = flux(out)
				out = 13.3487 * (1 - .013)
			}
			d["first/"+runName("C3", model, grid)+".flux"] = flux(out)
		}
	}
	// The first upload of C1-B-G4 still drifts; the second has settled.
	d["first/C1-B-G4.mon"] = monitor(750, "Cd", "Cl", driftDrag, liftC1[1][3]-liftSlope*angleLack, history{iterations: 600, drift: -.006})
	d["second/C1-B-G4.mon"] = monitor(751, "Cd", "Cl", dragC1[1][3], liftC1[1][3], history{iterations: 600})
}

// flux is the mass that enters and leaves a run.
func flux(out float64) []byte {
	return []byte("in[kg/s] out[kg/s]\n13.34870 " + fixed(out, 5) + "\n")
}

// monitor is the history of two quantities that end at the given values, with
// a residual.
func monitor(seed uint64, first, second string, a, b float64, h history) []byte {
	t := newTable(" ", "iter "+first+" "+second+" residual")
	r := rng(seed)
	for it := 2; it <= h.iterations; it += 2 {
		n := float64(it)
		start := math.Exp(-n/38) * math.Cos(n/27)
		swing := h.cycle * math.Sin(2*math.Pi*n/140)
		slide := h.drift * (n - float64(h.iterations)) / 200
		va := a * (1 + 0.35*start + swing + slide + 4e-6*r.NormFloat64())
		vb := b * (1 - 0.28*start + 0.8*swing + 4e-6*r.NormFloat64())
		residual := math.Max(1e-6, 3e-2*math.Exp(-n/45)) * math.Exp(0.15*r.NormFloat64())
		t.row(integer(it), significant(va), significant(vb), strconv.FormatFloat(residual, 'e', 1, 64))
	}
	return t.Bytes()
}

// significant writes six digits.
func significant(v float64) string { return strconv.FormatFloat(v, 'f', digitsBehind(v), 64) }

func digitsBehind(v float64) int {
	n := 5
	for w := math.Abs(v); w < 1 && n < 9; w *= 10 {
		n++
	}
	return n
}
