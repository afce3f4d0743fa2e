package study_test

import (
	"fmt"
	"math"
	"strings"
	"testing"

	"weirmark/core/notice"
	"weirmark/core/study"
)

// pressures is a study of taps in Pa, both sides to become Cp with one card:
// p_ref = 20 Pa ± 1, q = 500 Pa ± 5. The data lie shift Pa above the simulation.
func pressures(shift float64) *study.Study {
	p := func(x float64) float64 { return 20 + 500*math.Cos(3*x) }
	s := pair(rows(30, even, p), rows(12, func(i int) float64 { return float64(i) / 29 * 2 }, func(x float64) float64 { return p(x) + shift }), "m", "m")
	for i := range s.Slips {
		s.Slips[i].Y.Unit = entered("Pa")
	}
	s.Cases = []study.Card{{Name: "C", References: []study.ReferenceQuantity{
		{Symbol: study.RefPressure, Value: 20, Unit: "Pa", U: pointer(1), Origin: "log"},
		{Symbol: study.DynamicPressure, Value: 500, Unit: "Pa", U: pointer(5), Origin: "log"},
	}}}
	s.Questions[0].Form = study.Form{Name: "Cp", Simulation: study.FormTurned, Data: study.FormTurned}
	return s
}

func budgetLine(c *study.Cell, name string) *study.SourceLine {
	for i := range c.Sources {
		if c.Sources[i].Name == name {
			return &c.Sources[i]
		}
	}
	return nil
}

// Both sides become Cp = (p - p_ref)/q, and each moves with q as declared.
func TestFormsMoveAsDeclared(t *testing.T) {
	at := func(q float64, form study.Form) (s, d float64) {
		t.Helper()
		st := pressures(0)
		st.Cases[0].References[1].Value = q
		st.Questions[0].Form = form
		for i, side := range []string{form.Simulation, form.Data} {
			if side != study.FormTurned {
				st.Slips[i].Y.Unit = entered("1")
			}
		}
		c := only(t, st)
		if len(c.Stations) != 12 || c.Unit != "1" {
			t.Fatalf("%d stations in %q: %+v", len(c.Stations), c.Unit, c.Notices)
		}
		return float64(c.Stations[0].S), float64(c.Stations[0].D)
	}
	for _, row := range []struct{ simulation, data string }{
		{study.FormTurned, study.FormTurned}, {study.FormTurned, study.FormAsIs}, {study.FormMade, study.FormTurned}, {study.FormMade, study.FormMade},
	} {
		form := study.Form{Name: "Cp", Simulation: row.simulation, Data: row.data}
		s1, d1 := at(500, form)
		s2, d2 := at(250, form)
		want := func(mode string) float64 {
			if mode == study.FormTurned {
				return 2
			}
			return 1
		}
		if math.Abs(s2/s1-want(row.simulation)) > 1e-12 || math.Abs(d2/d1-want(row.data)) > 1e-12 {
			t.Errorf("%+v: S %v to %v, D %v to %v when q is halved", row, s1, s2, d1, d2)
		}
		if row.simulation == study.FormTurned && math.Abs(s1-1) > 1e-12 {
			t.Errorf("Cp at x = 0 is %v, want 1", s1)
		}
	}
}

