package koehler

import (
	"math"

	"dropcrest/atmos"
	"dropcrest/solutes"
)

// curve is a particle made ready: everything that depends on the temperature
// only is computed once.
type curve struct {
	dry    float64
	kelvin KelvinTerm
	sol    solutes.Solution
	swell  solutes.Swelling
	stress solutes.Tension // nil: constant
	sigma  float64         // N/m, that constant
	tolman float64         // m
}

func (p Particle) ready() curve {
	c := curve{
		dry:    p.DryDiameter,
		kelvin: NewKelvinTerm(p.Kelvin, p.Temperature),
		sol:    p.Solution,
		swell:  p.Swelling,
		tolman: p.TolmanLength,
	}
	switch t := p.Tension.(type) {
	case nil:
		c.sigma = atmos.SurfaceTension(p.Temperature)
	case solutes.ConstantTension:
		c.sigma = float64(t)
	default:
		c.stress = t
	}
	return c
}

// isPlain tells whether all but the water activity is of the simplest form:
// additive volumes, a constant tension, the standard Kelvin term.
func (c *curve) isPlain() bool {
	return c.swell == nil && c.stress == nil && c.tolman == 0 && c.kelvin.Form == Standard
}

// kelvinLength is A in m for the constant tension.
func (c *curve) kelvinLength() float64 { return 4 * c.sigma * c.kelvin.PerPressure }

// terms are the parts of the equilibrium at one u.
type terms struct {
	wet, sigma, lnaw, lnS, slope float64 // slope: d ln S/d ln u
	wetSlope                     float64 // d ln D/d ln u
	activitySlope                float64 // d ln a_w/d ln u
	fall                         float64 // what the growing size alone takes from the slope
	byActivity                   float64 // the part of slope that ln a_w makes
}

func (c *curve) at(u float64) (t terms) {
	if c.swell == nil {
		c.sized(&t, u, math.Cbrt(1+u), u/(3*(1+u)))
		return t
	}
	v, dv := c.swell.Swell(u)
	c.sized(&t, u, math.Cbrt(v), dv/(3*v))
	return t
}

// sized is at for a known growth factor and its logarithmic slope by ln u.
func (c *curve) sized(t *terms, u, growth, wetSlope float64) {
	t.wet = c.dry * growth
	t.wetSlope = wetSlope
	var dsigma float64
	t.sigma = c.sigma
	if c.stress != nil {
		t.sigma, dsigma = c.stress.SurfaceTension(u)
	}
	if c.tolman != 0 {
		factor, slope := TolmanTension(1, c.tolman, t.wet)
		dsigma = dsigma*factor + t.sigma*slope*t.wetSlope
		t.sigma *= factor
	}
	t.lnaw, t.activitySlope = c.sol.LnActivity(u)
	pressure := LaplacePressure(t.sigma, t.wet)
	lnS, byPressure, byActivity := c.kelvin.LnSaturation(pressure, t.lnaw)
	t.lnS = lnS
	t.fall = byPressure * pressure * t.wetSlope
	t.byActivity = byActivity * t.activitySlope
	t.slope = t.byActivity + byPressure*4*dsigma/t.wet - t.fall
}

func (c *curve) state(u float64) State {
	t := c.at(u)
	return t.state(u)
}

func (t *terms) state(u float64) State {
	s := State{
		WetDiameter:     t.wet,
		Water:           u,
		Supersaturation: math.Expm1(t.lnS),
		WaterActivity:   math.Exp(t.lnaw),
		SurfaceTension:  t.sigma,
	}
	s.SaturationRatio = 1 + s.Supersaturation
	if t.lnS < -0.5 { // digits would be lost
		s.SaturationRatio = math.Exp(t.lnS)
	}
	s.KelvinFactor = s.SaturationRatio / s.WaterActivity
	if !(s.WaterActivity > 0) {
		s.KelvinFactor = math.Exp(t.lnS - t.lnaw)
	}
	return s
}

// LnSaturation makes a curve an equilibrium, for the scan and the roots.
func (c *curve) LnSaturation(u float64) (lnS, slope float64) {
	t := c.at(u)
	return t.lnS, t.slope
}

// LnSaturation returns ln S over the drop that holds u volumes of water per dry
// volume (u > 0) and its derivative by ln u.
func (p Particle) LnSaturation(u float64) (lnS, slope float64) {
	c := p.ready()
	t := c.at(u)
	return t.lnS, t.slope
}

// AtWater returns the drop that holds u volumes of water per dry volume, u > 0.
func (p Particle) AtWater(u float64) State {
	c := p.ready()
	return c.state(u)
}

// At returns the drop of that wet diameter in m, larger than the dry one. A
// diameter that no drop of the particle has gives NaN in every field.
func (p Particle) At(wet float64) State {
	c := p.ready()
	s := c.state(c.water(wet))
	if !math.IsNaN(s.WetDiameter) {
		s.WetDiameter = wet
	}
	return s
}

// swellDone is the relative step of u at which the Newton steps for a given
// wet diameter end.
const swellDone = 1e-12

// water is u at a wet diameter. With additive volumes u = x³ - 1 in the form
// that keeps its digits near the dry size.
func (c *curve) water(wet float64) float64 {
	t := (wet - c.dry) / c.dry
	u := t * (3 + t*(3+t))
	if c.swell == nil {
		if !(u >= 0) {
			return math.NaN()
		}
		return u
	}
	u = math.Max(u, 1e-12)
	target := 1 + t*(3+t*(3+t))
	for range 50 {
		v, dv := c.swell.Swell(u)
		step := (v - target) / dv
		step = math.Max(-2, math.Min(2, step))
		u *= math.Exp(-step)
		if math.Abs(step) <= swellDone {
			return u
		}
	}
	return math.NaN()
}

// Sample fills dst (grown as needed) with states at n wet diameters from one
// to the other in m, spaced evenly in the logarithm, and puts the extrema that
// lie between them in their places, so that the crest is never cut off. The
// result has n states and those extrema, in the order of their size.
func (p Particle) Sample(dst []State, from, to float64, n int) []State {
	dst = dst[:0]
	if !(from > 0) || !(to > from) || n < 2 {
		return dst
	}
	c := p.ready()
	extrema, _ := p.Extrema() // none where there is no curve
	next := 0
	step := math.Log(to/from) / float64(n-1)
	for i := range n {
		wet := from * math.Exp(float64(i)*step)
		if i == n-1 {
			wet = to
		}
		for ; next < len(extrema) && extrema[next].WetDiameter < wet; next++ {
			if extrema[next].WetDiameter > from {
				dst = append(dst, extrema[next].State)
			}
		}
		if wet > p.DryDiameter {
			dst = append(dst, c.state(c.water(wet)))
		}
	}
	return dst
}
