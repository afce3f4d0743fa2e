package settling

import (
	"math"
	"slices"
	"strings"
	"testing"

	"weirmark/core/notice"
)

// sine returns mean (1 + part sin) with a start-up that dies off.
func sine(n int, mean, part, period float64) []float64 {
	return made(n, func(i float64) float64 {
		return mean * (1 + 0.5*math.Exp(-i/30) + part*math.Sin(2*math.Pi*i/period+1))
	})
}

// TestDemoDrift: Cd falls 0.6 % per 200 iterations (6-demo F12), as a line, a
// line with noise and a curve that has 1 % to go.
func TestDemoDrift(t *testing.T) {
	line := made(600, func(i float64) float64 { return 0.02995 * (1 - 0.006*(i-500)/200) })
	curve := made(600, func(i float64) float64 { return 0.03 * (1 + 0.01*math.Exp((599-i)/250)) })
	for what, y := range map[string][]float64{
		"line":  line,
		"noise": plus(line, 3e-5, markov(generator(1), 0.8, 600)),
	} {
		m := Judge(Series{Value: y}, Options{Name: "Cd"})
		if m.Class != Drifting || math.Abs(m.Drift+0.006) > 3e-4 || m.Per != 200 || !math.IsNaN(m.U) || !slices.Equal(codes(m.Notices), []string{"monitor-drift"}) {
			t.Fatalf("%s: %+v", what, m)
		}
	}
	m := Judge(Series{Value: line}, Options{Name: "Cd"})
	want := "Cd still falls 0.60 % per 200 iterations. It has no end in sight: no iterative uncertainty was computed. Continue the run, or enter U_iter with a reason."
	if m.Notices[0].Text != want || m.Notices[0].Severity != notice.Stop || !math.IsNaN(m.Remaining) {
		t.Errorf("%+v", m.Notices[0])
	}
	m = Judge(Series{Value: curve}, Options{Name: "Cd"})
	// An exact approach is continued exactly, but for the rounding of the fit.
	if m.Class != Drifting || !near(m.Remaining, -0.0003, 1e-9) || !strings.Contains(m.Notices[0].Text, "leaves −0.00030 to come") {
		t.Errorf("%+v", m)
	}
	rises := Judge(Series{Value: plus(flat(600, 0), -1, line)}, Options{Name: "Cm"})
	if !strings.HasPrefix(rises.Notices[0].Text, "Cm still rises 0.60 %") {
		t.Errorf("%+v", rises.Notices)
	}
}

// TestDemoCycle: a cycle of 140 iterations, ±1.1 % (6-demo F13). Known: mean
// 0.09, half-range 0.011 of it. Over 13 whole cycles a period wrong by a part
// in a thousand moves the mean by less than 1e-4 of it.
func TestDemoCycle(t *testing.T) {
	m := Judge(Series{Value: sine(2000, 0.09, 0.011, 140)}, Options{Name: "Cd"})
	if m.Class != Cycling || !near(m.Period, 140, 0.1) || m.Cycles < 6 || !near(m.Mean, 0.09, 9e-6) ||
		math.Abs(m.HalfRange/0.00099-1) > 0.01 || !near(m.U, m.HalfRange/math.Sqrt(3), 1e-15) {
		t.Fatalf("%+v", m)
	}
	want := "Cd cycles every 140 iterations, ±1.1 %. Mean over 13 whole cycles used, half-range 0.000991 as U_iter. Is the flow steady?"
	if len(m.Notices) != 1 || m.Notices[0].Text != want || m.Notices[0].Severity != notice.Ask {
		t.Errorf("%v", m.Notices)
	}
	if rows := m.Window[1] - m.Window[0] + 1; math.Abs(rows-float64(m.Cycles)*m.Period) > 1 {
		t.Errorf("%v rows are not %d cycles", rows, m.Cycles)
	}
	// With noise of a tenth of the cycle, and with 600 rows, which hold three
	// whole cycles behind their start-up.
	noisy := Judge(Series{Value: plus(sine(2000, 0.09, 0.011, 140), 0.09*0.0011, markov(generator(3), 0.5, 2000))}, Options{})
	if noisy.Class != Cycling || !near(noisy.Period, 140, 1) || noisy.Cycles < 6 || !near(noisy.Mean, 0.09, 9e-5) || noisy.HalfRange < 0.00099 || noisy.HalfRange > 0.0014 {
		t.Errorf("noisy: %+v", noisy)
	}
	short := Judge(Series{Value: sine(600, 0.09, 0.011, 140)}, Options{})
	if short.Class != Cycling || !near(short.Period, 140, 1.4) || short.Cycles != 3 || !near(short.Mean, 0.09, 9e-5) {
		t.Errorf("600 rows: %+v", short)
	}
}

