package fieldfile

import (
	"cmp"
	"math"
	"slices"
)

// AtStandard interpolates counts to other supersaturations (fractions), in the
// logarithms of both, because a spectrum is near a power law between neighbours.
// The uncertainty follows the weights of the neighbours. Outside the measured
// range, and beside a cell that is no value, the result is missing: nothing is
// extrapolated.
func AtStandard(counts []Count, supersaturations []float64) []Count {
	var known []Count
	for _, c := range counts {
		if c.N.OK() && c.N.X > 0 && c.At() > 0 {
			known = append(known, c)
		}
	}
	slices.SortStableFunc(known, func(a, b Count) int { return cmp.Compare(a.At(), b.At()) })
	out := make([]Count, 0, len(supersaturations))
	for _, s := range supersaturations {
		c := Count{Set: Cell{s, Value}}
		if i := slices.IndexFunc(known, func(k Count) bool { return k.At() >= s*(1-sameNumber) }); i >= 0 {
			c = between(known, i, s)
		}
		out = append(out, c)
	}
	return out
}

// sameNumber is how far two supersaturations may differ by rounding.
const sameNumber = 1e-9

// between interpolates to s, below or at known[i].
func between(known []Count, i int, s float64) Count {
	b := known[i]
	c := Count{Set: Cell{s, Value}, Basis: b.Basis}
	if b.At() <= s*(1+sameNumber) {
		c.N, c.Uncertainty = b.N, b.Uncertainty
		return c
	}
	if i == 0 || known[i-1].Basis != b.Basis || known[i-1].At() == b.At() {
		return c
	}
	a := known[i-1]
	w := math.Log(s/a.At()) / math.Log(b.At()/a.At())
	c.N = Cell{a.N.X * math.Pow(b.N.X/a.N.X, w), Value}
	if a.Uncertainty.OK() && b.Uncertainty.OK() {
		c.Uncertainty = Cell{c.N.X * math.Hypot((1-w)*a.Uncertainty.X/a.N.X, w*b.Uncertainty.X/b.N.X), Value}
	}
	return c
}
