package comparison

import (
	"errors"
	"math"
	"testing"

	"weirmark/core/internal/reference"
	"weirmark/core/uncertainty"
)

// TestCalibrationLine: JCGM 100:2008 H.3, all values from memory and confirmed by
// recomputation (published-examples 3.3): b = y1 + y2 (t - 20), s 0.0034975640.
// With that s as independent uncertainty the fit is ordinary least squares.
func TestCalibrationLine(t *testing.T) {
	at := []float64{21.521, 22.012, 22.512, 23.003, 23.507, 23.999, 24.513, 25.002, 25.503, 26.010, 26.511}
	b := []float64{-0.171, -0.169, -0.166, -0.159, -0.164, -0.165, -0.156, -0.157, -0.159, -0.161, -0.160}
	from20 := make([]float64, len(at))
	for i, v := range at {
		from20[i] = v - 20
	}
	const s = 0.0034975640
	d, ok := Decompose(b, from20, budget(len(b), []float64{s}, nil))
	if !ok {
		t.Fatal("no line")
	}
	for _, row := range []struct {
		name                 string
		got, want, tolerance float64
	}{
		{"y1, printed -0.1712", d.Offset, -0.17120379, 5e-9},
		{"s(y1), printed 0.0029", d.UOffset, 0.0028776, 5e-8},
		{"y2, printed 0.00218", d.Scale, 0.0021827, 5e-8},
		{"s(y2), printed 0.00067", d.UScale, 0.00066794, 5e-9},
		{"r, printed -0.930", d.Correlation, -0.9304296, 5e-8},
		{"s from the remainder", math.Sqrt(d.ShapePart/9) * s, s, 5e-11},
	} {
		if math.Abs(row.got-row.want) > row.tolerance {
			t.Errorf("%s: %v, want %v", row.name, row.got, row.want)
		}
	}
	r := d.Correlation
	first, err := uncertainty.Model{
		F: func(x []float64) float64 { return x[0] + 10*x[1] },
		Inputs: []uncertainty.Input{
			{Value: d.Offset, U: d.UOffset, Distribution: uncertainty.Normal},
			{Value: d.Scale, U: d.UScale, Distribution: uncertainty.Normal},
		},
		Correlation: [][]float64{{1, r}, {r, 1}},
	}.FirstOrder()
	if err != nil || math.Abs(first.Value+0.1493768127) > 5e-11 || math.Abs(first.U-0.0041385958) > 5e-11 {
		t.Errorf("b(30) %+v, %v, want -0.1493768127 ± 0.0041385958 (printed -0.1494, 0.0041)", first, err)
	}
}

// tapsBudget is the budget of the taps with the pressure reference common.
func tapsBudget(n int) uncertainty.Budget {
	return budget(n, []float64{reference.TapsRandom, reference.TapsGrid}, []float64{reference.TapsPressure})
}

// TestTapsCurve: design 6.1, the statistic against the shared part of the
// variance of the pressure reference: 51.0, 9.42, 27.0 flipping at 0.0215 for A,
// 14.5, 25.8, 125.0 at 0.684 for B.
func TestTapsCurve(t *testing.T) {
	rest := budget(24, []float64{reference.TapsRandom, reference.TapsGrid}, nil)
	u := uncertainty.Constant(24, reference.TapsPressure)
	for _, row := range []struct {
		name            string
		e               []float64
		none, half, all string
		flip            string
		exceeds         []bool
		low             bool
	}{
		{"A", reference.TapsErrorA, "51.0", "9.42", "27.0", "0.0215", []bool{true, false, false}, true},
		{"B", reference.TapsErrorB, "14.5", "25.8", "125.0", "0.684", []bool{false, false, true}, false},
	} {
		c, err := Correlate(row.e, rest, u, 20)
		if err != nil || len(c.Points) != 21 || len(c.Flips) != 1 {
			t.Fatalf("%s: %+v, %v", row.name, c, err)
		}
		if !rounds(c.Flips[0], row.flip) {
			t.Errorf("%s: flips at %v, printed %s", row.name, c.Flips, row.flip)
		}
		for k, printed := range []string{row.none, row.half, row.all} {
			p := c.Points[10*k]
			if p.Rho != 0.5*float64(k) || !rounds(p.Statistic, printed) || p.Exceeds != row.exceeds[k] || !rounds(p.Reference, "36.4") {
				t.Errorf("%s: %+v, printed %s", row.name, p, printed)
			}
		}
		// The 1 % point of 24 degrees of freedom is 10.86 (scipy.stats.chi2.ppf).
		if c.Points[10].Low != row.low || c.Points[20].Low {
			t.Errorf("%s: low tail %+v", row.name, c.Points[10])
		}
	}
}

