package answer

import (
	"errors"
	"math"
	"slices"

	"dropcrest/atmos"
	"dropcrest/koehler"
	"dropcrest/solutes"
	"dropcrest/ui/scenario"
)

// newCurve makes the particle of a scenario.
func newCurve(env Env, s scenario.Scenario) (*curve, error) {
	c := &curve{asked: s}
	made, err := env.matter(s)
	if err != nil {
		return nil, err
	}
	c.dissolved, c.parts = made.dissolved, made.parts
	c.notes = distinct(slices.Concat(made.notes, waterNotes(s), made.more))
	dry := dryDiameter(s)
	if !(dry > 0) {
		return nil, &InputError{Input: "dry-diameter", Text: "no volume-equivalent diameter belongs to this mobility diameter and shape factor"}
	}
	c.particle, err = newParticle(made.dissolved, s, dry)
	if err != nil {
		return nil, recipeError(err)
	}
	if made.dissolved.Core != nil {
		c.dissolved.Solution = c.particle.Solution
	}
	c.twin, c.hasTwin = c.particle.Dissolved()
	return c, nil
}

// recipeError names the input that a refused particle is about.
func recipeError(err error) error {
	input := "component"
	var refused *solutes.RefusedError
	if errors.As(err, &refused) {
		input = refused.Input
	}
	return &InputError{Input: input, Text: reason(err)}
}

// dissolve makes the solution of a recipe with the solubility that the scenario
// asks for. A solubility counts where it is known and a published model joins it
// with the rest; where none does, a note says so.
func dissolve(r solutes.Recipe, s scenario.Scenario) (solutes.Dissolved, []atmos.Note, error) {
	if s.Solubility == "limited" {
		r.Solubility = solutes.LimitedSolubility
	}
	return solutes.DissolveJoined(r)
}

// newParticle is the droplet's particle: plain, with a film, or with water
// adsorbed on a core.
func newParticle(d solutes.Dissolved, s scenario.Scenario, dry float64) (koehler.Particle, error) {
	m := koehler.Making{DryDiameter: dry, Temperature: s.Temperature, Partitioning: s.Partitioning == "on",
		Kelvin: kelvinForm(s.Kelvin), TolmanLength: s.TolmanLength}
	if isExponential(s) {
		m.Form = koehler.Exponential
	}
	return m.Of(d)
}

// isExponential tells which published form a soluble share on adsorbing matter has.
func isExponential(s scenario.Scenario) bool {
	return len(s.Adsorption) > 0 && s.Adsorption[0].Form == "exponential"
}

// dryDiameter is the volume-equivalent dry diameter. A classifier measures at
// laboratory pressure: one standard atmosphere.
func dryDiameter(s scenario.Scenario) float64 {
	if s.DrySizeIs == "mobility" {
		return atmos.VolumeEquivalent(s.DryDiameter, s.ShapeFactor, s.Temperature, atmos.StandardPressure)
	}
	return s.DryDiameter
}

func kelvinForm(word string) koehler.Kelvin {
	switch word {
	case "pure-vapour":
		return koehler.PureVapour
	case "compressible":
		return koehler.Compressible
	}
	return koehler.Standard
}

// solve finds crest, extrema, haze and the textbook crest. What does not exist
// is no error of the question: it is said in words and is null in the facts.
func (c *curve) solve() {
	s := c.particle.Solve(c.asked.RelativeHumidity)
	c.crest, c.noCrest, c.extrema, c.noHaze = s.Crest, s.NoCrest, s.Extrema, s.NoHaze
	c.textbook, c.noCubic = c.particle.Textbook()
	if s.Stable.WetDiameter > 0 {
		c.haze = append(c.haze, hazeState{"stable", s.Stable})
	}
	if s.Unstable.WetDiameter > 0 && !math.IsInf(s.Unstable.WetDiameter, 0) {
		c.haze = append(c.haze, hazeState{"unstable", s.Unstable})
	}
	if c.hasTwin {
		c.solveTwin()
	}
	c.branches()
}

// solveTwin finds what the particle does once all of it has been dissolved.
func (c *curve) solveTwin() {
	s := c.twin.Solve(c.asked.RelativeHumidity)
	c.twinCrest, c.hasTwin = s.Crest, s.NoCrest == nil
	if s.Stable.WetDiameter > 0 && c.hasTwin {
		c.haze = append(c.haze, hazeState{"dissolved", s.Stable})
	}
}

// branches puts the particle on the branch that its history gives it: a crystal,
// or a solution. Over a drop of some nanometres a salt may dissolve above 100 %
// only.
func (c *curve) branches() {
	flat, notes := solutes.PhasesOf(c.parts, c.asked.Temperature)
	c.flat = flat
	if c.noHaze != nil || c.hasTwin || c.dissolved.Film != nil {
		return
	}
	history := solutes.Rising
	if c.asked.HumidityHistory == "falling" {
		history = solutes.Falling
	}
	h, err := c.particle.Hysteresis(c.asked.RelativeHumidity, flat, history)
	if err != nil {
		c.notes = append(c.notes, atmos.Note{Code: "no-phase-branch", Input: "humidity-history",
			Text: "A dry crystal of this size would dissolve only beyond its crest: whether it is dry or a drop at this humidity is not said."})
		return
	}
	if c.asked.RelativeHumidity >= 1 && !h.Several {
		return // dissolved, as far as is known
	}
	c.phase, c.hasPhase = h, true
	crystals, solutions := c.partsAt(h.Now.WaterActivity)
	c.isDoubtful = h.Now.Branch == solutes.BranchUnknown && crystals > 0
	isSolution := h.Now.Branch == solutes.SolutionBranch || h.Now.Branch == solutes.BranchUnknown && crystals == 0 && solutions > 0
	if h.Several || !isSolution {
		c.notes = distinct(append(c.notes, notes...))
	}
	unstable := slices.DeleteFunc(c.haze, func(h hazeState) bool { return h.branch != "unstable" })
	c.haze = []hazeState{c.branched(h.Now)}
	if h.Several {
		c.haze = append(c.haze, c.branched(h.Other))
	}
	c.haze = append(c.haze, unstable...)
}

// partsAt counts the parts that would be crystals by themselves at that water
// activity, and those that would dissolve. A mixture dissolves below the
// deliquescence of each of its parts.
func (c *curve) partsAt(activity float64) (crystals, solutions int) {
	for _, p := range c.parts {
		switch humidity, known := p.Substance.DeliquescenceHumidity(c.asked.Temperature); {
		case known && activity < humidity:
			crystals++
		case known:
			solutions++
		}
	}
	return crystals, solutions
}

// branched names the state of a particle on its branch. A drop of a lower water
// activity than that at which a dry particle dissolves is metastable.
func (c *curve) branched(b koehler.Branched) hazeState {
	switch {
	case b.Branch == solutes.CrystalBranch:
		return hazeState{"dry", b.State}
	case b.Branch == solutes.PartlyDissolved:
		return hazeState{"partly_dissolved", b.State}
	case b.WaterActivity < c.flat.Dissolved:
		return hazeState{"metastable", b.State}
	}
	return hazeState{"stable", b.State}
}
