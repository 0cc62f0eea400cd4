package spectrum

import (
	"fmt"
	"math"
)

// Group is particles of one size distribution and one composition.
type Group struct {
	Sizes Sizes
	Share float64 // of the particles of Sizes that have this composition, above 0 and up to 1
	Of    Composition
}

// Population is a sum of groups, such as one a mode.
type Population []Group

// A GroupError says which group cannot be counted.
type GroupError struct {
	Group int // from 0
	Err   error
}

// Error names the group, counted from 1.
func (e *GroupError) Error() string { return fmt.Sprintf("group %d: %v", e.Group+1, e.Err) }

// Unwrap returns what was wrong.
func (e *GroupError) Unwrap() error { return e.Err }

// Number returns the number of all particles, 1/m³.
func (p Population) Number() float64 {
	total := 0.0
	for _, g := range p {
		total += g.Share * g.Sizes.Number()
	}
	return total
}

// Count returns the number of particles that activate at s, 1/m³.
func (p Population) Count(s float64) (float64, error) {
	var n [1]float64
	_, err := p.Counts(n[:0], []float64{s})
	return n[0], err
}

// Counts appends to dst the number of particles that activate at each s, 1/m³. An
// error is a *GroupError. Groups of the same sharp composition in a row share
// their critical diameters.
func (p Population) Counts(dst, s []float64) ([]float64, error) {
	from := len(dst)
	for range s {
		dst = append(dst, 0)
	}
	sum := dst[from:]
	var cuts []float64
	var cutsOf Composition
	for i, g := range p {
		if err := checkShare(g.Share); err != nil {
			return dst, &GroupError{i, err}
		}
		if !isSharp(g.Of) {
			if err := g.Of.AddCounts(sum, s, g.Sizes, g.Share); err != nil {
				return dst, &GroupError{i, err}
			}
			continue
		}
		if cuts == nil {
			cuts = make([]float64, 0, len(s))
		}
		if g.Of != cutsOf {
			var err error
			if cuts, err = criticals(cuts[:0], g.Of, s); err != nil {
				return dst, &GroupError{i, err}
			}
			cutsOf = g.Of
		}
		addAbove(sum, cuts, g.Sizes, g.Share)
	}
	return dst, nil
}

func checkShare(share float64) *InputError {
	if !(share > 0 && share <= 1) {
		return unusable("share", -1, share, "above 0 and up to 1")
	}
	return nil
}

// slopeStep is the half step in ln s of Slope: its error falls with the square,
// rounding rises as the step falls.
const slopeStep = 1e-4

// Slope returns d ln N/d ln s at s, the exponent k of the power law that touches
// the spectrum there. An uncertainty of s becomes one of N by this factor.
func (p Population) Slope(s float64) (float64, error) {
	n, err := p.Counts(nil, []float64{s * math.Exp(-slopeStep), s * math.Exp(slopeStep)})
	if err != nil {
		return math.NaN(), err
	}
	return math.Log(n[1]/n[0]) / (2 * slopeStep), nil
}
