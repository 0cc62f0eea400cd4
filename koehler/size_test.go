package koehler

import (
	"errors"
	"math"
	"math/rand/v2"
	"testing"

	"dropcrest/solutes"
)

// matters are particles of every kind of matter at one dry size, made as their
// users make them.
func matters(t testing.TB, dry float64) map[string]Particle {
	const T = 298.15
	must := func(p Particle, err error) Particle {
		t.Helper()
		if err != nil {
			t.Fatal(err)
		}
		return p
	}
	of := func(s solutes.Solution) Particle {
		return Particle{DryDiameter: dry, Temperature: T, Solution: s}
	}
	organic := Surfactant{Share: 0.8, Density: 1100, MolarMass: 0.3, GammaMax: 2e-6, K: 20, Floor: 0.035, Partitioning: true}
	return map[string]Particle{
		"kappa": of(solutes.Kappa(0.3)),
		"salt":  of(ammoniumSulfate()),
		"limited": of(mustMix(t, solutes.LimitedPart{Volume: 0.9, Kappa: 0.15, Solubility: 0.01},
			solutes.LimitedPart{Volume: 0.1, Kappa: 0.6, Solubility: math.Inf(1)})),
		"barely soluble": of(mustMix(t, solutes.LimitedPart{Volume: 1, Kappa: 0.096, Solubility: 0.0183})),
		"film":           must(Adsorption{A: 2.25, B: 1.2}.Particle(dry, T)),
		"coated film":    must(Adsorption{A: 2.25, B: 1.2, SolubleShare: 0.1, Kappa: 0.6}.Particle(dry, T)),
		"surface-active": must(organic.Particle(dry, T, Salt{Share: 0.2, Kappa: 0.61})),
	}
}

// Another dry size of the same matter is the particle that is made at that size.
func TestSized(t *testing.T) {
	made := matters(t, 45e-9)
	for name, p := range matters(t, 120e-9) {
		got, err := p.Sized(45e-9).Crest()
		want, also := made[name].Crest()
		if err != nil || also != nil {
			t.Errorf("%s: %v, %v", name, err, also)
			continue
		}
		checkClose(t, name+" s_c", got.Supersaturation, want.Supersaturation, 1e-12)
		checkClose(t, name+" D_c", got.WetDiameter, want.WetDiameter, 1e-8)
		if got.Kind != want.Kind || got.Place != want.Place {
			t.Errorf("%s: %+v, made at that size %+v", name, got, want)
		}
	}
}

func TestInverseOfEveryMatter(t *testing.T) {
	for _, dry := range []float64{30e-9, 100e-9, 300e-9} {
		for name, p := range matters(t, dry) {
			crest, err := p.Crest()
			if err != nil {
				t.Fatal(name, err)
			}
			got, err := p.Sized(77e-9).ActivatedDryDiameter(crest.Supersaturation)
			if err != nil {
				t.Errorf("%s: %v", name, err)
			}
			checkClose(t, name, got, dry, 1e-9)
		}
	}
}

// The crest falls with the dry size, which the inverse relies on.
func TestCrestFallsWithDrySize(t *testing.T) {
	rng := rand.New(rand.NewPCG(14, 15))
	for range 100 {
		mix := mustMix(t, randomMixture(rng)...)
		s, _ := randomSurface(t, rng)
		surface := s
		all := []Particle{
			{DryDiameter: 1e-7, Temperature: 298.15, Solution: mix},
			{DryDiameter: s.dry, Temperature: 298.15, Solution: surface, Tension: surface},
		}
		for _, p := range all {
			last := math.Inf(1)
			for _, dry := range []float64{15e-9, 22e-9, 33e-9, 50e-9, 75e-9, 120e-9, 400e-9} {
				crest, err := p.Sized(dry).Crest()
				if err != nil {
					t.Fatalf("%+v: %v", p, err)
				}
				if !(crest.Supersaturation < last) {
					t.Errorf("%+v: the crest rises to %v at %v m", p.Solution, crest.Supersaturation, dry)
				}
				last = crest.Supersaturation
			}
		}
	}
}

func TestMatterOfAnotherSizeIsRefused(t *testing.T) {
	for name, p := range matters(t, 100e-9) {
		_, depends := p.Solution.(SizeDependent)
		p.DryDiameter = 50e-9
		if err := p.Check(); errors.Is(err, ErrInput) != depends {
			t.Errorf("%s: error %v, depends on size %t", name, err, depends)
		}
	}
	if _, err := (Adsorption{A: 1, B: 1}).Particle(-1, 298.15); !errors.Is(err, ErrInput) {
		t.Errorf("film of negative size: %v", err)
	}
	var unusable *solutes.UnusableError
	if _, err := (Surfactant{}).Particle(1e-7, 298.15, Salt{}); !errors.As(err, &unusable) {
		t.Errorf("organic of nothing: %v", err)
	}
}

// A bare film has no cubic form, a coated one that of its soluble share.
func TestTextbookOfFilms(t *testing.T) {
	all := matters(t, 100e-9)
	if _, err := all["film"].Textbook(); !errors.Is(err, ErrNoSolution) {
		t.Errorf("bare film: %v", err)
	}
	if kappa := all["coated film"].DiluteKappa(); math.Abs(kappa-0.06) > 1e-15 {
		t.Errorf("coat: κ %v, want 0.06", kappa)
	}
}
