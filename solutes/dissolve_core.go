package solutes

import (
	"fmt"
	"math"
	"strings"
)

// Core is what koehler.Adsorption takes of a recipe: an insoluble core on which
// water is adsorbed, with what is soluble as a coat.
type Core struct {
	A            float64 // of the Frenkel-Halsey-Hill isotherm
	B            float64
	SolubleShare float64 // of the dry volume, below 1
	Kappa        float64 // of the soluble share; 0 where there is none
	Source       string
}

// core finds the adsorbing core and its coat.
func (d *dissolving) core() error {
	if d.Recipe.Adsorption == NoAdsorption {
		return nil
	}
	if err := d.checkCore(); err != nil {
		return err
	}
	c := &Core{A: d.AdsorptionA, B: d.AdsorptionB, Source: "as given"}
	insoluble, kappa := 0.0, 0.0
	var names []string
	for _, p := range d.Parts {
		s := p.Substance
		if !s.Insoluble() {
			k, _ := s.activationKappa(d.waterDensity)
			kappa += p.Volume * k
			continue
		}
		if d.Recipe.Adsorption == KnownAdsorption {
			if err := c.add(s, len(names) == 0); err != nil {
				return err
			}
		}
		insoluble += p.Volume
		names = append(names, s.called())
	}
	if insoluble == 0 {
		return &RefusedError{inputAdsorption, "no component is insoluble, so nothing adsorbs: leave adsorption out"}
	}
	c.SolubleShare = math.Max(0, 1-insoluble)
	if c.SolubleShare < sumTolerance {
		c.SolubleShare = 0
	}
	if err := d.coat(c, kappa); err != nil {
		return err
	}
	d.says("%s: water adsorbed on the surface by the Frenkel-Halsey-Hill isotherm, A %.4g, B %.4g (%s)",
		strings.Join(names, ", "), c.A, c.B, c.Source)
	d.out.Core = c
	return nil
}

// checkCore refuses what adsorption does not go with.
func (d *dissolving) checkCore() error {
	switch {
	case d.Recipe.Adsorption != KnownAdsorption && d.Recipe.Adsorption != GivenAdsorption:
		return fmt.Errorf("adsorption rule %d does not exist: use none, known or given", int(d.Recipe.Adsorption))
	case d.out.Film != nil:
		return &RefusedError{inputAdsorption, "no published rule joins adsorption and a surface-active organic: leave one of them out"}
	case d.Solubility == LimitedSolubility:
		return &RefusedError{inputSolubility, "no published rule joins adsorption and limited solubility: choose complete solubility"}
	}
	return nil
}

// add takes the parameters of an insoluble substance, or compares them with those
// of the first.
func (c *Core) add(s Substance, first bool) error {
	a := s.Adsorption
	switch {
	case a == nil:
		return &RefusedError{inputAdsorption, fmt.Sprintf("no adsorption parameters are known for %s: give A and B, or leave adsorption out", s.called())}
	case first:
		c.A, c.B, c.Source = a.A.Value, a.B.Value, a.A.Source
	case c.A != a.A.Value || c.B != a.B.Value:
		return &RefusedError{inputAdsorption, "no published rule mixes the adsorption of different minerals: keep one of them, or give A and B"}
	}
	return nil
}

// coat sets the κ of the soluble share from the κ of its parts, by volume.
func (d *dissolving) coat(c *Core, kappa float64) error {
	if k, ok := d.out.Solution.(Kappa); ok && (d.Model == VantHoff || d.Model == KappaModel && !math.IsNaN(d.Recipe.Kappa)) {
		kappa = float64(k) // of the whole particle, in which insoluble parts have none
	}
	switch {
	case c.SolubleShare == 0 && kappa > 0:
		return &RefusedError{inputActivity, "a κ is given for a particle that is all insoluble: leave it out, or add a soluble component"}
	case c.SolubleShare == 0:
		return nil
	case math.IsNaN(kappa):
		return &MissingError{"the soluble share", "kappa", "kappa"}
	}
	c.Kappa = kappa / c.SolubleShare
	if d.Model == IonInteraction {
		d.out.Models = nil // what they say does not count
		d.says("the coat: κ %.4g, by volume", c.Kappa)
		d.note("adsorption-kappa", inputActivity,
			"The published forms of adsorption with a soluble share know κ only: ion interaction is not used, the coat counts by its κ %.4g.", c.Kappa)
	}
	return nil
}
