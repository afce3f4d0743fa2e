package settling

import (
	"math"
	"slices"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"weirmark/core/notice"
)

// TestBalance: sign and scale (requirement N15), by hand.
func TestBalance(t *testing.T) {
	nan := math.NaN()
	for _, row := range []struct {
		what       string
		flux       Flux
		opt        Options
		net, scale float64
		limit      float64
		closed     bool
		notices    []string
	}{
		{"closed", Flux{Kind: Mass, In: []float64{2, 1}, Out: []float64{3}}, Options{}, 0, 3, 0.001, true, []string{}},
		{"at the limit", Flux{Kind: Mass, In: []float64{1000}, Out: []float64{999}}, Options{}, 1, 1000, 0.001, true, []string{}},
		{"more enters", Flux{Kind: Mass, In: []float64{2, 1}, Out: []float64{2.961}}, Options{}, 0.039, 3, 0.001, false, []string{"balance-open"}},
		{"more leaves", Flux{Kind: Mass, In: []float64{2, 1}, Out: []float64{3.039}}, Options{}, -0.039, 3, 0.001, false, []string{"balance-open"}},
		{"backflow enters", Flux{Kind: Mass, In: []float64{3}, Out: []float64{4, -1}}, Options{}, 0, 4, 0.001, true, []string{}},
		{"nothing enters", Flux{Kind: Mass, Out: []float64{2}}, Options{}, -2, 2, 0.001, false, []string{"balance-open"}},
		{"made inside", Flux{Kind: Species, In: []float64{1}, Out: []float64{1.5}, Produced: 0.5}, Options{}, 0, 1.5, 0.001, true, []string{}},
		{"consumed inside", Flux{Kind: Species, In: []float64{1}, Out: []float64{0.4}, Produced: -0.6}, Options{}, 0, 1, 0.001, true, []string{}},
		// 1 kW lost of 500 kW carried through, where 20 kW are exchanged: 0.2 % or 5 %.
		{"energy by all that enters", Flux{Kind: Energy, In: []float64{480, 20}, Out: []float64{499}}, Options{}, 1, 500, 0.001, false, []string{"balance-gross", "balance-open"}},
		{"energy by the heat exchanged", Flux{Kind: Energy, In: []float64{480, 20}, Out: []float64{499}, Scale: 20}, Options{}, 1, 20, 0.001, false, []string{"balance-open"}},
		{"force by the measured one", Flux{Kind: Force, In: []float64{10}, Out: []float64{7, 3.004}, Scale: 5}, Options{}, -0.004, 5, 0.001, true, []string{}},
		// U_grid is 2 % of the quantity: a tenth of it is 0.2 %.
		{"small beside the grid uncertainty", Flux{Kind: Mass, In: []float64{1}, Out: []float64{0.998}}, Options{Scale: 0.03, UGrid: 0.0006}, 0.002, 1, 0.002, true, []string{}},
		{"not small beside it", Flux{Kind: Mass, In: []float64{1}, Out: []float64{0.9979}}, Options{Scale: 0.03, UGrid: 0.0006}, 0.0021, 1, 0.002, false, []string{"balance-open"}},
		// No grid uncertainty, but E of 5 % of the quantity: a tenth of it is 0.5 %.
		{"small beside E", Flux{Kind: Mass, In: []float64{1}, Out: []float64{0.995}}, Options{Scale: 0.03, E: -0.0015}, 0.005, 1, 0.005, true, []string{}},
		{"not small beside E", Flux{Kind: Mass, In: []float64{1}, Out: []float64{1.0051}}, Options{Scale: 0.03, E: -0.0015}, -0.0051, 1, 0.005, false, []string{"balance-open"}},
		{"blank", Flux{Kind: Mass, In: []float64{1, nan}, Out: []float64{1}}, Options{}, nan, nan, 0.001, false, []string{"balance-missing"}},
		{"infinite", Flux{Kind: Mass, In: []float64{1}, Out: []float64{math.Inf(1)}}, Options{}, nan, nan, 0.001, false, []string{"balance-missing"}},
		{"nothing", Flux{Kind: Mass}, Options{}, 0, nan, 0.001, false, []string{"balance-scale"}},
	} {
		b := Balance(row.flux, row.opt)
		// Without anything of the quantity the limit is a habit, which is told.
		if habit := row.opt == (Options{}) && !math.IsNaN(row.scale); habit != notice.Has(b.Notices, "balance-habit") || habit != strings.Contains(b.LimitOf, "habit") && !math.IsNaN(row.scale) {
			t.Errorf("%s: limit is %s, %v", row.what, b.LimitOf, codes(b.Notices))
		}
		b.Notices = slices.DeleteFunc(b.Notices, func(n notice.Notice) bool { return n.Code == "balance-habit" })
		same := func(got, want float64) bool {
			return math.IsNaN(got) && math.IsNaN(want) || near(got, want, 1e-12)
		}
		if !same(b.Net, row.net) || !same(b.Scale, row.scale) || !same(b.Fraction, row.net/row.scale) || !same(b.Limit, row.limit) || b.Closed != row.closed || !slices.Equal(codes(b.Notices), row.notices) {
			t.Errorf("%s: %+v", row.what, b)
		}
	}
}

