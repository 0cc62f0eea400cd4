package ascent

import (
	"fmt"
	"math"

	"dropcrest/koehler/spectrum"
	"gonum.org/v1/gonum/integrate/quad"
)

// spreadClasses is how many κ stand for a spread of it: the points of Gauss and
// Hermite's quadrature in ln κ.
const spreadClasses = 7

// FromSpectrum makes the groups of a population of package spectrum, and says of
// which group of it each is a part: an external mixture becomes one group a part, a
// spread of κ seven of them. The Kelvin lengths there are not taken over, as the
// surface tension goes with the temperature here. Ranges have no counterpart; an
// error is a *GroupError.
func FromSpectrum(p spectrum.Population) (groups []Group, partOf []int, err error) {
	for i, g := range p {
		first := len(groups)
		if groups, err = appendComposition(groups, Group{Sizes: g.Sizes, Share: g.Share}, g.Of); err != nil {
			return nil, nil, &GroupError{Group: i, Err: err}
		}
		for range groups[first:] {
			partOf = append(partOf, i)
		}
	}
	return groups, partOf, nil
}

func appendComposition(to []Group, g Group, of spectrum.Composition) ([]Group, error) {
	switch c := of.(type) {
	case spectrum.Kappa:
		g.Kappa = c.Value
	case *spectrum.Matter:
		particle := c.Particle
		g.Matter = &particle
	case *spectrum.KappaTable:
		g.KappaBySize = c.Table
	case spectrum.External:
		for _, part := range c {
			one := g
			one.Share *= part.Share
			var err error
			if to, err = appendComposition(to, one, part.Of); err != nil {
				return to, err
			}
		}
		return to, nil
	case spectrum.Spread:
		var z, weight [spreadClasses]float64
		quad.Hermite{}.FixedLocations(z[:], weight[:], math.Inf(-1), math.Inf(1))
		for i := range z {
			one := g
			one.Share *= weight[i] / math.Sqrt(math.Pi)
			one.Kappa = math.Min(30, c.Median*math.Exp(math.Sqrt2*z[i]*math.Log(c.GSD)))
			to = append(to, one)
		}
		return to, nil
	default:
		return to, fmt.Errorf("%w: a composition of type %T cannot rise; give each range of sizes a group with From and To", ErrInput, of)
	}
	return append(to, g), nil
}
