package comparison

import (
	"math"
	"strconv"
	"strings"
	"testing"

	"weirmark/core/internal/reference"
)

// rounds says whether v, rounded to the decimals of the printed number, is
// that number.
func rounds(v float64, printed string) bool {
	_, decimals, _ := strings.Cut(printed, ".")
	return strconv.FormatFloat(v, 'f', len(decimals), 64) == printed
}

// TestTaps holds the joint statistics of the 24 taps to what the design of the
// demo campaign prints (section 6.1), by every pattern it names. One number
// differs: the part of the offset of A is 2.2547 (numpy: joint.json), where the
// design prints 2.26.
func TestTaps(t *testing.T) {
	sB, d, sA := reference.TapsCp()
	random, grid, common := reference.TapsRandom, reference.TapsGrid, reference.TapsPressure
	split := func(rho float64) (independent, shared float64) {
		return common * math.Sqrt(1-rho), common * math.Sqrt(rho)
	}
	for _, row := range []struct {
		model                                        string
		s, printed                                   []float64
		uncorrelated, joint, shared, half            string
		offset, uOffset, part, remainder, rms, ratio string
		flip                                         float64 // share at which the statistic passes its 95 % point
		offsetPart                                   string
	}{
		{"A", sA, reference.TapsErrorA, "51.0", "27.0", "38.0", "9.42", "0.0301", "0.0201", "2.25", "24.79", "0.0310", "1.92", .0215, "1.50"},
		{"B", sB, reference.TapsErrorB, "14.5", "125.0", "180.6", "25.8", "0.0016", "0.0201", "0.006", "125.03", "0.0165", "1.29", .684, ""},
	} {
		n := len(d)
		e := Error(row.s, d)
		sum := 0.0
		for i, v := range e {
			// The curves carry four decimals, as the errors do.
			if math.Abs(v-row.printed[i]) > 1e-12 {
				t.Errorf("%s: E %v at tap %d, printed %v", row.model, v, i, row.printed[i])
			}
			sum += v * v
		}
		if n != 24 || !rounds(math.Sqrt(sum/float64(n)), row.rms) {
			t.Errorf("%s: %d taps, RMS %v", row.model, n, math.Sqrt(sum/float64(n)))
		}
		u := budget(n, []float64{random, grid, common}, nil).Total()
		largest, beyond := 0.0, 0
		for _, r := range Ratio(e, u) {
			largest = max(largest, r)
			if r > 2 {
				beyond++
			}
		}
		if !rounds(largest, row.ratio) || beyond != 0 || !rounds(u[0], "0.0213") {
			t.Errorf("%s: largest |E|/u_val %v, %d beyond 2, u_val %v", row.model, largest, beyond, u[0])
		}

		half, halfShared := split(0.5)
		for _, c := range []struct {
			what, printed       string
			independent, shared []float64
		}{
			{"uncorrelated", row.uncorrelated, []float64{random, grid, common}, nil},
			{"pressure reference common", row.joint, []float64{random, grid}, []float64{common}},
			{"grid common too", row.shared, []float64{random}, []float64{common, grid}},
			{"half of the variance common", row.half, []float64{random, grid, half}, []float64{halfShared}},
		} {
			q, err := Statistic(e, budget(n, c.independent, c.shared))
			if err != nil || q.Rank != n || !rounds(q.Statistic, c.printed) {
				t.Errorf("%s, %s: %+v, %v, printed %s", row.model, c.what, q, err, c.printed)
			}
		}

		s, ok := Offset(e, budget(n, []float64{random, grid}, []float64{common}))
		if !ok || !rounds(s.Offset, row.offset) || !rounds(s.U, row.uOffset) || !rounds(s.Part, row.part) || !rounds(s.Remainder, row.remainder) {
			t.Errorf("%s: %+v", row.model, s)
		}
		if row.offsetPart != "" && !rounds(s.Offset/s.U, row.offsetPart) {
			t.Errorf("%s: offset over u %v", row.model, s.Offset/s.U)
		}

		// Just below and above the printed share the statistic lies on either
		// side of its 95 % point. The step is half a unit in the last digit.
		excess := func(rho float64) float64 {
			independent, shared := split(rho)
			q, err := Statistic(e, budget(n, []float64{random, grid, independent}, []float64{shared}))
			if err != nil {
				t.Fatal(err)
			}
			return q.Statistic - ChiSquare95(n)
		}
		step := .00005
		if row.flip > .1 {
			step = .0005
		}
		if excess(row.flip-step)*excess(row.flip+step) >= 0 {
			t.Errorf("%s: no flip at the share %v: %v and %v", row.model, row.flip, excess(row.flip-step), excess(row.flip+step))
		}
	}
	if !rounds(ChiSquare95(24), "36.4") {
		t.Errorf("95 %% point %v", ChiSquare95(24))
	}
}
