package settling

import (
	"math"
	"testing"
)

// TestCertified: NIST's statistical reference datasets. Certified digits as in
// shared/references/published-examples.md, section 7; the tolerance is the
// rounding of about 200 sums in doubles.
func TestCertified(t *testing.T) {
	for _, row := range []struct {
		name              string
		y                 []float64
		mean, sd, lagOne  float64
		meanSlack, sdPart float64
	}{
		{"Lew", lew, -177.435, 277.332168044316, -0.307304800605679, 1e-12, 1e-14},
		// 299.85 and the others are no doubles: their spread keeps 12 digits.
		{"Michelso", michelso, 299.8524, 0.0790105478190518, 0.535199668621283, 1e-12, 1e-11},
	} {
		m, sd := spread(row.y)
		if r := LagOne(row.y); math.Abs(m-row.mean) > row.meanSlack || math.Abs(sd/row.sd-1) > row.sdPart || math.Abs(r-row.lagOne) > 1e-11 {
			t.Errorf("%s: mean %.15g, sd %.15g, r1 %.15g", row.name, m, sd, r)
		}
	}
}

// TestBatchMeansPublished: batch means of NIST's series. The figures are
// published-examples.md section 5 (computed there with numpy and scipy), to
// their ten decimals.
func TestBatchMeansPublished(t *testing.T) {
	for _, row := range []struct {
		name          string
		y             []float64
		count, size   int
		u, half, slip float64
	}{
		{"Michelso", michelso, 5, 20, 0.0153715647, 0.0426783055, 1e-10},
		{"Michelso", michelso, 10, 10, 0.0129049517, 0.0291930289, 1e-10},
		{"Lew", lew, 10, 20, 3.7523033667, 8.4882999, 1e-7},
		{"Lew", lew, 20, 10, 3.8545344111, 8.0676332, 1e-7},
	} {
		b, ok := BatchMeans(row.y, row.count)
		if !ok || b.Size != row.size || !near(b.U, row.u, 1e-10) || !near(b.Half95, row.half, row.slip) {
			t.Errorf("%s %d of %d: %+v", row.name, row.count, row.size, b)
		}
		_, sd := spread(row.y)
		if naive := sd / math.Sqrt(float64(len(row.y))); (b.U < naive) != (row.name == "Lew") {
			t.Errorf("%s: u %v by batches, %v as if independent: the oscillating series alone gains", row.name, b.U, naive)
		}
	}
}

// TestMarkovFactorPublished: published-examples.md section 5, AR(1).
func TestMarkovFactorPublished(t *testing.T) {
	for _, row := range []struct {
		rho                             float64
		n                               int
		limit, exact, nLimit, nEffExact float64
	}{
		{0.5, 100, 3, 2.96, 33.333333, 33.783784},
		{0.9, 100, 19, 17.200047811, 5.2631579, 5.8139373},
		{0.9, 1000, 19, 18.82, 52.631579, 53.134963},
		{-0.3, 200, 0.53846154, 0.54023669, 371.42857, 370.20811},
	} {
		limit, exact := MarkovFactor(row.rho, row.n)
		n := float64(row.n)
		for _, pair := range [][2]float64{{limit, row.limit}, {exact, row.exact}, {n / limit, row.nLimit}, {n / exact, row.nEffExact}} {
			if !near(pair[0], pair[1], 2e-8*math.Abs(pair[1])) { // printed to 8 digits or more
				t.Errorf("rho %v, n %d: %.10g, want %.10g", row.rho, row.n, pair[0], pair[1])
			}
		}
	}
	if _, one := MarkovFactor(0.7, 1); !near(one, 1, 1e-15) {
		t.Errorf("one row: %v", one)
	}
}

// TestStartUpPublished: published-examples.md section 5, MSER.
func TestStartUpPublished(t *testing.T) {
	y := []float64{10, 8, 6, 4, 2, 1, 2, 1, 2, 1, 2, 1, 2, 1, 2, 1, 2, 1, 2, 1, 2}
	d, ok := StartUp(y)
	if m := mean(y[d:]); d != 4 || !ok || !near(m, 1.5294117647, 1e-10) {
		t.Errorf("d %d, ok %v, mean %v", d, ok, mean(y[d:]))
	}
	// The objective of the same source, written out, has its least value there.
	for i, want := range []float64{0.2747003563, 0.158, 0.0769791515, 0.0308641975, 0.0146549969, 0.015625, 0.0165925926} {
		if got := objective(y, i); !near(got, want, 5e-11) {
			t.Errorf("objective at %d: %.10f, want %.10f", i, got, want)
		}
	}
}

// objective is the rule of StartUp as it is written, in n steps.
func objective(y []float64, d int) float64 {
	m := mean(y[d:])
	sum := 0.
	for _, v := range y[d:] {
		sum += (v - m) * (v - m)
	}
	n := float64(len(y) - d)
	return sum / n / n
}

// TestExtrapolatePublished: f_k = 1 + 2 (0.9)^k at k = 50, published-examples.md
// section 5. The tolerance is the rounding of f near 1, 1e-16, over the last
// change, 1e-3, times the 1/(1-rho) = 10 of the formula, with room for the fit.
func TestExtrapolatePublished(t *testing.T) {
	y := made(51, func(k float64) float64 { return 1 + 2*math.Pow(0.9, k) })
	if y[50] != 1.0103075504146402 || !near(y[50]-y[49], -0.0011452833794, 1e-13) {
		t.Fatalf("f_50 = %.17g, change %.13g", y[50], y[50]-y[49])
	}
	g, ok := Extrapolate(y)
	if !ok || !near(g.Ratio, 0.9, 1e-12) || !near(g.Remaining, -0.0103075504146, 1e-12) || g.Fit < 1-1e-12 {
		t.Errorf("%v, %+v", ok, g)
	}
	// The bound |change_(n+1)|/(1-rho) of the same source is reached by an exact sequence.
	next := 2 * math.Pow(0.9, 51)
	if bound := math.Abs(next-(y[50]-1)) / (1 - 0.9); math.Abs(g.Remaining) > bound*(1+1e-12) {
		t.Errorf("remaining %v beyond its bound %v", g.Remaining, bound)
	}
}

// TestConstantTrap: a constant series has no uncertainty of its mean and no
// division by zero (published-examples.md section 5).
func TestConstantTrap(t *testing.T) {
	for _, v := range []float64{0, 3, -1e-30, 0.1} {
		st := Statistics(Series{Value: flat(40, v)}, Options{})
		if st.U != 0 || st.Mean != v || st.SD != 0 || st.LagOne != 0 || st.Batch.U != 0 || st.Batch.Half95 != 0 || st.UMarkov != 0 || st.Independent != 40 {
			t.Errorf("%v: %+v", v, st)
		}
	}
}
