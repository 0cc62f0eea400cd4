package ascent

import (
	"errors"
	"fmt"

	"dropcrest/atmos/aerosol"
	"dropcrest/koehler/spectrum"
)

// ErrInput is wrapped by every InputError.
var ErrInput = aerosol.ErrInput

// InputError says which value is not usable, as in package aerosol.
type InputError = aerosol.InputError

func unusable(what string, index int, value float64, right string) error {
	return &InputError{What: what, Index: index, Value: value, Right: right}
}

// The reasons why an ascent ends before its height, beside those of its context.
var (
	ErrStep  = errors.New("the step became too small")
	ErrSteps = errors.New("too many steps")
	ErrCold  = errors.New("the air left the temperatures that the properties cover, 200 to 340 K")
)

// A StoppedError is an ascent that did not come to its end.
type StoppedError struct {
	State State // the last one that was reached
	Steps int
	Err   error // ErrStep, ErrSteps, ErrCold or that of the context
}

// Error says where the ascent stopped and why.
func (e *StoppedError) Error() string {
	return fmt.Sprintf("ascent stopped at %.4g m (%.2f K, supersaturation %.4g %%, %d steps): %v",
		e.State.Height, e.State.Temperature, 100*e.State.Supersaturation, e.Steps, e.Err)
}

// Unwrap returns the reason.
func (e *StoppedError) Unwrap() error { return e.Err }

// GroupError says which group of the population is not usable, as in package
// spectrum.
type GroupError = spectrum.GroupError
