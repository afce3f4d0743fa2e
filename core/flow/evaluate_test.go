package flow

import (
	"errors"
	"math"
	"regexp"
	"slices"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"weirmark/core/notice"
	"weirmark/core/quantity"
)

// value evaluates one station of a law that must have a value there.
func value(t *testing.T, id string, p map[string]float64, x float64) float64 {
	t.Helper()
	l, err := Find(id)
	if err != nil {
		t.Fatal(err)
	}
	c, err := l.Evaluate(p, []float64{x})
	if err != nil {
		t.Fatal(err)
	}
	if math.IsNaN(c.Values[0]) {
		t.Fatalf("%s has no value at %v: %v", id, x, c.Notices)
	}
	return c.Values[0]
}

// printed is one expected number: digits as printed or recomputed, and how far
// the value may lie from it.
type printed struct {
	law        string
	parameters map[string]float64
	station    float64
	want       float64
	within     float64
}

func check(t *testing.T, rows []printed) {
	t.Helper()
	for _, row := range rows {
		if got := value(t, row.law, row.parameters, row.station); !(math.Abs(got-row.want) <= row.within) {
			t.Errorf("%s %v at %v: %.12g, want %v within %g", row.law, row.parameters, row.station, got, row.want, row.within)
		}
	}
}

// anyParameters draws parameters inside their domains, near their stated range.
func anyParameters(t *rapid.T, l Law) map[string]float64 {
	p := map[string]float64{}
	for _, s := range l.Parameters {
		p[s.Name] = within(t, s.Stated, s.Name)
	}
	return p
}

// within draws a number of a range, up to a million where it has no end, and
// zero or at least a millionth: below, quotients leave the range of doubles.
func within(t *rapid.T, r Range, name string) float64 {
	lo, hi := max(r.Lo, -1e6), min(r.Hi, 1e6)
	fits := func(v float64) bool { return r.Holds(v) && (v == 0 || math.Abs(v) >= 1e-6) }
	return rapid.Float64Range(lo, hi).Filter(fits).Draw(t, name)
}

// TestEveryLawIsComplete: what the shelf promises of each entry.
func TestEveryLawIsComplete(t *testing.T) {
	id := regexp.MustCompile(`^[a-z0-9]+(-[a-z0-9]+)*$`)
	seen := map[string]bool{}
	laws := Laws()
	if len(laws) < 40 {
		t.Errorf("only %d laws", len(laws))
	}
	for _, l := range laws {
		if !id.MatchString(l.ID) || seen[l.ID] {
			t.Errorf("%q: form of the ID, or twice", l.ID)
		}
		seen[l.ID] = true
		for _, text := range []string{l.Name, l.Formula, l.Source, l.Uncertainty, l.Caveat} {
			if strings.TrimSpace(text) == "" {
				t.Errorf("%s: name, formula, source, uncertainty or caveat is blank", l.ID)
			}
		}
		if l.Kind != Exact && l.Kind != Correlation {
			t.Errorf("%s: kind %q", l.ID, l.Kind)
		}
		if l.Reach != Seen && l.Reach != Quoted && l.Reach != Memory {
			t.Errorf("%s: reach %q", l.ID, l.Reach)
		}
		for _, s := range append([]Symbol{l.Station, l.Value}, l.Parameters...) {
			if _, err := quantity.Parse(s.Unit); err != nil || s.Name == "" || s.Meaning == "" || s.Unit == "" {
				t.Errorf("%s: symbol %+v: %v", l.ID, s, err)
			}
			if s.Domain.Source == "" || s.Stated.Source == "" || s.Stated.Lo < s.Domain.Lo || s.Stated.Hi > s.Domain.Hi || !(s.Domain.Lo < s.Domain.Hi) {
				t.Errorf("%s, %s: ranges %+v and %+v", l.ID, s.Name, s.Domain, s.Stated)
			}
			if s.Default != nil && !s.Stated.Holds(*s.Default) {
				t.Errorf("%s, %s: default %v outside %s", l.ID, s.Name, *s.Default, s.Stated)
			}
		}
		for _, c := range l.Conditions {
			if c.Name == "" || c.Formula == "" || c.Stated.Source == "" {
				t.Errorf("%s: condition %+v", l.ID, c)
			}
		}
	}
}

