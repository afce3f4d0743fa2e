package metric

import "math"

// Line is the least-squares line of s on d with their correlation. A
// correlation is blind to bias and scale: whoever prints R prints the slope and
// the intercept with it.
type Line struct {
	Slope     float64 // of s on d
	Intercept float64 // in the unit of the data
	R         float64
}

// Fit returns the line of s on d; NaN where either does not vary.
func Fit(s, d []float64) Line {
	n := float64(len(d))
	meanS, meanD := 0.0, 0.0
	for i := range d {
		meanS += s[i] / n
		meanD += d[i] / n
	}
	var ss, dd, sd float64
	for i := range d {
		a, b := s[i]-meanS, d[i]-meanD
		ss += float64(a * a)
		dd += float64(b * b)
		sd += float64(a * b)
	}
	if len(d) == 0 || ss == 0 || dd == 0 {
		return Line{math.NaN(), math.NaN(), math.NaN()}
	}
	slope := sd / dd
	return Line{Slope: slope, Intercept: meanS - float64(slope*meanD), R: sd / math.Sqrt(float64(ss*dd))}
}
