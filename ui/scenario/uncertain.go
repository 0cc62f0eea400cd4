package scenario

import (
	"fmt"
	"math"
	"strconv"
	"strings"
)

// Uncertain is a measured number with its standard uncertainties in SI: the part
// of its own, and the part that is common to all measurements made with the same
// instrument. The zero Uncertain, or one that is NaN, was not measured.
type Uncertain struct {
	Value  float64
	Own    float64
	Common float64
}

// Known reports whether it was measured.
func (u Uncertain) Known() bool { return u.Value != 0 && !math.IsNaN(u.Value) }

// readUncertain reads "80nm±3%rel", "0.25%±0.01%abs", "80nm±2nm±1%rel common".
// +- serves for ±. For quantities in per cent rel or abs is required: 1 % of what
// is not to be guessed.
func (q *quantity) readUncertain(text string, bare bool) (Uncertain, *ValueError) {
	if strings.TrimSpace(text) == notMeasured {
		return Uncertain{}, nil
	}
	parts := strings.Split(strings.ReplaceAll(text, "+-", "±"), "±")
	value, problem := q.read(parts[0], bare)
	if problem != nil {
		problem.Right += ", or with an uncertainty, such as " + q.show(q.start) + "±3%rel"
		return Uncertain{}, problem
	}
	u := Uncertain{Value: value}
	for _, p := range parts[1:] {
		own, common, problem := q.uncertainty(value, p, bare)
		if problem != nil {
			return Uncertain{}, problem
		}
		u.Own, u.Common = math.Hypot(u.Own, own), math.Hypot(u.Common, common)
	}
	return u, nil
}

// notMeasured is the word for a quantity that was not measured, NotMeasured what
// is shown of it.
const (
	notMeasured = "not-measured"
	NotMeasured = "not measured"
)

// uncertainty reads what follows a ±.
func (q *quantity) uncertainty(value float64, text string, bare bool) (own, common float64, _ *ValueError) {
	given := strings.TrimSpace(text)
	fail := func(problem string) (float64, float64, *ValueError) {
		right := "±3%rel, or ± with the unit of the value"
		if q.si == "percent" {
			right = "±1%rel or ±0.01%abs"
		}
		return 0, 0, &ValueError{Given: given, Problem: problem, Right: right}
	}
	number, isCommon := strings.CutSuffix(given, "common")
	number = strings.TrimSpace(number)
	relative := false
	switch {
	case strings.HasSuffix(number, "rel"):
		number, relative = strings.TrimSpace(strings.TrimSuffix(number, "rel")), true
	case strings.HasSuffix(number, "abs"):
		number = strings.TrimSpace(strings.TrimSuffix(number, "abs"))
	case q.si == "percent":
		return fail(fmt.Sprintf("%q may be relative or absolute", shortened(given)))
	case strings.HasSuffix(number, "%"):
		relative = true
	}
	var u float64
	if relative {
		n := numberLength(number)
		x, err := strconv.ParseFloat(number[:n], 64)
		if err != nil || strings.TrimSpace(number[n:]) != "%" {
			return fail(fmt.Sprintf("%q is no relative uncertainty", shortened(given)))
		}
		u = x / 100 * math.Abs(value)
	} else {
		var problem string
		if u, problem = q.difference(number, bare); problem != "" {
			return fail(problem)
		}
	}
	if !(u >= 0) || u > 10*math.Abs(value)+q.max-q.min {
		return fail(fmt.Sprintf("%q is no uncertainty", shortened(given)))
	}
	if isCommon {
		return 0, u, nil
	}
	return u, 0, nil
}

// difference reads a difference of two values: without the offset of its unit.
func (q *quantity) difference(text string, bare bool) (float64, string) {
	n := numberLength(text)
	name := strings.TrimSpace(text[n:])
	u, ok := q.unit(name)
	switch {
	case n == 0:
		return 0, fmt.Sprintf("%q is no number", shortened(text))
	case !ok:
		return 0, fmt.Sprintf("no unit %q of %s", shortened(name), q.says)
	case name == "" && u.name() != "" && !bare:
		return 0, fmt.Sprintf("%s has no unit", shortened(text))
	}
	u.offset = ""
	x, err := u.toSI(text[:n])
	if err != nil {
		return 0, fmt.Sprintf("%q is no number that can be used", shortened(text))
	}
	return x, ""
}

// showUncertain writes a value with its uncertainties: "80 nm ± 3 %".
func (q *quantity) showUncertain(u Uncertain) string {
	if !u.Known() {
		return NotMeasured
	}
	text := q.show(u.Value)
	for _, part := range []struct {
		u     float64
		words string
	}{{u.Own, ""}, {u.Common, " common"}} {
		if part.u > 0 {
			text += fmt.Sprintf(" ± %s %%%s%s", strconv.FormatFloat(100*part.u/math.Abs(u.Value), 'g', 3, 64), q.relative(), part.words)
		}
	}
	return text
}

// relative is the word that a percentage of a percentage needs.
func (q *quantity) relative() string {
	if q.si == "percent" {
		return " rel"
	}
	return ""
}

// exactUncertain writes it so that reading gives the same again, to rounding.
func (q *quantity) exactUncertain(u Uncertain) string {
	if !u.Known() {
		return notMeasured
	}
	text := q.exact(u.Value)
	difference := &quantity{units: []unit{q.units[0]}}
	difference.units[0].offset = ""
	write := func(x float64, words string) {
		if x > 0 {
			text += " ± " + difference.exact(x)
			if q.si == "percent" {
				text += " abs"
			}
			text += words
		}
	}
	write(u.Own, "")
	write(u.Common, " common")
	return text
}
