package settling

import (
	"encoding/binary"
	"math"
	"slices"
	"testing"

	"pgregory.net/rapid"

	"weirmark/core/notice"
)

// sound holds a judgement to what must be true of any. It returns what is not.
func sound(s Series, m Monitor) string {
	switch {
	case !slices.Contains([]Class{Settled, Drifting, Cycling, Stalled, Unsteady, Short, Broken}, m.Class):
		return "class"
	case m.Rule == "":
		return "no rule"
	case math.IsNaN(m.U) && !notice.Any(m.Notices, notice.Stop) && !notice.Any(m.Notices, notice.Ask):
		return "no u and no reason"
	case math.IsInf(m.U, 0) || m.U < 0:
		return "u"
	case (m.Class == Drifting) != notice.Has(m.Notices, "monitor-drift"):
		return "drift without its notice, or the notice without a drift"
	case m.Class == Drifting && !math.IsNaN(m.U):
		return "a drift with a u"
	case (m.Class == Cycling) != (notice.Has(m.Notices, "monitor-cycle") || notice.Has(m.Notices, "monitor-cycle-shrinking")):
		return "cycle without its notice"
	case math.IsNaN(m.Period) != (m.Cycles == 0) && m.Class != Drifting && m.Class != Short:
		return "cycles without a period"
	}
	if m.Class == Broken || math.IsNaN(m.Mean) {
		if m.Class != Broken && m.Class != Short {
			return "no mean"
		}
		return ""
	}
	lo, hi := math.Inf(1), math.Inf(-1)
	for _, v := range s.Value {
		if usable(v) {
			lo, hi = min(lo, v), max(hi, v)
		}
	}
	slack := 1e-12 * max(math.Abs(lo), math.Abs(hi))
	switch {
	case m.Mean < lo-slack || m.Mean > hi+slack:
		return "mean outside the rows"
	case !(m.Window[0] <= m.Window[1]):
		return "window"
	case !(m.HalfRange >= 0) || m.HalfRange > (hi-lo)/2+slack:
		return "half-range"
	case math.IsNaN(m.Drift) || math.IsInf(m.Drift, 0):
		return "drift"
	case math.IsInf(m.Remaining, 0):
		return "remaining"
	}
	return ""
}

// anySeries draws monitors of the kinds that occur.
func anySeries(t *rapid.T) Series {
	n := rapid.IntRange(0, 400).Draw(t, "rows")
	seed := rapid.Uint64().Draw(t, "seed")
	rho := rapid.Float64Range(-0.95, 0.99).Draw(t, "rho")
	noise := rapid.SampledFrom([]float64{0, 1e-6, 1e-3, 0.1}).Draw(t, "noise")
	cycle := rapid.SampledFrom([]float64{0, 1e-4, 0.01, 1}).Draw(t, "cycle")
	period := rapid.Float64Range(2, 200).Draw(t, "period")
	slope := rapid.SampledFrom([]float64{0, 1e-6, -1e-4, 1e-2}).Draw(t, "slope")
	level := rapid.SampledFrom([]float64{0, 1, -30}).Draw(t, "level")
	rate := rapid.Float64Range(1, 500).Draw(t, "rate")
	start := rapid.SampledFrom([]float64{0, 0.3, -5}).Draw(t, "start")
	y := made(n, func(i float64) float64 {
		return level + start*math.Exp(-i/rate) + slope*i + cycle*math.Sin(2*math.Pi*i/period)
	})
	return Series{Value: plus(y, noise, markov(generator(seed), rho, n))}
}