// Of E = (p_S - p_D)/q an error of q that both sides share leaves E/q, and one
// of p_ref nothing; apart, each side has all of it.
func TestSharedReferencesCancel(t *testing.T) {
	const e = -10. / 500 // of Cp
	cp := func(c *study.Cell, i int) float64 { return math.Cos(3 * float64(c.Stations[i].X)) }
	c := only(t, pressures(10))
	if line := budgetLine(c, "reference p_ref"); line != nil {
		t.Errorf("a common p_ref is left in the budget: %+v", line)
	}
	q := budgetLine(c, "reference q∞")
	if q == nil || math.Abs(float64(q.U)-math.Abs(e)*.01) > 1e-9 || q.Pattern != study.Common || q.Of != study.OfInput {
		t.Fatalf("a common q: %+v, want u = %v", q, math.Abs(e)*.01)
	}
	same := only(t, pressures(0))
	if line := budgetLine(same, "reference q∞"); line != nil {
		t.Errorf("S = D, and a common q is left: %+v", line)
	}
	apart := pressures(10)
	apart.Cases[0].References[1].Shared = study.ErrorApart
	c = only(t, apart)
	ofS, ofD := 0.0, 0.0
	for i := range c.Stations {
		ofS += math.Pow(cp(c, i)*.01, 2) / 12
		ofD += math.Pow((cp(c, i)+.02)*.01, 2) / 12
	}
	found := map[string]float64{}
	for _, line := range c.Sources {
		if line.Name == "reference q∞" {
			found[line.Of] = float64(line.U)
		}
	}
	if math.Abs(found[study.OfInput]-math.Sqrt(ofS)) > 1e-6 || math.Abs(found[study.OfData]-math.Sqrt(ofD)) > 1e-6 {
		t.Errorf("apart: %v, want %v of the simulation and %v of the data", found, math.Sqrt(ofS), math.Sqrt(ofD))
	}
	// Data given as Cp that was made with the card see the error of q too.
	made := pressures(0)
	made.Slips[1].Y.Unit = entered("1")
	made.Files[1].Data = []byte(rows(12, func(i int) float64 { return float64(i) / 29 * 2 }, func(x float64) float64 { return math.Cos(3*x) + .02 }))
	made.Files[1].SHA256 = study.Hash(made.Files[1].Data)
	made.Questions[0].Form.Data = study.FormMade
	c = only(t, made)
	q = budgetLine(c, "reference q∞")
	if q == nil || math.Abs(float64(q.U)-math.Abs(e)*.01) > 1e-7 {
		t.Errorf("data made with the card: %+v, want u = %v", q, math.Abs(e)*.01)
	}
}

// Two entries of one instrument: the tick makes the two errors one.
func TestSeparateReferences(t *testing.T) {
	for _, row := range []struct {
		shared string
		lines  int
	}{{"", 2}, {study.ErrorShared, 1}} {
		s := pressures(10)
		s.Cases[0].References[1].Side = study.Simulation
		s.Cases[0].References = append(s.Cases[0].References, study.ReferenceQuantity{Symbol: study.DynamicPressure, Value: 510, Unit: "Pa", U: pointer(5), Side: study.OfData, Shared: row.shared})
		c := only(t, s)
		n := 0
		for _, line := range c.Sources {
			if line.Name == "reference q∞" {
				n++
			}
		}
		if n != row.lines || math.Abs(float64(c.Stations[0].D)-510./510) > 1e-9 || math.Abs(float64(c.Stations[0].S)-1) > 1e-9 {
			t.Errorf("shared %q: %d lines, S %v, D %v", row.shared, n, c.Stations[0].S, c.Stations[0].D)
		}
	}
}

// Without q on the card it is ρ U²/2, its parts are those of ρ and U, and the
// card says so.
func TestDynamicPressureIsComputed(t *testing.T) {
	s := pressures(10)
	s.Cases[0].References = []study.ReferenceQuantity{
		{Symbol: study.RefPressure, Value: 20, Unit: "Pa", U: pointer(0)},
		{Symbol: study.Density, Value: 1.25, Unit: "kg/m^3", U: pointer(0)},
		{Symbol: study.RefSpeed, Value: 101.8233764, Unit: "km/h", U: pointer(.5), Shared: study.ErrorApart},
	}
	c := only(t, s)
	speed := 101.8233764 / 3.6
	q := 1.25 * speed * speed / 2
	if got := float64(c.Stations[0].S); math.Abs(got-500/q) > 1e-9 {
		t.Errorf("S = %v, want %v", got, 500/q)
	}
	var line *study.ReferenceLine
	for i := range c.References {
		if c.References[i].Symbol == "q∞" {
			line = &c.References[i]
		}
	}
	if line == nil || line.Formula != "q∞ = ρ U_ref²/2" || math.Abs(float64(line.Value)-q) > 1e-6 || math.Abs(float64(line.U)-2*q*.5/101.8233764) > 1e-6 {
		t.Errorf("%+v", line)
	}
	if budgetLine(c, "reference U_ref") == nil || budgetLine(c, "reference ρ") != nil {
		t.Errorf("sources %+v", c.Sources)
	}
}

