package tablefile

import (
	"bytes"
	"fmt"
	"slices"
	"strings"

	"weirmark/core/notice"
)

// Limits of the ranges of a sheet.
const (
	maxRegions     = 1000
	maxRegionCells = 16 << 20 // cells of all ranges, blank ones included
	maxSpread      = 1 << 20  // cells under merged names of a range
)

// cellMark parts the cells of a row of a sheet that is read as text. No text
// of a workbook can hold it: XML does not allow it.
const cellMark = 0x1f

// region is a range of a sheet that is read as one table.
type region struct {
	grid    *grid
	rows    [][]gridCell // of the rows that hold something, in order
	columns []int        // of the sheet, those read
	fills   map[[2]int]string
}

// sheetRow is a row of a sheet within a group of columns.
type sheetRow struct {
	at             int
	cells          []gridCell
	numbers, texts int
	states         bool // a condition, no row of a table
}

// alone reports whether the row holds one text and nothing else.
func (s *sheetRow) alone() bool { return len(s.cells) == 1 && s.texts == 1 }

// cellName names the cell in row line of the sheet and column c of the table.
func (g *region) cellName(line, c int) string {
	if c >= len(g.columns) {
		return cellReference(line, g.columns[0])
	}
	return cellReference(line, g.columns[c])
}

// bounds returns the cells that the region spans.
func (g *region) bounds() area {
	first, last := g.rows[0][0], g.rows[len(g.rows)-1][0]
	return area{int(first.row), g.columns[0], int(last.row), g.columns[len(g.columns)-1]}
}

// sheet reads the ranges of a sheet that lie in cells as tables.
func (r *reader) sheet(g *grid, cells area) {
	rows := r.sheetRows(g, cells)
	if len(rows) == 0 {
		return
	}
	if g.hidden {
		r.askHidden(fmt.Sprintf("the sheet %q", g.name), 0)
	}
	regions := g.regions(rows, func(column int) bool { return r.opt.Hidden == LeaveOutHidden && g.hiddenColumn(column) })
	if cells != everything {
		r.add(notice.New("range-stated", r.opt.Range))
		regions = []*region{newRegion(g, rows)}
	}
	if len(regions) > maxRegions {
		r.refuse(notice.New("workbook-large", fmt.Sprintf("%d ranges in sheet %q", len(regions), g.name)))
		return
	}
	r.room = maxRegionCells
	if len(regions) > 1 {
		var list []string
		for _, s := range regions {
			list = append(list, s.bounds().String())
		}
		r.add(notice.New("sheet-ranges", len(regions), g.name, strings.Join(list[:min(20, len(list))], ", ")))
	}
	for _, s := range regions {
		name := g.name
		if len(regions) > 1 {
			name += " " + s.bounds().String()
		}
		r.readRegion(s, name)
		if r.refused {
			return
		}
	}
}

// sheetRows parts the cells in the area into rows, without what is hidden
// where that is left out.
func (r *reader) sheetRows(g *grid, cells area) []sheetRow {
	var rows []sheetRow
	var dropped []string
	drop := func(what string) {
		if !slices.Contains(dropped, what) {
			dropped = append(dropped, what)
		}
	}
	for i := range g.cells {
		c := g.cells[i]
		row, column := int(c.row), int(c.column)
		if !cells.holds(row, column) {
			continue
		}
		if r.opt.Hidden == LeaveOutHidden && (g.rows[row] || g.hiddenColumn(column)) {
			if g.rows[row] {
				drop(fmt.Sprintf("row %d", row))
			} else {
				drop("column " + strings.TrimRight(cellReference(1, column), "1"))
			}
			continue
		}
		if len(rows) == 0 || rows[len(rows)-1].at != row {
			rows = append(rows, sheetRow{at: row})
		}
		last := &rows[len(rows)-1]
		last.cells = append(last.cells, c)
		last.count(&c)
	}
	for i := range rows {
		var texts []string
		for _, c := range rows[i].cells[:min(4, len(rows[i].cells))] {
			texts = append(texts, g.textOf(&c))
		}
		_, _, rows[i].states = cellStatement(texts)
	}
	if len(dropped) > 0 {
		r.add(notice.New("hidden-left-out", listSome(dropped)))
	}
	return rows
}

// count counts a cell of the row.
func (s *sheetRow) count(c *gridCell) {
	if c.kind == gridNumber || c.kind == gridNoValue {
		s.numbers++
	}
	if c.kind == gridText {
		s.texts++
	}
}

