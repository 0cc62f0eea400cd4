package koehler

import (
	"errors"
	"fmt"
	"math"
)

// AdsorptionHaze returns the water u of the film or haze drop in equilibrium at
// saturation ratio S below the crest, and for S > 1 that of the unstable drop
// beyond it (NaN for S ≤ 1). Errors: those of AdsorptionCrest, and those that
// wrap ErrAboveCrest and ErrNoHaze. Without a crest there is a stable size for every S below 1.
func AdsorptionHaze(dry, kelvin float64, p Adsorption, S float64) (stable, unstable float64, err error) {
	crest, err := AdsorptionCrest(dry, kelvin, p)
	c := adsorptionCurve{p.On(dry), kelvin / dry}
	endless := errors.Is(err, ErrNoCrest)
	if endless {
		crest, err = Turn{Water: math.Pow(greatestGrowth, 3)}, nil
		lnS, _ := c.LnSaturation(crest.Water)
		crest.Supersaturation = math.Expm1(lnS)
	}
	switch {
	case err != nil:
		return 0, 0, err
	case S-1 > crest.Supersaturation:
		return 0, 0, &AboveCrestError{S, 1 + crest.Supersaturation}
	}
	lnS := math.Log(S)
	unstable = math.NaN()
	if S > 1 {
		unstable = beyond(c, lnS, crest.Water)
	}
	if crest.Kind == BoundaryMaximum || lnS < c.a+c.DryLnActivity() {
		return 0, unstable, fmt.Errorf("%w: its curve starts above S = %.6g", ErrNoHaze, S)
	}
	return before(c, lnS, crest.Water), unstable, nil
}

// before returns the u below crest at which c, rising there, has ln S.
func before(c equilibrium, lnS, crest float64) float64 {
	lo := crest
	for f := lnS; f >= lnS && lo > leastWater; f, _ = c.LnSaturation(lo) {
		lo *= 0.1
	}
	return waterBetween(c, lnS, lo, crest)
}

// beyond returns the u above crest at which c, falling to ln S = 0 there, has
// ln S > 0.
func beyond(c equilibrium, lnS, crest float64) float64 {
	hi := math.Max(crest, 1e-12)
	for f := lnS; f >= lnS && !math.IsInf(hi, 1); f, _ = c.LnSaturation(hi) {
		hi *= 10
	}
	return waterBetween(c, lnS, hi, crest)
}

// waterBetween solves ln S(u) = lnS by Newton's method in ln u inside a bracket;
// the curve is below lnS at low and above it at high, whichever is the larger u.
func waterBetween(c equilibrium, lnS, low, high float64) float64 {
	below, above := math.Log(math.Max(low, leastWater)), math.Log(math.Max(high, leastWater))
	y := below + (above-below)/2
	for range mostRootSteps {
		f, slope := c.LnSaturation(math.Exp(y))
		f -= lnS
		if f < 0 {
			below = y
		} else {
			above = y
		}
		next := y - f/slope
		if math.Abs(next-y) <= rootPrecision*math.Max(1, math.Abs(y)) {
			return math.Exp(next)
		}
		if !(next > math.Min(below, above) && next < math.Max(below, above)) {
			next = below + (above-below)/2
			if next == below || next == above {
				break
			}
		}
		y = next
	}
	return math.Exp(y)
}
