package tablefile

import (
	"weirmark/core/notice"
)

// zones is the state of reading a file of tables in zones.
type zones struct {
	*reader
	headers []string // of the list of variables in force, nil for none
	line    int      // of that list
	told    bool     // its notices were given
	parted  bool     // the notice on the separator was given
	heading heading
	number  int   // zones met
	before  forms // as counted before the rows in hand
}

// zoned reads the file as tables in zones.
func (r *reader) zoned() {
	z := &zones{reader: r}
	for r.at < len(r.data) && !r.refused {
		kind, i := kindOfLine(r.data, r.at, spaces)
		switch {
		case kind == lineBlank:
			r.tally.blank++
			r.skipLine()
		case kind == lineComment:
			z.commentStatement()
			r.tally.comment++
			r.skipLine()
		case isHeadingOf(r.data, i, "title"):
			r.assignments(i, func(key, value string) { r.state(key, value, r.line) })
			r.tally.header++
			r.skipLine()
		case isHeadingOf(r.data, i, "filetype"):
			r.tally.header++
			r.skipLine()
		case isHeadingOf(r.data, i, "variables"):
			z.closeHeading()
			z.variables(i)
		case zoneAt(r.data, i) >= 0:
			z.closeHeading()
			z.zone(zoneAt(r.data, i))
		case isRecord(r.data, i):
			z.record(i)
		default:
			z.rows()
		}
	}
	if !r.refused {
		z.closeHeading()
	}
}

// closeHeading tells of a zone that ends before it has a row.
func (z *zones) closeHeading() {
	if z.heading.given {
		z.add(notice.New("zone-empty", z.heading.title(z.number)).At(z.heading.line))
	}
	z.heading = heading{}
}

// variables reads the list of variables whose heading is at offset i. It goes
// on over the lines that follow until something else than names stands there.
func (z *zones) variables(i int) {
	z.headers, z.line, z.told = nil, z.reader.line, false
	_, after := wordAt(z.data, i)
	end := z.lineEnd(after)
	z.headers = bareNames(z.data[after+1 : end])
	z.tally.header++
	z.skipLine()
	for z.at < len(z.data) {
		kind, i := kindOfLine(z.data, z.at, spaces)
		switch kind {
		case lineBlank:
			z.tally.blank++
		case lineComment:
			z.tally.comment++
		case lineContent:
			if isAssignment(z.data, i) || zoneAt(z.data, i) >= 0 || isRecord(z.data, i) {
				return
			}
			names := bareNames(z.text(i))
			if z.data[i] != '"' && z.data[i] != '\'' && !allNames(names) {
				return
			}
			z.headers = append(z.headers, names...)
			z.tally.header++
		}
		z.skipLine()
	}
}

// allNames reports whether no name is a number or a mark of a missing value.
func allNames(names []string) bool {
	for _, name := range names {
		if _, kind, _ := readCell([]byte(name)); kind != cellText {
			return false
		}
	}
	return len(names) > 0
}

// zone reads the heading of a zone; offset i is behind its first word. Lines
// of keywords that follow belong to it.
func (z *zones) zone(i int) {
	z.number++
	z.heading = heading{given: true, line: z.reader.line}
	z.keywords(i)
	for z.at < len(z.data) {
		kind, i := kindOfLine(z.data, z.at, spaces)
		switch {
		case kind == lineBlank:
			z.tally.blank++
			z.skipLine()
		case kind == lineComment:
			z.tally.comment++
			z.skipLine()
		case isAssignment(z.data, i) && !isHeadingOf(z.data, i, "variables") && !isHeadingOf(z.data, i, "title"):
			z.keywords(i)
		default:
			z.leaveOutUnread()
			return
		}
	}
	z.leaveOutUnread()
}

// keywords reads the keywords from offset i on and moves behind their lines.
func (z *zones) keywords(i int) {
	end := z.assignments(i, z.heading.set)
	for z.at <= end && z.at < len(z.data) {
		z.tally.header++
		z.skipLine()
	}
}

// leaveOutUnread leaves the zone out where its heading names a layout that is
// not read.
func (z *zones) leaveOutUnread() {
	if z.heading.unread != "" {
		z.leaveOut(z.heading.unread)
		z.skipSection()
	}
}

// leaveOut tells that the zone in hand is left out, and why.
func (z *zones) leaveOut(why string) {
	name := z.heading.title(z.number)
	n := notice.New("zone-layout", name, why).At(z.heading.line)
	z.add(n)
	z.file.leftOut = append(z.file.leftOut, leftOut{name, n.In(z.file.Name)})
	z.heading = heading{}
}

// skipSection moves to the next line that begins a section.
func (z *zones) skipSection() {
	for z.at < len(z.data) && !z.sectionAt() {
		switch kind, _ := kindOfLine(z.data, z.at, spaces); kind {
		case lineBlank:
			z.tally.blank++
		case lineComment:
			z.tally.comment++
		case lineContent:
			z.tally.left++
		}
		z.skipLine()
	}
}

// sectionAt reports whether the line in hand begins a list of variables, a
// zone, a title or a record.
func (z *zones) sectionAt() bool {
	kind, i := kindOfLine(z.data, z.at, spaces)
	return kind == lineContent && beginsSection(z.data, i)
}

func beginsSection(data []byte, i int) bool {
	return isHeadingOf(data, i, "variables") || isHeadingOf(data, i, "title") || zoneAt(data, i) >= 0 || isRecord(data, i)
}

