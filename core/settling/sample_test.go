package settling

import (
	"math"
	"math/rand/v2"

	"weirmark/core/notice"
)

// lew and michelso are NIST's statistical reference datasets of these names
// (public domain), written from memory. TestCertified holds them to NIST's
// certified mean, standard deviation and autocorrelation to 13 digits, which
// no slip in a value or in the order would survive.
var lew = []float64{
	-213, -564, -35, -15, 141, 115, -420, -360, 203, -338, -431, 194, -220, -513, 154, -125, -559, 92, -21, -579,
	-52, 99, -543, -175, 162, -457, -346, 204, -300, -474, 164, -107, -572, -8, 83, -541, -224, 180, -420, -374,
	201, -236, -531, 83, 27, -564, -112, 131, -507, -254, 199, -311, -495, 143, -46, -579, -90, 136, -472, -338,
	202, -287, -477, 169, -124, -568, 17, 48, -568, -135, 162, -430, -422, 172, -74, -577, -13, 92, -534, -243,
	194, -355, -465, 156, -81, -578, -64, 139, -449, -384, 193, -198, -538, 110, -44, -577, -6, 66, -552, -164,
	161, -460, -344, 205, -281, -504, 134, -28, -576, -118, 156, -437, -381, 200, -220, -540, 83, 11, -568, -160,
	172, -414, -408, 188, -125, -572, -32, 139, -492, -321, 205, -262, -504, 142, -83, -574, 0, 48, -571, -106,
	137, -501, -266, 190, -391, -406, 194, -186, -553, 83, -13, -577, -49, 103, -515, -280, 201, 300, -506, 131,
	-45, -578, -80, 138, -462, -361, 201, -211, -554, 32, 74, -533, -235, 187, -372, -442, 182, -147, -566, 25,
	68, -535, -244, 194, -351, -463, 174, -125, -570, 15, 72, -550, -190, 172, -424, -385, 198, -218, -536, 96,
}

var michelso = []float64{
	299.85, 299.74, 299.90, 300.07, 299.93, 299.85, 299.95, 299.98, 299.98, 299.88, 300.00, 299.98, 299.93, 299.65, 299.76, 299.81, 300.00, 300.00, 299.96, 299.96,
	299.96, 299.94, 299.96, 299.94, 299.88, 299.80, 299.85, 299.88, 299.90, 299.84, 299.83, 299.79, 299.81, 299.88, 299.88, 299.83, 299.80, 299.79, 299.76, 299.80,
	299.88, 299.88, 299.88, 299.86, 299.72, 299.72, 299.62, 299.86, 299.97, 299.95, 299.88, 299.91, 299.85, 299.87, 299.84, 299.84, 299.85, 299.84, 299.84, 299.84,
	299.89, 299.81, 299.81, 299.82, 299.80, 299.77, 299.76, 299.74, 299.75, 299.76, 299.91, 299.92, 299.89, 299.86, 299.88, 299.72, 299.84, 299.85, 299.85, 299.78,
	299.89, 299.84, 299.78, 299.81, 299.76, 299.81, 299.79, 299.81, 299.82, 299.85, 299.87, 299.87, 299.81, 299.74, 299.81, 299.94, 299.95, 299.80, 299.81, 299.87,
}

// generator returns random numbers that are the same wherever they are drawn.
func generator(seed uint64) *rand.Rand { return rand.New(rand.NewPCG(seed, 20)) }

// markov returns n rows of a stationary first-order Markov series of unit
// variance.
func markov(r *rand.Rand, rho float64, n int) []float64 {
	y := make([]float64, n)
	state := r.NormFloat64()
	for i := range y {
		y[i] = state
		state = rho*state + math.Sqrt(1-rho*rho)*r.NormFloat64()
	}
	return y
}

// made returns n rows of f(0), f(1), ...
func made(n int, f func(i float64) float64) []float64 {
	y := make([]float64, n)
	for i := range y {
		y[i] = f(float64(i))
	}
	return y
}

// plus returns f·a + b, value by value.
func plus(b []float64, f float64, a []float64) []float64 {
	y := make([]float64, len(b))
	for i := range y {
		y[i] = f*a[i] + b[i]
	}
	return y
}

func flat(n int, v float64) []float64 { return made(n, func(float64) float64 { return v }) }

func codes(list []notice.Notice) []string {
	all := []string{}
	for _, n := range list {
		all = append(all, n.Code)
	}
	return all
}

func near(got, want, tolerance float64) bool { return math.Abs(got-want) <= tolerance }
