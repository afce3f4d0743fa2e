package tablefile

import "errors"

// ErrNoRows says that no row of a table lies within what was asked for.
var ErrNoRows = errors.New("no row lies between these values")

// Where returns the table with only the rows whose value in a column lies
// between two values, both included, in the order and with the lines of the
// file. Rows without a number there are left out. It shares nothing with t.
// The error is that of Column, or ErrNoRows.
func (t Table) Where(column string, from, to float64) (Table, error) {
	by, err := t.Column(column)
	if err != nil {
		return Table{}, err
	}
	var rows []int
	for i, v := range by.Values {
		if v >= from && v <= to {
			rows = append(rows, i)
		}
	}
	if rows == nil {
		return Table{}, ErrNoRows
	}
	out := Table{Name: t.Name, Line: t.RowLine(rows[0]), Columns: make([]Column, len(t.Columns))}
	for n, i := range rows {
		if line := t.RowLine(i); len(out.runs) == 0 || line != out.RowLine(n) {
			out.runs = append(out.runs, run{n, line})
		}
	}
	for k, c := range t.Columns {
		kept := Column{Name: c.Name, Unit: c.Unit, Header: c.Header, Values: make([]float64, len(rows))}
		if c.Text != nil {
			kept.Text = make([]string, len(rows))
		}
		for n, i := range rows {
			kept.Values[n] = c.Values[i]
			if c.Text != nil {
				kept.Text[n] = c.Text[i]
			}
		}
		out.Columns[k] = kept
	}
	return out, nil
}
