package answer

import (
	"math"
	"strings"

	"dropcrest/solutes"
)

// Model is the water-activity model that counts for a substance alone.
type Model struct {
	Says          string  // in words, with its source and how far it reaches
	LeastActivity float64 // water activity down to which it reaches; NaN: no such end
}

// ModelOf is the most detailed model that is known of a substance at 25 °C: that of
// ion interaction, or what stands in for it. Adsorption counts for insoluble matter.
func ModelOf(s solutes.Substance) Model {
	const reference = 298.15 // K
	r := solutes.Recipe{Parts: []solutes.Part{{Substance: s, Volume: 1}}, Model: solutes.IonInteraction,
		Kappa: math.NaN(), VantHoffFactor: math.NaN(), Temperature: reference}
	if s.Insoluble() && s.Adsorption != nil {
		r.Adsorption = solutes.KnownAdsorption
	}
	d, _, err := solutes.Dissolve(r)
	if err != nil {
		return Model{"none: " + reason(err), math.NaN()}
	}
	var words []string
	for _, m := range d.Models {
		words = append(words, strings.TrimPrefix(m, s.Name+": "))
	}
	m := Model{strings.Join(words, "; "), math.NaN()}
	if least := d.Solution.LeastWater(); least > 0 {
		lnaw, _ := d.Solution.LnActivity(least)
		m.LeastActivity = math.Exp(lnaw)
	}
	return m
}