// listSome lists at most twenty things.
func listSome(things []string) string {
	if len(things) > 20 {
		return strings.Join(things[:20], ", ") + fmt.Sprintf(" and %d more", len(things)-20)
	}
	return strings.Join(things, ", ")
}

// regions finds the ranges of a sheet: columns that follow each other, and in
// them rows up to a blank row with a row of names behind it. A row with one
// text, such as a title, joins the columns nearest to it. Columns that were
// left out part nothing.
func (g *grid) regions(rows []sheetRow, leftOut func(column int) bool) []*region {
	var regions []*region
	for _, own := range byGroup(rows, columnGroups(rows, leftOut)) {
		for len(own) > 0 {
			n := regionEnd(own)
			regions = append(regions, newRegion(g, own[:n]))
			own = own[n:]
		}
	}
	return regions
}

// columnGroups returns runs of columns without a blank one between. Each is
// widened up to the next, and the first to the left, so that every lone text
// belongs to one.
func columnGroups(rows []sheetRow, leftOut func(column int) bool) []area {
	used := map[int]bool{}
	var columns []int
	use := func(row *sheetRow) {
		for _, c := range row.cells {
			if column := int(c.column); !used[column] {
				used[column] = true
				columns = append(columns, column)
			}
		}
	}
	for i := range rows {
		if !rows[i].alone() {
			use(&rows[i])
		}
	}
	if len(columns) == 0 {
		for i := range rows {
			use(&rows[i])
		}
	}
	slices.Sort(columns)
	var groups []area
	for _, c := range columns {
		n := len(groups)
		if n > 0 {
			for last := &groups[n-1].right; *last < c-1 && leftOut(*last+1); {
				*last++
			}
		}
		if n > 0 && groups[n-1].right == c-1 {
			groups[n-1].right = c
		} else {
			groups = append(groups, area{left: c, right: c})
		}
	}
	for i := range groups {
		if i == 0 {
			groups[i].left = 1
		}
		if i+1 < len(groups) {
			groups[i].right = groups[i+1].left - 1
		} else {
			groups[i].right = sheetColumns
		}
	}
	return groups
}

// byGroup parts the rows into those of each group of columns.
func byGroup(rows []sheetRow, groups []area) [][]sheetRow {
	parts := make([][]sheetRow, len(groups))
	for i := range rows {
		row := &rows[i]
		for from, group := 0, 0; from < len(row.cells); {
			for int(row.cells[from].column) > groups[group].right {
				group++
			}
			part := sheetRow{at: row.at, states: row.states}
			to := from
			for ; to < len(row.cells) && int(row.cells[to].column) <= groups[group].right; to++ {
				part.count(&row.cells[to])
			}
			part.cells = row.cells[from:to]
			parts[group] = append(parts[group], part)
			from = to
		}
	}
	return parts
}

// regionEnd returns how many of the rows belong to the first region: a row of
// names behind a blank row and rows of numbers begins another.
func regionEnd(rows []sheetRow) int {
	numbers := false
	for i := range rows {
		row := &rows[i]
		if row.states {
			continue
		}
		if numbers && i > 0 && row.at > rows[i-1].at+1 && headed(rows[i:]) {
			return i
		}
		numbers = numbers || row.numbers > 0 && row.numbers >= row.texts
	}
	return len(rows)
}

// headed reports whether a block of rows begins with a row of names, perhaps
// below titles, and goes on with numbers.
func headed(rows []sheetRow) bool {
	named := false
	for i := range rows {
		row := &rows[i]
		if i > 0 && row.at > rows[i-1].at+1 {
			return false
		}
		switch {
		case row.states:
		case row.numbers > 0 && row.numbers >= row.texts:
			return named
		case row.texts > row.numbers:
			named = true
		}
	}
	return false
}

// newRegion returns the region of rows.
func newRegion(g *grid, rows []sheetRow) *region {
	s := &region{grid: g, fills: map[[2]int]string{}}
	for i := range rows {
		s.rows = append(s.rows, rows[i].cells)
		for _, c := range rows[i].cells {
			if !rows[i].alone() || len(rows) == 1 {
				s.columns = append(s.columns, int(c.column))
			}
		}
	}
	if s.columns == nil {
		for _, row := range s.rows {
			s.columns = append(s.columns, int(row[0].column))
		}
	}
	slices.Sort(s.columns)
	s.columns = slices.Compact(s.columns)
	return s
}

