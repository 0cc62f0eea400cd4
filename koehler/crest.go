package koehler

import (
	"dropcrest/solutes"
)

// SeveralMaxima is what a Solution or Tension implements that knows whether its
// curve may have more than one extremum. The whole curve is scanned then instead
// of climbed to the one crest. A Solution that says nothing has one crest; a
// Tension that says nothing may have more.
type SeveralMaxima interface{ SeveralMaxima() bool }

// Crest returns the barrier: the highest maximum of the equilibrium curve.
//
// Constant κ with additive volumes, a constant tension and the standard Kelvin
// term is solved in closed form. A smooth activity is climbed by Newton's method
// in ln u. Everything else is the Barrier among the Turns. An error wraps ErrInput
// or ErrNoCrest.
func (p Particle) Crest() (Crest, error) {
	if err := p.Check(); err != nil {
		return Crest{}, err
	}
	c := p.ready()
	if kappa, ok := c.closedKappa(); ok {
		return c.closed(kappa), nil
	}
	if s, ok := c.only(); ok {
		return c.crest(c.extremum(Maximum, s), Only), nil
	}
	var room [16]Turn
	crest, _, err := c.barrier(room[:0])
	return crest, err
}

// barrier returns the crest and the turns that had to be found for it, in the
// empty dst.
func (c *curve) barrier(dst []Turn) (Crest, []Turn, error) {
	turns, ok := c.exact(dst)
	if !ok {
		if s, ok := c.only(); ok {
			crest := c.crest(c.extremum(Maximum, s), Only)
			return crest, append(dst, crest.turn()), nil
		}
		turns = c.scan(dst)
	}
	i, place := Barrier(turns)
	if place == NoBarrier {
		return Crest{}, turns, c.endless()
	}
	if kappa, ok := c.closedKappa(); ok {
		return c.closed(kappa), turns, nil
	}
	return c.crest(c.atTurn(turns[i]), place), turns, nil
}

func (c Crest) turn() Turn { return Turn{c.Kind, c.Water, c.GrowthFactor, c.Supersaturation} }

// hasSeveralMaxima tells whether the curve may have more than one extremum.
func (c *curve) hasSeveralMaxima() bool {
	if s, ok := c.sol.(SeveralMaxima); ok && s.SeveralMaxima() {
		return true
	}
	if c.stress == nil {
		return false
	}
	s, ok := c.stress.(SeveralMaxima)
	return !ok || s.SeveralMaxima()
}

// closedKappa is κ where the closed form holds.
func (c *curve) closedKappa() (float64, bool) {
	k, ok := c.sol.(solutes.Kappa)
	return float64(k), ok && c.isPlain()
}

// endless is the error of a curve without a maximum.
func (c *curve) endless() error {
	if t := c.at(turnEnd); t.slope > 0 {
		return errEndless
	}
	return ErrNoCrest
}

func (c *curve) extremum(kind Kind, s State) Extremum {
	return Extremum{kind, s, kind != BoundaryMaximum && s.Water < c.sol.LeastWater()}
}

func (c *curve) crest(e Extremum, place Place) Crest {
	return Crest{e, e.WetDiameter / c.dry, place}
}

// closed is the crest of the κ form.
func (c *curve) closed(kappa float64) Crest {
	k := SolveKappa(c.dry, c.kelvinLength(), kappa)
	t := k.GrowthFactor - 1
	kind := Maximum
	if kappa == 0 {
		kind = BoundaryMaximum
	}
	return Crest{
		Extremum: Extremum{Kind: kind, State: State{
			WetDiameter:     c.dry * k.GrowthFactor,
			Water:           t * (3 + t*(3+t)),
			SaturationRatio: 1 + k.Supersaturation,
			Supersaturation: k.Supersaturation,
			WaterActivity:   k.WaterActivity,
			KelvinFactor:    (1 + k.Supersaturation) / k.WaterActivity,
			SurfaceTension:  c.sigma,
		}},
		GrowthFactor: k.GrowthFactor,
		Place:        Only,
	}
}

// only is the drop at the one crest of a smooth activity, if the curve has one
// crest that is to be climbed to and it is found.
func (c *curve) only() (s State, ok bool) {
	if _, film := c.sol.(AdsorbedWater); c.hasSeveralMaxima() || film && c.isPlain() {
		return s, false
	}
	t, ok := c.climb()
	if !ok {
		return s, false
	}
	var here terms
	c.thick(t, &here)
	return here.state(t * (3 + t*(3+t))), true
}

// Giant reports whether the particle is a giant nucleus by its dry size: above
// 1 µm (common practice). Whether equilibrium is the question is a matter of its
// crest, see Slow: an insoluble particle of that size has it near the dry size.
func (p Particle) Giant() bool { return p.DryDiameter > giantDry }

const giantDry = 1e-6

// Slow reports whether the crest lies at a wet size that growth cannot reach
// within minutes, so that equilibrium is not the question: above 10 µm in radius.
// Growth by vapour to r takes r²/(2 G s), with G some 1e-10 m²/s (10 °C, 900 hPa; from
// memory): 8 minutes at 0.1 %, longer than a drop spends near cloud base.
func (c Crest) Slow() bool { return c.WetDiameter > slowWet }

const slowWet = 20e-6
