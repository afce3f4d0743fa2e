package tablefile

import (
	"bytes"
	"fmt"
	"slices"
	"strconv"
	"strings"

	"weirmark/core/notice"
)

// reader walks the text of one file. at is the offset of the line in hand and
// line its number, counted from one.
type reader struct {
	file     File
	data     []byte // UTF-8
	returns  bool   // data holds carriage returns
	at, line int
	first    int  // line that data begins with, counted from one
	refused  bool // a stop notice for the whole file was raised
	opt      Options
	answers
	strict     bool    // the guides are a guess
	statements bool    // lines above the rows may state a key and a value
	tick       int     // offset at which progress is told next
	room       int     // cells that further ranges of a sheet may have
	region     *region // of the workbook the text is from, else nil

	tally    tally
	passed   tellOnce // lines of text passed over
	disabled tellOnce // comments that look like rows
	gaps     tellOnce // blank lines between rows
	stated   tellOnce // lines of a key and a value
	forms    forms
}

// tally counts the lines of the file by what became of them. Their sum is the
// number of lines, which tests hold it to.
type tally struct {
	row     int // read, or read as part of a row
	header  int // names, units, titles, zone headings
	comment int
	blank   int
	text    int // passed over, notice text-line
	stated  int // key and value, notice statement-line
	held    int // held back, notice column-count
	left    int // of a zone or record left out
}

// tellOnce gathers findings of one kind into one notice.
type tellOnce struct {
	count int
	line  int // of the first
	first string
}

// add adds the lines of another text.
func (t *tally) add(o tally) {
	t.row += o.row
	t.header += o.header
	t.comment += o.comment
	t.blank += o.blank
	t.text += o.text
	t.stated += o.stated
	t.held += o.held
	t.left += o.left
}

func (t *tellOnce) tell(line int, text []byte) {
	if t.count == 0 {
		t.line, t.first = line, excerpt(text)
	}
	t.count++
}

// forms counts numbers that were not written plainly.
type forms struct {
	fortran, signs, comma, thousands numberForm
}

// numberForm is a tellOnce with the value the first number was read as.
type numberForm struct {
	tellOnce
	value float64
}

func (f *numberForm) tell(line int, text []byte, value float64) {
	if f.count == 0 {
		f.value = value
	}
	f.tellOnce.tell(line, text)
}

func (f *forms) tell(form cellForm, line int, text []byte, value float64) {
	if form&formFortran != 0 {
		f.fortran.tell(line, text, value)
	}
	if form&formSign != 0 {
		f.signs.tell(line, text, value)
	}
	if form&formComma != 0 {
		f.comma.tell(line, text, value)
	}
	if form&formThousands != 0 {
		f.thousands.tell(line, text, value)
	}
}

// excerpt returns the text of a notice about b: at most 60 bytes of it.
func excerpt(b []byte) string {
	b = bytes.Trim(b, " \t\r\n\x1f")
	tail := ""
	if len(b) > 60 {
		b, tail = bytes.ToValidUTF8(b[:60], nil), " ..."
	}
	return strings.ReplaceAll(string(b), string(rune(cellMark)), " | ") + tail
}

// add records a notice of this file.
func (r *reader) add(n notice.Notice) {
	r.file.Notices = append(r.file.Notices, n.In(r.file.Name))
}

// refuse records a stop notice for the whole file.
func (r *reader) refuse(n notice.Notice) {
	r.refused = true
	r.add(n)
}

// progressBytes is how much is read between two calls of Options.Progress.
const progressBytes = 1 << 20

// progress tells how far the reading is and reports whether to go on.
func (r *reader) progress() bool {
	r.tick = r.at + progressBytes
	if r.opt.Progress == nil || r.opt.Progress(r.at, len(r.data)) {
		return true
	}
	r.refuse(notice.New("read-ended", r.at, len(r.data)))
	return false
}

// read reads the text in data, whichever kind of table it holds.
func (r *reader) read() {
	r.line, r.first = 1, 1
	if len(r.guides) == 0 && r.looksZoned() || r.delimited() == foundZones {
		r.zoned()
	}
	r.summarise()
	r.closeEmpty()
}

// closeEmpty tells of a file without rows.
func (r *reader) closeEmpty() {
	if len(r.file.Tables) == 0 && !notice.Any(r.file.Notices, notice.Stop) {
		r.add(notice.New("file-empty", r.tally.String()))
	}
}

// addTable adds the finished table of b, or leaves it out where a stop notice
// was raised for one of its cells. name is that for a reference to it.
func (r *reader) addTable(t Table, b *builder) {
	if b.stop == nil {
		r.file.Tables = append(r.file.Tables, t)
		return
	}
	r.tally.left += r.tally.row - b.rowsBefore
	r.tally.row = b.rowsBefore
	r.file.leftOut = append(r.file.leftOut, leftOut{t.Name, b.stop.In(r.file.Name)})
}

// summarise turns what was gathered over the whole file into notices.
func (r *reader) summarise() {
	f := &r.forms
	numbers := func(code string, n *numberForm) {
		if n.count > 0 {
			r.add(notice.New(code, n.count, n.first, formatValue(n.value)).At(n.line))
		}
	}
	numbers("number-fortran", &f.fortran)
	numbers("number-signs", &f.signs)
	switch {
	case f.comma.count > 0 && r.cells.decimal == decimalComma:
		numbers("decimal-stated", &f.comma)
	case f.comma.count > 0:
		r.add(notice.New("decimal-comma", f.comma.first, formatValue(f.comma.value), f.comma.count).At(f.comma.line))
	}
	switch {
	case f.thousands.count > 0 && r.cells.decimal != decimalOpen:
		numbers("groups-stated", &f.thousands)
	case f.thousands.count > 0:
		r.add(notice.New("number-thousands", f.thousands.first, formatValue(f.thousands.value), f.thousands.count).At(f.thousands.line))
	}
	lines := func(code string, t *tellOnce) {
		if t.count > 0 {
			r.add(notice.New(code, t.count, t.first).At(t.line))
		}
	}
	lines("text-line", &r.passed)
	lines("comment-row", &r.disabled)
	lines("statement-line", &r.stated)
	if r.gaps.count > 0 {
		r.add(notice.New("blank-lines", r.gaps.count).At(r.gaps.line))
	}
}

// String tells the lines that were seen in a file without rows.
func (t tally) String() string {
	text := ""
	for _, part := range []struct {
		count int
		name  string
	}{{t.header, "header line"}, {t.comment, "comment line"}, {t.text + t.stated, "line of text"}, {t.held, "row held back"}, {t.left, "line left out"}} {
		if part.count > 0 {
			text += ", " + plural(part.count, part.name)
		}
	}
	if text == "" {
		return "nothing but blanks"
	}
	return text[2:]
}

func plural(n int, name string) string {
	if n == 1 {
		return "1 " + name
	}
	for _, word := range []string{"line", "row"} {
		if rest, ok := strings.CutPrefix(name, word+" "); ok {
			return fmt.Sprintf("%d %ss %s", n, word, rest)
		}
	}
	return fmt.Sprintf("%d %ss", n, name)
}

// close returns the finished file.
func (r *reader) close() File {
	if r.refused {
		r.file.Tables, r.file.leftOut = nil, nil
	}
	r.file.tally = r.tally
	slices.SortStableFunc(r.file.Notices, func(a, b notice.Notice) int { return a.Line - b.Line })
	return r.file
}

func formatValue(v float64) string { return strconv.FormatFloat(v, 'g', -1, 64) }
