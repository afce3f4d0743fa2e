package tablefile

import (
	"strings"
	"testing"
)

func TestSplitUnit(t *testing.T) {
	for _, c := range []struct {
		header, name, unit string
		guess              bool
	}{
		{"x [mm]", "x", "mm", false},
		{"x[mm]", "x", "mm", false},
		{"p (Pa)", "p", "Pa", false},
		{"p(Pa)", "p", "Pa", false},
		{"x(m)", "x", "m", true},
		{"u, m/s", "u", "m/s", false},
		{"alpha, deg", "alpha", "deg", false},
		{"T [°C]", "T", "°C", false},
		{"k (m²/s²)", "k", "m²/s²", false},
		{"rho [kg/m^3]", "rho", "kg/m^3", false},
		{"cp [-]", "cp", "-", false},
		{"cp [1]", "cp", "1", false},
		{"U [furlong/week]", "U", "furlong/week", false},
		{"x / mm", "x", "mm", true},
		{"U / (m/s)", "U", "m/s", true},
		{"y / h", "y / h", "", false},
		{"y / H", "y / H", "", false},
		{"x/c", "x/c", "", false},
		{"x/m", "x/m", "", false},
		{"h^2=1/N", "h^2=1/N", "", false},
		{"h=sqrt(1/N)", "h=sqrt(1/N)", "", false},
		{"sqrt(N)", "sqrt(N)", "", false},
		{"log(y+)", "log(y+)", "", false},
		{"C_f,x=0.97", "C_f,x=0.97", "", false},
		{"C_{f,x=1.5}", "C_{f,x=1.5}", "", false},
		{"C_f,m", "C_f,m", "", false},
		{"cp (upper)", "cp (upper)", "", false},
		{"U[0]", "U[0]", "", false},
		{"u'u'/U^2", "u'u'/U^2", "", false},
		{"[mm]", "[mm]", "", false},
		{"", "", "", false},
	} {
		name, unit, guess := splitUnit(c.header)
		if name != c.name || unit != c.unit || guess != c.guess {
			t.Errorf("%q: %q %q %v, want %q %q %v", c.header, name, unit, guess, c.name, c.unit, c.guess)
		}
	}
}

func TestUnitRow(t *testing.T) {
	for _, c := range []struct {
		cells string // parted by |
		units string // "no" for no row of units
	}{
		{"m|m/s|-", "m|m/s|-"},
		{"[mm]|[furlong]|", "mm|furlong|"},
		{"(Pa)|1|°C", "Pa|1|°C"},
		{"[-]|[-]", "-|-"},
		{"-|-", "no"},
		{"1|1", "no"},
		{"x|m", "no"},
		{"m|0.5", "no"},
	} {
		units, ok := unitRow(strings.Split(c.cells, "|"))
		got := "no"
		if ok {
			got = strings.Join(units, "|")
		}
		if got != c.units {
			t.Errorf("%q: %q, want %q", c.cells, got, c.units)
		}
	}
}
