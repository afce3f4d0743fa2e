package integrate

// Simpson returns the integral of the parabolas through stations 0, 1, 2, then
// 2, 3, 4, and so on; where the number of intervals is odd, the last one is
// taken under the parabola through the last three stations. It is exact for
// parabolas, and for cubics where each pair of intervals is equal and their
// number even. It needs three stations; the errors are *FewError and
// *StationError.
//
// With steps g and h, values a, b, c, a pair gives
// (g+h)/6 ((2 - h/g) a + (g+h)^2/(g h) b + (2 - g/h) c).
func Simpson(x, y []float64) (float64, error) {
	if err := refuse(x, y, 3); err != nil {
		return 0, err
	}
	sum := 0.0
	i := 2
	for ; i < len(x); i += 2 {
		g, h := x[i-1]-x[i-2], x[i]-x[i-1]
		whole := g + h
		first, last := 2-h/g, 2-g/h
		middle := whole / g * (whole / h)
		sum += float64(whole / 6 * (float64(first*y[i-2]) + float64(middle*y[i-1]) + float64(last*y[i])))
	}
	if i == len(x) {
		sum += lastInterval(x[i-3:], y[i-3:])
	}
	return sum, nil
}

// lastInterval returns the integral from the second to the third of three
// stations under the parabola through them:
// h/6 ( -h^2/(g(g+h)) a + (3 + h/g) b + (3 - h/(g+h)) c ).
func lastInterval(x, y []float64) float64 {
	g, h := x[1]-x[0], x[2]-x[1]
	whole := g + h
	a := -h / g * (h / whole)
	return h / 6 * (float64(a*y[0]) + float64((3+h/g)*y[1]) + float64((3-h/whole)*y[2]))
}
