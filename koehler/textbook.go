package koehler

import (
	"fmt"
	"math"

	"dropcrest/atmos"
	"dropcrest/solutes"
)

// diluteWater is the u at which the dilute limit of a solution is read. The
// osmotic coefficient of a salt is within 0.1 % of its limit there.
const diluteWater = 1e9

// DiluteKappa returns κ of the solution at infinite dilution, read from the
// slope of ln a_w at u = 1e9: κ = u d ln a_w/d ln u. For constant κ that is κ, for
// adsorbed water that of the soluble share.
func (p Particle) DiluteKappa() float64 {
	switch s := p.Solution.(type) {
	case solutes.Kappa:
		return float64(s)
	case AdsorbedWater:
		return s.DiluteKappa()
	}
	_, slope := p.Solution.LnActivity(diluteWater)
	return diluteWater * slope
}

// Textbook returns the crest of the cubic form
//
//	s = A/D - B/D³, s_c = √(4A³/(27B)), D_c = √(3B/A)
//
// with A of pure water at the particle's temperature and B = κ Dd³, κ of
// DiluteKappa. It is the common textbook approximation, drawn beside the full
// curve; WaterActivity is 1 - B/D³ and KelvinFactor 1 + A/D, as linearised.
func (p Particle) Textbook() (Crest, error) {
	if err := p.Check(); err != nil {
		return Crest{}, err
	}
	kappa := p.DiluteKappa()
	if !(kappa > 0) {
		return Crest{}, fmt.Errorf("%w: the cubic form needs a soluble part", ErrNoSolution)
	}
	sigma := atmos.SurfaceTension(p.Temperature)
	a := KelvinLength(sigma, p.Temperature) / p.DryDiameter
	s := math.Sqrt(4 * a * a * a / (27 * kappa))
	g := math.Sqrt(3 * kappa / a)
	return Crest{
		Extremum: Extremum{State: State{
			WetDiameter: g * p.DryDiameter, Water: g*g*g - 1, SaturationRatio: 1 + s, Supersaturation: s,
			WaterActivity: 1 - kappa/(g*g*g), KelvinFactor: 1 + a/g, SurfaceTension: sigma,
		}},
		GrowthFactor: g, Place: Only,
	}, nil
}
