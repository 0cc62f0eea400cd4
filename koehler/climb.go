package koehler

import "math"

const (
	// guessKappa is the κ whose crest is where the climb begins: that of a salt.
	guessKappa = 0.6
	// mostClimbSteps bounds the climb; a smooth activity takes four or five.
	mostClimbSteps = 40
	// climbDone and climbProduct bound the last step, relative, and its product with
	// the one before, that end a climb. The error of an inverse quadratic step is
	// below a tenth of that product: what is left is below 1e-10 in the size and
	// nothing in s_c.
	climbDone    = 1e-5
	climbProduct = 1e-9
)

// ascent is one point of a climb: t = (1+u)^(1/3) - 1, which is D/Dd - 1 where
// volumes are additive, and the excess there, the logarithm of what lifts the
// curve over what lets it fall. It is nearly a straight line against ln t, which
// the slope of ln S itself is not. The logarithm is that of its first approximant,
// ln r ≈ 2 (r-1)/(r+1), -2 where nothing lifts the curve. In t neither cube roots
// nor exponentials are needed.
type ascent struct{ t, excess float64 }

// ascent leaves the terms at t in here.
func (c *curve) ascent(t float64, here *terms) ascent {
	c.thick(t, here)
	if here.slope < -here.fall {
		return ascent{t, -2}
	}
	return ascent{t, 2 * here.slope / (here.slope + 2*here.fall)}
}

// thick is at for t.
func (c *curve) thick(t float64, here *terms) {
	u := t * (3 + t*(3+t))
	if c.swell != nil {
		*here = c.at(u)
		return
	}
	c.sized(here, u, 1+t, u/(3*(1+u)))
}

// climb finds the t of the one crest of a smooth activity: first the crest of a
// salt, then that of the κ that has the same slope of ln a_w there, then a secant
// and inverse quadratic steps in a bracket.
func (c *curve) climb() (t float64, ok bool) {
	kelvin := c.kelvinLength()
	if c.stress != nil {
		sigma, _ := c.stress.SurfaceTension(1e6)
		kelvin = 4 * sigma * c.kelvin.PerPressure
	}
	if !(kelvin > 0) {
		return 0, false
	}
	a := kelvin / c.dry
	var here terms
	first := c.ascent(crestStart(3*guessKappa/a, guessKappa), &here)
	kappa := equivalentKappa(first.t, &here)
	if !(kappa > 0) || kappa > maxKappa {
		return 0, false
	}
	next, ok := halley(3*kappa/a, kappa)
	if !ok {
		next = first.t
	}
	return c.climbFrom(first, next)
}

// climbFrom goes on from a first point and the size to look at next.
func (c *curve) climbFrom(first ascent, next float64) (t float64, ok bool) {
	before, here := ascent{math.NaN(), math.NaN()}, first
	lo, hi := 0.0, math.Inf(1)
	last := 1.0
	var there terms
	for range mostClimbSteps {
		switch {
		case here.excess > 0:
			lo = here.t
		case here.excess <= 0:
			hi = here.t
		default:
			return 0, false
		}
		if !(next > lo && next < hi) {
			next = halfway(lo, hi)
		}
		now := c.ascent(next, &there)
		step, falls := quadraticStep(before, here, now)
		size := math.Abs(step) / now.t
		if falls && (size <= climbDone && size*last <= climbProduct || size <= climbProduct) {
			return now.t + step, true
		}
		last = size
		before, here = here, now
		next = math.Max(now.t/4, math.Min(now.t*4, now.t+step))
	}
	return 0, false
}

// halfway is the middle of a bracket, or beyond its one end.
func halfway(lo, hi float64) float64 {
	switch {
	case math.IsInf(hi, 1):
		return lo * 2
	case lo == 0:
		return hi / 2
	}
	return math.Sqrt(lo) * math.Sqrt(hi)
}

// quadraticStep is the step from c to where the parabola t(excess) through three
// points crosses zero, or the straight line where there are only two or the
// parabola is far from straight; falls tells whether the excess falls from b to c
// as t grows.
func quadraticStep(a, b, c ascent) (step float64, falls bool) {
	if c.excess == 0 {
		return 0, true
	}
	slope := (c.t - b.t) / (c.excess - b.excess)
	step = -c.excess * slope
	bend := (slope - (b.t-a.t)/(b.excess-a.excess)) / (c.excess - a.excess)
	if bent := b.excess * c.excess * bend; math.Abs(bent) < math.Abs(step)/2 {
		step += bent
	}
	return step, slope < 0
}

// equivalentKappa is the κ of the form ln a_w = -log1p(κ/u) that has the slope of
// here, or its value where that form has no such slope.
func equivalentKappa(t float64, here *terms) float64 {
	u := t * (3 + t*(3+t))
	if here.activitySlope > 0 && here.activitySlope < 0.9 {
		return u * here.activitySlope / (1 - here.activitySlope)
	}
	return u * math.Expm1(-here.lnaw)
}
