package koehler

import (
	"errors"
	"fmt"
)

// The reasons why a question about a droplet has no answer. Errors returned by
// this package wrap one of them.
var (
	ErrNoCrest    = errors.New("the equilibrium curve has no maximum")
	ErrAboveCrest = errors.New("no equilibrium: above the crest")
	ErrNoHaze     = errors.New("no haze: the particle stays dry")
	ErrNoSolution = errors.New("no solution")
	ErrInput      = errors.New("input out of range")
)

// A RangeError is an input that no droplet can have. It wraps ErrInput.
type RangeError struct {
	What  string  // "dry diameter"
	Value float64 // SI
	Right string  // what would be right
}

// Error says which input, its value and what would be right.
func (e *RangeError) Error() string {
	return fmt.Sprintf("%s %.6g: must be %s", e.What, e.Value, e.Right)
}

// Unwrap returns ErrInput.
func (e *RangeError) Unwrap() error { return ErrInput }

// A NoSolutionError says why an inverse has no answer. It wraps ErrNoSolution.
type NoSolutionError struct {
	Supersaturation float64 // asked for, fraction
	Limit           float64 // largest supersaturation with an answer, fraction
	Reason          string
}

// Error says which supersaturation has no answer and why.
func (e *NoSolutionError) Error() string {
	return fmt.Sprintf("no solution at s = %.6g %%: %s", 100*e.Supersaturation, e.Reason)
}

// Unwrap returns ErrNoSolution.
func (e *NoSolutionError) Unwrap() error { return ErrNoSolution }

// An AboveCrestError is a humidity at which no drop of the particle is in
// equilibrium. It wraps ErrAboveCrest.
type AboveCrestError struct {
	SaturationRatio, Crest float64
}

// Error says how far the humidity lies above the crest.
func (e *AboveCrestError) Error() string {
	return fmt.Sprintf("no equilibrium: above the crest: S = %.8g, crest at %.8g", e.SaturationRatio, e.Crest)
}

// Unwrap returns ErrAboveCrest.
func (e *AboveCrestError) Unwrap() error { return ErrAboveCrest }
