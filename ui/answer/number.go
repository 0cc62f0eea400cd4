package answer

import (
	"math"
	"strconv"
)

// Number is a number of the JSON object: full double precision, null when it is
// absent (NaN) or endless.
type Number float64

// MarshalJSON writes the shortest digits that read back as the same number.
func (n Number) MarshalJSON() ([]byte, error) {
	x := float64(n)
	if math.IsNaN(x) || math.IsInf(x, 0) {
		return []byte("null"), nil
	}
	format := byte('f')
	if a := math.Abs(x); a != 0 && (a < 1e-4 || a >= 1e15) {
		format = 'e'
	}
	return strconv.AppendFloat(make([]byte, 0, 24), x, format, -1, 64), nil
}

// cell is a number in a table: nil when it is absent.
func cell(x float64) any {
	if math.IsNaN(x) || math.IsInf(x, 0) {
		return nil
	}
	return x
}

// Figures in sentences: never an exponent, never more digits than a reader uses.

// digits writes x with n significant digits.
func digits(x float64, n int) string {
	if x == 0 || math.IsNaN(x) || math.IsInf(x, 0) {
		return strconv.FormatFloat(x, 'g', n, 64)
	}
	rounded, err := strconv.ParseFloat(strconv.FormatFloat(x, 'e', n-1, 64), 64)
	if err != nil {
		rounded = x
	}
	decimals := n - 1 - int(math.Floor(math.Log10(math.Abs(rounded))))
	return strconv.FormatFloat(rounded, 'f', max(decimals, 0), 64)
}

// percent writes a fraction in per cent: three decimals as supersaturations are
// quoted, more where they would vanish, fewer where they mean nothing.
func percent(fraction float64) string {
	p := 100 * fraction
	switch a := math.Abs(p); {
	case a != 0 && a < 0.01:
		return digits(p, 3) + " %"
	case a < 10:
		return strconv.FormatFloat(p, 'f', 3, 64) + " %"
	}
	return digits(p, 4) + " %"
}

// humidity writes a saturation ratio as relative humidity: one decimal, more
// when that would round away what is not zero.
func humidity(S float64) string {
	p := 100 * S
	decimals := 1
	for decimals < 6 && math.Abs(p-roundTo(p, decimals)) > 1e-9*math.Abs(p) {
		decimals++
	}
	return strconv.FormatFloat(p, 'f', decimals, 64) + " %"
}

func roundTo(x float64, decimals int) float64 {
	scale := math.Pow(10, float64(decimals))
	return math.Round(x*scale) / scale
}

// micrometres writes a length in µm.
func micrometres(m float64) string { return digits(m*1e6, 3) + " µm" }

// activity writes a water activity so that its distance from 1 keeps two digits.
func activity(aw float64) string {
	decimals := 5
	if d := 1 - aw; d > 0 {
		decimals = min(max(5, 1-int(math.Floor(math.Log10(d)))), 9)
	}
	return strconv.FormatFloat(aw, 'f', decimals, 64)
}
