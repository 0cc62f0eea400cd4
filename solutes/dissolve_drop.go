package solutes

import (
	"fmt"
	"math"

	"dropcrest/atmos"
)

// density chooses the volume of the solution.
func (d *dissolving) density() error {
	if d.DensityRule == Additive {
		return nil
	}
	if d.DensityRule != Measured {
		return fmt.Errorf("density rule %d does not exist: use additive or measured", int(d.DensityRule))
	}
	if d.out.Film != nil || d.Recipe.Adsorption != NoAdsorption {
		d.note("density-additive", inputDensity,
			"The models of films and of adsorption know additive volumes only: measured solution densities are not used.")
		return nil
	}
	m := &MeasuredDensity{waterDensity: d.waterDensity}
	polynomials := 0
	for _, p := range d.Parts {
		s := p.Substance
		if s.Insoluble() || (s.Kappa.Known() && s.Kappa.Value == 0) {
			m.insoluble += p.Volume
			continue
		}
		if !s.Density.Known() {
			return &MissingError{s.called(), "density", "density"}
		}
		mass := p.Volume * s.Density.Value
		m.solute += mass
		part := newDensityPart(s, mass)
		m.parts = append(m.parts, part)
		if part.known {
			polynomials++
		} else {
			d.note("density-additive", inputDensity,
				"No measured solution density is known for %s: it keeps its dry volume.", s.called())
		}
	}
	if polynomials == 0 {
		if len(d.Parts) == 0 {
			d.note("density-additive", inputDensity,
				"No substance is named, so no measured solution density is known: volumes are additive.")
		}
		return nil
	}
	for i := range m.parts {
		m.parts[i].weight /= m.solute
	}
	d.out.Swelling = m
	if math.Abs(d.Temperature-referenceTemperature) > sameTemperature {
		d.note("density-25c", inputTemperature,
			"Measured solution densities are those of 25 °C, scaled so that pure water has its density at the temperature.")
	}
	return nil
}

// tension chooses the surface tension of the drop.
func (d *dissolving) tension() error {
	water := atmos.SurfaceTension(d.Temperature)
	switch d.TensionRule {
	case PureWater, Szyszkowski:
		d.out.Tension = ConstantTension(water)
	case FixedTension:
		d.out.Tension = ConstantTension(d.Tension)
	case SolutionRule:
		return d.solutionTension(water)
	default:
		return fmt.Errorf("surface-tension rule %d does not exist: use pure water, solution or a value", int(d.TensionRule))
	}
	return nil
}

func (d *dissolving) solutionTension(water float64) error {
	t := LinearTension{Water: water}
	if len(d.Parts) == 0 {
		d.note("tension-not-known", inputTension,
			"No substance is named, so its effect on surface tension is not known: pure water is used.")
	}
	for _, p := range d.Parts {
		s := p.Substance
		if s.Insoluble() {
			continue
		}
		if !s.TensionIncrement.Known() {
			d.note("tension-not-known", inputTension,
				"The effect of %s on surface tension is not known and left out.", s.called())
			continue
		}
		if err := missing(s); err != nil {
			return err
		}
		t.PerDry += p.Volume * s.TensionIncrement.Value * s.molality(d.waterDensity)
	}
	t.Crystal = d.crystalWater()
	d.out.Tension = t
	return nil
}
