package scenario

import (
	"fmt"
	"math"
	"math/big"
	"strconv"
	"strings"
	"unicode/utf8"
)

// quantity is a kind of number: its units, the range that makes sense and how a
// key press changes it. Conversion between a unit and SI happens here and nowhere
// else.
type quantity struct {
	says     string // "length"
	units    []unit // the first one is shown
	si       string // suffix of the SI key: "m", "percent", "" for none
	min, max float64
	open     bool // min itself is not allowed
	whole    bool // only whole numbers
	step     stepper
	start    float64 // SI: where stepping starts when a word stood there
	doubt    func(x float64) (problem, right string)
}

// unit is one unit of a quantity: SI value = number·factor + offset, in exact
// decimals, so that 100 nm is 1e-7 m to the last bit.
type unit struct {
	names          []string // the first one is shown
	factor, offset string
}

func (u unit) name() string { return u.names[0] }

// toSI converts the decimal text of a number.
func (u unit) toSI(number string) (float64, error) {
	x, ok := decimal(number)
	if !ok {
		return 0, errNoNumber
	}
	x.Mul(x, rat(u.factor))
	x.Add(x, rat(u.offset))
	f, _ := x.Float64()
	return f, nil
}

// fromSI converts to the unit, rounded once. Beside an offset the last binary
// digits mean nothing: 273.15 K is 0 °C.
func (u unit) fromSI(x float64) float64 {
	if math.IsNaN(x) || math.IsInf(x, 0) {
		return x
	}
	f, _ := u.ratio(x).Float64()
	if u.offset != "" {
		const scale = 1e9
		f = math.Round(f*scale)/scale + 0 // + 0: no negative zero
	}
	return f
}

// ratio is a finite SI value in the unit, exactly.
func (u unit) ratio(x float64) *big.Rat {
	r := new(big.Rat).SetFloat64(x)
	r.Sub(r, rat(u.offset))
	return r.Quo(r, rat(u.factor))
}

func rat(s string) *big.Rat {
	if s == "" {
		return new(big.Rat)
	}
	r, ok := new(big.Rat).SetString(s)
	if !ok {
		panic("scenario: bad number in the table of units: " + s)
	}
	return r
}

// decimal reads a decimal number exactly. The bounds keep a text such as
// 1e999999999 from filling the memory.
func decimal(s string) (*big.Rat, bool) {
	f, err := strconv.ParseFloat(s, 64)
	if err != nil || len(s) > 60 || f != 0 && (math.Abs(f) > 1e40 || math.Abs(f) < 1e-40) {
		return nil, false
	}
	if f == 0 {
		return new(big.Rat), true
	}
	return new(big.Rat).SetString(s)
}

var errNoNumber = fmt.Errorf("no number")

// numberLength is the length of the decimal number at the start of a text.
func numberLength(s string) int {
	i := 0
	if i < len(s) && (s[i] == '+' || s[i] == '-') {
		i++
	}
	digits := 0
	for ; i < len(s) && (isDigit(s[i]) || s[i] == '.'); i++ {
		if s[i] != '.' {
			digits++
		}
	}
	if digits == 0 {
		return 0
	}
	if i < len(s) && (s[i] == 'e' || s[i] == 'E') {
		j := i + 1
		if j < len(s) && (s[j] == '+' || s[j] == '-') {
			j++
		}
		if j < len(s) && isDigit(s[j]) {
			for j < len(s) && isDigit(s[j]) {
				j++
			}
			i = j
		}
	}
	return i
}

func isDigit(c byte) bool { return '0' <= c && c <= '9' }

// read reads a number with its unit. Without a unit it is in the shown unit when
// bare says that this may be left out.
func (q *quantity) read(text string, bare bool) (float64, *ValueError) {
	text = strings.TrimSpace(text)
	fail := func(format string, values ...any) *ValueError {
		return &ValueError{Given: text, Problem: fmt.Sprintf(format, values...), Right: q.right()}
	}
	n := numberLength(text)
	number, name := text[:n], strings.TrimSpace(text[n:])
	switch {
	case text == "":
		return 0, fail("no value")
	case n == 0:
		return 0, fail("%q is no number", shortened(text))
	case strings.HasPrefix(name, ","):
		return 0, fail("%q has a comma: the decimal sign is a point", shortened(text))
	}
	u, ok := q.unit(name)
	if !ok {
		return 0, fail("no unit %q of %s", shortened(name), q.says)
	}
	if name == "" && u.name() != "" && !bare {
		return 0, fail("%s has no unit", shortened(text))
	}
	if name == "" && q.doubt != nil {
		if x, err := strconv.ParseFloat(number, 64); err == nil {
			if problem, right := q.doubt(x); problem != "" {
				return 0, &ValueError{Given: text, Problem: problem, Right: right}
			}
		}
	}
	x, err := u.toSI(number)
	if err != nil {
		return 0, fail("%q is no number that can be used", shortened(text))
	}
	if problem := q.outside(x); problem != "" {
		return 0, fail("%s is %s", shortened(text), problem)
	}
	return x, nil
}

