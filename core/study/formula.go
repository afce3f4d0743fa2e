package study

import (
	"errors"
	"math"
	"strings"

	"weirmark/core/notice"
	"weirmark/core/quantity"
	"weirmark/core/tablefile"
	"weirmark/core/uncertainty"
)

// binding gives the names of formulas their columns and quantities of the case
// card. Values of columns stand first in the operands' x, those of the card
// behind them.
type binding struct {
	e        *evaluation
	caseName string
	side     string
	columns  []boundColumn
	inputs   []cardInput
	chain    []string // symbols being computed, to end a circle
}

// boundColumn is a name of a formula that stands for values of the rows.
type boundColumn struct {
	name      quantity.Name
	values    []float64 // in SI
	dimension quantity.Dimension
	called    string // in words
}

// lookup tells what a name of a formula is.
func (b *binding) lookup(n quantity.Name) (quantity.Operand, error) {
	if !n.Card {
		for i, c := range b.columns {
			if c.name == n {
				return quantity.Operand{Dimension: c.dimension, Value: func(x []float64) float64 { return x[i] }}, nil
			}
		}
	}
	return b.cardOperand(n.Text)
}

// cardOperand is a quantity of the case card, as entered or computed.
func (b *binding) cardOperand(name string) (quantity.Operand, error) {
	symbol := name
	if known, have := typed[name]; have {
		symbol = known
	}
	in, err := b.e.input(b.caseName, symbol, b.side)
	if err == nil {
		at := -1
		for i, have := range b.inputs {
			if have.entry == in.entry {
				at = i
			}
		}
		if at < 0 {
			at = len(b.inputs)
			b.inputs = append(b.inputs, in)
		}
		at += len(b.columns)
		return quantity.Operand{Dimension: in.unit.Dimension, Value: func(x []float64) float64 { return x[at] }}, nil
	}
	text, follows := computed[symbol]
	for _, above := range b.chain {
		follows = follows && above != symbol
	}
	if n, entered := err.(notice.Notice); !follows || entered && n.Code != "card-missing" {
		return quantity.Operand{}, err
	}
	b.chain = append(b.chain, symbol)
	defer func() { b.chain = b.chain[:len(b.chain)-1] }()
	f, err := quantity.ParseFormula(text)
	if err != nil {
		return quantity.Operand{}, err
	}
	o, err := f.Bind(b.lookup)
	if err != nil {
		return quantity.Operand{}, notice.New("card-missing", symbol, b.caseName)
	}
	return o, nil
}

// values returns x of an operand for one row, with the card behind the columns.
func (b *binding) values(row []float64) []float64 {
	x := append(make([]float64, 0, len(row)+len(b.inputs)), row...)
	for _, in := range b.inputs {
		x = append(x, in.value)
	}
	return x
}

// run computes an operand at every row; rows that lack a value, or have none
// that is finite, are missing.
func (b *binding) run(o quantity.Operand, rows int) []float64 {
	x := b.values(make([]float64, len(b.columns)))
	out := make([]float64, rows)
	for i := range out {
		for k := range b.columns {
			x[k] = b.columns[k].values[i]
		}
		out[i] = o.Value(x)
		if math.IsInf(out[i], 0) {
			out[i] = math.NaN()
		}
	}
	return out
}

// cardPart is what the standard uncertainty of one quantity of a case card does
// to a curve: one error of all rows, with its sign, in SI.
type cardPart struct {
	in cardInput
	at []float64 // of each row
}

// parts returns what every quantity of the card does to an operand at the rows.
func (b *binding) parts(o quantity.Operand, values []float64) ([]cardPart, error) {
	var rows []int
	for i, v := range values {
		if !math.IsNaN(v) {
			rows = append(rows, i)
		}
	}
	columns := make([]uncertainty.Column, len(b.columns))
	for k, c := range b.columns {
		columns[k] = uncertainty.Column{Values: pick(c.values, rows), U: make([]float64, len(rows))}
	}
	shared := make([]uncertainty.Input, len(b.inputs))
	for k, in := range b.inputs {
		shared[k] = uncertainty.Input{Value: in.value, U: in.u, Distribution: uncertainty.Normal}
	}
	r, err := uncertainty.Reduce(o.Value, columns, shared)
	if err != nil {
		return nil, err
	}
	parts := make([]cardPart, len(b.inputs))
	for k, in := range b.inputs {
		parts[k] = cardPart{in, blank(len(values))}
		for j, i := range rows {
			parts[k].at[i] = r.Sources[len(columns)+k].U[j]
		}
	}
	return parts, nil
}

// scaledParts returns parts times a slope at each row.
func scaledParts(parts []cardPart, slope []float64) []cardPart {
	out := make([]cardPart, len(parts))
	for k, p := range parts {
		out[k] = cardPart{p.in, make([]float64, len(p.at))}
		for i := range p.at {
			out[k].at[i] = float64(p.at[i] * slope[i])
		}
	}
	return out
}

// addParts adds the parts of one more step to those before it: one quantity
// has one error.
func addParts(parts, more []cardPart) []cardPart {
	for _, m := range more {
		found := false
		for k, p := range parts {
			if p.in.entry != m.in.entry {
				continue
			}
			found = true
			sum := make([]float64, len(p.at))
			for i := range sum {
				sum[i] = p.at[i] + m.at[i]
			}
			parts[k].at = sum
		}
		if !found {
			parts = append(parts, m)
		}
	}
	return parts
}

