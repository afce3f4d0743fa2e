package tablefile

import (
	"crypto/sha256"
	"encoding/hex"
	"math"
	"slices"

	"weirmark/core/notice"
)

// defaultMaxBytes is the size above which a file is refused unless Options
// says otherwise.
const defaultMaxBytes = 512 << 20

// maxColumns bounds the columns of a table: above it the separator is
// misjudged or the file is not a table.
const maxColumns = 10000

// File is what was read from one file.
type File struct {
	Name    string
	SHA256  string // of the bytes as given, hexadecimal
	Size    int    // bytes as given
	Tables  []Table
	Meta    []Meta          // what the file states beside its tables
	Notices []notice.Notice // by line, whole-file notices first

	leftOut []leftOut
	tally   tally
	lines   int // written of the ranges of a workbook
}

// leftOut is a zone that was announced but could not be read.
type leftOut struct {
	name string
	stop notice.Notice
}

// Table is one table of a file. Columns have equal lengths.
type Table struct {
	Name    string // "" when the file gives none
	Line    int    // first data line, counted from one
	Columns []Column

	runs []run
}

// Column is one column of a table.
type Column struct {
	Name   string    // without the unit, unique in its table
	Unit   string    // as written, "" when not stated
	Header string    // name and unit as written, "" when the file gives none
	Values []float64 // as written; NaN where the cell holds no number
	Text   []string  // the cells as written, nil unless some cell holds other text
}

// run says that rows from row on begin on consecutive lines from line on.
type run struct{ row, line int }

// Constant returns the value that all numbers of the column have, and whether
// they have one and the same and none is missing. Such a column may be a
// placeholder.
func (c Column) Constant() (float64, bool) {
	if len(c.Values) == 0 || math.IsNaN(c.Values[0]) {
		return 0, false
	}
	for _, v := range c.Values[1:] {
		if v != c.Values[0] {
			return 0, false
		}
	}
	return c.Values[0], true
}

// Rows returns the number of rows.
func (t Table) Rows() int {
	if len(t.Columns) == 0 {
		return 0
	}
	return len(t.Columns[0].Values)
}

// RowLine returns the line of the file on which row i begins, counted from one.
func (t Table) RowLine(i int) int {
	at, exact := slices.BinarySearchFunc(t.runs, i, func(r run, row int) int { return r.row - row })
	if !exact {
		at--
	}
	if at < 0 {
		return t.Line + i
	}
	return t.runs[at].line + i - t.runs[at].row
}

// Refused reports whether nothing of the file could be used.
func (f File) Refused() bool {
	return len(f.Tables) == 0 && notice.Any(f.Notices, notice.Stop)
}

// Read reads the tables of a file. It never fails: a file that cannot be read
// has stop notices and no table. The result keeps no reference to data.
func Read(name string, data []byte, opt Options) File {
	// The hash takes a fifth of the time and needs nothing of the reading.
	sum := make(chan [sha256.Size]byte, 1)
	go func() { sum <- sha256.Sum256(data) }()
	f := read(name, data, opt)
	hash := <-sum
	f.SHA256 = hex.EncodeToString(hash[:])
	return f
}

func read(name string, data []byte, opt Options) File {
	r := &reader{file: File{Name: name, Size: len(data)}, opt: opt, tick: progressBytes}
	limit := opt.MaxBytes
	if limit <= 0 {
		limit = defaultMaxBytes
	}
	if len(data) > limit {
		r.add(notice.New("file-too-large", len(data), limit))
		return r.close()
	}
	var err error
	if r.answers, err = opt.settle(); err != nil {
		r.refuse(err.(notice.Notice))
		return r.close()
	}
	switch {
	case isArchive(data):
		r.workbook(data)
	case r.decode(data):
		if isObject(r.data) {
			r.profile()
		} else {
			r.read()
		}
	}
	return r.close()
}
