package derived

import "math"

// Friction is a friction velocity and how it was found.
type Friction struct {
	UTau     float64
	Rows     int     // used in the fit
	Low      float64 // y+ of the first and last of them
	High     float64
	Residual float64 // root mean square of u+ - law
}

// WallGradient returns sqrt(nu du/dy) from the rows that lie within y+ <= 5 of
// the wall, by the mean of u/y. Rows is 0 where none does.
func WallGradient(y, u []float64, nu float64) Friction {
	f := Friction{UTau: math.NaN()}
	// y+ depends on the result: take rows from the wall outwards as long as
	// they still lie within five units of their own estimate.
	sum := 0.0
	for i := range y {
		if !(y[i] > 0) || math.IsNaN(u[i]) {
			continue
		}
		slope := u[i] / y[i]
		if !(slope > 0) {
			break
		}
		estimate := math.Sqrt(float64(nu * ((sum + slope) / float64(f.Rows+1))))
		if float64(y[i]*estimate)/nu > 5 {
			break
		}
		sum += slope
		f.Rows++
		f.UTau = estimate
		if f.Rows == 1 {
			f.Low = float64(y[i]*estimate) / nu
		}
		f.High = float64(y[i]*estimate) / nu
	}
	return f
}

// wallLaw is u+ over y+ with its constants.
type wallLaw func(kappa, b, plus float64) float64

// Fit returns the friction velocity for which a law of the wall fits the rows
// with low <= y+ <= high best (Clauser's method where it is the log law), by
// iteration over the rows in range. It needs four rows.
func (law wallLaw) Fit(y, u []float64, nu, kappa, b, low, high float64) (Friction, error) {
	// Start from the outermost row taken as log layer.
	tau := 0.0
	for i := range y {
		if y[i] > 0 && u[i] > 0 {
			tau = math.Max(tau, u[i]/25)
		}
	}
	if !(tau > 0) {
		return Friction{}, ErrProfile
	}
	var f Friction
	for range 100 {
		next, g := law.step(y, u, nu, kappa, b, low, high, tau)
		if g.Rows < 4 || !(next > 0) {
			return Friction{}, ErrFit
		}
		f = g
		f.UTau = next
		if math.Abs(next-tau) <= 1e-12*tau {
			break
		}
		tau = next
	}
	return f, nil
}

// step makes one step of Newton's method for the least squares in u over the
// rows that lie in range at tau.
func (law wallLaw) step(y, u []float64, nu, kappa, b, low, high, tau float64) (float64, Friction) {
	f := Friction{Low: math.Inf(1)}
	num, den, rest := 0.0, 0.0, 0.0
	for i := range y {
		plus := float64(y[i]*tau) / nu
		if math.IsNaN(u[i]) || !(plus > 0) || !(plus >= low && plus <= high) {
			continue
		}
		at := law(kappa, b, plus)
		const h = 1e-5                                                            // of y+, relative
		slope := at + (law(kappa, b, plus*(1+h))-law(kappa, b, plus*(1-h)))/(2*h) // d(tau law)/d tau
		r := u[i] - float64(tau*at)
		num += float64(r * slope)
		den += float64(slope * slope)
		rest += float64(r/tau) * (r / tau)
		f.Rows++
		f.Low, f.High = min(f.Low, plus), max(f.High, plus)
	}
	if f.Rows == 0 {
		return tau, f
	}
	f.Residual = math.Sqrt(rest / float64(f.Rows))
	return tau + num/den, f
}

// takeFit fits a law; its effects are those of the ranges of its constants.
func takeFit(law wallLaw) taker {
	return func(c *Curve, p *Settings, s *Scalar) error {
		n := p.Numbers
		fit := func(kappa, b float64) (Friction, error) {
			return law.Fit(c.X, c.Y, n["viscosity"], kappa, b, n["low"], n["high"])
		}
		f, err := fit(n["kappa"], n["B"])
		if err != nil {
			return err
		}
		s.Value = f.UTau
		for _, other := range []struct {
			name     string
			kappa, b float64
		}{{"κ at the end of its range", n["kappa"] + n["kappa range"], n["B"]}, {"B at the end of its range", n["kappa"], n["B"] + n["B range"]}} {
			if g, err := fit(other.kappa, other.b); err == nil {
				s.Effects = append(s.Effects, Effect{Name: other.name, Change: g.UTau - f.UTau, Factor: limits})
			}
		}
		return nil
	}
}

func takeWall(c *Curve, p *Settings, s *Scalar) error {
	f := WallGradient(c.X, c.Y, p.Numbers["viscosity"])
	if f.Rows == 0 {
		return ErrWall
	}
	s.Value = f.UTau
	for i, y := range c.X {
		if y > 0 {
			s.Effects = []Effect{{Name: "the row nearest to the wall alone", Change: math.Sqrt(p.Numbers["viscosity"]*c.Y[i]/y) - f.UTau, Factor: limits}}
			break
		}
	}
	return nil
}

// CrossingU returns the standard uncertainty of the place of a crossing from
// that of the value: u_x = u_y/|dy/dx|, with the slope of the two rows around
// it. NaN where the slope is zero.
func CrossingU(x, y []float64, at, u float64) float64 {
	for i := 1; i < len(x); i++ {
		if (x[i-1]-at)*(x[i]-at) <= 0 && x[i] != x[i-1] && usable(x, y, i-1) && usable(x, y, i) {
			slope := (y[i] - y[i-1]) / (x[i] - x[i-1])
			if slope != 0 {
				return u / math.Abs(slope)
			}
		}
	}
	return math.NaN()
}
