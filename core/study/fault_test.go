package study_test

import (
	"fmt"
	"math"
	"testing"

	"weirmark/core/notice"
	"weirmark/core/study"
)

// questions are the codes of all findings that ask whether something is a
// mistake.
var questions = append([]string{"cp-high", "cp-stagnation", "absolute-negative", "temperature-below", "energy-negative", "speed-high", "first-cell", "grid-wall", "datum-differs", "length-scaled",
	"columns-swapped", "rows-repeated", "wall-units", "unit-missing", "percent-zero", "temperature-step", "axes-up", "axes-origin"}, doubts...)

// sides makes a study of two curves in units of their own; the question is q.
func sides(xUnit, yUnit, quantity string, x func(i int) float64, s, d func(x float64) float64) *study.Study {
	st := pair(rows(30, x, s), rows(15, func(i int) float64 { return x(2*i) + (x(1)-x(0))/3 }, d), xUnit, xUnit)
	for i := range st.Slips {
		st.Slips[i].Y.Unit, st.Slips[i].Quantity = entered(yUnit), entered(quantity)
	}
	st.Questions[0].Quantity = quantity
	return st
}

func card(list ...study.ReferenceQuantity) []study.Card {
	for i := range list {
		list[i].U = pointer(0)
	}
	return []study.Card{{Name: "C", References: list}}
}

func given(symbol string, v float64, unit string) study.ReferenceQuantity {
	return study.ReferenceQuantity{Symbol: symbol, Value: v, Unit: unit}
}

// section is a closed contour from the trailing edge over the lower side, the
// nose and the upper side back, with the largest Cp at the nose.
func section(peak float64) string {
	text := "x,y\n"
	for i := range 41 {
		a := math.Pi * float64(i-20) / 20
		text += fmt.Sprintf("%.6g,%.6g\n", (1-math.Cos(a))/2+.0001*float64(i), peak-1.4*math.Pow(math.Sin(a/2), 2)+.3*math.Sin(a))
	}
	return text
}

