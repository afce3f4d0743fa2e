package study

import (
	"cmp"
	"strings"

	"weirmark/core/notice"
	"weirmark/core/quantity"
)

// Symbols of a case card that the evaluation itself asks for. Density relates a
// pressure to a pressure divided by density.
const (
	Density         = "ρ"
	DynamicPressure = "q"
	RefLength       = "L"
	RefArea         = "A_ref"
	RefSpeed        = "U_ref"
	RefPressure     = "p_ref"
	FrictionSpeed   = "u_τ"
	Angle           = "α"
)

// CardSymbol is a reference quantity that a case card knows by name. Others
// can be added under a name of their own, with any unit.
type CardSymbol struct {
	Symbol string
	Shown  string // in words and formulas
	Words  string
	Unit   string // a unit of its dimension; "" where any will do
}

// CardSymbols are the known reference quantities.
var CardSymbols = []CardSymbol{
	{RefLength, "L", "reference length, e.g. the chord", "m"},
	{"H", "H", "reference height", "m"},
	{"δ", "δ", "layer thickness", "m"},
	{"θ", "θ", "momentum thickness", "m"},
	{RefSpeed, "U_ref", "reference speed", "m/s"},
	{FrictionSpeed, "u_τ", "friction velocity", "m/s"},
	{Density, "ρ", "density", "kg/m^3"},
	{"μ", "μ", "dynamic viscosity", "Pa s"},
	{"ν", "ν", "kinematic viscosity", "m^2/s"},
	{"T_ref", "T_ref", "reference temperature", "K"},
	{"T_w", "T_w", "wall temperature", "K"},
	{"λ", "λ", "thermal conductivity", "W/(m K)"},
	{"c_p", "c_p", "heat capacity at constant pressure", "J/(kg K)"},
	{RefPressure, "p_ref", "reference pressure", "Pa"},
	{DynamicPressure, "q∞", "dynamic pressure", "Pa"},
	{RefArea, "A_ref", "reference area", "m^2"},
	{"C_ref", "C_0", "reference concentration", ""},
	{Angle, "α", "angle of attack", "deg"},
	{"x_m", "x_m", "moment centre, along the flow", "m"},
	{"z_m", "z_m", "moment centre, upward", "m"},
	{"x_c", "x_c", "centre of comparison of moments, along the flow", "m"},
	{"z_c", "z_c", "centre of comparison of moments, upward", "m"},
}

// cardSymbol returns what is known of a symbol.
func cardSymbol(symbol string) (CardSymbol, bool) {
	for _, s := range CardSymbols {
		if s.Symbol == symbol {
			return s, true
		}
	}
	return CardSymbol{Symbol: symbol, Shown: symbol, Words: "reference quantity"}, false
}

// typed are names for the keyboard.
var typed = map[string]string{"rho": Density, "mu": "μ", "nu": "ν", "alpha": Angle, "u_tau": FrictionSpeed, "delta": "δ", "theta": "θ", "lambda": "λ", "q∞": DynamicPressure, "A": RefArea, "U": RefSpeed}

// computed are the symbols that follow from others where they are not given.
var computed = map[string]string{DynamicPressure: "ρ*U_ref^2/2", "ν": "μ/ρ", "μ": "ν*ρ", "δ_ν": "ν/u_τ"}

// Kinds of a reference area.
var AreaKinds = []string{"planform", "frontal", "wetted", "base", halfArea}

const halfArea = "half of the planform"

// Words of ReferenceQuantity.Shared.
const (
	ErrorShared = "yes"
	ErrorApart  = "no"
)

// ItemReference is a quantity of a case card, as a list item; the ID of its
// target is the case. ItemAxes are the axes of one side.
const (
	ItemReference = "reference"
	ItemAxes      = "axes"
)

// Axes says how the coordinates of a case are meant, of one side or of both.
type Axes struct {
	Side   string `json:"side,omitempty"`
	Origin string `json:"origin"` // e.g. leading edge, mid span
	Up     string `json:"up"`     // y or z
	Flow   string `json:"flow"`   // along +x or -x
}

// The directions that axes may state.
const (
	UpY      = "y"
	UpZ      = "z"
	AlongX   = "+x"
	AgainstX = "-x"
)

// side is the side that a slip stands on.
func (p *Slip) side() string {
	if p.Role.Value == Reference {
		return OfData
	}
	return Simulation
}

// card returns the card of a case, or nil.
func (s *Study) card(name string) *Card {
	for i := range s.Cases {
		if s.Cases[i].Name == name {
			return &s.Cases[i]
		}
	}
	return nil
}

// Card returns the card of a case, empty where there is none.
func (s *Study) Card(name string) Card {
	if c := s.card(name); c != nil {
		return *c
	}
	return Card{Name: name}
}

// cardMade returns the card of a case, made where there is none.
func (s *Study) cardMade(name string) *Card {
	if c := s.card(name); c != nil {
		return c
	}
	s.Cases = append(s.Cases, Card{Name: name, References: []ReferenceQuantity{}})
	return &s.Cases[len(s.Cases)-1]
}

