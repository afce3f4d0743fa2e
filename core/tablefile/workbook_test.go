package tablefile

import (
	"archive/zip"
	"bytes"
	"fmt"
	"hash/crc32"
	"math"
	"os"
	"path/filepath"
	"runtime"
	"slices"
	"strings"
	"testing"

	"compress/flate"

	"weirmark/core/notice"
)

// workbooks says for each file of testdata/workbook what must be read, as the
// corpus does. LibreOffice wrote them, and openpyxl those without a csv beside
// them: see fixtures.sh there.
var workbooks = []struct{ file, tables, notices string }{
	{"date-1904.xlsx", ``, "header-guessed:1 value-missing:3 value-date:3"},
	{"date.xlsx", ``, "header-guessed:2 value-missing:14 value-date:14"},
	{"digits.xlsx", `"data" 2: x [mm]; Cp; p [Pa] | 0.1 0.123456789012345 101325.25 | 0.2 -1.5e-07 1.23456789e+300 | 0.333333333333333 1.23456789012345e+07 0`, "header-guessed:1"},
	{"formula-no-value.xlsx", ``, "formula-no-value:3"},
	{"gap-column.xlsx", `"data" 3: x; y; z | 1 NaN 3.5 | 2 5 NaN`, "header-guessed:2 value-missing:3 value-missing:4"},
	{"hash-label.xlsx", `"data" 2: tap; cp | NaN"#1" 0.5 | NaN"#2" 0.25 | NaN"%3" -0.5`, "header-guessed:1 value-missing:2"},
	{"hidden.xlsx", `"data" 2: x; a; b | 1 10 100 | 2 20 200 | 3 30 300 | 4 40 400`, "hidden-cells:1 header-guessed:1 hidden-cells:3"},
	{"kinds.xlsx", `"data" 2: x; flag; value; note | 1 NaN"TRUE" 2.5 NaN"a, \"b\"" | 2 NaN"FALSE" NaN NaN"#3 tap" | 3 NaN"TRUE" 3.125 NaN"two lines" | 4 NaN"FALSE" NaN NaN"last"`,
		"header-guessed:1 value-missing:2 value-missing:2 value-missing:3"},
	{"merged.xlsx", `"data" 4: x [mm]; upper Cp; upper Cf; lower Cp; lower Cf | 1 0.5 0.001 0.25 0.002 | 2 0.75 0.003 0.125 0.004`,
		"text-line:1 header-merged:1 header-guessed:3"},
	{"metadata.xlsx", `"run" 6: y [mm]; U [m/s]; k [m2/s2] | 0.5 3.25 0.5 | 1 6.5 0.75 | 2 9.75 0.875`, "statement-line:1 header-guessed:5"},
	{"ranges.xlsx", `"both A1:B5" 4: x; u | 1 10 | 2 20
"both A7:B9" 8: y; w | 5 50 | 6 60
"both D3:E5" 4: x; v | 1.5 0.1 | 2.5 0.2`, "sheet-ranges:0 text-line:1 header-guessed:3 header-guessed:3 header-guessed:7"},
	{"sheets.xlsx", `"upper" 2: x; cp | 0 1 | 0.5 -0.75
"lower, aft" 2: x; cp | 0 1 | 0.5 0.25`, "header-guessed:1 header-guessed:1"},
}

func readFixture(t testing.TB, name string) []byte {
	t.Helper()
	data, err := os.ReadFile(filepath.Join("testdata", "workbook", name))
	if err != nil {
		t.Fatal(err)
	}
	return data
}

func TestWorkbooks(t *testing.T) {
	var listed []string
	for _, c := range workbooks {
		listed = append(listed, c.file)
		t.Run(c.file, func(t *testing.T) {
			data := readFixture(t, c.file)
			f := Read(c.file, data, Options{})
			if tables, notices := render(f); tables != c.tables || notices != c.notices {
				t.Errorf("tables\n%s\nwant\n%s\nnotices\n%s\nwant\n%s", tables, c.tables, notices, c.notices)
			}
			checkFile(t, f, data)
		})
	}
	found, err := filepath.Glob(filepath.Join("testdata", "workbook", "*.xlsx"))
	if err != nil || len(found) != len(listed) {
		t.Errorf("%d workbooks in the folder, %d in the table: %v", len(found), len(listed), err)
	}
}

