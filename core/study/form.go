package study

import (
	"errors"
	"math"
	"strings"

	"weirmark/core/notice"
	"weirmark/core/quantity"
)

// FormKind is a form in which a quantity or its stations are compared: what it
// is made of, in the units of Of, with the formulas. In them "value" is the
// column, every other name a quantity of the case card.
type FormKind struct {
	Name    string
	Words   string
	Station bool // of the stations
	Made    []FormOf
}

// FormOf is a formula of a form for a column of one dimension.
type FormOf struct {
	Of      string // a unit of the dimension
	Formula string
}

// FormKinds are the forms, by the definitions of the trade (common practice, no
// source).
var FormKinds = []FormKind{
	{"Cp", "pressure coefficient", false, []FormOf{{"Pa", "(value - p_ref)/q"}}},
	{"ΔCp", "pressure coefficient of a difference to the reference pressure", false, []FormOf{{"Pa", "value/q"}}},
	{"K", "loss coefficient, of a pressure loss", false, []FormOf{{"Pa", "value/q"}}},
	{"Cf", "friction coefficient, of a wall stress or a friction velocity", false, []FormOf{{"Pa", "value/q"}, {"m/s", "2*(value/U_ref)^2"}}},
	{"Cd", "drag coefficient, of a force or a force per span", false, []FormOf{{"N", "value/(q*A_ref)"}, {"N/m", "value/(q*L)"}}},
	{"Cl", "lift coefficient, of a force or a force per span", false, []FormOf{{"N", "value/(q*A_ref)"}, {"N/m", "value/(q*L)"}}},
	{"Cm", "moment coefficient, of a moment or a moment per span", false, []FormOf{{"N m", "value/(q*A_ref*L)"}, {"N", "value/(q*L^2)"}}},
	{"Nu", "Nusselt number, of a transfer coefficient or a wall heat flux", false, []FormOf{{"W/(m^2 K)", "value*L/λ"}, {"W/m^2", "value*L/(λ*(T_w - T_ref))"}}},
	{"Stanton number", "of a transfer coefficient or a wall heat flux", false, []FormOf{{"W/(m^2 K)", "value/(ρ*c_p*U_ref)"}, {"W/m^2", "value/(ρ*c_p*U_ref*(T_w - T_ref))"}}},
	{"St", "Strouhal number, of a frequency", false, []FormOf{{"Hz", "value*L/U_ref"}}},
	{"Re", "Reynolds number, of a speed or a length", false, []FormOf{{"m/s", "value*L/ν"}, {"m", "value*U_ref/ν"}}},
	{"u/U", "speed over the reference speed", false, []FormOf{{"m/s", "value/U_ref"}}},
	{"u⁺", "speed in wall units", false, []FormOf{{"m/s", "value/u_τ"}}},
	{"Tu", "turbulence intensity, of a standard deviation or of k", false, []FormOf{{"m/s", "value/U_ref"}, {"m^2/s^2", "sqrt(2*value/3)/U_ref"}}},
	{"u'/U", "standard deviation over the reference speed, of a standard deviation or a variance", false, []FormOf{{"m/s", "value/U_ref"}, {"m^2/s^2", "sqrt(value)/U_ref"}}},
	{"u'u'/U²", "variance over the reference speed squared, of a variance or a standard deviation", false, []FormOf{{"m^2/s^2", "value/U_ref^2"}, {"m/s", "(value/U_ref)^2"}}},
	{"k/U²", "turbulent kinetic energy over the reference speed squared", false, []FormOf{{"m^2/s^2", "value/U_ref^2"}}},
	{"C/C₀", "concentration over the reference", false, []FormOf{{"1", "value/C_ref"}, {"kg/m^3", "value/C_ref"}}},
	{"Θ", "temperature over the difference of wall and reference", false, []FormOf{{"K", "(value - T_ref)/(T_w - T_ref)"}, {"ΔK", "value/(T_w - T_ref)"}}},
	{"H₁₂", "shape factor, of a displacement thickness", false, []FormOf{{"m", "value/θ"}}},
	{"x/L", "length over the reference length", true, []FormOf{{"m", "value/L"}}},
	{"x/H", "length over the reference height", true, []FormOf{{"m", "value/H"}}},
	{"y/δ", "wall distance over the layer thickness", true, []FormOf{{"m", "value/δ"}}},
	{"y⁺", "wall distance in wall units", true, []FormOf{{"m", "value*u_τ/ν"}}},
	{"Re_x", "Reynolds number of a length", true, []FormOf{{"m", "value*U_ref/ν"}}},
}

