package adequacy

import (
	"math"
	"testing"

	"pgregory.net/rapid"
)

func TestLocate(t *testing.T) {
	square := [][]float64{{0, 0}, {10, 0}, {0, 2}, {10, 2}}
	for _, row := range []struct {
		name             string
		points           [][]float64
		at               []float64
		state            string
		beyond, distance float64
	}{
		{"between two", [][]float64{{4.2}, {9}}, []float64{6}, Inside, 0, 1.8 / 4.8},
		{"at one of two", [][]float64{{4.2}, {9}}, []float64{9}, Edge, 0, 0},
		{"beyond two", [][]float64{{4.2}, {9}}, []float64{11}, Outside, 2 / 4.8, 2 / 4.8},
		{"in the middle of a square", square, []float64{5, 1}, Inside, 0, math.Sqrt(.5)},
		{"on its side", square, []float64{10, 1}, Edge, 0, .5},
		{"off its side", square, []float64{12, 1}, Outside, .2, math.Hypot(.2, .5)},
		{"off its corner", square, []float64{13, 2.8}, Outside, .5, .5},
		{"inside each range, outside the hull", [][]float64{{0, 0}, {1, 0}, {0, 1}}, []float64{.9, .9}, Outside, .8 / math.Sqrt2, math.Hypot(.1, .9)},
		{"on the line of a flat set", [][]float64{{0, 0}, {1, 1}}, []float64{.5, .5}, Edge, 0, math.Sqrt(.5)},
		{"the only point", [][]float64{{4}}, []float64{4}, Edge, 0, 0},
		{"beside the only point", [][]float64{{4}}, []float64{5}, Outside, .25, .25},
		{"beside zero", [][]float64{{0}}, []float64{2}, Outside, 2, 2},
		{"the same point twice", [][]float64{{1, 2}, {1, 2}, {3, 4}}, []float64{3, 4}, Edge, 0, 0},
	} {
		p := Locate(row.points, row.at)
		if p.State != row.state || math.Abs(p.Beyond-row.beyond) > 1e-9 || math.Abs(p.Distance-row.distance) > 1e-9 {
			t.Errorf("%s: %+v, want %s, %v, %v", row.name, p, row.state, row.beyond, row.distance)
		}
	}
}

// The distance from the hull is the least over all flats through some of the
// points whose nearest point is a mean of them: every such set is tried.
func TestHullAgainstExhaustiveSearch(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		d := rapid.IntRange(1, 3).Draw(t, "parameters")
		points := rapid.SliceOfN(rapid.SliceOfN(rapid.Float64Range(-1, 1), d, d), 1, 7).Draw(t, "points")
		want := math.Inf(1)
		for set := 1; set < 1<<len(points); set++ {
			var in []int
			for i := range points {
				if set>>i&1 == 1 {
					in = append(in, i)
				}
			}
			weights, ok := affine(points, in)
			if len(in) == 1 {
				weights, ok = []float64{1}, true
			}
			if !ok || len(in) > d+1 {
				continue
			}
			mean := true
			for _, w := range weights {
				mean = mean && w >= -1e-12
			}
			if x := combined(points, in, weights); mean {
				want = min(want, math.Sqrt(product(x, x)))
			}
		}
		if got := fromOrigin(points); math.Abs(got-want) > 1e-6 {
			t.Fatalf("distance %v, want %v", got, want)
		}
	})
}