// readRegion reads a region as a table of the given name.
func (r *reader) readRegion(s *region, name string) {
	if n, found := s.noValue(); found {
		r.add(n)
		r.file.leftOut = append(r.file.leftOut, leftOut{name, n.In(r.file.Name)})
		return
	}
	bounds := s.bounds()
	r.room -= (bounds.bottom - bounds.top + 1) * len(s.columns)
	if r.room < 0 || s.spread() > maxSpread {
		n := notice.New("workbook-large", fmt.Sprintf("the range %s of sheet %q", bounds, s.grid.name))
		r.add(n)
		r.file.leftOut = append(r.file.leftOut, leftOut{name, n.In(r.file.Name)})
		return
	}
	r.tellHidden(s)
	merged := s.spreadNames()
	child := &reader{file: File{Name: r.file.Name}, data: s.text(), line: bounds.top, first: bounds.top, opt: r.opt, answers: r.answers, region: s}
	child.opt.Progress = nil
	child.tick = len(child.data)
	child.guides, child.separator = nil, cellMark
	if len(s.columns) == 1 {
		child.separator = 0 // rows of text pasted into one column
	}
	lines := bytes.Count(child.data, []byte("\n"))
	if child.delimited() == foundZones {
		child.zoned()
	}
	child.summarise()
	if merged != "" {
		child.add(notice.New("header-merged", merged).At(bounds.top))
	}
	r.adopt(child, name, lines)
}

// adopt takes over what was read of a region.
func (r *reader) adopt(child *reader, name string, lines int) {
	slices.SortStableFunc(child.file.Notices, func(a, b notice.Notice) int { return a.Line - b.Line })
	r.file.Notices = append(r.file.Notices, child.file.Notices...)
	if child.refused {
		for _, n := range child.file.Notices {
			if n.Severity == notice.Stop {
				child.file.leftOut = []leftOut{{name, n}}
				break
			}
		}
		child.file.Tables = nil
	}
	for _, t := range child.file.Tables {
		if t.Name == "" {
			t.Name = name
		}
		r.file.Tables = append(r.file.Tables, t)
	}
	for _, m := range child.file.Meta {
		m.Table = name
		r.file.Meta = append(r.file.Meta, m)
	}
	for _, l := range child.file.leftOut {
		if l.name == "" {
			l.name = name
		}
		r.file.leftOut = append(r.file.leftOut, l)
	}
	if child.refused {
		r.tally.left += lines
	} else {
		r.tally.add(child.tally)
	}
	r.file.lines += lines
}

// noValue returns the stop notice for formulas whose results are not stored.
func (g *region) noValue() (notice.Notice, bool) {
	count := 0
	var first gridCell
	for _, row := range g.rows {
		for _, c := range row {
			if c.kind == gridNoValue {
				if count == 0 {
					first = c
				}
				count++
			}
		}
	}
	if count == 0 {
		return notice.Notice{}, false
	}
	return notice.New("formula-no-value", cellReference(int(first.row), int(first.column)), count).At(int(first.row)), true
}

// tellHidden asks about hidden rows and columns of a region, or notes what a
// person said of them.
func (r *reader) tellHidden(s *region) {
	var rows, columns []string
	line := 0
	for _, row := range s.rows {
		if at := int(row[0].row); s.grid.rows[at] {
			rows = append(rows, fmt.Sprint(at))
			if line == 0 {
				line = at
			}
		}
	}
	for _, column := range s.columns {
		if s.grid.hiddenColumn(column) {
			columns = append(columns, strings.TrimRight(cellReference(1, column), "1"))
		}
	}
	if len(rows) > 0 {
		r.askHidden(fmt.Sprintf("%s (%s)", plural(len(rows), "row"), listSome(rows)), line)
	}
	if len(columns) > 0 {
		r.askHidden(fmt.Sprintf("%s (%s)", plural(len(columns), "column"), listSome(columns)), s.bounds().top)
	}
}

func (r *reader) askHidden(what string, line int) {
	code := "hidden-cells"
	if r.opt.Hidden == IncludeHidden {
		code = "hidden-included"
	}
	r.add(notice.New(code, what).At(line))
}