// TestDemoBalance: mass imbalance of 1.3 % (6-demo F14).
func TestDemoBalance(t *testing.T) {
	b := Balance(Flux{Kind: Mass, In: []float64{0.8}, Out: []float64{0.7896}}, Options{Scale: 5.67, UGrid: 0.057, E: -0.2})
	want := "Mass imbalance 1.3 % of inflow (more enters than leaves; the same fraction of the quantity is 1.3 of its U_grid and 0.37 of |E|). Its effect on the quantity is unknown: continue the run, or enter an effect with a reason."
	if len(b.Notices) != 1 || b.Notices[0].Text != want || b.Notices[0].Severity != notice.Stop || !near(b.OfGrid, 0.013*5.67/0.057, 1e-9) || !near(b.OfE, 0.013*5.67/0.2, 1e-9) {
		t.Errorf("%+v", b)
	}
}

// TestBalanceNamesItsScale: the flux that a person named stands in the message.
func TestBalanceNamesItsScale(t *testing.T) {
	b := Balance(Flux{Kind: Energy, In: []float64{500}, Out: []float64{499}, Scale: 20, ScaleOf: "the heat exchanged"}, Options{})
	if b.ScaleOf != "the heat exchanged" || !strings.Contains(b.Notices[len(b.Notices)-1].Text, "Energy imbalance 5.0 % of the heat exchanged (more enters than leaves)") {
		t.Errorf("%+v", b)
	}
}

// TestBalanceProperties: what enters and what leaves exchanged turns the sign
// and keeps the scale to within the imbalance; a common factor keeps the fraction.
func TestBalanceProperties(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		flows := rapid.SliceOfN(rapid.Float64Range(-10, 10), 1, 6)
		f := Flux{Kind: Mass, In: flows.Draw(t, "in"), Out: flows.Draw(t, "out")}
		b := Balance(f, Options{})
		back := Balance(Flux{Kind: Mass, In: f.Out, Out: f.In}, Options{})
		if !near(b.Net, -back.Net, 1e-13) || math.Abs(b.Scale-back.Scale) > math.Abs(b.Net)*(1+1e-12)+1e-12 {
			t.Fatalf("%+v exchanged is %+v", b, back)
		}
		eight := Flux{Kind: Mass}
		for _, v := range f.In {
			eight.In = append(eight.In, 8*v)
		}
		for _, v := range f.Out {
			eight.Out = append(eight.Out, 8*v)
		}
		if e := Balance(eight, Options{}); e.Net != 8*b.Net || e.Fraction != b.Fraction && !math.IsNaN(b.Fraction) {
			t.Fatalf("eightfold %+v, single %+v", e, b)
		}
		if math.IsNaN(b.Fraction) != notice.Has(b.Notices, "balance-scale") {
			t.Fatalf("no fraction without a reason: %+v", b)
		}
	})
}

