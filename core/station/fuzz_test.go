package station

import (
	"encoding/binary"
	"math"
	"testing"

	"weirmark/core/interpolate"
	"weirmark/core/notice"
)

// numbersOf reads bytes as numbers: small ones, exact eighths, that coincide
// often, and one in sixteen missing or infinite.
func numbersOf(data []byte) []float64 {
	v := make([]float64, len(data)/2)
	for i := range v {
		k := binary.LittleEndian.Uint16(data[2*i:])
		switch {
		case k%32 == 0:
			v[i] = math.NaN()
		case k%32 == 1:
			v[i] = math.Inf(1)
		default:
			v[i] = float64(int16(k)>>5) / 8
		}
	}
	return v
}

// FuzzResample holds every result to what must be true of any: each station
// that is a number is in one list, an answer is finite and between the curve's
// extremes, a refusal compares nothing and says why.
func FuzzResample(f *testing.F) {
	f.Add([]byte("ascending"), []byte("values"), []byte("stations"), false)
	f.Add([]byte{}, []byte{}, []byte{}, true)
	f.Add([]byte{2, 1, 2, 1, 2, 2}, []byte{2, 1, 2, 9, 2, 2}, []byte{2, 1}, false)
	f.Add([]byte{0, 0, 2, 1, 2, 0}, []byte{2, 1, 2, 9, 2, 2}, []byte{2, 1}, true)
	f.Fuzz(func(t *testing.T, xs, ys, stations []byte, cubic bool) {
		x, y, at := numbersOf(xs), numbersOf(ys), numbersOf(stations)
		n := min(len(x), len(y))
		x, y = x[:n], y[:n]
		opt := Options{Method: interpolate.Linear}
		if cubic {
			opt.Method = interpolate.Monotone
		}
		r := Resample("s", "x", x, y, at, opt)
		if r.Refused != notice.Any(r.Notices, notice.Stop) {
			t.Fatalf("refused %v, notices %v", r.Refused, r.Notices)
		}
		if r.Refused && len(r.Kept)+len(r.S)+len(r.UInterp) != 0 {
			t.Fatalf("refused, yet %d stations kept", len(r.Kept))
		}
		if len(r.S) != len(r.Kept) || len(r.UInterp) != len(r.Kept) {
			t.Fatalf("%d kept, %d values, %d uncertainties", len(r.Kept), len(r.S), len(r.UInterp))
		}
		lo, hi := math.Inf(1), math.Inf(-1)
		for i, v := range y {
			if finite(v) && finite(x[i]) {
				lo, hi = min(lo, v), max(hi, v)
			}
		}
		for j := range r.Kept {
			if !(lo <= r.S[j] && r.S[j] <= hi) || !(r.UInterp[j] >= 0) || math.IsInf(r.UInterp[j], 0) {
				t.Fatalf("station %v: %v ± %v, curve %v to %v", at[r.Kept[j]], r.S[j], r.UInterp[j], lo, hi)
			}
		}
		seen := make([]int, len(at))
		for _, list := range [][]int{r.Kept, r.Outside, r.Gap, r.Jump} {
			for k, i := range list {
				seen[i]++
				if k > 0 && i <= list[k-1] {
					t.Fatalf("indices do not ascend: %v", list)
				}
			}
		}
		for i, times := range seen {
			want := 1
			if math.IsNaN(at[i]) || r.Refused && len(r.Outside) == 0 {
				want = 0
			}
			if times != want {
				t.Fatalf("station %d (%v) is in %d lists: %+v", i, at[i], times, r)
			}
		}
	})
}
