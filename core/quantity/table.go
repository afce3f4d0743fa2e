package quantity

var (
	length      = Dimension{1}
	mass        = Dimension{0, 1}
	duration    = Dimension{0, 0, 1}
	temperature = Dimension{0, 0, 0, 1}
	angle       = Dimension{0, 0, 0, 0, 1}
	speed       = Dimension{1, 0, -1}
	force       = Dimension{1, 1, -2}
	pressure    = Dimension{-1, 1, -2}
	energy      = Dimension{2, 1, -2}
	power       = Dimension{2, 1, -3}
	pureNumber  = Dimension{}
)

const (
	inch  = 0.0254     // exact, international inch (1959 agreement; from memory)
	pound = 0.45359237 // exact, international pound (1959 agreement; from memory)
	g0    = 9.80665    // exact, standard gravity (CGPM 1901; from memory)
	pi    = 3.141592653589793
)

// Definitions of units outside SI are exact by agreement and written from
// memory; unit_test.go checks them against NIST's and each other's relations.
var units = map[string]Unit{
	"m": {Dimension: length, Factor: 1}, "mm": {Dimension: length, Factor: 1e-3}, "cm": {Dimension: length, Factor: 1e-2},
	"km": {Dimension: length, Factor: 1e3}, "µm": {Dimension: length, Factor: 1e-6}, "um": {Dimension: length, Factor: 1e-6},
	"in": {Dimension: length, Factor: inch}, "inch": {Dimension: length, Factor: inch}, "ft": {Dimension: length, Factor: 12 * inch},
	"kg": {Dimension: mass, Factor: 1}, "g": {Dimension: mass, Factor: 1e-3}, "lb": {Dimension: mass, Factor: pound},
	"s": {Dimension: duration, Factor: 1}, "ms": {Dimension: duration, Factor: 1e-3}, "min": {Dimension: duration, Factor: 60}, "h": {Dimension: duration, Factor: 3600},
	"Hz": {Dimension: Dimension{0, 0, -1}, Factor: 1}, "kHz": {Dimension: Dimension{0, 0, -1}, Factor: 1e3},
	"K": {Dimension: temperature, Factor: 1}, "°C": {Dimension: temperature, Factor: 1, Offset: 273.15}, "degC": {Dimension: temperature, Factor: 1, Offset: 273.15}, "C": {Dimension: temperature, Factor: 1, Offset: 273.15},
	"°F": {Dimension: temperature, Factor: 5. / 9, Offset: 273.15 - 32*5./9}, "degF": {Dimension: temperature, Factor: 5. / 9, Offset: 273.15 - 32*5./9}, "°R": {Dimension: temperature, Factor: 5. / 9},
	"ΔK": {Dimension: temperature, Factor: 1, Step: true}, "Δ°C": {Dimension: temperature, Factor: 1, Step: true}, "ΔdegC": {Dimension: temperature, Factor: 1, Step: true}, "Δ°F": {Dimension: temperature, Factor: 5. / 9, Step: true}, "ΔdegF": {Dimension: temperature, Factor: 5. / 9, Step: true},
	"mrad": {Dimension: angle, Factor: 1e-3}, "arcmin": {Dimension: angle, Factor: pi / 10800}, "arcsec": {Dimension: angle, Factor: pi / 648000}, "rev": {Dimension: angle, Factor: 2 * pi}, "rpm": {Dimension: Dimension{0, 0, -1, 0, 1}, Factor: 2 * pi / 60},
	"rad": {Dimension: angle, Factor: 1}, "deg": {Dimension: angle, Factor: pi / 180}, "°": {Dimension: angle, Factor: pi / 180}, "degree": {Dimension: angle, Factor: pi / 180}, "degrees": {Dimension: angle, Factor: pi / 180},
	"kn": {Dimension: speed, Factor: 1852. / 3600}, "knot": {Dimension: speed, Factor: 1852. / 3600}, "mph": {Dimension: speed, Factor: 63360 * inch / 3600}, "kph": {Dimension: speed, Factor: 1 / 3.6},
	"N": {Dimension: force, Factor: 1}, "kN": {Dimension: force, Factor: 1e3}, "lbf": {Dimension: force, Factor: pound * g0},
	"Pa": {Dimension: pressure, Factor: 1}, "hPa": {Dimension: pressure, Factor: 1e2}, "kPa": {Dimension: pressure, Factor: 1e3}, "MPa": {Dimension: pressure, Factor: 1e6},
	"bar": {Dimension: pressure, Factor: 1e5}, "mbar": {Dimension: pressure, Factor: 1e2}, "psi": {Dimension: pressure, Factor: pound * g0 / (inch * inch)}, "atm": {Dimension: pressure, Factor: 101325},
	"J": {Dimension: energy, Factor: 1}, "kJ": {Dimension: energy, Factor: 1e3}, "W": {Dimension: power, Factor: 1}, "kW": {Dimension: power, Factor: 1e3}, "MW": {Dimension: power, Factor: 1e6},
	"L": {Dimension: Dimension{3}, Factor: 1e-3}, "l": {Dimension: Dimension{3}, Factor: 1e-3},
	"%": {Dimension: pureNumber, Factor: 1e-2}, "percent": {Dimension: pureNumber, Factor: 1e-2}, "‰": {Dimension: pureNumber, Factor: 1e-3}, "ppm": {Dimension: pureNumber, Factor: 1e-6}, "1": {Dimension: pureNumber, Factor: 1},
}

func find(symbol string) (Unit, bool) {
	u, ok := units[symbol]
	return u, ok
}
