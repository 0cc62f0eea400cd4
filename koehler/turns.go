package koehler

import (
	"math"
	"slices"

	"dropcrest/atmos"
	"dropcrest/solutes"
)

// Kinked is what a Solution or Tension implements whose slope jumps at some u.
type Kinked interface {
	Kinks(dst []float64) []float64 // appended in ascending order
}

// turnPoints is the number of points of a particle's scan over 27 to 50 e-folds of u.
const turnPoints = 800

// Turns appends all extrema of the particle's curve to dst in the order of their
// wet size, each curve by the solver that fits it: the exact one for limited
// solubility with additive volumes, the tension of pure water and the standard
// Kelvin term; the crest alone where a model has no more; otherwise a scan that
// looks at both sides of each kink and follows each near miss.
//
// An error wraps ErrInput or ErrNoCrest. A curve that never turns has no turns
// and no error if its model says that it SeveralMaxima.
func (p Particle) Turns(dst []Turn) ([]Turn, error) {
	if err := p.Check(); err != nil {
		return dst, err
	}
	mix, limited := p.Solution.(*solutes.Limited)
	switch {
	case limited && p.Swelling == nil && p.Tension == nil && p.Kelvin == Standard:
		kelvin := KelvinLength(atmos.SurfaceTension(p.Temperature), p.Temperature)
		return LimitedExtrema(dst, p.DryDiameter, kelvin, mix), nil
	case !limited && !p.severalMaxima():
		crest, err := p.Crest()
		if err != nil {
			return dst, err
		}
		return append(dst, Turn{crest.Kind, crest.Water, crest.GrowthFactor, crest.Supersaturation}), nil
	}
	return p.scanTurns(dst, mix), nil
}

// scanTurns scans the curve; mix is its Solution where that is a *solutes.Limited.
func (p Particle) scanTurns(dst []Turn, mix *solutes.Limited) []Turn {
	c := p.ready()
	in := scan{from: scanFrom, to: turnEnd, points: turnPoints, dryLnS: math.Inf(-1), breaks: p.kinks(mix)}
	if t := c.at(leastWater); t.slope < 0 {
		in.dryLnS = t.lnS
	}
	first := len(dst)
	dst = in.extrema(dst, scanned{&c})
	for i := first; i < len(dst); i++ {
		if c.swell != nil && dst[i].Water > 0 {
			v, _ := c.swell.Swell(dst[i].Water)
			dst[i].GrowthFactor = math.Cbrt(v)
		}
	}
	return dst
}

// turnEnd is the u at which a scan ends: 10000 times the dry diameter.
const turnEnd = greatestGrowth * greatestGrowth * greatestGrowth

// kinks collects the u at which some part of the particle's model has a kink.
// Those of one thing that is both solution and tension come twice, which does a
// scan no harm.
func (p Particle) kinks(mix *solutes.Limited) []float64 {
	var all []float64
	if mix != nil {
		for i := range mix.Points() {
			all = append(all, mix.Point(i))
		}
	}
	if k, ok := p.Solution.(Kinked); ok {
		all = k.Kinks(all)
	}
	if k, ok := p.Tension.(Kinked); ok {
		all = k.Kinks(all)
	}
	slices.Sort(all)
	return all
}

// scanned is a particle's curve made ready for a scan.
type scanned struct{ c *curve }

func (s scanned) LnSaturation(u float64) (lnS, slope float64) {
	t := s.c.at(u)
	return t.lnS, t.slope
}

// AtTurn returns the extremum with the rest of its state. At a BoundaryMaximum it
// is the limit at the dry size.
func (p Particle) AtTurn(t Turn) Extremum {
	c := p.ready()
	state := c.state(math.Max(t.Water, leastWater))
	state.Water = t.Water
	state.WetDiameter = p.DryDiameter * t.GrowthFactor
	state.Supersaturation, state.SaturationRatio = t.Supersaturation, 1+t.Supersaturation
	return Extremum{t.Kind, state}
}
