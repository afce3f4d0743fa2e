package refinement

import (
	"math"

	"weirmark/core/notice"
)

// JointStudy is the study of runs that differ in grid and time step.
type JointStudy struct {
	Extrapolated float64 // value at zero spacing and step
	Space, Time  float64 // estimated errors of the finest run, with signs
	Scatter      float64 // standard deviation of the fit
	U            float64 // 1.25 (|Space| + |Time|) + Scatter, expanded
	Used         int
	Notices      []notice.Notice
}

// Joint fits
//
//	f = f0 + a h^p + b dt^q
//
// with given orders p of space and q of time to four or more runs, with equal
// weights. The finest run is the one of the most cells and, among those, of the
// least step. The two errors are added without their signs, because errors that
// cancel in one run need not in the next (no source). Rows without a positive
// count and step or without a value are left out; all slices have one length.
// There is no order to observe here: Study and Steps tell whether those given
// are met.
func Joint(counts, steps, values []float64, dim int, p, q float64) JointStudy {
	j := JointStudy{Extrapolated: math.NaN(), Space: math.NaN(), Time: math.NaN(), Scatter: math.NaN(), U: math.NaN()}
	if dim < 1 || dim > 3 {
		j.Notices = append(j.Notices, notice.New("grid-dimension", dim))
		return j
	}
	var n, dt, f []float64
	finest := 0
	for i, v := range values {
		if !(counts[i] > 0 && steps[i] > 0) || math.IsInf(counts[i], 0) || math.IsInf(steps[i], 0) || math.IsNaN(v) || math.IsInf(v, 0) {
			continue
		}
		n, dt, f = append(n, counts[i]), append(dt, steps[i]), append(f, v)
		last := len(n) - 1
		if n[last] > n[finest] || n[last] == n[finest] && dt[last] < dt[finest] {
			finest = last
		}
	}
	j.Used = len(f)
	if len(f) < 4 {
		j.Notices = append(j.Notices, notice.New("grid-joint-few", len(f)))
		return j
	}
	space, time, weights, change := make([]float64, len(f)), make([]float64, len(f)), make([]float64, len(f)), make([]float64, len(f))
	for i := range f {
		space[i] = math.Exp(p * math.Log(ratio(n[finest], n[i], dim)))
		time[i] = math.Exp(q * math.Log(dt[i]/dt[finest]))
		weights[i], change[i] = 1/float64(len(f)), f[i]-f[finest]
	}
	l, ok := fitLinear(change, weights, space, time)
	if !ok {
		j.Notices = append(j.Notices, notice.New("grid-joint-tied"))
		return j
	}
	j.Extrapolated, j.Space, j.Time = f[finest]+l.c[0], l.c[1], l.c[2]
	j.Scatter = math.Sqrt(float64(len(f)) * l.squares / float64(len(f)-3))
	j.U = float64(safety*(math.Abs(j.Space)+math.Abs(j.Time))) + j.Scatter
	return j
}
