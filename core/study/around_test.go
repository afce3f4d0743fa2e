package study_test

import (
	"math"
	"strings"
	"testing"

	"weirmark/core/message"
	"weirmark/core/notice"
	"weirmark/core/study"
)

// Listing a reading three times changes neither the statistic nor its degrees
// of freedom, and is told; the same value at another place is another reading.
func TestRepeatedReadingsCountOnce(t *testing.T) {
	sim := rows(30, even, smooth)
	ref := rows(12, func(i int) float64 { return float64(i) / 11 }, func(x float64) float64 { return smooth(x) + .01*math.Cos(9*x) })
	lines := strings.SplitAfter(ref, "\n")
	plain, repeated := only(t, pair(sim, ref, "m", "m")), only(t, pair(sim, ref+lines[3]+lines[3]+lines[7], "m", "m"))
	a, b := plain.Joint, repeated.Joint
	if len(repeated.Stations) != 15 || b.N != 12 || a.N != 12 || b.Merged != 3 || a.Merged != 0 {
		t.Fatalf("%d stations, ranks %d and %d, merged %d and %d", len(repeated.Stations), a.N, b.N, a.Merged, b.Merged)
	}
	if math.Abs(float64(a.Statistic-b.Statistic)) > 1e-9*float64(a.Statistic) || a.Exceeds != b.Exceeds {
		t.Errorf("statistic %v, with repetitions %v", a.Statistic, b.Statistic)
	}
	if notice.Has(plain.Notices, "covariance-repeated") || !notice.Has(repeated.Notices, "covariance-repeated") {
		t.Error("the repetitions are not told, or told where there are none")
	}
	blank := 0
	for _, s := range repeated.Stations {
		if !s.Whitened.Known() {
			blank++
		}
	}
	if blank != 3 {
		t.Errorf("%d stations have no whitened residual, want the 3 repetitions", blank)
	}
}

// The squares of the whitened residuals sum to the statistic, and the largest
// is named, for both models of the taps.
func TestWhitenedResidualsSumToTheStatistic(t *testing.T) {
	r := study.Evaluate(message.Demo(), study.Options{Alternatives: true})
	for _, i := range []int{2, 3} {
		c := r.Cells[i]
		sum, worst, at := 0.0, study.Number(0), study.None
		for _, s := range c.Stations {
			sum += float64(s.Whitened * s.Whitened)
			if math.Abs(float64(s.Whitened)) > math.Abs(float64(worst)) {
				worst, at = s.Whitened, study.Number(s.X)
			}
		}
		if math.Abs(sum-float64(c.Joint.Statistic)) > 1e-9*sum {
			t.Errorf("cell %d: squares sum to %v, statistic %v", i, sum, c.Joint.Statistic)
		}
		if c.Joint.Worst != worst || c.Joint.WorstAt != at {
			t.Errorf("cell %d: worst %v at %v, want %v at %v", i, c.Joint.Worst, c.Joint.WorstAt, worst, at)
		}
		// V = 0.0000520 I + 0.0004 11': the matrix I + g'g of its one common column
		// is 1 + 24 0.0004/0.000052, a single number whose condition is 1.
		if c.Joint.Condition != 1 || len(c.Joint.Eigenvalues) != 0 {
			t.Errorf("cell %d: condition %v, eigenvalues %v", i, c.Joint.Condition, c.Joint.Eigenvalues)
		}
	}
}

// The statistic against the correlation of the pressure reference passes
// through the numbers of the design (6.1): A 51.0, 9.42 at one half, 27.0 with
// the flip at .0215; B 14.5, 25.8, 125.0 with the flip at .684. At one half A
// lies below the 1 % point of 24 degrees of freedom, 10.856 (table of
// chi-square, from memory), which is told.
func TestStatisticAgainstCorrelation(t *testing.T) {
	r := study.Evaluate(message.Demo(), study.Options{Alternatives: true})
	for i, want := range map[int]struct {
		at   [3]float64
		half [3]float64
		flip float64
		fine float64
		low  bool
	}{
		2: {[3]float64{51.0, 9.42, 27.0}, [3]float64{.05, .005, .05}, .0215, .00005, true},
		3: {[3]float64{14.5, 25.8, 125.0}, [3]float64{.05, .05, .05}, .684, .0005, false},
	} {
		c := r.Cells[i]
		if len(c.Joint.Correlations) != 1 {
			t.Fatalf("cell %d: %d curves", i, len(c.Joint.Correlations))
		}
		line := c.Joint.Correlations[0]
		n := len(line.Points) - 1
		for k, j := range []int{0, n / 2, n} {
			if p := line.Points[j]; float64(p.Rho) != float64(k)/2 || math.Abs(float64(p.Statistic)-want.at[k]) > want.half[k] {
				t.Errorf("cell %d: %+v, want %v at %v", i, p, want.at[k], float64(k)/2)
			}
		}
		if len(line.Flips) != 1 || math.Abs(float64(line.Flips[0])-want.flip) > want.fine {
			t.Errorf("cell %d: turns at %v, want %v", i, line.Flips, want.flip)
		}
		if line.N != 24 || math.Abs(float64(line.Top)-36.415) > .0005 || math.Abs(float64(line.Low)-10.856) > .0005 {
			t.Errorf("cell %d: on %d, points %v and %v", i, line.N, line.Low, line.Top)
		}
		if notice.Has(c.Notices, "joint-low-correlation") != want.low {
			t.Errorf("cell %d: low tail told: %v", i, !want.low)
		}
	}
}