// TestStationsInside: inside its ranges every law has finite, unflagged values,
// the same in any order of the stations; outside its domain it has none.
func TestStationsInside(t *testing.T) {
	for _, l := range Laws() {
		t.Run(l.ID, rapid.MakeCheck(func(t *rapid.T) {
			p := anyParameters(t, l)
			full, _, beyond, err := l.take(p)
			if err != nil {
				t.Fatal(err)
			}
			stated, domain := l.Station.Stated, l.Station.Domain
			if l.stated != nil {
				stated = l.stated(full)
			}
			if l.domain != nil {
				domain = l.domain(full)
			}
			if !(stated.Lo < stated.Hi) {
				t.Skip("the parameters leave no stated range")
			}
			a, b := within(t, stated, "a"), within(t, domain, "b")
			c, err := l.Evaluate(p, []float64{a, math.NaN(), b, infinite})
			if err != nil {
				t.Fatal(err)
			}
			if math.IsInf(c.Values[0], 0) || math.IsNaN(c.Values[0]) && domain.Holds(a) || c.Flagged[0] != (beyond && domain.Holds(a)) {
				t.Fatalf("at %v: %v, flagged %v", a, c.Values[0], c.Flagged[0])
			}
			if !math.IsNaN(c.Values[1]) || !math.IsNaN(c.Values[3]) || !notice.Has(c.Notices, "law-outside") {
				t.Fatalf("stations that are no numbers have values %v, notices %v", c.Values, c.Notices)
			}
			if c.Flagged[2] != ((beyond || !stated.Holds(b)) && !math.IsNaN(c.Values[2])) {
				t.Fatalf("at %v: flagged %v, stated %s", b, c.Flagged[2], stated)
			}
			turned, err := l.Evaluate(p, []float64{b, a})
			if err != nil || math.Float64bits(turned.Values[1]) != math.Float64bits(c.Values[0]) || math.Float64bits(turned.Values[0]) != math.Float64bits(c.Values[2]) {
				t.Fatalf("order of the stations matters: %v, %v, %v", turned.Values, c.Values, err)
			}
		}))
	}
}

// TestRangesAtTheirEnds: what is refused, what is flagged, what is taken.
func TestRangesAtTheirEnds(t *testing.T) {
	pipe := map[string]float64{"U": 1, "D": 0.1, "nu": 1e-3}
	for _, row := range []struct {
		law        string
		parameters map[string]float64
		station    float64
		has        bool
		codes      []string
	}{
		{"blasius-velocity", nil, -1e-9, false, []string{"law-outside"}},
		{"blasius-velocity", nil, 0, true, nil},
		{"blasius-friction", nil, 0, false, []string{"law-outside"}},
		{"blasius-friction", nil, 999, true, []string{"law-beyond"}},
		{"blasius-friction", nil, 1e3, true, nil},
		{"blasius-friction", nil, 5e5, true, nil},
		{"blasius-friction", nil, 5.1e5, true, []string{"law-beyond"}},
		{"plate-power-5", nil, 4e5, true, []string{"law-beyond"}},
		{"plate-white", nil, 16, false, []string{"law-outside"}},
		{"plate-karman-schoenherr", nil, 199, true, []string{"law-beyond"}},
		{"plate-karman-schoenherr", nil, 20000, true, nil},
		{"plate-karman-schoenherr", nil, 0.5, false, []string{"law-outside"}},
		{"line-ittc-57", nil, 100, false, []string{"law-outside"}},
		{"line-ittc-57", nil, 1e5, true, []string{"law-beyond"}},
		{"wall-viscous", nil, 5, true, nil},
		{"wall-viscous", nil, 5.1, true, []string{"law-beyond"}},
		{"wall-log", map[string]float64{"kappa": 0.41, "B": 5, "Re_tau": 1000}, 150, true, nil},
		{"wall-log", map[string]float64{"kappa": 0.41, "B": 5, "Re_tau": 1000}, 151, true, []string{"law-beyond"}},
		{"wall-log", nil, 100, true, []string{"law-default", "law-default", "law-unchecked"}},
		{"wall-log", map[string]float64{"kappa": 0.41, "B": 5, "Re_tau": 1000}, 0, false, []string{"law-outside"}},
		{"wall-log", map[string]float64{"kappa": 0.5, "B": 5, "Re_tau": 1000}, 100, true, []string{"law-condition"}},
		{"power-profile-7", nil, 1, true, nil},
		{"power-profile-7", nil, 1.01, false, []string{"law-outside"}},
		{"pipe-poiseuille", pipe, 0.05, true, nil},
		{"pipe-poiseuille", pipe, 0.0501, false, []string{"law-outside"}},
		{"pipe-poiseuille", map[string]float64{"U": 1, "D": 0.1, "nu": 1e-5}, 0, true, []string{"law-condition"}},
		{"couette", map[string]float64{"U": -1, "h": 1, "nu": 1e-4}, 0, true, []string{"law-condition"}},
		{"pipe-laminar", nil, 2300, true, nil},
		{"pipe-laminar", nil, 2301, true, []string{"law-beyond"}},
		{"pipe-colebrook", map[string]float64{"eps/D": 0.06}, 1e5, true, []string{"law-condition"}},
		{"pipe-blasius", nil, 1e6, true, []string{"law-beyond"}},
		{"sphere-stokes", nil, 0.2, true, []string{"law-beyond"}},
		{"sphere-schiller-naumann", nil, 801, true, []string{"law-beyond"}},
		{"sphere-brown-lawler", nil, 3e5, true, []string{"law-beyond"}},
		{"plane-jet-turbulent", nil, -2.1, true, []string{"law-beyond"}},
		{"plane-jet-spread", map[string]float64{"S": 0.1, "x0/d": 3}, 3, false, []string{"law-outside"}},
		{"sphere-stokes", nil, 5e-324, false, []string{"law-outside"}}, // 24/Re is beyond the largest double
	} {
		l, err := Find(row.law)
		if err != nil {
			t.Fatal(err)
		}
		c, err := l.Evaluate(row.parameters, []float64{row.station})
		if err != nil {
			t.Errorf("%s: %v", row.law, err)
			continue
		}
		var codes []string
		for _, n := range c.Notices {
			codes = append(codes, n.Code)
		}
		flagged := slices.Contains(row.codes, "law-beyond") || slices.Contains(row.codes, "law-condition")
		if math.IsNaN(c.Values[0]) == row.has || c.Flagged[0] != flagged || !slices.Equal(codes, row.codes) {
			t.Errorf("%s at %v: value %v, flagged %v, notices %v, want %+v", row.law, row.station, c.Values[0], c.Flagged[0], codes, row)
		}
	}
}

