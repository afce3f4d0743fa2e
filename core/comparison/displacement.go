package comparison

import (
	"math"
	"sort"

	"weirmark/core/interpolate"
)

// Displacement is the shift along the stations and the scale that bring a
// simulation nearest to the data: it parts what lies at the wrong place from
// what has the wrong size. It is a diagnosis; nothing is moved.
type Displacement struct {
	N         int     // stations used: those the curve answers at every shift
	RMS       float64 // root mean square of S - D there, as compared
	Shift     float64 // of S towards larger x, in the unit of x, alone
	ShiftRMS  float64
	Scale     float64 // of S, alone
	ScaleRMS  float64
	BothShift float64 // with the best scale at every shift
	BothScale float64
	BothRMS   float64
	AtEdge    bool // a shift ends at the largest one tried
}

// Shifts up to a tenth of the range of the stations are tried, in steps of a
// four-hundredth; the best is refined between its neighbours.
const (
	reach      = 0.1
	shiftSteps = 40 // on either side
	fewestFit  = 8  // stations
)

// Displace finds the displacement of the curve (sx, sy), sx ascending strictly
// and all finite, against data d at the stations x. It is not ok with fewer
// than eight stations inside the curve at every shift, or where S is zero at
// all of them.
func Displace(sx, sy, x, d []float64) (Displacement, bool) {
	if len(sx) < 2 || len(x) < fewestFit {
		return Displacement{}, false
	}
	order := make([]int, len(x))
	for i := range order {
		order[i] = i
	}
	sort.SliceStable(order, func(i, j int) bool { return x[order[i]] < x[order[j]] })
	largest := reach * (x[order[len(order)-1]] - x[order[0]])
	f := fit{sx: sx, sy: sy}
	for _, i := range order {
		if x[i]-largest >= sx[0] && x[i]+largest <= sx[len(sx)-1] {
			f.x, f.d = append(f.x, x[i]), append(f.d, d[i])
		}
	}
	if len(f.x) < fewestFit || !(largest > 0) {
		return Displacement{}, false
	}
	f.s, f.at = make([]float64, len(f.x)), make([]float64, len(f.x))
	out := Displacement{N: len(f.x)}
	out.RMS, _ = f.rms(0, false)
	out.ScaleRMS, out.Scale = f.rms(0, true)
	if math.IsNaN(out.Scale) {
		return Displacement{}, false
	}
	var edge, edgeBoth bool
	out.Shift, edge = f.best(largest, false)
	out.ShiftRMS, _ = f.rms(out.Shift, false)
	out.BothShift, edgeBoth = f.best(largest, true)
	out.BothRMS, out.BothScale = f.rms(out.BothShift, true)
	out.AtEdge = edge || edgeBoth
	return out, true
}

// fit holds the stations that are answered at every shift.
type fit struct{ sx, sy, x, d, s, at []float64 }

// rms returns the root mean square of a S - D with S shifted, and a: the one
// of least squares, or one.
func (f *fit) rms(shift float64, scaled bool) (rms, scale float64) {
	for i, x := range f.x {
		f.at[i] = min(max(x-shift, f.sx[0]), f.sx[len(f.sx)-1]) // by rounding only
	}
	if err := interpolate.At(f.s, f.sx, f.sy, f.at, interpolate.Linear); err != nil {
		panic(err) // stations that leave the curve at some shift were left out
	}
	scale = 1
	if scaled {
		ss, sd := 0.0, 0.0
		for i, s := range f.s {
			ss, sd = ss+float64(s*s), sd+float64(s*f.d[i])
		}
		scale = sd / ss
	}
	sum := 0.0
	for i, s := range f.s {
		e := float64(scale*s) - f.d[i]
		sum += float64(e * e)
	}
	return math.Sqrt(sum / float64(len(f.s))), scale
}

// best returns the shift of least rms, and whether it is the largest tried.
func (f *fit) best(largest float64, scaled bool) (shift float64, edge bool) {
	step := largest / shiftSteps
	at, least := 0, math.Inf(1)
	for n := 0; n <= 2*shiftSteps; n++ { // from zero outwards, so that equal ones stay near it
		k := (n + 1) / 2
		if n%2 == 0 {
			k = -k
		}
		if r, _ := f.rms(float64(k)*step, scaled); r < least {
			at, least = k, r
		}
	}
	if at == shiftSteps || at == -shiftSteps {
		return float64(at) * step, true
	}
	shift = f.golden(float64(at-1)*step, float64(at+1)*step, scaled)
	here, _ := f.rms(0, scaled)
	if there, _ := f.rms(shift, scaled); !(there < here*(1-1e-9)) {
		return 0, false // no nearer than unmoved
	}
	return shift, false
}

// golden narrows the shift of least rms by the golden section.
func (f *fit) golden(lo, hi float64, scaled bool) float64 {
	const part = 0.6180339887498949
	a, b := hi-float64(part*(hi-lo)), lo+float64(part*(hi-lo))
	fa, _ := f.rms(a, scaled)
	fb, _ := f.rms(b, scaled)
	for range 40 {
		if fa <= fb {
			hi, b, fb = b, a, fa
			a = hi - float64(part*(hi-lo))
			fa, _ = f.rms(a, scaled)
			continue
		}
		lo, a, fa = a, b, fb
		b = lo + float64(part*(hi-lo))
		fb, _ = f.rms(b, scaled)
	}
	return (lo + hi) / 2
}