// Each injected fault raises its question and no other.
func TestInjectedFaults(t *testing.T) {
	scaled := func(f float64) func(float64) float64 { return func(x float64) float64 { return f * smooth(x) } }
	form := func(s *study.Study, name string) *study.Study {
		s.Questions[0].Form = study.Form{Name: name, Simulation: study.FormTurned, Data: study.FormTurned}
		return s
	}
	with := func(s *study.Study, list ...study.ReferenceQuantity) *study.Study {
		s.Cases = card(list...)
		return s
	}
	near := func(x float64) float64 { return smooth(x) + .03*x }
	pascals := func(f, d float64) *study.Study {
		return form(with(sides("m", "Pa", "p", even, func(x float64) float64 { return f * 100 * math.Cos(3*x) }, func(x float64) float64 { return d * 100 * math.Cos(3.05*x) }), given("p_ref", 0, "Pa"), given("q", 100, "Pa")), "Cp")
	}
	loop := func(peak float64) *study.Study {
		s := pair(section(peak), section(1), "1", "1")
		for i := range s.Slips {
			s.Slips[i].Branch = entered("first")
		}
		s.Questions[0].Symbol = "Cp"
		return s
	}
	wall := func(y, settings string) *study.Study {
		s := sides("m", "m/s", "u", even, smooth, near)
		s.Slips[0].Grid, s.Slips[0].YPlus, s.Slips[0].Settings = entered("G1"), entered(y), entered(settings)
		return s
	}
	family := wall("4", "")
	family.Questions[0].Family = &study.Family{Wall: "wall functions"}
	datum := func(s, d string) *study.Study {
		st := pascals(1, 1)
		st.Slips[0].Datum, st.Slips[1].Datum = entered(s), entered(d)
		return st
	}
	apart := datum(study.DatumAbsolute, study.DatumGauge)
	apart.Questions[0].Form = study.Form{}
	for i := range apart.Slips {
		apart.Files[i].Data = []byte(rows(30, even, func(x float64) float64 { return 101325*float64(1-i) + 100*math.Cos(3*x) + 200 }))
		apart.Files[i].SHA256 = study.Hash(apart.Files[i].Data)
	}
	below := sides("m", "Pa", "p", even, func(x float64) float64 { return 100 - 150*x }, func(x float64) float64 { return 100 - 148*x })
	below.Slips[0].Datum, below.Slips[1].Datum = entered(study.DatumAbsolute), entered(study.DatumAbsolute)
	for _, row := range []struct {
		name  string
		study *study.Study
		codes []string
	}{
		{"Cp above 1.05", pascals(1.2, 1.15), []string{"cp-high"}},
		{"stagnation far from 1", loop(.7), []string{"cp-stagnation", "offset-constant"}},
		{"stagnation at 1", loop(1), nil},
		{"speed above 3 U_ref", with(sides("m", "m/s", "u", even, smooth, near), given("U_ref", .5, "m/s")), []string{"speed-high"}},
		{"u/U above 3", form(with(sides("m", "m/s", "u", even, smooth, near), given("U_ref", .5, "m/s")), "u/U"), []string{"speed-high"}},
		{"speed in km/h at 3 U_ref", with(sides("m", "km/h", "u", even, smooth, near), given("U_ref", .5, "m/s")), nil},
		{"absolute pressure below zero", below, []string{"absolute-negative"}},
		{"temperature below absolute zero", sides("m", "°C", "T", even, func(x float64) float64 { return -300 + 400*x*x }, func(x float64) float64 { return -290 + 399*x*x }), []string{"temperature-below"}},
		{"k below zero", sides("m", "m^2/s^2", "k", even, func(x float64) float64 { return x - .2 }, func(x float64) float64 { return 1.04*x + .01 }), []string{"energy-negative"}},
		{"first cell between", wall("8", ""), []string{"first-cell"}},
		{"wall function too near", wall("4", "wall treatment: wall function"), []string{"first-cell"}},
		{"resolved wall too far", wall("40", "wall: resolved"), []string{"first-cell"}},
		{"wall function of the family too near", family, []string{"first-cell"}},
		{"wall function as stated", wall("40", "wall: wall function"), nil},
		{"resolved as stated", wall("0.9", "wall: resolved"), nil},
		{"datum", datum(study.DatumAbsolute, study.DatumGauge), []string{"datum-differs"}},
		{"datum, as it shows", apart, []string{"datum-differs", "offset-constant"}},
		{"millimetres as metres", with(sides("m", "1", "q", func(i int) float64 { return 240 * even(i) }, func(x float64) float64 { return smooth(x / 240) }, func(x float64) float64 { return near(x / 240) }), given("L", .24, "m")), []string{"length-scaled"}},
		{"metres as millimetres", with(sides("mm", "1", "q", func(i int) float64 { return .24 * even(i) }, func(x float64) float64 { return smooth(x / .24) }, func(x float64) float64 { return near(x / .24) }), given("L", 240, "mm")), []string{"length-scaled"}},
		{"ratio 1000", sides("m", "1", "q", even, scaled(1000), smooth), []string{"ratio-constant"}},
		{"nothing", sides("m", "1", "q", even, smooth, near), nil},
	} {
		c := only(t, row.study)
		if c.Summary == nil {
			t.Errorf("%s: not compared: %+v", row.name, c.Notices)
			continue
		}
		for _, code := range questions {
			want := false
			for _, w := range row.codes {
				want = want || w == code
			}
			if notice.Has(c.Notices, code) != want {
				t.Errorf("%s: %s found %v: %+v", row.name, code, !want, c.Notices)
			}
		}
	}
}

// Every ratio of the list is found both ways, with its reason, and nothing is
// changed because of it.
func TestRatiosAreNamed(t *testing.T) {
	for _, row := range []struct {
		ratio  float64
		reason string
	}{
		{1000, "millimetres against metres, or kilopascals against pascals"}, {25.4, "inches against millimetres"}, {2, "a factor 2"}, {.5, "a factor 2"},
		{1.196, "a pressure divided by density (1/ρ = 0.836)"}, {math.Pi / 180, "degrees against radians"}, {1.8, "°F against °C"}, {7.69, "one reference area against the other"},
	} {
		for _, ratio := range []float64{row.ratio, 1 / row.ratio} {
			s := sides("m", "1", "q", even, func(x float64) float64 { return ratio * smooth(x) * (1 + .002*math.Sin(40*x)) }, smooth)
			s.Cases = card(given("ρ", 1.196, "kg/m^3"), given("A_ref", .0864, "m^2"), given("A_ref", .0864/7.69, "m^2"))
			s.Cases[0].References[1].Side, s.Cases[0].References[1].Kind = study.OfData, study.AreaKinds[0]
			s.Cases[0].References[2].Side, s.Cases[0].References[2].Kind = study.Simulation, study.AreaKinds[1]
			c := only(t, s)
			if !told(c, "ratio-constant", row.reason) || !told(c, "ratio-constant", "Nothing was changed") {
				t.Errorf("%v: %+v", ratio, c.Notices)
			}
			if at := c.Stations[3]; math.Abs(float64(at.S)/float64(at.D)/ratio-1) > .01 {
				t.Errorf("%v: S was moved to %v, D %v", ratio, at.S, at.D)
			}
		}
	}
}

