package tablefile

import (
	"archive/zip"
	"bytes"
	"encoding/xml"
	"errors"
	"fmt"
	"io"
	"path"
	"strconv"
	"strings"

	"weirmark/core/notice"
)

// Limits of a workbook. What its parts announce is held to them before they
// are unpacked.
const (
	maxUnpacked = 256 << 20 // bytes of all parts that are read
	maxShared   = 64 << 20  // bytes of the table of texts
	maxListed   = 4 << 20   // bytes of a part that lists others, or styles
	maxCells    = 4 << 20   // cells of a sheet that hold something, and shared texts
	maxToken    = 1 << 20   // bytes of one tag or one text
	maxDepth    = 64        // elements in each other
	maxSheets   = 500
)

// isArchive reports whether data begins as the zip archive that a workbook is.
func isArchive(data []byte) bool { return bytes.HasPrefix(data, []byte("PK\x03\x04")) }

// workbook reads the sheets of a workbook (ECMA-376, "xlsx"): every range of
// every sheet is a table. Numbers are read from the digits that are stored,
// formulas by the result that is stored.
func (r *reader) workbook(data []byte) {
	err := r.readWorkbook(data)
	if err != nil {
		n, ok := err.(notice.Notice)
		if !ok {
			n = notice.New("workbook-damaged", err.Error())
		}
		r.refuse(n)
		return
	}
	r.closeEmpty()
}

func (r *reader) readWorkbook(data []byte) error {
	archive, err := zip.NewReader(bytes.NewReader(data), int64(len(data)))
	if err != nil {
		return err
	}
	b := &book{parts: map[string]*zip.File{}, room: maxUnpacked}
	for _, f := range archive.File {
		b.parts[strings.TrimPrefix(f.Name, "/")] = f
	}
	if err := b.open(); err != nil {
		return err
	}
	wanted, cells, err := b.wanted(r.opt.Range)
	if err != nil {
		return err
	}
	for i, s := range wanted {
		if r.opt.Progress != nil && !r.opt.Progress(i, len(wanted)) {
			return notice.New("read-ended", i, len(wanted))
		}
		if s.hidden && r.opt.Hidden == LeaveOutHidden {
			r.add(notice.New("hidden-left-out", fmt.Sprintf("the sheet %q", s.name)))
			continue
		}
		grid, err := b.readSheet(s)
		if err != nil {
			return err
		}
		kept := len(r.file.Notices)
		r.sheet(grid, cells)
		if len(b.sheets) > 1 {
			for i := range r.file.Notices[kept:] {
				n := &r.file.Notices[kept+i]
				n.Text = fmt.Sprintf("Sheet %q: %s", s.name, n.Text)
			}
		}
	}
	return nil
}

// book is a workbook whose parts are known and not yet read.
type book struct {
	parts     map[string]*zip.File
	room      int64 // bytes that may still be unpacked
	sheets    []sheetEntry
	texts     []string // shared by the cells
	dates     []bool   // of the cell styles
	since1904 bool
}

// sheetEntry is a sheet as the workbook lists it.
type sheetEntry struct {
	name, part string
	hidden     bool
}

// errNoWorkbook says that an archive holds something else.
var errNoWorkbook = errors.New("the archive holds no workbook")

// open reads the list of sheets, the shared texts and the styles.
func (b *book) open() error {
	main := ""
	links, err := b.links("")
	if err != nil {
		return err
	}
	for _, l := range links {
		if strings.HasSuffix(l.kind, "/officeDocument") {
			main = l.part
		}
	}
	if b.parts[main] == nil {
		return errNoWorkbook
	}
	targets := map[string]string{}
	if links, err = b.links(main); err != nil {
		return err
	}
	for _, l := range links {
		switch path.Base(l.kind) {
		case "worksheet":
			targets[l.id] = l.part
		case "sharedStrings":
			err = b.readTexts(l.part)
		case "styles":
			err = b.readStyles(l.part)
		}
		if err != nil {
			return err
		}
	}
	return b.readList(main, targets)
}

// link is a reference from one part to another.
type link struct{ id, kind, part string }

