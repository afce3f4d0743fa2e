package quantity

import (
	"errors"
	"math"
	"strings"
	"testing"

	"pgregory.net/rapid"
)

// TestFactors checks the table of units against values that others print, and
// against relations between units of the table.
func TestFactors(t *testing.T) {
	const digits = "NIST SP 811 (2008) appendix B, digits from memory"
	for _, row := range []struct {
		symbol    string
		si        float64
		tolerance float64 // relative: half a unit of the last printed digit, or exact
		source    string
	}{
		{"psi", 6.894757e3, 1e-7, digits},
		{"lbf", 4.448222, 2e-7, digits},
		{"mph", 0.44704, 1e-15, digits + ", exact there"},
		{"knot", 0.5144444, 1e-7, digits},
		{"kn", 0.5144444, 1e-7, digits},
		{"ft", 0.3048, 1e-15, digits + ", exact there"},
		{"in", 0.0254, 1e-15, digits + ", exact there"},
		{"lb", 0.45359237, 1e-15, digits + ", exact there"},
		{"deg", 1.745329e-2, 2e-7, digits},
		{"atm", 1.01325e5, 1e-15, digits + ", exact there"},
		{"bar", 1e5, 1e-15, digits + ", exact there"},
		{"mbar", 1e2, 1e-15, digits + ", exact there"},
		{"lbf/ft^2", 47.88026, 1e-7, digits},
		{"lb/ft^3", 16.01846, 3e-7, digits},
		{"ft/min", 5.08e-3, 1e-15, digits + ", exact there"},
		{"°R", 5. / 9, 1e-15, digits + ", exact there"},
		{"L/min", 1.666667e-5, 2e-7, digits},
		{"km/h", 1 / 3.6, 1e-15, "definition of the hour"},
		{"kph", 1 / 3.6, 1e-15, "definition of the hour"},
		{"N/mm^2", 1e6, 1e-15, "equals MPa"},
		{"kg m/s^2", 1, 1e-15, "equals N"},
		{"kW h", 3.6e6, 1e-15, "equals 3.6 MJ"},
		{"g/cm3", 1e3, 1e-15, "equals 1000 kg/m^3"},
		{"ppm", 1e-6, 1e-15, "name"},
		{"%", 1e-2, 1e-15, "name"},
	} {
		u, err := Parse(row.symbol)
		if err != nil {
			t.Errorf("%s: %v", row.symbol, err)
			continue
		}
		if math.Abs(u.Factor-row.si) > row.tolerance*row.si || u.Offset != 0 {
			t.Errorf("%s: factor %v, offset %v, want %v and 0 (%s)", row.symbol, u.Factor, u.Offset, row.si, row.source)
		}
	}
}

func TestParse(t *testing.T) {
	const k = 1e-3
	velocity, density, kinematic := Dimension{1, 0, -1}, Dimension{-3, 1}, Dimension{2, 0, -2}
	for _, row := range []struct {
		symbol    string
		dimension Dimension
		factor    float64
	}{
		{"", Dimension{}, 1},
		{"1", Dimension{}, 1},
		{"-", Dimension{}, 1},
		{"%", Dimension{}, 0.01},
		{"mm", Dimension{1}, k},
		{" mm ", Dimension{1}, k},
		{"µm", Dimension{1}, 1e-6},
		{"μm", Dimension{1}, 1e-6}, // Greek letter, not the micro sign
		{"m/s", velocity, 1},
		{"m / s", velocity, 1},
		{"m s^-1", velocity, 1},
		{"m s-1", velocity, 1},
		{"m·s⁻¹", velocity, 1},
		{"m.s-1", velocity, 1},
		{"m*s**-1", velocity, 1},
		{"m\u00a0s-1", velocity, 1},
		{"kg/m^3", density, 1},
		{"kg/m3", density, 1},
		{"kg/m³", density, 1},
		{"kg m⁻³", density, 1},
		{"g/cm³", density, 1e3},
		{"m2/s2", kinematic, 1},
		{"m²/s²", kinematic, 1},
		{"(m/s)²", kinematic, 1},
		{"(m/s)^2", kinematic, 1},
		{"m/s/s", Dimension{1, 0, -2}, 1},
		{"1/s", Dimension{0, 0, -1}, 1},
		{"J/(kg K)", Dimension{2, 0, -2, -1}, 1},
		{"W/(m²·K)", Dimension{0, 1, -3, -1}, 1},
		{"(kg/m) s", Dimension{-1, 1, 1}, 1},
		{"( m )", Dimension{1}, 1},
		{"deg/s", Dimension{0, 0, -1, 0, 1}, math.Pi / 180},
		{"N.m", Dimension{2, 1, -2}, 1},
	} {
		u, err := Parse(row.symbol)
		if err != nil || u.Dimension != row.dimension || math.Abs(u.Factor-row.factor) > 1e-15*row.factor {
			t.Errorf("%q: %+v, %v, want %v and factor %v", row.symbol, u, err, row.dimension, row.factor)
		}
	}
}

