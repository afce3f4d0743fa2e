package metric

import "math"

// Criterion is a limit on a score that a field uses, with its scope: limits
// are bound to their context, and a result beyond one is no statement on the
// model by itself.
type Criterion struct {
	Name   string
	Score  string // FB, NMSE, FAC2, MG, VG, q
	Low    float64
	High   float64
	Scope  string
	Source string
}

// Criteria are the limits carried with the program; a study may add its own.
// Sources as recorded with the published examples; where publications differ
// both limits are listed.
var Criteria = []Criterion{
	{"fractional bias, rural", "FB", -0.3, 0.3, "rural dispersion, maxima on arcs, unpaired in space", "Chang and Hanna 2004, Meteorol. Atmos. Phys. 87, 167"},
	{"normalised error, rural", "NMSE", 0, 1.5, "rural dispersion, maxima on arcs", "Chang and Hanna 2004, Meteorol. Atmos. Phys. 87, 167"},
	{"normalised error, rural, wider", "NMSE", 0, 4, "rural dispersion; the wider limit in use", "Chang and Hanna 2004, Meteorol. Atmos. Phys. 87, 167"},
	{"within a factor of two, rural", "FAC2", 0.5, 1, "rural dispersion", "Chang and Hanna 2004, Meteorol. Atmos. Phys. 87, 167"},
	{"geometric bias", "MG", 0.7, 1.3, "rural dispersion", "Chang and Hanna 2004, Meteorol. Atmos. Phys. 87, 167"},
	{"geometric variance", "VG", 1, 1.6, "rural dispersion", "Chang and Hanna 2004, Meteorol. Atmos. Phys. 87, 167"},
	{"fractional bias, urban", "FB", -0.67, 0.67, "urban dispersion", "from the capability list of this project, no document seen"},
	{"normalised error, urban", "NMSE", 0, 6, "urban dispersion", "from the capability list of this project, no document seen"},
	{"within a factor of two, urban", "FAC2", 0.3, 1, "urban dispersion", "from the capability list of this project, no document seen"},
	{"hit rate", "q", 0.66, 1, "wind and dispersion guideline, D = 25 %, W from the data", "VDI 3783-9, as recorded with the published examples"},
}

// Met reports whether a score lies within the limits of the criterion.
func (c Criterion) Met(score float64) bool {
	return !math.IsNaN(score) && score >= c.Low && score <= c.High
}