// TestCycles: other cycles with known answers.
func TestCycles(t *testing.T) {
	square := func(i float64) float64 {
		if math.Mod(i, 50) < 25 {
			return 1.02
		}
		return 0.98
	}
	for _, row := range []struct {
		what      string
		y         []float64
		class     Class
		period    float64
		mean      float64
		halfRange float64
		code      string
	}{
		{"from row to row", made(200, func(i float64) float64 { return 1 + 0.01*math.Cos(math.Pi*i) }), Cycling, 2, 1, 0.01, "monitor-cycle"},
		{"square", made(1000, square), Cycling, 50, 1, 0.02, "monitor-cycle"},
		{"with a harmonic", made(1000, func(i float64) float64 {
			return 1 + 0.01*math.Sin(2*math.Pi*i/60) + 0.006*math.Sin(4*math.Pi*i/60+1)
		}), Cycling, 60, 1, 0.01346, "monitor-cycle"},
		{"small", sine(1500, 1, 5e-4, 90), Settled, 90, 1, 5e-4, ""},
		{"drifting", made(2000, func(i float64) float64 { return 0.09 * (1 - 0.006*(i-1500)/200 + 0.011*math.Sin(2*math.Pi*i/140)) }), Drifting, 140, 0.09, math.NaN(), "monitor-drift"},
		{"shrinking", made(1500, func(i float64) float64 { return 1 + 0.1*math.Exp(-i/500)*math.Sin(2*math.Pi*i/140) }), Cycling, 140, 1, 0.0107, "monitor-cycle-shrinking"},
		{"shrunk", made(3000, func(i float64) float64 { return 1 + 0.1*math.Exp(-i/300)*math.Sin(2*math.Pi*i/140) }), Settled, 140, 1, 0, ""},
	} {
		m := Judge(Series{Value: row.y}, Options{})
		want := []string{}
		if row.code != "" {
			want = []string{row.code}
		}
		if m.Class != row.class || !near(m.Period, row.period, 0.01*row.period) || !slices.Equal(codes(m.Notices), want) {
			t.Errorf("%s: %+v", row.what, m)
		}
		if row.class == Drifting {
			if math.Abs(m.Drift+0.006) > 6e-4 {
				t.Errorf("%s: drift %v", row.what, m.Drift)
			}
			continue
		}
		if !near(m.Mean, row.mean, 2e-3*max(row.halfRange, 0.1)) || math.Abs(m.HalfRange-row.halfRange) > 0.25*row.halfRange+1e-4 {
			t.Errorf("%s: mean %v, half-range %v, want %v and %v", row.what, m.Mean, m.HalfRange, row.mean, row.halfRange)
		}
	}
}