func TestJudgeProperties(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := anySeries(t)
		opt := Options{Time: rapid.Bool().Draw(t, "time"), Name: "Cd"}
		m := Judge(s, opt)
		if what := sound(s, m); what != "" {
			t.Fatalf("%s: %+v", what, m)
		}
		// A power of two changes no digit but those of logarithms: the class stays
		// and lengths scale.
		eight := Series{Value: plus(flat(len(s.Value), 0), -8, s.Value)}
		e := Judge(eight, opt)
		same := func(a, b float64) bool { return a == b || math.IsNaN(a) && math.IsNaN(b) }
		alike := func(a, b float64) bool { return same(a, b) || near(a, b, 1e-9*math.Abs(b)) }
		if e.Class != m.Class || !same(e.Mean, -8*m.Mean) || !alike(e.U, 8*m.U) || !same(e.HalfRange, 8*m.HalfRange) || !same(e.Period, m.Period) || !same(e.Drift, -m.Drift) {
			t.Fatalf("minus eightfold %+v, single %+v", e, m)
		}
		// So does a stretched abscissa, with what is stated per it.
		if n := len(s.Value); n > 0 && !opt.Time {
			wide := Series{made(n, func(i float64) float64 { return 4 * (i + 1) }), s.Value}
			opt.Per = 4 * usualPer
			w := Judge(wide, opt)
			if w.Class != m.Class || !same(w.Mean, m.Mean) || !same(w.U, m.U) || !same(w.Period, 4*m.Period) || !same(w.Window[0], 4*m.Window[0]) {
				t.Fatalf("stretched %+v, single %+v", w, m)
			}
		}
	})
}

// TestStartUpIsTheRule: the linear sweep finds the least objective.
func TestStartUpIsTheRule(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		y := anySeries(t).Value
		d, ok := StartUp(y)
		keep := max(5, len(y)/10)
		if len(y) < 2*keep {
			if ok {
				t.Fatal("too few values were taken")
			}
			return
		}
		if ok != (2*d <= len(y)) || d > len(y)-keep {
			t.Fatalf("%d of %d, ok %v", d, len(y), ok)
		}
		scale := largest(y) * largest(y)
		for i := 0; i <= len(y)-keep; i++ {
			if objective(y, i) < objective(y, d)*(1-1e-6)-1e-13*scale {
				t.Fatalf("%v at %d, found %v at %d", objective(y, i), i, objective(y, d), d)
			}
		}
	})
}

// TestGeometricIsExact: any exact approach is continued to its limit. The
// tolerance is the rounding of the values over the last change, carried to the rest.
func TestGeometricIsExact(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		q := rapid.Float64Range(0.3, 0.95).Draw(t, "ratio") * rapid.SampledFrom([]float64{1, -1}).Draw(t, "sign")
		limit := rapid.Float64Range(-5, 5).Draw(t, "limit")
		y := made(12, func(k float64) float64 { return limit + math.Pow(q, k) })
		g, ok := Extrapolate(y)
		if !ok || math.Abs(y[11]+g.Remaining-limit) > 1e-8 {
			t.Fatalf("%v: %+v leads to %v", ok, g, y[11]+g.Remaining)
		}
	})
}

// FuzzJudge: whatever the bytes, a judgement is sound; odd rows are missing,
// infinite, repeated or out of order.
func FuzzJudge(f *testing.F) {
	f.Add([]byte("a monitor of some thirty rows or more, in plain letters of a text"), []byte{}, false)
	f.Add([]byte{}, []byte{}, true)
	f.Add(slices.Repeat([]byte{3, 7}, 60), []byte{}, false)
	f.Add(slices.Repeat([]byte{9, 9, 9, 200, 9, 1}, 40), slices.Repeat([]byte{1}, 60), true)
	f.Add(slices.Repeat([]byte{0, 31, 64, 12}, 40), append(slices.Repeat([]byte{1}, 40), 130, 1, 1, 90, 1), false)
	f.Fuzz(func(t *testing.T, values, steps []byte, time bool) {
		s := Series{Value: make([]float64, len(values)/2)}
		for i := range s.Value {
			k := binary.LittleEndian.Uint16(values[2*i:])
			switch {
			case k%128 == 1:
				s.Value[i] = math.NaN()
			case k%128 == 2:
				s.Value[i] = math.Inf(-1)
			default:
				s.Value[i] = float64(int16(k)) / 64
			}
		}
		if len(steps) > 0 {
			s.At = make([]float64, len(s.Value))
			for i := range s.At {
				step := float64(int8(steps[i%len(steps)])) / 4
				if i > 0 {
					s.At[i] = s.At[i-1] + step
				}
			}
		}
		m := Judge(s, Options{Time: time})
		if what := sound(s, m); what != "" {
			t.Fatalf("%s: %+v", what, m)
		}
		st := Statistics(s, Options{Time: time})
		if math.IsNaN(st.U) && len(st.Notices) == 0 || math.IsInf(st.U, 0) || st.Rule == "" {
			t.Fatalf("%+v", st)
		}
		Depth(s, Options{})
	})
}
