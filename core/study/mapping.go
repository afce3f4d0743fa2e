package study

import (
	"strconv"

	"weirmark/core/quantity"
	"weirmark/core/tablefile"
)

// mapping says in a sentence how the columns of each side were used.
func (w *work) mapping() {
	for _, c := range []*curve{w.finest(), w.reference} {
		if c != nil {
			w.cell.Mapping = append(w.cell.Mapping, w.e.study.fileName(c.slip)+": "+w.e.mappingOf(c.slip, c.table)+".")
		}
	}
}

// Mapping says in a sentence what the columns of a slip are and what becomes of
// them, such as: column 3 = p in Pa, gauge; becomes Cp = (p − p_ref)/q∞ with
// p_ref = 0 Pa, q∞ = 574.7 Pa.
func (s *Study) Mapping(p *Slip, t tablefile.Table) string {
	return begin(s, Options{}).mappingOf(p, t)
}

func (e *evaluation) mappingOf(p *Slip, t tablefile.Table) string {
	text := e.useWords(p, t, p.values())
	if p.Datum.Given() {
		text += ", " + p.Datum.Value
	}
	q := e.study.Question(p.Case.Value, p.Quantity.Value)
	if q != nil && p.Derive.Value == "" && p.Role.Value != Balance && p.Role.Value != Residual {
		text += e.formWords(p, t, p.values(), q.Form, false)
	}
	if !p.X.Given() {
		return text
	}
	text += "; over " + e.useWords(p, t, p.X)
	if q != nil && p.Derive.Value == "" && (p.Role.Value == Simulation || p.Role.Value == Reference) {
		text += e.formWords(p, t, p.X, q.XForm, true)
	}
	return text
}

// useWords says where values come from.
func (e *evaluation) useWords(p *Slip, t tablefile.Table, use ColumnUse) string {
	unit := ""
	if use.Unit.Given() && use.Unit.Value != "1" {
		unit = " in " + use.Unit.Value
	}
	if use.Formula.Given() {
		f, err := quantity.ParseFormula(use.Formula.Value)
		if err != nil {
			return "a formula that was not understood"
		}
		l := loader{e: e, slip: p, table: t}
		b := &binding{e: e, caseName: p.Case.Value, side: p.side()}
		for _, n := range f.Names() {
			if c, isColumn, err := l.boundColumn(n, b); err == nil && isColumn {
				b.columns = append(b.columns, c)
			}
		}
		if _, err := f.Bind(b.lookup); err != nil {
			return "the formula " + f.Text + ", which was not used"
		}
		return f.Said(b.said) + unit + b.withWords()
	}
	for i, c := range t.Columns {
		if c.Name == use.Column.Value {
			return "column " + strconv.Itoa(i+1) + " = " + c.Name + unit
		}
	}
	return "no column"
}

// formWords says what becomes of values.
func (e *evaluation) formWords(p *Slip, t tablefile.Table, use ColumnUse, f Form, station bool) string {
	kind, known := f.kind(station)
	if !known {
		return ""
	}
	switch f.of(p.side()) {
	case FormMade:
		return ", which is " + kind.Name + ", made with the case card"
	case FormTurned:
		unit, err := quantity.Parse(use.Unit.Value)
		l := loader{e: e, slip: p, table: t}
		_, r, ok := l.reform(nil, axis{unit: unit, known: use.Unit.Given() && err == nil, name: use.Name()}, kind, FormTurned)
		if !ok {
			return "; it did not become " + kind.Name
		}
		return "; becomes " + r.text + r.binding.withWords()
	}
	return ""
}
