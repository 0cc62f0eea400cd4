package solutes

import (
	"fmt"
	"math"
	"strings"
)

// activity chooses the water-activity model of every part and mixes them.
func (d *dissolving) activity() error {
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
		d.out.Solution = Kappa(d.Recipe.Kappa)
		d.says("the whole particle: κ %.4g as given", d.Recipe.Kappa)
		return nil
	}
	sum := 0.0
	for _, p := range d.Parts {
		k, err := d.partKappa(p.Substance)
		if err != nil {
			return err
		}
		sum += p.Volume * k
	}
	d.out.Solution = Kappa(sum)
	return nil
}

// partKappa returns the κ by which a substance counts and says which it is.
func (d *dissolving) partKappa(s Substance) (float64, error) {
	k, own := s.activationKappa(d.waterDensity)
	switch {
	case own:
		d.says("%s: κ %.4g (%s)", s.called(), k, s.Kappa.Source)
	case math.IsNaN(k):
		return 0, &MissingError{s.called(), "kappa", "kappa"}
	case k == 0 && s.Adsorption != nil:
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
	sum := 0.0
	for _, p := range d.Parts {
		s := p.Substance
		if s.Insoluble() {
			d.says("%s: insoluble, counts as volume", s.called())
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
		sum += p.Volume * float64(k)
	}
	d.out.Solution = Kappa(sum)
	return nil
}

func (d *dissolving) ionInteraction() error {
	var salts []Part
	kappa, kappaShare := 0.0, 0.0
	for _, p := range d.Parts {
		if p.Substance.Ion != nil {
			salts = append(salts, p)
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
	salts = mergeSalts(salts)
	d.ionNotes(salts)
	if len(salts) == 0 {
		d.out.Solution = Kappa(kappa)
		return nil
	}
	if len(salts) == 1 && kappa == 0 {
		s, err := d.salt(salts[0].Substance, salts[0].Volume)
		d.out.Solution = s
		return err
	}
	var parts []MixturePart
	if kappa > 0 {
		parts = append(parts, MixturePart{kappaShare, Kappa(kappa / kappaShare)})
	}
	for _, p := range salts {
		s, err := d.salt(p.Substance, 1)
		if err != nil {
			return err
		}
		parts = append(parts, MixturePart{p.Volume, s})
	}
	mixture, err := NewMixture(parts)
	if err != nil {
		return err
	}
	d.out.Solution = mixture
	return nil
}

// mergeSalts adds up the shares of a salt that is named twice.
func mergeSalts(salts []Part) []Part {
	var merged []Part
next:
	for _, p := range salts {
		for i, q := range merged {
			if q.Substance.Ion == p.Substance.Ion && q.Substance.Density == p.Substance.Density &&
				q.Substance.MolarMass == p.Substance.MolarMass {
				merged[i].Volume += p.Volume
				continue next
			}
		}
		merged = append(merged, p)
	}
	return merged
}

func (d *dissolving) salt(s Substance, share float64) (*Salt, error) {
	if err := missing(s); err != nil {
		return nil, err
	}
	salt, err := NewSalt(SaltInput{
		Ion: s.Ion, Concentrated: s.Concentrated,
		MolarMass: s.MolarMass.Value, Density: s.Density.Value,
		WaterDensity: d.waterDensity, Temperature: d.Temperature, Share: share,
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

// sameTemperature is how near to 25 °C values of 25 °C need no note, K.
const sameTemperature = 0.5

func (d *dissolving) ionNotes(salts []Part) {
	var fixed, joined, mixedCharges []string
	for _, p := range salts {
		s := p.Substance
		if s.Ion.Temperature == nil {
			fixed = append(fixed, s.called())
		}
		if s.Concentrated.Joined() || s.Ion.Extended != nil {
			joined = append(joined, s.called())
		}
		if charge := fmt.Sprint(s.Ion.CationCharge, "-", s.Ion.AnionCharge); len(mixedCharges) == 0 || mixedCharges[0] != charge {
			mixedCharges = append(mixedCharges, charge)
		}
	}
	if len(salts) > 0 && math.Abs(d.Temperature-referenceTemperature) > sameTemperature {
		if len(fixed) > 0 {
			d.note("ion-parameters-25c", inputTemperature,
				"Ion-interaction parameters of %s are those of 25 °C; only the Debye-Hückel slope follows the temperature.",
				strings.Join(fixed, ", "))
		}
		if len(joined) > 0 {
			d.note("concentrated-25c", inputTemperature,
				"Concentrated solutions of %s follow data of 25 °C.", strings.Join(joined, ", "))
		}
	}
	if len(salts) > 0 && (d.Temperature < debyeHueckelLow || d.Temperature > debyeHueckelHigh) {
		d.note("debye-hueckel-extrapolated", inputTemperature,
			"The Debye-Hückel slope is extrapolated: it rests on values from 0 to 40 °C.")
	}
	if len(mixedCharges) > 1 {
		d.note("zsr-mixed-charge", inputComponent,
			"Salts of different charge type are mixed by water content (ZSR): 0.4 to 1 %% low in water at 0.03 to 0.3 osmol/kg, about 0.2 to 0.5 %% in critical supersaturation.")
	}
}
