package derived

import "math"

// takeCrossing returns the place where the curve meets the level, with every
// candidate. Its effect is that of the straight line: h² |y”|/(8 |slope|),
// with y” from the slopes beside it.
func takeCrossing(c *Curve, p *Settings, s *Scalar) error {
	y := make([]float64, len(c.Y))
	for i, v := range c.Y {
		y[i] = v - p.Numbers[KeyLevel]
	}
	s.Value = math.NaN()
	for _, at := range Crossings(c.X, y) {
		switch p.Words[KeyDirection] {
		case RisingOnly:
			if !at.Rising {
				continue
			}
		case FallingOnly:
			if at.Rising {
				continue
			}
		}
		s.Places = append(s.Places, at)
	}
	if len(s.Places) == 0 {
		return ErrNone
	}
	s.Chosen = 0
	switch p.Words[KeyWhich] {
	case Last:
		s.Chosen = len(s.Places) - 1
	case Nearest:
		for i, at := range s.Places {
			if math.Abs(at.X-p.Numbers[KeyNear]) < math.Abs(s.Places[s.Chosen].X-p.Numbers[KeyNear]) {
				s.Chosen = i
			}
		}
	case First:
	default:
		s.Several = len(s.Places) > 1
	}
	s.Value = s.Places[s.Chosen].X
	s.At = s.Value
	s.Effects = []Effect{{Name: "straight between rows", Change: bow(c.X, y, s.Value), Factor: limits}}
	return nil
}

// bow estimates how far a curved line through the rows meets zero from where
// the straight one does.
func bow(x, y []float64, at float64) float64 {
	for i := 1; i < len(x); i++ {
		if x[i] < at {
			continue
		}
		h := x[i] - x[i-1]
		slope := (y[i] - y[i-1]) / h
		curvature := 0.0
		if i >= 2 {
			curvature = math.Abs(slope-(y[i-1]-y[i-2])/(x[i-1]-x[i-2])) / ((x[i] - x[i-2]) / 2)
		}
		if i+1 < len(x) {
			curvature = max(curvature, math.Abs((y[i+1]-y[i])/(x[i+1]-x[i])-slope)/((x[i+1]-x[i-1])/2))
		}
		if slope == 0 {
			return 0
		}
		return min(h, float64(h*h)*curvature/(8*math.Abs(slope)))
	}
	return 0
}

// takeExtremum returns the value or the place of an extremum. What the rows
// leave open is the step from the row to the parabola, for the place too.
func takeExtremum(most, place bool) taker {
	return func(c *Curve, _ *Settings, s *Scalar) error {
		e, ok := Extrema(c.X, c.Y, most)
		if !ok {
			return ErrRows
		}
		s.Value = e.Y
		s.At, s.Bound = e.X, e.AtEnd
		change := e.Sampling
		if place {
			s.Value, change = e.X, e.X-c.X[e.Row]
		}
		if !e.AtEnd {
			s.Effects = []Effect{{Name: "row in place of the parabola", Change: -change, Factor: limits}}
		}
		return nil
	}
}

// takeLoop integrates a closed section; what is left open beside the spacing
// of the rows is the closing of the contour.
func takeLoop(of func(s Coefficients, about float64) float64) taker {
	return func(c *Curve, p *Settings, s *Scalar) error {
		section, err := Loop(c.X, c.Second, c.Y, p.Numbers[NumberAngle])
		if err != nil {
			return err
		}
		s.Value, s.Gap = of(section.Coefficients, p.Numbers["about"]), section.Gap
		s.Effects = []Effect{{Name: "contour left open at its ends", Change: -of(section.Closing, p.Numbers["about"]), Factor: limits}}
		return nil
	}
}

// takeWidth returns the distance between the half heights around the extreme.
func takeWidth(c *Curve, _ *Settings, s *Scalar) error {
	n := len(c.X)
	if n < 5 {
		return ErrRows
	}
	base := (c.Y[0] + c.Y[n-1]) / 2
	y := make([]float64, n)
	for i, v := range c.Y {
		y[i] = v - base
	}
	up, okUp := Extrema(c.X, y, true)
	down, okDown := Extrema(c.X, y, false)
	if !okUp || !okDown {
		return ErrRows
	}
	top := up
	if -down.Y > up.Y {
		top = down
		for i := range y {
			y[i] = -y[i]
		}
		top.Y = -top.Y
	}
	if top.AtEnd || !(top.Y > 0) {
		return ErrNone
	}
	left, right := math.NaN(), math.NaN()
	for i := top.Row; i > 0; i-- {
		if y[i-1] <= top.Y/2 {
			left = between(c.X, y, i, top.Y/2)
			break
		}
	}
	for i := top.Row + 1; i < n; i++ {
		if y[i] <= top.Y/2 {
			right = between(c.X, y, i, top.Y/2)
			break
		}
	}
	s.Value = right - left
	s.At = top.X
	return nil
}

// between returns where the line from row i-1 to row i meets a level.
func between(x, y []float64, i int, level float64) float64 {
	if y[i] == y[i-1] {
		return x[i]
	}
	return x[i-1] + float64((x[i]-x[i-1])*((level-y[i-1])/(y[i]-y[i-1])))
}

// takeDeficit returns the mean of the two ends less the least value.
func takeDeficit(c *Curve, _ *Settings, s *Scalar) error {
	e, ok := Extrema(c.X, c.Y, false)
	if !ok || len(c.X) < 5 {
		return ErrRows
	}
	n := len(c.X)
	s.Value = (c.Y[0]+c.Y[n-1])/2 - e.Y
	s.At, s.Bound = e.X, e.AtEnd
	s.Effects = []Effect{{Name: "row in place of the parabola", Change: e.Sampling, Factor: limits}}
	return nil
}