// links reads the references of a part, "" being the archive itself.
func (b *book) links(of string) ([]link, error) {
	dir, name := path.Split(of)
	part := path.Join(dir, "_rels", name+".rels")
	if b.parts[part] == nil {
		if of == "" {
			return nil, errNoWorkbook
		}
		return nil, nil
	}
	var links []link
	err := b.walk(part, maxListed, func(d *partReader, e xml.StartElement) error {
		if e.Name.Local == "Relationship" {
			target := attribute(e, "Target")
			if !strings.HasPrefix(target, "/") {
				target = path.Join(dir, target)
			}
			links = append(links, link{attribute(e, "Id"), attribute(e, "Type"), strings.TrimPrefix(target, "/")})
		}
		return nil
	})
	return links, err
}

// readList reads the sheets and the date system.
func (b *book) readList(main string, targets map[string]string) error {
	return b.walk(main, maxListed, func(d *partReader, e xml.StartElement) error {
		switch e.Name.Local {
		case "workbookPr":
			b.since1904 = isTrue(attribute(e, "date1904"))
		case "sheet":
			id := ""
			for _, a := range e.Attr {
				if a.Name.Local == "id" && a.Name.Space != "" {
					id = a.Value
				}
			}
			if part := targets[id]; part != "" { // else a sheet of a chart
				state := attribute(e, "state")
				b.sheets = append(b.sheets, sheetEntry{attribute(e, "name"), part, state == "hidden" || state == "veryHidden"})
			}
			if len(b.sheets) > maxSheets {
				return notice.New("workbook-large", fmt.Sprintf("more than %d sheets", maxSheets))
			}
		}
		return nil
	})
}

// wanted returns the sheets and the cells that a range names: all for "".
func (b *book) wanted(ref string) ([]sheetEntry, area, error) {
	if ref == "" {
		return b.sheets, everything, nil
	}
	name, cells := "", ref
	if at := strings.LastIndexByte(ref, '!'); at >= 0 {
		name, cells = strings.Trim(ref[:at], "'"), ref[at+1:]
	}
	for _, s := range b.sheets {
		if s.name == ref {
			return []sheetEntry{s}, everything, nil
		}
	}
	a, ok := parseArea(cells)
	if !ok {
		return nil, area{}, notice.New("range-unknown", ref, b.listSheets())
	}
	if name == "" {
		return b.sheets, a, nil
	}
	for _, s := range b.sheets {
		if s.name == name {
			return []sheetEntry{s}, a, nil
		}
	}
	return nil, area{}, notice.New("range-unknown", ref, b.listSheets())
}

func (b *book) listSheets() string {
	names := make([]string, len(b.sheets))
	for i, s := range b.sheets {
		names[i] = s.name
	}
	return listNames(names)
}

// readTexts reads the texts that cells share.
func (b *book) readTexts(part string) error {
	return b.walk(part, maxShared, func(d *partReader, e xml.StartElement) error {
		if e.Name.Local == "si" {
			text, err := itemText(d)
			if err != nil {
				return err
			}
			if len(b.texts) == maxCells {
				return notice.New("workbook-large", fmt.Sprintf("more than %d texts", maxCells))
			}
			b.texts = append(b.texts, text)
		}
		return nil
	})
}

// readStyles finds out which cell styles show dates.
func (b *book) readStyles(part string) error {
	formats := map[string]string{}
	inside := false
	return b.walk(part, maxListed, func(d *partReader, e xml.StartElement) error {
		switch e.Name.Local {
		case "numFmt":
			formats[attribute(e, "numFmtId")] = attribute(e, "formatCode")
		case "cellStyleXfs", "cellStyles", "dxfs":
			inside = false
		case "cellXfs":
			inside = true
		case "xf":
			if inside {
				id := attribute(e, "numFmtId")
				format, own := formats[id]
				number, _ := strconv.Atoi(id)
				b.dates = append(b.dates, own && isDateFormat(format) || !own && isDateNumber(number))
			}
		}
		return nil
	})
}

