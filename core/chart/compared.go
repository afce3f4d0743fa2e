package chart

import (
	"errors"
	"fmt"

	"weirmark/core/study"
)

// Compared returns several models of one case and quantity against their
// common reference, which is drawn once: curves over each other with one error
// strip per model, or the intervals of scalars below each other. Models differ
// by line pattern, marker and lightness; hues repeat it.
//
// It fails on fewer than two cells or more than there are patterns, and on
// cells that differ in case, quantity, units, reference or coverage factor:
// those do not belong into one picture.
func Compared(cells []study.Cell, id string, t Theme) (Figure, error) {
	if len(cells) < 2 {
		return Figure{}, errors.New("comparing models: fewer than two are given")
	}
	if len(cells) > len(looks) {
		return Figure{}, fmt.Errorf("comparing models: %d are given and %d can be told apart in one figure", len(cells), len(looks))
	}
	for _, c := range cells[1:] {
		if what := differs(cells[0], c); what != "" {
			return Figure{}, fmt.Errorf("comparing models: %q and %q differ in %s", cells[0].Model, c.Model, what)
		}
	}
	if cells[0].Scalar {
		return intervals(cells, id+"-compared", t)
	}
	return overlay(cells, id+"-compared", t)
}

// differs names what keeps two cells out of one picture, or returns "".
func differs(a, b study.Cell) string {
	for _, row := range []struct {
		what string
		same bool
	}{
		{"case", a.Case == b.Case && a.Condition == b.Condition},
		{"quantity", a.Quantity == b.Quantity && a.Scalar == b.Scalar},
		{"unit", a.Unit == b.Unit},
		{"abscissa", a.XName == b.XName && a.XUnit == b.XUnit},
		{"reference", a.Reference == b.Reference},
		{"direction of the axis", a.Downward == b.Downward},
		{"coverage factor", a.Choices.K == b.Choices.K},
	} {
		if !row.same {
			return row.what
		}
	}
	return ""
}