// The sentence of the mapping follows from the mapping.
func TestMappingSentence(t *testing.T) {
	s := pressures(0)
	s.Slips[1].Datum = entered(study.DatumGauge)
	s.Questions[0].XForm = study.Form{Name: "x/L", Simulation: study.FormTurned, Data: study.FormTurned}
	s.Cases[0].References = append(s.Cases[0].References, study.ReferenceQuantity{Symbol: study.RefLength, Value: .24, Unit: "m", U: pointer(0)})
	want := func(sentence string) {
		t.Helper()
		c := only(t, s)
		if len(c.Mapping) != 2 || c.Mapping[1] != sentence {
			t.Errorf("%q, want %q", c.Mapping, sentence)
		}
	}
	want("ref.csv: column 2 = y in Pa, gauge; becomes Cp = (y − p_ref)/q∞ with p_ref = 20 Pa ± 1, q∞ = 500 Pa ± 5; over column 1 = x in m; becomes x/L = x/L with L = 0.24 m ± 0.")
	s.Cases[0].References[1].Value = 574.7
	s.Questions[0].XForm.Data = study.FormAsIs
	s.Slips[1].X.Unit, s.Questions[0].XForm.Simulation = entered("m"), study.FormAsIs
	want("ref.csv: column 2 = y in Pa, gauge; becomes Cp = (y − p_ref)/q∞ with p_ref = 20 Pa ± 1, q∞ = 574.7 Pa ± 5; over column 1 = x in m.")
	s.Questions[0].Form = study.Form{}
	want("ref.csv: column 2 = y in Pa, gauge; over column 1 = x in m.")
}

// A formula of columns and of the card gives the same values as the form does.
func TestFormulaOfColumns(t *testing.T) {
	want := only(t, pressures(10))
	s := pressures(10)
	s.Questions[0].Form = study.Form{}
	for i := range s.Slips {
		s.Slips[i].Y = study.ColumnUse{Formula: entered(`("y in Pa" - p_ref)/q`), Unit: entered("1")}
	}
	got := only(t, s)
	if len(got.Stations) != len(want.Stations) {
		t.Fatalf("%d stations: %+v", len(got.Stations), got.Notices)
	}
	for i := range got.Stations {
		if a, b := got.Stations[i], want.Stations[i]; a.S != b.S || a.D != b.D || math.Abs(float64(a.UVal-b.UVal)) > 1e-9 {
			t.Errorf("station %d: %+v, want %+v", i, a, b)
		}
	}
	if text := "Values were computed as (y − p_ref)/q∞ with p_ref = 20 Pa ± 1, q∞ = 500 Pa ± 5."; !told(got, "formula-used", text) {
		t.Errorf("%+v", got.Notices)
	}
	for _, row := range []struct{ formula, unit, code, part string }{
		{"y - p_ref", "Pa", "formula-refused", "has no unit"},
		{`"y in Pa" - q*L`, "Pa", "formula-refused", "L is not on the card"},
		{`"y in m/s" - q`, "Pa", "formula-refused", "- joins m s^-1 and kg m^-1 s^-2 (at character 12)"},
		{`"y in Pa" - q`, "1", "formula-dimension", "gives kg m^-1 s^-2"},
		{`"z" - q`, "Pa", "formula-refused", `No column named "z"`},
		{`log("y in Pa"/q - 9)`, "1", "column-empty", "holds no number"},
	} {
		s.Slips[1].Y = study.ColumnUse{Formula: entered(row.formula), Unit: entered(row.unit)}
		if c := only(t, s); !told(c, row.code, row.part) || c.Summary != nil || !c.Withheld {
			t.Errorf("%s: %+v", row.formula, c.Notices)
		}
	}
}

func told(c *study.Cell, code, part string) bool {
	for _, n := range c.Notices {
		if n.Code == code && strings.Contains(n.Text, part) {
			return true
		}
	}
	return false
}

