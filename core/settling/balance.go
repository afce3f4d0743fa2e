package settling

import (
	"math"
	"strings"

	"weirmark/core/notice"
	"weirmark/core/quantity"
)

// Kind says what a balance is of.
type Kind string

// The kinds.
const (
	Mass    Kind = "mass"
	Energy  Kind = "energy"
	Species Kind = "species"
	Force   Kind = "force"
)

// Flux is what enters and leaves a domain, in one unit. Entries of In count
// positive inward and those of Out positive outward; a backflow is negative.
// Of forces, In are those that drive the fluid along the axis, Out those that
// hold it back.
type Flux struct {
	Kind     Kind
	In, Out  []float64
	Produced float64 // made inside less what is stored there; negative where consumed
	Scale    float64 // the flux that matters, e.g. the heat exchanged or the measured force; 0 stands for all that enters
	ScaleOf  string  // what Scale is, in messages
}

const givenScale = "the given scale"

// Balanced is the judgement of a balance; NaN where it could not be made.
type Balanced struct {
	Kind     Kind
	Net      float64 // in + produced - out: positive where more enters than leaves
	Scale    float64 // positive
	Fraction float64 // Net/Scale, with its sign
	ScaleOf  string  // what Scale is: inflow, outflow, or the given scale
	Limit    float64 // fraction that counts as small
	LimitOf  string  // what it is a part of
	OfGrid   float64 // |Fraction| of the quantity over U_grid, as if the quantity changed by the same fraction
	OfE      float64 // the same over |E|
	Closed   bool    // |Fraction| is at most Limit
	Notices  []notice.Notice
}

// Balance adds up what enters and leaves and scales the sum by the flux that
// matters: Scale, or all that enters (backflow at outlets and what is made
// inside included), or all that leaves where nothing enters. It is held
// against a tenth of the grid uncertainty relative to opt.Scale, the magnitude
// of the quantity of interest, or of |E| where there is no grid uncertainty.
// Where neither is known a thousandth is used, which is told (no source).
// Linear in the number of fluxes.
func Balance(f Flux, opt Options) Balanced {
	nan := math.NaN()
	b := Balanced{Kind: f.Kind, Net: nan, Scale: nan, Fraction: nan, Limit: smallChange, LimitOf: "a thousandth, by habit", OfGrid: nan, OfE: nan}
	enters, leaves, missing := f.gross()
	if missing > 0 {
		b.tell("balance-missing", f.title(), missing)
		return b
	}
	b.Net = enters - leaves
	b.ScaleOf = givenScale
	switch {
	case usable(f.Scale) && f.Scale > 0:
		b.Scale = f.Scale
		if f.ScaleOf != "" {
			b.ScaleOf = f.ScaleOf
		}
	case enters > 0:
		b.Scale, b.ScaleOf = enters, "inflow"
	case leaves > 0:
		b.Scale, b.ScaleOf = leaves, "outflow"
	default:
		b.tell("balance-scale", f.title())
		return b
	}
	if !(f.Scale > 0) && (f.Kind == Energy || f.Kind == Force) {
		b.tell("balance-gross", f.title(), b.ScaleOf)
	}
	b.Fraction = b.Net / b.Scale
	shares := b.against(opt)
	if math.IsNaN(b.OfGrid) && math.IsNaN(b.OfE) {
		b.tell("balance-habit", f.title())
	}
	b.Closed = quantity.Round(math.Abs(b.Fraction), 10) <= quantity.Round(b.Limit, 10)
	if !b.Closed {
		sense := "more enters than leaves"
		if b.Net < 0 {
			sense = "more leaves than enters"
		}
		b.tell("balance-open", f.title(), quantity.Text(100*math.Abs(b.Fraction), 2), b.ScaleOf, sense+shares)
	}
	return b
}

func (b *Balanced) tell(code string, args ...any) {
	b.Notices = append(b.Notices, notice.New(code, args...))
}

// gross returns all that enters and all that leaves, each at least 0, and how
// many entries are no numbers.
func (f Flux) gross() (enters, leaves float64, missing int) {
	add := func(inward float64) {
		switch {
		case !usable(inward):
			missing++
		case inward > 0:
			enters += inward
		default:
			leaves -= inward
		}
	}
	for _, v := range f.In {
		add(v)
	}
	for _, v := range f.Out {
		add(-v)
	}
	add(f.Produced)
	return enters, leaves, missing
}

func (f Flux) title() string {
	if f.Kind == "" {
		return "Flux"
	}
	return strings.ToUpper(string(f.Kind[:1])) + string(f.Kind[1:])
}

// against sets the limit and the ratios by what is known of the quantity, and
// returns the ratios for a reader.
func (b *Balanced) against(opt Options) string {
	if !(opt.Scale > 0) {
		return ""
	}
	words := []string{}
	part := math.Abs(b.Fraction) * opt.Scale
	if opt.UGrid > 0 {
		b.Limit, b.LimitOf = smallShare*opt.UGrid/opt.Scale, "a tenth of U_grid"
		b.OfGrid = part / opt.UGrid
		words = append(words, quantity.Text(b.OfGrid, 2)+" of its U_grid")
	}
	if e := math.Abs(opt.E); e > 0 && usable(e) {
		if !(opt.UGrid > 0) {
			b.Limit, b.LimitOf = smallShare*e/opt.Scale, "a tenth of |E|"
		}
		b.OfE = part / e
		words = append(words, quantity.Text(b.OfE, 2)+" of |E|")
	}
	if len(words) == 0 {
		return ""
	}
	return "; the same fraction of the quantity is " + strings.Join(words, " and ")
}
