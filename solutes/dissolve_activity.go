package solutes

import (
	"fmt"
	"math"
)

// activity chooses the water-activity model of every part and mixes them.
func (d *dissolving) activity() error {
	if d.Solubility != Complete && d.Solubility != LimitedSolubility {
		return fmt.Errorf("solubility rule %d does not exist: use complete or limited", int(d.Solubility))
	}
	d.limits()
	switch d.Model {
	case KappaModel:
		return d.kappaModel()
	case VantHoff:
		return d.vantHoff()
	case IonInteraction:
		return d.ionInteraction()
	}
	return fmt.Errorf("water-activity model %d does not exist: use kappa, van 't Hoff or ion interaction", int(d.Model))
}

func (d *dissolving) says(format string, args ...any) {
	d.out.Models = append(d.out.Models, fmt.Sprintf(format, args...))
}

func (d *dissolving) kappaModel() error {
	if !math.IsNaN(d.Recipe.Kappa) {
		d.says("the whole particle: κ %.4g as given", d.Recipe.Kappa)
		return d.oneKappa()
	}
	var parts []kappaPart
	for _, p := range d.Parts {
		k, err := d.partKappa(p.Substance)
		if err != nil {
			return err
		}
		parts = append(parts, kappaPart{p, k})
	}
	return d.kappaParts(parts)
}

// partKappa returns the κ by which a substance counts and says which it is.
func (d *dissolving) partKappa(s Substance) (float64, error) {
	k, own := s.activationKappa(d.waterDensity)
	switch {
	case own:
		d.says("%s: κ %.4g (%s)", s.called(), k, s.Kappa.Source)
	case math.IsNaN(k):
		return 0, &MissingError{s.called(), "kappa", "kappa"}
	case k == 0 && s.Adsorption != nil && d.Recipe.Adsorption == NoAdsorption:
		d.says("%s: insoluble, counts as volume", s.called())
		d.note("adsorption-left-out", inputActivity,
			"%s counts as insoluble: water adsorbed on its surface is not in this model.", s.called())
	case k == 0:
		d.says("%s: insoluble, counts as volume", s.called())
	default:
		d.says("%s: κ %.4g of the ideal solution", s.called(), k)
		d.note("kappa-ideal", inputComponent,
			"No κ at activation is known for %s: the ideal solution with %g ions a formula unit stands in, κ %.4g.",
			s.called(), s.Ions.Value, k)
	}
	if k < 0 || math.IsInf(k, 0) {
		return 0, fmt.Errorf("kappa of %s is %g: it must be 0 or more", s.called(), k)
	}
	return k, nil
}

func (d *dissolving) vantHoff() error {
	var parts []kappaPart
	for _, p := range d.Parts {
		s := p.Substance
		if s.Insoluble() {
			d.says("%s: insoluble, counts as volume", s.called())
			parts = append(parts, kappaPart{p, 0})
			continue
		}
		factor, origin := d.VantHoffFactor, "as given"
		if math.IsNaN(factor) {
			factor, origin = s.Ions.Value, "number of ions"
		} else if !s.Ions.Known() {
			s.Ions = Datum{Value: 1, Evidence: User} // not used: the factor is given
		}
		if err := missing(s); err != nil {
			return err
		}
		k := VantHoffKappa(factor, s.MolarMass.Value, s.Density.Value, d.waterDensity)
		d.says("%s: van 't Hoff factor %.4g (%s)", s.called(), factor, origin)
		parts = append(parts, kappaPart{p, float64(k)})
	}
	return d.kappaParts(parts)
}
