package memo

import (
	"bytes"
	"encoding/csv"
	"errors"
	"fmt"
	"strconv"
	"strings"

	"weirmark/core/quantity"
	"weirmark/core/study"
)

// exportedColumns are the columns of the CSV, in their order. Numbers are texts,
// so that every one has the digits of the report and an unknown one is blank,
// not zero.
var exportedColumns = []struct {
	name string
	text func(*study.Cell, *study.Station) string
}{
	{"case", func(c *study.Cell, _ *study.Station) string { return guarded(c.Case) }},
	{"quantity", func(c *study.Cell, _ *study.Station) string { return guarded(c.Quantity) }},
	{"model", func(c *study.Cell, _ *study.Station) string { return guarded(c.Model) }},
	{"x", func(_ *study.Cell, s *study.Station) string { return plain(s.X) }},
	{"x_unit", func(c *study.Cell, _ *study.Station) string { return guarded(c.XUnit) }},
	{"s", func(_ *study.Cell, s *study.Station) string { return plain(s.S) }},
	{"d", func(_ *study.Cell, s *study.Station) string { return plain(s.D) }},
	{"e", func(_ *study.Cell, s *study.Station) string { return plain(s.E) }},
	{"u_d", func(_ *study.Cell, s *study.Station) string { return plain(s.UD) }},
	{"u_num", func(_ *study.Cell, s *study.Station) string { return plain(s.UNum) }},
	{"u_interp", func(_ *study.Cell, s *study.Station) string { return plain(s.UInterp) }},
	{"u_input", func(_ *study.Cell, s *study.Station) string { return plain(s.UInput) }},
	{"u_val", func(_ *study.Cell, s *study.Station) string { return plain(s.UVal) }},
	{"ratio", func(_ *study.Cell, s *study.Station) string { return plain(s.Ratio) }},
	{"lo", func(_ *study.Cell, s *study.Station) string { return plain(s.Lo) }},
	{"hi", func(_ *study.Cell, s *study.Station) string { return plain(s.Hi) }},
	{"whitened", func(_ *study.Cell, s *study.Station) string { return plain(s.Whitened) }},
	{"unit", func(c *study.Cell, _ *study.Station) string { return guarded(c.Unit) }},
	{"reference", func(c *study.Cell, _ *study.Station) string { return guarded(c.Reference) }},
	{"line", func(_ *study.Cell, s *study.Station) string { return lineText(s.Line) }}, // of the reference file
}

// Stations returns the stations of the cells as CSV: one row for each, numbers
// with a decimal point and ten digits, values of files with all of theirs.
// Texts that a spreadsheet would take for a formula are begun with an
// apostrophe.
func Stations(cells []study.Cell) ([]byte, error) {
	var out bytes.Buffer
	rows := csv.NewWriter(&out)
	row := make([]string, len(exportedColumns))
	for i, column := range exportedColumns {
		row[i] = column.name
	}
	err := rows.Write(row)
	for i := range cells {
		for j := range cells[i].Stations {
			for k, column := range exportedColumns {
				row[k] = column.text(&cells[i], &cells[i].Stations[j])
			}
			err = errors.Join(err, rows.Write(row))
		}
	}
	rows.Flush()
	if err := errors.Join(err, rows.Error()); err != nil {
		return nil, fmt.Errorf("writing the stations as CSV: %w", err)
	}
	return out.Bytes(), nil
}

// plain returns a number as in JSON, or nothing where it is not known.
func plain[N quantity.Number | quantity.Written](n N) string {
	if !quantity.Number(n).Known() {
		return ""
	}
	var digits []byte
	switch v := any(n).(type) {
	case quantity.Number:
		digits, _ = v.MarshalJSON()
	case quantity.Written:
		digits, _ = v.MarshalJSON()
	}
	return string(digits)
}

func lineText(n int) string {
	if n == 0 {
		return ""
	}
	return strconv.Itoa(n)
}

// guarded returns a text that no spreadsheet takes for a formula.
func guarded(s string) string {
	if t := strings.TrimLeft(s, " \u00a0"); t != "" && strings.ContainsRune("=+-@\t\r\n", rune(t[0])) {
		return "'" + s
	}
	return s
}