// TestSilent: ten settled monitors. No notice, and the mean within four
// standard uncertainties of the known value.
func TestSilent(t *testing.T) {
	decay := func(n int, part, rows float64) []float64 {
		return made(n, func(i float64) float64 { return 1 + part*math.Exp(-i/rows) })
	}
	printed := func(y []float64) []float64 {
		return plus(flat(len(y), 0), 1e-5, made(len(y), func(i float64) float64 { return math.Round(y[int(i)] * 1e5) }))
	}
	for _, row := range []struct {
		what string
		y    []float64
		at   []float64
		opt  Options
	}{
		{what: "approach alone", y: decay(600, 0.3, 40)},
		{what: "approach, white noise 1e-6", y: plus(decay(600, 0.3, 40), 1e-6, markov(generator(11), 0, 600))},
		{what: "approach, noise 1e-4", y: plus(decay(600, 0.3, 40), 1e-4, markov(generator(12), 0.5, 600))},
		{what: "noise 3e-4", y: plus(decay(1000, 2, 30), 3e-4, markov(generator(13), 0.8, 1000))},
		{what: "slow noise 2e-4", y: plus(decay(2000, -0.5, 50), 2e-4, markov(generator(14), 0.95, 2000))},
		{what: "alternating noise", y: plus(decay(400, 0.3, 20), 3e-4, markov(generator(15), -0.8, 400))},
		{what: "printed with five decimals", y: printed(plus(decay(600, 0.3, 30), 1e-5, markov(generator(16), 0, 600)))},
		{what: "every tenth iteration", y: plus(decay(300, 0.3, 15), 1e-4, markov(generator(17), 0.3, 300)), at: made(300, func(i float64) float64 { return 10 * i })},
		{what: "overshoot", y: made(800, func(i float64) float64 { return 1 + 0.5*math.Exp(-i/40)*math.Cos(i/15) })},
		{what: "large noise beside a larger grid uncertainty", y: plus(decay(600, 0.3, 30), 3e-3, markov(generator(18), 0.5, 600)), opt: Options{UGrid: 0.05}},
	} {
		m := Judge(Series{At: row.at, Value: row.y}, row.opt)
		if m.Class != Settled || len(m.Notices) > 0 {
			t.Errorf("%s: %s, %v", row.what, m.Class, m.Notices)
		}
		if !(m.U > 0) || math.Abs(m.Mean-1) > 4*m.U || m.U > m.Limit {
			t.Errorf("%s: %v ± %v", row.what, m.Mean, m.U)
		}
	}
}

