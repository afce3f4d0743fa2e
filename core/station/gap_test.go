package station

import (
	"math"
	"slices"
	"testing"

	"pgregory.net/rapid"
)

// Spacings of one with a hole of h: it is a gap where h is above m times the
// median, and then no station inside it is answered.
func TestWideSpacing(t *testing.T) {
	for _, row := range []struct {
		hole, m float64
		gap     bool
	}{{9, 10, false}, {10, 10, false}, {10.5, 10, true}, {10.5, 11, false}, {3, 2.5, true}, {1e4, 0, false}} {
		var x, y []float64
		for i := range 20 {
			at := float64(i)
			if i >= 10 {
				at += row.hole - 1
			}
			x, y = append(x, at), append(y, at)
		}
		r := Resample("S", "x", x, y, []float64{4.5, 9, 9.5, 9 + row.hole/2, 9 + row.hole, 9.5 + row.hole}, Options{Gap: row.m})
		want := []int{0, 1, 2, 3, 4, 5}
		var notices []string
		if row.gap {
			want, notices = []int{0, 1, 4, 5}, []string{"curve-gap", "station-gap"}
		}
		if !slices.Equal(r.Kept, want) || !slices.Equal(codes(r.Notices), notices) {
			t.Errorf("hole %v, m %v: kept %v, notices %v", row.hole, row.m, r.Kept, codes(r.Notices))
		}
		if row.gap && (!slices.Equal(r.Gap, []int{2, 3}) || r.Part[1] == r.Part[2] || r.Part[0] != r.Part[1]) {
			t.Errorf("hole %v: gap %v, parts %v", row.hole, r.Gap, r.Part)
		}
	}
}

// Stretched grids are whole whatever they span, and so is a cut through cells
// that leaves most rows in close pairs or triples.
func TestStretchedIsWhole(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		ratio := rapid.Float64Range(1, 1.9).Draw(t, "ratio")
		n := rapid.IntRange(5, 40).Draw(t, "n")
		close := rapid.IntRange(0, 2).Draw(t, "close")
		x, h := []float64{}, 1e-6
		at := 0.0
		for range n {
			x = append(x, at)
			for k := range close {
				x = append(x, at+float64(k+1)*1e-4*h)
			}
			at += h
			h *= ratio
		}
		c := curve{x: x, y: x, pieces: []piece{{to: len(x)}}}
		c.partWide(10)
		if len(c.pieces) != 1 {
			t.Fatalf("ratio %v, %d extra rows: %d pieces, gaps %v", ratio, close, len(c.pieces), c.wide)
		}
	})
}

// A sine over one turn, sampled every 10 degrees from 5 to 355, has values at
// the seam and at any number of turns: what lies beyond its ends is inside.
func TestPeriodic(t *testing.T) {
	var x, y []float64
	for d := 5.0; d < 360; d += 10 {
		x, y = append(x, d), append(y, math.Sin(d*math.Pi/180))
	}
	at := []float64{0, 358, 360, -1, 722, 90}
	if r := Resample("S", "x", x, y, at, Options{}); len(r.Outside) != 5 {
		t.Errorf("without a period %d stations are outside", len(r.Outside))
	}
	r := Resample("S", "x", x, y, at, Options{Period: 360, Gap: 10})
	if len(r.Kept) != len(at) || len(r.Notices) != 0 {
		t.Fatalf("kept %v, notices %v", r.Kept, codes(r.Notices))
	}
	for i, k := range r.Kept {
		want := math.Sin(at[k] * math.Pi / 180)
		if math.Abs(r.S[i]-want) > r.UInterp[i]*math.Sqrt(3)+1e-12 || r.Part[i] != r.Part[0] {
			t.Errorf("at %v: %v ± %v for %v, parts %v", at[k], r.S[i], r.UInterp[i], want, r.Part)
		}
	}
	// A row at both ends of the turn is one place; with another value there it is a jump.
	closed := Resample("S", "x", append([]float64{0}, append(x, 360)...), append([]float64{0}, append(y, 0)...), []float64{-2, 0, 2}, Options{Period: 360})
	if len(closed.Kept) != 3 || closed.S[1] != 0 || math.Abs(closed.S[0]+closed.S[2]) > 1e-12 {
		t.Errorf("closed: %v %v", closed.Kept, closed.S)
	}
	jump := Resample("S", "x", append([]float64{0}, append(x, 360)...), append([]float64{0}, append(y, 1)...), []float64{-2, 0, 2}, Options{Period: 360})
	if !slices.Equal(jump.Kept, []int{0, 2}) || !slices.Equal(jump.Jump, []int{1}) {
		t.Errorf("jump at the seam: %+v", jump)
	}
	// Half a turn does not close: its seam is no spacing but a part that is missing.
	half := Resample("S", "x", x[:18], y[:18], []float64{90, 200, -60}, Options{Period: 360})
	if !slices.Equal(half.Kept, []int{0}) || !slices.Equal(half.Gap, []int{1, 2}) {
		t.Errorf("half a turn: %+v", half)
	}
	if over := Resample("S", "x", []float64{0, 200, 400}, []float64{0, 1, 2}, at, Options{Period: 360}); !over.Refused || codes(over.Notices)[0] != "curve-period" {
		t.Errorf("more than a period: %+v", over)
	}
}

// Averaging over a width keeps a straight line and adds h²/24 f” to a
// parabola, here sampled finely enough that the straight lines between rows
// add less than a thousandth of that.
func TestWidth(t *testing.T) {
	var x, line, parabola []float64
	for i := range 1001 {
		at := float64(i) / 1000
		x, line, parabola = append(x, at), append(line, 3-2*at), append(parabola, 5*at*at)
	}
	at := []float64{.05, .1, .1234, .5, .9, .9001, .95}
	for _, h := range []float64{.05, .1, .2} {
		l := Resample("S", "x", x, line, at, Options{Width: h})
		p := Resample("S", "x", x, parabola, at, Options{Width: h})
		inside := 0
		for _, v := range at {
			if v >= h/2 && v <= 1-h/2 {
				inside++
			}
		}
		if len(l.Kept) != inside || len(l.Outside) != len(at)-inside || inside < len(at) != slices.Contains(codes(l.Notices), "station-width") {
			t.Errorf("h %v: kept %v, outside %v, notices %v", h, l.Kept, l.Outside, codes(l.Notices))
		}
		for i, k := range l.Kept {
			if want := 3 - 2*at[k]; math.Abs(l.S[i]-want) > 1e-12 {
				t.Errorf("h %v: the line at %v is %v, want %v", h, at[k], l.S[i], want)
			}
			want := h * h / 24 * 10
			if got := p.S[i] - 5*at[k]*at[k]; math.Abs(got/want-1) > 2e-3 {
				t.Errorf("h %v: the parabola gains %v at %v, want %v", h, got, at[k], want)
			}
		}
	}
}
