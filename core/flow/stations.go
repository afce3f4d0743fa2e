package flow

import (
	"fmt"
	"math"
)

// stretch is the part of a station's range that a figure shows: the stated
// range, cut to lo and hi where they differ; scale, where given, multiplies
// both.
type stretch struct {
	lo, hi float64
	scale  func(p []float64) float64
}

// stretches are the laws whose stated range has no end, or too long a one, to
// be drawn. Their ends are our choice and limit nothing.
var stretches = map[string]stretch{
	"blasius-velocity":        {0, 8, nil},
	"blasius-normal":          {0, 8, nil},
	"wall-log":                {30, 1000, nil},
	"wall-spalding":           {0.1, 1000, nil},
	"wall-spalding-inverse":   {0, 25, nil},
	"pipe-laminar":            {100, 2300, nil},
	"sphere-stokes":           {1e-3, 0.1, nil},
	"sphere-schiller-naumann": {0.1, 800, nil},
	"sphere-brown-lawler":     {0.1, 2e5, nil},
	"cylinder-speed":          {0, math.Pi, nil},
	"cylinder-pressure":       {0, math.Pi, nil},
	"ellipse-speed":           {0, 2 * math.Pi, nil},
	"ellipse-pressure":        {0, 2 * math.Pi, nil},
	"plane-jet-laminar":       {-4, 4, func(p []float64) float64 { return math.Cbrt(48 * p[1] * p[1] / p[0] * p[2] * p[2]) }},
	"plane-jet-spread":        {20, 100, nil},
	"mixing-layer":            {-2.5, 2.5, func(p []float64) float64 { return 1 / spread(p[1], p[0]) }},
	"mixing-layer-thickness":  {0.01, 1, nil},
}

// Stations returns n ascending stations, at least two, for drawing the law:
// within its stated range, in equal steps, or equal ratios where the range
// spans more than a factor of 20 above zero. The error is that of Evaluate, or
// says that the parameters leave nothing to draw.
func (l Law) Stations(parameters map[string]float64, n int) ([]float64, error) {
	p, _, _, err := l.take(parameters)
	if err != nil {
		return nil, err
	}
	r := l.Station.Stated
	if l.stated != nil {
		r = l.stated(p)
	}
	lo, hi := r.Lo, r.Hi
	if cut, listed := stretches[l.ID]; listed {
		scale := 1.0
		if cut.scale != nil {
			scale = cut.scale(p)
		}
		lo, hi = max(lo, cut.lo*scale), min(hi, cut.hi*scale)
	}
	if !(lo < hi) || math.IsInf(hi-lo, 0) {
		return nil, fmt.Errorf("law %s: the parameters leave no stations to draw between %g and %g", l.ID, lo, hi)
	}
	return spaced(lo, hi, max(n, 2)), nil
}

// spaced returns n numbers from lo to hi, both exactly.
func spaced(lo, hi float64, n int) []float64 {
	x := make([]float64, n)
	byRatio := lo > 0 && hi/lo > 20
	for i := range x {
		w := float64(i) / float64(n-1)
		if byRatio {
			x[i] = lo * math.Exp(w*math.Log(hi/lo))
		} else {
			x[i] = lo + float64(w*(hi-lo))
		}
	}
	x[n-1] = hi
	return x
}
