package study

import (
	"bytes"
	"math"
	"strconv"
	"strings"
	"unicode/utf8"

	"weirmark/core/quantity"
	"weirmark/core/uncertainty"
)

// curveOf returns the table behind a side of a read path: sim, ref, grids, run
// with its number, monitor or balance with its number.
func (w *work) curveOf(side string) *curve {
	switch side {
	case "sim":
		return w.finest()
	case "ref":
		return w.reference
	case "grids":
		return w.grids
	}
	if number, ok := strings.CutPrefix(side, "take"); ok {
		if n, err := strconv.Atoi(number); err == nil && n >= 0 && n < len(w.takes) {
			return w.takes[n].curve
		}
	}
	kinds := []struct{ prefix, role string }{{"monitor", Monitor}, {"balance", Balance}}
	if number, ok := strings.CutPrefix(side, "run"); ok {
		if n, err := strconv.Atoi(number); err == nil && n >= 0 && n < len(w.runs) {
			return w.runs[n].curve
		}
	}
	for _, k := range kinds {
		number, ok := strings.CutPrefix(side, k.prefix)
		if !ok {
			continue
		}
		n, err := strconv.Atoi(number)
		for _, p := range w.slips(k.role) {
			c, _ := w.e.load(p)
			if c == nil || c.x == nil {
				continue
			}
			if n == 0 && err == nil {
				return c
			}
			n--
		}
	}
	return nil
}

// columnOf names a column of a curve.
func columnOf(c *curve, column string) string {
	if i, ok := tableColumn(c, column); ok {
		return c.table.Columns[i].Name
	}
	switch column {
	case "cells":
		return "number of cells"
	case "x":
		return c.slip.X.Column.Value
	case "u":
		return c.slip.U.Column.Value
	case "size":
		return c.slip.Size.Column.Value
	}
	return c.slip.Y.Column.Value
}

// tableColumn returns the number of a column that is named by its place, such
// as c3.
func tableColumn(c *curve, column string) (int, bool) {
	number, ok := strings.CutPrefix(column, "c")
	i, err := strconv.Atoi(number)
	return i, ok && err == nil && i >= 0 && i < len(c.table.Columns)
}

// readPath parts side, column and row.
func (w *work) readPath(path string) (side, column string, row int, c *curve) {
	parts := strings.Split(path, ".")
	if len(parts) != 3 {
		return "", "", 0, nil
	}
	row, err := strconv.Atoi(parts[2])
	c = w.curveOf(parts[0])
	if err != nil || c == nil || row < 0 || row >= len(c.y) {
		return "", "", 0, nil
	}
	return parts[0], parts[1], row, c
}

// readAt returns a value as read, in the units of the cell; monitors and
// balances keep their places in SI.
func (w *work) readAt(path string) (float64, bool) {
	side, column, row, c := w.readPath(path)
	if c == nil {
		return 0, false
	}
	if i, ok := tableColumn(c, column); ok {
		return c.table.Columns[i].Values[row], true
	}
	own := strings.HasPrefix(side, "monitor") || strings.HasPrefix(side, "balance")
	xUnit, yUnit := w.unitsOf(side)
	switch {
	case column == "cells" && strings.HasPrefix(side, "run"):
		return w.cells(c.slip), true
	case column == "x" && c.x != nil && own:
		return c.x[row], true
	case column == "x" && c.x != nil:
		return xUnit.FromSI(inUnit(c.x, c.xUnit, xUnit)[row]), true
	case column == "y" && strings.HasPrefix(side, "balance"):
		return c.y[row], true
	case column == "y":
		return yUnit.FromSI(inUnit(c.y, c.yUnit, yUnit)[row]), true
	case column == "u" && c.u != nil:
		return float64(w.step(c.u[row])), true
	case column == "size" && side == "grids" && row < len(w.sizes):
		return w.sizes[row], true
	}
	return 0, false
}

// unitsOf are the units in which the rows of a side are told: of the cell, or
// of the curve from which its scalar was taken.
func (w *work) unitsOf(side string) (x, y unit) {
	if number, ok := strings.CutPrefix(side, "take"); ok {
		if n, err := strconv.Atoi(number); err == nil && n >= 0 && n < len(w.takes) {
			return w.takes[n].taking.x, w.takes[n].taking.y
		}
	}
	return w.xUnit, w.yUnit
}

