package derived

import (
	"errors"
	"math"
)

// ErrOpen says that a loop does not close on itself.
var ErrOpen = errors.New("the loop does not close: its ends are further apart than its rows are")

// ErrRows says that a curve has too few rows for the question.
var ErrRows = errors.New("too few rows")

// Coefficients are those of the pressure on a section, per chord: normal and
// axial to the chord line, and lift and pressure drag at the angle of attack.
// Moment is about the leading edge (x = 0), positive nose up. The drag is the
// pressure part only.
type Coefficients struct {
	Normal, Axial float64
	Lift, Drag    float64
	Moment        float64
}

// Section holds the coefficients of a closed section.
type Section struct {
	Coefficients
	Gap float64 // distance between the two ends, in chords
	// Closing is the part of the straight segment, with the mean pressure of the
	// ends, that closes the gap.
	Closing Coefficients
}

// Loop integrates the pressure coefficient cp over a closed section with
// surface points (x, y) in chords, in the order in which the contour runs
// (either way round, starting anywhere), at the angle of attack alpha in
// radians, by the trapezium rule over the contour:
//
//	Cn = closed integral of cp dx, Ca = -closed integral of cp dy
//
// with the sign of a contour that runs clockwise over the upper side. It
// refuses loops whose ends lie further apart than five times the median step.
func Loop(x, y, cp []float64, alpha float64) (Section, error) {
	n := len(cp)
	if n < 8 {
		return Section{}, ErrRows
	}
	for i := range cp {
		if math.IsNaN(x[i]) || math.IsNaN(y[i]) || math.IsNaN(cp[i]) {
			return Section{}, ErrRows
		}
	}
	s := Section{Gap: math.Hypot(x[n-1]-x[0], y[n-1]-y[0])}
	if s.Gap > 5*typicalStep(x, y) {
		return Section{}, ErrOpen
	}
	area := 0.0
	for i := 1; i < n; i++ {
		s.add(x, y, cp, i-1, i)
		area += float64(x[i-1]*y[i]) - float64(x[i]*y[i-1])
	}
	s.Closing.add(x, y, cp, n-1, 0)
	s.add(x, y, cp, n-1, 0)
	area += float64(x[n-1]*y[0]) - float64(x[0]*y[n-1])
	for _, c := range []*Coefficients{&s.Coefficients, &s.Closing} {
		if area > 0 { // counterclockwise: turn the signs
			c.Normal, c.Axial, c.Moment = -c.Normal, -c.Axial, -c.Moment
		}
		sin, cos := math.Sincos(alpha)
		c.Lift = float64(c.Normal*cos) - float64(c.Axial*sin)
		c.Drag = float64(c.Normal*sin) + float64(c.Axial*cos)
	}
	return s, nil
}

// add adds the segment from row i to row j of a clockwise contour: over the
// upper side x grows and pressure pushes down.
func (s *Coefficients) add(x, y, cp []float64, i, j int) {
	p := (cp[i] + cp[j]) / 2
	dx, dy := x[j]-x[i], y[j]-y[i]
	s.Normal -= float64(p * dx)
	s.Axial += float64(p * dy)
	mx, my := (x[i]+x[j])/2, (y[i]+y[j])/2
	s.Moment += float64(p*float64(mx*dx)) + float64(p*float64(my*dy))
}

// typicalStep is the mean distance of neighbouring rows.
func typicalStep(x, y []float64) float64 {
	sum := 0.0
	for i := 1; i < len(x); i++ {
		sum += math.Hypot(x[i]-x[i-1], y[i]-y[i-1])
	}
	return sum / float64(len(x)-1)
}

// ArcLength returns the length along the contour from its first row.
func ArcLength(x, y []float64) []float64 {
	s := make([]float64, len(x))
	for i := 1; i < len(x); i++ {
		s[i] = s[i-1] + math.Hypot(x[i]-x[i-1], y[i]-y[i-1])
	}
	return s
}

// Onto returns the values of a closed contour (x, y) at other points, each
// taken at the nearest place of the contour, straight between its rows, and
// the greatest distance of a point from it over the length of the contour in x.
// Rows with a gap part the contour; nil where it has no two rows.
func Onto(x, y, values, px, py []float64) (at []float64, apart float64) {
	lo, hi := math.Inf(1), math.Inf(-1)
	for _, v := range x {
		if !math.IsNaN(v) {
			lo, hi = min(lo, v), max(hi, v)
		}
	}
	for n := range px {
		best, found := math.Inf(1), math.NaN()
		for i := 1; i < len(x); i++ {
			if !usable(x, values, i-1) || !usable(x, values, i) || math.IsNaN(y[i-1]) || math.IsNaN(y[i]) {
				continue
			}
			dx, dy := x[i]-x[i-1], y[i]-y[i-1]
			t := 0.0
			if length := float64(dx*dx) + float64(dy*dy); length > 0 {
				t = min(1, max(0, (float64((px[n]-x[i-1])*dx)+float64((py[n]-y[i-1])*dy))/length))
			}
			d := math.Hypot(px[n]-x[i-1]-float64(t*dx), py[n]-y[i-1]-float64(t*dy))
			if d < best {
				best, found = d, values[i-1]+float64(t*(values[i]-values[i-1]))
			}
		}
		if math.IsNaN(found) || !(hi > lo) {
			return nil, 0
		}
		at, apart = append(at, found), max(apart, best/(hi-lo))
	}
	return at, apart
}
