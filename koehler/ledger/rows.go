package ledger

import (
	"fmt"
	"math"
	"strings"

	"dropcrest/atmos"
	"dropcrest/koehler"
	"dropcrest/solutes"
)

// against is the row of a simplified particle.
func (b *book) against(p koehler.Particle) Row {
	r := b.row(answer(p, b.asked.SaturationRatio))
	r.simple, r.whole = &p, &b.full.particle
	return r
}

func (b *book) row(simplified Answer) Row { return compare(simplified, b.fullest) }

func compare(simplified, full Answer) Row {
	r := Row{Simplified: simplified, Full: full, Change: change(simplified.Values, full.Values)}
	if simplified.NoCrest != nil && full.NoCrest == nil {
		r.Reason = "Simplified, the particle has no barrier."
	}
	return r
}

// remade is the row of the fullest particle asked for in another way.
func (b *book) remade(a Asked) Row {
	m, err := a.make()
	if err != nil {
		return unknown(sentence(err))
	}
	return b.against(m.particle)
}

func unknown(reason string) Row { return Row{Status: NotKnown, Reason: reason, Change: none()} }
func inapplicable(reason string) Row {
	return Row{Status: NotApplicable, Reason: reason, Change: none()}
}

// sentence makes one of an error.
func sentence(err error) string {
	return "It cannot be worked out: " + strings.ReplaceAll(err.Error(), "\n", ": ") + "."
}

// pair compares two forms of the curvature term, all else as in the fullest model.
func (b *book) pair(simple, full koehler.Kelvin) (Answer, Answer) {
	p := b.full.particle
	p.Kelvin = simple
	s := answer(p, b.asked.SaturationRatio)
	p.Kelvin = full
	return s, answer(p, b.asked.SaturationRatio)
}

func vapourRow(b *book) Row {
	simple, vapour := b.pair(koehler.Standard, koehler.PureVapour)
	inVapour := compare(simple, vapour)
	r := b.against(b.full.particle) // air: the term does not exist
	r.Reason = "In air of a fixed total pressure it is exactly zero."
	r.If = &If{"in pure water vapour instead of air", inVapour.Change}
	if b.asked.Kelvin == koehler.PureVapour {
		r = inVapour
		r.Reason = "Both answers take the liquid as incompressible, so that the vapour's pressure alone differs."
	}
	if b.fullest.NoCrest == nil {
		c := b.fullest.Crest
		r.Pressures = &Pressures{
			Laplace: koehler.LaplacePressure(c.SurfaceTension, c.WetDiameter),
			Vapour:  atmos.VapourPressure(b.full.particle.Temperature) * c.Supersaturation,
		}
	}
	return r
}

func incompressibleRow(b *book) Row {
	p := b.full.particle
	p.Kelvin = koehler.Standard
	return b.against(p)
}

// simulatedTolman is the Tolman length that a simulation of TIP4P/2005 water at
// 300 K gave for radii of 0.7 to 1.6 nm, m.
const simulatedTolman = -0.056e-9

func flatRow(b *book) Row {
	p := b.full.particle
	if p.TolmanLength != 0 {
		p.TolmanLength = 0
		return b.against(p)
	}
	r := unknown("No Tolman length is given: published ones lie between -0.1 and +0.1 nm and disagree on the sign.")
	p.TolmanLength = simulatedTolman
	if p.Check() == nil {
		r.If = &If{"if Tolman's length is -0.056 nm", change(b.fullest.Values, answer(p, b.asked.SaturationRatio).Values)}
	}
	return r
}

func kappaRow(b *book) Row {
	r := recipe{b.full.asked.Recipe}
	switch {
	case r.hasOneKappa():
		return unknown("Only one κ is known for the whole particle: how it changes with the dilution is not.")
	case b.full.dissolved.Core != nil:
		return inapplicable("The published forms of adsorption know κ only.")
	case r.isInsoluble():
		return inapplicable("Nothing in the particle dissolves.")
	case r.Model != solutes.IonInteraction || !r.hasDetail():
		return unknown("No part of the particle has a model of water activity beyond its κ.")
	case isKept(b.full.dissolved):
		return unknown("Limited solubility is a model for one κ a part: nothing fuller is published.")
	}
	a := b.full.asked
	a.Recipe.Model, a.Recipe.Kappa = solutes.KappaModel, math.NaN()
	row := b.remade(a)
	if row.Status == Known && row.Reason == "" {
		kappa := (recipe{a.Recipe}).kappa(b.full.dissolved.WaterDensity)
		row.Reason = fmt.Sprintf("The catalogue's κ is %.3g, mixed by volume.", kappa)
		if own, ok := kappaAt(b.fullest); ok {
			row.Reason = fmt.Sprintf("The catalogue's κ is %.3g, the solution's at the crest %.3g.", kappa, own)
		}
	}
	return row
}

// kappaAt is the κ that the drop at the crest stands for.
func kappaAt(a Answer) (kappa float64, ok bool) {
	if a.NoCrest != nil || !(a.Crest.Water > 0) {
		return 0, false
	}
	return (1/a.Crest.WaterActivity - 1) * a.Crest.Water, true
}

