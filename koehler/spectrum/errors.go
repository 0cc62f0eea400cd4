package spectrum

import (
	"errors"
	"fmt"
)

// errNotSharp is what only a caller's code can cause.
var errNotSharp = errors.New("spectrum: cuts of a composition that has no single critical diameter")

// ErrInput is wrapped by errors about values that no measurement can have.
var ErrInput = errors.New("input out of range")

// An InputError says which value is not usable. It wraps ErrInput.
type InputError struct {
	What  string
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
