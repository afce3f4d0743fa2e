// Package adequacy sets the interval of the model error against an accuracy
// requirement. There are three outcomes, never two; the requirement belongs
// to the decision and is not the result of the comparison.
package adequacy

import "math"

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
// resolved. All arguments are in one unit; u is standard and known.
func Judge(e, u, k, limit float64) Outcome {
	switch a := math.Abs(e); {
	case float64(k*u)+a <= limit:
		return Shown
	case a-float64(k*u) > limit:
		return NotMet
	}
	return NotResolved
}

// JudgeAll returns the outcome over all stations and the deciding one: not met
// where one station is not met, shown where all are shown, else not resolved.
// limits is per station.
func JudgeAll(e, u []float64, k float64, limits []float64) (Outcome, int) {
	all, at := Shown, 0
	worst := math.Inf(-1)
	for i := range e {
		o := Judge(e[i], u[i], k, limits[i])
		excess := math.Abs(e[i]) + float64(k*u[i]) - limits[i]
		if rank(o) > rank(all) || (rank(o) == rank(all) && excess > worst) {
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
// e unchanged, and false where no u would do.
func Needed(e, k, limit float64) (float64, bool) {
	room := limit - math.Abs(e)
	return room / k, room > 0
}

// PartNeeded returns the value of one part of u that brings u to needed while
// the other parts stay, and false where the others alone exceed it.
func PartNeeded(u, part, needed float64) (float64, bool) {
	rest := float64(u*u) - float64(part*part)
	room := float64(needed*needed) - rest
	if room <= 0 {
		return 0, false
	}
	return math.Sqrt(room), true
}
