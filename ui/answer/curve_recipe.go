package answer

import (
	"fmt"
	"math"
	"strings"

	"dropcrest/atmos"
	"dropcrest/solutes"
	"dropcrest/ui/scenario"
)

// newRecipe says to the solutes floor what the particle of a scenario is made of.
func newRecipe(env Env, s scenario.Scenario) (solutes.Recipe, []atmos.Note, error) {
	r := solutes.Recipe{
		Model:          waterModel(s.WaterActivity),
		Kappa:          given(s.Kappa),
		VantHoffFactor: given(s.VantHoffFactor),
		Temperature:    s.Temperature,
	}
	if s.SolutionDensity == "measured" {
		r.DensityRule = solutes.Measured
	}
	switch {
	case s.SurfaceTension.Is("solution"):
		r.TensionRule = solutes.SolutionRule
	case len(s.Szyszkowski) > 0:
		r.TensionRule, r.Surface = solutes.Szyszkowski, surfaceActivity(s.Szyszkowski[0])
	case !s.SurfaceTension.Is("water"):
		r.TensionRule, r.Tension = solutes.FixedTension, s.SurfaceTension.Number
	}
	parts, err := parts(env, s)
	if err != nil {
		return r, nil, err
	}
	r.Parts = parts
	if len(parts) == 0 && (r.Model != solutes.KappaModel || math.IsNaN(r.Kappa)) {
		return r, nil, &InputError{"component", "a particle without components needs one number for its hygroscopicity: " +
			"name a substance, or choose water activity by kappa and give kappa"}
	}
	r.Adsorption, r.AdsorptionA, r.AdsorptionB = adsorption(s, r.Parts)
	note, err := volumeShares(r.Parts, s)
	return r, note, err
}

func surfaceActivity(f scenario.Film) *solutes.SurfaceActivity {
	a := &solutes.SurfaceActivity{GammaMax: userDatum(f.GammaMax), K: userDatum(f.K)}
	if f.Floor > 0 {
		a.Floor = userDatum(f.Floor)
	}
	return a
}

// adsorption is the given isotherm, or that of the catalogue where the particle
// has one and no other published model takes its place.
func adsorption(s scenario.Scenario, parts []solutes.Part) (rule solutes.AdsorptionRule, a, b float64) {
	if len(s.Adsorption) > 0 {
		if i := s.Adsorption[0]; i.A > 0 {
			return solutes.GivenAdsorption, i.A, i.B
		}
		return solutes.NoAdsorption, 0, 0
	}
	known := false
	for _, p := range parts {
		if !p.Substance.Insoluble() {
			continue
		}
		if p.Substance.Adsorption == nil {
			return solutes.NoAdsorption, 0, 0 // part of the surface is not known
		}
		known = true
	}
	if !known || len(s.Szyszkowski) > 0 {
		return solutes.NoAdsorption, 0, 0
	}
	return solutes.KnownAdsorption, 0, 0
}

func waterModel(word string) solutes.Model {
	switch word {
	case "vant-hoff":
		return solutes.VantHoff
	case "ion-interaction":
		return solutes.IonInteraction
	}
	return solutes.KappaModel
}

// given is the number of a measure, NaN when a word stands for it.
func given(m scenario.Measure) float64 {
	if m.Word != "" {
		return math.NaN()
	}
	return m.Number
}

// parts are the components with the user's values over the catalogue's. Volume
// still holds the share as it was given.
func parts(env Env, s scenario.Scenario) ([]solutes.Part, error) {
	out := make([]solutes.Part, 0, len(s.Components))
	for i, c := range s.Components {
		substance := solutes.Substance{Name: fmt.Sprintf("component %d", i+1)}
		if c.Substance != "" {
			found, ok := env.catalogue().Find(c.Substance)
			if !ok {
				return nil, unknownSubstance(env.catalogue(), c.Substance)
			}
			substance = found
		}
		override(&substance.Kappa, c.Kappa)
		override(&substance.Density, c.Density)
		override(&substance.MolarMass, c.MolarMass)
		override(&substance.Ions, c.Ions)
		override(&substance.VolumeSolubility, c.Solubility)
		if !(c.Share > 0) {
			return nil, &InputError{"component", fmt.Sprintf("the share of %s is %g, should be greater than 0", substance.Name, c.Share)}
		}
		out = append(out, solutes.Part{Substance: substance, Volume: c.Share})
	}
	return out, nil
}

func (env Env) catalogue() *solutes.Catalogue {
	if env.Substances != nil {
		return env.Substances
	}
	return solutes.Standard()
}

func unknownSubstance(c *solutes.Catalogue, name string) error {
	text := fmt.Sprintf("no substance %q in the catalogue", name)
	if near := c.Near(name, 3); len(near) > 0 {
		text += ": did you mean " + strings.Join(near, ", ") + "?"
	} else {
		text += ": dropcrest substances lists them"
	}
	return &InputError{"component", text}
}

func override(d *solutes.Datum, m scenario.Measure) {
	if m.Word == "" {
		*d = userDatum(m.Number)
	}
}

func userDatum(x float64) solutes.Datum {
	return solutes.Datum{Value: x, Source: "given in the scenario", Evidence: solutes.User}
}

// volumeShares turns the shares as given into volume shares that add up to 1.
func volumeShares(parts []solutes.Part, s scenario.Scenario) ([]atmos.Note, error) {
	asGiven, total := 0.0, 0.0
	for i := range parts {
		p := &parts[i]
		asGiven += p.Volume
		if s.SharesBy == "mass" && len(parts) > 1 {
			if !p.Substance.Density.Known() {
				return nil, &InputError{"component", fmt.Sprintf(
					"shares by mass need the density of every component, and that of %s is not known: give density=, or shares by volume", p.Substance.Name)}
			}
			p.Volume /= p.Substance.Density.Value
		}
		total += p.Volume
	}
	for i := range parts {
		parts[i].Volume /= total
	}
	if len(parts) < 2 || math.Abs(asGiven-1) <= 1e-9 {
		return nil, nil
	}
	return []atmos.Note{{
		Code:  "shares-scaled",
		Text:  fmt.Sprintf("The shares by %s add up to %s and are scaled to 1.", s.SharesBy, shortest(asGiven)),
		Input: "component",
	}}, nil
}

// shortest writes a number that a person gave, without the noise of sums.
func shortest(x float64) string { return fmt.Sprintf("%.6g", x) }
