package spectrum

import (
	"math"

	"dropcrest/atmos/aerosol"
	"dropcrest/koehler"
)

// StepOfMode returns the error function that a mode of one κ (above 0) has for a
// spectrum, for the Kelvin length in m:
//
//	Centre = s_c(Dg),  Width = 3 ln σ_g/√2
//
// The parameters convert there and back exactly. The counts agree as far as s_c
// falls with D^-3/2: to some 0.1 % near the centre, up to 1 % in the low tail.
func StepOfMode(m aerosol.Mode, kappa, kelvin float64) (ErrorFunction, error) {
	if err := m.Check(); err != nil {
		return ErrorFunction{}, err
	}
	if !(kappa > 0 && kappa <= mostKappa) {
		return ErrorFunction{}, unusable("kappa", -1, kappa, "above 0 and up to 30")
	}
	crest := koehler.SolveKappa(m.Median, kelvin, kappa)
	return ErrorFunction{m.Concentration, crest.Supersaturation, 3 * math.Log(m.GSD) / math.Sqrt2}, nil
}

// ModeOfStep returns the mode of particles of one κ (above 0) that has this step
// for a spectrum, for the Kelvin length in m. It inverts StepOfMode. Another κ gives
// another Dg: a spectrum alone does not tell them apart.
func ModeOfStep(f ErrorFunction, kappa, kelvin float64) (aerosol.Mode, error) {
	if !(f.Width > 0) || math.IsInf(f.Width, 1) {
		return aerosol.Mode{}, unusable("width", -1, f.Width, "above 0")
	}
	if !(kappa > 0 && kappa <= mostKappa) {
		return aerosol.Mode{}, unusable("kappa", -1, kappa, "above 0 and up to 30")
	}
	dry, err := koehler.DryOf(kappa, kelvin, f.Centre)
	if err != nil {
		return aerosol.Mode{}, err
	}
	return aerosol.Mode{Concentration: f.Number, Median: dry, GSD: math.Exp(math.Sqrt2 * f.Width / 3)}, nil
}
