package refinement

import "math"

// Fit is a line of values over the spacing h, relative to the finest grid:
// Base + sum of Coefficient h^Power, in the unit of the values.
type Fit struct {
	Base  float64
	Terms []Term
}

// Term is one term of a Fit.
type Term struct{ Coefficient, Power float64 }

// At returns the value at a relative spacing of 0 or more.
func (f Fit) At(h float64) float64 {
	v := f.Base
	for _, t := range f.Terms {
		v += float64(t.Coefficient * math.Pow(h, t.Power))
	}
	return v
}

// through returns the line of one order p through the two finest values.
func (r *Result) through(e21, p float64) *Fit {
	c := e21 / powerLessOne(r.R21, p)
	return &Fit{r.Values[0] - c, []Term{{c, p}}}
}

// line returns the fit with an origin of values at the finest grid.
func (x expansion) line(first, p float64) *Fit {
	powers := map[string][]float64{formPower: {p}, formFirst: {1}, formSecond: {2}, formBoth: {1, 2}}[x.form]
	f := &Fit{Base: first + x.c[0]}
	for i, power := range powers {
		f.Terms = append(f.Terms, Term{x.c[i+1], power})
	}
	return f
}
