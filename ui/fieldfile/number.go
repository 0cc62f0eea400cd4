package fieldfile

import (
	"strconv"
)

// exactPowers of ten are exact as float64.
var exactPowers = [...]float64{1, 1e1, 1e2, 1e3, 1e4, 1e5, 1e6, 1e7, 1e8, 1e9, 1e10, 1e11,
	1e12, 1e13, 1e14, 1e15, 1e16, 1e17, 1e18, 1e19, 1e20, 1e21, 1e22}

// exactDigits is how many decimal digits always fit into the 53 bits of a
// float64; a number of so many, times or over an exact power of ten, is rounded
// once and therefore right (Clinger 1990).
const exactDigits = 15

// number reads a decimal number that fills the whole text: sign, digits, point,
// exponent, nothing else. Hexadecimal numbers, infinities and underscores, which
// strconv takes, are none.
func number(b []byte) (float64, bool) {
	i, n := 0, len(b)
	negative := false
	if n > 0 && (b[0] == '-' || b[0] == '+') {
		negative = b[0] == '-'
		i = 1
	}
	mantissa, digits, scale, seen := uint64(0), 0, 0, i
	for ; i < n; i++ {
		c := b[i] - '0'
		if c > 9 {
			break
		}
		mantissa = mantissa*10 + uint64(c)
	}
	digits = i - seen
	if i < n && b[i] == '.' {
		i++
		point := i
		for ; i < n; i++ {
			c := b[i] - '0'
			if c > 9 {
				break
			}
			mantissa = mantissa*10 + uint64(c)
		}
		scale = i - point
		digits += scale
	}
	if i != n || digits == 0 || digits > exactDigits {
		return slowNumber(b, i, digits)
	}
	x := float64(mantissa)
	if scale > 0 {
		x /= exactPowers[scale]
	}
	if negative {
		x = -x
	}
	return x, true
}

// slowNumber reads what the fast way does not: exponents and more digits. The
// mantissa ends at i.
func slowNumber(b []byte, i, digits int) (float64, bool) {
	if digits == 0 || len(b) > 400 {
		return 0, false
	}
	if i < len(b) {
		if c := b[i] | 0x20; c != 'e' {
			return 0, false
		}
		j := i + 1
		if j < len(b) && (b[j] == '-' || b[j] == '+') {
			j++
		}
		if j == len(b) {
			return 0, false
		}
		for ; j < len(b); j++ {
			if c := b[j] - '0'; c > 9 {
				return 0, false
			}
		}
	}
	x, err := strconv.ParseFloat(string(b), 64)
	return x, err == nil
}

// whole reads a number without sign and point.
func whole(b []byte) (int, bool) {
	if len(b) == 0 || len(b) > 9 {
		return 0, false
	}
	n := 0
	for _, c := range b {
		if c -= '0'; c > 9 {
			return 0, false
		}
		n = 10*n + int(c)
	}
	return n, true
}
