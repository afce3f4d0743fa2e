package comparison

import "weirmark/core/uncertainty"

// dense makes the statistic by the dense root, whatever the patterns.
func dense(e []float64, b uncertainty.Budget) (Joint, error) {
	r, err := newRoot(b)
	if err != nil {
		return Joint{}, err
	}
	return (&whitening{n: len(e), root: r}).joint(e)
}
