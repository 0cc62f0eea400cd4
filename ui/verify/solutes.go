package verify

import (
	"fmt"
	"math"

	"dropcrest/atmos"
	"dropcrest/solutes"
)

// solutesChecks recomputes what is published about the substances, with the
// models as a particle gets them. Arguments: substance (name), m (mol/kg), x (mass
// fraction of the solute), T (K, 298.15 when it is not given).
func solutesChecks() map[string]Check {
	return map[string]Check{
		"osmotic-coefficient": func(a Args) (float64, error) {
			salt, err := saltOf(a)
			if err != nil {
				return 0, err
			}
			return salt.Osmotic(a.Number("m")), nil
		},
		"ion-interaction-osmotic-coefficient": diluteOsmotic,
		"solution-humidity": func(a Args) (float64, error) {
			salt, err := saltOf(a)
			if err != nil {
				return 0, err
			}
			lnaw, _ := salt.LnActivity(salt.Water(a.Number("m")))
			return math.Exp(lnaw), nil
		},
		"solution-density":       solutionDensity,
		"deliquescence-humidity": deliquescence,
	}
}

// saltOf returns the ion-interaction model of the substance; the molality must
// lie in its range.
func saltOf(a Args) (*solutes.Salt, error) {
	d, err := dissolved(a)
	if err != nil {
		return nil, err
	}
	salt, ok := d.Solution.(*solutes.Salt)
	if !ok {
		return nil, fmt.Errorf("%s has no ion-interaction model", a.Text("substance"))
	}
	if m := a.Number("m"); m > salt.MaxMolality() {
		return nil, fmt.Errorf("%g mol/kg is beyond the model's range, which ends at %g", m, salt.MaxMolality())
	}
	return salt, nil
}

func dissolved(a Args) (solutes.Dissolved, error) {
	name := a.Text("substance")
	s, ok := solutes.Standard().Find(name)
	if !ok {
		return solutes.Dissolved{}, fmt.Errorf("no substance %q", name)
	}
	d, _, err := solutes.Dissolve(solutes.Recipe{
		Parts:          []solutes.Part{{Substance: s, Volume: 1}},
		Model:          solutes.IonInteraction,
		Kappa:          math.NaN(),
		VantHoffFactor: math.NaN(),
		DensityRule:    solutes.Measured,
		Temperature:    a.NumberOr("T", 298.15),
	})
	return d, err
}

// solutionDensity returns the density of a solution in kg/m³.
func solutionDensity(a Args) (float64, error) {
	d, err := dissolved(a)
	if err != nil {
		return 0, err
	}
	if d.Swelling == nil {
		return 0, fmt.Errorf("%s has no measured solution density", a.Text("substance"))
	}
	x := a.Number("x")
	u := d.DryDensity * (1 - x) / (x * d.WaterDensity)
	v, _ := d.Swelling.Swell(u)
	return (d.DryDensity + u*d.WaterDensity) / v, nil
}

// diluteOsmotic is the osmotic coefficient by the ion-interaction parameters
// alone, without the concentrated data that they are joined to.
func diluteOsmotic(a Args) (float64, error) {
	s, ok := solutes.Standard().Find(a.Text("substance"))
	if !ok || s.Ion == nil {
		return 0, fmt.Errorf("no ion-interaction parameters for %q", a.Text("substance"))
	}
	T := a.NumberOr("T", 298.15)
	salt, err := solutes.NewSalt(solutes.SaltInput{Ion: s.Ion, MolarMass: s.MolarMass.Value,
		Density: s.Density.Value, WaterDensity: atmos.WaterDensity(T), Temperature: T})
	if err != nil {
		return 0, err
	}
	if m := a.Number("m"); m > salt.MaxMolality() {
		return 0, fmt.Errorf("%g mol/kg is beyond the range of the parameters, which ends at %g", m, salt.MaxMolality())
	}
	return salt.Osmotic(a.Number("m")), nil
}

// deliquescence is the humidity from which the dry substance takes up water.
func deliquescence(a Args) (float64, error) {
	s, ok := solutes.Standard().Find(a.Text("substance"))
	if !ok {
		return 0, fmt.Errorf("no substance %q", a.Text("substance"))
	}
	drh, ok := s.DeliquescenceHumidity(a.NumberOr("T", 298.15))
	if !ok {
		return 0, fmt.Errorf("no deliquescence humidity of %s is known", s.Name)
	}
	return drh, nil
}
