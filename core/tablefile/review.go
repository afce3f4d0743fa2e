package tablefile

import "weirmark/core/notice"

// review walks the rows of a finished table again where a column holds text,
// to keep the cells as written, or a decimal comma, to find out whether it
// holds a decimal point as well.
func (b *builder) review(t *Table) {
	var wanted bool
	for c := range b.columns {
		g := &b.columns[c]
		if g.text {
			t.Columns[c].Text = make([]string, b.rows)
		}
		wanted = wanted || g.text || g.comma.count > 0
	}
	if !wanted {
		return
	}
	kept := labels{}
	at, line := b.start, b.startLine
	for row := range b.rows {
		for begin := t.RowLine(row); line < begin; line++ {
			at = afterEnd(b.r.data, b.r.lineEnd(at))
		}
		next, lines := b.split.split(at)
		at, line = next, line+lines
		b.reviewRow(t, row, line-lines, kept)
	}
}

// reviewRow looks at the cells just split, those of a row that begins on line.
func (b *builder) reviewRow(t *Table, row, line int, kept labels) {
	column := 0
	for _, c := range b.split.cells {
		for range c.repeat {
			if column == len(b.columns) {
				return
			}
			g := &b.columns[column]
			if g.text {
				t.Columns[column].Text[row] = kept.string(b.split.bytes(c))
			}
			if g.comma.count > 0 {
				b.reviewPoint(column, line, b.split.bytes(c))
			}
			column++
		}
	}
}

// reviewPoint refuses the file where a cell of a column with decimal commas
// has a decimal point. The notice stands where the second of the two is met.
func (b *builder) reviewPoint(column, line int, text []byte) {
	_, kind, form := b.r.cells.read(text)
	if b.r.refused || kind != cellNumber || form&formPoint == 0 {
		return
	}
	comma := b.columns[column].comma
	b.r.refuse(notice.New("decimal-mixed", excerpt(text), comma.first, column+1).At(max(line, comma.line)))
}

// labels keeps one string for equal cells, up to a number of them.
type labels map[string]string

func (l labels) string(text []byte) string {
	if s, ok := l[string(text)]; ok {
		return s
	}
	s := string(text)
	if len(l) < 4096 {
		l[s] = s
	}
	return s
}