// outside says why a number cannot be, "" when it can.
func (q *quantity) outside(x float64) string {
	switch {
	case math.IsNaN(x):
		return "no number"
	case x < q.min || q.open && x == q.min:
		return "too small"
	case x > q.max:
		return "too large"
	case q.whole && x != math.Trunc(x):
		return "no whole number"
	}
	return ""
}

func (q *quantity) unit(name string) (unit, bool) {
	if name == "" {
		return q.units[0], true
	}
	for _, u := range q.units {
		for _, n := range u.names {
			if name == n {
				return u, true
			}
		}
	}
	return unit{}, false
}

// span is the range in words: "1 to 10000 nm".
func (q *quantity) span() string {
	lo := figures(q.units[0].fromSI(q.min))
	if q.open {
		lo = "more than " + lo
	}
	return strings.TrimSpace(lo + " to " + figures(q.units[0].fromSI(q.max)) + " " + q.units[0].name())
}

// right is what would be right, with an example where a unit is needed.
func (q *quantity) right() string {
	if q.units[0].name() == "" {
		return q.span()
	}
	return q.span() + ", such as " + q.show(q.start)
}

// show writes a number in the unit that is shown, rounded for reading.
func (q *quantity) show(x float64) string {
	text := figures(q.units[0].fromSI(x))
	if q.step.decimals > 0 {
		text = atLeast(text, q.step.decimals)
	}
	return strings.TrimSpace(text + " " + q.units[0].name())
}

// showAll writes several numbers with one unit: "0.1, 0.2, 0.5 %".
func (q *quantity) showAll(xs []float64) string {
	texts := make([]string, len(xs))
	for i, x := range xs {
		texts[i] = figures(q.units[0].fromSI(x))
	}
	return strings.TrimSpace(strings.Join(texts, ", ") + " " + q.units[0].name())
}

// exactAll writes several numbers so that reading them gives the same again.
func (q *quantity) exactAll(xs []float64) string {
	texts := make([]string, len(xs))
	for i, x := range xs {
		texts[i] = q.exact(x)
	}
	return strings.Join(texts, ", ")
}

// exact writes a number so that reading it gives the same number again.
func (q *quantity) exact(x float64) string {
	for _, u := range q.units {
		y := u.fromSI(x)
		for digits := 1; digits <= 17; digits++ {
			text := unrolled(strconv.FormatFloat(y, 'g', digits, 64))
			if back, err := u.toSI(text); err == nil && back == x {
				return strings.TrimSpace(text + " " + u.name())
			}
		}
	}
	// Conversion back rounds once more; a few digits more than a float has hold it.
	const enough, bits = 24, 200
	text := new(big.Float).SetPrec(bits).SetRat(q.units[0].ratio(x)).Text('g', enough)
	return strings.TrimSpace(text + " " + q.units[0].name())
}

// unrolled writes a number of common size without an exponent.
func unrolled(text string) string {
	x, err := strconv.ParseFloat(text, 64)
	if a := math.Abs(x); err != nil || a < 1e-4 || a >= 1e7 {
		return text
	}
	return strconv.FormatFloat(x, 'f', -1, 64)
}

// figures writes a number with at most six significant digits and no exponent.
func figures(x float64) string {
	if x == 0 || math.IsNaN(x) || math.IsInf(x, 0) {
		return strconv.FormatFloat(x, 'f', -1, 64)
	}
	decimals := max(0, 5-int(math.Floor(math.Log10(math.Abs(x)))))
	text := strconv.FormatFloat(x, 'f', decimals, 64)
	if strings.Contains(text, ".") {
		text = strings.TrimRight(strings.TrimRight(text, "0"), ".")
	}
	return text
}

// atLeast pads a number to that many decimals.
func atLeast(text string, decimals int) string {
	_, after, found := strings.Cut(text, ".")
	if !found {
		text += "."
	}
	return text + strings.Repeat("0", max(0, decimals-len(after)))
}

// shortened keeps a quoted text on a line.
func shortened(s string) string {
	const most = 40
	if utf8.RuneCountInString(s) <= most {
		return s
	}
	return string([]rune(s)[:most-1]) + "…"
}
