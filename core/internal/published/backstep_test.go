package published

import (
	"strconv"
	"testing"

	"weirmark/core/comparison"
	"weirmark/core/internal/reference"
	"weirmark/core/interpolate"
	"weirmark/core/metric"
	"weirmark/core/station"
	"weirmark/core/uncertainty"
)

// The backward-facing step of Driver and Seegmiller: skin friction of the lower
// wall. Source: NASA Turbulence Modeling Resource (public copy, CC0 1.0), folder
// backstep. The error column of the measured file is taken as one standard
// uncertainty, independent between stations; the source states no coverage.
var models = []struct{ name, simulated, figures string }{
	{"SA", "nasa-tmr/backstep/backstep_cfl3d_cf_sa.dat", "backstep-sa.csv"},
	{"SST", "nasa-tmr/backstep/backstep_cfl3d_cf_sst.dat", "backstep-sst.csv"},
	{"W06", "nasa-tmr/backstep/backstep_cfl3d_cf_w06.dat", "backstep-w06.csv"},
}

func measured(t *testing.T) (x, d, u []float64) {
	columns := curve(t, "nasa-tmr/backstep/cf.exp.dat", "x", "cf", "error")
	return columns[0], columns[1], columns[2]
}

func simulated(t *testing.T, name string, at []float64, m interpolate.Method) []float64 {
	t.Helper()
	columns := curve(t, name, "x", "cf")
	r := station.Resample("cf", "x", columns[0], columns[1], at, station.Options{Method: m})
	if r.Refused || len(r.S) != len(at) {
		t.Fatalf("%s: %d of %d stations, notices %v", name, len(r.S), len(at), r.Notices)
	}
	return r.S
}

func TestBackstepStations(t *testing.T) {
	reference.SharedDir(t)
	for _, model := range models {
		t.Run(model.name, func(t *testing.T) {
			x, d, u := measured(t)
			s := simulated(t, model.simulated, x, interpolate.Linear)
			e := comparison.Error(s, d)
			ratio := comparison.Ratio(e, u)
			rows := figures(t, model.figures)
			if len(rows) != 20 || len(x) != len(rows) {
				t.Fatalf("%d stations read, %d committed, want 20", len(x), len(rows))
			}
			for i, row := range rows {
				for _, value := range []struct {
					name string
					got  float64
					size float64
				}{
					{"x", x[i], x[i]},
					{"d", d[i], d[i]},
					{"u_d", u[i], u[i]},
					{"s", s[i], s[i]},
					{"e", e[i], d[i]},
					{"ratio", ratio[i], d[i] / u[i]},
				} {
					if want := number(t, row, value.name); !equal(value.got, want, value.size) {
						t.Errorf("x/H = %v: %s = %v, scipy has %v", x[i], value.name, value.got, want)
					}
				}
			}
		})
	}
}

func TestBackstepSummary(t *testing.T) {
	reference.SharedDir(t)
	rows := figures(t, "backstep-summary.csv")
	if len(rows) != len(models) {
		t.Fatalf("%d rows, want %d", len(rows), len(models))
	}
	for i, model := range models {
		t.Run(model.name, func(t *testing.T) {
			row := rows[i]
			x, d, u := measured(t)
			e := comparison.Error(simulated(t, model.simulated, x, interpolate.Linear), d)
			ratio := comparison.Ratio(e, u)
			m := metric.Summarise(e)
			q, err := comparison.Statistic(e, uncertainty.Combine(len(u), []uncertainty.Source{{U: u}}))
			if err != nil {
				t.Fatal(err)
			}
			counts := []struct {
				name string
				got  int
			}{
				{"n", m.N}, {"n", q.Rank}, {"within_1", metric.Within(ratio, 1)}, {"within_2", metric.Within(ratio, 2)},
			}
			for _, count := range counts {
				if row[count.name] != strconv.Itoa(count.got) {
					t.Errorf("%s = %d, scipy has %s", count.name, count.got, row[count.name])
				}
			}
			for _, value := range []struct {
				name      string
				got, size float64
			}{
				{"bias", m.Bias, m.MAE},
				{"mae", m.MAE, 0},
				{"rmse", m.RMSE, 0},
				{"max", m.MaxAbs, 0},
				{"chi2", q.Statistic, 0},
			} {
				if want := number(t, row, value.name); !equal(value.got, want, value.size) {
					t.Errorf("%s = %v, scipy has %v", value.name, value.got, want)
				}
			}
			// A tail of 1e-46 multiplies the digits lost in its argument by half of it: 1e-9.
			if want := number(t, row, "tail"); row["model"] != model.name || q.P() > want*(1+1e-9) || q.P() < want*(1-1e-9) {
				t.Errorf("%s: tail = %v, scipy has %v", row["model"], q.P(), want)
			}
		})
	}
}

// TestBackstepMonotone: linear and monotone cubic beside numpy.interp and
// scipy.interpolate.PchipInterpolator.
func TestBackstepMonotone(t *testing.T) {
	x, _, _ := measured(t)
	rows := figures(t, "backstep-monotone.csv")
	linear := simulated(t, models[0].simulated, x, interpolate.Linear)
	monotone := simulated(t, models[0].simulated, x, interpolate.Monotone)
	if len(rows) != len(x) {
		t.Fatalf("%d rows, want %d", len(rows), len(x))
	}
	for i, row := range rows {
		if want := number(t, row, "linear"); !equal(linear[i], want, 0) {
			t.Errorf("x/H = %v: linear %v, numpy has %v", x[i], linear[i], want)
		}
		if want := number(t, row, "monotone"); !equal(monotone[i], want, 0) {
			t.Errorf("x/H = %v: monotone %v, scipy has %v", x[i], monotone[i], want)
		}
	}
}
