package koehler

import (
	"fmt"
	"math"
)

// Haze returns the drops in equilibrium at saturation ratio S: the stable one
// below the crest and, for S > 1, the unstable one above it (the zero State for
// S ≤ 1). Where the curve has several maxima, the stable drop is the first that
// a growing particle meets.
//
// Errors wrap ErrAboveCrest for S at or above the crest, ErrNoHaze where a
// particle without solute stays dry, ErrInput and ErrNoCrest.
func (p Particle) Haze(S float64) (stable State, unstable State, err error) {
	if err := checkRatio(S); err != nil {
		return stable, unstable, err
	}
	if err := p.Check(); err != nil {
		return stable, unstable, err
	}
	c := p.ready()
	crest, extrema, err := p.barrier(&c)
	if err != nil {
		return stable, unstable, err
	}
	return p.haze(&c, S, crest, extrema)
}

func checkRatio(S float64) error {
	if !(S > 0) || math.IsInf(S, 0) {
		return &RangeError{"saturation ratio", S, "above 0"}
	}
	return nil
}

// haze is Haze once barrier has found the crest.
func (p Particle) haze(c *curve, S float64, crest Crest, extrema []Extremum) (stable, unstable State, err error) {
	if S >= crest.SaturationRatio || S-1 >= crest.Supersaturation {
		return stable, unstable, &AboveCrestError{S, crest.SaturationRatio}
	}
	lnS := math.Log(S)
	if S > 1 {
		top := math.Log(math.Max(crest.Water, scanFrom))
		far := top + 1
		for c.at(math.Exp(far)).lnS > lnS {
			far += 2
		}
		unstable = c.state(math.Exp(c.waterAt(lnS, top, far)))
	}
	if crest.Kind == BoundaryMaximum && crest.Water <= scanFrom {
		return stable, unstable, fmt.Errorf("%w: its curve falls from the dry size on", ErrNoHaze)
	}
	hi := p.firstAbove(lnS, crest, extrema)
	lo := hi - 1
	for c.at(math.Exp(lo)).lnS >= lnS {
		if lo -= 2; lo < -90 {
			return stable, unstable, fmt.Errorf("%w: even its first water needs more than S = %.6g", ErrNoHaze, S)
		}
	}
	stable = c.state(math.Exp(c.waterAt(lnS, lo, hi)))
	return stable, unstable, nil
}

// firstAbove is ln u of the first maximum above lnS.
func (p Particle) firstAbove(lnS float64, crest Crest, extrema []Extremum) float64 {
	if !p.severalMaxima() {
		return math.Log(crest.Water)
	}
	for _, e := range extrema {
		if e.Kind == Maximum && math.Log(e.SaturationRatio) > lnS {
			return math.Log(e.Water)
		}
	}
	return math.Log(crest.Water)
}
