package aerosol

import (
	"errors"
	"fmt"
	"math"
)

// ErrInput is wrapped by every InputError.
var ErrInput = errors.New("input not usable")

// An InputError says which value, of a size distribution or of what rests on one,
// is not usable.
type InputError struct {
	What  string  // "edge", "count", "gsd"
	Index int     // which of a list, from 0; -1: there is only one
	Value float64 // SI
	Right string  // what would be right
}

// Error says which value, where it stands (counted from 1) and what would be
// right.
func (e *InputError) Error() string {
	if e.Index < 0 {
		return fmt.Sprintf("%s %.6g: must be %s", e.What, e.Value, e.Right)
	}
	return fmt.Sprintf("%s %d, %.6g: must be %s", e.What, e.Index+1, e.Value, e.Right)
}

// Unwrap returns ErrInput.
func (e *InputError) Unwrap() error { return ErrInput }

// CheckDiameters returns nil or an *InputError: diameters (m) are above 0, finite,
// and ascend. what names one of them.
func CheckDiameters(what string, diameters []float64) error {
	for i, d := range diameters {
		if !(d > 0) || math.IsInf(d, 1) {
			return &InputError{what, i, d, "above 0, in m"}
		}
		if i > 0 && !(d > diameters[i-1]) {
			return &InputError{what, i, d, "larger than the one before it"}
		}
	}
	return nil
}
