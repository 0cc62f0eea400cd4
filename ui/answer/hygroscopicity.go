package answer

import (
	"math"

	"dropcrest/solutes"
	"dropcrest/ui/scenario"
)

// Hygroscopicity is κ at activation of each component, as the scenario or the
// catalogue has it, and of the particle mixed from them by volume. What is not
// known is NaN.
func Hygroscopicity(env Env, s scenario.Scenario) (each []float64, mixed float64) {
	s.WaterActivity, s.Kappa = "kappa", scenario.Measure{Word: "catalogue"}
	recipe, _, err := newRecipe(env, s)
	if err != nil {
		return nil, math.NaN()
	}
	for _, p := range recipe.Parts {
		kappa := math.NaN()
		if p.Substance.Kappa.Known() {
			kappa = p.Substance.Kappa.Value
		}
		each = append(each, kappa)
	}
	dissolved, _, err := solutes.Dissolve(recipe)
	if err != nil {
		return each, math.NaN()
	}
	return each, dissolved.Kappa
}
