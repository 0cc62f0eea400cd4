package koehler

import (
	"errors"
	"math"

	"dropcrest/solutes"
)

// SeveralMaxima is what a Solution or Tension implements whose curve may have
// more than one extremum. Crest then scans the whole curve instead of climbing
// to the one crest.
type SeveralMaxima interface{ SeveralMaxima() bool }

// Crest returns the barrier: the highest maximum of the equilibrium curve.
//
// Constant κ with additive volumes, a constant tension and the standard Kelvin
// term is solved in closed form. A smooth activity is climbed by Newton in ln u;
// a Tension that hangs on the solution, or a part that reports SeveralMaxima, is
// scanned. An error wraps ErrInput or ErrNoCrest.
func (p Particle) Crest() (Crest, error) {
	if err := p.Check(); err != nil {
		return Crest{}, err
	}
	c := p.ready()
	crest, _, err := p.barrier(&c)
	return crest, err
}

// Extrema returns all extrema in the order of their wet size.
func (p Particle) Extrema() ([]Extremum, error) {
	if err := p.Check(); err != nil {
		return nil, err
	}
	c := p.ready()
	crest, extrema, err := p.barrier(&c)
	return p.allExtrema(crest, extrema, err)
}

// allExtrema are the extrema of what barrier returned. A curve that was scanned
// and has no maximum has no error either.
func (p Particle) allExtrema(crest Crest, scanned []Extremum, err error) ([]Extremum, error) {
	switch {
	case scanned != nil && p.severalMaxima():
		return scanned, nil
	case err != nil:
		return nil, err
	}
	return []Extremum{{crest.Kind, crest.State}}, nil
}

// barrier is the crest of a particle that was made ready, and all extrema where
// they had to be found for it.
func (p Particle) barrier(c *curve) (Crest, []Extremum, error) {
	kappa, constant := closedKappa(p.Solution)
	if constant && (!(kappa >= 0) || kappa > maxKappa) {
		return Crest{}, nil, &RangeError{"kappa", kappa, "0 to 30"}
	}
	switch {
	case constant && kappa == 0:
		return c.crest(Extremum{BoundaryMaximum, c.insoluble()}), nil, nil
	case constant && p.Swelling == nil && p.constantTension() && p.Kelvin == Standard:
		return c.closed(kappa), nil, nil
	case !p.severalMaxima():
		if u, ok := c.climb(); ok {
			return c.crest(Extremum{Maximum, c.state(u)}), nil, nil
		}
	}
	extrema, err := c.scan()
	if err != nil {
		return Crest{}, nil, err
	}
	best := -1
	for i, e := range extrema {
		isMaximum := e.Kind == Maximum || e.Kind == BoundaryMaximum
		if isMaximum && (best < 0 || e.SaturationRatio > extrema[best].SaturationRatio) {
			best = i
		}
	}
	if best < 0 {
		return Crest{}, extrema, ErrNoCrest
	}
	return c.crest(extrema[best]), extrema, nil
}

func (p Particle) severalMaxima() bool {
	if s, ok := p.Solution.(SeveralMaxima); ok && s.SeveralMaxima() {
		return true
	}
	if p.constantTension() {
		return false
	}
	s, ok := p.Tension.(SeveralMaxima)
	return !ok || s.SeveralMaxima()
}

// closedKappa is κ of a solution of constant κ.
func closedKappa(s solutes.Solution) (float64, bool) {
	k, ok := s.(solutes.Kappa)
	return float64(k), ok
}

func (c *curve) crest(e Extremum) Crest {
	return Crest{e.State, e.WetDiameter / c.dry, e.Kind, e.Kind != BoundaryMaximum && e.Water < c.sol.LeastWater()}
}

// closed is the crest of the κ form.
func (c *curve) closed(kappa float64) Crest {
	a := 4 * c.sigma * c.kelvin.PerPressure
	k := SolveKappa(c.dry, a, kappa)
	t := k.GrowthFactor - 1
	return Crest{
		State: State{
			WetDiameter:     c.dry * k.GrowthFactor,
			Water:           t * (3 + t*(3+t)),
			SaturationRatio: 1 + k.Supersaturation,
			Supersaturation: k.Supersaturation,
			WaterActivity:   k.WaterActivity,
			KelvinFactor:    (1 + k.Supersaturation) / k.WaterActivity,
			SurfaceTension:  c.sigma,
		},
		GrowthFactor: k.GrowthFactor,
	}
}

// insoluble is the state of a wettable particle without solute at its dry size.
func (c *curve) insoluble() State {
	sigma := c.sigma
	if c.stress != nil {
		sigma, _ = c.stress.SurfaceTension(scanFrom)
	}
	lnS, _, _ := c.kelvin.LnSaturation(LaplacePressure(sigma, c.dry), 0)
	return State{
		WetDiameter: c.dry, SaturationRatio: math.Exp(lnS), Supersaturation: math.Expm1(lnS),
		WaterActivity: 1, KelvinFactor: math.Exp(lnS), SurfaceTension: sigma,
	}
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

// scanFrom is the least u of the scan.
const scanFrom = 1e-9

// perDecade is the number of scan points per decade of u.
const perDecade = 24

// scan finds every extremum: a logarithmic scan for sign changes of the slope
// and a bracketed refinement of each. Where the curve still rises at the least
// water of the activity model the scan starts there, as what the extrapolation
// does below is no finding; nor is a boundary maximum of an extrapolation.
func (c *curve) scan() ([]Extremum, error) {
	far := c.farWater()
	if math.IsNaN(far) {
		return nil, errors.Join(ErrNoCrest, errors.New("the equilibrium curve is not finite or does not fall for large drops"))
	}
	from, least := scanFrom, c.sol.LeastWater()
	if least > from && c.at(least).slope > 0 {
		from = least
	}
	n := int(math.Ceil(perDecade * math.Log10(far/from)))
	start, step := math.Log(from), math.Log(far/from)/float64(n)
	x, f := start, c.at(from).slope
	found := []Extremum{}
	if f < 0 && least == 0 {
		found = append(found, Extremum{BoundaryMaximum, c.state(from)})
	}
	for i := 1; i <= n; i++ {
		next := start + float64(i)*step
		g := c.at(math.Exp(next)).slope
		if (f > 0) != (g > 0) {
			at, jump := c.turn(x, next)
			found = append(found, Extremum{kindOf(f > 0, jump), c.state(math.Exp(at))})
		}
		x, f = next, g
	}
	return found, nil
}

func kindOf(rising, jump bool) Kind {
	switch {
	case rising:
		return Maximum
	case jump:
		return KinkMinimum
	}
	return Minimum
}

// farWater is a u beyond all extrema: the curve falls there and a hundred
// times further out.
func (c *curve) farWater() float64 {
	for u := 1e6; u < 1e18; u *= 10 {
		if c.at(u).slope < 0 && c.at(10*u).slope < 0 && c.at(100*u).slope < 0 {
			return 10 * u
		}
	}
	return math.NaN()
}
