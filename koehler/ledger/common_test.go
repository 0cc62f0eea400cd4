package ledger

import (
	"math"
	"testing"

	"dropcrest/solutes"
)

// asked is the default question about a substance of the catalogue.
func asked(t testing.TB, name string, dry float64) Asked {
	t.Helper()
	s, ok := solutes.Standard().Find(name)
	if !ok {
		t.Fatalf("no substance %q", name)
	}
	a := Asked{Recipe: solutes.Recipe{Parts: []solutes.Part{{Substance: s, Volume: 1}}, Model: solutes.IonInteraction,
		Kappa: math.NaN(), VantHoffFactor: math.NaN(), Solubility: solutes.LimitedSolubility, Temperature: 298.15},
		DryDiameter: dry, SaturationRatio: 0.95, Partitioning: true}
	if s.Adsorption != nil {
		a.Recipe.Adsorption = solutes.KnownAdsorption
	}
	return a
}
