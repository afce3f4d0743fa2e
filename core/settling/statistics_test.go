package settling

import (
	"math"
	"slices"
	"strings"
	"testing"
)

// TestCorrelationTime: the mean over 200 seeded series of 500 correlation
// times lies within 10 % of (1+rho)/(1-rho) (requirement N9), and u agrees with
// the scatter of the 200 means, known to 5 %, within three times that and the
// bias of u.
func TestCorrelationTime(t *testing.T) {
	const series = 200
	for _, rho := range []float64{-0.3, 0, 0.5, 0.9, 0.96} {
		theory, _ := MarkovFactor(rho, 1)
		n := int(500 * max(theory, 1))
		times, squares, scatter := 0., 0., 0.
		for seed := range series {
			y := markov(generator(uint64(seed)), rho, n)
			u, tau, independent := standardOfMean(y)
			if !near(independent*tau, float64(n), 1e-9*float64(n)) {
				t.Fatalf("%v independent of %d with time %v", independent, n, tau)
			}
			m := mean(y)
			times, squares, scatter = times+tau/series, squares+u*u/series, scatter+m*m/series
		}
		if math.Abs(times/theory-1) > 0.1 {
			t.Errorf("rho %v: correlation time %v, theory %v", rho, times, theory)
		}
		if q := math.Sqrt(squares / scatter); math.Abs(q-1) > 0.2 {
			t.Errorf("rho %v: u is %v times the scatter of the means", rho, q)
		}
	}
}

// TestAutocovariance: by the transform as by the sums.
func TestAutocovariance(t *testing.T) {
	y := markov(generator(4), 0.7, 53)
	g := autocovariance(y)
	m := mean(y)
	for k := range y {
		sum := 0.
		for i := 0; i+k < len(y); i++ {
			sum += (y[i] - m) * (y[i+k] - m)
		}
		if !near(g[k], sum/53, 1e-14) {
			t.Errorf("lag %d: %v, want %v", k, g[k], sum/53)
		}
	}
	if r := g[1] / g[0]; !near(r, LagOne(y), 1e-13) {
		t.Errorf("lag one: %v and %v", r, LagOne(y))
	}
}

// TestStatistics: start-up, mean, uncertainty and count of a record whose
// answers are known: a decay over noise of correlation 0.9 (time 19 rows of
// 0.01 s) and unit standard deviation 0.1. Tolerances: three standard
// uncertainties of the mean; a quarter for the others, about three of theirs.
func TestStatistics(t *testing.T) {
	const n, step = 20000, 0.01
	at := made(n, func(i float64) float64 { return step * i })
	y := plus(made(n, func(i float64) float64 { return 2 + 3*math.Exp(-i/100) }), 0.1, markov(generator(8), 0.9, n))
	st := Statistics(Series{at, y}, Options{Time: true})
	u := 0.1 * math.Sqrt(19./n)
	if math.Abs(st.Mean-2) > 3*u || math.Abs(st.U/u-1) > 0.25 || math.Abs(st.UMarkov/u-1) > 0.25 || math.Abs(st.Batch.U/u-1) > 0.5 {
		t.Errorf("mean %v ± %v (Markov %v, batches %v), want 2 ± %v", st.Mean, st.U, st.UMarkov, st.Batch.U, u)
	}
	if math.Abs(st.Tau/(19*step)-1) > 0.25 || math.Abs(st.Independent*19/n-1) > 0.25 || math.Abs(st.LagOne-0.9) > 0.02 || math.Abs(st.SD-0.1) > 0.01 {
		t.Errorf("%+v", st)
	}
	if st.StartUp < 200 || st.StartUp > 1500 || st.StartUp+st.Rows != n || !near(st.Window[0], step*float64(st.StartUp), 1e-9) || !near(st.Window[1], at[n-1], 1e-9) {
		t.Errorf("start-up %d, rows %d, window %v", st.StartUp, st.Rows, st.Window)
	}
	if len(st.Notices) > 0 || !math.IsNaN(st.Period) || st.Cycles != 0 {
		t.Errorf("period %v, %v", st.Period, st.Notices)
	}
}

