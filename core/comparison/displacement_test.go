package comparison

import (
	"math"
	"testing"
)

// A known shift and scale are found, each alone and both together; equal
// curves have none.
func TestDisplace(t *testing.T) {
	f := func(x float64) float64 { return 2 + math.Exp(-50*(x-.5)*(x-.5)) }
	var sx, sy, x []float64
	for i := range 2001 {
		at := -.5 + 2*float64(i)/2000
		sx, sy = append(sx, at), append(sy, f(at))
	}
	for i := range 41 {
		x = append(x, float64(i)/40)
	}
	for _, row := range []struct{ shift, scale float64 }{{0, 1}, {.03, 1}, {-.0412, 1}, {0, 1.07}, {.02, .93}, {-.06, 1.2}} {
		d := make([]float64, len(x))
		for i, at := range x {
			d[i] = row.scale * f(at-row.shift)
		}
		p, ok := Displace(sx, sy, x, d)
		if !ok || p.N != 41 || p.AtEdge && row.scale == 1 {
			t.Fatalf("%+v: %+v, %v", row, p, ok)
		}
		if math.Abs(p.BothShift-row.shift) > 2e-4 || math.Abs(p.BothScale-row.scale) > 1e-4 || p.BothRMS > 1e-3 {
			t.Errorf("%+v: both %+v", row, p)
		}
		if row.scale == 1 && (math.Abs(p.Shift-row.shift) > 2e-4 || p.ShiftRMS > 1e-3) {
			t.Errorf("%+v: shift %+v", row, p)
		}
		if row.shift == 0 && (math.Abs(p.Scale-row.scale) > 1e-4 || p.ScaleRMS > 1e-3) {
			t.Errorf("%+v: scale %+v", row, p)
		}
		if p.BothRMS > p.ShiftRMS+1e-9 || p.BothRMS > p.ScaleRMS+1e-9 || p.ShiftRMS > p.RMS+1e-9 || p.ScaleRMS > p.RMS+1e-9 {
			t.Errorf("%+v: a fit is worse than none: %+v", row, p)
		}
	}
	if _, ok := Displace(sx, sy, x[:7], x[:7]); ok {
		t.Error("seven stations were fitted")
	}
	if _, ok := Displace(sx, make([]float64, len(sx)), x, x); ok {
		t.Error("a curve of zeros was given a scale")
	}
}