// TestTapsDecomposition: what the difference of each model consists of. The
// offset alone is that of 6.1; the parts sum to 27.0 and 125.0.
func TestTapsDecomposition(t *testing.T) {
	sB, _, sA := reference.TapsCp()
	for _, row := range []struct {
		name, total, offset string
		e, s                []float64
	}{{"A", "27.0", "2.25", reference.TapsErrorA, sA}, {"B", "125.0", "0.006", reference.TapsErrorB, sB}} {
		d, ok := Decompose(row.e, row.s, tapsBudget(24))
		if !ok || !rounds(d.OffsetPart, row.offset) || !rounds(d.OffsetPart+d.ScalePart+d.ShapePart, row.total) || d.ShapeDegrees != 22 {
			t.Errorf("%s: %+v", row.name, d)
		}
		// The reference is common: it limits the offset and leaves the scale alone.
		if !(d.UOffset > 0.020 && d.UOffset < 0.0203) {
			t.Errorf("%s: u(a) %v", row.name, d.UOffset)
		}
		t.Logf("%s: a %.4f ± %.4f, b %.4f ± %.4f, parts %.3f + %.3f + %.3f", row.name, d.Offset, d.UOffset, d.Scale, d.UScale, d.OffsetPart, d.ScalePart, d.ShapePart)
	}
}

// TestDecomposeExact: differences made of an offset, a scale and a shape that is
// orthogonal to both come apart again.
func TestDecomposeExact(t *testing.T) {
	s := []float64{-3, -1, 1, 3}
	shape := []float64{1, -1, -1, 1}
	e := make([]float64, 4)
	for i := range e {
		e[i] = 0.5 + 0.25*s[i] + 2*shape[i]
	}
	d, ok := Decompose(e, s, budget(4, []float64{0.5}, nil))
	want := Decomposition{Offset: 0.5, UOffset: 0.25, Scale: 0.25, UScale: 0.5 / math.Sqrt(20), OffsetPart: 4, ScalePart: 5, ShapePart: 64, ShapeDegrees: 2}
	for i, pair := range [][2]float64{{d.Offset, want.Offset}, {d.UOffset, want.UOffset}, {d.Scale, want.Scale}, {d.UScale, want.UScale},
		{d.OffsetPart, want.OffsetPart}, {d.ScalePart, want.ScalePart}, {d.ShapePart, want.ShapePart}, {d.Correlation, 0}} {
		if !ok || math.Abs(pair[0]-pair[1]) > 1e-13 {
			t.Errorf("value %d: %v, want %v", i, pair[0], pair[1])
		}
	}
	for i, v := range d.Shape {
		if math.Abs(v-2*shape[i]) > 1e-14 {
			t.Errorf("shape %v", d.Shape)
		}
	}
}

func TestDecomposeRefuses(t *testing.T) {
	three := []float64{1, 2, 3}
	for _, row := range []struct {
		name string
		e, s []float64
		b    uncertainty.Budget
	}{
		{"two stations", three[:2], three[:2], budget(2, []float64{1}, nil)},
		{"a simulation that does not vary", three, []float64{0.1, 0.1, 0.1}, budget(3, []float64{1}, nil)},
		{"a simulation that varies by rounding", three, []float64{1, 1 + 1e-15, 1}, budget(3, []float64{1}, nil)},
		{"no independent part", three, three, budget(3, nil, []float64{1})},
		{"unknown difference", []float64{1, 2, math.NaN()}, three, budget(3, []float64{1}, nil)},
		{"unknown simulation", three, []float64{1, 2, math.NaN()}, budget(3, []float64{1}, nil)},
		{"unknown uncertainty", three, three, budget(3, []float64{math.NaN()}, nil)},
	} {
		if d, ok := Decompose(row.e, row.s, row.b); ok {
			t.Errorf("%s: %+v", row.name, d)
		}
	}
}

