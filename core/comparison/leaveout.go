package comparison

import (
	"errors"
	"math"

	"weirmark/core/uncertainty"
)

// ErrWork says that leaving out was refused for its cost.
var ErrWork = errors.New("too many regions for this number of stations")

// maxLeaveOut bounds the stations times regions, and with a dense covariance
// their cubes times regions.
const (
	maxLeaveOut      = 4_000_000
	maxLeaveOutDense = 2_000_000_000
)

// LeaveOut returns the joint statistic without the stations of each region in
// turn. A region of all stations leaves none: NaN at rank 0. It fails as
// Statistic does, for any of the regions, and with ErrWork.
func LeaveOut(e []float64, b uncertainty.Budget, regions [][]int) ([]Joint, error) {
	if !finite(e) {
		return nil, ErrFinite
	}
	w, err := newWhitening(b)
	if err != nil {
		return nil, err
	}
	n := float64(len(e))
	work, limit := n*float64(len(regions)), float64(maxLeaveOut)
	if w.root != nil {
		work, limit = n*n*work, maxLeaveOutDense
	}
	if work > limit {
		return nil, ErrWork
	}
	left := make([]Joint, len(regions))
	for k, region := range regions {
		rows := without(len(e), region)
		if len(rows) == 0 {
			left[k] = Joint{math.NaN(), 0}
			continue
		}
		rest := make([]float64, len(rows))
		for j, i := range rows {
			rest[j] = e[i]
		}
		if left[k], err = Statistic(rest, b.At(rows)); err != nil {
			return nil, err
		}
	}
	return left, nil
}

// without returns 0 to n-1 but for the rows of a region.
func without(n int, region []int) []int {
	out := make([]bool, n)
	for _, i := range region {
		out[i] = true
	}
	rows := make([]int, 0, n)
	for i := range n {
		if !out[i] {
			rows = append(rows, i)
		}
	}
	return rows
}

// EachStation returns one region for every station.
func EachStation(n int) [][]int {
	regions := make([][]int, n)
	for i := range regions {
		regions[i] = []int{i}
	}
	return regions
}