// A dozen clean pairs of files of differing kinds raise no question.
func TestCleanPairsOfEveryKind(t *testing.T) {
	turned := func(s *study.Study, name, xName string, list ...study.ReferenceQuantity) *study.Study {
		if name != "" {
			s.Questions[0].Form = study.Form{Name: name, Simulation: study.FormTurned, Data: study.FormTurned}
		}
		if xName != "" {
			s.Questions[0].XForm = study.Form{Name: xName, Simulation: study.FormTurned, Data: study.FormTurned}
		}
		s.Cases = card(list...)
		return s
	}
	mm := func(i int) float64 { return .2 + 60*even(i)*even(i) }
	taps := pair(section(1), section(.99), "1", "1")
	for i := range taps.Slips {
		taps.Slips[i].Branch = entered("first")
	}
	taps.Questions[0].Symbol = "Cp"
	scalars := pair("run,y\n1,0.0301\n", "run,y\n1,0.0293\n2,0.0296\n3,0.0291\n4,0.0297\n5,0.0295\n", "", "")
	for i := range scalars.Slips {
		scalars.Slips[i].X = study.ColumnUse{}
	}
	cold := temperatures("°C", celsius)
	bend := func(x float64) float64 { return 1 + .04*math.Sin(5*x) }
	for name, s := range map[string]*study.Study{
		"pressures of taps": taps,
		"wall pressure to Cp": turned(sides("mm", "Pa", "p", func(i int) float64 { return 240 * even(i) }, func(x float64) float64 { return 30 - 400*x/240*(1-x/240) }, func(x float64) float64 { return 28 - 413*x/240*(1.01-x/240) }),
			"Cp", "x/L", given("p_ref", 5, "Pa"), given("q", 574.7, "Pa"), given("L", .24, "m")),
		"velocity profile": turned(sides("mm", "m/s", "u", mm, func(y float64) float64 { return 31 * math.Pow(y/61, 1./7) }, func(y float64) float64 { return 30.4 * math.Pow(y/60, 1./6.5) }), "", "", given("U_ref", 31, "m/s"), given("L", .24, "m")),
		"wall units": turned(sides("mm", "m/s", "u", mm, func(y float64) float64 { return 1.24 * (math.Log(y*80)/.41 + 5) }, func(y float64) float64 { return 1.22 * (math.Log(y*82)/.4 + 5.1) }), "u⁺", "y⁺",
			given("u_τ", 1.24, "m/s"), given("ν", 1.5e-5, "m^2/s")),
		"temperatures around the freezing point": cold,
		"temperature differences":                sides("m", "Δ°C", "rise", even, func(x float64) float64 { return 12*math.Exp(-3*x) - 2 }, func(x float64) float64 { return 11.7*math.Exp(-2.9*x) - 2 }),
		"turbulent kinetic energy":               turned(sides("mm", "m^2/s^2", "k", mm, func(y float64) float64 { return 9 * math.Exp(-y/14) * (y / 3) }, func(y float64) float64 { return 8.6 * math.Exp(-y/14.5) * (y / 3) }), "k/U²", "", given("U_ref", 31, "m/s")),
		"wall friction that changes sign":        sides("m", "1", "Cf", even, func(x float64) float64 { return .003*(x-.33)/(.2+x) + .0001*math.Sin(8*x) }, func(x float64) float64 { return .0031 * (x - .3) / (.2 + x) }),
		"heat flux to Nu": turned(sides("mm", "W/m^2", "q_w", func(i int) float64 { return 5 + 235*even(i) }, func(x float64) float64 { return 4000 / math.Sqrt(x) }, func(x float64) float64 { return 4100 / math.Pow(x, .51) }), "Nu", "x/L",
			given("T_w", 45, "°C"), given("T_ref", 68, "°F"), given("λ", .026, "W/(m K)"), given("L", .24, "m")),
		"repeated force readings":  scalars,
		"tracer in a street":       sides("m", "1", "C", even, func(x float64) float64 { return .02 + .7*math.Exp(-(x-.4)*(x-.4)/.03) }, func(x float64) float64 { return .02 + .66*math.Exp(-(x-.41)*(x-.41)/.033) }),
		"wake of thirty diameters": turned(sides("m", "m/s", "u", func(i int) float64 { return 1.2 * even(i) }, func(x float64) float64 { return 20 * (1 - .5*math.Exp(-2*x)) * bend(x) }, func(x float64) float64 { return 20 * (1 - .48*math.Exp(-1.9*x)) }), "u/U", "", given("U_ref", 20, "m/s"), given("L", .04, "m")),
	} {
		c := only(t, s)
		if c.Summary == nil && len(c.Stations) == 0 {
			t.Errorf("%s: nothing was compared: %+v", name, c.Notices)
		}
		for _, code := range questions {
			if notice.Has(c.Notices, code) {
				t.Errorf("%s: %s is raised: %+v", name, code, c.Notices)
			}
		}
	}
}

