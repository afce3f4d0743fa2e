package station

import (
	"math"
	"slices"
	"testing"

	"pgregory.net/rapid"

	"weirmark/core/interpolate"
	"weirmark/core/notice"
)

var nan, inf = math.NaN(), math.Inf(1)

func codes(list []notice.Notice) []string {
	var all []string
	for _, n := range list {
		all = append(all, n.Code)
	}
	return all
}

func equal(a, b []float64) bool {
	return slices.EqualFunc(a, b, func(v, w float64) bool { return v == w || math.IsNaN(v) && math.IsNaN(w) })
}

// TestResample holds what becomes of every station of small curves solved by
// hand. Values are linear.
func TestResample(t *testing.T) {
	for _, row := range []struct {
		what               string
		x, y, at           []float64
		kept               []int
		s                  []float64
		outside, gap, jump []int
		notices            []string
		refused            bool
	}{
		{what: "inside and at both ends", x: []float64{0, 1, 3}, y: []float64{0, 2, 6}, at: []float64{0, 0.5, 2, 3},
			kept: []int{0, 1, 2, 3}, s: []float64{0, 1, 4, 6}},
		{what: "outside at both ends", x: []float64{0, 1}, y: []float64{0, 2}, at: []float64{-1, 0.5, 1.1},
			kept: []int{1}, s: []float64{1}, outside: []int{0, 2}, notices: []string{"station-outside"}},
		{what: "no station inside", x: []float64{0, 1}, y: []float64{0, 2}, at: []float64{-1, 5},
			outside: []int{0, 1}, notices: []string{"station-none"}, refused: true},
		{what: "no station at all", x: []float64{0, 1}, y: []float64{0, 2}},
		{what: "stations in any order, one missing", x: []float64{0, 1}, y: []float64{0, 2}, at: []float64{1, nan, 0.5, 7, 0},
			kept: []int{0, 2, 4}, s: []float64{2, 1, 0}, outside: []int{3}, notices: []string{"station-outside"}},
		{what: "only missing stations", x: []float64{0, 1}, y: []float64{0, 2}, at: []float64{nan, nan}},
		{what: "infinite stations", x: []float64{0, 1}, y: []float64{0, 2}, at: []float64{-inf, 0.5, inf},
			kept: []int{1}, s: []float64{1}, outside: []int{0, 2}, notices: []string{"station-outside"}},
		{what: "reversed", x: []float64{3, 1, 0}, y: []float64{6, 2, 0}, at: []float64{0.5, 2},
			kept: []int{0, 1}, s: []float64{1, 4}, notices: []string{"curve-unsorted"}},
		{what: "shuffled", x: []float64{3, 0, 5, 1, 4}, y: []float64{6, 0, 10, 2, 8}, at: []float64{0.5, 2, 4.5},
			kept: []int{0, 1, 2}, s: []float64{1, 4, 9}, notices: []string{"curve-unsorted"}},
		{what: "value missing", x: []float64{0, 1, 2, 3, 4}, y: []float64{0, 1, nan, 3, 4}, at: []float64{0.5, 1, 1.5, 2, 2.5, 3, 3.5},
			kept: []int{0, 1, 5, 6}, s: []float64{0.5, 1, 3, 3.5}, gap: []int{2, 3, 4}, notices: []string{"station-gap"}},
		{what: "value infinite", x: []float64{0, 1, 2, 3}, y: []float64{0, 1, inf, 3}, at: []float64{0.5, 1.5, 2.5, 3},
			kept: []int{0, 3}, s: []float64{0.5, 3}, gap: []int{1, 2}, notices: []string{"station-gap"}},
		{what: "abscissa missing", x: []float64{0, 1, nan, 3, 4}, y: []float64{0, 1, 2, 3, 4}, at: []float64{0.5, 2, 3.5},
			kept: []int{0, 2}, s: []float64{0.5, 3.5}, gap: []int{1}, notices: []string{"station-gap"}},
		{what: "abscissa missing, reversed", x: []float64{4, 3, nan, 1, 0}, y: []float64{4, 3, 2, 1, 0}, at: []float64{0.5, 2, 3.5},
			kept: []int{0, 2}, s: []float64{0.5, 3.5}, gap: []int{1}, notices: []string{"curve-unsorted", "station-gap"}},
		{what: "missing at both ends", x: []float64{0, 1, 2, 3}, y: []float64{nan, 1, 2, nan}, at: []float64{0.5, 1.5, 2.5},
			kept: []int{1}, s: []float64{1.5}, outside: []int{0, 2}, notices: []string{"station-outside"}},
		{what: "row between gaps", x: []float64{0, 1, 2, 3, 4}, y: []float64{0, nan, 2, nan, 4}, at: []float64{0, 2, 3},
			kept: []int{0, 1}, s: []float64{0, 2}, gap: []int{2}, notices: []string{"station-gap"}},
		{what: "value missing in a shuffled file", x: []float64{3, 0, 2, 1, 4}, y: []float64{3, 0, nan, 1, 4}, at: []float64{0.5, 2.5, 3.5},
			kept: []int{0, 2}, s: []float64{0.5, 3.5}, gap: []int{1}, notices: []string{"curve-unsorted", "station-gap"}},
		{what: "repeated row", x: []float64{0, 1, 1, 1, 2}, y: []float64{0, 1, 1, 1, 4}, at: []float64{0.5, 1, 1.5},
			kept: []int{0, 1, 2}, s: []float64{0.5, 1, 2.5}, notices: []string{"curve-duplicate"}},
		{what: "one of a repeated row missing", x: []float64{0, 1, 1, 2}, y: []float64{0, nan, 1, 4}, at: []float64{0.5, 1, 1.5},
			kept: []int{0, 1, 2}, s: []float64{0.5, 1, 2.5}},
		{what: "jump", x: []float64{0, 1, 1, 2}, y: []float64{0, 1, 5, 6}, at: []float64{0.5, 1, 1, 1.5},
			kept: []int{0, 3}, s: []float64{0.5, 5.5}, jump: []int{1, 2}, notices: []string{"curve-jump"}},
		{what: "jump, reversed", x: []float64{2, 1, 1, 0}, y: []float64{6, 5, 1, 0}, at: []float64{0.5, 1, 1.5},
			kept: []int{0, 2}, s: []float64{0.5, 5.5}, jump: []int{1}, notices: []string{"curve-unsorted", "curve-jump"}},
		{what: "jump between two pieces in the wrong order", x: []float64{1, 1.5, 2, 0, 0.5, 1}, y: []float64{5, 5.5, 6, 0, 0.5, 1}, at: []float64{0.75, 1, 1.25},
			kept: []int{0, 2}, s: []float64{0.75, 5.25}, jump: []int{1}, notices: []string{"curve-unsorted", "curve-jump"}},
		{what: "jump at the first row", x: []float64{0, 0, 1, 2}, y: []float64{3, 5, 6, 7}, at: []float64{0, 0.5},
			kept: []int{1}, s: []float64{5.5}, jump: []int{0}, notices: []string{"curve-jump"}},
		{what: "three values", x: []float64{0, 1, 1, 1, 2}, y: []float64{0, 1, 9, 3, 4}, at: []float64{0.5, 1, 1.5},
			kept: []int{0, 2}, s: []float64{0.5, 3.5}, jump: []int{1}, notices: []string{"curve-jump"}},
		{what: "one row, same abscissa", x: []float64{2}, y: []float64{7}, at: []float64{2}, kept: []int{0}, s: []float64{7}},
		{what: "one row, same and elsewhere", x: []float64{2}, y: []float64{7}, at: []float64{2, 3}, kept: []int{0}, s: []float64{7},
			outside: []int{1}, notices: []string{"station-outside"}},
		{what: "one row, elsewhere", x: []float64{2}, y: []float64{7}, at: []float64{3}, outside: []int{0}, notices: []string{"curve-short"}, refused: true},
		{what: "no rows", at: []float64{3}, notices: []string{"curve-short"}, refused: true},
		{what: "no usable rows", x: []float64{1, nan}, y: []float64{nan, 2}, at: []float64{1}, notices: []string{"curve-short"}, refused: true},
		{what: "out and back", x: []float64{0, 1, 2, 1.5, 0.5}, y: []float64{0, 1, 2, -1, -2}, at: []float64{1}, notices: []string{"curve-loop"}, refused: true},
	} {
		r := Resample("s", "x", row.x, row.y, row.at, Options{})
		if !slices.Equal(r.Kept, row.kept) || !equal(r.S, row.s) || len(r.UInterp) != len(row.kept) {
			t.Errorf("%s: kept %v, s %v, u %v", row.what, r.Kept, r.S, r.UInterp)
		}
		if !slices.Equal(r.Outside, row.outside) || !slices.Equal(r.Gap, row.gap) || !slices.Equal(r.Jump, row.jump) {
			t.Errorf("%s: outside %v, gap %v, jump %v", row.what, r.Outside, r.Gap, r.Jump)
		}
		if !slices.Equal(codes(r.Notices), row.notices) || r.Refused != row.refused {
			t.Errorf("%s: notices %v, refused %v", row.what, r.Notices, r.Refused)
		}
	}
}

