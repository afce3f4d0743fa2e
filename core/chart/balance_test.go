package chart

import (
	"strings"
	"testing"

	"weirmark/core/quantity"
	"weirmark/core/study"
)

func balances() study.Cell {
	c := run()
	c.Balances = []study.BalanceLine{
		{Grid: "G3", Kind: "mass", Net: 0.013, Scale: 1, ScaleOf: "inflow", Fraction: 0.013, Limit: 0.0014, LimitOf: "a tenth of U_grid"},
		{Grid: "G4", Kind: "energy", Net: -0.004, Scale: 20, ScaleOf: "the heat exchanged", Fraction: -0.0002, Limit: 0.0014, LimitOf: "a tenth of U_grid", Closed: true},
		{Grid: "G2", Kind: "mass", Net: quantity.None, Scale: quantity.None, Fraction: quantity.None, Limit: 0.001},
	}
	return c
}

// The bars have the length and the side of what is left over, in percent; an
// open balance is hatched, and one that was not judged has no bar.
func TestBalances(t *testing.T) {
	f, err := Balances(balances(), "x", Light)
	if err != nil {
		t.Fatal(err)
	}
	d := decode(t, f)
	for _, row := range []struct {
		name string
		end  float64
	}{{openName, 1.3}, {closedName, -0.02}} {
		bar := d.rows(t, 0, row.name, "band")
		if len(bar) != 2 || *bar[0][0] != 0 || *bar[1][0] != row.end || *bar[0][1] >= *bar[0][2] {
			t.Errorf("%s: %v", row.name, bar)
		}
	}
	if limit := d.rows(t, 0, smallerName, "band"); *limit[0][0] != -0.14 || *limit[1][0] != 0.14 {
		t.Errorf("small is %v to %v", *limit[0][0], *limit[1][0])
	}
	if !strings.Contains(string(f.Option), `"hatch"`) {
		t.Error("an open balance is not hatched")
	}
	for _, want := range []string{"1 balance is not closed. Small is a tenth of U_grid", "The others are in the table."} {
		if !strings.Contains(f.Caption, want) {
			t.Errorf("the caption lacks %q: %s", want, f.Caption)
		}
	}
	if !strings.Contains(f.Alt, "G3, mass: +1.3 % of inflow, not closed; G4, energy: −0.020 % of the heat exchanged, closed; G2, mass, not judged.") || len(f.Table.Rows) != 3 {
		t.Errorf("%s %v", f.Alt, f.Table.Rows)
	}
	if _, err := Balances(run(), "x", Light); err == nil {
		t.Error("a cell without balances is drawn")
	}
}

// Residuals stand beneath the monitor of their run, on its axis, and those of
// other runs do not.
func TestResidualsBeneath(t *testing.T) {
	plain, err := Settling(run(), "x", Light)
	if err != nil {
		t.Fatal(err)
	}
	c := run()
	c.Residuals = []study.ResidualLine{
		{Grid: "G4", Name: "continuity", X: []number{1, 200, 500}, Y: []number{0, -2, -2.1}},
		{Grid: "G1", Name: "continuity", X: []number{1, 9000}, Y: []number{0, -9}},
	}
	f, err := Settling(c, "x", Light)
	if err != nil {
		t.Fatal(err)
	}
	d := decode(t, f)
	if len(d.Grid) != 4 || f.Height != plain.Height+beneathGap+beneathHeight+keyRow || !strings.Contains(f.Caption, "Beneath, the residuals of the run") {
		t.Fatalf("%d panels, height %d of %d: %s", len(d.Grid), f.Height, plain.Height, f.Caption)
	}
	rows := d.rows(t, 3, depthName, "")
	if len(rows) != 3 || *rows[2][0] != 500 || *rows[2][1] != -2.1 || d.XAxis[2].Max != d.XAxis[3].Max || d.XAxis[3].Max < 500 || d.XAxis[3].Max > 1000 || d.YAxis[3].Min > -2.1 {
		t.Errorf("%v, axes to %v and %v, from %v", rows, d.XAxis[2].Max, d.XAxis[3].Max, d.YAxis[3].Min)
	}
}

// A monitor that drifts has the line of its drift through the window, not a mean.
func TestDriftLine(t *testing.T) {
	c := run()
	m := &c.Monitors[0]
	m.Class, m.Change, m.Per, m.Mean = "drifting", -0.0001, 100, 0.03
	f, err := Settling(c, "x", Light)
	if err != nil {
		t.Fatal(err)
	}
	d := decode(t, f)
	// 199 iterations of window at -0.0001 for each 100: half of the fall each way.
	line := d.rows(t, 2, driftName, "")
	for i, want := range []float64{0.0300995, 0.0299005} {
		if got := *line[i][1]; got < want-1e-9 || got > want+1e-9 {
			t.Errorf("end %d at %v, want %v", i, got, want)
		}
	}
	if !strings.Contains(string(f.Option), meanName) || !strings.Contains(string(f.Option), driftName) {
		t.Error("one of the two lines has no key")
	}
}

// Monitors of another quantity bear its name and its unit.
func TestStandInsAreNamed(t *testing.T) {
	c := run()
	for i := range c.Monitors {
		c.Monitors[i].Quantity, c.Monitors[i].Unit = "lift force", "N"
	}
	f, err := Settling(c, "x", Light)
	if err != nil {
		t.Fatal(err)
	}
	if y := decode(t, f).YAxis[0].Name; !strings.Contains(y, "lift force (10⁻³ N)") {
		t.Errorf("axis %q", y)
	}
	for _, want := range []string{"those of the lift force, which stand for it", "Values are in N."} {
		if !strings.Contains(f.Caption, want) {
			t.Errorf("the caption lacks %q: %s", want, f.Caption)
		}
	}
}
