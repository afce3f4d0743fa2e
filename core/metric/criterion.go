package metric

import (
	"math"

	"weirmark/core/quantity"
)

// Criterion is a limit on a score that a field uses, with its scope: limits
// are bound to their context, and a result beyond one is no statement on the
// model by itself.
type Criterion struct {
	Name     string  `json:"name"`
	Score    string  `json:"score"` // one of ScoreKeys
	Low      float64 `json:"low"`
	High     float64 `json:"high"`
	Scope    string  `json:"scope"`
	Source   string  `json:"source"`
	Fraction float64 `json:"fraction,omitempty"` // of a hit rate: the fraction of D it is for; 0: any
}

// ScoreKeys are the scores that a criterion can limit.
var ScoreKeys = []string{"FB", "NMSE", "FAC2", "NAD", "MG", "VG", "q", "R", "slope"}

// Criteria are the limits carried with the program; a study may hold its own
// list in their place.
// Sources as recorded with the published examples; where publications differ
// both limits are listed.
var Criteria = []Criterion{
	{"fractional bias, rural", "FB", -0.3, 0.3, "rural dispersion, maxima on arcs, unpaired in space", "Chang and Hanna 2004, Meteorol. Atmos. Phys. 87, 167", 0},
	{"normalised error, rural", "NMSE", 0, 1.5, "rural dispersion, maxima on arcs", "Chang and Hanna 2004, Meteorol. Atmos. Phys. 87, 167", 0},
	{"normalised error, rural, wider", "NMSE", 0, 4, "rural dispersion; the wider limit in use", "Chang and Hanna 2004, Meteorol. Atmos. Phys. 87, 167", 0},
	{"within a factor of two, rural", "FAC2", 0.5, 1, "rural dispersion", "Chang and Hanna 2004, Meteorol. Atmos. Phys. 87, 167", 0},
	{"geometric bias", "MG", 0.7, 1.3, "rural dispersion", "Chang and Hanna 2004, Meteorol. Atmos. Phys. 87, 167", 0},
	{"geometric variance", "VG", 1, 1.6, "rural dispersion", "Chang and Hanna 2004, Meteorol. Atmos. Phys. 87, 167", 0},
	{"fractional bias, urban", "FB", -0.67, 0.67, "urban dispersion", "from memory, no document seen", 0},
	{"normalised error, urban", "NMSE", 0, 6, "urban dispersion", "from memory, no document seen", 0},
	{"within a factor of two, urban", "FAC2", 0.3, 1, "urban dispersion", "from memory, no document seen", 0},
	{"hit rate", "q", 0.66, 1, "wind and dispersion guideline, D = 25 %, W from the data", "VDI 3783-9, as recorded with the published examples", 0.25},
	{"hit rate, wind action, means", "q", 0.9, 1, "wind action on buildings, mean pressures, D = 10 %", "from memory, no document seen", 0.10},
	{"hit rate, wind action, rms and peaks", "q", 0.9, 1, "wind action on buildings, rms and peak pressures, D = 20 %", "from memory, no document seen", 0.20},
}

// For reports whether the criterion is one of a score, with the fraction of D
// of a hit rate.
func (c Criterion) For(key string, fraction float64) bool {
	return c.Score == key && (c.Fraction == 0 || quantity.Round(c.Fraction, 10) == quantity.Round(fraction, 10))
}

// Met reports whether a score lies within the limits of the criterion.
func (c Criterion) Met(score float64) bool {
	return !math.IsNaN(score) && score >= c.Low && score <= c.High
}
