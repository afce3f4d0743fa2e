package memo

import (
	"fmt"
	"strconv"
	"strings"

	"github.com/gocarina/gocsv"

	"weirmark/core/quantity"
	"weirmark/core/study"
)

// stationRow is one station in the CSV. Numbers are texts, so that every one
// has the digits of the report and an unknown one is blank, not zero.
type stationRow struct {
	Case      string `csv:"case"`
	Quantity  string `csv:"quantity"`
	Model     string `csv:"model"`
	X         string `csv:"x"`
	XUnit     string `csv:"x_unit"`
	S         string `csv:"s"`
	D         string `csv:"d"`
	E         string `csv:"e"`
	UD        string `csv:"u_d"`
	UNum      string `csv:"u_num"`
	UInterp   string `csv:"u_interp"`
	UInput    string `csv:"u_input"`
	UVal      string `csv:"u_val"`
	Ratio     string `csv:"ratio"`
	Lo        string `csv:"lo"`
	Hi        string `csv:"hi"`
	Unit      string `csv:"unit"`
	Reference string `csv:"reference"`
	Line      string `csv:"line"` // of the reference file
}

// Stations returns the stations of the cells as CSV: one row for each, numbers
// with a decimal point and ten digits, values of files with all of theirs.
// Texts that a spreadsheet would take for a formula are begun with an
// apostrophe.
func Stations(cells []study.Cell) ([]byte, error) {
	rows := []stationRow{}
	for _, c := range cells {
		for _, s := range c.Stations {
			rows = append(rows, stationRow{
				Case: guarded(c.Case), Quantity: guarded(c.Quantity), Model: guarded(c.Model),
				X: plain(s.X), XUnit: guarded(c.XUnit), S: plain(s.S), D: plain(s.D), E: plain(s.E),
				UD: plain(s.UD), UNum: plain(s.UNum), UInterp: plain(s.UInterp), UInput: plain(s.UInput), UVal: plain(s.UVal),
				Ratio: plain(s.Ratio), Lo: plain(s.Lo), Hi: plain(s.Hi), Unit: guarded(c.Unit), Reference: guarded(c.Reference), Line: lineText(s.Line),
			})
		}
	}
	data, err := gocsv.MarshalBytes(rows)
	if err != nil {
		return nil, fmt.Errorf("writing the stations as CSV: %w", err)
	}
	return data, nil
}

// plain returns a number as in JSON, or nothing where it is not known.
func plain[N quantity.Number | quantity.Written](n N) string {
	if !quantity.Number(n).Known() {
		return ""
	}
	var digits []byte
	switch v := any(n).(type) {
	case quantity.Number:
		digits, _ = v.MarshalJSON()
	case quantity.Written:
		digits, _ = v.MarshalJSON()
	}
	return string(digits)
}

func lineText(n int) string {
	if n == 0 {
		return ""
	}
	return strconv.Itoa(n)
}

// guarded returns a text that no spreadsheet takes for a formula.
func guarded(s string) string {
	if t := strings.TrimLeft(s, " \u00a0"); t != "" && strings.ContainsRune("=+-@\t\r\n", rune(t[0])) {
		return "'" + s
	}
	return s
}
