package chart

import (
	"fmt"
	"strings"
	"testing"
)

func TestAxisName(t *testing.T) {
	for _, row := range []struct {
		quantity, symbol, unit string
		exponent               int
		want                   string
	}{
		{"pressure coefficient", "Cp", "1", 0, "pressure coefficient Cp (–)"},
		{"drag coefficient", "C_D", "1", -3, "drag coefficient C_{D} (10⁻³)"},
		{"pressure", "p", "Pa", 3, "pressure p (10³ Pa)"},
		{"Cf", "Cf", "", 0, "Cf (–)"},
		{"temperature", "", "°C", 0, "temperature (°C)"},
		{"x/c", "", "1", 0, "x/c (–)"},
	} {
		if got := axisName(row.quantity, row.symbol, row.unit, row.exponent); got != row.want {
			t.Errorf("%q, want %q", got, row.want)
		}
	}
}

func TestShort(t *testing.T) {
	for _, row := range []struct{ name, want string }{
		{"model B", "model B"},
		{" two\nlines\tand\x00more ", "two lines and more"},
		{strings.Repeat("é", 41), strings.Repeat("é", 39) + "…"},
		{strings.Repeat("é", 40), strings.Repeat("é", 40)},
	} {
		if got := short(row.name); got != row.want {
			t.Errorf("%q: %q, want %q", row.name, got, row.want)
		}
	}
}

func TestTrimmed(t *testing.T) {
	for _, row := range []struct {
		v    number
		n    int
		want string
	}{
		{0.0004, 3, "0.0004"}, {5, 3, "5"}, {0.62, 4, "0.62"}, {-2.5, 3, "−2.5"}, {100, 3, "100"}, {1.5e-7, 3, "1.50e−7"}, {0, 3, "0"},
	} {
		if got := trimmed(row.v, row.n); got != row.want {
			t.Errorf("%v: %q, want %q", row.v, got, row.want)
		}
	}
}

func TestKeyRows(t *testing.T) {
	keys := []entry{}
	for i := range 6 {
		keys = append(keys, entry{Name: fmt.Sprintf("model %d on a fine grid", i)})
	}
	rows := keyRows(keys, 680)
	n := 0
	for _, row := range rows {
		n += len(row)
		w := 0.0
		for _, e := range row {
			w += keyWidth + keyText + textWidth(e.Name)
		}
		if w > 680 {
			t.Errorf("a row of %v px in a room of 680", w)
		}
	}
	if len(rows) < 2 || n != 6 {
		t.Errorf("%d keys in %d rows", n, len(rows))
	}
	// One key that is too wide still gets a row.
	if rows := keyRows(keys[:1], 10); len(rows) != 1 || len(rows[0]) != 1 {
		t.Errorf("rows %v", rows)
	}
}
