package tablefile

import (
	"encoding/xml"
	"fmt"
	"slices"
	"strconv"
	"strings"

	"weirmark/core/notice"
)

// Rows and columns that a sheet can have at most.
const (
	sheetRows    = 1 << 20
	sheetColumns = 1 << 14
)

// gridKind says what a cell of a sheet holds.
type gridKind uint8

const (
	gridNumber gridKind = iota
	gridText
	gridError
	gridNoValue // a formula whose result is not stored
)

// gridCell is a cell that holds something: text[start:end] of its grid.
// Rows and columns count from one.
type gridCell struct {
	row, column int32
	start, end  uint32
	kind        gridKind
}

// grid is a sheet as stored: its cells by row, then column.
type grid struct {
	name    string
	hidden  bool
	cells   []gridCell
	text    []byte
	rows    map[int]bool // hidden rows
	columns []bool       // hidden columns, nil for none
	spans   int          // hidden runs of columns that were given
	merged  []area
}

func (g *grid) textOf(c *gridCell) string { return string(g.text[c.start:c.end]) }

func (g *grid) hiddenColumn(column int) bool {
	return column < len(g.columns) && g.columns[column]
}

// hideColumns takes a run of columns that e says is hidden.
func (g *grid) hideColumns(e xml.StartElement) {
	first, _ := strconv.Atoi(attribute(e, "min"))
	last, _ := strconv.Atoi(attribute(e, "max"))
	if g.spans++; g.spans > sheetColumns {
		return // the runs of a sheet do not overlap: there cannot be more
	}
	if g.columns == nil {
		g.columns = make([]bool, sheetColumns+1)
	}
	for c := max(first, 1); c <= min(last, sheetColumns); c++ {
		g.columns[c] = true
	}
}

// area is a rectangle of cells, its ends included, counted from one.
type area struct{ top, left, bottom, right int }

// everything is the area of all cells.
var everything = area{1, 1, sheetRows, sheetColumns}

func (a area) holds(row, column int) bool {
	return row >= a.top && row <= a.bottom && column >= a.left && column <= a.right
}

func (a area) String() string {
	return cellReference(a.top, a.left) + ":" + cellReference(a.bottom, a.right)
}

// cellReference names a cell as workbooks do: C14.
func cellReference(row, column int) string {
	letters := ""
	for ; column > 0; column = (column - 1) / 26 {
		letters = string(rune('A'+(column-1)%26)) + letters
	}
	return letters + strconv.Itoa(row)
}

// parseReference reads the name of a cell, with or without dollar signs.
func parseReference(ref string) (row, column int, ok bool) {
	ref = strings.ReplaceAll(ref, "$", "")
	i := 0
	for ; i < len(ref) && i < 8 && ref[i]|0x20 >= 'a' && ref[i]|0x20 <= 'z'; i++ {
		column = column*26 + int(ref[i]|0x20-'a') + 1
	}
	if i == 0 || i == len(ref) || len(ref)-i > 9 || strings.Trim(ref[i:], "0123456789") != "" {
		return 0, 0, false
	}
	row, _ = strconv.Atoi(ref[i:])
	return row, column, row > 0
}

// parseArea reads a range of cells, or a single one.
func parseArea(ref string) (area, bool) {
	first, last, several := strings.Cut(ref, ":")
	if !several {
		last = first
	}
	top, left, ok := parseReference(first)
	bottom, right, also := parseReference(last)
	return area{min(top, bottom), min(left, right), max(top, bottom), max(left, right)}, ok && also
}

// readSheet reads the cells of a sheet.
func (b *book) readSheet(s sheetEntry) (*grid, error) {
	g := &grid{name: s.name, hidden: s.hidden, rows: map[int]bool{}}
	row, column := 0, 0
	err := b.walk(s.part, maxUnpacked, func(d *partReader, e xml.StartElement) error {
		switch e.Name.Local {
		case "col":
			if isTrue(attribute(e, "hidden")) {
				g.hideColumns(e)
			}
		case "row":
			row, column = nextRow(e, row), 0
			if row > sheetRows {
				return notice.New("workbook-large", fmt.Sprintf("row %d", row))
			}
			if isTrue(attribute(e, "hidden")) {
				g.rows[row] = true
			}
		case "c":
			return b.readCell(g, d, e, row, &column)
		case "mergeCell":
			if a, ok := parseArea(attribute(e, "ref")); ok && len(g.merged) < maxColumns {
				g.merged = append(g.merged, a)
			}
		}
		return nil
	})
	if err != nil {
		return nil, err
	}
	slices.SortStableFunc(g.cells, func(a, b gridCell) int {
		if a.row != b.row {
			return int(a.row - b.row)
		}
		return int(a.column - b.column)
	})
	for i := 1; i < len(g.cells); i++ {
		if a, b := &g.cells[i-1], &g.cells[i]; a.row == b.row && a.column == b.column {
			return nil, fmt.Errorf("sheet %q gives cell %s twice", s.name, cellReference(int(a.row), int(a.column)))
		}
	}
	return g, nil
}

