package solutes

import (
	"math"

	"dropcrest/atmos"
)

// OsmoticSolution is the water activity of one solute whose osmotic coefficient
// φ is known from a model of its own: acids and bisulfates with the bisulfate
// equilibrium, sea salt, non-electrolytes, or a Brine.
//
//	ln a_w = -ν M_w m φ(m),  m = (ρ_dry/M)/(u ρ_w)
//
// Immutable, safe for concurrent use; its methods do not allocate.
type OsmoticSolution struct {
	model    osmoticModel
	ions     float64 // ν of φ
	molality float64 // mol of solute per kg of water at u = 1
	highest  float64 // largest molality of the model
}

// osmoticModel is ln a_w and its derivative by ln m, finite for every m > 0.
type osmoticModel interface {
	lnActivity(m float64) (lnaw, slope float64)
}

// LnActivity returns ln a_w and its derivative by ln u, u > 0.
func (o *OsmoticSolution) LnActivity(u float64) (lnaw, slope float64) {
	lnaw, slope = o.model.lnActivity(o.molality / u)
	return lnaw, -slope
}

// LeastWater returns the u of the largest molality that the model covers.
func (o *OsmoticSolution) LeastWater() float64 { return o.molality / o.highest }

// OfShare returns the solution of a particle of which only that share of the
// dry volume, above 0 and at most 1, is this solute; the rest is insoluble and u
// counts per volume of the whole. It panics for other shares.
func (o *OsmoticSolution) OfShare(share float64) *OsmoticSolution {
	if !(share > 0 && share <= 1) {
		panic("solutes: share of the dry volume is not above 0 and at most 1")
	}
	part := *o
	part.molality *= share
	return &part
}

// Molality returns mol of solute formula units per kg of water at u.
func (o *OsmoticSolution) Molality(u float64) float64 { return o.molality / u }

// LargestMolality returns the end of the model's range, mol of solute formula
// units per kg of water.
func (o *OsmoticSolution) LargestMolality() float64 { return o.highest }

// Osmotic returns the osmotic coefficient at m mol of solute formula units per
// kg of water; φ → 1 for m → 0 with complete dissociation.
func (o *OsmoticSolution) Osmotic(m float64) float64 {
	lnaw, _ := o.model.lnActivity(m)
	return -lnaw / (o.ions * waterMolarMass * m)
}

// moleculesOf scales a model from one formula unit of several groups, such as
// letovicite with its two sulfates, to the groups the model counts.
type moleculesOf struct {
	osmoticModel
	groups float64
}

func (s moleculesOf) lnActivity(m float64) (lnaw, slope float64) {
	return s.osmoticModel.lnActivity(s.groups * m)
}

// molalityAtOne returns mol of solute per kg of water at u = 1 from the dry
// density and the molar mass of the substance.
func molalityAtOne(s Substance, T float64) (float64, error) {
	model := "water activity of " + s.Name
	switch {
	case !s.MolarMass.Known() || !(s.MolarMass.Value > 0) || math.IsInf(s.MolarMass.Value, 1):
		return 0, &UnusableError{model, "the molar mass", s.MolarMass.Value, "known, above 0 (kg/mol)"}
	case !s.Density.Known() || !(s.Density.Value > 0) || math.IsInf(s.Density.Value, 1):
		return 0, &UnusableError{model, "the dry density", s.Density.Value, "known, above 0 (kg/m³)"}
	case !(T >= coldest && T <= hottest):
		return 0, &UnusableError{model, "the temperature", T, "from 180 to 373.15 K"}
	}
	return s.Density.Value / s.MolarMass.Value / atmos.WaterDensity(T), nil
}

// Temperatures that the models take at all, K; outside, density and dielectric
// constant of water mean nothing.
const coldest, hottest = 180, 373.15