func TestWeigh(t *testing.T) {
	nan := math.NaN()
	for _, row := range []struct {
		what                      string
		uIter, uGrid, change, e   float64
		ofGrid, ofChange, ofError float64
		notices                   []string
	}{
		{"small", 1, 20, 10, 40, 0.05, 0.1, 0.025, []string{}},
		{"a tenth", 1, 10, -10, -4, 0.1, 0.1, 0.25, []string{}},
		{"above a tenth", 1, 9, 10, 4, 0.1111111111, 0.1, 0.25, []string{"iteration-ratio"}},
		{"noise", 4e-5, 1, 2e-5, 1, 4e-5, 2, 4e-5, []string{"iteration-noise"}},
		{"nothing known", nan, 1, 1, 1, nan, nan, nan, []string{}},
		{"no grid, no change, no E", 1, nan, 0, 0, nan, nan, nan, []string{}},
		{"no iteration error", 0, 1, 1, 1, 0, 0, 0, []string{}},
	} {
		w := Weigh("Cd", row.uIter, row.uGrid, row.change, row.e)
		same := func(got, want float64) bool { return got == want || math.IsNaN(got) && math.IsNaN(want) }
		if !same(w.OfGrid, row.ofGrid) || !same(w.OfChange, row.ofChange) || !same(w.OfE, row.ofError) || !slices.Equal(codes(w.Notices), row.notices) {
			t.Errorf("%s: %+v", row.what, w)
		}
	}
	w := Weigh("Cd", 4e-5, nan, 2e-5, nan)
	if want := "Fine–medium change (0.000020) of Cd is below the iterative uncertainty (0.000040): the observed order is noise. Continue the runs."; w.Notices[0].Text != want {
		t.Errorf("%s", w.Notices[0].Text)
	}
}

// TestDepth: residuals that fall, stall and rise, with known decades.
func TestDepth(t *testing.T) {
	falling := made(600, func(i float64) float64 { return math.Pow(10, -i/100) })
	stalled := made(600, func(i float64) float64 { return math.Pow(10, -i/100) + 1e-2 })
	deep := made(1200, func(i float64) float64 { return math.Pow(10, -i/100) + 1e-6 })
	for _, row := range []struct {
		what    string
		y       []float64
		stalled bool
		decades float64
		perLast float64
		notices []string
	}{
		// The last twentieth is 30 rows: its middle is 14.5 rows before the end.
		{"falling", falling, false, (599 - 14.5) / 100, 2, []string{}},
		{"stalled", stalled, true, 2, 0, []string{"residual-stalled"}},
		{"stalled deep", deep, true, 6, 0, []string{}},
		{"rising", made(600, func(i float64) float64 { return math.Pow(10, i/100) }), true, -(599-14.5)/100 + 0.29, -2, []string{"residual-stalled"}},
		{"some zeros", append([]float64{0, -1}, falling...), false, (599 - 14.5) / 100, 2, []string{"residual-zero"}},
		{"few rows", falling[:10], false, math.NaN(), math.NaN(), []string{"monitor-short"}},
		{"ends at zero", append(slices.Clone(falling), 0), false, (599 - 14.5) / 100, 2, []string{"residual-zero"}},
		{"ends without a number", append(slices.Clone(falling), math.NaN()), false, math.NaN(), math.NaN(), []string{"monitor-broken"}},
	} {
		d := Depth(Series{Value: row.y}, Options{Name: "Continuity"})
		same := func(got, want, tolerance float64) bool {
			return math.IsNaN(got) && math.IsNaN(want) || near(got, want, tolerance)
		}
		// A plateau under a sum is reached to 1e-2 decades within the last rows.
		if d.Stalled != row.stalled || !same(d.Decades, row.decades, 0.02) || !same(d.PerLast, row.perLast, 0.02) || !slices.Equal(codes(d.Notices), row.notices) {
			t.Errorf("%s: %+v", row.what, d)
		}
	}
	d := Depth(Series{Value: stalled}, Options{Name: "Continuity"})
	if text := d.Notices[0].Text; !strings.HasPrefix(text, "Continuity fell by 2.0 decades and then stalled") {
		t.Errorf("%s", text)
	}
}
