package uncertainty

import (
	"errors"
	"math"
	"testing"
)

// spread makes five readings of a mean and a standard deviation: the analysis
// of variance knows nothing else of them.
func spread(mean, s float64) []float64 {
	r := s * math.Sqrt2
	return []float64{mean - r, mean, mean, mean, mean + r}
}

// TestZenerVoltage: JCGM 100:2008 H.5, ten days of five readings in microvolt
// above 10 V; daily means, deviations and results from memory. They confirm each
// other but for F, remembered as 2.25: it is 2.2615 from these rounded figures.
func TestZenerVoltage(t *testing.T) {
	means := []float64{172, 116, 13, 144, 106, 31, 60, 125, 163, 41}
	deviations := []float64{60, 77, 111, 101, 67, 93, 80, 73, 88, 86}
	var x []float64
	var day []int
	for d, mean := range means {
		for _, v := range spread(mean, deviations[d]) {
			x, day = append(x, v), append(day, 100-d)
		}
	}
	n, err := Nested(x, day)
	if err != nil || len(n.Levels) != 2 {
		t.Fatal(err, n)
	}
	days, repeats := n.Levels[0], n.Levels[1]
	for _, row := range []struct {
		name             string
		got, want, least float64
	}{
		{"mean", n.Mean, 97, 0.5},
		{"u of the mean: 57/sqrt 10 = 18", n.U, 18, 0.5},
		{"its degrees", n.Degrees, 9, 0},
		{"s_a", math.Sqrt(days.MeanSquare), 128, 0.5},
		{"s_b", math.Sqrt(repeats.MeanSquare), 85, 0.5},
		{"degrees of s_b", repeats.Degrees, 40, 0},
		{"between days", math.Sqrt(days.Variance), 43, 0.5},
		{"F", days.MeanSquare / repeats.MeanSquare, 2.2615, 5e-5},
	} {
		if math.Abs(row.got-row.want) > row.least {
			t.Errorf("%s: %v, want %v", row.name, row.got, row.want)
		}
	}
}

// TestSiRstv: NIST StRD one-way analysis SiRstv, five instruments of five
// readings; readings and certified values from memory, which confirm each other.
func TestSiRstv(t *testing.T) {
	readings := [][]float64{
		{196.3052, 196.1240, 196.1890, 196.2569, 196.3403},
		{196.3042, 196.3825, 196.1669, 196.3257, 196.0422},
		{196.1303, 196.2005, 196.2889, 196.0343, 196.1811},
		{196.2795, 196.1748, 196.1494, 196.1485, 195.9885},
		{196.2119, 196.1051, 196.1850, 196.0052, 196.2090},
	}
	var x []float64
	var instrument []int
	for k, r := range readings {
		for _, v := range r {
			x, instrument = append(x, v), append(instrument, k)
		}
	}
	n, err := Nested(x, instrument)
	if err != nil {
		t.Fatal(err)
	}
	got := []float64{n.Levels[0].MeanSquare, n.Levels[1].MeanSquare, n.Levels[0].MeanSquare / n.Levels[1].MeanSquare}
	// The inputs carry 196.x to 1e-14, the mean squares 1e-2: eleven digits.
	if want := []float64{1.27865654000000e-2, 1.08318280000000e-2, 1.18046237440255}; !same(got, want, 1e-10) {
		t.Errorf("%v, want %v", got, want)
	}
}

// TestThreeLevels: 3 days of 5 readings, and days of re-rigs of readings, solved
// by hand.
func TestThreeLevels(t *testing.T) {
	for _, row := range []struct {
		name       string
		x          []float64
		labels     [][]int
		mean, u    float64
		degrees    float64
		components []float64
	}{
		{"3 x 5: means 10, 12, 17, deviation sqrt 2 within; 65/5 day mean square 65",
			append(append(spread(10, math.Sqrt2), spread(12, math.Sqrt2)...), spread(17, math.Sqrt2)...),
			[][]int{{1, 1, 1, 1, 1, 2, 2, 2, 2, 2, 3, 3, 3, 3, 3}},
			13, math.Sqrt(65. / 15), 2, []float64{(65. - 2) / 5, 2}},
		{"2 days of 2 re-rigs of 2 readings: mean squares 128, 16, 2",
			[]float64{0, 2, 4, 6, 8, 10, 12, 14},
			[][]int{{0, 0, 0, 0, 1, 1, 1, 1}, {0, 0, 1, 1, 0, 0, 1, 1}},
			7, math.Sqrt(128. / 8), 1, []float64{(128. - 16) / 4, (16. - 2) / 2, 2}},
		{"days of 1 and 3 readings: day mean square 12, within 1, coefficient 3/2",
			[]float64{0, 3, 4, 5},
			[][]int{{0, 1, 1, 1}},
			3, math.Sqrt((12.-1)/1.5*10/16 + 1./4), 1, []float64{(12. - 1) / 1.5, 1}},
		{"a component below zero counts as zero: two equal means",
			[]float64{-1, 1, -1, 1},
			[][]int{{0, 0, 1, 1}},
			0, math.Sqrt(2. / 4), 1, []float64{-1, 2}},
		{"one reading a day: the day holds both",
			[]float64{1, 2, 3, 4, 5},
			[][]int{{0, 1, 2, 3, 4}},
			3, math.Sqrt(2.5 / 5), 4, []float64{2.5, nan}},
		{"one day: the readings",
			[]float64{1, 2, 3, 4, 5},
			[][]int{{7, 7, 7, 7, 7}},
			3, math.Sqrt(2.5 / 5), 4, []float64{nan, 2.5}},
		{"no labels: repeats", []float64{1, 2, 3, 4, 5}, nil, 3, math.Sqrt(2.5 / 5), 4, []float64{2.5}},
	} {
		n, err := Nested(row.x, row.labels...)
		if err != nil {
			t.Errorf("%s: %v", row.name, err)
			continue
		}
		var components []float64
		for _, l := range n.Levels {
			components = append(components, l.Variance)
		}
		if math.Abs(n.Mean-row.mean) > 1e-14 || !same([]float64{n.U}, []float64{row.u}, 1e-14) || n.Degrees != row.degrees || !same(components, row.components, 1e-13) {
			t.Errorf("%s: %+v", row.name, n)
		}
	}
}

func TestNestedRefuses(t *testing.T) {
	for _, row := range []struct {
		name   string
		x      []float64
		labels [][]int
	}{
		{"one reading", []float64{1}, [][]int{{0}}},
		{"none", nil, nil},
		{"labels of another length", []float64{1, 2}, [][]int{{0}}},
		{"an unknown reading", []float64{1, nan}, [][]int{{0, 0}}},
		{"an infinite reading", []float64{1, inf}, [][]int{{0, 0}}},
	} {
		if n, err := Nested(row.x, row.labels...); !errors.Is(err, ErrNested) {
			t.Errorf("%s: %+v, %v", row.name, n, err)
		}
	}
}
