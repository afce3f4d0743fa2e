package tablefile

import "strconv"

// maxNumber bounds the bytes of a number: what is longer is text.
const maxNumber = 1024

// powers holds the powers of ten that a double holds exactly.
var powers = [...]float64{1e0, 1e1, 1e2, 1e3, 1e4, 1e5, 1e6, 1e7, 1e8, 1e9, 1e10, 1e11,
	1e12, 1e13, 1e14, 1e15, 1e16, 1e17, 1e18, 1e19, 1e20, 1e21, 1e22}

// scanNumber reads a plain decimal number that begins at data[i]: sign,
// digits, point, digits, exponent. It returns the value and the offset behind
// the number, or -1 where no such number begins or it is out of range.
//
// The value is that of strconv.ParseFloat, bit for bit: where the digits fit
// 53 bits and the power of ten is exact, one correctly rounded multiplication
// or division gives it (W. D. Clinger, "How to read floating point numbers
// accurately", 1990; from memory); elsewhere ParseFloat is called.
func scanNumber(data []byte, i int) (float64, int) {
	start := i
	negative := false
	if i < len(data) && (data[i] == '-' || data[i] == '+') {
		negative = data[i] == '-'
		i++
	}
	first := i
	var mantissa uint64
	for i < len(data) {
		d := data[i] - '0'
		if d > 9 {
			break
		}
		mantissa = mantissa*10 + uint64(d)
		i++
	}
	digits := i - first
	power := 0
	if i < len(data) && data[i] == '.' {
		i++
		first = i
		for i < len(data) {
			d := data[i] - '0'
			if d > 9 {
				break
			}
			mantissa = mantissa*10 + uint64(d)
			i++
		}
		power = first - i
		digits -= power
	}
	if digits == 0 {
		return 0, -1
	}
	if i < len(data) && data[i]|0x20 == 'e' {
		exponent, end := scanExponent(data, i+1)
		if end < 0 {
			return 0, -1
		}
		power += exponent
		i = end
	}
	// At most 19 digits cannot overflow the 64 bits of the mantissa.
	if digits <= 19 && mantissa <= 1<<53 && power >= -22 && power <= 22 {
		value := float64(mantissa)
		if power < 0 {
			value /= powers[-power]
		} else {
			value *= powers[power]
		}
		if negative {
			value = -value
		}
		return value, i
	}
	if i-start > maxNumber {
		return 0, -1
	}
	value, err := strconv.ParseFloat(string(data[start:i]), 64)
	if err != nil {
		return 0, -1
	}
	return value, i
}

// scanExponent reads a signed integer at data[i] and returns it, kept within
// what matters, and the offset behind it, or -1 where there is none.
func scanExponent(data []byte, i int) (exponent, end int) {
	negative := false
	if i < len(data) && (data[i] == '-' || data[i] == '+') {
		negative = data[i] == '-'
		i++
	}
	first := i
	for i < len(data) {
		d := data[i] - '0'
		if d > 9 {
			break
		}
		if exponent < 100000 {
			exponent = exponent*10 + int(d)
		}
		i++
	}
	if i == first {
		return 0, -1
	}
	if negative {
		exponent = -exponent
	}
	return exponent, i
}
