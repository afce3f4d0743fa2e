package tablefile

import (
	"bytes"
	"slices"

	"weirmark/core/notice"
)

// outcome of reading a file as one delimited table.
type outcome uint8

const (
	readDelimited outcome = iota
	foundZones            // a zone heading was met: read the file anew as zones
)

// delimited reads the file as one table.
func (r *reader) delimited() outcome {
	stated := r.separator
	if stated == 0 && r.region == nil && len(r.guides) == 0 {
		stated = r.statedSeparator()
	}
	from := r.at
	l, ok := r.judge(from, stated)
	if !ok || l.columns > maxColumns {
		return r.noTable(l.columns)
	}
	names := r.findNames(&l, from)
	r.statements = l.statements
	estimate := (len(r.data)-l.first)/l.rowBytes + 16
	b := r.newBuilder(l.columns, l.separator, min(estimate+estimate/32, (len(r.data)-l.first)/l.columns+16))
	b.trailing, b.numeric = l.trailing, l.numeric
	b.split.guides, b.split.strict = r.guides, r.strict
	if !r.delimitedRows(b, l) {
		if r.refused {
			return readDelimited
		}
		kept := *r
		*r = reader{file: kept.file, data: kept.data, returns: kept.returns, line: kept.first, first: kept.first, region: kept.region, opt: kept.opt, answers: kept.answers, tick: progressBytes}
		r.file.Meta = nil
		return foundZones
	}
	r.nameNotices(&l, &names)
	if t, ok := b.table("", names.columns); ok {
		if l.separator == ',' && names.stated*2 <= l.columns && r.cells.decimal == decimalOpen && !l.stated && r.commasDoubtful(b, l.first) {
			r.add(notice.New("comma-ambiguous", excerpt(r.text(l.first)), l.columns).At(t.Line))
		}
		r.addTable(t, b)
	}
	return readDelimited
}

// statedSeparator reads a first line of the form sep=; which spreadsheets
// write, and returns the separator or 0.
func (r *reader) statedSeparator() byte {
	text := bytes.TrimSpace(r.text(r.at))
	if len(text) != 5 || !bytes.EqualFold(text[:4], []byte("sep=")) {
		return 0
	}
	r.tally.header++
	r.skipLine()
	return text[4]
}

// noTable accounts for the lines of a file without a table.
func (r *reader) noTable(columns int) outcome {
	if columns > maxColumns {
		r.refuse(notice.New("columns-many", columns, maxColumns))
	}
	if r.refused {
		return readDelimited
	}
	for r.at < len(r.data) {
		switch kind, _ := kindOfLine(r.data, r.at, spaces); kind {
		case lineBlank:
			r.tally.blank++
		case lineComment:
			r.tally.comment++
		case lineContent:
			r.passed.tell(r.line, r.text(r.at))
			r.tally.text++
		}
		r.skipLine()
	}
	return readDelimited
}

// delimitedRows walks the whole file. It reports false where the walk ended
// early: the file was refused or turned out to be in zones.
func (r *reader) delimitedRows(b *builder, l layout) bool {
	plain := l.separator != fixed && r.cells.decimal != decimalComma
	for r.at < len(r.data) {
		if r.at >= r.tick && !r.progress() {
			return false
		}
		if r.at >= l.first && plain {
			if next := b.plainRow(r.at); next >= 0 {
				b.commit(r.line)
				if b.blank {
					b.noteGap(r.line)
				}
				r.tally.row++
				r.at = next
				r.line++
				continue
			}
		}
		kind, at := kindOfLine(r.data, r.at, l.separator)
		switch {
		case kind == lineBlank:
			b.blankLine()
		case kind == lineComment:
			b.comment(at)
		case r.at == l.names || r.at == l.units:
			r.headerLine(b)
		case r.zoneHeading(at):
			return false
		case r.at < l.first:
			if !b.content(false) {
				return false
			}
		default:
			if !b.content(true) {
				return false
			}
		}
	}
	return true
}

// headerLine passes over the line of names or units, which may span several
// lines where names are quoted.
func (r *reader) headerLine(b *builder) {
	next, lines := b.split.split(r.at)
	r.tally.header += lines
	r.at, r.line = next, r.line+lines
}

// nameSource says where the names of the columns were found.
type nameSource struct {
	columns  []Column
	headers  []string
	stated   int // names of the line of names
	comment  bool
	line     int // of the names, 0 for none
	unitLine int
	units    []string
}

// findNames finds the names of the columns above the first row: the nearest
// line of content that gives as many names, with a line of units between, or
// else a comment. It sets the places of those lines in l.
func (r *reader) findNames(l *layout, from int) nameSource {
	above := r.linesAbove(*l, from)
	var source nameSource
	content := above.content
	if l.statements {
		content = slices.DeleteFunc(content, func(c lineAt) bool {
			_, _, ok := rowStatement(c.text, l.separator)
			return ok
		})
	}
	if n := len(content); n > 0 {
		if names := r.rowNames(content[n-1].text, *l); names != nil {
			if units, ok := unitRow(names); ok && source.takeUnits(r, content[:n-1], *l, units) {
				l.units = content[n-1].at
				source.unitLine = content[n-1].line
				n--
			}
		}
		last := content[n-1]
		if names := r.rowNames(last.text, *l); names != nil && namesOfRows(names, *l) {
			source.headers, source.line, source.stated = names, last.line, len(names)
			l.names = last.at
			return source
		}
		source.stated = len(namesBetween(last.text, l.separator))
		l.cells = r.misfit(last.text, *l)
		if l.cells > 0 {
			l.names = last.at
			source.line = last.line
			return source
		}
	}
	source.stated = 0
	for i := len(above.comments) - 1; i >= 0; i-- {
		c := above.comments[i]
		names := splitNames(commentText(c.text), l.separator, l.columns)
		nearest := i == len(above.comments)-1
		if names != nil && plausibleNames(names) && (nearest || l.columns > 2) {
			source.headers, source.line, source.comment, source.stated = names, c.line, true, len(names)
			return source
		}
	}
	return source
}

