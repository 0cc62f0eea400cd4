package verify

import (
	"fmt"
	"math"

	"dropcrest/atmos"
	"dropcrest/solutes"
)

// acidsChecks recomputes what is published about acids, sea salt and sugars,
// with the models of their own. Arguments: substance (name), m (mol/kg), salinity
// (kg of salt per kg of sea water), T (K, 298.15 when it is not given).
func acidsChecks() map[string]Check {
	models := ownModels{}
	return map[string]Check{
		"own-model-osmotic-coefficient": func(a Args) (float64, error) {
			o, m, err := models.at(a)
			if err != nil {
				return 0, err
			}
			return o.Osmotic(m), nil
		},
		"own-model-saturated-humidity": models.saturatedHumidity,
		"own-model-growth-kappa":       models.growthKappa,
		"sea-water-osmotic-coefficient": func(a Args) (float64, error) {
			o, m, err := seaWater(a)
			if err != nil {
				return 0, err
			}
			return o.Osmotic(m), nil
		},
		"sea-water-activity": func(a Args) (float64, error) {
			o, m, err := seaWater(a)
			if err != nil {
				return 0, err
			}
			lnaw, _ := o.LnActivity(o.Molality(1) / m)
			return math.Exp(lnaw), nil
		},
		"strong-acid-mass-fraction": strongAcid,
	}
}

// ownModels keeps the models that were made, by substance and temperature: a
// model is a table that takes a millisecond, and many rows ask the same one.
type ownModels map[string]*solutes.OsmoticSolution

// of returns the substance and its model.
func (models ownModels) of(a Args) (solutes.Substance, *solutes.OsmoticSolution, error) {
	name, T := a.Text("substance"), a.NumberOr("T", 298.15)
	s, known := solutes.Standard().Find(name)
	if !known {
		return s, nil, fmt.Errorf("no substance %q", name)
	}
	key := fmt.Sprint(s.Key, " ", T)
	if o, made := models[key]; made {
		return s, o, nil
	}
	o, _, _, ok, err := solutes.OwnModel(s, T)
	if err == nil && !ok {
		err = fmt.Errorf("%s has no water activity model of its own", s.Name)
	}
	if err == nil {
		models[key] = o
	}
	return s, o, err
}

// at is of with the molality m, which must lie in the model's range.
func (models ownModels) at(a Args) (*solutes.OsmoticSolution, float64, error) {
	m := a.Number("m")
	_, o, err := models.of(a)
	if err != nil {
		return nil, 0, err
	}
	if !(m > 0 && m <= o.LargestMolality()) {
		return nil, 0, fmt.Errorf("%g mol/kg, the model's range is above 0 to %.4g", m, o.LargestMolality())
	}
	return o, m, nil
}

// saturatedHumidity is the water activity of the saturated solution at 25 °C.
func (models ownModels) saturatedHumidity(a Args) (float64, error) {
	s, o, err := models.of(a)
	if err != nil {
		return 0, err
	}
	if !s.Solubility.Known() {
		return 0, fmt.Errorf("the solubility of %s is not known", s.Name)
	}
	m := s.Solubility.Value / s.MolarMass.Value
	lnaw, _ := o.LnActivity(o.Molality(1) / m)
	return math.Exp(lnaw), nil
}

// growthKappa is κ from the water taken up at the water activity aw, volumes
// being additive.
func (models ownModels) growthKappa(a Args) (float64, error) {
	aw := a.Number("aw")
	_, o, err := models.of(a)
	if err != nil {
		return 0, err
	}
	low, high := math.Log(o.LeastWater()), 20.0
	for range 80 {
		mid := 0.5 * (low + high)
		if l, _ := o.LnActivity(math.Exp(mid)); l < math.Log(aw) {
			low = mid
		} else {
			high = mid
		}
	}
	return math.Exp(low) * (1/aw - 1), nil
}

// seaWater returns the model of sea salt and mol of its ions per kg of water.
func seaWater(a Args) (*solutes.OsmoticSolution, float64, error) {
	salt := a.Number("salinity")
	s, _ := solutes.Standard().Find("sea_salt")
	o, err := solutes.NewSeaSalt(s, a.NumberOr("T", 298.15))
	if err != nil {
		return nil, 0, err
	}
	if !(salt > 0 && salt < 0.25) {
		return nil, 0, fmt.Errorf("salinity=%g, should be above 0 and below 0.25 kg/kg", salt)
	}
	return o, salt / (1 - salt) / s.MolarMass.Value, nil
}

// strongAcid is the mass fraction of sulfuric acid by Tabazadeh et al. 1997 at
// a water activity that is given by m (mol/kg) and phi (ν = 3) at 25 °C.
func strongAcid(a Args) (float64, error) {
	s, _ := solutes.Standard().Find("sulfuric_acid")
	aw := math.Exp(-3 * atmos.WaterMolarMass * a.Number("m") * a.Number("phi"))
	w := solutes.TabazadehMolality(aw, a.NumberOr("T", 298.15)) * s.MolarMass.Value
	return w / (1 + w), nil
}