// TestWorkbookEqualsCSV reads a workbook and what LibreOffice exports of it.
func TestWorkbookEqualsCSV(t *testing.T) {
	for _, c := range []struct{ book, table, csv string }{
		{"digits.xlsx", "data", "digits-data.csv"},
		{"gap-column.xlsx", "data", "gap-column-data.csv"},
		{"hidden.xlsx", "data", "hidden-data.csv"},
		{"metadata.xlsx", "run", "metadata-run.csv"},
		{"sheets.xlsx", "upper", "sheets-upper.csv"},
		{"sheets.xlsx", "lower, aft", "sheets-lower, aft.csv"},
	} {
		book, err := Read(c.book, readFixture(t, c.book), Options{}).Table(c.table)
		if err != nil {
			t.Fatal(err)
		}
		text := Read(c.csv, readFixture(t, c.csv), Options{})
		table, err := text.Table("")
		if err != nil {
			t.Fatal(err)
		}
		columns := table.Columns
		if c.book == "gap-column.xlsx" { // the csv writes the blank column before the range
			columns = columns[1:]
		}
		if len(columns) != len(book.Columns) || table.Rows() != book.Rows() || table.RowLine(0) != book.RowLine(0) {
			t.Errorf("%s: %d columns, %d rows from line %d; csv %d, %d, %d", c.book, len(book.Columns), book.Rows(), book.RowLine(0), len(columns), table.Rows(), table.RowLine(0))
			continue
		}
		for i, want := range columns {
			got := book.Columns[i]
			if got.Name != want.Name || got.Unit != want.Unit || !sameValues(got.Values, want.Values) {
				t.Errorf("%s: column %+v, csv %+v", c.book, got, want)
			}
		}
	}
}

func sameValues(a, b []float64) bool {
	return slices.EqualFunc(a, b, func(v, w float64) bool { return v == w || math.IsNaN(v) && math.IsNaN(w) })
}

// TestHidden answers the question on hidden rows and columns.
func TestHidden(t *testing.T) {
	data := readFixture(t, "hidden.xlsx")
	for _, c := range []struct{ answer, tables, notices string }{
		{IncludeHidden, workbooks[6].tables, "hidden-included:1 header-guessed:1 hidden-included:3"},
		{LeaveOutHidden, `"data" 2: x; b | 1 100 | 4 400`, "hidden-left-out:0 header-guessed:1 blank-lines:5"},
	} {
		f := Read("hidden.xlsx", data, Options{Hidden: c.answer})
		if tables, notices := render(f); tables != c.tables || notices != c.notices {
			t.Errorf("%s: %s\n%s", c.answer, tables, notices)
		}
	}
	left := Read("hidden.xlsx", data, Options{Hidden: LeaveOutHidden})
	if want := "Hidden in the workbook and left out, as stated: column B, row 3, row 4."; left.Notices[0].Text != want {
		t.Errorf("%q, want %q", left.Notices[0].Text, want)
	}
}

// TestRange reads chosen cells.
func TestRange(t *testing.T) {
	data := readFixture(t, "ranges.xlsx")
	for _, c := range []struct{ ref, tables, code string }{
		{"both!D3:E5", `"both" 4: x; v | 1.5 0.1 | 2.5 0.2`, "range-stated"},
		{"both!$A$4:$B$5", `"both" 4: c1; c2 | 1 10 | 2 20`, "range-stated"},
		{"A7:B9", `"both" 8: y; w | 5 50 | 6 60`, "range-stated"},
		{"both", workbooks[10].tables, "sheet-ranges"},
		{"none!A1:B2", "", "range-unknown"},
		{"A1:", "", "range-unknown"},
		{"Z90:Z99", "", "file-empty"},
	} {
		f := Read("ranges.xlsx", data, Options{Range: c.ref})
		if tables, _ := render(f); tables != c.tables || !notice.Has(f.Notices, c.code) {
			t.Errorf("%s: %s, notices %v", c.ref, tables, f.Notices)
		}
	}
}

