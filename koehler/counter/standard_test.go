package counter

import (
	"errors"
	"math"
	"testing"

	"dropcrest/koehler"
	"dropcrest/solutes"
)

func salt(t testing.TB, name string) solutes.Substance {
	t.Helper()
	s, ok := solutes.Standard().Find(name)
	if !ok {
		t.Fatalf("%s is not in the catalogue", name)
	}
	return s
}

// sulfate is dry ammonium sulfate by ion interaction at 25 °C.
func sulfate(t testing.TB) Standard {
	return SaltStandard(salt(t, "ammonium sulfate"), solutes.IonInteraction, 298.15, Classifier{})
}

// Van 't Hoff with the constants of the public LExNO workshop note, basis of
// Snider et al. 2010, J. Geophys. Res.; s_c computed. The figures are those of the
// exponential form ln a_w = -i n_s/n_w. The mole-fraction form, which is that of the
// recipe, is κ²/2u² above it in ln a_w: 0.1 % of s_c at 1 %, nothing at 0.1 %. Then
// the mole-fraction form against κ 0.61 with the same A, where that drops out.
func TestPublishedVantHoff(t *testing.T) {
	s := salt(t, "ammonium sulfate")
	s.Density.Value, s.MolarMass.Value = 1770, 0.13214
	w := SaltStandard(s, solutes.VantHoff, 298.15, Classifier{})
	w.ShapeFactor, w.Recipe.VantHoffFactor = 1, 2.280
	w.Recipe.TensionRule, w.Recipe.Tension = solutes.FixedTension, 0.0722
	k := w
	k.Recipe.Model, k.Recipe.Kappa = solutes.KappaModel, 0.61
	exponential := koehler.Particle{
		Temperature: 298.15, Tension: solutes.ConstantTension(0.0722),
		Solution: solutes.IdealOsmotic(solutes.VantHoffKappa(2.280, 0.13214, 1770, 997)),
	}
	want := []float64{0.9636, 0.4477, 0.2212, 0.1583, 0.0862}
	for i, nm := range []float64{30, 50, 80, 100, 150} {
		crest, err := exponential.Sized(nm * 1e-9).Crest()
		if err != nil {
			t.Fatal(err)
		}
		near(t, "s_c, %", 100*crest.Supersaturation, want[i], 1e-4)
		got, err := w.Supersaturation(nm * 1e-9)
		if err != nil {
			t.Fatal(err)
		}
		near(t, "s_c of the mole-fraction form, %", 100*got, want[i], 1e-4+0.0013*want[i]*want[i])
		simple, err := k.Supersaturation(nm * 1e-9)
		if err != nil {
			t.Fatal(err)
		}
		near(t, "ratio", got/simple, 1.0505, 0.002)
	}
}

func TestSensitivities(t *testing.T) {
	s := sulfate(t)
	s.ShapeFactor = 1.02
	c, err := s.Critical(80e-9)
	if err != nil {
		t.Fatal(err)
	}
	// s_c ∝ A^3/2 Dd^-3/2 κ^-1/2; the osmotic coefficient makes them a little less
	near(t, "sizing", c.Sensitivity.Dry, -1.5, 0.06)
	near(t, "tension", c.Sensitivity.Tension, 1.5, 0.06)
	near(t, "temperature", c.Sensitivity.Temperature, -0.0081, 0.0008) // computed for the project: -4.1 % for 5 K
	if c.Sensitivity.Shape < 0.4 || c.Sensitivity.Shape > 1.5 {
		t.Errorf("shape %g, want about 0.8: a less dense particle is smaller than it looks", c.Sensitivity.Shape)
	}
	if !(c.DryDiameter < c.MobilityDiameter) {
		t.Errorf("volume-equivalent %g of mobility %g", c.DryDiameter, c.MobilityDiameter)
	}
	// The same with a tension that depends on the solution.
	w := s
	w.Recipe.TensionRule = solutes.SolutionRule
	d, err := w.Critical(80e-9)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "tension of the solution", d.Sensitivity.Tension, c.Sensitivity.Tension, 0.02)
}

// The choice of the model is worth 5 %.
func TestSpreadOfModels(t *testing.T) {
	choices := sulfate(t).Spread(80e-9)
	least, most := math.Inf(1), 0.0
	for _, c := range choices {
		if c.Fault != "" {
			t.Errorf("%s: %s", c.Model, c.Fault)
			continue
		}
		least, most = math.Min(least, c.Supersaturation), math.Max(most, c.Supersaturation)
	}
	if len(choices) != 3 || most/least < 1.03 || most/least > 1.3 {
		t.Errorf("%d models from %.4f to %.4f %%", len(choices), 100*least, 100*most)
	}
	if own, err := sulfate(t).Supersaturation(80e-9); err != nil || own != choices[0].Supersaturation {
		t.Errorf("the own model is not first: %v", choices)
	}
}

func TestStandardsThatCannotBeUsed(t *testing.T) {
	s := sulfate(t)
	if _, err := s.Supersaturation(-1); !errors.Is(err, ErrInput) {
		t.Errorf("negative size: %v", err)
	}
	s.ShapeFactor = 0.1
	if _, err := s.Critical(1e-7); !errors.Is(err, ErrInput) {
		t.Errorf("shape factor 0.1: %v", err)
	}
	s = sulfate(t)
	s.Recipe.Temperature = 0
	if _, err := s.Critical(1e-7); err == nil || errors.Is(err, koehler.ErrNoCrest) {
		t.Errorf("0 K: %v", err)
	}
	s = SaltStandard(solutes.Substance{Name: "nothing"}, solutes.IonInteraction, 298.15, Classifier{})
	if _, err := s.Critical(1e-7); err == nil {
		t.Error("a salt without data activates")
	}
}
