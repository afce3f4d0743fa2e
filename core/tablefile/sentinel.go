package tablefile

import (
	"fmt"
	"math"
	"slices"

	"weirmark/core/notice"
)

// marks are numbers that are often written for a missing value (common
// practice, no source). One occurrence of those below is enough to ask.
var marks = [...]float64{-999, -9999, -99999, -999.9, -999.99, 1e30, -1e30, 1e35, 1e36, 1e37, 1e38, 9.9999e37, 9.999e37, 9.99999e37}

// doubtful are marks that measured numbers may well equal: they are asked
// about where they appear more than once and exceed all else.
var doubtful = [...]float64{999, 9999, 99999}

// sentinels asks about numbers of a column that look like marks of missing
// data. Such a number stands out: it is the extreme of the column, and other
// numbers exist beside it.
func (r *reader) sentinels(t *Table, column Column) {
	low, high := math.Inf(1), math.Inf(-1)
	for _, v := range column.Values {
		if v < low {
			low = v
		}
		if v > high {
			high = v
		}
	}
	if low >= high {
		return
	}
	for _, mark := range marks {
		if mark == low || mark == high || mark >= 1e30 && mark <= high || mark <= -1e30 && mark >= low {
			r.askSentinel(t, column, mark, 1)
		}
	}
	for _, mark := range doubtful {
		if mark == high {
			r.askSentinel(t, column, mark, 2)
		}
	}
}

func (r *reader) askSentinel(t *Table, column Column, mark float64, least int) {
	if slices.Contains(r.kept, mark) {
		return
	}
	count, first := 0, 0
	for i, v := range column.Values {
		if v == mark {
			if count == 0 {
				first = i
			}
			count++
		}
	}
	if count >= least {
		r.add(notice.New("value-sentinel", count, fmt.Sprintf("%s in column %q", formatValue(mark), column.Name)).At(t.RowLine(first)))
	}
}

// dropSentinels makes the numbers that a person stated to be marks of missing
// values missing.
func (r *reader) dropSentinels(t *Table, column Column) {
	for _, mark := range r.answers.sentinels {
		count, first := 0, 0
		for i, v := range column.Values {
			if v == mark {
				if count == 0 {
					first = i
				}
				count++
				column.Values[i] = math.NaN()
			}
		}
		if count > 0 {
			r.add(notice.New("sentinel-stated", count, column.Name, formatValue(mark)).At(t.RowLine(first)))
		}
	}
}
