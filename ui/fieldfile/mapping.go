package fieldfile

import (
	"errors"
	"fmt"
	"math"
	"strconv"
	"strings"

	"dropcrest/ui/near"
)

// Basis says to which state of the air a number concentration belongs.
type Basis int

// The bases. Standard is 273.15 K and 1013.25 hPa, as in EBAS and CF.
const (
	Unstated Basis = iota
	Ambient
	Standard
)

var basisKeys = [...]string{"", "ambient", "stp"}

func (b Basis) String() string { return basisKeys[b] }

// Role is what a column holds, in which unit. Its text, which ParseRole reads, is
//
//	quantity [@value unit | @value..value unit] [in unit] [at stp|ambient]
//
// such as "ccn @0.3% in cm-3 at stp", "dN/dlog10D @45.2..50.1nm in cm-3",
// "start_time in days since 2026-03-14", "temperature in C", "unused".
type Role struct {
	Quantity Quantity
	At       float64 // SI: a supersaturation as a fraction or a diameter in m; 0: none
	From, To float64 // m, the limits of the size bin; 0: not given
	Unit     string  // as the file writes it
	Basis    Basis
}

func (r Role) String() string {
	d := declared[r.Quantity]
	var b strings.Builder
	b.WriteString(d.key)
	switch {
	case r.From > 0:
		fmt.Fprintf(&b, " @%s..%snm", short(r.From*1e9), short(r.To*1e9))
	case r.At > 0 && d.at == atDiameter:
		fmt.Fprintf(&b, " @%snm", short(r.At*1e9))
	case r.At > 0:
		fmt.Fprintf(&b, " @%s%%", short(r.At*100))
	}
	if r.Unit != "" {
		b.WriteString(" in " + r.Unit)
	}
	if r.Basis != Unstated {
		b.WriteString(" at " + r.Basis.String())
	}
	return b.String()
}

// short writes a number with at most ten digits: what was typed comes back, the
// last bits of a conversion do not.
func short(x float64) string {
	text := strconv.FormatFloat(x, 'g', 10, 64)
	if y, err := strconv.ParseFloat(text, 64); err == nil && math.Abs(y) < 1e7 && math.Abs(y) > 1e-5 {
		return strconv.FormatFloat(y, 'f', -1, 64)
	}
	return text
}

// ParseRole reads the text of a role. The error says what would be right.
func ParseRole(text string) (Role, error) {
	var r Role
	rest := strings.TrimSpace(text)
	if i := strings.LastIndex(rest, " at "); i >= 0 {
		word := strings.TrimSpace(rest[i+4:])
		switch strings.ToLower(word) {
		case "stp":
			r.Basis = Standard
		case "ambient":
			r.Basis = Ambient
		default:
			return r, fmt.Errorf("no air %s: want stp or ambient", quoted(word))
		}
		rest = rest[:i]
	}
	if i := strings.Index(rest, " in "); i >= 0 {
		r.Unit = strings.TrimSpace(rest[i+4:])
		rest = rest[:i]
	}
	key, where, placed := strings.Cut(rest, "@")
	key = strings.TrimSpace(key)
	q, ok := quantityOf(key)
	if !ok {
		right := strings.Join(quantityKeys(), ", ")
		if word := near.Word(key, quantityKeys()); word != "" {
			right = word + "?"
		}
		return r, fmt.Errorf("no quantity %s: want %s", quoted(key), right)
	}
	r.Quantity = q
	if placed {
		if err := r.setPlace(strings.TrimSpace(where)); err != nil {
			return r, err
		}
	}
	return r, r.check()
}

func (r *Role) setPlace(where string) error {
	d := declared[r.Quantity]
	dim := length
	switch d.at {
	case nowhere:
		return fmt.Errorf("%s is at no size and no supersaturation: want %s without @", d.key, d.key)
	case atSupersaturation:
		dim = excess
	}
	right := map[place]string{atSupersaturation: "@0.3%", atDiameter: "@50nm or @45..55nm"}[d.at]
	fail := func() error { return fmt.Errorf("%s is no place of %s: want %s", quoted("@"+where), d.key, right) }
	digits := strings.TrimRight(where, "%abcdefghijklmnopqrstuvwxyzABCDEFGHIJKLMNOPQRSTUVWXYZµμ ")
	u, ok := dim.unit(where[len(digits):])
	if !ok {
		return fail()
	}
	low, high, ranged := strings.Cut(digits, "..")
	x, ok := number([]byte(strings.TrimSpace(low)))
	if !ok || !(u.si(x) > 0) {
		return fail()
	}
	r.At = u.si(x)
	if !ranged {
		return nil
	}
	y, ok := number([]byte(strings.TrimSpace(high)))
	if !ok || d.at != atDiameter || !(u.si(y) > r.At) {
		return fail()
	}
	r.From, r.To = r.At, u.si(y)
	r.At = math.Sqrt(r.From * r.To)
	return nil
}

// errNoUnit marks a column that needs an answer from the user.
var errNoUnit = errors.New("no unit")

// check sees to it that the unit is one of the quantity.
func (r Role) check() error {
	d := declared[r.Quantity]
	if d.kind == asTime {
		if _, ok := parseTimeUnit(r.Unit); !ok {
			return fmt.Errorf("%s is no unit of time stamps: want %s", quoted(r.Unit), rightTime)
		}
		return nil
	}
	if d.kind != asNumber || r.Quantity == Number {
		return nil
	}
	if _, ok := d.dim.unit(r.Unit); ok {
		return nil
	}
	if r.Unit == "" {
		return fmt.Errorf("%s has %w: want %s", d.key, errNoUnit, d.dim.right())
	}
	return fmt.Errorf("%s is no unit of %s: want %s", quoted(r.Unit), d.dim.says, d.dim.right())
}
