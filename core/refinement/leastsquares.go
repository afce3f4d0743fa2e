package refinement

import (
	"math"
	"strconv"

	"weirmark/core/quantity"
)

// leastSquares studies all grids of a family of four or more. The three finest
// are classified first; only where they converge does the fit follow:
//
//	f0 + a h^p, f0 + a h, f0 + a h^2, f0 + a h + b h^2,
//
// h relative to the finest, each with equal weights and with weights in
// proportion to 1/h; scatter s = sqrt(n sum w (f - fit)^2/(n - m)), m
// coefficients. The order p is that of the first with the smaller scatter. It
// is used for 0.5 <= p <= 2; above, the better of the next two; below, or
// without p, the best of the last three. With e the fitted error of the finest
// grid, D = range/(n - 1) and F = 1.25 for s < D and 0.5 <= p < 2.1, else 3,
//
//	U = F e + s + |f - fit|               for s < D,
//	U = 3 (s/D) (e + s + |f - fit|)       otherwise.
//
// Source: Eca and Hoekstra, J. Comput. Phys. 262 (2014) 104, implemented from
// a description of it. Values that oscillate get U and no order.
func (r *Result) leastSquares(runs []run, dim int, opt Options) {
	runs, twice := distinct(runs)
	if twice > 0 {
		r.Used = 0
		r.Rule = "one cell count has two values: no order and no uncertainty"
		r.tell("grid-duplicate", quantity.Text(twice, 10))
		return
	}
	class := *r
	class.Notices = nil
	class.judge(Options{Formal: opt.Formal})
	if class.Class != Monotone && class.Class != Oscillatory {
		class.Notices = append(r.Notices, class.Notices...)
		*r = class
		return
	}
	r.Class, r.Ratio, r.Ea, r.HalfRange, r.Used = class.Class, class.Ratio, class.Ea, class.HalfRange, len(runs)
	s := newSeries(runs, dim)
	f, p := s.choose()
	step := quantity.Round(r.Range/float64(len(runs)-1), 10)
	scatter := f.scatter(len(runs))
	inside := quantity.Round(scatter, 10) < step
	rounded := quantity.Round(p, 10)
	off, e := math.Abs(f.residual[0]), math.Abs(f.fit[0]-f.c[0])
	safe := float64(wideSafety)
	if inside && rounded >= leastOrder && rounded < 2.1 {
		safe = safety
	}
	r.U = float64(safe*e) + scatter + off
	if !inside {
		r.U = wideSafety * scatter / step * (e + scatter + off)
	}
	words := f.words()
	r.Rule = "least squares over " + strconv.Itoa(len(runs)) + " grids: " + words + "; implemented from a description of the procedure"
	r.tell("grid-least-squares", len(runs), words, quantity.Text(scatter, 2), quantity.Text(step, 2), quantity.Text(safe, 3))
	if least := quantity.Round(min(r.R21, r.R32), 10); least < leastRatio {
		r.tell("grid-ratio", quantity.Text(least, 4))
	}
	r.index()
	if r.Class != Monotone {
		return
	}
	r.Extrapolated = s.first + f.c[0]
	r.Fit = f.line(s.first, p)
	if r.Extrapolated != 0 {
		r.Eext = math.Abs((r.Extrapolated - r.Values[0]) / r.Extrapolated)
	}
	if math.IsNaN(p) {
		r.tell("grid-fit-no-order")
		return
	}
	r.Order = p
	r.offFormal(opt)
}

// distinct returns the runs once each, and a count that has two values, or 0.
func distinct(runs []run) (once []run, twice float64) {
	for i, g := range runs {
		if i == 0 || g.count != runs[i-1].count {
			once = append(once, g)
		} else if g.value != once[len(once)-1].value {
			return once, g.count
		}
	}
	return once, 0
}

// series is a family relative to its finest grid.
type series struct {
	first   float64
	f       []float64 // less first
	h, logs []float64
	equal   []float64 // weights
	fine    []float64 // weights in proportion to 1/h
}

