package tablefile

import (
	"math"
	"strconv"
	"testing"

	"pgregory.net/rapid"
)

// decimals draws plain decimal numbers of every length and size.
func decimals() *rapid.Generator[string] {
	return rapid.StringMatching(`[-+]?([0-9]{1,20}\.?|[0-9]{0,19}\.[0-9]{1,20})([eE][-+]?[0-9]{1,3})?`)
}

// TestScanNumberEqualsParseFloat compares bit for bit with strconv.
func TestScanNumberEqualsParseFloat(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		text := decimals().Draw(t, "text")
		compareParse(t, text)
	})
}

// TestScanNumberShortest compares on the shortest and on 17-digit forms of
// doubles.
func TestScanNumberShortest(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		v := rapid.Float64().Draw(t, "value")
		digits := rapid.SampledFrom([]int{-1, 6, 12, 15, 17}).Draw(t, "digits")
		compareParse(t, strconv.FormatFloat(v, 'e', digits, 64))
	})
}

type failer interface {
	Errorf(format string, args ...any)
}

func compareParse(t failer, text string) {
	want, err := strconv.ParseFloat(text, 64)
	got, end := scanNumber([]byte(text+" "), 0)
	if err != nil {
		if end != -1 {
			t.Errorf("%q: %v up to %d, ParseFloat says %v", text, got, end, err)
		}
		return
	}
	if end != len(text) || math.Float64bits(got) != math.Float64bits(want) {
		t.Errorf("%q: %v up to %d, want %v up to %d", text, got, end, want, len(text))
	}
}

func TestScanNumberTable(t *testing.T) {
	for _, text := range []string{
		"0", "-0", "-0.0", "+1", "1.", ".5", "-.5e-3", "1e22", "1e23", "9007199254740992", "9007199254740993", "9007199254740993e1",
		"123456789012345678901234567890", "1e-22", "1e-23", "4.9e-324", "2.4e-324", "1e-400", "1.7976931348623157e308", "1e309", "0.1", "0.30000000000000004",
		"2.269449231195475E-002", "0.12665982100000E+03", "000000000000000000000012.5", "18446744073709551616", "18446744073709551615", "1e99999999999",
	} {
		compareParse(t, text)
	}
}

func TestScanNumberStops(t *testing.T) {
	for _, c := range []struct {
		text string
		end  int
	}{
		{"", -1}, {"-", -1}, {".", -1}, {"e5", -1}, {"1e", -1}, {"1e+", -1}, {"abc", -1}, {" 1", -1},
		{"1,2", 1}, {"1.5.2", 3}, {"1.0D-3", 3}, {"3.14-114", 4}, {"0x10", 1}, {"1_000", 1},
	} {
		if _, end := scanNumber([]byte(c.text), 0); end != c.end {
			t.Errorf("%q: end %d, want %d", c.text, end, c.end)
		}
	}
}