// TestCellNotices holds the wording and place of stops that name a cell.
func TestCellNotices(t *testing.T) {
	for _, c := range []struct{ file, code, begins string }{
		{"date.xlsx", "value-date", "Cell C14 is a date (2 March 2024) among the numbers of column \"ratio\""},
		{"date-1904.xlsx", "value-date", "Cell B3 is a date (2 March 2024) among the numbers of column \"ratio\""},
		{"formula-no-value.xlsx", "formula-no-value", "Cell B3 has a formula but no stored result"},
	} {
		f := Read(c.file, readFixture(t, c.file), Options{})
		_, err := f.Table("data")
		n, ok := err.(notice.Notice)
		if !ok || n.Code != c.code || !strings.HasPrefix(n.Text, c.begins) || n.Severity != notice.Stop {
			t.Errorf("%s: %v", c.file, err)
		}
	}
}

// Parts of a workbook of our own making, for what other programs do not write.
const (
	rootLinks = `<Relationships><Relationship Id="r1" Type="x/officeDocument" Target="xl/workbook.xml"/></Relationships>`
	bookLinks = `<Relationships><Relationship Id="a" Type="x/worksheet" Target="sheet.xml"/><Relationship Id="b" Type="x/sharedStrings" Target="/xl/texts.xml"/><Relationship Id="c" Type="x/styles" Target="styles.xml"/></Relationships>`
	bookPart  = `<workbook xmlns:r="r"><sheets><sheet name="data" r:id="a"/></sheets></workbook>`
	textPart  = `<sst><si><t>x</t></si><si> <r><t>p</t></r><r><t xml:space="preserve"> (Pa)</t></r><rPh><t>no</t></rPh></si></sst>`
	stylePart = `<styleSheet><numFmts><numFmt numFmtId="170" formatCode="0.00&quot;days&quot;"/><numFmt numFmtId="171" formatCode="d. mmm"/></numFmts><cellStyleXfs><xf numFmtId="14"/></cellStyleXfs><cellXfs><xf numFmtId="0"/><xf numFmtId="14"/><xf numFmtId="170"/><xf numFmtId="171"/></cellXfs></styleSheet>`
)

// sheetSeeds are sheets that hold every kind of cell.
var sheetSeeds = []string{
	`<worksheet><cols><col min="2" max="2" hidden="1"/></cols><sheetData><row r="1"><c r="A1" t="s"><v>0</v></c><c r="B1" t="s"><v>1</v></c></row><row r="2" hidden="1"><c r="A2"><v>1</v></c><c r="B2"><f>A2</f><v>2.5E-3</v></c></row><row r="3"><c r="A3"><v>2</v></c><c r="B3" t="e"><v>#DIV/0!</v></c></row></sheetData><mergeCells><mergeCell ref="A1:A2"/></mergeCells></worksheet>`,
	`<worksheet><sheetData><row><c t="inlineStr"><is><t>x</t></is></c><c t="str"><v>y</v></c></row><row><c><v>1</v></c><c s="1"><v>45000</v></c></row><row><c><v>1</v></c><c t="b"><v>1</v></c></row></sheetData></worksheet>`,
	`<worksheet><sheetData><row r="9"><c r="D9"><f>1+1</f><v></v></c></row></sheetData></worksheet>`,
}

// makeBook puts a sheet into a workbook of one sheet, named data.
func makeBook(sheet string) []byte {
	return makeArchive(map[string]string{
		"_rels/.rels": rootLinks, "xl/workbook.xml": bookPart, "xl/_rels/workbook.xml.rels": bookLinks,
		"xl/texts.xml": textPart, "xl/styles.xml": stylePart, "xl/sheet.xml": sheet,
	})
}

