package study

import "weirmark/core/metric"

// DistributionLine sets simulation and data against each other as
// distributions where either is one: runs with sampled inputs, or repeated
// readings of one value. Along a curve both numbers are means over the
// stations. Values are in the cell's unit.
type DistributionLine struct {
	Runs     int    `json:"runs"`     // of the simulation, 1 where it is one value
	Readings int    `json:"readings"` // of the data, 1 where they are one value
	Area     Number `json:"area"`     // between the two distribution functions
	Shift    Number `json:"shift"`    // mean of the runs less mean of the readings
}

// distributions fills the area between the distributions of both sides.
func (w *work) distributions() {
	if w.inner || len(w.x) == 0 || w.cell.Derived != nil {
		return
	}
	readings := [][]float64{}
	for _, d := range w.d {
		readings = append(readings, []float64{d})
	}
	if w.cell.Scalar {
		readings[0] = known(inUnit(w.reference.y, w.reference.yUnit, w.yUnit))
	}
	line := &DistributionLine{Runs: max(1, len(w.sampledRuns)), Readings: len(readings[0])}
	if line.Runs == 1 && line.Readings == 1 {
		return
	}
	area, shift := 0.0, 0.0
	for i := range w.x {
		s := []float64{w.s[i]}
		if w.sampledRuns != nil {
			s = nil
			for _, run := range w.sampledRuns {
				s = append(s, run[i])
			}
		}
		area += metric.Area(s, readings[i]) / float64(len(w.x))
		shift += (metric.Summarise(s).Bias - metric.Summarise(readings[i]).Bias) / float64(len(w.x))
	}
	line.Area, line.Shift = w.step(area), w.step(shift)
	if line.Area.Known() {
		w.cell.Distributions = line
	}
}