// TestClasses: the decided answers of a monitor that is not settled or cannot
// be judged.
func TestClasses(t *testing.T) {
	stall := plus(made(600, func(i float64) float64 { return 1 + 0.5*math.Exp(-i/20) }), 5e-3, markov(generator(1), 0.5, 600))
	for _, row := range []struct {
		what    string
		s       Series
		opt     Options
		class   Class
		known   bool // whether there is a U
		notices []string
	}{
		{"nothing", Series{}, Options{}, Short, false, []string{"monitor-short"}},
		{"nineteen rows", Series{Value: markov(generator(1), 0, 19)}, Options{}, Short, false, []string{"monitor-short"}},
		{"nineteen rows behind a restart", Series{Value: flat(60, 1), At: made(60, func(i float64) float64 { return math.Mod(i, 41) })}, Options{}, Short, false, []string{"monitor-restart", "monitor-short"}},
		{"blown up", Series{Value: append(flat(100, 1), math.Inf(1), math.NaN())}, Options{}, Broken, false, []string{"monitor-broken"}},
		{"constant", Series{Value: flat(100, 0.03)}, Options{}, Settled, false, []string{"monitor-constant"}},
		{"zero", Series{Value: flat(100, 0)}, Options{}, Settled, false, []string{"monitor-constant"}},
		{"constant in time", Series{Value: flat(100, 0.03)}, Options{Time: true}, Settled, false, []string{"monitor-constant"}},
		{"stalled", Series{Value: stall}, Options{}, Stalled, true, []string{"monitor-stalled"}},
		{"the same, for the grid uncertainty", Series{Value: stall}, Options{UGrid: 0.2}, Settled, true, []string{}},
		{"the same, in time", Series{Value: stall}, Options{Time: true}, Unsteady, true, []string{}},
		{"about zero", Series{Value: plus(flat(600, 0), 1e-5, markov(generator(1), 0, 600))}, Options{}, Stalled, true, []string{"monitor-scale", "monitor-stalled"}},
		{"about zero, with a scale", Series{Value: plus(flat(600, 0), 1e-5, markov(generator(1), 0, 600))}, Options{Scale: 1}, Settled, true, []string{}},
		{"zero from the middle on", Series{Value: append(made(40, func(i float64) float64 { return 41 - i }), flat(60, 0)...)}, Options{Scale: 1000}, Settled, true, []string{}},
		{"drift in time", Series{Value: plus(made(2000, func(i float64) float64 { return 1 + i/2000 }), 0.05, markov(generator(1), 0.5, 2000))}, Options{Time: true}, Drifting, false, []string{"sampling-startup", "monitor-drift"}},
		{"too short an average", Series{Value: plus(flat(30, 10), 1, markov(generator(1), 0.9, 30))}, Options{Time: true}, Short, false, []string{"sampling-none"}},
	} {
		m := Judge(row.s, row.opt)
		if m.Class != row.class || math.IsNaN(m.U) == row.known || !slices.Equal(codes(m.Notices), row.notices) || m.Rule == "" {
			t.Errorf("%s: %v, %+v", row.what, codes(m.Notices), m)
		}
	}
	m := Judge(Series{Value: stall}, Options{Name: "Cd"})
	y := stall[400:]
	if !near(m.HalfRange, halfRange(y), 0) || !near(m.Mean, mean(y), 1e-15) || !near(m.U, halfRange(y)/math.Sqrt(3), 1e-15) || m.Window != [2]float64{401, 600} {
		t.Errorf("stalled: %+v", m)
	}
	if text := m.Notices[0].Text; !strings.HasPrefix(text, "Cd keeps changing by ±1.6 % over the last 199 iterations, without drift or cycle.") {
		t.Errorf("%s", text)
	}
}

// TestJudgeTime: an unsteady run carries its statistic, and both agree.
func TestJudgeTime(t *testing.T) {
	s := Series{At: made(6000, func(i float64) float64 { return i / 100 })}
	s.Value = plus(made(6000, func(i float64) float64 { return 1 + math.Exp(-i/50) + 0.3*math.Sin(i/7) }), 0.1, markov(generator(1), 0.9, 6000))
	m, st := Judge(s, Options{Time: true}), Statistics(s, Options{Time: true})
	if m.Class != Unsteady || m.Stat == nil || m.Mean != st.Mean || m.U != st.U || m.Window != st.Window || m.Cycles != st.Cycles || m.Stat.Independent != st.Independent {
		t.Errorf("%+v\n%+v", m, st)
	}
	if !near(m.Period, 2*math.Pi*7/100, 0.002) || math.Abs(m.Mean-1) > 4*m.U {
		t.Errorf("%+v", m)
	}
}

// TestApproachSlow: rows that move little per 200 iterations but have a long
// way to go are not settled: with a time constant of 2000 the last 200 change
// by 0.05 %, and 0.5 % remains.
func TestApproachSlow(t *testing.T) {
	y := made(4000, func(i float64) float64 { return 1 - 0.005*math.Exp((3999-i)/2000) })
	m := Judge(Series{Value: y}, Options{})
	if math.Abs(m.Drift) > 0.001 || m.Class != Drifting || !near(m.Remaining, 0.005, 1e-8) {
		t.Errorf("%+v", m)
	}
}

// TestApproached: a window that still shows a drift, with next to nothing to
// come, is settled at its end.
func TestApproached(t *testing.T) {
	y := made(240, func(i float64) float64 { return 1 + 0.5*math.Exp(-i/25) })
	m := Judge(Series{Value: y}, Options{})
	if m.Class != Settled || math.Abs(m.Mean-1) > 2*m.U || m.U > m.Limit || len(m.Notices) > 0 {
		t.Errorf("%+v", m)
	}
}

