package derived

import (
	"errors"
	"math"
	"sort"

	"weirmark/core/profile"
)

// Curve is what a scalar is taken from: stations, values, and a second column
// where the kind asks for one, all in SI units and of one length. NaN marks a
// gap.
type Curve struct {
	X, Y, Second []float64
}

// Scalar is a value taken from a curve, in SI units.
type Scalar struct {
	Value float64
	At    float64 // the place it stands for; NaN where it has none
	Rows  int     // of the curve that were used
	// Effects are what choices of the method leave open, in the unit of Value.
	Effects []Effect
	// Places are the candidates among which one was chosen, of which Chosen is
	// the row; several without a choice leave Several set.
	Places  []Crossing
	Chosen  int
	Several bool
	// Bound says that the value is only a bound: an extremum at an end, or a
	// thickness of a profile that does not reach its edge.
	Bound     bool
	Edge      float64 // velocity at the edge; NaN where there is none
	Overshoot float64 // greatest velocity over that at the edge, less one
	Gap       float64 // of a loop, in lengths; NaN where there is none
}

// Effect is the change of the value under one other choice: the rows thinned,
// a constant at the end of its range. Factor times its magnitude is the
// standard uncertainty that it stands for.
type Effect struct {
	Name   string
	Change float64
	Factor float64
}

// thinning is the factor of the effect of every second row: the error of the
// rule may fall only in proportion to the spacing, as at a wall where the
// profile is steep, and a quarter more is our own margin.
const thinning = 1.25

// limits is the factor of an effect that is the limit of a range.
var limits = 1 / math.Sqrt(3)

// Part is the standard uncertainty that an effect alone would leave.
func (e Effect) Part() float64 { return e.Factor * math.Abs(e.Change) }

// U returns the standard uncertainty of the value from all its effects.
func (s Scalar) U() float64 {
	sum := 0.0
	for _, e := range s.Effects {
		sum += float64(e.Part() * e.Part())
	}
	return math.Sqrt(sum)
}

// Errors of kinds beside ErrRows, ErrOpen and ErrProfile.
var (
	ErrLoop   = errors.New("the stations go out and back: choose a branch")
	ErrSecond = errors.New("the second column is not given")
	ErrNone   = errors.New("there is no such crossing")
	ErrEdge   = errors.New("the edge is not reached: the greatest velocity lies at the last row")
	ErrFit    = errors.New("fewer than four rows lie in the range of the fit")
	ErrWall   = errors.New("no row lies within five wall units of the wall")
	ErrZero   = errors.New("what it is divided by is zero")
	ErrSign   = errors.New("the values must not be negative")
)

// Range tells the part of a finer curve that stands beside a coarser one.
type Range int

// The ranges.
const (
	Whole   Range = iota // of the curve: a feature is looked for everywhere
	ToEnd                // from the wall or the start to the last station of the coarser
	Between              // from the first station of the coarser to its last
)

// Parameter is a number or a word that a kind needs.
type Parameter struct {
	Key, Label, Default string
	Options             []string // words to choose from; nil for numbers
	Unit                string   // "x" and "y": as the columns; else a symbol; empty for words
	Low                 float64  // least number that can be entered
	Needed              bool
}

// Other is another choice that a careful person might have made.
type Other struct {
	Label string
	Set   map[string]string
}

// Kind is one way of taking a scalar from a curve.
type Kind struct {
	Name    string
	Formula string
	// The value has the unit of x to the power X times that of y to the power Y
	// times that of Card, where the kind takes a quantity of the case.
	X, Y       int
	Difference bool   // the value is a difference: of temperatures in °C it is in K
	Pure       bool   // the values must be pure numbers
	Velocity   bool   // the value is a velocity in m/s whatever the columns are
	Second     string // what a second column holds; empty: none is used
	Loop       bool   // a closed contour in order, with its second coordinate
	Signed     bool   // a column that is a magnitude cannot give it
	Sampled    bool   // the effect of the rows is that of every second one
	Range      Range
	Parameters []Parameter
	Others     []Other
	take       taker
}

// taker sets the value of a scalar, and what else is known of it.
type taker func(c *Curve, p *Settings, s *Scalar) error

// Settings are the parameters of a kind, numbers in SI units.
type Settings struct {
	Words   map[string]string
	Numbers map[string]float64
}

// Named returns the kind of a name.
func Named(name string) (*Kind, bool) {
	for i := range kinds {
		if kinds[i].Name == name {
			return &kinds[i], true
		}
	}
	return nil, false
}

// Names lists the kinds in the order in which they are offered.
func Names() []string {
	names := make([]string, len(kinds))
	for i := range kinds {
		names[i] = kinds[i].Name
	}
	return names
}

