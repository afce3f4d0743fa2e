package tablefile

import (
	"bytes"
	"errors"
	"os"
	"path/filepath"
	"slices"
	"strings"
	"testing"

	"weirmark/core/notice"
)

// checkFile holds a file that was read to what holds for every input.
func checkFile(t *testing.T, f File, data []byte) {
	t.Helper()
	if f.Size != len(data) || len(f.SHA256) != 64 {
		t.Errorf("size %d, hash %q", f.Size, f.SHA256)
	}
	for _, n := range f.Notices {
		if n.File != f.Name || n.Line < 0 || !bytes.ContainsRune(data, '%') && strings.Contains(n.Text, "%!") {
			t.Errorf("notice %+v", n)
		}
	}
	if len(f.Tables) == 0 && !f.Refused() {
		t.Error("no table and no stop notice")
	}
	if f.Refused() {
		if _, err := f.Table(""); !isStop(err) {
			t.Errorf("table of a refused file: %v", err)
		}
	}
	rows := 0
	for i, table := range f.Tables {
		rows += table.Rows()
		checkTable(t, i, table)
	}
	if !wholeFileStop(f) {
		checkAccount(t, f, rows, data)
	}
}

func checkTable(t *testing.T, i int, table Table) {
	t.Helper()
	if table.Rows() == 0 {
		t.Errorf("table %d has no rows", i)
		return
	}
	names := map[string]bool{}
	for _, c := range table.Columns {
		if len(c.Values) != table.Rows() || c.Text != nil && len(c.Text) != table.Rows() {
			t.Errorf("table %d column %q: %d values, %d texts, %d rows", i, c.Name, len(c.Values), len(c.Text), table.Rows())
		}
		if c.Name == "" || names[c.Name] {
			t.Errorf("table %d: name %q empty or taken", i, c.Name)
		}
		names[c.Name] = true
		if found, err := table.Column(c.Name); err != nil || found.Name != c.Name {
			t.Errorf("table %d: column %q looked up: %q, %v", i, c.Name, found.Name, err)
		}
	}
	if table.RowLine(0) != table.Line {
		t.Errorf("table %d: first line %d, row 0 on line %d", i, table.Line, table.RowLine(0))
	}
	for row := 1; row < table.Rows(); row++ {
		if table.RowLine(row) < table.RowLine(row-1) {
			t.Errorf("table %d: row %d on line %d before row %d", i, row, table.RowLine(row), row-1)
			break
		}
	}
	_, err := table.Column("no such column")
	var n notice.Notice
	if !errors.As(err, &n) || n.Code != "column-unknown" {
		t.Errorf("unknown column: %v", err)
	}
}

// checkAccount holds the tally of lines to a count of its own, and what is
// not in a table to a notice.
func checkAccount(t *testing.T, f File, rows int, data []byte) {
	t.Helper()
	a := f.tally
	total := a.row + a.header + a.comment + a.blank + a.text + a.stated + a.held + a.left
	lines := f.lines // of the ranges of a workbook
	if !isArchive(data) {
		lines = countLines(data)
	}
	if total != lines && !notice.Has(f.Notices, "encoding-utf16") && !isProfile(data) {
		t.Errorf("%d lines accounted for (%+v), the file has %d", total, a, lines)
	}
	if a.held > 0 && !notice.Has(f.Notices, "column-count") && !notice.Has(f.Notices, "rows-left-out") {
		t.Error("rows held back without a notice")
	}
	if a.text > 0 && !notice.Has(f.Notices, "text-line") {
		t.Error("text passed over without a notice")
	}
	if a.stated > 0 && (!notice.Has(f.Notices, "statement-line") || len(f.Meta) == 0) {
		t.Error("statements kept without a notice")
	}
	if a.left > 0 && !notice.Any(f.Notices, notice.Stop) && !notice.Has(f.Notices, "record-skipped") {
		t.Error("lines left out without a notice")
	}
	if rows == 0 && a.row > 0 {
		t.Errorf("%d lines counted as rows, none in a table", a.row)
	}
}

// isProfile reports whether data is read as JSON, whose lines are not counted.
func isProfile(data []byte) bool {
	return isObject(bytes.TrimPrefix(data, []byte("\ufeff")))
}

