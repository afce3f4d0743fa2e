package refinement

import (
	"math"
	"os"
	"path/filepath"
	"slices"
	"strconv"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"weirmark/core/internal/reference"
	"weirmark/core/notice"
)

// counted returns the counts of a one-dimensional family with spacings h.
func counted(h ...float64) []float64 {
	counts := make([]float64, len(h))
	for i, v := range h {
		counts[i] = 1e6 / v
	}
	return counts
}

func valuesOf(h []float64, f func(h float64) float64) []float64 {
	values := make([]float64, len(h))
	for i, v := range h {
		values[i] = f(v)
	}
	return values
}

var all = Options{Rule: RuleLeastSquares}

// fitRow is a row of testdata/published/least-squares.csv.
type fitRow struct {
	Family       string `csv:"family"`
	Form         string `csv:"form"`
	Weighting    string `csv:"weighting"`
	Order        string `csv:"order"`
	Extrapolated string `csv:"extrapolated"`
	U            string `csv:"u"`
}

// fitFamily is what a row of that file was computed from.
type fitFamily struct {
	counts, values []float64
	dim            int
}

func fitFamilies() map[string]fitFamily {
	h := []float64{1, 1.25, 1.5, 2, 2.5}
	plate := []float64{208896, 52224, 13056, 3264, 816}
	demo := []float64{5.60e6, 2.35e6, 0.98e6, 0.41e6}
	return map[string]fitFamily{
		"3 + 0.1 h^1.5":                {counted(h...), valuesOf(h, func(h float64) float64 { return 3 + 0.1*math.Pow(h, 1.5) }), 1},
		"3 + 0.1 h^3":                  {counted(h...), valuesOf(h, func(h float64) float64 { return 3 + 0.1*h*h*h }), 1},
		"3 + 0.1 h + 0.02 h^2":         {counted(h...), valuesOf(h, func(h float64) float64 { return 3 + 0.1*h + 0.02*h*h }), 1},
		"flat plate SA CFL3D CD":       {plate, []float64{0.285985288e-2, 0.286130951e-2, 0.286620917e-2, 0.288437885e-2, 0.295438152e-2}, 2},
		"flat plate SA CFL3D cf(0.97)": {plate, []float64{0.270562153e-2, 0.270673749e-2, 0.271115173e-2, 0.272834697e-2, 0.279568508e-2}, 2},
		"demo x_r A":                   {demo, []float64{6.38, 6.31, 6.18, 5.92}, 3},
		"demo x_r B":                   {demo, []float64{5.715, 5.67, 5.58, 5.41}, 3},
		"demo Cd A":                    {demo, []float64{.03178, .03217, .03287, .03412}, 3},
		"demo Cd B":                    {demo, []float64{.02995, .03021, .03068, .03155}, 3},
		"scattered":                    {counted(1, 1.3, 1.7, 2.2, 2.9), []float64{1.00, 1.02, 1.10, 0.55, 1.15}, 1}, // the finest three converge
	}
}

