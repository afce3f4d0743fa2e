package settling

import (
	"math"

	"gonum.org/v1/gonum/stat/distuv"
)

// Batch is the mean of a series with its uncertainty by batches.
type Batch struct {
	Count, Size int     // batches, and rows in each; the rows at the front that fill none are left out
	Mean        float64 // of the rows used
	U           float64 // standard deviation of the batch means over sqrt(Count)
	Half95      float64 // half-width of the 95 % interval: Student's factor for Count-1 times U
}

// BatchMeans parts y into count batches of equal size and takes their means
// as independent. ok is false for fewer than two batches or rows than batches.
// The formula is from memory.
func BatchMeans(y []float64, count int) (b Batch, ok bool) {
	if count < 2 || len(y) < count {
		return Batch{}, false
	}
	b = Batch{Count: count, Size: len(y) / count}
	y = y[len(y)-b.Count*b.Size:]
	means := make([]float64, count)
	for i := range means {
		means[i] = mean(y[i*b.Size : (i+1)*b.Size])
	}
	m, sd := spread(means)
	b.Mean, b.U = m, sd/math.Sqrt(float64(count))
	b.Half95 = b.U * distuv.StudentsT{Mu: 0, Sigma: 1, Nu: float64(count - 1)}.Quantile(0.975)
	return b, true
}
