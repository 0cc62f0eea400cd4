package koehler

import (
	"fmt"
	"math"

	"dropcrest/solutes"
)

// Branched is a particle on one branch of its hysteresis.
//
// On solutes.SolutionBranch the State is that of its drop, and so it is on
// solutes.BranchUnknown, where it holds if the particle is dissolved. On
// solutes.CrystalBranch the particle has its dry size and no water; what belongs
// to a solution is NaN. On solutes.PartlyDissolved the size is NaN too.
type Branched struct {
	Branch solutes.Branch
	State
	Extrapolated bool // the drop is more concentrated than the activity model's range
}

// Hysteresis is what a particle is at a saturation ratio, by its history.
type Hysteresis struct {
	Now     Branched // after the history that was asked for
	Other   Branched // after the other history, where Several
	Several bool     // there are two states; of them the drop below Dissolved is metastable

	// The saturation ratios over this particle at which it changes its branch;
	// NaN: not known, or beyond what the model gives. They are higher than those of
	// a flat surface, because the drop is curved.
	Over solutes.Phases
}

// Hysteresis returns the state of the particle at saturation ratio S below its
// crest, when its flat phases are known and humidity has been rising from dry or
// falling from a solution.
//
// Phases belong to the water activity of the solution, not to the humidity. So a
// crystal dissolves where the drop that it would become has the activity of the
// saturated solution, which over a drop of D is at S = a_w exp(A/D): 1.1 % of
// humidity above the flat value for 100 nm of ammonium sulfate. The crystal's own
// surface, which lowers that again by some percent below 10 nm, is left out. For
// a mixture, whose first solution is of another composition, the humidity of
// Uptake is that over the drop of all of it.
//
// Errors: those of Haze, and ErrNoSolution where the crystal would dissolve only
// beyond the crest: such a particle is one of limited solubility.
func (p Particle) Hysteresis(S float64, flat solutes.Phases, history solutes.History) (h Hysteresis, err error) {
	stable, _, err := p.Haze(S)
	if err != nil {
		return h, err
	}
	c := p.ready()
	h.Over, err = c.over(flat)
	if err != nil {
		return h, err
	}
	other := solutes.Falling
	if history == solutes.Falling {
		other = solutes.Rising
	}
	h.Now = c.branched(stable, flat.Branch(stable.WaterActivity, history))
	if after := flat.Branch(stable.WaterActivity, other); after != h.Now.Branch {
		h.Other, h.Several = c.branched(stable, after), true
	}
	return h, nil
}

func (c *curve) branched(drop State, branch solutes.Branch) Branched {
	nan := math.NaN()
	switch branch {
	case solutes.CrystalBranch:
		return Branched{branch, State{c.dry, 0, drop.SaturationRatio, drop.Supersaturation, nan, nan, nan}, false}
	case solutes.PartlyDissolved:
		return Branched{branch, State{nan, nan, drop.SaturationRatio, drop.Supersaturation, nan, nan, nan}, false}
	}
	return Branched{branch, drop, drop.Water < c.sol.LeastWater()}
}

// over turns activities into the saturation ratios of the drops that have them.
func (c *curve) over(flat solutes.Phases) (over solutes.Phases, err error) {
	dissolved := c.waterOf(flat.Dissolved)
	if dissolved > 0 {
		if t := c.at(dissolved); t.slope < 0 {
			return over, fmt.Errorf("%w: the dry particle dissolves only beyond its crest, so treat it as one of limited solubility", ErrNoSolution)
		}
	}
	ratio := func(activity float64) float64 {
		if activity == 0 {
			return 0
		}
		u := c.waterOf(activity)
		if math.IsNaN(u) {
			return u
		}
		return math.Exp(c.at(u).lnS)
	}
	return solutes.Phases{Uptake: ratio(flat.Uptake), Dissolved: ratio(flat.Dissolved), Efflorescence: ratio(flat.Efflorescence)}, nil
}

// waterOf is the u of the solution of that activity; NaN where there is none.
func (c *curve) waterOf(activity float64) float64 {
	lnaw := math.Log(activity)
	if most, _ := c.sol.LnActivity(turnEnd); !(lnaw < most) || math.IsInf(lnaw, -1) {
		return math.NaN()
	}
	if u := before(activityAlone{c.sol}, lnaw, turnEnd); u > 0 {
		return u
	}
	return math.NaN()
}

// activityAlone is the curve of a solution with a flat surface.
type activityAlone struct{ solutes.Solution }

func (a activityAlone) LnSaturation(u float64) (lnS, slope float64) { return a.LnActivity(u) }

// Dissolved returns the particle as it is when all that can dissolve has been
// dissolved before and stays so, a haze drop that came from higher humidity; ok
// tells whether that makes a difference. Parts of solubility 0 stay insoluble.
func (p Particle) Dissolved() (dissolved Particle, ok bool) {
	mix, ok := p.Solution.(*solutes.Limited)
	if !ok || mix.Points() == 0 {
		return p, false
	}
	kappa, _ := mix.Segment(mix.Points()) // nothing is saturated there
	p.Solution = solutes.Kappa(kappa)
	return p, true
}
