package quantity

import (
	"cmp"
	"encoding/json"
	"math"
	"slices"
	"strconv"
	"testing"

	"pgregory.net/rapid"
)

func sortedKeys[K cmp.Ordered, V any](m map[K]V) []K {
	keys := make([]K, 0, len(m))
	for k := range m {
		keys = append(keys, k)
	}
	slices.Sort(keys)
	return keys
}

var inf = math.Inf(1)

func TestNumberJSON(t *testing.T) {
	for _, row := range []struct {
		value           float64
		number, written string // ten digits; all digits
	}{
		{0, "0", "0"},
		{1. / 3, "0.3333333333", "0.3333333333333333"},
		{2. / 3, "0.6666666667", "0.6666666666666666"},
		{-1.23456789012345, "-1.23456789", "-1.23456789012345"},
		{math.Nextafter(0.3, 1), "0.3", "0.30000000000000004"},
		{123456.5, "123456.5", "123456.5"},
		{1e21, "1e+21", "1e+21"},
		{9.99999999999e-7, "1e-06", "9.99999999999e-07"},
		{math.NaN(), "null", "null"},
		{inf, "null", "null"},
		{-inf, "null", "null"},
	} {
		number, err := json.Marshal(Number(row.value))
		if err != nil || string(number) != row.number {
			t.Errorf("Number(%v): %s, %v, want %s", row.value, number, err, row.number)
		}
		written, err := json.Marshal(Written(row.value))
		if err != nil || string(written) != row.written {
			t.Errorf("Written(%v): %s, %v, want %s", row.value, written, err, row.written)
		}
	}
	if negative, err := json.Marshal(Number(math.Copysign(0, -1))); err != nil || string(negative) != "0" {
		t.Errorf("negative zero: %s, %v", negative, err)
	}
}

func TestNumberFromJSON(t *testing.T) {
	var record struct {
		A, B Number
		C, D Written
	}
	if err := json.Unmarshal([]byte(`{"A":1.5,"B":null,"C":-2e3,"D":null}`), &record); err != nil {
		t.Fatal(err)
	}
	if record.A != 1.5 || record.B.Known() || record.C != -2000 || !math.IsNaN(float64(record.D)) {
		t.Errorf("%+v", record)
	}
	if err := json.Unmarshal([]byte(`{"A":"1.5"}`), &record); err == nil {
		t.Error("a text was taken for a number")
	}
	if err := json.Unmarshal([]byte(`{"A":1e999}`), &record); err == nil {
		t.Error("a number out of range was taken")
	}
}

func TestKnown(t *testing.T) {
	for value, want := range map[Number]bool{0: true, -1e300: true, Number(inf): false, Number(-inf): false} {
		if value.Known() != want {
			t.Errorf("%v: %v", value, value.Known())
		}
	}
	if None.Known() {
		t.Error("None is known")
	}
}

func TestRound(t *testing.T) {
	for _, row := range []struct {
		value float64
		n     int
		want  float64
	}{
		{1.23456, 3, 1.23},
		{-1.23456, 3, -1.23},
		{123456, 2, 120000},
		{0.5, 1, 0.5},
		{9.996, 3, 10},
		{2.5, 1, 2},              // the exact half goes to the even digit
		{1.0000000000499, 10, 1}, // below half a unit of the tenth digit
		{1.4999999999999998, 10, 1.5},
		{5e-324, 10, 5e-324},
		{0, 3, 0},
		{inf, 3, inf},
	} {
		if got := Round(row.value, row.n); got != row.want {
			t.Errorf("Round(%v, %d) = %v, want %v", row.value, row.n, got, row.want)
		}
	}
	if !math.IsNaN(Round(math.NaN(), 3)) {
		t.Error("NaN was rounded to a number")
	}
}

func TestRoundIsStable(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		v := rapid.Float64Range(-1e200, 1e200).Draw(t, "value")
		n := rapid.IntRange(1, 15).Draw(t, "digits")
		r := Round(v, n)
		if Round(r, n) != r {
			t.Errorf("Round(%v, %d) = %v, and again %v", v, n, r, Round(r, n))
		}
		// Half a unit of the n-th digit is at most 5*10^-n of the value.
		if v != 0 && math.Abs(r-v) > 5.001*math.Pow(10, -float64(n))*math.Abs(v) {
			t.Errorf("Round(%v, %d) = %v is too far", v, n, r)
		}
		if math.Signbit(r) != math.Signbit(v) {
			t.Errorf("Round(%v, %d) = %v changed sign", v, n, r)
		}
	})
}

