package quantity

import (
	"errors"
	"math"
	"testing"
)

// names of the tests: a tap at 150 Pa, p_ref 20 Pa, q 574.7 Pa, and so on.
var bound = map[string]struct {
	at        int
	dimension Dimension
}{"p": {0, pressure}, "p_ref": {1, pressure}, "q": {2, pressure}, "u": {3, speed}, "a": {4, angle}, "n": {5, pureNumber}, "tap no. 3": {0, pressure}, "ρ": {6, Dimension{-3, 1}}}

var boundValues = []float64{150, 20, 574.7, 3, math.Pi / 6, 0.5, 1.2}

func lookup(n Name) (Operand, error) {
	b, known := bound[n.Text]
	if !known {
		return Operand{}, errors.New("no name " + n.Text)
	}
	return Operand{b.dimension, func(x []float64) float64 { return x[b.at] }}, nil
}

func TestFormulaValues(t *testing.T) {
	for _, row := range []struct {
		text      string
		value     float64
		dimension Dimension
	}{
		{"(p - p_ref)/q", 130 / 574.7, pureNumber},
		{"p − p_ref", 130, pressure},
		{`("tap no. 3" - card.p_ref)/q`, 130 / 574.7, pureNumber},
		{"ρ*u^2/2", 5.4, pressure},
		{"2*u²", 18, Dimension{2, 0, -2}},
		{"-u^2", -9, Dimension{2, 0, -2}},
		{"1 - 2 - 3", -4, pureNumber},
		{"8/4/2", 1, pureNumber},
		{"sqrt(p/ρ)", math.Sqrt(125), speed},
		{"sin(a) + cos(2*a) + tan(n)", 0.5 + 0.5 + math.Tan(0.5), pureNumber},
		{"exp(log(n))", 0.5, pureNumber},
		{"min(p, p_ref) + max(p, p_ref)*abs(-n)", 95, pressure},
		{"1.5e2 * .5", 75, pureNumber},
	} {
		f, err := ParseFormula(row.text)
		if err != nil {
			t.Errorf("%s: %v", row.text, err)
			continue
		}
		o, err := f.Bind(lookup)
		if err != nil {
			t.Errorf("%s: %v", row.text, err)
			continue
		}
		if got := o.Value(boundValues); math.Abs(got-row.value) > 1e-12*math.Abs(row.value) || o.Dimension != row.dimension {
			t.Errorf("%s = %v in %v, want %v in %v", row.text, got, o.Dimension, row.value, row.dimension)
		}
	}
}

func TestFormulaRefusals(t *testing.T) {
	for _, row := range []struct {
		text   string
		column int
		why    string
	}{
		{"", 1, "a name or a number was expected"},
		{"(p - p_ref", 11, "a closing parenthesis was expected"},
		{"p p_ref", 3, "an operation was expected"},
		{"p +", 4, "a name or a number was expected"},
		{"p - u", 3, "- joins kg m^-1 s^-2 and m s^-1"},
		{"p + 1", 3, "+ joins kg m^-1 s^-2 and a pure number"},
		{"min(p, u)", 1, "min joins kg m^-1 s^-2 and m s^-1"},
		{"q/(p - p_ref) + sqrt(u)", 17, "sqrt cannot be taken of m s^-1"},
		{"exp(p)", 1, "exp cannot be taken of kg m^-1 s^-2"},
		{"log(a)", 1, "log cannot be taken of rad"},
		{"q * missing", 5, "no name missing"},
		{"system(p)", 1, "system is none of the functions sqrt, abs, exp, log, sin, cos, tan, min, max"},
		{"min(p)", 1, "min takes 2 arguments"},
		{"u^5", 3, "a power is 2, 3 or 4"},
		{"u^n", 3, "a power is 2, 3 or 4"},
		{"0x10", 1, "a number is written with digits, a point and an exponent"},
		{"p.q", 2, "an operation was expected"},
		{"card.(p)", 6, "a name of the case card was expected"},
		{`"p`, 1, "it cannot be read"},
		{"p = 3", 3, "an operation was expected"},
		{"u^4*u^4*u^4*u^4", 12, "its dimension is beyond any unit"},
	} {
		f, err := ParseFormula(row.text)
		if err == nil {
			_, err = f.Bind(lookup)
		}
		var refusal *FormulaError
		if !errors.As(err, &refusal) || refusal.Column != row.column || refusal.Why != row.why {
			t.Errorf("%q: %+v, want column %d: %s", row.text, err, row.column, row.why)
		}
	}
}

func TestFormulaBounds(t *testing.T) {
	deep, long := "", ""
	for range 100 {
		deep += "("
		long += "p + p + "
	}
	for _, text := range []string{deep + "p", long + "p"} {
		if _, err := ParseFormula(text); err == nil {
			t.Errorf("%.20s… was read", text)
		}
	}
}

func TestFormulaSaid(t *testing.T) {
	for text, want := range map[string]string{
		"(p - p_ref)/q":  "(<p> − <p_ref>)/<q>",
		"ρ*u^2/2":        "<ρ> <u>²/2",
		"p/(q*n)":        "<p>/(<q> <n>)",
		"p - (q - p)":    "<p> − (<q> − <p>)",
		"sqrt(p*-n)":     "sqrt(<p> (−<n>))",
		"-u^2":           "−<u>²",
		"(p + q)^2":      "(<p> + <q>)²",
		`"tap no. 3"/2`:  "<tap no. 3>/2",
		"max(p,(q-p))*3": "max(<p>, <q> − <p>) 3",
	} {
		f, err := ParseFormula(text)
		if err != nil {
			t.Fatal(err)
		}
		if got := f.Said(func(n Name) string { return "<" + n.Text + ">" }); got != want {
			t.Errorf("%s is said %q, want %q", text, got, want)
		}
	}
}

// What is read can be bound or is refused with a place inside the text.
func FuzzFormula(f *testing.F) {
	for _, seed := range []string{"(p - p_ref)/q", "-u^2", `"tap no. 3"*2`, "min(p, max(q, p))", "card.q", "((", "1e999", "sqrt(-n)", "p²"} {
		f.Add(seed)
	}
	f.Fuzz(func(t *testing.T, text string) {
		formula, err := ParseFormula(text)
		if err == nil {
			var o Operand
			if o, err = formula.Bind(lookup); err == nil {
				o.Value(boundValues)
				again, err := ParseFormula(formula.Text)
				if err != nil || len(again.Names()) != len(formula.Names()) {
					t.Errorf("%q is read once but not twice", text)
				}
				return
			}
		}
		var refusal *FormulaError
		if !errors.As(err, &refusal) || refusal.Column < 1 || refusal.Column > len(text)+1 || refusal.Why == "" {
			t.Errorf("%q: %+v", text, err)
		}
	})
}
