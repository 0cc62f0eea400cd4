package aerosol

import "math"

// Response is the share of particles of a size that get through an inlet or that
// an instrument counts, 0 to 1 (a little above 1 where a calibration says so).
type Response interface {
	At(d float64) float64 // d in m
}

// Constant is one share at all sizes.
type Constant float64

// At returns the constant.
func (c Constant) At(float64) float64 { return float64(c) }

// ResponseFunc is a response given as a function.
type ResponseFunc func(d float64) float64

// At calls the function.
func (f ResponseFunc) At(d float64) float64 { return f(d) }

// Chain is several responses in a row: the particle must pass them all.
type Chain []Response

// At returns the product.
func (c Chain) At(d float64) float64 {
	share := 1.0
	for _, r := range c {
		share *= r.At(d)
	}
	return share
}

// LeastShare is the smallest mean share of a bin that Corrected divides by.
// Below it the correction is larger than twentyfold and says more about the
// response than about the air (own choice).
const LeastShare = 0.05

// Corrected returns the distribution before the response took its share: each
// count is divided by the mean of the response over its bin in ln D, by Simpson's
// rule with four panels. A bin whose mean share is below LeastShare is an
// *InputError, unless it is empty.
func (b *Bins) Corrected(r Response) (*Bins, error) {
	out := b.empty()
	for i, n := range b.counts {
		share := b.meanShare(r, i)
		if n == 0 {
			continue
		}
		if !(share >= LeastShare) || math.IsInf(share, 1) {
			return nil, &InputError{"penetration or efficiency over bin", i, share, "0.05 or more where particles were counted"}
		}
		out.counts[i] = n / share
	}
	out.accumulate()
	return out, nil
}

// Seen returns what is left of the distribution behind the response, the inverse
// of Corrected.
func (b *Bins) Seen(r Response) *Bins {
	out := b.empty()
	for i, n := range b.counts {
		out.counts[i] = n * b.meanShare(r, i)
	}
	out.accumulate()
	return out
}

func (b *Bins) meanShare(r Response, i int) float64 {
	if c, ok := r.(Constant); ok {
		return float64(c)
	}
	at := func(k float64) float64 { return r.At(math.Exp(b.grid.ln[i] + k*b.grid.WidthLn(i))) }
	ends := at(0) + at(1)
	return (ends + 4*(at(0.125)+at(0.375)+at(0.625)+at(0.875)) + 2*(at(0.25)+at(0.5)+at(0.75))) / 24
}
