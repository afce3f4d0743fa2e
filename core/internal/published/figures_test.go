package published

import (
	"encoding/csv"
	"math"
	"os"
	"path/filepath"
	"strconv"
	"testing"

	"weirmark/core/internal/reference"
	"weirmark/core/tablefile"
)

// figures are the rows of a committed file: one map from name to cell each.
func figures(t *testing.T, name string) []map[string]string {
	t.Helper()
	file, err := os.Open(filepath.Join(reference.Root(t), "testdata", "published", name))
	if err != nil {
		t.Fatal(err)
	}
	defer file.Close()
	reader := csv.NewReader(file)
	reader.Comment = '#'
	cells, err := reader.ReadAll()
	if err != nil {
		t.Fatalf("%s: %v", name, err)
	}
	var rows []map[string]string
	for _, line := range cells[1:] {
		row := map[string]string{}
		for i, cell := range line {
			row[cells[0][i]] = cell
		}
		rows = append(rows, row)
	}
	return rows
}

// number is a cell of a committed file.
func number(t *testing.T, row map[string]string, name string) float64 {
	t.Helper()
	v, err := strconv.ParseFloat(row[name], 64)
	if err != nil {
		t.Fatalf("column %s: %v", name, err)
	}
	return v
}

// curve reads two or more columns of the only table of a shared file.
func curve(t *testing.T, name string, columns ...string) [][]float64 {
	t.Helper()
	table, err := tablefile.Read(name, reference.Shared(t, name), tablefile.Options{}).Table("")
	if err != nil {
		t.Fatalf("%s: %v", name, err)
	}
	values := make([][]float64, len(columns))
	for i, column := range columns {
		c, err := table.Column(column)
		if err != nil {
			t.Fatalf("%s: %v", name, err)
		}
		values[i] = c.Values
	}
	return values
}

// equal compares with a committed figure of 12 significant digits. size is
// what the figure is a difference of: its last digits carry no more than that
// has.
func equal(got, want, size float64) bool {
	return math.Abs(got-want) <= 1e-11*max(math.Abs(want), math.Abs(size))
}