func TestUnknownMethod(t *testing.T) {
	r := Resample("s", "x", []float64{0, 1}, []float64{0, 1}, []float64{0.5}, Options{Method: "spline"})
	if !r.Refused || len(r.Kept) != 0 || !slices.Equal(codes(r.Notices), []string{"interpolation-unknown"}) {
		t.Errorf("%+v", r)
	}
}

func TestManyJumpsAreTold(t *testing.T) {
	var x, y []float64
	for i := range 12 {
		x, y = append(x, float64(i), float64(i)), append(y, 0, 1)
	}
	r := Resample("s", "x", x, y, []float64{0.5}, Options{})
	got := codes(r.Notices)
	if len(got) != maxJumps+1 || got[0] != "curve-jump" || got[maxJumps] != "curve-jumps" {
		t.Errorf("notices %v", got)
	}
}

// loop returns a closed curve of n rows over x from 0 to 1: the upper branch
// sqrt(x)(1 - x) out, and the lower, its negative times flat, back.
func loop(n int, flat float64) (x, y []float64) {
	for i := range n {
		a := 2 * math.Pi * float64(i) / float64(n)
		x = append(x, (1-math.Cos(a))/2)
		v := math.Sqrt(x[i]) * (1 - x[i])
		if math.Sin(a) < 0 {
			v *= -flat
		}
		y = append(y, v)
	}
	return x, y
}