// TestWorst: independent residuals are E/u; a common source takes out what all
// stations share, so that the odd one stands out.
func TestWorst(t *testing.T) {
	r, err := Whiten([]float64{1, -3, 2}, uncertainty.Budget{Variance: []float64{1, 4, 0.25}})
	if err != nil || r.Worst != 2 || !near(r.Whitened[0], 1, 1e-15) || !near(r.Whitened[1], -1.5, 1e-15) || !near(r.Whitened[2], 4, 1e-15) {
		t.Errorf("%+v, %v", r, err)
	}
	r, err = Whiten([]float64{5, 5, 5, 4, 5, 5}, budget(6, []float64{0.1}, []float64{5}))
	if err != nil || r.Worst != 3 || math.Abs(r.Whitened[0]) > 3 {
		t.Errorf("%+v, %v", r, err)
	}
	// The symmetric root keeps equal stations equal.
	for _, i := range []int{1, 2, 4, 5} {
		if math.Abs(r.Whitened[i]-r.Whitened[0]) > 1e-10 {
			t.Errorf("%+v", r)
		}
	}
	if _, err := Whiten([]float64{1, 2}, budget(2, nil, []float64{1})); !errors.Is(err, ErrRange) {
		t.Errorf("outside the range: %v", err)
	}
	if r, err := Whiten([]float64{1, 1}, budget(2, nil, []float64{0.5})); err != nil || !near(dot(r.Whitened, r.Whitened), 4, 1e-12) {
		t.Errorf("rank one: %+v, %v", r, err)
	}
}

// TestLeaveOut: independent stations leave their own square; the taps keep the
// conclusion of 6.1 without any one of them.
func TestLeaveOut(t *testing.T) {
	e := []float64{1, -2, 3}
	left, err := LeaveOut(e, budget(3, []float64{1}, nil), append(EachStation(3), []int{0, 1}, []int{0, 1, 2}))
	if err != nil || len(left) != 5 {
		t.Fatal(left, err)
	}
	for i, want := range []Joint{{13, 2}, {10, 2}, {5, 2}, {9, 1}} {
		if left[i] != want {
			t.Errorf("without region %d: %+v, want %+v", i, left[i], want)
		}
	}
	if !math.IsNaN(left[4].Statistic) || left[4].Rank != 0 {
		t.Errorf("without all: %+v", left[4])
	}
	for _, row := range []struct {
		e       []float64
		exceeds bool
	}{{reference.TapsErrorA, false}, {reference.TapsErrorB, true}} {
		left, err := LeaveOut(row.e, tapsBudget(24), EachStation(24))
		if err != nil {
			t.Fatal(err)
		}
		for i, q := range left {
			if q.Rank != 23 || (q.Statistic > ChiSquare95(23)) != row.exceeds {
				t.Errorf("without tap %d: %+v", i, q)
			}
		}
	}
	n := 4001
	if _, err := LeaveOut(make([]float64, n), budget(n, []float64{1}, nil), EachStation(n)); !errors.Is(err, ErrWork) {
		t.Errorf("4001 of 4001: %v", err)
	}
	n = 300
	if _, err := LeaveOut(make([]float64, n), budget(n, nil, []float64{1}), EachStation(n)); !errors.Is(err, ErrWork) {
		t.Errorf("dense, 300 of 300: %v", err)
	}
	if _, err := LeaveOut([]float64{math.NaN()}, budget(1, []float64{1}, nil), nil); !errors.Is(err, ErrFinite) {
		t.Errorf("unknown: %v", err)
	}
}

