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