func rotated(v []float64, k int) []float64 { return append(slices.Clone(v[k:]), v[:k]...) }

// TestLoops: a closed curve is refused wherever it starts, whichever way it
// runs, open or closed, blunt, and when both branches nearly agree; the number
// of branches is two.
func TestLoops(t *testing.T) {
	for _, n := range []int{12, 48, 49, 500} {
		for _, flat := range []float64{1, 0.3, -1, -1.001} {
			x, y := loop(n, flat)
			for start := 0; start < n; start += max(1, n/24) {
				for _, closed := range []bool{false, true} {
					for _, back := range []bool{false, true} {
						lx, ly := rotated(x, start), rotated(y, start)
						if closed {
							lx, ly = append(lx, lx[0]), append(ly, ly[0])
						}
						if back {
							slices.Reverse(lx)
							slices.Reverse(ly)
						}
						r := Resample("cp", "x", lx, ly, []float64{0.5}, Options{})
						if n == 12 && flat < 0 && start != 0 && start != 6 {
							continue // parts of a short symmetric curve too short to tell
						}
						if !r.Refused || len(r.Kept) != 0 || !slices.Equal(codes(r.Notices), []string{"curve-loop"}) {
							t.Fatalf("n %d, flat %v, start %d, closed %v, back %v: %+v", n, flat, start, closed, back, r)
						}
						if got := branches(usable(lx, ly)); got != 2 {
							t.Errorf("n %d, flat %v, start %d, closed %v, back %v: %d branches", n, flat, start, closed, back, got)
						}
					}
				}
			}
		}
	}
}

