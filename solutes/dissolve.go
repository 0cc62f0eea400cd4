package solutes

import (
	"errors"
	"fmt"
	"math"

	"dropcrest/atmos"
)

// Inputs that notes belong to.
const (
	inputActivity    = "water-activity"
	inputComponent   = "component"
	inputTension     = "surface-tension"
	inputDensity     = "solution-density"
	inputTemperature = "temperature"
	inputSolubility  = "solubility"
	inputAdsorption  = "adsorption"
)

// Dissolve makes a recipe ready. Notes say which part fell back to which model
// and which range is left; an error says what is missing and cannot be replaced:
// a *MissingError for a value that the catalogue does not have, a *RefusedError
// for choices that do not go together.
//
// Notes about the water itself at the temperature are atmos.WaterNotes.
func Dissolve(r Recipe) (Dissolved, []atmos.Note, error) {
	if err := r.check(); err != nil {
		return Dissolved{}, nil, err
	}
	d := &dissolving{Recipe: r, waterDensity: atmos.WaterDensity(r.Temperature)}
	steps := []func() error{d.film, d.activity, d.density, d.tension, d.core}
	for _, step := range steps {
		if err := step(); err != nil {
			return Dissolved{}, nil, err
		}
	}
	d.out.WaterDensity = d.waterDensity
	d.out.Kappa = d.mixedKappa()
	d.out.MolesPerVolume, d.out.DryDensity = d.amounts()
	d.out.CrystalWater = d.crystalWater()
	return d.out, d.notes, nil
}

// dissolving is a recipe on its way.
type dissolving struct {
	Recipe
	waterDensity float64
	out          Dissolved
	notes        []atmos.Note
}

func (d *dissolving) note(code, input, format string, args ...any) {
	d.notes = append(d.notes, atmos.Note{Code: code, Input: input, Text: fmt.Sprintf(format, args...)})
}

// sumTolerance is how far shares may be from adding up to 1: rounding.
const sumTolerance = 1e-6

func (r Recipe) check() error {
	if !(r.Temperature > 0) || math.IsInf(r.Temperature, 0) {
		return fmt.Errorf("temperature is %g K: it must be positive and finite", r.Temperature)
	}
	sum := 0.0
	for _, p := range r.Parts {
		if !(p.Volume > 0) {
			return fmt.Errorf("share of %s is %g: it must be positive", p.Substance.called(), p.Volume)
		}
		sum += p.Volume
	}
	if len(r.Parts) > 0 && math.Abs(sum-1) > sumTolerance {
		return fmt.Errorf("shares of the dry volume add up to %.9g: they must add up to 1", sum)
	}
	if len(r.Parts) == 0 && !(r.Model == KappaModel && !math.IsNaN(r.Kappa)) {
		return errors.New("the particle has no component: name a substance, or use the kappa model with a value")
	}
	if r.Model == KappaModel && (r.Kappa < 0 || math.IsInf(r.Kappa, 0)) {
		return fmt.Errorf("kappa is %g: it must be 0 or more", r.Kappa)
	}
	if r.Model == VantHoff && (r.VantHoffFactor < 0 || math.IsInf(r.VantHoffFactor, 0)) {
		return fmt.Errorf("the van 't Hoff factor is %g: it must be 0 or more", r.VantHoffFactor)
	}
	if r.TensionRule == FixedTension && (!(r.Tension > 0) || math.IsInf(r.Tension, 0)) {
		return fmt.Errorf("surface tension is %g N/m: it must be positive and finite", r.Tension)
	}
	return nil
}

// mixedKappa is the κ of the parts, or the given one.
func (d *dissolving) mixedKappa() float64 {
	if d.Model == KappaModel && !math.IsNaN(d.Recipe.Kappa) {
		return d.Recipe.Kappa
	}
	switch k := d.out.Solution.(type) {
	case Kappa:
		return float64(k)
	case *Limited:
		dissolved, _ := k.Segment(k.Points())
		return dissolved
	}
	sum := 0.0
	for _, p := range d.Parts {
		k, _ := p.Substance.activationKappa(d.waterDensity)
		sum += p.Volume * k
	}
	return sum
}

// amounts are mol of solute and kg per m³ of dry particle.
func (d *dissolving) amounts() (moles, density float64) {
	if len(d.Parts) == 0 {
		return math.NaN(), math.NaN()
	}
	for _, p := range d.Parts {
		s := p.Substance
		if !s.Insoluble() {
			moles += p.Volume * s.molality(d.waterDensity) * d.waterDensity
		}
		if s.Density.Known() {
			density += p.Volume * s.Density.Value
		} else {
			density = math.NaN()
		}
	}
	return moles, density
}

// crystalWater is the volume of crystal water per volume of dry particle, as far as
// it is known.
func (d *dissolving) crystalWater() float64 {
	sum := 0.0
	for _, p := range d.Parts {
		if s := p.Substance; s.Hydration.Value > 0 && !s.Insoluble() && missing(s) == nil {
			sum += p.Volume * s.molality(d.waterDensity) * s.Hydration.Value * waterMolarMass
		}
	}
	return sum
}

// activationKappa returns κ and whether it is a value of its own: else it is that
// of the ideal solution, NaN if that is not known either.
func (s Substance) activationKappa(waterDensity float64) (kappa float64, own bool) {
	if s.Kappa.Known() {
		return s.Kappa.Value, true
	}
	return s.IdealKappa(waterDensity), false
}