// What the list of bad inputs asks of units, ratios, columns and wall distances
// is raised in its words.
func TestBadInputsOfUnits(t *testing.T) {
	far := func(x float64) float64 { return smooth(x) + .03*x }
	noUnit := pressures(3)
	noUnit.Slips[1].Y.Unit = study.Field{}
	noUnit.Questions[0].Form = study.Form{}
	dense := pressures(3)
	dense.Slips[1].Y.Unit, dense.Questions[0].Form = study.Field{}, study.Form{}
	dense.Cases[0].References = append(dense.Cases[0].References, given(study.Density, .9, "kg/m^3"))
	millimetres := sides("m", "1", "q", func(i int) float64 { return 240 * even(i) }, func(x float64) float64 { return smooth(x / 240) }, func(x float64) float64 { return far(x / 240) })
	millimetres.Cases = card(given("L", .24, "m"))
	kinematic := sides("m", "1", "q", even, func(x float64) float64 { return smooth(x) / 1.196 }, smooth)
	kinematic.Cases = card(given("ρ", 1.196, "kg/m^3"))
	swapped := pair("", rows(15, func(i int) float64 { return float64(i) / 14 }, far), "m", "m")
	swapped.Files, swapped.Slips = swapped.Files[1:], swapped.Slips[1:]
	for i, model := range []string{"A", "B", "D", "E"} {
		first, second := "x,y,v\n", ""
		for k := range 30 {
			x := even(k)
			u, v := smooth(x)+.01*float64(i)*x, math.Cos(9*x)
			if i == 0 {
				u, v = v, u
			}
			second += fmt.Sprintf("%.6g,%.6g,%.6g\n", x, u, v)
		}
		data := []byte(first + second)
		id := "s" + model
		swapped.Files = append(swapped.Files, study.File{ID: id, Name: "sim" + model + ".csv", SHA256: study.Hash(data), Data: data})
		swapped.Slips = append(swapped.Slips, study.Slip{ID: id, File: id, Role: entered(study.Simulation), Case: entered("C"), Quantity: entered("q"), Model: entered(model),
			X: study.ColumnUse{Column: entered("x"), Unit: entered("m")}, Y: study.ColumnUse{Column: entered("y"), Unit: entered("1")}})
	}
	plus := sides("1", "1", "q", func(i int) float64 { return 1 + 20*float64(i) }, smooth, smooth)
	plus.Files[0].Data = []byte("y+" + rows(30, func(i int) float64 { return 1 + 20*float64(i) }, smooth)[1:])
	plus.Files[0].SHA256 = study.Hash(plus.Files[0].Data)
	plus.Slips[0].X.Column, plus.Slips[1].X.Unit = entered("y+"), entered("mm")
	zero := sides("m", "1", "q", even, func(x float64) float64 { return x - .3 }, func(x float64) float64 { return 1.05*x - .3 })
	for _, row := range []struct {
		number int
		study  *study.Study
		code   string
		parts  []string
		stops  bool
	}{
		{13, millimetres, "length-scaled", []string{"x of sim.csv runs from 0 m to 240 m", "L = 0.24 m", "factor 0.001", "millimetres against metres?", "Nothing was changed"}, false},
		{14, noUnit, "unit-missing", []string{`No unit is stated for "y" of ref.csv. Nothing is assumed.`, "Its range fits Pa (Cp −", " to 1.01) or m^2/s^2 (needs ρ)."}, false},
		{14, dense, "unit-missing", []string{"or m^2/s^2 (Cp −", " to 0.901)."}, false},
		{15, kinematic, "ratio-constant", []string{"S/D is 0.836 ±", "1/ρ = 0.836"}, false},
		{16, sides("m", "Pa", "p", even, func(x float64) float64 { return 41.8 + 200*smooth(x) + 2*math.Sin(9*x) }, func(x float64) float64 { return 200 * smooth(x) }), "offset-constant", []string{"E is 42.7 Pa ± 2 everywhere", "different datums? Nothing was removed."}, false},
		{17, swapped, "columns-swapped", []string{`"v" of simA.csv matches what the other runs have, not "y" (3 runs, r = 1`, "are the headers swapped?"}, false},
		{18, plus, "wall-units", []string{"Abscissa y+ of sim.csv is in wall units", "u_tau and nu are needed, and whose u_tau", "Nothing was compared"}, true},
		{56, zero, "percent-withheld", []string{"Percent errors are withheld at 1 station", "|D| is below 2.0 % of its largest value"}, false},
	} {
		r := study.Evaluate(row.study, study.Options{})
		c := &r.Cells[0]
		for _, part := range row.parts {
			if !told(c, row.code, part) {
				t.Errorf("row %d: %q is not told by %s: %+v", row.number, part, row.code, c.Notices)
			}
		}
		if row.stops && (c.Summary != nil || !c.Withheld) {
			t.Errorf("row %d: it is compared", row.number)
		}
	}
}
