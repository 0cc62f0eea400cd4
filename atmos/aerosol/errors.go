package aerosol

import (
	"errors"
	"fmt"
)

// ErrInput is wrapped by every error of this package.
var ErrInput = errors.New("size distribution not usable")

// An InputError says which value of a size distribution is not usable.
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