// TestBranches tells curves that have one value at a station from those that
// have not.
func TestBranches(t *testing.T) {
	ramp := func(from, to, step float64) (x []float64) {
		for i := 0; ; i++ {
			v := from + float64(i)*step
			if step > 0 && v > to+1e-9 || step < 0 && v < to-1e-9 {
				return x
			}
			x = append(x, v)
		}
	}
	f := func(x []float64, g func(float64) float64) (y []float64) {
		for _, v := range x {
			y = append(y, g(v))
		}
		return y
	}
	square := func(v float64) float64 { return v * v }
	shifted := func(v float64) float64 { return v*v + 5 }
	for _, row := range []struct {
		what     string
		x, y     []float64
		branches int
	}{
		{"two blocks in the wrong order", append(ramp(5, 9, 0.5), ramp(0, 4.5, 0.5)...), append(f(ramp(5, 9, 0.5), square), f(ramp(0, 4.5, 0.5), square)...), 1},
		{"blocks running either way", append(ramp(5, 9, 0.5), ramp(4.5, 0, -0.5)...), append(f(ramp(5, 9, 0.5), square), f(ramp(4.5, 0, -0.5), square)...), 1},
		{"two rows swapped", []float64{0, 1, 2, 4, 3, 5, 6}, []float64{0, 1, 4, 16, 9, 25, 36}, 1},
		{"every second point in a second pass", append(ramp(0, 10, 1), ramp(0.5, 9.5, 1)...), append(f(ramp(0, 10, 1), square), f(ramp(0.5, 9.5, 1), square)...), 1},
		{"two surfaces listed the same way", append(ramp(0, 10, 1), ramp(0.5, 9.5, 1)...), append(f(ramp(0, 10, 1), square), f(ramp(0.5, 9.5, 1), shifted)...), 2},
		{"hairpin", append(ramp(0, 10, 1), ramp(9.5, 0.5, -1)...), append(f(ramp(0, 10, 1), square), f(ramp(9.5, 0.5, -1), shifted)...), 2},
		{"hairpin of one value", append(ramp(0, 10, 1), ramp(9.5, 0.5, -1)...), append(f(ramp(0, 10, 1), square), f(ramp(9.5, 0.5, -1), square)...), 2},
		{"out, back and out again", append(append(ramp(0, 10, 1), ramp(9.5, 3.5, -1)...), ramp(4, 20, 1)...),
			append(append(f(ramp(0, 10, 1), square), f(ramp(9.5, 3.5, -1), shifted)...), f(ramp(4, 20, 1), func(v float64) float64 { return v*v + 9 })...), 3},
		{"one abscissa only", []float64{1, 1, 1}, []float64{1, 2, 3}, 1},
		{"nothing", nil, nil, 1},
	} {
		if got := branches(usable(row.x, row.y)); got != row.branches {
			t.Errorf("%s: %d branches, want %d", row.what, got, row.branches)
		}
	}
}

// TestSineBound is check T4: on 21 points of a period and more, wherever they
// begin, three standard deviations' worth of the bound, u sqrt 3, is not below
// the true error of the linear value at any station, and is zero at points.
func TestSineBound(t *testing.T) {
	for n := 21; n <= 400; n = n*5/4 + 1 {
		for phase := range 48 {
			x, y := make([]float64, n), make([]float64, n)
			begin := 2 * math.Pi * float64(phase) / 48
			for i := range x {
				x[i] = begin + 2*math.Pi*float64(i)/float64(n-1)
				y[i] = math.Sin(x[i])
			}
			var at []float64
			for i := range 7*(n-1) + 1 {
				at = append(at, min(begin+2*math.Pi*float64(i)/float64(7*(n-1)), x[n-1]))
			}
			r := Resample("sin", "x", x, y, at, Options{})
			if len(r.Kept) != len(at) {
				t.Fatalf("n %d: %d of %d stations kept", n, len(r.Kept), len(at))
			}
			for j, a := range at {
				// Rounding of values of size one.
				if miss := math.Abs(r.S[j] - math.Sin(a)); miss > r.UInterp[j]*math.Sqrt(3)+1e-14 {
					t.Fatalf("n %d, begin %v, at %v: error %v, bound %v", n, begin, a, miss, r.UInterp[j]*math.Sqrt(3))
				}
			}
			points := Resample("sin", "x", x, y, x, Options{})
			for j, u := range points.UInterp {
				if u != 0 || points.S[j] != y[j] {
					t.Fatalf("n %d: u %v, s %v at point %d", n, u, points.S[j], j)
				}
			}
		}
	}
}