// TestLeastSquares holds ten families to what numpy and scipy give (see
// testdata/published/reference.py): form, weights, order, limit and U, to the
// eight digits printed there (relative 6e-8). The first three are those of
// references 1.6 of the design, which prints the same digits.
func TestLeastSquares(t *testing.T) {
	data, err := os.ReadFile(filepath.Join(reference.Root(t), "testdata", "published", "least-squares.csv"))
	if err != nil {
		t.Fatal(err)
	}
	rows, families := readRows[fitRow](t, data), fitFamilies()
	if len(rows) != len(families) {
		t.Fatalf("%d rows of %d families", len(rows), len(families))
	}
	forms := map[string]string{"power": formPower, "first": formFirst, "second": formSecond, "both": formBoth}
	weights := map[string]string{"weighted": ", weighted by 1/h;", "equal": ", equal weights;", "": ""}
	for _, row := range rows {
		in := families[row.Family]
		r := Study(in.counts, in.values, in.dim, all)
		if r.Class != Monotone || r.Used != len(in.counts) || !strings.Contains(r.Rule, forms[row.Form]+weights[row.Weighting]) || notice.Has(r.Notices, "grid-finest-three") || !notice.Has(r.Notices, "grid-least-squares") {
			t.Errorf("%s: %s, %d grids, %s, %v", row.Family, r.Class, r.Used, r.Rule, codes(r.Notices))
		}
		if (row.Order == "") != math.IsNaN(r.Order) || (row.Order == "") != notice.Has(r.Notices, "grid-fit-no-order") {
			t.Errorf("%s: order %v, want %q, %v", row.Family, r.Order, row.Order, codes(r.Notices))
		}
		for _, c := range []struct {
			what, printed string
			got           float64
		}{{"order", row.Order, r.Order}, {"limit", row.Extrapolated, r.Extrapolated}, {"U", row.U, r.U}} {
			if c.printed == "" {
				continue
			}
			want, err := strconv.ParseFloat(c.printed, 64)
			if err != nil || math.Abs(c.got-want) > 6e-8*math.Abs(want) {
				t.Errorf("%s: %s %.10g, want %s", row.Family, c.what, c.got, c.printed)
			}
		}
	}
	// The scatter that references 1.6 prints of the second.
	second := families["3 + 0.1 h^3"]
	if f, _ := newSeries(usable(second.counts, second.values), 1).choose(); math.Abs(f.scatter(5)-0.068073490) > 5e-10 {
		t.Errorf("scatter %.10g", f.scatter(5))
	}
	// The two U that the design prints of the demo (6.1).
	for name, u := range map[string]string{"demo x_r A": "0.303", "demo x_r B": "0.204"} {
		if r := Study(families[name].counts, families[name].values, 3, all); !asPrinted(r.U, u) {
			t.Errorf("%s: U %v, printed %s", name, r.U, u)
		}
	}
}

// TestLeastSquaresPowerLaw: exact families with an order from 0.5 to 2 give the
// order, the limit and U = 1.25 times the error, on any four to six grids.
func TestLeastSquaresPowerLaw(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		p := rapid.Float64Range(0.51, 1.99).Draw(t, "order")
		a := rapid.SampledFrom([]float64{-1, 1}).Draw(t, "sign") * rapid.Float64Range(0.1, 10).Draw(t, "size")
		f0 := rapid.Float64Range(-10, 10).Draw(t, "limit")
		n, dim := rapid.IntRange(4, 6).Draw(t, "grids"), rapid.IntRange(1, 3).Draw(t, "dimension")
		counts, values := make([]float64, n), make([]float64, n)
		h := 1.0
		for i := range counts {
			counts[i], values[i] = 1e6/math.Pow(h, float64(dim)), f0+a*math.Pow(h, p)
			h *= rapid.Float64Range(1.2, 2).Draw(t, "ratio")
		}
		r := Study(counts, values, dim, all)
		// The rounding of the differences, 1e-15 of at most 20 over at least 0.1,
		// is magnified by fitting three numbers over a short range.
		if r.Class != Monotone || math.Abs(r.Order-p) > 1e-7 || math.Abs(r.Extrapolated-f0) > 1e-6 || math.Abs(r.U-1.25*math.Abs(a)) > 1e-6 {
			t.Fatalf("p %v, f0 %v, a %v: %+v", p, f0, a, r)
		}
	})
}

