package flow

import (
	"math"
	"testing"
)

// TestPowerProfile: delta* = delta/8, theta = 7 delta/72, H = 9/7, exactly
// (published relations), by midpoints in s = y^(1/7).
func TestPowerProfile(t *testing.T) {
	lost, momentum := 0.0, 0.0
	const n = 4000 // the error of the midpoint rule falls as 1/n^2: below 1e-6
	for i := range n {
		s := (float64(i) + 0.5) / n
		u := value(t, "power-profile-7", nil, math.Pow(s, 7))
		weight := 7 * math.Pow(s, 6) / n
		lost += (1 - u) * weight
		momentum += u * (1 - u) * weight
	}
	if math.Abs(lost-1./8) > 1e-6 || math.Abs(momentum-7./72) > 1e-6 || math.Abs(lost/momentum-9./7) > 1e-5 {
		t.Errorf("delta* %v, theta %v, H %v", lost, momentum, lost/momentum)
	}
}
