package plausibility

import (
	"math"
	"sort"
)

// Correlation returns the coefficient of two slices, 0 where one is constant.
func Correlation(a, b []float64) float64 {
	n := float64(len(a))
	ma, mb := mean(a), mean(b)
	saa, sbb, sab := 0.0, 0.0, 0.0
	for i := range a {
		saa += float64((a[i] - ma) * (a[i] - ma))
		sbb += float64((b[i] - mb) * (b[i] - mb))
		sab += float64((a[i] - ma) * (b[i] - mb))
	}
	if n < 2 || saa == 0 || sbb == 0 {
		return 0
	}
	return sab / math.Sqrt(float64(saa*sbb))
}

func mean(v []float64) float64 {
	sum := 0.0
	for _, x := range v {
		sum += x
	}
	return sum / float64(len(v))
}

// Shuffled reports whether a curve that is sorted in x jumps to and fro
// between two branches, as a closed loop does once it was sorted: the second
// differences change sign almost always, and the steps are large against
// those between rows two apart. Turns counts the changes of direction.
func Shuffled(x, y []float64) (turns int, ok bool) {
	if len(y) < 12 || !sort.Float64sAreSorted(x) {
		return 0, false
	}
	near, far := 0.0, 0.0
	for i := 2; i < len(y); i++ {
		if (y[i]-y[i-1])*(y[i-1]-y[i-2]) < 0 {
			turns++
		}
		near += math.Abs(y[i] - y[i-1])
		far += math.Abs(y[i] - y[i-2])
	}
	share := float64(turns) / float64(len(y)-2)
	return turns, share > 0.4 && near > 1.5*far
}

// Magnitude reports whether values that never change sign touch zero, as the
// magnitude of a quantity does where the quantity itself changes sign: a
// sharp minimum inside the curve, far below its neighbours and near zero
// against the largest value.
func Magnitude(y []float64) (least float64, ok bool) {
	if len(y) < 5 {
		return 0, false
	}
	at, largest := 0, 0.0
	for i, v := range y {
		if v < 0 || math.IsNaN(v) {
			return 0, false
		}
		if v < y[at] {
			at = i
		}
		largest = max(largest, v)
	}
	if at == 0 || at == len(y)-1 || y[at] > 0.05*largest {
		return 0, false
	}
	// A sign change leaves a corner: both sides fall towards it as steeply as
	// they do one step further away.
	left, right := y[max(at-2, 0)], y[min(at+2, len(y)-1)]
	return y[at], left > 2*y[at]+0.01*largest && right > 2*y[at]+0.01*largest && corner(y, at)
}

// corner reports whether the slope changes abruptly at a row: from the rows
// before to the rows after it by more than twice the change on either side.
func corner(y []float64, at int) bool {
	if at < 2 || at+2 >= len(y) {
		return true
	}
	before, after := y[at-1]-y[at-2], y[at+2]-y[at+1]
	inner := y[at+1] - y[at-1]
	return before < 0 && after > 0 && math.Abs(after-before) > math.Abs(inner)
}

// Outlier is a row that lies far off the line through its neighbours.
type Outlier struct {
	Row    int
	Robust float64 // distance in robust deviations
	Ratio  float64 // value over the value expected from its neighbours
}

// farOff is the number of robust deviations beyond which a row is flagged.
const farOff = 12

// Outliers flags rows of a smooth curve that lie more than twelve robust
// deviations off the value that their four neighbours interpolate. The
// deviation is 1.4826 times the median distance, and at least a thousandth of
// the range, so that a smooth curve without scatter is not all outliers. A
// flag is a question; nothing is left out.
func Outliers(y []float64) []Outlier {
	if len(y) < 9 {
		return nil
	}
	off := make([]float64, len(y))
	expected := make([]float64, len(y))
	lo, hi := math.Inf(1), math.Inf(-1)
	for i := range y {
		lo, hi = min(lo, y[i]), max(hi, y[i])
		expected[i] = fromNeighbours(y, i)
		off[i] = y[i] - expected[i]
	}
	deviation := max(1.4826*medianAbs(off), 1e-3*robustRange(y))
	var found []Outlier
	for i := range y {
		r := math.Abs(off[i]) / deviation
		if r > farOff && r >= neighbourWorst(off, i)/deviation && alone(y, off, i, deviation) {
			found = append(found, Outlier{i, r, y[i] / expected[i]})
		}
	}
	if len(found) > max(1, len(y)/20) {
		return nil // not single rows but the nature of the curve
	}
	return found
}

// fromNeighbours returns the median of three guesses from the rows around i:
// the line between its neighbours, the line between the next ones, and the
// lines through the two rows on either side.
func fromNeighbours(y []float64, i int) float64 {
	n := len(y)
	switch {
	case i < 2:
		return 2*y[i+1] - y[i+2]
	case i >= n-2:
		return 2*y[i-1] - y[i-2]
	}
	guesses := []float64{(y[i-1] + y[i+1]) / 2, (y[i-2] + y[i+2]) / 2, 2*y[i-1] - y[i-2], 2*y[i+1] - y[i+2]}
	sort.Float64s(guesses)
	return (guesses[1] + guesses[2]) / 2
}

func medianAbs(v []float64) float64 {
	a := make([]float64, len(v))
	for i, x := range v {
		a[i] = math.Abs(x)
	}
	sort.Float64s(a)
	return quantile(a, 0.5)
}

// robustRange is the range of the middle nine tenths.
func robustRange(y []float64) float64 {
	sorted := append([]float64{}, y...)
	sort.Float64s(sorted)
	return quantile(sorted, 0.95) - quantile(sorted, 0.05)
}

func neighbourWorst(off []float64, i int) float64 {
	worst := 0.0
	for j := max(0, i-1); j <= min(len(off)-1, i+1); j++ {
		if j != i {
			worst = max(worst, math.Abs(off[j]))
		}
	}
	return worst
}

// alone reports whether, with the row left out, its neighbours lie on a line:
// a jump or a peak of several rows is no outlier.
func alone(y, off []float64, i int, deviation float64) bool {
	if i < 2 || i >= len(y)-2 {
		return false // ends and steep starts cannot be told apart
	}
	bridge := (y[i-1] + y[i+1]) / 2
	return math.Abs(y[i]-bridge) > farOff*deviation && math.Abs(y[i+1]-y[i-1]) < math.Abs(off[i])
}
