package tablefile

import (
	"math"
	"testing"
)

// TestReadCell holds the forms in which numbers and their absence are met.
func TestReadCell(t *testing.T) {
	nan := math.NaN()
	for _, c := range []struct {
		text  string
		value float64
		kind  cellKind
		form  cellForm
	}{
		{"1", 1, cellNumber, 0},
		{"-1.5", -1.5, cellNumber, formPoint},
		{"1.5E-03", 1.5e-3, cellNumber, formPoint},
		{"1.0D-03", 1e-3, cellNumber, formPoint | formFortran},
		{"2d2", 200, cellNumber, formFortran},
		{"3.14-114", 3.14e-114, cellNumber, formPoint | formFortran},
		{"-3.14+100", -3.14e100, cellNumber, formPoint | formFortran},
		{"3.14-14", nan, cellText, 0},
		{"3-114", nan, cellText, 0},
		{"2024-01-02", nan, cellText, 0},
		{"\u22121.5", -1.5, cellNumber, formPoint | formSign},
		{"\u20132", -2, cellNumber, formSign},
		{"1e\u22123", 1e-3, cellNumber, formSign},
		{"\u00a07", 7, cellNumber, formSign},
		{"12\u00a0345,5", 12345.5, cellNumber, formSign | formComma},
		{"1\u202f234", 1234, cellNumber, formSign},
		{"12\u00a034", nan, cellText, 0},
		{"0,125", 0.125, cellNumber, formComma},
		{",5", 0.5, cellNumber, formComma},
		{"1,5e3", 1500, cellNumber, formComma},
		{"1,0D3", 1000, cellNumber, formComma | formFortran},
		{"5,", nan, cellText, 0},
		{"1,234.5", 1234.5, cellNumber, formThousands | formPoint},
		{"1,234,567.8", 1234567.8, cellNumber, formThousands | formPoint},
		{"1,234,567", 1234567, cellNumber, formThousands},
		{"1.234,5", 1234.5, cellNumber, formThousands | formComma},
		{"1.234.567,5", 1234567.5, cellNumber, formThousands | formComma},
		{"12,34.5", nan, cellText, 0},
		{"1234,567.5", nan, cellText, 0},
		{"1.2.3", nan, cellText, 0},
		{"1,2,3", nan, cellText, 0},
		{"", nan, cellMissing, 0},
		{"\u00a0", nan, cellMissing, 0},
		{"-", nan, cellMissing, 0},
		{"--", nan, cellMissing, 0},
		{"\u2013", nan, cellMissing, 0},
		{"\u2014", nan, cellMissing, 0},
		{"nan", nan, cellMissing, 0},
		{"NaN", nan, cellMissing, 0},
		{"-NaN", nan, cellMissing, 0},
		{"n.a.", nan, cellMissing, 0},
		{"N/A", nan, cellMissing, 0},
		{"#DIV/0!", nan, cellMissing, 0},
		{"1.#QNAN", nan, cellMissing, 0},
		{"-1.#IND", nan, cellMissing, 0},
		{"********", nan, cellMissing, 0},
		{"?", nan, cellMissing, 0},
		{"inf", nan, cellOverflow, 0},
		{"-Infinity", nan, cellOverflow, 0},
		{"1.#INF", nan, cellOverflow, 0},
		{"1e999", nan, cellOverflow, 0},
		{"0x1p3", nan, cellText, 0},
		{"1_000", nan, cellText, 0},
		{"12 %", nan, cellText, 0},
		{"wall", nan, cellText, 0},
		{"1e", nan, cellText, 0},
		{"1.5-abc", nan, cellText, 0},
	} {
		value, kind, form := readCell([]byte(c.text))
		same := value == c.value || math.IsNaN(value) && math.IsNaN(c.value)
		if !same || kind != c.kind || form != c.form {
			t.Errorf("%q: %v kind %d form %b, want %v kind %d form %b", c.text, value, kind, form, c.value, c.kind, c.form)
		}
	}
}