// entry returns the quantity of a symbol for a side: its own, else that of
// both; nil where the card has none.
func (c *Card) entry(symbol, side string) *ReferenceQuantity {
	var both *ReferenceQuantity
	for i := range c.References {
		r := &c.References[i]
		if r.Symbol != symbol {
			continue
		}
		if r.Side == side && side != "" {
			return r
		}
		if r.Side == "" && both == nil {
			both = r
		}
	}
	return both
}

// axes returns the axes of a side.
func (c *Card) axes(side string) Axes {
	var both Axes
	for _, a := range c.Axes {
		if a.Side == side {
			return a
		}
		if a.Side == "" {
			both = a
		}
	}
	return both
}

// cardInput is a quantity of a case card in SI; u is its standard uncertainty.
type cardInput struct {
	entry    *ReferenceQuantity
	value, u float64
	unit     quantity.Unit
}

// input reads the quantity of a symbol for a side. Its unit is checked against
// the dimension of the symbol.
func (e *evaluation) input(caseName, symbol, side string) (cardInput, error) {
	c := e.study.card(caseName)
	if c == nil {
		return cardInput{}, notice.New("card-missing", symbol, caseName)
	}
	r := c.entry(symbol, side)
	if r == nil {
		return cardInput{}, notice.New("card-missing", symbol, caseName)
	}
	unit, err := r.unit()
	if err != nil {
		return cardInput{}, err
	}
	in := cardInput{entry: r, value: unit.ToSI(r.Value), unit: unit}
	if r.U != nil {
		in.u = unit.StepToSI(*r.U)
	}
	return in, nil
}

// unit parses the unit of a quantity and checks its dimension.
func (r *ReferenceQuantity) unit() (quantity.Unit, error) {
	known, _ := cardSymbol(r.Symbol)
	unit, err := quantity.Parse(r.Unit)
	wanted, _ := quantity.Parse(cmp.Or(known.Unit, r.Unit)) // ours, or the one just parsed
	if err != nil || !unit.Same(wanted) || unit.Step && known.Unit != "" {
		return unit, notice.New("card-unit", cmp.Or(r.Symbol, "The quantity"), known.Words, cmp.Or(known.Unit, "any known unit"), r.Unit)
	}
	return unit, nil
}

// cardValue returns a reference quantity of the case for a side, in SI: as
// entered, or computed from others.
func (e *evaluation) cardValue(caseName, symbol, side string) (float64, bool) {
	b := &binding{e: e, caseName: caseName, side: side}
	o, err := b.cardOperand(symbol)
	if err != nil {
		return 0, false
	}
	return o.Value(b.values(nil)), true
}

// enter changes a field of a quantity of a case card.
func (r *ReferenceQuantity) enter(field, value string) (string, error) {
	switch field {
	case "symbol":
		return r.enterSymbol(strings.TrimSpace(value))
	case "value":
		return number(&r.Value, value, -1e30, 1e30)
	case "unit":
		changed := *r
		changed.Unit = strings.TrimSpace(value)
		if _, err := changed.unit(); err != nil {
			return r.Unit, err
		}
		return exchange(&r.Unit, changed.Unit)
	case "u":
		return optional(&r.U, value, 0)
	case "origin":
		return exchange(&r.Origin, value)
	case "side":
		return oneWord(&r.Side, value, "", Simulation, OfData)
	case "shared":
		return oneWord(&r.Shared, value, "", ErrorShared, ErrorApart)
	case "kind":
		return oneWord(&r.Kind, value, append([]string{""}, AreaKinds...)...)
	}
	return "", refuse(field, value)
}

// enterSymbol takes a name that a formula can use, and the unit of a known one
// where the entry has none that fits.
func (r *ReferenceQuantity) enterSymbol(value string) (string, error) {
	if known, have := typed[value]; have {
		value = known
	}
	f, err := quantity.ParseFormula(value)
	if names := f.Names(); err != nil || len(names) != 1 || names[0].Text != value {
		return r.Symbol, refuse("a symbol of letters, digits and underscores", value)
	}
	before := r.Symbol
	r.Symbol = value
	if _, err := r.unit(); err != nil {
		known, _ := cardSymbol(value)
		r.Unit = known.Unit
	}
	return before, nil
}

func (a *Axes) enter(field, value string) (string, error) {
	switch field {
	case "side":
		return oneWord(&a.Side, value, "", Simulation, OfData)
	case "origin":
		return exchange(&a.Origin, value)
	case "up":
		return oneWord(&a.Up, value, "", UpY, UpZ)
	case "flow":
		return oneWord(&a.Flow, value, "", AlongX, AgainstX)
	}
	return "", refuse(field, value)
}

// itemName names an item of a case card.
func (s *Study) itemName(t Target) string {
	i, _, ok := sourceField(t.Field)
	c := s.Card(t.ID)
	if t.Kind == ItemReference && ok && i < len(c.References) && c.References[i].Symbol != "" {
		known, _ := cardSymbol(c.References[i].Symbol)
		return known.Shown
	}
	return "a " + t.Kind + " entry"
}

// oneWord takes one of the allowed words.
func oneWord(text *string, value string, allowed ...string) (string, error) {
	for _, a := range allowed {
		if value == a {
			return exchange(text, value)
		}
	}
	return *text, refuse("one of "+strings.Join(allowed, ", "), value)
}
