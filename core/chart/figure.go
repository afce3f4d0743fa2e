package chart

import (
	"encoding/json"
	"fmt"

	"weirmark/core/study"
)

// Figure is one drawing with everything that has to stand beside it. Width and
// Height are in px.
type Figure struct {
	ID      string          `json:"id"`
	Title   string          `json:"title"`
	Caption string          `json:"caption"`
	Alt     string          `json:"alt"` // what the drawing shows, for those who do not see it
	Width   int             `json:"width"`
	Height  int             `json:"height"`
	Option  json.RawMessage `json:"option"`
	Table   Table           `json:"table"`
}

// Table holds the numbers that a figure draws, as texts.
type Table struct {
	Head []string   `json:"head"`
	Rows [][]string `json:"rows"`
}

// width of every figure, in px.
const width = 760

// Figures returns the figures of a cell in the order of reading: the monitors
// and balances of its runs, the comparison, the parts of the joint statistic and what a
// correlation does to it, the grid study behind u_num, and the sources of u_val. Their IDs begin with id. A cell with none of them has none. It fails on
// a theme that does not exist.
func Figures(c study.Cell, id string, t Theme) ([]Figure, error) {
	figures := []Figure{}
	if len(c.Monitors) > 0 {
		f, err := Settling(c, id, t)
		if err != nil {
			return nil, err
		}
		figures = append(figures, f)
	}
	if hasBalances(c) {
		f, err := Balances(c, id, t)
		if err != nil {
			return nil, err
		}
		figures = append(figures, f)
	}
	compare, drawable := Overlay, len(c.Stations) > 0 || len(c.Curve.X) > 0
	if c.Scalar {
		compare, drawable = Intervals, len(c.Stations) > 0 && c.Stations[0].E.Known()
	}
	if drawable {
		f, err := compare(c, id, t)
		if err != nil {
			return nil, err
		}
		figures = append(figures, f)
	}
	if hasResiduals(c) {
		f, err := Residuals(c, id, t)
		if err != nil {
			return nil, err
		}
		figures = append(figures, f)
	}
	if j := c.Joint; j != nil && len(j.Correlations) > 0 {
		f, err := Correlation(c, id, t)
		if err != nil {
			return nil, err
		}
		figures = append(figures, f)
	}
	if hasGrids(c.Grids) {
		f, err := Refinement(c, id, t)
		if err != nil {
			return nil, err
		}
		figures = append(figures, f)
	}
	if hasShares(c) {
		f, err := Budget(c, id, t)
		if err != nil {
			return nil, err
		}
		figures = append(figures, f)
	}
	return figures, nil
}

// finish encodes the option. A number that is not finite would be a fault of
// our own and fails here.
func (f Figure) finish(o option) (Figure, error) {
	encoded, err := json.Marshal(o)
	if err != nil {
		return Figure{}, fmt.Errorf("encoding figure %q: %w", f.ID, err)
	}
	f.Width = width
	f.Option = encoded
	return f, nil
}
