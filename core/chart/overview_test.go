package chart

import (
	"fmt"
	"strings"
	"testing"

	"weirmark/core/quantity"
	"weirmark/core/study"
)

func TestOverviewIsInPartsOfTheRequirement(t *testing.T) {
	withheld := drag("C", 0.001)
	withheld.Withheld = true
	// B reaches 1.498/1.48, A 3.248/1.48: A goes first.
	f, err := Overview([]study.Cell{drag("B", 0.00035), taps("B", 0.004), withheld, drag("A", 0.0021)}, Light)
	if err != nil {
		t.Fatal(err)
	}
	d := decode(t, f)
	marks := d.rows(t, 0, overviewMean, "")
	if len(marks) != 2 || !near(*marks[0][0], 0.0021/0.00148) || !near(*marks[1][0], 0.00035/0.00148) {
		t.Fatalf("marks at %v, want the farthest reach first", marks)
	}
	var lines [][]*float64
	for _, s := range d.Series {
		if s.Name == "E ± 2 u_{val}" && s.XAxisIndex == 0 {
			lines = append(lines, decoded{Series: []decodedSeries{s}}.rows(t, 0, s.Name, "intervalBar")...)
		}
	}
	if len(lines) != 2 || !near(*lines[0][1], (0.0021-0.001148)/0.00148) || !near(*lines[0][2], (0.0021+0.001148)/0.00148) {
		t.Errorf("lines %v", lines)
	}
	// The one without a requirement: in parts of u_val, its envelope.
	c := taps("B", 0.004)
	low, high := 0.0, 0.0
	for _, s := range c.Stations {
		low, high = min(low, float64(s.E/s.UVal)-2), max(high, float64(s.E/s.UVal)+2)
	}
	if line := d.rows(t, 1, "E ± 2 u_{val}", "intervalBar")[0]; !near(*line[1], low) || !near(*line[2], high) {
		t.Errorf("line of the curve %v to %v, want %v to %v", *line[1], *line[2], low, high)
	}
	for _, want := range []string{"3 comparisons as E ± 2 u_val (k = 2).", "No interval: drag coefficient of model C."} {
		if !strings.Contains(f.Caption, want) {
			t.Errorf("the caption lacks %q: %s", want, f.Caption)
		}
	}
}

func TestRequirementInPercentAtEveryStation(t *testing.T) {
	c := taps("B", 0.004)
	c.Requirement = &study.Judgement{Limit: 1, Percent: 10, Outcome: study.NotMet}
	c.Stations[5].D = 0
	r := parted(c, requirementAt)
	if r.stations != 23 || !r.partly {
		t.Errorf("%d stations have a requirement, partly %v", r.stations, r.partly)
	}
	s := c.Stations[0]
	one := c
	one.Stations = c.Stations[:1]
	if got, want := parted(one, requirementAt).mean, float64(s.E)/(0.1*-float64(s.D)); !near(got, want) {
		t.Errorf("E is %v requirements, want %v", got, want)
	}
}

func TestLongOverview(t *testing.T) {
	var cells []study.Cell
	for i := range 40 {
		c := drag(fmt.Sprintf("model of a very long name, number %d", i), 0.0001*float64(i))
		c.Symbol, c.Quantity = "", "a quantity whose name is longer than the room"
		cells = append(cells, c)
	}
	f, err := Overview(cells, Light)
	if err != nil {
		t.Fatal(err)
	}
	if f.Height > 800 || !strings.Contains(f.Caption, "24 of 40 are drawn") {
		t.Errorf("%d px high: %s", f.Height, f.Caption)
	}
	if name := rowName(cells[0]); !strings.HasSuffix(name, "…") || textWidth(name) > overviewLeft-24 {
		t.Errorf("%q is %v px wide", name, textWidth(name))
	}
}

func TestNothingToOverview(t *testing.T) {
	c := drag("A", 0)
	c.Stations[0].UVal = quantity.None
	for _, cells := range [][]study.Cell{nil, {c}} {
		if _, err := Overview(cells, Light); err == nil {
			t.Error("an overview without an interval is drawn")
		}
	}
}
