package spectrum

import (
	"errors"

	"dropcrest/atmos/aerosol"
)

// errNotSharp is what only a caller's code can cause.
var errNotSharp = errors.New("spectrum: cuts of a composition that has no single critical diameter")

// ErrInput is wrapped by every InputError.
var ErrInput = aerosol.ErrInput

// InputError says which value is not usable, as in package aerosol.
type InputError = aerosol.InputError

func unusable(what string, index int, value float64, right string) *InputError {
	return &InputError{What: what, Index: index, Value: value, Right: right}
}