// TestBeyondByChance: 48 independent stations at k = 2 expect 2.18 (design, Q3);
// the probability of at least the found number is binomial. Full correlation
// leaves the expectation: either all are beyond or none. Four standard errors of
// 10,000 draws.
func TestBeyondByChance(t *testing.T) {
	p := math.Erfc(math.Sqrt2)
	for _, row := range []struct {
		name  string
		b     uncertainty.Budget
		found int
		want  float64
	}{
		{"independent, none", budget(48, []float64{1}, nil), 0, 1},
		{"independent, one", budget(48, []float64{1}, nil), 1, 1 - math.Pow(1-p, 48)},
		{"independent, two", budget(48, []float64{1}, nil), 2, 1 - math.Pow(1-p, 48) - 48*p*math.Pow(1-p, 47)},
		{"common, one", budget(48, []float64{1e-9}, []float64{1}), 1, p},
		{"common, all", budget(48, []float64{1e-9}, []float64{1}), 48, p},
		{"six groups of eight, eight", uncertainty.Combine(48, []uncertainty.Source{{U: uncertainty.Constant(48, 1), Group: labels(48, 6, 1)}}), 8, 1 - math.Pow(1-p, 6)},
	} {
		c, err := BeyondByChance(row.b, 2, row.found, 17)
		if err != nil || !rounds(c.Expected, "2.18") || c.Draws != 10_000 {
			t.Errorf("%s: %+v, %v", row.name, c, err)
		}
		if limit := 4 * math.Sqrt(row.want*(1-row.want)/10_000); math.Abs(c.AtLeast-row.want) > limit {
			t.Errorf("%s: at least %d with probability %v, want %v", row.name, row.found, c.AtLeast, row.want)
		}
	}
	if c, err := BeyondByChance(budget(20_000, []float64{1}, []float64{1}), 2, 1, 17); err != nil || c.Draws != 2500 || c.AtLeast < 0.9 {
		t.Errorf("many stations: %+v, %v", c, err)
	}
	if _, err := BeyondByChance(budget(2, []float64{math.NaN()}, nil), 2, 1, 17); !errors.Is(err, ErrFinite) {
		t.Errorf("unknown: %v", err)
	}
	if _, err := BeyondByChance(uncertainty.Budget{Variance: []float64{1e308}, Common: [][]float64{{1e200}}}, 2, 1, 17); !errors.Is(err, ErrFinite) {
		t.Errorf("overflow: %v", err)
	}
}

// TestAgreementCovers: 10,000 seeded sets of 24 stations in which only the stated
// errors are present, of every pattern. The 95 % point holds the statistic, and
// the intervals of offset, scale and single stations hold zero, in 93 to 97 %.
func TestAgreementCovers(t *testing.T) {
	const n, trials = 24, 10_000
	x, u, _ := scattered(n, 9)
	s := make([]float64, n)
	for i, v := range x {
		s[i] = math.Sin(v)
	}
	b := uncertainty.Combine(n, []uncertainty.Source{
		{U: u},
		{U: uncertainty.Constant(n, 2), Common: true},
		{U: signed(u), Group: labels(n, 5, 1)},
		{U: u, X: x, Length: 2},
	})
	w, err := newWhitening(b)
	if err != nil {
		t.Fatal(err)
	}
	limit, total := ChiSquare95(n), b.Total()
	draws := uncertainty.NewRealisation(b, 2029)
	e := make([]float64, n)
	var joint, offset, scale, station int
	k, _ := uncertainty.StudentFactor(0.95, math.Inf(1))
	for trial := range trials {
		draws.Next(e)
		q, err := w.joint(e)
		d, ok := Decompose(e, s, b)
		if err != nil || !ok {
			t.Fatal(err)
		}
		if q.Statistic <= limit {
			joint++
		}
		if math.Abs(d.Offset) <= k*d.UOffset {
			offset++
		}
		if math.Abs(d.Scale) <= k*d.UScale {
			scale++
		}
		if i := trial % n; math.Abs(e[i]) <= k*total[i] {
			station++
		}
	}
	for _, row := range []struct {
		name string
		hits int
	}{{"joint", joint}, {"offset", offset}, {"scale", scale}, {"station", station}} {
		got := float64(row.hits) / trials
		t.Logf("%s: %.2f %%", row.name, 100*got)
		if got < 0.93 || got > 0.97 {
			t.Errorf("%s: covers %.2f %%", row.name, 100*got)
		}
	}
}
