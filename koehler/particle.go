package koehler

import (
	"errors"
	"math"

	"dropcrest/atmos"
	"dropcrest/solutes"
)

// Kelvin names the form of the curvature term.
type Kelvin int

const (
	Standard     Kelvin = iota // ln S = 4 σ M_w/(R T ρ_w D)
	PureVapour                 // a drop in its own vapour, the vapour's pressure change kept
	Compressible               // the liquid's compression under the Laplace pressure kept
)

// Particle is one dry particle and the drop that may grow on it. Whatever it is
// made of, the questions about it are the same:
//
//	soluble                Solution: a solutes.Kappa, *solutes.Salt, ... of solutes.Dissolve
//	limited solubility     Solution: a *solutes.Limited
//	adsorption             Adsorption.Particle
//	surface-active organic Surfactant.Particle
type Particle struct {
	DryDiameter  float64          // m, volume-equivalent
	Temperature  float64          // K
	Solution     solutes.Solution // water activity
	Swelling     solutes.Swelling // nil: additive volumes
	Tension      solutes.Tension  // of the flat surface; nil: pure water at Temperature
	Kelvin       Kelvin
	TolmanLength float64 // m, see TolmanTension; 0: the tension of a flat surface
}

// Check returns an error that says which field of the particle is not usable. It
// wraps ErrInput.
func (p Particle) Check() error {
	switch {
	case !(p.DryDiameter > 0) || math.IsInf(p.DryDiameter, 0):
		return &RangeError{"dry diameter", p.DryDiameter, "a positive length in m"}
	case !(p.Temperature > 0) || p.Temperature >= atmos.CriticalTemperature:
		return &RangeError{"temperature", p.Temperature, "above 0 K and below the critical point of water"}
	case p.Solution == nil:
		return errors.Join(ErrInput, errors.New("particle has no solution"))
	case !(p.DryDiameter+4*p.TolmanLength > 0) || math.IsInf(p.TolmanLength, 1):
		return &RangeError{"Tolman length", p.TolmanLength, "a length in m above minus a quarter of the dry diameter"}
	}
	if kappa, ok := p.Solution.(solutes.Kappa); ok && !(kappa >= 0 && kappa <= maxKappa) {
		return &RangeError{"kappa", float64(kappa), "0 to 30"}
	}
	if sigma, ok := p.Tension.(solutes.ConstantTension); ok && (!(sigma > 0) || math.IsInf(float64(sigma), 1)) {
		return &RangeError{"surface tension", float64(sigma), "above 0 N/m"}
	}
	_, limited := p.Solution.(*solutes.Limited)
	if _, linear := p.Tension.(solutes.LinearTension); limited && linear {
		return errors.Join(ErrInput, errors.New("a tension that rises with all of the solute does not go with limited solubility: take that of water, or a fixed one"))
	}
	return p.checkSize()
}

// State is the drop at one wet size.
type State struct {
	WetDiameter     float64 // m
	Water           float64 // u, volume of water per volume of dry particle
	SaturationRatio float64
	Supersaturation float64 // SaturationRatio - 1, free of cancellation
	WaterActivity   float64
	KelvinFactor    float64
	SurfaceTension  float64 // N/m, of the curved surface where there is a TolmanLength
}

// Kind says what an extremum of the equilibrium curve is.
type Kind int

const (
	Maximum         Kind = iota // smooth: the drop is unstable beyond it
	Minimum                     // smooth, between two maxima
	KinkMinimum                 // the slope jumps from below to above zero, where a part has just dissolved or the tension left its floor
	BoundaryMaximum             // the limit at the dry size, where the curve falls from there on
)

// Extremum is one extremum of the equilibrium curve.
type Extremum struct {
	Kind Kind
	State
	Extrapolated bool // it lies where the activity model is outside its range
}

// Crest is the highest maximum of the equilibrium curve, the barrier.
type Crest struct {
	Extremum
	GrowthFactor float64 // wet over dry diameter
	Place        Place   // among the maxima of the curve
}
