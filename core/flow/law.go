package flow

import (
	"math"
	"slices"
	"strconv"

	"weirmark/core/notice"
)

// Kind says what a reference curve rests on.
type Kind string

// The two kinds of computed curves.
const (
	Exact       Kind = "law"         // follows from the equations of motion under stated assumptions
	Correlation Kind = "correlation" // holds measured data together; its constants are fitted
)

// Reach says how the source of a formula was reached.
type Reach string

// How far a source reaches.
const (
	Seen   Reach = "seen"   // read in the primary source
	Quoted Reach = "quoted" // read in a text that quotes the source
	Memory Reach = "memory" // written from memory
)

// noneStated is the uncertainty of a formula whose source gives none.
const noneStated = "none stated"

// Range is a closed interval, or open where it says so. Ends may be infinite.
type Range struct {
	Lo, Hi         float64
	OpenLo, OpenHi bool
	Source         string // where the ends come from
}

// Holds reports whether v lies in the range.
func (r Range) Holds(v float64) bool {
	above := v > r.Lo || v == r.Lo && !r.OpenLo
	below := v < r.Hi || v == r.Hi && !r.OpenHi
	return above && below
}

// String writes the range, as "above 0", "0 to 1", "up to 5".
func (r Range) String() string {
	lo, hi := strconv.FormatFloat(r.Lo, 'g', 6, 64), strconv.FormatFloat(r.Hi, 'g', 6, 64)
	from, to := lo, hi
	if r.OpenLo {
		from = "above " + lo
	}
	if r.OpenHi {
		to = "below " + hi
	}
	switch {
	case math.IsInf(r.Lo, -1) && math.IsInf(r.Hi, 1):
		return "any number"
	case math.IsInf(r.Hi, 1) && r.OpenLo:
		return from
	case math.IsInf(r.Hi, 1):
		return "from " + lo
	case math.IsInf(r.Lo, -1) && r.OpenHi:
		return to
	case math.IsInf(r.Lo, -1):
		return "up to " + hi
	}
	return from + " to " + to
}

// Symbol is a quantity of a formula. Unit is a symbol that core/quantity
// knows. Optional marks a parameter that only narrows a range; Default is the
// value taken, with a notice, where a parameter is not given (nil: it must be).
type Symbol struct {
	Name     string
	Meaning  string
	Unit     string
	Domain   Range
	Stated   Range
	Default  *float64
	Optional bool
}

// Condition is a quantity made of the parameters that a law depends on, such
// as a Reynolds number. Outside Stated every value is flagged.
type Condition struct {
	Name    string
	Formula string
	Stated  Range
	value   func(p []float64) float64
}

// Law is one reference curve: Value over Station.
type Law struct {
	ID          string
	Name        string
	Kind        Kind
	Formula     string
	Station     Symbol
	Value       Symbol
	Parameters  []Symbol
	Conditions  []Condition
	Source      string
	Reach       Reach
	Uncertainty string
	Caveat      string

	// at is the formula: parameters in their order (NaN where an optional one
	// is not given), and a station inside the domain.
	at func(p []float64, x float64) float64
	// domain and stated give the ranges of the station where they depend on
	// the parameters; nil: those of Station.
	domain, stated func(p []float64) Range
}

// Curve is the answer of a law.
type Curve struct {
	Values  []float64 // one for each station, NaN outside the domain
	Flagged []bool    // computed outside the stated range of a station, parameter or condition
	Notices []notice.Notice
}

// Laws returns every law, in the order of the shelf.
func Laws() []Law {
	return slices.Concat(blasiusLaws(), plateLaws(), meanPlateLaws(), wallLaws(), powerLaws(),
		channelLaws(), pipeLaws(), sphereLaws(), bodyLaws(), jetLaws(), mixingLaws())
}

// Find returns the law of an ID; the error is an *UnknownError.
func Find(id string) (Law, error) {
	for _, l := range Laws() {
		if l.ID == id {
			return l, nil
		}
	}
	return Law{}, &UnknownError{id}
}

func number(v float64) *float64 { return &v }

// The ends that several laws share.
var (
	infinite = math.Inf(1)
	anything = Range{Lo: -infinite, Hi: infinite, Source: "the formula"}
	positive = Range{Lo: 0, OpenLo: true, Hi: infinite, Source: "the formula"}
	fromZero = Range{Lo: 0, Hi: infinite, Source: "the formula"}
)

// plain is a symbol whose stated range is its domain.
func plain(name, meaning, unit string, domain Range) Symbol {
	return Symbol{Name: name, Meaning: meaning, Unit: unit, Domain: domain, Stated: domain}
}

// result is the symbol of a value.
func result(name, meaning, unit string) Symbol { return plain(name, meaning, unit, anything) }
