package uncertainty

import "math"

// FirstOrder is the propagation of uncertainty by the slopes of a model.
type FirstOrder struct {
	Value       float64
	U           float64
	Sensitivity []float64 // in the unit of the model over that of the input
	Parts       []float64 // sensitivity times standard uncertainty, with its sign
	// Degrees are the effective degrees of freedom, +Inf where all uncertainties
	// are taken as known, NaN where inputs of finite degrees are correlated.
	Degrees float64
}

// slopeStep is the part of the standard uncertainty by which an input is
// shifted: small against the curvature, large against rounding, and a power of
// two so that the shift is exact.
const slopeStep = 1.0 / 64

// FirstOrder returns the value of the model at the means of its inputs and
//
//	u^2 = sum over i, j of c_i c_j r_ij u_i u_j
//
// with the slopes c by central differences, two evaluations an input. Source:
// JCGM 100:2008 5.1.2, 5.2.2 and 5.1.3 note 2 (clauses from memory). An input
// without uncertainty has no slope: NaN, and a part of 0. It fails with
// ErrInput or ErrModel.
func (m Model) FirstOrder() (FirstOrder, error) {
	if _, err := m.factor(); err != nil {
		return FirstOrder{}, err
	}
	x := m.means()
	value, err := m.at(x)
	if err != nil {
		return FirstOrder{}, err
	}
	r := FirstOrder{Value: value, Sensitivity: make([]float64, len(x)), Parts: make([]float64, len(x))}
	for i, in := range m.Inputs {
		u := in.u()
		if u == 0 {
			r.Sensitivity[i] = math.NaN()
			continue
		}
		difference, distance, err := m.across(x, i, float64(u*slopeStep))
		if err != nil {
			return FirstOrder{}, err
		}
		r.Sensitivity[i] = difference / distance
		r.Parts[i] = r.Sensitivity[i] * u
	}
	r.U = m.combined(r.Parts)
	r.Degrees = m.effective(r.Parts)
	return r, nil
}

// means returns the means of the inputs.
func (m Model) means() []float64 {
	x := make([]float64, len(m.Inputs))
	for i, in := range m.Inputs {
		x[i] = in.mean()
	}
	return x
}

// across returns the difference of the model over input i shifted up and down
// by step, and the distance between the two shifted inputs as they are held.
func (m Model) across(x []float64, i int, step float64) (difference, distance float64, err error) {
	middle := x[i]
	defer func() { x[i] = middle }()
	up, down := middle+step, middle-step
	x[i] = up
	above, err := m.at(x)
	if err != nil {
		return 0, 0, err
	}
	x[i] = down
	below, err := m.at(x)
	if err != nil {
		return 0, 0, err
	}
	if up == down { // the uncertainty is below the rounding of the value
		return 0, 1, nil
	}
	return above - below, up - down, nil
}

// combined returns the root of the sum over i, j of r_ij part_i part_j.
func (m Model) combined(parts []float64) float64 {
	sum := 0.0
	for i, p := range parts {
		sum += float64(p * p)
		if m.Correlation != nil {
			for j := range i {
				sum += float64(2 * float64(m.Correlation[i][j]*p) * parts[j])
			}
		}
	}
	return math.Sqrt(max(sum, 0))
}

// effective returns the effective degrees of freedom; NaN where there are none.
func (m Model) effective(parts []float64) float64 {
	terms := make([]Term, len(parts))
	for i, p := range parts {
		terms[i] = Term{U: math.Abs(p), Degrees: m.Inputs[i].degrees(), Correlated: m.correlated(i)}
	}
	degrees, err := EffectiveDegrees(terms)
	if err != nil {
		return math.NaN()
	}
	return degrees
}

func (m Model) correlated(i int) bool {
	if m.Correlation == nil {
		return false
	}
	for j, r := range m.Correlation[i] {
		if j != i && r != 0 {
			return true
		}
	}
	return false
}

// Interval returns Value -+ k U with the factor of Student's distribution at
// the effective degrees of freedom; it is not ok where there are none.
func (r FirstOrder) Interval(level float64) (low, high float64, ok bool) {
	k, ok := StudentFactor(level, r.Degrees)
	if !ok {
		return math.NaN(), math.NaN(), false
	}
	return r.Value - float64(k*r.U), r.Value + float64(k*r.U), true
}

// SecondOrderU returns the standard uncertainty with the terms that follow the
// first order where all inputs are normal and independent:
//
//	u^2 = first order + sum over i, j of (f_ij^2/2 + f_i f_ijj) u_i^2 u_j^2.
//
// It shows whether the first order is enough. Source: JCGM 100:2008 5.1.2 note
// (clause from memory). It is refused (ErrInput) where inputs are correlated;
// where the sum is negative, ErrModel: no such expansion describes the model.
func (m Model) SecondOrderU() (float64, error) {
	if m.Correlation != nil {
		return math.NaN(), ErrInput
	}
	first, err := m.FirstOrder()
	if err != nil {
		return math.NaN(), err
	}
	sum := float64(first.U * first.U)
	for i := range m.Inputs {
		for j := range m.Inputs {
			mixed, err := m.difference(i, j)
			if err != nil {
				return math.NaN(), err
			}
			third, err := m.difference(i, j, j)
			if err != nil {
				return math.NaN(), err
			}
			sum += float64(mixed*mixed)/2 + float64(first.Parts[i]*third)
		}
	}
	if !(sum >= 0) {
		return math.NaN(), ErrModel
	}
	return math.Sqrt(sum), nil
}

// curveStep is the part of the standard uncertainty for higher differences,
// whose rounding grows with the power of its reciprocal.
const curveStep = 1.0 / 8

// difference returns the derivative of the model by the named inputs in turn,
// times their standard uncertainties, by central differences.
func (m Model) difference(by ...int) (float64, error) {
	x := m.means()
	sum := 0.0
	for signs := range 1 << len(by) {
		weight := 1.0
		copy(x, m.means())
		for k, i := range by {
			step := float64(m.Inputs[i].u() * curveStep)
			if signs>>k&1 == 1 {
				step, weight = -step, -weight
			}
			x[i] += step
		}
		y, err := m.at(x)
		if err != nil {
			return math.NaN(), err
		}
		sum += weight * y
	}
	for range by {
		sum /= 2 * curveStep
	}
	return sum, nil
}
