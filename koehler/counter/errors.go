package counter

import (
	"errors"
	"fmt"
)

// What may be wrong with a scan. A ScanError wraps one of them.
var (
	ErrFewPoints   = errors.New("too few points")
	ErrDuplicated  = errors.New("sizes stand several times")
	ErrNoParticles = errors.New("no particles were counted")
	ErrAllZero     = errors.New("nothing activates")
	ErrAllActive   = errors.New("everything activates")
	ErrNoStep      = errors.New("the activated fraction does not rise")
	ErrDecreasing  = errors.New("the activated fraction falls")
	ErrNoPlateau   = errors.New("no upper plateau")
	ErrNoFit       = errors.New("no fit")
)

// What may be wrong with a line or a calibration.
var (
	ErrLine  = errors.New("no line")
	ErrApply = errors.New("calibration does not apply")
	ErrInput = errors.New("input out of range")
)

// A ScanError says why a scan gives no activation curve.
type ScanError struct {
	Scan   string // its name; "" where it has none
	Reason error  // one of the Err values
	Says   string // the sentence
}

// Error names the scan and says what is wrong and what would be right.
func (e *ScanError) Error() string {
	if e.Scan == "" {
		return e.Says
	}
	return "scan " + e.Scan + ": " + e.Says
}

// Unwrap returns the reason.
func (e *ScanError) Unwrap() error { return e.Reason }

// fault makes a ScanError.
func (s Scan) fault(reason error, format string, args ...any) error {
	return &ScanError{s.Name, reason, fmt.Sprintf(format, args...)}
}

func lineError(format string, args ...any) error {
	return fmt.Errorf("%w: %s", ErrLine, fmt.Sprintf(format, args...))
}

func inputError(format string, args ...any) error {
	return fmt.Errorf("%w: %s", ErrInput, fmt.Sprintf(format, args...))
}
