package sentence

import (
	"strings"
	"testing"

	"weirmark/core/quantity"
	"weirmark/core/study"
)

// oneValue is a cell of one value below its reference by 3 in 100, with
// u_val 2, beside the given grid study.
func oneValue(g *study.Grids) *study.Cell {
	return &study.Cell{
		Case: "C1", Quantity: "drag", Model: "A", Reference: "balance", Kind: study.KindTest, Scalar: true,
		Choices:  study.Choices{K: 2, KNum: 1.15},
		Stations: []study.Station{{S: 97, D: 100, E: -3, UVal: 2, Lo: -7, Hi: 1, Reading: study.Between}},
		Summary:  &study.Summary{N: 1, Tested: 1},
		Grids:    g,
	}
}

// TestFactorOnlyWhereUsed: k_num is said where U was divided by it, and not of
// the bound of an oscillatory family, which was divided by the root of three.
func TestFactorOnlyWhereUsed(t *testing.T) {
	for _, row := range []struct {
		name string
		g    *study.Grids
		said bool
	}{
		{"no grid study", nil, false},
		{"monotone", &study.Grids{U: 1.15, UNum: 1}, true},
		{"oscillatory", &study.Grids{U: quantity.None, UNum: 1}, false},
		{"along a curve", &study.Grids{Along: true, U: quantity.None, UNum: 1}, true},
		{"diverging", &study.Grids{U: quantity.None, UNum: quantity.None}, false},
	} {
		text := Of(oneValue(row.g)).Text()
		if strings.Contains(text, "k_num = 1.15") != row.said {
			t.Errorf("%s: %s", row.name, text)
		}
	}
}

// TestBetweenIsOfTheSize: a negative E lies between nothing and u_val; its size
// lies between u_val and k u_val.
func TestBetweenIsOfTheSize(t *testing.T) {
	if text := Of(oneValue(nil)).Text(); !strings.Contains(text, ". |E| lies between u_val and 2 u_val; its sign is not resolved;") {
		t.Error(text)
	}
}

// TestUseIsSaidOfWithheld: what the use of the data does to the claim stands
// beside any E, also where no statement is made.
func TestUseIsSaidOfWithheld(t *testing.T) {
	c := oneValue(nil)
	c.Withheld, c.Use = true, study.UseTuning
	c.Open = []study.Open{{Missing: "the uncertainty of the data"}}
	const want = ", without [the uncertainty of the data]. Comparison only. Experimental uncertainty is not available; no validation statement is made. These data were used to set the model; agreement here is fit quality. No statement: [the uncertainty of the data] is open. No further open point."
	if text := Of(c).Text(); !strings.HasSuffix(text, want) {
		t.Error(text)
	}
}

// TestIntervalsAreSaid: where a source is known by its limits only, the sentence
// says what its words hold with, and no more.
func TestIntervalsAreSaid(t *testing.T) {
	c := oneValue(nil)
	c.Requirement, c.Bound = &study.Judgement{Percent: quantity.None}, &study.BoundLine{Half: 1.5, At: quantity.None}
	for reading, want := range map[string]string{
		study.WithinNoise:  "|E| = 3.0 does not exceed u_val and the interval ± 1.5 of what is known by its limits only, together. ",
		study.Between:      "|E| less the interval ± 1.5 of what is known by its limits only lies between u_val and 2 u_val; ",
		study.SignResolved: "|E| exceeds 2 u_val and the interval ± 1.5 of what is known by its limits only, together. ",
	} {
		c.Stations[0].Reading = reading
		if text := Of(c).Text(); !strings.Contains(text, want) {
			t.Errorf("%s: %s", reading, text)
		}
	}
	if text := Of(c).Text(); strings.Contains(text, "exceeds 2 u_val.") {
		t.Error(text)
	}
}

// TestBorrowedIsSaid: a grid uncertainty of another case is not said as one of
// this.
func TestBorrowedIsSaid(t *testing.T) {
	c := oneValue(nil)
	c.Borrowed = &study.Borrowed{From: "drag at C2", U: 1}
	if text := Of(c).Text(); !strings.Contains(text, " (grid uncertainty borrowed from drag at C2, not computed for this case)") {
		t.Error(text)
	}
}