// TestStatisticsCycles: the mean of shed vortices is taken over whole cycles.
// A pure cycle leaves next to nothing uncertain; with noise on it u is that
// of the noise (correlation 0.9, so 0.1 sqrt(19/n)).
func TestStatisticsCycles(t *testing.T) {
	const n = 6000
	wave := made(n, func(i float64) float64 { return 1 + 0.4*math.Sin(2*math.Pi*i/73.4+1) })
	st := Statistics(Series{Value: wave}, Options{Time: true})
	if !near(st.Period, 73.4, 0.01) || st.Cycles < 78 || !near(st.Mean, 1, 1e-4) || !(st.U < 1e-4) {
		t.Errorf("pure: %+v", st)
	}
	rows := st.Window[1] - st.Window[0] + 1
	if math.Abs(rows-float64(st.Cycles)*st.Period) > 0.6 {
		t.Errorf("%v rows are not %d cycles of %v", rows, st.Cycles, st.Period)
	}
	st = Statistics(Series{Value: plus(wave, 0.1, markov(generator(2), 0.9, n))}, Options{Time: true})
	u := 0.1 * math.Sqrt(19./n)
	if !near(st.Period, 73.4, 0.1) || math.Abs(st.Mean-1) > 3*u || math.Abs(st.U/u-1) > 0.35 {
		t.Errorf("noisy: want 1 ± %v: %+v", u, st)
	}
}

// TestStatisticsLew: NIST's oscillating series has a mean known better than
// independent rows would make it: u lies near its batch means (3.75 and 3.85,
// see TestBatchMeansPublished), not near 19.6.
func TestStatisticsLew(t *testing.T) {
	st := Statistics(Series{Value: lew}, Options{Time: true})
	if st.U < 3 || st.U > 4.5 || math.Abs(st.Mean+177.435) > 2 || st.Cycles < 55 {
		t.Errorf("%+v", st)
	}
}

// TestDeclaredStart: what a person declares takes the place of the rule. The
// rows before row 400 lie at 5, the others at 1.
func TestDeclaredStart(t *testing.T) {
	const step = 0.5
	at := made(1000, func(i float64) float64 { return 10 + step*i })
	y := plus(append(flat(400, 5), flat(600, 1)...), 0.01, markov(generator(3), 0.3, 1000))
	for _, row := range []struct {
		start float64
		first int
	}{{10 + 400*step, 400}, {10 + 499.2*step, 500}, {10 + 500*step, 500}, {-5, 0}} {
		opt := Options{Time: true, Declared: true, Start: row.start, Scale: 1e6} // nothing is a drift
		st, m := Statistics(Series{at, y}, opt), Judge(Series{at, y}, opt)
		if st.StartUp != row.first || st.Rows != 1000-row.first || row.first > 0 && !strings.Contains(st.Rule, "the declared start") || !near(st.Mean, mean(y[row.first:]), 1e-12) {
			t.Errorf("start %v: %+v", row.start, st)
		}
		if m.Stat == nil || m.Stat.StartUp != row.first || m.Mean != st.Mean {
			t.Errorf("start %v: %+v", row.start, m)
		}
	}
	late := Options{Time: true, Declared: true, Start: 10 + 985*step}
	st, m := Statistics(Series{at, y}, late), Judge(Series{at, y}, late)
	if !math.IsNaN(st.Mean) || !slices.Contains(codes(st.Notices), "monitor-short") || m.Class != Short || !slices.Contains(codes(m.Notices), "monitor-short") {
		t.Errorf("15 rows: %+v, %+v", st, m)
	}
}

// TestDeclaredPeriod: whole cycles of a declared period, where the noise hides
// it from the search; a period that the record does not hold three times, or
// that is no two rows long, is not used, and that is told.
func TestDeclaredPeriod(t *testing.T) {
	const n, period = 1000, 73.4
	y := plus(made(n, func(i float64) float64 { return 1 + 0.05*math.Sin(2*math.Pi*i/period) }), 0.3, markov(generator(9), 0, n))
	if found := Statistics(Series{Value: y}, Options{Time: true}); found.Cycles != 0 {
		t.Fatalf("the search finds the hidden cycle: %+v", found)
	}
	st := Statistics(Series{Value: y}, Options{Time: true, Period: period, Declared: true})
	rows := st.Window[1] - st.Window[0] + 1
	if st.Period != period || st.Cycles != 13 || math.Abs(rows-13*period) > 0.6 || !strings.Contains(st.Rule, "declared period") || len(st.Notices) > 0 && st.Notices[0].Code == "sampling-period" {
		t.Errorf("%v rows: %+v", rows, st)
	}
	for _, bad := range []float64{340, 1.9} {
		opt := Options{Time: true, Period: bad, Declared: true}
		if st, m := Statistics(Series{Value: y}, opt), Judge(Series{Value: y}, opt); !slices.Contains(codes(st.Notices), "sampling-period") || st.Cycles != 0 || !slices.Contains(codes(m.Notices), "sampling-period") {
			t.Errorf("period %v: %+v, %v", bad, st, codes(m.Notices))
		}
	}
}