// countLines counts lines the plain way.
func countLines(data []byte) int {
	text := strings.TrimPrefix(string(data), "\ufeff")
	text = strings.TrimRight(text, "\x1a")
	text = strings.ReplaceAll(text, "\r\n", "\n")
	text = strings.ReplaceAll(text, "\r", "\n")
	lines := strings.Count(text, "\n")
	if text != "" && !strings.HasSuffix(text, "\n") {
		lines++
	}
	return lines
}

func isStop(err error) bool {
	var n notice.Notice
	return errors.As(err, &n) && n.Severity == notice.Stop
}

// wholeFileStop reports a refusal before every line was looked at.
func wholeFileStop(f File) bool {
	for _, n := range f.Notices {
		switch n.Code {
		case "file-not-text", "file-too-large", "quote-open", "decimal-mixed", "columns-many",
			"workbook-damaged", "workbook-large", "option-bad", "read-ended", "range-unknown":
			return true
		}
	}
	return false
}

func FuzzRead(f *testing.F) {
	files, err := filepath.Glob(filepath.Join("testdata", "corpus", "*"))
	if err != nil || len(files) < corpusLeast {
		f.Fatalf("%d seeds, at least %d expected: %v", len(files), corpusLeast, err)
	}
	for _, name := range files {
		data, err := os.ReadFile(name)
		if err != nil {
			f.Fatal(err)
		}
		f.Add(data)
	}
	for _, c := range workbooks {
		f.Add(readFixture(f, c.file))
	}
	f.Fuzz(func(t *testing.T, data []byte) {
		given := bytes.Clone(data)
		file := Read("fuzz", data, Options{MaxBytes: 1 << 20})
		if !bytes.Equal(given, data) {
			t.Error("the data were changed")
		}
		checkFile(t, file, data)
	})
}

// FuzzOptions reads text with answers of every kind.
func FuzzOptions(f *testing.F) {
	f.Add([]byte("x;y\n1;0,5\n2;-999\n"), "comma", "semicolon", "-999", 3)
	f.Add([]byte("x y\n1 1,234.5\n"), "point", "blanks", "n.m.", 0)
	f.Add([]byte("  1  2\n 10-20\n"), "", "", "10", 4)
	f.Fuzz(func(t *testing.T, data []byte, decimal, delimiter, sentinel string, guide int) {
		// checkFile would take the sign in an answer for a fault of our own.
		decimal, delimiter = strings.ReplaceAll(decimal, "%", ""), strings.ReplaceAll(delimiter, "%", "")
		opt := Options{MaxBytes: 1 << 20, Decimal: decimal, Delimiter: delimiter, Sentinels: []string{sentinel}}
		if guide != 0 {
			opt.Guides = []int{guide}
		}
		file := Read("fuzz", data, opt)
		checkFile(t, file, data)
		value, kind, _ := readCell([]byte(sentinel))
		for _, table := range file.Tables {
			for _, c := range table.Columns {
				if kind == cellNumber && opt.Decimal == "" && slices.Contains(c.Values, value) {
					t.Errorf("the stated mark %v is among the values of %q", value, c.Name)
				}
			}
		}
	})
}

// FuzzWorkbook puts any XML into the place of a sheet.
func FuzzWorkbook(f *testing.F) {
	for _, sheet := range sheetSeeds {
		f.Add(sheet, "", "")
	}
	f.Add(sheetSeeds[0], "data!B1:B3", "leave out")
	f.Fuzz(func(t *testing.T, sheet, cells, hidden string) {
		data := makeBook(sheet[:min(len(sheet), 1<<18)])
		file := Read("fuzz", data, Options{Range: cells, Hidden: hidden})
		checkFile(t, file, data)
	})
}

// FuzzProfile puts any text behind the head of a profile.
func FuzzProfile(f *testing.F) {
	for _, tail := range []string{
		`"columns": [{"name": "y", "unit": "mm", "values": [1, null, "a"]}]}`,
		`"name": "a", "columns": [], "conditions": {"Re": 1}}`,
		`"columns": [{"name": "y", "values": [1e999, 2]}, {"values": [], "name": "z"}]}`,
	} {
		f.Add([]byte(tail))
	}
	f.Fuzz(func(t *testing.T, tail []byte) {
		data := append([]byte(`{"format": "weirmark profile", "version": 1, `), tail...)
		file := Read("fuzz", data, Options{MaxBytes: 1 << 20})
		checkFile(t, file, data)
		for _, n := range file.Notices {
			if n.Code == "profile-damaged" && (n.Line == 0 || n.Column == 0) {
				t.Errorf("no place in %v", n)
			}
		}
	})
}