func TestExtrapolateRefuses(t *testing.T) {
	for what, y := range map[string][]float64{
		"three values":       {1, 2, 2.5},
		"constant":           {1, 1, 1, 1, 1},
		"a step of zero":     {1, 2, 2, 2.5, 2.6},
		"line":               {1, 2, 3, 4, 5},
		"growing":            {1, 2, 4, 8, 16},
		"signs without rule": {0, 1, 1.5, 1.25, 1.125},
	} {
		if g, ok := Extrapolate(y); ok || g != (Geometric{}) {
			t.Errorf("%s: %+v", what, g)
		}
	}
	// 1 + (-1/2)^k alternates: the ratio is negative and the rest exact.
	g, ok := Extrapolate(made(12, func(k float64) float64 { return 1 + math.Pow(-0.5, k) }))
	if !ok || !near(g.Ratio, -0.5, 1e-12) || !near(g.Remaining, math.Pow(0.5, 11), 1e-14) {
		t.Errorf("alternating: %v, %+v", ok, g)
	}
}

// TestDetection: seeded monitors of random length, start-up and noise. Of 200
// cycles of ±1.1 % every one is found, its period to 2 %, its mean within half
// of u. Of 200 drifts of 0.3 % to 1 % per 200 iterations in noise of up to 0.2 %
// nine in ten are named and none is called settled. Of 200 settled ones every
// one is called settled, in silence, and u holds: beyond three of it at most
// one in fifty (normal values alone would give one in 370).
func TestDetection(t *testing.T) {
	const each = 200
	named, beyond := 0, 0
	for seed := range uint64(each) {
		r := generator(1000 + seed)
		n := 600 + r.IntN(1400)
		startUp := func(i float64) float64 { return 1 + 0.5*math.Exp(-i/20) }
		correlated := func(part, rho float64) []float64 { return plus(flat(n, 0), part, markov(r, rho, n)) }

		period, phase := 20+r.Float64()*(float64(n)/5-20), 2*math.Pi*r.Float64()
		wave := made(n, func(i float64) float64 { return startUp(i) + 0.011*math.Sin(2*math.Pi*i/period+phase) })
		m := Judge(Series{Value: plus(wave, 1, correlated(0.003*r.Float64(), 0.5))}, Options{})
		if m.Class != Cycling || !near(m.Period, period, 0.02*period) || math.Abs(m.Mean-1) > m.U/2 || m.HalfRange < 0.0105 {
			t.Errorf("%d: cycle of %v in %d rows: %+v", seed, period, n, m)
		}

		slope := (0.003 + 0.007*r.Float64()) / 200
		ramp := made(n, func(i float64) float64 { return startUp(i) + slope*(i-float64(n)) })
		m = Judge(Series{Value: plus(ramp, 1, correlated(0.002*r.Float64(), 0.9*r.Float64()))}, Options{})
		if m.Class == Drifting {
			named++
		} else if m.Class == Settled {
			t.Errorf("%d: drift of %v a row in %d rows: %+v", seed, slope, n, m)
		}

		rest := plus(made(n, startUp), 1, correlated(math.Pow(10, -6+2.4*r.Float64()), -0.5+1.3*r.Float64()))
		m = Judge(Series{Value: rest}, Options{})
		if m.Class != Settled || len(m.Notices) > 0 {
			t.Errorf("%d: settled, %d rows: %s, %v", seed, n, m.Class, m.Notices)
		}
		if math.Abs(m.Mean-1) > 3*m.U {
			beyond++
		}
	}
	if named < each*9/10 || beyond > each/50 {
		t.Errorf("%d of %d drifts named, %d means beyond three u", named, each, beyond)
	}
}