func makeArchive(parts map[string]string) []byte {
	var out bytes.Buffer
	w := zip.NewWriter(&out)
	var names []string
	for name := range parts {
		names = append(names, name)
	}
	slices.Sort(names)
	for _, name := range names {
		part, err := w.Create(name)
		if err == nil {
			_, err = part.Write([]byte(parts[name]))
		}
		if err != nil {
			panic(err)
		}
	}
	if err := w.Close(); err != nil {
		panic(err)
	}
	return out.Bytes()
}

// rowsXML writes a sheet from rows of cells written out.
func rowsXML(rows ...string) string {
	return "<worksheet><sheetData><row>" + strings.Join(rows, "</row><row>") + "</row></sheetData></worksheet>"
}

// TestMadeSheets reads sheets of our own making.
func TestMadeSheets(t *testing.T) {
	head := `<c t="s"><v>0</v></c><c t="s"><v>1</v></c>`
	for _, c := range []struct{ name, sheet, tables, notices string }{
		{"all digits as stored", rowsXML(head, `<c><v>0.30000000000000004</v></c><c><v>5E-324</v></c>`, `<c><v>1.7976931348623157E+308</v></c><c><v>-0.1000000000000000055511151231257827</v></c>`),
			`"data" 2: x; p [Pa] | 0.30000000000000004 5e-324 | 1.7976931348623157e+308 -0.1`, "header-guessed:1"},
		{"a format with a quoted word is no date", rowsXML(head, `<c s="2"><v>1.5</v></c><c s="9"><v>2</v></c>`), `"data" 2: x; p [Pa] | 1.5 2`, "header-guessed:1"},
		{"a stored blank text of a formula", rowsXML(head, `<c><v>1</v></c><c t="str"><f>IF(1,"")</f><v></v></c>`, `<c><v>1</v></c><c><v>2</v></c>`), `"data" 2: x; p [Pa] | 1 NaN | 1 2`, "header-guessed:1 value-missing:2"},
		{"formula without value", rowsXML(head, `<c><v>1</v></c><c><f>A2</f><v/></c>`), ``, "formula-no-value:2"},
		{"day and month by a format of its own", rowsXML(head, `<c><v>1</v></c><c s="3"><v>45353</v></c>`, `<c><v>1</v></c><c><v>2</v></c>`), ``, "header-guessed:1 value-missing:2 value-date:2"},
		{"a new kind of error in the first column", rowsXML(head, `<c t="e"><v>#SPILL!</v></c><c><v>2</v></c>`, `<c><v>3</v></c><c><v>4</v></c>`), `"data" 2: x; p [Pa] | NaN"#SPILL!" 2 | 3"3" 4`, "header-guessed:1 value-missing:2"},
		{"text with a decimal comma", rowsXML(head, `<c t="str"><v>0,125</v></c><c><v>2.5</v></c>`), `"data" 2: x; p [Pa] | 0.125 2.5`, "header-guessed:1 decimal-comma:2"},
		{"zones pasted into one column", rowsXML(`<c t="str"><v>VARIABLES = x y</v></c>`, `<c t="str"><v>ZONE T="a"</v></c>`, `<c t="str"><v>1 2</v></c>`), `"a" 3: x; y | 1 2`, ""},
		{"rows pasted into one column", rowsXML(`<c t="str"><v>x y</v></c>`, `<c t="str"><v>1 2.5</v></c>`), `"data" 2: x; y | 1 2.5`, "delimiter-guessed:0 header-guessed:1"},
		{"nothing", `<worksheet/>`, ``, "file-empty:0"},
		{"a lone text far away", `<worksheet><sheetData><row r="2"><c r="B2"><v>1</v></c><c r="C2"><v>2</v></c></row><row r="7"><c r="XFD7" t="str"><v>far</v></c></row></sheetData></worksheet>`,
			`"data" 2: c1; c2 | 1 2`, "header-none:0 text-line:7"},
	} {
		data := makeBook(c.sheet)
		f := Read("made", data, Options{})
		if tables, notices := render(f); tables != c.tables || notices != c.notices {
			t.Errorf("%s: tables\n%s\nnotices %s", c.name, tables, notices)
		}
		checkFile(t, f, data)
	}
}

