package koehler

import (
	"math"
	"slices"

	"dropcrest/solutes"
)

// Kinked is what a Solution or Tension implements whose slope jumps at some u.
type Kinked interface {
	Kinks(dst []float64) []float64 // appended in ascending order
}

const (
	// scanFrom is the least u of a particle's scan.
	scanFrom = 1e-9
	// turnEnd is the u at which a scan ends: 10000 times the dry diameter.
	turnEnd = greatestGrowth * greatestGrowth * greatestGrowth
	// turnPoints is the number of points of a particle's scan over 27 to 50 e-folds of u.
	turnPoints = 800
)

// Turns appends all extrema of the particle's curve to dst in the order of their
// wet size, each curve by the solver that fits it: the exact ones for constant κ,
// limited solubility and adsorption with additive volumes, a constant tension
// and the standard Kelvin term; the climb to the one crest where a model has no
// more; otherwise a scan that looks at both sides of each kink and follows each
// near miss.
//
// A curve that never turns has no turns. An error wraps ErrInput.
func (p Particle) Turns(dst []Turn) ([]Turn, error) {
	if err := p.Check(); err != nil {
		return dst, err
	}
	c := p.ready()
	return c.turns(dst), nil
}

// Extrema returns the Turns with the rest of their states. Which of them is the
// barrier, Crest tells, or Barrier of the Turns. An error wraps ErrInput.
func (p Particle) Extrema() ([]Extremum, error) {
	var room [16]Turn
	turns, err := p.Turns(room[:0])
	if err != nil {
		return nil, err
	}
	c := p.ready()
	return c.extrema(turns), nil
}

func (c *curve) extrema(turns []Turn) []Extremum {
	all := make([]Extremum, len(turns))
	for i, t := range turns {
		all[i] = c.atTurn(t)
	}
	return all
}

// AtTurn returns the extremum with the rest of its state. At a BoundaryMaximum it
// is the limit at the dry size.
func (p Particle) AtTurn(t Turn) Extremum {
	c := p.ready()
	return c.atTurn(t)
}

func (c *curve) atTurn(t Turn) Extremum {
	state := c.state(math.Max(t.Water, leastWater))
	state.Water = t.Water
	state.WetDiameter = c.dry * t.GrowthFactor
	state.Supersaturation, state.SaturationRatio = t.Supersaturation, 1+t.Supersaturation
	return c.extremum(t.Kind, state)
}

func (c *curve) turns(dst []Turn) []Turn {
	if turns, ok := c.exact(dst); ok {
		return turns
	}
	if s, ok := c.only(); ok {
		return append(dst, c.crest(c.extremum(Maximum, s), Only).turn())
	}
	return c.scan(dst)
}

// exact finds the turns of the models that have a solver of their own.
func (c *curve) exact(dst []Turn) (turns []Turn, ok bool) {
	if s, ok := c.sol.(*SurfaceActive); ok && c.isOf(s) {
		return s.Extrema(dst), true
	}
	if !c.isPlain() {
		return dst, false
	}
	switch s := c.sol.(type) {
	case solutes.Kappa:
		return append(dst, c.closed(float64(s)).turn()), true
	case *solutes.Limited:
		return LimitedExtrema(dst, c.dry, c.kelvinLength(), s), true
	case AdsorbedWater:
		return adsorptionCurve{s, c.kelvinLength() / c.dry}.turns(dst), true
	}
	return dst, false
}

// isOf tells whether the curve is that of a surface-active drop and nothing else.
func (c *curve) isOf(s *SurfaceActive) bool {
	tension, ok := c.stress.(*SurfaceActive)
	return ok && tension == s && c.swell == nil && c.tolman == 0 && c.kelvin.Form == Standard &&
		math.Abs(s.kelvin*c.dry/(4*c.kelvin.PerPressure)-1) < 1e-12 // of the same temperature
}

// scan looks for the turns of any curve. Where the curve still rises at the least
// water of the activity model it starts there, as what the extrapolation does
// below is no finding; nor is a boundary maximum of an extrapolation.
func (c *curve) scan(dst []Turn) []Turn {
	in := scan{from: scanFrom, to: turnEnd, points: turnPoints, dryLnS: math.Inf(-1), breaks: c.kinks()}
	if least := c.sol.LeastWater(); least > scanFrom && c.at(least).slope > 0 {
		in.from = least
	} else if t := c.at(leastWater); t.slope < 0 && least == 0 {
		in.dryLnS = t.lnS
	}
	first := len(dst)
	held := *c // c itself stays off the heap
	dst = in.extrema(dst, &held)
	for i := first; i < len(dst); i++ {
		if c.swell != nil && dst[i].Water > 0 {
			v, _ := c.swell.Swell(dst[i].Water)
			dst[i].GrowthFactor = math.Cbrt(v)
		}
	}
	return dst
}

// kinks collects the u at which some part of the particle's model has a kink.
// Those of one thing that is both solution and tension come twice, which does a
// scan no harm.
func (c *curve) kinks() []float64 {
	var all []float64
	if mix, ok := c.sol.(*solutes.Limited); ok {
		for i := range mix.Points() {
			all = append(all, mix.Point(i))
		}
	}
	if k, ok := c.sol.(Kinked); ok {
		all = k.Kinks(all)
	}
	if k, ok := c.stress.(Kinked); ok {
		all = k.Kinks(all)
	}
	slices.Sort(all)
	return all
}
