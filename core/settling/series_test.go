package settling

import (
	"math"
	"slices"
	"testing"
)

func TestRecord(t *testing.T) {
	nan, inf := math.NaN(), math.Inf(1)
	for _, row := range []struct {
		what      string
		at, value []float64
		start     float64
		step      float64
		y         []float64
		notices   []string
	}{
		{"counted", nil, []float64{5, 6, 7}, 1, 1, []float64{5, 6, 7}, []string{}},
		{"every tenth", []float64{10, 20, 30}, []float64{5, 6, 7}, 10, 10, []float64{5, 6, 7}, []string{}},
		{"no number at the front and inside", []float64{1, 2, 3, 4, 5}, []float64{nan, 5, inf, 7, 8}, 2, 1, []float64{5, 6, 7, 8}, []string{"monitor-rows", "monitor-uneven"}},
		{"place without a number", []float64{1, nan, 2}, []float64{5, 6, 7}, 1, 1, []float64{5, 7}, []string{"monitor-rows"}},
		{"beyond all sense", []float64{1, 2, 3}, []float64{5, -1e200, 7}, 1, 2, []float64{5, 7}, []string{"monitor-rows"}},
		{"ends without numbers", []float64{1, 2, 3}, []float64{5, 6, nan}, 0, 0, nil, []string{"monitor-broken"}},
		{"inner iterations", []float64{1, 1, 2, 2, 3}, []float64{9, 5, 9, 6, 7}, 1, 1, []float64{5, 6, 7}, []string{"monitor-repeated"}},
		{"count begins anew", []float64{1, 2, 3, 1, 2}, []float64{1, 2, 3, 8, 9}, 1, 1, []float64{8, 9}, []string{"monitor-restart"}},
		{"rows missing", []float64{1, 2, 3, 14, 15, 16}, []float64{1, 2, 3, 8, 9, 7}, 14, 1, []float64{8, 9, 7}, []string{"monitor-restart"}},
		{"a step of ten is no break", []float64{1, 2, 12}, []float64{1, 2, 12}, 1, 1, []float64{1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 11, 12}, []string{"monitor-uneven"}},
		{"growing time steps", []float64{0, 1, 3, 7}, []float64{0, 2, 6, 14}, 0, 1.75, []float64{0, 3.5, 7, 10.5, 14}, []string{"monitor-uneven"}},
		{"nothing", nil, nil, 0, 0, nil, []string{}},
		{"nothing usable", nil, []float64{nan, nan}, 0, 0, nil, []string{"monitor-rows"}},
	} {
		r := newRecord(Series{row.at, row.value}, Options{})
		same := slices.EqualFunc(r.y, row.y, func(a, b float64) bool { return near(a, b, 1e-14) })
		if !same || r.start != row.start || !near(r.step, row.step, 1e-15) || !slices.Equal(codes(r.notices), row.notices) {
			t.Errorf("%s: from %v by %v: %v, %v", row.what, r.start, r.step, r.y, codes(r.notices))
		}
	}
}

func TestRecordTellsTheBreak(t *testing.T) {
	r := newRecord(Series{[]float64{1, 2, 3, 14, 15, 7, 8, 9}, []float64{1, 1, 1, 1, 1.5, 1.25, 2, 2}}, Options{Name: "Cd"})
	want := "Cd has 2 breaks in its monitor, the last from 15.0000 to 7.00000 iterations (change across it −0.250). The 3 rows behind it were judged. Check that the restart changed nothing else."
	if len(r.notices) != 1 || r.notices[0].Text != want {
		t.Errorf("%v", r.notices)
	}
}

func TestRecordRefusesUnequalLengths(t *testing.T) {
	defer func() {
		if recover() == nil {
			t.Error("two lengths were taken")
		}
	}()
	newRecord(Series{[]float64{1}, []float64{1, 2}}, Options{})
}