// TestNumberPrintsTenDigits: what is printed reads back within half a unit of
// the tenth digit, and is printed the same again.
func TestNumberPrintsTenDigits(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		v := rapid.Float64Range(-1e100, 1e100).Draw(t, "value")
		printed, err := Number(v).MarshalJSON()
		if err != nil {
			t.Fatal(err)
		}
		back, err := strconv.ParseFloat(string(printed), 64)
		if err != nil || math.Abs(back-v) > 5.001e-10*math.Abs(v) {
			t.Errorf("%v was printed as %s (%v)", v, printed, err)
		}
		if again, _ := Number(back).MarshalJSON(); string(again) != string(printed) {
			t.Errorf("%s was printed again as %s", printed, again)
		}
		written, err := Written(v).MarshalJSON()
		if err != nil {
			t.Fatal(err)
		}
		if back, err := strconv.ParseFloat(string(written), 64); err != nil || back != v {
			t.Errorf("%v was written as %s (%v)", v, written, err)
		}
	})
}

func TestText(t *testing.T) {
	for _, row := range []struct {
		value        float64
		n            int
		text, signed string
	}{
		{1.23456, 3, "1.23", "+1.23"},
		{-1.23456, 3, "−1.23", "−1.23"},
		{0, 3, "0", "0"},
		{9.9996, 4, "10.00", "+10.00"},
		{123456, 3, "123456", "+123456"}, // the whole part is kept
		{208896, 10, "208896.0000", "+208896.0000"},
		{0.001234, 2, "0.0012", "+0.0012"},
		{1.5e-5, 2, "0.000015", "+0.000015"},
		{9.99e-6, 2, "0.000010", "+0.000010"}, // 1.0e-5 once rounded
		{1.5e-6, 2, "1.5e−6", "+1.5e−6"},
		{-1.5e-12, 3, "−1.50e−12", "−1.50e−12"},
		{9999999, 3, "1.00e7", "+1.00e7"},
		{1e7, 2, "1.0e7", "+1.0e7"},
		{6.02e23, 3, "6.02e23", "+6.02e23"},
		{0.125, 2, "0.12", "+0.12"},                    // a tie goes to the even digit
		{math.Nextafter(0.125, 1), 2, "0.12", "+0.12"}, // and so does a tie but for its last bit
		{math.NaN(), 3, "–", "–"},
		{inf, 3, "–", "–"},
		{-inf, 3, "–", "–"},
	} {
		if got := Text(row.value, row.n); got != row.text {
			t.Errorf("Text(%v, %d) = %q, want %q", row.value, row.n, got, row.text)
		}
		if got := Signed(row.value, row.n); got != row.signed {
			t.Errorf("Signed(%v, %d) = %q, want %q", row.value, row.n, got, row.signed)
		}
	}
}

func TestLike(t *testing.T) {
	for _, row := range []struct {
		value, u     float64
		n            int
		text, signed string
	}{
		{0.0285985288, 0.00041, 2, "0.02860", "+0.02860"},
		{-1.16, 0.5, 1, "−1.2", "−1.2"},
		{1234.5678, 12, 2, "1235", "+1235"},
		{1234.5678, 120, 2, "1235", "+1235"}, // no zeros are made up before the point
		{0.00004, 0.01, 2, "0.000", "0.000"}, // a zero has no sign
		{-0.00004, 0.01, 2, "0.000", "0.000"},
		{1, 0.0996, 2, "1.00", "+1.00"}, // 0.0996 rounds to 0.10
		{1.25, 0, 2, "1.25", "+1.25"},   // no uncertainty: n decimals
		{1.25, math.NaN(), 1, "1.2", "+1.2"},
		{math.NaN(), 1, 2, "–", "–"},
		{inf, 1, 2, "–", "–"},
		{1, 1e-20, 2, "1.000000000000", "+1.000000000000"}, // at most 12 decimals
	} {
		if got := Like(row.value, row.u, row.n); got != row.text {
			t.Errorf("Like(%v, %v, %d) = %q, want %q", row.value, row.u, row.n, got, row.text)
		}
		if got := SignedLike(row.value, row.u, row.n); got != row.signed {
			t.Errorf("SignedLike(%v, %v, %d) = %q, want %q", row.value, row.u, row.n, got, row.signed)
		}
	}
}

func TestPercent(t *testing.T) {
	for _, row := range []struct {
		value        float64
		text, signed string
	}{
		{0.0741, "7.4", "+7.4"},
		{-0.0741, "−7.4", "−7.4"},
		{1, "100.0", "+100.0"},
		{0.00951, "0.95", "+0.95"},
		{0.00949, "0.95", "+0.95"},
		{0.0095, "0.95", "+0.95"},
		{0.00997, "1.0", "+1.0"},
		{0.01, "1.0", "+1.0"},
		{0.00041, "0.041", "+0.041"},
		{0.0000041, "0.0004", "+0.0004"},
		{1e-9, "0.0000", "0.0000"},
		{-1e-9, "0.0000", "0.0000"},
		{0, "0.0", "0.0"},
		{math.NaN(), "–", "–"},
		{inf, "–", "–"},
	} {
		if got := Percent(row.value); got != row.text {
			t.Errorf("Percent(%v) = %q, want %q", row.value, got, row.text)
		}
		if got := SignedPercent(row.value); got != row.signed {
			t.Errorf("SignedPercent(%v) = %q, want %q", row.value, got, row.signed)
		}
	}
}
