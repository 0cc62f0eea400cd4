package koehler

import (
	"fmt"
	"math"
)

// Equilibrium is a drop in equilibrium at some humidity.
type Equilibrium struct {
	State
	// Stable: the curve rises there, so that a drop that gained or lost a little
	// water comes back. Where it falls, the drop evaporates or grows on.
	Stable       bool
	Extrapolated bool // it lies where the activity model is outside its range
}

// Equilibria appends to dst all drops in equilibrium at saturation ratio S in the
// order of their wet size. Between two extrema the curve is monotone, so there is
// one drop or none. Of a particle without solute, which stays dry, there may be
// none at all.
//
// Errors wrap ErrAboveCrest for S at or above the crest, ErrNoCrest where an
// endless curve comes to S later than 10000 times the dry size, and ErrInput.
func (p Particle) Equilibria(dst []Equilibrium, S float64) ([]Equilibrium, error) {
	if err := p.Check(); err != nil {
		return dst, err
	}
	c := p.ready()
	var room [16]Turn
	return c.equilibria(dst, c.turns(room[:0]), S)
}

// ratioRounding is what rounding leaves of a saturation ratio near 1.
const ratioRounding = 0x1p-52

func (c *curve) equilibria(dst []Equilibrium, turns []Turn, S float64) ([]Equilibrium, error) {
	if !(S > 0) || math.IsInf(S, 0) {
		return dst, &RangeError{"saturation ratio", S, "above 0"}
	}
	lnS := math.Log(S)
	i, place := Barrier(turns)
	if place != NoBarrier && S-1 >= turns[i].Supersaturation-ratioRounding {
		return dst, &AboveCrestError{S, 1 + turns[i].Supersaturation}
	}
	add := func(u float64, stable bool) {
		if u > 0 {
			dst = append(dst, Equilibrium{c.state(u), stable, u < c.sol.LeastWater()})
		}
	}
	held := *c                   // c itself stays off the heap
	last, rising := Turn{}, true // the end of the segment below, and whether the next one rises
	isBelow := true              // whether S lies above the curve at that end
	for i, t := range turns {
		if i == 0 && t.Kind != BoundaryMaximum && t.Supersaturation > S-1 {
			add(before(&held, lnS, t.Water), true)
		}
		now := t.Supersaturation <= S-1
		if i > 0 && now != isBelow {
			low, high := last.Water, t.Water
			if now {
				low, high = high, low
			}
			add(waterBetween(&held, lnS, low, high), rising)
		}
		last, isBelow = t, now
		rising = t.Kind == Minimum || t.Kind == KinkMinimum
	}
	switch {
	case !rising && !isBelow && lnS > 0:
		add(beyond(&held, lnS, last.Water), false)
	case rising && isBelow: // an endless curve
		if c.at(turnEnd).lnS < lnS {
			return dst, c.endless()
		}
		if last.Water > 0 {
			add(waterBetween(&held, lnS, last.Water, turnEnd), true)
		} else {
			add(before(&held, lnS, turnEnd), true)
		}
	}
	return dst, nil
}

// Haze returns the drop that a growing particle meets first at saturation ratio S,
// the stable one of the smallest size, and for S > 1 the unstable one beyond which
// every drop grows on (the zero State for S ≤ 1). Where there are more than these
// two, Equilibria has them all.
//
// Errors are those of Equilibria, and ErrNoHaze where the particle stays dry: a
// particle without solute, or one whose curve starts above S and falls from there.
func (p Particle) Haze(S float64) (stable State, unstable State, err error) {
	var room [8]Equilibrium
	drops, err := p.Equilibria(room[:0], S)
	if err != nil {
		return stable, unstable, err
	}
	return haze(drops, S)
}

// haze picks what Haze returns.
func haze(drops []Equilibrium, S float64) (stable, unstable State, err error) {
	if n := len(drops); n > 0 && S > 1 && !drops[n-1].Stable {
		unstable = drops[n-1].State
	}
	if len(drops) == 0 || !drops[0].Stable {
		return stable, unstable, fmt.Errorf("%w: its curve starts above S = %.6g", ErrNoHaze, S)
	}
	return drops[0].State, unstable, nil
}