// Every form is what its definition says, of values of 3 in SI, with quantities
// of the card that are different primes. Own hand calculation.
func TestEveryForm(t *testing.T) {
	card := map[string]float64{"L": 2, "H": 5, "δ": 7, "θ": 11, "U_ref": 13, "u_τ": 17, "ρ": 19, "μ": 23, "T_ref": 29, "T_w": 31, "λ": 37, "c_p": 41, "p_ref": 43, "A_ref": 47}
	units := map[string]string{}
	for _, known := range study.CardSymbols {
		units[known.Symbol] = known.Unit
	}
	q, nu := 19*13*13/2., 23./19
	want := map[string]map[string]float64{
		"Cp": {"Pa": (3 - 43) / q, "m^2/s^2": (3*19 - 43) / q}, "ΔCp": {"Pa": 3 / q}, "K": {"Pa": 3 / q}, "Cf": {"Pa": 3 / q, "m/s": 2. * 9 / 169},
		"Cd": {"N": 3 / (q * 47), "N/m": 3 / (q * 2)}, "Cl": {"N": 3 / (q * 47), "N/m": 3 / (q * 2)}, "Cm": {"N m": 3 / (q * 47 * 2), "N": 3 / (q * 4)},
		"Nu": {"W/(m^2 K)": 3 * 2. / 37, "W/m^2": 3 * 2. / (37 * 2)}, "Stanton number": {"W/(m^2 K)": 3 / (19 * 41 * 13.), "W/m^2": 3 / (19 * 41 * 13 * 2.)},
		"St": {"Hz": 3 * 2 / 13.}, "Re": {"m/s": 3 * 2 / nu, "m": 3 * 13 / nu}, "u/U": {"m/s": 3 / 13.}, "u⁺": {"m/s": 3 / 17.},
		"Tu": {"m/s": 3 / 13., "m^2/s^2": math.Sqrt2 / 13}, "u'/U": {"m/s": 3 / 13., "m^2/s^2": math.Sqrt(3) / 13}, "u'u'/U²": {"m^2/s^2": 3 / 169., "m/s": 9 / 169.},
		"k/U²": {"m^2/s^2": 3 / 169.}, "C/C₀": {"kg/m^3": 3 / 53.}, "Θ": {"K": (3 - 29) / 2.}, "H₁₂": {"m": 3 / 11.},
		"x/L": {"m": 3 / 2.}, "x/H": {"m": 3 / 5.}, "y/δ": {"m": 3 / 7.}, "y⁺": {"m": 3 * 17 / nu}, "Re_x": {"m": 3 * 13 / nu},
	}
	for _, kind := range study.FormKinds {
		if len(want[kind.Name]) == 0 {
			t.Errorf("%s is in no row here", kind.Name)
		}
		for unit, value := range want[kind.Name] {
			s := pair("x,y\n3,3\n6,3\n", "x,y\n3,3\n6,3\n", "m", "m")
			s.Cases = []study.Card{{Name: "C"}}
			for _, known := range study.CardSymbols { // in order
				if v, given := card[known.Symbol]; given {
					s.Cases[0].References = append(s.Cases[0].References, study.ReferenceQuantity{Symbol: known.Symbol, Value: v, Unit: units[known.Symbol], U: pointer(0)})
				}
			}
			s.Cases[0].References = append(s.Cases[0].References, study.ReferenceQuantity{Symbol: "C_ref", Value: 53, Unit: "kg/m^3", U: pointer(0)})
			form := study.Form{Name: kind.Name, Simulation: study.FormTurned, Data: study.FormTurned}
			got := func(c *study.Cell) float64 { return float64(c.Stations[0].S) }
			if kind.Station {
				s.Questions[0].XForm = form
				got = func(c *study.Cell) float64 { return float64(c.Stations[0].X) }
				for i := range s.Slips {
					s.Slips[i].X.Unit = entered(unit)
				}
			} else {
				s.Questions[0].Form = form
				for i := range s.Slips {
					s.Slips[i].Y.Unit = entered(unit)
				}
			}
			c := only(t, s)
			if len(c.Stations) != 2 || math.Abs(got(c)-value) > 1e-9*math.Abs(value) {
				t.Errorf("%s of %s: %+v %+v, want %v", kind.Name, unit, c.Stations, c.Notices, value)
				continue
			}
			if !told(c, "form-turned", kind.Name+" = ") {
				t.Errorf("%s: its formula is not printed", kind.Name)
			}
		}
	}
}