func TestParseRefuses(t *testing.T) {
	for _, row := range []struct{ symbol, reason string }{
		{"furlong", "not in the table"},
		{"M", "case matters"},
		{"PA", "case matters"},
		{"m/", "nothing behind the stroke"},
		{"/s", "nothing before the stroke"},
		{"m//s", "two strokes"},
		{"m*", "nothing behind the product"},
		{"m**", "no exponent"},
		{"m^", "no exponent"},
		{"m^0.5", "a root"},
		{"m^5", "exponent above 4"},
		{"m^2^2", "two exponents"},
		{"10 m", "a number"},
		{"1m", "a number"},
		{"°C/s", "a temperature with a zero of its own in a product"},
		{"degF^2", "a temperature with a zero of its own in a product"},
		{"J/kg K", "a product behind a stroke is read in two ways"},
		{"W/m2*K", "a product behind a stroke is read in two ways"},
		{"(m", "open parenthesis"},
		{"m)", "closing parenthesis alone"},
		{"()", "empty parentheses"},
		{"(m)(s)", "no sign between the factors"},
		{"m(s)", "no sign between the factors"},
		{"x/c", "names, not units"},
		{"m4 m4 m4 m4", "exponent above 12 together"},
		{strings.Repeat("m ", 5) + strings.Repeat("1 ", 40) + "1", "longer than 64 bytes"},
		{strings.Repeat("ppm4 ", 11) + "ppm4", "factor below 1e-60"},
	} {
		u, err := Parse(row.symbol)
		var unknown *UnknownError
		if !errors.As(err, &unknown) || unknown.Symbol != strings.TrimSpace(row.symbol) || u != (Unit{}) {
			t.Errorf("%q (%s): %+v, %v, want a refusal that names it", row.symbol, row.reason, u, err)
		}
	}
}

// TestTemperatures: fixed points of the scales, and steps, which have no zero.
func TestTemperatures(t *testing.T) {
	for _, row := range []struct {
		symbol       string
		value, si    float64
		step, stepSI float64
	}{
		{"K", 273.15, 273.15, 1, 1},
		{"°C", 0, 273.15, 1, 1},
		{"°C", 100, 373.15, 10, 10},
		{"degC", -273.15, 0, 1, 1},
		{"C", 20, 293.15, 1, 1},
		{"°F", 32, 273.15, 1.8, 1},
		{"degF", 212, 373.15, 9, 5},
		{"°F", -459.67, 0, 1.8, 1},
		{"°R", 491.67, 273.15, 1.8, 1},
	} {
		u, err := Parse(row.symbol)
		if err != nil {
			t.Errorf("%s: %v", row.symbol, err)
			continue
		}
		// 1e-13 K is two units in the last place of 300 K.
		if got := u.ToSI(row.value); math.Abs(got-row.si) > 1e-13 {
			t.Errorf("%v %s = %v K, want %v", row.value, row.symbol, got, row.si)
		}
		if got := u.StepToSI(row.step); math.Abs(got-row.stepSI) > 1e-14 {
			t.Errorf("a step of %v %s = %v K, want %v", row.step, row.symbol, got, row.stepSI)
		}
	}
}

