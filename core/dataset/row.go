package dataset

import (
	"bytes"
	"encoding/csv"
	"fmt"
	"io"
	"math"
	"strconv"
	"strings"

	"github.com/gocarina/gocsv"
)

// Number is a figure as printed, and its value; both blank and NaN where there
// is none.
type Number struct {
	Text  string
	Value float64
}

// UnmarshalCSV reads a cell.
func (n *Number) UnmarshalCSV(cell string) error {
	n.Text, n.Value = cell, math.NaN()
	if cell == "" {
		return nil
	}
	v, err := strconv.ParseFloat(cell, 64)
	if err != nil || math.IsNaN(v) || math.IsInf(v, 0) || strings.ContainsAny(cell, "xX") {
		return fmt.Errorf("%q is no number", cell)
	}
	n.Value = v
	return nil
}

// MarshalCSV writes the figure as printed.
func (n Number) MarshalCSV() (string, error) { return n.Text, nil }

// Flag marks a row that must not be used.
type Flag string

// The flags of a row.
const (
	Good     Flag = ""
	Misprint Flag = "misprint" // the printed figure cannot be what was meant
	Doubtful Flag = "doubtful" // it may not be
)

// Row is one row of a table.
type Row struct {
	Curve  string `csv:"curve"`
	X      Number `csv:"x"`
	Value  Number `csv:"value"`
	U      Number `csv:"u"`
	Flag   Flag   `csv:"flag"`
	Remark string `csv:"remark"`
}

const heading = "curve,x,value,u,flag,remark"

// RowError refuses a line of a table.
type RowError struct {
	Table  string
	Line   int // counted from one; 0: the whole table
	Reason string
}

func (e *RowError) Error() string {
	if e.Line == 0 {
		return fmt.Sprintf("%s: %s", e.Table, e.Reason)
	}
	return fmt.Sprintf("%s:%d: %s", e.Table, e.Line, e.Reason)
}

// readRows decodes a table of the form and checks each row. No cell holds a
// line break, so that row i stands in line i + 2.
func readRows(table string, data []byte) ([]Row, error) {
	first, _, _ := strings.Cut(string(data), "\n")
	if first != heading {
		return nil, &RowError{table, 1, fmt.Sprintf("the first line is %q, not %q", first, heading)}
	}
	if bytes.ContainsAny(data, "\r") || !bytes.HasSuffix(data, []byte("\n")) {
		return nil, &RowError{table, 0, "lines must end with one line feed each"}
	}
	if err := oneLineEach(table, data); err != nil {
		return nil, err
	}
	var rows []Row
	if err := gocsv.UnmarshalCSV(csv.NewReader(bytes.NewReader(data)), &rows); err != nil {
		return nil, &RowError{table, 0, err.Error()}
	}
	for i, r := range rows {
		if reason := r.fault(); reason != "" {
			return nil, &RowError{table, i + 2, reason}
		}
	}
	return rows, nil
}

// oneLineEach refuses rows of another width, and cells with a line break.
func oneLineEach(table string, data []byte) error {
	reader := csv.NewReader(bytes.NewReader(data))
	for line := 1; ; line++ {
		_, err := reader.Read()
		if err == io.EOF {
			if lines := bytes.Count(data, []byte("\n")); lines != line-1 {
				return &RowError{table, 0, fmt.Sprintf("%d lines hold %d rows", lines, line-1)}
			}
			return nil
		}
		if err != nil {
			return &RowError{table, line, err.Error()}
		}
	}
}

// fault says what is wrong with a row, or "".
func (r Row) fault() string {
	switch {
	case r.Curve == "":
		return "no curve is named"
	case r.X.Text == "" || r.Value.Text == "":
		return "x or value is blank"
	case r.U.Text != "" && !(r.U.Value > 0):
		return fmt.Sprintf("the uncertainty %q is not above zero", r.U.Text)
	case r.Flag != Good && r.Flag != Misprint && r.Flag != Doubtful:
		return fmt.Sprintf("unknown flag %q", string(r.Flag))
	case r.Flag != Good && r.Remark == "":
		return "a flag without a remark"
	}
	return ""
}
