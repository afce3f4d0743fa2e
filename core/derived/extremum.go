package derived

import "math"

// Extremum is the least or greatest value of a curve.
type Extremum struct {
	X, Y    float64
	Row     int  // the row it was found at
	AtEnd   bool // no row on one side of it: only a bound
	Spacing float64
	// Sampling is the difference between the parabola and the row: what the
	// spacing of the rows leaves open.
	Sampling float64
}

// Extrema returns the greatest (most) or least value of a curve. Inside the
// curve the parabola through the row and its neighbours gives place and value,
// so that rows that miss a smooth peak still find it to second order. Rows
// without numbers end a curve; ok is false where no row has one.
func Extrema(x, y []float64, most bool) (Extremum, bool) {
	at := -1
	for i := range y {
		if !usable(x, y, i) {
			continue
		}
		if at < 0 || most && y[i] > y[at] || !most && y[i] < y[at] {
			at = i
		}
	}
	if at < 0 {
		return Extremum{}, false
	}
	e := Extremum{X: x[at], Y: y[at], Row: at}
	if at == 0 || at == len(y)-1 || !usable(x, y, at-1) || !usable(x, y, at+1) {
		e.AtEnd = true
		return e, true
	}
	a, b := x[at-1]-x[at], x[at+1]-x[at]
	e.Spacing = max(math.Abs(a), math.Abs(b))
	// y = y0 + p t + q t² through (a, ya), (0, y0), (b, yb).
	ya, yb := y[at-1]-y[at], y[at+1]-y[at]
	q := (yb/b - ya/a) / (b - a)
	p := ya/a - float64(q*a)
	if q == 0 || math.IsNaN(q) || math.IsInf(q, 0) {
		return e, true
	}
	t := -p / (2 * q)
	if t < min(a, b) || t > max(a, b) {
		return e, true
	}
	e.X, e.Y = x[at]+t, y[at]+float64(p*t)+float64(q*float64(t*t))
	e.Sampling = e.Y - y[at]
	return e, true
}