func TestDimensions(t *testing.T) {
	unit := func(symbol string) Unit {
		u, err := Parse(symbol)
		if err != nil {
			t.Fatal(err)
		}
		return u
	}
	for _, row := range []struct {
		a, b            string
		same, kinematic bool
	}{
		{"mm", "ft", true, false},
		{"m/s", "kn", true, false},
		{"psi", "N/m^2", true, false},
		{"deg", "1", false, false},
		{"deg", "rad", true, false},
		{"%", "1", true, false},
		{"m²/s²", "Pa", false, true},
		{"(m/s)^2", "psi", false, true},
		{"Pa", "m²/s²", false, false},
		{"m/s", "Pa", false, false},
	} {
		a, b := unit(row.a), unit(row.b)
		if a.Same(b) != row.same || b.Same(a) != row.same || a.KinematicOf(b) != row.kinematic {
			t.Errorf("%s and %s: same %v, kinematic %v", row.a, row.b, a.Same(b), a.KinematicOf(b))
		}
	}
}

// symbols returns the symbols of the table in their order.
func symbols() []string { return sortedKeys(units) }

func TestTableIsSound(t *testing.T) {
	all := symbols()
	if len(all) < 50 {
		t.Fatalf("only %d units", len(all))
	}
	for _, symbol := range all {
		u, err := Parse(symbol)
		if err != nil || u.Symbol != symbol || !(u.Factor > 0) {
			t.Errorf("%q: %+v, %v", symbol, u, err)
		}
		if u.Offset != 0 && u.Dimension != temperature {
			t.Errorf("%q has a zero of its own and is no temperature", symbol)
		}
	}
}

func TestToSIAndBack(t *testing.T) {
	all := symbols()
	rapid.Check(t, func(t *rapid.T) {
		u, err := Parse(rapid.SampledFrom(all).Draw(t, "symbol"))
		if err != nil {
			t.Fatal(err)
		}
		v := rapid.Float64Range(-1e9, 1e9).Draw(t, "value")
		// The offset of a temperature takes digits of small values with it.
		allowed := 4e-16*math.Abs(v) + 2e-16*math.Abs(u.Offset/u.Factor)
		if back := u.FromSI(u.ToSI(v)); math.Abs(back-v) > allowed {
			t.Errorf("%v %s came back as %v", v, u.Symbol, back)
		}
		if back := u.StepFromSI(u.StepToSI(v)); math.Abs(back-v) > 4e-16*math.Abs(v) {
			t.Errorf("a step of %v %s came back as %v", v, u.Symbol, back)
		}
	})
}

// TestProductsOfUnits: the parts of a product may stand in any order and be
// written in any of the forms, with one result.
func TestProductsOfUnits(t *testing.T) {
	var plain []string
	for _, symbol := range symbols() {
		if units[symbol].Offset == 0 && symbol != "-" {
			plain = append(plain, symbol)
		}
	}
	rapid.Check(t, func(t *rapid.T) {
		a := rapid.SampledFrom(plain).Draw(t, "a")
		b := rapid.SampledFrom(plain).Draw(t, "b")
		want, err := Parse("(" + a + ")/(" + b + ")")
		if err != nil {
			t.Fatal(err)
		}
		for _, form := range []string{a + "/" + b, a + " / " + b, a + " " + b + "^-1", b + "^-1*" + a, a + "·" + b + "⁻¹"} {
			got, err := Parse(form)
			if err != nil || got.Dimension != want.Dimension || math.Abs(got.Factor/want.Factor-1) > 4e-16 {
				t.Errorf("%q: %+v, %v, want %+v", form, got, err, want)
			}
		}
	})
}

