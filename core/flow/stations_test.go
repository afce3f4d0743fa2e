package flow

import (
	"math"
	"slices"
	"testing"
)

// TestEveryLawCanBeDrawn: the stations ascend, and every one has a value that
// is not flagged.
func TestEveryLawCanBeDrawn(t *testing.T) {
	needed := map[string]float64{"h": 0.01, "D": 0.01, "nu": 1e-4, "U": 0.1, "eps/D": 0.001, "b/a": 0.25, "K": 1e-4, "x": 0.5, "U2/U1": 0.3}
	for _, l := range Laws() {
		p := map[string]float64{}
		for _, s := range l.Parameters {
			if v, ok := needed[s.Name]; ok {
				p[s.Name] = v
			} else if s.Default == nil && !s.Optional {
				t.Fatalf("%s needs %s: give it a value here", l.ID, s.Name)
			}
		}
		x, err := l.Stations(p, 61)
		if err != nil {
			t.Errorf("%s: %v", l.ID, err)
			continue
		}
		c, err := l.Evaluate(p, x)
		if err != nil || len(x) != 61 || !slices.IsSorted(x) || x[0] == x[1] {
			t.Errorf("%s: stations %v, %v", l.ID, x, err)
			continue
		}
		for i, v := range c.Values {
			if math.IsNaN(v) || c.Flagged[i] {
				t.Errorf("%s at %v: value %v, flagged %v, notices %v", l.ID, x[i], v, c.Flagged[i], c.Notices)
			}
		}
	}
}

func TestSpaced(t *testing.T) {
	if got := spaced(1, 10000, 3); !slices.Equal([]float64{got[0], got[2]}, []float64{1, 10000}) || math.Abs(got[1]-100) > 1e-12 {
		t.Errorf("by ratio: %v", got)
	}
	if got := spaced(-1, 1, 5); !slices.Equal(got, []float64{-1, -0.5, 0, 0.5, 1}) {
		t.Errorf("by steps: %v", got)
	}
}

// TestNothingToDraw: ranges that the parameters close are refused.
func TestNothingToDraw(t *testing.T) {
	l, err := Find("wall-log")
	if err != nil {
		t.Fatal(err)
	}
	if x, err := l.Stations(map[string]float64{"Re_tau": 100}, 10); err == nil {
		t.Errorf("stations %v though the layer ends at y+ = 15", x)
	}
	if _, err := l.Stations(map[string]float64{"kappa": -1}, 10); err == nil {
		t.Error("a refused parameter was taken")
	}
}
