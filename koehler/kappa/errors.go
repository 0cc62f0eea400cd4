package kappa

import (
	"errors"
	"fmt"
)

// The reasons why several points have no common mean, or Monte Carlo no result.
var (
	ErrFewPoints = errors.New("a mean needs two points or more that have a κ")
	ErrMixed     = errors.New("κ from growth factors and from activation are not merged: take the mean of each")
	ErrNoWeight  = errors.New("no weight")
)

// A NoWeightError is a point that has no uncertainty of its own, so that it
// would outweigh all others. It wraps ErrNoWeight.
type NoWeightError struct{ Point string }

// Error says which point and what would be right.
func (e *NoWeightError) Error() string {
	return fmt.Sprintf("point %q has no independent uncertainty and would outweigh all others: give it one", e.Point)
}

// Unwrap returns ErrNoWeight.
func (e *NoWeightError) Unwrap() error { return ErrNoWeight }
