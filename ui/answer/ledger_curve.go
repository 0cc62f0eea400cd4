package answer

import (
	"context"
	"slices"

	"dropcrest/koehler"
	"dropcrest/koehler/ledger"
	"dropcrest/solutes"
	"dropcrest/ui/scenario"
)

// particleFigures are those of one particle. The ledger's sizes are diameters, the
// Curve page's radii.
func particleFigures() []figureOf {
	half := func(x float64) float64 { return x / 2 }
	radius := func(x float64) string { return micrometres(x / 2) }
	return []figureOf{
		{"critical_supersaturation", "critical supersaturation", percent, func(x float64) float64 { return 100 * x }},
		{"critical_wet_radius", "critical wet radius", radius, half},
		{"haze_radius", "haze radius", radius, half},
	}
}

// curveCosts is the ledger of the Curve question.
func curveCosts(_ context.Context, env Env, s scenario.Scenario) (*costs, error) {
	a, err := askedOf(env, s)
	if err != nil {
		return nil, err
	}
	l, err := ledger.Make(a)
	if err != nil {
		return nil, recipeError(err)
	}
	c := &costs{asked: s, page: "Curve", figures: particleFigures(), plain: l.Plain.Values, full: l.Fullest.Values, models: l.Models,
		subject: nanometres(s.DryDiameter) + " nm of " + componentWords(s) + " at " + celsius(s.Temperature)}
	for _, r := range l.Rows {
		row := assumed{Assumption: r.Assumption, status: r.Status, reason: r.Reason, made: r.Made, change: r.Change, pressures: r.Pressures}
		if r.If != nil {
			row.ifSays, row.ifChange = r.If.Says, r.If.Change
		}
		c.rows = append(c.rows, row)
	}
	inputs := known(l.Inputs(), s)
	if c.budget, err = ledger.NewBudget(&l, inputs); err != nil {
		return nil, &InputError{"uncertainty", reason(err)}
	}
	c.notes = distinct(slices.Concat(waterNotes(s), l.Notes, unknownInputs(inputs, s)))
	return c, nil
}

// askedOf is the particle of a scenario as the ledger takes it.
func askedOf(env Env, s scenario.Scenario) (ledger.Asked, error) {
	recipe, _, err := newRecipe(env, s)
	if err != nil {
		return ledger.Asked{}, err
	}
	if s.Solubility == "limited" {
		recipe.Solubility = solutes.LimitedSolubility
	}
	a := ledger.Asked{Recipe: recipe, DryDiameter: s.DryDiameter, Mobility: s.DrySizeIs == "mobility", ShapeFactor: s.ShapeFactor,
		SaturationRatio: s.RelativeHumidity, Partitioning: s.Partitioning == "on", Kelvin: kelvinForm(s.Kelvin), TolmanLength: s.TolmanLength}
	if isExponential(s) {
		a.Form = koehler.Exponential
	}
	return a, nil
}
