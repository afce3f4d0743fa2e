package derived

import "math"

// weight is one, or the distance from the axis in a round section.
func weight(p *Settings, x float64) float64 {
	if p.Words["section"] == Round {
		return math.Abs(x)
	}
	return 1
}

// sum integrates f over the rows by the trapezium rule.
func sum(x []float64, f func(i int) float64) float64 {
	total := 0.0
	for i := 1; i < len(x); i++ {
		total += float64((f(i-1) + f(i)) / 2 * (x[i] - x[i-1]))
	}
	return total
}

// ratio sets the value to one over another.
func (s *Scalar) ratio(over, under float64) error {
	if under == 0 {
		return ErrZero
	}
	s.Value = over / under
	return nil
}

func takeMean(c *Curve, p *Settings, s *Scalar) error {
	return s.ratio(sum(c.X, func(i int) float64 { return c.Y[i] * weight(p, c.X[i]) }), sum(c.X, func(i int) float64 { return weight(p, c.X[i]) }))
}

func takeFlowMean(c *Curve, p *Settings, s *Scalar) error {
	if c.Second == nil {
		return ErrSecond
	}
	flux := func(i int) float64 { return c.Second[i] * weight(p, c.X[i]) }
	return s.ratio(sum(c.X, func(i int) float64 { return c.Y[i] * flux(i) }), sum(c.X, flux))
}

func takeIntegral(c *Curve, _ *Settings, s *Scalar) error {
	s.Value = sum(c.X, func(i int) float64 { return c.Y[i] })
	return nil
}

// takeVariation returns the coefficient of variation, or the mixing index of
// a fraction: one less the standard deviation over that of the unmixed state.
func takeVariation(index bool) taker {
	return func(c *Curve, p *Settings, s *Scalar) error {
		if err := takeMean(c, p, s); err != nil {
			return err
		}
		m := s.Value
		if err := s.ratio(sum(c.X, func(i int) float64 { return float64((c.Y[i]-m)*(c.Y[i]-m)) * weight(p, c.X[i]) }), sum(c.X, func(i int) float64 { return weight(p, c.X[i]) })); err != nil {
			return err
		}
		if !index {
			return s.ratio(math.Sqrt(s.Value), m)
		}
		if !(m > 0 && m < 1) {
			return ErrZero
		}
		s.Value = 1 - math.Sqrt(s.Value/float64(m*(1-m)))
		return nil
	}
}

// takeBackflow takes the parts of straight lines on either side of zero.
func takeBackflow(c *Curve, p *Settings, s *Scalar) error {
	forth, back := 0.0, 0.0
	for i := 1; i < len(c.X); i++ {
		for _, part := range parts(c.X[i-1], c.X[i], c.Y[i-1], c.Y[i]) {
			f := float64((part.y0*weight(p, part.x0) + part.y1*weight(p, part.x1)) / 2 * (part.x1 - part.x0))
			forth, back = forth+max(f, 0), back+max(-f, 0)
		}
	}
	return s.ratio(back, forth)
}

type piece struct{ x0, x1, y0, y1 float64 }

// parts cuts the straight line between two rows where it meets zero.
func parts(x0, x1, y0, y1 float64) []piece {
	if !opposite(y0, y1) {
		return []piece{{x0, x1, y0, y1}}
	}
	at := x0 + float64((x1-x0)*(y0/(y0-y1)))
	return []piece{{x0, at, y0, 0}, {at, x1, 0, y1}}
}

func takeFall(c *Curve, _ *Settings, s *Scalar) error {
	s.Value = c.Y[0] - c.Y[len(c.Y)-1]
	return nil
}

func takeLoss(c *Curve, p *Settings, s *Scalar) error {
	return s.ratio(c.Y[0]-c.Y[len(c.Y)-1], p.Numbers["scale"])
}

// takeResidence returns the first moment of an age distribution, or its second
// about the first.
func takeResidence(second bool) taker {
	return func(c *Curve, _ *Settings, s *Scalar) error {
		all := sum(c.X, func(i int) float64 { return c.Y[i] })
		err := s.ratio(sum(c.X, func(i int) float64 { return c.X[i] * c.Y[i] }), all)
		if err != nil || !second {
			return err
		}
		m := s.Value
		return s.ratio(sum(c.X, func(i int) float64 { return float64((c.X[i]-m)*(c.X[i]-m)) * c.Y[i] }), all)
	}
}

func takeBeyond(c *Curve, p *Settings, s *Scalar) error {
	length := 0.0
	for i := 1; i < len(c.X); i++ {
		for _, part := range parts(c.X[i-1], c.X[i], c.Y[i-1]-p.Numbers[KeyLevel], c.Y[i]-p.Numbers[KeyLevel]) {
			if part.y0+part.y1 > 0 {
				length += part.x1 - part.x0
			}
		}
	}
	return s.ratio(length, c.X[len(c.X)-1]-c.X[0])
}

// takeSlope is the slope of the least squares line with equal weights.
func takeSlope(c *Curve, _ *Settings, s *Scalar) error {
	n := float64(len(c.X))
	mx, my := 0.0, 0.0
	for i := range c.X {
		mx, my = mx+c.X[i]/n, my+c.Y[i]/n
	}
	xy, xx := 0.0, 0.0
	for i := range c.X {
		xy += float64((c.X[i] - mx) * (c.Y[i] - my))
		xx += float64((c.X[i] - mx) * (c.X[i] - mx))
	}
	return s.ratio(xy, xx)
}

// takeWakeDrag integrates the momentum deficit. Beyond the rows nothing is
// added: the ends must lie outside the wake.
func takeWakeDrag(c *Curve, p *Settings, s *Scalar) error {
	edge := p.Numbers["velocity"]
	if !(edge > 0) {
		edge = (c.Y[0] + c.Y[len(c.Y)-1]) / 2
	}
	if !(edge > 0) || !(p.Numbers["length"] > 0) {
		return ErrZero
	}
	s.Value = 2 / p.Numbers["length"] * sum(c.X, func(i int) float64 {
		u := c.Y[i] / edge
		return float64(u * (1 - u))
	})
	s.Edge = edge
	return nil
}