// TestRefusedParameters breaks each precondition of the parameters once.
func TestRefusedParameters(t *testing.T) {
	for _, row := range []struct {
		law        string
		parameters map[string]float64
		name       string
		reason     string
	}{
		{"couette", map[string]float64{"U": 1, "h": 1}, "nu", "missing"},
		{"couette", map[string]float64{"U": 1, "h": 0, "nu": 1}, "h", "outside above 0"},
		{"couette", map[string]float64{"U": math.NaN(), "h": 1, "nu": 1}, "U", "not finite"},
		{"couette", map[string]float64{"U": 1, "h": infinite, "nu": 1}, "h", "not finite"},
		{"couette", map[string]float64{"U": 1, "h": 1, "nu": 1, "z": 1, "a": 1}, "a", "not one of this law"},
		{"blasius-velocity", map[string]float64{"Re": 1}, "Re", "not one of this law"},
		{"pipe-colebrook", map[string]float64{"eps/D": -1e-9}, "eps/D", "outside 0 to below 1"},
		{"mixing-layer", map[string]float64{"U2/U1": 1}, "U2/U1", "outside"},
		{"wall-log", map[string]float64{"kappa": 0}, "kappa", "outside"},
		{"wall-log", map[string]float64{"Re_tau": -1}, "Re_tau", "outside"},
		{"ellipse-pressure", map[string]float64{"b/a": 0}, "b/a", "outside"},
	} {
		l, err := Find(row.law)
		if err != nil {
			t.Fatal(err)
		}
		c, err := l.Evaluate(row.parameters, []float64{1})
		var refused *ParameterError
		if !errors.As(err, &refused) || refused.Name != row.name || !strings.Contains(refused.Error(), row.reason) || c.Values != nil {
			t.Errorf("%s %v: %v, want %s %s", row.law, row.parameters, err, row.name, row.reason)
		}
	}
	_, err := Find("no-such-law")
	var unknown *UnknownError
	if !errors.As(err, &unknown) || unknown.ID != "no-such-law" {
		t.Errorf("an unknown law: %v", err)
	}
}

func TestRangeText(t *testing.T) {
	for _, row := range []struct {
		r    Range
		want string
	}{
		{Range{Lo: 0, Hi: 1}, "0 to 1"},
		{Range{Lo: 0, Hi: 1, OpenHi: true}, "0 to below 1"},
		{Range{Lo: 0, Hi: 1, OpenLo: true}, "above 0 to 1"},
		{positive, "above 0"},
		{fromZero, "from 0"},
		{anything, "any number"},
		{Range{Lo: -infinite, Hi: 5}, "up to 5"},
		{Range{Lo: -infinite, Hi: 5, OpenHi: true}, "below 5"},
	} {
		if got := row.r.String(); got != row.want {
			t.Errorf("%+v: %q, want %q", row.r, got, row.want)
		}
	}
}
