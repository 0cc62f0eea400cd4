package koehler

import (
	"fmt"
	"math"
)

// The range of dry diameters in m that ActivatedDryDiameter searches.
const (
	leastDry = 1e-10
	mostDry  = 1e-3
)

// dryDone is the relative step of ln Dd at which the search ends.
const dryDone = 1e-13

// ActivatedDryDiameter returns the dry diameter in m of this composition whose
// crest lies at supersaturation s (a fraction); the particle's own DryDiameter
// does not matter, and SizeDependent matter is taken along.
//
// Constant κ is DryOf. Otherwise the crest falls with the dry size, and ln s_c
// against ln Dd is nearly straight, so secants inside a bracket end in a few
// steps. A NoSolutionError says that no size from 0.1 nm to 1 mm activates at s.
func (p Particle) ActivatedDryDiameter(s float64) (float64, error) {
	p = p.Sized(1e-7)
	if err := p.Check(); err != nil {
		return math.NaN(), err
	}
	if !(s > 0) || math.IsInf(s, 0) {
		return math.NaN(), &RangeError{"supersaturation", s, "above 0: at or below saturation no particle has its crest"}
	}
	c := p.ready()
	if kappa, ok := c.closedKappa(); ok {
		return DryOf(kappa, c.kelvinLength(), s)
	}
	return p.searchDry(s)
}

func (p Particle) searchDry(s float64) (float64, error) {
	target := math.Log(s)
	lo, hi := math.Log(leastDry), math.Log(mostDry)
	x, slope := math.Log(1e-7), -1.5
	before, f := math.NaN(), math.NaN()
	for range 200 {
		crest, err := p.Sized(math.Exp(x)).Crest()
		if err != nil {
			return math.NaN(), err
		}
		g := math.Inf(-1)
		if crest.Supersaturation > 0 {
			g = math.Log(crest.Supersaturation) - target
		}
		if g > 0 {
			lo = x
		} else {
			hi = x
		}
		if d := (g - f) / (x - before); d < 0 && !math.IsInf(d, 0) {
			slope = d
		}
		before, f = x, g
		step := -g / slope
		if math.Abs(step) <= dryDone {
			return math.Exp(x + step), nil
		}
		x += step
		if !(x > lo && x < hi) {
			x = (lo + hi) / 2
		}
		if hi-lo <= dryDone {
			break
		}
	}
	if hi > math.Log(mostDry)-1e-9 || lo < math.Log(leastDry)+1e-9 {
		return math.NaN(), &NoSolutionError{s, math.NaN(), fmt.Sprintf("no dry diameter from %g nm to %g mm has its crest there", leastDry*1e9, mostDry*1e3)}
	}
	return math.Exp((lo + hi) / 2), nil
}
