package comparison

import "math"

// Distinct returns the stations to keep where the same reading is listed more
// than once: the first of those that are equal in all columns (position, value,
// uncertainty), to the last bit. A reading counts once in the joint statistic,
// however often a file repeats it; equal values at different positions are
// different readings. Rows with a NaN are kept.
func Distinct(columns ...[]float64) []int {
	if len(columns) == 0 {
		return nil
	}
	seen := map[string]bool{}
	key := make([]byte, 0, 8*len(columns))
	var rows []int
	for i := range columns[0] {
		key = key[:0]
		known := true
		for _, c := range columns {
			v := c[i]
			known = known && !math.IsNaN(v)
			if v == 0 {
				v = 0 // -0 is 0
			}
			bits := math.Float64bits(v)
			for shift := 0; shift < 64; shift += 8 {
				key = append(key, byte(bits>>shift))
			}
		}
		if known && seen[string(key)] {
			continue
		}
		seen[string(key)] = true
		rows = append(rows, i)
	}
	return rows
}