// formula computes a column from others of the table and the case card. The
// unit of the use is that of the result.
func (l *loader) formula(use ColumnUse) ([]float64, axis) {
	text := use.Formula.Value
	refuse := func(err error) ([]float64, axis) {
		at := 1
		var wrong *quantity.FormulaError
		if errors.As(err, &wrong) {
			at = wrong.Column
		}
		l.tell(notice.New("formula-refused", text, err.Error(), at))
		return nil, axis{}
	}
	f, err := quantity.ParseFormula(text)
	if err != nil {
		return refuse(err)
	}
	b := &binding{e: l.e, caseName: l.slip.Case.Value, side: l.slip.side()}
	for _, n := range f.Names() {
		c, isColumn, err := l.boundColumn(n, b)
		if err != nil {
			return refuse(err)
		}
		if isColumn {
			b.columns = append(b.columns, c)
		}
	}
	o, err := f.Bind(b.lookup)
	if err != nil {
		return refuse(err)
	}
	unit, err := quantity.Parse(use.Unit.Value)
	if use.Unit.Given() && err == nil && unit.Dimension != o.Dimension {
		l.tell(notice.New("formula-dimension", text, o.Dimension.String(), use.Unit.Value))
		return nil, axis{}
	}
	if err != nil {
		l.tell(notice.New("unit-unknown", use.Unit.Value, text))
		return nil, axis{}
	}
	values := b.run(o, l.table.Rows())
	if !anyKnown(values) {
		l.tell(notice.New("column-empty", text))
		return nil, axis{}
	}
	parts, err := b.parts(o, values)
	if err != nil {
		return refuse(err)
	}
	unit.Dimension = o.Dimension
	l.last = &reducing{operand: o, binding: b, parts: parts, text: f.Said(b.said)}
	l.tell(notice.New("formula-used", l.last.text+b.withWords()))
	return values, axis{unit: unit, known: use.Unit.Given(), name: text, symbol: use.Unit.Value}
}

// boundColumn is the column that a name stands for. A name that is a column
// and a symbol of the card too is refused: quotes or "card." tell them apart.
func (l *loader) boundColumn(n quantity.Name, b *binding) (boundColumn, bool, error) {
	if n.Card {
		return boundColumn{}, false, nil
	}
	name, symbol := n.Text, ""
	if n.Quoted {
		if head, unit, stated := strings.Cut(n.Text, " in "); stated && !l.has(n.Text) {
			name, symbol = head, unit
		}
	}
	if !l.has(name) {
		if n.Quoted {
			_, err := l.table.Column(name)
			return boundColumn{}, false, err
		}
		return boundColumn{}, false, nil
	}
	if !n.Quoted {
		if _, err := b.cardOperand(n.Text); err == nil {
			return boundColumn{}, false, notice.New("formula-name", n.Text, n.Text, n.Text)
		}
	}
	column, err := l.table.Column(name)
	if err != nil {
		return boundColumn{}, false, err
	}
	if symbol == "" {
		symbol = l.unitOf(column)
	}
	if symbol == "" {
		return boundColumn{}, false, notice.New("formula-unit", name, name)
	}
	unit, err := quantity.Parse(symbol)
	if err != nil {
		return boundColumn{}, false, err
	}
	return boundColumn{name: n, values: inSI(column.Values, unit), dimension: unit.Dimension, called: name}, true, nil
}

// has reports whether the table has a column of exactly this name.
func (l *loader) has(name string) bool {
	for _, c := range l.table.Columns {
		if c.Name == name {
			return true
		}
	}
	return false
}

// unitOf is the unit of a column: as the slip states it, else the file.
func (l *loader) unitOf(c tablefile.Column) string {
	for _, use := range []ColumnUse{l.slip.X, l.slip.Y, l.slip.Contour} {
		if use.Column.Value == c.Name && use.Unit.Given() && !use.Formula.Given() {
			return use.Unit.Value
		}
	}
	return c.Unit
}

// reducing is how a curve was computed from columns and the case card.
type reducing struct {
	operand quantity.Operand
	binding *binding
	parts   []cardPart
	text    string    // the formula in words
	u       []float64 // standard uncertainty of the first column at each row; nil where it is not known
}

// said writes a name of a formula: a column as it is called, a quantity of the
// card as it is shown, a computed one as its formula.
func (b *binding) said(n quantity.Name) string {
	if !n.Card {
		for _, c := range b.columns {
			if c.name == n {
				return c.called
			}
		}
	}
	symbol := n.Text
	if known, have := typed[symbol]; have {
		symbol = known
	}
	if _, err := b.e.input(b.caseName, symbol, b.side); err != nil {
		if f, err := quantity.ParseFormula(computed[symbol]); err == nil {
			return "(" + f.Said(b.said) + ")"
		}
	}
	known, _ := cardSymbol(symbol)
	return known.Shown
}

// withWords says the values that a formula takes from the case card.
func (b *binding) withWords() string {
	var list []string
	for _, in := range b.inputs {
		known, _ := cardSymbol(in.entry.Symbol)
		text := known.Shown + " = " + valueUnit(in.entry.Value, in.entry.Unit)
		if in.entry.U != nil {
			text += " ± " + quantity.Typed(*in.entry.U)
		}
		if in.entry.Side != "" {
			text += " (of the " + in.entry.Side + ")"
		}
		list = append(list, text)
	}
	if list == nil {
		return ""
	}
	return " with " + strings.Join(list, ", ")
}
