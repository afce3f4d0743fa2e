package chart

import (
	"fmt"
	"strings"
	"testing"

	"weirmark/core/quantity"
	"weirmark/core/study"
)

func TestMonitorsShowTheirWindow(t *testing.T) {
	f, err := Settling(run(), "x", Light)
	if err != nil {
		t.Fatal(err)
	}
	d := decode(t, f)
	for i, grid := range []string{"G2", "G3", "G4"} { // coarse to fine, as the grid study has them
		y := d.YAxis[i]
		if !strings.HasPrefix(y.Name, "grid "+grid+": ") {
			t.Errorf("panel %d is named %q, want grid %s", i, y.Name, grid)
		}
		window := d.rows(t, i, windowName, "band")
		mean := d.rows(t, i, meanName, "")
		if *window[0][0] != 201 || *window[1][0] != 400 || *window[0][1] != y.Min || *window[0][2] != y.Max {
			t.Errorf("panel %d: window %v to %v", i, *window[0][0], *window[1][0])
		}
		if *mean[0][0] != 201 || *mean[1][0] != 400 || *mean[0][1] != *mean[1][1] {
			t.Errorf("panel %d: mean line %v %v to %v %v", i, *mean[0][0], *mean[0][1], *mean[1][0], *mean[1][1])
		}
		outside, last := 0, 0.0
		for _, row := range d.rows(t, i, "C_{D} of the run", "") {
			last = *row[1]
			if *row[1] < y.Min || *row[1] > y.Max {
				outside++
				if *row[0] >= 201 {
					t.Errorf("panel %d: iteration %v of the window lies beyond the axis", i, *row[0])
				}
			}
		}
		if outside == 0 || last < y.Min || last > y.Max {
			t.Errorf("panel %d: %d early points lie beyond the axis, the end at %v of %v to %v", i, outside, last, y.Min, y.Max)
		}
	}
	for _, want := range []string{
		"Grid G2 settled, window 201 to 400, U_iter 0.000024 (k = 2)", "grid G3 cycling, window 201 to 400, U_iter 0.00012 (a bound, half the range)",
		"Each panel has its own scale.", "points lie beyond the value axis",
	} {
		if !strings.Contains(f.Caption, want) {
			t.Errorf("the caption lacks %q: %s", want, f.Caption)
		}
	}
}

func TestMonitorsWithoutAMean(t *testing.T) {
	c := run()
	c.Monitors = []study.MonitorLine{{Class: "short", Axis: study.AxisTime, Mean: quantity.None, U: quantity.None, From: quantity.None, To: quantity.None, HalfRange: quantity.None,
		X: []number{0.1, 0.2}, Y: []number{1, 2}}}
	f, err := Settling(c, "x", Light)
	if err != nil {
		t.Fatal(err)
	}
	if d := decode(t, f); len(d.Series) != 1 || d.XAxis[0].Name != "time" || d.YAxis[0].Name != "run: short, C_{D} (–)" {
		t.Errorf("%d series, axes %q and %q", len(d.Series), d.XAxis[0].Name, d.YAxis[0].Name)
	}
	if !strings.Contains(f.Caption, "Run short, no uncertainty.") {
		t.Errorf("caption %q", f.Caption)
	}
}

func TestOnlyTheFinestMonitorsAreDrawn(t *testing.T) {
	c := run()
	c.Monitors = append(c.Monitors, history("G1", "settled", 0.0315, 1e-5), history("trial", "settled", 0.04, 1e-5))
	f, err := Settling(c, "x", Light)
	if err != nil {
		t.Fatal(err)
	}
	d := decode(t, f)
	if len(d.Grid) != mostMonitors || !strings.HasPrefix(d.YAxis[0].Name, "grid G1") || len(f.Table.Rows) != 5 || f.Table.Rows[0][0] != "grid trial" {
		t.Errorf("%d panels, the first %q; %d rows, the first %v", len(d.Grid), d.YAxis[0].Name, len(f.Table.Rows), f.Table.Rows[0])
	}
	if !strings.Contains(f.Caption, "4 of 5 monitors are drawn") {
		t.Errorf("caption %q", f.Caption)
	}
}

func TestFiguresInOrderOfReading(t *testing.T) {
	figures, err := Figures(run(), "x", Light)
	if err != nil {
		t.Fatal(err)
	}
	var ids []string
	for _, f := range figures {
		ids = append(ids, f.ID)
	}
	if got := fmt.Sprint(ids); got != "[x-monitors x-intervals x-grids x-budget]" {
		t.Errorf("figures %s", got)
	}
	if _, err := Settling(taps("B", 0), "x", Light); err == nil {
		t.Error("monitors are drawn of a cell without any")
	}
}
