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
	refused  bool // a stop notice for the whole file was raised

	tally    tally
	passed   tellOnce // lines of text passed over
	disabled tellOnce // comments that look like rows
	gaps     tellOnce // blank lines between rows
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
	held    int // held back, notice column-count
	left    int // of a zone or record left out
}

// tellOnce gathers findings of one kind into one notice.
type tellOnce struct {
	count int
	line  int // of the first
	first string
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
	b = bytes.TrimSpace(b)
	if len(b) <= 60 {
		return string(b)
	}
	return string(bytes.ToValidUTF8(b[:60], nil)) + " ..."
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

// read reads the text in data, whichever kind of table it holds.
func (r *reader) read() {
	r.line = 1
	if r.looksZoned() || r.delimited() == foundZones {
		r.zoned()
	}
	r.summarise()
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
	if f.comma.count > 0 {
		r.add(notice.New("decimal-comma", f.comma.first, formatValue(f.comma.value), f.comma.count).At(f.comma.line))
	}
	if f.thousands.count > 0 {
		r.add(notice.New("number-thousands", f.thousands.first, formatValue(f.thousands.value), f.thousands.count).At(f.thousands.line))
	}
	lines := func(code string, t *tellOnce) {
		if t.count > 0 {
			r.add(notice.New(code, t.count, t.first).At(t.line))
		}
	}
	lines("text-line", &r.passed)
	lines("comment-row", &r.disabled)
	if r.gaps.count > 0 {
		r.add(notice.New("blank-lines", r.gaps.count).At(r.gaps.line))
	}
	if len(r.file.Tables) == 0 && !notice.Any(r.file.Notices, notice.Stop) {
		r.add(notice.New("file-empty", r.tally.String()))
	}
}

// String tells the lines that were seen in a file without rows.
func (t tally) String() string {
	text := ""
	for _, part := range []struct {
		count int
		name  string
	}{{t.header, "header line"}, {t.comment, "comment line"}, {t.text, "line of text"}, {t.held, "row held back"}, {t.left, "line left out"}} {
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
