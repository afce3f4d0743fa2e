package study

import (
	"cmp"
	"math"

	"weirmark/core/derived"
	"weirmark/core/notice"
	"weirmark/core/quantity"
)

// taking is a kind of scalar with what it needs of one study: its settings and
// the units of the curves it is taken from.
type taking struct {
	kind     *derived.Kind
	settings derived.Settings
	x, y     unit    // of the curves
	length   float64 // of a loop: what makes coordinates pure numbers, in SI
	pressure float64 // of a loop: what makes values pure numbers, in SI
	unit     unit    // of the scalar
}

// taking reads the settings of the question for curves in given units, and
// lists what is missing.
func (w *work) taking(kind *derived.Kind, x, y unit) (*taking, bool) {
	t := &taking{kind: kind, x: x, y: y, length: 1, pressure: 1}
	t.settings = derived.Settings{Words: map[string]string{}, Numbers: map[string]float64{}}
	settings := []DerivedSetting{}
	ok := true
	for i := range kind.Parameters {
		p := &kind.Parameters[i]
		text := cmp.Or(w.q.Derive.Parameters[p.Key], p.Default)
		switch {
		case text == "" && p.Needed:
			w.need(2, true, p.Label, w.q.target("derive."+p.Key), "derive-parameter", p.Label, kind.Name)
			ok = false
		case p.Unit == "":
			t.settings.Words[p.Key] = text
		case text != "":
			v := 0.0
			if _, err := number(&v, text, p.Low, 1e30); err != nil {
				w.need(2, true, p.Label, w.q.target("derive."+p.Key), "field-bad", p.Label, w.q.label(), text)
				ok = false
				continue
			}
			si, symbol := t.toSI(p.Unit, v)
			t.settings.Numbers[p.Key] = si
			text += symbol
		}
		if text != "" {
			settings = append(settings, DerivedSetting{Name: p.Label, Value: text})
		}
	}
	if !kind.Loop && !t.derivedUnit() {
		w.refuseDerived(notice.New("derive-unit", kind.Name, x.symbol, y.symbol), w.q.target("derive.kind"))
		return nil, false
	}
	if kind.Loop {
		ok = w.loopScales(t, &settings) && ok
	}
	w.cell.Derived.Settings = settings
	return t, ok
}

// toSI converts a number of a parameter, and returns its unit to print.
func (t *taking) toSI(symbol string, v float64) (float64, string) {
	switch symbol {
	case "x":
		return t.x.ToSI(v), suffix(t.x.symbol)
	case "y":
		return t.y.ToSI(v), suffix(t.y.symbol)
	}
	u, err := quantity.Parse(symbol)
	if err != nil {
		panic("study: a parameter in " + symbol) // of the table of kinds
	}
	return u.ToSI(v), suffix(symbol)
}

func suffix(symbol string) string {
	if symbol == "" || symbol == "1" {
		return ""
	}
	return " " + symbol
}

func (t *taking) suffix() string { return suffix(t.unit.symbol) }

// derivedUnit settles the unit of the scalar from those of the columns.
func (t *taking) derivedUnit() bool {
	k := t.kind
	switch {
	case k.Velocity:
		// A profile in wall units or of pure numbers has no friction velocity.
		if t.y.Dimension != (quantity.Dimension{1, 0, -1}) || t.x.Dimension != (quantity.Dimension{1}) {
			return false
		}
		t.unit = t.y
	case k.Pure && !t.y.Same(quantity.One):
		return false
	case k.X == 0 && k.Y == 0:
		t.unit = unit{quantity.One, "1"}
	case k.X == 1 && k.Y == 0:
		t.unit = t.x
	case k.X == 0 && k.Difference && t.y.Offset != 0:
		t.unit = unit{quantity.Unit{Symbol: "K", Dimension: t.y.Dimension, Factor: 1}, "K"}
	case k.X == 0:
		t.unit = t.y
	default:
		symbol := power(t.x.symbol, k.X)
		switch {
		case k.Y > 0 && k.X < 0:
			symbol = over(t.y.symbol, power(t.x.symbol, -k.X))
		case k.Y > 0:
			symbol = product(t.y.symbol, symbol)
		}
		u, err := quantity.Parse(symbol)
		if err != nil {
			return false
		}
		t.unit = unit{u, symbol}
	}
	return true
}

func power(symbol string, n int) string {
	if symbol == "" || symbol == "1" || n == 1 {
		return cmp.Or(symbol, "1")
	}
	return "(" + symbol + ")^" + string(rune('0'+n))
}

func product(a, b string) string {
	switch {
	case a == "" || a == "1":
		return b
	case b == "1":
		return a
	}
	return "(" + a + ") (" + b + ")"
}

func over(a, b string) string {
	if b == "1" {
		return cmp.Or(a, "1")
	}
	return "(" + cmp.Or(a, "1") + ")/(" + b + ")"
}

// loopScales takes what makes a loop of pure numbers from the card of the
// case.
func (w *work) loopScales(t *taking, settings *[]DerivedSetting) bool {
	t.unit = unit{quantity.One, "1"}
	length, okX := w.e.scaleOf(axis{unit: t.x.Unit}, w.q.Case, OfData, RefLength)
	pressure, okY := w.e.scaleOf(axis{unit: t.y.Unit}, w.q.Case, OfData, DynamicPressure)
	if !okX || !okY {
		w.refuseDerived(notice.New("loop-references", w.q.label(), w.q.Case), w.q.target("derive.kind"))
		return false
	}
	t.length, t.pressure = length, pressure
	alpha, known := w.e.cardValue(w.q.Case, Angle, OfData)
	if !known && !notice.Has(w.cell.Notices, "loop-angle") {
		w.tell(notice.New("loop-angle", w.q.label()))
	}
	t.settings.Numbers[derived.NumberAngle] = alpha
	*settings = append(*settings, DerivedSetting{Name: "angle of attack α of the case", Value: quantity.Typed(quantity.Round(alpha*180/math.Pi, 10)) + "°"})
	return true
}

// scaled returns a curve as its kind takes it: a loop in pure numbers.
func (t *taking) scaled(c derived.Curve) derived.Curve {
	if !t.kind.Loop {
		return c
	}
	return derived.Curve{X: times(c.X, 1/t.length), Y: times(c.Y, 1/t.pressure), Second: times(c.Second, 1/t.length)}
}

func (t *taking) take(c derived.Curve) (derived.Scalar, error) {
	return t.kind.Take(t.scaled(c), t.settings)
}

// value and step print a scalar and a difference of scalars in their unit.
func (t *taking) value(si float64) Number { return Number(t.unit.FromSI(si)) }

func (t *taking) step(si float64) Number { return Number(t.unit.StepFromSI(si)) }
