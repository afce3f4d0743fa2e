// Package adequacy sets the interval of the model error against an accuracy
// requirement. There are three outcomes, never two; the requirement belongs
// to the decision and is not the result of the comparison.
package adequacy

import (
	"math"

	"weirmark/core/quantity"
)

// Outcome of a requirement.
type Outcome string

// The three outcomes.
const (
	Shown       Outcome = "shown"
	NotMet      Outcome = "not met"
	NotResolved Outcome = "not resolved"
)

// Judge returns whether the model error, within e ± k u, stays within ±limit:
// shown if |e| + k u <= limit, not met if |e| - k u > limit, else not
// resolved. All arguments are in one unit; u is standard. An argument that is
// not known (NaN) resolves nothing. Both sides of a comparison are taken to ten
// digits, so that a tie is decided alike on every host.
func Judge(e, u, k, limit float64) Outcome {
	a, half := math.Abs(e), float64(k*u)
	switch {
	case ten(a+half) <= ten(limit):
		return Shown
	case ten(a) > ten(limit+half):
		return NotMet
	}
	return NotResolved
}

func ten(v float64) float64 { return quantity.Round(v, 10) }

// JudgeAll returns the outcome over all stations and the index of the deciding
// one: not met where one station is not met, shown where all are shown, else
// not resolved. Among stations of the same outcome the one that exceeds its
// limit by most decides. limits is per station. Of no stations nothing is
// resolved, and the index is -1.
func JudgeAll(e, u []float64, k float64, limits []float64) (Outcome, int) {
	if len(e) == 0 {
		return NotResolved, -1
	}
	all, at := Shown, -1
	worst := math.Inf(-1)
	for i := range e {
		o := Judge(e[i], u[i], k, limits[i])
		excess := math.Abs(e[i]) + float64(k*u[i]) - limits[i]
		if at < 0 || rank(o) > rank(all) || rank(o) == rank(all) && excess > worst {
			all, at, worst = o, i, excess
		}
	}
	return all, at
}

func rank(o Outcome) int {
	switch o {
	case NotMet:
		return 2
	case NotResolved:
		return 1
	}
	return 0
}

// Needed returns the largest u for which the requirement would be shown with
// e unchanged, and false where no positive u would do.
func Needed(e, k, limit float64) (float64, bool) {
	room := limit - math.Abs(e)
	if !(room > 0) {
		return 0, false
	}
	return room / k, true
}

// PartNeeded returns the value of one part of u that brings u to needed while
// the other parts stay, and false where the others alone exceed it.
func PartNeeded(u, part, needed float64) (float64, bool) {
	rest := float64(u*u) - float64(part*part)
	room := float64(needed*needed) - rest
	if !(room > 0) {
		return 0, false
	}
	return math.Sqrt(room), true
}