// isRecord reports whether a record that is no table stands at offset i: text
// or lines to draw, or remarks for another program.
func isRecord(data []byte, i int) bool {
	word, after := wordAt(data, i)
	switch word {
	case "text", "geometry":
		after = skipSeparators(data, after)
		return atLineEnd(data, after) || isAssignment(data, after)
	case "datasetauxdata", "varauxdata", "auxdata", "customlabels", "userrec":
		return true
	}
	return false
}

// record leaves out a record; offset i is that of its first word.
func (z *zones) record(i int) {
	word, _ := wordAt(z.data, i)
	line, before := z.reader.line, z.tally.left
	z.tally.left++
	z.skipLine()
	if word == "text" || word == "geometry" {
		z.skipSection()
	}
	z.add(notice.New("record-skipped", word, line, z.tally.left-before).At(line))
}

// rows reads the rows that begin at the line in hand as a table.
func (z *zones) rows() {
	h := z.heading
	columns, separator := z.judgeRow(len(z.headers))
	if columns > maxColumns {
		z.refuse(notice.New("columns-many", columns, maxColumns))
		return
	}
	if h.block {
		z.blockRows(columns)
	} else {
		z.pointRows(columns, separator)
	}
	z.heading = heading{}
}

// judgeRow returns the columns of the rows and their separator, judged by the
// line in hand. columns is the length of the list of variables, 0 for none.
func (z *zones) judgeRow(columns int) (int, byte) {
	best, bestNumbers, bestColumns := byte(spaces), -1, max(1, columns)
	for _, separator := range []byte{spaces, ',', '\t', ';'} {
		split := splitter{data: z.data, separator: separator, repeats: true}
		s := sample{separator: separator, cells: z.cells}
		split.split(z.at)
		if split.openQuote >= 0 || split.count == 0 {
			continue
		}
		line := s.look(&split, z.at, z.at)
		count := line.count
		if line.lastVoid && (columns == 0 || count == columns+1) {
			count--
		}
		if columns > 0 && count != columns || line.texts > 0 && separator != spaces {
			continue
		}
		if line.numbers > bestNumbers {
			best, bestNumbers, bestColumns = separator, line.numbers, count
		}
	}
	return bestColumns, best
}

// pointRows reads rows in point order up to the next section.
func (z *zones) pointRows(columns int, separator byte) {
	r, h := z.reader, &z.heading
	at, line := r.at, r.line
	z.before = r.forms
	b := r.newBuilder(columns, separator, z.roomFor(columns))
	b.split.repeats, b.trailing = true, separator != spaces
	if !z.readPoints(b) {
		return
	}
	found := b.rows + b.held.count
	if h.points() > 0 && found != h.points() || b.rows == 0 && b.held.count > 0 {
		if z.wrapped(b, at, line) {
			return
		}
	}
	if h.points() > 0 && found != h.points() {
		code := "zone-count"
		if r.opt.Zones == ZonesAsFound {
			code = "zone-as-found"
		}
		r.add(notice.New(code, h.title(z.number), h.points(), found).At(h.line))
	}
	if t, ok := b.table(h.name, z.columns(columns)); ok {
		z.separatorNotice(separator)
		r.addTable(t, b)
	} else if b.held.count == 0 {
		z.closeHeading()
	}
}

// roomFor returns for how many rows to make room at first. What a heading
// announces is not trusted with much memory.
func (z *zones) roomFor(columns int) int {
	fits := (len(z.data)-z.at)/(2*columns) + 1
	if announced := z.heading.points(); announced > 0 {
		return min(announced, fits, 1<<16)
	}
	return min(1024, fits)
}

// readPoints reads lines into b up to the next section, and reports false
// where the file was refused.
func (z *zones) readPoints(b *builder) bool {
	r := z.reader
	plain := r.cells.decimal != decimalComma
	for r.at < len(r.data) {
		if r.at >= r.tick && !r.progress() {
			return false
		}
		if next := b.plainRow(r.at); plain && next >= 0 {
			b.commit(r.line)
			if b.blank {
				b.noteGap(r.line)
			}
			r.tally.row++
			r.at = next
			r.line++
			continue
		}
		kind, i := kindOfLine(r.data, r.at, b.split.separator)
		switch {
		case kind == lineBlank:
			b.blankLine()
		case kind == lineComment:
			b.comment(i)
		case beginsSection(r.data, i):
			return true
		default:
			if !b.content(true) {
				return false
			}
		}
	}
	return true
}

// columns returns the columns by the list of variables, or numbered ones.
func (z *zones) columns(n int) []Column {
	if z.headers == nil {
		if !z.told {
			z.told = true
			z.add(notice.New("zone-no-variables", n).At(z.heading.line))
		}
		return numbered(n)
	}
	kept := len(z.file.Notices)
	columns := z.named(z.headers, z.line)
	if z.told {
		z.file.Notices = z.file.Notices[:kept]
	}
	z.told = true
	return columns
}

// separatorNotice tells of a separator other than blanks, once.
func (z *zones) separatorNotice(separator byte) {
	if separator != spaces && !z.parted {
		z.parted = true
		z.add(notice.New("delimiter-guessed", separatorName(separator)))
	}
}

// commentStatement keeps what a comment before the first table states.
func (z *zones) commentStatement() {
	if len(z.file.Tables) > 0 {
		return
	}
	if key, value, ok := statement(commentText(z.text(z.at))); ok {
		z.state(key, value, z.reader.line)
	}
}