// Take returns the scalar of a curve. Rows with a gap are left out; all kinds
// but loops take the rows in ascending order of x, each x once, the mean of
// repeated rows. It refuses with the errors of this package.
func (k *Kind) Take(c Curve, p Settings) (Scalar, error) {
	if k.Second == "" {
		c.Second = nil
	}
	c, err := k.prepared(c)
	if err != nil {
		return Scalar{}, err
	}
	s, err := k.plain(c, p)
	if err != nil || !k.Sampled {
		return s, err
	}
	thinned, err := k.plain(everySecond(c), p)
	if err != nil {
		return s, nil
	}
	s.Effects = append([]Effect{{Name: "every second row left out", Change: thinned.Value - s.Value, Factor: thinning}}, s.Effects...)
	return s, nil
}

// plain takes the scalar of rows in order.
func (k *Kind) plain(c Curve, p Settings) (Scalar, error) {
	s := Scalar{At: math.NaN(), Edge: math.NaN(), Overshoot: math.NaN(), Gap: math.NaN(), Rows: len(c.X), Chosen: -1}
	if err := k.take(&c, &p, &s); err != nil {
		return s, err
	}
	if math.IsNaN(s.Value) || math.IsInf(s.Value, 0) {
		return s, ErrZero
	}
	return s, nil
}

// prepared returns the rows without gaps and in order.
func (k *Kind) prepared(c Curve) (Curve, error) {
	if c.Second == nil && k.Loop {
		return Curve{}, ErrSecond
	}
	if !k.Loop && profile.Loop(c.X) {
		return Curve{}, ErrLoop
	}
	var rows []int
	for i := range c.X {
		if usable(c.X, c.Y, i) && (c.Second == nil || !math.IsNaN(c.Second[i])) {
			rows = append(rows, i)
		}
	}
	if !k.Loop {
		sort.SliceStable(rows, func(i, j int) bool { return c.X[rows[i]] < c.X[rows[j]] })
	}
	out := Curve{}
	for n := 0; n < len(rows); {
		i, m := rows[n], 1
		x, y, second := c.X[i], c.Y[i], 0.0
		if c.Second != nil {
			second = c.Second[i]
		}
		for !k.Loop && n+m < len(rows) && c.X[rows[n+m]] == x {
			y += c.Y[rows[n+m]]
			if c.Second != nil {
				second += c.Second[rows[n+m]]
			}
			m++
		}
		out.X, out.Y = append(out.X, x), append(out.Y, y/float64(m))
		if c.Second != nil {
			out.Second = append(out.Second, second/float64(m))
		}
		n += m
	}
	if len(out.X) < 2 {
		return Curve{}, ErrRows
	}
	return out, nil
}

// everySecond leaves out every second row; first and last stay.
func everySecond(c Curve) Curve {
	out := Curve{}
	for i := range c.X {
		if i%2 == 1 && i != len(c.X)-1 {
			continue
		}
		out.X, out.Y = append(out.X, c.X[i]), append(out.Y, c.Y[i])
		if c.Second != nil {
			out.Second = append(out.Second, c.Second[i])
		}
	}
	return out
}

// Sensitivities returns the change of the scalar with the value at each row,
// by differences over one standard uncertainty u to either side (over step
// where u is not positive). ok is false where the scalar is lost on the way: a
// crossing that vanishes within the uncertainty has no first-order uncertainty.
func (k *Kind) Sensitivities(c Curve, p Settings, u []float64, step float64) (slopes []float64, ok bool) {
	y := append([]float64{}, c.Y...)
	at := Curve{X: c.X, Y: y, Second: c.Second}
	slopes = make([]float64, len(y))
	for i, v := range c.Y {
		if !usable(c.X, c.Y, i) {
			continue
		}
		h := step
		if u[i] > 0 && !math.IsInf(u[i], 0) {
			h = u[i]
		}
		var side [2]float64
		for n, sign := range [2]float64{-1, 1} {
			y[i] = v + float64(sign*h)
			s, err := k.value(at, p)
			if err != nil {
				return nil, false
			}
			side[n] = s
		}
		y[i] = v
		slopes[i] = (side[1] - side[0]) / (2 * h)
	}
	return slopes, true
}

// Value returns the scalar alone, without its effects.
func (k *Kind) value(c Curve, p Settings) (float64, error) {
	if k.Second == "" {
		c.Second = nil
	}
	c, err := k.prepared(c)
	if err != nil {
		return 0, err
	}
	s, err := k.plain(c, p)
	return s.Value, err
}
