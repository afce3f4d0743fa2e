package metric

import (
	"math"
	"testing"

	"pgregory.net/rapid"
)

func TestSummarise(t *testing.T) {
	for _, row := range []struct {
		name string
		e    []float64
		want Summary
	}{
		{"no station", nil, Summary{}},
		{"one station", []float64{-2}, Summary{1, -2, 2, 2, 2, 0}},
		{"3, -4: mean -1/2, root of 25/2", []float64{3, -4}, Summary{2, -0.5, 3.5, math.Sqrt(12.5), 4, 1}},
		{"the first of two equal maxima", []float64{1, -5, 5}, Summary{3, 1. / 3, 11. / 3, math.Sqrt(17), 5, 1}},
		{"no difference", []float64{0, 0}, Summary{2, 0, 0, 0, 0, 0}},
	} {
		if got := Summarise(row.e); got != row.want {
			t.Errorf("%s: %+v, want %+v", row.name, got, row.want)
		}
	}
}

// TestPublishedScores: the set of published-examples section 4.3 (provenance C:
// formulas with an exactly computed case): bias 0.6971428571, RMSE 1.9087542684,
// MAE 0.8971428571, to the ten decimals printed there.
func TestPublishedScores(t *testing.T) {
	o := []float64{1, 2, 3, 4, 5, 0.5, 0.02}
	p := []float64{1.2, 1.4, 3.3, 9.0, 4.9, 0.55, 0.05}
	e := make([]float64, len(o))
	for i := range e {
		e[i] = p[i] - o[i]
	}
	s := Summarise(e)
	for _, row := range []struct {
		name      string
		got, want float64
	}{
		{"bias", s.Bias, 0.6971428571},
		{"RMSE", s.RMSE, 1.9087542684},
		{"MAE", s.MAE, 0.8971428571},
		{"maximum", s.MaxAbs, 5},
	} {
		if math.Abs(row.got-row.want) > 0.5e-10 {
			t.Errorf("%s: %v, want %v", row.name, row.got, row.want)
		}
	}
	if s.N != 7 || s.MaxAt != 3 {
		t.Errorf("%+v", s)
	}
}

func TestUnknownIsNotZero(t *testing.T) {
	s := Summarise([]float64{1, math.NaN(), 3})
	if !math.IsNaN(s.Bias) || !math.IsNaN(s.MAE) || !math.IsNaN(s.RMSE) {
		t.Errorf("%+v", s)
	}
}

// TestOrderOfMeasures: |bias| <= MAE <= RMSE <= maximum for any differences.
func TestOrderOfMeasures(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		// Thousandths, so that no square underflows.
		e := make([]float64, rapid.IntRange(1, 50).Draw(t, "stations"))
		for i := range e {
			e[i] = float64(rapid.IntRange(-1e9, 1e9).Draw(t, "e")) / 1e3
		}
		s := Summarise(e)
		const rounding = 1 + 1e-13
		if math.Abs(s.Bias) > s.MAE*rounding || s.MAE > s.RMSE*rounding || s.RMSE > s.MaxAbs*rounding {
			t.Errorf("%+v", s)
		}
	})
}

func TestWithin(t *testing.T) {
	nan := math.NaN()
	for _, row := range []struct {
		name  string
		ratio []float64
		k     float64
		want  int
	}{
		{"none", nil, 2, 0},
		{"the limit is within", []float64{0, 1.9, 2, 2.1}, 2, 3},
		{"the limit but for last bits is within", []float64{2.0000000000000018, math.Nextafter(2, 0)}, 2, 2},
		{"one unit of the tenth digit is not", []float64{2.000000001}, 2, 0},
		{"unknown is neither", []float64{nan, 1}, 2, 1},
		{"infinite is not", []float64{math.Inf(1)}, 2, 0},
		{"half a unit of the tenth digit goes to the even one", []float64{2.0000000004999, 2.0000000005001}, 2, 1},
		{"a limit of more digits", []float64{1.1547005384, 1.15470053839}, 2 / math.Sqrt(3), 2}, // 1.154700538379
		{"of nothing", []float64{0, 1e-300}, 0, 1},
	} {
		if got := Within(row.ratio, row.k); got != row.want {
			t.Errorf("%s: %d, want %d", row.name, got, row.want)
		}
	}
	// 0.52 is 0.02 from 0.5 in the reader's digits: two uncertainties of 0.01.
	s, d, u := 0.52, 0.5, 0.01
	if Within([]float64{(s - d) / u}, 2) != 1 {
		t.Errorf("(0.52 - 0.50)/0.01 = %v is not within 2", (s-d)/u)
	}
}
