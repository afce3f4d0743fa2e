package chart

import (
	"fmt"
	"strings"
	"testing"

	"weirmark/core/quantity"
	"weirmark/core/study"
)

func TestSharesFillThePanel(t *testing.T) {
	c := friction()
	f, err := Budget(c, "x", Light)
	if err != nil {
		t.Fatal(err)
	}
	d := decode(t, f)
	data, numerical := d.rows(t, 0, "data", "band"), d.rows(t, 0, "numerical", "band")
	if len(data) != 2*len(c.Stations) || len(numerical) != len(data) {
		t.Fatalf("%d and %d rows for %d stations", len(data), len(numerical), len(c.Stations))
	}
	for i := range data {
		s := c.Stations[i/2]
		if !s.UVal.Known() {
			if data[i][1] != nil && data[i][2] != nil {
				t.Errorf("station %d has no u_val and a share", i/2)
			}
			continue
		}
		// The sides from the station's own numbers; u_input is not given.
		want := 100 * float64(s.UD*s.UD) / float64(s.UD*s.UD+s.UNum*s.UNum)
		if *data[i][1] != 0 || !near(*data[i][2], want) || *numerical[i][1] != *data[i][2] || !near(*numerical[i][2], 100) {
			t.Errorf("station %d: data %v to %v, want up to %v; numerical %v to %v", i/2, *data[i][1], *data[i][2], want, *numerical[i][1], *numerical[i][2])
		}
		if i%2 == 0 && (*data[i][0] >= float64(s.X) || *data[i+1][0] <= float64(s.X)) {
			t.Errorf("station %d at %v lies outside its column %v to %v", i/2, s.X, *data[i][0], *data[i+1][0])
		}
		if i%2 == 1 && i+1 < len(data) && *data[i][0] != *data[i+1][0] {
			t.Errorf("column %d ends at %v, the next begins at %v", i/2, *data[i][0], *data[i+1][0])
		}
	}
	for _, want := range []string{"29 of 31 stations with a known u_val", "Not given, and not zero: input."} {
		if !strings.Contains(f.Caption, want) {
			t.Errorf("the caption lacks %q: %s", want, f.Caption)
		}
	}
}

func TestBarStacksItsSources(t *testing.T) {
	pile := piled(run().Sources, 110)
	want := []string{"46 %  balance", "18 %  angle, speed, turbulence", "35 %  grid", "1.0 %  iteration"}
	at := 0.0
	for i, s := range pile {
		if s.name != want[i] || !near(s.low, at) {
			t.Errorf("segment %d is %q from %v, want %q from %v", i, s.name, s.low, want[i], at)
		}
		at = s.high
	}
	if len(pile) != 4 || !near(at, 100) {
		t.Errorf("%d segments up to %v", len(pile), at)
	}
}

func TestNamesBesideTheBarKeepApart(t *testing.T) {
	var sources []study.SourceLine
	for i := range 20 {
		sources = append(sources, study.SourceLine{Name: fmt.Sprintf("source %d", i), Of: sides[i%3].of, Share: number(0.001 * float64(i+1))})
	}
	sources[7].Share = 0.6
	sources = append(sources, study.SourceLine{Name: "unknown", Of: study.OfData, Share: quantity.None})
	c := drag("B", 0)
	c.Sources = sources
	f, err := Budget(c, "x", Light)
	if err != nil {
		t.Fatal(err)
	}
	if strings.Contains(string(f.Option), "unknown") || len(f.Table.Rows) != 21 {
		t.Errorf("a source without a share is drawn, or not in the table of %d rows", len(f.Table.Rows))
	}
	height := f.Height - 16 - topEdge - keyRow - nameRow
	pile := piled(sources, height)
	if len(pile) != mostSources+len(sides) || !strings.Contains(pile[len(pile)-1].name, "further sources of numerical") {
		t.Errorf("%d segments, the last %q", len(pile), pile[len(pile)-1].name)
	}
	for i, s := range pile {
		if s.mark < 0 || s.mark > 100 || i > 0 && float64(height)*(s.mark-pile[i-1].mark)/100 < pileLine-1e-9 {
			t.Errorf("name %d stands at %v %% of %d px", i, s.mark, height)
		}
	}
}

func TestNoSharesNoBudget(t *testing.T) {
	c := drag("B", 0)
	c.Sources = []study.SourceLine{{Name: "grid", Of: study.OfNumerical, U: 1, Share: quantity.None}}
	if _, err := Budget(c, "x", Light); err == nil {
		t.Error("a budget without shares is drawn")
	}
}