// walkRead ends a walk at what is written in a file.
func (w *work) walkRead(path string) (Step, bool) {
	v, ok := w.readAt(path)
	_, column, row, c := w.readPath(path)
	if !ok {
		return Step{}, false
	}
	name := w.e.study.fileName(c.slip)
	s := Step{Name: columnOf(c, column) + " of " + name, Value: Number(v), Unit: w.unitOfPath("read." + path), Inputs: []StepInput{}, Again: None}
	if c.slip.Derive.Value == DeriveLift {
		s.Origin = &Origin{File: name, Of: columnOf(c, column)}
		s.Why = "The lift of the closed section, integrated from all rows of the table."
		return s, true
	}
	if c.taken {
		s.Origin = &Origin{File: name, Of: columnOf(c, column)}
		s.Why = "The scalar of the curve in this file, taken as on the grid that is compared."
		return s, true
	}
	if column == "cells" {
		s.Origin = &Origin{Text: c.slip.Cells.Value, Of: "number of cells of " + name}
		s.Again, s.Agrees, s.Words = s.Value, true, "as entered"
		return s, true
	}
	s.Origin = w.origin(c, column, row)
	s.Words = "as written"
	written, err := strconv.ParseFloat(strings.ReplaceAll(s.Origin.Text, ",", "."), 64)
	if err != nil {
		s.Why = "The file states it in another form than digits."
		return s, true
	}
	s.Again = Number(w.converted(path, written))
	s.Agrees = math.Abs(float64(s.Again)-v) <= halfDigit(v)
	if float64(s.Again) != written {
		s.Words = "converted from what is written in " + s.Origin.Unit
		if column == "u" {
			s.Words = "what is written, " + coverageWords(c.slip.UFactor.Value) + ", made standard"
		}
	}
	return s, true
}

// converted brings a number as written to the unit of the cell, as the loader
// does.
func (w *work) converted(path string, written float64) float64 {
	side, column, row, c := w.readPath(path)
	xUnit, yUnit := w.unitsOf(side)
	own := strings.HasPrefix(side, "monitor") || strings.HasPrefix(side, "balance")
	if _, ok := tableColumn(c, column); ok || column == "size" {
		return written
	}
	switch column {
	case "x":
		v := written
		if u, err := quantity.Parse(c.slip.X.Unit.Value); err == nil && c.slip.X.Unit.Given() {
			v = u.ToSI(v)
		} else if !own {
			return v
		}
		if own {
			return v
		}
		return xUnit.FromSI(v)
	case "u":
		return w.standard(c, row, written)
	}
	v := written
	u, err := quantity.Parse(c.slip.Y.Unit.Value)
	if err != nil || !c.slip.Y.Unit.Given() {
		return v
	}
	v = u.ToSI(v) * w.densityOf(c)
	if strings.HasPrefix(side, "balance") {
		return v
	}
	return yUnit.FromSI(v)
}

// standard makes a written uncertainty of a row standard, in the unit of the
// cell.
func (w *work) standard(c *curve, row int, written float64) float64 {
	k, known := uncertainty.CoverageFactor(c.slip.UFactor.Value)
	if !known {
		k = 1
	}
	if c.slip.percentU() {
		of := math.Abs(c.y[row])
		if full, err := strconv.ParseFloat(c.slip.UBasis.Value, 64); err == nil && full > 0 {
			of = c.yUnit.unit.StepToSI(full)
		}
		return float64(w.step(of * written / 100 / k))
	}
	unit, factor := c.yUnit.unit, w.densityOf(c)
	if symbol := c.slip.U.Unit.Value; symbol != "" && symbol != c.slip.Y.Unit.Value {
		if u, err := quantity.Parse(symbol); err == nil {
			unit = u
		}
	} else if u, err := quantity.Parse(c.slip.Y.Unit.Value); err == nil {
		unit = u
	}
	return float64(w.step(unit.StepToSI(written) * factor / k))
}

