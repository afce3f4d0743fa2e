package refinement

// Steps studies values over time steps on one grid, as Study does over grids:
// a step takes the part of h, so that what it says of grids holds of steps.
// Steps are positive, in any one unit.
func Steps(steps, values []float64, opt Options) Result {
	counts := make([]float64, len(steps))
	for i, dt := range steps {
		counts[i] = 1 / dt
	}
	return Study(counts, values, 1, opt)
}