// TestWorkbookRefusals holds what is refused, with its reason, and that little
// memory is spent on it.
func TestWorkbookRefusals(t *testing.T) {
	deep := strings.Repeat("<a>", 1000)
	million := `<worksheet><sheetData><row r="1">` + strings.Repeat(`<c><v>1</v></c>`, 1_000_000) + `</row></sheetData></worksheet>`
	for _, c := range []struct {
		name, says string
		data       []byte
	}{
		{"announced size", "1099511627776 bytes in part \"xl/sheet.xml\", unpacked from 25", bomb(1<<40, 1000)},
		{"size not announced", "zip: not a valid zip file", bomb(1000, 20<<20)},
		{"one long text", "has more than 1048576 bytes", bomb(20<<20, 20<<20)},
		{"entities", "declares a document type", makeBook(`<!DOCTYPE a [<!ENTITY b "cc"><!ENTITY d "&b;&b;">]><worksheet>&d;</worksheet>`)},
		{"undeclared entity", "invalid character entity", makeBook(`<worksheet>&d;</worksheet>`)},
		{"deep", "more than 64 deep", makeBook("<worksheet>" + deep)},
		{"a million columns", "columns-many: The first rows have 16385 columns", makeBook(million)},
		{"a far column", "columns-many: The first rows have 475254", makeBook(`<worksheet><sheetData><row r="1"><c r="ZZZZ1"><v>1</v></c></row></sheetData></worksheet>`)},
		{"a far row", "workbook-large: The workbook holds more than is read: row 99999999", makeBook(`<worksheet><sheetData><row r="99999999"><c><v>1</v></c></row></sheetData></worksheet>`)},
		{"corners", "workbook-large: The workbook holds more than is read: the range A1:T1048576", makeBook(corners(20))},
		{"twice", "gives cell A1 twice", makeBook(`<worksheet><sheetData><row r="1"><c r="A1"><v>1</v></c><c r="A1"><v>2</v></c></row></sheetData></worksheet>`)},
		{"other row", `cell "A2" stands in row 1`, makeBook(`<worksheet><sheetData><row r="1"><c r="A2"><v>1</v></c></row></sheetData></worksheet>`)},
		{"no shared text", `no shared text "7"`, makeBook(`<worksheet><sheetData><row><c t="s"><v>7</v></c></row></sheetData></worksheet>`)},
		{"cut", "unexpected EOF", makeBook(`<worksheet><sheetData><row>`)},
		{"no workbook", "holds no workbook", makeArchive(map[string]string{"a.txt": "1 2"})},
		{"no sheet part", "is missing", makeArchive(map[string]string{"_rels/.rels": rootLinks, "xl/workbook.xml": bookPart, "xl/_rels/workbook.xml.rels": bookLinks})},
	} {
		var before, after runtime.MemStats
		runtime.ReadMemStats(&before)
		f := Read("bad", c.data, Options{})
		runtime.ReadMemStats(&after)
		said := ""
		for _, n := range f.Notices {
			said += n.Code + ": " + n.Text + "\n"
		}
		if !f.Refused() || !strings.Contains(said, c.says) {
			t.Errorf("%s: %d tables, %s", c.name, len(f.Tables), said)
		}
		if spent := after.TotalAlloc - before.TotalAlloc; spent > 24<<20 {
			t.Errorf("%s: %d bytes were spent", c.name, spent)
		}
	}
}