// One station carries the difference: leaving it out changes most and turns
// the conclusion, and that is among the alternatives; with independent sources
// its leaving takes its own square.
func TestLeavingOutStations(t *testing.T) {
	s := pair(rows(30, even, smooth), rows(20, func(i int) float64 { return float64(i) / 19 }, func(x float64) float64 {
		if math.Abs(x-10./19) < 1e-6 {
			return smooth(x) + .12
		}
		return smooth(x) + .004
	}), "m", "m")
	c := only(t, s)
	j := c.Joint
	if j.Station == nil || j.Station.Region != "0.526316 m" || !j.Exceeds || j.Station.Exceeds || j.Turning != 1 || j.Station.N != 19 {
		t.Fatalf("joint %+v, station %+v", j, j.Station)
	}
	whole := float64(j.Statistic - c.Stations[10].Ratio*c.Stations[10].Ratio)
	if math.Abs(float64(j.Station.Statistic)-whole) > 1e-8*whole {
		t.Errorf("without the station %v, want %v", j.Station.Statistic, whole)
	}
	told := false
	for _, f := range c.Fragile {
		told = told || f.Change == "one station left out, any of 1 station"
	}
	if !told {
		t.Errorf("alternatives %+v", c.Fragile)
	}
}

// Without an independent part anywhere the covariance is treated whole: its
// eigenvalues are listed, those that count as zero as zero, and the rank says
// how many do not.
func TestEigenvaluesOfASingularCovariance(t *testing.T) {
	s := pair(rows(30, even, smooth), rows(12, func(i int) float64 { return float64(i) / 11 }, func(x float64) float64 { return smooth(x) + .02 }), "m", "m")
	q := &s.Questions[0]
	q.Choices.UInterp = false
	for i := range q.Sources {
		q.Sources[i].Pattern = study.Common
	}
	// The file holds six digits, so that E is constant to rounding only: a scale
	// of the readings takes what is left.
	q.Sources = append(q.Sources, study.Source{Name: "rest", Of: study.OfData, Value: .01, Basis: study.Absolute, Coverage: entered("1"), Pattern: study.Length, Length: .5})
	c := only(t, s)
	if c.Joint == nil || len(c.Joint.Eigenvalues) != 0 || c.Joint.N != 12 {
		t.Fatalf("with a correlation length: %+v", c.Joint)
	}
	// The rest shared within three groups of places: rank 3 of 12.
	ref := "x,y,part\n"
	for i := range 12 {
		ref += strings.TrimSpace(strings.Split(rows(12, func(i int) float64 { return float64(i) / 11 }, func(x float64) float64 { return 2 }), "\n")[i+1]) + "," + string(rune('1'+i/4)) + "\n"
	}
	s = pair(rows(30, even, func(float64) float64 { return 2.01 }), ref, "m", "m")
	q = &s.Questions[0]
	q.Choices.UInterp = false
	for i := range q.Sources {
		q.Sources[i].Pattern, q.Sources[i].Group = study.Grouped, "part"
	}
	c = only(t, s)
	if c.Joint == nil || c.Joint.N != 3 || len(c.Joint.Eigenvalues) != 12 || !notice.Has(c.Notices, "covariance-rank") {
		t.Fatalf("in three groups: %+v, %+v", c.Joint, c.Notices)
	}
	for i, v := range c.Joint.Eigenvalues {
		want := 0.0
		if i >= 9 {
			want = 4 // four equal stations in each group
		}
		if math.Abs(float64(v)-want) > 1e-9 || want == 0 && v != 0 {
			t.Errorf("eigenvalue %d is %v, want %v", i, v, want)
		}
	}
	if math.Abs(float64(c.Joint.Condition)-1) > 1e-9 {
		t.Errorf("condition %v, want 1", c.Joint.Condition)
	}
}