// TestUncertainties holds the rule to numbers worked by hand.
func TestUncertainties(t *testing.T) {
	root3 := math.Sqrt(3)
	for _, row := range []struct {
		what string
		x, y []float64
		at   float64
		m    interpolate.Method
		want float64
	}{
		// x^2: f'' = 2, 1.05*0.5*0.5/2*2.
		{"parabola", []float64{0, 1, 2, 3}, []float64{0, 1, 4, 9}, 0.5, interpolate.Linear, 1.05 * 0.25 / root3},
		// Second differences 0 and 6 about the interval: the larger.
		{"larger of both ends", []float64{0, 1, 2, 3}, []float64{0, 0, 0, 3}, 1.5, interpolate.Linear, 1.05 * 0.125 * 3 / root3},
		{"straight", []float64{0, 1, 4}, []float64{1, 3, 9}, 2, interpolate.Linear, 0},
		// Two points: |f''| = 2*4/2^2.
		{"two points", []float64{0, 2}, []float64{1, 5}, 1, interpolate.Linear, 1.05 * 0.5 * 2 / root3},
		{"two points", []float64{0, 2}, []float64{1, 5}, 1, interpolate.Monotone, 1.05 * 0.5 * 2 / root3},
		// The monotone value is 0.1875 below the line (core/interpolate, "convex").
		{"convex", []float64{0, 1, 2}, []float64{0, 1, 4}, 0.5, interpolate.Monotone, 0.1875 / root3},
		{"one point", []float64{0}, []float64{1}, 0, interpolate.Linear, 0},
	} {
		r := Resample("s", "x", row.x, row.y, []float64{row.at}, Options{Method: row.m})
		if len(r.UInterp) != 1 || math.Abs(r.UInterp[0]-row.want) > 1e-15 {
			t.Errorf("%s, %s: u %v, want %v", row.what, row.m, r.UInterp, row.want)
		}
	}
}

// TestShuffled: neither the order of the rows nor that of the stations changes
// an answer.
func TestShuffled(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		n := rapid.IntRange(3, 60).Draw(t, "rows")
		x, y := make([]float64, n), make([]float64, n)
		for i := range x {
			x[i] = float64(i) + rapid.Float64Range(0, 0.5).Draw(t, "x")
			y[i] = x[i] * x[i] // rises: a shuffled file varies more than the curve
			if rapid.IntRange(0, 9).Draw(t, "missing") == 0 {
				y[i] = nan
			}
		}
		at := rapid.SliceOfN(rapid.Float64Range(-1, float64(n)), 1, 40).Draw(t, "stations")
		slices.Sort(at)
		opt := Options{Method: rapid.SampledFrom([]interpolate.Method{interpolate.Linear, interpolate.Monotone}).Draw(t, "method")}
		plain := Resample("s", "x", x, y, at, opt)

		rows := rapid.Permutation(count0(n)).Draw(t, "order of rows")
		stations := rapid.Permutation(count0(len(at))).Draw(t, "order of stations")
		sx, sy, sat := pick(x, rows), pick(y, rows), pick(at, stations)
		shuffled := Resample("s", "x", sx, sy, sat, opt)
		if notice.Has(shuffled.Notices, "curve-loop") {
			t.Skip("by chance the shuffled rows run out and back")
		}
		if plain.Refused != shuffled.Refused || len(plain.Kept) != len(shuffled.Kept) ||
			len(plain.Outside) != len(shuffled.Outside) || len(plain.Gap) != len(shuffled.Gap) {
			t.Fatalf("sorted %+v\nshuffled %+v", plain, shuffled)
		}
		s, u := map[float64]float64{}, map[float64]float64{}
		for j, i := range plain.Kept {
			s[at[i]], u[at[i]] = plain.S[j], plain.UInterp[j]
		}
		for j, i := range shuffled.Kept {
			if s[sat[i]] != shuffled.S[j] || u[sat[i]] != shuffled.UInterp[j] {
				t.Fatalf("at %v: %v ± %v, shuffled %v ± %v", sat[i], s[sat[i]], u[sat[i]], shuffled.S[j], shuffled.UInterp[j])
			}
		}
	})
}

func count0(n int) []int {
	all := make([]int, n)
	for i := range all {
		all[i] = i
	}
	return all
}

func pick(v []float64, order []int) []float64 {
	picked := make([]float64, len(order))
	for i, k := range order {
		picked[i] = v[k]
	}
	return picked
}

// TestInputsAreLeftAlone: file order and stations stay as given (C1, T1).
func TestInputsAreLeftAlone(t *testing.T) {
	x, y, at := []float64{3, 0, 5, 1, 4}, []float64{6, 0, 10, 2, 8}, []float64{2, 0.5}
	x0, y0, at0 := slices.Clone(x), slices.Clone(y), slices.Clone(at)
	Resample("s", "x", x, y, at, Options{})
	if !slices.Equal(x, x0) || !slices.Equal(y, y0) || !slices.Equal(at, at0) {
		t.Errorf("changed: %v %v %v", x, y, at)
	}
}
