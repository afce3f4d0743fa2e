package settling

import (
	"math"

	"weirmark/core/notice"
	"weirmark/core/quantity"
)

// Weight compares the iterative uncertainty with what stands beside it. A
// ratio is NaN where either side is not known.
type Weight struct {
	OfGrid   float64 // U_iter/U_grid: aim at a tenth or less
	OfChange float64 // U_iter over the change between the two finest grids
	OfE      float64 // U_iter/|E|
	Notices  []notice.Notice
}

// Weigh compares U_iter, the grid uncertainty U_grid, the change between the
// two finest grids and the comparison error E, all in one unit and both U at
// one coverage. Signs do not count; 0 and NaN stand for not known (of U_iter
// only NaN). Name is the quantity in messages.
func Weigh(name string, uIter, uGrid, change, e float64) Weight {
	ratio := func(of float64) float64 {
		of = math.Abs(of)
		if !(uIter >= 0) || !usable(uIter) || !(of > 0) || !usable(of) {
			return math.NaN()
		}
		return quantity.Round(uIter/of, 10)
	}
	w := Weight{OfGrid: ratio(uGrid), OfChange: ratio(change), OfE: ratio(e)}
	if w.OfGrid > smallShare {
		w.Notices = append(w.Notices, notice.New("iteration-ratio", name, quantity.Text(w.OfGrid, 2), quantity.Text(smallShare, 1)))
	}
	if w.OfChange > 1 {
		w.Notices = append(w.Notices, notice.New("iteration-noise", quantity.Text(math.Abs(change), 2), name, quantity.Text(uIter, 2)))
	}
	return w
}
