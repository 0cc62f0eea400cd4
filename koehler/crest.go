package koehler

import (
	"math"

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
	var room [16]Turn
	crest, _, err := c.barrier(room[:0])
	return crest, err
}

// barrier returns the crest and the turns that had to be found for it, in the
// empty dst.
func (c *curve) barrier(dst []Turn) (Crest, []Turn, error) {
	turns, ok := c.exact(dst)
	if !ok {
		if u, ok := c.only(); ok {
			crest := c.crest(c.extremum(Maximum, c.state(u)), Only)
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

// only is the u of the one crest of a smooth activity, if the curve has one
// crest and it is found.
func (c *curve) only() (u float64, ok bool) {
	if c.hasSeveralMaxima() {
		return 0, false
	}
	return c.climb()
}

// climbDone is the last step in ln u: secants gain half as many digits again, so
// what is left after it is below 1e-12 in the size and nothing in s_c.
const climbDone = 1e-8

// climb finds the one crest of a smooth activity. It starts from the crest of
// the κ that the solution has there, takes the second derivative of that κ form
// for the first step and secants from then on.
func (c *curve) climb() (u float64, ok bool) {
	a := 4 * c.sigma * c.kelvin.PerPressure
	if c.stress != nil {
		sigma, _ := c.stress.SurfaceTension(1e6)
		a = 4 * sigma * c.kelvin.PerPressure
	}
	kappa := c.equivalentKappa(1000)
	if !(kappa > 0) || kappa > maxKappa {
		return 0, false
	}
	if there := c.equivalentKappa(crestWater(c.dry, a, kappa)); there > 0 && there <= maxKappa {
		kappa = there
	}
	x := math.Log(crestWater(c.dry, a, kappa))
	f, slope := c.kappaSlope(x)
	lo, hi := math.Inf(-1), math.Inf(1)
	for range 40 {
		step := -f / slope
		if math.Abs(step) <= climbDone {
			return math.Exp(x + step), slope < 0
		}
		if f > 0 {
			lo = x
		} else {
			hi = x
		}
		next := x + math.Max(-2, math.Min(2, step))
		if !(slope < 0) { // no maximum near: go uphill
			next = x + math.Copysign(1, f)
		}
		if !(next > lo && next < hi) {
			next = (lo + hi) / 2
		}
		g := c.at(math.Exp(next)).slope
		slope = (g - f) / (next - x)
		x, f = next, g
	}
	return 0, false
}

// kappaSlope is d ln S/d ln u and the derivative of it that the κ form with
// the same slope of ln a_w has.
func (c *curve) kappaSlope(x float64) (f, slope float64) {
	t := c.at(math.Exp(x))
	k := t.lnS - t.lnaw
	r := 3 * t.wetSlope
	w := t.slope + k*r/3
	return t.slope, -w*(1-w) + k*r*r/9 - k*r*(1-r)/3
}

func (c *curve) equivalentKappa(u float64) float64 {
	lnaw, _ := c.sol.LnActivity(u)
	return u * math.Expm1(-lnaw)
}

func crestWater(dry, kelvin, kappa float64) float64 {
	t := SolveKappa(dry, kelvin, kappa).GrowthFactor - 1
	return t * (3 + t*(3+t))
}

// Giant reports whether the particle is a giant nucleus: one whose crest lies
// at a wet size that growth cannot reach within minutes, so that equilibrium is
// not the question. The threshold is a dry diameter of 1 µm (common practice):
// a soluble particle of 1 µm has its crest at some 25 µm and below 0.01 %, and
// growing a drop from haze to there by vapour at such supersaturations takes
// many minutes, longer than it spends near cloud base.
func (p Particle) Giant() bool { return p.DryDiameter > giantDry }

const giantDry = 1e-6