// TestLeastSquaresRefuses: families that do not converge, or too few grids.
func TestLeastSquaresRefuses(t *testing.T) {
	cells := []float64{0.41e6, 0.98e6, 2.35e6, 5.60e6}
	for _, row := range []struct {
		what    string
		values  []float64
		class   Class
		u       bool
		notices []string
	}{
		{"diverging", []float64{-.00091, -.00098, -.00112, -.00139}, Diverging, false, []string{"grid-diverging"}},
		{"finest three diverging, all four falling", []float64{9, 5, 4, 2}, Diverging, false, []string{"grid-diverging"}},
		{"oscillating without end", []float64{1, 2, 1, 2}, OscillatoryDiverging, false, []string{"grid-diverging"}},
		{"flat in the finest three", []float64{1, 2, 2, 2}, Flat, false, []string{"grid-flat"}},
		{"oscillating", []float64{.4312, .4391, .4346, .4371}, Oscillatory, true, []string{"grid-least-squares"}},
	} {
		r := Study(cells, row.values, 3, all)
		if r.Class != row.class || !slices.Equal(codes(r.Notices), row.notices) || math.IsNaN(r.U) == row.u || math.IsNaN(r.StandardUncertainty(2)) == row.u {
			t.Errorf("%s: %+v", row.what, r)
		}
		if !math.IsNaN(r.Order) || !math.IsNaN(r.Extrapolated) || !math.IsNaN(r.UStandard) {
			t.Errorf("%s: order %v, extrapolated %v", row.what, r.Order, r.Extrapolated)
		}
	}
	three := Study(cells[1:], []float64{6.18, 6.31, 6.38}, 3, all)
	if plain := Three(cells[1:], []float64{6.18, 6.31, 6.38}, 3, Options{}); three.U != plain.U || !notice.Has(three.Notices, "grid-rule-few") {
		t.Errorf("three grids: %+v", three)
	}
	twice := Study(append(cells, cells[0]), []float64{5.92, 6.18, 6.31, 6.38, 5.93}, 3, all)
	if twice.Class != Insufficient || !math.IsNaN(twice.U) || !slices.Equal(codes(twice.Notices), []string{"grid-duplicate"}) {
		t.Errorf("one count twice: %+v", twice)
	}
	same := Study(append(cells, cells[0]), []float64{5.92, 6.18, 6.31, 6.38, 5.92}, 3, all)
	if once := Study(cells, []float64{5.92, 6.18, 6.31, 6.38}, 3, all); same.U != once.U {
		t.Errorf("the same row twice: U %v, once %v", same.U, once.U)
	}
}

// TestLeastSquaresInvariance: neither a unit, the sign, nor the order of rows
// changes the study (relative 1e-8).
func TestLeastSquaresInvariance(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		h := []float64{1, 1.4, 2, 2.7, 4}
		values := valuesOf(h, func(h float64) float64 {
			return 2 + 0.3*math.Pow(h, 1.2) + rapid.Float64Range(-0.01, 0.01).Draw(t, "scatter")
		})
		r := Study(counted(h...), values, 1, all)
		order := rapid.Permutation([]int{0, 1, 2, 3, 4}).Draw(t, "rows")
		counts, moved := make([]float64, 5), make([]float64, 5)
		for i, k := range order {
			counts[i], moved[i] = counted(h...)[k], -8*values[k]
		}
		s := Study(counts, moved, 1, all)
		same := func(a, b float64) bool {
			return math.IsNaN(a) && math.IsNaN(b) || math.Abs(a-b) <= 1e-8*math.Abs(a)
		}
		if r.Class != s.Class || r.Rule != s.Rule || !same(r.Order, s.Order) || !same(8*r.U, s.U) || !same(-8*r.Extrapolated, s.Extrapolated) {
			t.Fatalf("%+v\n%+v", r, s)
		}
	})
}

// TestFitLinear: a parabola through three points, and a column that depends on
// another.
func TestFitLinear(t *testing.T) {
	x, squares := []float64{1, 2, 4}, []float64{1, 4, 16}
	l, ok := fitLinear([]float64{6, 11, 27}, []float64{1, 2, 3}, x, squares) // 3 + 2 x + x²
	if !ok || math.Abs(l.c[0]-3) > 1e-12 || math.Abs(l.c[1]-2) > 1e-12 || math.Abs(l.c[2]-1) > 1e-12 || l.squares > 1e-24 {
		t.Errorf("%+v", l)
	}
	// Weighted mean and slope by the textbook sums: mean x 2, mean f 3; slope 0.5.
	l, ok = fitLinear([]float64{1, 4, 3}, []float64{.25, .5, .25}, []float64{0, 2, 4})
	if !ok || math.Abs(l.c[1]-.5) > 1e-14 || math.Abs(l.c[0]-2) > 1e-14 || math.Abs(l.squares-1) > 1e-14 {
		t.Errorf("%+v", l)
	}
	if _, ok := fitLinear([]float64{1, 2, 3}, []float64{1, 1, 1}, x, []float64{3, 5, 9}); ok {
		t.Error("a column that is 1 + 2 x was taken beside x")
	}
}
