package uncertainty

import (
	"math"
	"slices"
)

// ShortestInterval returns the ends of the shortest interval that holds the
// fraction level of the values, q = floor(level n + 1/2) steps of the ordered
// values apart, the lowest such interval where several are shortest. It reorders
// the values. Source: JCGM 101:2008 7.7 (clause from memory). It is not ok for
// a level outside 0 to 1, and where q is 0 or n.
//
// Only the values that can be an end are ordered, so that most of a sample is
// selected and not sorted.
func ShortestInterval(values []float64, level float64) (low, high float64, ok bool) {
	n := len(values)
	q := int(float64(level*float64(n)) + 0.5)
	if !(level > 0 && level < 1) || q < 1 || q >= n {
		return math.NaN(), math.NaN(), false
	}
	ends := n - q
	if 2*ends < n {
		selectAt(values, ends)
		slices.Sort(values[:ends])
		selectAt(values[ends:], q-ends)
		slices.Sort(values[q:])
	} else {
		slices.Sort(values)
	}
	best := 0
	for r := 1; r < ends; r++ {
		if values[r+q]-values[r] < values[best+q]-values[best] {
			best = r
		}
	}
	return values[best], values[best+q], true
}

// median returns the middle of the values, the mean of the middle two for an
// even number. It reorders the values.
func median(values []float64) float64 {
	n := len(values)
	selectAt(values, n/2)
	if n%2 == 1 {
		return values[n/2]
	}
	return (slices.Max(values[:n/2]) + values[n/2]) / 2
}

// selectAt reorders values so that values[k] is the one it would be in sorted
// order, none before it is larger and none after it is smaller. Source: Hoare's
// selection with the median of three (from memory).
func selectAt(values []float64, k int) {
	low, high := 0, len(values)-1
	for low < high {
		pivot := medianOfThree(values[low], values[low+(high-low)/2], values[high])
		i, j := low, high
		for i <= j {
			for values[i] < pivot {
				i++
			}
			for pivot < values[j] {
				j--
			}
			if i <= j {
				values[i], values[j] = values[j], values[i]
				i++
				j--
			}
		}
		switch {
		case k <= j:
			high = j
		case k >= i:
			low = i
		default:
			return
		}
	}
}

func medianOfThree(a, b, c float64) float64 { return max(min(a, b), min(max(a, b), c)) }