// FuzzParse: whatever is accepted is a finite positive unit whose printed
// symbol parses to the same unit; whatever is refused names the symbol.
func FuzzParse(f *testing.F) {
	for _, seed := range []string{"", "m/s", "kg/m^3", "(m/s)²", "J/(kg K)", "°C", "m4 m4 m4 m4", "((((m))))", "1/1/1", "m\xff", "s⁻¹", "%", "(m)^4)^4"} {
		f.Add(seed)
	}
	f.Fuzz(func(t *testing.T, symbol string) {
		u, err := Parse(symbol)
		if err != nil {
			var unknown *UnknownError
			if !errors.As(err, &unknown) || u != (Unit{}) {
				t.Fatalf("%q: %+v, %v", symbol, u, err)
			}
			return
		}
		if !(u.Factor > 0) || math.IsInf(u.Factor, 0) {
			t.Fatalf("%q: factor %v", symbol, u.Factor)
		}
		if again, err := Parse(u.Symbol); err != nil || again != u {
			t.Fatalf("%q printed as %q and read as %+v, %v, not %+v", symbol, u.Symbol, again, err, u)
		}
	})
}

// A step of 1 K is one of 1 °C and of 1.8 °F, whichever unit states it, and a
// unit of differences has no zero of its own.
func TestStepsOfTemperature(t *testing.T) {
	for _, row := range []struct {
		symbol             string
		step               float64 // that is 1 K
		convention, isStep bool
	}{
		{"K", 1, false, false}, {"°C", 1, true, false}, {"°F", 1.8, true, false}, {"°R", 1.8, false, false},
		{"ΔK", 1, false, true}, {"Δ°C", 1, false, true}, {"∆°C", 1, false, true}, {"Δ°F", 1.8, false, true}, {"ΔdegF", 1.8, false, true},
	} {
		u, err := Parse(row.symbol)
		if err != nil {
			t.Errorf("%s: %v", row.symbol, err)
			continue
		}
		if got := u.StepToSI(row.step); math.Abs(got-1) > 1e-15 || math.Abs(u.StepFromSI(1)-row.step) > 1e-15 {
			t.Errorf("%v %s is a step of %v K", row.step, row.symbol, got)
		}
		if u.ByConvention() != row.convention || u.Step != row.isStep {
			t.Errorf("%s: %+v", row.symbol, u)
		}
	}
	celsius, step, kelvin := must(t, "°C"), must(t, "Δ°F"), must(t, "K")
	if !celsius.StepAgainst(step) || !step.StepAgainst(celsius) || kelvin.StepAgainst(step) || kelvin.StepAgainst(celsius) {
		t.Error("a difference is not told from a temperature")
	}
	if u := must(t, "W/(m^2 Δ°C)"); u != (Unit{Symbol: "W/(m^2 Δ°C)", Dimension: Dimension{0, 1, -3, -1}, Factor: 1}) {
		t.Errorf("per step: %+v", u)
	}
}

// A turn is 360°, 2π rad and 21600 minutes of arc.
func TestAngles(t *testing.T) {
	for _, row := range []struct {
		symbol string
		turn   float64
	}{{"rad", 2 * math.Pi}, {"mrad", 2000 * math.Pi}, {"deg", 360}, {"°", 360}, {"arcmin", 21600}, {"arcsec", 1296000}, {"rev", 1}} {
		if got := must(t, row.symbol).ToSI(row.turn); math.Abs(got-2*math.Pi) > 1e-12 {
			t.Errorf("%v %s is %v rad", row.turn, row.symbol, got)
		}
	}
	if rpm, each := must(t, "rpm"), must(t, "rev/min"); math.Abs(rpm.Factor-each.Factor) > 1e-15 || rpm.Dimension != each.Dimension {
		t.Errorf("rpm is %+v, rev/min %+v", rpm, each)
	}
}

func must(t *testing.T, symbol string) Unit {
	t.Helper()
	u, err := Parse(symbol)
	if err != nil {
		t.Fatal(err)
	}
	return u
}
