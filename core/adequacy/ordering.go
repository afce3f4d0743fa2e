package adequacy

import "math"

// An Ordering is one of the six orders of |E|, U_V and U_reqd, all at 95 %, with
// what it says. Equal values count as not exceeding. The enumeration is that of
// the marine procedure (from memory of its practice; no clause was checked).
type Ordering struct {
	Order string
	Words string
}

// Orderings are all six, in the order of the procedure: first those in which E
// is not distinguishable from the uncertainties.
var Orderings = [6]Ordering{
	{"|E| ≤ U_V ≤ U_reqd", "E is not distinguishable from the uncertainties, which are within what is required"},
	{"|E| ≤ U_reqd < U_V", "E is not distinguishable from the uncertainties, which are larger than required: |E| within the requirement says nothing"},
	{"U_reqd < |E| ≤ U_V", "E is not distinguishable from the uncertainties, and both are larger than required"},
	{"U_V < |E| ≤ U_reqd", "E is resolved at 95 %, and |E| is within what is required"},
	{"U_V ≤ U_reqd < |E|", "E is resolved at 95 %, and |E| is larger than required"},
	{"U_reqd < U_V < |E|", "E is resolved at 95 %, and |E| and the uncertainties are larger than required"},
}

// Order returns the place in Orderings of a comparison error, an expanded
// uncertainty and a requirement, in one unit; -1 where one is not known.
func Order(e, uV, required float64) int {
	a, u, r := ten(math.Abs(e)), ten(uV), ten(required)
	switch {
	case math.IsNaN(a) || math.IsNaN(u) || math.IsNaN(r):
		return -1
	case a <= u && u <= r:
		return 0
	case a <= u && a <= r:
		return 1
	case a <= u:
		return 2
	case a <= r:
		return 3
	case u <= r:
		return 4
	}
	return 5
}