// spreadNames puts the text of merged cells where it stands for more than one
// cell: labels over several rows are repeated, and names over several columns
// go before the names below them. A title over the whole width stays one. It
// says what it did with the first merged name, "" for nothing.
func (g *region) spreadNames() string {
	told := ""
	for _, a := range g.grid.merged {
		anchor := g.find(a.top, a.left)
		if anchor == nil || anchor.kind != gridText {
			continue
		}
		text := g.grid.textOf(anchor)
		switch {
		case a.left == a.right:
			for row := a.top + 1; row <= a.bottom && row <= g.bounds().bottom; row++ {
				g.fills[[2]int{row, a.left}] = text
			}
		case a.left > g.columns[0] || a.right < g.columns[len(g.columns)-1]:
			g.spreadName(a, text)
			if told == "" {
				told = fmt.Sprintf("%q at %s", text, a)
			}
		}
	}
	return told
}

// spread returns how many cells of the region merged names stand for.
func (g *region) spread() int {
	total, bounds := 0, g.bounds()
	for _, a := range g.grid.merged {
		height := min(a.bottom, bounds.bottom) - max(a.top, bounds.top) + 1
		width := min(a.right, bounds.right) - max(a.left, bounds.left) + 1
		total += max(0, height) * max(0, width)
	}
	return total
}

// spreadName puts a name merged over columns before the names below it, or,
// where no names are below, over each of its columns.
func (g *region) spreadName(a area, text string) {
	for column := max(a.left, g.columns[0]); column <= min(a.right, g.columns[len(g.columns)-1]); column++ {
		below := g.find(a.bottom+1, column)
		if below != nil && below.kind == gridText {
			g.fills[[2]int{a.bottom + 1, column}] = text + " " + g.grid.textOf(below)
		} else if below != nil && column > a.left {
			g.fills[[2]int{a.bottom, column}] = text
		}
	}
}

// find returns the cell of a region at a place, or nil.
func (g *region) find(row, column int) *gridCell {
	at, found := slices.BinarySearchFunc(g.rows, row, func(cells []gridCell, row int) int { return int(cells[0].row) - row })
	if !found {
		return nil
	}
	cells := g.rows[at]
	if at, found = slices.BinarySearchFunc(cells, column, func(c gridCell, column int) int { return int(c.column) - column }); !found {
		return nil
	}
	return &cells[at]
}

// text writes the region as lines of cells, one for every row of the sheet.
func (g *region) text() []byte {
	var text []byte
	line := g.bounds().top
	for _, row := range g.rows {
		for ; line < int(row[0].row); line++ {
			text = append(text, '\n')
		}
		text = g.appendRow(text, row)
		text = append(text, '\n')
		line++
	}
	return text
}

// appendRow writes a row. A lone text is written without the blank cells
// beside it, so that a title, a comment or a statement is read as such.
func (g *region) appendRow(text []byte, row []gridCell) []byte {
	at := int(row[0].row)
	if len(row) == 1 && row[0].kind == gridText && !g.filled(at) {
		return appendCell(text, g.grid.textOf(&row[0]), false)
	}
	next := 0
	for i, column := range g.columns {
		if i > 0 {
			text = append(text, cellMark)
		}
		for next < len(row) && int(row[next].column) < column {
			next++
		}
		fill, isFilled := g.fills[[2]int{at, column}]
		switch {
		case isFilled:
			text = appendCell(text, fill, i == 0)
		case next < len(row) && int(row[next].column) == column:
			text = appendCell(text, g.grid.textOf(&row[next]), i == 0 && len(g.columns) > 1)
		}
	}
	return text
}

// filled reports whether the row has cells that merged cells stand for.
func (g *region) filled(row int) bool {
	for _, column := range g.columns {
		if _, is := g.fills[[2]int{row, column}]; is {
			return true
		}
	}
	return false
}

// appendCell writes the text of a cell on one line. Where guard is set a text
// that would make its line a comment is quoted.
func appendCell(text []byte, cell string, guard bool) []byte {
	cell = strings.Map(func(c rune) rune {
		switch c {
		case '\n', '\r', '\t', cellMark:
			return ' '
		}
		return c
	}, strings.TrimSpace(cell))
	kind, _ := kindOfLine([]byte(cell), 0, spaces)
	if !strings.HasPrefix(cell, `"`) && !(guard && kind == lineComment) {
		return append(text, cell...)
	}
	text = append(text, '"')
	text = append(text, strings.ReplaceAll(cell, `"`, `""`)...)
	return append(text, '"')
}
