package derived

import "math"

// Friction is a friction velocity and how it was found.
type Friction struct {
	UTau     float64
	Rows     int     // used in the fit
	Low      float64 // y+ of the first and last of them
	High     float64
	Residual float64 // root mean square of u+ - law
	// KappaB is the change of UTau when kappa = 0.384, B = 4.17 take the place
	// of the given constants: how much the law itself leaves open.
	KappaB float64
}

// WallGradient returns sqrt(nu du/dy) from the rows that lie within y+ <= 5 of
// the wall, by the mean of u/y. Rows is 0 where none does.
func WallGradient(y, u []float64, nu float64) Friction {
	f := Friction{UTau: math.NaN(), KappaB: math.NaN()}
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

// LogFit returns the friction velocity for which u+ = ln(y+)/kappa + B fits
// the rows with low <= y+ <= high best (Clauser's method), by iteration over
// the rows in range.
func LogFit(y, u []float64, nu, kappa, b, low, high float64) (Friction, bool) {
	f, ok := logFit(y, u, nu, kappa, b, low, high)
	if !ok {
		return f, false
	}
	other, ok := logFit(y, u, nu, 0.384, 4.17, low, high)
	f.KappaB = math.NaN()
	if ok {
		f.KappaB = other.UTau - f.UTau
	}
	return f, true
}

func logFit(y, u []float64, nu, kappa, b, low, high float64) (Friction, bool) {
	// Start from the outermost row taken as log layer.
	tau := 0.0
	for i := range y {
		if y[i] > 0 && u[i] > 0 {
			tau = math.Max(tau, u[i]/25)
		}
	}
	if !(tau > 0) {
		return Friction{}, false
	}
	var f Friction
	for range 100 {
		next, g := fitOnce(y, u, nu, kappa, b, low, high, tau)
		if g.Rows < 4 {
			return Friction{}, false
		}
		f = g
		f.UTau = next
		if math.Abs(next-tau) <= 1e-12*tau {
			return f, true
		}
		tau = next
	}
	return f, f.Rows >= 4
}

// fitOnce makes one step of Newton's method for the least squares in u over
// the rows that lie in range at tau.
func fitOnce(y, u []float64, nu, kappa, b, low, high, tau float64) (float64, Friction) {
	f := Friction{Low: math.Inf(1)}
	num, den, rest := 0.0, 0.0, 0.0
	for i := range y {
		plus := float64(y[i]*tau) / nu
		if math.IsNaN(u[i]) || !(plus >= low && plus <= high) {
			continue
		}
		law := math.Log(plus)/kappa + b
		slope := law + 1/kappa // d(tau law)/d tau
		r := u[i] - float64(tau*law)
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