// What a side does about a form.
const (
	FormAsIs   = ""       // its numbers are in the form, or there is none
	FormMade   = "made"   // its numbers are in the form, made with the case card
	FormTurned = "turned" // its numbers are to be brought into the form with the case card
)

// Form is a form that a question asks for, and what each side does about it.
type Form struct {
	Name       string `json:"name,omitempty"` // of FormKinds
	Simulation string `json:"simulation,omitempty"`
	Data       string `json:"data,omitempty"`
}

// of is what a side does.
func (f Form) of(side string) string {
	if side == OfData {
		return f.Data
	}
	return f.Simulation
}

// kind returns the form of a name.
func (f Form) kind(station bool) (FormKind, bool) {
	for _, k := range FormKinds {
		if k.Name == f.Name && k.Station == station {
			return k, true
		}
	}
	return FormKind{}, false
}

func (f *Form) enter(field, value string, station bool) (string, error) {
	switch field {
	case "name":
		if _, known := (Form{Name: value}).kind(station); !known && value != "" {
			return f.Name, refuse("the name of a form", value)
		}
		return exchange(&f.Name, value)
	case "simulation":
		return oneWord(&f.Simulation, value, FormAsIs, FormMade, FormTurned)
	case "data":
		return oneWord(&f.Data, value, FormAsIs, FormMade, FormTurned)
	}
	return "", refuse(field, value)
}

// takeForms brings the columns of a curve into the forms of its question.
func (l *loader) takeForms(c *curve) {
	q := l.e.study.Question(c.slip.Case.Value, c.slip.Quantity.Value)
	if q == nil || c.slip.Role.Value == Balance || c.slip.Role.Value == Residual {
		return
	}
	l.takeForm(c, q.Form)
	if c.x == nil || c.slip.Role.Value == Monitor {
		return
	}
	kind, known := q.XForm.kind(true)
	mode := q.XForm.of(c.slip.side())
	if !known || mode == FormAsIs {
		return
	}
	values, r, ok := l.reform(c.x, c.xUnit, kind, mode)
	if !ok {
		return
	}
	c.inputs = append(c.inputs, r.binding.inputs...)
	if mode == FormTurned {
		c.x, c.xUnit, c.xTurned = values, pureAxis(kind.Name), true
	}
	if moved := r.binding.uncertainInputs(); moved != "" {
		l.tell(notice.New("form-abscissa", moved, kind.Name))
	}
}

// takeForm brings the values into a form. What the card's uncertainties do to
// them is kept beside them.
func (l *loader) takeForm(c *curve, f Form) {
	kind, known := f.kind(false)
	mode := f.of(c.slip.side())
	if !known || mode == FormAsIs {
		return
	}
	values, r, ok := l.reform(c.y, c.yUnit, kind, mode)
	if !ok {
		return
	}
	if mode == FormMade {
		c.parts, c.inputs = addParts(c.parts, r.parts), append(c.inputs, r.binding.inputs...)
		return
	}
	slope := r.slope()
	c.parts = addParts(scaledParts(c.parts, slope), r.parts)
	c.inputs = append(c.inputs, r.binding.inputs...)
	r.u, c.slope, c.rawUnit, c.reduced = c.u, slope, c.yUnit, r
	c.u, c.uPlus = sides(c.u, c.uPlus, slope)
	c.y, c.yUnit, c.yTurned = values, pureAxis(kind.Name), true
}

// sides are the uncertainties below and above the values times the slope; a
// falling one exchanges them.
func sides(below, above, slope []float64) (u, uPlus []float64) {
	if below == nil {
		return nil, nil
	}
	u = make([]float64, len(below))
	if above != nil {
		uPlus = make([]float64, len(above))
	}
	for i, k := range slope {
		u[i] = math.Abs(float64(k * below[i]))
		if above == nil {
			continue
		}
		uPlus[i] = math.Abs(float64(k * above[i]))
		if k < 0 {
			u[i], uPlus[i] = uPlus[i], u[i]
		}
	}
	return u, uPlus
}

func pureAxis(name string) axis {
	return axis{unit: quantity.One, known: true, name: name, symbol: "1"}
}

