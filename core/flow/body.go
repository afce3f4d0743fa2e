package flow

import "math"

// ellipseSpeed returns the surface speed over U of an ellipse with half axes a
// and b = ratio a, without circulation, at the eccentric angle phi of the point
// (a cos phi, b sin phi): (1 + ratio) |sin(phi - alpha)| / sqrt(sin^2 phi +
// ratio^2 cos^2 phi). It follows from z = zeta + (a^2 - b^2)/(4 zeta), which
// carries the circle of radius (a+b)/2 to the ellipse.
func ellipseSpeed(ratio, alpha, phi float64) float64 {
	s, c := math.Sincos(phi)
	return (1 + ratio) * math.Abs(math.Sin(phi-alpha)) / math.Hypot(s, ratio*c)
}

// pressure returns cp = 1 - q^2.
func pressure(q float64) float64 { return (1 - q) * (1 + q) }

// bodyLaws are potential flows round bodies.
func bodyLaws() []Law {
	theta := plain("theta", "angle at the centre, zero at the rear stagnation point, pi at the front", "rad", anything)
	phi := plain("phi", "eccentric angle of the surface point (a cos phi, b sin phi), the flow along +x turned by alpha", "rad", anything)
	speed := result("q/U", "surface speed over that far away", "1")
	cp := result("cp", "pressure difference over rho U^2/2", "1")
	shape := []Symbol{
		plain("b/a", "half axis across x over half axis along x", "1", positive),
		{Name: "alpha", Meaning: "angle of the flow to the x axis", Unit: "rad", Domain: anything, Stated: anything, Default: number(0)},
	}
	const caveat = "no viscosity: a real flow separates, the rear differs most; no circulation, so no lift"
	law := func(id, name, formula string, station, value Symbol, parameters []Symbol, at func(p []float64, x float64) float64) Law {
		return Law{ID: id, Name: name, Kind: Exact, Formula: formula, Station: station, Value: value, Parameters: parameters,
			Source: "exact solution of Laplace's equation", Reach: Memory, Uncertainty: noneStated, Caveat: caveat, at: at}
	}
	circle := func(_ []float64, x float64) float64 { return ellipseSpeed(1, 0, x) }
	ellipse := func(p []float64, x float64) float64 { return ellipseSpeed(p[0], p[1], x) }
	return []Law{
		law("cylinder-speed", "Potential flow round a cylinder, speed", "q/U = 2 |sin theta|", theta, speed, nil, circle),
		law("cylinder-pressure", "Potential flow round a cylinder, pressure", "cp = 1 - 4 sin^2 theta", theta, cp, nil,
			func(p []float64, x float64) float64 { return pressure(circle(p, x)) }),
		law("ellipse-speed", "Potential flow round an ellipse, speed", "q/U = (1 + b/a) |sin(phi - alpha)|/sqrt(sin^2 phi + (b/a)^2 cos^2 phi)", phi, speed, shape, ellipse),
		law("ellipse-pressure", "Potential flow round an ellipse, pressure", "cp = 1 - (q/U)^2", phi, cp, shape,
			func(p []float64, x float64) float64 { return pressure(ellipse(p, x)) }),
	}
}
