package koehler

import (
	"errors"
	"math"
	"math/rand/v2"
	"testing"

	"dropcrest/atmos"
	"dropcrest/solutes"
)

// crystal is a particle of one salt of the catalogue and its phases.
func crystal(t testing.TB, name string, dry, T float64) (Particle, solutes.Phases) {
	t.Helper()
	s, ok := solutes.Standard().Find(name)
	if !ok {
		t.Fatalf("no %s", name)
	}
	salt, err := solutes.NewSalt(solutes.SaltInput{
		Ion: s.Ion, Concentrated: s.Concentrated, MolarMass: s.MolarMass.Value,
		Density: s.Density.Value, WaterDensity: atmos.WaterDensity(T), Temperature: T,
	})
	if err != nil {
		t.Fatal(err)
	}
	phases, _ := solutes.PhasesOf([]solutes.Part{{Substance: s, Volume: 1}}, T)
	return Particle{DryDiameter: dry, Temperature: T, Solution: salt}, phases
}

func TestHysteresis(t *testing.T) {
	const T = 298.15
	p, flat := crystal(t, "ammonium sulfate", 100e-9, T)
	dry, wet := solutes.CrystalBranch, solutes.SolutionBranch
	for _, c := range []struct {
		name    string
		S       float64
		history solutes.History
		now     solutes.Branch
		several bool
	}{
		{"dried out", 0.30, solutes.Falling, dry, false},
		{"never wet", 0.30, solutes.Rising, dry, false},
		{"wetted, below deliquescence", 0.70, solutes.Rising, dry, true},
		{"drying, above efflorescence", 0.70, solutes.Falling, wet, true},
		{"wetted", 0.90, solutes.Rising, wet, false},
		{"drying", 0.90, solutes.Falling, wet, false},
		{"above saturation", 1.0005, solutes.Rising, wet, false},
	} {
		h, err := p.Hysteresis(c.S, flat, c.history)
		if err != nil {
			t.Errorf("%s: %v", c.name, err)
			continue
		}
		if h.Now.Branch != c.now || h.Several != c.several || h.Several == (h.Other.Branch == solutes.BranchUnknown) {
			t.Errorf("%s: %+v", c.name, h)
		}
		if h.Now.Branch == dry && (h.Now.WetDiameter != p.DryDiameter || h.Now.Water != 0 || h.Now.SaturationRatio == 0) {
			t.Errorf("%s: a dry particle of %+v", c.name, h.Now)
		}
		if haze, _, _ := p.Haze(c.S); h.Now.Branch == wet && h.Now.State != haze {
			t.Errorf("%s: a drop of %+v, haze %+v", c.name, h.Now, haze)
		}
	}
	crest, _ := p.Crest()
	if _, err := p.Hysteresis(crest.SaturationRatio, flat, solutes.Rising); !errors.Is(err, ErrAboveCrest) {
		t.Errorf("at the crest: %v", err)
	}
}

// The branch changes at the humidities over the particle, and these approach
// those of a flat surface as the particle grows.
func TestHysteresisChangesAtItsHumidities(t *testing.T) {
	for _, name := range []string{"ammonium sulfate", "sodium chloride"} {
		last := solutes.Phases{Dissolved: math.Inf(1), Efflorescence: math.Inf(1)}
		for _, dry := range []float64{8e-9, 30e-9, 100e-9, 1e-6, 20e-6} {
			p, flat := crystal(t, name, dry, 298.15)
			h, err := p.Hysteresis(0.7, flat, solutes.Rising)
			if err != nil {
				t.Fatal(name, err)
			}
			for _, edge := range []struct {
				S       float64
				history solutes.History
			}{{h.Over.Dissolved, solutes.Rising}, {h.Over.Efflorescence, solutes.Falling}} {
				below, err1 := p.Hysteresis(edge.S*(1-1e-9), flat, edge.history)
				above, err2 := p.Hysteresis(edge.S*(1+1e-9), flat, edge.history)
				if err1 != nil || err2 != nil || below.Now.Branch != solutes.CrystalBranch || above.Now.Branch != solutes.SolutionBranch {
					t.Errorf("%s of %v m at S = %v: below %+v %v, above %+v %v", name, dry, edge.S, below.Now, err1, above.Now, err2)
				}
			}
			if !(h.Over.Dissolved < last.Dissolved && h.Over.Efflorescence < last.Efflorescence &&
				h.Over.Dissolved > flat.Dissolved && h.Over.Efflorescence > flat.Efflorescence) {
				t.Errorf("%s of %v m: %+v after %+v, flat %+v", name, dry, h.Over, last, flat)
			}
			last = h.Over
		}
		_, flat := crystal(t, name, 1, 298.15)
		checkClose(t, name+" large", last.Dissolved, flat.Dissolved, 1e-4)
	}
}

