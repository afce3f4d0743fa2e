package dataset

// Kind says what the figures of an entry rest on. It decides what may be
// claimed of a comparison with them.
type Kind string

// The four kinds.
const (
	Law         Kind = "law"         // exact under stated assumptions
	Correlation Kind = "correlation" // fitted to measured data
	Simulation  Kind = "simulation"  // another computation
	Test        Kind = "test"        // measured
)

// Noun returns what a sentence calls a reference of the kind; "" for an
// unknown one.
func (k Kind) Noun() string {
	switch k {
	case Law:
		return "published law"
	case Correlation:
		return "published correlation"
	case Simulation:
		return "other simulation"
	case Test:
		return "measured data"
	}
	return ""
}

// Measured reports whether a comparison may be worded as a validation: only
// with measured data.
func (k Kind) Measured() bool { return k == Test }

// Reach says how the source of the figures was reached.
type Reach string

// How far a source reaches.
const (
	Seen     Reach = "seen"     // read in the primary source
	Quoted   Reach = "quoted"   // read in a text that quotes the source
	Memory   Reach = "memory"   // written from memory
	Computed Reach = "computed" // computed for this shelf
)

func (r Reach) known() bool {
	return r == Seen || r == Quoted || r == Memory || r == Computed
}