// nextRow returns the number of the row that e begins.
func nextRow(e xml.StartElement, before int) int {
	if n, err := strconv.Atoi(attribute(e, "r")); err == nil && n > 0 {
		return n
	}
	return before + 1
}

// readCell reads a cell up to its end. column is that of the cell before.
func (b *book) readCell(g *grid, d *partReader, e xml.StartElement, row int, column *int) error {
	*column++
	if ref := attribute(e, "r"); ref != "" {
		at, c, ok := parseReference(ref)
		if !ok || at != row {
			return fmt.Errorf("cell %q stands in row %d", ref, row)
		}
		*column = c
	}
	if *column > sheetColumns {
		return notice.New("columns-many", *column, maxColumns)
	}
	stored, err := readStored(d)
	if err != nil {
		return err
	}
	kind, text, err := b.cellText(e, stored)
	if err != nil {
		return fmt.Errorf("cell %s: %w", cellReference(row, *column), err)
	}
	if kind != gridNoValue && strings.TrimSpace(text) == "" {
		return nil
	}
	if len(g.cells) == maxCells {
		return notice.New("workbook-large", fmt.Sprintf("more than %d cells in sheet %q", maxCells, g.name))
	}
	start := uint32(len(g.text))
	g.text = append(g.text, text...)
	g.cells = append(g.cells, gridCell{int32(row), int32(*column), start, uint32(len(g.text)), kind})
	return nil
}

// stored is what stands in a cell.
type stored struct {
	value, inline string
	formula       bool
	given         bool // there is a value, blank or not
}

// readStored reads the elements of a cell up to its end.
func readStored(d *partReader) (stored, error) {
	var s stored
	var value strings.Builder
	for inside := false; ; {
		token, err := d.token()
		if err != nil {
			return s, err
		}
		switch t := token.(type) {
		case xml.StartElement:
			switch t.Name.Local {
			case "f":
				s.formula = true
				err = d.skip()
			case "is":
				s.inline, err = itemText(d)
			case "v":
				inside, s.given = true, true
			default:
				err = d.skip()
			}
			if err != nil {
				return s, err
			}
		case xml.EndElement:
			if !inside {
				s.value = value.String()
				return s, nil
			}
			inside = false
		case xml.CharData:
			if inside {
				value.Write(t)
			}
		}
	}
}

// cellText returns what a cell shows: a number in the digits that are stored,
// a date as 2024-03-02.
func (b *book) cellText(e xml.StartElement, s stored) (gridKind, string, error) {
	kind := attribute(e, "t")
	if s.formula && strings.TrimSpace(s.value) == "" && kind != "str" && kind != "inlineStr" {
		return gridNoValue, "", nil
	}
	if s.formula && kind == "str" && !s.given {
		return gridNoValue, "", nil
	}
	switch kind {
	case "s":
		i, err := strconv.Atoi(strings.TrimSpace(s.value))
		if err != nil || i < 0 || i >= len(b.texts) {
			return 0, "", fmt.Errorf("no shared text %q", s.value)
		}
		return gridText, b.texts[i], nil
	case "inlineStr":
		return gridText, s.inline, nil
	case "str", "d":
		return gridText, s.value, nil
	case "e":
		return gridError, s.value, nil
	case "b":
		if isTrue(strings.TrimSpace(s.value)) {
			return gridText, "TRUE", nil
		}
		return gridText, "FALSE", nil
	}
	text := strings.TrimSpace(s.value)
	style, _ := strconv.Atoi(attribute(e, "s"))
	if text != "" && style >= 0 && style < len(b.dates) && b.dates[style] {
		if serial, err := strconv.ParseFloat(text, 64); err == nil {
			return gridText, serialText(serial, b.since1904), nil
		}
	}
	return gridNumber, text, nil
}