// densityOf is what the values of a curve were multiplied by to be pressures.
func (w *work) densityOf(c *curve) float64 {
	u, err := quantity.Parse(c.slip.Y.Unit.Value)
	if rho, known := w.density(c.slip.side()); known && err == nil && c.yUnit.known && c.yUnit.unit.Dimension != u.Dimension {
		return rho
	}
	return 1
}

// origin finds where a number is written.
func (w *work) origin(c *curve, column string, row int) *Origin {
	use := map[string]ColumnUse{"x": c.slip.X, "y": c.slip.Y, "u": c.slip.U, "size": c.slip.Size}[column]
	o := &Origin{File: w.e.study.fileName(c.slip), Line: c.table.RowLine(row), Of: columnOf(c, column), Unit: use.Unit.Value}
	at, value := -1, math.NaN()
	for i, k := range c.table.Columns {
		if k.Name == columnOf(c, column) {
			at, value = i, k.Values[row]
		}
	}
	if at < 0 {
		return o
	}
	o.Text, o.Column = field(w.e.study.File(c.slip.File).Data, o.Line, at, value)
	if o.Text == "" { // in a workbook, or in a coding of its own
		o.Text = quantity.Typed(value)
	}
	return o
}

// field returns the text of a line that reads as the value, and its place:
// where the column stands if it does so there, else the first that does.
func field(data []byte, line, column int, value float64) (string, int) {
	if !utf8.Valid(data) {
		return "", 0
	}
	for range line - 1 {
		_, rest, more := bytes.Cut(data, []byte("\n"))
		if !more {
			return "", 0
		}
		data = rest
	}
	row, _, _ := bytes.Cut(data, []byte("\n"))
	text := string(row)
	for _, anywhere := range []bool{false, true} {
		for _, separator := range []string{"\t", ";", ",", ""} {
			fields := strings.Split(text, separator)
			if separator == "" {
				fields = strings.Fields(text)
			}
			for i, f := range fields {
				f = strings.Trim(strings.TrimSpace(f), `"'`)
				if (i == column || anywhere) && reads(f, value) {
					return f, i + 1
				}
			}
		}
	}
	return "", 0
}

// reads reports whether a text is the number.
func reads(text string, value float64) bool {
	v, err := strconv.ParseFloat(strings.ReplaceAll(text, ",", "."), 64)
	return err == nil && v == value
}

// unitOfPath returns the unit in which a number of the cell is stated.
func (w *work) unitOfPath(path string) string {
	last := path[strings.LastIndex(path, ".")+1:]
	switch first, _, _ := strings.Cut(path, "."); first {
	case "stations", "summary", "sources", "crossings", "excluded", "requirement", "regions":
		if w.pure(path) {
			return ""
		}
		if last == "x" || last == "max_at" || last == "from" || last == "to" || first == "crossings" || path == "requirement.at" {
			return w.cell.XUnit
		}
		return w.cell.Unit
	case "outside":
		return w.cell.XUnit
	case "taken", "read":
		if side := strings.Split(path, ".")[1]; first == "taken" || strings.HasPrefix(side, "take") {
			x, y := w.unitsOf("take" + strings.TrimPrefix(side, "take"))
			return map[bool]string{true: x.symbol, false: y.symbol}[strings.Contains(path, ".x.")]
		}
		if strings.Contains(path, ".x.") {
			return w.cell.XUnit
		}
		if strings.Contains(path, ".size.") || strings.Contains(path, "balance") {
			return ""
		}
		return w.cell.Unit
	}
	switch path {
	case "joint.offset", "joint.u_offset", "grids.extrapolated", "grids.u", "grids.u_num":
		return w.cell.Unit
	}
	return ""
}

// pure reports whether a number of the cell is a count or a ratio.
func (w *work) pure(path string) bool {
	switch path[strings.LastIndex(path, ".")+1:] {
	case "ratio", "whitened", "line", "n", "tested", "max_ratio", "within_u_val", "within_k_u_val", "beyond_chance", "share", "percent", "u_num_reduction", "hit_rate", "beyond":
		return true
	}
	return false
}