func newSeries(runs []run, dim int) series {
	s := series{first: runs[0].value}
	sum := 0.0
	for _, g := range runs {
		h := ratio(runs[0].count, g.count, dim)
		s.h, s.logs, s.f = append(s.h, h), append(s.logs, math.Log(h)), append(s.f, g.value-s.first)
		s.equal, s.fine = append(s.equal, 1/float64(len(runs))), append(s.fine, 1/h)
		sum += 1 / h
	}
	for i := range s.fine {
		s.fine[i] /= sum
	}
	return s
}

// expansion is a fit of one form.
type expansion struct {
	linear
	form     string
	weighted bool
}

// scatter returns the standard deviation of a fit.
func (x expansion) scatter(n int) float64 {
	m := len(x.c)
	if x.form == formPower {
		m++
	}
	return math.Sqrt(float64(n) * x.squares / float64(n-m))
}

// The forms.
const (
	formPower  = "f0 + a h^p"
	formFirst  = "f0 + a h"
	formSecond = "f0 + a h²"
	formBoth   = "f0 + a h + b h²"
)

func (x expansion) words() string {
	if x.weighted {
		return x.form + ", weighted by 1/h"
	}
	return x.form + ", equal weights"
}

// choose returns the fit that is used, and the order of the fit with a free
// order, NaN where it has none.
func (s series) choose() (expansion, float64) {
	p := math.NaN()
	var best expansion
	for _, weighted := range []bool{true, false} {
		if q, x, ok := s.power(weighted); ok && (math.IsNaN(p) || x.scatter(len(s.f)) < best.scatter(len(s.f))) {
			p, best = q, x
		}
	}
	rounded := quantity.Round(p, 10)
	if rounded >= leastOrder && rounded <= 2 {
		return best, p
	}
	squares := make([]float64, len(s.h))
	for i, h := range s.h {
		squares[i] = h * h
	}
	forms := []struct {
		name    string
		columns [][]float64
	}{{formFirst, [][]float64{s.h}}, {formSecond, [][]float64{squares}}}
	if !(rounded > 2) {
		forms = append(forms, struct {
			name    string
			columns [][]float64
		}{formBoth, [][]float64{s.h, squares}})
	}
	found := false
	for _, form := range forms {
		for _, weighted := range []bool{true, false} {
			l, ok := fitLinear(s.f, s.weights(weighted), form.columns...)
			x := expansion{l, form.name, weighted}
			if ok && (!found || x.scatter(len(s.f)) < best.scatter(len(s.f))) {
				best, found = x, true
			}
		}
	}
	return best, p
}

func (s series) weights(weighted bool) []float64 {
	if weighted {
		return s.fine
	}
	return s.equal
}

// Orders that power looks at: steps of an eighth, none of them zero.
const (
	orderStep  = 0.125
	mostOrders = 10
)

// power fits f0 + a h^p. The sum of squares, with f0 and a the best for each
// p, is scanned over orders of both signs; around its least the order is the
// root of its derivative, so that it is good to the last bits. ok is false
// where the least is at an end, or not at an order above zero.
func (s series) power(weighted bool) (p float64, x expansion, ok bool) {
	w := s.weights(weighted)
	steps := int(mostOrders / orderStep)
	at := func(k int) float64 { return (float64(k) + 0.5) * orderStep }
	best, least := 0, math.Inf(1)
	for k := -steps; k < steps; k++ {
		l, ok := fitLinear(s.f, w, s.powers(at(k)))
		if ok && l.squares < least {
			best, least = k, l.squares
		}
	}
	if best < 1 || best == steps-1 {
		return math.NaN(), x, false
	}
	p = bisect(func(q float64) float64 {
		l, _ := fitLinear(s.f, w, s.powers(q))
		slope := 0.0
		for i, r := range l.residual {
			slope -= float64(float64(w[i]*r)*math.Exp(q*s.logs[i])) * s.logs[i]
		}
		return slope * l.c[1]
	}, at(best-1), at(best+1))
	l, ok := fitLinear(s.f, w, s.powers(p))
	return p, expansion{l, formPower, weighted}, ok
}

// powers returns h^p.
func (s series) powers(p float64) []float64 {
	v := make([]float64, len(s.logs))
	for i, log := range s.logs {
		v[i] = math.Exp(p * log)
	}
	return v
}
