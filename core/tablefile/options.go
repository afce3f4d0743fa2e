package tablefile

import (
	"slices"
	"strconv"

	"weirmark/core/notice"
)

// Options of Read. Beside the limit they are answers of a person to what the
// reader asked about a file: a file read with its answers asks no more about
// what they settle, and says as a note what was done.
type Options struct {
	MaxBytes int `json:"maxBytes,omitempty"` // size above which the file is refused; 0 means 512 MB

	Decimal   string   `json:"decimal,omitempty"`   // "comma" or "point"; "" while not stated
	Delimiter string   `json:"delimiter,omitempty"` // "comma", "semicolon", "tab", "stroke" or "blanks", of text without zones; "" while not stated
	Sentinels []string `json:"sentinels,omitempty"` // cells that mark missing values, as written: -999, n.m.
	Data      []string `json:"data,omitempty"`      // numbers that look like such marks and are data
	Hidden    string   `json:"hidden,omitempty"`    // hidden rows, columns and sheets: "include" or "leave out"; "" includes and asks
	Uneven    string   `json:"uneven,omitempty"`    // rows of another number of columns: "leave out"; "" holds them back and asks
	Zones     string   `json:"zones,omitempty"`     // zones of another count than they announce: "as found"; "" uses them and asks
	Guides    []int    `json:"guides,omitempty"`    // characters of a line before each further column, for fixed widths
	Range     string   `json:"range,omitempty"`     // cells of a workbook to read: Sheet!B4:F30, a sheet alone, or B4:F30 of every sheet

	// Progress is called now and then with the bytes done of all, or the sheets
	// of a workbook; it returns false to end the reading. It is called from the
	// goroutine of Read.
	Progress func(done, total int) bool `json:"-"`
}

// IncludeHidden and LeaveOutHidden are the answers of Options.Hidden,
// LeaveOutUneven is that of Options.Uneven and ZonesAsFound that of Options.Zones.
const (
	IncludeHidden  = "include"
	LeaveOutHidden = "leave out"
	LeaveOutUneven = "leave out"
	ZonesAsFound   = "as found"
)

// decimalSign says how a person stated that decimals are written.
type decimalSign uint8

const (
	decimalOpen decimalSign = iota // not stated
	decimalPoint
	decimalComma
)

// answers is Options in the form that the reader uses.
type answers struct {
	cells     cellReader
	separator byte // 0 while not stated
	sentinels []float64
	kept      []float64
	guides    []int
}

// settle brings the options into the form the reader uses, or returns the
// stop notice for one that is not known.
func (o *Options) settle() (answers, error) {
	var a answers
	bad := func(name, value string) (answers, error) { return answers{}, notice.New("option-bad", name, value) }
	signs := map[string]decimalSign{"": decimalOpen, "point": decimalPoint, "comma": decimalComma}
	separators := map[string]byte{"": 0, "comma": ',', "semicolon": ';', "tab": '\t', "stroke": '|', "blanks": spaces}
	var known bool
	if a.cells.decimal, known = signs[o.Decimal]; !known {
		return bad("decimal", o.Decimal)
	}
	if a.separator, known = separators[o.Delimiter]; !known {
		return bad("delimiter", o.Delimiter)
	}
	if !slices.Contains([]string{"", IncludeHidden, LeaveOutHidden}, o.Hidden) {
		return bad("hidden", o.Hidden)
	}
	if o.Uneven != "" && o.Uneven != LeaveOutUneven {
		return bad("uneven", o.Uneven)
	}
	if o.Zones != "" && o.Zones != ZonesAsFound {
		return bad("zones", o.Zones)
	}
	for i, guide := range o.Guides {
		if guide < 1 || i > 0 && guide <= o.Guides[i-1] || len(o.Guides) >= maxColumns {
			return bad("guides", strconv.Itoa(guide))
		}
	}
	a.guides = o.Guides
	a.cells.missing = map[string]bool{}
	for _, text := range o.Sentinels {
		if value, kind, _ := a.cells.read([]byte(text)); kind == cellNumber {
			a.sentinels = append(a.sentinels, value)
		}
		a.cells.missing[text] = true
	}
	for _, text := range o.Data {
		value, kind, _ := readCell([]byte(text))
		if kind != cellNumber {
			return bad("data", text)
		}
		a.kept = append(a.kept, value)
	}
	return a, nil
}
