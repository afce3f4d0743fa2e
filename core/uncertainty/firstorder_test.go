package uncertainty

import (
	"errors"
	"math"
	"testing"
)

// endGauge is JCGM 100:2008 H.1 (values quoted; published-examples 3.1), in
// nanometre and kelvin.
func endGauge() Model {
	return Model{
		F: func(x []float64) float64 { return x[0] + x[1] - x[0]*(x[2]*x[3]+x[4]*x[5]) },
		Inputs: []Input{
			{Value: 50.000623e6, U: 25, Distribution: Normal, Degrees: 18},
			{Value: 215, U: 9.7, Distribution: Normal, Degrees: 25.6},
			{Value: 0, U: 0.58e-6, Distribution: Normal, Degrees: 50},
			{Value: -0.1, U: 0.41, Distribution: Normal},
			{Value: 11.5e-6, U: 2e-6 / math.Sqrt(3), Distribution: Normal}, // printed 1.2e-6
			{Value: 0, U: 0.029, Distribution: Normal, Degrees: 2},
		},
	}
}

func TestEndGauge(t *testing.T) {
	m := endGauge()
	r, err := m.FirstOrder()
	if err != nil {
		t.Fatal(err)
	}
	second, err := m.SecondOrderU()
	if err != nil {
		t.Fatal(err)
	}
	low, high, ok := r.Interval(0.99)
	for _, row := range []struct {
		name                 string
		got, want, tolerance float64
		source               string
	}{
		{"length, mm", r.Value / 1e6, 50.000838, 1e-12, "printed 50.000 838"},
		{"part of da", math.Abs(r.Parts[2]), 2.9000361, 1e-7, "printed 2.9"},
		{"part of dth", math.Abs(r.Parts[5]), 16.6752078, 1e-7, "recomputed; 16.6 printed, truncated at the source"},
		{"part of th", r.Parts[3], 0, 1e-9, "no first-order part"},
		{"part of as", r.Parts[4], 0, 1e-9, "no first-order part"},
		{"u", r.U, 31.7106096, 1e-8, "printed 32"},
		{"degrees", r.Degrees, 16.6560627, 1e-8, "printed 16.7"},
		{"U at 99 %", (high - low) / 2, 92.139848, 1e-7, "interpolated; 93 printed for degrees cut to 16"},
		// Third differences on eighths of u: rounding of 5e7 nm over 1/512.
		{"second-order terms", math.Sqrt(second*second - r.U*r.U), math.Hypot(11.8901481, 1.6743366), 1e-5, "recomputed; 11.7 and 1.7 printed"},
		{"u of second order", second, 33.9078426, 1e-6, "printed 34"},
	} {
		if math.Abs(row.got-row.want) > row.tolerance*math.Max(1, math.Abs(row.want)) {
			t.Errorf("%s: %v, want %v (JCGM 100 H.1: %s)", row.name, row.got, row.want, row.source)
		}
	}
	k, _ := StudentFactor(0.99, math.Floor(r.Degrees))
	if !ok || math.Abs(k*r.U-92.6198) > 5e-5 {
		t.Errorf("%v: t_99(16) u = %v, recomputed 92.6198", ok, k*r.U)
	}
}

