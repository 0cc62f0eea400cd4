package koehler

import (
	"errors"
	"math"
	"testing"

	"dropcrest/solutes"
)

// A Making takes what a recipe is made of to the particle of that kind, and keeps
// size and form.
func TestMaking(t *testing.T) {
	m := Making{DryDiameter: 80e-9, Temperature: 290, Partitioning: true, Kelvin: Compressible, TolmanLength: 0.01e-9}
	dissolved := map[string]solutes.Dissolved{
		"soluble": {Solution: solutes.Kappa(0.3), Tension: solutes.ConstantTension(0.07)},
		"core":    {Core: &solutes.Core{A: 2.25, B: 1.2, SolubleShare: 0.1, Kappa: 0.6}, Tension: solutes.ConstantTension(0.07)},
		"film":    {Film: &solutes.Film{Share: 0.6, Density: 1400, MolarMass: 0.15, GammaMax: 2e-6, K: 0.5, Floor: 0.03, RestShare: 0.4, RestKappa: 0.6}},
	}
	for name, d := range dissolved {
		p, err := m.Of(d)
		if err != nil {
			t.Errorf("%s: %v", name, err)
			continue
		}
		if p.DryDiameter != 80e-9 || p.Temperature != 290 || p.Kelvin != Compressible || p.TolmanLength != 0.01e-9 {
			t.Errorf("%s: %+v", name, p)
		}
		if c, err := p.Crest(); err != nil || !(c.Supersaturation > 0) {
			t.Errorf("%s: crest %v, %v", name, c.Supersaturation, err)
		}
		bad := m
		bad.DryDiameter = math.NaN()
		if _, err := bad.Of(d); err == nil {
			t.Errorf("%s: no error without a size", name)
		}
	}
	exponential := m
	exponential.Form = Exponential
	a, _ := m.Of(dissolved["core"])
	b, _ := exponential.Of(dissolved["core"])
	if a.AtWater(0.1).WaterActivity == b.AtWater(0.1).WaterActivity {
		t.Error("both forms of the soluble share give the same activity")
	}
	m.TolmanLength = -1
	if _, err := m.Of(dissolved["soluble"]); !errors.Is(err, ErrInput) {
		t.Errorf("error %v of a Tolman length of -1 m", err)
	}
}