func idealRow(b *book) Row {
	r := recipe{b.full.asked.Recipe}
	switch {
	case r.hasOneKappa():
		return inapplicable("Only one κ is known for the whole particle: no number of ions goes into it.")
	case r.isInsoluble():
		return inapplicable("Nothing in the particle dissolves.")
	case r.Model == solutes.VantHoff && math.IsNaN(r.VantHoffFactor):
		return unknown("No part of the particle has a fuller model than the ideal solution that was asked for.")
	}
	a := b.full.asked
	a.Recipe.Model, a.Recipe.VantHoffFactor = solutes.VantHoff, math.NaN()
	return b.remade(a)
}

func pureWaterRow(b *book) Row {
	r, p := recipe{b.full.asked.Recipe}, b.full.particle
	water := solutes.ConstantTension(atmos.SurfaceTension(p.Temperature))
	switch {
	case b.full.dissolved.Film != nil:
		p.Solution = b.full.dissolved.Solution // all of the organic in the bulk
	case r.TensionRule == solutes.FixedTension:
	case r.isInsoluble():
		return inapplicable("Nothing in the particle dissolves.")
	case !r.hasIncrement():
		return unknown("No effect of the particle's substances on the surface tension is known.")
	case b.refused[PureWaterSurfaceTension] != nil:
		return unknown(sentence(b.refused[PureWaterSurfaceTension]))
	}
	p.Tension = water
	return b.against(p)
}

func conventionRow(b *book) Row {
	a, p := b.full.asked, b.full.particle
	if b.full.dissolved.Film != nil {
		p.Solution = b.full.dissolved.Solution
		p.Temperature = convention.Temperature
		p.Tension = solutes.ConstantTension(convention.Tension)
		return b.against(p)
	}
	if a.Recipe.Temperature == convention.Temperature {
		p.Tension = solutes.ConstantTension(convention.Tension)
		return b.against(p)
	}
	a.Recipe.Temperature = convention.Temperature
	a.Recipe.TensionRule, a.Recipe.Tension = solutes.FixedTension, convention.Tension
	return b.remade(a)
}

func additiveRow(b *book) Row {
	p := b.full.particle
	switch {
	case (recipe{b.full.asked.Recipe}).isInsoluble():
		return inapplicable("Nothing in the particle dissolves.")
	case b.refused[VolumeAdditivity] != nil:
		return unknown(sentence(b.refused[VolumeAdditivity]))
	case b.full.dissolved.Film != nil || b.full.dissolved.Core != nil:
		return unknown("The models of films and of adsorption know additive volumes only.")
	case p.Swelling == nil:
		return unknown("No measured density of the particle's solution is known.")
	}
	p.Swelling = nil
	return b.against(p)
}

func sphereRow(b *book) Row {
	a := b.full.asked
	switch {
	case !a.Mobility:
		return inapplicable("The dry size is a volume-equivalent diameter, whatever the shape.")
	case a.ShapeFactor <= 1:
		return unknown("No shape factor of the particle is known or given.")
	}
	row := b.against(b.full.particle.Sized(a.DryDiameter))
	row.Reason = fmt.Sprintf("The shape factor is %.3g.", a.ShapeFactor)
	if b.asked.ShapeFactor <= 1 {
		row.Reason = fmt.Sprintf("The shape factor is %.3g, that of the catalogue.", a.ShapeFactor)
	}
	return row
}

func textbookRow(b *book) Row {
	t, err := textbook(b.full.particle, b.asked.SaturationRatio)
	if err != nil {
		return inapplicable("The cubic form needs a soluble part.")
	}
	return b.row(t)
}

func dissolutionRow(b *book) Row {
	if len(b.full.dissolved.Limits) == 0 {
		return inapplicable("As far as is known, no part of the particle is sparingly soluble.")
	}
	if isKept(b.full.dissolved) {
		all, ok := b.full.particle.Dissolved()
		if !ok {
			return inapplicable("All of the particle that can dissolve does so at once.")
		}
		return b.against(all)
	}
	return b.dissolutionByKappa()
}

// dissolutionByKappa compares within the κ model, where no published model joins
// the solubility with the fullest one.
func (b *book) dissolutionByKappa() Row {
	a := b.full.asked
	if a.Recipe.Adsorption != solutes.NoAdsorption || b.full.dissolved.Film != nil || (recipe{a.Recipe}).hasOneKappa() {
		return unknown("No published model joins the solubility with the rest of the particle.")
	}
	a.Recipe.Model, a.Recipe.Kappa = solutes.KappaModel, math.NaN()
	a.Recipe.TensionRule, a.Recipe.Solubility = solutes.PureWater, solutes.LimitedSolubility
	limited, err := a.make()
	if err != nil {
		return unknown(sentence(err))
	}
	all, ok := limited.particle.Dissolved()
	if !ok {
		return unknown("No published model joins the solubility with the rest of the particle.")
	}
	row := compare(answer(all, a.SaturationRatio), answer(limited.particle, a.SaturationRatio))
	row.simple, row.whole = &all, &limited.particle
	row.Reason = "Both answers are those of the κ model with the tension of water: no published model joins solubility with ion interaction."
	return row
}