// TestImpedance: JCGM 100:2008 H.2, approach 1 (data quoted; published-examples
// 3.2): means, correlations and the three results from five sets of readings.
func TestImpedance(t *testing.T) {
	data := [][]float64{
		{5.007, 4.994, 5.005, 4.990, 4.999},
		{19.663e-3, 19.639e-3, 19.640e-3, 19.685e-3, 19.678e-3},
		{1.0456, 1.0438, 1.0468, 1.0428, 1.0433},
	}
	var inputs []Input
	r := make([][]float64, 3)
	for i, x := range data {
		mean, _, u := Replicates(x)
		inputs = append(inputs, Input{Value: mean, U: u, Distribution: Normal, Degrees: 4})
		r[i] = make([]float64, 3)
		for j, y := range data {
			r[i][j] = Correlation(x, y)
			if i == j {
				r[i][j] = 1
			} else if j < i {
				r[i][j] = r[j][i]
			}
		}
	}
	if !same([]float64{r[0][1], r[0][2], r[1][2]}, []float64{-0.35531122, 0.85762421, -0.64511122}, 1e-7) {
		t.Errorf("correlations %v; printed -0.36, 0.86, -0.65", r)
	}
	results := map[string]FirstOrder{}
	for _, row := range []struct {
		name                      string
		f                         func(x []float64) float64
		value, u, uWithout, least float64
		printed                   string
	}{
		{"R", func(x []float64) float64 { return x[0] / x[1] * math.Cos(x[2]) }, 127.73216993, 0.07107141, 0.1945, 1e-7, "127.732, 0.071"},
		{"X", func(x []float64) float64 { return x[0] / x[1] * math.Sin(x[2]) }, 219.84651191, 0.29558168, 0.2009, 1e-7, "219.847, 0.295 (0.296 recomputed)"},
		{"Z", func(x []float64) float64 { return x[0] / x[1] }, 254.25970195, 0.23633613, 0.2041, 1e-7, "254.260, 0.236"},
	} {
		got, err := Model{row.f, inputs, r}.FirstOrder()
		if err != nil || math.Abs(got.Value-row.value) > 1e-8 || math.Abs(got.U-row.u) > row.least {
			t.Errorf("%s: %+v, %v, printed %s", row.name, got, err, row.printed)
		}
		if _, _, ok := got.Interval(0.95); ok || !math.IsNaN(got.Degrees) {
			t.Errorf("%s: effective degrees %v of correlated inputs", row.name, got.Degrees)
		}
		plain, err := Model{row.f, inputs, nil}.FirstOrder()
		if err != nil || math.Abs(plain.U-row.uWithout) > 5e-5 {
			t.Errorf("%s without correlation: %v, %v, want %v", row.name, plain.U, err, row.uWithout)
		}
		results[row.name] = got
	}
	// Correlations of the results from their parts: printed -0.588, -0.485, 0.993 (memory).
	for _, row := range []struct {
		a, b string
		want float64
	}{{"R", "X", -0.58842978}, {"R", "Z", -0.48525922}, {"X", "Z", 0.99251165}} {
		a, b, sum := results[row.a], results[row.b], 0.0
		for i, p := range a.Parts {
			for j, q := range b.Parts {
				sum += p * q * r[i][j]
			}
		}
		if got := sum / (a.U * b.U); math.Abs(got-row.want) > 1e-6 {
			t.Errorf("r(%s, %s) = %v, want %v", row.a, row.b, got, row.want)
		}
	}
}

// TestThermalExpansion: NIST TN 1900 E13 (quoted; published-examples 3.5).
func TestThermalExpansion(t *testing.T) {
	m := Model{
		F: func(x []float64) float64 { return (x[1] - x[0]) / (x[0] * (x[3] - x[2])) },
		Inputs: []Input{
			{Value: 1.4999, U: 0.0001, Distribution: Normal}, {Value: 1.5021, U: 0.0002, Distribution: Normal},
			{Value: 288.15, U: 0.02, Distribution: Normal}, {Value: 373.10, U: 0.05, Distribution: Normal},
		},
	}
	// Printed 1.7266e-5, 1.76e-6; recomputed to eight digits there. The slope over
	// a 64th of u carries the curvature of 1/x: 1e-12.
	if r, err := m.FirstOrder(); err != nil || math.Abs(r.Value-1.7266209e-5) > 5e-13 || math.Abs(r.U-1.7554773e-6) > 5e-13 {
		t.Errorf("%+v, %v", r, err)
	}
}

// TestProductOfThreeMeans: y = x1/x2 x3 of published-examples 3.4 (quoted): u
// 0.00494 printed with round-off, 0.0049318020 recomputed; degrees 27.7 printed,
// 27.5127 recomputed; U 0.0101.
func TestProductOfThreeMeans(t *testing.T) {
	m := Model{
		F: func(x []float64) float64 { return x[0] / x[1] * x[2] },
		Inputs: []Input{
			{Value: 0.1820, U: 0.00093, Distribution: Normal, Degrees: 9},
			{Value: 0.1823, U: 0.00058, Distribution: Normal, Degrees: 19},
			{Value: 0.6978, U: 0.0026, Distribution: Normal, Degrees: 19},
		},
	}
	r, err := m.FirstOrder()
	low, high, ok := r.Interval(0.95)
	if err != nil || !ok || math.Abs(r.Value-0.69665167) > 5e-9 || math.Abs(r.U-0.0049318020) > 5e-11 || math.Abs(r.Degrees-27.5127) > 5e-5 || math.Abs((high-low)/2-0.01011041) > 5e-9 {
		t.Errorf("%+v, %v, %v to %v", r, err, low, high)
	}
}