// Deliquescence of NaCl nanoparticles, 75 % at 60 nm and 87 % at 6 nm of mobility
// diameter: Biskos et al., Atmos. Chem. Phys. 6, 4633, 2006 (from memory). Ours
// leaves out the crystal's own surface and so must lie above, by 1 to 2 % of
// humidity at 60 nm (a rounded value, and the shape factor is left out) and by a
// few percent at 6 nm.
func TestDeliquescenceOfNanoparticles(t *testing.T) {
	for _, c := range []struct{ dry, published, above float64 }{{60e-9, 0.75, 0.025}, {6e-9, 0.87, 0.06}} {
		p, flat := crystal(t, "sodium chloride", c.dry, 298.15)
		h, err := p.Hysteresis(0.6, flat, solutes.Rising)
		if err != nil {
			t.Fatal(err)
		}
		t.Logf("%v m: %.4f, published %v", c.dry, h.Over.Dissolved, c.published)
		if d := h.Over.Dissolved - c.published; d < 0 || d > c.above {
			t.Errorf("%v m: %.4f, published %v", c.dry, h.Over.Dissolved, c.published)
		}
	}
}

func TestHysteresisWithGaps(t *testing.T) {
	p, flat := crystal(t, "sodium chloride", 80e-9, 298.15)
	nan := math.NaN()
	unknown := solutes.Phases{Uptake: nan, Dissolved: nan, Efflorescence: nan}
	if h, err := p.Hysteresis(0.7, unknown, solutes.Rising); err != nil || h.Several || h.Now.Branch != solutes.BranchUnknown || !(h.Now.WetDiameter > p.DryDiameter) || !math.IsNaN(h.Over.Dissolved) {
		t.Errorf("nothing known: %+v %v", h, err)
	}
	liquid := solutes.Phases{}
	if h, err := p.Hysteresis(0.2, liquid, solutes.Rising); err != nil || h.Several || h.Now.Branch != solutes.SolutionBranch || h.Over.Dissolved != 0 {
		t.Errorf("always liquid: %+v %v", h, err)
	}
	if h, err := p.Hysteresis(0.2, liquid, solutes.Falling); err != nil || !h.Now.Extrapolated {
		t.Errorf("beyond the model: %+v %v", h, err)
	}
	mutual := solutes.Phases{Uptake: 0.6, Dissolved: nan, Efflorescence: nan}
	if h, err := p.Hysteresis(0.7, mutual, solutes.Rising); err != nil || h.Now.Branch != solutes.PartlyDissolved || !math.IsNaN(h.Now.WetDiameter) {
		t.Errorf("partly dissolved: %+v %v", h, err)
	}
	sparing := flat
	sparing.Dissolved = 0.99999
	if _, err := p.Hysteresis(0.7, sparing, solutes.Rising); !errors.Is(err, ErrNoSolution) {
		t.Errorf("dissolves beyond the crest: %v", err)
	}
}

// All dissolved is LimitedDissolved, whatever the mixture.
func TestDissolved(t *testing.T) {
	rng := rand.New(rand.NewPCG(18, 19))
	kelvin := KelvinLength(atmos.SurfaceTension(293.15), 293.15)
	for range 200 {
		mix := mustMix(t, randomMixture(rng)...)
		p := Particle{DryDiameter: 80e-9, Temperature: 293.15, Solution: mix}
		d, ok := p.Dissolved()
		if ok != (mix.Points() > 0) {
			t.Fatalf("%+v: dissolves %t", mix, ok)
		}
		crest, err := d.Crest()
		want := LimitedDissolved(80e-9, kelvin, mix)
		if err != nil || crest.Kind != want.Kind || apart(crest.GrowthFactor, want.GrowthFactor) > 1e-9 || math.Abs(crest.Supersaturation-want.Supersaturation) > 1e-14 {
			t.Errorf("%+v: %+v %v, want %+v", mix, crest, err, want)
		}
		if p, _ := p.Crest(); p.Supersaturation < crest.Supersaturation*(1-1e-12) {
			t.Errorf("%+v: started dry %v, dissolved %v", mix, p.Supersaturation, crest.Supersaturation)
		}
	}
	salt, _ := crystal(t, "sodium chloride", 80e-9, 298.15)
	if d, ok := salt.Dissolved(); ok || d.Solution != salt.Solution {
		t.Error("a salt is no mixture of limited solubility")
	}
}
