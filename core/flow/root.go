package flow

// root returns where the rising or falling function f changes sign between lo
// and hi, by bisection to the last bit that the interval can resolve: at most
// 2000 halvings, since doubles span 2^11 binary exponents of 53 bits. f must
// have opposite signs at the ends.
func root(f func(float64) float64, lo, hi float64) float64 {
	rising := f(hi) > 0
	for range 2000 {
		mid := lo + float64(0.5*(hi-lo))
		if mid <= lo || mid >= hi {
			break
		}
		if (f(mid) > 0) == rising {
			hi = mid
		} else {
			lo = mid
		}
	}
	return lo + float64(0.5*(hi-lo))
}