// reform computes values in a form, or, of values that are in it, what the case
// card did to them.
func (l *loader) reform(values []float64, a axis, kind FormKind, mode string) ([]float64, *reducing, bool) {
	refuse := func(n notice.Notice) ([]float64, *reducing, bool) {
		l.tell(n)
		return nil, nil, false
	}
	if !a.known {
		return refuse(notice.New("form-unit", a.name, kind.Name))
	}
	if mode == FormMade {
		return l.remake(values, a, kind)
	}
	for _, made := range kind.Made {
		of, err := quantity.Parse(made.Of)
		if err != nil || of.Step != a.unit.Step || !of.Same(a.unit) && !a.unit.KinematicOf(of) {
			continue
		}
		text := made.Formula
		if !of.Same(a.unit) { // a pressure divided by density
			text = strings.ReplaceAll(text, "value", "value*ρ")
		}
		o, b, said, err := l.bindForm(text, values, a)
		if err != nil {
			return refuse(notice.New("form-card", a.name, kind.Name, said, err.Error()))
		}
		out := b.run(o, len(values))
		parts, err := b.parts(o, out)
		if err != nil {
			return refuse(notice.New("form-card", a.name, kind.Name, said, err.Error()))
		}
		l.tell(notice.New("form-turned", a.name, kind.Name, said, b.withWords()))
		return out, &reducing{operand: o, binding: b, parts: parts, text: kind.Name + " = " + said}, true
	}
	var units []string
	for _, made := range kind.Made {
		units = append(units, made.Of)
	}
	return refuse(notice.New("form-dimension", a.name, a.unit.Symbol, kind.Name, strings.Join(units, " or ")))
}

// bindForm binds a formula of a form to one column.
func (l *loader) bindForm(text string, values []float64, a axis) (quantity.Operand, *binding, string, error) {
	b := &binding{e: l.e, caseName: l.slip.Case.Value, side: l.slip.side(),
		columns: []boundColumn{{name: quantity.Name{Text: "value"}, values: values, dimension: a.unit.Dimension, called: a.name}}}
	f, err := quantity.ParseFormula(text)
	if err != nil {
		return quantity.Operand{}, b, text, err
	}
	o, err := f.Bind(b.lookup)
	said := f.Said(b.said)
	if err == nil && o.Dimension != (quantity.Dimension{}) {
		err = errors.New("the result is in " + o.Dimension.String())
	}
	return o, b, said, err
}

// remake finds what values in a form were made of, so that an error of the card
// can be followed through them. Only formulas linear in the value are undone.
func (l *loader) remake(values []float64, a axis, kind FormKind) ([]float64, *reducing, bool) {
	if !a.unit.Same(quantity.One) {
		l.tell(notice.New("form-made", a.name, a.unit.Symbol, kind.Name))
		return nil, nil, false
	}
	var last error
	for _, made := range kind.Made {
		of, err := quantity.Parse(made.Of)
		if err != nil {
			continue
		}
		raw := append([]float64{}, values...)
		o, b, said, err := l.bindForm(made.Formula, raw, axis{unit: of, name: kind.Name})
		if err != nil {
			last = err
			continue
		}
		at := func(v float64) float64 { return o.Value(b.values([]float64{v})) }
		zero, one, two := at(0), at(1), at(2)
		if !(math.Abs(two-2*one+zero) <= 1e-9*math.Abs(one-zero)) {
			continue
		}
		for i, v := range values {
			raw[i] = (v - zero) / (one - zero)
		}
		parts, err := b.parts(o, values)
		if err != nil {
			last = err
			continue
		}
		return values, &reducing{operand: o, binding: b, parts: parts, text: kind.Name + " = " + said}, true
	}
	why := "its formula cannot be undone"
	if last != nil {
		why = last.Error()
	}
	l.tell(notice.New("form-unfollowed", a.name, kind.Name, why))
	return nil, nil, false
}

// slope is the change of the result for one unit of the first column, at each
// row, by central difference.
func (r *reducing) slope() []float64 {
	raw := r.binding.columns[0].values
	largest := 0.0
	for _, v := range raw {
		if !math.IsNaN(v) {
			largest = max(largest, math.Abs(v))
		}
	}
	const part = 1e-6
	step := part * largest
	if step == 0 {
		step = part
	}
	slope := make([]float64, len(raw))
	x := r.binding.values([]float64{0})
	for i, v := range raw {
		x[0] = v + step
		up := r.operand.Value(x)
		x[0] = v - step
		slope[i] = (up - r.operand.Value(x)) / (2 * step)
	}
	return slope
}

// uncertainInputs names the quantities of the card that have an uncertainty.
func (b *binding) uncertainInputs() string {
	var names []string
	for _, in := range b.inputs {
		if in.u > 0 {
			known, _ := cardSymbol(in.entry.Symbol)
			names = append(names, known.Shown)
		}
	}
	return strings.Join(names, ", ")
}