func TestFormRefusals(t *testing.T) {
	for _, row := range []struct {
		change func(*study.Study)
		code   string
		blocks bool
	}{
		{func(s *study.Study) { s.Cases[0].References = s.Cases[0].References[:1] }, "form-card", true},
		{func(s *study.Study) { s.Slips[1].Y.Unit = entered("m/s") }, "form-dimension", true},
		{func(s *study.Study) { s.Slips[1].Y.Unit = study.Field{} }, "form-unit", true},
		{func(s *study.Study) { s.Questions[0].Form.Data = study.FormMade }, "form-made", true},
		{func(s *study.Study) { s.Slips[0].Y.Unit = entered("m^2/s^2") }, "form-card", true}, // no density
		{func(s *study.Study) { s.Cases[0].References[1].Unit = "m" }, "card-unit", true},
		{func(s *study.Study) { s.Cases[0].References[1].U = nil }, "card-uncertainty", false},
		{func(s *study.Study) { s.Slips[1].Y.Unit = entered("dB") }, "unit-level", true},
	} {
		s := pressures(10)
		row.change(s)
		c := only(t, s)
		if !notice.Has(c.Notices, row.code) || row.blocks && (c.Summary != nil || !c.Withheld) || len(c.Open) == 0 {
			t.Errorf("%s: %+v", row.code, c.Notices)
		}
	}
}

// The uncertainty of a tap goes through the form, and the reduction by sampling
// agrees with the first order where the formula is linear in all but q.
func TestReductionBothWays(t *testing.T) {
	s := pressures(10)
	var b strings.Builder
	b.WriteString("x,y,u\n")
	for i := range 12 {
		x := float64(i) / 29 * 2
		fmt.Fprintf(&b, "%.6g,%.6g,3\n", x, 30+500*math.Cos(3*x))
	}
	s.Files[1].Data = []byte(b.String())
	s.Files[1].SHA256 = study.Hash(s.Files[1].Data)
	s.Slips[1].U, s.Slips[1].UFactor = study.ColumnUse{Column: entered("u"), Unit: entered("Pa")}, entered("1")
	c := only(t, s)
	if column := budgetLine(c, "column u"); column == nil || math.Abs(float64(column.U)-3./500) > 1e-9 {
		t.Errorf("the tap's uncertainty is %+v, want %v", column, 3./500)
	}
	r := c.Reduction
	// u² = (u_p² + u_pref² + (Cp u_q)²)/q² at Cp = 1.02, own hand calculation.
	want := math.Sqrt(9+1+math.Pow(1.02*5, 2)) / 500
	if r == nil || math.Abs(float64(r.U)-want) > 1e-8 || math.Abs(float64(r.SU)-want) > .01*want || !r.Agrees || r.Draws < 100000 || len(r.Inputs) != 3 || r.Inputs[0].Common || !r.Inputs[2].Common {
		t.Fatalf("%+v, want u = %v", r, want)
	}
	if math.Abs(float64(r.Inputs[2].Part)+1.02*5/500) > 1e-7 {
		t.Errorf("the part of q is %v, want %v", r.Inputs[2].Part, -1.02*5/500)
	}
	// With 20 % of q the reciprocal is skew: the two part, and it is told.
	s.Cases[0].References[1].U = pointer(100)
	c = only(t, s)
	if r = c.Reduction; r == nil || r.Agrees || !notice.Has(c.Notices, "reduction-apart") {
		t.Errorf("a wide q: %+v", r)
	}
}

func TestAxes(t *testing.T) {
	s := pair("x,y\n0,1\n1,2\n2,4\n", "x,y\n-1,2\n-0.5,1.4\n", "m", "m")
	s.Cases = []study.Card{{Name: "C", Axes: []study.Axes{{Side: study.OfData, Flow: study.AgainstX, Up: study.UpZ, Origin: "trailing edge"}, {Side: study.Simulation, Flow: study.AlongX, Up: study.UpY, Origin: "leading edge"}}}}
	c := only(t, s)
	if len(c.Stations) != 2 || c.Stations[0].X != 1 || c.Stations[0].S != 2 {
		t.Errorf("stations %+v", c.Stations)
	}
	for _, code := range []string{"axes-turned", "axes-up", "axes-origin"} {
		if !notice.Has(c.Notices, code) {
			t.Errorf("%s is missing", code)
		}
	}
}