// walk unpacks a part and hands every start tag to use, which may read on up
// to its end. Parts that announce more than limit, or more than the room left
// for all, are refused before they are unpacked.
func (b *book) walk(name string, limit int64, use func(*partReader, xml.StartElement) error) error {
	f := b.parts[name]
	if f == nil {
		return fmt.Errorf("the part %q is missing", name)
	}
	size := int64(min(f.UncompressedSize64, 1<<62))
	if size > limit || size > b.room {
		return notice.New("workbook-large", fmt.Sprintf("%d bytes in part %q, unpacked from %d", f.UncompressedSize64, name, f.CompressedSize64))
	}
	b.room -= size
	packed, err := f.Open()
	if err != nil {
		return fmt.Errorf("part %q: %w", name, err)
	}
	defer packed.Close()
	from := &bounded{from: packed}
	d := &partReader{xml: xml.NewDecoder(from), from: from}
	for {
		token, err := d.token()
		if err == io.EOF {
			return nil
		}
		if start, is := token.(xml.StartElement); err == nil && is {
			err = use(d, start)
		}
		if _, told := err.(notice.Notice); told {
			return err
		}
		if err != nil {
			return fmt.Errorf("part %q: %w", name, err)
		}
	}
}

// partReader walks the XML of a part within the limits.
type partReader struct {
	xml  *xml.Decoder
	from *bounded
	open []string // local names of the elements not yet closed
}

// token returns the next token. Prefixes of names are left aside: the local
// names of the format are its own. Declared document types are refused: they may
// hold entities that expand.
func (p *partReader) token() (xml.Token, error) {
	p.from.since = 0
	token, err := p.xml.RawToken()
	if err == io.EOF && len(p.open) > 0 {
		return nil, io.ErrUnexpectedEOF
	}
	switch t := token.(type) {
	case xml.Directive:
		return nil, errors.New("it declares a document type, and with it perhaps entities that expand")
	case xml.StartElement:
		if p.open = append(p.open, t.Name.Local); len(p.open) > maxDepth {
			return nil, fmt.Errorf("elements stand in each other more than %d deep", maxDepth)
		}
	case xml.EndElement:
		last := len(p.open) - 1
		if last < 0 || p.open[last] != t.Name.Local {
			return nil, fmt.Errorf("</%s> closes nothing", t.Name.Local)
		}
		p.open = p.open[:last]
	}
	return token, err
}

// skip passes over the element just begun.
func (p *partReader) skip() error {
	for end := len(p.open) - 1; len(p.open) > end; {
		if _, err := p.token(); err != nil {
			return err
		}
	}
	return nil
}

// bounded reads at most maxToken bytes for one token; more is an error. That a
// part unpacks to no more than it announces is seen to by archive/zip.
type bounded struct {
	from  io.Reader
	since int // bytes read since a token was asked for
}

func (b *bounded) Read(p []byte) (int, error) {
	n, err := b.from.Read(p)
	if b.since += n; b.since > maxToken {
		return 0, fmt.Errorf("one tag or text has more than %d bytes", maxToken)
	}
	return n, err
}

// itemText returns the text of a string item up to its end: of all its runs,
// without phonetic hints.
func itemText(d *partReader) (string, error) {
	var text strings.Builder
	for depth, hint, inside := 1, 0, 0; depth > 0; {
		token, err := d.token()
		if err != nil {
			return "", err
		}
		switch t := token.(type) {
		case xml.StartElement:
			depth++
			if hint > 0 || t.Name.Local == "rPh" {
				hint++
			}
			if t.Name.Local == "t" {
				inside = depth
			}
		case xml.EndElement:
			if depth == inside {
				inside = 0
			}
			depth--
			hint = max(0, hint-1)
		case xml.CharData:
			if hint == 0 && inside > 0 {
				text.Write(t)
			}
		}
	}
	return text.String(), nil
}

func attribute(e xml.StartElement, name string) string {
	for _, a := range e.Attr {
		if a.Name.Local == name && a.Name.Space == "" {
			return a.Value
		}
	}
	return ""
}

func isTrue(value string) bool { return value == "1" || value == "true" }
