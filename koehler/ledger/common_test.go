package ledger

import (
	"math"
	"testing"

	"dropcrest/koehler"
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

func ledgerOf(t testing.TB, a Asked) Ledger {
	t.Helper()
	l, err := Make(a)
	if err != nil {
		t.Fatal(err)
	}
	return l
}

func rowOf(t testing.TB, l Ledger, k Key) Row {
	t.Helper()
	for _, r := range l.Rows {
		if r.Key == k {
			return r
		}
	}
	t.Fatalf("no row %s", k)
	return Row{}
}

func within(t testing.TB, what string, got, want, tol float64) {
	t.Helper()
	if !(math.Abs(got-want) <= tol) {
		t.Errorf("%s: %.7g, want %.7g, tolerance %.2g", what, got, want, tol)
	}
}

// oneKappa is a particle that is known by its κ alone, in the water of its
// temperature.
func oneKappa(kappa, dry, temperature float64) Asked {
	return Asked{Recipe: solutes.Recipe{Kappa: kappa, VantHoffFactor: math.NaN(), Temperature: temperature},
		DryDiameter: dry, SaturationRatio: 0.95}
}

func crest(t testing.TB, p koehler.Particle) float64 {
	t.Helper()
	c, err := p.Crest()
	if err != nil {
		t.Fatal(err)
	}
	return c.Supersaturation
}

// filmOf is half ammonium sulfate, half an organic whose film has the constant k; the
// constants are invented.
func filmOf(t testing.TB, k float64) Asked {
	t.Helper()
	a := asked(t, "ammonium sulfate", 60e-9)
	acid := asked(t, "glutaric acid", 60e-9).Recipe.Parts[0].Substance
	a.Recipe.Parts = []solutes.Part{{Substance: a.Recipe.Parts[0].Substance, Volume: 0.5}, {Substance: acid, Volume: 0.5}}
	a.Recipe.TensionRule = solutes.Szyszkowski
	a.Recipe.Surface = &solutes.SurfaceActivity{GammaMax: datum(2e-6), K: datum(k), Floor: datum(0.03)}
	return a
}

func datum(x float64) solutes.Datum {
	return solutes.Datum{Value: x, Source: "invented", Evidence: solutes.User}
}