// takeUnits takes units where a line of names stands above them.
func (s *nameSource) takeUnits(r *reader, above []lineAt, l layout, units []string) bool {
	if len(above) == 0 {
		return false
	}
	names := r.rowNames(above[len(above)-1].text, l)
	if names == nil || !namesOfRows(names, l) {
		return false
	}
	s.units = units
	return true
}

// rowNames splits a line of content into the names of the columns, or returns
// nil where their number does not fit.
func (r *reader) rowNames(text []byte, l layout) []string {
	switch l.separator {
	case spaces:
		return splitNames(text, spaces, l.columns)
	case fixed:
		return r.namesByGuides(text)
	}
	names := namesBetween(text, l.separator)
	if l.trailing && len(names) == l.columns+1 && names[l.columns] == "" {
		names = names[:l.columns]
	}
	if len(names) != l.columns {
		return nil
	}
	return names
}

// namesOfRows reports whether a line of content above the rows can hold their
// names: most are text, or the first is, above numbers.
func namesOfRows(names []string, l layout) bool {
	return plausibleNames(names) || l.numeric[0] && plausibleNames(names[:1])
}

// misfit returns the number of names of a line above the first row that is a
// line of names by its separators but does not fit the columns, else 0.
func (r *reader) misfit(text []byte, l layout) int {
	if l.separator == spaces || l.separator == fixed {
		return 0
	}
	names := namesBetween(text, l.separator)
	if len(names) < 2 || !plausibleNames(names) {
		return 0
	}
	return len(names)
}

// lineAt is a line of the file above the first row.
type lineAt struct {
	at, line int
	text     []byte
}

// linesAbove is what stands above the first row.
type linesAbove struct{ content, comments []lineAt }

// linesAbove returns the last lines above the first row. A line of content
// spans the lines of its quoted fields.
func (r *reader) linesAbove(l layout, from int) linesAbove {
	var above linesAbove
	split := splitter{data: r.data, separator: l.separator, guides: r.guides}
	line := r.line
	for at := from; at < l.first; {
		kind, mark := kindOfLine(r.data, at, l.separator)
		next, lines := afterEnd(r.data, r.lineEnd(at)), 1
		if kind == lineContent {
			if next, lines = split.split(at); split.openQuote >= 0 {
				break
			}
			above.content = append(above.content, lineAt{at, line, bytes.TrimRight(r.data[at:next], "\r\n")})
		}
		if kind == lineComment {
			above.comments = append(above.comments, lineAt{at, line, r.text(mark)})
		}
		at, line = next, line+lines
	}
	return above
}

// nameNotices makes the columns of the names found and says where they are
// from.
func (r *reader) nameNotices(l *layout, s *nameSource) {
	switch {
	case l.separator == fixed && r.strict:
		r.add(notice.New("fixed-guessed", listGuides(r.guides)))
	case l.separator == fixed:
		r.add(notice.New("fixed-stated", listGuides(r.guides)))
	case l.columns > 1 && !l.stated:
		r.add(notice.New("delimiter-guessed", separatorName(l.separator)))
	}
	if l.trailing {
		r.add(notice.New("delimiter-trailing", separatorName(l.separator)))
	}
	switch {
	case l.cells > 0:
		r.add(notice.New("header-count", s.line, l.cells, l.columns, l.columns).At(s.line))
		s.columns = numbered(l.columns)
	case s.headers == nil:
		r.add(notice.New("header-none", l.columns))
		s.columns = numbered(l.columns)
	case s.comment:
		r.add(notice.New("header-comment", s.line).At(s.line))
		s.columns = r.named(s.headers, s.line)
	default:
		r.add(notice.New("header-guessed", s.line).At(s.line))
		s.columns = r.named(s.headers, s.line)
	}
	if s.units != nil {
		r.add(notice.New("unit-row", s.unitLine).At(s.unitLine))
		for c, unit := range s.units {
			if unit != "" {
				s.columns[c].Unit = unit
			}
		}
	}
}

func separatorName(separator byte) string {
	switch separator {
	case '\t':
		return "tabs"
	case ';':
		return "semicolons"
	case ',':
		return "commas"
	case spaces:
		return "blanks"
	}
	return string(rune(separator))
}

// commasDoubtful reports whether the commas of a file without names could as
// well be decimal signs: an even number of columns, whole numbers throughout.
func (r *reader) commasDoubtful(b *builder, first int) bool {
	if len(b.values)%2 != 0 || bytes.IndexByte(r.data[first:], '.') >= 0 {
		return false
	}
	for c := range b.columns {
		if b.columns[c].text {
			return false
		}
	}
	return true
}
