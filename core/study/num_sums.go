package study

import (
	"math"

	"weirmark/core/notice"
	"weirmark/core/quantity"
)

// apart is the factor between both sums of u_num above which both are told.
const apart = 1.2

// sumNumerical compares the root of the sum of squares of the parts of u_num
// with their sum, which is theirs where they depend on each other, as grid and
// iteration errors may. Where a person chose the sum, every part is raised by
// the ratio of the two, so that the parts still make up the whole.
func (w *work) sumNumerical() {
	n := len(w.x)
	count := 0
	root, linear := make([]float64, n), make([]float64, n)
	for _, p := range w.parts {
		if p.line.Of != OfNumerical || p.interp {
			continue
		}
		count++
		for i, u := range p.source.U {
			root[i] = math.Hypot(root[i], u)
			linear[i] += math.Abs(u)
		}
	}
	if count < 2 || len(known(root)) == 0 {
		return
	}
	sums := NumSums{Root: w.step(rms(known(root))), Linear: w.step(rms(known(linear)))}
	sums.Apart = exceeds(float64(sums.Linear), float64(apart*sums.Root))
	w.cell.NumSums = &sums
	used := "root"
	if w.choices.NumLinear {
		used = "sum"
		for j := range w.parts {
			if p := &w.parts[j]; p.line.Of == OfNumerical && !p.interp {
				p.plain = p.source.U
				p.source.U = raised(p.source.U, root, linear)
			}
		}
	}
	if sums.Apart {
		unit := w.cell.UnitSuffix()
		w.tell(notice.New("num-sums", quantity.Text(float64(sums.Root), 3)+unit, quantity.Text(float64(sums.Linear), 3)+unit, used))
	}
}

// raised returns u times the ratio of both sums at each station.
func raised(u, root, linear []float64) []float64 {
	out := make([]float64, len(u))
	for i, v := range u {
		out[i] = v
		if root[i] > 0 {
			out[i] = v * (linear[i] / root[i])
		}
	}
	return out
}

// stated returns what the source states, before sums were made of it.
func (p *part) stated() []float64 {
	if p.plain != nil {
		return p.plain
	}
	return p.source.U
}
