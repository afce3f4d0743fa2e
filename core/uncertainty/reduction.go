package uncertainty

// PressureCoefficient returns Cp = (p - p_ref)/q of x = (p, p_ref, q), all in
// one unit.
func PressureCoefficient(x []float64) float64 { return (x[0] - x[1]) / x[2] }

// Column is an input of a reduction that is read anew at every station.
type Column struct {
	Values, U []float64
}

// Reduced is a reduced quantity at the stations and the sources that its
// inputs make there.
type Reduced struct {
	Values  []float64
	Sources []Source // one for each column, independent; then one for each shared input, common
}

// Reduce applies f at every station to the columns followed by the inputs that
// all stations share, as p at every tap, then p_ref and q. An error of a shared
// input is one error of all stations, scaled by the slope there with its sign:
// so an error of p_ref is a common offset of Cp and one of q a common scale.
// Slopes are those of Model.FirstOrder. It fails with ErrInput or ErrModel.
func Reduce(f func(x []float64) float64, columns []Column, shared []Input) (Reduced, error) {
	n := 0
	if len(columns) > 0 {
		n = len(columns[0].Values)
	}
	r := Reduced{Values: make([]float64, n)}
	for range columns {
		r.Sources = append(r.Sources, Source{U: make([]float64, n)})
	}
	for range shared {
		r.Sources = append(r.Sources, Source{U: make([]float64, n), Common: true})
	}
	m := Model{F: f, Inputs: make([]Input, len(columns), len(columns)+len(shared))}
	m.Inputs = append(m.Inputs, shared...)
	for i := range n {
		for k, c := range columns {
			if len(c.Values) != n || len(c.U) != n {
				return Reduced{}, ErrInput
			}
			m.Inputs[k] = Input{Value: c.Values[i], U: c.U[i], Distribution: Normal}
		}
		first, err := m.FirstOrder()
		if err != nil {
			return Reduced{}, err
		}
		r.Values[i] = first.Value
		for k, part := range first.Parts {
			if k < len(columns) && part < 0 {
				part = -part // the sign of an error of one station says nothing
			}
			r.Sources[k].U[i] = part
		}
	}
	return r, nil
}
