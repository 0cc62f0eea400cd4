package solutes

import (
	"fmt"
	"math"

	"dropcrest/atmos"
)

// ionInteraction gives every part the most detailed model that is published for
// it: ion interaction, a model of its own, or else its κ.
func (d *dissolving) ionInteraction() error {
	if d.Solubility == LimitedSolubility {
		return &RefusedError{inputSolubility, "limited solubility is a model for κ components: choose water activity by kappa or van 't Hoff, or complete solubility (salts have their deliquescence instead)"}
	}
	var detailed []MixturePart
	var salts, own []Substance
	kappa, kappaShare := 0.0, 0.0
	for _, p := range mergeParts(d.Parts) {
		solution, err := d.detailed(p.Substance)
		if err != nil {
			return err
		}
		if solution != nil {
			detailed = append(detailed, MixturePart{p.Volume, solution})
			if p.Substance.Ion != nil {
				salts = append(salts, p.Substance)
			} else {
				own = append(own, p.Substance)
			}
			continue
		}
		k, err := d.partKappa(p.Substance)
		if err != nil {
			return err
		}
		if k > 0 {
			kappa += p.Volume * k
			kappaShare += p.Volume
			d.note("no-ion-interaction", inputActivity,
				"%s has no ion-interaction parameters: its κ is used instead.", p.Substance.called())
		}
	}
	d.ionNotes(salts)
	d.mixingNotes(salts, own)
	if len(detailed) == 0 {
		d.out.Solution = Kappa(kappa)
		return nil
	}
	if len(detailed) == 1 && kappa == 0 {
		d.out.Solution = ofShare(detailed[0])
		return nil
	}
	if kappa > 0 {
		detailed = append(detailed, MixturePart{kappaShare, Kappa(kappa / kappaShare)})
	}
	mixture, err := NewMixture(detailed)
	if err != nil {
		return err
	}
	d.out.Solution = mixture
	return nil
}

// detailed returns the solution of a substance alone; nil if it has only a κ.
func (d *dissolving) detailed(s Substance) (Solution, error) {
	if s.Ion != nil {
		return d.salt(s)
	}
	if !hasOwnModel(s) {
		return nil, nil
	}
	if err := missing(s); err != nil {
		return nil, err
	}
	o, says, notes, _, err := OwnModel(s, d.Temperature)
	if err != nil {
		return nil, err
	}
	least, _ := o.LnActivity(o.LeastWater())
	d.says("%s: %s, to %.4g mol/kg (water activity %.3f)", s.called(), says, o.LargestMolality(), math.Exp(least))
	d.note("own-model", inputActivity, "%s has a water activity model of its own: %s.", s.called(), says)
	d.addOnce(notes)
	return o, nil
}

// addOnce adds notes that are not there yet: several parts may bring the same.
func (d *dissolving) addOnce(notes []atmos.Note) {
next:
	for _, n := range notes {
		for _, have := range d.notes {
			if n == have {
				continue next
			}
		}
		d.notes = append(d.notes, n)
	}
}

// ofShare is the solution of a particle of which only a share is the solute.
func ofShare(p MixturePart) Solution {
	switch s := p.Solution.(type) {
	case *Salt:
		return s.OfShare(p.Volume)
	case *OsmoticSolution:
		return s.OfShare(min(p.Volume, 1))
	}
	panic("solutes: a solution without a share")
}

// mergeParts adds up the shares of a substance that is named twice.
func mergeParts(parts []Part) []Part {
	var merged []Part
next:
	for _, p := range parts {
		for i, q := range merged {
			if p.Substance.same(q.Substance) {
				merged[i].Volume += p.Volume
				continue next
			}
		}
		merged = append(merged, p)
	}
	return merged
}

// same reports whether two parts are one substance with the same values where
// they matter to a solution.
func (s Substance) same(other Substance) bool {
	return s.Key != "" && s.Key == other.Key && s.Ion == other.Ion && s.Concentrated == other.Concentrated &&
		s.Density == other.Density && s.MolarMass == other.MolarMass && s.Ions == other.Ions &&
		s.Kappa == other.Kappa && s.VolumeSolubility == other.VolumeSolubility
}

func (d *dissolving) salt(s Substance) (*Salt, error) {
	if err := missing(s); err != nil {
		return nil, err
	}
	salt, err := NewSalt(SaltInput{
		Ion: s.Ion, Concentrated: s.Concentrated,
		MolarMass: s.MolarMass.Value, Density: s.Density.Value, Hydration: s.Hydration.Value,
		WaterDensity: d.waterDensity, Temperature: d.Temperature,
	})
	if err != nil {
		return nil, fmt.Errorf("%s: %w", s.called(), err)
	}
	least, _ := salt.LnActivity(salt.LeastWater())
	d.says("%s: ion interaction (%s)%s, to %.4g mol/kg (water activity %.3f)",
		s.called(), s.Ion.Source, s.joinWords(), salt.MaxMolality(), math.Exp(least))
	return salt, nil
}

func (s Substance) joinWords() string {
	switch e := s.Ion.Extended; {
	case e != nil && e.JoinHigh == 0:
		return " in an own extended fit"
	case e != nil:
		return fmt.Sprintf(", joined at %g-%g mol/kg to an own extended fit", e.JoinLow, e.JoinHigh)
	case s.Concentrated.Joined():
		return fmt.Sprintf(", joined at %g-%g mol/kg to %s",
			s.Concentrated.JoinLow, s.Concentrated.JoinHigh, s.Concentrated.Source)
	}
	return ""
}
