package integrate

import (
	"fmt"
	"math"
)

// FewError says that a rule needs more stations.
type FewError struct{ Have, Need int }

func (e *FewError) Error() string {
	return fmt.Sprintf("integrate %d stations: at least %d are needed", e.Have, e.Need)
}

// StationError says that a station, counted from zero, is not above the one
// before, or that its abscissa or value is not finite.
type StationError struct {
	Station int
	X, Y    float64
}

func (e *StationError) Error() string {
	return fmt.Sprintf("integrate: station %d (%g, %g) is not finite or not above the one before", e.Station, e.X, e.Y)
}

// refuse checks what both rules need; slices of different lengths panic.
func refuse(x, y []float64, need int) error {
	if len(x) != len(y) {
		panic(fmt.Sprintf("integrate: %d abscissae with %d values", len(x), len(y)))
	}
	for i := range x {
		sum := x[i] - x[i] + (y[i] - y[i])
		if math.IsNaN(sum) || i > 0 && !(x[i-1] < x[i]) {
			return &StationError{i, x[i], y[i]}
		}
	}
	if len(x) < need {
		return &FewError{len(x), need}
	}
	return nil
}
