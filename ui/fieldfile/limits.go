package fieldfile

import (
	"math"
	"strings"
)

// limit is the code of a limit of detection.
type limit struct {
	code  float64 // NaN: none
	digit byte    // of a code that is that digit alone, whose length may vary; 0: not so
}

func (l limit) is(x float64) bool {
	return alike(x, l.code) || l.digit != 0 && x < suspiciousLimit && isRepeated(x, l.digit)
}

// suspiciousLimit is above every code of at least three digits.
const suspiciousLimit = -700

// alike compares codes as numbers: -9999.0 is -9999.00.
func alike(x, code float64) bool { return x == code || math.Abs(x-code) <= 1e-6*math.Abs(code) }

func readLimit(text string, digit byte) limit {
	text, _, _ = strings.Cut(text, "\n")
	x, ok := number([]byte(strings.TrimSpace(text)))
	if !ok {
		return limit{code: math.NaN()}
	}
	l := limit{code: x}
	if x < 0 && isRepeated(x, digit) {
		l.digit = digit
	}
	return l
}

// readLimits takes codes and values of the limits of detection, and the
// uncertainties, out of the keywords.
func (f *File) readLimits() {
	f.above = readLimit(f.Attribute("ULOD_FLAG"), 7)
	f.below = readLimit(f.Attribute("LLOD_FLAG"), 8)
	f.spread("ULOD_VALUE", func(c *Column, x float64) { c.Upper = x })
	f.spread("LLOD_VALUE", func(c *Column, x float64) { c.Lower = x })
	f.spread("UNCERTAINTY", func(c *Column, x float64) { c.Uncertainty = x })
	for i := range f.Columns[1:] {
		if c := &f.Columns[i+1]; f.below.is(c.missing) {
			f.notes.add("llod_is_missing", 0, "LLOD_FLAG is also the missing-data code of %s: such values are taken as missing", quoted(c.Name))
		}
	}
}

// spread gives each dependent variable its value of a keyword: one for all, or
// one each; text says nothing.
func (f *File) spread(key string, set func(*Column, float64)) {
	parts := splitAny(strings.ReplaceAll(f.Attribute(key), "\n", ","), true)
	if len(parts) != 1 && len(parts) != len(f.Columns)-1 {
		return
	}
	for i := range f.Columns[1:] {
		p := parts[0]
		if len(parts) > 1 {
			p = parts[i]
		}
		if x, ok := number([]byte(p)); ok {
			set(&f.Columns[i+1], x)
		}
	}
}

// coded tells what a stored number of ICARTT or NASA Ames says: codes are
// compared before the scale is applied.
func (f *File) coded(s *step, x float64) State {
	switch {
	case alike(x, s.code):
		return Missing
	case f.Format != ICARTT:
		return Value
	case x > suspiciousLimit:
		if f.below.digit == 0 && alike(x, f.below.code) {
			return Below
		}
		if f.above.digit == 0 && alike(x, f.above.code) {
			return Above
		}
		return Value
	case f.below.is(x):
		return Below
	case f.above.is(x):
		return Above
	case isRepeated(x, 9):
		f.notes.add("nines", f.row.line, "%s in column %s, whose missing-data code is %s, is taken as missing",
			short(x), quoted(f.Columns[s.column].Name), f.Columns[s.column].Missing)
		return Missing
	}
	return Value
}
