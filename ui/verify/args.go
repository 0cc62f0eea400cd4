package verify

import (
	"fmt"
	"math"
	"strconv"
	"strings"
)

// Args are the arguments of one check, read from text such as
// "T=298.15 p=101325". A value runs to the next key, so that names with
// blanks need no quotes: "substance=sodium chloride m=1".
//
// The methods remember the first thing that was wrong and every key that was
// read; Run reports both a missing and an unread argument, so a check function
// may simply use what the methods return.
type Args struct {
	values map[string]string
	state  *argState
}

type argState struct {
	read map[string]bool
	err  error
}

// ParseArgs reads the arguments of a check.
func ParseArgs(text string) (Args, error) {
	a := Args{values: map[string]string{}, state: &argState{read: map[string]bool{}}}
	key := ""
	for _, word := range strings.Fields(text) {
		k, v, ok := strings.Cut(word, "=")
		switch {
		case ok && (k == "" || v == ""):
			return a, fmt.Errorf("argument %q: write key=value", word)
		case ok:
			if _, twice := a.values[k]; twice {
				return a, fmt.Errorf("argument %q is given twice", k)
			}
			a.values[k], key = v, k
		case key == "":
			return a, fmt.Errorf("argument %q: write key=value", word)
		default:
			a.values[key] += " " + word
		}
	}
	return a, nil
}

// Has tells whether the argument is given. It counts as reading it.
func (a Args) Has(key string) bool {
	a.state.read[key] = true
	_, ok := a.values[key]
	return ok
}

// Text returns an argument as it stands, "" when it is missing (an error of
// the row).
func (a Args) Text(key string) string {
	if !a.Has(key) {
		a.fail(fmt.Errorf("argument %q is missing", key))
	}
	return a.values[key]
}

// Number returns a number in SI units, NaN when it is missing or no finite
// number (an error of the row).
func (a Args) Number(key string) float64 {
	text := a.Text(key)
	if text == "" {
		return math.NaN()
	}
	x, err := strconv.ParseFloat(text, 64)
	if err != nil || math.IsInf(x, 0) || math.IsNaN(x) {
		a.fail(fmt.Errorf("argument %s=%s is not a finite number", key, text))
		return math.NaN()
	}
	return x
}

// NumberOr is Number with a value for an argument that is not given.
func (a Args) NumberOr(key string, missing float64) float64 {
	if !a.Has(key) {
		return missing
	}
	return a.Number(key)
}

func (a Args) fail(err error) {
	if a.state.err == nil {
		a.state.err = err
	}
}

// trouble is the first error met, or the arguments that no one read.
func (a Args) trouble() error {
	if a.state.err != nil {
		return a.state.err
	}
	for key := range a.values {
		if !a.state.read[key] {
			return fmt.Errorf("argument %q is not used by this check", key)
		}
	}
	return nil
}

// Numbers returns a list of finite numbers with commas between them, nil when it is
// missing or one of them is none (errors of the row).
func (a Args) Numbers(key string) []float64 {
	var out []float64
	for word := range strings.SplitSeq(a.Text(key), ",") {
		x, err := strconv.ParseFloat(word, 64)
		if err != nil || math.IsNaN(x) || math.IsInf(x, 0) {
			a.fail(fmt.Errorf("argument %s: %q is not a finite number", key, word))
			return nil
		}
		out = append(out, x)
	}
	return out
}
