package koehler

import (
	"dropcrest/solutes"
)

// Kelvin names the form of the curvature term.
type Kelvin int

const (
	Standard     Kelvin = iota // ln S = 4 σ M_w/(R T ρ_w D)
	PureVapour                 // a drop in its own vapour, the vapour's pressure change kept
	Compressible               // the liquid's compression under the Laplace pressure kept
)

// Particle is one dry particle and the drop that may grow on it.
type Particle struct {
	DryDiameter float64          // m, volume-equivalent
	Temperature float64          // K
	Solution    solutes.Solution // water activity
	Swelling    solutes.Swelling // nil: additive volumes
	Tension     solutes.Tension  // nil: pure water at Temperature
	Kelvin      Kelvin
}

// State is the drop at one wet size.
type State struct {
	WetDiameter     float64 // m
	Water           float64 // u, volume of water per volume of dry particle
	SaturationRatio float64
	Supersaturation float64 // SaturationRatio - 1, free of cancellation
	WaterActivity   float64
	KelvinFactor    float64
	SurfaceTension  float64 // N/m
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
}

// Crest is the highest maximum of the equilibrium curve, the barrier.
type Crest struct {
	State
	GrowthFactor float64 // wet over dry diameter
	Kind         Kind
	Extrapolated bool // the crest lies where the activity model is outside its range
}