// bomb returns a workbook whose sheet announces and unpacks to so many bytes.
func bomb(announced uint64, unpacked int) []byte {
	sheet := append([]byte("<worksheet>"), bytes.Repeat([]byte(" "), unpacked)...)
	var packed bytes.Buffer
	w, _ := flate.NewWriter(&packed, 9)
	w.Write(sheet)
	w.Close()
	var out bytes.Buffer
	z := zip.NewWriter(&out)
	for _, part := range [][2]string{{"_rels/.rels", rootLinks}, {"xl/workbook.xml", bookPart}, {"xl/_rels/workbook.xml.rels", bookLinks}, {"xl/texts.xml", textPart}, {"xl/styles.xml", stylePart}} {
		p, _ := z.Create(part[0])
		p.Write([]byte(part[1]))
	}
	p, _ := z.CreateRaw(&zip.FileHeader{Name: "xl/sheet.xml", Method: zip.Deflate, CRC32: crc32.ChecksumIEEE(sheet),
		CompressedSize64: uint64(packed.Len()), UncompressedSize64: announced})
	p.Write(packed.Bytes())
	z.Close()
	return out.Bytes()
}

// corners returns a sheet with cells in its first and last row only.
func corners(columns int) string {
	row := func(at int) string {
		text := fmt.Sprintf(`<row r="%d">`, at)
		for range columns {
			text += `<c><v>1</v></c>`
		}
		return text + "</row>"
	}
	return "<worksheet><sheetData>" + row(1) + row(sheetRows) + "</sheetData></worksheet>"
}

func TestCellReference(t *testing.T) {
	for _, c := range []struct {
		row, column int
		ref         string
	}{{1, 1, "A1"}, {14, 3, "C14"}, {7, 26, "Z7"}, {7, 27, "AA7"}, {1048576, 16384, "XFD1048576"}} {
		row, column, ok := parseReference(c.ref)
		if got := cellReference(c.row, c.column); got != c.ref || row != c.row || column != c.column || !ok {
			t.Errorf("%d, %d: %s; %s: %d, %d, %v", c.row, c.column, got, c.ref, row, column, ok)
		}
	}
	for _, bad := range []string{"", "A", "1", "A0", "A1B", "$", "A-1", "ABCDEFGHIJ1", "A9999999999"} {
		if row, column, ok := parseReference(bad); ok {
			t.Errorf("%q: %d, %d", bad, row, column)
		}
	}
}

// TestHiddenSheet asks about a hidden sheet, and leaves it out where that is
// the answer. Notices of a workbook of several sheets name theirs.
func TestHiddenSheet(t *testing.T) {
	sheet := rowsXML(`<c t="str"><v>x</v></c><c t="str"><v>y</v></c>`, `<c><v>1</v></c><c><v>2</v></c>`)
	data := makeArchive(map[string]string{
		"_rels/.rels": rootLinks, "xl/texts.xml": textPart, "xl/styles.xml": stylePart, "xl/sheet.xml": sheet, "xl/other.xml": sheet,
		"xl/workbook.xml":            `<workbook xmlns:r="r"><sheets><sheet name="data" r:id="a"/><sheet name="old" state="veryHidden" r:id="d"/></sheets></workbook>`,
		"xl/_rels/workbook.xml.rels": strings.Replace(bookLinks, "</R", `<Relationship Id="d" Type="x/worksheet" Target="other.xml"/></R`, 1),
	})
	for _, c := range []struct {
		answer, code string
		tables       int
		text         string
	}{
		{"", "hidden-cells", 2, "Sheet \"old\": Hidden in the workbook: the sheet \"old\". They were read. Do they belong to the data? Include them or leave them out."},
		{IncludeHidden, "hidden-included", 2, "Sheet \"old\": Hidden in the workbook and read, as stated: the sheet \"old\"."},
		{LeaveOutHidden, "hidden-left-out", 1, "Hidden in the workbook and left out, as stated: the sheet \"old\"."},
	} {
		f := Read("book", data, Options{Hidden: c.answer})
		at := slices.IndexFunc(f.Notices, func(n notice.Notice) bool { return n.Code == c.code })
		if len(f.Tables) != c.tables || at < 0 || f.Notices[at].Text != c.text {
			t.Errorf("%q: %d tables, notices %v", c.answer, len(f.Tables), f.Notices)
		}
		checkFile(t, f, data)
	}
}
