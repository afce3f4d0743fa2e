package uncertainty

import "math"

// Replicates returns the mean of repeated readings, their standard deviation
// (divisor n-1) and the standard uncertainty of the mean s/sqrt(n), JCGM
// 100:2008 4.2 (clause from memory). Fewer than two readings have no s, none
// have no mean. Readings are taken from the first one, so that a large common
// part takes no digits.
func Replicates(x []float64) (mean, s, u float64) {
	if len(x) == 0 {
		return math.NaN(), math.NaN(), math.NaN()
	}
	n := float64(len(x))
	sum := 0.0
	for _, v := range x {
		sum += v - x[0]
	}
	mean = x[0] + sum/n
	if len(x) < 2 {
		return mean, math.NaN(), math.NaN()
	}
	squares := 0.0
	for _, v := range x {
		squares += float64((v - mean) * (v - mean))
	}
	s = math.Sqrt(squares / (n - 1))
	return mean, s, s / math.Sqrt(n)
}

// Correlation returns the correlation coefficient of readings taken in pairs,
// which is also that of their means (JCGM 100:2008 5.2.3, clause from memory).
// It is NaN where there are fewer than two pairs or one side does not vary.
func Correlation(x, y []float64) float64 {
	meanX, sX, _ := Replicates(x)
	meanY, sY, _ := Replicates(y)
	sum := 0.0
	for i := range x {
		sum += float64((x[i] - meanX) * (y[i] - meanY))
	}
	return sum / (float64(len(x)-1) * sX * sY)
}