func TestStatisticsNotices(t *testing.T) {
	short := markov(generator(5), 0.97, 700)
	for _, row := range []struct {
		what    string
		value   []float64
		opt     Options
		known   bool
		notices []string
	}{
		{"few rows", short[:19], Options{}, false, []string{"monitor-short"}},
		{"blown up", append(slices.Clone(short), math.NaN()), Options{}, false, []string{"monitor-broken"}},
		{"few independent", short, Options{}, true, []string{"sampling-short"}},
		{"none independent", made(40, func(i float64) float64 { return math.Sqrt(40 - i) }), Options{}, false, []string{"sampling-startup", "sampling-none"}},
		{"start-up beyond the middle", append(made(300, func(i float64) float64 { return 50 - i/10 }), markov(generator(1), 0, 200)...), Options{}, true, nil},
		{"enough", markov(generator(1), 0.5, 3000), Options{}, true, []string{}},
		{"enough, but large beside u_num", markov(generator(1), 0.5, 3000), Options{UNum: 0.05}, true, []string{"sampling-short"}},
	} {
		st := Statistics(Series{Value: row.value}, row.opt)
		if row.notices == nil {
			if got := codes(st.Notices); !slices.Contains(got, "sampling-startup") {
				t.Errorf("%s: %v", row.what, got)
			}
		} else if got := codes(st.Notices); !slices.Equal(got, row.notices) {
			t.Errorf("%s: %v, %+v", row.what, got, st)
		}
		if row.known == math.IsNaN(st.U) || st.Rule == "" {
			t.Errorf("%s: %+v", row.what, st)
		}
	}
	st := Statistics(Series{Value: short}, Options{Name: "Cd", UNum: 0.5})
	if text := st.Notices[0].Text; !strings.HasPrefix(text, "About 17 independent samples of Cd. The statistical standard uncertainty is 0.24 (48 % of u_num)") {
		t.Errorf("%s", text)
	}
}

func TestStartUp(t *testing.T) {
	for _, row := range []struct {
		what string
		y    []float64
		d    int
		ok   bool
	}{
		{"nothing", nil, 0, false},
		{"nine", flat(9, 1), 0, false},
		{"constant: the longest record", flat(50, 1.1), 0, true},
		{"a step at the front", append(flat(10, 5), flat(40, 1)...), 10, true},
		{"a step at the middle", append(flat(20, 5), flat(20, 1)...), 20, true},
		{"a step behind the middle", append(flat(21, 5), flat(19, 1)...), 21, false},
		{"a ramp to the end", made(60, func(i float64) float64 { return i }), 54, false},
	} {
		if d, ok := StartUp(row.y); d != row.d || ok != row.ok {
			t.Errorf("%s: %d, %v", row.what, d, ok)
		}
	}
}

func TestBatchMeansRefuses(t *testing.T) {
	for _, row := range [][2]int{{10, 1}, {10, 0}, {3, 4}, {0, 2}} {
		if b, ok := BatchMeans(flat(row[0], 1), row[1]); ok || b != (Batch{}) {
			t.Errorf("%v: %+v", row, b)
		}
	}
	b, ok := BatchMeans([]float64{100, 1, 1, 3, 3}, 2)
	// Means 1 and 3: u = sqrt(2)/sqrt(2) = 1; Student's factor for one degree is 12.706 (table, from memory).
	if !ok || b.Mean != 2 || b.Size != 2 || !near(b.U, 1, 1e-15) || !near(b.Half95, 12.706, 5e-4) {
		t.Errorf("%+v", b)
	}
}
