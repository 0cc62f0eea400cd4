package koehler

import (
	"errors"
	"math"
	"math/rand/v2"
	"testing"

	"dropcrest/atmos"
	"dropcrest/solutes"
)

// additive swells as no Swelling at all does, but is one.
type additive struct{}

func (additive) Swell(u float64) (v, slope float64) { return 1 + u, u }

// The exact solver and the scan between dissolution points agree; other forms
// of the Kelvin term turn at nearly the same places.
func TestTurnsOfLimitedSolubility(t *testing.T) {
	rng := rand.New(rand.NewPCG(10, 11))
	for range 200 {
		p := Particle{DryDiameter: 10e-9 * math.Exp(4*rng.Float64()), Temperature: 285, Solution: mustMix(t, randomMixture(rng)...)}
		exact, err := p.Turns(nil)
		if err != nil {
			t.Fatal(err)
		}
		swelling := p
		swelling.Swelling = additive{}
		scanned, err := swelling.Turns(nil)
		if err != nil || len(scanned) != len(exact) {
			t.Fatalf("%+v: scan %+v %v, exact %+v", p, scanned, err, exact)
		}
		for i, want := range exact {
			if got := scanned[i]; got.Kind != want.Kind || apart(got.GrowthFactor, want.GrowthFactor) > 1e-9 || math.Abs(got.Supersaturation-want.Supersaturation) > 1e-13 {
				t.Errorf("%+v: scan %+v, exact %+v", p, got, want)
			}
			e := p.AtTurn(want)
			lnS, _ := p.LnSaturation(math.Max(want.Water, 1e-30))
			if e.Kind != want.Kind || e.Supersaturation != want.Supersaturation || apart(e.SaturationRatio, math.Exp(lnS)) > 1e-12 ||
				e.WetDiameter != p.DryDiameter*want.GrowthFactor || e.Kind == BoundaryMaximum && e.WetDiameter != p.DryDiameter ||
				apart(e.WaterActivity*e.KelvinFactor, e.SaturationRatio) > 1e-12 {
				t.Errorf("%+v: state %+v at %+v", p, e, want)
			}
		}
		p.Kelvin = Compressible
		compressed, err := p.Turns(nil)
		if err != nil || len(compressed) == 0 {
			t.Fatalf("%+v: %+v %v", p, compressed, err)
		}
		i, _ := Barrier(exact)
		j, _ := Barrier(compressed)
		if compressed[j].Supersaturation > exact[i].Supersaturation {
			t.Errorf("%+v: the compressible barrier %+v is not below %+v", p, compressed[j], exact[i])
		}
	}
}

// The floor of a surface-active particle is a kink that both solvers know.
func TestTurnsOfSurfaceActive(t *testing.T) {
	rng := rand.New(rand.NewPCG(12, 13))
	kinks := 0
	for range 100 {
		s, dry := randomSurface(t, rng)
		const T = 290
		s = mustSurface(t, dry, T, s.p, s.salt)
		p := Particle{DryDiameter: dry, Temperature: T, Solution: s, Tension: s}
		want := s.Extrema(nil)
		got, err := p.Turns(nil)
		if err != nil || len(got) != len(want) {
			t.Fatalf("%+v: particle %+v %v, by itself %+v", s.p, got, err, want)
		}
		for i, w := range want {
			if w.Kind == KinkMinimum {
				kinks++
			}
			if got[i].Kind != w.Kind || apart(got[i].GrowthFactor, w.GrowthFactor) > 1e-7 || math.Abs(got[i].Supersaturation-w.Supersaturation) > 1e-13 {
				t.Errorf("%+v: particle %+v, by itself %+v", s.p, got[i], w)
			}
		}
	}
	if kinks == 0 {
		t.Error("no kink among them: too easy a test")
	}
}

func TestTurnsOfOtherParticles(t *testing.T) {
	const dry, T = 80e-9, 293.15
	kelvin := KelvinLength(atmos.SurfaceTension(T), T)
	for _, f := range films {
		want, err := AdsorptionExtrema(nil, dry, kelvin, f.p)
		if err != nil {
			t.Fatal(err)
		}
		got, err := Particle{DryDiameter: dry, Temperature: T, Solution: f.p.On(dry)}.Turns(nil)
		if err != nil || len(got) != len(want) {
			t.Errorf("%s: particle %+v %v, by itself %+v", f.name, got, err, want)
			continue
		}
		for i := range want {
			if got[i].Kind != want[i].Kind || math.Abs(got[i].Supersaturation-want[i].Supersaturation) > 1e-13 {
				t.Errorf("%s: particle %+v, by itself %+v", f.name, got[i], want[i])
			}
		}
	}
	turns, err := Particle{DryDiameter: dry, Temperature: T, Solution: solutes.Kappa(0.61)}.Turns(nil)
	if kappa := SolveKappa(dry, kelvin, 0.61); err != nil || len(turns) != 1 || apart(turns[0].Supersaturation, kappa.Supersaturation) > 1e-14 {
		t.Errorf("κ: %+v %v, want %+v", turns, err, kappa)
	}
	if _, err := (Particle{DryDiameter: -1, Temperature: T, Solution: solutes.Kappa(0.61)}).Turns(nil); !errors.Is(err, ErrInput) {
		t.Errorf("negative size: %v, want ErrInput", err)
	}
}
