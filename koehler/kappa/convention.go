package kappa

import (
	"math"

	"dropcrest/atmos"
	"dropcrest/koehler"
)

// Convention is the water that a κ is computed with.
type Convention struct {
	Temperature float64 // K, above 0 and below the critical point of water
	Tension     float64 // surface tension, N/m; 0: pure water at Temperature
}

// At25C is the convention of most published κ: 298.15 K and 72.0 mN/m (Petters
// and Kreidenweis 2007).
func At25C() Convention { return Convention{298.15, 0.072} }

// SurfaceTension returns the tension in N/m.
func (c Convention) SurfaceTension() float64 {
	if c.Tension != 0 {
		return c.Tension
	}
	return atmos.SurfaceTension(c.Temperature)
}

// Kelvin returns the Kelvin length in m, see koehler.KelvinLength.
func (c Convention) Kelvin() float64 {
	return koehler.KelvinLength(c.SurfaceTension(), c.Temperature)
}

// Check returns an error that says what no water can have. It wraps
// koehler.ErrInput.
func (c Convention) Check() error {
	switch {
	case !(c.Temperature > 0) || c.Temperature >= atmos.CriticalTemperature:
		return &koehler.RangeError{What: "temperature", Value: c.Temperature, Right: "above 0 K and below the critical point of water"}
	case !(c.Tension >= 0) || math.IsInf(c.Tension, 1):
		return &koehler.RangeError{What: "surface tension", Value: c.Tension, Right: "above 0 N/m, or 0 for pure water"}
	}
	return nil
}

// Given says what a published κ belongs to. The κ and one of DryDiameter and
// Supersaturation fix a crest; a κ from growth factors needs DryDiameter and
// Humidity.
type Given struct {
	DryDiameter     float64 // m; 0: not known
	Supersaturation float64 // fraction, used where the dry diameter is not known
	Humidity        float64 // saturation ratio of a growth factor; 0: κ is from activation
}

// Recomputed is a κ under another convention, and what was behind it.
type Recomputed struct {
	Kappa           float64
	DryDiameter     float64 // m
	Supersaturation float64 // fraction, of the crest; 0 for growth factors
	GrowthFactor    float64 // at the humidity; 0 for activation
}

// Recompute returns the κ that the same measurement has under another
// convention. It goes back to what was measured, exactly: to the critical
// supersaturation of that κ and dry diameter, to the dry diameter of that κ and
// supersaturation where only this is known, or to the growth factor.
//
// Errors: those of package koehler, which say what has no answer. For small
// s the rule of thumb is κ ∝ (σ/T)³, whatever the size.
func Recompute(kappa float64, g Given, from, to Convention) (Recomputed, error) {
	if err := checkBoth(from, to); err != nil {
		return Recomputed{}, err
	}
	if g.Humidity != 0 {
		gf, err := GrowthFactor(g.DryDiameter, kappa, g.Humidity, from)
		if err != nil {
			return Recomputed{}, err
		}
		v, err := FromGrowth(g.DryDiameter, gf, g.Humidity, to)
		return Recomputed{Kappa: v.Kappa, DryDiameter: g.DryDiameter, GrowthFactor: gf}, err
	}
	r := Recomputed{DryDiameter: g.DryDiameter, Supersaturation: g.Supersaturation}
	switch {
	case g.DryDiameter > 0:
		r.Supersaturation = koehler.SolveKappa(g.DryDiameter, from.Kelvin(), kappa).Supersaturation
	case g.Supersaturation > 0:
		dry, err := koehler.DryOf(kappa, from.Kelvin(), g.Supersaturation)
		if err != nil {
			return Recomputed{}, err
		}
		r.DryDiameter = dry
	default:
		return Recomputed{}, &koehler.RangeError{What: "dry diameter", Value: g.DryDiameter, Right: "known, or else the supersaturation"}
	}
	k, err := koehler.KappaOf(r.DryDiameter, to.Kelvin(), r.Supersaturation)
	r.Kappa = k
	return r, err
}

func checkBoth(from, to Convention) error {
	if err := from.Check(); err != nil {
		return err
	}
	return to.Check()
}
