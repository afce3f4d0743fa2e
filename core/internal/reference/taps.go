package reference

import "math"

// Taps are the 24 pressure taps on the upper branch of the invented demo
// campaign (design, demo campaign, section 6.1): comparison errors of models A
// and B as printed there, and the standard uncertainties that go with them.
var (
	TapsErrorA = []float64{
		.0382, .0245, .0315, .0160, .0294, .0392, .0409, .0226, .0264, .0282, .0124, .0409,
		.0345, .0334, .0368, .0278, .0315, .0355, .0349, .0268, .0218, .0340, .0326, .0229,
	}
	TapsErrorB = []float64{
		.0046, .0150, .0230, .0243, .0219, .0153, -.0045, -.0092, -.0216, -.0218, -.0114, -.0056,
		.0083, .0154, .0235, .0233, .0131, .0006, -.0058, -.0152, -.0275, -.0239, -.0092, .0047,
	}
)

// Standard uncertainties of the taps: random and of the grid, both independent
// between taps, and of the pressure reference, common to all.
const (
	TapsRandom   = .006
	TapsGrid     = .004
	TapsPressure = .020
)

// TapsPosition returns x/c of every tap: 0.02 + 0.95 (i/23)^1.25.
func TapsPosition() []float64 {
	x := make([]float64, len(TapsErrorA))
	for i := range x {
		x[i] = 0.02 + float64(0.95*math.Pow(float64(i)/23, 1.25))
	}
	return x
}

// TapsCp returns the pressure coefficients at the taps: of model B,
//
//	-1.05 exp(-((x - 0.16)/0.2)^2) - 0.35 (1 - x) + 0.28 x^2,
//
// rounded to four decimals, and from it the data D = S_B - E_B and model A,
// S_A = D + E_A, both rounded to four decimals as the errors are.
func TapsCp() (sB, d, sA []float64) {
	for i, x := range TapsPosition() {
		z := (x - 0.16) / 0.2
		b := fourDecimals(-float64(1.05*math.Exp(-float64(z*z))) - float64(0.35*(1-x)) + float64(0.28*x*x))
		data := fourDecimals(b - TapsErrorB[i])
		sB, d, sA = append(sB, b), append(d, data), append(sA, fourDecimals(data+TapsErrorA[i]))
	}
	return sB, d, sA
}

func fourDecimals(v float64) float64 { return math.Round(v*1e4) / 1e4 }