func TestFirstOrderMomentsAndUnits(t *testing.T) {
	sum := func(x []float64) float64 { return x[0] + 2*x[1] }
	m := Model{F: sum, Inputs: []Input{
		{Value: 1, Distribution: Split, Sides: TwoPiece{1, 3}},
		{Value: 5, U: 0, Distribution: Normal},
	}}
	r, err := m.FirstOrder()
	sides := TwoPiece{1, 3}
	if err != nil || math.Abs(r.Value-(11+sides.Shift())) > 1e-13 || math.Abs(r.U-sides.U()) > 1e-12 || r.Parts[1] != 0 || !math.IsNaN(r.Sensitivity[1]) {
		t.Errorf("%+v, %v", r, err)
	}
	// An uncertainty below the rounding of its value moves nothing.
	m.Inputs = []Input{{Value: 1e20, U: 1, Distribution: Normal}, {Value: 0, U: 0.5, Distribution: Normal}}
	if r, err := (Model{func(x []float64) float64 { return x[1] + 0*x[0] }, m.Inputs, nil}).FirstOrder(); err != nil || r.Parts[0] != 0 || math.Abs(r.U-0.5) > 1e-15 {
		t.Errorf("%+v, %v", r, err)
	}
}

func TestModelRefuses(t *testing.T) {
	ratio := func(x []float64) float64 { return 1 / x[0] }
	good := Input{Value: 1, U: 0.1, Distribution: Normal}
	two := func(r ...float64) [][]float64 { return [][]float64{{r[0], r[1]}, {r[2], r[3]}} }
	for _, row := range []struct {
		name string
		m    Model
		want error
	}{
		{"no distribution", Model{F: ratio, Inputs: []Input{{Value: 1, U: 1}}}, ErrInput},
		{"negative u", Model{F: ratio, Inputs: []Input{{Value: 1, U: -1, Distribution: Normal}}}, ErrInput},
		{"unknown u", Model{F: ratio, Inputs: []Input{{Value: 1, U: nan, Distribution: Normal}}}, ErrInput},
		{"infinite u", Model{F: ratio, Inputs: []Input{{Value: 1, U: inf, Distribution: Normal}}}, ErrInput},
		{"unknown value", Model{F: ratio, Inputs: []Input{{Value: nan, U: 1, Distribution: Normal}}}, ErrInput},
		{"infinite value", Model{F: ratio, Inputs: []Input{{Value: inf, U: 1, Distribution: Normal}}}, ErrInput},
		{"negative degrees", Model{F: ratio, Inputs: []Input{{Value: 1, U: 1, Distribution: Normal, Degrees: -1}}}, ErrInput},
		{"Student without degrees", Model{F: ratio, Inputs: []Input{{Value: 1, U: 1, Distribution: Student}}}, ErrInput},
		{"negative side", Model{F: ratio, Inputs: []Input{{Value: 1, Distribution: Split, Sides: TwoPiece{-1, 1}}}}, ErrInput},
		{"correlated rectangles", Model{F: ratio, Inputs: []Input{{Value: 1, U: 1, Distribution: Rectangular}, good}, Correlation: two(1, .5, .5, 1)}, ErrInput},
		{"correlation above one", Model{F: ratio, Inputs: []Input{good, good}, Correlation: two(1, 1.5, 1.5, 1)}, ErrInput},
		{"correlation not symmetric", Model{F: ratio, Inputs: []Input{good, good}, Correlation: two(1, .5, .4, 1)}, ErrInput},
		{"correlation of another size", Model{F: ratio, Inputs: []Input{good}, Correlation: two(1, .5, .5, 1)}, ErrInput},
		{"ragged correlation", Model{F: ratio, Inputs: []Input{good, good}, Correlation: [][]float64{{1, .5}, {.5}}}, ErrInput},
		{"no unit diagonal", Model{F: ratio, Inputs: []Input{good, good}, Correlation: two(2, 0, 0, 1)}, ErrInput},
		{"a correlation no three can have", Model{F: ratio, Inputs: []Input{good, good, good}, Correlation: [][]float64{{1, .9, -.9}, {.9, 1, .9}, {-.9, .9, 1}}}, ErrInput},
		{"no value at the estimate", Model{F: ratio, Inputs: []Input{{Value: 0, U: 1, Distribution: Normal}}}, ErrModel},
		{"no value beside it", Model{F: func(x []float64) float64 { return math.Sqrt(x[0]) }, Inputs: []Input{{Value: 0, U: 1, Distribution: Normal}}}, ErrModel},
	} {
		if r, err := row.m.FirstOrder(); !errors.Is(err, row.want) {
			t.Errorf("%s: %+v, %v, want %v", row.name, r, err, row.want)
		}
		if s, err := row.m.Sample(0.95, 1); !errors.Is(err, row.want) && row.name != "no value at the estimate" {
			t.Errorf("%s, sampled: %+v, %v, want %v", row.name, s, err, row.want)
		}
		if u, err := row.m.SecondOrderU(); err == nil {
			t.Errorf("%s, second order: %v", row.name, u)
		}
	}
	for _, level := range []float64{0, 1, nan, 95} {
		if _, err := (Model{F: ratio, Inputs: []Input{good}}).Sample(level, 1); !errors.Is(err, ErrInput) {
			t.Errorf("level %v: %v", level, err)
		}
	}
}
